// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/families/heterogeneity.h"

#include <cmath>
#include <cstdlib>
#include <numeric>

#include <gtest/gtest.h>

#include "core/inheritance/hypothesis.h"
#include "tests/families/random_tables.h"
#include "tests/support/reference.h"

namespace filial::families {
namespace {

using test::printed_tolerance;
using test::reference_case;

std::string notation_of(const std::vector<std::int64_t>& weights) {
    std::string text;
    for (const auto weight : weights)
        text += (text.empty() ? "" : ":") + std::to_string(weight);
    return text;
}

Input input_of(const std::vector<std::vector<std::int64_t>>& rows, const std::string& notation) {
    Input input{.families = {},
                .common = fit::Input{.labels = {},
                                     .observed = {},
                                     .hypothesis = inheritance::read_hypothesis(notation).value(),
                                     .joins = {},
                                     .level_counts = {},
                                     .trait_names = {}}};
    for (std::size_t j = 0; j < rows.size(); ++j) {
        Family family{"F2-0" + std::to_string(j + 1), {}};
        for (const auto count : rows[j])
            family.observed.emplace_back(count);
        input.families.push_back(std::move(family));
    }
    for (std::size_t i = 0; i < input.common.hypothesis.class_count(); ++i)
        input.common.labels.push_back("class " + std::to_string(i + 1));
    return input;
}

Heterogeneity pool(const std::vector<std::vector<std::int64_t>>& rows, const std::string& notation) {
    auto result = heterogeneity(input_of(rows, notation));
    EXPECT_TRUE(result.ok());
    return std::move(result).value();
}

Heterogeneity pool(const nlohmann::json& reference) {
    const auto& inputs = reference.at("inputs");
    return pool(inputs.at("families").get<std::vector<std::vector<std::int64_t>>>(),
                notation_of(inputs.at("ratio").get<std::vector<std::int64_t>>()));
}

bool says(const std::vector<Message>& messages, MessageId id) {
    for (const Message& message : messages)
        if (message.id == id)
            return true;
    return false;
}

void expect_relative(double found, double expected, double relative, const std::string& what) {
    EXPECT_NEAR(found, expected, relative * std::fabs(expected)) << what;
}

// ---- published and recomputed values -------------------------------------------------------------------------------

class PublishedFamilies : public testing::TestWithParam<const char*> {};

TEST_P(PublishedFamilies, AreRecomputed) {
    const auto reference = reference_case(GetParam());
    const auto& expected = reference.at("expected");
    const Heterogeneity result = pool(reference);
    constexpr double digits = 2e-12; // expected values have 15 digits
    ASSERT_EQ(result.per_family.size(), expected.at("per_family_chi2").size());
    for (std::size_t j = 0; j < result.per_family.size(); ++j) {
        const auto& fit = result.per_family[j];
        ASSERT_TRUE(fit.chi_square.has_value());
        expect_relative(fit.chi_square->statistic, expected.at("per_family_chi2")[j], digits, "family");
        expect_relative(fit.chi_square->p->p, expected.at("per_family_p")[j], digits, "family P");
        if (expected.contains("per_group_G"))
            expect_relative(fit.g->statistic, expected.at("per_group_G")[j], digits, "family G");
    }
    const auto row = [&](const SourceRow& found, const char* name) {
        expect_relative(*found.chi_square, expected.at(name).at("chi2"), digits, name);
        EXPECT_EQ(found.df, expected.at(name).at("df").get<int>());
        expect_relative(found.chi_square_p->p, expected.at(name).at("p"), digits, name);
    };
    row(result.total, "total");
    row(result.pooled, "pooled");
    row(result.heterogeneity, "heterogeneity");
    expect_relative(result.contingency->statistic, expected.at("contingency_chi2").at("chi2"), digits, "contingency");
    EXPECT_EQ(result.contingency->df, expected.at("contingency_chi2").at("df").get<int>());
    expect_relative(result.contingency->p->p, expected.at("contingency_chi2").at("p"), digits, "contingency P");
    expect_relative(*result.total.g, expected.at("G_total"), digits, "total G");
    expect_relative(*result.pooled.g, expected.at("G_pooled"), digits, "pooled G");
    expect_relative(*result.heterogeneity.g, expected.at("G_heterogeneity"), digits, "heterogeneity G");
    expect_relative(result.heterogeneity.g_p->p, expected.at("p_G_heterogeneity"), digits, "heterogeneity G P");
    if (expected.contains("p_total")) {
        expect_relative(result.total.g_p->p, expected.at("p_total"), digits, "total G P");
        expect_relative(result.pooled.g_p->p, expected.at("p_pooled"), digits, "pooled G P");
    }
    const auto counts = expected.at("pooled").at("counts").get<std::vector<std::int64_t>>();
    for (std::size_t i = 0; i < counts.size(); ++i)
        EXPECT_EQ(result.pooled_fit.classes[i].observed.value(), counts[i]);
    EXPECT_FALSE(result.heterogeneous);
}

INSTANTIATE_TEST_SUITE_P(References, PublishedFamilies, testing::Values("E01", "E02", "E03", "E04"));

// Strickberger 1968, Genetics, pp. 136-138: five plants. He subtracts rounded terms for the homogeneity row, so that
// his third digit differs; ours must not.
TEST(PublishedFamiliesPrinted, Strickberger1968) {
    const Heterogeneity result = pool(reference_case("E03"));
    EXPECT_NEAR(*result.total.chi_square, 2.05, printed_tolerance("2.05"));
    EXPECT_NEAR(*result.pooled.chi_square, 0.015, printed_tolerance("0.015"));
    EXPECT_GT(std::fabs(*result.heterogeneity.chi_square - 2.035), printed_tolerance("2.035"));
    EXPECT_NEAR(*result.heterogeneity.chi_square, 2.05 - 0.015, printed_tolerance("2.05") + printed_tolerance("0.015"));
    EXPECT_TRUE(result.pooled.chi_square_p->p > 0.90 && result.pooled.chi_square_p->p < 0.95);
    EXPECT_TRUE(result.heterogeneity.chi_square_p->p > 0.70 && result.heterogeneity.chi_square_p->p < 0.90);
}

// Fisher 1936, Annals of Science 1: 115-137, table V: the ten plants' seeds and cotyledons, 12.4870 on 20 df, P 0.90.
TEST(PublishedFamiliesPrinted, Fisher1936) {
    const Heterogeneity seeds = pool(reference_case("E01"));
    const Heterogeneity cotyledons = pool(reference_case("E02"));
    const double both = *seeds.total.chi_square + *cotyledons.total.chi_square;
    EXPECT_NEAR(both, 12.4870, printed_tolerance("12.4870"));
    EXPECT_EQ(seeds.total.df + cotyledons.total.df, 20);
    EXPECT_NEAR(numeric::chi_square_upper(both, 20.0).p, 0.90, printed_tolerance("0.90"));
}

// ---- against other libraries ---------------------------------------------------------------------------------------

double number(const test::Row& row, std::size_t at) {
    return std::strtod(row.at(at).c_str(), nullptr);
}

TEST(HeterogeneityOracle, AgreesWithRationalArithmetic) {
    const auto tables = test::random_tables(400, 91);
    std::vector<test::Row> rows;
    for (std::size_t t = 0; t < tables.size(); ++t)
        rows.push_back(test::oracle_row("t" + std::to_string(t), tables[t]));
    const auto answers = test::run_oracle("families.py", rows);
    for (std::size_t t = 0; t < tables.size(); ++t) {
        const std::string id = "t" + std::to_string(t);
        const test::Row& r = answers.at(id);
        Input input = input_of(tables[t].rows, notation_of(tables[t].weights));
        input.with_family_fits = false;
        const auto found = heterogeneity(input);
        ASSERT_TRUE(found.ok()) << id;
        const Heterogeneity& result = found.value();
        EXPECT_TRUE(result.per_family.empty());
        const auto near = [&](double value, std::size_t at, double relative) {
            EXPECT_NEAR(value, number(r, at), relative * std::max(1.0, std::fabs(number(r, at)))) << id << " " << at;
        };
        near(result.contingency->statistic, 5, 1e-14);
        near(result.contingency->p->p, 6, 1e-11);
        near(*result.total.chi_square, 8, 1e-14);
        near(result.total.chi_square_p->p, 9, 1e-11);
        near(*result.pooled.chi_square, 10, 1e-14);
        near(*result.heterogeneity.chi_square, 11, 1e-14);
        near(*result.total.g, 12, 1e-14);
        near(*result.pooled.g, 13, 1e-14);
        near(*result.overdispersion->z, 14, 1e-13);
        near(result.overdispersion->z_p->p, 15, 1e-11);
        near(result.overdispersion->phi, 16, 1e-14);
        near(result.overdispersion->free->phi, 17, 1e-14);
        EXPECT_EQ(result.heterogeneous, number(r, 6) < 0.05) << id;
        // The pooled fit is the same test of the same counts.
        EXPECT_NEAR(result.pooled_fit.chi_square->statistic, *result.pooled.chi_square,
                    1e-12 * std::max(1.0, *result.pooled.chi_square));
        EXPECT_EQ(result.pooled_fit.df, result.pooled.df);
    }
}

// One recombination fraction for all families: total, pooled and between at its common value, charged once.
TEST(HeterogeneityOracle, FitsOneRecombinationFractionForAll) {
    const std::vector<std::vector<std::vector<std::int64_t>>> tables{
        {{125, 18, 20, 34}, {66, 14, 10, 20}},
        {{48, 9, 11, 8}, {51, 12, 9, 10}, {60, 6, 5, 14}},
        {{30, 12, 10, 2}, {28, 10, 13, 3}, {31, 9, 9, 4}, {40, 4, 3, 9}}};
    std::vector<test::Row> rows;
    for (std::size_t t = 0; t < tables.size(); ++t) {
        test::Row row{"t" + std::to_string(t), std::to_string(tables[t].size())};
        for (const auto& family : tables[t])
            for (const auto count : family)
                row.push_back(std::to_string(count));
        rows.push_back(row);
    }
    const auto answers = test::run_oracle("families_fitted.py", rows);
    for (std::size_t t = 0; t < tables.size(); ++t) {
        const test::Row& r = answers.at("t" + std::to_string(t));
        const Heterogeneity result = pool(tables[t], "f2(coupling, r=fit)");
        const int families = static_cast<int>(tables[t].size());
        ASSERT_EQ(result.pooled_fit.estimates.size(), 1U);
        EXPECT_NEAR(result.pooled_fit.estimates[0].value, number(r, 1), 1e-9);
        EXPECT_EQ(result.total.df, 3 * families - 1);
        EXPECT_EQ(result.pooled.df, 2);
        EXPECT_EQ(result.heterogeneity.df, 3 * (families - 1));
        expect_relative(*result.total.chi_square, number(r, 2), 1e-7, "total");
        expect_relative(result.total.chi_square_p->p, number(r, 3), 1e-6, "total P");
        expect_relative(*result.pooled.chi_square, number(r, 4), 1e-6, "pooled");
        expect_relative(result.pooled.chi_square_p->p, number(r, 5), 1e-6, "pooled P");
        expect_relative(*result.heterogeneity.chi_square, number(r, 6), 1e-7, "between");
        expect_relative(result.heterogeneity.chi_square_p->p, number(r, 7), 1e-6, "between P");
        expect_relative(*result.total.g, number(r, 8), 1e-7, "total G");
        expect_relative(*result.pooled.g, number(r, 9), 1e-6, "pooled G");
        expect_relative(result.overdispersion->phi, number(r, 10), 1e-7, "phi");
        EXPECT_FALSE(result.overdispersion->z.has_value());
        EXPECT_TRUE(says(result.cautions, MessageId::FamiliesFittedTogether));
    }
}

// ---- what is said --------------------------------------------------------------------------------------------------

TEST(Heterogeneity, SaysWhetherFamiliesAgree) {
    const Heterogeneity agree = pool({{30, 10}, {29, 11}, {32, 8}}, "3:1");
    EXPECT_FALSE(agree.heterogeneous);
    EXPECT_EQ(agree.verdict_sentence.id, MessageId::FamiliesVerdictAgree);
    EXPECT_EQ(agree.line.id, MessageId::FamiliesAgreeLine);
    EXPECT_EQ(agree.line.arguments.at(0), p_argument(agree.contingency->p->p));
    EXPECT_FALSE(agree.exact.has_value());
    EXPECT_EQ(agree.exact.why_not.id, MessageId::FamiliesExactNotComputed);
    EXPECT_EQ(agree.overdispersion->rho.why_not.id, MessageId::FamiliesRhoNotComputed);

    const Heterogeneity differ = pool({{30, 10}, {29, 11}, {31, 9}, {5, 35}}, "3:1");
    EXPECT_TRUE(differ.heterogeneous);
    EXPECT_EQ(differ.verdict_sentence.id, MessageId::FamiliesVerdictDiffer);
    ASSERT_EQ(differ.line.id, MessageId::FamiliesDifferOddLine);
    EXPECT_EQ(differ.line.arguments.at(1).text, "F2-04");

    // Of two, neither is the odd one.
    EXPECT_EQ(pool({{30, 10}, {5, 35}}, "3:1").line.id, MessageId::FamiliesDifferLine);
}

// A wrong hypothesis without heterogeneity: 3:1 assumed, 1:1 true. The contingency decides.
TEST(Heterogeneity, TheContingencyDecides) {
    const Heterogeneity result = pool({{40, 60}, {60, 40}, {45, 55}, {50, 50}}, "9:1");
    EXPECT_TRUE(result.heterogeneity.chi_square_p->p < 0.05);
    EXPECT_EQ(result.heterogeneous, result.contingency->p->p < 0.05);
    const Heterogeneity wrong = pool({{44, 56}, {56, 44}, {47, 53}, {53, 47}}, "9:1");
    EXPECT_GT(wrong.contingency->p->p, 0.05);
    EXPECT_LT(wrong.heterogeneity.chi_square_p->p, 0.05);
    EXPECT_FALSE(wrong.heterogeneous);
    EXPECT_TRUE(says(wrong.cautions, MessageId::FamiliesScaledDisagrees));
}

TEST(Heterogeneity, TwoFamiliesAreOneTest) {
    const Heterogeneity result = pool({{30, 10}, {20, 20}}, "3:1");
    ASSERT_EQ(result.outliers.size(), 2U);
    for (const OddFamily& one : result.outliers) {
        EXPECT_EQ(one.p_holm, one.p.p);
        EXPECT_EQ(one.p_bh, one.p.p);
        EXPECT_NEAR(one.statistic, result.contingency->statistic, 1e-13);
    }
}

TEST(Heterogeneity, CautionsAboutSmallExpectedValues) {
    EXPECT_TRUE(says(pool({{3, 1}, {4, 0}, {2, 2}}, "3:1").cautions, MessageId::FamiliesSmallExpected));
    EXPECT_FALSE(says(pool({{30, 10}, {28, 12}}, "3:1").cautions, MessageId::FamiliesSmallExpected));
}

TEST(Heterogeneity, JoinsAreTheSameInEveryFamily) {
    Input input = input_of({{20, 7, 6, 3}, {30, 9, 12, 1}, {18, 5, 9, 4}}, "9:3:3:1");
    input.common.joins = {{2, 3}};
    const auto joined = heterogeneity(input);
    ASSERT_TRUE(joined.ok());
    const Heterogeneity typed = pool({{20, 7, 9}, {30, 9, 13}, {18, 5, 13}}, "9:3:4");
    EXPECT_EQ(joined.value().contingency->df, 4);
    EXPECT_EQ(joined.value().total.df, typed.total.df);
    EXPECT_NEAR(*joined.value().total.chi_square, *typed.total.chi_square, 1e-13);
    EXPECT_NEAR(joined.value().contingency->statistic, typed.contingency->statistic, 1e-13);
    EXPECT_NEAR(*joined.value().heterogeneity.g, *typed.heterogeneity.g, 1e-13);
}

// ---- degenerate tables ---------------------------------------------------------------------------------------------

TEST(Heterogeneity, FamiliesWithoutPlantsCarryNoDegreesOfFreedom) {
    const Heterogeneity with = pool({{30, 10}, {0, 0}, {20, 20}}, "3:1");
    const Heterogeneity without = pool({{30, 10}, {20, 20}}, "3:1");
    EXPECT_EQ(with.total.df, without.total.df);
    EXPECT_EQ(with.contingency->df, 1);
    EXPECT_EQ(*with.total.chi_square, *without.total.chi_square);
    EXPECT_EQ(with.per_family.size(), 3U);
    EXPECT_EQ(with.families_of_df, 2U);
    ASSERT_EQ(with.outliers.size(), 2U);
    EXPECT_EQ(with.outliers[1].family, 2U);
    EXPECT_TRUE(says(with.cautions, MessageId::FamiliesWithoutPlants));
}

TEST(Heterogeneity, DropsAnEmptyColumnFromTheContingency) {
    const Heterogeneity result = pool({{30, 10, 0}, {20, 20, 0}, {25, 15, 0}}, "9:6:1");
    EXPECT_EQ(result.contingency->df, 2);
    EXPECT_EQ(result.heterogeneity.df, 4);
    EXPECT_EQ(result.total.df, 6);
    EXPECT_EQ(result.outliers.front().df, 1);
    EXPECT_TRUE(says(result.cautions, MessageId::FamiliesEmptyClass));
}

TEST(Heterogeneity, OneFamilyIsNotCompared) {
    const Heterogeneity result = pool({{30, 10}}, "3:1");
    EXPECT_FALSE(result.contingency.has_value());
    EXPECT_EQ(result.line.id, MessageId::FamiliesNotComparedOneLine);
    EXPECT_EQ(result.heterogeneity.df, 0);
    EXPECT_FALSE(result.heterogeneity.chi_square_p.has_value());
    EXPECT_EQ(*result.total.chi_square, *result.pooled.chi_square);
    EXPECT_TRUE(result.outliers.empty());
    EXPECT_FALSE(result.overdispersion->free.has_value());
}

TEST(Heterogeneity, AllInOneClassIsNotCompared) {
    const Heterogeneity result = pool({{30, 0}, {12, 0}}, "3:1");
    EXPECT_EQ(result.line.id, MessageId::FamiliesNotComparedClassLine);
    EXPECT_EQ(*result.heterogeneity.g, 0.0);
    EXPECT_TRUE(result.outliers.empty());
    EXPECT_GT(*result.total.chi_square, 0.0);
}

TEST(Heterogeneity, NoPlantsAtAll) {
    const Heterogeneity result = pool({{0, 0}, {0, 0}}, "3:1");
    EXPECT_EQ(result.line.id, MessageId::FamiliesNotComparedEmptyLine);
    EXPECT_EQ(result.total.df, 0);
    EXPECT_FALSE(result.total.chi_square.has_value());
    EXPECT_FALSE(result.overdispersion.has_value());
}

TEST(Heterogeneity, ForbiddenClassWithOffspringIsImpossible) {
    const Heterogeneity result = pool({{30, 10, 1}, {20, 20, 2}}, "3:1:0");
    for (const SourceRow* row : {&result.total, &result.pooled}) {
        EXPECT_FALSE(row->chi_square.has_value());
        EXPECT_FALSE(row->g.has_value());
        EXPECT_EQ(row->chi_square_p->p, 0.0);
        EXPECT_EQ(row->chi_square_p->log10_p, -INFINITY);
    }
    EXPECT_FALSE(result.heterogeneity.chi_square.has_value());
    EXPECT_EQ(result.contingency->df, 2); // the families are compared all the same
    EXPECT_EQ(*result.heterogeneity.g_p, *result.heterogeneity.g_p);
    EXPECT_FALSE(result.overdispersion.has_value());
    EXPECT_EQ(result.overdispersion.why_not.id, MessageId::FamiliesForbidden);
}

TEST(Heterogeneity, ForbiddenClassWithoutOffspringCountsForNothing) {
    const Heterogeneity with = pool({{30, 10, 0}, {20, 20, 0}}, "3:1:0");
    const Heterogeneity without = pool({{30, 10}, {20, 20}}, "3:1");
    EXPECT_EQ(with.total.df, without.total.df);
    EXPECT_EQ(*with.total.chi_square, *without.total.chi_square);
    EXPECT_EQ(*with.overdispersion->z, *without.overdispersion->z);
    EXPECT_FALSE(says(with.cautions, MessageId::FamiliesEmptyClass));
}

TEST(Heterogeneity, FamiliesOfOnePlantEach) {
    const Heterogeneity result = pool({{1, 0}, {0, 1}, {1, 0}, {1, 0}}, "3:1");
    EXPECT_FALSE(result.overdispersion->z.has_value());
    EXPECT_EQ(result.overdispersion->z.why_not.id, MessageId::FamiliesScoreTestNoPairs);
    EXPECT_NEAR(result.contingency->statistic, 4.0, 1e-14); // N(k-1) when every family is one plant
}

TEST(Heterogeneity, NothingIsEverNotANumber) {
    const std::vector<std::vector<std::int64_t>> kinds{{0, 0, 0}, {1, 0, 0}, {0, 0, 1}, {3, 2, 1}, {0, 9, 0}};
    for (const char* notation : {"1:2:1", "9:3:4", "3:1:0", "0:1:1", "1:0:0", "1000000007:3:1"})
        for (const auto& a : kinds)
            for (const auto& b : kinds)
                for (const auto& c : kinds) {
                    const auto found = heterogeneity(input_of({a, b, c}, notation));
                    ASSERT_TRUE(found.ok());
                    const Heterogeneity& result = found.value();
                    for (const SourceRow* row : {&result.total, &result.pooled, &result.heterogeneity}) {
                        EXPECT_TRUE(!row->chi_square || std::isfinite(*row->chi_square));
                        EXPECT_TRUE(!row->g || std::isfinite(*row->g));
                        for (const auto* p : {&row->chi_square_p, &row->g_p})
                            EXPECT_TRUE(!*p || ((*p)->p >= 0.0 && (*p)->p <= 1.0 && !std::isnan((*p)->log10_p)));
                        EXPECT_GE(row->df, 0);
                    }
                    EXPECT_TRUE(!result.contingency || std::isfinite(result.contingency->statistic));
                    EXPECT_TRUE(!result.overdispersion || std::isfinite(result.overdispersion->phi));
                    for (const OddFamily& one : result.outliers)
                        EXPECT_TRUE(std::isfinite(one.statistic) && one.p_holm <= 1.0 && one.p_bh <= 1.0);
                    EXPECT_EQ(result.line.id == MessageId::FamiliesAgreeLine ||
                                  result.line.id == MessageId::FamiliesDifferLine ||
                                  result.line.id == MessageId::FamiliesDifferOddLine,
                              result.contingency.has_value());
                }
}

TEST(Heterogeneity, RefusesWhatCannotBePooled) {
    const auto none = heterogeneity(input_of({}, "3:1"));
    ASSERT_FALSE(none.ok());
    EXPECT_EQ(none.error().message.id, MessageId::FamiliesNone);
    const auto width = heterogeneity(input_of({{3, 1}, {3, 1, 2}}, "3:1"));
    ASSERT_FALSE(width.ok());
    EXPECT_EQ(width.error().message.id, MessageId::FamiliesClassCount);
    EXPECT_EQ(width.error().message.arguments.at(1).count, 3);
    EXPECT_EQ(width.error().message.arguments.at(2).count, 2);
    const auto huge = heterogeneity(input_of({{Count::kLargest, 0}, {1, 1}}, "3:1"));
    ASSERT_FALSE(huge.ok());
    EXPECT_EQ(huge.error().message.id, MessageId::FamiliesTooManyPlants);
    CancellationToken cancel;
    cancel.cancel();
    EXPECT_FALSE(heterogeneity(input_of({{3, 1}, {3, 1}}, "3:1"), cancel).ok());
}

} // namespace
} // namespace filial::families
