// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/report/plain_counts.h"

#include "core/report/wording.h"

namespace filial::report {

namespace {

/// Two or three loci with two levels (dominance) or three (codominance) each.
const std::vector<std::vector<std::size_t>>& arrangements() {
    static const std::vector<std::vector<std::size_t>> all{{2, 2},    {2, 3},    {3, 2},    {3, 3},
                                                           {2, 2, 2}, {2, 2, 3}, {2, 3, 2}, {3, 2, 2},
                                                           {2, 3, 3}, {3, 2, 3}, {3, 3, 2}, {3, 3, 3}};
    return all;
}

std::size_t product(const std::vector<std::size_t>& levels) {
    std::size_t classes = 1;
    for (const std::size_t level : levels) {
        classes *= level;
    }
    return classes;
}

std::string numbered(std::size_t i) {
    return std::to_string(i + 1);
}

std::vector<book::Trait> traits_of(const std::vector<std::size_t>& levels) {
    const std::vector<std::string> names = loci_names(levels.size());
    std::vector<book::Trait> traits;
    for (std::size_t t = 0; t < levels.size(); ++t) {
        book::Trait trait{names[t], {}};
        for (std::size_t level = 0; level < levels[t]; ++level) {
            trait.levels.push_back({numbered(level), ""});
        }
        traits.push_back(std::move(trait));
    }
    return traits;
}

/// One trait with a level a class.
book::Trait single_trait(const std::vector<std::string>& labels) {
    book::Trait trait;
    for (const std::string& label : labels) {
        trait.levels.push_back({label, ""});
    }
    return trait;
}

} // namespace

std::vector<std::size_t> loci_levels(const inheritance::Hypothesis& hypothesis) {
    const ratio::Ratio* ratio = hypothesis.ratio();
    if (ratio == nullptr) {
        return {};
    }
    for (const std::vector<std::size_t>& levels : arrangements()) {
        if (product(levels) == ratio->size() && !inheritance::product_factors(*ratio, levels).empty()) {
            return levels;
        }
    }
    return {};
}

std::vector<std::string> loci_names(std::size_t count) {
    std::vector<std::string> names;
    for (std::size_t i = 0; i < count; ++i) {
        const std::string letter(1, static_cast<char>('A' + static_cast<char>(i)));
        names.push_back(render({MessageId::HeadlessLocus, {text_argument(letter)}}));
    }
    return names;
}

std::vector<std::string> plain_labels(const inheritance::Hypothesis& hypothesis) {
    std::vector<std::string> labels;
    for (std::size_t i = 0; i < hypothesis.class_count(); ++i) {
        labels.push_back(hypothesis.linked_cross() != nullptr
                             ? hypothesis.term_text(i)
                             : render({MessageId::HeadlessClass, {text_argument(numbered(i))}}));
    }
    return labels;
}

book::Cross cross_of(book::CountTable table, const inheritance::Hypothesis& hypothesis) {
    book::Cross cross;
    cross.hypothesis.notation = hypothesis.notation();
    cross.families = std::move(table.families);
    const std::vector<std::size_t> levels = loci_levels(hypothesis);
    if (!levels.empty() && table.class_labels.size() == hypothesis.class_count()) {
        cross.traits = traits_of(levels);
        cross.classes = book::product_classes(cross.traits);
    } else {
        cross.traits = {single_trait(table.class_labels)};
        cross.classes = book::product_classes(cross.traits);
    }
    for (std::size_t i = 0; i < cross.classes.size(); ++i) {
        cross.classes[i].label = table.class_labels[i];
    }
    return cross;
}

} // namespace filial::report
