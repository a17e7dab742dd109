// SPDX-License-Identifier: GPL-3.0-or-later
// Counts against linked loci with r fitted: the estimate, X2 and P on two degrees of freedom, and adjusted residuals.
#include <cmath>
#include <cstdlib>
#include <random>
#include <sstream>

#include <gtest/gtest.h>

#include "tests/fit/fit_support.h"
#include "tests/support/oracle.h"

namespace filial::test {
namespace {

double number(const std::string& text) {
    return std::strtod(text.c_str(), nullptr);
}

std::vector<double> numbers(const std::string& text) {
    std::vector<double> values;
    std::stringstream stream(text);
    for (std::string one; std::getline(stream, one, ';');)
        values.push_back(number(one));
    return values;
}

struct Linked {
    std::string cross, phase;
    std::vector<long> counts;
};

// Parental and recombinant classes by their place, so that the estimate lies well inside (0, 1/2).
std::vector<Linked> random_crosses() {
    std::mt19937_64 random(31);
    std::vector<Linked> crosses;
    for (int i = 0; i < 120; ++i) {
        Linked one{i % 2 == 0 ? "f2" : "testcross", i % 4 < 2 ? "coupling" : "repulsion", {}};
        const double r = std::uniform_real_distribution<double>(0.1, 0.35)(random);
        const bool coupling = one.phase == "coupling";
        const double t = coupling ? (1.0 - r) * (1.0 - r) : r * r;
        const double outer = coupling ? 1.0 - r : r;
        const std::vector<double> p =
            one.cross == "f2" ? std::vector{(2.0 + t) / 4.0, (1.0 - t) / 4.0, (1.0 - t) / 4.0, t / 4.0}
                              : std::vector{outer / 2.0, (1.0 - outer) / 2.0, (1.0 - outer) / 2.0, outer / 2.0};
        const double n = std::exp(std::uniform_real_distribution<double>(5.7, 8.0)(random));
        for (const double share : p)
            one.counts.push_back(std::poisson_distribution<long>(n * share)(random) + 1);
        crosses.push_back(one);
    }
    return crosses;
}

TEST(LinkedOracle, EstimateFitAndResiduals) {
    const auto crosses = random_crosses();
    std::vector<Row> rows;
    for (std::size_t i = 0; i < crosses.size(); ++i) {
        Row row{std::to_string(i)};
        for (const long count : crosses[i].counts)
            row.push_back(std::to_string(count));
        row.push_back(crosses[i].cross);
        row.push_back(crosses[i].phase);
        rows.push_back(row);
    }
    const auto oracle = run_oracle("fit_linked.py", rows);
    for (std::size_t i = 0; i < crosses.size(); ++i) {
        const Linked& asked = crosses[i];
        SCOPED_TRACE(asked.cross + " " + asked.phase + " " + std::to_string(i));
        const fit::GoodnessOfFit found = fitted(asked.counts, asked.cross + "(" + asked.phase + ", r=fit)");
        const Row& row = oracle.at(std::to_string(i));
        EXPECT_NEAR(found.estimates.at(0).value, number(row[1]), 1e-9);
        EXPECT_NEAR(found.chi_square->statistic, number(row[2]), 1e-7 * (1.0 + number(row[2])));
        EXPECT_EQ(found.df, 2);
        EXPECT_NEAR(found.chi_square->p->p, number(row[3]), 1e-7);
        const auto adjusted = numbers(row[4]);
        const auto p = numbers(row[5]);
        for (std::size_t c = 0; c < 4; ++c) {
            EXPECT_NEAR(*found.classes[c].adjusted_residual, adjusted[c], 1e-5) << c;
            EXPECT_NEAR(*found.classes[c].p, p[c], 1e-5) << c;
        }
    }
}

// The likelihood of a test cross is that of a share: r is the recombinants among all.
TEST(LinkedTest, TestCrossEstimateIsTheShareOfRecombinants) {
    for (const Linked& asked : random_crosses()) {
        if (asked.cross != "testcross")
            continue;
        const auto& o = asked.counts;
        const auto n = static_cast<double>(o[0] + o[1] + o[2] + o[3]);
        const long recombinants = asked.phase == "coupling" ? o[1] + o[2] : o[0] + o[3];
        const double r = static_cast<double>(recombinants) / n;
        const fit::GoodnessOfFit found = fitted(o, "testcross(" + asked.phase + ", r=fit)");
        EXPECT_NEAR(found.estimates.at(0).value, r, 1e-13);
        EXPECT_NEAR(*found.estimates[0].standard_error, std::sqrt(r * (1.0 - r) / n), 1e-12);
    }
}

} // namespace
} // namespace filial::test
