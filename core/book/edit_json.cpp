// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/book/edit_json.h"

#include <nlohmann/json.hpp>

#include "core/book/book_json.h"
#include "core/book/edit_parts.h"

namespace filial::book {

namespace {

OrderedJson whole_book(const Book& book) {
    OrderedJson json = JsonWriter().book(book);
    if (!book.unknown_fields.empty())
        json["unknown_fields"] = book.unknown_fields;
    return json;
}

OrderedJson plant_list(const std::vector<Plant>& plants) {
    OrderedJson list = OrderedJson::array();
    for (const Plant& plant : plants)
        list.push_back(JsonWriter().plant(plant));
    return list;
}

/// The fields of each kind of edit, its name first.
struct Writer {
    JsonWriter parts;

    OrderedJson operator()(const SetCell& edit) const {
        return {{"edit", "set_cell"},
                {"cross", edit.cross},
                {"family", edit.family},
                {"class", edit.phenotype},
                {"before", JsonWriter::cell(edit.before)},
                {"after", JsonWriter::cell(edit.after)}};
    }
    OrderedJson operator()(const SetFamily& edit) const {
        return {{"edit", "set_family"},
                {"cross", edit.cross},
                {"before", parts.family(without_cells(edit.before))},
                {"after", parts.family(without_cells(edit.after))}};
    }
    OrderedJson operator()(const InsertFamily& edit) const { return family("insert_family", edit); }
    OrderedJson operator()(const RemoveFamily& edit) const { return family("remove_family", edit); }
    OrderedJson operator()(const MoveFamily& edit) const {
        return {{"edit", "move_family"}, {"cross", edit.cross}, {"from", edit.from}, {"to", edit.to}};
    }
    OrderedJson operator()(const AddPlants& edit) const { return plants("add_plants", edit); }
    OrderedJson operator()(const RemovePlants& edit) const { return plants("remove_plants", edit); }
    OrderedJson operator()(const SetPlant& edit) const {
        return {{"edit", "set_plant"},
                {"cross", edit.cross},
                {"family", edit.family},
                {"index", edit.index},
                {"before", parts.plant(edit.before)},
                {"after", parts.plant(edit.after)}};
    }
    OrderedJson operator()(const SetHypothesis& edit) const {
        return {{"edit", "set_hypothesis"},
                {"cross", edit.cross},
                {"before", parts.hypothesis(edit.before)},
                {"after", parts.hypothesis(edit.after)}};
    }
    OrderedJson operator()(const SetCross& edit) const {
        return {{"edit", "set_cross"},
                {"cross", edit.cross},
                {"before", parts.cross(without_families(edit.before))},
                {"after", parts.cross(without_families(edit.after))}};
    }
    OrderedJson operator()(const ReplaceCross& edit) const {
        return {{"edit", "replace_cross"}, {"before", parts.cross(edit.before)}, {"after", parts.cross(edit.after)}};
    }
    OrderedJson operator()(const InsertCross& edit) const { return cross("insert_cross", edit); }
    OrderedJson operator()(const RemoveCross& edit) const { return cross("remove_cross", edit); }
    OrderedJson operator()(const MoveCross& edit) const {
        return {{"edit", "move_cross"}, {"from", edit.from}, {"to", edit.to}};
    }
    OrderedJson operator()(const SetBook& edit) const {
        return {{"edit", "set_book"},
                {"before", parts.book(without_crosses(edit.before))},
                {"after", parts.book(without_crosses(edit.after))}};
    }
    OrderedJson operator()(const RevertTo& edit) const {
        return {{"edit", "revert_to"}, {"before", whole_book(edit.before)}, {"after", whole_book(edit.after)}};
    }
    OrderedJson operator()(const Macro& edit) const {
        OrderedJson list = OrderedJson::array();
        for (const Edit& one : edit.edits)
            list.push_back(edit_json(one));
        return {{"edit", "several"}, {"edits", std::move(list)}};
    }

private:
    template <class T> OrderedJson family(const char* name, const T& edit) const {
        return {{"edit", name}, {"cross", edit.cross}, {"index", edit.index}, {"family", parts.family(edit.family)}};
    }
    template <class T> OrderedJson plants(const char* name, const T& edit) const {
        return {{"edit", name}, {"cross", edit.cross}, {"family", edit.family}, {"plants", plant_list(edit.plants)}};
    }
    template <class T> OrderedJson cross(const char* name, const T& edit) const {
        return {{"edit", name}, {"index", edit.index}, {"cross", parts.cross(edit.cross)}};
    }
};

template <class T, class ReadPart> void part(Fields& fields, const char* name, T& into, ReadPart read) {
    if (const Json* json = fields.need(name))
        read(fields.reading(), *json, fields.at(name), into);
}

template <class T, class ReadPart> void before_after(Fields& fields, T& edit, ReadPart read) {
    part(fields, "before", edit.before, read);
    part(fields, "after", edit.after, read);
}

void read_fields(Fields& fields, SetCell& edit) {
    fields.needed_text("cross", edit.cross);
    fields.needed_text("family", edit.family);
    if (fields.need("class") != nullptr)
        fields.integer("class", edit.phenotype, -1, 1'000'000);
    before_after(fields, edit, read_typed);
}
void read_fields(Fields& fields, SetFamily& edit) {
    fields.needed_text("cross", edit.cross);
    before_after(fields, edit, read_family);
}
template <class T> void read_family_edit(Fields& fields, T& edit) {
    fields.needed_text("cross", edit.cross);
    fields.index("index", edit.index);
    part(fields, "family", edit.family, read_family);
}
void read_fields(Fields& fields, InsertFamily& edit) {
    read_family_edit(fields, edit);
}
void read_fields(Fields& fields, RemoveFamily& edit) {
    read_family_edit(fields, edit);
}
void read_fields(Fields& fields, MoveFamily& edit) {
    fields.needed_text("cross", edit.cross);
    fields.index("from", edit.from);
    fields.index("to", edit.to);
}
template <class T> void read_plants_edit(Fields& fields, T& edit) {
    fields.needed_text("cross", edit.cross);
    fields.needed_text("family", edit.family);
    fields.list("plants", edit.plants, read_plant);
}
void read_fields(Fields& fields, AddPlants& edit) {
    read_plants_edit(fields, edit);
}
void read_fields(Fields& fields, RemovePlants& edit) {
    read_plants_edit(fields, edit);
}
void read_fields(Fields& fields, SetPlant& edit) {
    fields.needed_text("cross", edit.cross);
    fields.needed_text("family", edit.family);
    fields.index("index", edit.index);
    before_after(fields, edit, read_plant);
}
void read_fields(Fields& fields, SetHypothesis& edit) {
    fields.needed_text("cross", edit.cross);
    before_after(fields, edit, read_hypothesis_use);
}
void read_fields(Fields& fields, SetCross& edit) {
    fields.needed_text("cross", edit.cross);
    before_after(fields, edit, read_cross);
}
void read_fields(Fields& fields, ReplaceCross& edit) {
    before_after(fields, edit, read_cross);
}
template <class T> void read_cross_edit(Fields& fields, T& edit) {
    fields.index("index", edit.index);
    part(fields, "cross", edit.cross, read_cross);
}
void read_fields(Fields& fields, InsertCross& edit) {
    read_cross_edit(fields, edit);
}
void read_fields(Fields& fields, RemoveCross& edit) {
    read_cross_edit(fields, edit);
}
void read_fields(Fields& fields, MoveCross& edit) {
    fields.index("from", edit.from);
    fields.index("to", edit.to);
}
void read_fields(Fields& fields, SetBook& edit) {
    before_after(fields, edit, read_book_object);
}
void read_fields(Fields& fields, RevertTo& edit) {
    before_after(fields, edit, read_book_object);
}
void read_fields(Fields& fields, Macro& edit) {
    fields.list("edits", edit.edits, read_edit_json);
}

template <class T> bool read_kind(Fields& fields, std::string_view kind, std::string_view name, Edit& into) {
    if (kind != name)
        return false;
    T edit;
    read_fields(fields, edit);
    into.change = std::move(edit);
    return true;
}

bool read_any(Fields& fields, std::string_view kind, Edit& into) {
    return read_kind<SetCell>(fields, kind, "set_cell", into) ||
           read_kind<SetFamily>(fields, kind, "set_family", into) ||
           read_kind<InsertFamily>(fields, kind, "insert_family", into) ||
           read_kind<RemoveFamily>(fields, kind, "remove_family", into) ||
           read_kind<MoveFamily>(fields, kind, "move_family", into) ||
           read_kind<AddPlants>(fields, kind, "add_plants", into) ||
           read_kind<RemovePlants>(fields, kind, "remove_plants", into) ||
           read_kind<SetPlant>(fields, kind, "set_plant", into) ||
           read_kind<SetHypothesis>(fields, kind, "set_hypothesis", into) ||
           read_kind<SetCross>(fields, kind, "set_cross", into) ||
           read_kind<ReplaceCross>(fields, kind, "replace_cross", into) ||
           read_kind<InsertCross>(fields, kind, "insert_cross", into) ||
           read_kind<RemoveCross>(fields, kind, "remove_cross", into) ||
           read_kind<MoveCross>(fields, kind, "move_cross", into) ||
           read_kind<SetBook>(fields, kind, "set_book", into) || read_kind<RevertTo>(fields, kind, "revert_to", into) ||
           read_kind<Macro>(fields, kind, "several", into);
}

} // namespace

OrderedJson edit_json(const Edit& edit) {
    return std::visit(Writer{JsonWriter()}, edit.change);
}

void read_edit_json(Reading& reading, const Json& json, const Place& place, Edit& into) {
    Fields fields(reading, json, place);
    std::string kind;
    fields.needed_text("edit", kind);
    if (reading.error)
        return;
    if (!read_any(fields, kind, into))
        return reading.fail(MessageId::EditUnknownKind, fields.at("edit"), Json(kind));
    fields.finish();
}

std::string write_edit(const Edit& edit) {
    return on_one_line(edit_json(edit));
}

Result<Edit> read_edit(const std::string& json) {
    Result<Json> parsed = parse_json(json);
    if (!parsed)
        return parsed.error();
    Reading reading;
    Edit edit;
    const Place root;
    read_edit_json(reading, parsed.value(), root, edit);
    if (reading.error)
        return *reading.error;
    return edit;
}

} // namespace filial::book
