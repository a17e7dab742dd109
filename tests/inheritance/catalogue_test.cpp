// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/inheritance/catalogue.h"

#include <gtest/gtest.h>

#include <chrono>
#include <set>

#include "core/inheritance/derive.h"
#include "tests/inheritance/derive_oracle.h"
#include "tests/support/reference.h"

namespace filial::inheritance {
namespace {

// The ratios a breeder knows, as methods texts list them (common practice). They choose what must be in the catalogue;
// that each follows from its cross is checked by the enumeration in Python below.
const std::vector<std::pair<CatalogueGroup, std::vector<std::string>>> kKnown{
    {CatalogueGroup::OneLocus, {"1:1", "3:1", "1:2:1", "1:2"}},
    {CatalogueGroup::TwoLociDominant, {"9:3:3:1"}},
    {CatalogueGroup::TwoLociInteracting, {"9:3:4", "9:6:1", "9:7", "10:3:3", "12:3:1", "13:3", "15:1", "5:3"}},
    {CatalogueGroup::TwoLociCodominant, {"3:6:3:1:2:1", "1:2:1:2:4:2:1:2:1", "7:6:3", "8:7:1", "3:6:3:4", "1:4:6:4:1"}},
    {CatalogueGroup::ThreeLoci,
     {"27:9:9:9:3:3:3:1", "63:1", "57:7", "27:37", "54:10", "61:3", "45:19", "48:15:1", "27:9:28", "1:6:15:20:15:6:1"}},
    {CatalogueGroup::TestCross,
     {"1:1", "1:1:1:1", "1:3", "3:1", "1:1:2", "2:1:1", "1:2:1", "1:7", "7:1", "1:1:1:1:1:1:1:1", "3:3:1:1", "3:5"}},
    {CatalogueGroup::Selfing,
     {"5:3", "9:7", "17:15", "3:2:3", "7:2:7", "15:2:15", "25:15:15:9", "3:5", "7:1", "1:4:4", "1:8:7", "7:8:1",
      "37:6:12:8"}},
    {CatalogueGroup::Lethal, {"2:1", "1:2", "6:2:3:1", "6:3:2:1", "4:2:2:1"}},
    {CatalogueGroup::SexLinked, {"1:1", "2:1:1", "1:1:1:1", "3:1"}},
};

TEST(Catalogue, HoldsWhatABreederMeets) {
    for (const auto& [group, ratios] : kKnown)
        for (const std::string& text : ratios) {
            const ratio::Ratio wanted = ratio::read_ratio(text).value();
            const bool found = std::any_of(catalogue().begin(), catalogue().end(), [&](const CatalogueEntry& entry) {
                return entry.group == group && entry.hypothesis.ratio() != nullptr &&
                       *entry.hypothesis.ratio() == wanted;
            });
            EXPECT_TRUE(found) << text;
        }
    std::set<std::string> linked;
    for (const CatalogueEntry& entry : catalogue())
        if (entry.group == CatalogueGroup::Linked)
            linked.insert(entry.hypothesis.notation());
    EXPECT_EQ(linked, (std::set<std::string>{"f2(coupling, r=fit)", "f2(repulsion, r=fit)",
                                             "testcross(coupling, r=fit)", "testcross(repulsion, r=fit)"}));
}

TEST(Catalogue, IsCompleteInWords) {
    std::set<std::string> names;
    for (const CatalogueEntry& entry : catalogue()) {
        EXPECT_TRUE(names.insert(entry.name).second) << entry.name;
        EXPECT_EQ(entry.meanings.size(), entry.hypothesis.class_count()) << entry.name;
        EXPECT_FALSE(entry.keywords.empty()) << entry.name;
        EXPECT_EQ(entry.hypothesis.origin(), Origin::Catalogue);
        for (const std::string& meaning : entry.meanings)
            EXPECT_FALSE(meaning.empty()) << entry.name;
        EXPECT_EQ(read_hypothesis(entry.hypothesis.notation()).value(), entry.hypothesis);
    }
}

TEST(CatalogueOracle, EqualsTheEnumerationOfGametesAndZygotes) {
    std::vector<OracleCase> cases;
    for (const CatalogueEntry& entry : catalogue())
        cases.push_back({entry.cross, entry.group == CatalogueGroup::Linked ? "0.2" : "", entry.show});
    const auto enumerated = enumerate(cases);
    for (std::size_t i = 0; i < catalogue().size(); ++i) {
        const CatalogueEntry& entry = catalogue()[i];
        ASSERT_EQ(enumerated[i].size(), entry.hypothesis.class_count()) << entry.name;
        const ratio::Ratio* ratio = entry.hypothesis.ratio();
        if (ratio == nullptr)
            continue;
        for (std::size_t term = 0; term < ratio->size(); ++term) {
            // Labels of the catalogue's groupings are the term numbers.
            const std::string& share = enumerated[i].at(std::to_string(term + 1)).share;
            EXPECT_TRUE(
                same_fraction(std::to_string(ratio->weights()[term]) + "/" + std::to_string(ratio->total()), share))
                << entry.name << ", term " << term + 1 << ": " << share;
        }
    }
}

TEST(CatalogueOracle, LinkedEntriesEqualTheEnumerationWithTheirSlopes) {
    const std::vector<std::string> rs{"0", "0.001", "0.0625", "0.2", "0.3333333333333333", "0.4999", "0.5"};
    std::vector<OracleCase> cases;
    std::vector<std::pair<const CatalogueEntry*, double>> asked;
    for (const CatalogueEntry& entry : catalogue())
        for (const std::string& r : rs)
            if (entry.group == CatalogueGroup::Linked) {
                cases.push_back({entry.cross, r, entry.show});
                asked.emplace_back(&entry, std::stod(r));
            }
    ASSERT_EQ(cases.size(), 4 * rs.size());
    const auto enumerated = enumerate(cases);
    for (std::size_t i = 0; i < cases.size(); ++i) {
        const ClassProbabilities found = asked[i].first->hypothesis.at(std::span(&asked[i].second, 1));
        for (std::size_t term = 0; term < 4; ++term) {
            const OracleShare& expected = enumerated[i].at(std::to_string(term + 1));
            EXPECT_NEAR(found.p[term], std::stod(expected.share), 1e-15) << cases[i].cross << cases[i].linkage;
            EXPECT_NEAR(found.derivatives[term][0], std::stod(expected.slope), 1e-15) << cases[i].cross;
        }
    }
}

// Classes counted in published families: the derived ratio is the one the source tested.
TEST(Catalogue, GivesTheRatiosOfPublishedFamilies) {
    const std::vector<std::pair<std::string, std::string>> cases{
        {"A04", "two loci, both dominant"},
        {"B01", "one locus, dominant"},
        {"B18", "duplicate recessive epistasis (complementary genes)"},
        {"B24", "kinds of F3 families of dominant F2 plants, complementary genes (true-breeding, 3:1, 9:7)"}};
    const auto weights_of = [](const std::string& name) {
        for (const CatalogueEntry& entry : catalogue())
            if (entry.name == name)
                return entry.hypothesis.ratio()->weights();
        return std::vector<std::int64_t>{};
    };
    for (const auto& [id, name] : cases)
        EXPECT_EQ(test::reference_case(id)["inputs"]["ratio"].get<std::vector<std::int64_t>>(), weights_of(name)) << id;
    const auto wheat = test::reference_case("B21")["inputs"]; // Nilsson-Ehle 1909
    EXPECT_EQ(wheat["F2_ratio"].get<std::vector<std::int64_t>>(), weights_of("triplicate dominant genes"));
    EXPECT_EQ(
        wheat["F3_ratio_among_red"].get<std::vector<std::int64_t>>(),
        weights_of("kinds of F3 families of dominant F2 plants, triplicate genes (true-breeding, 3:1, 15:1, 63:1)"));
}

} // namespace
} // namespace filial::inheritance
