// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "core/book/model.h"
#include "core/families/heterogeneity.h"
#include "core/fit/goodness_of_fit.h"

// Terms. A cross analysis is all that the Score desk, `filial score FILE` and the report show of one cross: one result
// a family, one for the chosen families together, their heterogeneity, and sown to scored.
namespace filial::report {

struct AnalysisOptions {
    double alpha = 0.05;
    fit::Method method = fit::Method::Auto;
    fit::Order order = fit::Order::ChiSquare;
    std::int64_t replicates = 100'000;
    std::uint64_t seed = 1;
    /// Families the summary is about, by id; empty: all that are complete and not set aside.
    std::vector<book::Id> selection;
};

/// Tested: complete and with plants. Empty: complete, every class 0. Blank: nothing entered. Incomplete: some class
/// blank or not looked at. SetAside: whatever its counts are.
enum class FamilyState : std::uint8_t { Tested, Blank, Incomplete, Empty, SetAside };
struct FamilyAnalysis {
    book::Id id;
    std::string label;
    FamilyState state = FamilyState::Blank;
    bool included = false;                 ///< its counts enter the totals
    std::optional<std::int64_t> total;     ///< empty where incomplete
    std::optional<fit::GoodnessOfFit> fit; ///< where complete and not all zero; set-aside families too, muted
    std::vector<Message> hints;            ///< "These look like percentages", unless dismissed; more alive than emerged
};

struct SownToScored {
    std::optional<std::int64_t> sown, emerged, alive; ///< sums over the chosen families; empty unless each has it
    std::int64_t scored = 0;
    std::int64_t not_scored = 0;
    /// From the earliest number known (sown, emerged, alive; else scored and not scored together) to scored; 0 where
    /// more were scored.
    std::int64_t lost = 0;
    /// For each class of the cross: would the verdict change, were every lost one of that class?
    struct IfAllLost {
        std::size_t class_index = 0;
        double p = 1.0; ///< the P that decides the verdict then
        bool verdict_changes = false;
        double share = 0.0; ///< of the class among all, then
    };
    std::vector<IfAllLost> if_all_lost; ///< empty where nothing is lost, or nothing is tested
    std::vector<Message> sentences;
};

struct CrossAnalysis {
    std::vector<std::string> class_labels;
    std::optional<inheritance::Hypothesis> hypothesis; ///< as bound to the classes
    std::optional<Error> hypothesis_error;             ///< not readable, or terms and classes differ in number
    std::vector<FamilyAnalysis> families;              ///< in table order
    std::vector<std::int64_t> column_totals;           ///< over complete families not set aside (or the selection)
    std::int64_t total = 0;
    std::int64_t not_scored = 0;
    /// Of all families, or of the selection: with a blank or not-looked class (Blank too), set aside, in the totals.
    std::size_t incomplete = 0, set_aside = 0, included = 0;
    std::optional<fit::GoodnessOfFit> totals;             ///< the chosen families together; with plants only
    std::optional<families::Heterogeneity> heterogeneity; ///< two or more families with plants; no `per_family`
    /// The same with the complete set-aside families put back, where there is one with plants.
    std::optional<fit::GoodnessOfFit> totals_with_set_aside;
    std::optional<families::Heterogeneity> heterogeneity_with_set_aside;
    std::optional<SownToScored> sown_to_scored; ///< where something of it was entered
    std::vector<Message> notes;                 ///< "1 incomplete", "1 set aside"
    std::optional<Error> error;                 ///< why there are no results although the hypothesis is good
};

/// A pure function of the cross and options; everything the desk shows comes from here. With a selection the summary is
/// about its families; those set aside are left out unless nothing else is selected. Ids that the cross does not hold
/// are passed over. Results of `previous` whose question has not changed are taken over instead of computed again.
[[nodiscard]] CrossAnalysis analyse(const book::Cross& cross, const AnalysisOptions& options,
                                    const CancellationToken& cancel = {}, const CrossAnalysis* previous = nullptr);

/// The hypothesis with its terms in class order, after the binding. Errors: those of its notation, and terms and
/// classes that differ in number.
[[nodiscard]] Result<inheritance::Hypothesis> bound_hypothesis(const book::Cross& cross);

/// A catalogue hypothesis that the chosen families' totals do not reject either, its terms in class order as stated.
struct AlsoNotContradicted {
    std::string name, notation;
    double p = 1.0; ///< chi-square
};
struct Alternatives {
    std::vector<AlsoNotContradicted> not_contradicted; ///< likeliest first
    std::size_t tried = 0;                             ///< catalogue hypotheses with as many classes
    std::vector<Message> notes; ///< how many were tried; that a ratio chosen after the counts needs new plants
};
/// Tests the totals against every catalogue hypothesis with as many classes, with the same joins; at most `most` are
/// listed. Empty where nothing is tested. Separate from `analyse` because it is wanted on demand.
[[nodiscard]] Alternatives also_not_contradicted(const CrossAnalysis& analysis, std::size_t most = 5);

} // namespace filial::report
