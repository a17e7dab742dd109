// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/score/score_view.h"

namespace filial::app {

ScoreView::ScoreView(Workbook* workbook, QObject* parent) : QObject(parent), workbook_(workbook) {
    connect(workbook_, &Workbook::crossChanged, this, [this] { with_ = false; });
    connect(workbook_, &Workbook::analysisChanged, this, [this] {
        altered_.reset();
        with_ = with_ && canShowSetAside();
        Q_EMIT changed();
    });
}

bool ScoreView::canShowSetAside() const {
    return workbook_->analysis().totals_with_set_aside.has_value();
}

void ScoreView::setWithSetAside(bool with) {
    if (with == with_ || (with && !canShowSetAside()))
        return;
    with_ = with;
    altered_.reset();
    Q_EMIT changed();
}

const report::CrossAnalysis& ScoreView::analysis() const {
    const report::CrossAnalysis& plain = workbook_->analysis();
    if (!with_ || !plain.totals_with_set_aside)
        return plain;
    if (!altered_) {
        altered_ = plain;
        altered_->totals = plain.totals_with_set_aside;
        altered_->heterogeneity = plain.heterogeneity_with_set_aside;
        altered_->total = altered_->totals->n;
        altered_->column_totals.clear();
        for (const Count& count : altered_->totals->input.observed)
            altered_->column_totals.push_back(count.value());
    }
    return *altered_;
}

QString ScoreView::scope() const {
    const auto& chosen = workbook_->selectedFamilies();
    if (chosen.empty())
        return {};
    if (chosen.size() > 1)
        return tr("%n families", nullptr, static_cast<int>(chosen.size()));
    const book::Cross* cross = workbook_->shownCross();
    for (const book::Family& family : cross != nullptr ? cross->families : std::vector<book::Family>()) {
        if (family.id == chosen.front())
            return tr("%1 alone").arg(QString::fromStdString(family.label));
    }
    return {};
}

} // namespace filial::app
