// SPDX-License-Identifier: GPL-3.0-or-later
// Which inheritances of the catalogue the counts do not contradict either: each P again in SciPy, and none missing.
#include <algorithm>
#include <cstdlib>
#include <map>
#include <string>
#include <vector>

#include <gtest/gtest.h>

#include "core/book/model.h"
#include "core/inheritance/catalogue.h"
#include "core/report/cross_analysis.h"
#include "tests/support/oracle.h"

namespace filial::report {
namespace {

std::string joined(const std::vector<long>& values) {
    std::string text;
    for (const long value : values)
        text += (text.empty() ? "" : ";") + std::to_string(value);
    return text;
}

CrossAnalysis analysis_of(const std::vector<long>& counts, const std::string& notation) {
    book::Cross cross;
    cross.id = book::new_id();
    cross.name = "K14 × M02, F2";
    book::Trait trait{"stem", {}};
    for (std::size_t i = 0; i < counts.size(); ++i)
        trait.levels.push_back({"level " + std::to_string(i + 1), ""});
    cross.traits = {trait};
    cross.classes = book::product_classes(cross.traits);
    cross.hypothesis.notation = notation;
    book::Family family = book::new_family("F2-1", counts.size());
    for (std::size_t i = 0; i < counts.size(); ++i)
        family.typed[i] = {book::CellState::Number, Count(counts[i])};
    cross.families = {family};
    return analyse(cross, {});
}

// Every hypothesis of the catalogue with as many classes, other than the one stated; each model once.
std::vector<std::string> rivals(std::size_t classes, const std::string& stated) {
    std::vector<inheritance::Hypothesis> found{inheritance::read_hypothesis(stated).value()};
    std::vector<std::string> notations;
    for (const auto& entry : inheritance::catalogue()) {
        if (entry.hypothesis.class_count() != classes ||
            std::find(found.begin(), found.end(), entry.hypothesis) != found.end())
            continue;
        found.push_back(entry.hypothesis);
        notations.push_back(entry.hypothesis.notation());
    }
    return notations;
}

struct Asked {
    std::vector<long> counts;
    std::string stated;
};

void expect_alternatives(const Asked& asked) {
    SCOPED_TRACE(joined(asked.counts) + " against " + asked.stated);
    const auto candidates = rivals(asked.counts.size(), asked.stated);
    std::vector<test::Row> rows;
    for (std::size_t i = 0; i < candidates.size(); ++i) {
        std::string text = candidates[i];
        std::replace(text.begin(), text.end(), ',', ';');
        rows.push_back({std::to_string(i), joined(asked.counts), text});
    }
    const auto oracle = test::run_oracle("alternatives.py", rows);
    std::map<std::string, double> expected;
    std::size_t tried = 1; // the stated one
    for (std::size_t i = 0; i < candidates.size(); ++i) {
        const std::string& p = oracle.at(std::to_string(i)).at(1);
        if (p == "none")
            continue;
        ++tried;
        if (const double value = std::strtod(p.c_str(), nullptr); value >= 0.05)
            expected[candidates[i]] = value;
    }
    const Alternatives found = also_not_contradicted(analysis_of(asked.counts, asked.stated), 100);
    EXPECT_EQ(found.tried, tried);
    EXPECT_EQ(found.not_contradicted.size(), expected.size());
    double last = 1.0;
    for (const auto& one : found.not_contradicted) {
        ASSERT_TRUE(expected.contains(one.notation)) << one.notation;
        EXPECT_NEAR(one.p, expected[one.notation], 1e-7) << one.notation;
        EXPECT_LE(one.p, last);
        last = one.p;
    }
}

TEST(AlternativesOracle, EachAgainInSciPyAndNoneMissing) {
    for (const Asked& asked : std::vector<Asked>{{{19, 11}, "3:1"},
                                                 {{56, 44}, "9:7"},
                                                 {{9, 5}, "1:1"},
                                                 {{31, 60, 29}, "1:2:1"},
                                                 {{92, 37, 31}, "9:3:4"},
                                                 {{64, 18, 21, 9}, "9:3:3:1"},
                                                 {{30, 28, 27, 33}, "1:1:1:1"},
                                                 {{20, 8, 9, 2}, "f2(coupling, r=fit)"}})
        expect_alternatives(asked);
}

TEST(AlternativesTest, AtMostAsManyAsAskedFor) {
    const CrossAnalysis analysis = analysis_of({9, 5}, "1:1");
    const Alternatives all = also_not_contradicted(analysis, 100);
    const Alternatives two = also_not_contradicted(analysis, 2);
    ASSERT_GT(all.not_contradicted.size(), 2U);
    ASSERT_EQ(two.not_contradicted.size(), 2U);
    EXPECT_EQ(two.not_contradicted[1].notation, all.not_contradicted[1].notation);
    EXPECT_EQ(two.tried, all.tried);
}

} // namespace
} // namespace filial::report
