// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QWidget>

class QLabel;
class QLineEdit;

namespace filial::app {

class Workbook;

/// What is remembered between books: who counts, and the significance level of the tests.
class SettingsPage : public QWidget {
    Q_OBJECT
public:
    explicit SettingsPage(QWidget* parent = nullptr);
    void begin(Workbook* workbook); ///< null: no book is open

Q_SIGNALS:
    void left();

protected:
    void keyPressEvent(QKeyEvent* event) override;

private:
    void readAlpha();
    void readWho();

    Workbook* workbook_ = nullptr;
    QLineEdit* who_;
    QLineEdit* alpha_;
    QLabel* problem_;
};

} // namespace filial::app
