// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/report/sown_to_scored.h"

#include <algorithm>
#include <array>
#include <utility>

#include "core/fit/verdict.h"

namespace filial::report {
namespace {

using Number = std::optional<Count>;

Message say(MessageId id, std::vector<std::int64_t> counts) {
    Message message{id, {}};
    for (const std::int64_t count : counts)
        message.arguments.push_back(count_argument(count));
    return message;
}

void compare(const Number& later, const Number& earlier, MessageId id, std::vector<Message>& hints) {
    if (later.has_value() && earlier.has_value() && *later > *earlier)
        hints.push_back(say(id, {later->value(), earlier->value()}));
}

struct Sum {
    std::optional<std::int64_t> value; // where every family has the number
    std::size_t known = 0;
};

Sum sum(const std::vector<const book::Family*>& families, Number book::Family::*stage) {
    Sum result;
    std::int64_t total = 0;
    for (const book::Family* family : families)
        if (const Number& number = family->*stage; number.has_value()) {
            ++result.known;
            total += number->value();
        }
    if (result.known == families.size() && !families.empty())
        result.value = total;
    return result;
}

Message stages_sentence(const SownToScored& s) {
    using Id = MessageId;
    std::vector<std::int64_t> counts;
    for (const auto& stage : {s.sown, s.emerged, s.alive})
        if (stage.has_value())
            counts.push_back(*stage);
    counts.push_back(s.scored);
    if (counts.size() == 1) {
        counts.push_back(s.not_scored);
        return say(Id::ScoredNotScored, counts);
    }
    if (s.sown.has_value())
        return say(s.emerged.has_value() ? (s.alive.has_value() ? Id::SownUpAliveScored : Id::SownUpScored)
                                         : (s.alive.has_value() ? Id::SownAliveScored : Id::SownScored),
                   counts);
    return say(s.emerged.has_value() ? (s.alive.has_value() ? Id::UpAliveScored : Id::UpScored) : Id::AliveScored,
               counts);
}

bool rejects(fit::Verdict verdict) {
    return verdict == fit::Verdict::Contradicted || verdict == fit::Verdict::Impossible;
}

void bounds(const fit::GoodnessOfFit& totals, const CancellationToken& cancel, SownToScored& result) {
    if (totals.verdict == fit::Verdict::NotTested || result.lost <= 0 || result.lost > Count::kLargest - result.scored)
        return;
    for (std::size_t i = 0; i < totals.input.observed.size() && !cancel.cancelled(); ++i) {
        fit::Input then = totals.input;
        then.observed[i] += Count(result.lost);
        const auto fit = fit::goodness_of_fit(then, cancel);
        if (!fit)
            continue;
        SownToScored::IfAllLost bound;
        bound.class_index = i;
        const auto p = fit::deciding_p(fit.value());
        bound.p = p.has_value() ? p->p : 1.0;
        bound.verdict_changes = rejects(fit.value().verdict) != rejects(totals.verdict);
        bound.share = then.observed[i].as_double() / static_cast<double>(result.scored + result.lost);
        result.if_all_lost.push_back(bound);
    }
}

void say_bounds(const fit::GoodnessOfFit& totals, SownToScored& result) {
    if (result.if_all_lost.empty())
        return;
    const bool seeds = result.sown.has_value();
    const bool plants = result.emerged.has_value() || result.alive.has_value();
    const auto pick = [&](MessageId seed, MessageId plant, MessageId unscored) {
        return seeds ? seed : plants ? plant : unscored;
    };
    const auto& bounds_of = result.if_all_lost;
    const auto changes = [](const SownToScored::IfAllLost& bound) { return bound.verdict_changes; };
    const auto changing = std::count_if(bounds_of.begin(), bounds_of.end(), changes);
    if (changing == 0) {
        result.sentences.push_back({pick(MessageId::LostSeedWouldNotChange, MessageId::LostPlantWouldNotChange,
                                         MessageId::LostUnscoredWouldNotChange),
                                    {}});
        return;
    }
    if (static_cast<std::size_t>(changing) == bounds_of.size()) {
        result.sentences.push_back({pick(MessageId::LostSeedAnyWouldChange, MessageId::LostPlantAnyWouldChange,
                                         MessageId::LostUnscoredAnyWouldChange),
                                    {}});
        return;
    }
    for (const auto& bound : bounds_of)
        if (bound.verdict_changes)
            result.sentences.push_back({pick(MessageId::LostSeedWouldChange, MessageId::LostPlantWouldChange,
                                             MessageId::LostUnscoredWouldChange),
                                        {text_argument(totals.input.labels[bound.class_index])}});
}

} // namespace

std::vector<Message> stage_hints(const book::Family& family, std::size_t class_count) {
    std::vector<Message> hints;
    compare(family.emerged, family.sown, MessageId::HintMoreEmergedThanSown, hints);
    // Each stage is held against the latest earlier one that is known, so that one slip is named once.
    compare(family.alive, family.emerged.has_value() ? family.emerged : family.sown,
            family.emerged.has_value() ? MessageId::HintMoreAliveThanEmerged : MessageId::HintMoreAliveThanSown, hints);
    std::int64_t scored = 0;
    for (std::size_t i = 0; i < class_count; ++i)
        if (const book::Cell cell = family.cell(ClassIndex{i}); cell.state == book::CellState::Number)
            scored += cell.count.value();
    const std::array<std::pair<const Number*, MessageId>, 3> stages{
        {{&family.alive, MessageId::HintMoreScoredThanAlive},
         {&family.emerged, MessageId::HintMoreScoredThanEmerged},
         {&family.sown, MessageId::HintMoreScoredThanSown}}};
    const auto known =
        std::find_if(stages.begin(), stages.end(), [](const auto& stage) { return stage.first->has_value(); });
    if (known != stages.end() && scored > (*known->first)->value())
        hints.push_back(say(known->second, {scored, (*known->first)->value()}));
    return hints;
}

std::optional<SownToScored> sown_to_scored(const std::vector<const book::Family*>& families, std::int64_t scored,
                                           const fit::GoodnessOfFit* totals, const CancellationToken& cancel) {
    SownToScored result;
    const Sum sown = sum(families, &book::Family::sown);
    const Sum emerged = sum(families, &book::Family::emerged);
    const Sum alive = sum(families, &book::Family::alive);
    result.sown = sown.value;
    result.emerged = emerged.value;
    result.alive = alive.value;
    result.scored = scored;
    for (const book::Family* family : families)
        if (const book::Cell cell = family->not_scored_cell(); cell.state == book::CellState::Number)
            result.not_scored += cell.count.value();
    if (sown.known + emerged.known + alive.known == 0 && result.not_scored == 0)
        return std::nullopt;
    const auto first = result.sown.has_value()      ? result.sown
                       : result.emerged.has_value() ? result.emerged
                                                    : result.alive;
    result.lost = std::max<std::int64_t>(0, first.value_or(scored + result.not_scored) - scored);
    result.sentences.push_back(stages_sentence(result));
    if (totals != nullptr) {
        bounds(*totals, cancel, result);
        say_bounds(*totals, result);
    }
    const auto families_count = static_cast<std::int64_t>(families.size());
    for (const auto& [stage, id] :
         {std::pair{&sown, MessageId::SownKnownForSome}, std::pair{&emerged, MessageId::UpKnownForSome},
          std::pair{&alive, MessageId::AliveKnownForSome}})
        if (stage->known > 0 && !stage->value.has_value())
            result.sentences.push_back(say(id, {static_cast<std::int64_t>(stage->known), families_count}));
    return result;
}

} // namespace filial::report
