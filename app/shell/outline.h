// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QAbstractListModel>
#include <QWidget>

#include "app/common/workbook.h"

class QLabel;
class QListView;
class QPushButton;

namespace filial::app {

/// The crosses of the book as a list: name, and how many families.
class CrossList : public QAbstractListModel {
    Q_OBJECT
public:
    enum Role { FamiliesRole = Qt::UserRole, ShortRole };
    explicit CrossList(Workbook* workbook, QObject* parent);
    int rowCount(const QModelIndex& parent = {}) const override;
    QVariant data(const QModelIndex& index, int role) const override;

private:
    void follow();
    Workbook* workbook_;
    int rows_ = 0;
};

/// The left pane: what I have. On narrow windows a rail of 48 px.
class Outline : public QWidget {
    Q_OBJECT
public:
    explicit Outline(Workbook* workbook, QWidget* parent = nullptr);
    void setRail(bool rail);
    QListView* list() const { return list_; }

Q_SIGNALS:
    void newCrossWanted();
    void detailsWanted();

protected:
    void paintEvent(QPaintEvent* event) override;
    void contextMenuEvent(QContextMenuEvent* event) override;
    bool eventFilter(QObject* watched, QEvent* event) override;

private:
    void chooseCurrent();
    void fitList(); ///< as high as its rows: what is to be done next stands right below
    Workbook* workbook_;
    CrossList* crosses_;
    QLabel* heading_;
    QListView* list_;
    QPushButton* fresh_;
    QPushButton* details_;
};

} // namespace filial::app
