// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/inheritance/hypothesis.h"

#include <gtest/gtest.h>

#include <array>
#include <stdexcept>

namespace filial::inheritance {
namespace {

Hypothesis read(const std::string& text) {
    Result<Hypothesis> hypothesis = read_hypothesis(text);
    if (!hypothesis)
        throw std::runtime_error("refused: " + text);
    return hypothesis.value();
}

TEST(HypothesisNotation, RoundTrips) {
    const std::vector<std::pair<std::string, std::string>> cases{
        {"9:3:3:1", "9:3:3:1"},
        {"9/16 7/16", "9/16, 7/16"},
        {"f2(coupling, r=0.2)", "f2(coupling, r=0.2)"},
        {" F2 ( r = 0.25 , Repulsion ) ", "f2(repulsion, r=0.25)"},
        {"f2(repulsion,r=fit)", "f2(repulsion, r=fit)"},
        {"testcross(coupling, r=FIT)", "testcross(coupling, r=fit)"},
        {"testcross(repulsion, r=1e-7)", "testcross(repulsion, r=1e-07)"},
        {"f2(coupling, r=0.1234567890123456)", "f2(coupling, r=0.1234567890123456)"},
        {"f2(coupling, r=0)", "f2(coupling, r=0)"},
        {"f2(coupling, r=0.5)", "f2(coupling, r=0.5)"},
    };
    for (const auto& [typed, tidy] : cases) {
        const Hypothesis hypothesis = read(typed);
        EXPECT_EQ(hypothesis.notation(), tidy);
        EXPECT_EQ(read(hypothesis.notation()), hypothesis) << typed;
    }
}

struct Refused {
    std::string text;
    MessageId id;
    std::size_t place;
};

class RefusedHypothesis : public testing::TestWithParam<Refused> {};

TEST_P(RefusedHypothesis, SaysWhyAndWhere) {
    const Result<Hypothesis> hypothesis = read_hypothesis(GetParam().text);
    ASSERT_FALSE(hypothesis.ok());
    EXPECT_EQ(hypothesis.error().message.id, GetParam().id);
    EXPECT_EQ(hypothesis.error().place, GetParam().place);
}

INSTANTIATE_TEST_SUITE_P(Notation, RefusedHypothesis,
                         testing::Values(Refused{"f3(coupling, r=0.2)", MessageId::HypothesisUnknownCross, 0},
                                         Refused{"  gamma", MessageId::HypothesisUnknownCross, 2},
                                         Refused{"f2", MessageId::HypothesisMissingOpening, 2},
                                         Refused{"f2(coupling, r=0.2", MessageId::HypothesisMissingClosing, 18},
                                         Refused{"f2(r=0.2)", MessageId::HypothesisMissingPhase, 3},
                                         Refused{"f2()", MessageId::HypothesisMissingPhase, 3},
                                         Refused{"f2(coupling)", MessageId::HypothesisMissingR, 11},
                                         Refused{"f2(coupling, repulsion, r=fit)", MessageId::HypothesisPhaseTwice, 13},
                                         Refused{"f2(coupling, r=fit, r=0.1)", MessageId::HypothesisRTwice, 20},
                                         Refused{"f2(coupling, r=0,2)", MessageId::HypothesisUnknownArgument, 17},
                                         Refused{"f2(coupled, r=0.2)", MessageId::HypothesisUnknownArgument, 3},
                                         Refused{"f2(, coupling, r=0.2)", MessageId::HypothesisUnknownArgument, 3},
                                         Refused{"f2(coupling, r=0.6)", MessageId::HypothesisROutside, 15},
                                         Refused{"f2(coupling, r=-0.1)", MessageId::HypothesisROutside, 15},
                                         Refused{"f2(coupling, r= 1e400)", MessageId::HypothesisROutside, 16},
                                         Refused{"f2(coupling, r=nan)", MessageId::HypothesisRNotANumber, 15},
                                         Refused{"f2(coupling, r=)", MessageId::HypothesisRNotANumber, 15},
                                         Refused{"f2(coupling, r=0.2x)", MessageId::HypothesisRNotANumber, 15},
                                         Refused{"f2(coupling, r=0.2) x", MessageId::HypothesisTextAfter, 20},
                                         Refused{"9:x", MessageId::RatioNotANumber, 2},
                                         Refused{"nan:1", MessageId::RatioNotANumber, 0},
                                         Refused{"", MessageId::RatioEmpty, 0}));

TEST(Hypothesis, HasAFreeParameterOnlyWhereRIsFitted) {
    EXPECT_TRUE(read("9:7").free_parameters().empty());
    EXPECT_TRUE(read("f2(coupling, r=0.2)").free_parameters().empty());
    const std::vector<FreeParameter> expected{{"r", 0.0, 0.5}};
    EXPECT_EQ(read("testcross(repulsion, r=fit)").free_parameters(), expected);
}

TEST(Hypothesis, RefusesParametersOutOfPlace) {
    const std::array<double, 1> outside{0.6};
    EXPECT_THROW((void)read("f2(coupling, r=fit)").at(outside), std::invalid_argument);
    EXPECT_THROW((void)read("f2(coupling, r=fit)").at({}), std::invalid_argument);
    EXPECT_THROW((void)read("9:7").at(outside), std::invalid_argument);
}

TEST(Hypothesis, OriginDoesNotMakeItAnother) {
    const Hypothesis typed = read("9:7");
    EXPECT_EQ(typed, Hypothesis::from_ratio(*typed.ratio(), Origin::Catalogue));
    EXPECT_EQ(typed, read("18:14"));
    EXPECT_FALSE(typed == read("7:9"));
    EXPECT_FALSE(read("f2(coupling, r=fit)") == read("f2(repulsion, r=fit)"));
}

TEST(Binding, PutsTermsInClassOrder) {
    const std::vector<std::size_t> binding{3, 1, 0, 2};
    const Hypothesis unbound = read("9:4:2:1");
    const Hypothesis bound = inheritance::bind(unbound, binding).value();
    EXPECT_EQ(bound.ratio()->weights(), (std::vector<std::int64_t>{1, 4, 9, 2}));
    EXPECT_EQ(bound.at({}).p, (std::vector<double>{1.0 / 16, 4.0 / 16, 9.0 / 16, 2.0 / 16}));
    EXPECT_EQ(bound.term_text(0), "1 of 16");
    EXPECT_EQ(bound.notation(), "9:4:2:1");
    EXPECT_EQ(bound.binding(), binding);
    EXPECT_EQ(inheritance::bind(unbound, {}).value(), unbound);
}

TEST(Binding, PutsALinkedCrossInClassOrder) {
    const std::vector<std::size_t> binding{3, 1, 0, 2};
    const Hypothesis unbound = read("f2(coupling, r=fit)");
    const Hypothesis bound = inheritance::bind(unbound, binding).value();
    const std::array<double, 1> r{0.2};
    const ClassProbabilities before = unbound.at(r);
    const ClassProbabilities after = bound.at(r);
    for (std::size_t i = 0; i < 4; ++i) {
        EXPECT_EQ(after.p[i], before.p[binding[i]]);
        EXPECT_EQ(after.derivatives[i], before.derivatives[binding[i]]);
        EXPECT_EQ(bound.term_text(i), unbound.term_text(binding[i]));
    }
    EXPECT_EQ(bound.notation(), unbound.notation());
}

TEST(Binding, ComposesWithAnEarlierOne) {
    const std::vector<std::size_t> turn{1, 2, 3, 0};
    for (const char* text : {"9:4:2:1", "testcross(coupling, r=0.1)"}) {
        Hypothesis turned = read(text);
        for (int i = 0; i < 4; ++i)
            turned = inheritance::bind(turned, turn).value();
        EXPECT_EQ(turned, read(text));
    }
}

TEST(Binding, RefusesWhatIsNotAPermutation) {
    const std::vector<std::vector<std::size_t>> bad{{0, 1, 2}, {0, 1, 2, 2}, {0, 1, 2, 4}, {0, 1, 2, 3, 4}};
    for (const auto& binding : bad)
        EXPECT_EQ(inheritance::bind(read("9:3:3:1"), binding).error().message.id, MessageId::HypothesisBinding);
}

TEST(ProductFactors, AreFoundWhereTheRatioIsAProduct) {
    const std::vector<std::size_t> two{2, 2};
    const std::vector<Factor> dominant{{{3, 1}}, {{3, 1}}};
    EXPECT_EQ(product_factors(*read("9:3:3:1").ratio(), two), dominant);
    const std::vector<std::size_t> three_by_two{3, 2};
    const std::vector<Factor> mixed{{{1, 2, 1}}, {{3, 1}}};
    EXPECT_EQ(product_factors(*read("3:1:6:2:3:1").ratio(), three_by_two), mixed);
    const std::vector<std::size_t> loci{2, 2, 2};
    const std::vector<Factor> three{{{3, 1}}, {{3, 1}}, {{3, 1}}};
    EXPECT_EQ(product_factors(*read("27:9:9:3:9:3:3:1").ratio(), loci), three);
    EXPECT_TRUE(product_factors(*read("9:3:4:0").ratio(), two).empty());
    EXPECT_TRUE(product_factors(*read("9:3:3:1").ratio(), loci).empty());
    EXPECT_TRUE(product_factors(*read("9:3:3:1").ratio(), {}).empty());
    const std::vector<std::size_t> none{0, 4};
    EXPECT_TRUE(product_factors(*read("9:3:3:1").ratio(), none).empty());
}

TEST(ProductFactors, StayExactWithLargeWeights) {
    const std::vector<std::size_t> two{2, 2};
    const std::vector<Factor> expected{{{1000000000, 1}}, {{1, 1000000000}}};
    EXPECT_EQ(product_factors(*read("1000000000:1000000000000000000:1:1000000000").ratio(), two), expected);
    EXPECT_TRUE(product_factors(*read("1000000000:1000000000000000001:1:1000000000").ratio(), two).empty());
}

} // namespace
} // namespace filial::inheritance
