// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <cstdint>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "core/inheritance/hypothesis.h"
#include "core/numeric/cancellation.h"
#include "core/numeric/quantities.h"
#include "core/numeric/result.h"
#include "core/numeric/tails.h"

// Terms. Observed counts O of k classes are tested against a hypothesis with expected counts E. A join adds
// classes together before testing and costs their degrees of freedom. The account lists every charge.
namespace filial::fit {

using numeric::Tail;

enum class Method : std::uint8_t { Auto, ChiSquare, Exact, Simulate };
enum class Order : std::uint8_t { ChiSquare, G, Probability };

struct Input {
    std::vector<std::string> labels;             ///< one a class, in the order of `observed`
    std::vector<Count> observed;                 ///< one a class
    inheritance::Hypothesis hypothesis;          ///< class i is its term i (already bound)
    std::vector<std::vector<std::size_t>> joins; ///< disjoint groups of class indices, each of two or more
    bool joins_after_seeing = false;             ///< joins chosen after the residuals were seen
    int fitted_elsewhere = 0;                    ///< parameters estimated elsewhere from the same counts
    std::vector<std::size_t> level_counts; ///< traits' numbers of levels, when classes are their product; else empty
    std::vector<std::string> trait_names;  ///< as long as level_counts
    double alpha = 0.05;                   ///< 0 < alpha < 1
    Method method = Method::Auto;
    Order order = Order::ChiSquare;
    std::int64_t replicates = 100'000;
    std::uint64_t seed = 1;
};

/// One class after joins; labels of joined classes are put together with "+".
struct ClassResult {
    std::string label;
    std::vector<std::size_t> members; ///< classes of the input
    Count observed;
    double probability = 0.0;
    double expected = 0.0;
    Maybe<double> residual;          ///< (O - E)/sqrt(E)
    Maybe<double> adjusted_residual; ///< Haberman 1973
    Maybe<double> p;                 ///< exact two-sided binomial (nothing fitted) or normal
    Maybe<double> p_holm;            ///< Holm 1979 over the classes
    Maybe<double> interval_low;      ///< Wilson 1927, 95 %
    Maybe<double> interval_high;
    Maybe<double> exact_low; ///< Clopper & Pearson 1934, 95 %
    Maybe<double> exact_high;
    Maybe<double> simultaneous_low; ///< Goodman 1965, joint 95 %
    Maybe<double> simultaneous_high;
};

enum class ChargeKind : std::uint8_t { Classes, TotalFixed, Fitted, FittedElsewhere, Joined, Forbidden };
struct Charge {
    ChargeKind kind = ChargeKind::Classes;
    Message what;
    int charge = 0; ///< +4, -1, …; the charges add to df
};

struct ChiSquare {
    double statistic = 0.0; ///< infinite, with P 0, where a forbidden class has offspring (null in JSON)
    Maybe<Tail> p;
    Maybe<double> p_too_close; ///< left tail P(X <= x)
};
struct LikelihoodRatio {
    double statistic = 0.0; ///< infinite, with P 0, where a forbidden class has offspring (null in JSON)
    Maybe<Tail> p;
    Maybe<double> williams_statistic; ///< customary q = 1 + (k+1)/(6N), Williams 1976
    Maybe<Tail> williams_p;
    Maybe<double> williams_general_statistic; ///< q = 1 + (sum 1/p - 1)/(6N(k-1))
    Maybe<Tail> williams_general_p;
};
struct Yates {
    double statistic = 0.0;
    Tail p;
};
struct Exact {
    Tail p;
    double mid_p = 0.0;
    double lower = 0.0; ///< certified bracket of p
    double upper = 0.0;
    double p_too_close = 0.0;            ///< P(T <= t)
    std::optional<double> other_reading; ///< G and probability order: without the other members of the tie band
    Order order = Order::ChiSquare;
    std::string method; ///< "exact" or "bounded"
};
struct Simulated {
    double p = 0.0;
    double low = 0.0, high = 0.0;
    std::int64_t replicates = 0;
    std::uint64_t seed = 0;
};
struct PartitionRow {
    std::vector<std::size_t> traits; ///< one: that trait's segregation; several: their association
    Message what;
    int df = 0;
    double statistic = 0.0;
    Tail p;
};
struct Estimate {
    std::string name; ///< "r"
    double value = 0.0;
    Maybe<double> standard_error; ///< from the expected information
    bool at_boundary = false;
};
struct Detectable {
    double power = 0.0;              ///< 0.8, 0.9
    double w = 0.0;                  ///< Cohen 1988
    Maybe<double> percentage_points; ///< two-sided departure of one class noticed with that power, in 0..1
    std::size_t class_index = 0;     ///< which class the percentage points are about
};

/// By the exact P where there is one and the method is not ChiSquare, else by the P of X2; against the user's alpha.
enum class Verdict : std::uint8_t { NotContradicted, Contradicted, Impossible, NotTested };

struct GoodnessOfFit {
    explicit GoodnessOfFit(Input asked) : input(std::move(asked)) {}

    Input input; ///< what was asked
    std::int64_t n = 0;
    std::vector<ClassResult> classes; ///< after joins
    std::vector<Charge> df_account;
    int df = 0;                      ///< may be < 1: then no P
    std::vector<Estimate> estimates; ///< fitted parameters
    Maybe<ChiSquare> chi_square;
    Maybe<LikelihoodRatio> g;
    Maybe<Yates> yates;
    Maybe<Exact> exact;
    Maybe<Simulated> simulated;
    Maybe<std::vector<PartitionRow>> partition;
    Maybe<double> effect_w;
    std::vector<Detectable> detectable;
    Verdict verdict = Verdict::NotTested;
    Message verdict_sentence; ///< "The counts do not contradict 9:3:3:1."
    Message meaning;          ///< "If 9:3:3:1 is true, samples this far off or further occur in 50 of 100."
    std::vector<Message>
        cautions; ///< small expected counts, too close, joins after seeing, percentages, suspicious order
    std::vector<std::vector<std::size_t>>
        proposed_joins; ///< for small classes; each a join of input classes that are neighbours
    /// Mis-scoring rate that would make a forbidden class' offspring unsurprising at alpha; only when Impossible.
    std::optional<double> rescuing_error_rate;
};

/// Tests counts against a hypothesis. A pure function; errors are Input errors (lengths that differ, joins out of
/// range or overlapping, alpha outside (0,1), fewer than two classes after joins, a method that is not available).
/// Sources: Pearson 1900; Fisher 1922, 1924 (degrees of freedom, fitted parameters); Yates 1934; Williams 1976;
/// Haberman 1973; Holm 1979; Wilson 1927; Clopper & Pearson 1934; Goodman 1965; Mather 1938; Cohen 1988; Cochran 1954.
[[nodiscard]] Result<GoodnessOfFit> goodness_of_fit(const Input& input, const CancellationToken& cancel = {},
                                                    const Progress& progress = {});

} // namespace filial::fit
