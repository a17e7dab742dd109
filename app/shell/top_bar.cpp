// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/shell/top_bar.h"

#include <algorithm>

#include <QHBoxLayout>
#include <QLabel>
#include <QMenu>
#include <QPainter>
#include <QPushButton>
#include <QTabBar>
#include <QToolButton>

#include "app/common/theme.h"

namespace filial::app {
namespace {

constexpr int kHeight = 48;

/// Three lines, drawn so that they follow the theme.
class MenuButton : public QToolButton {
public:
    using QToolButton::QToolButton;
    QSize sizeHint() const override { return {32, 32}; }

protected:
    void paintEvent(QPaintEvent* /*event*/) override {
        QPainter painter(this);
        painter.setRenderHint(QPainter::Antialiasing);
        if (underMouse() || isDown()) {
            painter.setPen(Qt::NoPen);
            painter.setBrush(tokens().selected);
            painter.drawRoundedRect(rect(), radius::kButton, radius::kButton);
        }
        painter.setPen(QPen(tokens().ink, 1.5, Qt::SolidLine, Qt::RoundCap));
        for (const double y : {11.0, 16.0, 21.0})
            painter.drawLine(QPointF(8.5, y), QPointF(23.5, y));
    }
};

} // namespace

TopBar::TopBar(QMenu* menu, QWidget* parent)
    : QWidget(parent), name_(new QLabel), tabs_(new QTabBar), saved_(new QLabel),
      report_(new QPushButton(tr("Report…"))), menu_(new MenuButton) {
    setFixedHeight(kHeight);
    auto* row = new QHBoxLayout(this);
    row->setContentsMargins(space::kL, 0, space::kL, 0);
    row->setSpacing(0);
    name_->setFont(app::font(TextRole::BodyBold));
    name_->setTextFormat(Qt::PlainText);
    tabs_->setDrawBase(false);
    tabs_->setExpanding(false);
    tabs_->setAccessibleName(tr("Desks"));
    setInk(saved_, Ink::Muted);
    saved_->setMinimumWidth(0);
    report_->setToolTip(tr("Write the report of this cross (Ctrl+P)"));
    report_->setWhatsThis(tr(
        "Writes a page with the counts, the tests, the methods and the cautions of this cross, to keep or to print."));
    menu_->setPopupMode(QToolButton::InstantPopup);
    menu_->setMenu(menu);
    menu_->setFocusPolicy(Qt::TabFocus);
    menu_->setAccessibleName(tr("Menu"));
    menu_->setObjectName(QStringLiteral("menu button"));
    menu_->setToolTip(tr("Menu (F10)"));
    row->addWidget(name_);
    row->addWidget(tabs_);
    row->addStretch(1);
    row->addWidget(saved_);
    row->addSpacing(space::kL);
    row->addWidget(report_);
    row->addSpacing(space::kS);
    row->addWidget(menu_);
    connect(tabs_, &QTabBar::currentChanged, this, &TopBar::deskChosen);
    connect(report_, &QPushButton::clicked, this, &TopBar::reportWanted);
}

void TopBar::setName(const QString& name, const QString& tip) {
    name_->setProperty("whole", name);
    name_->setToolTip(tip);
    name_->setAccessibleName(name);
    setLeftWidth(name_->property("left").toInt());
}

void TopBar::setDesks(const QStringList& names) {
    const QSignalBlocker quiet(tabs_);
    while (tabs_->count() > 0)
        tabs_->removeTab(0);
    for (const QString& name : names)
        tabs_->addTab(name);
}

void TopBar::setDesk(int index) {
    tabs_->setCurrentIndex(index);
}

void TopBar::setSavedState(const QString& state, const QString& tip) {
    saved_->setText(state);
    saved_->setToolTip(tip);
}

QString TopBar::savedState() const {
    return saved_->text();
}

void TopBar::setBookOpen(bool open) {
    tabs_->setVisible(open);
    saved_->setVisible(open);
    report_->setVisible(open);
}

void TopBar::setLeftWidth(int width) {
    // On a narrow window the outline is a rail; the name still needs room.
    const int room = std::max(width, 120) - space::kL;
    name_->setProperty("left", width);
    name_->setFixedWidth(room);
    name_->setText(
        name_->fontMetrics().elidedText(name_->property("whole").toString(), Qt::ElideRight, room - space::kS));
}

void TopBar::paintEvent(QPaintEvent* /*event*/) {
    QPainter painter(this);
    painter.fillRect(rect(), tokens().surface);
    painter.fillRect(0, height() - 1, width(), 1, tokens().rule);
}

} // namespace filial::app
