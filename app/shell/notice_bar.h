// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <functional>

#include <QFrame>

class QLabel;
class QPushButton;
class QToolButton;

namespace filial::app {

/// A calm line under the top bar: what went wrong or what should be known, with its reason. It never stops the work
/// and goes when dismissed.
class NoticeBar : public QFrame {
    Q_OBJECT
public:
    enum class Kind { Note, Warning, Error };
    explicit NoticeBar(QWidget* parent = nullptr);
    void show(Kind kind, const QString& sentence);
    /// A button beside the sentence until the next one; the bar goes when it is pressed.
    void offer(const QString& words, std::function<void()> act);
    QString sentence() const;

protected:
    void paintEvent(QPaintEvent* event) override;

private:
    QLabel* glyph_;
    QLabel* text_;
    QPushButton* act_;
    QPushButton* dismiss_;
    std::function<void()> offered_;
};

} // namespace filial::app
