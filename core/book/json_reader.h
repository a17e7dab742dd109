// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstdint>
#include <map>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "core/book/json_text.h"
#include "core/book/model.h"

// Terms. Reading keeps the first error and goes on with empty values, so that readers of single fields stay short; the
// caller looks at the error once. A place is where a value stands: by index for a person ("crosses[0].families[3]"),
// and by id for unknown fields ("crosses[k14…].families[a01…]"), which thus find their owner again after families were
// moved, added or removed.
namespace filial::book {

struct Place {
    const Place* parent = nullptr;
    std::string_view name;            ///< "families"; "" for an entry of a list
    std::optional<std::size_t> index; ///< of an entry of a list
    const std::string* id = nullptr;  ///< of an entry that has one

    [[nodiscard]] std::string path() const;
    [[nodiscard]] std::string key() const;
};

struct Reading {
    std::optional<Error> error;
    std::map<std::string, std::string>* unknown = nullptr; ///< where unknown fields go; may be null: they are refused

    void fail(MessageId id, const Place& at, const Json& found, std::vector<Argument> more = {});
    void missing(const Place& owner, std::string_view name);
};

/// The fields of one object. Those nobody asked for are unknown and are kept when it goes.
class Fields {
public:
    Fields(Reading& reading, const Json& json, const Place& place);

    [[nodiscard]] const Json* find(std::string_view name);
    /// A field that must be there; an error where it is missing.
    [[nodiscard]] const Json* need(std::string_view name);
    [[nodiscard]] Place at(std::string_view name) const { return {&place_, name, std::nullopt, nullptr}; }
    [[nodiscard]] Reading& reading() { return reading_; }

    /// Fields that may be left out keep what they hold.
    void text(std::string_view name, std::string& into);
    void text(std::string_view name, std::optional<std::string>& into);
    void truth(std::string_view name, bool& into);
    void count(std::string_view name, std::optional<Count>& into);
    void index(std::string_view name, std::size_t& into);
    void integer(std::string_view name, int& into, int least, int most);
    void texts(std::string_view name, std::map<std::string, std::string>& into);
    template <class T, class ReadEntry> void list(std::string_view name, std::vector<T>& into, ReadEntry read) {
        const Json* json = find(name);
        if (json == nullptr)
            return;
        const Place place = at(name);
        read_list(reading_, *json, place, into, read);
    }
    void needed_text(std::string_view name, std::string& into);

    /// Keeps what was not asked for; to be called last.
    void finish();

    template <class T, class ReadEntry>
    static void read_list(Reading& reading, const Json& json, const Place& place, std::vector<T>& into, ReadEntry read);

private:
    Reading& reading_;
    const Json* json_ = nullptr; ///< null where it is no object
    const Place& place_;
    std::vector<std::string_view> asked_;
};

[[nodiscard]] bool is_list(Reading& reading, const Json& json, const Place& place);
[[nodiscard]] std::size_t list_size(const Json& json);
[[nodiscard]] const Json& list_entry(const Json& json, std::size_t index);

void read_text(Reading& reading, const Json& json, const Place& place, std::string& into);
void read_count(Reading& reading, const Json& json, const Place& place, Count& into);
void read_index(Reading& reading, const Json& json, const Place& place, std::size_t& into);
void read_integer(Reading& reading, const Json& json, const Place& place, int& into, int least, int most);
/// A whole number, "–" or null.
void read_typed(Reading& reading, const Json& json, const Place& place, Cell& into);

template <class T, class ReadEntry>
void Fields::read_list(Reading& reading, const Json& json, const Place& place, std::vector<T>& into, ReadEntry read) {
    if (!is_list(reading, json, place))
        return;
    const std::size_t size = list_size(json);
    into.clear();
    into.resize(size);
    for (std::size_t i = 0; i < size && !reading.error; ++i) {
        const Place entry{&place, {}, i, nullptr};
        read(reading, list_entry(json, i), entry, into[i]);
    }
}

} // namespace filial::book
