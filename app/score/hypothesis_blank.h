// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QPushButton>

namespace filial::app {

/// The blank of the head line: the hypothesis in accent with an underline; click or Ctrl+R changes it.
class HypothesisBlank : public QPushButton {
    Q_OBJECT
public:
    explicit HypothesisBlank(QWidget* parent = nullptr);
    void setNotation(const QString& notation);
    QSize sizeHint() const override;

protected:
    void paintEvent(QPaintEvent* event) override;
};

} // namespace filial::app
