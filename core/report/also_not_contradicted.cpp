// SPDX-License-Identifier: GPL-3.0-or-later
#include <algorithm>
#include <utility>

#include "core/families/count_table.h"
#include "core/inheritance/catalogue.h"
#include "core/numeric/tails.h"
#include "core/report/cross_analysis.h"

namespace filial::report {
namespace {

using inheritance::CatalogueEntry;
using inheritance::Hypothesis;

// The chi-square P of the totals, joined as they are; 0 where a forbidden class has offspring, empty without degrees of
// freedom.
std::optional<double> p_of_ratio(const ratio::Ratio& ratio, const fit::GoodnessOfFit& totals) {
    families::Shares shares;
    std::vector<std::int64_t> observed;
    shares.weight_total = ratio.total();
    for (const fit::ClassResult& one : totals.classes) {
        std::int64_t weight = 0;
        for (const std::size_t member : one.members)
            weight += ratio.weights()[member];
        shares.weights.push_back(weight);
        shares.p.push_back(static_cast<double>(weight) / static_cast<double>(ratio.total()));
        observed.push_back(one.observed.value());
        if (weight == 0 && one.observed.value() > 0)
            return 0.0;
    }
    const std::size_t possible = shares.possible();
    if (possible < 2)
        return std::nullopt;
    return numeric::chi_square_upper(families::statistics(observed, shares).chi_square,
                                     static_cast<double>(possible - 1))
        .p;
}

std::optional<double> p_of(const Hypothesis& hypothesis, const fit::GoodnessOfFit& totals) {
    if (const ratio::Ratio* ratio = hypothesis.ratio())
        return p_of_ratio(*ratio, totals);
    fit::Input question = totals.input;
    question.hypothesis = hypothesis;
    question.method = fit::Method::ChiSquare; // a bootstrap for each rival would keep the person waiting
    const auto fit = fit::goodness_of_fit(question);
    if (!fit || !fit.value().chi_square || !fit.value().chi_square->p)
        return std::nullopt;
    return fit.value().chi_square->p->p;
}

} // namespace

Alternatives also_not_contradicted(const CrossAnalysis& analysis, std::size_t most) {
    const bool chosen_after_seeing = std::any_of(analysis.notes.begin(), analysis.notes.end(), [](const Message& note) {
        return note.id == MessageId::NoteChosenAfterSeeing;
    });
    Alternatives result;
    if (!analysis.totals.has_value())
        return result;
    const fit::GoodnessOfFit& totals = *analysis.totals;
    const Hypothesis& stated = totals.input.hypothesis;
    std::vector<const Hypothesis*> tried; // one ratio with several meanings is tried once
    for (const CatalogueEntry& entry : inheritance::catalogue()) {
        const Hypothesis& rival = entry.hypothesis;
        const auto same = [&](const Hypothesis* other) { return *other == rival; };
        if (rival.class_count() != stated.class_count() || rival == stated ||
            std::any_of(tried.begin(), tried.end(), same))
            continue;
        const auto p = p_of(rival, totals);
        if (!p.has_value())
            continue;
        tried.push_back(&rival);
        if (*p >= totals.input.alpha)
            result.not_contradicted.push_back({entry.name, rival.notation(), *p});
    }
    result.tried = tried.size() + 1; // the stated one is among those compared
    std::stable_sort(result.not_contradicted.begin(), result.not_contradicted.end(),
                     [](const auto& a, const auto& b) { return a.p > b.p; });
    const auto count = [](std::size_t number) { return count_argument(static_cast<std::int64_t>(number)); };
    if (!tried.empty()) {
        result.notes.push_back(
            {MessageId::AlternativesTried,
             {count(tried.size()), count(stated.class_count()), count(result.not_contradicted.size())}});
        if (chosen_after_seeing)
            result.notes.push_back({MessageId::AlternativesConfirm, {count(result.tried)}});
    }
    if (result.not_contradicted.size() > most)
        result.not_contradicted.resize(most);
    return result;
}

} // namespace filial::report
