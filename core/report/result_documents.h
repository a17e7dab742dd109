// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>

#include "core/inheritance/derive.h"
#include "core/report/cross_analysis.h"
#include "core/report/document.h"

// Terms. The readable answers of the command line, as documents made of the report's sections.
namespace filial::report {

/// Counts given as arguments.
[[nodiscard]] Document score_document(const fit::GoodnessOfFit& result);
/// The families of a file one by one and together. `analysis` was made of `cross`.
[[nodiscard]] Document cross_score_document(const book::Cross& cross, const CrossAnalysis& analysis);
/// Whether the families of a file agree.
[[nodiscard]] Document families_document(const book::Cross& cross, const CrossAnalysis& analysis);
/// Genotypes and classes of a derived cross; `input` is what it was derived from.
[[nodiscard]] Document derivation_document(const inheritance::DeriveInput& input,
                                           const inheritance::Derivation& derivation);

} // namespace filial::report
