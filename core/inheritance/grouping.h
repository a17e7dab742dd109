// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <array>
#include <cstdint>
#include <string>
#include <string_view>
#include <vector>

#include "core/inheritance/cross_plan.h"

// Terms. A grouping says what each genotype looks like. A pattern names, for each locus, the pairs of alleles it takes
// in. Two labels are kept back: 'dies' (never seen, in any generation) and 'left out' (not kept for scoring at the
// end). Internal to core/inheritance.
namespace filial::inheritance {

/// The pairs of alleles a pattern takes in, a bit each.
using PairSet = std::uint8_t;
inline constexpr PairSet kDominantPair = 1;
inline constexpr PairSet kMixedPair = 2;
inline constexpr PairSet kRecessivePair = 4;
inline constexpr PairSet kDominantAlone = 8;   ///< sex-linked, with a Y or W
inline constexpr PairSet kRecessiveAlone = 16; ///< likewise
inline constexpr PairSet kAnyPair = 31;

struct Pattern {
    std::array<PairSet, kMostLoci> pairs{kAnyPair, kAnyPair, kAnyPair};
    [[nodiscard]] bool takes_in(const Genotype& genotype, std::size_t loci) const;
};

struct GroupedClass {
    std::string label;
    std::vector<Pattern> patterns;
};

struct Grouping {
    std::vector<GroupedClass> classes;
    std::vector<Pattern> dies;
    std::vector<Pattern> left_out;
    bool only_arising = false; ///< classes that cannot arise are dropped: the user named none
};

/// Reads 'A_B_=purple hairy, A_bb=purple smooth, aa=green'. Errors give the byte place.
[[nodiscard]] Result<Grouping> read_grouping(std::string_view text, const std::vector<Locus>& loci);

/// Full dominance at every locus; sexes apart at a sex-linked one.
[[nodiscard]] Grouping full_dominance(const std::vector<Locus>& loci);

/// "A_bb" for one pattern, "A_bb + aa__" for several.
[[nodiscard]] std::string patterns_text(const std::vector<Pattern>& patterns, const std::vector<Locus>& loci);

[[nodiscard]] bool any_takes_in(const std::vector<Pattern>& patterns, const Genotype& genotype, std::size_t loci);

} // namespace filial::inheritance
