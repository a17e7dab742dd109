// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/score/cell_delegate.h"

#include <algorithm>
#include <array>

#include <QCoreApplication>
#include <QKeyEvent>
#include <QPainter>

#include "app/common/theme.h"
#include "app/score/family_table.h"
#include "core/book/count_table.h"

namespace filial::app {

CellEditor::CellEditor(QWidget* parent) : QLineEdit(parent) {
    setFrame(false);
    setTextMargins(space::kXs, 0, space::kXs, 2);
    setObjectName("cell-editor");
    setAccessibleName(tr("Count being typed"));
}

void CellEditor::setState(bool wrong, const QString& sum) {
    wrong_ = wrong;
    sum_ = sum;
    update();
}

void CellEditor::paintEvent(QPaintEvent* event) {
    QPainter painter(this);
    painter.fillRect(rect(), tokens().surface);
    painter.end();
    QLineEdit::paintEvent(event);
    painter.begin(this);
    painter.fillRect(QRect(0, height() - 2, width(), 2), wrong_ ? tokens().error : tokens().accent);
    if (!sum_.isEmpty()) {
        painter.setFont(app::font(TextRole::Note));
        painter.setPen(tokens().muted);
        const int free = width() - fontMetrics().horizontalAdvance(text()) - 2 * space::kS;
        if (painter.fontMetrics().horizontalAdvance(sum_) <= free)
            painter.drawText(rect().adjusted(space::kXs, 0, 0, -2), Qt::AlignLeft | Qt::AlignVCenter, sum_);
    }
}

CellDelegate::CellDelegate(FamilyTable* table) : QStyledItemDelegate(table), table_(table) {}

void CellDelegate::paint(QPainter* painter, const QStyleOptionViewItem& option, const QModelIndex& index) const {
    const Tokens& t = tokens();
    const FamilyModel* model = table_->families();
    const ColumnKind kind = model->kind(index.column());
    const QRect cell(option.rect.left(), option.rect.top(), option.rect.width(),
                     std::min(option.rect.height(), kRowHeight));
    painter->save();
    if (option.state & QStyle::State_Selected)
        painter->fillRect(cell, t.selected);
    const bool current = table_->currentIndex() == index && table_->hasFocus();
    if (current) {
        painter->fillRect(cell, t.surface);
        painter->setPen(QPen(t.accent, 2));
        painter->setBrush(Qt::NoBrush);
        painter->drawRect(QRectF(cell).adjusted(1, 1, -1, -1));
    }
    const bool wrong = index.data(FamilyModel::InvalidRole).toBool();
    const bool muted = index.data(FamilyModel::MutedRole).toBool() && !(option.state & QStyle::State_Selected);
    const bool count = kind == ColumnKind::Class;
    painter->setFont(app::font(count ? TextRole::Count : TextRole::Body));
    painter->setPen(wrong ? t.error : muted ? t.muted : t.ink);
    QString text = index.data().toString();
    const int left = kind == ColumnKind::Family ? (current ? space::kXs : 0) : space::kXs;
    const QRect inside = cell.adjusted(left, 0, kind == ColumnKind::Family ? 0 : -space::kS, 0);
    if (wrong)
        text = QStringLiteral("× ") + text;
    text = painter->fontMetrics().elidedText(text, Qt::ElideRight, inside.width());
    const int side = kind == ColumnKind::Family ? Qt::AlignLeft : Qt::AlignRight;
    painter->drawText(inside, side | Qt::AlignVCenter, text);
    if (wrong)
        painter->fillRect(QRect(cell.left() + 2, cell.bottom() - 2, cell.width() - 4, 2), t.error);
    painter->restore();
}

QWidget* CellDelegate::createEditor(QWidget* parent, const QStyleOptionViewItem& option,
                                    const QModelIndex& index) const {
    Q_UNUSED(option)
    auto* editor = new CellEditor(parent);
    FamilyModel* model = table_->families();
    const ColumnKind kind = model->kind(index.column());
    editor->setFont(app::font(kind == ColumnKind::Class ? TextRole::Count : TextRole::Body));
    editor->setAlignment(kind == ColumnKind::Family ? Qt::AlignLeft : Qt::AlignRight);
    const QPersistentModelIndex place(index);
    connect(editor, &QLineEdit::textEdited, model, [editor, model, place](const QString& text) {
        if (!place.isValid())
            return;
        QString sum;
        const auto read = book::read_cell(text.toStdString());
        if (model->kind(place.column()) != ColumnKind::Family && read && text.contains(u'+'))
            sum = QStringLiteral("= ") + QString::fromStdString(book::cell_text(read.value()));
        editor->setState(!model->problem(place, text).isEmpty(), sum);
        model->preview(place, text);
    });
    return editor;
}

void CellDelegate::setEditorData(QWidget* editor, const QModelIndex& index) const {
    auto* line = qobject_cast<QLineEdit*>(editor);
    // Filled once: later changes of the model come from what is typed here.
    if (line == nullptr || line->property("filled").toBool())
        return;
    line->setProperty("filled", true);
    line->setText(table_->families()->cellText(index));
    line->selectAll();
}

void CellDelegate::setModelData(QWidget* editor, QAbstractItemModel* model, const QModelIndex& index) const {
    if (const auto* line = qobject_cast<QLineEdit*>(editor))
        model->setData(index, line->text(), Qt::EditRole);
}

void CellDelegate::updateEditorGeometry(QWidget* editor, const QStyleOptionViewItem& option,
                                        const QModelIndex& index) const {
    Q_UNUSED(index)
    editor->setGeometry(option.rect.left(), option.rect.top(), option.rect.width(),
                        std::min(option.rect.height(), kRowHeight));
}

bool CellDelegate::leavesCell(const QKeyEvent& key) const {
    static constexpr std::array kMoves{Qt::Key_Left, Qt::Key_Right, Qt::Key_Up,
                                       Qt::Key_Down, Qt::Key_Home,  Qt::Key_End};
    const bool plain = (key.modifiers() & ~Qt::KeypadModifier) == Qt::NoModifier;
    return plain && table_->typedOver() && std::find(kMoves.begin(), kMoves.end(), key.key()) != kMoves.end();
}

bool CellDelegate::eventFilter(QObject* object, QEvent* event) {
    auto* editor = qobject_cast<QWidget*>(object);
    if (editor == nullptr || event->type() != QEvent::KeyPress)
        return QStyledItemDelegate::eventFilter(object, event);
    const auto* key = static_cast<QKeyEvent*>(event); // NOLINT: the type was asked for above
    int rows = 0, columns = 0;
    bool enter = false;
    if (leavesCell(*key)) {
        Q_EMIT commitData(editor);
        Q_EMIT closeEditor(editor, NoHint);
        QCoreApplication::sendEvent(table_, event); // the table moves as it does without an editor
        return true;
    }
    switch (key->key()) {
    case Qt::Key_Return:
    case Qt::Key_Enter:
        enter = true;
        break;
    case Qt::Key_Tab:
        columns = 1;
        break;
    case Qt::Key_Backtab:
        columns = -1;
        break;
    case Qt::Key_F2:
        table_->editWithCaret();
        return true;
    case Qt::Key_Up:
        rows = -1;
        break;
    case Qt::Key_Down:
        rows = 1;
        break;
    default:
        return QStyledItemDelegate::eventFilter(object, event);
    }
    Q_EMIT commitData(editor);
    Q_EMIT closeEditor(editor, NoHint);
    if (enter)
        table_->enter();
    else
        table_->step(rows, columns);
    return true;
}

} // namespace filial::app
