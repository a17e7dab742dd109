// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/shell/outline.h"

#include <algorithm>

#include <QAction>
#include <QContextMenuEvent>
#include <QLabel>
#include <QListView>
#include <QMenu>
#include <QPainter>
#include <QPushButton>
#include <QStyledItemDelegate>
#include <QVBoxLayout>

#include "app/common/style_parts.h"
#include "app/common/theme.h"
#include "app/shell/cross_acts.h"

namespace filial::app {
namespace {

constexpr int kCrossRow = 32, kRailRow = 44;
constexpr int kListStretch = 1000; // the list takes what room it needs, the space below the rest

class CrossDelegate : public QStyledItemDelegate {
public:
    using QStyledItemDelegate::QStyledItemDelegate;
    bool rail = false;

    QSize sizeHint(const QStyleOptionViewItem& /*option*/, const QModelIndex& /*index*/) const override {
        return {48, rail ? kRailRow : kCrossRow};
    }

    void paint(QPainter* painter, const QStyleOptionViewItem& option, const QModelIndex& index) const override {
        const Tokens& t = tokens();
        const QRect r = option.rect;
        const bool chosen = (option.state & QStyle::State_Selected) != 0;
        painter->save();
        if (chosen) {
            painter->fillRect(r, t.selected);
            painter->fillRect(r.left(), r.top(), 3, r.height(), t.accent);
        } else if ((option.state & QStyle::State_MouseOver) != 0) {
            painter->fillRect(r, parts::tinted(t.background, 0.05));
        }
        if (rail)
            paintRail(*painter, r, chosen, index);
        else
            paintRow(*painter, r, chosen, index);
        if ((option.state & QStyle::State_HasFocus) != 0 && chosen)
            parts::focusRing(*painter, QRectF(r).adjusted(5.0, 2.0, -3.0, -2.0), radius::kCell);
        painter->restore();
    }

private:
    static void paintRow(QPainter& painter, const QRect& r, bool chosen, const QModelIndex& index) {
        const QString families = index.data(CrossList::FamiliesRole).toString();
        painter.setFont(app::font(TextRole::Note));
        painter.setPen(chosen ? tokens().ink : tokens().muted);
        const QRect body = r.adjusted(space::kL, 0, -space::kL, 0);
        painter.drawText(body, Qt::AlignRight | Qt::AlignVCenter, families);
        const int room = body.width() - painter.fontMetrics().horizontalAdvance(families) - space::kS;
        painter.setFont(app::font(chosen ? TextRole::BodyBold : TextRole::Body));
        painter.setPen(tokens().ink);
        const QString name = painter.fontMetrics().elidedText(index.data().toString(), Qt::ElideMiddle, room);
        painter.drawText(body, Qt::AlignLeft | Qt::AlignVCenter, name);
    }
    static void paintRail(QPainter& painter, const QRect& r, bool chosen, const QModelIndex& index) {
        painter.setFont(app::font(TextRole::Label));
        painter.setPen(chosen ? tokens().ink : tokens().muted);
        painter.drawText(r, Qt::AlignCenter, index.data(CrossList::ShortRole).toString());
    }
};

} // namespace

CrossList::CrossList(Workbook* workbook, QObject* parent)
    : QAbstractListModel(parent), workbook_(workbook), rows_(static_cast<int>(workbook->book().crosses.size())) {
    connect(workbook, &Workbook::bookChanged, this, &CrossList::follow);
}

void CrossList::follow() {
    const int rows = static_cast<int>(workbook_->book().crosses.size());
    if (rows == rows_) {
        if (rows > 0)
            Q_EMIT dataChanged(index(0), index(rows - 1));
        return;
    }
    beginResetModel();
    rows_ = rows;
    endResetModel();
}

int CrossList::rowCount(const QModelIndex& parent) const {
    return parent.isValid() ? 0 : rows_;
}

QVariant CrossList::data(const QModelIndex& index, int role) const {
    const auto& crosses = workbook_->book().crosses;
    if (!index.isValid() || static_cast<std::size_t>(index.row()) >= crosses.size())
        return {};
    const book::Cross& cross = crosses[static_cast<std::size_t>(index.row())];
    const QString name = QString::fromStdString(cross.name);
    const int families = static_cast<int>(cross.families.size());
    switch (role) {
    case Qt::DisplayRole:
        return name;
    case Qt::ToolTipRole:
    case Qt::AccessibleTextRole:
        return families == 1 ? tr("%1, 1 family").arg(name) : tr("%1, %2 families").arg(name).arg(families);
    case FamiliesRole:
        return tr("%1 fam.").arg(families);
    case ShortRole: {
        const QString generation = QString::fromStdString(cross.generation);
        if (!generation.isEmpty() && generation.size() <= 3)
            return QStringLiteral("%1\n%2").arg(generation).arg(index.row() + 1);
        return QStringLiteral("%1\n%2").arg(name.left(3)).arg(index.row() + 1);
    }
    default:
        return {};
    }
}

Outline::Outline(Workbook* workbook, QWidget* parent)
    : QWidget(parent), workbook_(workbook), crosses_(new CrossList(workbook, this)),
      heading_(new QLabel(tr("Crosses"))), list_(new QListView), fresh_(new QPushButton(tr("New cross…"))),
      details_(new QPushButton(tr("Details…"))) {
    auto* column = new QVBoxLayout(this);
    column->setContentsMargins(0, space::kL, 0, space::kL);
    column->setSpacing(0);
    heading_->setFont(app::font(TextRole::Label));
    heading_->setContentsMargins(space::kL, 0, space::kL, space::kS);
    setInk(heading_, Ink::Muted);
    list_->setModel(crosses_);
    list_->setItemDelegate(new CrossDelegate(list_));
    list_->setFrameShape(QFrame::NoFrame);
    list_->setMouseTracking(true);
    list_->viewport()->setAutoFillBackground(false);
    list_->setHorizontalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
    list_->setAccessibleName(tr("Crosses of the book"));
    list_->setWhatsThis(
        tr("The crosses of this book. Arrow keys choose one; Alt+Up and Alt+Down move it; F2 opens its details."));
    list_->installEventFilter(this);
    for (QPushButton* button : {fresh_, details_}) {
        setLook(button, look::kQuiet);
        button->setCursor(Qt::PointingHandCursor);
    }
    fresh_->setToolTip(tr("Add a cross to this book"));
    details_->setToolTip(tr("Name, generation, parents, dates and notes of the chosen cross (F2)"));
    column->addWidget(heading_);
    column->addWidget(list_, kListStretch);
    auto* row = new QBoxLayout(QBoxLayout::TopToBottom);
    row->setContentsMargins(space::kXs, space::kS, space::kXs, 0);
    row->setSpacing(space::kXs);
    row->addWidget(fresh_, 0, Qt::AlignLeft);
    row->addWidget(details_, 0, Qt::AlignLeft);
    column->addLayout(row);
    column->addStretch(1);
    connect(fresh_, &QPushButton::clicked, this, &Outline::newCrossWanted);
    connect(details_, &QPushButton::clicked, this, &Outline::detailsWanted);
    connect(list_->selectionModel(), &QItemSelectionModel::currentChanged, this, [this](const QModelIndex& now) {
        const auto& crosses = workbook_->book().crosses;
        if (now.isValid() && static_cast<std::size_t>(now.row()) < crosses.size())
            workbook_->setCurrentCross(crosses[static_cast<std::size_t>(now.row())].id);
    });
    connect(workbook_, &Workbook::bookChanged, this, &Outline::chooseCurrent);
    connect(workbook_, &Workbook::crossChanged, this, &Outline::chooseCurrent);
    connect(list_, &QListView::doubleClicked, this, &Outline::detailsWanted);
    setAccessibleName(tr("Outline"));
    chooseCurrent();
}

void Outline::chooseCurrent() {
    const auto& crosses = workbook_->book().crosses;
    const QSignalBlocker quiet(list_->selectionModel());
    for (std::size_t i = 0; i < crosses.size(); ++i)
        if (crosses[i].id == workbook_->currentCrossId())
            list_->setCurrentIndex(crosses_->index(static_cast<int>(i)));
    details_->setVisible(!crosses.empty());
    fitList();
    list_->viewport()->update();
}

void Outline::fitList() {
    const int row = static_cast<CrossDelegate*>(list_->itemDelegate())->rail ? kRailRow : kCrossRow;
    list_->setMinimumHeight(row);
    list_->setMaximumHeight(std::max(1, crosses_->rowCount()) * row);
}

void Outline::setRail(bool rail) {
    static_cast<CrossDelegate*>(list_->itemDelegate())->rail = rail;
    fitList();
    heading_->setVisible(!rail);
    fresh_->setText(rail ? QStringLiteral("+") : tr("New cross…"));
    fresh_->setAccessibleName(rail ? tr("+ New cross…") : QString());
    details_->setText(rail ? QStringLiteral("…") : tr("Details…"));
    details_->setAccessibleName(rail ? tr("… Details of the cross") : QString());
    list_->doItemsLayout();
    list_->viewport()->update();
}

void Outline::paintEvent(QPaintEvent* /*event*/) {
    QPainter(this).fillRect(rect(), tokens().background);
}

void Outline::contextMenuEvent(QContextMenuEvent* event) {
    if (workbook_->currentCross() == nullptr)
        return;
    QMenu menu(this);
    menu.addAction(tr("Details…"), this, &Outline::detailsWanted);
    menu.addSeparator();
    addCrossActs(menu, workbook_);
    menu.exec(event->globalPos());
}

bool Outline::eventFilter(QObject* watched, QEvent* event) {
    if (watched != list_ || event->type() != QEvent::KeyPress)
        return QWidget::eventFilter(watched, event);
    auto* key = static_cast<QKeyEvent*>(event);
    if (key->key() == Qt::Key_F2) {
        Q_EMIT detailsWanted();
        return true;
    }
    const bool alt = key->modifiers().testFlag(Qt::AltModifier);
    if (alt && (key->key() == Qt::Key_Up || key->key() == Qt::Key_Down)) {
        moveCross(workbook_, key->key() == Qt::Key_Up ? -1 : 1);
        return true;
    }
    if (key->key() == Qt::Key_Delete) {
        removeCross(workbook_);
        return true;
    }
    return QWidget::eventFilter(watched, event);
}

} // namespace filial::app
