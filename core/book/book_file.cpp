// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/book/book_file.h"

#include <algorithm>
#include <array>

#include <nlohmann/json.hpp>
#include <openssl/sha.h>

#include "core/book/book_json.h"
#include "core/book/check.h"

namespace filial::book {

namespace {

constexpr int kMostVersion = 1'000'000;
/// Where the version of a file from a newer program is kept, to be written again with its fields.
const std::string kVersionKey = "version";

Error file_error(MessageId id, std::vector<Argument> arguments = {}) {
    return Error{ErrorKind::Input, Message{id, std::move(arguments)}, std::nullopt};
}

void read_version(Fields& fields, std::string_view name, int& into) {
    if (const Json* json = fields.need(name))
        read_integer(fields.reading(), *json, fields.at(name), into, 1, kMostVersion);
}

int kept_version(const Book& book) {
    const auto kept = book.unknown_fields.find(kVersionKey);
    if (kept == book.unknown_fields.end())
        return kFileVersion;
    const Json json = Json::parse(kept->second, nullptr, false);
    return json.is_number_integer() ? std::max(kFileVersion, json.get<int>()) : kFileVersion;
}

} // namespace

Result<OpenedBook> read_book(const std::string& json) {
    if (json.size() > kLargestFile)
        return file_error(MessageId::BookTooLarge, {count_argument(static_cast<std::int64_t>(kLargestFile >> 20U))});
    if (json.find_first_not_of(" \t\r\n") == std::string::npos)
        return file_error(MessageId::BookEmpty);
    Result<Json> parsed = parse_json(json);
    if (!parsed)
        return parsed.error();

    OpenedBook opened;
    Reading reading{std::nullopt, &opened.book.unknown_fields};
    const Place root;
    Fields fields(reading, parsed.value(), root);
    if (!reading.error && !parsed.value().contains("needs_reader"))
        return file_error(MessageId::NotABook);
    int version = kFileVersion;
    int needs_reader = kFileVersion;
    read_version(fields, "version", version);
    read_version(fields, "needs_reader", needs_reader);
    read_book_fields(fields, opened.book);
    fields.finish();
    if (!reading.error)
        if (Done sound = check_book(opened.book); !sound)
            reading.error = sound.error();
    opened.read_only = needs_reader > kFileVersion;
    // What a newer version means by its fields is not known here: say that it is newer, not that it is wrong.
    if (reading.error && opened.read_only)
        return file_error(MessageId::BookTooNew, {count_argument(needs_reader), count_argument(kFileVersion)});
    if (reading.error)
        return *reading.error;
    if (version > kFileVersion)
        opened.book.unknown_fields[kVersionKey] = std::to_string(version);
    if (opened.read_only)
        opened.warnings.push_back(
            {MessageId::BookReadOnlyNewer, {count_argument(needs_reader), count_argument(kFileVersion)}});
    opened.sha256 = sha256_hex(json);
    return opened;
}

std::string write_book(const Book& book) {
    OrderedJson json = OrderedJson::object();
    json["version"] = kept_version(book);
    json["needs_reader"] = kFileVersion;
    const OrderedJson fields = JsonWriter(&book.unknown_fields).book(book);
    for (auto field = fields.begin(); field != fields.end(); ++field)
        json[field.key()] = *field;
    if (const auto kept = book.unknown_fields.find(""); kept != book.unknown_fields.end()) {
        const Json rest = Json::parse(kept->second, nullptr, false);
        if (rest.is_object())
            for (const auto& [name, value] : rest.items())
                if (!json.contains(name))
                    json[name] = value;
    }
    // Fields of the book, entries of its lists, fields of a cross, and then one family a line.
    return laid_out(json, 4);
}

Result<OpenedBook> open_book(Files& files, const std::string& path) {
    Result<std::string> bytes = files.read(path, kLargestFile);
    if (!bytes)
        return bytes.error();
    Result<OpenedBook> opened = read_book(bytes.value());
    return opened;
}

Done save_book(Files& files, const std::string& path, const Book& book) {
    return files.write_atomically(path, write_book(book));
}

std::string sha256_hex(const std::string& bytes) {
    std::array<unsigned char, SHA256_DIGEST_LENGTH> digest{};
    SHA256(reinterpret_cast<const unsigned char*>(bytes.data()), bytes.size(), digest.data());
    static constexpr std::string_view digits = "0123456789abcdef";
    std::string hex;
    for (const unsigned char byte : digest) {
        hex += digits[byte >> 4U];
        hex += digits[byte & 15U];
    }
    return hex;
}

} // namespace filial::book
