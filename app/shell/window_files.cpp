// SPDX-License-Identifier: GPL-3.0-or-later
// How books come into the window and leave it.
#include <QClipboard>
#include <QDate>
#include <QDir>
#include <QFile>
#include <QFileInfo>
#include <QGuiApplication>
#include <QSaveFile>
#include <QStackedWidget>

#include "app/charts/chart_adapter.h"
#include "app/common/ask.h"
#include "app/common/text.h"
#include "app/common/version.h"
#include "app/common/workbook.h"
#include "app/shell/book_view.h"
#include "app/shell/cross_acts.h"
#include "app/shell/help_panel.h"
#include "app/shell/new_cross_page.h"
#include "app/shell/places.h"
#include "app/shell/window.h"
#include "core/report/cross_report.h"

namespace filial::app {
namespace {

const char* const kBookEnding = ".filial";

QString withEnding(QString path, const char* ending) {
    if (!path.isEmpty() && QFileInfo(path).suffix().isEmpty())
        path += QLatin1String(ending);
    return path;
}

bool isTable(const QString& path) {
    const QString ending = QFileInfo(path).suffix().toLower();
    return ending == QLatin1String("csv") || ending == QLatin1String("tsv") || ending == QLatin1String("txt");
}

report::Provenance provenanceOf(Workbook& workbook) {
    const QString path = QString::fromStdString(workbook.session().path());
    report::Provenance provenance;
    provenance.program_version = version();
    provenance.input_name =
        path.isEmpty() ? workbook.displayName().toStdString() + kBookEnding : QFileInfo(path).fileName().toStdString();
    // What the command below will read: the saved file, or the bytes a save would write now.
    QFile file(path);
    const bool asSaved = !workbook.session().dirty() && file.open(QIODevice::ReadOnly);
    provenance.input_sha256 =
        book::sha256_hex(asSaved ? file.readAll().toStdString() : book::write_book(workbook.book()));
    provenance.command = "filial report \"" + provenance.input_name + "\" --select \"" + workbook.currentCross()->name +
                         "\" --out report.html";
    provenance.parents = report::parent_names(workbook.book(), *workbook.currentCross());
    provenance.date = QDate::currentDate().toString(Qt::ISODate).toStdString();
    return provenance;
}

} // namespace

void Window::takeSession(OpenedSession opened, bool countsAsSaved) {
    if (!opened) {
        refuse(app::say(opened.error().message));
        return;
    }
    const QString path = QString::fromStdString(opened.value()->path());
    savedAt_ = countsAsSaved ? QFileInfo(path).lastModified() : QDateTime();
    if (countsAsSaved)
        rememberBook(path);
    showBook(std::make_unique<Workbook>(std::move(opened).value()));
}

void Window::tellOpened() {
    book::Session& session = workbook_->session();
    notice_->hide();
    passing_ = false;
    QStringList sentences;
    for (const Message& warning : session.warnings())
        sentences << app::say(warning);
    if (session.recovered_entries() == 1)
        sentences << tr("Recovered 1 change that had not been saved. Save the book to keep it, or revert.");
    else if (session.recovered_entries() > 1)
        sentences << tr("Recovered %1 changes that had not been saved. Save the book to keep them, or revert.")
                         .arg(session.recovered_entries());
    if (session.read_only())
        sentences << tr("This book can be read here, not changed. Save it under another name to change it.");
    if (!sentences.isEmpty())
        notice_->show(session.read_only() ? NoticeBar::Kind::Warning : NoticeBar::Kind::Note,
                      sentences.join(QLatin1Char(' ')));
    if (session.recovered_entries() > 0 && !session.read_only() && !session.path().empty())
        notice_->offer(tr("Revert"), [this] {
            if (workbook_ != nullptr) // the book may have been closed since
                workbook_->revertToSaved();
        });
}

bool Window::openPath(const QString& path) {
    if (isTable(path))
        return importTable(path);
    if (workbook_ != nullptr && !workbook_->session().path().empty() &&
        QFileInfo(path) == QFileInfo(QString::fromStdString(workbook_->session().path()))) {
        say(tr("This book is open here already."));
        return true;
    }
    // Opened before the present one is left: where it fails, nothing has been closed.
    OpenedSession opened = openBookFile(path);
    if (!opened) {
        refuse(app::say(opened.error().message));
        return false;
    }
    if (!mayLeave())
        return false;
    takeSession(std::move(opened), true);
    return true;
}

bool Window::openSample(const QString& path) {
    OpenedSession opened = openAsCopy(path);
    if (!opened) {
        refuse(app::say(opened.error().message));
        return false;
    }
    if (!mayLeave())
        return false;
    takeSession(std::move(opened), false);
    return true;
}

void Window::recover(const book::Session::Recoverable& which) {
    if (!mayLeave())
        return;
    OpenedSession opened = book::Session::recover(book::disk(), sessionPlaces(), which);
    const bool known = opened && !opened.value()->path().empty();
    takeSession(std::move(opened), known);
}

bool Window::importTable(const QString& path) {
    Result<book::Cross> cross = crossFromTable(path);
    if (!cross) {
        refuse(app::say(cross.error().message));
        return false;
    }
    if (workbook_ == nullptr)
        takeSession(newBook(QFileInfo(path).completeBaseName()), false);
    if (workbook_ == nullptr || !addCross(workbook_.get(), std::move(cross).value(), {}))
        return false;
    say(tr("Added %1 as a cross").arg(QFileInfo(path).fileName()));
    return true;
}

void Window::finishNewCross() {
    if (workbook_ == nullptr)
        takeSession(newBook(), false);
    if (workbook_ == nullptr)
        return;
    pages_->setCurrentWidget(view_);
    addCross(workbook_.get(), questions_->cross(), questions_->parents());
    view_->desk()->middle()->setFocus();
}

void Window::open() {
    const QString path = Ask::instance().openFile(
        this, tr("Open a book"), tr("Books and tables (*.filial *.csv *.tsv);;Books (*.filial);;All files (*)"));
    if (!path.isEmpty())
        openPath(path);
}

bool Window::save() {
    if (workbook_ == nullptr)
        return false;
    if (workbook_->session().path().empty() || workbook_->readOnly())
        return saveAs();
    const bool saved = workbook_->save();
    if (saved)
        savedAt_ = QDateTime::currentDateTime();
    else
        passing_ = false; // a failed save stays said
    followSavedState();
    return saved;
}

bool Window::saveAs() {
    if (workbook_ == nullptr)
        return false;
    const QString suggestion = workbook_->displayName() + QLatin1String(kBookEnding);
    const QString path = withEnding(
        Ask::instance().saveFile(this, tr("Save the book as"), suggestion, tr("Books (*.filial)")), kBookEnding);
    if (path.isEmpty())
        return false;
    if (!workbook_->saveAs(path)) {
        passing_ = false;
        return false;
    }
    savedAt_ = QDateTime::currentDateTime();
    rememberBook(path);
    followBook();
    return true;
}

bool Window::mayLeave() {
    if (workbook_ == nullptr)
        return true;
    book::Session& session = workbook_->session();
    if (!session.dirty()) {
        if (session.path().empty())
            return session.discard().ok(); // nothing was done to it: nothing to keep
        return true;
    }
    const int answer = Ask::instance().choose(
        this, tr("Save the changes to %1?").arg(workbook_->displayName()),
        tr("They are in the journal. “Keep for later” leaves the file as it is and offers the changes again when you "
           "come back."),
        {tr("Save"), tr("Keep for later"), tr("Discard")});
    switch (answer) {
    case 0:
        return save();
    case 1:
        session.wait_until_synced();
        return true;
    case 2: {
        const Done discarded = session.discard();
        if (!discarded)
            refuse(app::say(discarded.error().message));
        return discarded.ok();
    }
    default:
        return false;
    }
}

bool Window::closeBook() {
    if (!mayLeave())
        return false;
    toStart();
    return true;
}

void Window::writeReport() {
    if (workbook_ == nullptr || workbook_->currentCross() == nullptr)
        return;
    if (workbook_->analysing()) {
        say(tr("The results of this cross are still being worked out."));
        return;
    }
    const QString suggestion = QString::fromStdString(workbook_->currentCross()->name) + QStringLiteral(".html");
    const QString path = withEnding(
        Ask::instance().saveFile(this, tr("Write the report to"), suggestion, tr("Pages (*.html)")), ".html");
    if (path.isEmpty())
        return;
    const report::Document document =
        report::cross_report(*workbook_->currentCross(), workbook_->analysis(), provenanceOf(*workbook_));
    QSaveFile file(path);
    const std::string page = report::write_html(document, {&chartSvg});
    if (!file.open(QIODevice::WriteOnly) ||
        file.write(page.data(), static_cast<qint64>(page.size())) != static_cast<qint64>(page.size()) ||
        !file.commit()) {
        refuse(tr("The report could not be written to %1: %2").arg(QDir::toNativeSeparators(path), file.errorString()));
        return;
    }
    say(tr("Report written to %1").arg(QDir::toNativeSeparators(path)));
    Ask::instance().showFile(path);
}

void Window::copyTable() {
    if (view_ == nullptr)
        return;
    const QString block = view_->desk()->copyTable();
    if (block.isEmpty())
        return;
    QGuiApplication::clipboard()->setText(block);
    say(tr("Table copied: paste it into a spreadsheet"));
}

} // namespace filial::app
