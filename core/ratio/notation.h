// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>
#include <vector>

// Internal to core/ratio.
namespace filial::ratio {

/// The tidied notation of terms as typed: ", " between fractions, ":" otherwise.
[[nodiscard]] std::string joined_notation(const std::vector<std::string>& typed);

} // namespace filial::ratio
