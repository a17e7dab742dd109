// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/shell/cross_details.h"

#include <QFormLayout>
#include <QKeyEvent>
#include <QLabel>
#include <QLineEdit>
#include <QPlainTextEdit>
#include <QPushButton>
#include <QRegularExpression>
#include <QVBoxLayout>

#include "app/common/theme.h"
#include "app/shell/cross_acts.h"

namespace filial::app {

CrossDetails::CrossDetails(Workbook* workbook, QWidget* parent)
    : QWidget(parent), workbook_(workbook), note_(new QPlainTextEdit) {
    auto* column = new QVBoxLayout(this);
    column->setContentsMargins(space::kXl, space::kL, space::kXl, space::kL);
    column->setSpacing(space::kL);
    auto* title = new QLabel(tr("About this cross"));
    title->setFont(app::font(TextRole::Verdict));
    column->addWidget(title);
    auto* form = new QFormLayout;
    form->setHorizontalSpacing(space::kL);
    form->setVerticalSpacing(space::kM);
    form->setLabelAlignment(Qt::AlignRight | Qt::AlignVCenter);
    name_ = field(form, tr("Name"), tr("K14 × M02, F2"));
    parents_ = field(form, tr("Parents"), tr("K14 × M02"));
    generation_ = field(form, tr("Generation"), tr("F2, test cross, F3 …"));
    date_ = field(form, tr("Sown on"), tr("12 March"));
    stage_ = field(form, tr("Scored at"), tr("four-leaf stage"));
    who_ = field(form, tr("Scored by"), tr("name or initials"));
    note_->setAccessibleName(tr("Note"));
    note_->setTabChangesFocus(true);
    note_->setMaximumHeight(140);
    note_->installEventFilter(this);
    form->addRow(tr("Note"), note_);
    column->addLayout(form);
    auto* done = new QPushButton(tr("Back to the counts"));
    setLook(done, look::kPrimary);
    column->addWidget(done, 0, Qt::AlignLeft);
    column->addStretch(1);
    connect(done, &QPushButton::clicked, this, &CrossDetails::left);
    connect(workbook_, &Workbook::bookChanged, this, &CrossDetails::load);
    connect(workbook_, &Workbook::crossChanged, this, &CrossDetails::load);
    setFocusProxy(name_);
    load();
}

QLineEdit* CrossDetails::field(QFormLayout* form, const QString& label, const QString& example) {
    auto* edit = new QLineEdit;
    edit->setPlaceholderText(example);
    edit->setAccessibleName(label);
    edit->setMaximumWidth(420);
    form->addRow(label, edit);
    connect(edit, &QLineEdit::editingFinished, this, &CrossDetails::commit);
    return edit;
}

void CrossDetails::load() {
    const book::Cross* cross = workbook_->currentCross();
    if (cross == nullptr)
        return;
    loading_ = true;
    const auto set = [](QLineEdit* edit, const QString& text) {
        if (edit->text() != text)
            edit->setText(text);
        edit->setModified(false);
    };
    set(name_, QString::fromStdString(cross->name));
    set(parents_, parentsText(workbook_->book(), *cross));
    set(generation_, QString::fromStdString(cross->generation));
    set(date_, QString::fromStdString(cross->date));
    set(who_, QString::fromStdString(cross->who));
    set(stage_, QString::fromStdString(cross->stage));
    if (const QString note = QString::fromStdString(cross->note); note_->toPlainText() != note)
        note_->setPlainText(note);
    for (QLineEdit* edit : {name_, parents_, generation_, date_, who_, stage_})
        edit->setReadOnly(workbook_->readOnly());
    note_->setReadOnly(workbook_->readOnly());
    loading_ = false;
}

void CrossDetails::commit() {
    const book::Cross* cross = workbook_->currentCross();
    if (loading_ || cross == nullptr || workbook_->readOnly())
        return;
    if (parents_->isModified()) {
        commitParents();
        return;
    }
    book::Cross before = *cross;
    before.families.clear();
    book::Cross after = before;
    after.name = name_->text().trimmed().toStdString();
    after.generation = generation_->text().trimmed().toStdString();
    after.date = date_->text().trimmed().toStdString();
    after.who = who_->text().trimmed().toStdString();
    after.stage = stage_->text().trimmed().toStdString();
    after.note = note_->toPlainText().toStdString();
    if (after != before)
        workbook_->perform({book::SetCross{cross->id, std::move(before), std::move(after)}});
}

void CrossDetails::commitParents() {
    static const QRegularExpression kTimes(QStringLiteral("\\s*×\\s*|\\s+[xX]\\s+"));
    parents_->setModified(false);
    setParents(workbook_, parents_->text().split(kTimes, Qt::SkipEmptyParts));
}

void CrossDetails::keyPressEvent(QKeyEvent* event) {
    if (event->key() == Qt::Key_Escape) {
        load(); // what was not committed is put back
        Q_EMIT left();
        return;
    }
    QWidget::keyPressEvent(event);
}

bool CrossDetails::eventFilter(QObject* watched, QEvent* event) {
    if (watched == note_ && event->type() == QEvent::FocusOut)
        commit();
    return QWidget::eventFilter(watched, event);
}

} // namespace filial::app
