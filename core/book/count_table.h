// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "core/book/model.h"
#include "core/numeric/result.h"

// Terms. A typed cell is what a person writes for one family and class: "31", "29+8" (a sum), "–" or "-" (not looked),
// or nothing (blank). A block is cells as a spreadsheet copies them: rows by line ends, columns by tabs. A count table
// is a CSV or TSV with a header: family, then one column a class.
namespace filial::book {

/// Reads a typed cell. Errors: negative, fractional, text, NaN, too large; each with what was found and what is
/// allowed.
[[nodiscard]] Result<Cell> read_cell(std::string_view text);
/// "31", "–", "".
[[nodiscard]] std::string cell_text(const Cell& cell);

/// Splits a copied block; quotes as spreadsheets write them.
[[nodiscard]] std::vector<std::vector<std::string>> read_block(std::string_view text);
[[nodiscard]] std::string write_block(const std::vector<std::vector<std::string>>& cells);

struct CountTable {
    std::vector<std::string> class_labels;
    std::vector<Family> families;
};
/// Reads a wide CSV/TSV (comma, semicolon or tab). Errors name line and column.
[[nodiscard]] Result<CountTable> read_count_table(std::string_view text);

} // namespace filial::book
