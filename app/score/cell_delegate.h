// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QLineEdit>
#include <QStyledItemDelegate>

namespace filial::app {

class FamilyTable;

/// Line edit of a cell: surface, 2 px underline in accent (in error colour while the text is not a count), the result
/// of a sum muted beside it.
class CellEditor : public QLineEdit {
    Q_OBJECT
public:
    explicit CellEditor(QWidget* parent);
    void setState(bool wrong, const QString& sum);

protected:
    void paintEvent(QPaintEvent* event) override;

private:
    bool wrong_ = false;
    QString sum_;
};

/// Paints and edits the cells of the family table.
class CellDelegate : public QStyledItemDelegate {
    Q_OBJECT
public:
    explicit CellDelegate(FamilyTable* table);
    void paint(QPainter* painter, const QStyleOptionViewItem& option, const QModelIndex& index) const override;
    QWidget* createEditor(QWidget* parent, const QStyleOptionViewItem& option, const QModelIndex& index) const override;
    void setEditorData(QWidget* editor, const QModelIndex& index) const override;
    void setModelData(QWidget* editor, QAbstractItemModel* model, const QModelIndex& index) const override;
    void updateEditorGeometry(QWidget* editor, const QStyleOptionViewItem& option,
                              const QModelIndex& index) const override;

protected:
    bool eventFilter(QObject* object, QEvent* event) override;

private:
    bool leavesCell(const QKeyEvent& key) const; ///< a key that moves on, once a count is typed over the old one

    FamilyTable* table_;
};

} // namespace filial::app
