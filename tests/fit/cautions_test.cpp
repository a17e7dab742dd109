// SPDX-License-Identifier: GPL-3.0-or-later
// When a caution is said and when it is not. The limits: common practice and Cochran 1954, Biometrics 10: 417-451.
#include <algorithm>
#include <cstdlib>

#include <gtest/gtest.h>

#include "tests/fit/fit_support.h"
#include "tests/support/oracle.h"

namespace filial::test {
namespace {

bool warns(const fit::GoodnessOfFit& found, MessageId id) {
    return std::any_of(found.cautions.begin(), found.cautions.end(), [id](const Message& m) { return m.id == id; });
}

bool warns_of_small(const fit::GoodnessOfFit& found) {
    return warns(found, MessageId::FitSmallExpected) || warns(found, MessageId::FitSmallExpectedCochran) ||
           warns(found, MessageId::FitSmallExpectedExact);
}

TEST(CautionsTest, SmallExpectedCounts) {
    EXPECT_FALSE(warns_of_small(fitted({46, 14, 15, 5}, "9:3:3:1"))); // 80 plants: 5 expected, not below
    // 79 plants: 4.9 expected in one class of four, more than the fifth that Cochran allows.
    EXPECT_TRUE(warns(fitted({45, 14, 15, 5}, "9:3:3:1"), MessageId::FitSmallExpectedCochran));
    // One class of six: within his fifth, and not below 1.
    EXPECT_TRUE(warns(fitted({20, 21, 19, 20, 18, 4}, "5:5:5:5:5:1"), MessageId::FitSmallExpected));
    // One class of six, but below 1.
    EXPECT_TRUE(warns(fitted({20, 21, 19, 20, 18, 0}, "40:40:40:40:40:1"), MessageId::FitSmallExpectedCochran));
    EXPECT_TRUE(warns(fitted({6, 2}, "3:1"), MessageId::FitSmallExpectedExact)); // there the exact P is at hand
}

TEST(CautionsTest, SmallClassesAreProposedToTheirSmallerNeighbour) {
    const auto found = fitted({20, 21, 10, 4, 60}, "20:20:10:4:60");
    EXPECT_TRUE(warns_of_small(found));
    EXPECT_EQ(found.proposed_joins, (std::vector<std::vector<std::size_t>>{{2, 3}}));
    EXPECT_TRUE(fitted({46, 14, 15, 5}, "9:3:3:1").proposed_joins.empty());
    EXPECT_TRUE(fitted({6, 2}, "3:1").proposed_joins.empty()); // one class would be left
}

TEST(CautionsTest, CloserThanChanceAllows) {
    // All four exactly at their expected counts; and the left tail of 0.2158 on 3 df is 0.0249, of 0.2171 it is 0.0251
    // (Fisher & Yates 1938, table IV: 0.185 at P 0.98 and 0.352 at 0.95).
    EXPECT_TRUE(warns(fitted({900, 300, 300, 100}, "9:3:3:1"), MessageId::FitTooClose));
    EXPECT_TRUE(warns(fitted({905, 300, 297, 98}, "9:3:3:1"), MessageId::FitTooClose));  // X2 = 0.098
    EXPECT_FALSE(warns(fitted({910, 290, 305, 95}, "9:3:3:1"), MessageId::FitTooClose)); // X2 = 0.778
}

TEST(CautionsTest, JoinsChosenAfterSeeing) {
    fit::Input input = fit_input({90, 30, 30, 10}, "9:3:3:1");
    input.joins_after_seeing = true;
    EXPECT_FALSE(warns(fitted(input), MessageId::FitJoinedAfterSeeing)); // nothing is joined
    input.joins = {{2, 3}};
    EXPECT_TRUE(warns(fitted(input), MessageId::FitJoinedAfterSeeing));
    input.joins_after_seeing = false;
    EXPECT_FALSE(warns(fitted(input), MessageId::FitJoinedAfterSeeing));
}

TEST(CautionsTest, CountsThatLookLikePercentages) {
    for (const std::vector<long>& counts : {std::vector<long>{25, 25, 25, 25}, {56, 19, 19, 6}, {56, 19, 19, 7}})
        EXPECT_TRUE(warns(fitted(counts, "9:3:3:1"), MessageId::FitLooksLikePercentages));
    EXPECT_FALSE(warns(fitted({56, 19, 19, 8}, "9:3:3:1"), MessageId::FitLooksLikePercentages)); // 102
    EXPECT_FALSE(warns(fitted({55, 19, 18, 6}, "9:3:3:1"), MessageId::FitLooksLikePercentages)); // 98
}

TEST(CautionsTest, ClassesInAnotherOrderThanTheRatio) {
    const auto swapped = fitted({30, 90, 30, 10}, "9:3:3:1");
    EXPECT_EQ(swapped.verdict, fit::Verdict::Contradicted);
    ASSERT_TRUE(warns(swapped, MessageId::FitSuspiciousOrder));
    const auto& said = swapped.cautions.back();
    EXPECT_EQ(said.arguments.at(1), ratio_argument("3:9:3:1"));
    EXPECT_FALSE(warns(fitted({90, 30, 30, 10}, "9:3:3:1"), MessageId::FitSuspiciousOrder)); // it fits as it is
    EXPECT_FALSE(warns(fitted({60, 60, 30, 10}, "9:3:3:1"), MessageId::FitSuspiciousOrder)); // no order fits
}

TEST(CautionsTest, AnImpossibleHypothesisIsNotAskedForLargerNumbers) {
    const auto found = fitted({3, 1, 1}, "3:1:0");
    EXPECT_EQ(found.verdict, fit::Verdict::Impossible);
    EXPECT_FALSE(warns_of_small(found));
    EXPECT_FALSE(warns(found, MessageId::FitTooClose));
    EXPECT_TRUE(found.proposed_joins.empty());
}

TEST(RescueOracle, RateThatWouldExplainAForbiddenClass) {
    struct Case {
        long seen, others;
        double alpha;
    };
    const std::vector<Case> cases{{1, 40, 0.05}, {1, 0, 0.05},    {3, 997, 0.05},
                                  {2, 50, 0.01}, {40, 160, 0.05}, {7, 70, 0.6}};
    std::vector<Row> rows;
    for (std::size_t i = 0; i < cases.size(); ++i)
        rows.push_back({std::to_string(i), std::to_string(cases[i].seen),
                        std::to_string(cases[i].seen + cases[i].others), exact_text(cases[i].alpha)});
    const auto oracle = run_oracle("fit_rescue.py", rows);
    for (std::size_t i = 0; i < cases.size(); ++i) {
        const auto& [seen, others, alpha] = cases[i];
        fit::Input input = fit_input({others, 0, seen}, "3:1:0");
        input.alpha = alpha;
        const double expected = std::strtod(oracle.at(std::to_string(i))[1].c_str(), nullptr);
        EXPECT_NEAR(fitted(input).rescuing_error_rate.value(), expected, 1e-11) << seen << " of " << seen + others;
    }
}

} // namespace
} // namespace filial::test
