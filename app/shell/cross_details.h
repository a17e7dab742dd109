// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QWidget>

#include "app/common/workbook.h"

class QFormLayout;
class QLineEdit;
class QPlainTextEdit;

namespace filial::app {

/// What is written about a cross besides its counts. Each field is an edit of its own when it is left, and undoable.
class CrossDetails : public QWidget {
    Q_OBJECT
public:
    explicit CrossDetails(Workbook* workbook, QWidget* parent = nullptr);
    void load(); ///< fills the fields from the current cross

Q_SIGNALS:
    void left();

protected:
    void keyPressEvent(QKeyEvent* event) override;
    bool eventFilter(QObject* watched, QEvent* event) override;

private:
    QLineEdit* field(QFormLayout* form, const QString& label, const QString& example);
    void commit();
    void commitParents();

    Workbook* workbook_;
    QLineEdit* name_;
    QLineEdit* generation_;
    QLineEdit* parents_;
    QLineEdit* date_;
    QLineEdit* who_;
    QLineEdit* stage_;
    QPlainTextEdit* note_;
    bool loading_ = false;
};

} // namespace filial::app
