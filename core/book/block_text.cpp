// SPDX-License-Identifier: GPL-3.0-or-later
#include <algorithm>

#include "core/book/count_table.h"

namespace filial::book {

namespace {

bool line_end(char c) {
    return c == '\n' || c == '\r';
}

/// The end of a quoted cell that begins at `begin`: just past its closing quote, which a tab, a line end or the end of
/// the text must follow. npos where there is none; the quote then is a plain character.
std::size_t quoted_end(std::string_view text, std::size_t begin) {
    for (std::size_t at = begin + 1; at < text.size(); ++at) {
        if (text[at] != '"')
            continue;
        if (at + 1 < text.size() && text[at + 1] == '"')
            ++at;
        else
            return at + 1 == text.size() || text[at + 1] == '\t' || line_end(text[at + 1]) ? at + 1
                                                                                           : std::string_view::npos;
    }
    return std::string_view::npos;
}

std::string unquoted(std::string_view text) {
    std::string plain;
    for (std::size_t at = 1; at + 1 < text.size(); ++at) {
        plain += text[at];
        if (text[at] == '"')
            ++at;
    }
    return plain;
}

bool needs_quotes(const std::string& cell) {
    return cell.find_first_of("\t\n\r") != std::string::npos || cell.starts_with('"');
}

std::string quoted(const std::string& cell) {
    std::string text = "\"";
    for (const char c : cell) {
        text += c;
        if (c == '"')
            text += c;
    }
    return text + '"';
}

} // namespace

std::vector<std::vector<std::string>> read_block(std::string_view text) {
    std::vector<std::vector<std::string>> rows;
    std::size_t at = 0;
    bool more_cells = false; // a tab was read, so another cell follows even at the end of the text
    // An unclosed quote is looked for once, not once a cell: a hostile text of quotes must not cost its square.
    bool quotes_close = true;
    while (at < text.size() || more_cells) {
        if (!more_cells)
            rows.emplace_back();
        more_cells = false;
        std::size_t end = std::string_view::npos;
        if (quotes_close && at < text.size() && text[at] == '"') {
            end = quoted_end(text, at);
            quotes_close = end != std::string_view::npos;
        }
        if (end != std::string_view::npos) {
            rows.back().push_back(unquoted(text.substr(at, end - at)));
        } else {
            end = std::min(text.find_first_of("\t\n\r", at), text.size());
            rows.back().emplace_back(text.substr(at, end - at));
        }
        at = end;
        if (at >= text.size())
            break;
        more_cells = text[at] == '\t';
        at += text.substr(at).starts_with("\r\n") ? 2U : 1U;
    }
    return rows;
}

std::string write_block(const std::vector<std::vector<std::string>>& cells) {
    std::string text;
    for (std::size_t row = 0; row < cells.size(); ++row) {
        if (row > 0)
            text += '\n';
        for (std::size_t column = 0; column < cells[row].size(); ++column) {
            if (column > 0)
                text += '\t';
            const std::string& cell = cells[row][column];
            text += needs_quotes(cell) ? quoted(cell) : cell;
        }
    }
    // A last row of one empty cell would otherwise vanish.
    if (!cells.empty() && cells.back().size() == 1 && cells.back().front().empty())
        text += '\n';
    return text;
}

} // namespace filial::book
