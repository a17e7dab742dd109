// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/common/focus_ring.h"

#include <QAbstractButton>
#include <QApplication>
#include <QComboBox>
#include <QFocusEvent>

namespace filial::app {

FocusRing::FocusRing(QObject* parent) : QObject(parent) {
    qApp->installEventFilter(this);
}

FocusRing::~FocusRing() {
    delete frame_;
}

bool FocusRing::eventFilter(QObject* watched, QEvent* event) {
    if (event->type() != QEvent::FocusIn && event->type() != QEvent::FocusOut)
        return false;
    auto* widget = qobject_cast<QWidget*>(watched);
    const bool ringed =
        qobject_cast<QAbstractButton*>(widget) != nullptr || qobject_cast<QComboBox*>(widget) != nullptr;
    if (!ringed)
        return false;
    if (event->type() == QEvent::FocusOut) {
        if (frame_ != nullptr && frame_->widget() == widget)
            frame_->setWidget(nullptr);
        return false;
    }
    if (static_cast<QFocusEvent*>(event)->reason() == Qt::MouseFocusReason)
        return false;
    if (frame_ == nullptr)
        frame_ = new QFocusFrame;
    frame_->setWidget(widget);
    return false;
}

} // namespace filial::app
