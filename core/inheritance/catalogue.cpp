// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/inheritance/catalogue.h"

#include <algorithm>
#include <stdexcept>
#include <utility>

#include "core/inheritance/catalogue_sources.h"
#include "core/inheritance/derive.h"

namespace filial::inheritance {
namespace {

std::vector<std::string> keywords_of(std::string_view text) {
    std::vector<std::string> words;
    while (!text.empty()) {
        const std::size_t comma = std::min(text.find(','), text.size());
        words.emplace_back(text.substr(0, comma));
        text.remove_prefix(std::min(comma + 1, text.size()));
    }
    return words;
}

std::vector<std::string> meanings_of(const Derivation& derivation) {
    std::vector<std::string> meanings;
    for (const DerivedClass& one : derivation.classes)
        meanings.push_back(one.genotypes);
    return meanings;
}

Derivation derived(const DeriveInput& input) {
    Result<Derivation> derivation = derive(input);
    if (!derivation)
        throw std::logic_error("the catalogue cannot derive " + input.cross + ", " + input.show);
    return std::move(derivation).value();
}

CatalogueEntry entry_of(const CatalogueSource& source) {
    const DeriveInput input{std::string(source.cross), std::nullopt, std::string(source.show)};
    const Derivation derivation = derived(input);
    if (!derivation.ratio)
        throw std::logic_error("no ratio from " + input.cross + ", " + input.show);
    return {Hypothesis::from_ratio(*derivation.ratio, Origin::Catalogue),
            source.group,
            std::string(source.name),
            input.cross,
            input.show,
            meanings_of(derivation),
            keywords_of(source.keywords)};
}

CatalogueEntry linked_entry(CrossKind kind, Phase phase) {
    const bool f2 = kind == CrossKind::F2;
    const bool coupling = phase == Phase::Coupling;
    const std::string plant = coupling ? "AB/ab" : "Ab/aB";
    CatalogueEntry entry{Hypothesis::from_linked_cross({kind, phase, std::nullopt}, Origin::Catalogue),
                         CatalogueGroup::Linked,
                         std::string("two linked loci, ") + (f2 ? "both dominant, F2, " : "test cross, ") +
                             (coupling ? "coupling" : "repulsion") + ", r fitted",
                         plant + " x " + (f2 ? plant : "ab/ab"),
                         "A_B_=1, A_bb=2, aaB_=3, aabb=4",
                         {},
                         {"linkage", "linked", "recombination", f2 ? "F2" : "test cross"}};
    entry.meanings = meanings_of(derived({entry.cross, RecombinationFraction(0.25), entry.show}));
    return entry;
}

std::vector<CatalogueEntry> build() {
    std::vector<CatalogueEntry> entries;
    for (const auto sources : {one_and_two_locus_sources(), three_locus_sources(), other_sources()})
        for (const CatalogueSource& source : sources)
            entries.push_back(entry_of(source));
    for (const CrossKind kind : {CrossKind::F2, CrossKind::TestCross})
        for (const Phase phase : {Phase::Coupling, Phase::Repulsion})
            entries.push_back(linked_entry(kind, phase));
    return entries;
}

} // namespace

const std::vector<CatalogueEntry>& catalogue() {
    static const std::vector<CatalogueEntry> entries = build();
    return entries;
}

} // namespace filial::inheritance
