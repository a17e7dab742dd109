// SPDX-License-Identifier: GPL-3.0-or-later
#include <QAbstractButton>
#include <QAccessible>
#include <QDragEnterEvent>
#include <QDropEvent>
#include <QFile>
#include <QLineEdit>
#include <QListView>
#include <QMenu>
#include <QMimeData>
#include <QSet>
#include <QSignalSpy>

#include "app/common/help_page.h"
#include "app/shell/cross_acts.h"
#include "app/shell/drawer.h"
#include "app/shell/new_cross_page.h"
#include "app/shell/outline.h"
#include "app/shell/proposed_ratio.h"
#include "app/shell/start_page.h"
#include "tests/app/shell_fixture.h"

namespace filial::app {
namespace {

class WindowTest : public ShellTest {};

TEST_F(WindowTest, NewCrossByKeyboard) {
    Window window;
    showAt(window, 1360, 860);
    QTest::keyClick(&window, Qt::Key_N, Qt::ControlModifier);
    ASSERT_TRUE(window.newCrossPage()->isVisible());
    window.activateWindow();
    const auto type = [&window](const char* name, const char* text) {
        for (QLineEdit* edit : window.newCrossPage()->findChildren<QLineEdit*>())
            if (edit->accessibleName() == QLatin1String(name)) {
                QTest::keyClicks(edit, QLatin1String(text));
                return edit;
            }
        ADD_FAILURE() << name;
        return static_cast<QLineEdit*>(nullptr);
    };
    type("First parent", "K14");
    type("Second parent", "M02");
    type("Trait 1", "stem");
    QLineEdit* last = type("Levels of trait 1", "purple, green");
    ASSERT_NE(last, nullptr);
    QTest::keyClick(last, Qt::Key_Return);
    ASSERT_NE(window.workbook(), nullptr);
    const book::Cross* cross = window.workbook()->currentCross();
    ASSERT_NE(cross, nullptr);
    EXPECT_EQ(cross->name, "K14 × M02, F2");
    ASSERT_EQ(cross->classes.size(), 2U);
    EXPECT_EQ(cross->hypothesis.notation, "3:1"); // Mendel (1866), the F2 of one trait
    EXPECT_EQ(parentsText(window.workbook()->book(), *cross), "K14 × M02");
    EXPECT_EQ(window.savedState(), "Not saved yet");
    window.workbook()->undo();
    EXPECT_EQ(window.workbook()->currentCross(), nullptr);
    answers_.choice = 2;
}

TEST_F(WindowTest, TabGoesThroughANewCrossAsItIsRead) {
    Window window;
    showAt(window, 1360, 860);
    window.activateWindow();
    ASSERT_TRUE(QTest::qWaitForWindowActive(&window));
    window.newCross();
    QStringList passed;
    const auto note = [&passed] {
        QWidget* focus = QApplication::focusWidget();
        const auto* button = qobject_cast<QAbstractButton*>(focus);
        passed << (button != nullptr ? button->text() : focus->accessibleName());
    };
    ASSERT_TRUE(waitFor([] { return qobject_cast<QLineEdit*>(QApplication::focusWidget()) != nullptr; }));
    note();
    for (int i = 0; i < 3; ++i) {
        QTest::keyClick(QApplication::focusWidget(), Qt::Key_Tab);
        note();
    }
    QTest::keyClicks(QApplication::focusWidget(), "stem");
    QTest::keyClick(QApplication::focusWidget(), Qt::Key_Tab);
    note();
    QTest::keyClicks(QApplication::focusWidget(), "purple, green");
    for (int i = 0; i < 3; ++i) {
        QTest::keyClick(QApplication::focusWidget(), Qt::Key_Tab);
        note();
    }
    EXPECT_EQ(passed, QStringList({"First parent", "Second parent", "F2", "Trait 1", "Levels of trait 1",
                                   "Another trait", "Begin counting", "Cancel"}))
        << passed.join(" | ").toStdString();
}

TEST_F(WindowTest, HelpLeavesAboutForThePageOfTheFocus) {
    Window window;
    HelpPanel panel(&window);
    panel.showAbout();
    QWidget field;
    field.setProperty(kHelpPage, "hypotheses.md");
    panel.showFor(&field);
    EXPECT_FALSE(panel.text().contains("GPL-3.0-or-later"));
    QFile page(":/help/hypotheses.md");
    ASSERT_TRUE(page.open(QIODevice::ReadOnly));
    const QString title = QString::fromUtf8(page.readAll()).section("# ", 1).section('\n', 0, 0).trimmed();
    ASSERT_FALSE(title.isEmpty());
    EXPECT_TRUE(panel.text().startsWith(title)) << panel.text().left(40).toStdString();
}

TEST_F(WindowTest, ProposesTheRatiosOfTheTextbooks) {
    const book::Trait two{"a", {{"x", ""}, {"y", ""}}};
    const book::Trait other{"b", {{"x", ""}, {"y", ""}}};
    const book::Trait three{"c", {{"x", ""}, {"xy", ""}, {"y", ""}}};
    EXPECT_EQ(proposedRatio("F2", {two, other}), "9:3:3:1"); // Mendel (1866)
    EXPECT_EQ(proposedRatio("F2", {three}), "1:2:1");
    EXPECT_EQ(proposedRatio("test cross", {two, other}), "1:1:1:1");
    EXPECT_EQ(proposedRatio("F3", {two}), "5:3"); // one more selfing: 3/8 AA, 2/8 Aa, 3/8 aa
    EXPECT_EQ(proposedRatio("", {two}), "");
}

TEST_F(WindowTest, SampleOpensAsACopy) {
    Window window;
    ASSERT_TRUE(window.openSample(sample("f2-eight-families")));
    EXPECT_EQ(window.workbook()->session().path(), "");
    ASSERT_NE(window.workbook()->currentCross(), nullptr);
    EXPECT_EQ(window.workbook()->currentCross()->families.size(), 8U);
    EXPECT_EQ(window.savedState(), "Not saved yet");
}

TEST_F(WindowTest, SaveCloseReopen) {
    Window window;
    ASSERT_TRUE(window.openSample(sample("f2-eight-families")));
    rename(*window.workbook(), "bench 4");
    answers_.save = path("spring");
    ASSERT_TRUE(window.save());
    EXPECT_EQ(window.savedState(), "Saved");
    const QString file = path("spring.filial");
    ASSERT_TRUE(QFile::exists(file));
    ASSERT_TRUE(window.closeBook());
    EXPECT_EQ(answers_.asked, 0);
    ASSERT_TRUE(window.openPath(file));
    EXPECT_EQ(window.workbook()->currentCross()->name, "bench 4");
    EXPECT_EQ(window.savedState(), "Saved");
}

TEST_F(WindowTest, KeptChangesAreRecoveredAndSaid) {
    const QString file = path("kept.filial");
    ASSERT_TRUE(QFile::copy(sample("f2-eight-families"), file));
    {
        Window window;
        ASSERT_TRUE(window.openPath(file));
        rename(*window.workbook(), "kept for later");
        answers_.choice = 1;
        ASSERT_TRUE(window.closeBook());
        EXPECT_EQ(answers_.asked, 1);
    }
    Window window;
    ASSERT_TRUE(window.openPath(file));
    EXPECT_EQ(window.workbook()->currentCross()->name, "kept for later");
    EXPECT_TRUE(window.notice().contains("Recovered 1 change that")) << window.notice().toStdString();
    auto* revert = window.findChild<QAbstractButton*>("notice-act");
    ASSERT_NE(revert, nullptr);
    revert->click();
    EXPECT_NE(window.workbook()->currentCross()->name, "kept for later");
    EXPECT_TRUE(window.notice().isEmpty());
    window.workbook()->undo();
    EXPECT_EQ(window.workbook()->currentCross()->name, "kept for later");
    EXPECT_EQ(window.savedState(), "Changes not saved");
    answers_.choice = 2;
    ASSERT_TRUE(window.closeBook());
    ASSERT_TRUE(window.openPath(file));
    EXPECT_NE(window.workbook()->currentCross()->name, "kept for later");
}

TEST_F(WindowTest, DismissedQuestionKeepsTheBookOpen) {
    Window window;
    ASSERT_TRUE(window.openSample(sample("f2-eight-families")));
    rename(*window.workbook(), "changed");
    answers_.choice = -1;
    EXPECT_FALSE(window.closeBook());
    EXPECT_NE(window.workbook(), nullptr);
}

TEST_F(WindowTest, SecondWindowOnTheSameBookIsRefused) {
    const QString file = path("shared.filial");
    ASSERT_TRUE(QFile::copy(sample("f2-eight-families"), file));
    Window first;
    Window second;
    ASSERT_TRUE(first.openPath(file));
    EXPECT_FALSE(second.openPath(file));
    EXPECT_EQ(second.workbook(), nullptr);
    EXPECT_FALSE(second.notice().isEmpty());
}

TEST_F(WindowTest, MissingAndBrokenFilesAreSaidAndLoseNothing) {
    Window window;
    ASSERT_TRUE(window.openSample(sample("f2-eight-families")));
    EXPECT_FALSE(window.openPath(path("nowhere.filial")));
    EXPECT_FALSE(window.notice().isEmpty());
    QFile broken(path("broken.filial"));
    ASSERT_TRUE(broken.open(QIODevice::WriteOnly));
    broken.write("{\"version\": 1, ");
    broken.close();
    EXPECT_FALSE(window.openPath(path("broken.filial")));
    ASSERT_NE(window.workbook(), nullptr);
    EXPECT_EQ(window.workbook()->currentCross()->families.size(), 8U);
}

TEST_F(WindowTest, UndoAndRedoSayWhat) {
    Window window;
    showAt(window, 1360, 860);
    ASSERT_TRUE(window.openSample(sample("f2-eight-families")));
    const std::string before = window.workbook()->currentCross()->name;
    rename(*window.workbook(), "bench 4");
    QTest::keyClick(&window, Qt::Key_Z, Qt::ControlModifier);
    EXPECT_EQ(window.workbook()->currentCross()->name, before);
    EXPECT_TRUE(window.statusText().startsWith("Undid: ")) << window.statusText().toStdString();
    QTest::keyClick(&window, Qt::Key_Z, Qt::ControlModifier | Qt::ShiftModifier);
    EXPECT_EQ(window.workbook()->currentCross()->name, "bench 4");
    EXPECT_TRUE(window.statusText().startsWith("Redid: "));
    answers_.choice = 2;
}

TEST_F(WindowTest, UndoGoesToTheCrossItChanges) {
    Window window;
    ASSERT_TRUE(window.openSample(sample("f2-eight-families")));
    Workbook& workbook = *window.workbook();
    const book::Id first = workbook.currentCrossId();
    duplicateCross(&workbook);
    const book::Id copy = workbook.currentCrossId();
    ASSERT_NE(copy, first);
    rename(workbook, "bench 4");
    workbook.setCurrentCross(first);
    workbook.undo();
    EXPECT_EQ(workbook.currentCrossId(), copy);
    workbook.setCurrentCross(first);
    workbook.redo();
    EXPECT_EQ(workbook.currentCrossId(), copy);
    EXPECT_EQ(workbook.currentCross()->name, "bench 4");
}

TEST_F(WindowTest, WhatWasSaidOfARefusedEditGoesWithTheNext) {
    Window window;
    ASSERT_TRUE(window.openSample(sample("f2-eight-families")));
    Q_EMIT window.workbook()->refused("three is not a count");
    EXPECT_FALSE(window.notice().isEmpty());
    rename(*window.workbook(), "bench 4");
    EXPECT_TRUE(window.notice().isEmpty());
    answers_.save = path("spring");
    ASSERT_TRUE(window.save());
    EXPECT_EQ(window.statusText(), "Saved as spring.filial");
    rename(*window.workbook(), "bench 5");
    EXPECT_TRUE(window.statusText().isEmpty());
    EXPECT_EQ(window.savedState(), "Changes not saved");
    answers_.choice = 2;
}

TEST_F(WindowTest, CrossesAreDuplicatedMovedAndRemovedUndoably) {
    Window window;
    ASSERT_TRUE(window.openSample(sample("f2-eight-families")));
    Workbook& workbook = *window.workbook();
    const std::size_t crosses = workbook.book().crosses.size();
    const book::Book before = workbook.book();
    duplicateCross(&workbook);
    ASSERT_EQ(workbook.book().crosses.size(), crosses + 1);
    const book::Id copy = workbook.currentCrossId();
    moveCross(&workbook, -1);
    EXPECT_EQ(workbook.book().crosses[0].id, copy);
    removeCross(&workbook);
    EXPECT_EQ(workbook.book().crosses.size(), crosses);
    ASSERT_NE(workbook.currentCross(), nullptr);
    for (int i = 0; i < 3; ++i)
        workbook.undo();
    EXPECT_EQ(workbook.book(), before);
}

TEST_F(WindowTest, RearrangesItselfByWidth) {
    Window window;
    ASSERT_TRUE(window.openSample(sample("f2-eight-families")));
    showAt(window, 1360, 860);
    EXPECT_EQ(window.view()->shape(), BookView::Shape::Wide);
    EXPECT_EQ(window.view()->outline()->width(), 212);
    EXPECT_EQ(window.view()->rightColumn()->width(), 330);
    window.resize(1024, 700);
    ASSERT_TRUE(waitFor([&] { return window.view()->shape() == BookView::Shape::Rail; }));
    ASSERT_TRUE(waitFor([&] { return window.view()->outline()->width() == 48; }));
    EXPECT_EQ(window.view()->rightColumn()->width(), 280);
    window.resize(680, 700);
    ASSERT_TRUE(waitFor([&] { return window.view()->shape() == BookView::Shape::Drawer; }));
    EXPECT_EQ(window.width(), 680);
    EXPECT_FALSE(window.view()->rightColumn()->isVisible());
    ASSERT_TRUE(window.view()->drawer()->isVisible());
    EXPECT_EQ(window.view()->drawer()->line(), window.view()->desk()->verdictLine());
    auto* handle = window.view()->drawer()->findChild<QAbstractButton*>();
    ASSERT_NE(handle, nullptr);
    QTest::mouseClick(handle, Qt::LeftButton);
    EXPECT_TRUE(window.view()->rightColumn()->isVisible());
    window.resize(1360, 860);
    ASSERT_TRUE(waitFor([&] { return window.view()->shape() == BookView::Shape::Wide; }));
    EXPECT_TRUE(window.view()->rightColumn()->isVisible());
}

TEST_F(WindowTest, DroppedTableBecomesACross) {
    Window window;
    QFile table(path("petals.csv"));
    ASSERT_TRUE(table.open(QIODevice::WriteOnly));
    table.write("family,red,white\nP-1,30,11\nP-2,28,9\n");
    table.close();
    QMimeData data;
    data.setUrls({QUrl::fromLocalFile(path("petals.csv"))});
    QDragEnterEvent enter(QPoint(50, 300), Qt::CopyAction, &data, Qt::LeftButton, Qt::NoModifier);
    QCoreApplication::sendEvent(&window, &enter);
    QDropEvent drop(QPointF(50, 300), Qt::CopyAction, &data, Qt::LeftButton, Qt::NoModifier);
    QCoreApplication::sendEvent(&window, &drop);
    ASSERT_NE(window.workbook(), nullptr) << window.notice().toStdString();
    ASSERT_NE(window.workbook()->currentCross(), nullptr);
    EXPECT_EQ(window.workbook()->currentCross()->families.size(), 2U);
    EXPECT_EQ(window.workbook()->currentCross()->families[0].cell(ClassIndex{0}).count.value(), 30);
}

TEST_F(WindowTest, ReportIsWrittenAndAFailureIsSaid) {
    Window window;
    ASSERT_TRUE(window.openSample(sample("f2-eight-families")));
    answers_.save = path("report.html");
    window.writeReport();
    QFile report(path("report.html"));
    ASSERT_TRUE(report.open(QIODevice::ReadOnly));
    EXPECT_TRUE(report.readAll().contains("9:3:3:1"));
    answers_.save = path("no/such/folder/report.html");
    window.writeReport();
    EXPECT_TRUE(window.notice().contains("report.html"));
}

/// Buttons, fields and lists that a person can reach.
QList<QWidget*> reachable(QWidget& window) {
    QList<QWidget*> found;
    for (QWidget* one : window.findChildren<QWidget*>())
        if (one->isVisible() && one->isEnabled() && one->focusPolicy() != Qt::NoFocus && one->focusProxy() == nullptr)
            found << one;
    return found;
}

void checkNames(QWidget& window) {
    QSet<QString> names;
    for (QWidget* one : reachable(window)) {
        QAccessibleInterface* spoken = QAccessible::queryAccessibleInterface(one);
        ASSERT_NE(spoken, nullptr);
        const QString name = spoken->text(QAccessible::Name);
        EXPECT_FALSE(name.isEmpty()) << one->metaObject()->className();
        EXPECT_FALSE(name == QLatin1String(one->metaObject()->className()) ||
                     name.startsWith(QLatin1String("filial::")));
        EXPECT_FALSE(names.contains(name)) << name.toStdString();
        names << name;
        if (auto* button = qobject_cast<QAbstractButton*>(one)) {
            EXPECT_TRUE(name.contains(button->text())) << button->text().toStdString();
        }
    }
    EXPECT_FALSE(names.isEmpty());
}

TEST_F(WindowTest, EveryControlHasAnAccessibleNameOfItsOwn) {
    Window window;
    showAt(window, 1360, 860);
    checkNames(window);
    window.newCross();
    QCoreApplication::processEvents();
    checkNames(window);
    ASSERT_TRUE(window.openSample(sample("f2-eight-families")));
    QCoreApplication::processEvents();
    checkNames(window);
    window.resize(1024, 700);
    QCoreApplication::processEvents();
    checkNames(window);
}

TEST_F(WindowTest, AboutShowsCautionsAndLicence) {
    Window window;
    HelpPanel panel(&window);
    panel.showAbout();
    EXPECT_TRUE(panel.text().contains("GPL-3.0-or-later"));
    EXPECT_TRUE(panel.text().contains("diagnosis"));
}

} // namespace
} // namespace filial::app
