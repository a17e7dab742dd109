// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/score/class_header.h"

#include <algorithm>

#include <QMouseEvent>
#include <QPainter>

#include "app/common/class_style.h"
#include "app/score/family_model.h"

namespace filial::app {

namespace {
constexpr int kLine = 16, kSwatch = 12, kBracket = 26, kMargin = 8;
} // namespace

ClassHeader::ClassHeader(Workbook* workbook, FamilyModel* model, QWidget* parent)
    : QHeaderView(Qt::Horizontal, parent), workbook_(workbook), families_(model) {
    setObjectName("class-header");
    setAccessibleName(tr("Classes of the family table"));
    setSectionResizeMode(QHeaderView::Fixed);
    setSectionsClickable(true);
    setHighlightSections(false);
    setMouseTracking(true);
    setMinimumSectionSize(28);
    viewport()->setAutoFillBackground(false);
    setToolTip(tr("Click two or more classes to join them"));
    connect(this, &QHeaderView::sectionResized, this, [this] { placeSplits(); });
}

QString ClassHeader::term(std::size_t phenotype) const {
    const auto& hypothesis = workbook_->analysis().hypothesis;
    return hypothesis && phenotype < hypothesis->class_count()
               ? QString::fromStdString(hypothesis->term_text(phenotype))
               : QString();
}

bool ClassHeader::anyBreaks() const {
    const QFontMetrics metrics(app::font(TextRole::Label));
    for (int column = 1; column <= static_cast<int>(families_->classCount()); ++column) {
        const QString label = families_->headerData(column, Qt::Horizontal, Qt::DisplayRole).toString();
        if (metrics.horizontalAdvance(label) > sectionSize(column) - kSwatch - 6 - kMargin)
            return true;
    }
    return false;
}

QStringList ClassHeader::labelLines(const QString& label, int width, bool breaks) const {
    const QFontMetrics metrics(app::font(TextRole::Label));
    if (!breaks && metrics.horizontalAdvance(label) <= width)
        return {label};
    const qsizetype dot = label.indexOf(QStringLiteral("·"));
    if (dot < 0)
        return {metrics.elidedText(label, Qt::ElideRight, width)};
    return {metrics.elidedText(label.left(dot + 1), Qt::ElideRight, width),
            metrics.elidedText(label.mid(dot + 1).trimmed(), Qt::ElideRight, width)};
}

QSize ClassHeader::sizeHint() const {
    int lines = 1;
    const bool breaks = model() != nullptr && anyBreaks();
    const book::Cross* cross = model() != nullptr ? workbook_->shownCross() : nullptr;
    for (int column = 1; model() != nullptr && column <= static_cast<int>(families_->classCount()); ++column) {
        const QString label = families_->headerData(column, Qt::Horizontal, Qt::DisplayRole).toString();
        const int room = sectionSize(column) - kSwatch - 6 - kMargin;
        lines = std::max(lines, static_cast<int>(labelLines(label, room, breaks).size()));
    }
    const bool joined = cross != nullptr && !cross->hypothesis.joins.empty();
    return {QHeaderView::sizeHint().width(), (lines + 1) * kLine + 2 * space::kXs + (joined ? kBracket : 0)};
}

void ClassHeader::paintSection(QPainter* painter, const QRect& rect, int column) const {
    if (model() == nullptr || !rect.isValid())
        return;
    const Tokens& t = tokens();
    const ColumnKind kind = families_->kind(column);
    const QString label = families_->headerData(column, Qt::Horizontal, Qt::DisplayRole).toString();
    painter->save();
    painter->setClipRect(rect);
    if (kind == ColumnKind::Class && chosen_.contains(static_cast<std::size_t>(column - 1)))
        painter->fillRect(rect, t.selected);
    else if (kind == ColumnKind::Class && column == hovered_)
        painter->fillRect(rect, QColor(t.ink.red(), t.ink.green(), t.ink.blue(), 13));
    const QRect inside = rect.adjusted(kMargin, 0, -kMargin, -space::kXs);
    painter->setFont(app::font(TextRole::Label));
    painter->setPen(t.muted);
    if (kind != ColumnKind::Class) {
        const auto side = kind == ColumnKind::Family ? Qt::AlignLeft : Qt::AlignRight;
        const int indent = kind == ColumnKind::Family ? -kMargin : 0;
        painter->drawText(inside.adjusted(indent, 0, 0, 0), static_cast<int>(side) | Qt::AlignBottom, label);
        painter->restore();
        return;
    }
    const auto phenotype = static_cast<std::size_t>(column - 1);
    const QStringList lines = labelLines(label, rect.width() - kMargin - kSwatch - 6, anyBreaks());
    int y = inside.bottom() + 1 - kLine * (static_cast<int>(lines.size()) + 1);
    const QFontMetrics metrics(painter->font());
    int widest = 0;
    for (const QString& line : lines)
        widest = std::max(widest, metrics.horizontalAdvance(line));
    if (const book::Cross* cross = workbook_->shownCross(); cross != nullptr && phenotype < cross->classes.size())
        paintSwatch(*painter, QRectF(inside.right() + 1 - widest - 6 - kSwatch, y + 2, kSwatch, kSwatch),
                    classStyle(*cross, phenotype));
    for (const QString& line : lines) {
        painter->drawText(QRect(rect.left(), y, inside.right() + 1 - rect.left(), kLine),
                          Qt::AlignRight | Qt::AlignVCenter, line);
        y += kLine;
    }
    painter->setFont(app::font(TextRole::Note));
    painter->drawText(QRect(rect.left(), y, inside.right() + 1 - rect.left(), kLine), Qt::AlignRight | Qt::AlignVCenter,
                      term(phenotype));
    painter->restore();
}

QRect ClassHeader::joinRect(const std::vector<std::size_t>& join) const {
    QRect all;
    for (const std::size_t phenotype : join) {
        const int column = static_cast<int>(phenotype) + 1;
        all |= QRect(sectionViewportPosition(column), 0, sectionSize(column), kBracket);
    }
    return all;
}

void ClassHeader::paintEvent(QPaintEvent* event) {
    QHeaderView::paintEvent(event);
    const book::Cross* cross = model() != nullptr ? workbook_->shownCross() : nullptr;
    if (cross == nullptr)
        return;
    QPainter painter(viewport());
    for (const auto& join : cross->hypothesis.joins) {
        const QRect rect = joinRect(join).adjusted(space::kS, 0, -space::kXs, 0);
        const double y = kBracket - 5.0;
        painter.setPen(QPen(tokens().ink, 1.5));
        drawHairline(painter, QPointF(rect.left(), y), QPointF(rect.right(), y), tokens().ink, 1.5);
        for (const std::size_t phenotype : join) {
            const int column = static_cast<int>(phenotype) + 1;
            const double x = sectionViewportPosition(column) + sectionSize(column) - kMargin - kSwatch / 2.0;
            drawHairline(painter, QPointF(x, y), QPointF(x, y + 5), tokens().ink, 1.5);
        }
    }
}

void ClassHeader::placeSplits() {
    for (std::size_t i = 0; i < splits_.size(); ++i) {
        const book::Cross* cross = workbook_->shownCross();
        if (cross == nullptr || i >= cross->hypothesis.joins.size())
            continue;
        const QRect rect = joinRect(cross->hypothesis.joins[i]);
        const QSize size = splits_[i]->sizeHint();
        splits_[i]->setGeometry(rect.center().x() - size.width() / 2, -2, size.width(), 22);
        splits_[i]->show();
    }
}

void ClassHeader::refresh() {
    const book::Cross* cross = workbook_->shownCross();
    const std::size_t joins = cross != nullptr ? cross->hypothesis.joins.size() : 0;
    while (splits_.size() > joins) {
        splits_.back()->deleteLater();
        splits_.pop_back();
    }
    while (splits_.size() < joins) {
        auto* button = new TextButton(tr("joined · Split"), viewport());
        button->setObjectName(QStringLiteral("split-%1").arg(splits_.size()));
        const std::size_t which = splits_.size();
        connect(button, &QPushButton::clicked, this, [this, which] { Q_EMIT splitRequested(which); });
        splits_.push_back(button);
    }
    for (std::size_t i = 0; i < joins; ++i) {
        QStringList labels;
        for (const std::size_t phenotype : cross->hypothesis.joins[i])
            labels << QString::fromStdString(cross->class_label(ClassIndex{phenotype}));
        splits_[i]->setAccessibleName(tr("joined · Split %1").arg(labels.join(QStringLiteral(" + "))));
    }
    std::erase_if(chosen_, [&](std::size_t phenotype) { return phenotype >= families_->classCount(); });
    updateGeometry();
    placeSplits();
    viewport()->update();
}

void ClassHeader::clearChosen() {
    chosen_.clear();
    viewport()->update();
    Q_EMIT chosenChanged();
}

void ClassHeader::mousePressEvent(QMouseEvent* event) {
    const int column = logicalIndexAt(event->position().toPoint());
    if (model() == nullptr || column < 0 || families_->kind(column) != ColumnKind::Class) {
        clearChosen();
        return;
    }
    const auto phenotype = static_cast<std::size_t>(column - 1);
    if (!chosen_.erase(phenotype))
        chosen_.insert(phenotype);
    viewport()->update();
    Q_EMIT chosenChanged();
}

void ClassHeader::mouseMoveEvent(QMouseEvent* event) {
    hovered_ = logicalIndexAt(event->position().toPoint());
    viewport()->update();
}

void ClassHeader::leaveEvent(QEvent* event) {
    hovered_ = -1;
    viewport()->update();
    QHeaderView::leaveEvent(event);
}

void ClassHeader::resizeEvent(QResizeEvent* event) {
    QHeaderView::resizeEvent(event);
    placeSplits();
}

} // namespace filial::app
