// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/inheritance/grouping.h"

#include <algorithm>
#include <optional>
#include <utility>

#include "core/numeric/ascii.h"

namespace filial::inheritance {
namespace {

using ascii::is_letter;
using ascii::is_space;
using ascii::is_upper;
using ascii::upper;

constexpr PairSet kWithDominant = kDominantPair | kMixedPair;
constexpr PairSet kWithRecessive = kMixedPair | kRecessivePair;
constexpr PairSet kTwo = kDominantPair | kMixedPair | kRecessivePair;
constexpr PairSet kAlone = kDominantAlone | kRecessiveAlone;

PairSet pair_of(Allele one, Allele other) {
    if (other < one)
        std::swap(one, other);
    if (other == Allele::Absent)
        return one == Allele::Dominant ? kDominantAlone : kRecessiveAlone;
    if (one != other)
        return kMixedPair;
    return one == Allele::Dominant ? kDominantPair : kRecessivePair;
}

std::string_view trimmed(std::string_view text) {
    while (!text.empty() && is_space(text.front()))
        text.remove_prefix(1);
    while (!text.empty() && is_space(text.back()))
        text.remove_suffix(1);
    return text;
}

/// The pairs that two places of a pattern allow, each an allele of the locus or '_'.
PairSet pairs_with(char one, char other) {
    PairSet pairs = kTwo;
    for (const char place : {one, other})
        if (place != '_')
            pairs &= is_upper(place) ? kWithDominant : kWithRecessive;
    if (one != '_' && other != '_' && is_upper(one) == is_upper(other))
        pairs &= static_cast<PairSet>(~kMixedPair);
    return pairs;
}

bool allele_or_blank(char c, const Locus& locus) {
    return c == '_' || upper(c) == locus.letter;
}

/// A sex-linked part such as "XAX_" or "X_Y" at text[at]; moves `at` past it.
std::optional<PairSet> sex_linked_part(std::string_view text, std::size_t& at, const Locus& locus) {
    const char other = locus.chromosome == 'X' ? 'Y' : 'W';
    if (at + 2 >= text.size() || !allele_or_blank(text[at + 1], locus))
        return std::nullopt;
    const char first = text[at + 1];
    if (text[at + 2] == other) {
        at += 3;
        if (first == '_')
            return kAlone;
        return is_upper(first) ? kDominantAlone : kRecessiveAlone;
    }
    if (at + 3 >= text.size() || text[at + 2] != locus.chromosome || !allele_or_blank(text[at + 3], locus))
        return std::nullopt;
    at += 4;
    return pairs_with(first, text[at - 1]);
}

class PatternReader {
public:
    PatternReader(std::string_view text, const std::vector<Locus>& loci) : loci_(loci) {
        for (const char c : text)
            if (!is_space(c))
                text_ += c;
    }

    /// Empty where the text is no pattern of these loci.
    std::optional<Pattern> read() {
        if (text_.empty())
            return std::nullopt;
        for (std::size_t at = 0; at < text_.size();)
            if (!read_part(at))
                return std::nullopt;
        return pattern_;
    }

private:
    bool read_part(std::size_t& at) {
        for (std::size_t i = 0; i < loci_.size(); ++i)
            if (loci_[i].sex_linked() && text_[at] == loci_[i].chromosome) {
                const auto pairs = sex_linked_part(text_, at, loci_[i]);
                return pairs && restrict_to(i, *pairs);
            }
        if (at + 1 >= text_.size())
            return false;
        const char one = text_[at];
        const char other = text_[at + 1];
        at += 2;
        if (one == '_')
            return other == '_'; // any pair at a locus not named
        for (std::size_t i = 0; i < loci_.size(); ++i)
            if (!loci_[i].sex_linked() && upper(one) == loci_[i].letter && allele_or_blank(other, loci_[i]))
                return restrict_to(i, pairs_with(one, other));
        return false;
    }

    bool restrict_to(std::size_t locus, PairSet pairs) {
        if (named_[locus])
            return false;
        named_[locus] = true;
        pattern_.pairs[locus] = pairs;
        return true;
    }

    std::string text_;
    const std::vector<Locus>& loci_;
    Pattern pattern_;
    std::array<bool, kMostLoci> named_{};
};

std::string locus_text(PairSet pairs, const Locus& locus) {
    const std::string big(1, allele_letter(locus, Allele::Dominant));
    const std::string small(1, allele_letter(locus, Allele::Recessive));
    std::string first = "_";
    std::string second = "_";
    if ((pairs & kTwo) != kTwo) {
        const bool needs_big = (pairs & (kRecessivePair | kRecessiveAlone)) == 0;
        const bool needs_small = (pairs & (kDominantPair | kDominantAlone)) == 0;
        const bool mixed = (pairs & kMixedPair) != 0;
        first = needs_big ? big : needs_small ? small : "_";
        second = mixed && needs_big && needs_small ? small : mixed ? "_" : first;
    }
    if (!locus.sex_linked())
        return first + second;
    const std::string chromosome(1, locus.chromosome);
    if ((pairs & kTwo) == 0)
        return chromosome + first + (locus.chromosome == 'X' ? "Y" : "W");
    if ((pairs & kAlone) != 0)
        return ""; // both sexes, any allele
    return chromosome + first + chromosome + second;
}

std::string pattern_text(const Pattern& pattern, const std::vector<Locus>& loci) {
    std::string text;
    for (std::size_t i = 0; i < loci.size(); ++i)
        text += locus_text(pattern.pairs[i], loci[i]);
    return text;
}

/// Where a pattern of `label` goes.
std::vector<Pattern>& patterns_of(Grouping& grouping, const std::string& label) {
    if (label == "dies")
        return grouping.dies;
    if (label == "left out")
        return grouping.left_out;
    const auto found = std::find_if(grouping.classes.begin(), grouping.classes.end(),
                                    [&](const GroupedClass& one) { return one.label == label; });
    if (found != grouping.classes.end())
        return found->patterns;
    grouping.classes.push_back({label, {}});
    return grouping.classes.back().patterns;
}

Done read_entry(std::string_view entry, std::size_t place, const std::vector<Locus>& loci, Grouping& grouping) {
    while (!entry.empty() && is_space(entry.front())) {
        entry.remove_prefix(1);
        ++place;
    }
    const std::size_t equals = entry.find('=');
    if (equals == std::string_view::npos)
        return refusal_at(MessageId::DeriveShowMissingEquals, place, {text_argument(std::string(trimmed(entry)))});
    const std::string_view typed = trimmed(entry.substr(0, equals));
    const auto pattern = PatternReader(typed, loci).read();
    if (!pattern)
        return refusal_at(MessageId::DeriveShowPattern, place, {text_argument(std::string(typed))});
    const std::string label(trimmed(entry.substr(equals + 1)));
    if (label.empty())
        return refusal_at(MessageId::DeriveShowLabelMissing, place + equals + 1, {text_argument(std::string(typed))});
    patterns_of(grouping, label).push_back(*pattern);
    return done();
}

} // namespace

bool Pattern::takes_in(const Genotype& genotype, std::size_t loci) const {
    for (std::size_t i = 0; i < loci; ++i)
        if ((pairs[i] & pair_of(genotype.first.alleles[i], genotype.second.alleles[i])) == 0)
            return false;
    return true;
}

bool any_takes_in(const std::vector<Pattern>& patterns, const Genotype& genotype, std::size_t loci) {
    return std::any_of(patterns.begin(), patterns.end(),
                       [&](const Pattern& pattern) { return pattern.takes_in(genotype, loci); });
}

Result<Grouping> read_grouping(std::string_view text, const std::vector<Locus>& loci) {
    if (text.size() > kLongestText)
        return refusal_at(MessageId::DeriveTooLong, kLongestText);
    Grouping grouping;
    std::size_t begin = 0;
    for (std::size_t i = 0; i <= text.size(); ++i) {
        if (i != text.size() && text[i] != ',')
            continue;
        if (const Done read = read_entry(text.substr(begin, i - begin), begin, loci, grouping); !read)
            return read.error();
        begin = i + 1;
    }
    if (grouping.classes.empty())
        return refusal_at(MessageId::DeriveShowNoClass, 0);
    return grouping;
}

Grouping full_dominance(const std::vector<Locus>& loci) {
    std::vector<Pattern> patterns(1);
    for (std::size_t i = 0; i < loci.size(); ++i) {
        std::vector<PairSet> phenotypes{kWithDominant, kRecessivePair};
        if (loci[i].sex_linked())
            phenotypes = {kWithDominant, kRecessivePair, kDominantAlone, kRecessiveAlone};
        std::vector<Pattern> longer;
        for (const Pattern& pattern : patterns)
            for (const PairSet pairs : phenotypes) {
                longer.push_back(pattern);
                longer.back().pairs[i] = pairs;
            }
        patterns = std::move(longer);
    }
    Grouping grouping;
    grouping.only_arising = true;
    for (const Pattern& pattern : patterns)
        grouping.classes.push_back({pattern_text(pattern, loci), {pattern}});
    return grouping;
}

std::string patterns_text(const std::vector<Pattern>& patterns, const std::vector<Locus>& loci) {
    std::string text;
    for (const Pattern& pattern : patterns)
        text += (text.empty() ? "" : " + ") + pattern_text(pattern, loci);
    return text;
}

} // namespace filial::inheritance
