// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QDialog>

class QComboBox;
class QLabel;
class QTextBrowser;

namespace filial::app {

/// Help beside the work: what has the focus, then the pages. Not modal.
class HelpPanel : public QDialog {
    Q_OBJECT
public:
    explicit HelpPanel(QWidget* parent);
    /// What a widget, or the nearest one around it, says about itself.
    static QString aboutFocus(const QWidget* focus);
    /// The page on a widget or what is around it; on the test of the counts where none is named.
    static QString pageFor(const QWidget* focus);
    void showFor(const QWidget* focus);
    void showAbout();
    QString text() const;

private:
    void showPage(int index);
    QLabel* about_;
    QComboBox* pages_;
    QTextBrowser* browser_;
};

} // namespace filial::app
