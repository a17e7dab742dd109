// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/shell/class_preview.h"

#include <algorithm>

#include <QPainter>

#include "app/common/class_style.h"
#include "app/common/theme.h"
#include "core/inheritance/hypothesis.h"

namespace filial::app {
namespace {
constexpr int kCell = 220, kRow = 28, kHead = 28;
}

void ClassPreview::setCross(book::Cross cross) {
    cross_ = std::move(cross);
    terms_.clear();
    if (const auto read = inheritance::read_hypothesis(cross_.hypothesis.notation);
        read && read.value().class_count() == cross_.classes.size())
        for (std::size_t i = 0; i < cross_.classes.size(); ++i)
            terms_ << QString::fromStdString(read.value().term_text(i));
    QStringList spoken;
    for (std::size_t i = 0; i < cross_.classes.size(); ++i)
        spoken << QString::fromStdString(cross_.class_label(ClassIndex{i}));
    setAccessibleName(tr("Classes: %1").arg(spoken.join(QStringLiteral(", "))));
    // A scroll area asks for no height for width: the room is kept as a minimum.
    setMinimumHeight(heightForWidth(std::max(width(), 2 * kCell)));
    updateGeometry();
    update();
}

int ClassPreview::columns(int width) const {
    return std::max(1, width / kCell);
}

int ClassPreview::heightForWidth(int width) const {
    const int classes = static_cast<int>(cross_.classes.size());
    if (classes == 0)
        return 0;
    return kHead + kRow * ((classes + columns(width) - 1) / columns(width));
}

void ClassPreview::paintEvent(QPaintEvent* /*event*/) {
    if (cross_.classes.empty())
        return;
    QPainter painter(this);
    painter.setFont(app::font(TextRole::Note));
    painter.setPen(tokens().muted);
    const QString ratio = QString::fromStdString(cross_.hypothesis.notation);
    const QString head = ratio.isEmpty() ? tr("These classes, no ratio proposed yet:")
                                         : tr("These classes, to be tested against %1:").arg(ratio);
    painter.drawText(QRect(0, 0, width(), kHead), Qt::AlignVCenter, head);
    const int across = columns(width());
    for (std::size_t i = 0; i < cross_.classes.size(); ++i) {
        const int at = static_cast<int>(i);
        const QRect cell((at % across) * kCell, kHead + (at / across) * kRow, kCell - space::kS, kRow);
        paintSwatch(painter, QRectF(cell.left(), cell.top() + 6, 16, 16), classStyle(cross_, i));
        painter.setFont(app::font(TextRole::Body));
        painter.setPen(tokens().ink);
        const QString label = QString::fromStdString(cross_.class_label(ClassIndex{i}));
        const QRect body = cell.adjusted(space::kXl, 0, 0, 0);
        const int room = terms_.isEmpty() ? body.width() : body.width() - 60;
        const QString shown = painter.fontMetrics().elidedText(label, Qt::ElideRight, room);
        painter.drawText(body, Qt::AlignVCenter, shown);
        const int after = painter.fontMetrics().horizontalAdvance(shown) + space::kS;
        painter.setFont(app::font(TextRole::Note));
        painter.setPen(tokens().muted);
        painter.drawText(body.adjusted(after, 1, 0, 0), Qt::AlignVCenter, terms_.value(at));
    }
}

} // namespace filial::app
