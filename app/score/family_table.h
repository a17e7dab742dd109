// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <optional>

#include <QTableView>

#include "app/score/class_header.h"
#include "app/score/family_model.h"

class QLineEdit;

namespace filial::app {

inline constexpr int kRowHeight = 32;
inline constexpr int kBandHeight = 18; ///< added to a row that says something below

/// The family table with a spreadsheet's habits.
class FamilyTable : public QTableView {
    Q_OBJECT
public:
    FamilyTable(Workbook* workbook, FamilyModel* model, QWidget* parent = nullptr);

    FamilyModel* families() const { return model_; }
    ClassHeader* classHeader() const { return header_; }
    QList<QAction*> tableActions() const { return actions_; }
    void showSownColumns(bool show);
    bool sownColumnsShown() const;
    void layOutColumns(int width); ///< shares a width among the columns
    int contentHeight() const;     ///< of header and all rows
    QString blockText() const;     ///< the selected block for a spreadsheet
    QString wholeTable() const;    ///< header and all families

    void step(int rows, int columns); ///< moves the current cell; Tab wraps at the row's end
    void enter();                     ///< down, to the column where a run of Tabs began; in the last row adds a family
    void startReason();
    bool typedOver() const { return typed_over_; } ///< the open edit began by typing, so arrows leave the cell
    void editWithCaret() { typed_over_ = false; }  ///< from here arrows move within the text

Q_SIGNALS:
    void heightChanged(); ///< more or fewer rows, or one grew
    void joinRequested(const std::vector<std::size_t>& classes);

protected:
    void focusInEvent(QFocusEvent* event) override;
    void keyPressEvent(QKeyEvent* event) override;
    void paintEvent(QPaintEvent* event) override;
    void mouseDoubleClickEvent(QMouseEvent* event) override;
    void contextMenuEvent(QContextMenuEvent* event) override;
    void selectionChanged(const QItemSelection& selected, const QItemSelection& deselected) override;
    bool focusNextPrevChild(bool next) override;
    bool edit(const QModelIndex& index, EditTrigger trigger, QEvent* event) override;
    void closeEditor(QWidget* editor, QAbstractItemDelegate::EndEditHint hint) override;
    bool eventFilter(QObject* object, QEvent* event) override;

private:
    QAction* add(const char* id, const QString& text, const QList<QKeySequence>& keys, void (FamilyTable::*act)());
    void addActions();
    void copy();
    void cut();
    void paste();
    void clearCells();
    void fillDown();
    void insertRow();
    void removeRows();
    void moveUp();
    void moveDown();
    void aside();
    void joinColumns();
    void selectRows();
    void fitRows();
    void finishReason(bool keep);
    QRect block() const; ///< selected rows and columns: x columns, y rows
    std::vector<int> visibleColumns(int from) const;
    void report(const QStringList& complaints);

    Workbook* workbook_;
    FamilyModel* model_;
    ClassHeader* header_;
    QList<QAction*> actions_;
    std::optional<int> tab_start_;
    QLineEdit* reason_ = nullptr;
    int reason_row_ = -1;
    bool sown_ = false;
    bool typed_over_ = false;
    int width_ = 0; ///< last shared among the columns
};

} // namespace filial::app
