// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/shell/start_page.h"

#include <QDateTime>
#include <QDir>
#include <QFileInfo>
#include <QHBoxLayout>
#include <QLabel>
#include <QPushButton>
#include <QVBoxLayout>

#include "app/common/theme.h"
#include "app/shell/book_card.h"
#include "app/shell/places.h"
#include "core/book/book_file.h"

namespace filial::app {
namespace {

QLabel* heading(const QString& text) {
    auto* label = new QLabel(text);
    label->setFont(app::font(TextRole::Label));
    setInk(label, Ink::Muted);
    return label;
}

QLabel* sentence(const QString& text) {
    auto* label = new QLabel(text);
    label->setWordWrap(true);
    setInk(label, Ink::Muted);
    return label;
}

QString whenText(const book::Timestamp& time) {
    const QDateTime when = QDateTime::fromString(QString::fromStdString(time), Qt::ISODateWithMs).toLocalTime();
    return when.isValid() ? QLocale().toString(when, QLocale::ShortFormat) : QString();
}

} // namespace

StartPage::StartPage(QWidget* parent) : QScrollArea(parent) {
    setWidgetResizable(true);
    setFrameShape(QFrame::NoFrame);
    setHorizontalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
    setFocusPolicy(Qt::NoFocus);
    setAccessibleName(tr("Start"));
}

void StartPage::refresh() {
    auto* page = new QWidget;
    auto* outer = new QHBoxLayout(page);
    outer->setContentsMargins(space::kXl, 0, space::kXl, space::kXl);
    auto* centre = new QWidget;
    centre->setMaximumWidth(960);
    outer->addStretch(1);
    outer->addWidget(centre, 100);
    outer->addStretch(1);
    auto* column = new QVBoxLayout(centre);
    column->setContentsMargins(0, 64, 0, 0);
    column->setSpacing(space::kS);
    auto* title = new QLabel(tr("What do the counts say?"));
    title->setFont(app::font(TextRole::Answer));
    column->addWidget(title);
    auto* about = sentence(tr("Count the offspring of a cross in classes, test them against a ratio, see where the "
                              "misfit sits and whether the families agree."));
    about->setMaximumWidth(640);
    column->addWidget(about);
    column->addSpacing(space::kL);

    auto* acts = new QHBoxLayout;
    acts->setSpacing(space::kM);
    auto* fresh = new QPushButton(tr("New cross…"));
    setLook(fresh, look::kPrimary);
    fresh->setWhatsThis(
        tr("Three questions: what was crossed, which generation, which classes. Then you type counts."));
    auto* open = new QPushButton(tr("Open a book…"));
    open->setToolTip(tr("A .filial book, or a table of counts as CSV"));
    acts->addWidget(fresh);
    acts->addWidget(open);
    acts->addSpacing(space::kS);
    acts->addWidget(sentence(tr("or drop a book or a CSV table anywhere here")), 1);
    column->addLayout(acts);
    column->addSpacing(space::kXxl);
    connect(fresh, &QPushButton::clicked, this, &StartPage::newCrossWanted);
    connect(open, &QPushButton::clicked, this, &StartPage::openWanted);

    auto* lists = new QHBoxLayout;
    lists->setSpacing(space::kXxl);
    auto* left = new QVBoxLayout;
    auto* right = new QVBoxLayout;
    for (QVBoxLayout* side : {left, right})
        side->setSpacing(space::kS);
    fillSamples(left);
    fillRecovered(right);
    fillRecent(right);
    left->addStretch(1);
    right->addStretch(1);
    lists->addLayout(left, 1);
    lists->addLayout(right, 1);
    column->addLayout(lists);
    column->addStretch(1);
    setWidget(page);
    fresh->setFocus();
}

void StartPage::fillSamples(QVBoxLayout* column) {
    const QStringList samples = sampleBooks();
    if (samples.isEmpty())
        return;
    column->addWidget(heading(tr("Look at a sample")));
    for (const QString& path : samples) {
        const auto opened = book::open_book(book::disk(), path.toStdString());
        if (!opened)
            continue; // a sample that cannot be read is not offered
        const book::Book& book = opened.value().book;
        const QString name = QFileInfo(path).completeBaseName();
        const QString title = book.title.empty() ? name : QString::fromStdString(book.title);
        auto* card = new BookCard(title, QString::fromStdString(book.note).section(QLatin1Char('\n'), 0, 0));
        if (!book.crosses.empty())
            card->setCross(book.crosses.front());
        card->setToolTip(tr("Opens a copy; the sample stays as it is"));
        connect(card, &QAbstractButton::clicked, this, [this, path] { Q_EMIT sampleChosen(path); });
        column->addWidget(card);
    }
}

void StartPage::fillRecent(QVBoxLayout* column) {
    const QStringList recent = recentBooks();
    column->addWidget(heading(tr("Opened lately")));
    if (recent.isEmpty())
        column->addWidget(sentence(tr("Books you save are listed here.")));
    for (const QString& path : recent) {
        const QFileInfo file(path);
        auto* card = new BookCard(file.completeBaseName(), QDir::toNativeSeparators(file.absolutePath()));
        card->setToolTip(path);
        connect(card, &QAbstractButton::clicked, this, [this, path] { Q_EMIT recentChosen(path); });
        column->addWidget(card);
    }
}

void StartPage::fillRecovered(QVBoxLayout* column) {
    const auto found = book::Session::recoverable(book::disk(), sessionPlaces());
    if (found.empty())
        return;
    column->addWidget(heading(tr("Not saved when it was last closed")));
    for (const auto& one : found) {
        const QString title = one.title.empty() ? tr("Book without a name") : QString::fromStdString(one.title);
        auto* card = new BookCard(tr("Recover %1").arg(title),
                                  tr("changes kept: %1, the last on %2").arg(one.entries).arg(whenText(one.time)));
        connect(card, &QAbstractButton::clicked, this, [this, one] { Q_EMIT recoverChosen(one); });
        column->addWidget(card);
    }
    column->addSpacing(space::kL);
}

} // namespace filial::app
