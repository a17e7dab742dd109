// SPDX-License-Identifier: GPL-3.0-or-later
// The Score desk by real keys and clicks; what its widgets say is compared with core's results and published values.
#include "tests/app/score_fixture.h"

namespace filial::app {
namespace {

// Mendel 1866 (Bateson 1902, p. 53): seed form of the first ten plants.
TEST_F(ScoreDeskTest, TenPlantsTypedGiveThePublishedValues) {
    open(seedCross());
    typeTenPlants();
    ASSERT_EQ(cross().families.size(), 10u);
    const auto expected = test::reference_case("E01")["expected"];
    EXPECT_EQ(words("chi-square-statistic"), "0.831");
    EXPECT_EQ(words("chi-square-p"), "P " + pText(expected["pooled"]["p"].get<double>()));
    EXPECT_EQ(words("source-total-statistic"), "5.297");
    EXPECT_EQ(words("source-total-df"), "10 df");
    EXPECT_EQ(words("source-pooled-statistic"), "0.831");
    EXPECT_EQ(words("source-between-statistic"), "4.466");
    EXPECT_EQ(words("contingency-statistic"), "4.713");
    EXPECT_EQ(words("contingency-p"), "P " + pText(expected["contingency_chi2"]["p"].get<double>()));
    EXPECT_EQ(words("df"), "for the test");
    EXPECT_EQ(words("df-p"), "1");
    for (int row = 0; row < 10; ++row)
        EXPECT_EQ(cell(row, 8), pText(expected["per_family_p"][static_cast<std::size_t>(row)].get<double>()));
    const auto* totals = window_->findChild<QTableView*>("totals-table");
    EXPECT_EQ(totals->model()->index(0, 1).data().toString(), "336");
    EXPECT_EQ(totals->model()->index(0, 2).data().toString(), "101");
    EXPECT_EQ(totals->model()->index(1, 1).data().toString(), "327.8"); // 437 × 3/4 = 327.75
    EXPECT_EQ(totals->model()->index(1, 2).data().toString(), "109.2"); // the two add to 437
    EXPECT_EQ(words("verdict"), say(workbook_->analysis().totals->verdict_sentence));
    EXPECT_EQ(desk_->verdictLine(), words("verdict"));
    const auto tip = window_->findChild<QLabel*>("chi-square-statistic")->toolTip().toDouble();
    EXPECT_NEAR(tip, expected["pooled"]["chi2"].get<double>(), 1e-12);
}

TEST_F(ScoreDeskTest, EveryKeyIsSeenAtOnceAndEscapeRestores) {
    open(seedCross());
    typeTenPlants();
    goTo(0, 1);
    const QString before = words("chi-square-statistic");
    type("9");
    EXPECT_NE(words("chi-square-statistic"), before);
    EXPECT_EQ(cross().families[0].typed[0].count.value(), 45) << "nothing is committed while typing";
    press(Qt::Key_Escape);
    EXPECT_EQ(words("chi-square-statistic"), before);
    EXPECT_EQ(cell(0, 1), "45");
}

TEST_F(ScoreDeskTest, ArrowsLeaveACellThatIsBeingTyped) {
    open(seedCross());
    type("12");
    press(Qt::Key_Right);
    type("7");
    press(Qt::Key_Left);
    EXPECT_EQ(cell(0, 1), "12");
    EXPECT_EQ(cell(0, 2), "7");
    EXPECT_EQ(table_->currentIndex().column(), 1);
    type("14");
    press(Qt::Key_Down);
    EXPECT_EQ(cell(0, 1), "14");
    EXPECT_EQ(table_->currentIndex().row(), 1);
    type("31");
    press(Qt::Key_Home);
    EXPECT_EQ(cell(1, 1), "31");
    EXPECT_EQ(table_->currentIndex().column(), 0);
}

TEST_F(ScoreDeskTest, ArrowsMoveTheCaretInACellOpenedByF2) {
    open(seedCross());
    type("12");
    press(Qt::Key_Return);
    goTo(0, 1);
    press(Qt::Key_F2);
    press(Qt::Key_Home);
    press(Qt::Key_Right);
    type("7");
    press(Qt::Key_Return);
    EXPECT_EQ(cell(0, 1), "172");
    goTo(1, 1);
    type("13");
    press(Qt::Key_F2); // from typing to the caret, without leaving the cell
    press(Qt::Key_Left);
    type("0");
    press(Qt::Key_Return);
    EXPECT_EQ(cell(1, 1), "103");
}

TEST_F(ScoreDeskTest, AHypothesisOfTheWrongLengthIsNotTaken) {
    open(seedCross());
    typeTenPlants();
    QTest::mouseClick(window_->findChild<QPushButton*>("hypothesis-blank"), Qt::LeftButton);
    auto* field = window_->findChild<QLineEdit*>("hypothesis-field");
    auto* use = window_->findChild<QPushButton*>("use-hypothesis");
    field->selectAll();
    type("9:3:3:1");
    EXPECT_FALSE(use->isEnabled());
    EXPECT_FALSE(words("preview-verdict").isEmpty()) << "why is said";
    press(Qt::Key_Return);
    EXPECT_EQ(cross().hypothesis.notation, "3:1");
    EXPECT_TRUE(field->isVisible()) << "it waits for a ratio that fits";
    field->selectAll();
    type("1:1");
    EXPECT_TRUE(use->isEnabled());
    press(Qt::Key_Return);
    EXPECT_EQ(cross().hypothesis.notation, "1:1");
}

TEST_F(ScoreDeskTest, CountsWithoutARatioAskForOne) {
    book::Cross cross = seedCross();
    cross.hypothesis.notation.clear();
    open(cross);
    EXPECT_TRUE(words("verdict").startsWith("No counts yet"));
    type("12");
    press(Qt::Key_Tab);
    type("5");
    press(Qt::Key_Return);
    EXPECT_EQ(words("verdict"), "Choose a ratio to test against.");
}

TEST_F(ScoreDeskTest, ALowWindowFoldsThePictureBeforeTheCounts) {
    open(seedCross());
    typeTenPlants();
    const auto* map = window_->findChild<QWidget*>("departure-map");
    const auto* totals = window_->findChild<QTableView*>("totals-table");
    EXPECT_TRUE(map->isVisible());
    window_->resize(1010, 320);
    ASSERT_TRUE(QTest::qWaitFor([&] { return !map->isVisible(); }));
    EXPECT_LE(totals->geometry().bottom(), desk_->middle()->height());
    EXPECT_GT(table_->height(), 64);
    window_->resize(1148, 812);
    EXPECT_TRUE(QTest::qWaitFor([&] { return map->isVisible(); }));
}

TEST_F(ScoreDeskTest, HelpKnowsItsPageFromTheFocus) {
    open(seedCross());
    typeTenPlants();
    goTo(0, 1);
    EXPECT_EQ(HelpPanel::pageFor(QApplication::focusWidget()), "keys.md");
    type("4");
    EXPECT_EQ(HelpPanel::pageFor(QApplication::focusWidget()), "keys.md") << "also while a count is typed";
    press(Qt::Key_Escape);
    QTest::mouseClick(window_->findChild<QPushButton*>("hypothesis-blank"), Qt::LeftButton);
    EXPECT_EQ(HelpPanel::pageFor(QApplication::focusWidget()), "hypotheses.md");
    EXPECT_EQ(HelpPanel::pageFor(window_->findChild<QPushButton*>("families-title")), "heterogeneity.md");
    EXPECT_EQ(HelpPanel::pageFor(window_->findChild<QPushButton*>("fit-title")), "goodness-of-fit.md");
}

TEST_F(ScoreDeskTest, SumsDashesAndBlanksAreThreeThings) {
    open(seedCross());
    type("29+8");
    press(Qt::Key_Tab);
    type("-");
    press(Qt::Key_Return);
    EXPECT_EQ(cell(0, 1), "37");
    EXPECT_EQ(cell(0, 2), "not looked");
    EXPECT_EQ(cell(0, 7), "–");
    EXPECT_EQ(cell(0, 8), "none");
    goTo(0, 2);
    press(Qt::Key_Delete);
    EXPECT_EQ(cell(0, 2), "blank");
    type("0");
    press(Qt::Key_Return);
    EXPECT_EQ(cell(0, 2), "0");
    EXPECT_EQ(cell(0, 7), "37");
}

TEST_F(ScoreDeskTest, WhatIsNotACountStaysMarkedAndIsNotCounted) {
    open(seedCross());
    typeTenPlants();
    goTo(0, 1);
    type("4o");
    press(Qt::Key_Return);
    EXPECT_TRUE(cell(0, 1).startsWith("4o, not a count"));
    EXPECT_TRUE(table_->model()->index(0, 0).data(FamilyModel::BandRole).toString().contains("4o"));
    EXPECT_EQ(table_->rowHeight(0), 50);
    EXPECT_EQ(cell(0, 7), "–");
    EXPECT_EQ(workbook_->analysis().total, 437 - 57);
    workbook_->undo();
    EXPECT_EQ(cell(0, 1), "45");
    EXPECT_EQ(workbook_->analysis().total, 437);
    EXPECT_EQ(table_->rowHeight(0), 32);
}

TEST_F(ScoreDeskTest, ABlockFromASpreadsheetIsOneStepAndAddsFamilies) {
    open(stemLeafCross());
    goTo(0, 0);
    QApplication::clipboard()->setText("A-1\t35\t16\t9\t4\nA-2\t35\t9\t9\t5\nA-3\t45\t13\t10\tthree\n");
    press(Qt::Key_V, Qt::ControlModifier);
    ASSERT_EQ(cross().families.size(), 3u);
    EXPECT_EQ(cell(1, 0), "A-2");
    EXPECT_EQ(cell(0, 1), "35");
    EXPECT_TRUE(cell(2, 4).startsWith("three, not a count"));
    EXPECT_EQ(workbook_->analysis().total, 64 + 58);
    table_->selectionModel()->select(QItemSelection(table_->model()->index(0, 0), table_->model()->index(1, 4)),
                                     QItemSelectionModel::ClearAndSelect);
    press(Qt::Key_C, Qt::ControlModifier);
    EXPECT_EQ(QApplication::clipboard()->text().trimmed(), "A-1\t35\t16\t9\t4\nA-2\t35\t9\t9\t5");
    workbook_->undo();
    EXPECT_TRUE(cross().families.empty());
    workbook_->redo();
    EXPECT_EQ(cross().families.size(), 3u);
}

TEST_F(ScoreDeskTest, FamiliesMoveGoAndComeBack) {
    open(seedCross());
    typeTenPlants();
    const std::string first = cross().families[0].label;
    goTo(0, 1);
    press(Qt::Key_Down, Qt::AltModifier);
    EXPECT_EQ(cross().families[1].label, first);
    EXPECT_EQ(table_->currentIndex().row(), 1);
    press(Qt::Key_Delete, Qt::ControlModifier);
    EXPECT_EQ(cross().families.size(), 9u);
    workbook_->undo();
    workbook_->undo();
    EXPECT_EQ(cross().families[0].label, first);
    EXPECT_EQ(workbook_->analysis().total, 437);
    goTo(10, 1);
    press(Qt::Key_Return);
    EXPECT_EQ(cross().families.size(), 11u);
}

TEST_F(ScoreDeskTest, SettingAsideAsksForAReasonInPlace) {
    open(seedCross());
    typeTenPlants();
    goTo(6, 1);
    press(Qt::Key_D, Qt::ControlModifier);
    ASSERT_EQ(QApplication::focusWidget()->objectName(), "set-aside-reason");
    press(Qt::Key_Return);
    EXPECT_FALSE(cross().families[6].set_aside.has_value()) << "no reason, not set aside";
    type("wrong tray");
    press(Qt::Key_Return);
    EXPECT_EQ(cross().families[6].set_aside.value_or(""), "wrong tray");
    EXPECT_EQ(workbook_->analysis().total, 437 - 112);
    auto* with = window_->findChild<QPushButton*>("with-set-aside");
    ASSERT_TRUE(with->isVisible());
    QTest::mouseClick(with, Qt::LeftButton);
    EXPECT_EQ(words("chi-square-statistic"), "0.831");
    QTest::mouseClick(with, Qt::LeftButton);
    EXPECT_NE(words("chi-square-statistic"), "0.831");
    goTo(6, 1);
    press(Qt::Key_D, Qt::ControlModifier);
    EXPECT_FALSE(cross().families[6].set_aside.has_value());
}

TEST_F(ScoreDeskTest, AChosenFamilyIsReadAlone) {
    open(seedCross());
    typeTenPlants();
    goTo(2, 0);
    const auto expected = test::reference_case("E01")["expected"];
    EXPECT_EQ(words("chi-square-p"), "P " + pText(expected["per_family_p"][2].get<double>()));
    EXPECT_TRUE(window_->findChild<QPushButton*>("fit-title")->text().contains("alone"));
    QTest::mouseClick(window_->findChild<QPushButton*>("all-families"), Qt::LeftButton);
    EXPECT_EQ(words("chi-square-statistic"), "0.831");
}

TEST_F(ScoreDeskTest, HypothesesAreTypedFoundAndPlacesOfErrorsShown) {
    open(seedCross());
    typeTenPlants();
    QTest::mouseClick(window_->findChild<QPushButton*>("hypothesis-blank"), Qt::LeftButton);
    auto* field = window_->findChild<QLineEdit*>("hypothesis-field");
    ASSERT_TRUE(field->isVisible());
    field->selectAll();
    type("1:x");
    EXPECT_FALSE(window_->findChild<QWidget*>("hypothesis-error")->property("reason").toString().isEmpty());
    EXPECT_FALSE(window_->findChild<QPushButton*>("use-hypothesis")->isEnabled());
    press(Qt::Key_Backspace);
    type("1");
    EXPECT_TRUE(window_->findChild<QWidget*>("hypothesis-error")->property("reason").toString().isEmpty());
    EXPECT_EQ(words("preview-verdict"), say(workbook_->analysis().totals->verdict_sentence));
    EXPECT_EQ(cross().hypothesis.notation, "3:1") << "only previewed";
    press(Qt::Key_Return);
    EXPECT_EQ(cross().hypothesis.notation, "1:1");
    EXPECT_TRUE(cross().hypothesis.chosen_after_seeing);
    EXPECT_EQ(window_->findChild<QPushButton*>("hypothesis-blank")->text(), "1:1");
    workbook_->undo();
    EXPECT_EQ(cross().hypothesis.notation, "3:1");
    QTest::mouseClick(window_->findChild<QPushButton*>("hypothesis-blank"), Qt::LeftButton);
    field->selectAll();
    type("2:1");
    press(Qt::Key_Escape);
    EXPECT_EQ(cross().hypothesis.notation, "3:1");
    EXPECT_EQ(words("chi-square-statistic"), "0.831");
}

TEST_F(ScoreDeskTest, TermsAreBoundToClassesByKeyAndByDrag) {
    open(seedCross());
    typeTenPlants();
    QTest::mouseClick(window_->findChild<QPushButton*>("hypothesis-blank"), Qt::LeftButton);
    auto* chip = window_->findChild<QPushButton*>("term-chip-0");
    ASSERT_NE(chip, nullptr);
    EXPECT_TRUE(chip->accessibleName().contains(chip->text()));
    chip->setFocus();
    press(Qt::Key_Down, Qt::AltModifier);
    EXPECT_EQ(workbook_->analysis().totals->classes[0].expected, 437 / 4.0);
    QTest::mousePress(chip, Qt::LeftButton, {}, QPoint(10, 10));
    QTest::mouseMove(chip, QPoint(10, 44));
    QTest::mouseRelease(chip, Qt::LeftButton, {}, QPoint(10, 10));
    EXPECT_EQ(workbook_->analysis().totals->classes[0].expected, 437 * 3 / 4.0);
    chip->setFocus();
    press(Qt::Key_Down, Qt::AltModifier);
    QTest::mouseClick(window_->findChild<QPushButton*>("use-hypothesis"), Qt::LeftButton);
    EXPECT_EQ(cross().hypothesis.binding, (std::vector<std::size_t>{1, 0}));
    EXPECT_EQ(window_->findChild<QPushButton*>("hypothesis-blank")->text(), "1:3") << "in the order of the classes";
    EXPECT_TRUE(words("verdict").contains("1:3")) << words("verdict").toStdString();
    EXPECT_EQ(words("chi-square-statistic"), statisticText(workbook_->analysis().totals->chi_square->statistic));
}

TEST_F(ScoreDeskTest, ClassesJoinAndSplitAgain) {
    open(stemLeafCross());
    goTo(0, 1);
    QApplication::clipboard()->setText("35\t16\t9\t4\n35\t9\t9\t5\n");
    press(Qt::Key_V, Qt::ControlModifier);
    auto* header = window_->findChild<QHeaderView*>("class-header");
    for (const int column : {3, 4})
        QTest::mouseClick(header->viewport(), Qt::LeftButton, {},
                          QPoint(header->sectionViewportPosition(column) + 20, header->height() - 10));
    auto* join = window_->findChild<QPushButton*>("join");
    ASSERT_TRUE(join->isVisible());
    QTest::mouseClick(join, Qt::LeftButton);
    ASSERT_EQ(cross().hypothesis.joins.size(), 1u);
    EXPECT_TRUE(cross().hypothesis.joins_after_seeing);
    EXPECT_EQ(words("df-p"), "2");
    auto* split = window_->findChild<QPushButton*>("split-0");
    ASSERT_NE(split, nullptr);
    QTest::mouseClick(split, Qt::LeftButton);
    EXPECT_TRUE(cross().hypothesis.joins.empty());
    EXPECT_EQ(words("df-p"), "3");
}

TEST_F(ScoreDeskTest, SownColumnsAreEditedAndThePictureHasItsTable) {
    open(seedCross());
    typeTenPlants();
    QTest::mouseClick(window_->findChild<QPushButton*>("sown-columns"), Qt::LeftButton);
    ASSERT_FALSE(table_->isColumnHidden(3));
    goTo(0, 3);
    type("60");
    press(Qt::Key_Return);
    EXPECT_EQ(cross().families[0].sown->value(), 60);
    for (QAction* action : desk_->actions()) {
        if (action->objectName() == "show-as-table-action")
            action->trigger();
    }
    const auto* twin = window_->findChild<QTableView*>("twin-table");
    ASSERT_TRUE(twin->isVisible());
    EXPECT_EQ(twin->model()->index(0, 1).data().toString(), "336");
    const QString said = window_->findChild<QWidget*>("departure-map")->accessibleDescription();
    EXPECT_TRUE(said.contains("plants"));
}

TEST_F(ScoreDeskTest, SmallClassesAreJoinedFromTheirCautionAndPercentagesDismissed) {
    open(stemLeafCross());
    goTo(0, 1);
    QApplication::clipboard()->setText("20\t6\t5\t1\n");
    press(Qt::Key_V, Qt::ControlModifier);
    auto* join = window_->findChild<QPushButton*>("propose-join-0");
    ASSERT_NE(join, nullptr);
    ASSERT_TRUE(join->isVisible());
    QTest::mouseClick(join, Qt::LeftButton);
    EXPECT_EQ(cross().hypothesis.joins.size(), 1u);
    EXPECT_EQ(words("df-p"), "2");
    workbook_->undo();
    goTo(0, 1);
    QApplication::clipboard()->setText("56\t19\t19\t6\n");
    press(Qt::Key_V, Qt::ControlModifier);
    QPushButton* dismiss = nullptr;
    for (auto* button : window_->findChildren<QPushButton*>()) {
        if (button->objectName().startsWith("dismiss-hint") && button->isVisible())
            dismiss = button;
    }
    ASSERT_NE(dismiss, nullptr);
    QTest::mouseClick(dismiss, Qt::LeftButton);
    EXPECT_TRUE(workbook_->analysis().families[0].hints.empty());
}

TEST_F(ScoreDeskTest, AccessibleNamesAreUniqueAndHoldWhatIsSeen) {
    open(stemLeafCross());
    QStringList names;
    for (const auto* button : window_->findChildren<QPushButton*>()) {
        if (!button->isVisible())
            continue;
        QAccessibleInterface* spoken = QAccessible::queryAccessibleInterface(const_cast<QPushButton*>(button));
        const QString name = spoken->text(QAccessible::Name);
        EXPECT_FALSE(name.isEmpty()) << button->objectName().toStdString();
        EXPECT_TRUE(name.contains(button->text())) << name.toStdString();
        EXPECT_FALSE(names.contains(name)) << name.toStdString();
        names << name;
    }
}

} // namespace
} // namespace filial::app
