// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>

#include "core/numeric/result.h"

namespace filial::book {

/// The error for an errno at a path: permission, no space, not there, a folder, or the system's own text.
[[nodiscard]] Error file_error(int number, const std::string& path);
/// "/a/b/c" -> "/a/b"; "c" -> ".".
[[nodiscard]] std::string folder_of(const std::string& path);
/// "/a/b/c" -> "c".
[[nodiscard]] std::string name_of(const std::string& path);

} // namespace filial::book
