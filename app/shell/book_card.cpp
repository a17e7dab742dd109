// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/shell/book_card.h"

#include <QPainter>

#include "app/common/class_style.h"
#include "app/common/style_parts.h"
#include "app/common/theme.h"

namespace filial::app {
namespace {
constexpr int kPlain = 58, kBand = 12, kBanded = 82;
}

BookCard::BookCard(const QString& title, const QString& about, QWidget* parent)
    : QAbstractButton(parent), about_(about) {
    setText(title);
    setAccessibleName(title);
    setAccessibleDescription(about);
    setCursor(Qt::PointingHandCursor);
    setAttribute(Qt::WA_Hover);
    setFocusPolicy(Qt::StrongFocus);
    setSizePolicy(QSizePolicy::Expanding, QSizePolicy::Fixed);
}

void BookCard::setCross(const book::Cross& cross) {
    cross_.traits = cross.traits;
    cross_.classes = cross.classes;
    shares_.assign(cross.classes.size(), 0.0);
    double all = 0.0;
    for (const book::Family& family : cross.families)
        for (std::size_t i = 0; i < shares_.size(); ++i)
            if (const book::Cell cell = family.cell(ClassIndex{i}); cell.state == book::CellState::Number) {
                const auto plants = static_cast<double>(cell.count.value());
                shares_[i] += plants;
                all += plants;
            }
    if (all <= 0.0)
        shares_.clear();
    for (double& share : shares_)
        share /= all;
    updateGeometry();
}

QSize BookCard::sizeHint() const {
    return {360, shares_.empty() ? kPlain : kBanded};
}

void BookCard::paintEvent(QPaintEvent* /*event*/) {
    const Tokens& t = tokens();
    QPainter painter(this);
    painter.setRenderHint(QPainter::Antialiasing);
    painter.setPen(QPen(underMouse() ? t.controlBorder : t.rule, 1.0));
    painter.setBrush(parts::tinted(t.surface, isDown() ? 0.10 : underMouse() ? 0.03 : 0.0));
    painter.drawRoundedRect(QRectF(rect()).adjusted(0.5, 0.5, -0.5, -0.5), radius::kLane, radius::kLane);
    const QRect body = rect().adjusted(space::kL, space::kS, -space::kL, -space::kS);
    painter.setFont(app::font(TextRole::BodyBold));
    painter.setPen(t.ink);
    painter.drawText(QRect(body.left(), body.top(), body.width(), 22), Qt::AlignVCenter,
                     painter.fontMetrics().elidedText(text(), Qt::ElideMiddle, body.width()));
    painter.setFont(app::font(TextRole::Note));
    painter.setPen(t.muted);
    painter.drawText(QRect(body.left(), body.top() + 22, body.width(), 18), Qt::AlignVCenter,
                     painter.fontMetrics().elidedText(about_, Qt::ElideRight, body.width()));
    double at = body.left();
    for (std::size_t i = 0; i < shares_.size(); ++i) {
        const double length = shares_[i] * body.width();
        if (length >= 3.0)
            paintSwatch(painter, QRectF(at, body.bottom() - kBand - 1, length + 1.0, kBand), classStyle(cross_, i));
        at += length;
    }
}

} // namespace filial::app
