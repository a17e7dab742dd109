// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

namespace filial::app {

/// Opens the window, on a book where one is named. Returns the exit status: 0, 2 for wrong arguments, 4 where there is
/// no display.
int run_window(int argc, char** argv);

} // namespace filial::app
