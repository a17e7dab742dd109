// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <algorithm>
#include <string>

// Terms. Notations are written in ASCII; these tell its characters apart whatever the locale.
namespace filial::ascii {

[[nodiscard]] constexpr bool is_space(char c) {
    return c == ' ' || c == '\t' || c == '\n' || c == '\r';
}
[[nodiscard]] constexpr bool is_digit(char c) {
    return c >= '0' && c <= '9';
}
[[nodiscard]] constexpr bool is_upper(char c) {
    return c >= 'A' && c <= 'Z';
}
[[nodiscard]] constexpr bool is_letter(char c) {
    return is_upper(c) || (c >= 'a' && c <= 'z');
}
[[nodiscard]] constexpr char upper(char c) {
    return is_letter(c) && !is_upper(c) ? static_cast<char>(c - 'a' + 'A') : c;
}
[[nodiscard]] inline std::string lower(std::string text) {
    std::transform(text.begin(), text.end(), text.begin(),
                   [](char c) { return is_upper(c) ? static_cast<char>(c - 'A' + 'a') : c; });
    return text;
}

} // namespace filial::ascii
