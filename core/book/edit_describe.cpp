// SPDX-License-Identifier: GPL-3.0-or-later
#include <algorithm>

#include "core/book/count_table.h"
#include "core/book/edit.h"

namespace filial::book {

namespace {

Message say(MessageId id, std::vector<Argument> arguments = {}) {
    return Message{id, std::move(arguments)};
}

struct Describer {
    const Book& book;

    Message operator()(const SetCell& edit) const {
        Argument label = text_argument(family_label(edit.cross, edit.family));
        if (edit.before.state == CellState::Blank)
            return say(MessageId::EditCellFilled, {std::move(label), text_argument(cell_text(edit.after))});
        if (edit.after.state == CellState::Blank)
            return say(MessageId::EditCellCleared, {std::move(label), text_argument(cell_text(edit.before))});
        return say(MessageId::EditCell,
                   {std::move(label), text_argument(cell_text(edit.before)), text_argument(cell_text(edit.after))});
    }
    Message operator()(const SetFamily& edit) const {
        if (edit.before.label != edit.after.label)
            return say(MessageId::EditFamilyRenamed,
                       {text_argument(edit.before.label), text_argument(edit.after.label)});
        Argument label = text_argument(edit.after.label);
        if (!edit.before.set_aside && edit.after.set_aside)
            return say(MessageId::EditFamilySetAside, {std::move(label)});
        if (edit.before.set_aside && !edit.after.set_aside)
            return say(MessageId::EditFamilyTakenBack, {std::move(label)});
        return say(MessageId::EditFamily, {std::move(label)});
    }
    Message operator()(const InsertFamily& edit) const {
        return say(MessageId::EditFamilyInserted, {text_argument(edit.family.label)});
    }
    Message operator()(const RemoveFamily& edit) const {
        return say(MessageId::EditFamilyRemoved, {text_argument(edit.family.label)});
    }
    Message operator()(const MoveFamily& edit) const {
        return say(MessageId::EditFamilyMoved, {size_argument(edit.from + 1), size_argument(edit.to + 1)});
    }
    Message operator()(const AddPlants& edit) const {
        return say(MessageId::EditPlantsAdded,
                   {text_argument(family_label(edit.cross, edit.family)), size_argument(edit.plants.size())});
    }
    Message operator()(const RemovePlants& edit) const {
        return say(MessageId::EditPlantsRemoved,
                   {text_argument(family_label(edit.cross, edit.family)), size_argument(edit.plants.size())});
    }
    Message operator()(const SetPlant& edit) const {
        return say(MessageId::EditPlant,
                   {text_argument(family_label(edit.cross, edit.family)), size_argument(edit.index + 1)});
    }
    Message operator()(const SetHypothesis& edit) const {
        if (edit.before.notation == edit.after.notation && edit.before.joins != edit.after.joins)
            return say(MessageId::EditJoins, {text_argument(cross_name(edit.cross))});
        if (edit.after.notation.empty())
            return say(MessageId::EditHypothesisCleared, {text_argument(cross_name(edit.cross))});
        return say(MessageId::EditHypothesis,
                   {text_argument(cross_name(edit.cross)), ratio_argument(edit.after.notation)});
    }
    Message operator()(const SetCross& edit) const {
        return say(MessageId::EditCross, {text_argument(edit.after.name)});
    }
    Message operator()(const ReplaceCross& edit) const {
        return say(MessageId::EditClasses, {text_argument(edit.after.name)});
    }
    Message operator()(const InsertCross& edit) const {
        return say(MessageId::EditCrossInserted, {text_argument(edit.cross.name)});
    }
    Message operator()(const RemoveCross& edit) const {
        return say(MessageId::EditCrossRemoved, {text_argument(edit.cross.name)});
    }
    Message operator()(const MoveCross& edit) const {
        return say(MessageId::EditCrossMoved, {size_argument(edit.from + 1), size_argument(edit.to + 1)});
    }
    Message operator()(const SetBook& /*edit*/) const { return say(MessageId::EditBook); }
    Message operator()(const RevertTo& /*edit*/) const { return say(MessageId::EditReverted); }
    Message operator()(const Macro& edit) const {
        if (const auto one = as_one_cell(edit))
            return (*this)(*one);
        if (edit.edits.size() == 1)
            return std::visit(*this, edit.edits.front().change);
        return say(MessageId::EditSeveral, {size_argument(edit.edits.size())});
    }

private:
    /// Keystrokes in one cell read as one change from the first value to the last.
    static std::optional<SetCell> as_one_cell(const Macro& macro) {
        std::optional<SetCell> all;
        for (const Edit& edit : macro.edits) {
            const auto* cell = std::get_if<SetCell>(&edit.change);
            if (cell == nullptr)
                return std::nullopt;
            if (!all)
                all = *cell;
            else if (all->cross != cell->cross || all->family != cell->family || all->phenotype != cell->phenotype)
                return std::nullopt;
            all->after = cell->after;
        }
        return all;
    }
    std::string cross_name(const Id& id) const {
        const Cross* cross = book.find_cross(id);
        return cross == nullptr ? std::string{} : cross->name;
    }
    std::string family_label(const Id& cross_id, const Id& id) const {
        const Cross* cross = book.find_cross(cross_id);
        if (cross == nullptr)
            return {};
        const auto found = std::find_if(cross->families.begin(), cross->families.end(),
                                        [&](const Family& family) { return family.id == id; });
        return found == cross->families.end() ? std::string{} : found->label;
    }
};

} // namespace

Message describe(const Edit& edit, const Book& book) {
    return std::visit(Describer{book}, edit.change);
}

} // namespace filial::book
