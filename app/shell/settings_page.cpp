// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/shell/settings_page.h"

#include <QFormLayout>
#include <QKeyEvent>
#include <QLabel>
#include <QLineEdit>
#include <QPushButton>
#include <QSettings>
#include <QVBoxLayout>

#include "app/common/theme.h"
#include "app/common/workbook.h"

namespace filial::app {
namespace {

QLabel* note(const QString& words) {
    auto* label = new QLabel(words);
    label->setFont(app::font(TextRole::Note));
    label->setWordWrap(true);
    label->setMaximumWidth(420);
    setInk(label, Ink::Muted);
    return label;
}

} // namespace

SettingsPage::SettingsPage(QWidget* parent)
    : QWidget(parent), who_(new QLineEdit), alpha_(new QLineEdit), problem_(new QLabel) {
    setAccessibleName(tr("Settings"));
    auto* column = new QVBoxLayout(this);
    column->setContentsMargins(space::kXl, space::kXxl, space::kXl, space::kXl);
    column->setSpacing(space::kL);
    auto* title = new QLabel(tr("Settings"));
    title->setFont(app::font(TextRole::Verdict));
    column->addWidget(title);
    auto* form = new QFormLayout;
    form->setHorizontalSpacing(space::kL);
    form->setVerticalSpacing(space::kXs);
    form->setLabelAlignment(Qt::AlignRight | Qt::AlignVCenter);
    who_->setAccessibleName(tr("Who counts"));
    who_->setPlaceholderText(tr("name or initials"));
    alpha_->setAccessibleName(tr("Significance level α"));
    for (QLineEdit* edit : {who_, alpha_})
        edit->setMaximumWidth(180);
    form->addRow(tr("Who counts"), who_);
    form->addRow(QString(), note(tr("Kept with every change in the book's history.")));
    form->addRow(tr("Significance level α"), alpha_);
    form->addRow(QString(), note(tr("A ratio is called contradicted where P is below it. It is stated beside every "
                                    "verdict.")));
    form->addRow(QString(), problem_);
    column->addLayout(form);
    setInk(problem_, Ink::Error);
    auto* done = new QPushButton(tr("Back"));
    setLook(done, look::kPrimary);
    column->addWidget(done, 0, Qt::AlignLeft);
    column->addStretch(1);
    connect(who_, &QLineEdit::textEdited, this, &SettingsPage::readWho);
    connect(alpha_, &QLineEdit::textEdited, this, &SettingsPage::readAlpha);
    for (QLineEdit* edit : {who_, alpha_})
        connect(edit, &QLineEdit::returnPressed, this, &SettingsPage::left);
    connect(done, &QPushButton::clicked, this, &SettingsPage::left);
    setFocusProxy(who_);
}

void SettingsPage::begin(Workbook* workbook) {
    workbook_ = workbook;
    const QSettings settings;
    who_->setText(settings.value(QStringLiteral("who")).toString());
    alpha_->setText(QString::number(Workbook::rememberedAlpha()));
    setLook(alpha_, look::kInvalid, false);
    problem_->clear();
    who_->setFocus(Qt::TabFocusReason);
}

void SettingsPage::readWho() {
    const QString who = who_->text().trimmed();
    QSettings().setValue(QStringLiteral("who"), who);
    if (workbook_ != nullptr)
        workbook_->session().set_who(who.toStdString());
}

void SettingsPage::readAlpha() {
    bool number = false;
    const double alpha = alpha_->text().trimmed().replace(QLatin1Char(','), QLatin1Char('.')).toDouble(&number);
    const bool good = number && Workbook::rememberAlpha(alpha);
    setLook(alpha_, look::kInvalid, !good);
    problem_->setText(good ? QString()
                           : tr("α is a number between 0 and 1, such as 0.05; %1 stays.")
                                 .arg(QString::number(Workbook::rememberedAlpha())));
    if (good && workbook_ != nullptr)
        workbook_->setAlpha(alpha);
}

void SettingsPage::keyPressEvent(QKeyEvent* event) {
    if (event->key() == Qt::Key_Escape)
        Q_EMIT left();
    else
        QWidget::keyPressEvent(event);
}

} // namespace filial::app
