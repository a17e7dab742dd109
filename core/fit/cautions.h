// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/sample.h"

namespace filial::fit {

/// Fills cautions and proposed_joins: small expected counts (common practice: all above 5; Cochran 1954: none below 1,
/// at most a fifth below 5), a fit that is too good (left tail below 0.025), joins chosen after seeing the counts,
/// counts that look like percentages, and classes that look as if they stood in another order than the ratio.
void set_cautions(GoodnessOfFit& result, const Sample& sample);

} // namespace filial::fit
