// SPDX-License-Identifier: GPL-3.0-or-later
// What the family table does on its keys: blocks, rows, setting aside.
#include <algorithm>

#include <QAction>
#include <QClipboard>
#include <QGuiApplication>
#include <QKeyEvent>
#include <QLineEdit>

#include "app/score/family_table.h"
#include "core/book/count_table.h"

namespace filial::app {

QAction* FamilyTable::add(const char* id, const QString& text, const QList<QKeySequence>& keys,
                          void (FamilyTable::*act)()) {
    auto* action = new QAction(text, this);
    action->setObjectName(QString::fromLatin1(id));
    action->setShortcuts(keys);
    action->setShortcutContext(Qt::WidgetWithChildrenShortcut);
    connect(action, &QAction::triggered, this, act);
    addAction(action);
    actions_ << action;
    return action;
}

void FamilyTable::addActions() {
    add("copy-block", tr("Copy block"), {QKeySequence::Copy}, &FamilyTable::copy);
    add("cut-block", tr("Cut block"), {QKeySequence::Cut}, &FamilyTable::cut);
    add("paste-block", tr("Paste block"), {QKeySequence::Paste}, &FamilyTable::paste);
    add("clear-cells", tr("Clear to blank"), {QKeySequence(Qt::Key_Delete), QKeySequence(Qt::Key_Backspace)},
        &FamilyTable::clearCells);
    add("fill-down", tr("Fill down"), {QKeySequence(Qt::CTRL | Qt::SHIFT | Qt::Key_D)}, &FamilyTable::fillDown);
    add("insert-family", tr("Insert family above"), {QKeySequence(Qt::Key_Insert)}, &FamilyTable::insertRow);
    add("delete-family", tr("Delete family"), {QKeySequence(Qt::CTRL | Qt::Key_Delete)}, &FamilyTable::removeRows);
    add("move-family-up", tr("Move family up"), {QKeySequence(Qt::ALT | Qt::Key_Up)}, &FamilyTable::moveUp);
    add("move-family-down", tr("Move family down"), {QKeySequence(Qt::ALT | Qt::Key_Down)}, &FamilyTable::moveDown);
    add("set-aside", tr("Set aside or take back…"), {QKeySequence(Qt::CTRL | Qt::Key_D)}, &FamilyTable::aside);
    add("select-families", tr("Read these families alone"), {QKeySequence(Qt::SHIFT | Qt::Key_Space)},
        &FamilyTable::selectRows);
    add("join-classes", tr("Join these classes"), {QKeySequence(Qt::CTRL | Qt::Key_J)}, &FamilyTable::joinColumns);
}

QRect FamilyTable::block() const {
    QRect all;
    for (const QItemSelectionRange& range : selectionModel()->selection())
        all |= QRect(QPoint(range.left(), range.top()), QPoint(range.right(), range.bottom()));
    if (all.isNull() && currentIndex().isValid())
        all = QRect(currentIndex().column(), currentIndex().row(), 1, 1);
    return all;
}

QString FamilyTable::blockText() const {
    const QRect area = block();
    std::vector<std::vector<std::string>> cells;
    for (int row = area.top(); row <= area.bottom(); ++row) {
        if (model_->isNextFamily(row))
            continue;
        auto& line = cells.emplace_back();
        for (const int column : visibleColumns(area.left())) {
            if (column <= area.right())
                line.push_back(model_->index(row, column).data().toString().toStdString());
        }
    }
    return QString::fromStdString(book::write_block(cells));
}

QString FamilyTable::wholeTable() const {
    std::vector<std::vector<std::string>> cells(1);
    const std::vector<int> columns = visibleColumns(0);
    for (const int column : columns)
        cells[0].push_back(model_->headerData(column, Qt::Horizontal, Qt::DisplayRole).toString().toStdString());
    for (int row = 0; row + 1 < model_->rowCount(); ++row) {
        auto& line = cells.emplace_back();
        for (const int column : columns)
            line.push_back(model_->index(row, column).data().toString().toStdString());
    }
    return QString::fromStdString(book::write_block(cells));
}

void FamilyTable::copy() {
    QGuiApplication::clipboard()->setText(blockText());
}

void FamilyTable::cut() {
    copy();
    clearCells();
}

void FamilyTable::paste() {
    auto cells = book::read_block(QGuiApplication::clipboard()->text().toStdString());
    if (cells.empty() || !currentIndex().isValid())
        return;
    const QRect area = block();
    std::vector<int> columns = visibleColumns(area.left());
    // One cell into a larger block fills the block.
    if (cells.size() == 1 && cells[0].size() == 1) {
        std::erase_if(columns, [&area](int column) { return column > area.right(); });
        cells.assign(static_cast<std::size_t>(area.height()), std::vector<std::string>(columns.size(), cells[0][0]));
    }
    report(model_->setBlock(area.top(), columns, cells));
}

void FamilyTable::report(const QStringList& complaints) {
    if (complaints.isEmpty())
        return;
    QString text = complaints.mid(0, 3).join(QStringLiteral("; "));
    if (complaints.size() > 3)
        text += tr("; and %1 more").arg(complaints.size() - 3);
    Q_EMIT workbook_->refused(text);
}

void FamilyTable::clearCells() {
    QModelIndexList indexes = selectionModel()->selectedIndexes();
    if (indexes.isEmpty() && currentIndex().isValid())
        indexes << currentIndex();
    model_->clear(indexes);
}

void FamilyTable::fillDown() {
    const QRect area = block();
    if (area.height() < 2)
        return;
    std::vector<int> columns = visibleColumns(area.left());
    std::erase_if(columns, [&area](int column) { return column > area.right(); });
    std::vector<std::string> top;
    for (const int column : columns)
        top.push_back(model_->cellText(model_->index(area.top(), column)).toStdString());
    std::vector<std::vector<std::string>> cells(static_cast<std::size_t>(area.height() - 1), top);
    report(model_->setBlock(area.top() + 1, columns, cells));
}

void FamilyTable::insertRow() {
    const QModelIndex here = currentIndex();
    model_->insertFamily(here.isValid() ? here.row() : model_->rowCount() - 1);
    if (here.isValid())
        setCurrentIndex(model_->index(here.row(), here.column()));
}

void FamilyTable::removeRows() {
    const QRect area = block();
    const int column = currentIndex().column();
    std::vector<int> rows;
    for (int row = area.top(); row <= area.bottom(); ++row)
        rows.push_back(row);
    model_->removeFamilies(rows);
    setCurrentIndex(model_->index(std::min(area.top(), model_->rowCount() - 1), column));
}

void FamilyTable::moveUp() {
    const QModelIndex here = currentIndex();
    if (here.isValid() && model_->moveFamily(here.row(), -1))
        setCurrentIndex(model_->index(here.row() - 1, here.column()));
}

void FamilyTable::moveDown() {
    const QModelIndex here = currentIndex();
    if (here.isValid() && model_->moveFamily(here.row(), 1))
        setCurrentIndex(model_->index(here.row() + 1, here.column()));
}

void FamilyTable::selectRows() {
    const QRect area = block();
    QItemSelection chosen;
    for (int row = area.top(); row <= area.bottom(); ++row)
        chosen.select(model_->index(row, 0), model_->index(row, 0));
    selectionModel()->select(chosen, QItemSelectionModel::Select);
}

void FamilyTable::joinColumns() {
    const QRect area = block();
    std::set<std::size_t> classes = header_->chosenClasses();
    for (int column = area.left(); classes.size() < 2 && column <= area.right(); ++column) {
        if (model_->kind(column) == ColumnKind::Class)
            classes.insert(static_cast<std::size_t>(column - 1));
    }
    if (classes.size() >= 2)
        Q_EMIT joinRequested({classes.begin(), classes.end()});
}

void FamilyTable::aside() {
    const QModelIndex here = currentIndex();
    const book::Family* shown = here.isValid() ? model_->family(here.row()) : nullptr;
    if (shown == nullptr || workbook_->readOnly())
        return;
    if (shown->set_aside)
        model_->setAside(here.row(), std::nullopt);
    else
        startReason();
}

void FamilyTable::startReason() {
    const QModelIndex here = currentIndex();
    const book::Family* shown = here.isValid() ? model_->family(here.row()) : nullptr;
    if (shown == nullptr)
        return;
    if (reason_ != nullptr)
        finishReason(false);
    reason_row_ = here.row();
    const QString before = shown->set_aside ? QString::fromStdString(*shown->set_aside) : QString();
    fitRows();
    reason_ = new QLineEdit(viewport());
    reason_->setObjectName("set-aside-reason");
    reason_->setAccessibleName(tr("Why %1 is set aside").arg(QString::fromStdString(shown->label)));
    reason_->setPlaceholderText(tr("why is it set aside?"));
    reason_->setFont(app::font(TextRole::Note));
    reason_->setFrame(false);
    reason_->setText(before);
    reason_->setGeometry(0, rowViewportPosition(reason_row_) + kRowHeight - 4, std::min(viewport()->width(), 420),
                         kBandHeight + 3);
    reason_->installEventFilter(this);
    reason_->show();
    reason_->setFocus();
}

void FamilyTable::finishReason(bool keep) {
    if (reason_ == nullptr)
        return;
    QLineEdit* editor = reason_;
    const int row = reason_row_;
    const QString reason = editor->text().trimmed();
    const bool focused = editor->hasFocus();
    reason_ = nullptr;
    reason_row_ = -1;
    editor->removeEventFilter(this);
    editor->hide();
    editor->deleteLater();
    if (keep && !reason.isEmpty())
        model_->setAside(row, reason);
    fitRows();
    if (focused)
        setFocus();
}

bool FamilyTable::eventFilter(QObject* object, QEvent* event) {
    if (object == nullptr || object != reason_)
        return QTableView::eventFilter(object, event);
    if (event->type() == QEvent::FocusOut) {
        finishReason(true);
        return false;
    }
    if (event->type() != QEvent::KeyPress)
        return false;
    switch (static_cast<QKeyEvent*>(event)->key()) { // NOLINT: the type was asked for above
    case Qt::Key_Return:
    case Qt::Key_Enter:
        if (reason_->text().trimmed().isEmpty())
            reason_->setPlaceholderText(tr("a reason is needed: why is it set aside?"));
        else
            finishReason(true);
        return true;
    case Qt::Key_Escape:
        finishReason(false);
        return true;
    default:
        return false;
    }
}

} // namespace filial::app
