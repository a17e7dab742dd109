// SPDX-License-Identifier: GPL-3.0-or-later
#include <array>

#include "core/inheritance/catalogue_sources.h"

// Names of kinds of inheritance are common practice.
namespace filial::inheritance {
namespace {

constexpr std::array<CatalogueSource, 19> kOneAndTwoLoci{{
    {CatalogueGroup::OneLocus, "one locus, dominant", "Aa x Aa", "A_=1, aa=2",
     "F2,monohybrid,dominance,dominant,recessive,single gene"},
    {CatalogueGroup::OneLocus, "one locus, heterozygote distinct (codominant or incompletely dominant)", "Aa x Aa",
     "AA=1, Aa=2, aa=3", "F2,monohybrid,codominance,incomplete dominance,intermediate,marker"},
    {CatalogueGroup::OneLocus, "one locus, heterozygote by recessive", "Aa x aa", "Aa=1, aa=2",
     "test cross,back-cross,BC1,heterozygote"},
    {CatalogueGroup::OneLocus, "one locus, true-breeding to segregating among the dominant F2 plants", "Aa selfed",
     "AA=1, Aa=2, aa=left out", "F3 families,progeny test,true-breeding,segregating,F2 dominants"},
    {CatalogueGroup::TwoLociDominant, "two loci, both dominant", "Aa Bb x Aa Bb", "A_B_=1, A_bb=2, aaB_=3, aabb=4",
     "F2,dihybrid,independent assortment,two genes"},
    {CatalogueGroup::TwoLociInteracting, "recessive epistasis (supplementary genes)", "Aa Bb x Aa Bb",
     "A_B_=1, A_bb=2, aa=3", "epistasis,modified dihybrid,F2,9:4:3,supplementary"},
    {CatalogueGroup::TwoLociInteracting, "duplicate genes with cumulative effect (additive dominants)", "Aa Bb x Aa Bb",
     "A_B_=1, A_bb=2, aaB_=2, aabb=3", "additive,cumulative,polymeric,F2,modified dihybrid"},
    {CatalogueGroup::TwoLociInteracting, "duplicate recessive epistasis (complementary genes)", "Aa Bb x Aa Bb",
     "A_B_=1, A_bb=2, aaB_=2, aabb=2", "complementary,epistasis,F2,modified dihybrid,7:9"},
    {CatalogueGroup::TwoLociInteracting, "two loci, double recessive like double dominant, single dominants distinct",
     "Aa Bb x Aa Bb", "A_B_=1, aabb=1, A_bb=2, aaB_=3", "F2,modified dihybrid"},
    {CatalogueGroup::TwoLociInteracting, "dominant epistasis (masking gene)", "Aa Bb x Aa Bb", "A_=1, aaB_=2, aabb=3",
     "epistasis,masking,F2,modified dihybrid"},
    {CatalogueGroup::TwoLociInteracting, "dominant and recessive epistasis (inhibiting gene)", "Aa Bb x Aa Bb",
     "A_=1, aabb=1, aaB_=2", "inhibitor,inhibitory,suppressor,epistasis,F2,modified dihybrid"},
    {CatalogueGroup::TwoLociInteracting, "duplicate dominant epistasis (duplicate genes)", "Aa Bb x Aa Bb",
     "A_=1, B_=1, aabb=2", "duplicate,epistasis,F2,modified dihybrid"},
    {CatalogueGroup::TwoLociInteracting, "two loci, one dominant alone differs from both or none", "Aa Bb x Aa Bb",
     "A_B_=1, aabb=1, A_bb=2, aaB_=2", "5:3,F2,modified dihybrid"},
    {CatalogueGroup::TwoLociCodominant, "two loci, one codominant, one dominant", "Aa Bb x Aa Bb",
     "AAB_=1, AaB_=2, aaB_=3, AAbb=4, Aabb=5, aabb=6", "F2,dihybrid,codominance,incomplete dominance,marker"},
    {CatalogueGroup::TwoLociCodominant, "two loci, both codominant", "Aa Bb x Aa Bb",
     "AABB=1, AABb=2, AAbb=3, AaBB=4, AaBb=5, Aabb=6, aaBB=7, aaBb=8, aabb=9",
     "F2,dihybrid,codominance,incomplete dominance,markers"},
    {CatalogueGroup::TwoLociCodominant, "one codominant locus, recessive epistasis of the other", "Aa Bb x Aa Bb",
     "AAB_=1, AaB_=2, aaB_=3, bb=4", "F2,epistasis,codominance,incomplete dominance"},
    {CatalogueGroup::TwoLociCodominant, "one codominant locus, recessive of the other like its dominant homozygote",
     "Aa Bb x Aa Bb", "AAB_=1, bb=1, AaB_=2, aaB_=3", "F2,epistasis,codominance,incomplete dominance"},
    {CatalogueGroup::TwoLociCodominant, "heterozygote distinct, double recessive distinct", "Aa Bb x Aa Bb",
     "Aa=1, AA=2, aaB_=2, aabb=3", "F2,codominance,incomplete dominance"},
    {CatalogueGroup::TwoLociCodominant, "two loci, equal additive effects (number of dominant alleles)",
     "Aa Bb x Aa Bb", "AABB=1, AABb=2, AaBB=2, AAbb=3, AaBb=3, aaBB=3, Aabb=4, aaBb=4, aabb=5",
     "F2,additive,polygenic,multiple factors,quantitative"},
}};

} // namespace

std::span<const CatalogueSource> one_and_two_locus_sources() {
    return kOneAndTwoLoci;
}

} // namespace filial::inheritance
