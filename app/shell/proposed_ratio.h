// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>
#include <vector>

#include "core/book/model.h"

namespace filial::app {

/// Generations offered for a new cross, as the trade writes them.
inline constexpr const char* kGenerations[] = {"F2", "test cross", "F3", "other"};

/// The ratio to begin with, derived by the inheritance engine from the generation and the traits: two levels, the first
/// dominant; three levels, the middle one the heterozygote. "" where it says nothing (another generation, more levels,
/// more than three traits).
std::string proposedRatio(const std::string& generation, const std::vector<book::Trait>& traits);

} // namespace filial::app
