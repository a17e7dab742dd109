// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/inheritance/derive.h"

#include <algorithm>
#include <limits>
#include <utility>

#include <boost/multiprecision/cpp_int.hpp>

#include "core/inheritance/cross_plan.h"
#include "core/inheritance/engine.h"
#include "core/inheritance/grouping.h"

namespace filial::inheritance {
namespace {

using Whole = boost::multiprecision::cpp_int;
using Exact = boost::multiprecision::cpp_rational;

bool linked_interval(const std::vector<Locus>& loci, std::size_t interval) {
    return !loci[interval].sex_linked() && !loci[interval + 1].sex_linked();
}

bool has_linked_interval(const std::vector<Locus>& loci) {
    for (std::size_t i = 0; i + 1 < loci.size(); ++i)
        if (linked_interval(loci, i))
            return true;
    return false;
}

template <class Scalar> Genome<Scalar> genome_of(const std::vector<Locus>& loci, const Scalar& r) {
    Genome<Scalar> genome{loci.size(), {}};
    const Scalar unlinked = Scalar(1) / Scalar(2);
    for (std::size_t i = 0; i + 1 < loci.size(); ++i)
        genome.recombination.push_back(linked_interval(loci, i) ? r : unlinked);
    return genome;
}

/// Takes away what `patterns` take in, and brings the rest back to 1.
template <class Scalar>
std::optional<Generation<Scalar>> without(const Generation<Scalar>& generation, const std::vector<Pattern>& patterns,
                                          std::size_t loci) {
    if (patterns.empty())
        return generation;
    return survivors<Scalar>(
        generation, [&](const Genotype& genotype) { return Scalar(any_takes_in(patterns, genotype, loci) ? 0 : 1); });
}

/// The last generation as it is scored; empty where nothing is left of one.
template <class Scalar>
std::optional<Generation<Scalar>> run(const CrossPlan& plan, const Grouping& grouping, const Scalar& r) {
    const Genome<Scalar> genome = genome_of(plan.loci, r);
    Generation<Scalar> plants{{plan.first.genotype, Scalar(1)}};
    for (const Step& step : plan.steps) {
        const int generations = step.other ? 1 : step.selfings;
        for (int i = 0; i < generations; ++i) {
            const Generation<Scalar> zygotes =
                step.other ? cross(plants, {{step.other->genotype, Scalar(1)}}, genome) : selfed(plants, genome);
            auto alive = without(zygotes, grouping.dies, plan.loci.size());
            if (!alive)
                return std::nullopt;
            plants = std::move(*alive);
        }
    }
    return without(plants, grouping.left_out, plan.loci.size());
}

/// Locus by locus: AABB, AABb, AAbb, AaBB, …; phases of one genotype side by side.
struct ByLocus {
    bool operator()(const Genotype& left, const Genotype& right) const {
        for (std::size_t i = 0; i < kMostLoci; ++i) {
            const auto one = std::minmax(left.first.alleles[i], left.second.alleles[i]);
            const auto other = std::minmax(right.first.alleles[i], right.second.alleles[i]);
            if (one != other)
                return one < other;
        }
        return left < right;
    }
};
template <class Scalar> using Table = std::map<Genotype, Scalar, ByLocus>;

/// Genotypes in the order of the table. Without linkage the phase does not matter and phases are added together.
template <class Scalar> Table<Scalar> table_of(const Generation<Scalar>& plants, bool phased) {
    Table<Scalar> table;
    for (const auto& [genotype, share] : plants) {
        if (share == Scalar(0))
            continue;
        Genotype key = genotype;
        if (!phased)
            for (std::size_t i = 0; i < kMostLoci; ++i)
                if (key.second.alleles[i] < key.first.alleles[i])
                    std::swap(key.first.alleles[i], key.second.alleles[i]);
        table[key] += share;
    }
    return table;
}

Result<std::size_t> class_of(const Genotype& genotype, const CrossPlan& plan, const Grouping& grouping) {
    std::optional<std::size_t> found;
    for (std::size_t i = 0; i < grouping.classes.size(); ++i) {
        if (!any_takes_in(grouping.classes[i].patterns, genotype, plan.loci.size()))
            continue;
        if (found)
            return refusal_at(MessageId::DeriveShowOverlap, std::nullopt,
                              {text_argument(genotype_text(genotype, plan.loci, false)),
                               text_argument(grouping.classes[*found].label),
                               text_argument(grouping.classes[i].label)});
        found = i;
    }
    if (!found)
        return refusal_at(MessageId::DeriveShowMissing, std::nullopt,
                          {text_argument(genotype_text(genotype, plan.loci, false))});
    return *found;
}

/// A label kept back and a class must not both take in a genotype; checked for every genotype there can be, since one
/// that dies is in no table.
Done check_kept_back(const CrossPlan& plan, const Grouping& grouping) {
    const std::size_t loci = plan.loci.size();
    std::vector<Haplotype> strands(1);
    for (std::size_t i = 0; i < loci; ++i) {
        std::vector<Haplotype> longer;
        for (Haplotype strand : strands)
            for (const Allele allele : {Allele::Dominant, Allele::Recessive, Allele::Absent})
                if (allele != Allele::Absent || plan.loci[i].sex_linked()) {
                    strand.alleles[i] = allele;
                    longer.push_back(strand);
                }
        strands = std::move(longer);
    }
    const auto overlap = [&](const Genotype& genotype, const std::string& one, const std::string& other) {
        return refusal_at(
            MessageId::DeriveShowOverlap, std::nullopt,
            {text_argument(genotype_text(genotype, plan.loci, false)), text_argument(one), text_argument(other)});
    };
    for (const Haplotype& one : strands)
        for (const Haplotype& other : strands) {
            const Genotype genotype = Genotype::of(one, other);
            const bool dies = any_takes_in(grouping.dies, genotype, loci);
            const bool left_out = any_takes_in(grouping.left_out, genotype, loci);
            if (dies && left_out)
                return overlap(genotype, "dies", "left out");
            for (const GroupedClass& named : grouping.classes)
                if ((dies || left_out) && any_takes_in(named.patterns, genotype, loci))
                    return overlap(genotype, dies ? "dies" : "left out", named.label);
        }
    return done();
}

template <class Scalar> void keep_what_arises(Grouping& grouping, const Table<Scalar>& table, std::size_t loci) {
    std::erase_if(grouping.classes, [&](const GroupedClass& named) {
        return std::none_of(table.begin(), table.end(),
                            [&](const auto& entry) { return any_takes_in(named.patterns, entry.first, loci); });
    });
}

template <class Scalar> struct Shares {
    Table<Scalar> table;
    std::vector<std::size_t> class_of_row;
    std::vector<Scalar> classes;
};

template <class Scalar>
Result<Shares<Scalar>> shares_of(const CrossPlan& plan, Grouping& grouping, bool phased, const Scalar& r) {
    const auto plants = run(plan, grouping, r);
    if (!plants)
        return refusal_at(MessageId::DeriveShowAllDie, std::nullopt);
    Shares<Scalar> shares{table_of(*plants, phased), {}, {}};
    if (grouping.only_arising)
        keep_what_arises(grouping, shares.table, plan.loci.size());
    shares.classes.assign(grouping.classes.size(), Scalar(0));
    for (const auto& [genotype, share] : shares.table) {
        const Result<std::size_t> at = class_of(genotype, plan, grouping);
        if (!at)
            return at.error();
        shares.class_of_row.push_back(at.value());
        shares.classes[at.value()] += share;
    }
    return shares;
}

/// Fractions over one common denominator: "4/16", not "1/4".
struct CommonDenominator {
    Whole denominator = 1;
    explicit CommonDenominator(const Table<Exact>& table) {
        for (const auto& entry : table)
            denominator = boost::multiprecision::lcm(denominator, boost::multiprecision::denominator(entry.second));
    }
    [[nodiscard]] Whole numerator(const Exact& share) const {
        return boost::multiprecision::numerator(Exact(share * denominator));
    }
    [[nodiscard]] std::string text(const Exact& share) const {
        return numerator(share).str() + "/" + denominator.str();
    }
};

double as_double(const Exact& share) {
    return share.convert_to<double>();
}

double as_double(double share) {
    return share;
}

template <class Scalar, class FractionText>
Derivation tabulated(const Shares<Scalar>& shares, const CrossPlan& plan, const Grouping& grouping, bool phased,
                     const FractionText& fraction) {
    Derivation result;
    std::size_t row = 0;
    for (const auto& [genotype, share] : shares.table)
        result.genotypes.push_back({genotype_text(genotype, plan.loci, phased), fraction(share), as_double(share),
                                    grouping.classes[shares.class_of_row[row++]].label});
    for (std::size_t i = 0; i < grouping.classes.size(); ++i)
        result.classes.push_back({grouping.classes[i].label, patterns_text(grouping.classes[i].patterns, plan.loci),
                                  fraction(shares.classes[i]), as_double(shares.classes[i])});
    return result;
}

std::optional<ratio::Ratio> ratio_of(const Shares<Exact>& shares, const CommonDenominator& common) {
    std::vector<std::int64_t> weights;
    for (const Exact& share : shares.classes) {
        const Whole weight = common.numerator(share);
        if (weight > std::numeric_limits<std::int64_t>::max())
            return std::nullopt;
        weights.push_back(static_cast<std::int64_t>(weight));
    }
    Result<ratio::Ratio> ratio = ratio::Ratio::from_weights(std::move(weights));
    return ratio ? std::optional(std::move(ratio).value()) : std::nullopt;
}

Result<Derivation> derive_exact(const CrossPlan& plan, Grouping grouping) {
    const auto shares = shares_of<Exact>(plan, grouping, false, Exact(1, 2));
    if (!shares)
        return shares.error();
    const CommonDenominator common(shares.value().table);
    Derivation result =
        tabulated(shares.value(), plan, grouping, false, [&](const Exact& share) { return common.text(share); });
    result.ratio = ratio_of(shares.value(), common);
    return result;
}

Result<Derivation> derive_linked(const CrossPlan& plan, Grouping grouping, double r) {
    const auto shares = shares_of<double>(plan, grouping, true, r);
    if (!shares)
        return shares.error();
    return tabulated(shares.value(), plan, grouping, true, [](double) { return std::string(); });
}

/// "Aa Bb was taken as AB/ab"; the other phase shown has its last heterozygous locus turned.
std::vector<Message> phase_notes(const CrossPlan& plan) {
    std::vector<Message> notes;
    const auto note = [&](const Plant& plant) {
        if (!plant.phase_taken)
            return;
        Haplotype turned_first = plant.genotype.first;
        Haplotype turned_second = plant.genotype.second;
        std::size_t last = plan.loci.size() - 1;
        while (last > 0 && (plan.loci[last].sex_linked() || turned_first.alleles[last] == turned_second.alleles[last]))
            --last;
        std::swap(turned_first.alleles[last], turned_second.alleles[last]);
        Message message{MessageId::DeriveCouplingTaken,
                        {text_argument(plant.text), text_argument(genotype_text(plant.genotype, plan.loci, true)),
                         text_argument(genotype_text(Genotype::of(turned_first, turned_second), plan.loci, true))}};
        if (std::find(notes.begin(), notes.end(), message) == notes.end())
            notes.push_back(std::move(message));
    };
    note(plan.first);
    for (const Step& step : plan.steps)
        if (step.other)
            note(*step.other);
    return notes;
}

Done check_parents_live(const CrossPlan& plan, const Grouping& grouping) {
    const auto dies = [&](const Plant& plant) { return any_takes_in(grouping.dies, plant.genotype, plan.loci.size()); };
    if (dies(plan.first))
        return refusal_at(MessageId::DeriveShowParentDies, std::nullopt, {text_argument(plan.first.text)});
    for (const Step& step : plan.steps)
        if (step.other && dies(*step.other))
            return refusal_at(MessageId::DeriveShowParentDies, std::nullopt, {text_argument(step.other->text)});
    return done();
}

Result<Grouping> grouping_of(const DeriveInput& input, const CrossPlan& plan) {
    if (input.show.find_first_not_of(" \t\r\n") == std::string::npos)
        return full_dominance(plan.loci);
    Result<Grouping> grouping = read_grouping(input.show, plan.loci);
    if (!grouping)
        return grouping.error();
    if (const Done kept_back = check_kept_back(plan, grouping.value()); !kept_back)
        return kept_back.error();
    if (const Done alive = check_parents_live(plan, grouping.value()); !alive)
        return alive.error();
    return grouping;
}

} // namespace

Result<Derivation> derive(const DeriveInput& input) {
    const Result<CrossPlan> plan = read_cross_plan(input.cross);
    if (!plan)
        return plan.error();
    if (input.linkage && !has_linked_interval(plan.value().loci))
        return refusal_at(MessageId::DeriveLinkageNeedsTwoLoci, plan.value().first.place);
    const Result<Grouping> grouping = grouping_of(input, plan.value());
    if (!grouping)
        return grouping.error();
    Result<Derivation> result = input.linkage ? derive_linked(plan.value(), grouping.value(), input.linkage->value())
                                              : derive_exact(plan.value(), grouping.value());
    if (!result)
        return result.error();
    if (input.linkage)
        result.value().notes = phase_notes(plan.value());
    return result;
}

} // namespace filial::inheritance
