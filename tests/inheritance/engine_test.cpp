// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/inheritance/engine.h"

#include <gtest/gtest.h>

#include <array>

#include "core/inheritance/hypothesis.h"

namespace filial::inheritance {
namespace {

Haplotype strand(std::initializer_list<Allele> alleles) {
    Haplotype result;
    std::copy(alleles.begin(), alleles.end(), result.alleles.begin());
    return result;
}

constexpr Allele kBig = Allele::Dominant;
constexpr Allele kSmall = Allele::Recessive;

Genotype double_heterozygote(Phase phase) {
    return phase == Phase::Coupling ? Genotype::of(strand({kBig, kBig}), strand({kSmall, kSmall}))
                                    : Genotype::of(strand({kBig, kSmall}), strand({kSmall, kBig}));
}

/// The four classes A_B_, A_bb, aaB_, aabb of a generation.
std::array<Dual, 4> classes_of(const Generation<Dual>& generation) {
    std::array<Dual, 4> classes;
    for (const auto& [genotype, share] : generation) {
        const auto recessive = [&](std::size_t locus) {
            return genotype.first.alleles.at(locus) == kSmall && genotype.second.alleles.at(locus) == kSmall;
        };
        classes.at((recessive(0) ? 2U : 0U) + (recessive(1) ? 1U : 0U)) += share;
    }
    return classes;
}

// The closed forms of the hypothesis are those of the engine, with their derivatives.
TEST(Engine, GivesTheClosedFormsOfLinkedCrosses) {
    for (const CrossKind kind : {CrossKind::F2, CrossKind::TestCross})
        for (const Phase phase : {Phase::Coupling, Phase::Repulsion})
            for (int step = 0; step <= 50; ++step) {
                const double r = step / 100.0;
                const Genome<Dual> genome{2, {Dual(r, 1.0)}};
                const Generation<Dual> plant{{double_heterozygote(phase), Dual(1.0)}};
                const Generation<Dual> recessive{
                    {Genotype::of(strand({kSmall, kSmall}), strand({kSmall, kSmall})), Dual(1.0)}};
                const auto engine =
                    classes_of(kind == CrossKind::F2 ? selfed(plant, genome) : cross(plant, recessive, genome));
                const auto closed = Hypothesis::from_linked_cross({kind, phase, std::nullopt}).at(std::span(&r, 1));
                for (std::size_t i = 0; i < 4; ++i) {
                    EXPECT_NEAR(closed.p[i], engine.at(i).value, 1e-15);
                    EXPECT_NEAR(closed.derivatives[i][0], engine.at(i).slope, 1e-15);
                }
            }
}

TEST(Engine, SelfingIsACrossWithItself) {
    const Genome<double> genome{2, {0.2}};
    const Generation<double> plant{{double_heterozygote(Phase::Repulsion), 1.0}};
    EXPECT_EQ(selfed(plant, genome), cross(plant, plant, genome));
}

TEST(Engine, SharesAddToOneWithoutInterference) {
    const Genotype plant = Genotype::of(strand({kBig, kBig, kBig}), strand({kSmall, kSmall, kSmall}));
    const Genome<double> genome{3, {0.1, 0.3}};
    double sum = 0.0;
    for (const auto& entry : gametes_of(plant, genome))
        sum += entry.second;
    EXPECT_NEAR(sum, 1.0, 1e-15);
    // Double crossovers are the product of the intervals (no interference), in either of two gametes.
    EXPECT_NEAR(gametes_of(plant, genome).at(strand({kBig, kSmall, kBig})), 0.1 * 0.3 / 2.0, 1e-16);
}

TEST(Engine, SurvivorsAreBroughtBackToOne) {
    const Genome<double> genome{1, {}};
    const Generation<double> f2 = selfed<double>({{Genotype::of(strand({kBig}), strand({kSmall})), 1.0}}, genome);
    const auto half_lost = survivors<double>(f2, [](const Genotype& genotype) {
        return genotype.first == genotype.second && genotype.first.alleles[0] == kSmall ? 0.5 : 1.0;
    });
    ASSERT_TRUE(half_lost.has_value());
    const Genotype recessive = Genotype::of(strand({kSmall}), strand({kSmall}));
    EXPECT_NEAR(half_lost->at(recessive), 0.125 / 0.875, 1e-16);
    EXPECT_FALSE(survivors<double>(f2, [](const Genotype&) { return 0.0; }).has_value());
}

TEST(Engine, RefusesAGenomeThatDoesNotFit) {
    const Genotype plant = double_heterozygote(Phase::Coupling);
    EXPECT_THROW((void)gametes_of(plant, Genome<double>{2, {}}), std::invalid_argument);
    EXPECT_THROW((void)gametes_of(plant, Genome<double>{0, {}}), std::invalid_argument);
    EXPECT_THROW((void)gametes_of(plant, Genome<double>{4, {0.1, 0.1, 0.1}}), std::invalid_argument);
}

} // namespace
} // namespace filial::inheritance
