// SPDX-License-Identifier: GPL-3.0-or-later
#include <gtest/gtest.h>

#include <optional>

#include "core/ratio/ratio.h"

namespace filial::ratio {
namespace {

using Weights = std::vector<std::int64_t>;

Ratio read(const std::string& text) {
    Result<Ratio> ratio = read_ratio(text);
    if (!ratio)
        throw std::runtime_error("refused: " + text);
    return ratio.value();
}

struct Accepted {
    std::string text;
    Weights weights;
    std::string notation;
    std::string first_term;
};

class AcceptedRatio : public testing::TestWithParam<Accepted> {};

TEST_P(AcceptedRatio, IsReadTidiedAndReadBack) {
    const Ratio ratio = read(GetParam().text);
    EXPECT_EQ(ratio.weights(), GetParam().weights);
    EXPECT_EQ(ratio.notation(), GetParam().notation);
    EXPECT_EQ(ratio.term_text(0), GetParam().first_term);
    const Ratio again = read(ratio.notation());
    EXPECT_EQ(again, ratio);
    EXPECT_EQ(again.notation(), ratio.notation());
}

INSTANTIATE_TEST_SUITE_P(
    Notation, AcceptedRatio,
    testing::Values(
        Accepted{"9:3:3:1", {9, 3, 3, 1}, "9:3:3:1", "9 of 16"},
        Accepted{" 9 3 3 1 ", {9, 3, 3, 1}, "9:3:3:1", "9 of 16"},
        Accepted{"9,3,3,1", {9, 3, 3, 1}, "9:3:3:1", "9 of 16"}, Accepted{"9; 7", {9, 7}, "9:7", "9 of 16"},
        Accepted{"10:6", {5, 3}, "10:6", "10 of 16"}, Accepted{"9/16, 7/16", {9, 7}, "9/16, 7/16", "9 of 16"},
        Accepted{"9 / 16 7 / 16", {9, 7}, "9/16, 7/16", "9 of 16"},
        Accepted{"1/2 1/4 1/4", {2, 1, 1}, "1/2, 1/4, 1/4", "2 of 4"},
        Accepted{"0.75:0.25", {3, 1}, "0.75:0.25", "0.75"}, Accepted{".75:.25", {3, 1}, "0.75:0.25", "0.75"},
        Accepted{"75%:25%", {3, 1}, "75%:25%", "75%"}, Accepted{"75 % 25 %", {3, 1}, "75%:25%", "75%"},
        Accepted{"56.25%:43.75%", {9, 7}, "56.25%:43.75%", "56.25%"}, Accepted{"1:0:2", {1, 0, 2}, "1:0:2", "1 of 3"},
        Accepted{"09:003", {3, 1}, "9:3", "9 of 12"}, Accepted{"0.1:0.2:0.7", {1, 2, 7}, "0.1:0.2:0.7", "0.1"},
        Accepted{"1/3:2/3", {1, 2}, "1/3, 2/3", "1 of 3"}));

struct Refused {
    std::string text;
    MessageId id;
    std::optional<std::size_t> place;
};

class RefusedRatio : public testing::TestWithParam<Refused> {};

TEST_P(RefusedRatio, SaysWhyAndWhere) {
    const Result<Ratio> ratio = read_ratio(GetParam().text);
    ASSERT_FALSE(ratio.ok());
    EXPECT_EQ(ratio.error().message.id, GetParam().id);
    EXPECT_EQ(ratio.error().place, GetParam().place);
    EXPECT_EQ(ratio.error().kind, ErrorKind::Input);
}

std::string many_terms(std::size_t count) {
    std::string text = "1";
    for (std::size_t i = 1; i < count; ++i)
        text += ":1";
    return text;
}

INSTANTIATE_TEST_SUITE_P(
    Notation, RefusedRatio,
    testing::Values(
        Refused{"", MessageId::RatioEmpty, 0}, Refused{"  ", MessageId::RatioEmpty, 0},
        Refused{"9:-3:3:1", MessageId::RatioNegativeTerm, 2},
        Refused{"9:\xE2\x88\x92"
                "3",
                MessageId::RatioNegativeTerm, 2},
        Refused{"9:3: x", MessageId::RatioNotANumber, 5}, Refused{"9:nan", MessageId::RatioNotANumber, 2},
        Refused{"9:1e30", MessageId::RatioNotANumber, 2}, Refused{"9:inf", MessageId::RatioNotANumber, 2},
        Refused{"9 3:3", MessageId::RatioNotANumber, 0}, Refused{"1.:3", MessageId::RatioNotANumber, 0},
        Refused{"0:0", MessageId::RatioAllZero, 0}, Refused{"0%:0%", MessageId::RatioAllZero, 0},
        Refused{" 9", MessageId::RatioTooFewTerms, 1}, Refused{"9:", MessageId::RatioTermMissing, 2},
        Refused{":9", MessageId::RatioTermMissing, 0}, Refused{"9::7", MessageId::RatioTermMissing, 2},
        Refused{"9/0, 7/16", MessageId::RatioZeroDenominator, 0}, Refused{"9/16, 7/", MessageId::RatioNotANumber, 6},
        Refused{"75%:25", MessageId::RatioMixedPercentages, 4}, Refused{"0,75:0,25", MessageId::RatioDecimalComma, 1},
        Refused{"0,75 0,25", MessageId::RatioDecimalComma, 1}, Refused{"0,75, 0,25", MessageId::RatioDecimalComma, 1},
        Refused{"0,75,0,25", MessageId::RatioDecimalComma, 1}, Refused{"0,75", MessageId::RatioDecimalComma, 1},
        Refused{"1/4611686018427387905, 1/2", MessageId::RatioTooFine, 0}, // common denominator > 2^62
        Refused{"4611686018427387904:1", MessageId::RatioTooFine, 0},      // sum 2^62 + 1
        Refused{"0.00000000000000000001:1", MessageId::RatioTooFine, 0},
        Refused{std::string(5000, '9') + ":1", MessageId::RatioTooFine, 0},
        Refused{"1 .5" + std::string(58, '0'), MessageId::RatioTooFine, 2}, // 61 characters with the 0 before its point
        Refused{many_terms(65), MessageId::RatioTooManyTerms, 128}));

TEST(Ratio, HoldsUpToTwoToThe62) {
    EXPECT_EQ(read("4611686018427387903:1").total(), std::int64_t{1} << 62U);
    EXPECT_EQ(read("1/4611686018427387904, 4611686018427387903/4611686018427387904").total(), std::int64_t{1} << 62U);
    EXPECT_EQ(read(many_terms(64)).size(), kMostTerms);
}

TEST(Ratio, EqualsOnLowestTerms) {
    EXPECT_EQ(read("10:6"), read("5:3"));
    EXPECT_EQ(read("10:6"), read("62.5%:37.5%"));
    EXPECT_FALSE(read("3:1") == read("1:3"));
}

TEST(Ratio, WarnsOfPercentagesThatDoNotAddTo100) {
    EXPECT_TRUE(read("75%:25%").warnings().empty());
    const Ratio ratio = read("74.9%:25%");
    EXPECT_EQ(ratio.weights(), (Weights{749, 250}));
    ASSERT_EQ(ratio.warnings().size(), 1U);
    EXPECT_EQ(ratio.warnings()[0], (Message{MessageId::RatioPercentagesDoNotAdd, {text_argument("99.9")}}));
}

TEST(Ratio, WarnsOfFractionsThatDoNotAddTo1) {
    EXPECT_TRUE(read("9/16, 7/16").warnings().empty());
    const Ratio ratio = read("9/16, 6/16");
    ASSERT_EQ(ratio.warnings().size(), 1U);
    EXPECT_EQ(ratio.warnings()[0], (Message{MessageId::RatioFractionsDoNotAdd, {text_argument("15/16")}}));
}

TEST(Ratio, FromWeightsKeepsWhatWasGiven) {
    const Result<Ratio> ratio = Ratio::from_weights({10, 6});
    ASSERT_TRUE(ratio.ok());
    EXPECT_EQ(ratio.value().notation(), "10:6");
    EXPECT_EQ(ratio.value().weights(), (Weights{5, 3}));
    EXPECT_EQ(ratio.value().term_text(1), "6 of 16");
    EXPECT_EQ(Ratio::from_weights({}).error().message.id, MessageId::RatioEmpty);
    EXPECT_EQ(Ratio::from_weights({1}).error().message.id, MessageId::RatioTooFewTerms);
    EXPECT_EQ(Ratio::from_weights({0, 0}).error().message.id, MessageId::RatioAllZero);
    EXPECT_EQ(Ratio::from_weights({1, -1}).error().message.id, MessageId::RatioNegativeTerm);
    EXPECT_EQ(Ratio::from_weights(Weights(65, 1)).error().message.id, MessageId::RatioTooManyTerms);
    const std::int64_t huge = std::int64_t{1} << 62U;
    EXPECT_EQ(Ratio::from_weights({huge, 1}).error().message.id, MessageId::RatioTooFine);
    EXPECT_EQ(Ratio::from_weights({huge, huge, huge}).value().weights(), (Weights{1, 1, 1}));
    EXPECT_EQ(Ratio::from_weights({huge, huge, huge}).value().term_text(0), "1 of 3");
}

TEST(Ratio, PermutesItsTerms) {
    const std::vector<std::size_t> order{3, 0, 1, 2};
    const Ratio ratio = read("9/16 3/16 2/16 2/16").permuted(order);
    EXPECT_EQ(ratio.weights(), (Weights{2, 9, 3, 2}));
    EXPECT_EQ(ratio.notation(), "2/16, 9/16, 3/16, 2/16");
    EXPECT_THROW((void)ratio.permuted(std::vector<std::size_t>{0, 0, 1, 2}), std::invalid_argument);
    EXPECT_THROW((void)ratio.permuted(std::vector<std::size_t>{0, 1}), std::invalid_argument);
}

} // namespace
} // namespace filial::ratio
