// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/exact_two_class.h"

#include <algorithm>
#include <cmath>
#include <limits>

#include "core/fit/binomial.h"
#include "core/numeric/tails.h"

namespace filial::fit {
namespace {

__extension__ using Wide = __int128;

constexpr double kTieTolerance = 1e-12;
constexpr double kReadingsDiffer = 1e-9;
constexpr double kExactBracket = 1e-6;       // wider is called bounded
constexpr std::int64_t kCentreSummed = 4096; // outcomes nearer than the observed that are added one by one
const double kLn10 = std::log(10.0);

// How far off an outcome is, against the one observed: `reaches` counts it into P, `exceeds` when it is beyond the tie
// band. Both hold from some place downwards on the left of `peak` and from some place upwards on its right.
class Distance {
public:
    Distance(const Binomial& binomial, Order order, std::int64_t observed, Wide weight, Wide weight_total)
        : binomial_(binomial), order_(order), weight_(weight), total_(weight_total), observed_(observed) {
        if (whole()) {
            whole_observed_ = whole_distance(observed);
        } else {
            observed_distance_ = distance(observed);
            tolerance_ = kTieTolerance * std::max(1.0, observed_distance_);
        }
    }
    /// The outcome up to which the distance falls.
    [[nodiscard]] std::int64_t peak() const {
        return order_ == Order::Probability ? binomial_.mode() : binomial_.mean_floor();
    }
    [[nodiscard]] bool whole() const { return order_ == Order::ChiSquare && total_ > 0; }
    [[nodiscard]] bool reaches(std::int64_t x) const {
        return whole() ? whole_distance(x) >= whole_observed_
                       : x == observed_ || distance(x) >= observed_distance_ - tolerance_;
    }
    [[nodiscard]] bool exceeds(std::int64_t x) const {
        return whole() ? whole_distance(x) > whole_observed_ : distance(x) > observed_distance_ + tolerance_;
    }

private:
    [[nodiscard]] Wide whole_distance(std::int64_t x) const {
        const Wide difference = total_ * x - Wide{binomial_.n()} * weight_;
        return difference < 0 ? -difference : difference;
    }
    [[nodiscard]] double distance(std::int64_t x) const {
        switch (order_) {
        case Order::ChiSquare:
            return binomial_.pearson(x);
        case Order::G:
            return 2.0 * binomial_.deviance(x);
        case Order::Probability:
            break;
        }
        return -2.0 * binomial_.log_pmf(x);
    }

    const Binomial& binomial_;
    Order order_;
    Wide weight_, total_, whole_observed_ = 0;
    std::int64_t observed_;
    double observed_distance_ = 0.0, tolerance_ = 0.0;
};

// The last x in [low, high] with the predicate, which holds up to some place; low - 1 where it holds nowhere. Gallops
// from `guess`, so that a good guess costs three or four evaluations.
template <class Predicate>
std::int64_t last_holding(std::int64_t low, std::int64_t high, std::int64_t guess, Predicate holds) {
    if (low > high)
        return low - 1;
    guess = std::clamp(guess, low, high);
    std::int64_t yes = low - 1;
    std::int64_t no = high + 1;
    std::int64_t step = 1;
    if (holds(guess)) {
        yes = guess;
        while (yes + step <= high && holds(yes + step)) {
            yes += step;
            step *= 2;
        }
        no = std::min(no, yes + step);
    } else {
        no = guess;
        while (no - step >= low && !holds(no - step)) {
            no -= step;
            step *= 2;
        }
        yes = std::max(yes, no - step);
    }
    while (no - yes > 1) {
        const std::int64_t middle = yes + (no - yes) / 2;
        (holds(middle) ? yes : no) = middle;
    }
    return yes;
}

// The outer outcomes: x <= low or x >= high.
struct Outer {
    std::int64_t low = 0, high = 0;
};

template <class Predicate> Outer outer_of(std::int64_t n, std::int64_t peak, Outer guess, Predicate holds) {
    Outer outer;
    outer.low = last_holding(0, peak, guess.low, holds);
    // On the right the predicate holds from some place up: count down from n.
    outer.high = n - last_holding(0, n - peak - 1, n - guess.high, [&](std::int64_t back) { return holds(n - back); });
    return outer;
}

double log_add(double a, double b) {
    const double larger = std::max(a, b);
    if (larger == -numeric::kInfinity)
        return -numeric::kInfinity;
    return larger + std::log1p(std::exp(std::min(a, b) - larger));
}

// ln P of the outer outcomes; 0 where they are all. Both tails fall away from the peak, so each is summed directly.
double log_outer(const Binomial& binomial, std::int64_t peak, Outer outer) {
    if (outer.low >= peak && outer.high <= peak + 1)
        return 0.0;
    return std::min(0.0, log_add(binomial.log_lower_tail(outer.low), binomial.log_upper_tail(outer.high)));
}

double sum_between(const Binomial& binomial, std::int64_t from, std::int64_t to) {
    double total = 0.0;
    for (std::int64_t x = from; x <= to; ++x)
        total += std::exp(binomial.log_pmf(x));
    return total;
}

Outer first_guess(const Binomial& binomial, std::int64_t observed) {
    const std::int64_t mirror = 2 * binomial.mean_floor() - observed;
    return observed <= binomial.mean_floor() ? Outer{observed, mirror} : Outer{mirror, observed};
}

struct Places {
    std::int64_t peak = 0;
    Outer reaching;
    Outer exceeding;
};

// P(T = t) of the tie band without cancellation where it is narrow.
double tie_mass(const Binomial& binomial, const Places& places, double p, double p_beyond) {
    const std::int64_t left = places.reaching.low - places.exceeding.low;
    const std::int64_t right = places.exceeding.high - places.reaching.high;
    if (left + right > kCentreSummed)
        return p - p_beyond;
    return sum_between(binomial, places.exceeding.low + 1, places.reaching.low) +
           sum_between(binomial, places.reaching.high, places.exceeding.high - 1);
}

double left_tail(const Binomial& binomial, const Places& places, double p_beyond) {
    const std::int64_t inside = places.exceeding.high - places.exceeding.low - 1;
    if (inside > kCentreSummed)
        return 1.0 - p_beyond;
    return std::min(1.0, sum_between(binomial, places.exceeding.low + 1, places.exceeding.high - 1));
}

// P without the members of the band other than the observed outcome and, for equal classes, its mirror image.
std::optional<double> other_reading(const Binomial& binomial, const Distance& distance, const Places& places,
                                    std::int64_t observed, bool equal_classes, double p, double p_beyond) {
    if (distance.whole())
        return std::nullopt;
    double other = p_beyond + std::exp(binomial.log_pmf(observed));
    if (equal_classes && 2 * observed != binomial.n())
        other += std::exp(binomial.log_pmf(binomial.n() - observed));
    const std::int64_t band = places.reaching.low - places.exceeding.low + places.exceeding.high - places.reaching.high;
    if (band < 2 || !(std::abs(other - p) > kReadingsDiffer * p))
        return std::nullopt;
    return other;
}

Binomial binomial_of(const Sample& sample, const Cell& cell) {
    if (sample.weight_total > 0)
        return {sample.n, cell.weight, sample.weight_total - cell.weight};
    return {sample.n, cell.probability, 1.0 - cell.probability};
}

} // namespace

Exact exact_two_class(const Sample& sample, Order order) {
    const auto possible = [](const Cell& cell) { return cell.probability > 0.0; };
    const Cell& cell = *std::find_if(sample.cells.begin(), sample.cells.end(), possible);
    const Binomial binomial = binomial_of(sample, cell);
    const Distance distance(binomial, order, cell.observed, cell.weight, sample.weight_total);
    Places places{distance.peak(), {}, {}};
    places.reaching = outer_of(binomial.n(), places.peak, first_guess(binomial, cell.observed),
                               [&](std::int64_t x) { return distance.reaches(x); });
    places.exceeding = outer_of(binomial.n(), places.peak, {places.reaching.low - 1, places.reaching.high + 1},
                                [&](std::int64_t x) { return distance.exceeds(x); });

    const double log_p = log_outer(binomial, places.peak, places.reaching);
    const double p_beyond = std::exp(log_outer(binomial, places.peak, places.exceeding));
    Exact exact;
    exact.order = order;
    exact.p = {std::exp(log_p), log_p / kLn10};
    const double error = log_p == 0.0 ? 0.0 : binomial.relative_error_bound(log_p);
    exact.lower = exact.p.p * (1.0 - error);
    exact.upper = std::min(1.0, exact.p.p * (1.0 + error));
    exact.method = exact.upper - exact.lower > kExactBracket * exact.p.p ? "bounded" : "exact";
    exact.mid_p = exact.p.p - 0.5 * tie_mass(binomial, places, exact.p.p, p_beyond);
    exact.p_too_close = left_tail(binomial, places, p_beyond);
    exact.other_reading =
        other_reading(binomial, distance, places, cell.observed, cell.probability == 0.5, exact.p.p, p_beyond);
    return exact;
}

Tail exact_class_p(const Sample& sample, const Cell& cell) {
    const Binomial binomial = binomial_of(sample, cell);
    const Distance distance(binomial, Order::Probability, cell.observed, cell.weight, sample.weight_total);
    const Outer reaching = outer_of(binomial.n(), distance.peak(), first_guess(binomial, cell.observed),
                                    [&](std::int64_t x) { return distance.reaches(x); });
    const double log_p = log_outer(binomial, distance.peak(), reaching);
    return {std::exp(log_p), log_p / kLn10};
}

} // namespace filial::fit
