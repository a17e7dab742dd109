// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/book/json_text.h"

#include <algorithm>
#include <vector>

#include <nlohmann/json.hpp>

namespace filial::book {

namespace {

constexpr auto kReplace = OrderedJson::error_handler_t::replace;

struct LineColumn {
    std::int64_t line = 1, column = 1;
};

LineColumn locate(std::string_view text, std::size_t byte) {
    LineColumn at;
    for (const char c : text.substr(0, byte)) {
        const bool continues = (static_cast<unsigned char>(c) & 0xC0U) == 0x80U;
        if (c == '\n') {
            ++at.line;
            at.column = 1;
        } else if (!continues) {
            ++at.column;
        }
    }
    return at;
}

/// Builds the value event by event, so that a hostile text is stopped before it costs memory or hides a key.
class Builder : public nlohmann::json_sax<Json> {
public:
    explicit Builder(std::string_view text) : text_(text) {}

    bool null() override { return put(nullptr); }
    bool boolean(bool value) override { return put(value); }
    bool number_integer(number_integer_t value) override { return put(value); }
    bool number_unsigned(number_unsigned_t value) override { return put(value); }
    bool number_float(number_float_t value, const string_t& /*text*/) override { return put(value); }
    bool string(string_t& value) override { return put(std::move(value)); }
    bool binary(binary_t& /*value*/) override { return false; }
    bool start_object(std::size_t /*size*/) override { return open(Json::object()); }
    bool start_array(std::size_t /*size*/) override { return open(Json::array()); }
    bool end_object() override { return close(); }
    bool end_array() override { return close(); }
    bool key(string_t& value) override {
        auto [slot, fresh] = open_.back()->get_ref<Json::object_t&>().try_emplace(value);
        slot_ = &slot->second;
        if (!fresh)
            error_ = refusal(MessageId::JsonKeyTwice, {text_argument(value)});
        return fresh;
    }
    bool parse_error(std::size_t byte, const std::string& /*token*/, const Json::exception& /*why*/) override {
        const std::size_t place = byte > 0 ? byte - 1 : 0;
        const LineColumn at = locate(text_, place);
        const bool ended = text_.find_last_not_of(" \t\r\n") == std::string_view::npos || byte > text_.size();
        error_ = refusal(ended ? MessageId::JsonEndsEarly : MessageId::JsonMalformed,
                         {count_argument(at.line), count_argument(at.column)});
        error_->place = std::min(place, text_.size());
        return false;
    }

    Json take() { return std::move(root_); }
    std::optional<Error>& error() { return error_; }

private:
    bool counted() {
        if (++values_ <= kMostValues)
            return true;
        error_ = refusal(MessageId::JsonTooManyValues, {count_argument(static_cast<std::int64_t>(kMostValues))});
        return false;
    }
    Json* place(Json value) {
        if (open_.empty()) {
            root_ = std::move(value);
            return &root_;
        }
        if (open_.back()->is_array()) {
            auto& items = open_.back()->get_ref<Json::array_t&>();
            items.push_back(std::move(value));
            return &items.back();
        }
        *slot_ = std::move(value);
        return slot_;
    }
    template <class T> bool put(T&& value) {
        place(Json(std::forward<T>(value)));
        return counted();
    }
    bool open(Json container) {
        if (open_.size() >= kDeepestNesting) {
            error_ = refusal(MessageId::JsonTooDeep, {count_argument(static_cast<std::int64_t>(kDeepestNesting))});
            return false;
        }
        open_.push_back(place(std::move(container)));
        return counted();
    }
    bool close() {
        open_.pop_back();
        return true;
    }

    std::string_view text_;
    Json root_;
    std::vector<Json*> open_;
    Json* slot_ = nullptr;
    std::size_t values_ = 0;
    std::optional<Error> error_;
};

void lay_out(const OrderedJson& json, int depth, int open_depth, std::string& out) {
    if (!json.is_structured() || json.empty() || depth >= open_depth) {
        out += json.dump(-1, ' ', false, kReplace);
        return;
    }
    const std::string indent(static_cast<std::size_t>(depth) + 1, ' ');
    out += json.is_object() ? "{" : "[";
    bool first = true;
    for (auto item = json.begin(); item != json.end(); ++item) {
        out += first ? "\n" : ",\n";
        first = false;
        out += indent;
        if (json.is_object())
            out += OrderedJson(item.key()).dump(-1, ' ', false, kReplace) + ": ";
        lay_out(*item, depth + 1, open_depth, out);
    }
    out += "\n" + std::string(static_cast<std::size_t>(depth), ' ');
    out += json.is_object() ? "}" : "]";
}

} // namespace

Result<Json> parse_json(std::string_view text) {
    Builder builder(text);
    const bool whole = Json::sax_parse(text.begin(), text.end(), &builder);
    if (builder.error())
        return *builder.error();
    if (!whole)
        return refusal(MessageId::JsonMalformed, {count_argument(1), count_argument(1)});
    return builder.take();
}

std::string laid_out(const OrderedJson& json, int open_depth) {
    std::string out;
    lay_out(json, 0, open_depth, out);
    return out + "\n";
}

std::string on_one_line(const OrderedJson& json) {
    return json.dump(-1, ' ', false, kReplace);
}

std::string shown(const Json& json) {
    constexpr std::size_t most = 40;
    if (json.is_structured() && json.size() > 8)
        return json.is_object() ? "{…}" : "[…]";
    std::string text = json.dump(-1, ' ', false, Json::error_handler_t::replace);
    if (text.size() <= most)
        return text;
    std::size_t end = most;
    while (end > 0 && (static_cast<unsigned char>(text[end]) & 0xC0U) == 0x80U)
        --end;
    return text.substr(0, end) + "…";
}

} // namespace filial::book
