// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/inheritance/engine.h"

#include <algorithm>
#include <stdexcept>

#include <boost/multiprecision/cpp_int.hpp>

namespace filial::inheritance {
namespace {

template <class Scalar>
void unite(const Gametes<Scalar>& eggs, const Gametes<Scalar>& pollen, const Scalar& share, Generation<Scalar>& into) {
    for (const auto& [egg, egg_share] : eggs) {
        const Scalar weight = share * egg_share;
        for (const auto& [grain, grain_share] : pollen)
            into[Genotype::of(egg, grain)] += weight * grain_share;
    }
}

template <class Scalar> Gametes<Scalar> pool_gametes(const Generation<Scalar>& plants, const Genome<Scalar>& genome) {
    Gametes<Scalar> pool;
    for (const auto& [plant, share] : plants)
        for (const auto& [gamete, part] : gametes_of(plant, genome))
            pool[gamete] += share * part;
    return pool;
}

} // namespace

Genotype Genotype::of(const Haplotype& one, const Haplotype& other) {
    return one <= other ? Genotype{one, other} : Genotype{other, one};
}

template <class Scalar> Gametes<Scalar> gametes_of(const Genotype& plant, const Genome<Scalar>& genome) {
    if (genome.loci == 0 || genome.loci > kMostLoci || genome.recombination.size() + 1 != genome.loci)
        throw std::invalid_argument("one to three loci, and one recombination fraction between neighbours");
    Gametes<Scalar> gametes;
    // Bit i of `strands` says which strand locus i comes from.
    for (unsigned strands = 0; strands < 1U << genome.loci; ++strands) {
        Haplotype gamete;
        Scalar share = Scalar(1) / Scalar(2);
        for (std::size_t locus = 0; locus < genome.loci; ++locus) {
            const bool second = (strands >> locus & 1U) != 0;
            gamete.alleles[locus] = (second ? plant.second : plant.first).alleles[locus];
            if (locus == 0)
                continue;
            const bool before = (strands >> (locus - 1) & 1U) != 0;
            const Scalar& r = genome.recombination[locus - 1];
            share = share * (second != before ? r : Scalar(Scalar(1) - r));
        }
        gametes[gamete] += share;
    }
    return gametes;
}

template <class Scalar>
Generation<Scalar> cross(const Generation<Scalar>& mothers, const Generation<Scalar>& fathers,
                         const Genome<Scalar>& genome) {
    Generation<Scalar> offspring;
    unite(pool_gametes(mothers, genome), pool_gametes(fathers, genome), Scalar(1), offspring);
    return offspring;
}

template <class Scalar> Generation<Scalar> selfed(const Generation<Scalar>& plants, const Genome<Scalar>& genome) {
    Generation<Scalar> offspring;
    for (const auto& [plant, share] : plants) {
        const Gametes<Scalar> gametes = gametes_of(plant, genome);
        unite(gametes, gametes, share, offspring);
    }
    return offspring;
}

template <class Scalar>
std::optional<Generation<Scalar>> survivors(const Generation<Scalar>& zygotes,
                                            const std::function<Scalar(const Genotype&)>& viability) {
    Generation<Scalar> alive;
    Scalar total(0);
    bool any = false;
    for (const auto& [genotype, share] : zygotes) {
        const Scalar part = share * viability(genotype);
        if (part == Scalar(0))
            continue;
        any = true;
        total += part;
        alive.emplace(genotype, part);
    }
    if (!any)
        return std::nullopt;
    for (auto& entry : alive)
        entry.second = entry.second / total;
    return alive;
}

#define FILIAL_ENGINE(Scalar)                                                                                          \
    template Gametes<Scalar> gametes_of(const Genotype&, const Genome<Scalar>&);                                       \
    template Generation<Scalar> cross(const Generation<Scalar>&, const Generation<Scalar>&, const Genome<Scalar>&);    \
    template Generation<Scalar> selfed(const Generation<Scalar>&, const Genome<Scalar>&);                              \
    template std::optional<Generation<Scalar>> survivors(const Generation<Scalar>&,                                    \
                                                         const std::function<Scalar(const Genotype&)>&);
FILIAL_ENGINE(double)
FILIAL_ENGINE(Dual)
FILIAL_ENGINE(boost::multiprecision::cpp_rational)
#undef FILIAL_ENGINE

} // namespace filial::inheritance
