// SPDX-License-Identifier: GPL-3.0-or-later
#include <algorithm>
#include <numeric>
#include <utility>

#include "core/report/chart_table.h"
#include "core/report/document.h"
#include "core/report/utf8.h"

namespace filial::report {

namespace {

constexpr std::size_t kLineWidth = 80;
constexpr std::size_t kGap = 2; ///< spaces between columns
constexpr std::string_view kCommandIndent = "    ";

std::vector<std::string> words_of(const std::string& text) {
    std::vector<std::string> words;
    std::string word;
    for (const char c : text) {
        if (c != ' ') {
            word += c;
        } else if (!word.empty()) {
            words.push_back(std::exchange(word, {}));
        }
    }
    if (!word.empty()) {
        words.push_back(word);
    }
    return words;
}

/// Lines of at most `width` cells, broken at spaces; a longer word stands alone. No-break spaces hold.
std::vector<std::string> wrap(const std::string& text, std::size_t width) {
    std::vector<std::string> lines;
    std::string line;
    for (const std::string& word : words_of(clean_line(text))) {
        if (!line.empty() && display_width(line) + 1 + display_width(word) > width) {
            lines.push_back(std::exchange(line, {}));
        }
        line += (line.empty() ? "" : " ") + word;
    }
    if (!line.empty()) {
        lines.push_back(line);
    }
    return lines;
}

std::string repeated(std::string_view what, std::size_t times) {
    std::string text;
    for (std::size_t i = 0; i < times; ++i) {
        text += what;
    }
    return text;
}

std::string padded(const std::string& cell, std::size_t width, Align align) {
    const std::size_t cells = display_width(cell);
    const std::string space(width > cells ? width - cells : 0, ' ');
    return align == Align::Right ? space + cell : cell + space;
}

std::string without_end_spaces(std::string line) {
    line.erase(line.find_last_not_of(' ') + 1);
    return line + "\n";
}

std::size_t longest_word(const std::string& text) {
    std::size_t longest = 0;
    for (const std::string& word : words_of(text)) {
        longest = std::max(longest, display_width(word));
    }
    return longest;
}

/// A column is as wide as its widest cell, and no title is broken inside a word.
std::vector<std::size_t> column_widths(const Table& table) {
    std::vector<std::size_t> widths;
    for (std::size_t c = 0; c < table.columns.size(); ++c) {
        std::size_t width = longest_word(clean_line(table.columns[c].title));
        for (const TableRow& row : table.rows) {
            width = std::max(width, c < row.cells.size() ? display_width(clean_line(row.cells[c])) : 0);
        }
        widths.push_back(width);
    }
    return widths;
}

std::string row_text(const std::vector<std::string>& cells, const Table& table,
                     const std::vector<std::size_t>& widths) {
    std::string line;
    for (std::size_t c = 0; c < table.columns.size(); ++c) {
        line += c == 0 ? "" : std::string(kGap, ' ');
        line += padded(c < cells.size() ? clean_line(cells[c]) : "", widths[c], table.columns[c].align);
    }
    return without_end_spaces(std::move(line));
}

/// Titles over several lines where that keeps the columns narrow; the last line stands on the rule.
std::string title_rows(const Table& table, const std::vector<std::size_t>& widths) {
    std::vector<std::vector<std::string>> wrapped;
    std::size_t height = 0;
    for (std::size_t c = 0; c < table.columns.size(); ++c) {
        wrapped.push_back(wrap(table.columns[c].title, widths[c]));
        height = std::max(height, wrapped.back().size());
    }
    std::string text;
    for (std::size_t line = 0; line < height; ++line) {
        std::vector<std::string> cells;
        for (const std::vector<std::string>& title : wrapped) {
            const std::size_t above = height - title.size();
            cells.push_back(line < above ? "" : title[line - above]);
        }
        text += row_text(cells, table, widths);
    }
    return text;
}

std::string table_text(const Table& table) {
    const std::vector<std::size_t> widths = column_widths(table);
    const std::size_t gaps = widths.empty() ? 0 : kGap * (widths.size() - 1);
    const std::string rule = repeated("─", std::accumulate(widths.begin(), widths.end(), gaps)) + "\n";
    std::string text = table.caption.empty() ? "" : clean_line(table.caption) + "\n";
    const std::string titles = title_rows(table, widths);
    text += titles.empty() ? "" : titles + rule;
    bool first = true;
    for (const TableRow& row : table.rows) {
        text += row.role == TableRow::Role::Total && !first ? rule : "";
        text += row_text(row.cells, table, widths);
        first = false;
    }
    for (const std::string& note : table.notes) {
        for (const std::string& line : wrap(note, kLineWidth - 2)) {
            text += "  " + line + "\n";
        }
    }
    return text;
}

struct TextBlock {
    std::string operator()(const Heading& heading) const {
        const std::string line = clean_line(heading.text);
        const std::string_view under = heading.level <= 1 ? "=" : "-";
        return line + "\n" + repeated(under, display_width(line)) + "\n";
    }
    std::string operator()(const Paragraph& paragraph) const {
        const bool caution = paragraph.role == Paragraph::Role::Caution;
        const std::string indent = caution ? "! " : "";
        std::string text;
        for (const std::string& line : wrap(paragraph.text, kLineWidth - indent.size())) {
            text += (text.empty() ? indent : std::string(indent.size(), ' ')) + line + "\n";
        }
        return text;
    }
    std::string operator()(const Table& table) const { return table_text(table); }
    std::string operator()(const Chart& chart) const { return table_text(chart_table(chart)); }
    std::string operator()(const Command& command) const {
        return std::string(kCommandIndent) + clean_line(command.text) + "\n";
    }
};

} // namespace

std::string write_text(const Document& document) {
    std::string text;
    for (const Block& block : document.blocks) {
        const std::string piece = std::visit(TextBlock{}, block);
        if (!piece.empty()) {
            text += (text.empty() ? "" : "\n") + piece;
        }
    }
    return text;
}

} // namespace filial::report
