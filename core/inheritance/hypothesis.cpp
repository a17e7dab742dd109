// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/inheritance/hypothesis.h"

#include <array>
#include <charconv>
#include <numeric>
#include <stdexcept>
#include <utility>

namespace filial::inheritance {
namespace {

constexpr std::size_t kLinkedClasses = 4;
constexpr double kLargestR = 0.5;

std::string linked_notation(const LinkedCross& cross) {
    std::string text = cross.kind == CrossKind::F2 ? "f2(" : "testcross(";
    text += cross.phase == Phase::Coupling ? "coupling, r=" : "repulsion, r=";
    if (!cross.r)
        return text + "fit)";
    std::array<char, 32> number{};
    const auto end = std::to_chars(number.data(), number.data() + number.size(), cross.r->value()).ptr;
    return text.append(number.data(), end) + ")";
}

struct LinkedProbabilities {
    std::array<double, kLinkedClasses> p{};
    std::array<double, kLinkedClasses> slope{};
};

/// Fisher & Balmukand 1928: theta is the probability that both gametes carry no dominant allele, times 4.
LinkedProbabilities f2_probabilities(Phase phase, double r) {
    const bool coupling = phase == Phase::Coupling;
    const double theta = coupling ? (1.0 - r) * (1.0 - r) : r * r;
    // Not 1 - theta, which would lose digits near theta = 1.
    const double rest = coupling ? r * (2.0 - r) : (1.0 - r) * (1.0 + r);
    const double slope = (coupling ? -2.0 * (1.0 - r) : 2.0 * r) / 4.0;
    return {{(2.0 + theta) / 4.0, rest / 4.0, rest / 4.0, theta / 4.0}, {slope, -slope, -slope, slope}};
}

LinkedProbabilities test_cross_probabilities(Phase phase, double r) {
    const double parental = (1.0 - r) / 2.0;
    const double recombinant = r / 2.0;
    if (phase == Phase::Coupling)
        return {{parental, recombinant, recombinant, parental}, {-0.5, 0.5, 0.5, -0.5}};
    return {{recombinant, parental, parental, recombinant}, {0.5, -0.5, -0.5, 0.5}};
}

} // namespace

Hypothesis::Hypothesis(std::variant<ratio::Ratio, LinkedCross> model, std::string notation, Origin origin)
    : model_(std::move(model)), notation_(std::move(notation)), origin_(origin) {
    const LinkedCross* cross = linked_cross();
    if (cross != nullptr && !cross->r)
        free_parameters_.push_back({"r", 0.0, kLargestR});
    binding_.resize(cross != nullptr ? kLinkedClasses : ratio()->size());
    std::iota(binding_.begin(), binding_.end(), std::size_t{0});
}

Hypothesis Hypothesis::from_ratio(ratio::Ratio ratio, Origin origin) {
    std::string notation = ratio.notation();
    return {std::move(ratio), std::move(notation), origin};
}

Hypothesis Hypothesis::from_linked_cross(LinkedCross cross, Origin origin) {
    return {cross, linked_notation(cross), origin};
}

std::size_t Hypothesis::class_count() const {
    return binding_.size();
}

const ratio::Ratio* Hypothesis::ratio() const {
    return std::get_if<ratio::Ratio>(&model_);
}

const LinkedCross* Hypothesis::linked_cross() const {
    return std::get_if<LinkedCross>(&model_);
}

ClassProbabilities Hypothesis::at(std::span<const double> beta) const {
    if (beta.size() != free_parameters_.size())
        throw std::invalid_argument("one value for each free parameter");
    if (const ratio::Ratio* exact = ratio())
        return {exact->probabilities(), std::vector<std::vector<double>>(class_count())};
    const LinkedCross& cross = *linked_cross();
    const double r = cross.r ? cross.r->value() : beta[0];
    if (!(r >= 0.0 && r <= kLargestR))
        throw std::invalid_argument("a recombination fraction lies in [0, 1/2]");
    const LinkedProbabilities terms =
        cross.kind == CrossKind::F2 ? f2_probabilities(cross.phase, r) : test_cross_probabilities(cross.phase, r);
    ClassProbabilities result;
    for (const std::size_t term : binding_) {
        result.p.push_back(terms.p.at(term));
        result.derivatives.push_back(beta.empty() ? std::vector<double>{} : std::vector<double>{terms.slope.at(term)});
    }
    return result;
}

std::string Hypothesis::term_text(std::size_t term) const {
    if (const ratio::Ratio* exact = ratio())
        return exact->term_text(term);
    static constexpr std::array<const char*, kLinkedClasses> kF2{"A_B_", "A_bb", "aaB_", "aabb"};
    static constexpr std::array<const char*, kLinkedClasses> kTestCross{"AB", "Ab", "aB", "ab"};
    const std::size_t at = binding_.at(term);
    return linked_cross()->kind == CrossKind::F2 ? kF2.at(at) : kTestCross.at(at);
}

Result<Hypothesis> bind(const Hypothesis& hypothesis, std::span<const std::size_t> binding) {
    if (binding.empty())
        return hypothesis;
    const std::size_t count = hypothesis.class_count();
    std::vector<bool> seen(count, false);
    bool once = binding.size() == count;
    for (std::size_t i = 0; once && i < count; ++i) {
        once = binding[i] < count && !seen[binding[i]];
        if (once)
            seen[binding[i]] = true;
    }
    if (!once)
        return Error{ErrorKind::Input,
                     {MessageId::HypothesisBinding, {count_argument(static_cast<std::int64_t>(count))}},
                     std::nullopt};
    Hypothesis result = hypothesis;
    for (std::size_t i = 0; i < count; ++i)
        result.binding_[i] = hypothesis.binding_[binding[i]];
    if (const ratio::Ratio* exact = hypothesis.ratio())
        result.model_ = exact->permuted(binding);
    return result;
}

} // namespace filial::inheritance
