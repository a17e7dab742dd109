// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <vector>

#include "core/fit/sample.h"

namespace filial::fit {

/// Every charge to the degrees of freedom, in the order shown; the charges add to df (Fisher 1922, 1924). Classes,
/// total fixed, fitted and joined are listed even where they cost nothing.
[[nodiscard]] std::vector<Charge> degrees_of_freedom_account(const Input& input, const Sample& sample,
                                                             const std::vector<std::string>& cell_labels, int fitted);

[[nodiscard]] int sum_of_charges(const std::vector<Charge>& account);

} // namespace filial::fit
