// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/sample.h"

namespace filial::fit {

/// The P that decides: the exact one where there is one and the method is not chi-square, else chi-square's; empty
/// where nothing could be tested.
[[nodiscard]] std::optional<Tail> deciding_p(const GoodnessOfFit& result);

/// Fills verdict, verdict_sentence, meaning and rescuing_error_rate from the tests already in `result`.
void set_verdict(GoodnessOfFit& result, const Sample& sample);

} // namespace filial::fit
