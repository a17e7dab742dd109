// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/report/cross_analysis.h"

#include <algorithm>
#include <unordered_set>
#include <utility>

#include "core/report/sown_to_scored.h"

namespace filial::report {
namespace {

// Counts that add to 99 to 101 with none above 100 read like rounded percentages.
constexpr std::int64_t kPercentLow = 99, kPercentHigh = 101, kPercentLargest = 100;
constexpr const char* kPercentagesHint = "percentages";

Argument count_of(std::size_t number) {
    return count_argument(static_cast<std::int64_t>(number));
}

std::int64_t sum_of(const std::vector<Count>& counts) {
    std::int64_t sum = 0;
    for (const Count count : counts)
        sum += count.value();
    return sum;
}

bool look_like_percentages(const book::Family& family, const std::vector<Count>& counts) {
    const std::int64_t sum = sum_of(counts);
    const bool small = std::all_of(counts.begin(), counts.end(), [](Count c) { return c.value() <= kPercentLargest; });
    const auto& dismissed = family.dismissed_hints;
    return small && sum >= kPercentLow && sum <= kPercentHigh && family.plants.empty() &&
           std::find(dismissed.begin(), dismissed.end(), kPercentagesHint) == dismissed.end();
}

FamilyState state_of(const book::Family& family, std::size_t classes, const std::optional<std::vector<Count>>& counts) {
    if (family.set_aside.has_value())
        return FamilyState::SetAside;
    if (counts.has_value())
        return sum_of(*counts) > 0 ? FamilyState::Tested : FamilyState::Empty;
    return family.blank(classes) ? FamilyState::Blank : FamilyState::Incomplete;
}

// The fit cannot know of a tally, of a hint dismissed, or that a total of several families is near 100 by chance.
void set_percentages_caution(fit::GoodnessOfFit& fit, bool caution) {
    std::erase_if(fit.cautions, [](const Message& one) { return one.id == MessageId::FitLooksLikePercentages; });
    if (caution)
        fit.cautions.push_back({MessageId::FitLooksLikePercentages, {}});
}

bool same_question(const fit::Input& a, const fit::Input& b) {
    return a.observed == b.observed && a.alpha == b.alpha && a.method == b.method && a.order == b.order &&
           a.replicates == b.replicates && a.seed == b.seed && a.joins == b.joins &&
           a.joins_after_seeing == b.joins_after_seeing && a.fitted_elsewhere == b.fitted_elsewhere &&
           a.labels == b.labels && a.level_counts == b.level_counts && a.trait_names == b.trait_names &&
           a.hypothesis == b.hypothesis && a.hypothesis.notation() == b.hypothesis.notation();
}

// What one pass over the cross gathers; the families' counts are read once.
class Analysis {
public:
    Analysis(const book::Cross& cross, const AnalysisOptions& options, const CancellationToken& cancel,
             const CrossAnalysis* previous)
        : cross_(cross), options_(options), cancel_(cancel), previous_(previous), classes_(cross.classes.size()) {}

    CrossAnalysis run() {
        for (std::size_t i = 0; i < classes_; ++i)
            result_.class_labels.push_back(cross_.class_label(ClassIndex{i}));
        read_hypothesis();
        read_families();
        choose();
        add_up();
        if (question_.has_value())
            test();
        sum_stages();
        say_notes();
        return std::move(result_);
    }

private:
    void read_hypothesis();
    void read_families();
    void choose();
    void add_up();
    void test();
    void test_families();
    void sum_stages();
    void say_notes();

    [[nodiscard]] const fit::GoodnessOfFit* known_fit(std::size_t family, const fit::Input& question) const;
    [[nodiscard]] bool has_plants(std::size_t family) const {
        return counts_[family].has_value() && sum_of(*counts_[family]) > 0;
    }
    void test_together(const std::vector<std::size_t>& families, std::optional<fit::GoodnessOfFit>& totals,
                       std::optional<families::Heterogeneity>& heterogeneity);

    const book::Cross& cross_;
    const AnalysisOptions& options_;
    const CancellationToken& cancel_;
    const CrossAnalysis* previous_;
    std::size_t classes_;
    CrossAnalysis result_;
    std::optional<fit::Input> question_; // without counts
    std::vector<std::optional<std::vector<Count>>> counts_;
    std::vector<std::size_t> scope_;    // the selection, or all
    std::vector<std::size_t> chosen_;   // in the totals
    std::vector<std::size_t> put_back_; // complete set-aside families with plants that the totals leave out
};

void Analysis::read_hypothesis() {
    if (cross_.hypothesis.notation.empty())
        return;
    auto bound = bound_hypothesis(cross_);
    if (!bound) {
        result_.hypothesis_error = bound.error();
        return;
    }
    result_.hypothesis = bound.value();
    question_ = fit::Input{.labels = result_.class_labels,
                           .observed = {},
                           .hypothesis = std::move(bound).value(),
                           .joins = cross_.hypothesis.joins,
                           .joins_after_seeing = cross_.hypothesis.joins_after_seeing,
                           .fitted_elsewhere = cross_.hypothesis.fitted_elsewhere,
                           .level_counts = cross_.level_counts(),
                           .trait_names = cross_.trait_names(),
                           .alpha = options_.alpha,
                           .method = options_.method,
                           .order = options_.order,
                           .replicates = options_.replicates,
                           .seed = options_.seed};
    if (question_->level_counts.empty())
        question_->trait_names.clear();
}

void Analysis::read_families() {
    counts_.reserve(cross_.families.size());
    result_.families.reserve(cross_.families.size());
    for (const book::Family& family : cross_.families) {
        const auto& counts = counts_.emplace_back(family.counts(classes_));
        FamilyAnalysis& one = result_.families.emplace_back();
        one.id = family.id;
        one.label = family.label;
        one.state = state_of(family, classes_, counts);
        if (counts.has_value()) {
            one.total = sum_of(*counts);
            if (look_like_percentages(family, *counts))
                one.hints.push_back({MessageId::FitLooksLikePercentages, {}});
        }
        for (Message& hint : stage_hints(family, classes_))
            one.hints.push_back(std::move(hint));
    }
}

void Analysis::choose() {
    const std::unordered_set<book::Id> selected(options_.selection.begin(), options_.selection.end());
    for (std::size_t j = 0; j < cross_.families.size(); ++j)
        if (selected.contains(cross_.families[j].id))
            scope_.push_back(j);
    const bool selection = !scope_.empty();
    if (!selection)
        for (std::size_t j = 0; j < cross_.families.size(); ++j)
            scope_.push_back(j);
    const auto aside = [&](std::size_t j) { return result_.families[j].state == FamilyState::SetAside; };
    const bool only_aside = selection && std::all_of(scope_.begin(), scope_.end(), aside);
    for (const std::size_t j : scope_) {
        if (aside(j))
            ++result_.set_aside;
        else if (!counts_[j].has_value())
            ++result_.incomplete;
        if (counts_[j].has_value() && (!aside(j) || only_aside)) {
            chosen_.push_back(j);
            result_.families[j].included = true;
        } else if (aside(j) && has_plants(j)) {
            put_back_.push_back(j);
        }
    }
    result_.included = chosen_.size();
}

void Analysis::add_up() {
    result_.column_totals.assign(classes_, 0);
    for (const std::size_t j : chosen_) {
        for (std::size_t i = 0; i < classes_; ++i)
            result_.column_totals[i] += (*counts_[j])[i].value();
        if (const book::Cell cell = cross_.families[j].not_scored_cell(); cell.state == book::CellState::Number)
            result_.not_scored += cell.count.value();
    }
    for (const std::int64_t column : result_.column_totals)
        result_.total += column;
}

const fit::GoodnessOfFit* Analysis::known_fit(std::size_t family, const fit::Input& question) const {
    if (previous_ == nullptr)
        return nullptr;
    // A row may have moved by one: a family was inserted or deleted above it.
    for (const std::size_t at : {family, family + 1, family - 1}) {
        if (at >= previous_->families.size() || previous_->families[at].id != cross_.families[family].id)
            continue;
        const auto& fit = previous_->families[at].fit;
        return fit.has_value() && same_question(fit->input, question) ? &*fit : nullptr;
    }
    return nullptr;
}

void Analysis::test_families() {
    for (std::size_t j = 0; j < counts_.size(); ++j) {
        if (!has_plants(j))
            continue;
        if (cancel_.cancelled()) {
            result_.error = Error{ErrorKind::Input, {MessageId::Cancelled, {}}, std::nullopt};
            return;
        }
        question_->observed = *counts_[j];
        FamilyAnalysis& family = result_.families[j];
        if (const fit::GoodnessOfFit* known = known_fit(j, *question_)) {
            family.fit = *known;
        } else if (auto fit = fit::goodness_of_fit(*question_, cancel_)) {
            family.fit = std::move(fit).value();
        } else {
            result_.error = fit.error();
            return;
        }
        const bool percentages = std::any_of(family.hints.begin(), family.hints.end(), [](const Message& hint) {
            return hint.id == MessageId::FitLooksLikePercentages;
        });
        set_percentages_caution(*family.fit, percentages);
    }
}

void Analysis::test_together(const std::vector<std::size_t>& families, std::optional<fit::GoodnessOfFit>& totals,
                             std::optional<families::Heterogeneity>& heterogeneity) {
    families::Input input{.families = {}, .common = *question_, .with_family_fits = false};
    std::int64_t plants = 0;
    std::size_t with_plants = 0;
    for (const std::size_t j : families) {
        input.families.push_back({cross_.families[j].label, *counts_[j]});
        plants += *result_.families[j].total;
        with_plants += has_plants(j) ? 1U : 0U;
    }
    if (with_plants == 0)
        return;
    if (plants > Count::kLargest) {
        result_.error =
            Error{ErrorKind::Input,
                  {MessageId::CrossTooManyPlants, {count_argument(plants), count_argument(Count::kLargest)}},
                  std::nullopt};
        return;
    }
    if (with_plants == 1) {
        const auto only = std::find_if(families.begin(), families.end(), [&](std::size_t j) { return has_plants(j); });
        totals = result_.families[*only].fit;
        return;
    }
    auto together = families::heterogeneity(input, cancel_);
    if (!together) {
        result_.error = together.error();
        return;
    }
    heterogeneity = std::move(together).value();
    set_percentages_caution(heterogeneity->pooled_fit, false);
    totals = heterogeneity->pooled_fit;
}

void Analysis::test() {
    test_families();
    if (result_.error.has_value())
        return;
    test_together(chosen_, result_.totals, result_.heterogeneity);
    if (put_back_.empty() || result_.error.has_value())
        return;
    std::vector<std::size_t> with = chosen_;
    with.insert(with.end(), put_back_.begin(), put_back_.end());
    std::sort(with.begin(), with.end());
    test_together(with, result_.totals_with_set_aside, result_.heterogeneity_with_set_aside);
}

void Analysis::sum_stages() {
    std::vector<const book::Family*> families;
    families.reserve(chosen_.size());
    for (const std::size_t j : chosen_)
        families.push_back(&cross_.families[j]);
    result_.sown_to_scored =
        sown_to_scored(families, result_.total, result_.totals.has_value() ? &*result_.totals : nullptr, cancel_);
}

void Analysis::say_notes() {
    if (result_.incomplete > 0)
        result_.notes.push_back({MessageId::NoteIncomplete, {count_of(result_.incomplete)}});
    if (result_.set_aside > 0)
        result_.notes.push_back({MessageId::NoteSetAside, {count_of(result_.set_aside)}});
    if (result_.total == 0)
        result_.notes.push_back({MessageId::NoteNothingToTest, {}});
    if (cross_.hypothesis.chosen_after_seeing && result_.hypothesis.has_value())
        result_.notes.push_back({MessageId::NoteChosenAfterSeeing, {}});
}

} // namespace

CrossAnalysis analyse(const book::Cross& cross, const AnalysisOptions& options, const CancellationToken& cancel,
                      const CrossAnalysis* previous) {
    return Analysis(cross, options, cancel, previous).run();
}

Result<inheritance::Hypothesis> bound_hypothesis(const book::Cross& cross) {
    auto hypothesis = inheritance::read_hypothesis(cross.hypothesis.notation);
    if (!hypothesis)
        return hypothesis;
    const std::size_t terms = hypothesis.value().class_count();
    if (terms != cross.classes.size())
        return Error{ErrorKind::Input,
                     {MessageId::CrossClassCount,
                      {ratio_argument(hypothesis.value().notation()), count_of(terms), count_of(cross.classes.size())}},
                     std::nullopt};
    return inheritance::bind(hypothesis.value(), cross.hypothesis.binding);
}

} // namespace filial::report
