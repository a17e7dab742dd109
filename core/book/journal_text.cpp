// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/book/journal_text.h"

#include <algorithm>

#include <nlohmann/json.hpp>

#include "core/book/book_file.h"
#include "core/book/book_json.h"
#include "core/book/check.h"
#include "core/book/edit_json.h"

namespace filial::book {

namespace {

constexpr int kJournalVersion = 1;
constexpr std::size_t kSumDigits = 16;

std::string line_of(const OrderedJson& json) {
    const std::string text = on_one_line(json);
    return sha256_hex(text).substr(0, kSumDigits) + " " + text + "\n";
}

const char* act_name(Act act) {
    return act == Act::Do ? "do" : act == Act::Undo ? "undo" : "redo";
}

/// The text of a line whose sum is right; empty otherwise.
std::optional<std::string> verified(std::string_view line) {
    if (line.size() < kSumDigits + 1 || line[kSumDigits] != ' ')
        return std::nullopt;
    std::string text(line.substr(kSumDigits + 1));
    if (sha256_hex(text).substr(0, kSumDigits) != line.substr(0, kSumDigits))
        return std::nullopt;
    return text;
}

/// The next line without its end; empty where none is complete.
std::optional<std::string_view> next_line(std::string_view& text) {
    const auto end = text.find('\n');
    if (end == std::string_view::npos)
        return std::nullopt;
    const std::string_view line = text.substr(0, end);
    text.remove_prefix(end + 1);
    return line;
}

Error damaged() {
    return Error{ErrorKind::File, Message{MessageId::JournalDamaged, {}}, std::nullopt};
}

Result<JournalHeader> read_header(const std::string& text) {
    Result<Json> json = parse_json(text);
    if (!json)
        return damaged();
    Reading reading;
    const Place root;
    Fields fields(reading, json.value(), root);
    JournalHeader header;
    int version = 0;
    fields.integer("filial_journal", version, 1, 1'000'000);
    if (version > kJournalVersion)
        return Error{ErrorKind::File, Message{MessageId::JournalTooNew, {}}, std::nullopt};
    fields.needed_text("book", header.book);
    fields.text("title", header.title);
    fields.text("path", header.book_path);
    fields.text("base_sha256", header.base_sha256);
    fields.text("time", header.time);
    std::size_t sequence = 0;
    fields.index("base_sequence", sequence);
    header.base_sequence = sequence;
    if (const Json* base = fields.find("base"))
        read_book_object(reading, *base, fields.at("base"), header.base.emplace());
    fields.finish();
    if (reading.error || version < 1)
        return damaged();
    return header;
}

bool read_entry(Fields& fields, LogEntry& entry) {
    std::size_t sequence = 0;
    std::string act;
    fields.index("sequence", sequence);
    entry.sequence = sequence;
    fields.needed_text("act", act);
    fields.text("merge", entry.merge_key);
    fields.text("time", entry.time);
    fields.text("who", entry.who);
    if (const Json* edit = fields.need("change"))
        read_edit_json(fields.reading(), *edit, fields.at("change"), entry.edit);
    for (const Act one : {Act::Do, Act::Undo, Act::Redo})
        if (act == act_name(one)) {
            entry.act = one;
            return true;
        }
    return false;
}

bool read_line(const std::string& text, JournalContent& content) {
    Result<Json> json = parse_json(text);
    if (!json)
        return false;
    Reading reading;
    const Place root;
    Fields fields(reading, json.value(), root);
    std::string saving;
    fields.text("saving", saving);
    LogEntry entry;
    if (saving.empty() && !read_entry(fields, entry))
        return false;
    fields.finish();
    if (reading.error)
        return false;
    if (!saving.empty()) {
        content.savings.push_back({saving, content.entries.size()});
        return true;
    }
    if (entry.sequence != content.header.base_sequence + content.entries.size() + 1)
        return false;
    content.entries.push_back(std::move(entry));
    return true;
}

} // namespace

std::string header_line(const JournalHeader& header) {
    OrderedJson json = {{"filial_journal", kJournalVersion},
                        {"book", header.book},
                        {"title", header.title},
                        {"path", header.book_path},
                        {"base_sha256", header.base_sha256},
                        {"base_sequence", header.base_sequence},
                        {"time", header.time}};
    if (header.base) {
        json["base"] = JsonWriter().book(*header.base);
        if (!header.base->unknown_fields.empty())
            json["base"]["unknown_fields"] = header.base->unknown_fields;
    }
    return line_of(json);
}

std::string entry_line(const LogEntry& entry) {
    OrderedJson json = {{"sequence", entry.sequence}, {"act", act_name(entry.act)}};
    if (!entry.merge_key.empty())
        json["merge"] = entry.merge_key;
    json["time"] = entry.time;
    json["who"] = entry.who;
    json["change"] = edit_json(entry.edit);
    return line_of(json);
}

std::string saving_line(const std::string& sha256) {
    return line_of({{"saving", sha256}});
}

Result<JournalContent> read_journal(std::string_view text) {
    const auto first = next_line(text);
    const auto header_text = first ? verified(*first) : std::nullopt;
    if (!header_text)
        return damaged();
    Result<JournalHeader> header = read_header(*header_text);
    if (!header)
        return header.error();
    JournalContent content;
    content.header = std::move(header).value();
    while (!text.empty()) {
        const std::string_view rest = text;
        const auto line = next_line(text);
        const auto line_text = line ? verified(*line) : std::nullopt;
        if (line_text && read_line(*line_text, content))
            continue;
        content.lost_lines = static_cast<std::size_t>(std::count(rest.begin(), rest.end(), '\n'));
        content.lost_lines += rest.back() == '\n' ? 0U : 1U;
        break;
    }
    return content;
}

std::optional<std::size_t> entries_within(const JournalContent& journal, const std::string& sha256) {
    for (auto saving = journal.savings.rbegin(); saving != journal.savings.rend(); ++saving)
        if (saving->sha256 == sha256)
            return saving->entries_before;
    if (journal.header.base_sha256 == sha256)
        return 0;
    return std::nullopt;
}

} // namespace filial::book
