// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/score/family_table.h"

#include <algorithm>

#include <QAction>
#include <QContextMenuEvent>
#include <QKeyEvent>
#include <QMenu>
#include <QPainter>
#include <QScrollBar>

#include "app/common/help_page.h"
#include "app/score/cell_delegate.h"

namespace filial::app {

FamilyTable::FamilyTable(Workbook* workbook, FamilyModel* model, QWidget* parent)
    : QTableView(parent), workbook_(workbook), model_(model), header_(new ClassHeader(workbook, model, this)) {
    setObjectName("family-table");
    setAccessibleName(tr("Families and their counts"));
    setProperty(kHelpPage, "keys.md");
    setHorizontalHeader(header_);
    setModel(model_);
    setItemDelegate(new CellDelegate(this));
    setFrameShape(QFrame::NoFrame);
    setShowGrid(false);
    setEditTriggers(AnyKeyPressed | EditKeyPressed | DoubleClicked);
    setSelectionMode(ExtendedSelection);
    setTabKeyNavigation(false);
    setHorizontalScrollMode(ScrollPerPixel);
    setVerticalScrollMode(ScrollPerPixel);
    setCornerButtonEnabled(false);
    viewport()->setAutoFillBackground(false);
    verticalHeader()->hide();
    verticalHeader()->setSectionResizeMode(QHeaderView::Fixed);
    verticalHeader()->setMinimumSectionSize(14);
    verticalHeader()->setDefaultSectionSize(kRowHeight);
    addActions();
    showSownColumns(false);
    connect(model_, &FamilyModel::bandsChanged, this, &FamilyTable::fitRows);
    connect(model_, &FamilyModel::structureChanged, this, [this] {
        showSownColumns(sown_);
        header_->clearChosen();
        fitRows();
    });
    connect(model_, &QAbstractItemModel::rowsInserted, this, &FamilyTable::heightChanged);
    connect(model_, &QAbstractItemModel::rowsRemoved, this, &FamilyTable::heightChanged);
    connect(workbook_, &Workbook::analysisChanged, header_, &ClassHeader::refresh);
}

void FamilyTable::focusInEvent(QFocusEvent* event) {
    // Who comes here by key can count at once: the first class of the first family.
    if (!currentIndex().isValid() && model_->columnCount() > 1)
        setCurrentIndex(model_->index(0, 1));
    QTableView::focusInEvent(event);
}

void FamilyTable::showSownColumns(bool show) {
    sown_ = show;
    for (const ColumnKind kind : {ColumnKind::Sown, ColumnKind::Emerged, ColumnKind::Alive}) {
        if (const int column = model_->columnOf(kind); column >= 0)
            setColumnHidden(column, !show);
    }
}

bool FamilyTable::sownColumnsShown() const {
    return sown_;
}

void FamilyTable::layOutColumns(int width) {
    if (model_->columnCount() == 0)
        return;
    const QFontMetrics small(app::font(TextRole::Label));
    const QFontMetrics body(app::font(TextRole::Body));
    int family = 84;
    for (const book::Id& id : model_->familyIds()) {
        if (const book::Family* one = model_->family(model_->rowOf(id)); one != nullptr && family < 150)
            family = std::max(family, body.horizontalAdvance(QString::fromStdString(one->label)) + space::kM);
        if (model_->familyIds().size() > 200)
            break;
    }
    family = std::min(family, 150);
    int left = width;
    width_ = width;
    for (int column = 0; column < model_->columnCount(); ++column) {
        const ColumnKind kind = model_->kind(column);
        if (kind == ColumnKind::Class || isColumnHidden(column))
            continue;
        const QString label = model_->headerData(column, Qt::Horizontal, Qt::DisplayRole).toString();
        const int own = std::max(small.horizontalAdvance(label) + 2 * space::kS, kind == ColumnKind::P ? 54 : 48);
        setColumnWidth(column, kind == ColumnKind::Family ? family : own);
        left -= columnWidth(column);
    }
    const int classes = static_cast<int>(model_->classCount());
    const int share = std::clamp(left / classes, 60, 200);
    const int rest = share < 200 ? std::max(0, left - share * classes) : 0;
    for (int i = 0; i < classes; ++i)
        setColumnWidth(1 + i, share + (i < rest ? 1 : 0));
    updateGeometries();
}

int FamilyTable::contentHeight() const {
    const bool bar = header_->length() > width_;
    return header_->sizeHint().height() + verticalHeader()->length() +
           (bar ? horizontalScrollBar()->sizeHint().height() : 0);
}

void FamilyTable::fitRows() {
    bool changed = false;
    for (int row = 0; row < model_->rowCount(); ++row) {
        const bool band = row == reason_row_ || !model_->index(row, 0).data(FamilyModel::BandRole).toString().isEmpty();
        const int height = kRowHeight + (band ? kBandHeight : 0);
        if (rowHeight(row) != height) {
            setRowHeight(row, height);
            changed = true;
        }
    }
    if (changed)
        Q_EMIT heightChanged();
}

void FamilyTable::paintEvent(QPaintEvent* event) {
    QTableView::paintEvent(event);
    if (model_->rowCount() == 0)
        return;
    QPainter painter(viewport());
    painter.setFont(app::font(TextRole::Note));
    const int bottom = viewport()->height();
    for (int row = std::max(0, rowAt(0)); row < model_->rowCount() && rowViewportPosition(row) < bottom; ++row) {
        const QModelIndex at = model_->index(row, 0);
        const QString band = at.data(FamilyModel::BandRole).toString();
        if (band.isEmpty() || row == reason_row_)
            continue;
        painter.setPen(at.data(FamilyModel::BandIsErrorRole).toBool() ? tokens().error : tokens().muted);
        painter.fillRect(QRect(0, rowViewportPosition(row) + kRowHeight, viewport()->width(), kBandHeight),
                         tokens().background);
        const QRect rect(0, rowViewportPosition(row) + kRowHeight - 2, viewport()->width() - space::kS, kBandHeight);
        painter.drawText(rect, Qt::AlignLeft | Qt::AlignVCenter,
                         painter.fontMetrics().elidedText(band, Qt::ElideRight, rect.width()));
    }
}

void FamilyTable::step(int rows, int columns) {
    const QModelIndex here = currentIndex();
    int row = here.isValid() ? here.row() : 0;
    int column = here.isValid() ? here.column() : 0;
    const std::vector<int> order = visibleColumns(0);
    if (order.empty())
        return;
    if (columns != 0) {
        if (!tab_start_)
            tab_start_ = column;
        auto place = static_cast<int>(std::find(order.begin(), order.end(), column) - order.begin()) + columns;
        if (place >= static_cast<int>(order.size())) {
            place = 0;
            ++row;
            tab_start_.reset();
        } else if (place < 0) {
            place = static_cast<int>(order.size()) - 1;
            --row;
        }
        column = order[static_cast<std::size_t>(place)];
    }
    row = std::clamp(row + rows, 0, model_->rowCount() - 1);
    setCurrentIndex(model_->index(row, column));
    scrollTo(currentIndex());
}

void FamilyTable::enter() {
    const QModelIndex here = currentIndex();
    if (!here.isValid())
        return;
    const int column = tab_start_.value_or(here.column());
    tab_start_.reset();
    if (model_->isNextFamily(here.row())) {
        model_->insertFamily(here.row());
        setCurrentIndex(model_->index(here.row(), column));
        return;
    }
    setCurrentIndex(model_->index(here.row() + 1, column));
    scrollTo(currentIndex());
}

void FamilyTable::keyPressEvent(QKeyEvent* event) {
    const bool plain = (event->modifiers() & ~(Qt::KeypadModifier | Qt::ShiftModifier)) == Qt::NoModifier;
    switch (event->key()) {
    case Qt::Key_Return:
    case Qt::Key_Enter:
        if (plain)
            return enter();
        break;
    case Qt::Key_Tab:
    case Qt::Key_Backtab:
        return step(0, event->key() == Qt::Key_Tab ? 1 : -1);
    case Qt::Key_Escape:
        clearSelection();
        header_->clearChosen();
        workbook_->setSelectedFamilies({});
        return;
    default:
        break;
    }
    if (event->key() == Qt::Key_Up || event->key() == Qt::Key_Down || event->key() == Qt::Key_Left ||
        event->key() == Qt::Key_Right)
        tab_start_.reset();
    QTableView::keyPressEvent(event);
}

bool FamilyTable::focusNextPrevChild(bool next) {
    // Tab walks the cells; past the first or last one it leaves the table.
    const QModelIndex here = currentIndex();
    const std::vector<int> order = visibleColumns(0);
    if (order.empty() || !here.isValid())
        return QTableView::focusNextPrevChild(next);
    const bool leaving = next ? here.row() == model_->rowCount() - 1 && here.column() == order.back()
                              : here.row() == 0 && here.column() == order.front();
    return leaving && QTableView::focusNextPrevChild(next);
}

void FamilyTable::mouseDoubleClickEvent(QMouseEvent* event) {
    const int row = rowAt(event->position().toPoint().y());
    const book::Family* shown = model_->family(row);
    if (shown != nullptr && shown->set_aside && event->position().y() > rowViewportPosition(row) + kRowHeight) {
        setCurrentIndex(model_->index(row, 0));
        startReason();
        return;
    }
    QTableView::mouseDoubleClickEvent(event);
}

void FamilyTable::contextMenuEvent(QContextMenuEvent* event) {
    QMenu menu(this);
    menu.addActions(actions_);
    menu.exec(event->globalPos());
}

void FamilyTable::selectionChanged(const QItemSelection& selected, const QItemSelection& deselected) {
    QTableView::selectionChanged(selected, deselected);
    std::vector<book::Id> chosen;
    for (const QModelIndex& at : selectionModel()->selectedIndexes()) {
        if (at.column() == 0 && !model_->isNextFamily(at.row()))
            chosen.push_back(model_->familyIds()[static_cast<std::size_t>(at.row())]);
    }
    if (chosen != workbook_->selectedFamilies())
        workbook_->setSelectedFamilies(std::move(chosen));
}

bool FamilyTable::edit(const QModelIndex& index, EditTrigger trigger, QEvent* event) {
    if (state() != EditingState)
        typed_over_ = trigger == AnyKeyPressed;
    return QTableView::edit(index, trigger, event);
}

void FamilyTable::closeEditor(QWidget* editor, QAbstractItemDelegate::EndEditHint hint) {
    if (hint == QAbstractItemDelegate::RevertModelCache)
        workbook_->setPreview({});
    QTableView::closeEditor(editor, hint);
}

std::vector<int> FamilyTable::visibleColumns(int from) const {
    std::vector<int> columns;
    for (int column = from; column < model_->columnCount(); ++column) {
        if (!isColumnHidden(column))
            columns.push_back(column);
    }
    return columns;
}

} // namespace filial::app
