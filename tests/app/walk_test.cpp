// SPDX-License-Identifier: GPL-3.0-or-later
// A day's work in the whole window by real keys and clicks: describe a cross, count, read, save, crash, come back,
// undo, report. What the screen says is compared with the published values and with the saved book read without a
// window.
#include <sys/stat.h>
#include <unistd.h>

#include <cmath>
#include <cstdio>
#include <sstream>

#include <QAccessible>
#include <QApplication>
#include <QDir>
#include <QFile>
#include <QLabel>
#include <QLineEdit>
#include <QPushButton>
#include <QTableView>

#include "app/headless/headless.h"
#include "app/shell/new_cross_page.h"
#include "tests/app/shell_fixture.h"
#include "tests/support/reference.h"

namespace filial::app {
namespace {

using nlohmann::json;

/// Three decimals, rounded by the C library and not by the code under test.
std::string three(double value) {
    char text[32] = "";
    std::snprintf(text, sizeof text, "%.3f", value);
    return text;
}

json headless(const std::vector<std::string>& arguments) {
    std::ostringstream out;
    std::ostringstream err;
    EXPECT_EQ(run_headless(arguments, out, err), 0) << err.str();
    return json::parse(out.str(), nullptr, false);
}

class WalkTest : public ShellTest {
protected:
    void begin() {
        window_ = std::make_unique<Window>();
        showAt(*window_, 1360, 860);
        window_->activateWindow();
        ASSERT_TRUE(QTest::qWaitForWindowActive(window_.get()));
    }
    /// Keys go to what has the focus, as a person's do.
    static void press(Qt::Key key, Qt::KeyboardModifiers modifiers = Qt::NoModifier) {
        ASSERT_NE(QApplication::focusWidget(), nullptr);
        QTest::keyClick(QApplication::focusWidget(), key, modifiers);
    }
    static void type(const QString& text) {
        for (const QChar c : text) {
            ASSERT_NE(QApplication::focusWidget(), nullptr);
            QTest::keyClicks(QApplication::focusWidget(), QString(c));
        }
    }
    /// What a screen reader says of a label.
    std::string spoken(const char* name) const {
        auto* label = window_->findChild<QLabel*>(QLatin1String(name));
        if (label == nullptr)
            return "missing";
        return QAccessible::queryAccessibleInterface(label)->text(QAccessible::Name).toStdString();
    }
    static void tabTo(const char* name) {
        for (int i = 0; i < 8 && QApplication::focusWidget()->accessibleName() != QLatin1String(name); ++i)
            press(Qt::Key_Tab);
        ASSERT_EQ(QApplication::focusWidget()->accessibleName(), name);
    }
    void describeSeedCross() {
        QTest::keyClick(window_.get(), Qt::Key_N, Qt::ControlModifier);
        type("K14");
        press(Qt::Key_Tab);
        type("M02");
        tabTo("Trait 1"); // past the generation: F2 is chosen
        type("seed");
        tabTo("Levels of trait 1");
        type("round, wrinkled");
        press(Qt::Key_Return);
    }
    void typePlants(const json& families) {
        for (const json& family : families) {
            type(QString::number(family[0].get<int>()));
            press(Qt::Key_Tab);
            type(QString::number(family[1].get<int>()));
            press(Qt::Key_Return);
        }
    }
    void expectScreen(const json& total, const json& pooled, const json& between, const json& contingency) const {
        EXPECT_EQ(spoken("source-total-statistic"), three(total["chi2"]));
        EXPECT_EQ(spoken("source-pooled-statistic"), three(pooled["chi2"]));
        EXPECT_EQ(spoken("source-between-statistic"), three(between["chi2"]));
        EXPECT_EQ(spoken("chi-square-statistic"), three(pooled["chi2"]));
        EXPECT_EQ(spoken("chi-square-p"), "P " + three(pooled["p"]));
        EXPECT_EQ(spoken("contingency-statistic"), three(contingency["chi2"]));
        EXPECT_EQ(spoken("contingency-p"), "P " + three(contingency["p"]));
    }
    /// The saved book's numbers, read without a window, in the form of the reference cases.
    json savedNumbers(const QString& file) const {
        const json read = headless({"families", file.toStdString(), "--json"});
        json numbers;
        for (const char* row : {"total", "pooled", "heterogeneity"})
            numbers[row] = {{"chi2", read[row]["chi_square"]}, {"p", read[row]["chi_square_p"]}};
        numbers["contingency"] = {{"chi2", read["contingency"]["statistic"]}, {"p", read["contingency"]["p"]}};
        return numbers;
    }
    std::unique_ptr<Window> window_;
};

// Mendel 1866 (Bateson 1902, p. 53): seed form of the first ten plants.
TEST_F(WalkTest, FromTheFirstKeyToTheReport) {
    const json plants = test::reference_case("E01");
    const json& expected = plants["expected"];
    begin();
    describeSeedCross();
    ASSERT_NE(window_->workbook(), nullptr);
    ASSERT_NE(window_->workbook()->currentCross(), nullptr);
    EXPECT_EQ(window_->workbook()->currentCross()->hypothesis.notation, "3:1");
    typePlants(plants["inputs"]["families"]);
    ASSERT_EQ(window_->workbook()->currentCross()->families.size(), 10U);
    expectScreen(expected["total"], expected["pooled"], expected["heterogeneity"], expected["contingency_chi2"]);
    EXPECT_NE(spoken("verdict").find("3:1"), std::string::npos) << spoken("verdict");

    answers_.save = path("walk.filial");
    press(Qt::Key_S, Qt::ControlModifier);
    EXPECT_EQ(window_->savedState(), "Saved");
    const json saved = savedNumbers(path("walk.filial"));
    expectScreen(saved["total"], saved["pooled"], saved["heterogeneity"], saved["contingency"]);
    const json score = headless({"score", path("walk.filial").toStdString(), "--json"});
    EXPECT_EQ(score["totals"]["verdict"], "not contradicted");
    EXPECT_NEAR(score["totals"]["chi_square"]["statistic"], expected["pooled"]["chi2"].get<double>(), 1e-12);

    auto* table = window_->findChild<QTableView*>("family-table");
    ASSERT_NE(table, nullptr);
    table->setCurrentIndex(table->model()->index(0, 1));
    type("75"); // 45 plants, digits exchanged: the kind of slip that is undone later
    press(Qt::Key_Return);
    EXPECT_EQ(window_->savedState(), "Changes not saved");
    EXPECT_NE(spoken("chi-square-statistic"), three(expected["pooled"]["chi2"]));
    const std::string slipped = spoken("chi-square-statistic");
    window_->workbook()->session().wait_until_synced();

    window_.reset(); // gone without a question: what a crash leaves is the file as saved, and the journal
    const json file = savedNumbers(path("walk.filial"));
    EXPECT_EQ(file, saved);
    EXPECT_EQ(answers_.asked, 0);
    begin();
    ASSERT_TRUE(window_->openPath(path("walk.filial")));
    EXPECT_TRUE(window_->notice().contains("Recovered 1 change")) << window_->notice().toStdString();
    EXPECT_EQ(spoken("chi-square-statistic"), slipped);
    QTest::keyClick(window_.get(), Qt::Key_Z, Qt::ControlModifier);
    expectScreen(expected["total"], expected["pooled"], expected["heterogeneity"], expected["contingency_chi2"]);

    answers_.save = path("walk.html");
    QTest::keyClick(window_.get(), Qt::Key_P, Qt::ControlModifier);
    EXPECT_EQ(answers_.shown, path("walk.html"));
    QFile page(path("walk.html"));
    ASSERT_TRUE(page.open(QIODevice::ReadOnly));
    const QByteArray html = page.readAll();
    for (const char* shown : {"5.297", "0.831", "4.466", "4.713", "0.362", "<svg", "K14", "M02"})
        EXPECT_TRUE(html.contains(shown)) << shown;
}

TEST_F(WalkTest, AFileRemovedUnderneathIsWrittenAgain) {
    const QString file = path("gone.filial");
    ASSERT_TRUE(QFile::copy(sample("f2-eight-families"), file));
    begin();
    ASSERT_TRUE(window_->openPath(file));
    const json before = savedNumbers(file);
    rename(*window_->workbook(), "kept");
    ASSERT_TRUE(QFile::remove(file));
    QTest::keyClick(window_.get(), Qt::Key_S, Qt::ControlModifier);
    EXPECT_EQ(window_->savedState(), "Saved") << window_->notice().toStdString();
    ASSERT_TRUE(QFile::exists(file));
    EXPECT_EQ(savedNumbers(file), before);
}

TEST_F(WalkTest, ASecondWindowIsRefusedWhileTheFirstKeepsItsChanges) {
    const QString file = path("shared.filial");
    ASSERT_TRUE(QFile::copy(sample("f2-eight-families"), file));
    begin();
    ASSERT_TRUE(window_->openPath(file));
    rename(*window_->workbook(), "bench 4");
    Window second;
    EXPECT_FALSE(second.openPath(file));
    EXPECT_EQ(second.workbook(), nullptr);
    EXPECT_FALSE(second.notice().isEmpty());
    EXPECT_EQ(window_->workbook()->currentCross()->name, "bench 4");
    ASSERT_TRUE(window_->save());
    EXPECT_EQ(window_->savedState(), "Saved");
}

/// The superuser may write anywhere: for a while this process is nobody.
class AsNobody {
public:
    AsNobody() {
        if (::geteuid() == 0)
            changed_ = ::setresuid(65534, 65534, 0) == 0;
    }
    AsNobody(const AsNobody&) = delete;
    AsNobody& operator=(const AsNobody&) = delete;
    ~AsNobody() {
        if (changed_) {
            EXPECT_EQ(::setresuid(0, 0, 0), 0);
        }
    }

private:
    bool changed_ = false;
};

TEST_F(WalkTest, ABookInAFolderThatCannotBeWrittenLosesNothing) {
    const QString locked = path("locked");
    ASSERT_TRUE(QDir().mkpath(locked));
    const QString file = locked + "/book.filial";
    ASSERT_TRUE(QFile::copy(sample("f2-eight-families"), file));
    ASSERT_EQ(::chmod(file.toUtf8().constData(), 0444), 0);
    ASSERT_EQ(::chmod(locked.toUtf8().constData(), 0555), 0);
    ASSERT_EQ(::chmod(folder_.path().toUtf8().constData(), 0777), 0);
    {
        const AsNobody nobody;
        begin();
        ASSERT_TRUE(window_->openPath(file)) << window_->notice().toStdString();
        rename(*window_->workbook(), "bench 4");
        window_->workbook()->session().wait_until_synced();
        EXPECT_EQ(window_->workbook()->session().journal_state(), book::JournalState::OnDisk);
        EXPECT_FALSE(window_->save());
        EXPECT_FALSE(window_->notice().isEmpty());
        EXPECT_EQ(window_->savedState(), "Changes not saved");
        window_.reset();
        begin();
        ASSERT_TRUE(window_->openPath(file));
        EXPECT_EQ(window_->workbook()->currentCross()->name, "bench 4");
        answers_.save = path("elsewhere.filial");
        ASSERT_TRUE(window_->saveAs()) << window_->notice().toStdString();
        EXPECT_EQ(window_->savedState(), "Saved");
        window_.reset();
    }
    ASSERT_EQ(::chmod(locked.toUtf8().constData(), 0755), 0);
}

} // namespace
} // namespace filial::app
