// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QFrame>
#include <QLineEdit>
#include <QSpinBox>

#include "app/common/workbook.h"
#include "app/score/binding_editor.h"
#include "app/score/catalogue_list.h"
#include "app/score/words.h"

namespace filial::app {

/// Marks the place of an error below a field, with the reason.
class PlaceMark : public QWidget {
    Q_OBJECT
public:
    PlaceMark(QLineEdit* field, QWidget* parent);
    void setError(const std::optional<Error>& error);

protected:
    void paintEvent(QPaintEvent* event) override;

private:
    QLineEdit* field_;
    std::optional<Error> error_;
};

/// Choosing and typing a hypothesis, below the blank. What is chosen is previewed everywhere; Enter keeps it as one
/// undo step, Esc restores.
class HypothesisPanel : public QFrame {
    Q_OBJECT
public:
    HypothesisPanel(Workbook* workbook, QWidget* parent);
    ~HypothesisPanel() override;

    void openBelow(const QRect& blank);
    void place(const QRect& blank);
    void accept();
    void cancel();

Q_SIGNALS:
    void closed();

protected:
    void keyPressEvent(QKeyEvent* event) override;
    void paintEvent(QPaintEvent* event) override;
    bool eventFilter(QObject* object, QEvent* event) override;

private:
    void build();
    void textEdited(const QString& text);
    void rowChosen(int row);
    void setCandidate(const inheritance::Hypothesis& hypothesis, const QString& name,
                      const std::vector<std::string>& meanings);
    book::HypothesisUse use() const;
    void preview();
    void showVerdict();
    bool usable() const; ///< a hypothesis with one term for each class
    void moveRow(int by);
    void close();

    Workbook* workbook_;
    CatalogueModel* model_;
    QLineEdit* field_;
    PlaceMark* mark_;
    CatalogueList* list_;
    Words *binding_title_, *fitted_title_, *verdict_;
    BindingEditor* binding_;
    QSpinBox* fitted_;
    QPushButton *use_, *cancel_;
    std::optional<inheritance::Hypothesis> candidate_;
    QString candidate_name_;
    bool opening_ = false;
};

} // namespace filial::app
