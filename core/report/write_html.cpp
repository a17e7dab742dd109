// SPDX-License-Identifier: GPL-3.0-or-later
#include <algorithm>

#include "core/report/chart_table.h"
#include "core/report/document.h"
#include "core/report/utf8.h"

namespace filial::report {

namespace {

// One page without outside parts: it opens from a mail or a memory stick, and is well-formed XML as well as HTML.
constexpr std::string_view kStyle = R"(
:root { color-scheme: light; --background: #FAF9F5; --surface: #FFFFFF; --ink: #1E2A2B; --muted: #5A6568;
  --accent: #5B2E5A; --warning: #8A4B00; --rule: #D9D6CC; }
* { box-sizing: border-box; }
body { margin: 0; background: var(--background); color: var(--ink);
  font: 14px/20px "Noto Sans", "Noto Sans Math", "Noto Sans Symbols2", "DejaVu Sans", sans-serif;
  font-variant-numeric: tabular-nums lining-nums; }
main { max-width: 60rem; margin: 0 auto; padding: 32px 24px; }
h1 { font-size: 24px; line-height: 32px; margin: 0 0 8px; }
h2 { font-size: 14px; line-height: 20px; margin: 32px 0 8px; color: var(--muted); }
p { margin: 0 0 8px; max-width: 45rem; }
.verdict { font-size: 18px; line-height: 24px; font-weight: 700; }
.note, .notes { font-size: 12px; line-height: 16px; color: var(--muted); }
.caution { color: var(--warning); padding-left: 16px; text-indent: -16px; }
.caution::before { content: "! "; display: inline-block; width: 16px; text-indent: 0; font-weight: 700; }
.table { overflow-x: auto; margin: 8px 0 16px; }
table { border-collapse: collapse; }
caption { text-align: left; font-weight: 700; padding: 0 0 8px; }
th, td { padding: 4px 24px 4px 0; vertical-align: baseline; text-align: left; unicode-bidi: isolate; }
th { font-size: 12px; line-height: 16px; color: var(--muted); vertical-align: bottom; }
th:last-child, td:last-child { padding-right: 0; }
.right { text-align: right; white-space: nowrap; }
thead tr { border-bottom: 1px solid var(--ink); }
tr.total { font-weight: 700; }
tr.rule-above { border-top: 1px solid var(--ink); }
tr.muted, tr.sub { color: var(--muted); }
tr.sub td:first-child { padding-left: 16px; }
ul.notes { margin: 8px 0 0; padding: 0; list-style: none; max-width: 45rem; }
figure { margin: 16px 0; }
figcaption { font-weight: 700; margin-bottom: 8px; }
figure svg { max-width: 100%; height: auto; }
pre { margin: 8px 0 16px; padding: 12px 16px; background: var(--surface); border: 1px solid var(--rule);
  border-radius: 3px; white-space: pre-wrap; overflow-wrap: anywhere;
  font: 12px/16px "Noto Sans Mono", "DejaVu Sans Mono", monospace; }
@page { margin: 18mm 16mm; }
@media print {
  body { background: none; font-size: 9.5pt; line-height: 13pt; }
  main { max-width: none; padding: 0; }
  .table { overflow: visible; }
  h1, h2, caption { break-after: avoid; }
  tr, figure, pre { break-inside: avoid; }
  thead { display: table-header-group; }
  th, td { padding-right: 10pt; }
  p, li { orphans: 2; widows: 2; }
}
)";

std::string escaped(std::string_view text) {
    std::string html;
    for (const char c : clean_line(text)) {
        switch (c) {
        case '&':
            html += "&amp;";
            break;
        case '<':
            html += "&lt;";
            break;
        case '>':
            html += "&gt;";
            break;
        case '"':
            html += "&quot;";
            break;
        case '\'':
            html += "&#39;";
            break;
        default:
            html += c;
        }
    }
    return html;
}

std::string element(std::string_view tag, std::string_view css, std::string_view text) {
    const std::string name(tag);
    const std::string with = css.empty() ? "" : " class=\"" + std::string(css) + "\"";
    return "<" + name + with + ">" + escaped(text) + "</" + name + ">";
}

std::string_view css_of(Paragraph::Role role) {
    switch (role) {
    case Paragraph::Role::Verdict:
        return "verdict";
    case Paragraph::Role::Note:
        return "note";
    case Paragraph::Role::Caution:
        return "caution";
    case Paragraph::Role::Body:
        break;
    }
    return "";
}

std::string css_of(TableRow::Role role, bool first_total) {
    switch (role) {
    case TableRow::Role::Total:
        return first_total ? "total rule-above" : "total";
    case TableRow::Role::Muted:
        return "muted";
    case TableRow::Role::Sub:
        return "sub";
    case TableRow::Role::Body:
        break;
    }
    return "";
}

std::string_view css_of(Align align) {
    return align == Align::Right ? "right" : "";
}

std::string head(const Table& table) {
    const bool titled = std::any_of(table.columns.begin(), table.columns.end(),
                                    [](const Column& column) { return !column.title.empty(); });
    if (!titled) {
        return "";
    }
    std::string html = "<thead><tr>";
    for (const Column& column : table.columns) {
        const std::string_view css = css_of(column.align);
        html += "<th scope=\"col\"" + (css.empty() ? "" : " class=\"" + std::string(css) + "\"") + ">" +
                escaped(column.title) + "</th>";
    }
    return html + "</tr></thead>\n";
}

std::string body(const Table& table) {
    std::string html = "<tbody>\n";
    bool total_before = false;
    for (const TableRow& row : table.rows) {
        const bool total = row.role == TableRow::Role::Total;
        const std::string css = css_of(row.role, !total_before);
        total_before = total;
        html += css.empty() ? "<tr>" : "<tr class=\"" + css + "\">";
        for (std::size_t c = 0; c < table.columns.size(); ++c) {
            html += element("td", css_of(table.columns[c].align), c < row.cells.size() ? row.cells[c] : "");
        }
        html += "</tr>\n";
    }
    return html + "</tbody>\n";
}

std::string table_html(const Table& table) {
    std::string html = "<div class=\"table\"><table>\n";
    html += table.caption.empty() ? "" : element("caption", "", table.caption) + "\n";
    html += head(table) + body(table) + "</table>\n";
    if (!table.notes.empty()) {
        html += "<ul class=\"notes\">\n";
        for (const std::string& note : table.notes) {
            html += element("li", "", note) + "\n";
        }
        html += "</ul>\n";
    }
    return html + "</div>\n";
}

struct HtmlBlock {
    const HtmlOptions& options;

    std::string operator()(const Heading& heading) const {
        return element("h" + std::to_string(std::clamp(heading.level, 1, 6)), "", heading.text) + "\n";
    }
    std::string operator()(const Paragraph& paragraph) const {
        return element("p", css_of(paragraph.role), paragraph.text) + "\n";
    }
    std::string operator()(const Table& table) const { return table_html(table); }
    std::string operator()(const Chart& chart) const {
        if (options.draw_chart == nullptr) {
            return table_html(chart_table(chart));
        }
        return "<figure>" + element("figcaption", "", chart.title) + options.draw_chart(chart) + "</figure>\n";
    }
    std::string operator()(const Command& command) const { return element("pre", "", command.text) + "\n"; }
};

} // namespace

std::string write_html(const Document& document, const HtmlOptions& options) {
    std::string html = "<!DOCTYPE html>\n<html xmlns=\"http://www.w3.org/1999/xhtml\" lang=\"en\">\n<head>\n"
                       "<meta charset=\"utf-8\"/>\n"
                       "<meta name=\"viewport\" content=\"width=device-width, initial-scale=1\"/>\n";
    html += element("title", "", document.title) + "\n<style>" + std::string(kStyle) + "</style>\n";
    html += "</head>\n<body>\n<main>\n";
    for (const Block& block : document.blocks) {
        html += std::visit(HtmlBlock{options}, block);
    }
    return html + "</main>\n</body>\n</html>\n";
}

} // namespace filial::report
