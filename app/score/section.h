// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <optional>
#include <vector>

#include <QGridLayout>
#include <QPushButton>
#include <QVBoxLayout>

#include "app/score/words.h"

namespace filial::app {

/// Rows of a label and up to three right-aligned numbers; labels are kept and filled again, so that a key press lays
/// nothing out anew.
class ResultGrid : public QWidget {
    Q_OBJECT
public:
    struct Row {
        QString id; ///< object names: id, id-statistic, id-df, id-p
        QString label;
        QString statistic, df, p;
        QString statistic_tip, p_tip;
        QString label_tip = {};
        bool strong = false;
        bool muted = false;
        bool warn = false;
    };
    explicit ResultGrid(QWidget* parent = nullptr);
    void setRows(const std::vector<Row>& rows);

protected:
    void paintEvent(QPaintEvent* event) override;

private:
    struct Line {
        Words *label, *statistic, *df, *p;
        bool strong = false;
    };
    Line& line(std::size_t index);
    QGridLayout* grid_;
    std::vector<Line> lines_;
    std::size_t shown_ = 0;
};

/// A titled part of the right column; a click or Space on the title folds it.
class Section : public QWidget {
    Q_OBJECT
public:
    Section(const QString& id, const QString& title, QWidget* parent = nullptr);
    QVBoxLayout* content() const { return content_; }
    void setTitle(const QString& title);
    void setFolded(bool folded); ///< by hand: from then on not by height
    void foldForHeight(bool folded);
    bool folded() const { return folded_; }

private:
    void apply();
    QPushButton* title_;
    QWidget* body_;
    QVBoxLayout* content_;
    QString text_;
    bool folded_ = false;
    bool by_hand_ = false;
};

} // namespace filial::app
