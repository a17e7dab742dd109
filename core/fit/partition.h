// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <vector>

#include "core/fit/goodness_of_fit.h"

namespace filial::fit {

/// The parts of X2 that belong to each trait and to their associations, for a ratio that is a product over the traits,
/// nothing fitted and nothing joined; the parts add to X2. Source: Mather 1938, The Measurement of Linkage in Heredity;
/// 1951. For a set S of factors h_S = sum over T in S of (-1)^(|S|-|T|) phat_T / p_T, X2_S = N sum p_S h_S^2,
/// df = product of (levels - 1).
[[nodiscard]] Maybe<std::vector<PartitionRow>> partition_by_traits(const Input& input);

} // namespace filial::fit
