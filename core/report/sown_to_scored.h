// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <optional>
#include <vector>

#include "core/book/model.h"
#include "core/report/cross_analysis.h"

// Terms. Sown, emerged, alive and scored are the stages a seed passes; what is lost between them was never classed, and
// the question is whether its classes could change the verdict.
namespace filial::report {

/// Stages of one family that hold more than an earlier one; says so and refuses nothing.
[[nodiscard]] std::vector<Message> stage_hints(const book::Family& family, std::size_t class_count);

/// Sums over the families in the totals, and for each class the verdict were every lost one of it. `totals` is their
/// test (null: nothing tested). Empty where no family has any of the numbers.
[[nodiscard]] std::optional<SownToScored> sown_to_scored(const std::vector<const book::Family*>& families,
                                                         std::int64_t scored, const fit::GoodnessOfFit* totals,
                                                         const CancellationToken& cancel);

} // namespace filial::report
