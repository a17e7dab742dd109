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
[[nodiscard]] std::string to_json(const CrossAnalysis& result); ///< per_family, totals, heterogeneity
[[nodiscard]] std::string to_json(const inheritance::Derivation& result);

} // namespace filial::report
