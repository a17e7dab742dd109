// SPDX-License-Identifier: GPL-3.0-or-later
// What `derive --json` writes, against the enumeration in Python.
#include <string>
#include <vector>

#include <gtest/gtest.h>
#include <nlohmann/json.hpp>

#include "core/inheritance/derive.h"
#include "core/report/results_json.h"
#include "tests/inheritance/derive_oracle.h"

namespace filial::report {
namespace {

using nlohmann::json;

json derived(const inheritance::OracleCase& asked) {
    inheritance::DeriveInput input{asked.cross, std::nullopt, asked.show};
    if (!asked.linkage.empty())
        input.linkage = RecombinationFraction(std::stod(asked.linkage));
    return json::parse(to_json(inheritance::derive(input).value()));
}

TEST(DerivationJsonOracle, ClassesAsEnumerated) {
    const std::vector<inheritance::OracleCase> cases{
        {"Aa Bb x Aa Bb", "", "A_B_=purple hairy, A_bb=purple smooth, aa=green"},
        {"Aa Bb Cc selfed", "", "A_B_=tall, A_bb=short, aa=short"},
        {"Aa selfed 2", "", "AA=red, Aa=pink, aa=white"},
        {"AB/ab selfed", "0.2", "A_B_=1, A_bb=2, aaB_=3, aabb=4"},
        {"Ab/aB x aa bb", "0.1", "A_B_=1, A_bb=2, aaB_=3, aabb=4"}};
    const auto enumerated = inheritance::enumerate(cases);
    for (std::size_t i = 0; i < cases.size(); ++i) {
        SCOPED_TRACE(cases[i].cross);
        const json found = derived(cases[i]);
        ASSERT_EQ(found["classes"].size(), enumerated[i].size());
        double sum = 0.0;
        for (const json& one : found["classes"]) {
            const auto& expected = enumerated[i].at(one["label"]).share;
            if (cases[i].linkage.empty()) {
                EXPECT_TRUE(inheritance::same_fraction(one["fraction"], expected)) << one.dump();
            } else {
                EXPECT_TRUE(one["fraction"].is_null());
                EXPECT_NEAR(one["probability"].get<double>(), std::stod(expected), 1e-15) << one.dump();
            }
            sum += one["probability"].get<double>();
        }
        EXPECT_NEAR(sum, 1.0, 1e-15);
        EXPECT_EQ(found["ratio"].is_null(), !cases[i].linkage.empty());
    }
}

TEST(DerivationJsonTest, GenotypesNotationAndNotes) {
    const json found = derived({"Aa Bb x Aa Bb", "", "A_B_=purple hairy, A_bb=purple smooth, aa=green"});
    EXPECT_EQ(found["notation"], "9:3:4");
    EXPECT_EQ(found["ratio"], (json{9, 3, 4}));
    ASSERT_EQ(found["genotypes"].size(), 9U);
    for (const json& row : found["genotypes"])
        for (const char* field : {"genotype", "fraction", "probability", "phenotype"})
            EXPECT_TRUE(row.contains(field)) << row.dump();
    EXPECT_TRUE(found["notes"].empty());
    const json linked = derived({"Aa Bb selfed", "0.2", ""});
    EXPECT_TRUE(linked["notation"].is_null());
    ASSERT_EQ(linked["notes"].size(), 1U); // which phase was taken
    EXPECT_NE(linked["notes"][0].get<std::string>().find("AB/ab"), std::string::npos);
}

} // namespace
} // namespace filial::report
