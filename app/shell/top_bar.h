// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QStringList>
#include <QWidget>

class QLabel;
class QMenu;
class QPushButton;
class QTabBar;
class QToolButton;

namespace filial::app {

/// The bar of 48 px on top: the book's name, the desks, whether it is saved, the report, the menu.
class TopBar : public QWidget {
    Q_OBJECT
public:
    explicit TopBar(QMenu* menu, QWidget* parent = nullptr);
    void setName(const QString& name, const QString& tip);
    void setDesks(const QStringList& names);
    void setDesk(int index);
    /// "" where no book is open.
    void setSavedState(const QString& state, const QString& tip);
    void setBookOpen(bool open);
    void setLeftWidth(int width); ///< the first tab begins where the middle does
    QString savedState() const;

Q_SIGNALS:
    void deskChosen(int index);
    void reportWanted();

protected:
    void paintEvent(QPaintEvent* event) override;

private:
    QLabel* name_;
    QTabBar* tabs_;
    QLabel* saved_;
    QPushButton* report_;
    QToolButton* menu_;
};

} // namespace filial::app
