// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/book/model.h"

#include <algorithm>
#include <random>

namespace filial::book {

namespace {

Cell with_plants(const Cell& typed, std::int64_t plants, bool ordered) {
    // A class marked as not looked at stays so: plants of it that were met all the same do not make the number known.
    if (typed.state == CellState::NotLooked)
        return typed;
    if (typed.state == CellState::Blank && !ordered)
        return typed;
    const Count number = typed.state == CellState::Number ? typed.count : Count{};
    return Cell{CellState::Number, number + Count(plants)};
}

bool full_product(const Cross& cross, const std::vector<PhenotypeClass>& product) {
    if (product.size() != cross.classes.size())
        return false;
    for (std::size_t i = 0; i < product.size(); ++i)
        if (product[i].levels != cross.classes[i].levels)
            return false;
    return true;
}

} // namespace

Cell Family::cell(ClassIndex phenotype) const {
    if (phenotype.value >= typed.size())
        return {};
    const auto met =
        std::count_if(plants.begin(), plants.end(), [&](const Plant& plant) { return plant.phenotype == phenotype; });
    return with_plants(typed[phenotype.value], met, !plants.empty());
}

bool Family::complete(std::size_t class_count) const {
    for (std::size_t i = 0; i < class_count; ++i)
        if (cell(ClassIndex{i}).state != CellState::Number)
            return false;
    return class_count > 0;
}

bool Family::blank(std::size_t class_count) const {
    for (std::size_t i = 0; i < std::min(class_count, typed.size()); ++i)
        if (typed[i].state != CellState::Blank)
            return false;
    return plants.empty() && not_scored_typed.state == CellState::Blank;
}

std::optional<std::vector<Count>> Family::counts(std::size_t class_count) const {
    std::vector<Count> numbers(class_count);
    for (std::size_t i = 0; i < class_count; ++i) {
        if (i >= typed.size() || typed[i].state == CellState::NotLooked ||
            (typed[i].state == CellState::Blank && plants.empty()))
            return std::nullopt;
        numbers[i] = typed[i].count;
    }
    // One pass over the plants, as a family may hold thousands.
    for (const Plant& plant : plants)
        if (plant.phenotype && plant.phenotype->value < class_count)
            numbers[plant.phenotype->value] += Count(1);
    if (class_count == 0)
        return std::nullopt;
    return numbers;
}

Cell Family::not_scored_cell() const {
    const auto missed =
        std::count_if(plants.begin(), plants.end(), [](const Plant& plant) { return !plant.phenotype.has_value(); });
    return with_plants(not_scored_typed, missed, missed > 0);
}

std::string Cross::class_label(ClassIndex phenotype) const {
    if (phenotype.value >= classes.size())
        return {};
    const PhenotypeClass& one = classes[phenotype.value];
    if (!one.label.empty())
        return one.label;
    std::string label;
    for (std::size_t trait = 0; trait < std::min(one.levels.size(), traits.size()); ++trait) {
        const int level = one.levels[trait];
        if (level < 0 || static_cast<std::size_t>(level) >= traits[trait].levels.size())
            continue;
        if (!label.empty())
            label += " · ";
        label += traits[trait].levels[static_cast<std::size_t>(level)].label;
    }
    return label;
}

std::vector<std::size_t> Cross::level_counts() const {
    if (traits.empty() || !full_product(*this, product_classes(traits)))
        return {};
    std::vector<std::size_t> counts;
    for (const Trait& trait : traits)
        counts.push_back(trait.levels.size());
    return counts;
}

std::vector<std::string> Cross::trait_names() const {
    std::vector<std::string> names;
    for (const Trait& trait : traits)
        names.push_back(trait.name);
    return names;
}

const Cross* Book::find_cross(const Id& wanted) const {
    const auto found =
        std::find_if(crosses.begin(), crosses.end(), [&](const Cross& cross) { return cross.id == wanted; });
    return found == crosses.end() ? nullptr : &*found;
}

Cross* Book::find_cross(const Id& wanted) {
    const auto found =
        std::find_if(crosses.begin(), crosses.end(), [&](const Cross& cross) { return cross.id == wanted; });
    return found == crosses.end() ? nullptr : &*found;
}

Id new_id() {
    static constexpr std::string_view letters = "0123456789abcdefghijklmnopqrstuvwxyz";
    std::random_device device;
    std::uniform_int_distribution<std::size_t> pick(0, letters.size() - 1);
    Id id;
    for (int i = 0; i < 16; ++i)
        id += letters[pick(device)];
    return id;
}

std::vector<PhenotypeClass> product_classes(const std::vector<Trait>& traits) {
    // More than any hypothesis has terms is of no use, and a slip of the finger must not fill the memory.
    constexpr std::size_t most = 4096;
    std::vector<PhenotypeClass> classes;
    if (traits.empty())
        return classes;
    classes.emplace_back();
    for (const Trait& trait : traits) {
        std::vector<PhenotypeClass> wider;
        if (classes.size() * trait.levels.size() > most)
            return {};
        for (const PhenotypeClass& one : classes)
            for (std::size_t level = 0; level < trait.levels.size(); ++level) {
                wider.push_back(one);
                wider.back().levels.push_back(static_cast<int>(level));
            }
        classes = std::move(wider);
    }
    return classes;
}

Family new_family(std::string label, std::size_t class_count) {
    Family family;
    family.id = new_id();
    family.label = std::move(label);
    family.typed.resize(class_count);
    return family;
}

std::string next_family_label(const Cross& cross) {
    if (cross.families.empty())
        return "family 1";
    const std::string& last = cross.families.back().label;
    const auto digit = [](char c) { return c >= '0' && c <= '9'; };
    std::size_t end = last.size();
    while (end > 0 && !digit(last[end - 1]))
        --end;
    if (end == 0)
        return "family " + std::to_string(cross.families.size() + 1);
    std::size_t begin = end;
    while (begin > 0 && digit(last[begin - 1]))
        --begin;
    // Counting up in the text itself, so that any length and leading zeros stay right.
    std::string number = last.substr(begin, end - begin);
    std::size_t at = number.size();
    while (at > 0 && number[at - 1] == '9')
        number[--at] = '0';
    if (at > 0)
        ++number[at - 1];
    else
        number.insert(number.begin(), '1');
    return last.substr(0, begin) + number + last.substr(end);
}

} // namespace filial::book
