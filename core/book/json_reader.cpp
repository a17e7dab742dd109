// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/book/json_reader.h"

#include <algorithm>
#include <limits>

#include <nlohmann/json.hpp>

namespace filial::book {

namespace {

std::string joined(const Place& place, bool by_id) {
    if (place.parent == nullptr)
        return std::string(place.name);
    std::string path = joined(*place.parent, by_id);
    if (place.index) {
        const bool named = by_id && place.id != nullptr;
        return path + "[" + (named ? *place.id : std::to_string(*place.index)) + "]";
    }
    if (!path.empty())
        path += ".";
    return path.append(place.name);
}

/// A whole number written as such; 3.0 and 1e3 are not.
std::optional<std::int64_t> whole(const Json& json) {
    if (json.is_number_unsigned()) {
        const auto value = json.get<std::uint64_t>();
        if (value > static_cast<std::uint64_t>(std::numeric_limits<std::int64_t>::max()))
            return std::nullopt;
        return static_cast<std::int64_t>(value);
    }
    if (json.is_number_integer())
        return json.get<std::int64_t>();
    return std::nullopt;
}

} // namespace

std::string Place::path() const {
    return joined(*this, false);
}

std::string Place::key() const {
    return joined(*this, true);
}

void Reading::fail(MessageId id, const Place& at, const Json& found, std::vector<Argument> more) {
    if (error)
        return;
    std::vector<Argument> arguments{text_argument(at.path()), text_argument(shown(found))};
    arguments.insert(arguments.end(), more.begin(), more.end());
    error = Error{ErrorKind::Input, Message{id, std::move(arguments)}, std::nullopt};
}

void Reading::missing(const Place& owner, std::string_view name) {
    if (error)
        return;
    const Place place{&owner, name, std::nullopt, nullptr};
    error = Error{ErrorKind::Input, Message{MessageId::FieldMissing, {text_argument(place.path())}}, std::nullopt};
}

Fields::Fields(Reading& reading, const Json& json, const Place& place)
    : reading_(reading), json_(json.is_object() ? &json : nullptr), place_(place) {
    if (json_ == nullptr)
        reading_.fail(MessageId::FieldNotObject, place_, json);
}

const Json* Fields::find(std::string_view name) {
    if (json_ == nullptr || reading_.error)
        return nullptr;
    const auto found = json_->find(name);
    if (found == json_->end())
        return nullptr;
    if (std::find(asked_.begin(), asked_.end(), name) == asked_.end())
        asked_.push_back(name);
    return &*found;
}

const Json* Fields::need(std::string_view name) {
    const Json* found = find(name);
    if (found == nullptr)
        reading_.missing(place_, name);
    return found;
}

void Fields::text(std::string_view name, std::string& into) {
    if (const Json* json = find(name))
        read_text(reading_, *json, at(name), into);
}

void Fields::text(std::string_view name, std::optional<std::string>& into) {
    if (const Json* json = find(name))
        read_text(reading_, *json, at(name), into.emplace());
}

void Fields::needed_text(std::string_view name, std::string& into) {
    if (const Json* json = need(name))
        read_text(reading_, *json, at(name), into);
}

void Fields::truth(std::string_view name, bool& into) {
    const Json* json = find(name);
    if (json == nullptr)
        return;
    if (!json->is_boolean())
        return reading_.fail(MessageId::FieldNotTruth, at(name), *json);
    into = json->get<bool>();
}

void Fields::count(std::string_view name, std::optional<Count>& into) {
    if (const Json* json = find(name))
        read_count(reading_, *json, at(name), into.emplace());
}

void Fields::index(std::string_view name, std::size_t& into) {
    if (const Json* json = need(name))
        read_index(reading_, *json, at(name), into);
}

void Fields::integer(std::string_view name, int& into, int least, int most) {
    if (const Json* json = find(name))
        read_integer(reading_, *json, at(name), into, least, most);
}

void Fields::texts(std::string_view name, std::map<std::string, std::string>& into) {
    const Json* json = find(name);
    if (json == nullptr)
        return;
    const Place place = at(name);
    if (!json->is_object())
        return reading_.fail(MessageId::FieldNotObject, place, *json);
    for (const auto& [key, value] : json->items())
        read_text(reading_, value, Place{&place, key, std::nullopt, nullptr}, into[key]);
}

void Fields::finish() {
    if (json_ == nullptr || reading_.error || asked_.size() == json_->size())
        return;
    Json rest = Json::object();
    for (const auto& [key, value] : json_->items()) {
        if (std::find(asked_.begin(), asked_.end(), key) != asked_.end())
            continue;
        if (reading_.unknown == nullptr)
            return reading_.fail(MessageId::FieldUnknown, Place{&place_, key, std::nullopt, nullptr}, value);
        rest[key] = value;
    }
    reading_.unknown->insert_or_assign(place_.key(), rest.dump());
}

bool is_list(Reading& reading, const Json& json, const Place& place) {
    if (json.is_array())
        return true;
    reading.fail(MessageId::FieldNotList, place, json);
    return false;
}

std::size_t list_size(const Json& json) {
    return json.size();
}

const Json& list_entry(const Json& json, std::size_t index) {
    return json[index];
}

void read_text(Reading& reading, const Json& json, const Place& place, std::string& into) {
    if (!json.is_string())
        return reading.fail(MessageId::FieldNotText, place, json);
    into = json.get_ref<const std::string&>();
}

void read_count(Reading& reading, const Json& json, const Place& place, Count& into) {
    const auto number = whole(json);
    const auto count = number ? Count::from(*number) : std::nullopt;
    if (!count)
        return reading.fail(MessageId::FieldNotCount, place, json);
    into = *count;
}

void read_index(Reading& reading, const Json& json, const Place& place, std::size_t& into) {
    const auto number = whole(json);
    if (!number || *number < 0 || *number > Count::kLargestTyped)
        return reading.fail(MessageId::FieldNotCount, place, json);
    into = static_cast<std::size_t>(*number);
}

void read_integer(Reading& reading, const Json& json, const Place& place, int& into, int least, int most) {
    const auto number = whole(json);
    if (!number || *number < least || *number > most)
        return reading.fail(MessageId::FieldNotIndex, place, json, {count_argument(least), count_argument(most)});
    into = static_cast<int>(*number);
}

void read_typed(Reading& reading, const Json& json, const Place& place, Cell& into) {
    into = {};
    if (json.is_null())
        return;
    if (json.is_string() && json.get_ref<const std::string&>() == "–") {
        into.state = CellState::NotLooked;
        return;
    }
    const auto number = whole(json);
    const auto count = number ? Count::from(*number) : std::nullopt;
    if (!count)
        return reading.fail(MessageId::FieldNotCell, place, json);
    into = {CellState::Number, *count};
}

} // namespace filial::book
