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

enum class FamilyState : std::uint8_t { Tested, Blank, Incomplete, Empty, SetAside };
struct FamilyAnalysis {
    book::Id id;
    std::string label;
    FamilyState state = FamilyState::Blank;
    std::optional<std::int64_t> total;     ///< empty where incomplete
    std::optional<fit::GoodnessOfFit> fit; ///< where complete and not all zero; set-aside families too, muted
    std::vector<Message> hints;            ///< "These look like percentages", unless dismissed
};

struct SownToScored {
    std::optional<std::int64_t> sown, emerged, alive; ///< sums over the chosen families; empty unless each has it
    std::int64_t scored = 0;
    std::int64_t not_scored = 0;
    std::int64_t lost = 0; ///< sown (or emerged, alive) - scored
    /// For each class: would the verdict change, were every lost one of that class?
    struct IfAllLost {
        std::size_t class_index = 0;
        double p = 1.0;
        bool verdict_changes = false;
        double share = 0.0;
    };
    std::vector<IfAllLost> if_all_lost;
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
    std::size_t incomplete = 0, set_aside = 0, included = 0;
    std::optional<fit::GoodnessOfFit> totals;             ///< the chosen families together
    std::optional<families::Heterogeneity> heterogeneity; ///< two or more families with plants
    std::optional<SownToScored> sown_to_scored;
    std::vector<Message> notes; ///< "1 incomplete", "1 set aside"
};

/// A pure function of the cross and options; everything the desk shows comes from here.
[[nodiscard]] CrossAnalysis analyse(const book::Cross& cross, const AnalysisOptions& options,
                                    const CancellationToken& cancel = {});

/// The hypothesis with its terms in class order, after the binding.
[[nodiscard]] Result<inheritance::Hypothesis> bound_hypothesis(const book::Cross& cross);

} // namespace filial::report
