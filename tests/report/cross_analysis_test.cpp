// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/report/cross_analysis.h"

#include <algorithm>
#include <cstdlib>

#include <gtest/gtest.h>

#include "core/report/wording.h"
#include "tests/support/oracle.h"

namespace filial::report {
namespace {

using book::CellState;

constexpr MessageId kHint = MessageId::FitLooksLikePercentages;

book::Cell cell(std::int64_t count) {
    return {CellState::Number, Count(count)};
}

book::Family family(const std::string& label, const std::vector<std::int64_t>& counts) {
    book::Family result;
    result.id = "id-" + label;
    result.label = label;
    for (const auto count : counts)
        result.typed.push_back(cell(count));
    return result;
}

book::Cross two_traits(const std::string& notation) {
    book::Cross cross;
    cross.name = "K14 × M02, F2";
    cross.traits = {{"stem", {{"purple", ""}, {"green", ""}}}, {"leaf", {{"hairy", ""}, {"smooth", ""}}}};
    cross.classes = book::product_classes(cross.traits);
    cross.hypothesis.notation = notation;
    return cross;
}

// Eight families of the trial ground.
book::Cross eight_families() {
    book::Cross cross = two_traits("9:3:3:1");
    const std::vector<std::vector<std::int64_t>> counts{{35, 16, 9, 4},  {35, 9, 9, 5},   {45, 13, 10, 3},
                                                        {36, 9, 12, 3},  {38, 12, 12, 4}, {34, 3, 11, 1},
                                                        {26, 13, 19, 4}, {31, 7, 17, 2}};
    for (std::size_t j = 0; j < counts.size(); ++j)
        cross.families.push_back(family("F2-0" + std::to_string(j + 1), counts[j]));
    return cross;
}

bool says(const std::vector<Message>& messages, MessageId id) {
    return std::any_of(messages.begin(), messages.end(), [&](const Message& one) { return one.id == id; });
}

std::vector<std::string> sentences(const std::vector<Message>& messages) {
    std::vector<std::string> result;
    for (const Message& message : messages)
        result.push_back(render(message));
    return result;
}

AnalysisOptions selecting(std::vector<book::Id> ids) {
    AnalysisOptions options;
    options.selection = std::move(ids);
    return options;
}

TEST(CrossAnalysis, AddsUpTheFamilies) {
    const CrossAnalysis analysis = analyse(eight_families(), {});
    EXPECT_EQ(analysis.class_labels[0], "purple · hairy");
    EXPECT_EQ(analysis.column_totals, (std::vector<std::int64_t>{280, 82, 99, 26})); // added by hand
    EXPECT_EQ(analysis.total, 487);
    EXPECT_EQ(analysis.included, 8U);
    ASSERT_TRUE(analysis.totals.has_value());
    EXPECT_EQ(analysis.totals->n, 487);
    ASSERT_TRUE(analysis.heterogeneity.has_value());
    EXPECT_TRUE(analysis.heterogeneity->per_family.empty());
    EXPECT_EQ(analysis.heterogeneity->contingency->df, 21);
    for (const FamilyAnalysis& one : analysis.families) {
        EXPECT_EQ(one.state, FamilyState::Tested);
        EXPECT_TRUE(one.included && one.fit.has_value() && one.hints.empty());
    }
    EXPECT_TRUE(analysis.notes.empty());
    EXPECT_FALSE(analysis.sown_to_scored.has_value());
    EXPECT_FALSE(analysis.error.has_value());
}

TEST(CrossAnalysis, TellsTheStatesApart) {
    book::Cross cross = eight_families();
    for (auto& one : cross.families[1].typed)
        one = {};
    cross.families[2].typed[3] = {};
    cross.families[3].typed[0] = {CellState::NotLooked, {}};
    for (auto& one : cross.families[4].typed)
        one = cell(0);
    cross.families[5].set_aside = "tray flooded";
    const CrossAnalysis analysis = analyse(cross, {});
    const std::vector<FamilyState> states{FamilyState::Tested,     FamilyState::Blank, FamilyState::Incomplete,
                                          FamilyState::Incomplete, FamilyState::Empty, FamilyState::SetAside,
                                          FamilyState::Tested,     FamilyState::Tested};
    for (std::size_t j = 0; j < states.size(); ++j) {
        EXPECT_EQ(analysis.families[j].state, states[j]) << j;
        EXPECT_EQ(analysis.families[j].fit.has_value(),
                  states[j] == FamilyState::Tested || states[j] == FamilyState::SetAside);
    }
    EXPECT_FALSE(analysis.families[2].total.has_value());
    EXPECT_EQ(analysis.families[4].total, 0);
    EXPECT_EQ(analysis.column_totals, (std::vector<std::int64_t>{35 + 26 + 31, 16 + 13 + 7, 9 + 19 + 17, 4 + 4 + 2}));
    EXPECT_EQ(analysis.incomplete, 3U);
    EXPECT_EQ(analysis.set_aside, 1U);
    EXPECT_EQ(analysis.included, 4U);
    EXPECT_EQ(analysis.heterogeneity->families_of_df, 3U);
    EXPECT_EQ(sentences(analysis.notes), (std::vector<std::string>{"3 incomplete", "1 set aside"}));
}

TEST(CrossAnalysis, ShowsBothAnalysesWhereAFamilyIsSetAside) {
    book::Cross cross = eight_families();
    const CrossAnalysis whole = analyse(cross, {});
    EXPECT_FALSE(whole.totals_with_set_aside.has_value());
    cross.families[5].set_aside = "tray flooded";
    const CrossAnalysis analysis = analyse(cross, {});
    EXPECT_EQ(analysis.total, 487 - 49);
    EXPECT_EQ(analysis.totals->n, 487 - 49);
    EXPECT_EQ(analysis.heterogeneity->contingency->df, 18);
    ASSERT_TRUE(analysis.totals_with_set_aside.has_value());
    EXPECT_EQ(analysis.totals_with_set_aside->n, 487);
    EXPECT_EQ(analysis.totals_with_set_aside->chi_square->statistic, whole.totals->chi_square->statistic);
    EXPECT_EQ(analysis.heterogeneity_with_set_aside->contingency->statistic,
              whole.heterogeneity->contingency->statistic);
    EXPECT_EQ(analysis.families[5].fit->chi_square->statistic, whole.families[5].fit->chi_square->statistic);
}

TEST(CrossAnalysis, FollowsTheSelection) {
    book::Cross cross = eight_families();
    const CrossAnalysis one = analyse(cross, selecting({"id-F2-06"}));
    EXPECT_EQ(one.column_totals, (std::vector<std::int64_t>{34, 3, 11, 1}));
    EXPECT_FALSE(one.heterogeneity.has_value());
    EXPECT_EQ(one.totals->chi_square->statistic, one.families[5].fit->chi_square->statistic);
    EXPECT_TRUE(one.families[0].fit.has_value()); // the table still shows every family's P
    EXPECT_FALSE(one.families[0].included);

    const CrossAnalysis two = analyse(cross, selecting({"id-F2-08", "id-F2-01", "id-of-nobody"}));
    EXPECT_EQ(two.column_totals, (std::vector<std::int64_t>{66, 23, 26, 6}));
    EXPECT_EQ(two.heterogeneity->contingency->df, 3);
    EXPECT_EQ(analyse(cross, selecting({"id-of-nobody"})).total, 487);

    cross.families[5].set_aside = "tray flooded";
    EXPECT_EQ(analyse(cross, selecting({"id-F2-05", "id-F2-06"})).total, 66); // left out beside others …
    const CrossAnalysis aside = analyse(cross, selecting({"id-F2-06"}));      // … and looked at alone
    EXPECT_EQ(aside.total, 49);
    EXPECT_EQ(aside.set_aside, 1U);
    EXPECT_FALSE(aside.totals_with_set_aside.has_value());
}

TEST(CrossAnalysis, NamesBothNumbersWhereTermsAndClassesDiffer) {
    book::Cross cross = eight_families();
    cross.hypothesis.notation = "9:3:4";
    const CrossAnalysis analysis = analyse(cross, {});
    ASSERT_TRUE(analysis.hypothesis_error.has_value());
    EXPECT_EQ(analysis.hypothesis_error->message.id, MessageId::CrossClassCount);
    EXPECT_EQ(render(analysis.hypothesis_error->message),
              "9:3:4 has 3 terms, the cross 4 classes; each class needs one term");
    EXPECT_EQ(analysis.total, 487); // the counts stand all the same
    EXPECT_EQ(analysis.families[0].state, FamilyState::Tested);
    EXPECT_FALSE(analysis.families[0].fit.has_value());
    EXPECT_FALSE(analysis.totals.has_value());

    cross.hypothesis.notation = "9:3:3:x";
    EXPECT_TRUE(analyse(cross, {}).hypothesis_error.has_value());
    cross.hypothesis.notation = "";
    EXPECT_FALSE(analyse(cross, {}).hypothesis_error.has_value());
    EXPECT_FALSE(bound_hypothesis(cross).ok());
}

TEST(CrossAnalysis, BindsTermsToClasses) {
    book::Cross cross = two_traits("3:1:9:3");
    cross.hypothesis.binding = {2, 0, 3, 1};
    cross.families = {family("F2-01", {315, 101, 108, 32})};
    const auto bound = bound_hypothesis(cross);
    ASSERT_TRUE(bound.ok());
    EXPECT_EQ(bound.value().ratio()->weights(), (std::vector<std::int64_t>{9, 3, 3, 1}));
    // Mendel 1866 (Bateson 1902, p. 56): 315, 101, 108, 32. X2 = sum O^2/E - N with E = 312.75, 104.25, 104.25, 34.75.
    const double by_hand =
        315.0 * 315.0 / 312.75 + (101.0 * 101.0 + 108.0 * 108.0) / 104.25 + 32.0 * 32.0 / 34.75 - 556.0;
    EXPECT_NEAR(analyse(cross, {}).totals->chi_square->statistic, by_hand, 1e-11);
    cross.hypothesis.binding = {0, 0, 1, 2};
    EXPECT_TRUE(analyse(cross, {}).hypothesis_error.has_value());
}

TEST(CrossAnalysis, HintsAtPercentagesOnceAFamily) {
    const auto hint = [](const book::Cross& cross) { return says(analyse(cross, {}).families[0].hints, kHint); };
    book::Cross cross = two_traits("9:3:3:1");
    cross.families = {family("F2-01", {56, 19, 19, 6})};
    EXPECT_TRUE(hint(cross));
    cross.families[0].typed[3] = cell(8); // 102
    EXPECT_FALSE(hint(cross));
    cross.families[0].typed[3] = cell(5); // 99
    EXPECT_TRUE(hint(cross));
    cross.families[0].dismissed_hints = {"percentages"};
    EXPECT_FALSE(hint(cross));
    EXPECT_FALSE(says(analyse(cross, {}).totals->cautions, kHint));
    cross.families[0].dismissed_hints.clear();
    EXPECT_TRUE(says(analyse(cross, {}).totals->cautions, kHint));
    // 100 plants tallied one by one are plants.
    cross.families[0].typed.assign(4, book::Cell{});
    for (int i = 0; i < 100; ++i)
        cross.families[0].plants.push_back({ClassIndex{i < 60 ? 0U : 3U}, "", "", "", std::nullopt});
    EXPECT_FALSE(hint(cross));
    // Two families that add to 100 by chance are no percentages.
    cross.families = {family("F2-01", {28, 9, 10, 3}), family("F2-02", {28, 10, 9, 3})};
    EXPECT_FALSE(says(analyse(cross, {}).totals->cautions, kHint));
}

TEST(CrossAnalysis, SaysWhereAStageHoldsMoreThanAnEarlierOne) {
    book::Cross cross = two_traits("9:3:3:1");
    cross.families = {family("F2-01", {35, 16, 9, 4})};
    auto& one = cross.families[0];
    one.sown = Count(70);
    one.emerged = Count(68);
    one.alive = Count(66);
    EXPECT_TRUE(analyse(cross, {}).families[0].hints.empty());
    one.alive = Count(69);
    EXPECT_EQ(sentences(analyse(cross, {}).families[0].hints), (std::vector<std::string>{"69 alive, but 68 up"}));
    one.alive = Count(60);
    EXPECT_EQ(sentences(analyse(cross, {}).families[0].hints), (std::vector<std::string>{"64 scored, but 60 alive"}));
    one.emerged.reset();
    one.alive = Count(71);
    EXPECT_EQ(sentences(analyse(cross, {}).families[0].hints), (std::vector<std::string>{"71 alive, but 70 sown"}));
    one.alive.reset();
    one.emerged = Count(71);
    EXPECT_EQ(sentences(analyse(cross, {}).families[0].hints), (std::vector<std::string>{"71 up, but 70 sown"}));
    one.emerged.reset();
    one.sown = Count(60);
    EXPECT_EQ(sentences(analyse(cross, {}).families[0].hints), (std::vector<std::string>{"64 scored, but 60 sown"}));
    ASSERT_TRUE(analyse(cross, {}).totals.has_value()); // said, not refused
    EXPECT_EQ(analyse(cross, {}).sown_to_scored->lost, 0);
}

TEST(CrossAnalysis, SumsSownToScored) {
    book::Cross cross = eight_families();
    const std::vector<std::int64_t> sown{70, 64, 74, 66, 70, 64, 68, 64};
    const std::vector<std::int64_t> emerged{65, 62, 71, 62, 68, 61, 65, 57};
    for (std::size_t j = 0; j < sown.size(); ++j) {
        cross.families[j].sown = Count(sown[j]);
        cross.families[j].emerged = Count(emerged[j]);
    }
    cross.families[0].not_scored_typed = cell(2);
    const CrossAnalysis analysis = analyse(cross, {});
    ASSERT_TRUE(analysis.sown_to_scored.has_value());
    const SownToScored& stages = *analysis.sown_to_scored;
    EXPECT_EQ(stages.sown, 540);
    EXPECT_EQ(stages.emerged, 511);
    EXPECT_FALSE(stages.alive.has_value());
    EXPECT_EQ(stages.scored, 487);
    EXPECT_EQ(stages.not_scored, 2);
    EXPECT_EQ(stages.lost, 53);
    EXPECT_EQ(render(stages.sentences.at(0)), "540 sown · 511 up · 487 scored");

    cross.families[3].sown.reset();
    const CrossAnalysis some = analyse(cross, {});
    EXPECT_FALSE(some.sown_to_scored->sown.has_value());
    EXPECT_EQ(some.sown_to_scored->lost, 511 - 487);
    EXPECT_EQ(render(some.sown_to_scored->sentences.back()), "sown is entered for 7 of 8 families; the sum needs all");
    // A selection that has it sums it.
    EXPECT_EQ(analyse(cross, selecting({"id-F2-01", "id-F2-02"})).sown_to_scored->sown, 134);
}

TEST(CrossAnalysis, PlantsNotScoredAreAskedAboutWhereNothingElseIsKnown) {
    book::Cross cross = eight_families();
    cross.families[0].not_scored_typed = cell(2);
    const CrossAnalysis analysis = analyse(cross, {});
    EXPECT_EQ(analysis.not_scored, 2);
    EXPECT_EQ(sentences(analysis.sown_to_scored->sentences),
              (std::vector<std::string>{
                  "487 scored · 2 not scored",
                  "Even if every plant not scored were of one class, whichever, the verdict would stand."}));
}

// Whether the lost could change the verdict: SciPy's chi-square with them added; for two classes the
// exact P in the order of chi-square from its binomial probabilities.
TEST(CrossAnalysisOracle, BoundsTheVerdictByTheLost) {
    struct Case {
        std::string notation;
        std::vector<std::int64_t> weights, counts;
        std::int64_t lost;
    };
    const std::vector<Case> cases{{"9:3:3:1", {9, 3, 3, 1}, {280, 82, 99, 26}, 53},
                                  {"9:3:3:1", {9, 3, 3, 1}, {280, 82, 99, 26}, 12},
                                  {"9:3:3:1", {9, 3, 3, 1}, {280, 82, 99, 26}, 1},
                                  {"1:1:1:1", {1, 1, 1, 1}, {30, 22, 18, 40}, 9},
                                  {"9:3:4", {9, 3, 4}, {60, 31, 20}, 14},
                                  {"3:1", {3, 1}, {140, 60}, 11},
                                  {"9:7", {9, 7}, {70, 30}, 25},
                                  {"15:1", {15, 1}, {92, 4}, 6}};
    std::vector<test::Row> rows;
    for (std::size_t c = 0; c < cases.size(); ++c) {
        test::Row row{"c" + std::to_string(c), std::to_string(cases[c].lost), std::to_string(cases[c].weights.size())};
        for (const auto weight : cases[c].weights)
            row.push_back(std::to_string(weight));
        for (const auto count : cases[c].counts)
            row.push_back(std::to_string(count));
        rows.push_back(row);
    }
    const auto answers = test::run_oracle("families_lost.py", rows);
    std::size_t changes = 0, stands = 0;
    for (std::size_t c = 0; c < cases.size(); ++c) {
        book::Cross cross;
        for (std::size_t i = 0; i < cases[c].counts.size(); ++i)
            cross.classes.push_back({"class " + std::to_string(i + 1), {}, ""});
        cross.hypothesis.notation = cases[c].notation;
        cross.families = {family("F2-01", cases[c].counts)};
        std::int64_t total = 0;
        for (const auto count : cases[c].counts)
            total += count;
        cross.families[0].sown = Count(total + cases[c].lost);
        const CrossAnalysis analysis = analyse(cross, {});
        const test::Row& expected = answers.at("c" + std::to_string(c));
        const bool now = std::strtod(expected.at(1).c_str(), nullptr) < 0.05;
        ASSERT_TRUE(analysis.sown_to_scored.has_value());
        const auto& bounds = analysis.sown_to_scored->if_all_lost;
        ASSERT_EQ(bounds.size(), cases[c].counts.size());
        for (std::size_t i = 0; i < bounds.size(); ++i) {
            const double p = std::strtod(expected.at(2 + i).c_str(), nullptr);
            EXPECT_NEAR(bounds[i].p, p, 1e-9 * p) << c << " class " << i;
            EXPECT_EQ(bounds[i].verdict_changes, now != (p < 0.05)) << c << " class " << i;
            EXPECT_DOUBLE_EQ(bounds[i].share, static_cast<double>(cases[c].counts[i] + cases[c].lost) /
                                                  static_cast<double>(total + cases[c].lost));
            (bounds[i].verdict_changes ? changes : stands) += 1;
            const Message sentence{MessageId::LostSeedWouldChange, {text_argument(analysis.class_labels[i])}};
            const auto& said = analysis.sown_to_scored->sentences;
            EXPECT_EQ(std::find(said.begin(), said.end(), sentence) != said.end() ||
                          says(said, MessageId::LostSeedAnyWouldChange),
                      bounds[i].verdict_changes);
        }
    }
    EXPECT_GT(changes, 5U);
    EXPECT_GT(stands, 5U);
}

TEST(CrossAnalysis, TakesOverWhatHasNotChanged) {
    book::Cross cross = eight_families();
    const CrossAnalysis before = analyse(cross, {});
    cross.families[5].typed[1] = cell(9);
    cross.families.insert(cross.families.begin() + 2, family("F2-09", {30, 11, 9, 2}));
    const CrossAnalysis afresh = analyse(cross, {});
    const CrossAnalysis after = analyse(cross, {}, {}, &before);
    ASSERT_EQ(after.families.size(), afresh.families.size());
    for (std::size_t j = 0; j < after.families.size(); ++j) {
        EXPECT_EQ(after.families[j].fit->input.observed, afresh.families[j].fit->input.observed);
        EXPECT_EQ(after.families[j].fit->chi_square->statistic, afresh.families[j].fit->chi_square->statistic);
    }
    EXPECT_EQ(after.totals->chi_square->statistic, afresh.totals->chi_square->statistic);
    // Another hypothesis of the same weights is another question: its name is in the sentences.
    cross.hypothesis.notation = "18:6:6:2";
    EXPECT_EQ(analyse(cross, {}, {}, &before).families[0].fit->input.hypothesis.notation(), "18:6:6:2");
}

TEST(CrossAnalysis, StandsDegenerateCrosses) {
    book::Cross cross = two_traits("9:3:3:1");
    EXPECT_TRUE(says(analyse(cross, {}).notes, MessageId::NoteNothingToTest));
    cross.families = {family("F2-01", {0, 0, 0, 0})};
    const CrossAnalysis empty = analyse(cross, {});
    EXPECT_FALSE(empty.totals.has_value());
    EXPECT_TRUE(says(empty.notes, MessageId::NoteNothingToTest));
    cross.classes.clear();
    cross.families = {family("F2-01", {})};
    const CrossAnalysis classless = analyse(cross, {});
    EXPECT_TRUE(classless.hypothesis_error.has_value());
    EXPECT_EQ(classless.families[0].state, FamilyState::Blank);

    cross = two_traits("9:3:3:1");
    for (int j = 0; j < 5000; ++j)
        cross.families.push_back(family("F" + std::to_string(j), {Count::kLargestTyped, 0, 0, 0}));
    const CrossAnalysis huge = analyse(cross, {});
    ASSERT_TRUE(huge.error.has_value());
    EXPECT_EQ(huge.error->message.id, MessageId::CrossTooManyPlants);
    EXPECT_FALSE(huge.totals.has_value());

    CancellationToken cancel;
    cancel.cancel();
    const CrossAnalysis cancelled = analyse(eight_families(), {}, cancel);
    ASSERT_TRUE(cancelled.error.has_value());
    EXPECT_EQ(cancelled.error->message.id, MessageId::Cancelled);
}

TEST(CrossAnalysis, NotesAHypothesisChosenAfterSeeing) {
    book::Cross cross = eight_families();
    cross.hypothesis.chosen_after_seeing = true;
    EXPECT_TRUE(says(analyse(cross, {}).notes, MessageId::NoteChosenAfterSeeing));
}

TEST(CrossAnalysis, AlternativesAreNamedAndWarnedOfOnlyWhereTheRatioWasChosenAfterTheCounts) {
    book::Cross cross;
    cross.traits = {{"flower", {{"coloured", ""}, {"white", ""}}}};
    cross.classes = book::product_classes(cross.traits);
    cross.hypothesis.notation = "1:1";
    cross.families = {family("F2-01", {90, 70})}; // 9:7 to the plant: chi-square 0, P 1
    const Alternatives before = also_not_contradicted(analyse(cross, {}));
    ASSERT_FALSE(before.not_contradicted.empty());
    EXPECT_EQ(before.not_contradicted[0].notation, "9:7");
    EXPECT_FALSE(before.not_contradicted[0].name.empty());
    EXPECT_EQ(before.not_contradicted[0].p, 1.0);
    EXPECT_TRUE(says(before.notes, MessageId::AlternativesTried));
    EXPECT_FALSE(says(before.notes, MessageId::AlternativesConfirm));
    cross.hypothesis.chosen_after_seeing = true;
    EXPECT_TRUE(says(also_not_contradicted(analyse(cross, {})).notes, MessageId::AlternativesConfirm));
}

} // namespace
} // namespace filial::report
