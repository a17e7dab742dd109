// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/score/binding_editor.h"

#include <algorithm>

#include <QKeyEvent>
#include <QMouseEvent>
#include <QPainter>

#include "app/common/class_style.h"
#include "app/common/theme.h"

namespace filial::app {

namespace {
constexpr int kTermRow = 34;
} // namespace

TermChip::TermChip(QWidget* parent) : QPushButton(parent) {
    setCursor(Qt::OpenHandCursor);
    setFont(app::font(TextRole::Note));
    setToolTip(tr("Drag to another class, or Alt+Up and Alt+Down"));
}

void TermChip::mousePressEvent(QMouseEvent* event) {
    grip_ = event->position().toPoint();
    setFocus();
    raise();
}

void TermChip::mouseMoveEvent(QMouseEvent* event) {
    if (event->buttons() & Qt::LeftButton)
        move(x(),
             std::clamp(y() + event->position().toPoint().y() - grip_.y(), 0, parentWidget()->height() - height()));
}

void TermChip::mouseReleaseEvent(QMouseEvent* event) {
    Q_UNUSED(event)
    Q_EMIT dropped(geometry().center().y());
}

void TermChip::keyPressEvent(QKeyEvent* event) {
    if ((event->modifiers() & Qt::AltModifier) && (event->key() == Qt::Key_Up || event->key() == Qt::Key_Down)) {
        Q_EMIT shifted(event->key() == Qt::Key_Up ? -1 : 1);
        return;
    }
    QPushButton::keyPressEvent(event);
}

void TermChip::paintEvent(QPaintEvent* event) {
    Q_UNUSED(event)
    QPainter painter(this);
    painter.setRenderHint(QPainter::Antialiasing);
    const Tokens& t = tokens();
    painter.setPen(QPen(hasFocus() ? t.accent : t.controlBorder, hasFocus() ? 2 : 1));
    painter.setBrush(t.surface);
    painter.drawRoundedRect(QRectF(rect()).adjusted(1, 1, -1, -1), 12, 12);
    painter.setPen(t.ink);
    painter.drawText(rect().adjusted(space::kM, 0, -space::kS, 0), Qt::AlignVCenter | Qt::AlignLeft,
                     fontMetrics().elidedText(text(), Qt::ElideRight, width() - 20));
}

BindingEditor::BindingEditor(QWidget* parent) : QWidget(parent) {
    setObjectName("binding");
    setAccessibleName(tr("Which class is which term"));
    setSizePolicy(QSizePolicy::Expanding, QSizePolicy::Fixed);
}

QSize BindingEditor::sizeHint() const {
    return {260, static_cast<int>(binding_.size()) * kTermRow};
}

void BindingEditor::setTerms(const book::Cross& cross, const QStringList& terms, std::vector<std::size_t> binding) {
    cross_ = cross;
    cross_.families.clear();
    terms_ = terms;
    if (binding.size() != cross.classes.size()) {
        binding.resize(cross.classes.size());
        for (std::size_t i = 0; i < binding.size(); ++i)
            binding[i] = i;
    }
    binding_ = std::move(binding);
    while (chips_.size() > binding_.size()) {
        chips_.back()->deleteLater();
        chips_.pop_back();
    }
    while (chips_.size() < binding_.size()) {
        const std::size_t place = chips_.size();
        auto* chip = new TermChip(this);
        chip->setObjectName(QStringLiteral("term-chip-%1").arg(place));
        connect(chip, &TermChip::dropped, this, [this, place](int y) {
            const int row = std::clamp(y / kTermRow, 0, static_cast<int>(binding_.size()) - 1);
            swap(place, static_cast<std::size_t>(row));
        });
        connect(chip, &TermChip::shifted, this, [this, place](int by) {
            const int to = static_cast<int>(place) + by;
            if (to >= 0 && to < static_cast<int>(binding_.size())) {
                swap(place, static_cast<std::size_t>(to));
                chips_[static_cast<std::size_t>(to)]->setFocus();
            }
        });
        chips_.push_back(chip);
        chip->show();
    }
    updateGeometry();
    placeChips();
    update();
}

void BindingEditor::swap(std::size_t from, std::size_t to) {
    std::swap(binding_[from], binding_[to]);
    placeChips();
    if (from != to)
        Q_EMIT bindingChanged();
}

void BindingEditor::placeChips() {
    const int left = width() / 2;
    for (std::size_t i = 0; i < chips_.size(); ++i) {
        const auto term = static_cast<qsizetype>(binding_[i]);
        const QString text = term < terms_.size() ? terms_[term] : QString();
        chips_[i]->setText(text);
        chips_[i]->setAccessibleName(
            tr("%1, on %2").arg(text, QString::fromStdString(cross_.class_label(ClassIndex{i}))));
        chips_[i]->setGeometry(left, static_cast<int>(i) * kTermRow + 3, width() - left, kTermRow - 6);
    }
}

void BindingEditor::resizeEvent(QResizeEvent* event) {
    QWidget::resizeEvent(event);
    placeChips();
}

void BindingEditor::paintEvent(QPaintEvent* event) {
    Q_UNUSED(event)
    QPainter painter(this);
    painter.setFont(app::font(TextRole::Note));
    for (std::size_t i = 0; i < cross_.classes.size(); ++i) {
        const int y = static_cast<int>(i) * kTermRow;
        paintSwatch(painter, QRectF(0, y + (kTermRow - 12) / 2.0, 12, 12), classStyle(cross_, i));
        painter.setPen(tokens().ink);
        const QRect room(20, y, width() / 2 - 28, kTermRow);
        painter.drawText(room, Qt::AlignVCenter | Qt::AlignLeft,
                         painter.fontMetrics().elidedText(QString::fromStdString(cross_.class_label(ClassIndex{i})),
                                                          Qt::ElideRight, room.width()));
    }
}

} // namespace filial::app
