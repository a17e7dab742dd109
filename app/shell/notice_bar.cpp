// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/shell/notice_bar.h"

#include <QAccessible>
#include <QHBoxLayout>
#include <QLabel>
#include <QPainter>
#include <QPushButton>

#include "app/common/theme.h"

namespace filial::app {

NoticeBar::NoticeBar(QWidget* parent)
    : QFrame(parent), glyph_(new QLabel), text_(new QLabel), act_(new QPushButton),
      dismiss_(new QPushButton(tr("Dismiss"))) {
    auto* row = new QHBoxLayout(this);
    row->setContentsMargins(space::kL, space::kXs, space::kL, space::kXs);
    row->setSpacing(space::kM);
    glyph_->setFont(app::font(TextRole::BodyBold));
    glyph_->setAccessibleName(tr("kind of notice"));
    text_->setWordWrap(true);
    text_->setTextInteractionFlags(Qt::TextSelectableByMouse);
    setLook(dismiss_, look::kQuiet);
    act_->setObjectName("notice-act");
    act_->hide();
    connect(act_, &QPushButton::clicked, this, [this] {
        hide();
        if (offered_)
            offered_();
    });
    connect(dismiss_, &QPushButton::clicked, this, &QWidget::hide);
    row->addWidget(glyph_);
    row->addWidget(text_, 1);
    row->addWidget(act_);
    row->addWidget(dismiss_);
    setAccessibleName(tr("Notice"));
    hide();
}

void NoticeBar::show(Kind kind, const QString& sentence) {
    glyph_->setText(kind == Kind::Error     ? QStringLiteral("×")
                    : kind == Kind::Warning ? QStringLiteral("!")
                                            : QStringLiteral("▸"));
    setInk(glyph_, kind == Kind::Error ? Ink::Error : kind == Kind::Warning ? Ink::Warning : Ink::Accent);
    QString capital = sentence;
    if (!capital.isEmpty())
        capital[0] = capital[0].toUpper();
    text_->setText(capital);
    act_->hide();
    setVisible(true);
    QAccessibleEvent alert(text_, QAccessible::Alert);
    QAccessible::updateAccessibility(&alert);
}

void NoticeBar::offer(const QString& words, std::function<void()> act) {
    offered_ = std::move(act);
    act_->setText(words);
    act_->show();
}

QString NoticeBar::sentence() const {
    return isHidden() ? QString() : text_->text();
}

void NoticeBar::paintEvent(QPaintEvent* /*event*/) {
    QPainter painter(this);
    painter.fillRect(rect(), tokens().paleBand);
    painter.fillRect(0, height() - 1, width(), 1, tokens().rule);
}

} // namespace filial::app
