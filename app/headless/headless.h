// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <iosfwd>
#include <span>
#include <string>

// Terms. A verb is the first argument of a run without a window: score, families, derive, report. Nothing here knows
// Qt, so it runs without a display and in a build that has none.
namespace filial::app {

/// Whether these arguments (without the program's name) are a verb, a request for help or the version, or a slip in
/// one of them; anything else opens the window.
[[nodiscard]] bool is_headless(std::span<const std::string> arguments);

/// Answers on `out`. Returns 0: computed, whatever the verdict; 2: the input is wrong; 3: a file could not be read or
/// written. In the last two cases one line on `err` names the place and what was expected, and `out` stays empty.
[[nodiscard]] int run_headless(std::span<const std::string> arguments, std::ostream& out, std::ostream& err);

} // namespace filial::app
