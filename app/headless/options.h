// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/headless/arguments.h"
#include "core/inheritance/hypothesis.h"
#include "core/report/cross_analysis.h"

// The options several verbs share, read and checked; errors name the option.
namespace filial::app {

[[nodiscard]] OptionNames test_options(); ///< --ratio, --join, --fitted, --alpha, --select, --method …, --json

/// --alpha, --method, --order, --replicates, --seed.
[[nodiscard]] Result<report::AnalysisOptions> analysis_options(const Arguments& arguments);
/// --ratio; it has to be given.
[[nodiscard]] Result<inheritance::Hypothesis> ratio_option(const Arguments& arguments);
/// --join, from 1 on the command line, from 0 here.
[[nodiscard]] Result<std::vector<std::vector<std::size_t>>> join_option(const Arguments& arguments,
                                                                        std::size_t classes);
[[nodiscard]] Result<int> fitted_option(const Arguments& arguments);

} // namespace filial::app
