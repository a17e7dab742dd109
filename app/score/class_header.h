// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <set>
#include <vector>

#include <QHeaderView>

#include "app/score/words.h"

namespace filial::app {

class FamilyModel;
class Workbook;

/// Header of the family table: a class has its swatch, label and term ("9 of 16"); classes are chosen by a click or by
/// Space; a bracket spans joined classes, with Split on it.
class ClassHeader : public QHeaderView {
    Q_OBJECT
public:
    ClassHeader(Workbook* workbook, FamilyModel* model, QWidget* parent = nullptr);

    QSize sizeHint() const override;
    const std::set<std::size_t>& chosenClasses() const { return chosen_; }
    void clearChosen();
    void refresh(); ///< joins, labels or terms may differ

Q_SIGNALS:
    void chosenChanged();
    void splitRequested(std::size_t join);

protected:
    void paintSection(QPainter* painter, const QRect& rect, int logicalIndex) const override;
    void paintEvent(QPaintEvent* event) override;
    void mousePressEvent(QMouseEvent* event) override;
    void mouseMoveEvent(QMouseEvent* event) override;
    void leaveEvent(QEvent* event) override;
    void resizeEvent(QResizeEvent* event) override;

private:
    QString term(std::size_t phenotype) const;
    bool anyBreaks() const; ///< one label is too wide: all break after the dot, for even rows
    QStringList labelLines(const QString& label, int width, bool breaks) const;
    QRect joinRect(const std::vector<std::size_t>& join) const;
    void placeSplits();

    Workbook* workbook_;
    FamilyModel* families_;
    std::set<std::size_t> chosen_;
    std::vector<TextButton*> splits_;
    int hovered_ = -1;
};

} // namespace filial::app
