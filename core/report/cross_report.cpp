// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/report/cross_report.h"

#include "core/report/sections.h"
#include "core/report/wording.h"

namespace filial::report {

namespace {

/// The verdict first: a reader who stops after one line has what was found.
void add_answer(Document& document, const CrossAnalysis& analysis) {
    if (!analysis.totals) {
        add_text(document, say(MessageId::ReportNothingTested), Paragraph::Role::Verdict);
        return;
    }
    add_verdict(document, *analysis.totals);
    if (analysis.heterogeneity) {
        add_text(document, render(analysis.heterogeneity->line));
    }
    add_tests(document, *analysis.totals);
}

Chart observed_and_expected(const fit::GoodnessOfFit& fit) {
    Chart chart;
    chart.kind = Chart::Kind::ObservedExpected;
    chart.title = say(MessageId::ReportChartTitle);
    chart.x_title = say(MessageId::ReportClass);
    chart.y_title = say(MessageId::ReportChartUnit);
    chart.series = {{say(MessageId::ReportObserved), {}, {}, {}}, {say(MessageId::ReportExpected), {}, {}, {}}};
    for (const fit::ClassResult& c : fit.classes) {
        chart.labels.push_back(c.label);
        chart.series[0].values.push_back(c.observed.as_double());
        chart.series[1].values.push_back(c.expected);
    }
    return chart;
}

void add_sample(Document& document, const fit::GoodnessOfFit& fit) {
    add_heading(document, 2, say(MessageId::ReportClasses));
    add_classes(document, fit);
    document.blocks.emplace_back(observed_and_expected(fit));
    add_account(document, fit);
    add_partition(document, fit);
    add_detectable(document, fit);
}

} // namespace

std::vector<std::string> parent_names(const book::Book& book, const book::Cross& cross) {
    std::vector<std::string> names;
    for (const book::Id& id : cross.parents) {
        for (const book::Line& line : book.lines) {
            if (line.id == id) {
                names.push_back(line.name);
            }
        }
    }
    return names;
}

Document cross_report(const book::Cross& cross, const CrossAnalysis& analysis, const Provenance& provenance) {
    Document document;
    document.title = cross.name.empty() ? say(MessageId::ReportUnnamedCross) : cross.name;
    add_heading(document, 1, document.title);
    add_answer(document, analysis);
    add_material(document, cross, provenance.parents);
    add_hypothesis(document, cross, analysis);
    add_sown_to_scored(document, analysis);
    add_family_table(document, cross, analysis);
    if (analysis.totals) {
        add_sample(document, *analysis.totals);
    }
    if (analysis.heterogeneity) {
        add_sources(document, *analysis.heterogeneity);
        add_odd_families(document, *analysis.heterogeneity,
                         analysis.totals ? analysis.totals->input.alpha : AnalysisOptions{}.alpha);
    }
    add_set_aside(document, cross, analysis);
    add_incomplete(document, analysis);
    add_methods(document, analysis);
    add_standing_cautions(document);
    add_provenance(document, provenance);
    return document;
}

} // namespace filial::report
