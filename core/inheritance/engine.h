// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <array>
#include <compare>
#include <cstddef>
#include <cstdint>
#include <functional>
#include <map>
#include <optional>
#include <vector>

// Terms. A haplotype is the alleles on one strand, one a locus. A genotype is two haplotypes; which is which does not
// matter, but which alleles stand together (the phase) does. A generation gives each genotype its share; the shares
// add to 1. A Y or W chromosome carries no allele of a sex-linked locus: its haplotype has `Absent` there.
//
// Scalar is an exact rational, a double, or a Dual where a derivative with respect to a recombination fraction is
// wanted; engine.cpp instantiates the three.
//
// Order of effects: gamete viability would come in `gametes_of`, renormalised within each parent and sex; then
// union in `cross` and `selfed`; zygote viability is `survivors`, renormalised over the whole generation, as for a
// bulk; penetrance and mis-scoring come after the last generation, where genotypes are shown as classes.
namespace filial::inheritance {

inline constexpr std::size_t kMostLoci = 3;

enum class Allele : std::uint8_t { Dominant, Recessive, Absent };

struct Haplotype {
    std::array<Allele, kMostLoci> alleles{};
    friend auto operator<=>(const Haplotype&, const Haplotype&) = default;
};

struct Genotype {
    Haplotype first; ///< never greater than `second`
    Haplotype second;
    [[nodiscard]] static Genotype of(const Haplotype& one, const Haplotype& other);
    friend auto operator<=>(const Genotype&, const Genotype&) = default;
};

/// A value with its derivative by one parameter.
struct Dual {
    double value = 0.0;
    double slope = 0.0;
    Dual() = default;
    Dual(double v, double s = 0.0) : value(v), slope(s) {} // NOLINT: constants are duals of slope 0
    friend Dual operator+(Dual a, Dual b) { return {a.value + b.value, a.slope + b.slope}; }
    friend Dual operator-(Dual a, Dual b) { return {a.value - b.value, a.slope - b.slope}; }
    friend Dual operator*(Dual a, Dual b) { return {a.value * b.value, a.slope * b.value + a.value * b.slope}; }
    friend Dual operator/(Dual a, Dual b) {
        return {a.value / b.value, (a.slope - a.value * b.slope / b.value) / b.value};
    }
    friend bool operator==(const Dual&, const Dual&) = default;
    Dual& operator+=(Dual other) { return *this = *this + other; }
};

/// Loci in map order; recombination[i] is the recombination fraction between locus i and i + 1 (1/2: unlinked),
/// `loci - 1` of them. Crossovers in different intervals are independent (no interference).
template <class Scalar> struct Genome {
    std::size_t loci = 1;
    std::vector<Scalar> recombination;
};

template <class Scalar> using Gametes = std::map<Haplotype, Scalar>;
template <class Scalar> using Generation = std::map<Genotype, Scalar>;

/// The gametes of one plant with their shares.
template <class Scalar> Gametes<Scalar> gametes_of(const Genotype& plant, const Genome<Scalar>& genome);

/// Every mother of one generation with every father of another, at random; single plants are generations of one.
template <class Scalar>
Generation<Scalar> cross(const Generation<Scalar>& mothers, const Generation<Scalar>& fathers,
                         const Genome<Scalar>& genome);

/// Every plant with itself, all leaving the same number of seeds.
template <class Scalar> Generation<Scalar> selfed(const Generation<Scalar>& plants, const Genome<Scalar>& genome);

/// Each genotype's share times its viability, brought back to a sum of 1; empty where none survives.
template <class Scalar>
std::optional<Generation<Scalar>> survivors(const Generation<Scalar>& zygotes,
                                            const std::function<Scalar(const Genotype&)>& viability);

} // namespace filial::inheritance
