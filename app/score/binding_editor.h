// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <vector>

#include <QPushButton>

#include "core/book/model.h"

namespace filial::app {

/// A term of the hypothesis as a chip; drag it, or Alt+Up and Alt+Down, to put it on another class.
class TermChip : public QPushButton {
    Q_OBJECT
public:
    explicit TermChip(QWidget* parent);

Q_SIGNALS:
    void dropped(int y); ///< its middle, in the editor's coordinates
    void shifted(int by);

protected:
    void mousePressEvent(QMouseEvent* event) override;
    void mouseMoveEvent(QMouseEvent* event) override;
    void mouseReleaseEvent(QMouseEvent* event) override;
    void keyPressEvent(QKeyEvent* event) override;
    void paintEvent(QPaintEvent* event) override;

private:
    QPoint grip_;
};

/// Which term each class of the cross is: classes stand still, chips change places.
class BindingEditor : public QWidget {
    Q_OBJECT
public:
    explicit BindingEditor(QWidget* parent = nullptr);
    /// Shows a cross' classes with the terms' texts; class i has term binding[i].
    void setTerms(const book::Cross& cross, const QStringList& terms, std::vector<std::size_t> binding);
    const std::vector<std::size_t>& binding() const { return binding_; }
    QSize sizeHint() const override;

Q_SIGNALS:
    void bindingChanged();

protected:
    void paintEvent(QPaintEvent* event) override;
    void resizeEvent(QResizeEvent* event) override;

private:
    void swap(std::size_t from, std::size_t to);
    void placeChips();

    book::Cross cross_; ///< without families: classes and their colours
    QStringList terms_;
    std::vector<std::size_t> binding_;
    std::vector<TermChip*> chips_; ///< one a class
};

} // namespace filial::app
