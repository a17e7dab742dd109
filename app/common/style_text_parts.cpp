// SPDX-License-Identifier: GPL-3.0-or-later
#include <QPainter>
#include <QStyle>
#include <QStyleOption>

#include "app/common/style_parts.h"
#include "app/common/theme.h"

namespace filial::app::parts {

void menuItem(QPainter& painter, const QStyleOptionMenuItem& item) {
    const Tokens& t = tokens();
    const QRect& r = item.rect;
    painter.save();
    if (item.menuItemType == QStyleOptionMenuItem::Separator) {
        painter.fillRect(r.left() + space::kM, r.center().y(), r.width() - 2 * space::kM, 1, t.rule);
        painter.restore();
        return;
    }
    const bool enabled = (item.state & QStyle::State_Enabled) != 0;
    const bool chosen = enabled && (item.state & QStyle::State_Selected) != 0;
    if (chosen) {
        painter.fillRect(r, t.selected);
        painter.fillRect(r.left(), r.top(), 3, r.height(), t.accent);
    }
    const QColor ink = enabled ? t.ink : t.muted;
    if (item.checked) {
        QStyleOption mark;
        mark.rect = QRect(r.left() + space::kS, r.center().y() - 7, 16, 16);
        painter.setRenderHint(QPainter::Antialiasing);
        painter.setPen(QPen(ink, 2.0, Qt::SolidLine, Qt::RoundCap, Qt::RoundJoin));
        const QPointF o = mark.rect.topLeft();
        painter.drawPolyline(QPolygonF({o + QPointF(3.0, 8.0), o + QPointF(6.5, 11.5), o + QPointF(13.0, 4.5)}));
    }
    const QStringList text = item.text.split(QLatin1Char('\t'));
    const QRect body = r.adjusted(32, 0, -space::kL, 0);
    painter.setFont(item.font);
    painter.setPen(ink);
    painter.drawText(body, Qt::AlignLeft | Qt::AlignVCenter | Qt::TextShowMnemonic, text.value(0));
    if (text.size() > 1) {
        painter.setPen(chosen ? t.ink : t.muted);
        painter.drawText(body, Qt::AlignRight | Qt::AlignVCenter, text.value(1));
    }
    if (item.menuItemType == QStyleOptionMenuItem::SubMenu)
        chevron(painter, QRect(r.right() - 24, r.top(), 16, r.height()), -90, t.muted);
    painter.restore();
}

void headerSection(QPainter& painter, const QStyleOptionHeader& header) {
    const Tokens& t = tokens();
    const bool hover = (header.state & QStyle::State_MouseOver) != 0 && (header.state & QStyle::State_Enabled) != 0;
    painter.fillRect(header.rect, hover ? tinted(t.background, 0.05) : t.background);
    if (header.orientation == Qt::Horizontal)
        painter.fillRect(header.rect.left(), header.rect.bottom(), header.rect.width(), 1, t.rule);
}

void headerLabel(QPainter& painter, const QStyleOptionHeader& header) {
    painter.save();
    painter.setFont(font(TextRole::Label));
    painter.setPen(tokens().muted);
    painter.drawText(header.rect.adjusted(space::kS, 0, -space::kS, 0),
                     static_cast<int>(header.textAlignment) | Qt::TextWordWrap, header.text);
    painter.restore();
}

void tabShape(QPainter& painter, const QStyleOptionTab& tab) {
    const Tokens& t = tokens();
    const QRect& r = tab.rect;
    const bool chosen = (tab.state & QStyle::State_Selected) != 0;
    const bool hover = (tab.state & QStyle::State_MouseOver) != 0;
    if (!chosen) {
        if (hover)
            painter.fillRect(r.adjusted(0, 0, 0, -1), tinted(t.surface, 0.05));
        return;
    }
    painter.fillRect(r, t.background);
    painter.fillRect(r.left(), r.top(), r.width(), 3, t.accent);
    painter.fillRect(r.left(), r.top() + 3, 1, r.height() - 3, t.rule);
    painter.fillRect(r.right(), r.top() + 3, 1, r.height() - 3, t.rule);
}

void tabLabel(QPainter& painter, const QStyleOptionTab& tab) {
    const bool chosen = (tab.state & QStyle::State_Selected) != 0;
    painter.save();
    painter.setFont(font(chosen ? TextRole::BodyBold : TextRole::Body));
    painter.setPen(chosen ? tokens().ink : tokens().muted);
    painter.drawText(tab.rect, Qt::AlignCenter | Qt::TextShowMnemonic, tab.text);
    if ((tab.state & QStyle::State_HasFocus) != 0)
        focusRing(painter, QRectF(tab.rect).adjusted(4.0, 6.0, -4.0, -4.0), radius::kCell);
    painter.restore();
}

} // namespace filial::app::parts
