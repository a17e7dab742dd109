// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/book/edit.h"

#include <algorithm>
#include <stdexcept>
#include <utility>

#include "core/book/check.h"
#include "core/book/edit_parts.h"

namespace filial::book {

namespace {

Error refused(MessageId id, std::vector<Argument> arguments = {}) {
    return Error{ErrorKind::Input, Message{id, std::move(arguments)}, std::nullopt};
}

Error stale() {
    return refused(MessageId::EditBeforeDiffers);
}

Error outside(std::size_t index) {
    return refused(MessageId::EditPlaceOutside, {count_argument(static_cast<std::int64_t>(index))});
}

/// The first id of a cross, its own or of a family, that is malformed, twice in it or in the book already.
std::optional<Id> clashing_id(const Book& book, const Cross& cross) {
    std::vector<Id> ids{cross.id};
    for (const Family& family : cross.families)
        ids.push_back(family.id);
    std::sort(ids.begin(), ids.end());
    if (const auto twice = std::adjacent_find(ids.begin(), ids.end()); twice != ids.end())
        return *twice;
    for (const Id& id : ids)
        if (!id_sound(id) || id_taken(book, id))
            return id;
    return std::nullopt;
}

template <class T> void move_item(std::vector<T>& items, std::size_t from, std::size_t to) {
    const auto at = [&](std::size_t i) { return items.begin() + static_cast<std::ptrdiff_t>(i); };
    if (from < to)
        std::rotate(at(from), at(from + 1), at(to + 1));
    else
        std::rotate(at(to), at(from), at(from + 1));
}

/// Applies one change. Each checks everything first and touches the book only then.
class Applier {
public:
    explicit Applier(Book& book) : book_(book) {}

    Done operator()(const SetCell& edit) const {
        Family* family = nullptr;
        Cross* cross = nullptr;
        if (Done found = find(edit.cross, edit.family, cross, family); !found)
            return found;
        if (edit.phenotype < -1 || edit.phenotype >= static_cast<int>(family->typed.size()))
            return refused(MessageId::EditPlaceOutside, {count_argument(edit.phenotype)});
        if (Done sound = check_cell(edit.after, family->label); !sound)
            return sound;
        Cell& cell =
            edit.phenotype < 0 ? family->not_scored_typed : family->typed[static_cast<std::size_t>(edit.phenotype)];
        if (cell != edit.before)
            return stale();
        cell = edit.after;
        return done();
    }
    Done operator()(const SetFamily& edit) const {
        Family* family = nullptr;
        Cross* cross = nullptr;
        if (Done found = find(edit.cross, edit.before.id, cross, family); !found)
            return found;
        if (edit.after.id != edit.before.id || without_cells(*family) != without_cells(edit.before))
            return stale();
        Family after = without_cells(edit.after);
        after.typed = family->typed;
        after.not_scored_typed = family->not_scored_typed;
        after.plants = family->plants;
        if (Done sound = check_family(after, cross->classes.size(), after.label); !sound)
            return sound;
        *family = std::move(after);
        return done();
    }
    Done operator()(const InsertFamily& edit) const {
        Cross* cross = book_.find_cross(edit.cross);
        if (cross == nullptr)
            return refused(MessageId::EditCrossMissing);
        if (edit.index > cross->families.size())
            return outside(edit.index);
        if (!id_sound(edit.family.id) || id_taken(book_, edit.family.id))
            return refused(MessageId::EditIdTaken, {text_argument(edit.family.id)});
        if (Done sound = check_family(edit.family, cross->classes.size(), edit.family.label); !sound)
            return sound;
        cross->families.insert(cross->families.begin() + static_cast<std::ptrdiff_t>(edit.index), edit.family);
        return done();
    }
    Done operator()(const RemoveFamily& edit) const {
        Cross* cross = book_.find_cross(edit.cross);
        if (cross == nullptr)
            return refused(MessageId::EditCrossMissing);
        if (edit.index >= cross->families.size())
            return outside(edit.index);
        if (cross->families[edit.index] != edit.family)
            return stale();
        cross->families.erase(cross->families.begin() + static_cast<std::ptrdiff_t>(edit.index));
        return done();
    }
    Done operator()(const MoveFamily& edit) const {
        Cross* cross = book_.find_cross(edit.cross);
        if (cross == nullptr)
            return refused(MessageId::EditCrossMissing);
        if (std::max(edit.from, edit.to) >= cross->families.size())
            return outside(std::max(edit.from, edit.to));
        move_item(cross->families, edit.from, edit.to);
        return done();
    }
    Done operator()(const AddPlants& edit) const {
        Family* family = nullptr;
        Cross* cross = nullptr;
        if (Done found = find(edit.cross, edit.family, cross, family); !found)
            return found;
        for (const Plant& plant : edit.plants)
            if (Done sound = check_plant(plant, cross->classes.size(), family->label); !sound)
                return sound;
        family->plants.insert(family->plants.end(), edit.plants.begin(), edit.plants.end());
        return done();
    }
    Done operator()(const RemovePlants& edit) const {
        Family* family = nullptr;
        Cross* cross = nullptr;
        if (Done found = find(edit.cross, edit.family, cross, family); !found)
            return found;
        if (edit.plants.size() > family->plants.size() ||
            !std::equal(edit.plants.rbegin(), edit.plants.rend(), family->plants.rbegin()))
            return stale();
        family->plants.resize(family->plants.size() - edit.plants.size());
        return done();
    }
    Done operator()(const SetPlant& edit) const {
        Family* family = nullptr;
        Cross* cross = nullptr;
        if (Done found = find(edit.cross, edit.family, cross, family); !found)
            return found;
        if (edit.index >= family->plants.size())
            return outside(edit.index);
        if (family->plants[edit.index] != edit.before)
            return stale();
        if (Done sound = check_plant(edit.after, cross->classes.size(), family->label); !sound)
            return sound;
        family->plants[edit.index] = edit.after;
        return done();
    }
    Done operator()(const SetHypothesis& edit) const {
        Cross* cross = book_.find_cross(edit.cross);
        if (cross == nullptr)
            return refused(MessageId::EditCrossMissing);
        if (cross->hypothesis != edit.before)
            return stale();
        Cross probe;
        probe.traits = cross->traits;
        probe.classes = cross->classes;
        probe.hypothesis = edit.after;
        if (Done sound = check_cross(probe, {}); !sound)
            return sound;
        cross->hypothesis = edit.after;
        return done();
    }
    Done operator()(const SetCross& edit) const {
        Cross* cross = book_.find_cross(edit.cross);
        if (cross == nullptr)
            return refused(MessageId::EditCrossMissing);
        if (edit.after.id != cross->id || without_families(*cross) != without_families(edit.before))
            return stale();
        if (edit.after.classes.size() != cross->classes.size())
            return refused(MessageId::EditClassesChanged);
        Cross after = without_families(edit.after);
        after.hypothesis = cross->hypothesis;
        if (Done sound = check_cross(after, {}); !sound)
            return sound;
        if (Done sound = check_parents(book_, after, after.name); !sound)
            return sound;
        after.families = std::move(cross->families);
        *cross = std::move(after);
        return done();
    }
    Done operator()(const ReplaceCross& edit) const {
        const auto at = std::find_if(book_.crosses.begin(), book_.crosses.end(),
                                     [&](const Cross& cross) { return cross.id == edit.before.id; });
        if (at == book_.crosses.end())
            return refused(MessageId::EditCrossMissing);
        if (*at != edit.before || edit.after.id != edit.before.id)
            return stale();
        // Ids of families that go free are free for those that come.
        Cross held = std::exchange(*at, Cross{});
        Done sound = check_new(edit.after);
        *at = sound ? edit.after : std::move(held);
        return sound;
    }
    Done operator()(const InsertCross& edit) const {
        if (edit.index > book_.crosses.size())
            return outside(edit.index);
        if (Done sound = check_new(edit.cross); !sound)
            return sound;
        book_.crosses.insert(book_.crosses.begin() + static_cast<std::ptrdiff_t>(edit.index), edit.cross);
        return done();
    }
    Done operator()(const RemoveCross& edit) const {
        if (edit.index >= book_.crosses.size())
            return outside(edit.index);
        if (book_.crosses[edit.index] != edit.cross)
            return stale();
        book_.crosses.erase(book_.crosses.begin() + static_cast<std::ptrdiff_t>(edit.index));
        return done();
    }
    Done operator()(const MoveCross& edit) const {
        if (std::max(edit.from, edit.to) >= book_.crosses.size())
            return outside(std::max(edit.from, edit.to));
        move_item(book_.crosses, edit.from, edit.to);
        return done();
    }
    Done operator()(const SetBook& edit) const {
        if (!same_but_crosses(book_, edit.before))
            return stale();
        Book held = without_crosses(book_);
        take_all_but_crosses(book_, edit.after);
        Done sound = check_book(book_);
        if (!sound)
            take_all_but_crosses(book_, held);
        return sound;
    }
    Done operator()(const RevertTo& edit) const {
        if (book_ != edit.before)
            return stale();
        if (Done sound = check_book(edit.after); !sound)
            return sound;
        book_ = edit.after;
        return done();
    }
    Done operator()(const Macro& edit) const {
        for (std::size_t i = 0; i < edit.edits.size(); ++i) {
            Done one = apply(edit.edits[i], book_);
            if (one)
                continue;
            while (i > 0)
                if (!revert(edit.edits[--i], book_))
                    throw std::logic_error("an edit that was applied can be reverted");
            return one;
        }
        return done();
    }

private:
    Done find(const Id& cross_id, const Id& family_id, Cross*& cross, Family*& family) const {
        cross = book_.find_cross(cross_id);
        if (cross == nullptr)
            return refused(MessageId::EditCrossMissing);
        const auto found = std::find_if(cross->families.begin(), cross->families.end(),
                                        [&](const Family& one) { return one.id == family_id; });
        if (found == cross->families.end())
            return refused(MessageId::EditFamilyMissing);
        family = &*found;
        return done();
    }
    Done check_new(const Cross& cross) const {
        if (const auto id = clashing_id(book_, cross))
            return refused(MessageId::EditIdTaken, {text_argument(*id)});
        if (Done sound = check_cross(cross, {}); !sound)
            return sound;
        return check_parents(book_, cross, cross.name);
    }

    Book& book_;
};

struct Inverter {
    Edit operator()(SetCell edit) const { return swapped(std::move(edit)); }
    Edit operator()(SetFamily edit) const { return swapped(std::move(edit)); }
    Edit operator()(const InsertFamily& edit) const { return {RemoveFamily{edit.cross, edit.index, edit.family}}; }
    Edit operator()(const RemoveFamily& edit) const { return {InsertFamily{edit.cross, edit.index, edit.family}}; }
    Edit operator()(const MoveFamily& edit) const { return {MoveFamily{edit.cross, edit.to, edit.from}}; }
    Edit operator()(const AddPlants& edit) const { return {RemovePlants{edit.cross, edit.family, edit.plants}}; }
    Edit operator()(const RemovePlants& edit) const { return {AddPlants{edit.cross, edit.family, edit.plants}}; }
    Edit operator()(SetPlant edit) const { return swapped(std::move(edit)); }
    Edit operator()(SetHypothesis edit) const { return swapped(std::move(edit)); }
    Edit operator()(SetCross edit) const { return swapped(std::move(edit)); }
    Edit operator()(ReplaceCross edit) const { return swapped(std::move(edit)); }
    Edit operator()(const InsertCross& edit) const { return {RemoveCross{edit.index, edit.cross}}; }
    Edit operator()(const RemoveCross& edit) const { return {InsertCross{edit.index, edit.cross}}; }
    Edit operator()(const MoveCross& edit) const { return {MoveCross{edit.to, edit.from}}; }
    Edit operator()(SetBook edit) const { return swapped(std::move(edit)); }
    Edit operator()(RevertTo edit) const { return swapped(std::move(edit)); }
    Edit operator()(const Macro& edit) const {
        Macro back;
        for (auto one = edit.edits.rbegin(); one != edit.edits.rend(); ++one)
            back.edits.push_back(std::visit(*this, one->change));
        return {std::move(back)};
    }

private:
    template <class T> static Edit swapped(T edit) {
        std::swap(edit.before, edit.after);
        return {std::move(edit)};
    }
};

} // namespace

Done apply(const Edit& edit, Book& book) {
    return std::visit(Applier(book), edit.change);
}

Done revert(const Edit& edit, Book& book) {
    return apply(std::visit(Inverter{}, edit.change), book);
}

} // namespace filial::book
