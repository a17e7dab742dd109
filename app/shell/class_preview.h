// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QWidget>

#include "core/book/model.h"

namespace filial::app {

/// The classes a cross will have, each with its swatch and its term of the ratio proposed.
class ClassPreview : public QWidget {
    Q_OBJECT
public:
    using QWidget::QWidget;
    void setCross(book::Cross cross);
    bool hasHeightForWidth() const override { return true; }
    int heightForWidth(int width) const override;
    QSize sizeHint() const override { return {400, heightForWidth(400)}; }

protected:
    void paintEvent(QPaintEvent* event) override;

private:
    int columns(int width) const;
    book::Cross cross_;
    QStringList terms_;
};

} // namespace filial::app
