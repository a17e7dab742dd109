// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <cstdint>
#include <memory>
#include <optional>
#include <string>
#include <variant>
#include <vector>

#include "core/book/model.h"
#include "core/numeric/result.h"

// Terms. Every change of a book is an edit: it holds what was and what is to be, and can be applied and reverted.
// Edits name crosses and families by id and places by index, so a journal of them can be replayed.
namespace filial::book {

struct SetCell { ///< a typed count; class -1 is the not-scored column
    Id cross, family;
    int phenotype = 0;
    Cell before, after;
};
struct SetFamily { ///< everything of a family but its cells and plants (label, sown, note, set aside …)
    Id cross;
    Family before, after; ///< `typed`, `not_scored_typed` and `plants` are not touched
};
struct InsertFamily {
    Id cross;
    std::size_t index = 0;
    Family family;
};
struct RemoveFamily {
    Id cross;
    std::size_t index = 0;
    Family family;
};
struct MoveFamily {
    Id cross;
    std::size_t from = 0, to = 0;
};
struct AddPlants {
    Id cross, family;
    std::vector<Plant> plants;
}; ///< appended
struct RemovePlants {
    Id cross, family;
    std::vector<Plant> plants;
}; ///< the last ones
struct SetPlant {
    Id cross, family;
    std::size_t index = 0;
    Plant before, after;
};
struct SetHypothesis {
    Id cross;
    HypothesisUse before, after;
};
struct SetCross { ///< everything of a cross but its families and hypothesis (name, traits, note …);
    Id cross;     ///< the number of classes may not change: see ReplaceCross
    Cross before, after;
};
struct ReplaceCross {
    Cross before, after;
}; ///< classes added or removed, with their cells
struct InsertCross {
    std::size_t index = 0;
    Cross cross;
};
struct RemoveCross {
    std::size_t index = 0;
    Cross cross;
};
struct MoveCross {
    std::size_t from = 0, to = 0;
};
struct SetBook {
    Book before, after;
}; ///< title, note, lines, hypotheses, plans, imports; not crosses
struct RevertTo {
    Book before, after;
}; ///< the whole book: Revert is an undoable edit

struct Edit;
struct Macro {
    std::vector<Edit> edits;
}; ///< one undo step of several

struct Edit {
    std::variant<SetCell, SetFamily, InsertFamily, RemoveFamily, MoveFamily, AddPlants, RemovePlants, SetPlant,
                 SetHypothesis, SetCross, ReplaceCross, InsertCross, RemoveCross, MoveCross, SetBook, RevertTo, Macro>
        change;
};

/// Applies or reverts an edit. An edit that does not fit the book (an id that is not there, a `before` that differs) is
/// an error and leaves the book as it was.
[[nodiscard]] Done apply(const Edit& edit, Book& book);
[[nodiscard]] Done revert(const Edit& edit, Book& book);

/// What an edit does, for "Undid: F2-06, 34 → 31" and the history.
[[nodiscard]] Message describe(const Edit& edit, const Book& book);

/// JSON text of an edit, and back; used by the journal.
[[nodiscard]] std::string write_edit(const Edit& edit);
[[nodiscard]] Result<Edit> read_edit(const std::string& json);

} // namespace filial::book
