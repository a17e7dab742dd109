// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QScrollArea>
#include <QTimer>

#include "app/common/runner.h"
#include "app/score/score_view.h"
#include "app/score/section.h"

namespace filial::app {

/// The right column of the Score desk: what the counts mean. A sentence first, then numbers, then what could be wrong.
class MeaningColumn : public QScrollArea {
    Q_OBJECT
public:
    explicit MeaningColumn(ScoreView* view, QWidget* parent = nullptr);

Q_SIGNALS:
    void joinRequested(const std::vector<std::size_t>& classes);

protected:
    void resizeEvent(QResizeEvent* event) override;

private:
    struct Caution {
        QString text;
        QString action; ///< text of its button; "" none
        int join = -1;  ///< index into joins_
        book::Id hint;  ///< family whose hint is dismissed
    };
    std::vector<Caution> cautionsOf(const report::CrossAnalysis& analysis);
    void actOn(std::size_t caution);
    void build();
    void refresh();
    QString nothingTested() const; ///< what is missing for a test
    void refreshFit(const report::CrossAnalysis& analysis);
    void refreshFamilies(const report::CrossAnalysis& analysis);
    void refreshCautions(const report::CrossAnalysis& analysis);
    void refreshAccount(const fit::GoodnessOfFit* fit);
    void refreshMisfit(const fit::GoodnessOfFit* fit);
    void refreshSown(const report::CrossAnalysis& analysis);
    void refreshDetectable(const fit::GoodnessOfFit* fit);
    void requestAlternatives();
    void showAlternatives(const report::Alternatives& alternatives);
    void dismissHint(const book::Id& family);

    ScoreView* view_;
    Section *fit_, *families_, *cautions_, *also_, *account_, *misfit_, *sown_, *detect_;
    Words *verdict_, *meaning_, *heterogeneity_, *also_note_, *sown_line_, *sown_note_, *detect_note_, *misfit_note_;
    TextButton* all_families_;
    ResultGrid *tests_, *sources_, *also_rows_, *charges_, *parts_, *detect_rows_;
    std::vector<Words*> caution_lines_;
    std::vector<TextButton*> caution_buttons_;
    std::vector<std::vector<std::size_t>> joins_;
    std::vector<Caution> cautions_shown_;
    Runner<report::Alternatives> runner_;
    QTimer later_;
};

} // namespace filial::app
