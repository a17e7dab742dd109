// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/book/check.h"

#include <algorithm>
#include <unordered_set>

#include "core/ratio/ratio.h"

namespace filial::book {

namespace {

Done check_number(Count count, const std::string& path) {
    if (count.value() > Count::kLargestTyped)
        return refusal(MessageId::FieldNotCount, {text_argument(path), text_argument(std::to_string(count.value()))});
    return done();
}

Done check_classes(const Cross& cross, const std::string& path) {
    for (std::size_t i = 0; i < cross.classes.size(); ++i) {
        const std::vector<int>& levels = cross.classes[i].levels;
        const auto place = [&] { return indexed(path + "classes", i) + ".levels"; };
        if (levels.size() != cross.traits.size())
            return refusal(MessageId::FieldWrongLength,
                           {text_argument(place()), size_argument(levels.size()), size_argument(cross.traits.size())});
        for (std::size_t trait = 0; trait < levels.size(); ++trait) {
            const auto most = static_cast<std::int64_t>(cross.traits[trait].levels.size()) - 1;
            if (levels[trait] < -1 || levels[trait] > most)
                return refusal(MessageId::FieldNotIndex,
                               {text_argument(indexed(place(), trait)), text_argument(std::to_string(levels[trait])),
                                count_argument(-1), count_argument(most)});
        }
    }
    return done();
}

/// Indices below `limit`, none twice over all the lists that share `seen`.
Done check_indices(const std::vector<std::size_t>& indices, std::size_t limit, std::unordered_set<std::size_t>& seen,
                   const std::string& path) {
    for (std::size_t i = 0; i < indices.size(); ++i) {
        if (indices[i] >= limit)
            return refusal(MessageId::FieldNotIndex,
                           {text_argument(indexed(path, i)), text_argument(std::to_string(indices[i])),
                            count_argument(0), count_argument(static_cast<std::int64_t>(limit) - 1)});
        if (!seen.insert(indices[i]).second)
            return refusal(MessageId::FieldIndexTwice, {text_argument(indexed(path, i)), size_argument(indices[i])});
    }
    return done();
}

Done check_hypothesis(const Cross& cross, const std::string& path) {
    const HypothesisUse& use = cross.hypothesis;
    if (!use.binding.empty() && use.binding.size() != cross.classes.size())
        return refusal(MessageId::FieldWrongLength, {text_argument(path + "binding"), size_argument(use.binding.size()),
                                                     size_argument(cross.classes.size())});
    std::unordered_set<std::size_t> bound;
    if (Done sound =
            check_indices(use.binding, std::max(ratio::kMostTerms, cross.classes.size()), bound, path + "binding");
        !sound)
        return sound;
    std::unordered_set<std::size_t> joined;
    for (std::size_t i = 0; i < use.joins.size(); ++i)
        if (Done sound = check_indices(use.joins[i], cross.classes.size(), joined, indexed(path + "joins", i)); !sound)
            return sound;
    if (use.fitted_elsewhere < 0)
        return refusal(MessageId::FieldNotCount,
                       {text_argument(path + "fitted_elsewhere"), text_argument(std::to_string(use.fitted_elsewhere))});
    return done();
}

/// Collects ids and complains of one that is malformed or there already.
class Ids {
public:
    template <class Entity> Done add(const std::vector<Entity>& entities, const std::string& path) {
        for (std::size_t i = 0; i < entities.size(); ++i)
            if (Done sound = add(entities[i].id, path, i); !sound)
                return sound;
        return done();
    }

private:
    Done add(const Id& id, const std::string& path, std::size_t index) {
        if (!id_sound(id))
            return refusal(MessageId::FieldNotId, {text_argument(indexed(path, index) + ".id"), text_argument(id)});
        if (!seen_.insert(id).second)
            return refusal(MessageId::FieldIdTwice, {text_argument(indexed(path, index) + ".id"), text_argument(id)});
        return done();
    }
    std::unordered_set<std::string_view> seen_;
};

Done check_ids(const Book& book) {
    if (!id_sound(book.id))
        return refusal(MessageId::FieldNotId, {text_argument("id"), text_argument(book.id)});
    Ids ids;
    if (Done sound = ids.add(book.lines, "lines"); !sound)
        return sound;
    if (Done sound = ids.add(book.hypotheses, "hypotheses"); !sound)
        return sound;
    if (Done sound = ids.add(book.plans, "plans"); !sound)
        return sound;
    if (Done sound = ids.add(book.imports, "imports"); !sound)
        return sound;
    if (Done sound = ids.add(book.crosses, "crosses"); !sound)
        return sound;
    for (std::size_t i = 0; i < book.crosses.size(); ++i)
        if (Done sound = ids.add(book.crosses[i].families, indexed("crosses", i) + ".families"); !sound)
            return sound;
    return done();
}

} // namespace

std::string indexed(const std::string& path, std::size_t index) {
    return path + "[" + std::to_string(index) + "]";
}

bool id_sound(const Id& id) {
    return !id.empty() && id.size() <= 64 && std::all_of(id.begin(), id.end(), [](char c) {
        return (c >= '0' && c <= '9') || (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') || c == '-' || c == '_';
    });
}

bool id_taken(const Book& book, const Id& id) {
    const auto within = [&](const auto& entities) {
        return std::any_of(entities.begin(), entities.end(), [&](const auto& entity) { return entity.id == id; });
    };
    return within(book.lines) || within(book.hypotheses) || within(book.plans) || within(book.imports) ||
           within(book.crosses) || std::any_of(book.crosses.begin(), book.crosses.end(), [&](const Cross& cross) {
               return within(cross.families);
           });
}

Done check_cell(const Cell& cell, const std::string& path) {
    if (cell.state != CellState::Number && cell.count != Count{})
        return refusal(MessageId::FieldNotCell,
                       {text_argument(path), text_argument(std::to_string(cell.count.value()))});
    return check_number(cell.count, path);
}

Done check_plant(const Plant& plant, std::size_t class_count, const std::string& path) {
    if (plant.phenotype && plant.phenotype->value >= class_count)
        return refusal(MessageId::FieldNotIndex,
                       {text_argument(path + ".class"), text_argument(std::to_string(plant.phenotype->value)),
                        count_argument(0), count_argument(static_cast<std::int64_t>(class_count) - 1)});
    if (plant.place && (plant.place->tray < 0 || plant.place->row < 0 || plant.place->column < 0))
        return refusal(MessageId::FieldNotCount, {text_argument(path + ".place"), text_argument("-")});
    return done();
}

Done check_family(const Family& family, std::size_t class_count, const std::string& path) {
    if (family.typed.size() != class_count)
        return refusal(MessageId::FieldWrongLength, {text_argument(path + ".typed"), size_argument(family.typed.size()),
                                                     size_argument(class_count)});
    const auto sound = [](const Cell& cell) {
        return cell.count.value() <= Count::kLargestTyped && (cell.state == CellState::Number || cell.count == Count{});
    };
    // The paths are made for the first unsound place only: this runs for every family of a large book.
    for (std::size_t i = 0; i < class_count; ++i)
        if (!sound(family.typed[i]))
            return check_cell(family.typed[i], indexed(path + ".typed", i));
    if (!sound(family.not_scored_typed))
        return check_cell(family.not_scored_typed, path + ".not_scored_typed");
    for (std::size_t i = 0; i < family.plants.size(); ++i)
        if (!check_plant(family.plants[i], class_count, {}))
            return check_plant(family.plants[i], class_count, indexed(path + ".plants", i));
    for (std::size_t i = 0; i < family.not_scored.size(); ++i)
        if (!check_number(family.not_scored[i].count, {}))
            return check_number(family.not_scored[i].count, indexed(path + ".not_scored", i) + ".count");
    for (const auto& [number, name] :
         {std::pair{family.sown, ".sown"}, std::pair{family.emerged, ".emerged"}, std::pair{family.alive, ".alive"}})
        if (number && !check_number(*number, {}))
            return check_number(*number, path + name);
    return done();
}

Done check_cross(const Cross& cross, const std::string& path) {
    const std::string inside = path.empty() ? path : path + ".";
    if (Done sound = check_classes(cross, inside); !sound)
        return sound;
    for (std::size_t i = 0; i < cross.families.size(); ++i)
        if (Done sound = check_family(cross.families[i], cross.classes.size(), indexed(inside + "families", i)); !sound)
            return sound;
    return check_hypothesis(cross, inside + "hypothesis.");
}

Done check_parents(const Book& book, const Cross& cross, const std::string& path) {
    for (std::size_t i = 0; i < cross.parents.size(); ++i)
        if (std::none_of(book.lines.begin(), book.lines.end(),
                         [&](const Line& line) { return line.id == cross.parents[i]; }))
            return refusal(MessageId::FieldParentMissing,
                           {text_argument(indexed(path + ".parents", i)), text_argument(cross.parents[i])});
    return done();
}

Done check_book(const Book& book) {
    if (Done sound = check_ids(book); !sound)
        return sound;
    for (std::size_t i = 0; i < book.crosses.size(); ++i) {
        const std::string path = indexed("crosses", i);
        if (Done sound = check_cross(book.crosses[i], path); !sound)
            return sound;
        if (Done sound = check_parents(book, book.crosses[i], path); !sound)
            return sound;
    }
    return done();
}

} // namespace filial::book
