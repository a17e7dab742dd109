// SPDX-License-Identifier: GPL-3.0-or-later
// The worked examples of the help pages: every number printed there is compared
// with what core computes and with a value from outside (tests/reference), each
// to the digits printed. A row that no check knows fails.
#include <cmath>
#include <fstream>
#include <functional>
#include <map>
#include <sstream>
#include <string>
#include <vector>

#include <gtest/gtest.h>

#include "core/families/heterogeneity.h"
#include "core/fit/goodness_of_fit.h"
#include "core/inheritance/hypothesis.h"
#include "tests/support/reference.h"

namespace filial {
namespace {

using nlohmann::json;
using Table = std::vector<std::vector<std::string>>;

std::string page(const std::string& name) {
    std::ifstream file(std::string(FILIAL_TEST_DATA) + "/../resources/help/" + name);
    std::stringstream text;
    text << file.rdbuf();
    EXPECT_FALSE(text.str().empty()) << name;
    return text.str();
}

/// The text under "### title", up to the next heading.
std::string example(const std::string& page_text, const std::string& title) {
    const std::string heading = "\n### " + title + "\n";
    const auto at = page_text.find(heading);
    EXPECT_NE(at, std::string::npos) << title;
    if (at == std::string::npos)
        return {};
    const auto begin = at + heading.size();
    return page_text.substr(begin, page_text.find("\n#", begin) - begin);
}

std::vector<std::string> cells(const std::string& line) {
    std::vector<std::string> result;
    std::stringstream stream(line.substr(1));
    std::string cell;
    while (std::getline(stream, cell, '|')) {
        const auto first = cell.find_first_not_of(' ');
        const auto last = cell.find_last_not_of(' ');
        result.push_back(first == std::string::npos ? std::string{} : cell.substr(first, last - first + 1));
    }
    return result;
}

/// Rows of the table whose header begins with `first`, without header and rule.
Table table(const std::string& text, const std::string& first) {
    Table rows;
    std::stringstream stream(text);
    std::string line;
    bool inside = false;
    while (std::getline(stream, line)) {
        if (line.starts_with("| " + first + " |"))
            inside = true;
        else if (inside && !line.starts_with("|"))
            break;
        else if (inside && !line.starts_with("| ---"))
            rows.push_back(cells(line));
    }
    EXPECT_FALSE(rows.empty()) << first;
    return rows;
}

/// What a row should say, from two sides.
struct Values {
    double computed = 0.0; ///< by core
    double outside = 0.0;  ///< by the reference case
};
using Expected = std::map<std::string, Values>;

void check_rows(const Table& rows, const Expected& expected) {
    EXPECT_EQ(rows.size(), expected.size());
    for (const auto& row : rows) {
        ASSERT_EQ(row.size(), 2U);
        const auto found = expected.find(row[0]);
        ASSERT_NE(found, expected.end()) << "no check for: " << row[0];
        const double printed = std::stod(row[1]);
        const double tolerance = test::printed_tolerance(row[1]);
        EXPECT_NEAR(found->second.computed, printed, tolerance) << row[0] << ", by core";
        EXPECT_NEAR(found->second.outside, printed, tolerance) << row[0] << ", by the reference";
    }
}

fit::Input input(const std::vector<long>& observed, const std::string& notation) {
    fit::Input result{.labels = {},
                      .observed = test::counts(observed),
                      .hypothesis = inheritance::read_hypothesis(notation).value(),
                      .joins = {},
                      .level_counts = {},
                      .trait_names = {}};
    for (std::size_t i = 0; i < observed.size(); ++i)
        result.labels.push_back("class " + std::to_string(i + 1));
    return result;
}

/// The page says the counts it is about.
void expect_counts_said(const std::string& text, const std::vector<long>& observed) {
    std::string said;
    for (std::size_t i = 0; i < observed.size(); ++i)
        said += (i == 0 ? "" : i + 1 == observed.size() ? " and " : ", ") + std::to_string(observed[i]);
    EXPECT_NE(text.find(said), std::string::npos) << said;
}

TEST(HelpExamplesTest, FourClasses) {
    const std::string text = example(page("goodness-of-fit.md"), "Four classes");
    const json a04 = test::reference_case("A04").at("expected");
    const json c17 = test::reference_case("C17").at("expected").at("partition");
    const auto observed = test::reference_case("A04").at("inputs").at("observed").get<std::vector<long>>();
    expect_counts_said(text, observed);
    auto asked = input(observed, "9:3:3:1");
    asked.level_counts = {2, 2};
    asked.trait_names = {"colour", "form"};
    const auto result = fit::goodness_of_fit(asked);
    ASSERT_TRUE(result.ok());
    const fit::GoodnessOfFit& fit = result.value();
    ASSERT_EQ(fit.partition->size(), 3U);

    Expected expected;
    for (std::size_t i = 0; i < 4; ++i)
        expected["expected, class " + std::to_string(i + 1)] = {fit.classes.at(i).expected,
                                                                a04.at("expected_counts").at(i)};
    expected["χ²"] = {fit.chi_square->statistic, a04.at("chi2")};
    expected["degrees of freedom"] = {static_cast<double>(fit.df), a04.at("df")};
    expected["P of χ²"] = {fit.chi_square->p->p, a04.at("p_chi2")};
    expected["G"] = {fit.g->statistic, a04.at("G")};
    expected["P of G"] = {fit.g->p->p, a04.at("p_G")};
    // C17 has the loci the other way round: its first is the form.
    expected["χ² of the first trait, 3:1"] = {fit.partition->at(0).statistic, c17.at("B_second_locus")};
    expected["χ² of the second trait, 3:1"] = {fit.partition->at(1).statistic, c17.at("A_first_locus")};
    expected["χ² of their association"] = {fit.partition->at(2).statistic, c17.at("linkage")};
    check_rows(table(text, "quantity"), expected);
}

TEST(HelpExamplesTest, TwoClasses) {
    const std::string text = example(page("goodness-of-fit.md"), "Two classes");
    const json reference = test::reference_case("A24").at("expected");
    const auto observed = test::reference_case("A24").at("inputs").at("observed").get<std::vector<long>>();
    expect_counts_said(text, observed);
    const auto result = fit::goodness_of_fit(input(observed, "3:1"));
    ASSERT_TRUE(result.ok());
    const fit::GoodnessOfFit& fit = result.value();
    check_rows(table(text, "quantity"),
               {{"χ²", {fit.chi_square->statistic, reference.at("chi2")}},
                {"P of χ²", {fit.chi_square->p->p, reference.at("p_chi2")}},
                {"χ² with Yates' correction", {fit.yates->statistic, reference.at("chi2_yates")}},
                {"P with Yates' correction", {fit.yates->p.p, reference.at("p_chi2_yates")}},
                {"G", {fit.g->statistic, reference.at("G")}},
                {"P of G", {fit.g->p->p, reference.at("p_G")}}});
}

TEST(HelpExamplesTest, ExactP) {
    const std::string text = example(page("goodness-of-fit.md"), "Exact P");
    const json reference = test::reference_case("A12");
    const long dominant = reference.at("inputs").at("x");
    const std::vector<long> observed{dominant, reference.at("inputs").at("n").get<long>() - dominant};
    expect_counts_said(text, observed);
    auto asked = input(observed, "3:1");
    asked.order = fit::Order::Probability;
    const auto result = fit::goodness_of_fit(asked);
    ASSERT_TRUE(result.ok());
    check_rows(table(text, "quantity"),
               {{"exact P", {result.value().exact->p.p, reference.at("expected").at("p_two_sided")}}});
}

Expected ten_plants(const families::Heterogeneity& result, const json& e01) {
    Expected expected;
    const auto rows = {std::pair{"total", &result.total}, std::pair{"pooled", &result.pooled},
                       std::pair{"heterogeneity", &result.heterogeneity}};
    for (const auto& [name, row] : rows) {
        const std::string label = name;
        expected[label + " χ²"] = {*row->chi_square, e01.at(label).at("chi2")};
        expected[label + " degrees of freedom"] = {static_cast<double>(row->df), e01.at(label).at("df")};
        expected[label + " P"] = {row->chi_square_p->p, e01.at(label).at("p")};
        expected[label + " G"] = {*row->g, e01.at("G_" + label)};
    }
    expected["P of heterogeneity G"] = {result.heterogeneity.g_p->p, e01.at("p_G_heterogeneity")};
    expected["contingency χ²"] = {result.contingency->statistic, e01.at("contingency_chi2").at("chi2")};
    expected["contingency P"] = {result.contingency->p->p, e01.at("contingency_chi2").at("p")};
    return expected;
}

TEST(HelpExamplesTest, TenPlants) {
    const std::string text = example(page("heterogeneity.md"), "Ten plants");
    const json e01 = test::reference_case("E01");
    families::Input asked{.families = {}, .common = input({1, 1}, "3:1")};
    json counts = json::array();
    for (const auto& row : table(text, "plant")) {
        ASSERT_EQ(row.size(), 3U);
        const std::vector<long> observed{std::stol(row[1]), std::stol(row[2])};
        counts.push_back(observed);
        asked.families.push_back({"plant " + row[0], test::counts(observed)});
    }
    EXPECT_EQ(counts, e01.at("inputs").at("families"));
    const auto result = families::heterogeneity(asked);
    ASSERT_TRUE(result.ok());
    check_rows(table(text, "quantity"), ten_plants(result.value(), e01.at("expected")));
    EXPECT_FALSE(result.value().heterogeneous);
}

TEST(HelpExamplesTest, LinkedLoci) {
    const std::string text = example(page("hypotheses.md"), "Linked loci");
    const json reference = test::reference_case("C01").at("expected");
    const auto observed = test::reference_case("C01").at("inputs").at("observed").get<std::vector<long>>();
    expect_counts_said(text, observed);
    const auto fitted = fit::goodness_of_fit(input(observed, "f2(repulsion, r=fit)"));
    const auto independent = fit::goodness_of_fit(input(observed, "9:3:3:1"));
    ASSERT_TRUE(fitted.ok() && independent.ok());
    const fit::GoodnessOfFit& fit = fitted.value();
    ASSERT_EQ(fit.estimates.size(), 1U);
    check_rows(table(text, "quantity"),
               {{"r", {fit.estimates[0].value, reference.at("r_ML")}},
                {"standard error of r", {*fit.estimates[0].standard_error, reference.at("se_r")}},
                {"χ² of the fit", {fit.chi_square->statistic, reference.at("chi2_fit_at_ML")}},
                {"degrees of freedom", {static_cast<double>(fit.df), reference.at("df_fit")}},
                {"P of the fit", {fit.chi_square->p->p, reference.at("p_fit")}},
                {"χ² of 9:3:3:1", {independent.value().chi_square->statistic, reference.at("partition").at("total")}}});
}

} // namespace
} // namespace filial
