// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <string>
#include <string_view>
#include <vector>

// Terms. A report may hold whatever a person typed or a file brought along. Clean text is valid UTF-8 without control
// characters; its display width is the number of cells it takes in a fixed-width terminal.
namespace filial::report {

/// Code points; each malformed byte becomes U+FFFD.
[[nodiscard]] std::vector<char32_t> code_points(std::string_view text);
void append_utf8(std::string& text, char32_t code_point);
/// Valid UTF-8 on one line: line ends and tabs become spaces, other control characters U+FFFD.
[[nodiscard]] std::string clean_line(std::string_view text);
/// Terminal cells of clean text: combining marks and joiners take none, East Asian wide characters two.
[[nodiscard]] std::size_t display_width(std::string_view text);

} // namespace filial::report
