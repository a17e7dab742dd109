// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "core/fit/goodness_of_fit.h"

// Terms. Replicate families of one cross are tested one by one, pooled, and against each other. Total = sum of
// the families' chi-squares; pooled = chi-square of the column totals; heterogeneity = total - pooled, scaled by
// the hypothesis; contingency = scaled by the pooled counts, which decides.
namespace filial::families {

using fit::Tail;

struct Family {
    std::string label;
    std::vector<Count> observed;
};

struct Input {
    std::vector<Family> families; ///< complete families only, those set aside left out
    fit::Input common;            ///< labels, hypothesis, joins, alpha …; `observed` is ignored
};

struct SourceRow {
    int df = 0;
    double chi_square = 0.0;
    Maybe<Tail> chi_square_p;
    double g = 0.0;
    Maybe<Tail> g_p;
};
struct Contingency {
    int df = 0;
    double statistic = 0.0;
    Maybe<Tail> p;
};
struct FreeMean {
    std::vector<double> mean;
    double rho = 0.0, phi = 0.0, lr = 0.0, p = 0.0, log_likelihood = 0.0;
};
struct Overdispersion {
    double phi = 0.0; ///< total X2 / [f(k-1)]
    Maybe<double> rho, rho_low, rho_high, lr, p;
    std::string p_method;
    Maybe<double> z, z_p; ///< score test, mean fixed
    Maybe<FreeMean> free;
};
struct OddFamily {
    std::string label;
    double statistic = 0.0; ///< this family against the rest
    int df = 0;
    Tail p;
    double p_holm = 1.0; ///< Holm 1979
    double p_bh = 1.0;   ///< Benjamini & Hochberg 1995
};

struct Heterogeneity {
    std::vector<fit::GoodnessOfFit> per_family;
    fit::GoodnessOfFit pooled_fit; ///< column totals as one sample
    SourceRow total, pooled, heterogeneity;
    Maybe<Contingency> contingency;
    Maybe<fit::Exact> exact;
    Maybe<Overdispersion> overdispersion;
    std::vector<OddFamily> outliers;
    bool heterogeneous = false; ///< contingency P < alpha
    Message verdict_sentence;   ///< "No heterogeneity found; pooling is reasonable."
    Message line;               ///< "Families agree: heterogeneity P 0.271."
    std::vector<Message> cautions;
};

/// Pools replicate families. One or more families; those of size 0 are listed but carry no df; an empty column is
/// dropped from the contingency. Sources: Mather 1951; Fisher 1922.
[[nodiscard]] Result<Heterogeneity> heterogeneity(const Input& input, const CancellationToken& cancel = {},
                                                  const Progress& progress = {});

} // namespace filial::families
