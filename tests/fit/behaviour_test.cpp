// SPDX-License-Identifier: GPL-3.0-or-later
#include <cmath>

#include <gtest/gtest.h>

#include "tests/fit/fit_support.h"
#include "tests/support/reference.h"

namespace filial::test {
namespace {

using nlohmann::json;

MessageId refusal(const fit::Input& input) {
    const auto result = fit::goodness_of_fit(input);
    return result ? MessageId::NotComputed : result.error().message.id;
}

TEST(FitTest, RefusesWhatCannotBeTested) {
    const fit::Input good = fit_input({9, 3, 3, 1}, "9:3:3:1");
    EXPECT_EQ(refusal(good), MessageId::NotComputed);
    fit::Input bad = good;
    bad.observed.pop_back();
    EXPECT_EQ(refusal(bad), MessageId::FitLabelsMismatch);
    bad.labels.pop_back();
    EXPECT_EQ(refusal(bad), MessageId::FitTermsMismatch);
    for (const double alpha : {0.0, 1.0, -1.0, std::nan(""), HUGE_VAL}) {
        bad = good;
        bad.alpha = alpha;
        EXPECT_EQ(refusal(bad), MessageId::FitAlphaOutOfRange);
    }
    bad = good;
    bad.joins = {{0, 1}, {1, 2}};
    EXPECT_EQ(refusal(bad), MessageId::FitJoinOverlaps);
    bad.joins = {{2, 4}};
    EXPECT_EQ(refusal(bad), MessageId::FitJoinOutOfRange);
    bad.joins = {{0, 1, 2, 3}};
    EXPECT_EQ(refusal(bad), MessageId::FitTooFewClasses);
    bad = good;
    bad.method = fit::Method::Exact;
    EXPECT_EQ(refusal(bad), MessageId::FitExactUnavailable);
}

TEST(FitTest, PartitionOfPublishedF2) { // C17 and C18: Mather 1938
    for (const char* id : {"C17", "C18"}) {
        const json reference = reference_case(id);
        fit::Input input = fit_input(reference["inputs"]["observed"].get<std::vector<long>>(), "9:3:3:1");
        input.level_counts = {2, 2};
        input.trait_names = {"form", "colour"};
        const auto rows = *fitted(input).partition;
        ASSERT_EQ(rows.size(), 3U);
        const json& expected = reference["expected"]["partition"];
        const double total = expected["total"].get<double>();
        EXPECT_NEAR(rows[0].statistic, expected["A_first_locus"].get<double>(), 1e-13 * total);
        EXPECT_NEAR(rows[1].statistic, expected["B_second_locus"].get<double>(), 1e-13 * total);
        EXPECT_NEAR(rows[2].statistic, expected["linkage"].get<double>(), 1e-13 * total);
        EXPECT_NEAR(rows[0].p.p, expected["p_A"].get<double>(), 1e-12);
        EXPECT_NEAR(rows[2].p.p / expected["p_linkage"].get<double>(), 1.0, 1e-10);
    }
}

TEST(FitTest, RecombinationOfPublishedF2) { // C01 Fisher & Balmukand 1928; C04, C06 Immer 1930; C18
    for (const char* id : {"C01", "C04", "C06", "C18"}) {
        SCOPED_TRACE(id);
        const json reference = reference_case(id);
        const json& expected = reference["expected"];
        const std::string phase = reference["inputs"].value("phase", "coupling");
        const auto found = fitted(reference["inputs"]["observed"].get<std::vector<long>>(), "f2(" + phase + ", r=fit)");
        EXPECT_NEAR(found.estimates.at(0).value, expected["r_ML"].get<double>(), 1e-13);
        EXPECT_NEAR(*found.estimates[0].standard_error, expected["se_r"].get<double>(), 1e-12);
        EXPECT_NEAR(found.chi_square->statistic, expected["chi2_fit_at_ML"].get<double>(), 1e-10);
        EXPECT_EQ(found.df, expected["df_fit"].get<int>());
        EXPECT_NEAR(found.chi_square->p->p, expected["p_fit"].get<double>(), 1e-10);
    }
}

TEST(FitTest, EstimateAtTheBoundaryHasNoChiSquareP) { // C17: the unrestricted r is 0.511
    const auto found = fitted({315, 108, 101, 32}, "f2(coupling, r=fit)");
    EXPECT_EQ(found.estimates.at(0).value, 0.5);
    EXPECT_TRUE(found.estimates[0].at_boundary);
    EXPECT_EQ(found.chi_square->p.why_not.id, MessageId::FitEstimateAtBoundary);
    EXPECT_EQ(found.verdict, fit::Verdict::NotTested);
}

TEST(FitTest, ClasswiseAndTwoClassExactAsPublished) { // A12, A14, A15
    const json classwise = reference_case("A15")["expected"]["classwise"];
    const auto found = fitted({72, 38, 20, 18}, "9:3:3:1");
    EXPECT_NEAR(*found.classes[0].p, classwise["72/148 vs 9/16"].get<double>(), 1e-13);
    EXPECT_NEAR(*found.classes[3].p, classwise["18/148 vs 1/16"].get<double>(), 1e-13);
    const json giant = reference_case("A12")["expected"];
    fit::Input input = fit_input({682, 243}, "3:1");
    input.order = fit::Order::Probability;
    const auto two = fitted(input);
    EXPECT_NEAR(two.exact->p.p, giant["p_two_sided"].get<double>(), 1e-13);
    EXPECT_NEAR(*two.classes[0].exact_low, giant["cp_low"].get<double>(), 1e-13);
    EXPECT_NEAR(*two.classes[0].exact_high, giant["cp_high"].get<double>(), 1e-13);
    EXPECT_NEAR(fitted({36, 7}, "1:1").exact->p.p, reference_case("A14")["expected"]["36 of 43"].get<double>(), 1e-18);
}

TEST(FitTest, ForbiddenClassWithOffspring) {
    const auto found = fitted({30, 10, 1}, "3:1:0");
    EXPECT_EQ(found.verdict, fit::Verdict::Impossible);
    EXPECT_TRUE(std::isinf(found.chi_square->statistic));
    EXPECT_EQ(found.chi_square->p->p, 0.0);
    EXPECT_NEAR(std::pow(1.0 - *found.rescuing_error_rate, 41), 0.95, 1e-12); // none of 41 mis-scored
    EXPECT_EQ(found.df, 1);
}

TEST(FitTest, JoinsCostTheirDegreesOfFreedomAndNothingScoredIsNotTested) {
    fit::Input input = fit_input({90, 30, 30, 1}, "9:3:3:1");
    input.joins = {{2, 3}};
    const auto found = fitted(input);
    EXPECT_EQ(found.df, 2);
    EXPECT_EQ(found.classes.size(), 3U);
    EXPECT_EQ(found.classes[2].observed.value(), 31);
    int sum = 0;
    for (const auto& charge : found.df_account)
        sum += charge.charge;
    EXPECT_EQ(sum, found.df);
    EXPECT_EQ(fitted({0, 0}, "3:1").verdict, fit::Verdict::NotTested);
    const long huge = 1'000'000'000'000;
    const auto large = fitted({3 * (huge / 4), huge / 4}, "3:1");
    EXPECT_EQ(large.chi_square->statistic, 0.0);
    EXPECT_EQ(large.exact->p.p, 1.0);
    const auto off = fitted({750'000'500'000, 249'999'500'000}, "3:1"); // X2 = d^2/(N p q) = 4/3
    EXPECT_NEAR(off.chi_square->statistic, 4.0 / 3.0, 1e-14);
    EXPECT_NEAR(off.exact->p.p, off.chi_square->p->p, 1e-5);
}

} // namespace
} // namespace filial::test
