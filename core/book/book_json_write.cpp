// SPDX-License-Identifier: GPL-3.0-or-later
#include <nlohmann/json.hpp>

#include "core/book/book_json.h"

namespace filial::book {

namespace {

// What is empty is left out: a book stays short, and a new field of a later version changes no old line.
void put(OrderedJson& json, const char* name, const std::string& text) {
    if (!text.empty())
        json[name] = text;
}

void put(OrderedJson& json, const char* name, const std::optional<Count>& count) {
    if (count)
        json[name] = count->value();
}

template <class T> void put(OrderedJson& json, const char* name, const std::vector<T>& values) {
    if (!values.empty())
        json[name] = values;
}

void put(OrderedJson& json, const char* name, const std::map<std::string, std::string>& texts) {
    if (!texts.empty())
        json[name] = texts;
}

} // namespace

std::string JsonWriter::inside(const std::string& key, std::string_view list, const std::string& entry) const {
    if (unknown_ == nullptr || unknown_->empty())
        return {};
    std::string place = key;
    if (!place.empty())
        place += ".";
    place.append(list);
    return entry.empty() ? place : place + "[" + entry + "]";
}

void JsonWriter::keep(OrderedJson& json, const std::string& key) const {
    if (unknown_ == nullptr)
        return;
    const auto found = unknown_->find(key);
    if (found == unknown_->end())
        return;
    const auto kept = Json::parse(found->second, nullptr, false);
    if (!kept.is_object())
        return;
    for (const auto& [name, value] : kept.items())
        if (!json.contains(name))
            json[name] = value;
}

OrderedJson JsonWriter::cell(const Cell& cell) {
    switch (cell.state) {
    case CellState::Number:
        return cell.count.value();
    case CellState::NotLooked:
        return "–";
    case CellState::Blank:
        break;
    }
    return nullptr;
}

OrderedJson JsonWriter::plant(const Plant& plant, const std::string& key) const {
    OrderedJson json = OrderedJson::object();
    if (plant.phenotype)
        json["class"] = plant.phenotype->value;
    if (!plant.phenotype || !plant.not_scored_reason.empty())
        json["not_scored"] = plant.not_scored_reason;
    put(json, "time", plant.time);
    put(json, "scorer", plant.scorer);
    if (plant.place)
        json["place"] = {plant.place->tray, plant.place->row, plant.place->column};
    keep(json, key);
    return json;
}

OrderedJson JsonWriter::family(const Family& family, const std::string& key) const {
    OrderedJson json = OrderedJson::object();
    json["id"] = family.id;
    put(json, "label", family.label);
    for (const Cell& one : family.typed)
        json["typed"].push_back(cell(one));
    for (std::size_t i = 0; i < family.plants.size(); ++i)
        json["plants"].push_back(plant(family.plants[i], inside(key, "plants", std::to_string(i))));
    if (family.not_scored_typed.state != CellState::Blank)
        json["not_scored_typed"] = cell(family.not_scored_typed);
    for (std::size_t i = 0; i < family.not_scored.size(); ++i) {
        OrderedJson one = OrderedJson::object();
        put(one, "reason", family.not_scored[i].reason);
        one["count"] = family.not_scored[i].count.value();
        keep(one, inside(key, "not_scored", std::to_string(i)));
        json["not_scored"].push_back(std::move(one));
    }
    put(json, "sown", family.sown);
    put(json, "emerged", family.emerged);
    put(json, "alive", family.alive);
    put(json, "tags", family.tags);
    put(json, "note", family.note);
    put(json, "date", family.date);
    put(json, "who", family.who);
    if (family.set_aside)
        json["set_aside"] = *family.set_aside;
    put(json, "dismissed_hints", family.dismissed_hints);
    put(json, "complete_at", family.complete_at);
    keep(json, key);
    return json;
}

OrderedJson JsonWriter::hypothesis(const HypothesisUse& use, const std::string& key) const {
    OrderedJson json = OrderedJson::object();
    put(json, "notation", use.notation);
    put(json, "name", use.name);
    put(json, "binding", use.binding);
    put(json, "joins", use.joins);
    if (use.joins_after_seeing)
        json["joins_after_seeing"] = true;
    if (use.chosen_after_seeing)
        json["chosen_after_seeing"] = true;
    if (use.fitted_elsewhere != 0)
        json["fitted_elsewhere"] = use.fitted_elsewhere;
    keep(json, key);
    return json;
}

OrderedJson JsonWriter::traits(const Cross& cross, const std::string& key) const {
    OrderedJson list = OrderedJson::array();
    for (std::size_t i = 0; i < cross.traits.size(); ++i) {
        const std::string here = inside(key, "traits", std::to_string(i));
        OrderedJson json = OrderedJson::object();
        json["name"] = cross.traits[i].name;
        for (std::size_t j = 0; j < cross.traits[i].levels.size(); ++j) {
            OrderedJson level = OrderedJson::object();
            level["label"] = cross.traits[i].levels[j].label;
            put(level, "colour", cross.traits[i].levels[j].colour);
            keep(level, inside(here, "levels", std::to_string(j)));
            json["levels"].push_back(std::move(level));
        }
        keep(json, here);
        list.push_back(std::move(json));
    }
    return list;
}

OrderedJson JsonWriter::classes(const Cross& cross, const std::string& key) const {
    OrderedJson list = OrderedJson::array();
    for (std::size_t i = 0; i < cross.classes.size(); ++i) {
        OrderedJson json = OrderedJson::object();
        put(json, "label", cross.classes[i].label);
        put(json, "levels", cross.classes[i].levels);
        put(json, "colour", cross.classes[i].colour);
        keep(json, inside(key, "classes", std::to_string(i)));
        list.push_back(std::move(json));
    }
    return list;
}

OrderedJson JsonWriter::cross(const Cross& cross, const std::string& key) const {
    OrderedJson json = OrderedJson::object();
    json["id"] = cross.id;
    put(json, "name", cross.name);
    put(json, "generation", cross.generation);
    put(json, "parents", cross.parents);
    put(json, "date", cross.date);
    put(json, "who", cross.who);
    put(json, "note", cross.note);
    put(json, "stage", cross.stage);
    if (!cross.traits.empty())
        json["traits"] = traits(cross, key);
    if (!cross.classes.empty())
        json["classes"] = classes(cross, key);
    if (OrderedJson use = hypothesis(cross.hypothesis, inside(key, "hypothesis", {})); !use.empty())
        json["hypothesis"] = std::move(use);
    for (const Family& one : cross.families)
        json["families"].push_back(family(one, inside(key, "families", one.id)));
    keep(json, key);
    return json;
}

void JsonWriter::shared(OrderedJson& json, const Book& book) const {
    for (const Line& line : book.lines) {
        OrderedJson one = {{"id", line.id}};
        put(one, "name", line.name);
        put(one, "note", line.note);
        keep(one, inside({}, "lines", line.id));
        json["lines"].push_back(std::move(one));
    }
    for (const NamedHypothesis& named : book.hypotheses) {
        OrderedJson one = {{"id", named.id}};
        put(one, "name", named.name);
        put(one, "notation", named.notation);
        put(one, "note", named.note);
        keep(one, inside({}, "hypotheses", named.id));
        json["hypotheses"].push_back(std::move(one));
    }
    for (const Plan& plan : book.plans) {
        OrderedJson one = {{"id", plan.id}};
        put(one, "name", plan.name);
        put(one, "question", plan.question);
        put(one, "inputs", plan.inputs);
        put(one, "note", plan.note);
        keep(one, inside({}, "plans", plan.id));
        json["plans"].push_back(std::move(one));
    }
    for (const ImportedText& import : book.imports) {
        OrderedJson one = {{"id", import.id}};
        put(one, "source", import.source);
        put(one, "text", import.text);
        put(one, "time", import.time);
        keep(one, inside({}, "imports", import.id));
        json["imports"].push_back(std::move(one));
    }
}

OrderedJson JsonWriter::book(const Book& book) const {
    OrderedJson json = OrderedJson::object();
    json["id"] = book.id;
    put(json, "title", book.title);
    put(json, "note", book.note);
    shared(json, book);
    for (const Cross& one : book.crosses)
        json["crosses"].push_back(cross(one, inside({}, "crosses", one.id)));
    return json;
}

} // namespace filial::book
