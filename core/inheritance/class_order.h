// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <algorithm>
#include <string>

#include "core/inheritance/hypothesis.h"

namespace filial::inheritance {

/// The hypothesis as a person reads it beside the classes: a ratio whose terms were moved in the order of the classes
/// (9:1:3:3 for 9:3:3:1 with its last term at the second class), anything else as written.
[[nodiscard]] inline std::string notation_in_class_order(const Hypothesis& hypothesis) {
    const bool moved = !std::is_sorted(hypothesis.binding().begin(), hypothesis.binding().end());
    return moved && hypothesis.ratio() != nullptr ? hypothesis.ratio()->notation() : hypothesis.notation();
}

} // namespace filial::inheritance
