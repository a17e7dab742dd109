// SPDX-License-Identifier: GPL-3.0-or-later
// The exact P of two classes beyond the range of a double, and where outcomes tie; against whole-number arithmetic.
#include <cmath>
#include <cstdlib>
#include <vector>

#include <gtest/gtest.h>

#include "tests/fit/fit_support.h"
#include "tests/support/oracle.h"

namespace filial::test {
namespace {

struct Pair {
    long x, n, a, b;
};

Row row_of(std::size_t i, const Pair& pair) {
    return {std::to_string(i), std::to_string(pair.x), std::to_string(pair.n), std::to_string(pair.a),
            std::to_string(pair.b)};
}

TEST(ExactOracle, LogarithmBeyondTheRangeOfADouble) {
    const std::vector<Pair> pairs{
        {0, 2000, 1, 1}, {3000, 3000, 1, 15}, {40, 3000, 3, 1}, {2950, 3000, 1, 3}, {1, 2500, 9, 7}};
    std::vector<Row> rows;
    for (std::size_t i = 0; i < pairs.size(); ++i)
        rows.push_back(row_of(i, pairs[i]));
    const auto oracle = run_oracle("fit_deep.py", rows);
    for (std::size_t i = 0; i < pairs.size(); ++i) {
        const auto& [x, n, a, b] = pairs[i];
        const fit::GoodnessOfFit found = fitted({x, n - x}, notation({a, b}));
        const double expected = std::strtod(oracle.at(std::to_string(i))[1].c_str(), nullptr);
        EXPECT_LT(expected, -308.0);
        EXPECT_NEAR(found.exact->p.log10_p, expected, 1e-12 * std::abs(expected)) << x << " of " << n;
        EXPECT_EQ(found.verdict, fit::Verdict::Contradicted);
    }
}

// At (n + 1) p whole the mode has a twin of the same probability: counted as a tie it makes P 1.
TEST(ExactOracle, OtherReadingOfTiedOutcomes) {
    const std::vector<Pair> pairs{{2, 3, 3, 1},   {3, 3, 3, 1},  {6, 7, 3, 1},  {5, 7, 3, 1},
                                  {15, 31, 1, 1}, {3, 15, 1, 3}, {4, 15, 1, 3}, {11, 15, 3, 1}};
    std::vector<Row> rows;
    for (std::size_t i = 0; i < pairs.size(); ++i)
        rows.push_back(row_of(i, pairs[i]));
    const auto oracle = run_oracle("fit_deep.py", rows);
    int differ = 0;
    for (std::size_t i = 0; i < pairs.size(); ++i) {
        const auto& [x, n, a, b] = pairs[i];
        fit::Input input = fit_input({x, n - x}, notation({a, b}));
        input.order = fit::Order::Probability;
        const fit::Exact exact = *fitted(input).exact;
        const Row& row = oracle.at(std::to_string(i));
        const double ties = std::strtod(row[2].c_str(), nullptr);
        const double no_ties = std::strtod(row[3].c_str(), nullptr);
        EXPECT_NEAR(exact.p.p, ties, 1e-13) << x << " of " << n;
        EXPECT_EQ(exact.other_reading.has_value(), std::abs(ties - no_ties) > 1e-9) << x << " of " << n;
        if (exact.other_reading) {
            EXPECT_NEAR(*exact.other_reading, no_ties, 1e-13) << x << " of " << n;
            ++differ;
        }
    }
    EXPECT_GT(differ, 3);
}

} // namespace
} // namespace filial::test
