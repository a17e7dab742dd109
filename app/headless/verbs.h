// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/headless/arguments.h"

// One function a verb: the whole answer as text, or the error. Nothing is printed before it is complete.
namespace filial::app {

struct Answer {
    std::string text;
    std::vector<Message> warnings; ///< for standard error; the answer stands nevertheless
};

[[nodiscard]] Result<Answer> score(std::span<const std::string> arguments);
[[nodiscard]] Result<Answer> families(std::span<const std::string> arguments);
[[nodiscard]] Result<Answer> derive(std::span<const std::string> arguments);
[[nodiscard]] Result<Answer> write_report(std::span<const std::string> arguments);

/// The help of a verb, or of the whole for "".
[[nodiscard]] std::string help_text(const std::string& verb);

} // namespace filial::app
