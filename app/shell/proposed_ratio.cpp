// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/shell/proposed_ratio.h"

#include <array>

#include "core/inheritance/derive.h"

namespace filial::app {
namespace {

constexpr std::size_t kLociAtMost = 3;
constexpr std::array<char, kLociAtMost> kLoci{'A', 'B', 'C'};

char recessive(char locus) {
    return static_cast<char>(locus - 'A' + 'a');
}

std::string plant(std::size_t loci, bool heterozygous) {
    std::string text;
    for (std::size_t i = 0; i < loci; ++i) {
        text += i == 0 ? "" : " ";
        text += heterozygous ? kLoci[i] : recessive(kLoci[i]);
        text += recessive(kLoci[i]);
    }
    return text;
}

/// Genotypes of one locus that look alike, by level.
std::vector<std::string> genotypes(char locus, std::size_t levels) {
    const std::string upper(1, locus);
    const std::string lower(1, recessive(locus));
    if (levels == 2)
        return {upper + "_", lower + lower};
    return {upper + upper, upper + lower, lower + lower};
}

/// Each combination of levels is a class of its own, numbered in the order of the book's classes.
std::string grouping(const std::vector<book::Trait>& traits) {
    std::vector<std::string> all{""};
    for (std::size_t i = 0; i < traits.size(); ++i) {
        std::vector<std::string> next;
        for (const std::string& before : all)
            for (const std::string& here : genotypes(kLoci[i], traits[i].levels.size()))
                next.push_back(before + here);
        all = std::move(next);
    }
    std::string text;
    for (std::size_t i = 0; i < all.size(); ++i)
        text += (i == 0 ? "" : ", ") + all[i] + "=class " + std::to_string(i + 1);
    return text;
}

} // namespace

std::string proposedRatio(const std::string& generation, const std::vector<book::Trait>& traits) {
    const std::size_t loci = traits.size();
    if (loci == 0 || loci > kLociAtMost)
        return {};
    for (const book::Trait& trait : traits)
        if (trait.levels.size() < 2 || trait.levels.size() > (generation == "test cross" ? 2U : 3U))
            return {};
    inheritance::DeriveInput input;
    if (generation == "F2")
        input.cross = plant(loci, true) + " x " + plant(loci, true);
    else if (generation == "test cross")
        input.cross = plant(loci, true) + " x " + plant(loci, false);
    else if (generation == "F3")
        input.cross = plant(loci, true) + " selfed 2";
    else
        return {};
    input.show = grouping(traits);
    const auto derived = inheritance::derive(input);
    return derived && derived.value().ratio ? derived.value().ratio->notation() : std::string();
}

} // namespace filial::app
