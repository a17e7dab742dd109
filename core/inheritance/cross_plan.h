// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "core/inheritance/engine.h"
#include "core/numeric/result.h"

// Terms. A cross plan is what a typed cross asks for: a first plant, then steps from left to right, each a cross with
// another plant or some generations of selfing. Internal to core/inheritance; `derive` is the way in.
namespace filial::inheritance {

inline constexpr int kMostSelfings = 20;
inline constexpr std::size_t kLongestText = 2000;

struct Locus {
    char letter = 'A';      ///< upper case
    char chromosome = '\0'; ///< 'X' or 'Z' where sex-linked
    [[nodiscard]] bool sex_linked() const { return chromosome != '\0'; }
    friend bool operator==(const Locus&, const Locus&) = default;
};

struct Plant {
    Genotype genotype;
    std::size_t place = 0;
    std::string text;
    bool phase_taken = false; ///< heterozygous at two or more autosomal loci, and the phase was not typed
};

struct Step {
    std::optional<Plant> other; ///< crossed with it; empty: selfed
    int selfings = 0;
};

struct CrossPlan {
    std::vector<Locus> loci; ///< in the order of the first plant
    Plant first;
    std::vector<Step> steps;
};

/// Reads 'Aa Bb x Aa Bb', 'Aa selfed 3', 'AB/ab x ab/ab', 'XAXa x XAY', 'AA x aa selfed 2'. Errors give the byte place.
[[nodiscard]] Result<CrossPlan> read_cross_plan(std::string_view text);

/// "AaBb"; with `phased` the autosomal loci as "AB/ab".
[[nodiscard]] std::string genotype_text(const Genotype& genotype, const std::vector<Locus>& loci, bool phased);

/// The allele letter of a locus: upper case the dominant one.
[[nodiscard]] char allele_letter(const Locus& locus, Allele allele);

} // namespace filial::inheritance
