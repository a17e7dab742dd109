// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/report/result_documents.h"

#include "core/report/sections.h"
#include "core/report/wording.h"

namespace filial::report {

namespace {

Document titled(std::string title) {
    Document document;
    document.title = std::move(title);
    add_heading(document, 1, document.title);
    return document;
}

std::string cross_title(const book::Cross& cross) {
    return say(MessageId::ReportCounts, {ratio_argument(cross.hypothesis.notation)});
}

double alpha_of(const CrossAnalysis& analysis) {
    return analysis.totals ? analysis.totals->input.alpha : AnalysisOptions{}.alpha;
}

Table genotype_table(const inheritance::Derivation& derivation) {
    Table table;
    table.columns = {{say(MessageId::ReportGenotype), Align::Left},
                     {say(MessageId::ReportFraction), Align::Right},
                     {say(MessageId::ReportProbability), Align::Right},
                     {say(MessageId::ReportPhenotype), Align::Left}};
    for (const inheritance::GenotypeRow& row : derivation.genotypes) {
        table.rows.push_back(
            {{row.genotype, row.fraction.empty() ? "–" : row.fraction, fixed_text(row.probability, 6), row.phenotype},
             TableRow::Role::Body});
    }
    return table;
}

Table class_table(const inheritance::Derivation& derivation) {
    Table table;
    table.columns = {{say(MessageId::ReportPhenotype), Align::Left},
                     {say(MessageId::ReportGenotypes), Align::Left},
                     {say(MessageId::ReportProbability), Align::Right}};
    for (const inheritance::DerivedClass& one : derivation.classes) {
        table.rows.push_back({{one.label, one.genotypes, fixed_text(one.probability, 6)}, TableRow::Role::Body});
    }
    return table;
}

} // namespace

Document score_document(const fit::GoodnessOfFit& result) {
    Document document = titled(say(MessageId::ReportCounts, {ratio_argument(result.input.hypothesis.notation())}));
    add_verdict(document, result);
    add_tests(document, result);
    add_classes(document, result);
    add_account(document, result);
    add_partition(document, result);
    add_detectable(document, result);
    return document;
}

Document cross_score_document(const book::Cross& cross, const CrossAnalysis& analysis) {
    Document document = titled(cross.name.empty() ? cross_title(cross) : cross.name);
    if (analysis.totals) {
        add_verdict(document, *analysis.totals);
        if (analysis.heterogeneity) {
            add_text(document, render(analysis.heterogeneity->line));
        }
        add_tests(document, *analysis.totals);
    }
    add_family_table(document, cross, analysis);
    if (analysis.totals) {
        add_account(document, *analysis.totals);
        add_partition(document, *analysis.totals);
    }
    add_sown_to_scored(document, analysis);
    add_set_aside(document, cross, analysis);
    add_incomplete(document, analysis);
    return document;
}

Document families_document(const book::Cross& cross, const CrossAnalysis& analysis) {
    Document document = titled(cross.name.empty() ? cross_title(cross) : cross.name);
    if (analysis.heterogeneity) {
        add_sources(document, *analysis.heterogeneity);
        add_odd_families(document, *analysis.heterogeneity, alpha_of(analysis));
    }
    add_family_table(document, cross, analysis);
    add_set_aside(document, cross, analysis);
    add_incomplete(document, analysis);
    return document;
}

Document derivation_document(const inheritance::DeriveInput& input, const inheritance::Derivation& derivation) {
    Document document = titled(say(MessageId::ReportDerivation, {text_argument(input.cross)}));
    add_text(document,
             derivation.ratio ? say(MessageId::ReportDerivedRatio, {ratio_argument(derivation.ratio->notation())})
                              : say(MessageId::ReportNoExactRatio),
             Paragraph::Role::Verdict);
    for (const Message& note : derivation.notes) {
        add_text(document, render(note));
    }
    add_heading(document, 2, say(MessageId::ReportPhenotypes));
    document.blocks.emplace_back(class_table(derivation));
    add_heading(document, 2, say(MessageId::ReportGenotypes));
    document.blocks.emplace_back(genotype_table(derivation));
    return document;
}

} // namespace filial::report
