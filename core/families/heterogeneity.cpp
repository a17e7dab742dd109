// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/families/heterogeneity.h"

#include <algorithm>
#include <limits>
#include <utility>

#include "core/families/count_table.h"

namespace filial::families {
namespace {

constexpr double kCochranSmallest = 1.0; // Cochran 1954: none below 1 …
constexpr std::size_t kCochranShare = 5; // … and at most one in five below 5

Message say(MessageId id, std::vector<Argument> arguments = {}) {
    return {id, std::move(arguments)};
}

std::optional<Error> wrong(const Input& input) {
    if (input.families.empty())
        return Error{ErrorKind::Input, say(MessageId::FamiliesNone), std::nullopt};
    const std::size_t classes = input.common.hypothesis.class_count();
    std::int64_t total = 0;
    for (const Family& family : input.families) {
        if (family.observed.size() != classes)
            return Error{
                ErrorKind::Input,
                say(MessageId::FamiliesClassCount,
                    {text_argument(family.label), count_argument(static_cast<std::int64_t>(family.observed.size())),
                     count_argument(static_cast<std::int64_t>(classes))}),
                std::nullopt};
        for (const Count count : family.observed) {
            if (count.value() > Count::kLargest - total)
                return Error{ErrorKind::Input, say(MessageId::FamiliesTooManyPlants, {count_argument(Count::kLargest)}),
                             std::nullopt};
            total += count.value();
        }
    }
    return std::nullopt;
}

fit::Input pooled_input(const Input& input) {
    fit::Input result = input.common;
    result.observed.assign(input.common.hypothesis.class_count(), Count{});
    for (const Family& family : input.families)
        for (std::size_t i = 0; i < family.observed.size(); ++i)
            result.observed[i] += family.observed[i];
    return result;
}

// Joins are the same in every family, as the pooled fit has them.
CountTable joined_table(const Input& input, const fit::GoodnessOfFit& pooled) {
    std::vector<std::vector<std::int64_t>> rows;
    rows.reserve(input.families.size());
    for (const Family& family : input.families) {
        auto& row = rows.emplace_back();
        row.reserve(pooled.classes.size());
        for (const fit::ClassResult& one : pooled.classes) {
            std::int64_t sum = 0;
            for (const std::size_t member : one.members)
                sum += family.observed[member].value();
            row.push_back(sum);
        }
    }
    return CountTable(std::move(rows));
}

Shares joined_shares(const Input& input, const fit::GoodnessOfFit& pooled) {
    Shares shares;
    const ratio::Ratio* ratio = input.common.hypothesis.ratio();
    for (const fit::ClassResult& one : pooled.classes) {
        shares.p.push_back(one.probability);
        if (ratio == nullptr)
            continue;
        std::int64_t weight = 0;
        for (const std::size_t member : one.members)
            weight += ratio->weights()[member];
        shares.weights.push_back(weight);
    }
    shares.weight_total = ratio == nullptr ? 0 : ratio->total();
    return shares;
}

Maybe<Tail> upper(double x, int df) {
    if (df < 1)
        return say(MessageId::FamiliesNoDegreesOfFreedom);
    return numeric::chi_square_upper(x, df);
}

bool forbidden_has_plants(const CountTable& table, const Shares& shares) {
    for (std::size_t i = 0; i < shares.p.size(); ++i)
        if (shares.p[i] <= 0.0 && table.totals()[i] > 0)
            return true;
    return false;
}

// The three rows while a forbidden class has offspring: P = 0 by what the hypothesis says, no statistic.
void impossible_rows(const CountTable& table, Heterogeneity& result) {
    const Message reason = say(MessageId::FamiliesForbidden);
    const Tail never{0.0, -std::numeric_limits<double>::infinity()};
    for (SourceRow* row : {&result.total, &result.pooled}) {
        row->chi_square = reason;
        row->g = reason;
        row->chi_square_p = never;
        row->g_p = never;
    }
    SourceRow& between = result.heterogeneity;
    between.chi_square = reason;
    between.chi_square_p = reason;
    between.g = reason;
    between.g_p = reason;
    if (const auto contingency = contingency_statistics(table)) {
        between.df = contingency->df;
        between.g = contingency->g;
        between.g_p = upper(contingency->g, contingency->df);
    }
}

SourceRow row(int df, const TwoStatistics& statistic) {
    SourceRow result;
    result.df = df;
    result.chi_square = statistic.chi_square;
    result.g = statistic.g;
    result.chi_square_p = upper(statistic.chi_square, df);
    result.g_p = upper(statistic.g, df);
    return result;
}

// A fit that refuses its P for another reason than degrees of freedom (an estimate on its boundary) has the total
// refuse it too: both are taken at that estimate.
void refuse_where_the_fit_does(const fit::GoodnessOfFit& pooled, Heterogeneity& result) {
    if (pooled.df < 1 || !pooled.chi_square || pooled.chi_square->p)
        return;
    for (SourceRow* one : {&result.total, &result.pooled}) {
        one->chi_square_p = pooled.chi_square->p.why_not;
        one->g_p = pooled.chi_square->p.why_not;
    }
}

void source_table(const CountTable& table, const Shares& shares, Heterogeneity& result) {
    const int families = static_cast<int>(table.families_with_plants());
    const int free_classes = std::max(0, static_cast<int>(shares.possible()) - 1);
    const int fitted = free_classes - result.pooled_fit.df; // charged once, not once a family
    result.pooled.df = families == 0 ? 0 : std::max(0, free_classes - fitted);
    result.total.df = std::max(0, families * free_classes - fitted);
    result.heterogeneity.df = std::max(0, families - 1) * free_classes;
    if (table.total() == 0) {
        result.total.df = 0;
        for (SourceRow* one : {&result.total, &result.pooled, &result.heterogeneity}) {
            const Message reason = say(MessageId::FamiliesNoPlants);
            one->chi_square = reason;
            one->chi_square_p = reason;
            one->g = reason;
            one->g_p = reason;
        }
        return;
    }
    if (forbidden_has_plants(table, shares)) {
        impossible_rows(table, result);
        return;
    }
    result.total = row(result.total.df, total_statistics(table, shares));
    result.pooled = row(result.pooled.df, statistics(table.totals(), shares));
    const auto contingency = contingency_statistics(table);
    result.heterogeneity =
        row(result.heterogeneity.df, {between_scaled(table, shares), contingency.has_value() ? contingency->g : 0.0});
    refuse_where_the_fit_does(result.pooled_fit, result);
}

void compare_families(const CountTable& table, double alpha, Heterogeneity& result) {
    const auto statistic = contingency_statistics(table);
    if (!statistic.has_value()) {
        result.contingency = say(table.total() == 0                  ? MessageId::FamiliesNoPlants
                                 : table.families_with_plants() == 1 ? MessageId::FamiliesOnlyOne
                                                                     : MessageId::FamiliesOneClass);
        return;
    }
    Contingency contingency;
    contingency.df = statistic->df;
    contingency.statistic = statistic->chi_square;
    contingency.p = upper(statistic->chi_square, statistic->df);
    contingency.smallest_expected = statistic->smallest_expected;
    contingency.cells = statistic->cells;
    contingency.cells_below_5 = statistic->cells_below_5;
    result.heterogeneous = contingency.p && contingency.p->p < alpha;
    result.contingency = contingency;
}

void extra_variation(const Input& input, const CountTable& table, const Shares& shares, Heterogeneity& result) {
    if (!result.total.chi_square || result.total.df < 1) {
        result.overdispersion =
            result.total.chi_square ? say(MessageId::FamiliesNoDegreesOfFreedom) : result.total.chi_square.why_not;
        return;
    }
    Overdispersion extra;
    extra.phi = *result.total.chi_square / result.total.df;
    const Message rho_reason = say(MessageId::FamiliesRhoNotComputed);
    extra.rho = rho_reason;
    extra.rho_low = rho_reason;
    extra.rho_high = rho_reason;
    extra.lr = rho_reason;
    extra.p = rho_reason;
    if (input.common.fitted_elsewhere > 0 || !input.common.hypothesis.free_parameters().empty()) {
        extra.z = say(MessageId::FamiliesScoreTestFitted);
    } else if (const auto z = score_z(table, shares)) {
        extra.z = *z;
        extra.z_p = numeric::normal_upper(*z);
        extra.z_note = say(MessageId::FamiliesScoreTestNormal);
    } else {
        extra.z = say(MessageId::FamiliesScoreTestNoPairs);
    }
    if (!extra.z)
        extra.z_p = extra.z.why_not;
    if (result.contingency) {
        FreeMean free;
        free.phi = result.contingency->statistic / result.contingency->df;
        free.mean = rho_reason;
        free.rho = rho_reason;
        free.lr = rho_reason;
        free.log_likelihood = rho_reason;
        free.p = rho_reason;
        extra.free = std::move(free);
    } else {
        extra.free = result.contingency.why_not;
    }
    result.overdispersion = std::move(extra);
}

void odd_families(const Input& input, const CountTable& table, Heterogeneity& result) {
    const std::size_t classes = table.classes_with_plants();
    if (table.families_with_plants() < 2 || classes < 2)
        return;
    const int df = static_cast<int>(classes) - 1;
    const auto statistic = against_the_rest(table);
    std::vector<double> p;
    for (std::size_t j = 0; j < statistic.size(); ++j) {
        if (!statistic[j].has_value())
            continue;
        OddFamily one;
        one.label = input.families[j].label;
        one.family = j;
        one.statistic = *statistic[j];
        one.df = df;
        one.p = numeric::chi_square_upper(one.statistic, df);
        p.push_back(one.p.p);
        result.outliers.push_back(std::move(one));
    }
    // Of two families each is the other's rest: one test, nothing to adjust for.
    const bool one_test = p.size() == 2;
    const auto by_holm = one_test ? p : holm(p);
    const auto by_rate = one_test ? p : benjamini_hochberg(p);
    for (std::size_t i = 0; i < p.size(); ++i) {
        result.outliers[i].p_holm = by_holm[i];
        result.outliers[i].p_bh = by_rate[i];
    }
}

void say_verdict(double alpha, Heterogeneity& result) {
    if (!result.contingency) {
        const MessageId why = result.contingency.why_not.id;
        result.verdict_sentence = say(why == MessageId::FamiliesNoPlants  ? MessageId::FamiliesNotComparedEmptyLine
                                      : why == MessageId::FamiliesOnlyOne ? MessageId::FamiliesNotComparedOneLine
                                                                          : MessageId::FamiliesNotComparedClassLine);
        result.line = result.verdict_sentence;
        return;
    }
    const Argument p = p_argument(result.contingency->p->p);
    if (!result.heterogeneous) {
        result.verdict_sentence = say(MessageId::FamiliesVerdictAgree);
        result.line = say(MessageId::FamiliesAgreeLine, {p});
        return;
    }
    result.verdict_sentence = say(MessageId::FamiliesVerdictDiffer);
    result.line = say(MessageId::FamiliesDifferLine, {p});
    const auto oddest = std::min_element(result.outliers.begin(), result.outliers.end(),
                                         [](const auto& a, const auto& b) { return a.p.log10_p < b.p.log10_p; });
    // Two families cannot tell which of them is the odd one.
    if (result.outliers.size() > 2 && oddest->p_holm < alpha)
        result.line =
            say(MessageId::FamiliesDifferOddLine, {p, text_argument(oddest->label), p_argument(oddest->p_holm)});
}

void say_cautions(const Input& input, const CountTable& table, const Shares& shares, Heterogeneity& result) {
    if (result.contingency) {
        const Contingency& c = *result.contingency;
        if (c.smallest_expected < kCochranSmallest || c.cells_below_5 * kCochranShare > c.cells)
            result.cautions.push_back(
                say(MessageId::FamiliesSmallExpected,
                    {count_argument(static_cast<std::int64_t>(c.cells_below_5)),
                     count_argument(static_cast<std::int64_t>(c.cells)), number_argument(c.smallest_expected, 1)}));
        const auto& scaled = result.heterogeneity.chi_square_p;
        if (scaled && (scaled->p < input.common.alpha) != result.heterogeneous)
            result.cautions.push_back(
                say(MessageId::FamiliesScaledDisagrees, {p_argument(scaled->p), p_argument(c.p->p)}));
    }
    const std::size_t without = result.families - result.families_of_df;
    if (without > 0)
        result.cautions.push_back(
            say(MessageId::FamiliesWithoutPlants, {count_argument(static_cast<std::int64_t>(without))}));
    for (std::size_t i = 0; i < table.totals().size() && table.total() > 0; ++i)
        if (table.totals()[i] == 0 && shares.p[i] > 0.0)
            result.cautions.push_back(
                say(MessageId::FamiliesEmptyClass, {text_argument(result.pooled_fit.classes[i].label)}));
    for (const fit::Estimate& estimate : result.pooled_fit.estimates)
        result.cautions.push_back(say(MessageId::FamiliesFittedTogether, {text_argument(estimate.name)}));
}

Result<std::vector<fit::GoodnessOfFit>> family_fits(const Input& input, const CancellationToken& cancel,
                                                    const Progress& progress) {
    std::vector<fit::GoodnessOfFit> fits;
    fits.reserve(input.families.size());
    fit::Input one = input.common;
    for (const Family& family : input.families) {
        if (cancel.cancelled())
            return Error{ErrorKind::Input, say(MessageId::Cancelled), std::nullopt};
        one.observed = family.observed;
        auto result = fit::goodness_of_fit(one, cancel);
        if (!result)
            return result.error();
        fits.push_back(std::move(result).value());
        if (progress)
            progress(static_cast<double>(fits.size()) / static_cast<double>(input.families.size()));
    }
    return fits;
}

} // namespace

Result<Heterogeneity> heterogeneity(const Input& input, const CancellationToken& cancel, const Progress& progress) {
    if (auto error = wrong(input))
        return *error;
    auto pooled = fit::goodness_of_fit(pooled_input(input), cancel);
    if (!pooled)
        return pooled.error();
    Heterogeneity result(std::move(pooled).value());
    if (input.with_family_fits) {
        auto fits = family_fits(input, cancel, progress);
        if (!fits)
            return fits.error();
        result.per_family = std::move(fits).value();
    }
    const CountTable table = joined_table(input, result.pooled_fit);
    const Shares shares = joined_shares(input, result.pooled_fit);
    result.families = input.families.size();
    result.families_of_df = table.families_with_plants();
    result.exact = say(MessageId::FamiliesExactNotComputed);
    source_table(table, shares, result);
    compare_families(table, input.common.alpha, result);
    extra_variation(input, table, shares, result);
    odd_families(input, table, result);
    say_verdict(input.common.alpha, result);
    say_cautions(input, table, shares, result);
    return result;
}

} // namespace filial::families
