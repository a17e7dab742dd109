// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/book/random_book.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <numeric>

namespace filial::test {

using namespace filial::book;

std::size_t RandomBook::up_to(std::size_t most) {
    return std::uniform_int_distribution<std::size_t>(0, most)(random_);
}

std::string RandomBook::text() {
    static const std::vector<std::string> pieces{
        "",     "K14", "M02 × K14", "\"quoted\"",           "tab\there", "line\nend", "–", "purple", "hairy", "é ü ß",
        "日本", "🌱",   "a\\b/c",    std::string(1, '\x01'), "0",         "F2-08"};
    return pieces[up_to(pieces.size() - 1)];
}

Id RandomBook::id() {
    std::string number = std::to_string(++ids_);
    return std::string(16 - number.size(), up_to(1) == 0 ? 'a' : 'z') + number;
}

Cell RandomBook::cell() {
    switch (up_to(3)) {
    case 0:
        return {};
    case 1:
        return {CellState::NotLooked, {}};
    case 2:
        return {CellState::Number, Count(Count::kLargestTyped)};
    default:
        return {CellState::Number, Count(static_cast<std::int64_t>(up_to(50)))};
    }
}

Plant RandomBook::plant(std::size_t classes) {
    Plant plant;
    if (classes > 0 && up_to(4) > 0)
        plant.phenotype = ClassIndex{up_to(classes - 1)};
    else
        plant.not_scored_reason = text();
    plant.time = text();
    plant.scorer = text();
    if (up_to(1) == 0)
        plant.place = TrayPlace{static_cast<int>(up_to(3)), static_cast<int>(up_to(9)), static_cast<int>(up_to(9))};
    return plant;
}

std::optional<Count> RandomBook::maybe_count() {
    if (up_to(1) == 0)
        return std::nullopt;
    return Count(static_cast<std::int64_t>(up_to(99)));
}

Family RandomBook::family(std::size_t classes) {
    Family family;
    family.id = id();
    family.label = text();
    for (std::size_t i = 0; i < classes; ++i)
        family.typed.push_back(cell());
    for (std::size_t i = up_to(3); i > 0; --i)
        family.plants.push_back(plant(classes));
    family.not_scored_typed = cell();
    for (std::size_t i = up_to(2); i > 0; --i)
        family.not_scored.push_back({text(), Count(static_cast<std::int64_t>(up_to(9)))});
    family.sown = maybe_count();
    family.emerged = maybe_count();
    family.alive = maybe_count();
    for (std::size_t i = up_to(2); i > 0; --i)
        family.tags[text()] = text();
    family.note = text();
    family.date = text();
    family.who = text();
    if (up_to(2) == 0)
        family.set_aside = text();
    for (std::size_t i = up_to(2); i > 0; --i)
        family.dismissed_hints.push_back(text());
    for (std::size_t i = up_to(2); i > 0; --i)
        family.complete_at.push_back(up_to(99));
    return family;
}

HypothesisUse RandomBook::hypothesis(std::size_t classes) {
    HypothesisUse use;
    use.notation = text();
    use.name = text();
    std::vector<std::size_t> order(classes);
    std::iota(order.begin(), order.end(), 0U);
    std::shuffle(order.begin(), order.end(), random_);
    if (up_to(1) == 0)
        use.binding = order;
    if (classes >= 4 && up_to(1) == 0)
        use.joins = {{order[0], order[1]}, {order[3]}};
    use.joins_after_seeing = up_to(1) == 0;
    use.chosen_after_seeing = up_to(1) == 0;
    use.fitted_elsewhere = static_cast<int>(up_to(2));
    return use;
}

Cross RandomBook::cross(const Book& book) {
    Cross cross;
    cross.id = id();
    cross.name = text();
    cross.generation = text();
    for (std::size_t i = up_to(2); i > 0 && !book.lines.empty(); --i)
        cross.parents.push_back(book.lines[up_to(book.lines.size() - 1)].id);
    cross.date = text();
    cross.who = text();
    cross.note = text();
    cross.stage = text();
    for (std::size_t i = up_to(2); i > 0; --i)
        cross.traits.push_back({text(), {{text(), ""}, {text(), "#800080"}}});
    cross.classes = product_classes(cross.traits);
    if (!cross.classes.empty())
        cross.classes.back().label = text();
    for (PhenotypeClass& one : cross.classes)
        for (int& level : one.levels)
            level = up_to(5) == 0 ? -1 : level;
    cross.hypothesis = hypothesis(cross.classes.size());
    for (std::size_t i = up_to(3); i > 0; --i)
        cross.families.push_back(family(cross.classes.size()));
    return cross;
}

void RandomBook::fill_shared(Book& book) {
    book.title = text();
    book.note = text();
    for (std::size_t i = up_to(2); i > 0; --i)
        book.lines.push_back({id(), text(), text()});
    for (std::size_t i = up_to(2); i > 0; --i)
        book.hypotheses.push_back({id(), text(), text(), text()});
    for (std::size_t i = up_to(2); i > 0; --i)
        book.plans.push_back({id(), text(), text(), {{text(), text()}}, text()});
    for (std::size_t i = up_to(2); i > 0; --i)
        book.imports.push_back({id(), text(), text(), text()});
}

Book RandomBook::book() {
    Book book;
    book.id = id();
    fill_shared(book);
    for (std::size_t i = up_to(2) + 1; i > 0; --i)
        book.crosses.push_back(cross(book));
    return book;
}

Edit RandomBook::family_edit(std::size_t kind, const Book& book) {
    std::vector<std::pair<const Cross*, std::size_t>> all;
    for (const Cross& one : book.crosses)
        for (std::size_t i = 0; i < one.families.size(); ++i)
            all.emplace_back(&one, i);
    if (all.empty())
        return {SetBook{book, book}};
    const auto [cross, index] = all[up_to(all.size() - 1)];
    const Family& one = cross->families[index];
    const std::size_t classes = cross->classes.size();
    switch (kind) {
    case 0: {
        const int phenotype = static_cast<int>(up_to(classes)) - 1;
        const Cell& before = phenotype < 0 ? one.not_scored_typed : one.typed[static_cast<std::size_t>(phenotype)];
        return {SetCell{cross->id, one.id, phenotype, before, cell()}};
    }
    case 1: {
        Family after = family(classes);
        after.id = one.id;
        return {SetFamily{cross->id, one, after}};
    }
    case 2:
        return {RemoveFamily{cross->id, index, one}};
    case 3:
        return {MoveFamily{cross->id, index, up_to(cross->families.size() - 1)}};
    case 4:
        return {AddPlants{cross->id, one.id, {plant(classes), plant(classes)}}};
    case 5: {
        const auto last = static_cast<std::ptrdiff_t>(up_to(one.plants.size()));
        return {RemovePlants{cross->id, one.id, {one.plants.end() - last, one.plants.end()}}};
    }
    default:
        if (one.plants.empty())
            return {AddPlants{cross->id, one.id, {plant(classes)}}};
        const std::size_t which = up_to(one.plants.size() - 1);
        return {SetPlant{cross->id, one.id, which, one.plants[which], plant(classes)}};
    }
}

Edit RandomBook::edit_of_kind(std::size_t kind, const Book& book) {
    if (kind < 7)
        return family_edit(kind, book);
    const std::size_t index = book.crosses.empty() ? 0 : up_to(book.crosses.size() - 1);
    if (kind == 7 || book.crosses.empty())
        return {InsertCross{up_to(book.crosses.size()), cross(book)}};
    const Cross& one = book.crosses[index];
    const std::size_t classes = one.classes.size();
    switch (kind) {
    case 8:
        return {InsertFamily{one.id, up_to(one.families.size()), family(classes)}};
    case 9:
        return {SetHypothesis{one.id, one.hypothesis, hypothesis(classes)}};
    case 10: {
        Cross after = one;
        after.name = text();
        after.note = text();
        return {SetCross{one.id, one, after}};
    }
    case 11: {
        Cross after = cross(book);
        after.id = one.id;
        return {ReplaceCross{one, after}};
    }
    case 12:
        return {RemoveCross{index, one}};
    case 13:
        return {MoveCross{index, up_to(book.crosses.size() - 1)}};
    case 14: {
        Book after = book;
        after.title = text();
        after.plans.push_back({id(), text(), text(), {}, text()});
        return {SetBook{book, after}};
    }
    default: {
        Book after = this->book();
        after.id = book.id;
        after.unknown_fields["crosses[x]"] = R"({"a":[1,null]})";
        return {RevertTo{book, after}};
    }
    }
}

Edit RandomBook::edit(const Book& book, bool macros) {
    const std::size_t kind = up_to(macros ? 16 : 15);
    if (kind < 16)
        return edit_of_kind(kind, book);
    Macro macro;
    Book going = book;
    for (std::size_t i = up_to(3) + 1; i > 0; --i) {
        macro.edits.push_back(edit(going, false));
        if (!apply(macro.edits.back(), going))
            throw std::logic_error("a random edit fits its book");
    }
    return {std::move(macro)};
}

namespace {

TEST(RandomBook, MakesEveryKindOfEdit) {
    RandomBook random(1);
    std::vector<int> seen(std::variant_size_v<decltype(Edit::change)>, 0);
    for (int i = 0; i < 400; ++i) {
        const Book book = random.book();
        ++seen[random.edit(book).change.index()];
    }
    EXPECT_EQ(std::count(seen.begin(), seen.end(), 0), 0);
}

} // namespace
} // namespace filial::test
