// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <vector>

#include "core/fit/sample.h"

namespace filial::fit {

/// The noncentrality at which a chi-square test at alpha with df degrees of freedom has this power; alpha < power < 1.
/// Cohen 1988: w = sqrt(lambda / N).
[[nodiscard]] double noncentrality_for_power(double power, double alpha, int df);

/// The departures a sample of this size would notice, at power 0.8 and 0.9. The percentage points are about the class
/// whose share would need to move least, the others keeping their proportions: a move of d in a class of probability p
/// is w = d / sqrt(p(1-p)), so it is the class with the smallest p(1-p) whose share can move by d both ways.
/// Empty where df < 1, no plant is scored, or alpha is not below the power.
[[nodiscard]] std::vector<Detectable> detectable_departures(const Sample& sample, double alpha, int df);

} // namespace filial::fit
