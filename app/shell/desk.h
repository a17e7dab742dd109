// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QList>
#include <QString>
#include <QWidget>

#include "app/common/workbook.h"

class QAction;

// Terms. A desk is one place to work: its middle pane (what I do) and its right column (what it means). The window owns
// the frame around them: top bar, outline on the left, splitters, the drawer on narrow windows.
namespace filial::app {

class Desk : public QObject {
    Q_OBJECT
public:
    using QObject::QObject;
    virtual QString name() const = 0; ///< "Score"
    virtual QWidget* middle() = 0;
    virtual QWidget* right() = 0;
    virtual QString verdictLine() const = 0;         ///< one line for the closed drawer on narrow windows
    virtual QList<QAction*> actions() const = 0;     ///< shown in the menu of the window
    virtual QString copyTable() const { return {}; } ///< main table as a block for a spreadsheet (Ctrl+Shift+C)
Q_SIGNALS:
    void verdictLineChanged();
};

} // namespace filial::app
