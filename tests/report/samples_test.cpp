// SPDX-License-Identifier: GPL-3.0-or-later
// The sample books open, show what their README says, and agree with SciPy, which reads the same files.
#include <cmath>
#include <string>
#include <vector>

#include <gtest/gtest.h>

#include "core/book/book_file.h"
#include "core/book/count_table.h"
#include "core/report/cross_analysis.h"
#include "tests/support/oracle.h"

namespace filial {
namespace {

std::string sample_path(const std::string& name) {
    return std::string(FILIAL_SAMPLES) + "/" + name;
}

book::Cross sample_cross(const std::string& name) {
    auto opened = book::open_book(book::disk(), sample_path(name));
    EXPECT_TRUE(opened.ok()) << name;
    EXPECT_TRUE(opened.value().warnings.empty()) << name;
    EXPECT_FALSE(opened.value().read_only) << name;
    EXPECT_EQ(opened.value().book.crosses.size(), 1U) << name;
    return opened.value().book.crosses.at(0);
}

struct Sample {
    std::string name;
    std::string ratio; ///< what its README compares it with
};

TEST(SamplesOracle, AgreeWithSciPy) {
    const std::vector<Sample> samples{{"f2-eight-families.filial", "9:3:3:1"},
                                      {"f2-one-odd-family.filial", "3:1"},
                                      {"f2-linked.filial", "9:3:3:1"},
                                      {"test-cross.filial", "1:1:1:1"}};
    std::vector<test::Row> rows;
    for (const Sample& sample : samples)
        rows.push_back({sample_path(sample.name), sample.ratio});
    const auto oracle = test::run_oracle("samples.py", rows);
    for (const Sample& sample : samples) {
        book::Cross cross = sample_cross(sample.name);
        cross.hypothesis.notation = sample.ratio;
        const report::CrossAnalysis analysis = report::analyse(cross, {});
        ASSERT_TRUE(analysis.totals && analysis.heterogeneity) << sample.name;
        const test::Row& row = oracle.at(sample_path(sample.name));
        const auto near = [&](double ours, std::size_t column) {
            const double outside = std::stod(row.at(column));
            EXPECT_NEAR(ours, outside, 1e-9 * std::fabs(outside)) << sample.name << " column " << column;
        };
        near(analysis.totals->chi_square->statistic, 1);
        near(analysis.totals->chi_square->p->p, 2);
        near(analysis.heterogeneity->contingency->statistic, 3);
        near(analysis.heterogeneity->contingency->p->p, 4);
    }
}

TEST(SamplesTest, EightFamiliesAgreeAndFit) {
    const auto analysis = report::analyse(sample_cross("f2-eight-families.filial"), {});
    EXPECT_EQ(analysis.included, 8U);
    EXPECT_EQ(analysis.totals->verdict, fit::Verdict::NotContradicted);
    EXPECT_FALSE(analysis.heterogeneity->heterogeneous);
}

TEST(SamplesTest, OneFamilyIsOddAndThePooledCountsHideIt) {
    const auto analysis = report::analyse(sample_cross("f2-one-odd-family.filial"), {});
    EXPECT_EQ(analysis.totals->verdict, fit::Verdict::NotContradicted);
    EXPECT_TRUE(analysis.heterogeneity->heterogeneous);
    for (const auto& family : analysis.heterogeneity->outliers)
        EXPECT_EQ(family.p_holm < 0.05, family.label == "F2-17") << family.label;
}

TEST(SamplesTest, LinkedLociFitWithROnly) {
    book::Cross cross = sample_cross("f2-linked.filial");
    EXPECT_EQ(report::analyse(cross, {}).totals->verdict, fit::Verdict::NotContradicted);
    cross.hypothesis.notation = "9:3:3:1";
    EXPECT_EQ(report::analyse(cross, {}).totals->verdict, fit::Verdict::Contradicted);
}

TEST(SamplesTest, TablesHoldTheCountsOfTheirBooks) {
    for (const std::string name : {"f2-eight-families", "test-cross"}) {
        const auto text = book::disk().read(sample_path(name + ".csv"), 100'000);
        ASSERT_TRUE(text.ok());
        const auto table = book::read_count_table(text.value());
        ASSERT_TRUE(table.ok()) << name;
        const book::Cross cross = sample_cross(name + ".filial");
        ASSERT_EQ(table.value().families.size(), cross.families.size());
        for (std::size_t j = 0; j < cross.families.size(); ++j) {
            EXPECT_EQ(table.value().families[j].label, cross.families[j].label);
            EXPECT_EQ(table.value().families[j].typed, cross.families[j].typed);
        }
    }
}

} // namespace
} // namespace filial
