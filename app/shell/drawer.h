// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QWidget>

class QPushButton;
class QVBoxLayout;

namespace filial::app {

/// On a narrow window the right column lies at the bottom: closed, its one line is the verdict; open, the whole column.
class Drawer : public QWidget {
    Q_OBJECT
public:
    explicit Drawer(QWidget* parent = nullptr);
    void setLine(const QString& verdict);
    QString line() const;
    void take(QWidget* column);
    bool isOpen() const { return open_; }
    void setOpen(bool open);

protected:
    void paintEvent(QPaintEvent* event) override;

private:
    void dress();
    QPushButton* handle_;
    QVBoxLayout* box_;
    QWidget* column_ = nullptr;
    QString line_;
    bool open_ = false;
};

} // namespace filial::app
