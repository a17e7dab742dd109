// SPDX-License-Identifier: GPL-3.0-or-later
#include <iostream>
#include <string>
#include <vector>

#include "app/headless/headless.h"
#include "app/shell/run_window.h"

int main(int argc, char** argv) {
    const std::vector<std::string> arguments(argv + 1, argv + argc);
    if (filial::app::is_headless(arguments))
        return filial::app::run_headless(arguments, std::cout, std::cerr);
    return filial::app::run_window(argc, argv);
}
