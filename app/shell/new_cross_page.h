// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QScrollArea>
#include <QStringList>

#include "core/book/model.h"

class QButtonGroup;
class QLabel;
class QLineEdit;
class QPushButton;
class QVBoxLayout;

namespace filial::app {

class ClassPreview;

/// A new cross in three questions: what was crossed, which generation, which classes.
class NewCrossPage : public QScrollArea {
    Q_OBJECT
public:
    explicit NewCrossPage(QWidget* parent = nullptr);
    void begin(); ///< empties the fields

    book::Cross cross() const;   ///< as answered
    QStringList parents() const; ///< names of the lines crossed

Q_SIGNALS:
    void answered();
    void cancelled();

protected:
    void keyPressEvent(QKeyEvent* event) override;

private:
    struct TraitRow {
        QWidget* box;
        QLineEdit* name;
        QLineEdit* levels;
    };
    void build();
    QWidget* crossedQuestion();
    QWidget* generationQuestion();
    QWidget* classesQuestion();
    void addTrait(const QString& name, const QString& levels);
    void orderTabs();
    void follow(); ///< lists the classes again and says what is missing
    std::vector<book::Trait> traits() const;
    QString generation() const;
    QString problem() const;

    QLineEdit* first_ = nullptr;
    QLineEdit* second_ = nullptr;
    QButtonGroup* generations_ = nullptr;
    QVBoxLayout* traitRows_ = nullptr;
    QList<TraitRow> rows_;
    QPushButton* more_ = nullptr;
    ClassPreview* preview_ = nullptr;
    QLabel* problem_ = nullptr;
    QPushButton* create_ = nullptr;
    QPushButton* cancel_ = nullptr;
};

} // namespace filial::app
