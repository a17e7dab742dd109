// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstdint>
#include <string>
#include <vector>

#include "core/inheritance/hypothesis.h"

// Terms. The catalogue lists the inheritances a breeder meets, each derived by the inheritance engine from a
// cross and a grouping of genotypes into phenotypes; no ratio in it is typed.
namespace filial::inheritance {

enum class CatalogueGroup : std::uint8_t {
    OneLocus,
    TwoLociDominant,
    TwoLociInteracting,
    TwoLociCodominant,
    ThreeLoci,
    TestCross,
    Selfing,
    Lethal,
    SexLinked,
    Linked
};

struct CatalogueEntry {
    Hypothesis hypothesis;
    CatalogueGroup group = CatalogueGroup::OneLocus;
    std::string name;                  ///< trade's words: "duplicate recessive epistasis (complementary genes)"
    std::string cross;                 ///< how it was derived, as `derive` reads it: "Aa Bb x Aa Bb"
    std::string show;                  ///< grouping, as `derive --show` reads it: "A_B_=1, A_bb=2, …"
    std::vector<std::string> meanings; ///< genotypes of each class, in term order
    std::vector<std::string> keywords; ///< for searching
};

/// The whole catalogue, in the order shown; derived once, on first use.
[[nodiscard]] const std::vector<CatalogueEntry>& catalogue();

} // namespace filial::inheritance
