// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>

#include "core/families/heterogeneity.h"
#include "core/fit/goodness_of_fit.h"
#include "core/inheritance/derive.h"
#include "core/report/cross_analysis.h"

// Terms. Results as JSON text: numbers read back to the identical double, what does not apply is null. The schema
// stands in resources/help/headless.md.
namespace filial::report {

[[nodiscard]] std::string to_json(const fit::GoodnessOfFit& result);
[[nodiscard]] std::string to_json(const families::Heterogeneity& result);
/// `per_family` (with its label), `totals`, `heterogeneity`, and the families left out of them by label.
[[nodiscard]] std::string to_json(const CrossAnalysis& result);
/// What `filial families` answers: as for Heterogeneity, with labels and the families left out.
[[nodiscard]] std::string families_json(const CrossAnalysis& result);
[[nodiscard]] std::string to_json(const inheritance::Derivation& result);

} // namespace filial::report
