// SPDX-License-Identifier: GPL-3.0-or-later
#include <sys/wait.h>

#include <algorithm>
#include <cstdlib>
#include <filesystem>
#include <fstream>
#include <sstream>

#include <gtest/gtest.h>
#include <nlohmann/json.hpp>

#include "tests/support/reference.h"

// Runs the built executable as a script would: no display, arguments in, two streams and a status out.
namespace filial {
namespace {

using nlohmann::json;

struct Outcome {
    int status = -1;
    std::string out, err;
};

std::string slurp(const std::string& path) {
    std::ifstream file(path);
    std::stringstream text;
    text << file.rdbuf();
    return text.str();
}

class Headless : public testing::Test {
protected:
    void SetUp() override {
        const auto* info = testing::UnitTest::GetInstance()->current_test_info();
        folder_ = testing::TempDir() + "filial_headless_" + info->name();
        std::filesystem::remove_all(folder_);
        std::filesystem::create_directories(folder_);
    }
    void TearDown() override { std::filesystem::remove_all(folder_); }

    /// `arguments` are as a shell reads them.
    Outcome run(const std::string& arguments) const {
        const std::string command = "cd '" + folder_ + "' && env -u DISPLAY -u WAYLAND_DISPLAY -u QT_QPA_PLATFORM '" +
                                    FILIAL_EXECUTABLE + "' " + arguments + " >out.txt 2>err.txt </dev/null";
        const int status = std::system(command.c_str());
        return {WIFEXITED(status) ? WEXITSTATUS(status) : -1, slurp(folder_ + "/out.txt"), slurp(folder_ + "/err.txt")};
    }
    json run_json(const std::string& arguments) const {
        const Outcome answer = run(arguments + " --json");
        EXPECT_EQ(answer.status, 0) << answer.err;
        return json::parse(answer.out, nullptr, false);
    }
    void write(const std::string& name, const std::string& text) const { std::ofstream(folder_ + "/" + name) << text; }
    /// Refused: this status, nothing on standard output, one line naming the place and what is wrong.
    void expect_refused(const std::string& arguments, int status, const std::string& place) const {
        SCOPED_TRACE("filial " + arguments);
        const Outcome answer = run(arguments);
        EXPECT_EQ(answer.status, status);
        EXPECT_EQ(answer.out, "");
        EXPECT_NE(answer.err.find(place), std::string::npos) << answer.err;
        EXPECT_EQ(std::count(answer.err.begin(), answer.err.end(), '\n'), 1) << answer.err;
        EXPECT_EQ(answer.err.rfind("filial: ", 0), 0U) << answer.err;
    }

    std::string folder_;
};

TEST_F(Headless, TenPlantsOfMendelGiveThePublishedHeterogeneity) {
    // Mendel 1866 (Bateson 1902, p. 53), values in tests/reference/E01.json.
    const json reference = test::reference_case("E01");
    std::string table = "family,round,angular\n";
    for (const json& family : reference["inputs"]["families"]) {
        table += "plant " + std::to_string(table.size()) + "," + family[0].dump() + "," + family[1].dump() + "\n";
    }
    write("plants.csv", table);
    const json expected = reference["expected"];
    const json score = run_json("score plants.csv --ratio 3:1");
    ASSERT_EQ(score["per_family"].size(), 10U);
    for (std::size_t i = 0; i < 10; ++i) {
        EXPECT_NEAR(score["per_family"][i]["chi_square"]["statistic"], expected["per_family_chi2"][i].get<double>(),
                    1e-12);
        EXPECT_NEAR(score["per_family"][i]["chi_square"]["p"], expected["per_family_p"][i].get<double>(), 1e-12);
    }
    EXPECT_EQ(score["totals"]["n"], 437);
    const json families = run_json("families plants.csv --ratio 3:1");
    for (const char* row : {"total", "pooled", "heterogeneity"}) {
        EXPECT_NEAR(families[row]["chi_square"], expected[row]["chi2"].get<double>(), 1e-12) << row;
        EXPECT_EQ(families[row]["df"], expected[row]["df"]) << row;
        EXPECT_NEAR(families[row]["chi_square_p"], expected[row]["p"].get<double>(), 1e-12) << row;
    }
    EXPECT_NEAR(families["contingency"]["statistic"], expected["contingency_chi2"]["chi2"].get<double>(), 1e-12);
    EXPECT_NEAR(families["heterogeneity"]["g"], expected["G_heterogeneity"].get<double>(), 1e-12);
    const std::string text = run("families plants.csv --ratio 3:1").out;
    for (const char* shown : {"4.713", "0.859", "4.466", "0.878", "0.831", "0.362", "5.297", "0.870"}) {
        EXPECT_NE(text.find(shown), std::string::npos) << shown << " in\n" << text;
    }
}

TEST_F(Headless, MendelsDihybridGivesThePublishedValuesInTextAndJson) {
    // Mendel 1866; Crawley, The R Book, ch. 15 prints 0.470024 (tests/reference/A04.json).
    const json expected = test::reference_case("A04")["expected"];
    const json score = run_json("score 315 101 108 32 --ratio 9:3:3:1");
    EXPECT_NEAR(score["chi_square"]["statistic"], expected["chi2"].get<double>(), 1e-12);
    EXPECT_NEAR(score["chi_square"]["p"], expected["p_chi2"].get<double>(), 1e-12);
    EXPECT_NEAR(score["g"]["williams_p"], expected["p_G_williams"].get<double>(), 1e-12);
    const std::string text = run("score 315 101 108 32 --ratio=9:3:3:1").out;
    for (const char* shown : {"0.470", "0.925", "312.75", "556"}) {
        EXPECT_NE(text.find(shown), std::string::npos) << shown << " in\n" << text;
    }
}

TEST_F(Headless, PartitionFindsTheLociOfARatio) {
    // Mather 1938 (tests/reference/C17.json).
    const json expected = test::reference_case("C17")["expected"]["partition"];
    const json parts = run_json("score 315 108 101 32 --ratio 9:3:3:1")["partition"];
    ASSERT_EQ(parts.size(), 3U);
    EXPECT_NEAR(parts[0]["statistic"], expected["A_first_locus"].get<double>(), 1e-12);
    EXPECT_NEAR(parts[1]["statistic"], expected["B_second_locus"].get<double>(), 1e-12);
    EXPECT_NEAR(parts[2]["p"], expected["p_linkage"].get<double>(), 1e-12);
}

TEST_F(Headless, WrongArgumentsAreRefusedByPlace) {
    expect_refused("score -3 1 --ratio 3:1", 2, "argument 1");
    expect_refused("score 3 3.5 --ratio 3:1", 2, "argument 2");
    expect_refused("score 3 abc --ratio 3:1", 2, "argument 2");
    expect_refused("score 1e30 1 --ratio 3:1", 2, "argument 1");
    expect_refused("score 3 NaN --ratio 3:1", 2, "argument 2");
    expect_refused("score 3 '' --ratio 3:1", 2, "argument 2");
    expect_refused("score 5 --ratio 3:1", 2, "argument 1");
    expect_refused("score abc --ratio 3:1", 2, "argument 1 (“abc”): neither a count nor a file");
    expect_refused("score --ratio 3:1", 2, "score");
    expect_refused("score 3 1", 2, "--ratio");
    expect_refused("score 3 1 --ratio 9:3:3:1", 2, "--ratio");
    expect_refused("score 3 1 1 --ratio 3:1", 2, "--ratio");
    expect_refused("score 3 1 --ratio 3:x", 2, "--ratio, character 3");
    expect_refused("score 3 1 --ratio", 2, "--ratio");
    expect_refused("score 3 1 --ratio 3:1 --ratio 1:1", 2, "--ratio");
    expect_refused("score 3 1 --ratio 3:1 --join 1", 2, "--join");
    expect_refused("score 3 1 1 --ratio 1:2:1 --join 1,4", 2, "--join");
    expect_refused("score 3 1 1 --ratio 1:2:1 --join 1,2 --join 2,3", 2, "--join");
    expect_refused("score 3 1 --ratio 3:1 --labels a,b,c", 2, "--labels");
    expect_refused("score 3 1 --ratio 3:1 --select x", 2, "--select");
    expect_refused("score 3 1 --ratio 3:1 --fitted -1", 2, "--fitted");
    expect_refused("score 3 1 --ratio 3:1 --method best", 2, "--method");
    expect_refused("score 3 1 --ratio 3:1 --order size", 2, "--order");
    expect_refused("score 3 1 --ratio 3:1 --replicates 1", 2, "--replicates");
    expect_refused("score 3 1 --ratio 3:1 --seed x", 2, "--seed");
    for (const char* alpha : {"0", "1", "2", "-0.1", "nan", "x"}) {
        expect_refused(std::string("score 3 1 --ratio 3:1 --alpha ") + alpha, 2, "--alpha");
    }
    expect_refused("score 3 1 --ratio 3:1 --jsn", 2, "--jsn");
    expect_refused("scroe 3 1", 2, "scroe");
    expect_refused("--frobnicate", 2, "--frobnicate");
    expect_refused("derive", 2, "derive");
    expect_refused("derive 'Aa x Aa' --linkage 0.6", 2, "--linkage");
    expect_refused("derive 'Aa x'", 2, "character 5");
}

TEST_F(Headless, WrongFilesAreRefusedByPlaceAndStatus) {
    write("plants.csv", "family,round,angular\nplant 1,45,12\nplant 2,27,8.5\n");
    write("one.csv", "family,round,angular\nplant 1,45,12\n");
    write("cut.filial", "{\"version\": 1, \"crosses\": [");
    std::filesystem::create_directories(folder_ + "/folder.csv");
    expect_refused("score missing.csv --ratio 3:1", 3, "missing.csv");
    expect_refused("score ./folder.csv --ratio 3:1", 3, "folder.csv");
    expect_refused("score plants.csv --ratio 3:1", 2, "plants.csv");
    expect_refused("score one.csv", 2, "--ratio");
    expect_refused("score one.csv --ratio 9:3:3:1", 2, "--ratio");
    expect_refused("families one.csv --ratio 3:1", 2, "one.csv");
    expect_refused("score cut.filial", 2, "cut.filial");
    expect_refused("report one.csv --out a.html --ratio 3:1", 2, "one.csv");
    expect_refused("report cut.filial --out a.pdf", 2, "--out");
    expect_refused("report cut.filial --out a.csv", 2, "--out");
    expect_refused("report cut.filial", 2, "--out");
    EXPECT_FALSE(std::filesystem::exists(folder_ + "/a.html"));
}

TEST_F(Headless, FullOutputIsAFileError) {
    const std::string command =
        std::string("'") + FILIAL_EXECUTABLE + "' score 3 1 --ratio 3:1 >/dev/full 2>'" + folder_ + "/err.txt'";
    const int status = std::system(command.c_str());
    EXPECT_EQ(WEXITSTATUS(status), 3);
    EXPECT_NE(slurp(folder_ + "/err.txt").find("standard output"), std::string::npos);
}

TEST_F(Headless, ReportIsAWellFormedPageWithEverySection) {
    const std::string book = std::string(FILIAL_SAMPLES) + "/f2-one-odd-family.filial";
    ASSERT_TRUE(std::filesystem::exists(book)) << book;
    const std::string before = slurp(book);
    const Outcome answer = run("report '" + book + "' --out report.html");
    ASSERT_EQ(answer.status, 0) << answer.err;
    EXPECT_EQ(slurp(book), before) << "no verb changes its input";
    const std::string check =
        "/usr/bin/python3 -c \"import xml.etree.ElementTree as t; t.parse('" + folder_ + "/report.html')\"";
    EXPECT_EQ(std::system(check.c_str()), 0) << "not well-formed";
    const std::string html = slurp(folder_ + "/report.html");
    for (const char* part : {"Material", "Hypothesis", "Families", "All families", "Expected", "Degrees of freedom",
                             "Where the variation lies", "Families that differ from the rest", "Methods",
                             "Pearson K. 1900", "Cautions", "animal-care", "SHA-256", "filial report"}) {
        EXPECT_NE(html.find(part), std::string::npos) << part;
    }
    EXPECT_EQ(html.find("nan"), std::string::npos);
}

TEST_F(Headless, HelpAndVersionAnswerWithoutADisplay) {
    for (const char* verb : {"", "score ", "families ", "derive ", "report "}) {
        const Outcome answer = run(std::string(verb) + "--help");
        EXPECT_EQ(answer.status, 0);
        EXPECT_NE(answer.out.find("filial " + std::string(verb)), std::string::npos);
        EXPECT_NE(answer.out.find("genetic counselling"), std::string::npos);
    }
    EXPECT_EQ(run("--version").out.rfind("filial ", 0), 0U);
}

TEST_F(Headless, NoTextSaysNan) {
    write("plants.csv", "family,round,angular\nplant 1,0,0\nplant 2,27,8\nplant 3,,\nplant 4,5,–\n");
    for (const char* arguments : {"score 0 0 --ratio 3:1", "score 1 0 --ratio 3:1", "score 3 1 1 --ratio 3:1:0",
                                  "score 3 1 1 --ratio 1:2:1 --join 1,2", "score plants.csv --ratio 3:1",
                                  "score 3 1 --ratio 3:1 --fitted 1", "score 30 5 5 10 --ratio 'f2(coupling, r=fit)'",
                                  "derive 'Aa Bb x Aa Bb'", "derive 'Aa Bb x Aa Bb' --linkage 0.2"}) {
        const Outcome answer = run(arguments);
        EXPECT_EQ(answer.status, 0) << arguments << ": " << answer.err;
        for (const char* bad : {"nan", "inf ", "∞", "{1}", "{2}"}) {
            EXPECT_EQ(answer.out.find(bad), std::string::npos) << arguments << '\n' << answer.out;
        }
    }
}

} // namespace
} // namespace filial
