// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/score/section.h"

#include <QPainter>

namespace filial::app {

namespace {

class SectionTitle : public QPushButton {
public:
    explicit SectionTitle(QWidget* parent) : QPushButton(parent) {
        setFont(app::font(TextRole::Label));
        setAttribute(Qt::WA_Hover);
        setCheckable(true);
        setSizePolicy(QSizePolicy::Expanding, QSizePolicy::Fixed);
        setFixedHeight(22);
    }

protected:
    void paintEvent(QPaintEvent* event) override {
        Q_UNUSED(event)
        QPainter painter(this);
        painter.setPen(underMouse() ? tokens().ink : tokens().muted);
        const QString mark = isChecked() ? QStringLiteral("▸ ") : underMouse() ? QStringLiteral("▾ ") : QString();
        painter.drawText(rect(), Qt::AlignLeft | Qt::AlignVCenter, isChecked() ? mark + text() : text());
        if (!isChecked() && !mark.isEmpty())
            painter.drawText(rect(), Qt::AlignRight | Qt::AlignVCenter, mark);
        if (hasFocus()) {
            painter.setRenderHint(QPainter::Antialiasing);
            painter.setPen(QPen(tokens().accent, 2));
            painter.drawRoundedRect(QRectF(rect()).adjusted(1, 1, -1, -1), radius::kCell, radius::kCell);
        }
    }
};

} // namespace

ResultGrid::ResultGrid(QWidget* parent) : QWidget(parent), grid_(new QGridLayout(this)) {
    grid_->setContentsMargins(0, 0, 0, 0);
    grid_->setHorizontalSpacing(space::kM);
    grid_->setVerticalSpacing(0);
    grid_->setColumnStretch(0, 1);
}

ResultGrid::Line& ResultGrid::line(std::size_t index) {
    while (lines_.size() <= index) {
        const int row = static_cast<int>(lines_.size());
        Line one{new Words(TextRole::Body, Ink::Normal, this), new Words(TextRole::Body, Ink::Normal, this),
                 new Words(TextRole::Body, Ink::Normal, this), new Words(TextRole::Body, Ink::Normal, this)};
        one.label->setWordWrap(true);
        one.label->setMinimumHeight(24);
        int column = 0;
        for (Words* words : {one.label, one.statistic, one.df, one.p}) {
            words->setAlignment((column == 0 ? Qt::AlignLeft : Qt::AlignRight) | Qt::AlignVCenter);
            grid_->addWidget(words, row, column++);
        }
        lines_.push_back(one);
    }
    return lines_[index];
}

void ResultGrid::setRows(const std::vector<Row>& rows) {
    for (std::size_t i = 0; i < rows.size(); ++i) {
        Line& one = line(i);
        const Row& row = rows[i];
        const Ink ink = row.warn ? Ink::Warning : row.muted ? Ink::Muted : Ink::Normal;
        const QString names[] = {row.id, row.id + QStringLiteral("-statistic"), row.id + QStringLiteral("-df"),
                                 row.id + QStringLiteral("-p")};
        const QString texts[] = {row.label, row.statistic, row.df, row.p};
        const QString tips[] = {row.label_tip, row.statistic_tip, {}, row.p_tip};
        int cell = 0;
        for (Words* words : {one.label, one.statistic, one.df, one.p}) {
            if (words->objectName() != names[cell])
                words->setObjectName(names[cell]);
            words->say(texts[cell], tips[cell]);
            app::setInk(words, ink);
            if (one.strong != row.strong)
                words->setFont(app::font(row.strong ? TextRole::BodyBold : TextRole::Body));
            ++cell;
        }
        one.strong = row.strong;
    }
    for (std::size_t i = rows.size(); i < lines_.size(); ++i) {
        for (Words* words : {lines_[i].label, lines_[i].statistic, lines_[i].df, lines_[i].p})
            words->say({});
    }
    shown_ = rows.size();
    setVisible(shown_ > 0);
    update();
}

void ResultGrid::paintEvent(QPaintEvent* event) {
    Q_UNUSED(event)
    QPainter painter(this);
    for (std::size_t i = 1; i < shown_; ++i) {
        if (lines_[i].strong && !lines_[i - 1].strong) {
            const double y = lines_[i].label->geometry().top();
            drawHairline(painter, QPointF(0, y), QPointF(width(), y), tokens().muted);
        }
    }
}

Section::Section(const QString& id, const QString& title, QWidget* parent)
    : QWidget(parent), title_(new SectionTitle(this)), body_(new QWidget(this)), content_(new QVBoxLayout(body_)) {
    setObjectName(id);
    title_->setObjectName(id + QStringLiteral("-title"));
    title_->setToolTip(tr("Fold or unfold"));
    content_->setContentsMargins(0, 0, 0, 0);
    content_->setSpacing(2);
    auto* all = new QVBoxLayout(this);
    all->setContentsMargins(0, 0, 0, 0);
    all->setSpacing(2);
    all->addWidget(title_);
    all->addWidget(body_);
    connect(title_, &QPushButton::clicked, this, [this](bool folded) { setFolded(folded); });
    setTitle(title);
}

void Section::setTitle(const QString& title) {
    if (text_ == title)
        return;
    text_ = title;
    title_->setText(title);
    apply();
}

void Section::setFolded(bool folded) {
    by_hand_ = true;
    folded_ = folded;
    apply();
}

void Section::foldForHeight(bool folded) {
    if (by_hand_ || folded_ == folded)
        return;
    folded_ = folded;
    apply();
}

void Section::apply() {
    title_->setChecked(folded_);
    title_->setAccessibleName(folded_ ? tr("%1, folded").arg(text_) : text_);
    body_->setVisible(!folded_);
}

} // namespace filial::app
