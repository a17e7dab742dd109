// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstdint>
#include <string>
#include <variant>
#include <vector>

// Terms. A report is a document of blocks: headings, paragraphs, tables with notes, charts as data, commands. Writers
// turn it into HTML, text and CSV; the app draws the charts.
namespace filial::report {

struct Heading {
    int level = 1;
    std::string text;
};
struct Paragraph {
    std::string text;
    enum class Role : std::uint8_t { Body, Verdict, Note, Caution } role = Role::Body;
};
enum class Align : std::uint8_t { Left, Right };
struct Column {
    std::string title;
    Align align = Align::Right;
};
struct TableRow {
    std::vector<std::string> cells;
    enum class Role : std::uint8_t { Body, Total, Muted, Sub } role = Role::Body;
};
struct Table {
    std::string caption;
    std::vector<Column> columns;
    std::vector<TableRow> rows;
    std::vector<std::string> notes;
};
/// Departures of the classes in standard errors, or observed beside expected.
struct Chart {
    enum class Kind : std::uint8_t { ObservedExpected, Departure, Intervals } kind = Kind::ObservedExpected;
    std::string title, x_title, y_title;
    std::vector<std::string> labels;
    struct Series {
        std::string name;
        std::vector<double> values, low, high;
    };
    std::vector<Series> series;
};
struct Command {
    std::string text;
};
using Block = std::variant<Heading, Paragraph, Table, Chart, Command>;

struct Document {
    std::string title;
    std::vector<Block> blocks;
};

/// One self-contained HTML page (no network, prints well). Charts become tables with the note that charts need the full
/// program, unless `draw_chart` gives SVG.
struct HtmlOptions {
    std::string (*draw_chart)(const Chart&) = nullptr;
};
[[nodiscard]] std::string write_html(const Document& document, const HtmlOptions& options = {});
[[nodiscard]] std::string write_text(const Document& document);

} // namespace filial::report
