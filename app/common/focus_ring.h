// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QFocusFrame>
#include <QObject>
#include <QPointer>

namespace filial::app {

/// Draws the accent ring round the button, box or field that has the keyboard: one for the application. Tables, lists
/// and tabs show the focus inside their cells, and a mouse press on a button shows none.
class FocusRing : public QObject {
    Q_OBJECT
public:
    explicit FocusRing(QObject* parent);
    ~FocusRing() override;

protected:
    bool eventFilter(QObject* watched, QEvent* event) override;

private:
    QPointer<QFocusFrame> frame_;
};

} // namespace filial::app
