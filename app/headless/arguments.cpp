// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/headless/arguments.h"

#include <charconv>
#include <cmath>

#include "core/report/wording.h"

namespace filial::app {

namespace {

bool is_option(const std::string& text) {
    const bool negative_number = text.size() > 1 && (text[1] == '.' || (text[1] >= '0' && text[1] <= '9'));
    return text.size() > 1 && text[0] == '-' && !negative_number;
}

Error wrong_option(const std::string& option, Message message) {
    return error_at(option_place(option), std::move(message));
}

/// The value after `=` or the next argument; moves `at` past what was used.
std::optional<std::string> value_of(const std::string& typed, std::span<const std::string> arguments, std::size_t& at) {
    if (const std::size_t equals = typed.find('='); equals != std::string::npos) {
        return typed.substr(equals + 1);
    }
    if (at + 1 >= arguments.size() || arguments[at + 1].starts_with("--")) {
        return std::nullopt;
    }
    return arguments[++at];
}

} // namespace

bool Arguments::has(const std::string& option) const {
    return values.contains(option) || switches.contains(option);
}

std::optional<std::string> Arguments::value(const std::string& option) const {
    const auto found = values.find(option);
    return found == values.end() ? std::nullopt : std::optional(found->second.back());
}

Result<Arguments> read_arguments(const std::string& verb, std::span<const std::string> arguments,
                                 const OptionNames& names) {
    Arguments read;
    bool only_plain = false;
    for (std::size_t at = 0; at < arguments.size(); ++at) {
        const std::string typed = arguments[at];
        if (only_plain || !is_option(typed)) {
            read.plain.push_back(typed);
            continue;
        }
        if (typed == "--") {
            only_plain = true;
            continue;
        }
        const std::string name = typed.substr(0, typed.find('='));
        if (names.switches.contains(typed)) {
            read.switches.insert(typed);
            continue;
        }
        if (!names.valued.contains(name)) {
            return wrong_option(name, {MessageId::HeadlessUnknownOption, {text_argument(verb)}});
        }
        const std::optional<std::string> value = value_of(typed, arguments, at);
        if (!value) {
            return wrong_option(name, {MessageId::HeadlessNeedsValue, {}});
        }
        if (read.values.contains(name) && !names.repeatable.contains(name)) {
            return wrong_option(name, {MessageId::HeadlessTwice, {}});
        }
        read.values[name].push_back(*value);
    }
    return read;
}

Error error_at(const std::string& place, const Error& error) {
    return error_at(place, error.message, error.kind);
}

Error error_at(const std::string& place, Message message, ErrorKind kind) {
    return {kind,
            {MessageId::HeadlessErrorLine, {text_argument(place), text_argument(report::render(message))}},
            std::nullopt};
}

std::string option_place(const std::string& option, const Error& error) {
    if (!error.place) {
        return report::render({MessageId::HeadlessOption, {text_argument(option)}});
    }
    const auto character = static_cast<std::int64_t>(*error.place) + 1;
    return report::render({MessageId::HeadlessOptionAt, {text_argument(option), count_argument(character)}});
}

std::string argument_place(std::size_t index, const std::string& text) {
    return report::render(
        {MessageId::HeadlessArgument, {count_argument(static_cast<std::int64_t>(index) + 1), text_argument(text)}});
}

std::optional<double> read_number(const std::string& text) {
    double value = 0.0;
    const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), value);
    if (error != std::errc() || end != text.data() + text.size() || !std::isfinite(value)) {
        return std::nullopt;
    }
    return value;
}

std::optional<std::uint64_t> read_whole(const std::string& text) {
    std::uint64_t value = 0;
    const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), value);
    if (error != std::errc() || end != text.data() + text.size()) {
        return std::nullopt;
    }
    return value;
}

std::vector<std::string> split_at_commas(const std::string& text) {
    std::vector<std::string> parts;
    std::size_t from = 0;
    while (true) {
        const std::size_t comma = text.find(',', from);
        parts.push_back(text.substr(from, comma - from));
        if (comma == std::string::npos) {
            return parts;
        }
        from = comma + 1;
    }
}

} // namespace filial::app
