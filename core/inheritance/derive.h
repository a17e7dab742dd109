// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "core/inheritance/hypothesis.h"
#include "core/numeric/result.h"

// Terms. Loci are named by letters: upper case the dominant allele, lower case the recessive. 'Aa Bb x Aa Bb' is
// a cross of two plants, 'Aa Bb selfed 2' two generations of selfing. A grouping says what each genotype looks
// like: 'A_B_=purple hairy, A_bb=purple smooth, aa=green'. '_' stands for either allele.
namespace filial::inheritance {

struct DeriveInput {
    std::string cross;                            ///< 'Aa Bb x Aa Bb'; up to three loci
    std::optional<RecombinationFraction> linkage; ///< between neighbouring loci; empty: unlinked
    std::string show;                             ///< grouping; empty: full dominance at every locus
};

struct GenotypeRow {
    std::string genotype; ///< "AaBb"
    std::string fraction; ///< "4/16", exact; empty where a real parameter enters
    double probability = 0.0;
    std::string phenotype; ///< label of its class
};

struct DerivedClass {
    std::string label;
    std::string genotypes; ///< "A_B_"
    double probability = 0.0;
};

struct Derivation {
    std::vector<GenotypeRow> genotypes;
    std::vector<DerivedClass> classes;
    std::optional<ratio::Ratio> ratio; ///< where exact
};

/// Derives the classes of a cross. Errors name the place in `cross` or `show`.
[[nodiscard]] Result<Derivation> derive(const DeriveInput& input);

} // namespace filial::inheritance
