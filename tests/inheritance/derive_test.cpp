// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/inheritance/derive.h"

#include <gtest/gtest.h>

#include <random>
#include <set>

#include "tests/inheritance/derive_oracle.h"

namespace filial::inheritance {
namespace {

Derivation derived(const std::string& cross, const std::string& show = "", std::optional<double> r = std::nullopt) {
    std::optional<RecombinationFraction> linkage;
    if (r)
        linkage = RecombinationFraction(*r);
    Result<Derivation> result = derive({cross, linkage, show});
    if (!result)
        throw std::runtime_error("refused: " + cross + ", " + show);
    return result.value();
}

struct Refused {
    std::string cross;
    std::string show;
    MessageId id;
    std::optional<std::size_t> place;
};

class RefusedCross : public testing::TestWithParam<Refused> {};

TEST_P(RefusedCross, SaysWhyAndWhere) {
    const Result<Derivation> result = derive({GetParam().cross, std::nullopt, GetParam().show});
    ASSERT_FALSE(result.ok());
    EXPECT_EQ(result.error().message.id, GetParam().id);
    EXPECT_EQ(result.error().place, GetParam().place);
}

constexpr auto kNowhere = std::nullopt;
INSTANTIATE_TEST_SUITE_P(Crosses, RefusedCross,
                         testing::Values(Refused{"", "", MessageId::DerivePlantMissing, 0},
                                         Refused{"x Aa", "", MessageId::DerivePlantMissing, 0},
                                         Refused{"Aa x", "", MessageId::DerivePlantMissing, 4},
                                         Refused{"Aa", "", MessageId::DeriveNoMating, 2},
                                         Refused{"Aa Bq x Aa Bb", "", MessageId::DerivePlantNotUnderstood, 3},
                                         Refused{"Aa x A1", "", MessageId::DerivePlantNotUnderstood, 5},
                                         Refused{"Aa x Aab", "", MessageId::DerivePlantNotUnderstood, 5},
                                         Refused{"AB/a x ab/ab", "", MessageId::DerivePlantNotUnderstood, 0},
                                         Refused{"XAZa x XAY", "", MessageId::DerivePlantNotUnderstood, 0},
                                         Refused{"Aa selfed 2 Bb", "", MessageId::DerivePlantNotUnderstood, 12},
                                         Refused{"Aa Aa x Aa", "", MessageId::DeriveLocusTwice, 3},
                                         Refused{"Aa Bb Cc Dd selfed", "", MessageId::DeriveTooManyLoci, 9},
                                         Refused{"Aa Bb x Aa", "", MessageId::DeriveLociDiffer, 8},
                                         Refused{"Aa x Aa Bb", "", MessageId::DeriveLocusUnknown, 5},
                                         Refused{"Aa selfed 0", "", MessageId::DeriveSelfedNumber, 10},
                                         Refused{"Aa selfed 21", "", MessageId::DeriveSelfedNumber, 10},
                                         Refused{"Aa selfed -1", "", MessageId::DeriveSelfedNumber, 10},
                                         Refused{"Aa selfed 20 selfed", "", MessageId::DeriveTooManyGenerations, 13},
                                         Refused{"XAXa selfed", "", MessageId::DeriveSexLinkedOneCross, 0},
                                         Refused{"XAXa x XAXa", "", MessageId::DeriveSameSex, 7},
                                         Refused{"XAXa XBXb x XAY XBY", "", MessageId::DeriveTwoSexLinkedLoci, 5},
                                         Refused{std::string(3000, 'A'), "", MessageId::DeriveTooLong, 2000}));

INSTANTIATE_TEST_SUITE_P(
    Groupings, RefusedCross,
    testing::Values(Refused{"Aa selfed", "A_", MessageId::DeriveShowMissingEquals, 0},
                    Refused{"Aa selfed", "A_=1,", MessageId::DeriveShowMissingEquals, 5},
                    Refused{"Aa selfed", "A_=1, B_=2", MessageId::DeriveShowPattern, 6},
                    Refused{"Aa selfed", "A_Aa=1", MessageId::DeriveShowPattern, 0},
                    Refused{"Aa selfed", "_A=1", MessageId::DeriveShowPattern, 0},
                    Refused{"Aa selfed", "=1", MessageId::DeriveShowPattern, 0},
                    Refused{"Aa selfed", "A_=1, aa=", MessageId::DeriveShowLabelMissing, 9},
                    Refused{"Aa selfed", "A_=1", MessageId::DeriveShowMissing, kNowhere},
                    Refused{"Aa selfed", "A_=1, a_=2", MessageId::DeriveShowOverlap, kNowhere},
                    Refused{"Aa selfed", "AA=dies, A_=1, aa=2", MessageId::DeriveShowOverlap, kNowhere},
                    Refused{"Aa selfed", "AA=dies, AA=left out, Aa=1, aa=2", MessageId::DeriveShowOverlap, kNowhere},
                    Refused{"AA x aa", "Aa=dies, AA=1, aa=2", MessageId::DeriveShowAllDie, kNowhere},
                    Refused{"Aa x AA", "AA=dies, Aa=1, aa=2", MessageId::DeriveShowParentDies, kNowhere},
                    Refused{"Aa selfed", "A_=dies, aa=dies", MessageId::DeriveShowNoClass, 0}));

TEST(Derive, NamesTheGenotypeThatIsMissingOrInTwoClasses) {
    const auto missing = derive({"Aa Bb x Aa Bb", std::nullopt, "A_B_=purple, aa=green"});
    EXPECT_EQ(missing.error().message.arguments, std::vector<Argument>{text_argument("AAbb")});
    const auto twice = derive({"Aa selfed", std::nullopt, "A_=purple, Aa=pink, aa=white"});
    const std::vector<Argument> expected{text_argument("Aa"), text_argument("purple"), text_argument("pink")};
    EXPECT_EQ(twice.error().message.arguments, expected);
}

TEST(Derive, GivesTheTableAndTheClasses) {
    const Derivation result = derived("Aa Bb x Aa Bb", "A_B_=purple hairy, A_bb=purple smooth, aa=green");
    ASSERT_EQ(result.genotypes.size(), 9U);
    EXPECT_EQ(result.genotypes[4].genotype, "AaBb");
    EXPECT_EQ(result.genotypes[4].fraction, "4/16");
    EXPECT_EQ(result.genotypes[4].phenotype, "purple hairy");
    ASSERT_EQ(result.classes.size(), 3U);
    EXPECT_EQ(result.classes[2].label, "green");
    EXPECT_EQ(result.classes[2].genotypes, "aa__");
    EXPECT_EQ(result.classes[2].fraction, "4/16");
    EXPECT_EQ(result.ratio->notation(), "9:3:4");
}

TEST(Derive, WithoutAGroupingTakesFullDominance) {
    EXPECT_EQ(derived("AaBb selfed").ratio->notation(), "9:3:3:1");
    EXPECT_EQ(derived("Aa Bb \xC3\x97 aa bb").ratio->notation(), "1:1:1:1");
    const Derivation uniform = derived("AA x aa");
    ASSERT_EQ(uniform.classes.size(), 1U);
    EXPECT_EQ(uniform.classes[0].label, "A_");
    EXPECT_FALSE(uniform.ratio.has_value());
    EXPECT_EQ(derived("Aa x Aa", "A_=1, aa=2, Aa=1").ratio->notation(), "3:1");
    EXPECT_EQ(derived("AA x Aa", "A_=1, aa=2").ratio->notation(), "2:0"); // a class that cannot arise stays
}

TEST(Derive, SaysWhichPhaseWasTaken) {
    const Derivation taken = derived("Aa Bb selfed", "", 0.2);
    ASSERT_EQ(taken.notes.size(), 1U);
    const std::vector<Argument> expected{text_argument("Aa Bb"), text_argument("AB/ab"), text_argument("Ab/aB")};
    EXPECT_EQ(taken.notes[0], (Message{MessageId::DeriveCouplingTaken, expected}));
    EXPECT_TRUE(derived("Ab/aB selfed", "", 0.2).notes.empty());
    EXPECT_TRUE(derived("Aa Bb selfed").notes.empty());
    EXPECT_EQ(derive({"Aa selfed", RecombinationFraction(0.1), ""}).error().message.id,
              MessageId::DeriveLinkageNeedsTwoLoci);
}

// All groupings of the four classes of two loci with dominance: which ratios there are is in methods texts (common
// practice); that each grouping gives its ratio is checked by the enumeration.
TEST(DeriveOracle, TwoLociWithDominanceGiveExactlyTenRatios) {
    const std::vector<std::string> classes{"A_B_", "A_bb", "aaB_", "aabb"};
    std::vector<OracleCase> cases;
    for (unsigned code = 0; code < 256; ++code) {
        std::string show;
        for (unsigned i = 0; i < 4; ++i)
            show += (i == 0 ? "" : ",") + classes[i] + "=" + std::to_string(code >> (2 * i) & 3U);
        cases.push_back({"Aa Bb x Aa Bb", "", show});
    }
    const auto enumerated = enumerate(cases);
    std::set<std::vector<std::int64_t>> ratios;
    for (std::size_t i = 0; i < cases.size(); ++i) {
        const Derivation result = derived(cases[i].cross, cases[i].show);
        ASSERT_EQ(result.classes.size(), enumerated[i].size());
        for (const DerivedClass& one : result.classes)
            EXPECT_TRUE(same_fraction(one.fraction, enumerated[i].at(one.label).share)) << cases[i].show;
        if (!result.ratio)
            continue;
        std::vector<std::int64_t> sorted = result.ratio->weights();
        std::sort(sorted.rbegin(), sorted.rend());
        ratios.insert(sorted);
    }
    const std::set<std::vector<std::int64_t>> ten{{3, 1}, {5, 3},     {9, 3, 3, 1}, {9, 4, 3}, {9, 6, 1},
                                                  {9, 7}, {10, 3, 3}, {12, 3, 1},   {13, 3},   {15, 1}};
    EXPECT_EQ(ratios, ten);
}

class RandomCrossesOracle : public testing::Test {
protected:
    std::mt19937 random_{20240229};
    std::size_t below(std::size_t n) { return random_() % n; }

    std::string plant(std::size_t loci, bool phased) {
        std::string one;
        std::string other;
        std::string pairs;
        for (std::size_t i = 0; i < loci; ++i) {
            const char big = static_cast<char>('A' + i);
            const char small = static_cast<char>('a' + i);
            const bool first = below(3) != 0;
            const bool second = below(3) == 0;
            one += first ? big : small;
            other += second ? big : small;
            pairs += std::string(i == 0 ? "" : " ") + one.back() + other.back();
        }
        return phased ? one + "/" + other : pairs;
    }

    /// A cross of one to three steps.
    std::string cross(std::size_t loci, bool phased) {
        std::string text = plant(loci, phased);
        for (std::size_t steps = 1 + below(3); steps > 0; --steps)
            text += below(2) == 0 ? " selfed " + std::to_string(1 + below(2)) : " x " + plant(loci, phased);
        return text;
    }

    /// Every genotype in a class of its own choosing.
    std::string grouping(std::size_t loci) {
        std::vector<std::string> genotypes{""};
        for (std::size_t i = 0; i < loci; ++i) {
            const std::string big(1, static_cast<char>('A' + i));
            const std::string small(1, static_cast<char>('a' + i));
            std::vector<std::string> longer;
            for (const std::string& start : genotypes)
                for (const std::string& pair : {big + big, big + small, small + small})
                    longer.push_back(start + pair);
            genotypes = longer;
        }
        const std::size_t classes = 1 + below(5);
        std::string show;
        for (const std::string& genotype : genotypes)
            show += (show.empty() ? "" : ",") + genotype + "=k" + std::to_string(below(classes));
        return show;
    }
};

TEST_F(RandomCrossesOracle, EqualTheEnumerationExactly) {
    std::vector<OracleCase> cases;
    for (int i = 0; i < 300; ++i) {
        const std::size_t loci = 1 + below(3);
        cases.push_back({cross(loci, below(2) == 0), "", grouping(loci)});
    }
    const auto enumerated = enumerate(cases);
    for (std::size_t i = 0; i < cases.size(); ++i) {
        const Derivation result = derived(cases[i].cross, cases[i].show);
        ASSERT_EQ(result.classes.size(), enumerated[i].size()) << cases[i].cross;
        for (const DerivedClass& one : result.classes)
            EXPECT_TRUE(same_fraction(one.fraction, enumerated[i].at(one.label).share)) << cases[i].cross;
    }
}

TEST_F(RandomCrossesOracle, EqualTheEnumerationWithLinkage) {
    std::vector<OracleCase> cases;
    for (int i = 0; i < 100; ++i) {
        const std::size_t loci = 2 + below(2);
        const double r = static_cast<double>(below(1000000)) / 2000000.0;
        cases.push_back({cross(loci, true), test::exact_text(r), grouping(loci)});
    }
    const auto enumerated = enumerate(cases);
    for (std::size_t i = 0; i < cases.size(); ++i) {
        const Derivation result = derived(cases[i].cross, cases[i].show, std::stod(cases[i].linkage));
        EXPECT_FALSE(result.ratio.has_value());
        for (const DerivedClass& one : result.classes)
            EXPECT_NEAR(one.probability, std::stod(enumerated[i].at(one.label).share), 1e-14) << cases[i].cross;
    }
}

} // namespace
} // namespace filial::inheritance
