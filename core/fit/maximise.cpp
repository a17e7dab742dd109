// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/maximise.h"

#include <algorithm>
#include <cmath>
#include <limits>
#include <stdexcept>
#include <utility>

#include <boost/math/tools/toms748_solve.hpp>

#include "core/numeric/tails.h"

namespace filial::fit {
namespace {

constexpr int kStarts = 16;
constexpr double kFlat = 1e-12; // relative size of a derivative or score that counts as zero

struct GroupPoint {
    double p = 0.0, derivative = 0.0;
};

// The likelihood of grouped counts as a function of the one free parameter.
class Likelihood {
public:
    Likelihood(const inheritance::Hypothesis& hypothesis, const std::vector<std::vector<std::size_t>>& groups,
               const std::vector<std::int64_t>& counts)
        : hypothesis_(hypothesis), groups_(groups), counts_(counts), points_(groups.size()) {}

    const std::vector<GroupPoint>& at(double beta) {
        const inheritance::ClassProbabilities classes = hypothesis_.at({&beta, 1});
        for (std::size_t g = 0; g < groups_.size(); ++g) {
            points_[g] = {};
            for (const std::size_t member : groups_[g]) {
                points_[g].p += classes.p[member];
                points_[g].derivative += classes.derivatives[member][0];
            }
        }
        return points_;
    }

    double log_likelihood(double beta) {
        double total = 0.0;
        const auto& points = at(beta);
        for (std::size_t g = 0; g < counts_.size(); ++g)
            if (counts_[g] > 0)
                total +=
                    points[g].p > 0.0 ? static_cast<double>(counts_[g]) * std::log(points[g].p) : -numeric::kInfinity;
        return total;
    }

    /// The score, set to 0 where its terms cancel to rounding; not finite where an observed group is impossible.
    double score(double beta) {
        double total = 0.0;
        double size = 0.0;
        const auto& points = at(beta);
        for (std::size_t g = 0; g < counts_.size(); ++g)
            if (counts_[g] > 0) {
                const double term = static_cast<double>(counts_[g]) * points[g].derivative / points[g].p;
                total += term;
                size += std::abs(term);
            }
        return std::abs(total) <= kFlat * 1e-3 * size ? 0.0 : total;
    }

    /// Flat to within what rounding of the score may hide.
    bool stationary(double beta) {
        double total = 0.0;
        double size = 0.0;
        const auto& points = at(beta);
        for (std::size_t g = 0; g < counts_.size(); ++g)
            if (counts_[g] > 0) {
                const double term = static_cast<double>(counts_[g]) * points[g].derivative / points[g].p;
                total += term;
                size += std::abs(term);
            }
        return std::abs(total) <= kFlat * size;
    }

    double information_per_plant(double beta) {
        double total = 0.0;
        for (const GroupPoint& point : at(beta))
            if (point.p > 0.0)
                total += point.derivative * point.derivative / point.p;
        return total;
    }

private:
    const inheritance::Hypothesis& hypothesis_;
    const std::vector<std::vector<std::size_t>>& groups_;
    const std::vector<std::int64_t>& counts_;
    std::vector<GroupPoint> points_;
};

double root_of_score(Likelihood& likelihood, double low, double high) {
    const double at_low = likelihood.score(low);
    const double at_high = likelihood.score(high);
    if (at_low == 0.0)
        return low;
    if (at_high == 0.0)
        return high;
    std::uintmax_t evaluations = 200;
    const auto bracket =
        boost::math::tools::toms748_solve([&likelihood](double beta) { return likelihood.score(beta); }, low, high,
                                          at_low, at_high, boost::math::tools::eps_tolerance<double>(52), evaluations);
    return 0.5 * (bracket.first + bracket.second);
}

// Between a bound and the first start the score may change sign arbitrarily close to the bound: approach it by halves
// until the score points back inside. Empty where it never does, so that the maximum of this stretch is the bound.
std::optional<double> root_beside_bound(Likelihood& likelihood, double bound, double inside, bool rising_inside) {
    double outer = inside;
    for (int halving = 0; halving < 60; ++halving) {
        const double next = bound + (outer - bound) / 2.0;
        const double score = likelihood.score(next);
        if (rising_inside ? score < 0.0 : score > 0.0)
            return rising_inside ? root_of_score(likelihood, outer, next) : root_of_score(likelihood, next, outer);
        outer = next;
    }
    return std::nullopt;
}

struct Candidate {
    double beta = 0.0;
    double log_likelihood = -numeric::kInfinity;
    bool bound = false;
};

std::vector<Candidate> candidates(Likelihood& likelihood, double low, double high) {
    std::vector<Candidate> found{{low, -numeric::kInfinity, true}, {high, -numeric::kInfinity, true}};
    std::vector<std::pair<double, double>> starts; // interior points and their scores
    for (int i = 0; i < kStarts; ++i) {
        const double beta = low + (high - low) * (i + 0.5) / kStarts;
        starts.emplace_back(beta, likelihood.score(beta));
    }
    for (std::size_t i = 0; i + 1 < starts.size(); ++i)
        if (starts[i].second >= 0.0 && starts[i + 1].second <= 0.0)
            found.push_back(
                {root_of_score(likelihood, starts[i].first, starts[i + 1].first), -numeric::kInfinity, false});
    if (starts.front().second < 0.0)
        if (const auto root = root_beside_bound(likelihood, low, starts.front().first, false))
            found.push_back({*root, -numeric::kInfinity, false});
    if (starts.back().second > 0.0)
        if (const auto root = root_beside_bound(likelihood, high, starts.back().first, true))
            found.push_back({*root, -numeric::kInfinity, false});
    for (Candidate& candidate : found)
        candidate.log_likelihood = likelihood.log_likelihood(candidate.beta);
    return found;
}

// -(d score / d beta) by a central difference that stays inside the bounds.
double observed_information(Likelihood& likelihood, double beta, double low, double high) {
    const double step = std::min({1e-4 * (high - low), (beta - low) / 4.0, (high - beta) / 4.0});
    const auto slope = [&](double h) { return (likelihood.score(beta - h) - likelihood.score(beta + h)) / (2.0 * h); };
    return (4.0 * slope(step) - slope(2.0 * step)) / 3.0; // Richardson's extrapolation
}

} // namespace

int identified_parameters(const inheritance::Hypothesis& hypothesis,
                          const std::vector<std::vector<std::size_t>>& groups) {
    const auto& parameters = hypothesis.free_parameters();
    if (parameters.empty())
        return 0;
    if (parameters.size() > 1)
        throw std::logic_error("the maximiser handles one free parameter");
    const std::vector<std::int64_t> none(groups.size(), 0);
    Likelihood likelihood(hypothesis, groups, none);
    const double low = parameters.front().low;
    const double high = parameters.front().high;
    for (const double share : {0.21, 0.5, 0.83}) // a polynomial in r that is flat at three places is flat
        for (const GroupPoint& point : likelihood.at(low + share * (high - low)))
            if (std::abs(point.derivative) > kFlat)
                return 1;
    return 0;
}

Fitted maximise(const inheritance::Hypothesis& hypothesis, const std::vector<std::vector<std::size_t>>& groups,
                const std::vector<std::int64_t>& counts) {
    Fitted fitted;
    const auto& parameters = hypothesis.free_parameters();
    if (parameters.empty())
        return fitted;
    const double low = parameters.front().low;
    const double high = parameters.front().high;
    Likelihood likelihood(hypothesis, groups, counts);
    if (identified_parameters(hypothesis, groups) == 0) {
        fitted.identified = false;
        fitted.beta = {0.5 * (low + high)};
        fitted.log_likelihood = likelihood.log_likelihood(fitted.beta.front());
        return fitted;
    }
    Candidate best;
    for (const Candidate& candidate : candidates(likelihood, low, high))
        if (candidate.log_likelihood > best.log_likelihood ||
            (candidate.log_likelihood == best.log_likelihood && !candidate.bound))
            best = candidate;
    fitted.beta = {best.beta};
    fitted.log_likelihood = best.log_likelihood;
    const double margin = kFlat * (high - low);
    fitted.at_boundary = best.bound || best.beta <= low + margin || best.beta >= high - margin ||
                         (best.beta > high - 1e-6 * (high - low) && likelihood.stationary(high));
    if (fitted.at_boundary)
        return fitted;
    double n = 0.0;
    for (const std::int64_t count : counts)
        n += static_cast<double>(count);
    fitted.standard_error = 1.0 / std::sqrt(n * likelihood.information_per_plant(best.beta));
    const double curvature = observed_information(likelihood, best.beta, low, high);
    if (curvature > 0.0)
        fitted.standard_error_observed = 1.0 / std::sqrt(curvature);
    return fitted;
}

} // namespace filial::fit
