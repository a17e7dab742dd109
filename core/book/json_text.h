// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>
#include <string_view>

#include <nlohmann/json_fwd.hpp>

#include "core/numeric/result.h"

// Terms. JSON text is untrusted: depth, number of values and doubled keys are limited while it is parsed, before
// anything is made of it.
namespace filial::book {

using Json = nlohmann::json;
using OrderedJson = nlohmann::ordered_json;

inline constexpr std::size_t kDeepestNesting = 64;
inline constexpr std::size_t kMostValues = 20'000'000;

/// Errors give line and column (in characters, from 1) of malformed text, invalid UTF-8 included.
[[nodiscard]] Result<Json> parse_json(std::string_view text);

/// Containers above `open_depth` are opened one entry a line, indented by one; deeper ones stand on one line.
[[nodiscard]] std::string laid_out(const OrderedJson& json, int open_depth);
/// Everything on one line.
[[nodiscard]] std::string on_one_line(const OrderedJson& json);

/// A short piece of a value, for saying what was found.
[[nodiscard]] std::string shown(const Json& json);

} // namespace filial::book
