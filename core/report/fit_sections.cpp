// SPDX-License-Identifier: GPL-3.0-or-later
#include <algorithm>

#include "core/report/sections.h"
#include "core/report/wording.h"

// The sections about one sample: verdict, tests, classes, account, partition, what would be detected.
namespace filial::report {

namespace {

using fit::GoodnessOfFit;

void add_test_row(Table& table, MessageId name, const Maybe<double>& statistic, const std::string& df,
                  const Maybe<fit::Tail>& p) {
    table.rows.push_back({{say(name), shown_statistic(statistic), df, shown_p(p)}, TableRow::Role::Body});
}

/// Why something is missing, as a note; the plain "not computed" says nothing to a reader.
void note_reason(Table& table, MessageId what, const Message& why_not) {
    if (why_not.id != MessageId::NotComputed) {
        table.notes.push_back(say(MessageId::ReportWhyNot, {text_argument(say(what)), text_argument(render(why_not))}));
    }
}

void add_g_rows(Table& table, const GoodnessOfFit& result, const std::string& df) {
    if (!result.g) {
        note_reason(table, MessageId::ReportG, result.g.why_not);
        return;
    }
    add_test_row(table, MessageId::ReportG, result.g->statistic, df, result.g->p);
    if (result.g->williams_statistic) {
        add_test_row(table, MessageId::ReportGWilliams, result.g->williams_statistic, df, result.g->williams_p);
    }
    if (result.g->williams_general_statistic) {
        add_test_row(table, MessageId::ReportGWilliamsGeneral, result.g->williams_general_statistic, df,
                     result.g->williams_general_p);
    }
}

void add_exact_rows(Table& table, const GoodnessOfFit& result) {
    if (result.exact) {
        const bool bounded = result.exact->method == "bounded";
        add_test_row(table, bounded ? MessageId::ReportBounded : MessageId::ReportExact, Maybe<double>{}, "–",
                     result.exact->p);
        if (result.verdict != fit::Verdict::Impossible) {
            table.rows.push_back(
                {{say(MessageId::ReportMidP), "–", "–", p_text(result.exact->mid_p)}, TableRow::Role::Sub});
        }
    } else {
        note_reason(table, MessageId::ReportExact, result.exact.why_not);
    }
    if (result.simulated) {
        table.rows.push_back(
            {{say(MessageId::ReportSimulated), "–", "–", p_text(result.simulated->p)}, TableRow::Role::Body});
        table.notes.push_back(say(MessageId::ReportSimulatedInterval,
                                  {p_argument(result.simulated->low), p_argument(result.simulated->high),
                                   count_argument(result.simulated->replicates),
                                   count_argument(static_cast<std::int64_t>(result.simulated->seed))}));
    }
}

std::string interval_text(const fit::ClassResult& c) {
    if (!c.interval_low || !c.interval_high) {
        return "–";
    }
    return say(MessageId::ReportInterval,
               {percent_argument(*c.interval_low, 1), percent_argument(*c.interval_high, 1)});
}

std::vector<std::string> class_cells(const fit::ClassResult& c) {
    return {c.label,
            shown_count(c.observed.value()),
            fixed_text(c.expected, 2),
            fixed_text(c.observed.as_double() - c.expected, 2),
            c.adjusted_residual ? fixed_text(*c.adjusted_residual, 2) : "–",
            c.p_holm ? p_text(*c.p_holm) : "–",
            interval_text(c)};
}

} // namespace

void add_verdict(Document& document, const GoodnessOfFit& result) {
    add_text(document, render(result.verdict_sentence), Paragraph::Role::Verdict);
    const std::string meaning = render(result.meaning);
    if (result.meaning.id != MessageId::NotComputed) {
        add_text(document, meaning);
    }
    for (const Message& caution : result.cautions) {
        add_text(document, render(caution), Paragraph::Role::Caution);
    }
}

void add_tests(Document& document, const GoodnessOfFit& result) {
    Table table;
    table.columns = {{say(MessageId::ReportTest), Align::Left},
                     {say(MessageId::ReportStatistic), Align::Right},
                     {say(MessageId::ReportDf), Align::Right},
                     {say(MessageId::ReportP), Align::Right}};
    const std::string df = shown_count(result.df);
    if (result.chi_square) {
        add_test_row(table, MessageId::ReportChiSquare, result.chi_square->statistic, df, result.chi_square->p);
        if (!result.chi_square->p) {
            note_reason(table, MessageId::ReportP, result.chi_square->p.why_not);
        }
    } else {
        note_reason(table, MessageId::ReportChiSquare, result.chi_square.why_not);
    }
    add_g_rows(table, result, df);
    if (result.yates) {
        add_test_row(table, MessageId::ReportYates, result.yates->statistic, "1", result.yates->p);
    }
    add_exact_rows(table, result);
    if (result.effect_w) {
        table.notes.push_back(say(MessageId::ReportEffect, {number_argument(*result.effect_w, 3)}));
    }
    document.blocks.emplace_back(std::move(table));
}

void add_classes(Document& document, const GoodnessOfFit& result) {
    Table table;
    table.columns = {{say(MessageId::ReportClass), Align::Left},      {say(MessageId::ReportObserved), Align::Right},
                     {say(MessageId::ReportExpected), Align::Right},  {say(MessageId::ReportDeparture), Align::Right},
                     {say(MessageId::ReportInErrors), Align::Right},  {say(MessageId::ReportPHolm), Align::Right},
                     {say(MessageId::ReportClassShare), Align::Right}};
    double expected = 0.0;
    for (const fit::ClassResult& c : result.classes) {
        table.rows.push_back({class_cells(c), TableRow::Role::Body});
        expected += c.expected;
    }
    table.rows.push_back({{say(MessageId::ReportTotal), shown_count(result.n), fixed_text(expected, 2), "", "", "", ""},
                          TableRow::Role::Total});
    table.notes.push_back(say(MessageId::ReportClassNote));
    document.blocks.emplace_back(std::move(table));
}

void add_account(Document& document, const GoodnessOfFit& result) {
    add_heading(document, 2, say(MessageId::ReportAccount));
    Table table;
    table.columns = {{"", Align::Left}, {"", Align::Right}};
    for (const fit::Charge& charge : result.df_account) {
        table.rows.push_back({{render(charge.what), shown_count(charge.charge)}, TableRow::Role::Body});
    }
    table.rows.push_back({{say(MessageId::ReportForTheTest), shown_count(result.df)}, TableRow::Role::Total});
    document.blocks.emplace_back(std::move(table));
    for (const fit::Estimate& estimate : result.estimates) {
        const bool known = estimate.standard_error.has_value();
        std::vector<Argument> arguments{text_argument(estimate.name), number_argument(estimate.value, 4)};
        if (known) {
            arguments.push_back(number_argument(*estimate.standard_error, 4));
        }
        add_text(document, say(known ? MessageId::ReportEstimate : MessageId::ReportEstimateBare, arguments));
    }
}

void add_partition(Document& document, const GoodnessOfFit& result) {
    if (!result.partition) {
        return;
    }
    add_heading(document, 2, say(MessageId::ReportMisfit));
    Table table;
    table.columns = {{say(MessageId::ReportPart), Align::Left},
                     {say(MessageId::ReportChiSquare), Align::Right},
                     {say(MessageId::ReportDf), Align::Right},
                     {say(MessageId::ReportP), Align::Right}};
    double sum = 0.0;
    int df = 0;
    for (const fit::PartitionRow& row : *result.partition) {
        table.rows.push_back({{render(row.what), statistic_text(row.statistic), shown_count(row.df), p_text(row.p.p)},
                              TableRow::Role::Body});
        sum += row.statistic;
        df += row.df;
    }
    table.rows.push_back(
        {{say(MessageId::ReportTotal), statistic_text(sum), shown_count(df), ""}, TableRow::Role::Total});
    table.notes.push_back(say(MessageId::ReportPartitionNote));
    document.blocks.emplace_back(std::move(table));
}

void add_detectable(Document& document, const GoodnessOfFit& result) {
    const bool any = std::any_of(result.detectable.begin(), result.detectable.end(),
                                 [](const fit::Detectable& d) { return d.percentage_points.has_value(); });
    if (!any) {
        return;
    }
    add_heading(document, 2, say(MessageId::ReportDetectable));
    for (const fit::Detectable& d : result.detectable) {
        if (d.percentage_points && d.class_index < result.classes.size()) {
            add_text(document,
                     say(MessageId::ReportWouldDetect, {number_argument(100.0 * *d.percentage_points, 1),
                                                        text_argument(result.classes[d.class_index].label),
                                                        percent_argument(d.power, 0), number_argument(d.w, 3)}));
        }
    }
}

} // namespace filial::report
