// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/book/count_table.h"

#include <algorithm>
#include <array>
#include <unordered_set>

#include <csv.h>

namespace filial::book {

namespace {

using Row = std::vector<std::string>;

struct NumberedRow {
    std::size_t line = 0;
    Row cells;
};

/// Bytes of the character that begins here, 0 where it is not UTF-8 (overlong forms and surrogates included) or NUL.
std::size_t character(std::string_view text) {
    const auto byte = [&](std::size_t i) { return static_cast<unsigned char>(text[i]); };
    const auto follows = [&](std::size_t i, unsigned low, unsigned high) {
        return i < text.size() && byte(i) >= low && byte(i) <= high;
    };
    const unsigned first = byte(0);
    if (first < 0x80)
        return first == 0 ? 0 : 1;
    if (first >= 0xC2 && first <= 0xDF)
        return follows(1, 0x80, 0xBF) ? 2 : 0;
    if (first >= 0xE0 && first <= 0xEF) {
        const bool second = follows(1, first == 0xE0 ? 0xA0 : 0x80, first == 0xED ? 0x9F : 0xBF);
        return second && follows(2, 0x80, 0xBF) ? 3 : 0;
    }
    if (first >= 0xF0 && first <= 0xF4) {
        const bool second = follows(1, first == 0xF0 ? 0x90 : 0x80, first == 0xF4 ? 0x8F : 0xBF);
        return second && follows(2, 0x80, 0xBF) && follows(3, 0x80, 0xBF) ? 4 : 0;
    }
    return 0;
}

Done check_text(std::string_view text) {
    std::size_t line = 1;
    std::size_t column = 1;
    for (std::size_t at = 0; at < text.size();) {
        const std::size_t bytes = character(text.substr(at));
        if (bytes == 0)
            return refusal(MessageId::TableNotText, {size_argument(line), size_argument(column)});
        ++column;
        if (text[at] == '\n') {
            ++line;
            column = 1;
        }
        at += bytes;
    }
    return done();
}

/// One kind of line end, so that lines can be counted.
std::string with_plain_line_ends(std::string_view text) {
    std::string plain;
    plain.reserve(text.size());
    for (std::size_t at = 0; at < text.size(); ++at) {
        if (text[at] != '\r')
            plain += text[at];
        else if (!text.substr(at + 1).starts_with('\n'))
            plain += '\n';
    }
    return plain;
}

/// What stands most often between the names of the header.
unsigned char separator(std::string_view text) {
    std::array<std::pair<char, std::size_t>, 3> seen{{{'\t', 0}, {';', 0}, {',', 0}}};
    bool quoted = false;
    for (const char c : text) {
        if (c == '"')
            quoted = !quoted;
        if (quoted)
            continue;
        if (c == '\n' && std::any_of(seen.begin(), seen.end(), [](const auto& one) { return one.second > 0; }))
            break;
        for (auto& [mark, times] : seen)
            times += c == mark ? 1U : 0U;
    }
    const auto most = std::max_element(seen.begin(), seen.end(),
                                       [](const auto& left, const auto& right) { return left.second < right.second; });
    return most->second == 0 ? static_cast<unsigned char>(',') : static_cast<unsigned char>(most->first);
}

struct Collector {
    std::vector<NumberedRow> rows;
    Row current;
    std::size_t line = 1;
    std::size_t lines_within = 0;
};

void field_ended(void* bytes, std::size_t size, void* data) {
    auto& collector = *static_cast<Collector*>(data);
    const std::string_view text(static_cast<const char*>(bytes), bytes == nullptr ? 0 : size);
    collector.lines_within += static_cast<std::size_t>(std::count(text.begin(), text.end(), '\n'));
    collector.current.emplace_back(text);
}

void row_ended(int /*mark*/, void* data) {
    auto& collector = *static_cast<Collector*>(data);
    const bool empty = std::all_of(collector.current.begin(), collector.current.end(),
                                   [](const std::string& cell) { return cell.empty(); });
    if (!empty)
        collector.rows.push_back({collector.line, std::move(collector.current)});
    collector.current = {};
    collector.line += 1 + collector.lines_within;
    collector.lines_within = 0;
}

Result<std::vector<NumberedRow>> read_rows(const std::string& text) {
    csv_parser parser;
    if (csv_init(&parser, CSV_STRICT | CSV_STRICT_FINI | CSV_REPALL_NL) != 0)
        throw std::bad_alloc();
    csv_set_delim(&parser, separator(text));
    Collector collector;
    const std::size_t read = csv_parse(&parser, text.data(), text.size(), field_ended, row_ended, &collector);
    const bool whole = read == text.size() && csv_fini(&parser, field_ended, row_ended, &collector) == 0;
    csv_free(&parser);
    if (!whole)
        return refusal(MessageId::TableQuote, {size_argument(collector.line)});
    return std::move(collector.rows);
}

enum class Column : std::uint8_t { Class, NotScored, Sown, Emerged, Alive, Note };

Column kind_of(const std::string& name) {
    std::string low;
    for (const char c : name)
        low += c == '_' || c == '-' ? ' ' : static_cast<char>(c >= 'A' && c <= 'Z' ? c - 'A' + 'a' : c);
    static constexpr std::array<std::pair<std::string_view, Column>, 5> known{{{"not scored", Column::NotScored},
                                                                               {"sown", Column::Sown},
                                                                               {"emerged", Column::Emerged},
                                                                               {"alive", Column::Alive},
                                                                               {"note", Column::Note}}};
    for (const auto& [text, kind] : known)
        if (low == text)
            return kind;
    return Column::Class;
}

struct Header {
    std::vector<Column> kinds; ///< one a column after the family's
    std::vector<std::string> names, class_labels;
};

Result<Header> read_header(NumberedRow row) {
    while (!row.cells.empty() && row.cells.back().empty())
        row.cells.pop_back();
    Header header;
    std::unordered_set<std::string> seen;
    bool all_counts = row.cells.size() > 1;
    for (std::size_t i = 1; i < row.cells.size(); ++i) {
        const std::string& name = row.cells[i];
        if (name.empty())
            return refusal(MessageId::TableColumnUnnamed, {size_argument(row.line), size_argument(i + 1)});
        if (!seen.insert(name).second)
            return refusal(MessageId::TableColumnTwice,
                           {size_argument(row.line), size_argument(i + 1), text_argument(name)});
        all_counts = all_counts && read_cell(name).ok();
        header.names.push_back(name);
        header.kinds.push_back(kind_of(name));
        if (header.kinds.back() == Column::Class)
            header.class_labels.push_back(name);
    }
    if (all_counts)
        return refusal(MessageId::TableNoHeader, {size_argument(row.line)});
    if (header.class_labels.empty())
        return refusal(MessageId::TableNoClasses, {size_argument(row.line)});
    // Two columns of one kind, written differently ("Sown", "sown").
    for (std::size_t i = 0; i < header.kinds.size(); ++i)
        if (header.kinds[i] != Column::Class &&
            std::count(header.kinds.begin(), header.kinds.end(), header.kinds[i]) > 1)
            return refusal(MessageId::TableColumnTwice,
                           {size_argument(row.line), size_argument(i + 2), text_argument(header.names[i])});
    return header;
}

MessageId in_table(MessageId of_cell) {
    switch (of_cell) {
    case MessageId::CountNegative:
        return MessageId::TableCountNegative;
    case MessageId::CountNotWhole:
        return MessageId::TableCountNotWhole;
    case MessageId::CountTooLarge:
        return MessageId::TableCountTooLarge;
    default:
        return MessageId::TableCountNotANumber;
    }
}

void put(Family& family, Column kind, const Cell& cell) {
    const std::optional<Count> number = cell.state == CellState::Number ? std::optional(cell.count) : std::nullopt;
    if (kind == Column::Class)
        family.typed.push_back(cell);
    else if (kind == Column::NotScored)
        family.not_scored_typed = cell;
    else if (kind == Column::Sown)
        family.sown = number;
    else if (kind == Column::Emerged)
        family.emerged = number;
    else
        family.alive = number;
}

Result<Family> read_family_row(const Header& header, const NumberedRow& row) {
    std::size_t used = row.cells.size();
    while (used > header.kinds.size() + 1 && row.cells[used - 1].empty())
        --used;
    if (used != header.kinds.size() + 1)
        return refusal(MessageId::TableRagged,
                       {size_argument(row.line), size_argument(used), size_argument(header.kinds.size() + 1)});
    if (row.cells.front().empty())
        return refusal(MessageId::TableFamilyUnnamed, {size_argument(row.line)});
    Family family = new_family(row.cells.front(), 0);
    for (std::size_t i = 0; i < header.kinds.size(); ++i) {
        const std::string& text = row.cells[i + 1];
        if (header.kinds[i] == Column::Note) {
            family.note = text;
            continue;
        }
        const Result<Cell> cell = read_cell(text);
        if (!cell) {
            std::vector<Argument> arguments{size_argument(row.line), size_argument(i + 2),
                                            text_argument(header.names[i])};
            const auto& found = cell.error().message.arguments;
            arguments.insert(arguments.end(), found.begin(), found.end());
            return refusal(in_table(cell.error().message.id), std::move(arguments));
        }
        put(family, header.kinds[i], cell.value());
    }
    return family;
}

} // namespace

Result<CountTable> read_count_table(std::string_view text) {
    if (text.starts_with("\xEF\xBB\xBF"))
        text.remove_prefix(3);
    const std::string plain = with_plain_line_ends(text);
    if (Done sound = check_text(plain); !sound)
        return sound.error();
    Result<std::vector<NumberedRow>> rows = read_rows(plain);
    if (!rows)
        return rows.error();
    if (rows.value().empty())
        return refusal(MessageId::TableEmpty);
    Result<Header> header = read_header(std::move(rows.value().front()));
    if (!header)
        return header.error();
    CountTable table{header.value().class_labels, {}};
    std::unordered_set<std::string> labels;
    for (std::size_t i = 1; i < rows.value().size(); ++i) {
        const NumberedRow& row = rows.value()[i];
        Result<Family> family = read_family_row(header.value(), row);
        if (!family)
            return family.error();
        if (!labels.insert(family.value().label).second)
            return refusal(MessageId::TableFamilyTwice, {size_argument(row.line), text_argument(family.value().label)});
        table.families.push_back(std::move(family).value());
    }
    if (table.families.empty())
        return refusal(MessageId::TableNoFamilies);
    return table;
}

} // namespace filial::book
