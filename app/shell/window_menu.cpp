// SPDX-License-Identifier: GPL-3.0-or-later
// The menu of the window. Every act in it works, or is greyed out where it does not apply.
#include <QAction>
#include <QActionGroup>
#include <QApplication>
#include <QFileInfo>
#include <QMenu>
#include <QPushButton>
#include <QSettings>
#include <QToolButton>

#include "app/common/text.h"
#include "app/common/theme.h"
#include "app/common/workbook.h"
#include "app/shell/book_view.h"
#include "app/shell/cross_acts.h"
#include "app/shell/help_panel.h"
#include "app/shell/places.h"
#include "app/shell/theme_choice.h"
#include "app/shell/window.h"

namespace filial::app {

QAction* Window::act(QMenu* menu, const QString& text, const QKeySequence& keys, void (Window::*slot)()) {
    QAction* action = menu->addAction(text);
    action->setShortcut(keys);
    connect(action, &QAction::triggered, this, slot);
    addAction(action); // the menu is closed most of the time: the window itself listens for the keys
    return action;
}

void Window::makeMenu() {
    makeFileMenu();
    makeEditMenu();
    desk_ = menu_->addMenu(tr("Desk"));
    makeViewMenu();
    makeHelpMenu();
    auto* openMenu = new QAction(this);
    openMenu->setShortcut(Qt::Key_F10);
    connect(openMenu, &QAction::triggered, this, [this] {
        if (auto* button = findChild<QToolButton*>(QStringLiteral("menu button")))
            button->showMenu();
    });
    addAction(openMenu);
    auto* panes = new QAction(this);
    panes->setShortcut(Qt::Key_F6);
    connect(panes, &QAction::triggered, this, [this] {
        if (view_ != nullptr)
            view_->nextPane();
    });
    addAction(panes);
    for (int i = 0; i < 5; ++i) {
        auto* desk = new QAction(this);
        desk->setShortcut(QKeySequence(Qt::CTRL | static_cast<Qt::Key>(Qt::Key_1 + i)));
        connect(desk, &QAction::triggered, this, [this, i] {
            if (view_ != nullptr)
                view_->showDesk(i);
        });
        addAction(desk);
    }
    connect(menu_, &QMenu::aboutToShow, this, &Window::followMenu);
}

void Window::makeFileMenu() {
    QMenu* file = menu_->addMenu(tr("Book"));
    act(file, tr("New cross…"), QKeySequence(Qt::CTRL | Qt::Key_N), &Window::newCross);
    act(file, tr("Open…"), QKeySequence(Qt::CTRL | Qt::Key_O), &Window::open);
    recent_ = file->addMenu(tr("Open recent"));
    file->addSeparator();
    QAction* saving = file->addAction(tr("Save"));
    saving->setShortcut(QKeySequence(Qt::CTRL | Qt::Key_S));
    connect(saving, &QAction::triggered, this, [this] { save(); });
    addAction(saving);
    save_ = saving;
    saveAs_ = file->addAction(tr("Save as…"));
    saveAs_->setShortcut(QKeySequence(Qt::CTRL | Qt::SHIFT | Qt::Key_S));
    connect(saveAs_, &QAction::triggered, this, [this] { saveAs(); });
    addAction(saveAs_);
    revert_ = file->addAction(tr("Revert to the saved book"));
    connect(revert_, &QAction::triggered, this, [this] { workbook_->revertToSaved(); });
    file->addSeparator();
    report_ = act(file, tr("Report…"), QKeySequence(Qt::CTRL | Qt::Key_P), &Window::writeReport);
    file->addSeparator();
    close_ = file->addAction(tr("Close the book"));
    close_->setShortcut(QKeySequence(Qt::CTRL | Qt::Key_W));
    connect(close_, &QAction::triggered, this, [this] { closeBook(); });
    addAction(close_);
    QAction* quit = file->addAction(tr("Quit"));
    quit->setShortcut(QKeySequence(Qt::CTRL | Qt::Key_Q));
    connect(quit, &QAction::triggered, this, [this] { close(); });
    addAction(quit);
}

void Window::makeEditMenu() {
    QMenu* edit = menu_->addMenu(tr("Edit"));
    undo_ = edit->addAction(tr("Undo"));
    undo_->setShortcut(QKeySequence(Qt::CTRL | Qt::Key_Z));
    redo_ = edit->addAction(tr("Redo"));
    redo_->setShortcut(QKeySequence(Qt::CTRL | Qt::SHIFT | Qt::Key_Z));
    connect(undo_, &QAction::triggered, this, [this] {
        if (workbook_ != nullptr)
            workbook_->undo();
    });
    connect(redo_, &QAction::triggered, this, [this] {
        if (workbook_ != nullptr)
            workbook_->redo();
    });
    addAction(undo_);
    addAction(redo_);
    edit->addSeparator();
    copy_ = act(edit, tr("Copy table"), QKeySequence(Qt::CTRL | Qt::SHIFT | Qt::Key_C), &Window::copyTable);
    edit->addSeparator();
    details_ = edit->addAction(tr("Details of the cross…"));
    connect(details_, &QAction::triggered, this, [this] {
        if (view_ != nullptr)
            view_->showDetails();
    });
    crossMenu_ = edit->addMenu(tr("Cross"));
}

void Window::makeViewMenu() {
    QMenu* view = menu_->addMenu(tr("Theme"));
    auto* group = new QActionGroup(this);
    for (const ThemeChoice choice : {ThemeChoice::System, ThemeChoice::Light, ThemeChoice::Dark, ThemeChoice::DimRed}) {
        QAction* action = view->addAction(themeChoiceText(choice));
        action->setCheckable(true);
        action->setChecked(choice == chosenTheme());
        group->addAction(action);
        connect(action, &QAction::triggered, this, [choice] { chooseTheme(choice); });
    }
}

void Window::makeHelpMenu() {
    act(menu_, tr("Settings…"), QKeySequence(Qt::CTRL | Qt::Key_Comma), &Window::settings);
    menu_->addSeparator();
    act(menu_, tr("Help on this"), QKeySequence(Qt::Key_F1), &Window::help);
    QAction* about = menu_->addAction(tr("About Filial"));
    connect(about, &QAction::triggered, this, &Window::about);
}

void Window::followMenu() {
    if (undo_ == nullptr)
        return;
    const bool open = workbook_ != nullptr;
    const bool cross = open && workbook_->currentCross() != nullptr;
    save_->setEnabled(open);
    saveAs_->setEnabled(open);
    close_->setEnabled(open);
    revert_->setEnabled(open && workbook_->session().dirty() && !workbook_->session().path().empty());
    report_->setEnabled(cross);
    copy_->setEnabled(cross);
    details_->setEnabled(cross);
    const auto text = [](const QString& verb, const std::optional<Message>& what) {
        return what ? QStringLiteral("%1: %2").arg(verb, app::say(*what)) : verb;
    };
    undo_->setEnabled(open && workbook_->session().log().can_undo());
    redo_->setEnabled(open && workbook_->session().log().can_redo());
    undo_->setText(text(tr("Undo"), open ? workbook_->session().log().undo_text() : std::nullopt));
    redo_->setText(text(tr("Redo"), open ? workbook_->session().log().redo_text() : std::nullopt));
    crossMenu_->clear();
    if (cross)
        addCrossActs(*crossMenu_, workbook_.get());
    crossMenu_->menuAction()->setVisible(cross);
    desk_->clear();
    if (view_ != nullptr)
        desk_->addActions(view_->desk()->actions());
    desk_->menuAction()->setVisible(!desk_->isEmpty());
    recent_->clear();
    for (const QString& path : recentBooks())
        recent_->addAction(QFileInfo(path).completeBaseName(), this, [this, path] { openPath(path); });
    recent_->menuAction()->setVisible(!recent_->isEmpty());
}

void Window::help() {
    const QWidget* focus = QApplication::focusWidget();
    if (help_ == nullptr)
        help_ = new HelpPanel(this);
    help_->showFor(focus);
}

void Window::about() {
    if (help_ == nullptr)
        help_ = new HelpPanel(this);
    help_->showAbout();
}

} // namespace filial::app
