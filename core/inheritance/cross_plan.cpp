// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/inheritance/cross_plan.h"

#include <algorithm>
#include <utility>

#include "core/numeric/ascii.h"

namespace filial::inheritance {
namespace {

using ascii::is_letter;
using ascii::is_upper;
using ascii::lower;
using ascii::upper;

struct Token {
    std::size_t place = 0;
    std::string text;
};

/// Two alleles at one locus, as typed; the first of a pair stands on the first strand.
struct TypedLocus {
    Locus locus;
    Allele first = Allele::Dominant;
    Allele second = Allele::Dominant;
    bool phased = false;
};

struct TypedPlant {
    std::vector<TypedLocus> loci;
    std::size_t place = 0;
    std::string text;
};

constexpr std::string_view kTimes = "\xC3\x97"; // the multiplication sign

Allele allele_of(char c) {
    return is_upper(c) ? Allele::Dominant : Allele::Recessive;
}

std::vector<Token> tokens_of(std::string_view text) {
    std::vector<Token> tokens;
    std::size_t i = 0;
    while (i < text.size()) {
        const std::size_t begin = std::min(text.find_first_not_of(" \t\r\n", i), text.size());
        std::size_t end = std::min(text.find_first_of(" \t\r\n", begin), text.size());
        const std::size_t times = text.substr(0, end).find(kTimes, begin);
        if (times == begin && begin < text.size())
            end = begin + kTimes.size();
        else if (times != std::string_view::npos)
            end = times;
        if (end > begin)
            tokens.push_back({begin, std::string(text.substr(begin, end - begin))});
        i = std::max(end, begin);
    }
    return tokens;
}

bool is_cross_sign(const Token& token) {
    return token.text == "x" || token.text == "X" || token.text == "*" || token.text == kTimes;
}

bool is_selfed(const Token& token) {
    return lower(token.text) == "selfed";
}

bool read_phased(const std::string& text, std::size_t slash, std::vector<TypedLocus>& loci) {
    const std::string first = text.substr(0, slash);
    const std::string second = text.substr(slash + 1);
    if (first.empty() || first.size() != second.size())
        return false;
    for (std::size_t i = 0; i < first.size(); ++i) {
        if (!is_letter(first[i]) || upper(first[i]) != upper(second[i]))
            return false;
        loci.push_back({{upper(first[i])}, allele_of(first[i]), allele_of(second[i]), true});
    }
    return true;
}

/// "XAXa", "XAY", "ZAZa", "ZAW".
bool read_sex_linked(const std::string& text, std::vector<TypedLocus>& loci) {
    const char chromosome = text[0];
    const Locus locus{upper(text[1]), chromosome};
    if (text.size() == 3 && text[2] == (chromosome == 'X' ? 'Y' : 'W')) {
        loci.push_back({locus, allele_of(text[1]), Allele::Absent});
        return true;
    }
    if (text.size() != 4 || text[2] != chromosome || upper(text[3]) != locus.letter)
        return false;
    loci.push_back({locus, allele_of(text[1]), allele_of(text[3])});
    return true;
}

bool read_pairs(const std::string& text, std::vector<TypedLocus>& loci) {
    if (text.size() % 2 != 0)
        return false;
    for (std::size_t i = 0; i < text.size(); i += 2) {
        if (!is_letter(text[i]) || upper(text[i]) != upper(text[i + 1]))
            return false;
        loci.push_back({{upper(text[i])}, allele_of(text[i]), allele_of(text[i + 1])});
    }
    return true;
}

bool read_loci(const std::string& text, std::vector<TypedLocus>& loci) {
    if (const std::size_t slash = text.find('/'); slash != std::string::npos)
        return read_phased(text, slash, loci);
    const bool chromosome = text[0] == 'X' || text[0] == 'Z';
    if (chromosome && text.size() > 2 && is_letter(text[1]) && upper(text[1]) != text[0])
        return read_sex_linked(text, loci);
    return read_pairs(text, loci);
}

/// The plant that begins at tokens[at]; leaves `at` at the token after it.
Result<TypedPlant> read_plant(const std::vector<Token>& tokens, std::size_t& at, std::size_t end_of_text) {
    TypedPlant plant;
    plant.place = at < tokens.size() ? tokens[at].place : end_of_text;
    while (at < tokens.size() && !is_cross_sign(tokens[at]) && !is_selfed(tokens[at])) {
        const std::size_t before = plant.loci.size();
        if (!read_loci(tokens[at].text, plant.loci))
            return refusal_at(MessageId::DerivePlantNotUnderstood, tokens[at].place, {text_argument(tokens[at].text)});
        for (std::size_t i = before; i < plant.loci.size(); ++i)
            for (std::size_t j = 0; j < i; ++j)
                if (plant.loci[i].locus.letter == plant.loci[j].locus.letter ||
                    (plant.loci[i].locus.sex_linked() && plant.loci[j].locus.sex_linked()))
                    return refusal_at(plant.loci[i].locus.letter == plant.loci[j].locus.letter
                                          ? MessageId::DeriveLocusTwice
                                          : MessageId::DeriveTwoSexLinkedLoci,
                                      tokens[at].place, {text_argument(std::string(1, plant.loci[i].locus.letter))});
        if (plant.loci.size() > kMostLoci)
            return refusal_at(MessageId::DeriveTooManyLoci, tokens[at].place, {count_argument(kMostLoci)});
        plant.text += (plant.text.empty() ? "" : " ") + tokens[at].text;
        ++at;
    }
    if (plant.loci.empty())
        return refusal_at(MessageId::DerivePlantMissing, plant.place);
    return plant;
}

/// Puts the typed loci in the plan's order. Where the phase of a heterozygote was not typed, the dominant alleles are
/// put on the first strand (coupling).
Result<Plant> placed(const TypedPlant& typed, const std::vector<Locus>& loci) {
    Plant plant{{}, typed.place, typed.text};
    Haplotype first;
    Haplotype second;
    std::size_t unphased = 0;
    std::size_t heterozygous = 0;
    for (std::size_t i = 0; i < loci.size(); ++i) {
        const auto found = std::find_if(typed.loci.begin(), typed.loci.end(),
                                        [&](const TypedLocus& one) { return one.locus == loci[i]; });
        if (found == typed.loci.end())
            return refusal_at(MessageId::DeriveLociDiffer, typed.place,
                              {text_argument(typed.text), text_argument(std::string(1, loci[i].letter))});
        const bool swap = !found->phased && found->second < found->first;
        first.alleles[i] = swap ? found->second : found->first;
        second.alleles[i] = swap ? found->first : found->second;
        if (found->first != found->second && !loci[i].sex_linked()) {
            ++heterozygous;
            if (!found->phased)
                ++unphased;
        }
    }
    for (const TypedLocus& one : typed.loci)
        if (std::find(loci.begin(), loci.end(), one.locus) == loci.end())
            return refusal_at(MessageId::DeriveLocusUnknown, typed.place,
                              {text_argument(typed.text), text_argument(std::string(1, one.locus.letter))});
    plant.genotype = Genotype::of(first, second);
    plant.phase_taken = heterozygous > 1 && unphased > 0;
    return plant;
}

bool heterogametic(const Plant& plant, std::size_t locus) {
    return plant.genotype.first.alleles[locus] == Allele::Absent ||
           plant.genotype.second.alleles[locus] == Allele::Absent;
}

Done check_sexes(const CrossPlan& plan) {
    for (std::size_t locus = 0; locus < plan.loci.size(); ++locus) {
        if (!plan.loci[locus].sex_linked())
            continue;
        if (plan.steps.size() != 1 || !plan.steps[0].other)
            return refusal_at(MessageId::DeriveSexLinkedOneCross, plan.first.place);
        const Plant& other = *plan.steps[0].other;
        if (heterogametic(plan.first, locus) == heterogametic(other, locus))
            return refusal_at(MessageId::DeriveSameSex, other.place,
                              {text_argument(plan.first.text), text_argument(other.text)});
    }
    return done();
}

Result<int> read_selfings(const std::vector<Token>& tokens, std::size_t& at) {
    if (at == tokens.size() || is_cross_sign(tokens[at]) || is_selfed(tokens[at]))
        return 1;
    const std::string& text = tokens[at].text;
    const bool digits = text.size() <= 2 && text.find_first_not_of("0123456789") == std::string::npos;
    const int number = digits ? std::stoi(text) : 0;
    if (number < 1 || number > kMostSelfings)
        return refusal_at(MessageId::DeriveSelfedNumber, tokens[at].place,
                          {text_argument(text), count_argument(kMostSelfings)});
    ++at;
    return number;
}

Result<Step> read_step(const std::vector<Token>& tokens, std::size_t& at, const std::vector<Locus>& loci,
                       std::size_t end_of_text) {
    if (is_selfed(tokens[at])) {
        const Result<int> selfings = read_selfings(tokens, ++at);
        if (!selfings)
            return selfings.error();
        return Step{std::nullopt, selfings.value()};
    }
    if (!is_cross_sign(tokens[at]))
        return refusal_at(MessageId::DerivePlantNotUnderstood, tokens[at].place, {text_argument(tokens[at].text)});
    const Result<TypedPlant> typed = read_plant(tokens, ++at, end_of_text);
    if (!typed)
        return typed.error();
    Result<Plant> plant = placed(typed.value(), loci);
    if (!plant)
        return plant.error();
    return Step{std::move(plant).value(), 0};
}

} // namespace

Result<CrossPlan> read_cross_plan(std::string_view text) {
    if (text.size() > kLongestText)
        return refusal_at(MessageId::DeriveTooLong, kLongestText);
    const std::vector<Token> tokens = tokens_of(text);
    std::size_t at = 0;
    const Result<TypedPlant> typed = read_plant(tokens, at, text.size());
    if (!typed)
        return typed.error();
    CrossPlan plan;
    for (const TypedLocus& locus : typed.value().loci)
        plan.loci.push_back(locus.locus);
    plan.first = placed(typed.value(), plan.loci).value();
    if (at == tokens.size())
        return refusal_at(MessageId::DeriveNoMating, text.size());
    int generations = 0;
    while (at < tokens.size()) {
        const std::size_t place = tokens[at].place;
        Result<Step> step = read_step(tokens, at, plan.loci, text.size());
        if (!step)
            return step.error();
        generations += std::max(1, step.value().selfings);
        if (generations > kMostSelfings)
            return refusal_at(MessageId::DeriveTooManyGenerations, place, {count_argument(kMostSelfings)});
        plan.steps.push_back(std::move(step).value());
    }
    if (const Done sexes = check_sexes(plan); !sexes)
        return sexes.error();
    return plan;
}

char allele_letter(const Locus& locus, Allele allele) {
    return allele == Allele::Dominant ? locus.letter : static_cast<char>(locus.letter - 'A' + 'a');
}

namespace {

std::string pair_text(const Locus& locus, Allele one, Allele other) {
    if (other < one)
        std::swap(one, other);
    if (!locus.sex_linked())
        return {allele_letter(locus, one), allele_letter(locus, other)};
    const std::string first{locus.chromosome, allele_letter(locus, one)};
    if (other == Allele::Absent)
        return first + (locus.chromosome == 'X' ? "Y" : "W");
    return first + locus.chromosome + allele_letter(locus, other);
}

} // namespace

std::string genotype_text(const Genotype& genotype, const std::vector<Locus>& loci, bool phased) {
    std::string first;
    std::string second;
    std::string text;
    for (std::size_t i = 0; i < loci.size(); ++i) {
        const Allele one = genotype.first.alleles[i];
        const Allele other = genotype.second.alleles[i];
        if (phased && !loci[i].sex_linked()) {
            first += allele_letter(loci[i], one);
            second += allele_letter(loci[i], other);
        } else {
            text += pair_text(loci[i], one, other);
        }
    }
    if (!phased)
        return text;
    return first + "/" + second + (text.empty() ? "" : " " + text);
}

} // namespace filial::inheritance
