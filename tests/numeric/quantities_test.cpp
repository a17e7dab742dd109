// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/numeric/quantities.h"

#include <limits>
#include <stdexcept>

#include <gtest/gtest.h>

namespace filial {
namespace {

TEST(CountTest, RefusesWhatIsNoCount) {
    EXPECT_FALSE(Count::from(-1).has_value());
    EXPECT_FALSE(Count::from(Count::kLargestTyped + 1).has_value());
    EXPECT_EQ(Count::from(0)->value(), 0);
    EXPECT_THROW(Count(-1), std::out_of_range);
    EXPECT_EQ((Count(3) + Count(4)).value(), 7);
    EXPECT_THROW(Count(Count::kLargest) + Count(1), std::out_of_range);
}

TEST(ProbabilityTest, RefusesWhatIsNoProbability) {
    EXPECT_FALSE(Probability::from(std::numeric_limits<double>::quiet_NaN()).has_value());
    EXPECT_THROW(Probability(1.0000001), std::out_of_range);
    EXPECT_THROW(RecombinationFraction(0.51), std::out_of_range);
    EXPECT_DOUBLE_EQ(RecombinationFraction::from(0.5)->value(), 0.5);
}

} // namespace
} // namespace filial
