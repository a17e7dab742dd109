// SPDX-License-Identifier: GPL-3.0-or-later
#include <QLineEdit>

#include "app/shell/settings_page.h"
#include "tests/app/shell_fixture.h"

namespace filial::app {
namespace {

class WorkbookTest : public ShellTest {
protected:
    std::unique_ptr<Workbook> open(int families) const {
        book::Cross cross;
        cross.id = book::new_id();
        cross.name = "K14 × M02, F2";
        cross.traits = {{"seed", {{"round", ""}, {"wrinkled", ""}}}};
        cross.classes = book::product_classes(cross.traits);
        cross.hypothesis.notation = "3:1";
        for (int i = 0; i < families; ++i) {
            cross.families.push_back(book::new_family("F2-" + std::to_string(i + 1), 2));
            cross.families.back().typed[0] = {book::CellState::Number, Count(30 + i % 7)};
            cross.families.back().typed[1] = {book::CellState::Number, Count(10 + i % 5)};
        }
        book::Book book;
        book.id = book::new_id();
        book.crosses = {cross};
        auto session = book::Session::create(book::disk(), {folder_.path().toStdString()}, std::move(book));
        EXPECT_TRUE(session.ok());
        return std::make_unique<Workbook>(std::move(session).value());
    }
};

TEST_F(WorkbookTest, VeryManyFamiliesAreAnalysedElsewhereAndGiveTheSame) {
    const auto workbook = open(1500);
    EXPECT_TRUE(workbook->analysing());
    EXPECT_FALSE(workbook->analysis().totals.has_value());
    ASSERT_TRUE(waitFor([&] { return !workbook->analysing(); }));
    std::int64_t plants = 0;
    for (int i = 0; i < 1500; ++i)
        plants += 40 + i % 7 + i % 5;
    EXPECT_EQ(workbook->analysis().total, plants);
    ASSERT_TRUE(workbook->analysis().totals.has_value());
    const double before = workbook->analysis().totals->chi_square->statistic;

    // While the next one is worked out, the former numbers stay; what is delivered is of the last change alone.
    const book::Cross& cross = *workbook->currentCross();
    for (const char* ratio : {"1:1", "15:1", "9:7"}) {
        book::HypothesisUse after = cross.hypothesis;
        after.notation = ratio;
        ASSERT_TRUE(workbook->perform({book::SetHypothesis{cross.id, cross.hypothesis, after}}));
        EXPECT_TRUE(workbook->analysing());
        EXPECT_EQ(workbook->analysis().totals->chi_square->statistic, before);
    }
    ASSERT_TRUE(waitFor([&] { return !workbook->analysing(); }));
    EXPECT_EQ(workbook->analysis().hypothesis->notation(), "9:7");
    const auto direct = report::analyse(*workbook->currentCross(), {});
    EXPECT_EQ(workbook->analysis().totals->chi_square->statistic, direct.totals->chi_square->statistic);
    EXPECT_EQ(workbook->analysis().families.size(), direct.families.size());
}

TEST_F(WorkbookTest, ABookClosedWhileItIsAnalysedIsLeftInPeace) {
    auto workbook = open(3000);
    ASSERT_TRUE(workbook->analysing());
    workbook.reset();
    QTest::qWait(50);
}

TEST_F(WorkbookTest, SettingsAreReadKeptAndRefused) {
    Window window;
    showAt(window, 1360, 860);
    ASSERT_TRUE(window.openSample(sample("f2-eight-families")));
    QTest::keyClick(&window, Qt::Key_Comma, Qt::ControlModifier);
    ASSERT_TRUE(window.settingsPage()->isVisible());
    const auto fields = window.settingsPage()->findChildren<QLineEdit*>();
    ASSERT_EQ(fields.size(), 2);
    EXPECT_EQ(fields[1]->text(), "0.05");
    QTest::keyClicks(fields[0], "AK");
    fields[1]->selectAll();
    QTest::keyClicks(fields[1], "0.01");
    EXPECT_EQ(window.workbook()->alpha(), 0.01);
    EXPECT_EQ(window.workbook()->analysis().totals->input.alpha, 0.01);
    fields[1]->selectAll();
    QTest::keyClicks(fields[1], "1.5");
    EXPECT_EQ(window.workbook()->alpha(), 1.0e-2) << "neither 1 nor 1.5 is a level";
    EXPECT_TRUE(fields[1]->property(look::kInvalid).toBool());
    QTest::keyClick(fields[1], Qt::Key_Escape);
    EXPECT_TRUE(window.view()->isVisible());
    rename(*window.workbook(), "bench 4");
    EXPECT_EQ(window.workbook()->session().log().history().back().who, "AK");
    EXPECT_EQ(Workbook::rememberedAlpha(), 0.01);
    EXPECT_EQ(open(2)->alpha(), 0.01);
    answers_.choice = 2;
}

} // namespace
} // namespace filial::app
