// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QList>
#include <QPointer>
#include <QWidget>

#include "app/shell/desk.h"

class QScrollArea;
class QSplitter;
class QStackedWidget;

namespace filial::app {

class CrossDetails;
class Drawer;
class Outline;

/// An open book: outline, the present desk's middle, its right column. Rearranges itself by the width it has.
class BookView : public QWidget {
    Q_OBJECT
public:
    enum class Shape { Wide, Rail, Drawer };
    explicit BookView(Workbook* workbook, QWidget* parent = nullptr);
    ~BookView() override;

    const QList<Desk*>& desks() const { return desks_; }
    Desk* desk() const;
    int deskIndex() const { return current_; }
    void showDesk(int index);
    void showDetails();
    void leaveDetails();
    Shape shape() const { return shape_; }
    Outline* outline() const { return outline_; }
    Drawer* drawer() const { return drawer_; }
    QWidget* rightColumn() const;
    int leftWidth() const;
    void nextPane(); ///< F6

Q_SIGNALS:
    void newCrossWanted();
    void leftWidthChanged(int width);

protected:
    void resizeEvent(QResizeEvent* event) override;

private:
    void arrange(Shape shape);
    void followCross();
    QWidget* emptyPage();
    void keepSizes();

    Workbook* workbook_;
    QList<Desk*> desks_;
    int current_ = -1;
    Shape shape_ = Shape::Wide;
    bool arranged_ = false;
    Outline* outline_;
    QSplitter* splitter_;
    QStackedWidget* middle_;
    QWidget* empty_;
    QScrollArea* right_;
    QWidget* centre_; ///< the middle and, on a narrow window, the drawer below it
    Drawer* drawer_;
    CrossDetails* details_;
};

} // namespace filial::app
