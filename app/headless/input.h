// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <optional>

#include "app/headless/arguments.h"
#include "core/book/model.h"
#include "core/report/cross_analysis.h"

// A file given to a verb: a book, or a table with a column a class.
namespace filial::app {

struct CrossInput {
    book::Cross cross; ///< with the hypothesis it is to be tested against
    std::optional<book::Book> book;
    std::string sha256;
    std::vector<Message> warnings;
};

/// Reads the one file among the plain arguments and takes --select, --ratio, --join and --fitted into account. Errors
/// name the file or the option.
[[nodiscard]] Result<CrossInput> read_cross_input(const Arguments& arguments);

struct AnalysedFile {
    CrossInput input;
    report::CrossAnalysis analysis; ///< of `input.cross`
};
/// Reads the file and analyses its cross with the options given.
[[nodiscard]] Result<AnalysedFile> analyse_file(const Arguments& arguments);

[[nodiscard]] bool is_folder(const std::string& path);

} // namespace filial::app
