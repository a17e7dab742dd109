// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/report/document.h"

#include <array>
#include <cstdio>
#include <fstream>
#include <memory>
#include <sstream>

#include <gtest/gtest.h>

#include "core/report/utf8.h"

namespace filial::report {
namespace {

// What a person or a hostile file may put into a label.
const std::string kHostile = "<script>alert('x')</script> & \"A\" \x01\x1b[31m ]]> \xff \xe2\x80\xae end";

Document sample() {
    Document document;
    document.title = "Report of " + kHostile;
    document.blocks.emplace_back(Heading{1, "K14 × M02, F2 " + kHostile});
    document.blocks.emplace_back(
        Paragraph{"The counts do not contradict f2(coupling,\u00a0r=0.2).", Paragraph::Role::Verdict});
    Table table;
    table.caption = "Families";
    table.columns = {{"Family", Align::Left}, {"purple · hairy", Align::Right}, {"P", Align::Right}};
    table.rows.push_back({{"F2-01", "35", "0.550"}, TableRow::Role::Body});
    table.rows.push_back({{kHostile, "7", "<0.001"}, TableRow::Role::Muted});
    table.rows.push_back({{"All families", "42"}, TableRow::Role::Total});
    table.notes = {"a note & more"};
    document.blocks.emplace_back(table);
    Chart chart;
    chart.title = "Observed and expected";
    chart.x_title = "Class";
    chart.labels = {"purple", "green"};
    chart.series = {{"Observed", {42, 8}, {}, {}}, {"Expected", {37.5, 12.5}, {30, 8}, {44, 18}}};
    document.blocks.emplace_back(chart);
    document.blocks.emplace_back(Command{"filial score a.csv --ratio '3:1' > out & more"});
    return document;
}

std::string run(const std::string& command) {
    std::string output;
    const std::unique_ptr<FILE, int (*)(FILE*)> pipe(popen(command.c_str(), "r"), pclose);
    std::array<char, 4096> buffer{};
    std::size_t read = 0;
    while (pipe && (read = fread(buffer.data(), 1, buffer.size(), pipe.get())) > 0) {
        output.append(buffer.data(), read);
    }
    return output;
}

/// What a general XML parser makes of the page: its elements and the text of its cells.
std::string parsed(const std::string& html) {
    const std::string path = testing::TempDir() + "filial_report_document.html";
    std::ofstream(path) << html;
    std::ofstream(path + ".py") << "import sys, xml.etree.ElementTree as tree\n"
                                   "for e in tree.parse(sys.argv[1]).iter():\n"
                                   "    print(e.tag.split('}')[1], '|', (e.text or '').strip())\n";
    return run("/usr/bin/python3 '" + path + ".py' '" + path + "' 2>&1");
}

TEST(Html, IsWellFormedAndHostileLabelsStayText) {
    const std::string html = write_html(sample());
    EXPECT_EQ(html.find("<script"), std::string::npos);
    EXPECT_EQ(html.find("http://", html.find("<head>")), std::string::npos) << "nothing is fetched";
    const std::string elements = parsed(html);
    EXPECT_NE(elements.find("td | <script>alert('x')</script> & \"A\" \uFFFD\uFFFD[31m ]]> \uFFFD"), std::string::npos)
        << elements;
    EXPECT_EQ(elements.find("script |"), std::string::npos);
    EXPECT_NE(elements.find("pre | filial score a.csv --ratio '3:1' > out & more"), std::string::npos) << elements;
    EXPECT_NE(elements.find("caption | Families"), std::string::npos);
    EXPECT_NE(elements.find("th | purple · hairy"), std::string::npos);
}

TEST(Html, ChartsBecomeTablesUnlessTheyCanBeDrawn) {
    EXPECT_NE(write_html(sample()).find("Charts are drawn by the full program"), std::string::npos);
    HtmlOptions options;
    options.draw_chart = [](const Chart& chart) { return "<svg><desc>" + chart.labels[1] + "</desc></svg>"; };
    const std::string drawn = write_html(sample(), options);
    EXPECT_NE(drawn.find("<svg><desc>green</desc></svg>"), std::string::npos);
    EXPECT_EQ(drawn.find("Charts are drawn by the full program"), std::string::npos);
}

TEST(Text, ColumnsAreAlignedAndFiguresStandRight) {
    const std::string text = write_text(sample());
    std::istringstream lines(text);
    std::string line;
    std::size_t first_end = 0;
    std::size_t second_end = 0;
    while (std::getline(lines, line)) {
        if (line.rfind("F2-01", 0) == 0) {
            first_end = display_width(line.substr(0, line.find("0.550")));
        }
        if (line.find("<0.001") != std::string::npos) {
            second_end = display_width(line.substr(0, line.find("<0.001"))) + 1;
        }
        EXPECT_FALSE(line.ends_with(' ')) << '"' << line << '"';
        EXPECT_EQ(line.find('\x1b'), std::string::npos) << "a label never steers the terminal";
    }
    EXPECT_GT(first_end, 0U);
    EXPECT_EQ(first_end, second_end) << text;
}

TEST(Text, LongParagraphsAreBrokenButNeverAtANoBreakSpace) {
    Document document;
    std::string text;
    for (int i = 0; i < 40; ++i) {
        text += "word and r\u00a0=\u00a00.2 ";
    }
    document.blocks.emplace_back(Paragraph{text, Paragraph::Role::Body});
    std::istringstream lines(write_text(document));
    std::string line;
    int number = 0;
    while (std::getline(lines, line)) {
        EXPECT_LE(display_width(line), 80U);
        EXPECT_FALSE(line.ends_with("r") || line.ends_with("="));
        ++number;
    }
    EXPECT_GT(number, 5);
}

TEST(Utf8, MalformedBytesBecomeTheReplacementCharacter) {
    // Unicode Standard 15.0, table 3-7 and section 3.9: overlong, surrogate and cut sequences are ill-formed.
    EXPECT_EQ(clean_line("a\xC0\xAFz"), "a\uFFFD\uFFFDz");
    EXPECT_EQ(clean_line("\xED\xA0\x80"), "\uFFFD\uFFFD\uFFFD");
    EXPECT_EQ(clean_line("\xF4\x90\x80\x80"), "\uFFFD\uFFFD\uFFFD\uFFFD");
    EXPECT_EQ(clean_line("χ²\t–\n\xE2\x82"), "χ² – \uFFFD\uFFFD");
    EXPECT_EQ(clean_line("😀"), "😀");
    EXPECT_EQ(display_width("χ² 花"), 5U);
}

} // namespace
} // namespace filial::report
