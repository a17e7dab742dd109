// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <cstdint>
#include <map>
#include <optional>
#include <string>
#include <vector>

#include "core/numeric/quantities.h"

// Terms. A book is a season's crosses. A cross has traits with levels, phenotype classes made of levels, and
// families. A family is a list of plants; plants typed as counts have no order, plants tallied have one. A cell is
// what stands in the table for one family and class: blank, not looked (–), or a number. Ids never change and are
// unique across books, so that two books can once be merged.
namespace filial::book {

using Id = std::string;        ///< 16 characters of [0-9a-z], from `new_id`
using Timestamp = std::string; ///< ISO 8601 UTC with milliseconds; "" where not known

struct Level {
    std::string label;
    std::string colour; ///< "#RRGGBB" chosen by the owner; "" automatic
    friend bool operator==(const Level&, const Level&) = default;
};
struct Trait {
    std::string name;
    std::vector<Level> levels;
    friend bool operator==(const Trait&, const Trait&) = default;
};
/// A phenotype class. `levels` has one entry a trait (an index into its levels), or -1 where the class does not tell
/// that trait's levels apart (9:3:4: the white class says nothing of the other locus).
struct PhenotypeClass {
    std::string label; ///< "" : made from its levels, "purple · hairy"
    std::vector<int> levels;
    std::string colour; ///< "" automatic
    friend bool operator==(const PhenotypeClass&, const PhenotypeClass&) = default;
};

struct TrayPlace {
    int tray = 0, row = 0, column = 0; ///< from 0
    friend bool operator==(const TrayPlace&, const TrayPlace&) = default;
};
/// A plant scored one by one. Either has a class, or was not scored, with the reason.
struct Plant {
    std::optional<ClassIndex> phenotype;
    std::string not_scored_reason;
    Timestamp time;
    std::string scorer;
    std::optional<TrayPlace> place;
    friend bool operator==(const Plant&, const Plant&) = default;
};

enum class CellState : std::uint8_t { Blank, NotLooked, Number };
struct Cell {
    CellState state = CellState::Blank;
    Count count;
    friend bool operator==(const Cell&, const Cell&) = default;
};
/// Plants not scored that were typed as a number, with the reason ("" not given).
struct NotScored {
    std::string reason;
    Count count;
    friend bool operator==(const NotScored&, const NotScored&) = default;
};

struct Family {
    Id id;
    std::string label;
    std::vector<Cell> typed;           ///< one a class: plants without an order
    std::vector<Plant> plants;         ///< plants in the order scored
    Cell not_scored_typed;             ///< the not-scored column: blank, not looked or a number
    std::vector<NotScored> not_scored; ///< its reasons, where given; they add to at most the number
    std::optional<Count> sown, emerged, alive;
    std::map<std::string, std::string> tags; ///< year, place, parent plant, scorer …
    std::string note, date, who;
    std::optional<std::string> set_aside; ///< the written reason
    std::vector<std::string> dismissed_hints;
    std::vector<std::size_t> complete_at; ///< numbers of plants at which a batch was declared complete
    friend bool operator==(const Family&, const Family&) = default;

    /// What stands in the table: the typed cell and the plants of that class together. With ordered plants
    /// a blank typed cell reads as a number; one typed as not looked stays so.
    [[nodiscard]] Cell cell(ClassIndex phenotype) const;
    [[nodiscard]] bool complete(std::size_t class_count) const; ///< no blank, no not-looked
    [[nodiscard]] bool blank(std::size_t class_count) const;    ///< no number, no not-looked, no plant, no not-scored
    [[nodiscard]] std::optional<std::vector<Count>> counts(std::size_t class_count) const; ///< only where complete
    [[nodiscard]] Cell not_scored_cell() const; ///< typed and plants together
};

/// How a cross is tested. `notation` is read by inheritance::read_hypothesis.
struct HypothesisUse {
    std::string notation;                        ///< "" : none chosen yet
    std::string name;                            ///< catalogue or own name; ""
    std::vector<std::size_t> binding;            ///< class i is term binding[i]; empty: in order
    std::vector<std::vector<std::size_t>> joins; ///< groups of class indices
    bool joins_after_seeing = false;
    bool chosen_after_seeing = false; ///< set when counts were there at the time
    int fitted_elsewhere = 0;
    friend bool operator==(const HypothesisUse&, const HypothesisUse&) = default;
};

struct Line {
    Id id;
    std::string name, note;
    friend bool operator==(const Line&, const Line&) = default;
};

struct Cross {
    Id id;
    std::string name;                   ///< "K14 × M02, F2"
    std::string generation;             ///< "F2", "test cross", …; free text from a short list
    std::vector<Id> parents;            ///< lines of the book
    std::string date, who, note, stage; ///< sown on; by; remarks; when scored ("four-leaf stage")
    std::vector<Trait> traits;
    std::vector<PhenotypeClass> classes;
    std::vector<Family> families;
    HypothesisUse hypothesis;
    friend bool operator==(const Cross&, const Cross&) = default;

    [[nodiscard]] std::string class_label(ClassIndex phenotype) const;
    /// Numbers of levels per trait where the classes are their full product in row order; else empty.
    [[nodiscard]] std::vector<std::size_t> level_counts() const;
    [[nodiscard]] std::vector<std::string> trait_names() const;
};

struct NamedHypothesis {
    Id id;
    std::string name, notation, note;
    friend bool operator==(const NamedHypothesis&, const NamedHypothesis&) = default;
};
/// A plan with its inputs as written; `question` names its kind. (The Plan desk gives these their form.)
struct Plan {
    Id id;
    std::string name, question;
    std::map<std::string, std::string> inputs;
    std::string note;
    friend bool operator==(const Plan&, const Plan&) = default;
};
/// Raw text as it was brought in, kept with the book.
struct ImportedText {
    Id id;
    std::string source, text;
    Timestamp time;
    friend bool operator==(const ImportedText&, const ImportedText&) = default;
};

struct Book {
    Id id;
    std::string title, note;
    std::vector<Line> lines;
    std::vector<Cross> crosses;
    std::vector<NamedHypothesis> hypotheses;
    std::vector<Plan> plans;
    std::vector<ImportedText> imports;
    /// Fields of a newer version, as JSON text by place, kept for saving.
    std::map<std::string, std::string> unknown_fields;
    friend bool operator==(const Book&, const Book&) = default;

    [[nodiscard]] const Cross* find_cross(const Id& id) const;
    [[nodiscard]] Cross* find_cross(const Id& id);
};

/// A new random id.
[[nodiscard]] Id new_id();

/// All levels of the traits in row order, first trait slowest: stem × leaf -> purple·hairy, purple·smooth, …
[[nodiscard]] std::vector<PhenotypeClass> product_classes(const std::vector<Trait>& traits);
/// A new family with every cell blank.
[[nodiscard]] Family new_family(std::string label, std::size_t class_count);
/// "F2-09" after "F2-08"; counts up the last number in the last label, else "family 1".
[[nodiscard]] std::string next_family_label(const Cross& cross);

} // namespace filial::book
