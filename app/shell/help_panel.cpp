// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/shell/help_panel.h"

#include <QComboBox>
#include <QDir>
#include <QFile>
#include <QLabel>
#include <QTextBrowser>
#include <QVBoxLayout>

#include "app/common/help_page.h"
#include "app/common/theme.h"
#include "app/common/version.h"
#include "core/report/cross_report.h"

namespace filial::app {
namespace {

QString pageText(const QString& name) {
    QFile file(QStringLiteral(":/help/%1").arg(name));
    if (!file.open(QIODevice::ReadOnly))
        return {};
    const QString text = QString::fromUtf8(file.readAll());
    // A licence line in a comment heads the file; it is not for reading here.
    return text.startsWith(QLatin1String("<!--")) ? text.section(QStringLiteral("-->"), 1).trimmed() : text;
}

QString titleOf(const QString& text) {
    for (const QString& line : text.split(QLatin1Char('\n')))
        if (line.startsWith(QLatin1String("# ")))
            return line.mid(2).trimmed();
    return {};
}

} // namespace

HelpPanel::HelpPanel(QWidget* parent)
    : QDialog(parent), about_(new QLabel), pages_(new QComboBox), browser_(new QTextBrowser) {
    setModal(false);
    setWindowTitle(tr("Help"));
    resize(560, 640);
    auto* column = new QVBoxLayout(this);
    column->setContentsMargins(space::kXl, space::kL, space::kXl, space::kXl);
    column->setSpacing(space::kM);
    about_->setWordWrap(true);
    about_->setFont(app::font(TextRole::BodyBold));
    column->addWidget(about_);
    pages_->setAccessibleName(tr("Page"));
    browser_->setAccessibleName(tr("Help text"));
    browser_->setFrameShape(QFrame::NoFrame);
    browser_->setOpenLinks(false);
    column->addWidget(pages_);
    column->addWidget(browser_, 1);
    for (const QString& name : QDir(QStringLiteral(":/help")).entryList({QStringLiteral("*.md")})) {
        const QString title = titleOf(pageText(name));
        pages_->addItem(title.isEmpty() ? name : title, name);
    }
    pages_->addItem(tr("About Filial"), QString());
    connect(pages_, &QComboBox::currentIndexChanged, this, &HelpPanel::showPage);
}

QString HelpPanel::aboutFocus(const QWidget* focus) {
    for (const QWidget* one = focus; one != nullptr; one = one->parentWidget())
        if (!one->whatsThis().isEmpty())
            return one->whatsThis();
    return {};
}

QString HelpPanel::pageFor(const QWidget* focus) {
    for (const QWidget* one = focus; one != nullptr; one = one->parentWidget())
        if (const QString page = one->property(kHelpPage).toString(); !page.isEmpty())
            return page;
    return QStringLiteral("goodness-of-fit.md");
}

void HelpPanel::showFor(const QWidget* focus) {
    const QString about = aboutFocus(focus);
    about_->setText(about);
    about_->setVisible(!about.isEmpty());
    const int page = pages_->findData(pageFor(focus));
    pages_->setCurrentIndex(page < 0 ? 0 : page);
    showPage(pages_->currentIndex());
    show();
    raise();
}

void HelpPanel::showAbout() {
    about_->hide();
    pages_->setCurrentIndex(pages_->count() - 1);
    showPage(pages_->currentIndex());
    show();
    raise();
}

QString HelpPanel::text() const {
    return browser_->toPlainText();
}

void HelpPanel::showPage(int index) {
    const QString name = pages_->itemData(index).toString();
    if (!name.isEmpty()) {
        browser_->setMarkdown(pageText(name));
        return;
    }
    QString text = tr("# Filial %1\n\nA workbench for people who score the offspring of crosses.\n\n")
                       .arg(QString::fromLatin1(version()));
    for (const std::string& caution : report::standing_cautions())
        text += QString::fromStdString(caution) + QStringLiteral("\n\n");
    text += tr("Free software under the GNU General Public License, version 3 or later (GPL-3.0-or-later). It comes "
               "without any warranty.");
    browser_->setMarkdown(text);
}

} // namespace filial::app
