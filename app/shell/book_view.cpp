// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/shell/book_view.h"

#include <QApplication>
#include <QGraphicsOpacityEffect>
#include <QLabel>
#include <QListView>
#include <QPushButton>
#include <QScrollArea>
#include <QSettings>
#include <QSplitter>
#include <QStackedWidget>
#include <QVBoxLayout>

#include "app/common/theme.h"
#include "app/shell/cross_details.h"
#include "app/shell/desks.h"
#include "app/shell/drawer.h"
#include "app/shell/outline.h"

namespace filial::app {
namespace {

constexpr double kMuted = 0.5;
constexpr int kRailFrom = 1120;  // narrower: the outline is a rail
constexpr int kDrawerFrom = 900; // narrower: the right column is a drawer
constexpr int kRail = 48, kLeft = 212, kLeftMin = 168, kLeftMax = 320;
constexpr int kRight = 330, kRightNarrow = 280, kRightMax = 400, kMiddleMin = 560;

} // namespace

BookView::BookView(Workbook* workbook, QWidget* parent)
    : QWidget(parent), workbook_(workbook), desks_(makeDesks(workbook, this)), outline_(new Outline(workbook)),
      splitter_(new QSplitter(Qt::Horizontal)), middle_(new QStackedWidget), empty_(emptyPage()),
      right_(new QScrollArea), centre_(new QWidget), drawer_(new Drawer), details_(new CrossDetails(workbook)) {
    auto* box = new QVBoxLayout(this);
    box->setContentsMargins(0, 0, 0, 0);
    box->addWidget(splitter_);
    auto* column = new QVBoxLayout(centre_);
    column->setContentsMargins(0, 0, 0, 0);
    column->setSpacing(0);
    column->addWidget(middle_, 1);
    column->addWidget(drawer_);
    for (Desk* one : desks_) {
        middle_->addWidget(one->middle());
        connect(one, &Desk::verdictLineChanged, this, [this, one] {
            if (one == desk())
                drawer_->setLine(one->verdictLine());
        });
    }
    middle_->addWidget(empty_);
    middle_->addWidget(details_);
    right_->setWidgetResizable(true);
    right_->setFrameShape(QFrame::NoFrame);
    right_->setHorizontalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
    right_->setBackgroundRole(QPalette::Base);
    right_->setAccessibleName(tr("What it means"));
    splitter_->setChildrenCollapsible(false);
    splitter_->addWidget(outline_);
    splitter_->addWidget(centre_);
    splitter_->addWidget(right_);
    splitter_->setStretchFactor(1, 1);
    centre_->setMinimumWidth(kMiddleMin);
    connect(splitter_, &QSplitter::splitterMoved, this, &BookView::keepSizes);
    connect(outline_, &Outline::newCrossWanted, this, &BookView::newCrossWanted);
    connect(outline_, &Outline::detailsWanted, this, &BookView::showDetails);
    connect(details_, &CrossDetails::left, this, &BookView::leaveDetails);
    connect(workbook_, &Workbook::bookChanged, this, &BookView::followCross);
    connect(workbook_, &Workbook::crossChanged, this, &BookView::followCross);
    // What is being worked out anew stays on the screen, muted.
    auto* muted = new QGraphicsOpacityEffect(right_);
    muted->setOpacity(kMuted);
    muted->setEnabled(false);
    right_->setGraphicsEffect(muted);
    connect(workbook_, &Workbook::busyChanged, muted, &QGraphicsEffect::setEnabled);
    showDesk(0);
}

BookView::~BookView() = default;

QWidget* BookView::emptyPage() {
    auto* page = new QWidget;
    auto* box = new QVBoxLayout(page);
    box->addStretch(1);
    auto* sentence = new QLabel(tr("This book has no cross yet."));
    sentence->setFont(app::font(TextRole::Sentence));
    sentence->setAlignment(Qt::AlignCenter);
    auto* button = new QPushButton(tr("Describe a cross…"));
    setLook(button, look::kPrimary);
    connect(button, &QPushButton::clicked, this, &BookView::newCrossWanted);
    box->addWidget(sentence);
    box->addSpacing(space::kL);
    box->addWidget(button, 0, Qt::AlignHCenter);
    box->addStretch(2);
    return page;
}

Desk* BookView::desk() const {
    return current_ >= 0 && current_ < desks_.size() ? desks_[current_] : nullptr;
}

void BookView::showDesk(int index) {
    if (index < 0 || index >= desks_.size())
        return;
    if (index != current_) {
        current_ = index;
        if (QWidget* before = right_->takeWidget())
            before->setParent(nullptr);
        QWidget* column = desks_[index]->right();
        right_->setWidget(column);
        column->setVisible(true);
        drawer_->setLine(desks_[index]->verdictLine());
    }
    followCross();
}

void BookView::followCross() {
    const bool any = workbook_->currentCross() != nullptr;
    if (any && middle_->currentWidget() == details_)
        return;
    middle_->setCurrentWidget(any ? desk()->middle() : empty_);
    right_->setVisible(any && (shape_ != Shape::Drawer || drawer_->isOpen()));
    drawer_->setVisible(any && shape_ == Shape::Drawer);
}

void BookView::showDetails() {
    if (workbook_->currentCross() == nullptr)
        return;
    details_->load();
    middle_->setCurrentWidget(details_);
    details_->setFocus();
}

void BookView::leaveDetails() {
    middle_->setCurrentWidget(desk()->middle());
    followCross();
    desk()->middle()->setFocus();
}

QWidget* BookView::rightColumn() const {
    return right_;
}

int BookView::leftWidth() const {
    return outline_->width();
}

void BookView::nextPane() {
    QList<QWidget*> panes{outline_, middle_->currentWidget()};
    if (right_->isVisible())
        panes << right_;
    qsizetype at = -1;
    for (qsizetype i = 0; i < panes.size(); ++i)
        if (QWidget* focus = QApplication::focusWidget();
            focus != nullptr && (focus == panes[i] || panes[i]->isAncestorOf(focus)))
            at = i;
    QWidget* next = panes[(at + 1) % panes.size()];
    if (next == outline_)
        next = outline_->list();
    QWidget* target = next;
    if (target->focusPolicy() == Qt::NoFocus || target->focusProxy() != nullptr) {
        for (QWidget* inside : next->findChildren<QWidget*>())
            if ((inside->focusPolicy() & Qt::TabFocus) != 0 && inside->isVisible() && inside->isEnabled()) {
                target = inside;
                break;
            }
    }
    target->setFocus(Qt::TabFocusReason);
}

void BookView::resizeEvent(QResizeEvent* event) {
    QWidget::resizeEvent(event);
    const Shape shape = width() < kDrawerFrom ? Shape::Drawer : width() < kRailFrom ? Shape::Rail : Shape::Wide;
    if (!arranged_ || shape != shape_)
        arrange(shape);
    Q_EMIT leftWidthChanged(leftWidth());
}

void BookView::arrange(Shape shape) {
    arranged_ = true;
    shape_ = shape;
    const bool wide = shape == Shape::Wide;
    const QSettings settings;
    outline_->setRail(!wide);
    outline_->setMinimumWidth(wide ? kLeftMin : kRail);
    outline_->setMaximumWidth(wide ? kLeftMax : kRail);
    if (shape == Shape::Drawer) {
        right_->setMinimumWidth(0);
        right_->setMaximumWidth(QWIDGETSIZE_MAX);
        drawer_->take(right_);
    } else {
        splitter_->addWidget(right_);
        right_->setMinimumWidth(kRightNarrow);
        right_->setMaximumWidth(kRightMax);
    }
    followCross();
    layout()->activate();
    const int left = wide ? settings.value(QStringLiteral("shell/left"), kLeft).toInt() : kRail;
    const int right = wide ? settings.value(QStringLiteral("shell/right"), kRight).toInt() : kRightNarrow;
    if (shape == Shape::Drawer)
        splitter_->setSizes({left, width() - left - 1});
    else
        splitter_->setSizes({left, width() - left - right - 2, right});
}

void BookView::keepSizes() {
    Q_EMIT leftWidthChanged(leftWidth());
    if (shape_ != Shape::Wide)
        return;
    QSettings settings;
    settings.setValue(QStringLiteral("shell/left"), outline_->width());
    settings.setValue(QStringLiteral("shell/right"), right_->width());
}

} // namespace filial::app
