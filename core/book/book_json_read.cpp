// SPDX-License-Identifier: GPL-3.0-or-later
#include <nlohmann/json.hpp>

#include "core/book/book_json.h"

namespace filial::book {

namespace {

constexpr int kMostInt = 1'000'000'000;

/// The place of an entry with its id, once that is known.
Place named(const Place& place, const Json& json, const Id& id) {
    Place with_id = place;
    // An id that is no text is an error of its own, raised when the field is read.
    if (place.index && json.is_object() && !id.empty())
        with_id.id = &id;
    return with_id;
}

/// The id as written, before anything else is read, as it names the places within.
Id peek_id(const Json& json) {
    if (!json.is_object())
        return {};
    const auto found = json.find("id");
    return found != json.end() && found->is_string() ? found->get<std::string>() : Id{};
}

void read_level(Reading& reading, const Json& json, const Place& place, Level& into) {
    Fields fields(reading, json, place);
    fields.needed_text("label", into.label);
    fields.text("colour", into.colour);
    fields.finish();
}

void read_trait(Reading& reading, const Json& json, const Place& place, Trait& into) {
    Fields fields(reading, json, place);
    fields.needed_text("name", into.name);
    fields.list("levels", into.levels, read_level);
    fields.finish();
}

void read_class(Reading& reading, const Json& json, const Place& place, PhenotypeClass& into) {
    Fields fields(reading, json, place);
    fields.text("label", into.label);
    fields.list("levels", into.levels, [](Reading& r, const Json& one, const Place& at, int& level) {
        read_integer(r, one, at, level, -1, kMostInt);
    });
    fields.text("colour", into.colour);
    fields.finish();
}

void read_not_scored(Reading& reading, const Json& json, const Place& place, NotScored& into) {
    Fields fields(reading, json, place);
    fields.text("reason", into.reason);
    if (const Json* count = fields.need("count"))
        read_count(reading, *count, fields.at("count"), into.count);
    fields.finish();
}

void read_tray_place(Fields& fields, Plant& into) {
    std::vector<int> numbers;
    fields.list("place", numbers, [](Reading& r, const Json& one, const Place& at, int& number) {
        read_integer(r, one, at, number, 0, kMostInt);
    });
    if (numbers.size() == 3)
        into.place = TrayPlace{numbers[0], numbers[1], numbers[2]};
    else if (const Json* json = fields.find("place"))
        fields.reading().fail(MessageId::FieldNotTrayPlace, fields.at("place"), *json);
}

void read_line(Reading& reading, const Json& json, const Place& place, Line& into) {
    const Id id = peek_id(json);
    const Place here = named(place, json, id);
    Fields fields(reading, json, here);
    fields.needed_text("id", into.id);
    fields.text("name", into.name);
    fields.text("note", into.note);
    fields.finish();
}

void read_named_hypothesis(Reading& reading, const Json& json, const Place& place, NamedHypothesis& into) {
    const Id id = peek_id(json);
    const Place here = named(place, json, id);
    Fields fields(reading, json, here);
    fields.needed_text("id", into.id);
    fields.text("name", into.name);
    fields.text("notation", into.notation);
    fields.text("note", into.note);
    fields.finish();
}

void read_plan(Reading& reading, const Json& json, const Place& place, Plan& into) {
    const Id id = peek_id(json);
    const Place here = named(place, json, id);
    Fields fields(reading, json, here);
    fields.needed_text("id", into.id);
    fields.text("name", into.name);
    fields.text("question", into.question);
    fields.texts("inputs", into.inputs);
    fields.text("note", into.note);
    fields.finish();
}

void read_import(Reading& reading, const Json& json, const Place& place, ImportedText& into) {
    const Id id = peek_id(json);
    const Place here = named(place, json, id);
    Fields fields(reading, json, here);
    fields.needed_text("id", into.id);
    fields.text("source", into.source);
    fields.text("text", into.text);
    fields.text("time", into.time);
    fields.finish();
}

} // namespace

void read_plant(Reading& reading, const Json& json, const Place& place, Plant& into) {
    Fields fields(reading, json, place);
    if (const Json* phenotype = fields.find("class"))
        read_index(reading, *phenotype, fields.at("class"), into.phenotype.emplace().value);
    if (into.phenotype)
        fields.text("not_scored", into.not_scored_reason);
    else
        fields.needed_text("not_scored", into.not_scored_reason);
    fields.text("time", into.time);
    fields.text("scorer", into.scorer);
    read_tray_place(fields, into);
    fields.finish();
}

void read_family(Reading& reading, const Json& json, const Place& place, Family& into) {
    const Id id = peek_id(json);
    const Place here = named(place, json, id);
    Fields fields(reading, json, here);
    fields.needed_text("id", into.id);
    fields.text("label", into.label);
    fields.list("typed", into.typed, read_typed);
    fields.list("plants", into.plants, read_plant);
    if (const Json* cell = fields.find("not_scored_typed"))
        read_typed(reading, *cell, fields.at("not_scored_typed"), into.not_scored_typed);
    fields.list("not_scored", into.not_scored, read_not_scored);
    fields.count("sown", into.sown);
    fields.count("emerged", into.emerged);
    fields.count("alive", into.alive);
    fields.texts("tags", into.tags);
    fields.text("note", into.note);
    fields.text("date", into.date);
    fields.text("who", into.who);
    fields.text("set_aside", into.set_aside);
    fields.list("dismissed_hints", into.dismissed_hints, read_text);
    fields.list("complete_at", into.complete_at, read_index);
    fields.finish();
}

void read_hypothesis_use(Reading& reading, const Json& json, const Place& place, HypothesisUse& into) {
    Fields fields(reading, json, place);
    fields.text("notation", into.notation);
    fields.text("name", into.name);
    fields.list("binding", into.binding, read_index);
    fields.list("joins", into.joins, [](Reading& r, const Json& one, const Place& at, std::vector<std::size_t>& group) {
        Fields::read_list(r, one, at, group, read_index);
    });
    fields.truth("joins_after_seeing", into.joins_after_seeing);
    fields.truth("chosen_after_seeing", into.chosen_after_seeing);
    fields.integer("fitted_elsewhere", into.fitted_elsewhere, 0, kMostInt);
    fields.finish();
}

void read_cross(Reading& reading, const Json& json, const Place& place, Cross& into) {
    const Id id = peek_id(json);
    const Place here = named(place, json, id);
    Fields fields(reading, json, here);
    fields.needed_text("id", into.id);
    fields.text("name", into.name);
    fields.text("generation", into.generation);
    fields.list("parents", into.parents, read_text);
    fields.text("date", into.date);
    fields.text("who", into.who);
    fields.text("note", into.note);
    fields.text("stage", into.stage);
    fields.list("traits", into.traits, read_trait);
    fields.list("classes", into.classes, read_class);
    if (const Json* hypothesis = fields.find("hypothesis"))
        read_hypothesis_use(reading, *hypothesis, fields.at("hypothesis"), into.hypothesis);
    fields.list("families", into.families, read_family);
    fields.finish();
}

void read_book_fields(Fields& fields, Book& into) {
    fields.needed_text("id", into.id);
    fields.text("title", into.title);
    fields.text("note", into.note);
    fields.list("lines", into.lines, read_line);
    fields.list("hypotheses", into.hypotheses, read_named_hypothesis);
    fields.list("plans", into.plans, read_plan);
    fields.list("imports", into.imports, read_import);
    fields.list("crosses", into.crosses, read_cross);
}

void read_book_object(Reading& reading, const Json& json, const Place& place, Book& into) {
    Fields fields(reading, json, place);
    read_book_fields(fields, into);
    fields.texts("unknown_fields", into.unknown_fields);
    fields.finish();
}

} // namespace filial::book
