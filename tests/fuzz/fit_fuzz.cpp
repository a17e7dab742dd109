// SPDX-License-Identifier: GPL-3.0-or-later
// Any counts, weights and joins: no crash, the account adds to df, P, brackets and limits are in order.
#include <cstddef>
#include <cstdint>
#include <cstdlib>
#include <string>

#include "core/fit/goodness_of_fit.h"

namespace {

void require(bool condition) {
    if (!condition)
        std::abort();
}

void check_limits(const filial::Maybe<double>& low, const filial::Maybe<double>& high) {
    if (low && high)
        require(*low >= 0.0 && *low <= *high && *high <= 1.0); // fails for NaN, too
}

void check(const filial::fit::GoodnessOfFit& result) {
    for (const auto& one : result.classes) {
        check_limits(one.interval_low, one.interval_high);
        check_limits(one.exact_low, one.exact_high);
        check_limits(one.simultaneous_low, one.simultaneous_high);
        if (one.p)
            require(*one.p >= 0.0 && *one.p <= 1.0);
    }
    for (const auto& one : result.detectable)
        require(one.w > 0.0);
    int sum = 0;
    for (const auto& charge : result.df_account)
        sum += charge.charge;
    require(sum == result.df);
    if (result.exact) {
        require(result.exact->lower <= result.exact->p.p && result.exact->p.p <= result.exact->upper);
        require(result.exact->upper <= 1.0 && result.exact->lower >= 0.0);
    }
    if (result.chi_square && result.chi_square->p)
        require(result.chi_square->p->p >= 0.0 && result.chi_square->p->p <= 1.0);
}

} // namespace

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
    using namespace filial;
    std::size_t at = 0;
    const auto next = [&]() -> std::uint64_t { return at < size ? data[at++] : 0; };
    const std::size_t classes = 2 + next() % 8;
    std::string text;
    std::vector<Count> observed;
    std::vector<std::string> labels;
    for (std::size_t i = 0; i < classes; ++i) {
        text += (i == 0 ? "" : ":") + std::to_string(next() << (next() % 48));
        observed.emplace_back(static_cast<std::int64_t>(next() << (next() % 32)));
        labels.push_back(std::to_string(i));
    }
    auto hypothesis = inheritance::read_hypothesis(next() % 4 == 0 ? "f2(coupling, r=fit)" : text);
    if (!hypothesis)
        return 0;
    fit::Input input{.labels = labels,
                     .observed = observed,
                     .hypothesis = hypothesis.value(),
                     .joins = {},
                     .level_counts = {},
                     .trait_names = {}};
    input.order = static_cast<fit::Order>(next() % 3);
    input.fitted_elsewhere = static_cast<int>(next() % 3);
    for (std::size_t joins = next() % 3; joins > 0; --joins)
        input.joins.push_back({next() % 10, next() % 10});
    if (const auto result = fit::goodness_of_fit(input))
        check(result.value());
    return 0;
}
