// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/sample.h"

// Terms. The exact P of two possible classes adds the binomial probabilities of all outcomes at least as far off as the
// one observed, in a named order. Outcomes tied with it count; a tie band says which are tied.
namespace filial::fit {

/// Nothing fitted, N >= 1, exactly two possible cells, no impossible one. Ties of the X2 order with whole weights are
/// integers; else |s - s_obs| <= 1e-12 max(1, s_obs), s = X2, G or -2 ln(probability). Any N up to Count::kLargest.
[[nodiscard]] Exact exact_two_class(const Sample& sample, Order order);

/// The exact two-sided P of one class of `observed` in n against its probability, probability order. With whole weights
/// p = weight / weight_total. 0 < p < 1.
[[nodiscard]] Tail exact_class_p(const Sample& sample, const Cell& cell);

} // namespace filial::fit
