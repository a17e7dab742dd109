// SPDX-License-Identifier: GPL-3.0-or-later
// The parts of the right column, each filled from the analysis.
#include <algorithm>

#include "app/common/text.h"
#include "app/score/meaning_column.h"

namespace filial::app {

namespace {

using Row = ResultGrid::Row;

/// The name under which a family remembers that its percentages hint was dismissed; the analysis looks for it.
constexpr const char* kPercentagesHint = "percentages";

QString dfText(int df) {
    return MeaningColumn::tr("%1 df").arg(df);
}

void setP(Row& row, double p) {
    row.p = MeaningColumn::tr("P %1").arg(pText(p));
    row.p_tip = fullText(p);
}

void setStatistic(Row& row, double statistic) {
    row.statistic = statisticText(statistic);
    row.statistic_tip = fullText(statistic);
}

template <class T> void setTail(Row& row, const Maybe<T>& tail) {
    if (tail)
        setP(row, tail->p);
    else {
        row.p = MeaningColumn::tr("no P");
        row.p_tip = say(tail.why_not);
        row.muted = true;
    }
}

QString signedCharge(int charge) {
    return charge < 0 ? QStringLiteral("−") + QString::number(-charge) : QString::number(charge);
}

} // namespace

QString MeaningColumn::nothingTested() const {
    const book::Cross* cross = view_->workbook()->shownCross();
    const bool counted = cross != nullptr && std::any_of(cross->families.begin(), cross->families.end(),
                                                         [cross](const book::Family& family) {
                                                             return !family.blank(cross->classes.size());
                                                         });
    return counted && cross->hypothesis.notation.empty() ? tr("Choose a ratio to test against.")
                                                         : tr("No counts yet. Type the first family in the table.");
}

void MeaningColumn::refreshFit(const report::CrossAnalysis& analysis) {
    if (!analysis.totals) {
        const bool chosen = analysis.hypothesis_error && !view_->workbook()->shownCross()->hypothesis.notation.empty();
        const QString why = chosen           ? say(analysis.hypothesis_error->message)
                            : analysis.error ? say(analysis.error->message)
                                             : nothingTested();
        verdict_->say(why);
        tests_->setRows({});
        meaning_->say({});
        return;
    }
    const fit::GoodnessOfFit& fit = *analysis.totals;
    verdict_->say(say(fit.verdict_sentence));
    std::vector<Row> rows;
    if (fit.chi_square) {
        Row row{"chi-square", QStringLiteral("χ²"), {}, dfText(fit.df), {}, {}, {}};
        setStatistic(row, fit.chi_square->statistic);
        setTail(row, fit.chi_square->p);
        rows.push_back(row);
    }
    if (fit.exact) {
        Row row{"exact", tr("exact"), {}, {}, {}, {}, {}};
        setP(row, fit.exact->p.p);
        rows.push_back(row);
    }
    if (fit.g) {
        Row row{"g", QStringLiteral("G"), {}, dfText(fit.df), {}, {}, {}};
        setStatistic(row, fit.g->statistic);
        setTail(row, fit.g->p);
        rows.push_back(row);
    }
    if (fit.yates) {
        Row row{"yates", tr("Yates"), {}, dfText(fit.df), {}, {}, {}};
        setStatistic(row, fit.yates->statistic);
        setP(row, fit.yates->p.p);
        rows.push_back(row);
    }
    for (const fit::Estimate& estimate : fit.estimates) {
        Row row{"estimate-" + QString::fromStdString(estimate.name),
                tr("%1 fitted").arg(QString::fromStdString(estimate.name)),
                {},
                {},
                {},
                {},
                {}};
        setStatistic(row, estimate.value);
        row.p = estimate.standard_error ? tr("SE %1").arg(fixedText(*estimate.standard_error, 3)) : tr("no SE");
        row.p_tip = estimate.standard_error ? fullText(*estimate.standard_error) : say(estimate.standard_error.why_not);
        rows.push_back(row);
    }
    tests_->setRows(rows);
    meaning_->say(say(fit.meaning) + QLatin1Char(' ') + tr("Tested at α = %1.").arg(QString::number(fit.input.alpha)));
}

void MeaningColumn::refreshFamilies(const report::CrossAnalysis& analysis) {
    families_->setVisible(analysis.heterogeneity.has_value());
    if (!analysis.heterogeneity)
        return;
    const families::Heterogeneity& found = *analysis.heterogeneity;
    heterogeneity_->say(say(found.line), say(found.verdict_sentence));
    app::setInk(heterogeneity_, found.heterogeneous ? Ink::Warning : Ink::Normal);
    std::vector<Row> rows;
    const auto add = [&rows](const QString& id, const QString& label, const families::SourceRow& source) {
        Row row{id, label, {}, dfText(source.df), {}, {}, {}};
        if (source.chi_square)
            setStatistic(row, *source.chi_square);
        else
            row.statistic_tip = say(source.chi_square.why_not);
        setTail(row, source.chi_square_p);
        rows.push_back(row);
    };
    add("source-between", tr("between, χ²"), found.heterogeneity);
    add("source-pooled", tr("pooled"), found.pooled);
    add("source-total", tr("total"), found.total);
    if (found.contingency) {
        Row row{"contingency", tr("contingency"), {}, dfText(found.contingency->df), {}, {}, {}};
        setStatistic(row, found.contingency->statistic);
        setTail(row, found.contingency->p);
        row.strong = true;
        rows.push_back(row);
    }
    sources_->setRows(rows);
}

std::vector<MeaningColumn::Caution> MeaningColumn::cautionsOf(const report::CrossAnalysis& analysis) {
    std::vector<Caution> cautions;
    joins_.clear();
    if (analysis.totals) {
        for (const Message& message : analysis.totals->cautions)
            cautions.push_back({say(message), {}, -1, {}});
        joins_ = analysis.totals->proposed_joins;
        for (std::size_t i = 0; i < joins_.size() && i < 3; ++i) {
            QStringList labels;
            for (const std::size_t member : joins_[i])
                labels << (member < analysis.class_labels.size() ? QString::fromStdString(analysis.class_labels[member])
                                                                 : QString::number(member + 1));
            cautions.push_back({{}, tr("Join %1").arg(labels.join(QStringLiteral(" + "))), static_cast<int>(i), {}});
        }
    }
    if (analysis.heterogeneity) {
        for (const Message& message : analysis.heterogeneity->cautions)
            cautions.push_back({say(message), {}, -1, {}});
    }
    for (const report::FamilyAnalysis& family : analysis.families) {
        for (const Message& hint : family.hints) {
            const bool percentages = hint.id == MessageId::FitLooksLikePercentages;
            const QString label = QString::fromStdString(family.label);
            cautions.push_back({label + QStringLiteral(": ") + say(hint),
                                percentages ? tr("%1 holds plants: dismiss").arg(label) : QString(), -1, family.id});
        }
    }
    return cautions;
}

void MeaningColumn::refreshCautions(const report::CrossAnalysis& analysis) {
    const std::vector<Caution> cautions = cautionsOf(analysis);
    for (std::size_t i = caution_lines_.size(); i < cautions.size(); ++i) {
        auto* line = new Words(TextRole::Note, Ink::Warning, cautions_);
        line->setWordWrap(true);
        line->setObjectName(QStringLiteral("caution-%1").arg(i));
        auto* button = new TextButton({}, cautions_);
        connect(button, &QPushButton::clicked, this, [this, i] { actOn(i); });
        cautions_->content()->addWidget(line);
        cautions_->content()->addWidget(button, 0, Qt::AlignLeft);
        caution_lines_.push_back(line);
        caution_buttons_.push_back(button);
    }
    for (std::size_t i = 0; i < caution_lines_.size(); ++i) {
        const Caution shown = i < cautions.size() ? cautions[i] : Caution{};
        caution_lines_[i]->say(shown.text.isEmpty() ? QString() : QStringLiteral("! ") + shown.text);
        TextButton* button = caution_buttons_[i];
        button->setVisible(!shown.action.isEmpty());
        button->setObjectName(shown.join >= 0 ? QStringLiteral("propose-join-%1").arg(shown.join)
                                              : QStringLiteral("dismiss-hint-%1").arg(i));
        button->setText(shown.action);
        button->updateGeometry();
    }
    cautions_shown_ = cautions;
    cautions_->setVisible(!cautions.empty());
}

void MeaningColumn::actOn(std::size_t caution) {
    if (caution >= cautions_shown_.size())
        return;
    const Caution shown = cautions_shown_[caution];
    if (shown.join >= 0)
        Q_EMIT joinRequested(joins_[static_cast<std::size_t>(shown.join)]);
    else if (!shown.hint.empty())
        dismissHint(shown.hint);
}

void MeaningColumn::dismissHint(const book::Id& id) {
    const book::Cross* cross = view_->workbook()->currentCross();
    if (cross == nullptr)
        return;
    for (const book::Family& family : cross->families) {
        if (family.id != id)
            continue;
        book::Family after = family;
        after.dismissed_hints.emplace_back(kPercentagesHint);
        view_->workbook()->perform({book::SetFamily{cross->id, book::Family(family), after}});
        return;
    }
}

void MeaningColumn::refreshAccount(const fit::GoodnessOfFit* fit) {
    account_->setVisible(fit != nullptr);
    if (fit == nullptr)
        return;
    std::vector<Row> rows;
    for (const fit::Charge& charge : fit->df_account) {
        Row row{QStringLiteral("charge-%1").arg(rows.size()),
                say(charge.what),
                {},
                {},
                signedCharge(charge.charge),
                {},
                {}};
        rows.push_back(row);
    }
    Row sum{"df", tr("for the test"), {}, {}, signedCharge(fit->df), {}, {}};
    sum.strong = true;
    rows.push_back(sum);
    charges_->setRows(rows);
}

void MeaningColumn::refreshMisfit(const fit::GoodnessOfFit* fit) {
    misfit_->setVisible(fit != nullptr && fit->classes.size() > 2);
    if (fit == nullptr)
        return;
    std::vector<Row> rows;
    if (fit->partition) {
        for (const fit::PartitionRow& part : *fit->partition) {
            Row row{QStringLiteral("part-%1").arg(rows.size()), say(part.what), {}, {}, {}, {}, {}};
            setStatistic(row, part.statistic);
            setP(row, part.p.p);
            rows.push_back(row);
        }
        misfit_note_->say({});
    } else {
        for (const fit::ClassResult& result : fit->classes) {
            Row row{
                QStringLiteral("part-%1").arg(rows.size()), QString::fromStdString(result.label), {}, {}, {}, {}, {}};
            row.statistic = result.adjusted_residual ? fixedText(*result.adjusted_residual, 2) : QString();
            row.statistic_tip = result.adjusted_residual ? fullText(*result.adjusted_residual) : QString();
            if (result.p_holm)
                setP(row, *result.p_holm);
            row.warn = result.p_holm && *result.p_holm < fit->input.alpha;
            rows.push_back(row);
        }
        misfit_note_->say(tr("departure in standard errors, P adjusted for the number of classes"));
    }
    parts_->setRows(rows);
}

void MeaningColumn::refreshSown(const report::CrossAnalysis& analysis) {
    sown_->setVisible(analysis.sown_to_scored.has_value());
    if (!analysis.sown_to_scored)
        return;
    const report::SownToScored& found = *analysis.sown_to_scored;
    QStringList sentences;
    for (const Message& message : found.sentences)
        sentences << say(message);
    sown_line_->say(sentences.isEmpty() ? QString() : sentences.takeFirst());
    sown_note_->say(sentences.join(u' '));
}

void MeaningColumn::refreshDetectable(const fit::GoodnessOfFit* fit) {
    detect_->setVisible(fit != nullptr && !fit->detectable.empty());
    if (fit == nullptr)
        return;
    std::vector<Row> rows;
    QString where;
    for (const fit::Detectable& one : fit->detectable) {
        Row row{QStringLiteral("detect-%1").arg(rows.size()),
                tr("%1 % power").arg(fixedText(one.power * 100.0, 0)),
                {},
                {},
                {},
                {},
                {}};
        if (one.percentage_points) {
            row.p = tr("±%1 points").arg(fixedText(*one.percentage_points * 100.0, 1));
            row.p_tip = fullText(*one.percentage_points);
            if (one.class_index < fit->classes.size())
                where = QString::fromStdString(fit->classes[one.class_index].label);
        }
        row.statistic = tr("w %1").arg(fixedText(one.w, 3));
        row.statistic_tip = fullText(one.w);
        rows.push_back(row);
    }
    detect_rows_->setRows(rows);
    detect_note_->say(where.isEmpty() ? QString() : tr("percentage points in %1; w: Cohen 1988").arg(where));
}

} // namespace filial::app
