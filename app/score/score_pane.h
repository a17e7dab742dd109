// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QButtonGroup>
#include <QTableWidget>

#include "app/charts/chart_adapter.h"
#include "app/score/departure_map.h"
#include "app/score/family_table.h"
#include "app/score/hypothesis_blank.h"
#include "app/score/score_view.h"
#include "app/score/totals_table.h"
#include "app/score/words.h"

namespace filial::app {

class HypothesisPanel;

/// The middle of the Score desk: head line, family table, totals, departure map or chart.
class ScorePane : public QWidget {
    Q_OBJECT
public:
    explicit ScorePane(ScoreView* view, QWidget* parent = nullptr);

    FamilyTable* table() const { return table_; }
    HypothesisPanel* panel() const { return panel_; }
    void chooseHypothesis(); ///< opens the panel below the blank
    void showAsTable();      ///< toggles the twin of the picture shown
    void joinClasses(const std::vector<std::size_t>& classes);
    QSize sizeHint() const override { return {818, 812}; }

protected:
    void resizeEvent(QResizeEvent* event) override;
    bool event(QEvent* event) override;

private:
    void build();
    void wire();
    void refresh();
    void refreshNotes();
    void refreshTwin();
    void refreshChart();
    void split(std::size_t join);
    void arrange();
    void showPictures(bool pictured); ///< the chosen one, or none in a low window
    void arrangeHead(int left, int width);
    void showPicture();

    ScoreView* view_;
    QString meaning_; ///< second line in full
    Workbook* workbook_;
    FamilyModel* model_;
    Words *name_, *against_, *sub_, *notes_;
    HypothesisBlank* blank_;
    QPushButton *sown_, *paste_;
    TextButton *join_, *with_;
    FamilyTable* table_;
    TotalsTable* totals_;
    DepartureMapWidget* map_;
    ChartWidget* chart_;
    QTableWidget* twin_;
    TextButton *show_map_, *show_chart_, *as_table_;
    HypothesisPanel* panel_;
};

} // namespace filial::app
