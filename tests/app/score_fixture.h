// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <gtest/gtest.h>

#include <QAbstractItemModelTester>
#include <QAccessible>
#include <QAction>
#include <QApplication>
#include <QClipboard>
#include <QHBoxLayout>
#include <QHeaderView>
#include <QLabel>
#include <QLineEdit>
#include <QPushButton>
#include <QTableView>
#include <QTemporaryDir>
#include <QTest>

#include "app/common/text.h"
#include "app/common/theme.h"
#include "app/score/family_model.h"
#include "app/score/score_desk.h"
#include "app/shell/help_panel.h"
#include "tests/support/reference.h"

/// Readable failures.
inline void PrintTo(const QString& text, std::ostream* out) {
    *out << '"' << text.toStdString() << '"';
}

namespace filial::app {
inline book::Cross seedCross() {
    book::Cross cross;
    cross.id = book::new_id();
    cross.name = "K14 × M02, F2";
    cross.traits = {{"seed", {{"round", ""}, {"wrinkled", ""}}}};
    cross.classes = book::product_classes(cross.traits);
    cross.hypothesis.notation = "3:1";
    return cross;
}

inline book::Cross stemLeafCross() {
    book::Cross cross;
    cross.id = book::new_id();
    cross.name = "K14 × M02, F2";
    cross.stage = "four-leaf stage";
    cross.traits = {{"stem", {{"purple", ""}, {"green", ""}}}, {"leaf", {{"hairy", ""}, {"smooth", ""}}}};
    cross.classes = book::product_classes(cross.traits);
    cross.hypothesis.notation = "9:3:3:1";
    return cross;
}

class ScoreDeskTest : public ::testing::Test {
protected:
    void open(book::Cross cross) {
        QAccessible::setActive(true);
        Theme::instance().apply(ThemeName::Light);
        book::Book book;
        book.id = book::new_id();
        book.crosses = {std::move(cross)};
        auto session = book::Session::create(book::disk(), {folder_.path().toStdString()}, std::move(book));
        ASSERT_TRUE(session.ok());
        workbook_ = std::make_unique<Workbook>(std::move(session).value());
        desk_ = std::make_unique<ScoreDesk>(workbook_.get());
        window_ = std::make_unique<QWidget>();
        auto* layout = new QHBoxLayout(window_.get());
        layout->setContentsMargins({});
        layout->setSpacing(0);
        layout->addWidget(desk_->middle(), 1);
        desk_->right()->setFixedWidth(330);
        layout->addWidget(desk_->right());
        window_->resize(1148, 812);
        window_->show();
        window_->activateWindow();
        ASSERT_TRUE(QTest::qWaitForWindowActive(window_.get())); // a window manager gives the keys in its own time
        table_ = window_->findChild<QTableView*>("family-table");
        ASSERT_NE(table_, nullptr);
        tester_ = std::make_unique<QAbstractItemModelTester>(table_->model(),
                                                             QAbstractItemModelTester::FailureReportingMode::Fatal);
        goTo(0, 1);
        QApplication::processEvents();
    }

    void TearDown() override {
        tester_.reset();
        window_.reset();
        desk_.reset();
        workbook_.reset();
    }

    void goTo(int row, int column) {
        table_->setFocus();
        table_->setCurrentIndex(table_->model()->index(row, column));
    }
    /// Keys go to the widget that has the focus, as a person's do.
    static void press(int key, Qt::KeyboardModifiers modifiers = Qt::NoModifier) {
        QTest::keyClick(QApplication::focusWidget(), static_cast<Qt::Key>(key), modifiers);
    }
    static void type(const QString& text) {
        for (const QChar c : text)
            QTest::keyClicks(QApplication::focusWidget(), QString(c));
    }
    QString words(const char* name) const {
        const auto* label = window_->findChild<QLabel*>(name);
        if (label == nullptr)
            return QStringLiteral("missing");
        QAccessibleInterface* spoken = QAccessible::queryAccessibleInterface(window_->findChild<QLabel*>(name));
        return spoken->text(QAccessible::Name);
    }
    QString cell(int row, int column) const {
        return table_->model()->index(row, column).data(Qt::AccessibleTextRole).toString();
    }
    const book::Cross& cross() const { return *workbook_->currentCross(); }
    void typeTenPlants() {
        const auto plants = test::reference_case("E01");
        for (const auto& family : plants["inputs"]["families"]) {
            type(QString::number(family[0].get<int>()));
            press(Qt::Key_Tab);
            type(QString::number(family[1].get<int>()));
            press(Qt::Key_Return);
        }
    }

    QTemporaryDir folder_;
    std::unique_ptr<Workbook> workbook_;
    std::unique_ptr<ScoreDesk> desk_;
    std::unique_ptr<QWidget> window_;
    std::unique_ptr<QAbstractItemModelTester> tester_;
    QTableView* table_ = nullptr;
};

} // namespace filial::app
