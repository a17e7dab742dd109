// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/ratio/ratio.h"

#include <algorithm>
#include <numeric>
#include <stdexcept>
#include <utility>

#include "core/ratio/notation.h"

namespace filial::ratio {
namespace {

constexpr std::int64_t kLargestTotal = std::int64_t{1} << 62U;

bool all_fractions(const std::vector<std::string>& typed) {
    return std::all_of(typed.begin(), typed.end(),
                       [](const std::string& term) { return term.find('/') != std::string::npos; });
}

/// A whole number short enough for std::stoll.
bool short_whole(const std::string& term) {
    return term.size() <= 18 && term.find_first_not_of("0123456789") == std::string::npos;
}

} // namespace

std::string joined_notation(const std::vector<std::string>& typed) {
    const std::string between = all_fractions(typed) ? ", " : ":";
    std::string text;
    for (const std::string& term : typed)
        text += (text.empty() ? "" : between) + term;
    return text;
}

Result<Ratio> Ratio::from_weights(std::vector<std::int64_t> weights) {
    if (weights.size() < 2)
        return refusal(weights.empty() ? MessageId::RatioEmpty : MessageId::RatioTooFewTerms);
    if (weights.size() > kMostTerms)
        return refusal(MessageId::RatioTooManyTerms, {count_argument(static_cast<std::int64_t>(weights.size()))});
    Ratio ratio;
    std::int64_t divisor = 0;
    for (std::size_t i = 0; i < weights.size(); ++i) {
        if (weights[i] < 0)
            return refusal(MessageId::RatioNegativeTerm, {count_argument(static_cast<std::int64_t>(i + 1)),
                                                          text_argument(std::to_string(weights[i]))});
        ratio.typed_.push_back(std::to_string(weights[i]));
        divisor = std::gcd(divisor, weights[i]);
    }
    if (divisor == 0)
        return refusal(MessageId::RatioAllZero);
    for (std::int64_t& weight : weights) {
        weight /= divisor;
        if (weight > kLargestTotal - ratio.total_)
            return refusal(MessageId::RatioTooFine);
        ratio.total_ += weight;
    }
    ratio.weights_ = std::move(weights);
    ratio.notation_ = joined_notation(ratio.typed_);
    return ratio;
}

double Ratio::probability(std::size_t term) const {
    // A long double holds any weight up to 2^62 exactly, so that the quotient is rounded as seldom as can be.
    return static_cast<double>(static_cast<long double>(weights_.at(term)) / static_cast<long double>(total_));
}

std::vector<double> Ratio::probabilities() const {
    std::vector<double> result(size());
    for (std::size_t i = 0; i < size(); ++i)
        result[i] = probability(i);
    return result;
}

std::string Ratio::term_text(std::size_t term) const {
    const std::string& typed = typed_.at(term);
    if (std::all_of(typed_.begin(), typed_.end(), short_whole)) {
        // Typed weights may add to more than an integer holds when they share a large divisor.
        std::int64_t scale = 0;
        for (std::size_t i = 0; i < size() && scale == 0; ++i)
            if (weights_[i] != 0)
                scale = std::stoll(typed_[i]) / weights_[i];
        if (scale <= kLargestTotal / total_)
            return typed + " of " + std::to_string(scale * total_);
    }
    if (typed.find_first_of(".%") != std::string::npos)
        return typed;
    return std::to_string(weights_[term]) + " of " + std::to_string(total_);
}

Ratio Ratio::permuted(std::span<const std::size_t> order) const {
    if (order.size() != size())
        throw std::invalid_argument("a permutation of a ratio names every term once");
    std::vector<bool> seen(size(), false);
    Ratio result = *this;
    for (std::size_t i = 0; i < size(); ++i) {
        if (order[i] >= size() || seen[order[i]])
            throw std::invalid_argument("a permutation of a ratio names every term once");
        seen[order[i]] = true;
        result.weights_[i] = weights_[order[i]];
        result.typed_[i] = typed_[order[i]];
    }
    result.notation_ = joined_notation(result.typed_);
    return result;
}

} // namespace filial::ratio
