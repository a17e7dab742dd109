// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "core/inheritance/hypothesis.h"
#include "core/numeric/result.h"

// Terms. Loci are named by letters: upper case the dominant allele, lower case the recessive. 'Aa Bb x Aa Bb' is
// a cross of two plants, 'Aa Bb selfed 2' two generations of selfing; steps follow one another from left to right, so
// that 'AA x aa selfed' is an F2 and 'AA x aa x aa' a back-cross. 'AB/ab' and 'Ab/aB' give the phase of linked loci;
// where it is not given, 'Aa Bb' is taken as AB/ab (coupling) and a note says so. A sex-linked locus is written on its
// chromosome: 'XAXa x XAY' where the male is XY, 'ZAW x ZaZa' where the female is ZW; it is never linked to the others.
//
// A grouping says what each genotype looks like: 'A_B_=purple hairy, A_bb=purple smooth, aa=green'. '_' stands for
// either allele, a locus not named for any pair; a label used twice joins its patterns. Two labels are kept back:
// 'dies' takes a genotype out of every generation, 'left out' sets it aside at the end; the rest is brought back to 1.
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
    std::string genotypes; ///< "A_B_", "A_bb + aaB_"
    std::string fraction;  ///< "9/16", over the same denominator as the genotypes'; empty where a real parameter enters
    double probability = 0.0;
};

struct Derivation {
    std::vector<GenotypeRow> genotypes;
    std::vector<DerivedClass> classes;
    /// Where exact, and there are two or more classes whose weights fit: over the genotypes' denominator (10:6, not
    /// 5:3).
    std::optional<ratio::Ratio> ratio;
    std::vector<Message> notes; ///< which phase was taken
};

/// Derives the classes of a cross. Errors name the place in `cross` or `show`; ids that begin DeriveShow are about
/// `show`, the others about `cross`. Without a grouping only classes that arise are given; a class of a grouping that
/// cannot arise stays, with probability 0.
[[nodiscard]] Result<Derivation> derive(const DeriveInput& input);

} // namespace filial::inheritance
