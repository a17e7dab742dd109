// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/report/sections.h"
#include "core/report/wording.h"

// The sections about a cross as a whole: its material, its hypothesis, what was lost on the way, cautions and where the
// numbers come from.
namespace filial::report {

namespace {

std::string joined(const std::vector<std::string>& parts, std::string_view between) {
    std::string text;
    for (const std::string& part : parts) {
        text += (text.empty() ? "" : std::string(between)) + part;
    }
    return text;
}

std::string trait_text(const book::Trait& trait) {
    std::vector<std::string> levels;
    for (const book::Level& level : trait.levels) {
        levels.push_back(level.label);
    }
    return trait.name.empty() ? joined(levels, ", ") : trait.name + ": " + joined(levels, ", ");
}

/// Who scored when, from the families: each pair once, in table order.
std::string scored_text(const book::Cross& cross) {
    std::vector<std::string> seen;
    for (const book::Family& family : cross.families) {
        const std::string one =
            family.who.empty() || family.date.empty() ? family.date + family.who : family.date + ", " + family.who;
        bool known = one.empty();
        for (const std::string& before : seen) {
            known = known || before == one;
        }
        if (!known) {
            seen.push_back(one);
        }
    }
    return joined(seen, "; ");
}

MessageId origin_text(inheritance::Origin origin) {
    switch (origin) {
    case inheritance::Origin::Typed:
        return MessageId::ReportOriginTyped;
    case inheritance::Origin::Catalogue:
        return MessageId::ReportOriginCatalogue;
    case inheritance::Origin::Derived:
        break;
    }
    return MessageId::ReportOriginDerived;
}

/// A name from the catalogue says more than the way it was chosen.
std::string came_from(const book::HypothesisUse& use, const inheritance::Hypothesis& hypothesis) {
    const std::string origin = say(origin_text(hypothesis.origin()));
    return use.name.empty() ? origin : use.name;
}

std::string joins_text(const book::HypothesisUse& use, const std::vector<std::string>& labels) {
    std::vector<std::string> groups;
    for (const std::vector<std::size_t>& join : use.joins) {
        std::vector<std::string> members;
        for (const std::size_t member : join) {
            members.push_back(member < labels.size() ? labels[member] : "?");
        }
        groups.push_back(joined(members, " + "));
    }
    return joined(groups, "; ");
}

std::string optional_count(const std::optional<std::int64_t>& count) {
    return count ? shown_count(*count) : "";
}

void add_if_all_lost(Document& document, const CrossAnalysis& analysis) {
    const SownToScored& sown = *analysis.sown_to_scored;
    if (sown.if_all_lost.empty() || sown.lost <= 0) {
        return;
    }
    Table table;
    table.columns = {{say(MessageId::ReportIfAllLost), Align::Left},
                     {say(MessageId::ReportShareThen), Align::Right},
                     {say(MessageId::ReportP), Align::Right},
                     {say(MessageId::ReportVerdict), Align::Left}};
    for (const SownToScored::IfAllLost& one : sown.if_all_lost) {
        const std::string label =
            one.class_index < analysis.class_labels.size() ? analysis.class_labels[one.class_index] : "";
        table.rows.push_back(
            {{label, fixed_text(100.0 * one.share, 1) + "%", p_text(one.p),
              say(one.verdict_changes ? MessageId::ReportVerdictChanges : MessageId::ReportVerdictStays)},
             TableRow::Role::Body});
    }
    document.blocks.emplace_back(std::move(table));
}

} // namespace

void add_material(Document& document, const book::Cross& cross, const std::vector<std::string>& parents) {
    std::vector<std::pair<std::string, std::string>> facts;
    facts.emplace_back(say(MessageId::ReportParents), joined(parents, " × "));
    facts.emplace_back(say(MessageId::ReportGeneration), cross.generation);
    for (const book::Trait& trait : cross.traits) {
        facts.emplace_back(say(MessageId::ReportTrait), trait_text(trait));
    }
    facts.emplace_back(say(MessageId::ReportSownOn), cross.date);
    facts.emplace_back(say(MessageId::ReportStage), cross.stage);
    facts.emplace_back(say(MessageId::ReportGrownBy), cross.who);
    facts.emplace_back(say(MessageId::ReportScored), scored_text(cross));
    facts.emplace_back(say(MessageId::ReportRemarks), cross.note);
    add_heading(document, 2, say(MessageId::ReportMaterial));
    add_facts(document, facts);
}

void add_hypothesis(Document& document, const book::Cross& cross, const CrossAnalysis& analysis) {
    add_heading(document, 2, say(MessageId::ReportHypothesis));
    if (!analysis.hypothesis) {
        add_text(document, analysis.hypothesis_error ? render(analysis.hypothesis_error->message)
                                                     : say(MessageId::ReportNoHypothesis));
        return;
    }
    const book::HypothesisUse& use = cross.hypothesis;
    add_facts(document, {{say(MessageId::ReportRatio), say(MessageId::ReportNotation, {ratio_argument(use.notation)})},
                         {say(MessageId::ReportCameFrom), came_from(use, *analysis.hypothesis)},
                         {say(MessageId::ReportJoined), joins_text(use, analysis.class_labels)}});
    if (use.chosen_after_seeing) {
        add_text(document, say(MessageId::ReportChosenAfter), Paragraph::Role::Caution);
    }
}

void add_sown_to_scored(Document& document, const CrossAnalysis& analysis) {
    if (!analysis.sown_to_scored) {
        return;
    }
    const SownToScored& sown = *analysis.sown_to_scored;
    add_heading(document, 2, say(MessageId::ReportSownToScored));
    Table table;
    std::vector<std::string> cells;
    const auto column = [&](MessageId title, const std::string& value) {
        if (!value.empty()) {
            table.columns.push_back({say(title), Align::Right});
            cells.push_back(value);
        }
    };
    column(MessageId::ReportSown, optional_count(sown.sown));
    column(MessageId::ReportEmerged, optional_count(sown.emerged));
    column(MessageId::ReportAlive, optional_count(sown.alive));
    column(MessageId::ReportScoredPlants, shown_count(sown.scored));
    column(MessageId::ReportNotScored, shown_count(sown.not_scored));
    column(MessageId::ReportLost, shown_count(sown.lost));
    table.rows.push_back({cells, TableRow::Role::Body});
    document.blocks.emplace_back(std::move(table));
    for (const Message& sentence : sown.sentences) {
        add_text(document, render(sentence));
    }
    add_if_all_lost(document, analysis);
}

std::vector<std::string> standing_cautions() {
    return {say(MessageId::ReportCautionResearch), say(MessageId::ReportCautionPeople),
            say(MessageId::ReportCautionAnimals)};
}

void add_standing_cautions(Document& document) {
    add_heading(document, 2, say(MessageId::ReportCautions));
    for (const std::string& caution : standing_cautions()) {
        add_text(document, caution);
    }
}

void add_provenance(Document& document, const Provenance& provenance) {
    add_heading(document, 2, say(MessageId::ReportRerun));
    add_facts(document, {{say(MessageId::ReportProgram),
                          provenance.program_version.empty() ? std::string() : "Filial " + provenance.program_version},
                         {say(MessageId::ReportInput), provenance.input_name},
                         {say(MessageId::ReportSha), provenance.input_sha256},
                         {say(MessageId::ReportDate), provenance.date}});
    if (!provenance.command.empty()) {
        document.blocks.emplace_back(Command{provenance.command});
    }
}

} // namespace filial::report
