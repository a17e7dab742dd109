// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/book/edit.h"
#include "core/book/json_reader.h"

// The JSON of each part of a book, shared by the book file and the journal.
namespace filial::book {

/// Writes with the unknown fields kept for each place; none where `unknown` is null.
class JsonWriter {
public:
    explicit JsonWriter(const std::map<std::string, std::string>* unknown = nullptr) : unknown_(unknown) {}

    [[nodiscard]] OrderedJson book(const Book& book) const; ///< its fields from `id` on
    [[nodiscard]] OrderedJson cross(const Cross& cross, const std::string& key = {}) const;
    [[nodiscard]] OrderedJson family(const Family& family, const std::string& key = {}) const;
    [[nodiscard]] OrderedJson plant(const Plant& plant, const std::string& key = {}) const;
    [[nodiscard]] OrderedJson hypothesis(const HypothesisUse& use, const std::string& key = {}) const;
    [[nodiscard]] static OrderedJson cell(const Cell& cell);

private:
    void keep(OrderedJson& json, const std::string& key) const;
    void crosses(OrderedJson& json, const Book& book) const;
    void shared(OrderedJson& json, const Book& book) const;
    [[nodiscard]] OrderedJson traits(const Cross& cross, const std::string& key) const;
    [[nodiscard]] OrderedJson classes(const Cross& cross, const std::string& key) const;
    [[nodiscard]] std::string inside(const std::string& key, std::string_view list, const std::string& entry) const;

    const std::map<std::string, std::string>* unknown_;
};

void read_plant(Reading& reading, const Json& json, const Place& place, Plant& into);
void read_family(Reading& reading, const Json& json, const Place& place, Family& into);
void read_hypothesis_use(Reading& reading, const Json& json, const Place& place, HypothesisUse& into);
void read_cross(Reading& reading, const Json& json, const Place& place, Cross& into);
/// The fields of a book from `id` on; `fields` may have been asked for others before.
void read_book_fields(Fields& fields, Book& into);
void read_book_object(Reading& reading, const Json& json, const Place& place, Book& into);

} // namespace filial::book
