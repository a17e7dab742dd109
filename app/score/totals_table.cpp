// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/score/totals_table.h"

#include <QHeaderView>
#include <QPainter>
#include <QScrollBar>
#include <QStyledItemDelegate>

#include "app/common/text.h"
#include "core/report/departure.h"

namespace filial::app {

namespace {

class TotalsDelegate : public QStyledItemDelegate {
public:
    using QStyledItemDelegate::QStyledItemDelegate;
    void paint(QPainter* painter, const QStyleOptionViewItem& option, const QModelIndex& index) const override {
        const bool first = index.row() == 0;
        const bool label = index.column() == 0;
        const bool count = index.data(Qt::UserRole).toBool();
        painter->save();
        painter->setFont(app::font(first ? (count ? TextRole::Count : TextRole::BodyBold) : TextRole::Body));
        painter->setPen(first && !index.data(Qt::UserRole + 1).toBool() ? tokens().ink : tokens().muted);
        const QRect inside = option.rect.adjusted(label ? 0 : space::kXs, 0, label ? 0 : -space::kS, 0);
        const int side = label ? Qt::AlignLeft : Qt::AlignRight;
        painter->drawText(inside, side | Qt::AlignVCenter, index.data().toString());
        painter->restore();
    }
};

} // namespace

TotalsModel::TotalsModel(ScoreView* view, FamilyModel* families, QObject* parent)
    : QAbstractTableModel(parent), view_(view), families_(families) {
    connect(view_, &ScoreView::changed, this, &TotalsModel::refresh);
    connect(families_, &FamilyModel::structureChanged, this, [this] {
        beginResetModel();
        endResetModel();
        refresh();
    });
    refresh();
}

int TotalsModel::rowCount(const QModelIndex& parent) const {
    return parent.isValid() ? 0 : 2;
}

int TotalsModel::columnCount(const QModelIndex& parent) const {
    return parent.isValid() ? 0 : families_->columnCount();
}

void TotalsModel::refresh() {
    const report::CrossAnalysis& analysis = view_->analysis();
    std::vector<double> raw;
    // Class by class also where classes are joined: the hypothesis gives each its share.
    if (analysis.totals && analysis.totals->classes.size() == families_->classCount()) {
        for (const fit::ClassResult& result : analysis.totals->classes)
            raw.push_back(result.expected);
    } else if (analysis.totals) {
        raw.assign(families_->classCount(), -1.0);
        for (const fit::ClassResult& result : analysis.totals->classes)
            raw[result.members.front()] = result.expected;
        expected_.assign(raw.begin(), raw.end());
        std::vector<double> only;
        std::vector<std::size_t> places;
        for (std::size_t i = 0; i < raw.size(); ++i) {
            if (raw[i] >= 0.0) {
                only.push_back(raw[i]);
                places.push_back(i);
            }
        }
        only = report::rounded_to_sum(only, 1);
        for (std::size_t i = 0; i < places.size(); ++i)
            expected_[places[i]] = only[i];
    }
    if (!analysis.totals || analysis.totals->classes.size() == families_->classCount())
        expected_ = report::rounded_to_sum(raw, 1);
    if (columnCount() > 0)
        Q_EMIT dataChanged(index(0, 0), index(1, columnCount() - 1));
}

QString TotalsModel::total(int column) const {
    const report::CrossAnalysis& analysis = view_->analysis();
    switch (families_->kind(column)) {
    case ColumnKind::Family:
        return view_->scope().isEmpty() ? tr("All families") : view_->scope();
    case ColumnKind::Class: {
        const auto phenotype = static_cast<std::size_t>(column - 1);
        return phenotype < analysis.column_totals.size() ? QString::number(analysis.column_totals[phenotype])
                                                         : QString();
    }
    case ColumnKind::NotScored:
        return QString::number(analysis.not_scored);
    case ColumnKind::Total:
        return QString::number(analysis.total);
    case ColumnKind::P:
        return analysis.totals && analysis.totals->chi_square && analysis.totals->chi_square->p
                   ? pText(analysis.totals->chi_square->p->p)
                   : QString();
    case ColumnKind::Sown:
    case ColumnKind::Emerged:
    case ColumnKind::Alive:
        break;
    }
    if (!analysis.sown_to_scored)
        return {};
    const auto& known = families_->kind(column) == ColumnKind::Sown      ? analysis.sown_to_scored->sown
                        : families_->kind(column) == ColumnKind::Emerged ? analysis.sown_to_scored->emerged
                                                                         : analysis.sown_to_scored->alive;
    return known ? QString::number(*known) : QString();
}

QString TotalsModel::expected(int column) const {
    if (families_->kind(column) == ColumnKind::Family)
        return tr("Expected");
    const auto place = static_cast<std::size_t>(column - 1);
    if (families_->kind(column) != ColumnKind::Class || place >= expected_.size() || expected_[place] < 0.0)
        return {};
    return fixedText(expected_[place], 1);
}

QVariant TotalsModel::data(const QModelIndex& index, int role) const {
    const ColumnKind kind = families_->kind(index.column());
    const QString text = role == Qt::DisplayRole || role == Qt::AccessibleTextRole
                             ? (index.row() == 0 ? total(index.column()) : expected(index.column()))
                             : QString();
    switch (role) {
    case Qt::DisplayRole:
        return text;
    case Qt::AccessibleTextRole:
        return text.isEmpty() ? tr("nothing") : text;
    case Qt::ToolTipRole: {
        const report::CrossAnalysis& analysis = view_->analysis();
        if (!analysis.totals)
            return {};
        if (kind == ColumnKind::P && index.row() == 0 && analysis.totals->chi_square && analysis.totals->chi_square->p)
            return fullText(analysis.totals->chi_square->p->p);
        const auto place = static_cast<std::size_t>(index.column() - 1);
        for (const fit::ClassResult& result : analysis.totals->classes) {
            if (kind == ColumnKind::Class && index.row() == 1 && result.members.front() == place)
                return fullText(result.expected);
        }
        return {};
    }
    case Qt::UserRole:
        return kind == ColumnKind::Class;
    case Qt::UserRole + 1:
        return kind == ColumnKind::NotScored || kind == ColumnKind::Sown || kind == ColumnKind::Emerged ||
               kind == ColumnKind::Alive;
    default:
        return {};
    }
}

TotalsTable::TotalsTable(ScoreView* view, FamilyTable* table, QWidget* parent) : QTableView(parent), table_(table) {
    setObjectName("totals-table");
    setAccessibleName(tr("Totals and expected counts"));
    setModel(new TotalsModel(view, table->families(), this));
    setItemDelegate(new TotalsDelegate(this));
    setFrameShape(QFrame::NoFrame);
    setShowGrid(false);
    setSelectionMode(NoSelection);
    setFocusPolicy(Qt::NoFocus);
    horizontalHeader()->hide();
    horizontalHeader()->setSectionResizeMode(QHeaderView::Fixed);
    horizontalHeader()->setMinimumSectionSize(28);
    verticalHeader()->hide();
    verticalHeader()->setSectionResizeMode(QHeaderView::Fixed);
    verticalHeader()->setDefaultSectionSize(kRowHeight);
    setHorizontalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
    setVerticalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
    setHorizontalScrollMode(ScrollPerPixel);
    viewport()->setAutoFillBackground(false);
    setFixedHeight(2 * kRowHeight);
    connect(table_->horizontalHeader(), &QHeaderView::sectionResized, this, [this] { follow(); });
    connect(table_->horizontalScrollBar(), &QScrollBar::valueChanged, horizontalScrollBar(), &QScrollBar::setValue);
}

void TotalsTable::follow() {
    for (int column = 0; column < model()->columnCount(); ++column) {
        setColumnHidden(column, table_->isColumnHidden(column));
        if (!table_->isColumnHidden(column) && columnWidth(column) != table_->columnWidth(column))
            setColumnWidth(column, table_->columnWidth(column));
    }
}

void TotalsTable::paintEvent(QPaintEvent* event) {
    QTableView::paintEvent(event);
    QPainter painter(viewport());
    const int length = std::min(viewport()->width(), horizontalHeader()->length());
    drawHairline(painter, QPointF(0, 0), QPointF(length, 0), tokens().muted);
}

} // namespace filial::app
