// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <functional>
#include <memory>
#include <optional>

#include <QObject>
#include <QString>
#include <QStringList>

#include "core/book/session.h"
#include "core/report/cross_analysis.h"

// Terms. The workbook is the open book as the window knows it: core's session plus what is chosen on the screen (cross,
// families, preview of an open editor). Desks read it and change it only through edits.
namespace filial::app {

class Workbook : public QObject {
    Q_OBJECT
public:
    explicit Workbook(std::unique_ptr<book::Session> session, QObject* parent = nullptr);
    ~Workbook() override;

    const book::Book& book() const;
    book::Session& session();
    QString displayName() const; ///< file's base name, or "new book"

    book::Id currentCrossId() const;
    const book::Cross* currentCross() const; ///< null in an empty book
    void setCurrentCross(const book::Id& id);

    /// Families chosen in the table; empty: all.
    const std::vector<book::Id>& selectedFamilies() const;
    void setSelectedFamilies(std::vector<book::Id> families);

    /// Performs an edit; a refused one is shown by `refused`. The merge key joins consecutive edits to one undo step.
    bool perform(book::Edit edit, const QString& mergeKey = {});
    void undo();
    void redo();

    /// File acts of the session; what came of them is said or refused.
    bool save();
    bool saveAs(const QString& path);
    bool revertToSaved();

    /// Live preview: the current cross with an editor's valid text in it, not yet committed. Empty optional drops it.
    void setPreview(std::optional<book::Cross> preview);
    /// The cross to show: preview where there is one, else the current cross.
    const book::Cross* shownCross() const;
    /// Analysis of `shownCross()` under the present selection and alpha; computed on demand, kept until something
    /// changes. Of a cross with very many families it is worked out on another thread; until `analysisChanged` says
    /// that it is there, this is what was there before.
    const report::CrossAnalysis& analysis() const;
    bool analysing() const; ///< `analysis()` is still the former one

    double alpha() const;
    void setAlpha(double alpha);
    /// The significance level kept between books; 0.05 where none was set.
    static double rememberedAlpha();
    static bool rememberAlpha(double alpha); ///< false, and nothing kept, unless it lies between 0 and 1
    bool readOnly() const;

Q_SIGNALS:
    void bookChanged();  ///< anything in the book (also undo, redo, revert)
    void crossChanged(); ///< another cross is current
    void selectionChanged();
    void analysisChanged();      ///< what `analysis()` gives is different now
    void busyChanged(bool busy); ///< an analysis takes so long that a person should see it
    void savedStateChanged();
    void said(const QString& sentence);    ///< status line: "Undid: F2-06, 34 → 31"
    void refused(const QString& sentence); ///< an edit or file action that failed, with its reason

private:
    void afterChange();
    void outdateAnalysis();
    report::AnalysisOptions analysisOptions() const;
    void rememberPlace();
    void goToChange(const std::vector<book::Cross>& before); ///< shows the cross that undo or redo changed
    bool tell(const Done& result, const QString& sentence);
    struct Private;
    std::unique_ptr<Private> p_;
};

} // namespace filial::app
