// SPDX-License-Identifier: GPL-3.0-or-later
#include <algorithm>

#include "core/report/sections.h"
#include "core/report/wording.h"

// The sections about families: their table, where the variation lies, odd ones, those set aside or incomplete.
namespace filial::report {

namespace {

std::string shown_cell(const book::Cell& cell) {
    switch (cell.state) {
    case book::CellState::Blank:
        return "";
    case book::CellState::NotLooked:
        return "–";
    case book::CellState::Number:
        break;
    }
    return shown_count(cell.count.value());
}

bool exact_p_anywhere(const CrossAnalysis& analysis) {
    const bool some = std::any_of(analysis.families.begin(), analysis.families.end(),
                                  [](const FamilyAnalysis& f) { return f.fit && f.fit->exact; });
    return some || (analysis.totals && analysis.totals->exact);
}

/// χ², df, P and, where the table has it, the exact P.
void append_fit(std::vector<std::string>& cells, const std::optional<fit::GoodnessOfFit>& fit, bool with_exact) {
    const bool tested = fit && fit->chi_square;
    cells.push_back(tested ? shown_statistic(fit->chi_square->statistic) : "–");
    cells.push_back(fit && fit->n > 0 ? shown_count(fit->df) : "–");
    if (fit && fit->verdict == fit::Verdict::Impossible) {
        cells.emplace_back("0");
    } else {
        cells.push_back(tested ? shown_p(fit->chi_square->p) : "–");
    }
    if (with_exact) {
        cells.push_back(fit && fit->exact ? shown_p(fit->exact->p) : "–");
    }
}

TableRow family_row(const book::Family& family, const FamilyAnalysis& analysis, std::size_t classes, bool with_exact) {
    TableRow row;
    row.cells.push_back(family.label);
    for (std::size_t i = 0; i < classes; ++i) {
        row.cells.push_back(shown_cell(family.cell(ClassIndex{i})));
    }
    row.cells.push_back(analysis.total ? shown_count(*analysis.total) : "–");
    row.cells.push_back(shown_cell(family.not_scored_cell()));
    append_fit(row.cells, analysis.fit, with_exact);
    row.role = analysis.state == FamilyState::Tested ? TableRow::Role::Body : TableRow::Role::Muted;
    return row;
}

TableRow totals_row(const CrossAnalysis& analysis, bool with_exact) {
    TableRow row;
    row.role = TableRow::Role::Total;
    row.cells.push_back(say(MessageId::ReportAllFamilies));
    for (const std::int64_t count : analysis.column_totals) {
        row.cells.push_back(shown_count(count));
    }
    row.cells.push_back(shown_count(analysis.total));
    row.cells.push_back(shown_count(analysis.not_scored));
    append_fit(row.cells, analysis.totals, with_exact);
    return row;
}

/// Expected numbers under the classes they belong to; a joined group shows its own under its first class.
TableRow expected_row(const CrossAnalysis& analysis) {
    TableRow row;
    row.role = TableRow::Role::Muted;
    row.cells.assign(1 + analysis.column_totals.size(), "");
    row.cells[0] = say(MessageId::ReportExpected);
    for (const fit::ClassResult& c : analysis.totals->classes) {
        if (!c.members.empty() && c.members.front() + 1 < row.cells.size()) {
            row.cells[c.members.front() + 1] = fixed_text(c.expected, 2);
        }
    }
    return row;
}

void add_source_row(Table& table, MessageId what, const families::SourceRow& row, TableRow::Role role) {
    table.rows.push_back({{say(what), shown_count(row.df), shown_statistic(row.chi_square), shown_p(row.chi_square_p),
                           shown_statistic(row.g), shown_p(row.g_p)},
                          role});
}

void add_overdispersion(Document& document, const families::Overdispersion& extra) {
    std::string text = say(MessageId::ReportPhi, {number_argument(extra.phi, 3)});
    if (extra.rho && extra.rho_low && extra.rho_high) {
        text += " " + say(MessageId::ReportRho, {number_argument(*extra.rho, 4), number_argument(*extra.rho_low, 4),
                                                 number_argument(*extra.rho_high, 4)});
    }
    add_text(document, text, Paragraph::Role::Note);
}

void add_source_tail(Table& table, const families::Heterogeneity& result) {
    if (result.contingency) {
        table.rows.push_back({{say(MessageId::ReportBetweenContingency), shown_count(result.contingency->df),
                               statistic_text(result.contingency->statistic), shown_p(result.contingency->p), "", ""},
                              TableRow::Role::Body});
    }
}

TableRow comparison_row(MessageId what, std::size_t families, const std::optional<fit::GoodnessOfFit>& totals,
                        const std::optional<families::Heterogeneity>& heterogeneity) {
    TableRow row;
    row.cells = {say(what), shown_count(static_cast<std::int64_t>(families)), totals ? shown_count(totals->n) : "–"};
    append_fit(row.cells, totals, false);
    const bool between = heterogeneity && heterogeneity->contingency;
    row.cells.push_back(between ? shown_p(heterogeneity->contingency->p) : "–");
    return row;
}

/// Families set aside that would enter the totals: complete and with plants.
std::size_t set_aside_with_plants(const CrossAnalysis& analysis) {
    return static_cast<std::size_t>(
        std::count_if(analysis.families.begin(), analysis.families.end(),
                      [](const FamilyAnalysis& f) { return f.state == FamilyState::SetAside && f.fit; }));
}

void add_both_analyses(Document& document, const CrossAnalysis& analysis) {
    Table both;
    both.columns.push_back({say(MessageId::ReportAnalysis), Align::Left});
    for (const MessageId id : {MessageId::ReportFamilies, MessageId::ReportPlants, MessageId::ReportChiSquare,
                               MessageId::ReportDf, MessageId::ReportP, MessageId::ReportPBetween}) {
        both.columns.push_back({say(id), Align::Right});
    }
    both.rows.push_back(
        comparison_row(MessageId::ReportWithout, analysis.included, analysis.totals, analysis.heterogeneity));
    both.rows.push_back(comparison_row(MessageId::ReportWith, analysis.included + set_aside_with_plants(analysis),
                                       analysis.totals_with_set_aside, analysis.heterogeneity_with_set_aside));
    document.blocks.emplace_back(std::move(both));
}

} // namespace

void add_family_table(Document& document, const book::Cross& cross, const CrossAnalysis& analysis) {
    add_heading(document, 2, say(MessageId::ReportFamilies));
    const bool with_exact = exact_p_anywhere(analysis);
    Table table;
    table.columns.push_back({say(MessageId::ReportFamily), Align::Left});
    for (const std::string& label : analysis.class_labels) {
        table.columns.push_back({label, Align::Right});
    }
    for (const MessageId id : {MessageId::ReportPlants, MessageId::ReportNotScored, MessageId::ReportChiSquare,
                               MessageId::ReportDf, MessageId::ReportP}) {
        table.columns.push_back({say(id), Align::Right});
    }
    if (with_exact) {
        table.columns.push_back({say(MessageId::ReportExactP), Align::Right});
    }
    for (std::size_t i = 0; i < std::min(cross.families.size(), analysis.families.size()); ++i) {
        table.rows.push_back(
            family_row(cross.families[i], analysis.families[i], analysis.class_labels.size(), with_exact));
    }
    table.rows.push_back(totals_row(analysis, with_exact));
    if (analysis.totals) {
        table.rows.push_back(expected_row(analysis));
    }
    for (const Message& note : analysis.notes) {
        table.notes.push_back(render(note));
    }
    document.blocks.emplace_back(std::move(table));
    for (const FamilyAnalysis& family : analysis.families) {
        for (const Message& hint : family.hints) {
            add_text(document,
                     say(MessageId::ReportFamilyHint, {text_argument(family.label), text_argument(render(hint))}),
                     Paragraph::Role::Caution);
        }
    }
}

void add_sources(Document& document, const families::Heterogeneity& result) {
    add_heading(document, 2, say(MessageId::ReportSources));
    add_text(document, render(result.verdict_sentence), Paragraph::Role::Verdict);
    for (const Message& caution : result.cautions) {
        add_text(document, render(caution), Paragraph::Role::Caution);
    }
    Table table;
    table.columns = {{say(MessageId::ReportSource), Align::Left},     {say(MessageId::ReportDf), Align::Right},
                     {say(MessageId::ReportChiSquare), Align::Right}, {say(MessageId::ReportP), Align::Right},
                     {say(MessageId::ReportG), Align::Right},         {say(MessageId::ReportP), Align::Right}};
    add_source_tail(table, result);
    add_source_row(table, MessageId::ReportBetweenScaled, result.heterogeneity, TableRow::Role::Body);
    add_source_row(table, MessageId::ReportPooled, result.pooled, TableRow::Role::Body);
    add_source_row(table, MessageId::ReportSum, result.total, TableRow::Role::Total);
    table.notes.push_back(say(MessageId::ReportSourceNote));
    if (result.exact) {
        table.notes.push_back(say(MessageId::ReportExactBetween, {p_argument(result.exact->p.p)}));
    }
    document.blocks.emplace_back(std::move(table));
    if (result.overdispersion) {
        add_overdispersion(document, *result.overdispersion);
    }
}

void add_odd_families(Document& document, const families::Heterogeneity& result, double alpha) {
    if (result.outliers.empty()) {
        return;
    }
    add_heading(document, 2, say(MessageId::ReportOdd));
    Table table;
    table.columns = {{say(MessageId::ReportFamily), Align::Left}, {say(MessageId::ReportChiSquare), Align::Right},
                     {say(MessageId::ReportDf), Align::Right},    {say(MessageId::ReportP), Align::Right},
                     {say(MessageId::ReportPHolm), Align::Right}, {say(MessageId::ReportPBh), Align::Right}};
    std::string named;
    for (const families::OddFamily& family : result.outliers) {
        const bool odd = family.p_holm < alpha;
        named += odd ? (named.empty() ? "" : ", ") + family.label : "";
        table.rows.push_back({{family.label, statistic_text(family.statistic), shown_count(family.df),
                               p_text(family.p.p), p_text(family.p_holm), p_text(family.p_bh)},
                              TableRow::Role::Body});
    }
    table.notes.push_back(say(MessageId::ReportOddNote));
    add_text(document,
             named.empty() ? say(MessageId::ReportNoneOdd) : say(MessageId::ReportSomeOdd, {text_argument(named)}));
    document.blocks.emplace_back(std::move(table));
}

void add_set_aside(Document& document, const book::Cross& cross, const CrossAnalysis& analysis) {
    Table table;
    table.columns = {{say(MessageId::ReportFamily), Align::Left}, {say(MessageId::ReportReason), Align::Left}};
    for (const book::Family& family : cross.families) {
        if (family.set_aside) {
            table.rows.push_back({{family.label, *family.set_aside}, TableRow::Role::Body});
        }
    }
    if (table.rows.empty()) {
        return;
    }
    add_heading(document, 2, say(MessageId::ReportSetAside));
    document.blocks.emplace_back(std::move(table));
    if (analysis.totals_with_set_aside) {
        add_both_analyses(document, analysis);
    }
}

void add_incomplete(Document& document, const CrossAnalysis& analysis) {
    std::string named;
    for (const FamilyAnalysis& family : analysis.families) {
        if (family.state == FamilyState::Incomplete || family.state == FamilyState::Blank) {
            named += (named.empty() ? "" : ", ") + family.label;
        }
    }
    if (!named.empty()) {
        add_heading(document, 2, say(MessageId::ReportIncompleteFamilies));
        add_text(document, say(MessageId::ReportIncompleteList, {text_argument(named)}));
    }
}

} // namespace filial::report
