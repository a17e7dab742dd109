// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <memory>

#include <QDateTime>
#include <QPointer>
#include <QTimer>
#include <QWidget>

#include "app/shell/notice_bar.h"
#include "app/shell/open_book.h"

class QLabel;
class QMenu;
class QStackedWidget;

namespace filial::app {

class BookView;
class HelpPanel;
class NewCrossPage;
class SettingsPage;
class StartPage;
class TopBar;
class Workbook;

/// The window: one book at a time, or the start page.
class Window : public QWidget {
    Q_OBJECT
public:
    explicit Window(QWidget* parent = nullptr);
    ~Window() override;

    /// Opens a book, or a table of counts as a cross. False where it failed or the person kept the present book; the
    /// reason stands in the notice bar.
    bool openPath(const QString& path);
    bool openSample(const QString& path);
    void recover(const book::Session::Recoverable& which);
    void newCross(); ///< the three questions
    bool save();
    bool saveAs();
    bool closeBook(); ///< back to the start page; false where the person stays
    void settings();  ///< who counts, and the significance level
    void writeReport();
    void copyTable();

    Workbook* workbook() const { return workbook_.get(); }
    BookView* view() const { return view_; }
    StartPage* startPage() const { return start_; }
    SettingsPage* settingsPage() const { return settings_; }
    NewCrossPage* newCrossPage() const { return questions_; }
    QString savedState() const;
    QString statusText() const;
    QString notice() const; ///< "" where none is shown
    QMenu* menu() const { return menu_; }

protected:
    void closeEvent(QCloseEvent* event) override;
    void dragEnterEvent(QDragEnterEvent* event) override;
    void dropEvent(QDropEvent* event) override;

private:
    void takeSession(OpenedSession opened, bool countsAsSaved);
    void showBook(std::unique_ptr<Workbook> workbook);
    bool importTable(const QString& path);
    bool mayLeave(); ///< asks what to do with unsaved changes
    void finishNewCross();
    void backToBook(); ///< from a page of questions
    void open();
    void tellOpened();
    void watchJournal();
    void followBook();
    void followEdit();
    void followSavedState();
    void say(const QString& sentence);
    void refuse(const QString& sentence);
    void toStart();
    void about();
    void help();

    QWidget* makeStatusLine();
    void makeMenu();
    void makeFileMenu();
    void makeEditMenu();
    void makeViewMenu();
    void makeHelpMenu();
    QAction* act(QMenu* menu, const QString& text, const QKeySequence& keys, void (Window::*slot)());
    void followMenu();

    QMenu* menu_;
    TopBar* bar_ = nullptr;
    NoticeBar* notice_;
    bool passing_ = false; ///< the notice is of a refused edit and goes with the next one
    QStackedWidget* pages_;
    StartPage* start_;
    NewCrossPage* questions_;
    SettingsPage* settings_;
    QLabel* status_ = nullptr;
    QLabel* place_ = nullptr;
    std::unique_ptr<Workbook> workbook_;
    QPointer<BookView> view_;
    QPointer<HelpPanel> help_;
    QDateTime savedAt_;
    QTimer journalWatch_;
    QTimer statusFade_;
    bool journalTold_ = false;

    QMenu* recent_ = nullptr;
    QMenu* desk_ = nullptr;
    QMenu* crossMenu_ = nullptr;
    QAction *save_ = nullptr, *saveAs_ = nullptr, *revert_ = nullptr, *close_ = nullptr, *report_ = nullptr;
    QAction *undo_ = nullptr, *redo_ = nullptr, *copy_ = nullptr, *details_ = nullptr;
};

} // namespace filial::app
