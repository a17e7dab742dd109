// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/shell/drawer.h"

#include <algorithm>

#include <QPainter>
#include <QPushButton>
#include <QVBoxLayout>

#include "app/common/style_parts.h"
#include "app/common/theme.h"

namespace filial::app {
namespace {

constexpr int kLine = 44;
constexpr int kOpenHeight = 300;

/// The verdict on one line with a chevron that points where the drawer goes.
class Handle : public QPushButton {
public:
    using QPushButton::QPushButton;
    bool open = false;
    QString line;

protected:
    void paintEvent(QPaintEvent* /*event*/) override {
        QPainter painter(this);
        painter.fillRect(rect(), parts::tinted(tokens().surface, underMouse() ? 0.05 : 0.0));
        painter.fillRect(0, 0, width(), 1, tokens().rule);
        parts::chevron(painter, QRect(space::kL, 0, 16, height()), open ? 0 : 180, tokens().muted);
        painter.setFont(app::font(TextRole::BodyBold));
        painter.setPen(tokens().ink);
        const QRect body = rect().adjusted(44, 0, -space::kL, 0);
        painter.drawText(body, Qt::AlignVCenter | Qt::AlignLeft,
                         painter.fontMetrics().elidedText(line, Qt::ElideRight, body.width()));
        if (hasFocus())
            parts::focusRing(painter, QRectF(rect()).adjusted(3.0, 3.0, -3.0, -3.0), radius::kCell);
    }
};

} // namespace

Drawer::Drawer(QWidget* parent) : QWidget(parent), handle_(new Handle(this)), box_(new QVBoxLayout(this)) {
    box_->setContentsMargins(0, 0, 0, 0);
    box_->setSpacing(0);
    handle_->setFixedHeight(kLine);
    handle_->setSizePolicy(QSizePolicy::Ignored, QSizePolicy::Fixed);
    handle_->setToolTip(tr("Show or fold what the counts mean"));
    box_->addWidget(handle_);
    connect(handle_, &QPushButton::clicked, this, [this] { setOpen(!open_); });
    dress();
}

void Drawer::setLine(const QString& verdict) {
    line_ = verdict;
    dress();
}

QString Drawer::line() const {
    return line_;
}

void Drawer::take(QWidget* column) {
    column_ = column;
    box_->addWidget(column, 1);
    setOpen(open_);
}

void Drawer::setOpen(bool open) {
    open_ = open;
    if (column_ != nullptr)
        column_->setVisible(open);
    // In a low window it leaves room for the totals above it.
    setFixedHeight(open ? std::clamp(window()->height() * 2 / 5, kLine + 100, kOpenHeight) : kLine);
    dress();
}

void Drawer::dress() {
    auto* handle = static_cast<Handle*>(handle_);
    handle->open = open_;
    handle->line = line_.isEmpty() ? tr("What the counts mean") : line_;
    handle->setAccessibleName(handle->line);
    handle->setAccessibleDescription(open_ ? tr("open; press to fold") : tr("folded; press to open"));
    handle->update();
}

void Drawer::paintEvent(QPaintEvent* /*event*/) {
    QPainter(this).fillRect(rect(), tokens().surface);
}

} // namespace filial::app
