// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QAbstractTableModel>
#include <QTableView>

#include "app/score/family_table.h"
#include "app/score/score_view.h"

namespace filial::app {

/// Two rows below the family table: all families, and what is expected.
class TotalsModel : public QAbstractTableModel {
    Q_OBJECT
public:
    TotalsModel(ScoreView* view, FamilyModel* families, QObject* parent);
    int rowCount(const QModelIndex& parent = {}) const override;
    int columnCount(const QModelIndex& parent = {}) const override;
    QVariant data(const QModelIndex& index, int role) const override;

private:
    void refresh();
    QString total(int column) const;
    QString expected(int column) const;

    ScoreView* view_;
    FamilyModel* families_;
    std::vector<double> expected_; ///< rounded so that they add to N
};

/// Its view; widths and scroll follow the family table.
class TotalsTable : public QTableView {
    Q_OBJECT
public:
    TotalsTable(ScoreView* view, FamilyTable* table, QWidget* parent = nullptr);
    void follow(); ///< takes the family table's columns

protected:
    void paintEvent(QPaintEvent* event) override;

private:
    FamilyTable* table_;
};

} // namespace filial::app
