// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/shell/window.h"

#include <QCloseEvent>
#include <QDir>
#include <QDragEnterEvent>
#include <QFileInfo>
#include <QHBoxLayout>
#include <QLabel>
#include <QMenu>
#include <QMimeData>
#include <QPainter>
#include <QSettings>
#include <QStackedWidget>
#include <QVBoxLayout>

#include "app/common/text.h"
#include "app/common/theme.h"
#include "app/common/workbook.h"
#include "app/shell/book_view.h"
#include "app/shell/help_panel.h"
#include "app/shell/new_cross_page.h"
#include "app/shell/settings_page.h"
#include "app/shell/start_page.h"
#include "app/shell/top_bar.h"

namespace filial::app {
namespace {

constexpr int kStatusHeight = 28;
constexpr int kStatusStays = 12'000;   // milliseconds
constexpr int kJournalWatched = 1'000; // milliseconds

/// A line of tokens' own colours under everything.
class StatusLine : public QFrame {
protected:
    void paintEvent(QPaintEvent* /*event*/) override {
        QPainter painter(this);
        painter.fillRect(rect(), tokens().surface);
        painter.fillRect(0, 0, width(), 1, tokens().rule);
    }
};

} // namespace

Window::Window(QWidget* parent)
    : QWidget(parent), menu_(new QMenu(this)), notice_(new NoticeBar), pages_(new QStackedWidget),
      start_(new StartPage), questions_(new NewCrossPage), settings_(new SettingsPage) {
    bar_ = new TopBar(menu_);
    auto* box = new QVBoxLayout(this);
    box->setContentsMargins(0, 0, 0, 0);
    box->setSpacing(0);
    box->addWidget(bar_);
    box->addWidget(notice_);
    box->addWidget(pages_, 1);
    box->addWidget(makeStatusLine());
    pages_->addWidget(start_);
    pages_->addWidget(questions_);
    pages_->addWidget(settings_);
    setAcceptDrops(true);
    setMinimumSize(620, 400);
    connect(start_, &StartPage::newCrossWanted, this, &Window::newCross);
    connect(start_, &StartPage::openWanted, this, &Window::open);
    connect(start_, &StartPage::sampleChosen, this, &Window::openSample);
    connect(start_, &StartPage::recentChosen, this, &Window::openPath);
    connect(start_, &StartPage::recoverChosen, this, &Window::recover);
    connect(questions_, &NewCrossPage::answered, this, &Window::finishNewCross);
    connect(questions_, &NewCrossPage::cancelled, this, &Window::backToBook);
    connect(settings_, &SettingsPage::left, this, &Window::backToBook);
    connect(bar_, &TopBar::reportWanted, this, &Window::writeReport);
    connect(bar_, &TopBar::deskChosen, this, [this](int index) {
        if (view_ != nullptr)
            view_->showDesk(index);
    });
    connect(&journalWatch_, &QTimer::timeout, this, &Window::watchJournal);
    statusFade_.setSingleShot(true);
    statusFade_.setInterval(kStatusStays);
    connect(&statusFade_, &QTimer::timeout, this, [this] { status_->clear(); });
    makeMenu();
    resize(1360, 860);
    if (const QByteArray geometry = QSettings().value(QStringLiteral("shell/geometry")).toByteArray();
        !geometry.isEmpty())
        restoreGeometry(geometry);
    toStart();
}

Window::~Window() {
    // The panes read the workbook while they are being taken down.
    delete view_;
}

QWidget* Window::makeStatusLine() {
    auto* line = new StatusLine;
    line->setFixedHeight(kStatusHeight);
    auto* row = new QHBoxLayout(line);
    row->setContentsMargins(space::kL, 0, space::kL, 0);
    status_ = new QLabel;
    place_ = new QLabel;
    for (QLabel* label : {status_, place_})
        label->setFont(app::font(TextRole::Note));
    status_->setTextFormat(Qt::PlainText);
    status_->setSizePolicy(QSizePolicy::Ignored, QSizePolicy::Preferred);
    place_->setTextFormat(Qt::PlainText);
    setInk(place_, Ink::Muted);
    row->addWidget(status_, 1);
    row->addWidget(place_);
    return line;
}

void Window::say(const QString& sentence) {
    status_->setText(sentence);
    statusFade_.start();
}

void Window::refuse(const QString& sentence) {
    notice_->show(NoticeBar::Kind::Error, sentence);
    passing_ = false;
}

QString Window::savedState() const {
    return bar_->savedState();
}

QString Window::statusText() const {
    return status_->text();
}

QString Window::notice() const {
    return notice_->sentence();
}

void Window::toStart() {
    delete view_;
    workbook_.reset();
    journalWatch_.stop();
    start_->refresh();
    pages_->setCurrentWidget(start_);
    followBook();
    followMenu();
}

void Window::showBook(std::unique_ptr<Workbook> workbook) {
    delete view_;
    workbook_ = std::move(workbook);
    journalTold_ = false;
    view_ = new BookView(workbook_.get());
    pages_->addWidget(view_);
    pages_->setCurrentWidget(view_);
    QStringList names;
    for (const Desk* desk : view_->desks())
        names << desk->name();
    bar_->setDesks(names);
    connect(view_, &BookView::newCrossWanted, this, &Window::newCross);
    connect(view_, &BookView::leftWidthChanged, bar_, &TopBar::setLeftWidth);
    connect(workbook_.get(), &Workbook::said, this, &Window::say);
    connect(workbook_.get(), &Workbook::refused, this, [this](const QString& sentence) {
        refuse(sentence);
        passing_ = true;
    });
    connect(workbook_.get(), &Workbook::bookChanged, this, &Window::followEdit);
    connect(workbook_.get(), &Workbook::savedStateChanged, this, &Window::followSavedState);
    connect(workbook_.get(), &Workbook::bookChanged, this, &Window::followBook);
    connect(workbook_.get(), &Workbook::bookChanged, this, &Window::followMenu);
    journalWatch_.start(kJournalWatched);
    followBook();
    followMenu();
    bar_->setLeftWidth(view_->leftWidth());
    tellOpened();
    view_->desk()->middle()->setFocus();
}

void Window::followBook() {
    const bool open = workbook_ != nullptr;
    bar_->setBookOpen(open);
    const QString path = open ? QString::fromStdString(workbook_->session().path()) : QString();
    bar_->setName(open ? workbook_->displayName() : QStringLiteral("Filial"), QDir::toNativeSeparators(path));
    setWindowTitle(open ? tr("%1 – Filial").arg(workbook_->displayName()) : QStringLiteral("Filial"));
    place_->setText(!open                   ? QString()
                    : workbook_->readOnly() ? tr("read-only: %1").arg(QDir::toNativeSeparators(path))
                    : path.isEmpty()        ? tr("a new book, kept in the journal until you save it")
                                            : QDir::toNativeSeparators(path));
    followSavedState();
}

void Window::followEdit() {
    // What was said of the edit or the save before no longer holds.
    status_->clear();
    if (passing_)
        notice_->hide();
    passing_ = false;
}

void Window::followSavedState() {
    if (workbook_ == nullptr) {
        bar_->setSavedState({}, {});
        return;
    }
    const book::Session& session = workbook_->session();
    const bool saved = !session.path().empty() && !session.dirty();
    const QString journal = session.journal_state() == book::JournalState::OnDisk
                                ? tr("Every change is in the journal already.")
                                : tr("Changes are in memory only: the journal cannot be written.");
    const QString time = savedAt_.isValid() ? QLocale().toString(savedAt_, QLocale::ShortFormat) : QString();
    const QString last = time.isEmpty() ? QString() : tr("Last saved %1.").arg(time);
    bar_->setSavedState(saved                    ? tr("Saved")
                        : session.path().empty() ? tr("Not saved yet")
                                                 : tr("Changes not saved"),
                        saved ? last : QStringList{last, journal}.join(QLatin1Char(' ')).trimmed());
    followMenu();
}

void Window::watchJournal() {
    if (workbook_ == nullptr)
        return;
    const auto error = workbook_->session().journal_error();
    if (!error) {
        journalTold_ = false;
        return;
    }
    if (journalTold_)
        return;
    journalTold_ = true;
    passing_ = false;
    notice_->show(NoticeBar::Kind::Warning,
                  tr("The journal cannot be written (%1). Your changes are in this window only: save the book soon.")
                      .arg(app::say(error->message)));
    followSavedState();
}

void Window::newCross() {
    questions_->begin();
    pages_->setCurrentWidget(questions_);
}

void Window::settings() {
    settings_->begin(workbook_.get());
    pages_->setCurrentWidget(settings_);
    settings_->setFocus(Qt::TabFocusReason);
}

void Window::backToBook() {
    pages_->setCurrentWidget(view_ != nullptr ? static_cast<QWidget*>(view_) : start_);
    if (view_ != nullptr)
        view_->desk()->middle()->setFocus();
    followSavedState();
}

void Window::closeEvent(QCloseEvent* event) {
    if (!mayLeave()) {
        event->ignore();
        return;
    }
    QSettings().setValue(QStringLiteral("shell/geometry"), saveGeometry());
    toStart();
    event->accept();
}

void Window::dragEnterEvent(QDragEnterEvent* event) {
    if (event->mimeData()->hasUrls() && event->mimeData()->urls().size() == 1 &&
        event->mimeData()->urls().front().isLocalFile())
        event->acceptProposedAction();
}

void Window::dropEvent(QDropEvent* event) {
    event->acceptProposedAction();
    openPath(event->mimeData()->urls().front().toLocalFile());
}

} // namespace filial::app
