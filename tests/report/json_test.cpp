// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/report/results_json.h"

#include <cmath>
#include <cstring>
#include <limits>

#include <gtest/gtest.h>
#include <nlohmann/json.hpp>

#include "tests/support/reference.h"

namespace filial::report {
namespace {

using nlohmann::json;

fit::Input input_of(const std::vector<long>& observed, const std::string& notation) {
    fit::Input input{{}, test::counts(observed), inheritance::read_hypothesis(notation).value(), {}, false, 0, {}, {}};
    for (std::size_t i = 0; i < observed.size(); ++i) {
        input.labels.push_back("class " + std::to_string(i + 1));
    }
    return input;
}

json parsed(const fit::GoodnessOfFit& result) {
    return json::parse(to_json(result));
}

void expect_fields(const json& object, const std::vector<std::string>& fields) {
    for (const std::string& field : fields) {
        EXPECT_TRUE(object.contains(field)) << field << " is missing in " << object.dump();
    }
}

/// Wherever there is a P there is its logarithm, and no number is text.
void expect_rules(const json& value) {
    if (value.is_array()) {
        for (const json& item : value) {
            expect_rules(item);
        }
    }
    if (!value.is_object()) {
        return;
    }
    for (const auto& [name, item] : value.items()) {
        expect_rules(item);
        if (name == "p" || (name.ends_with("_p") && !name.ends_with("log10_p"))) {
            const std::string prefix = name.substr(0, name.size() - 1);
            if (prefix != "mid_") {
                EXPECT_TRUE(value.contains(prefix + "log10_p")) << name << " in " << value.dump();
            }
        }
        if (item.is_string()) {
            for (const char* bad : {"nan", "NaN", "inf"}) {
                EXPECT_NE(item.get<std::string>(), bad);
            }
        }
    }
}

const std::vector<std::string> kScoreFields{
    "classes",   "n",        "df",           "df_account", "chi_square", "g",     "yates",     "exact",   "simulated",
    "partition", "effect_w", "detectable_w", "verdict",    "hypothesis", "alpha", "estimates", "cautions"};

TEST(ScoreJson, HasEveryFieldOfTheSchema) {
    const json object = parsed(fit::goodness_of_fit(input_of({315, 101, 108, 32}, "9:3:3:1")).value());
    expect_fields(object, kScoreFields);
    ASSERT_EQ(object["classes"].size(), 4U);
    expect_fields(object["classes"][0], {"label", "observed", "expected", "residual", "adjusted_residual", "p_holm",
                                         "interval_low", "interval_high"});
    expect_fields(object["chi_square"], {"statistic", "p", "log10_p", "p_too_close"});
    expect_fields(object["g"], {"statistic", "p", "log10_p", "williams_statistic", "williams_p", "williams_log10_p",
                                "williams_general_statistic", "williams_general_p", "williams_general_log10_p"});
    for (const json& charge : object["df_account"]) {
        expect_fields(charge, {"what", "charge"});
    }
    EXPECT_TRUE(object["yates"].is_null()) << "four classes have no continuity correction";
    EXPECT_TRUE(object["partition"].is_null()) << "no traits were named";
    EXPECT_TRUE(object["n"].is_number_integer());
    EXPECT_TRUE(object["classes"][0]["observed"].is_number_integer());
    EXPECT_EQ(object["verdict"], "not contradicted");
    expect_rules(object);
}

TEST(ScoreJson, TwoClassesHaveYatesAndExact) {
    const json object = parsed(fit::goodness_of_fit(input_of({5474, 1850}, "3:1")).value());
    expect_fields(object["yates"], {"statistic", "p", "log10_p"});
    expect_fields(object["exact"],
                  {"p", "log10_p", "mid_p", "lower", "upper", "p_too_close", "other_reading", "order", "method"});
    expect_rules(object);
}

TEST(ScoreJson, PartitionRowsAreNamed) {
    fit::Input input = input_of({315, 108, 101, 32}, "9:3:3:1");
    input.level_counts = {2, 2};
    input.trait_names = {"seed form", "seed colour"};
    const json object = parsed(fit::goodness_of_fit(input).value());
    // Mather 1938: the three parts of Mendel's dihybrid (tests/reference/C17.json).
    const json expected = test::reference_case("C17")["expected"]["partition"];
    ASSERT_EQ(object["partition"].size(), 3U);
    expect_fields(object["partition"][0], {"what", "df", "statistic", "p", "log10_p"});
    EXPECT_NEAR(object["partition"][0]["statistic"].get<double>(), expected["A_first_locus"].get<double>(), 1e-12);
    EXPECT_NEAR(object["partition"][2]["p"].get<double>(), expected["p_linkage"].get<double>(), 1e-12);
    EXPECT_NE(object["partition"][0]["what"].get<std::string>().find("seed form"), std::string::npos);
}

TEST(ScoreJson, NumbersReadBackToTheIdenticalDouble) {
    const fit::GoodnessOfFit result = fit::goodness_of_fit(input_of({315, 101, 108, 32}, "9:3:3:1")).value();
    const json object = parsed(result);
    const auto same = [](double left, double right) { return std::memcmp(&left, &right, sizeof left) == 0; };
    EXPECT_TRUE(same(object["chi_square"]["statistic"], result.chi_square->statistic));
    EXPECT_TRUE(same(object["chi_square"]["p"], result.chi_square->p->p));
    EXPECT_TRUE(same(object["g"]["statistic"], result.g->statistic));
    EXPECT_TRUE(same(object["classes"][3]["expected"], result.classes[3].expected));
}

TEST(ScoreJson, AForbiddenClassWithOffspringHasPZeroAndNoStatistic) {
    const json object = parsed(fit::goodness_of_fit(input_of({20, 10, 3}, "3:1:0")).value());
    EXPECT_EQ(object["verdict"], "impossible");
    EXPECT_TRUE(object["chi_square"]["statistic"].is_null());
    EXPECT_EQ(object["chi_square"]["p"], 0.0);
    EXPECT_TRUE(object["chi_square"]["log10_p"].is_null());
    expect_rules(object);
}

TEST(ScoreJson, WhatIsNotFiniteBecomesNull) {
    fit::GoodnessOfFit result = fit::goodness_of_fit(input_of({20, 10}, "3:1")).value();
    result.effect_w = std::numeric_limits<double>::infinity();
    fit::ChiSquare broken;
    broken.statistic = std::numeric_limits<double>::quiet_NaN();
    result.chi_square = broken;
    const json object = parsed(result);
    EXPECT_TRUE(object["effect_w"].is_null());
    EXPECT_TRUE(object["chi_square"]["statistic"].is_null());
    EXPECT_TRUE(object["chi_square"]["p"].is_null());
}

TEST(ScoreJson, MalformedLabelsStillGiveValidJson) {
    fit::Input input = input_of({20, 10}, "3:1");
    input.labels = {"a\xff\"\n", "<b>"};
    const json object = parsed(fit::goodness_of_fit(input).value());
    EXPECT_EQ(object["classes"][0]["label"], "a\uFFFD\"\n");
}

TEST(FamiliesJson, HasEveryFieldOfTheSchema) {
    const json reference = test::reference_case("E01");
    families::Input input{{}, input_of({1, 1}, "3:1"), true};
    for (const json& family : reference["inputs"]["families"]) {
        input.families.push_back(
            {"plant " + std::to_string(input.families.size() + 1), test::counts(family.get<std::vector<long>>())});
    }
    const json object = json::parse(to_json(families::heterogeneity(input).value()));
    expect_fields(object, {"per_family", "total", "pooled", "heterogeneity", "heterogeneity_exact", "contingency",
                           "overdispersion", "outliers"});
    for (const char* row : {"total", "pooled", "heterogeneity"}) {
        expect_fields(object[row], {"df", "chi_square", "chi_square_p", "chi_square_log10_p", "g", "g_p", "g_log10_p"});
    }
    expect_fields(object["contingency"], {"df", "statistic", "p", "log10_p"});
    expect_fields(object["overdispersion"],
                  {"phi", "rho", "rho_low", "rho_high", "lr", "p", "p_method", "z", "z_p", "free"});
    ASSERT_EQ(object["outliers"].size(), 10U);
    expect_fields(object["outliers"][0], {"label", "statistic", "df", "p", "log10_p", "p_holm", "p_bh"});
    ASSERT_EQ(object["per_family"].size(), 10U);
    expect_fields(object["per_family"][0], kScoreFields);
    // Mendel 1866 (Bateson 1902, p. 53), recomputed with mpmath: tests/reference/E01.json.
    const json expected = reference["expected"];
    EXPECT_NEAR(object["total"]["chi_square"], expected["total"]["chi2"].get<double>(), 1e-12);
    EXPECT_NEAR(object["heterogeneity"]["chi_square_p"], expected["heterogeneity"]["p"].get<double>(), 1e-12);
    EXPECT_NEAR(object["contingency"]["statistic"], expected["contingency_chi2"]["chi2"].get<double>(), 1e-12);
    expect_rules(object);
}

} // namespace
} // namespace filial::report
