// SPDX-License-Identifier: GPL-3.0-or-later
// Counts with published or independently recomputed tests; source, page and printed digits stand in
// tests/reference/<ID>.json. A printed value that the reference marks as disagreeing is not compared.
#include <cmath>
#include <map>
#include <string>

#include <gtest/gtest.h>

#include "tests/fit/fit_support.h"
#include "tests/support/reference.h"

namespace filial::test {
namespace {

using nlohmann::json;

constexpr double kRecomputed = 2e-14; // the reference keeps 15 digits
constexpr double kRecomputedP = 2e-13;

void near(const json& expected, const char* key, double found, double relative) {
    ASSERT_TRUE(expected.contains(key)) << key;
    const double value = expected[key].get<double>();
    EXPECT_NEAR(found, value, relative * std::abs(value) + 1e-300) << key;
}

// Compares whatever of these the reference gives, and says how many it gave.
int compare(const json& expected, const fit::GoodnessOfFit& found) {
    const double magnified = kRecomputedP * std::max(1.0, found.chi_square->statistic / 2.0);
    struct Line {
        const char* key;
        double value, relative;
    };
    std::vector<Line> lines{{"n", static_cast<double>(found.n), 0.0},
                            {"df", static_cast<double>(found.df), 0.0},
                            {"chi2", found.chi_square->statistic, kRecomputed},
                            {"p_chi2", found.chi_square->p->p, magnified},
                            {"p", found.chi_square->p->p, magnified},
                            {"G", found.g->statistic, kRecomputed},
                            {"p_G", found.g->p->p, magnified},
                            {"williams_q", found.g->statistic / *found.g->williams_statistic, kRecomputed},
                            {"G_williams", *found.g->williams_statistic, kRecomputed},
                            {"p_G_williams", found.g->williams_p->p, magnified}};
    if (found.yates) {
        lines.push_back({"chi2_yates", found.yates->statistic, kRecomputed});
        lines.push_back({"p_chi2_yates", found.yates->p.p, magnified});
    }
    int compared = 0;
    for (const Line& line : lines)
        if (expected.contains(line.key)) {
            near(expected, line.key, line.value, line.relative);
            ++compared;
        }
    if (expected.contains("expected_counts")) {
        for (std::size_t i = 0; i < found.classes.size(); ++i)
            EXPECT_NEAR(found.classes[i].expected, expected["expected_counts"][i].get<double>(), 1e-11);
    }
    return compared;
}

fit::GoodnessOfFit run(const json& observed, const json& ratio) {
    return fitted(observed.get<std::vector<long>>(), notation(ratio.get<std::vector<long>>()));
}

// Printed digits of the quantities that a fit gives, by the names the references use.
void compare_printed(const json& reference, const fit::GoodnessOfFit& found) {
    const std::map<std::string, double> values{{"chi2", found.chi_square->statistic},
                                               {"chi2 (Fisher 1936)", found.chi_square->statistic},
                                               {"p", found.chi_square->p->p},
                                               {"P", found.chi_square->p->p},
                                               {"p chi2", found.chi_square->p->p},
                                               {"G", found.g->statistic},
                                               {"p G", found.g->p->p},
                                               {"p G df=3", found.g->p->p}};
    for (const json& line : reference["published"]) {
        const auto value = values.find(line["quantity"].get<std::string>());
        if (value == values.end() || !line["agrees"].get<bool>())
            continue;
        const auto printed = line["as_printed"].get<std::string>();
        // More than a dozen printed digits are the printing machine's rounding: a part in 10^12 then.
        const double tolerance = std::max(printed_tolerance(printed), 1e-12 * std::abs(value->second));
        EXPECT_NEAR(value->second, std::stod(printed), tolerance) << reference["id"] << ' ' << line["quantity"];
    }
}

class PublishedFit : public testing::TestWithParam<const char*> {};

TEST_P(PublishedFit, StatisticsAndP) {
    const json reference = reference_case(GetParam());
    const json& in = reference["inputs"];
    ASSERT_TRUE(in.contains("observed") && in.contains("ratio"));
    const fit::GoodnessOfFit found = run(in["observed"], in["ratio"]);
    EXPECT_GE(compare(reference["expected"], found), 4);
    compare_printed(reference, found);
}

INSTANTIATE_TEST_SUITE_P(OneSample, PublishedFit,
                         testing::Values("A04", "A05", "A06", "A07", "A10", "A24", "A25", "A26", "B01", "B02", "B03",
                                         "B04", "B05", "B06", "B07", "B11", "B15", "B16", "B18", "B24"));

TEST(PublishedFitTest, UnequalProportionsAndFittedElsewhere) { // A08
    const json reference = reference_case("A08");
    const json& expected = reference["expected"];
    fit::Input input = fit_input(reference["inputs"]["observed"].get<std::vector<long>>(), "0.54:0.4:0.05:0.01");
    const fit::GoodnessOfFit found = fitted(input);
    EXPECT_GE(compare(expected, found), 7);
    compare_printed(reference, found);
    input.fitted_elsewhere = 1;
    const fit::GoodnessOfFit one = fitted(input);
    EXPECT_EQ(one.df, 2);
    near(expected, "p_G_df2", one.g->p->p, 1e-12);
    input.fitted_elsewhere = 2;
    near(expected, "p_G_df1", fitted(input).g->p->p, 1e-12);
    input.fitted_elsewhere = 3;
    const fit::GoodnessOfFit none = fitted(input);
    EXPECT_EQ(none.df, 0);
    EXPECT_FALSE(none.chi_square->p.has_value());
    EXPECT_EQ(none.chi_square->p.why_not.id, MessageId::FitNoDegreesOfFreedom);
    EXPECT_EQ(none.verdict, fit::Verdict::NotTested);
}

TEST(PublishedFitTest, SumOfSevenTests) { // B08, Fisher 1936
    const json reference = reference_case("B08");
    double sum = 0.0;
    for (const json& family : reference["inputs"]["families"])
        sum += run(family, reference["inputs"]["ratio"]).chi_square->statistic;
    near(reference["expected"], "chi2_sum", sum, 1e-13);
    near(reference["expected"], "p_upper", numeric::chi_square_upper(sum, 7).p, 1e-12);
    near(reference["expected"], "p_lower", numeric::chi_square_lower(sum, 7).p, 1e-12);
}

TEST(PublishedFitTest, ProgenyTestsOneByOne) { // B09, Fisher 1936
    const json reference = reference_case("B09");
    double sum = 0.0;
    for (const auto& [name, family] : reference["inputs"]["families"].items()) {
        const double statistic = run(family, reference["inputs"]["ratio"]).chi_square->statistic;
        near(reference["expected"]["per_family_chi2"], name.c_str(), statistic, 1e-13);
        sum += statistic;
    }
    near(reference["expected"], "chi2_sum", sum, 1e-13);
    const json& pooled = reference["expected"]["pooled"];
    EXPECT_GE(compare(pooled, run({560, 1124}, reference["inputs"]["ratio"])), 8);
}

TEST(PublishedFitTest, ExpectationCorrectedForSmallFamilies) { // B10, Fisher 1936
    const json reference = reference_case("B10");
    const json& expected = reference["expected"];
    near(expected, "chi2_naive", fitted({201, 399}, "1:2").chi_square->statistic, 1e-13);
    // Of 3 dominant plants 1 breeds true and 2 segregate, each missed with 3^10 of 4^10: weights over 3 * 4^10.
    const long all = 1L << 20;
    const long missed = 59049;
    const fit::GoodnessOfFit corrected = fitted({201, 399}, notation({all + 2 * missed, 2 * (all - missed)}));
    near(expected, "chi2_corrected", corrected.chi_square->statistic, 1e-13);
    near(expected, "p_corrected", corrected.chi_square->p->p, 1e-12);
    near(expected, "expected_fraction_apparently_homozygous", corrected.classes[0].probability, 1e-14);
}

TEST(PublishedFitTest, TwentySevenClasses) { // B12, Fisher 1936
    const json reference = reference_case("B12");
    const auto observed = reference["inputs"]["observed"].get<std::vector<long>>();
    const auto classes = reference["inputs"]["classes"].get<std::vector<std::string>>();
    std::vector<long> weights;
    for (const std::string& name : classes) // a heterozygous locus is written with both letters and doubles the weight
        weights.push_back(1L << (name.size() - 3));
    const fit::GoodnessOfFit found = fitted(observed, notation(weights));
    EXPECT_EQ(compare(reference["expected"], found), 4);
    compare_printed(reference, found);
}

TEST(PublishedFitTest, BackCrosses) { // B13, Fisher 1936
    const json reference = reference_case("B13");
    double sum = 0.0;
    for (const auto& [name, counts] : reference["inputs"].items()) {
        const fit::GoodnessOfFit found = fitted(counts.get<std::vector<long>>(), "1:1:1:1");
        EXPECT_EQ(compare(reference["expected"]["per_test"][name], found), 3);
        sum += found.chi_square->statistic;
    }
    near(reference["expected"], "chi2_sum", sum, 1e-13);
    near(reference["expected"], "p_upper", numeric::chi_square_upper(sum, 15).p, 1e-12);
}

TEST(PublishedFitTest, NoWhitePlantInSixtyThreeToOne) { // B21, Nilsson-Ehle 1909
    const json expected = reference_case("B21")["expected"];
    const fit::GoodnessOfFit found = fitted({78, 0}, "63:1");
    near(expected, "F2_chi2", found.chi_square->statistic, 1e-13);
    near(expected, "F2_p_chi2", found.chi_square->p->p, 1e-12);
    near(expected, "F2_expected_white", found.classes[1].expected, 1e-14);
    EXPECT_GE(compare(expected["F3"], fitted({50, 5, 15, 8}, "37:6:12:8")), 8);
}

TEST(PublishedFitTest, RejectedAtLargeNumbers) { // B28
    const json expected = reference_case("B28")["expected"];
    const fit::GoodnessOfFit kernels = fitted({3910, 1104}, "3:1");
    EXPECT_GE(compare(expected["kernels"], kernels), 8);
    EXPECT_EQ(kernels.verdict, fit::Verdict::Contradicted);
    // |O - E| is below 1/2: the reference squares the overshoot, while R's chisq.test and Yates' own purpose stop at 0.
    json ears = expected["ears"];
    ears.erase("chi2_yates");
    ears.erase("p_chi2_yates");
    const fit::GoodnessOfFit few = fitted({7, 13}, "1:2");
    EXPECT_GE(compare(ears, few), 8);
    EXPECT_EQ(few.yates->statistic, 0.0);
}

} // namespace
} // namespace filial::test
