// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/verdict.h"

#include <algorithm>
#include <cmath>

#include "core/fit/intervals.h"
#include "core/inheritance/class_order.h"

namespace filial::fit {
namespace {

constexpr double kInHundreds = 0.0995; // from here "10 of 100", below "99 of 1,000"
constexpr double kRare = 0.001;
constexpr double kNearlyAll = 0.995;

std::int64_t forbidden_offspring(const Sample& sample) {
    std::int64_t total = 0;
    for (const Cell& cell : sample.cells)
        if (cell.probability == 0.0)
            total += cell.observed;
    return total;
}

std::string forbidden_labels(const GoodnessOfFit& result) {
    std::string names;
    for (const ClassResult& one : result.classes)
        if (one.probability == 0.0 && one.observed.value() > 0)
            names += (names.empty() ? "" : ", ") + one.label;
    return names;
}

Message meaning_of(double p, const Argument& ratio) {
    if (p >= 1.0)
        return {MessageId::FitMeansAll, {ratio}};
    if (p >= kNearlyAll)
        return {MessageId::FitMeansNearlyAll, {ratio}};
    if (p >= kInHundreds)
        return {MessageId::FitMeansOfHundred, {ratio, count_argument(std::lround(100.0 * p))}};
    if (p >= kRare)
        return {MessageId::FitMeansOfThousand, {ratio, count_argument(std::lround(1000.0 * p))}};
    return {MessageId::FitMeansRare, {ratio}};
}

void set_impossible(GoodnessOfFit& result, const Sample& sample, const Argument& ratio) {
    const std::int64_t seen = forbidden_offspring(sample);
    const double rate = share_that_explains(seen, sample.n, result.input.alpha);
    result.verdict = Verdict::Impossible;
    result.rescuing_error_rate = rate;
    result.verdict_sentence = {MessageId::FitImpossible, {ratio, text_argument(forbidden_labels(result))}};
    const int decimals = rate < 0.001 ? 4 : rate < 0.01 ? 2 : 1;
    result.meaning = {MessageId::FitMeansImpossible,
                      {ratio, count_argument(seen), count_argument(sample.n), percent_argument(rate, decimals)}};
}

} // namespace

std::optional<Tail> deciding_p(const GoodnessOfFit& result) {
    if (result.exact && result.input.method != Method::ChiSquare)
        return result.exact->p;
    if (result.chi_square && result.chi_square->p)
        return *result.chi_square->p;
    return std::nullopt;
}

void set_verdict(GoodnessOfFit& result, const Sample& sample) {
    const Argument ratio = ratio_argument(inheritance::notation_in_class_order(result.input.hypothesis));
    if (sample.n > 0 && impossible(sample))
        return set_impossible(result, sample, ratio);
    const std::optional<Tail> p = deciding_p(result);
    if (!p) {
        result.verdict = Verdict::NotTested;
        result.verdict_sentence = {MessageId::FitNotTested, {ratio}};
        result.meaning = Message{sample.n == 0   ? MessageId::FitNoPlants
                                 : result.df < 1 ? MessageId::FitNoDegreesOfFreedom
                                                 : result.chi_square->p.why_not.id,
                                 {}};
        return;
    }
    const bool contradicted = p->p < result.input.alpha;
    result.verdict = contradicted ? Verdict::Contradicted : Verdict::NotContradicted;
    result.verdict_sentence = {contradicted ? MessageId::FitContradicted : MessageId::FitNotContradicted, {ratio}};
    result.meaning = meaning_of(p->p, ratio);
}

} // namespace filial::fit
