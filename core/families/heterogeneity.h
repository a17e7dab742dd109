// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "core/fit/goodness_of_fit.h"

// Terms. Replicate families of one cross are tested one by one, pooled, and against each other. Total = sum of
// the families' chi-squares; pooled = chi-square of the column totals; heterogeneity = total - pooled, scaled by
// the hypothesis; contingency = scaled by the pooled counts, which decides.
//
// A hypothesis with a fitted parameter: the maximum-likelihood value from the column totals is also the one that
// is common to all families, so total, pooled and heterogeneity are all taken at it and add up; each parameter is
// charged once, df total = f(k-1) - m and df pooled = k-1-m. A family's own test (`per_family`) fits its own value.
namespace filial::families {

using fit::Tail;

struct Family {
    std::string label;
    std::vector<Count> observed;
};

struct Input {
    std::vector<Family> families; ///< complete families only, those set aside left out
    fit::Input common;            ///< labels, hypothesis, joins, alpha …; `observed` is ignored
    bool with_family_fits = true; ///< false: `per_family` stays empty, for a caller who has those results
};

struct SourceRow {
    int df = 0;
    Maybe<double> chi_square; ///< absent where a forbidden class has offspring; its P is then 0
    Maybe<Tail> chi_square_p;
    Maybe<double> g; ///< likewise; in the heterogeneity row it is the contingency G, free of the hypothesis
    Maybe<Tail> g_p;
};
struct Contingency {
    int df = 0;
    double statistic = 0.0;
    Maybe<Tail> p;
    double smallest_expected = 0.0;
    std::size_t cells = 0;         ///< families with plants times classes with plants
    std::size_t cells_below_5 = 0; ///< of them, with an expected value below 5
};
/// Extra variation with the mean free.
struct FreeMean {
    double phi = 0.0; ///< contingency X2 / [(f-1)(k-1)]
    Maybe<std::vector<double>> mean;
    Maybe<double> rho, lr, log_likelihood;
    Maybe<Tail> p;
};
/// Extra variation with the mean as the hypothesis has it.
struct Overdispersion {
    double phi = 0.0; ///< total X2 / [f(k-1)], less the fitted parameters
    Maybe<double> rho, rho_low, rho_high, lr;
    Maybe<Tail> p; ///< against rho = 0
    std::string p_method;
    Maybe<double> z; ///< score test, mean fixed
    Maybe<Tail> z_p; ///< one-sided
    Message z_note;  ///< what the normal tail is worth here
    Maybe<FreeMean> free;
};
struct OddFamily {
    std::string label;
    std::size_t family = 0; ///< its place in the input
    double statistic = 0.0; ///< this family against the rest
    int df = 0;
    Tail p;
    double p_holm = 1.0; ///< Holm 1979
    double p_bh = 1.0;   ///< Benjamini & Hochberg 1995
};

struct Heterogeneity {
    explicit Heterogeneity(fit::GoodnessOfFit of_totals) : pooled_fit(std::move(of_totals)) {}

    std::vector<fit::GoodnessOfFit> per_family;
    fit::GoodnessOfFit pooled_fit;  ///< column totals as one sample
    std::size_t families = 0;       ///< as given
    std::size_t families_of_df = 0; ///< with plants
    SourceRow total, pooled, heterogeneity;
    Maybe<Contingency> contingency;
    Maybe<fit::Exact> exact;
    Maybe<Overdispersion> overdispersion;
    std::vector<OddFamily> outliers; ///< families with plants, in the order given; empty below two
    bool heterogeneous = false;      ///< contingency P < alpha
    Message verdict_sentence;        ///< "No heterogeneity found; pooling is reasonable."
    Message line;                    ///< "Families agree: heterogeneity P 0.271."
    std::vector<Message> cautions;
};

/// Pools replicate families. One or more families; those of size 0 are listed but carry no df; an empty column is
/// dropped from the contingency. No continuity correction anywhere. Errors: no family, a family with more or fewer
/// classes than the hypothesis, more plants than can be added, and those of fit::goodness_of_fit.
/// Sources: Mather 1951 (additive table); Fisher 1922, 1924 (df); Cochran 1954 (small expected values).
[[nodiscard]] Result<Heterogeneity> heterogeneity(const Input& input, const CancellationToken& cancel = {},
                                                  const Progress& progress = {});

} // namespace filial::families
