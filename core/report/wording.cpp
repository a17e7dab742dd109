// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/report/wording.h"

#include <algorithm>
#include <array>
#include <charconv>
#include <cmath>
#include <cstdlib>

namespace filial::report {

namespace {

struct Wording {
    std::string_view name;
    std::string_view text;
};

// Lists of their own length first: clang deduces no std::array of more than 256 members.
constexpr Wording kEnglishList[] = {
#define FILIAL_WORDING(name, text) Wording{#name, text},
#include "core/report/wording_en.inc"
#undef FILIAL_WORDING
};

constexpr std::string_view kNamesList[] = {
#define FILIAL_MESSAGE(name) std::string_view{#name},
#include "core/numeric/message_ids.inc"
#undef FILIAL_MESSAGE
};
constexpr auto kEnglish = std::to_array(kEnglishList);
constexpr auto kNames = std::to_array(kNamesList);

constexpr bool same_order() {
    for (std::size_t i = 0; i < std::min(kNames.size(), kEnglish.size()); ++i) {
        if (kNames[i] != kEnglish[i].name) {
            return false;
        }
    }
    return true;
}

static_assert(kNames.size() == kEnglish.size(), "every message needs its wording, and every wording its message");
static_assert(same_order(), "message_ids.inc and wording_en.inc list the messages in the same order");

constexpr double kLargestInFull = 1e15; ///< above, a double no longer holds three decimals

std::string superscript(int exponent, const NumberStyle& style) {
    static constexpr std::array<std::string_view, 10> digits{"⁰", "¹", "²", "³", "⁴", "⁵", "⁶", "⁷", "⁸", "⁹"};
    std::string text(exponent < 0 ? (style.minus == "-" ? "-" : "⁻") : "");
    for (const char digit : std::to_string(std::abs(exponent))) {
        text += digits[static_cast<std::size_t>(digit - '0')];
    }
    return text;
}

/// Digits of a value that is not negative, with the decimal mark of the style.
std::string digits_of(double value, int decimals, const NumberStyle& style) {
    std::array<char, 64> buffer{};
    const auto [end, error] =
        std::to_chars(buffer.data(), buffer.data() + buffer.size(), value, std::chars_format::fixed, decimals);
    std::string text(buffer.data(), error == std::errc() ? end : buffer.data());
    std::replace(text.begin(), text.end(), '.', style.decimal_mark);
    return text;
}

std::string large_text(double value, int decimals, const NumberStyle& style) {
    int exponent = static_cast<int>(std::floor(std::log10(value)));
    const std::string mantissa = digits_of(value / std::pow(10.0, exponent), std::min(decimals, 3), style);
    return mantissa + " × 10" + superscript(exponent, style);
}

/// Spaces inside a ratio or notation become no-break spaces. A colon, a slash or a full stop between digits is no place
/// to break a line (Unicode Standard Annex 14, rule LB25), so the rest needs nothing and stays searchable.
std::string unbroken(const std::string& notation) {
    std::string text;
    for (const char c : notation) {
        if (c == ' ') {
            text += "\u00a0";
        } else {
            text += c;
        }
    }
    return text;
}

std::string argument_text(const Argument& argument, const NumberStyle& style) {
    switch (argument.kind) {
    case ArgumentKind::Text:
        return argument.text;
    case ArgumentKind::RatioText:
        return unbroken(argument.text);
    case ArgumentKind::Count:
        return argument.count < 0 ? std::string(style.minus) + std::to_string(argument.count).substr(1)
                                  : std::to_string(argument.count);
    case ArgumentKind::Number:
        return fixed_text(argument.number, argument.decimals, style);
    case ArgumentKind::PValue:
        return p_text(argument.number, style);
    case ArgumentKind::Percent:
        return fixed_text(100.0 * argument.number, argument.decimals, style) + "%";
    }
    return {};
}

bool is_one(const Argument& argument) {
    return argument.kind == ArgumentKind::Count && argument.count == 1;
}

/// What stands between braces: "2" or "2?family|families". Empty where it is no placeholder of this message.
bool put_in(std::string_view inside, const std::vector<Argument>& arguments, const NumberStyle& style,
            std::string& text) {
    std::size_t number = 0;
    const auto [end, error] = std::from_chars(inside.data(), inside.data() + inside.size(), number);
    if (error != std::errc() || number == 0 || number > arguments.size()) {
        return false;
    }
    const Argument& argument = arguments[number - 1];
    const std::string_view rest = inside.substr(static_cast<std::size_t>(end - inside.data()));
    if (rest.empty()) {
        text += argument_text(argument, style);
        return true;
    }
    const std::size_t bar = rest.find('|');
    if (rest.front() != '?' || bar == std::string_view::npos) {
        return false;
    }
    text += is_one(argument) ? rest.substr(1, bar - 1) : rest.substr(bar + 1);
    return true;
}

} // namespace

std::size_t message_count() {
    return kEnglish.size();
}

std::string_view message_name(MessageId id) {
    return kNames.at(static_cast<std::size_t>(id));
}

std::string_view english(MessageId id) {
    return kEnglish.at(static_cast<std::size_t>(id)).text;
}

std::string render(const Message& message, const Catalogue& catalogue, const NumberStyle& style) {
    const std::string wording = catalogue ? catalogue(message.id) : std::string(english(message.id));
    std::string text;
    std::size_t at = 0;
    while (at < wording.size()) {
        const std::size_t open = wording.find('{', at);
        const std::size_t close = open == std::string::npos ? open : wording.find('}', open);
        if (close == std::string::npos) {
            return text + wording.substr(at);
        }
        text += wording.substr(at, open - at);
        const std::string_view inside = std::string_view(wording).substr(open + 1, close - open - 1);
        if (!put_in(inside, message.arguments, style, text)) {
            text += wording.substr(open, close - open + 1);
        }
        at = close + 1;
    }
    return text;
}

std::string fixed_text(double value, int decimals, const NumberStyle& style) {
    if (std::isnan(value)) {
        return "–";
    }
    if (std::isinf(value)) {
        return (value < 0 ? std::string(style.minus) : std::string()) + "∞";
    }
    const double size = std::abs(value);
    const std::string digits =
        size >= kLargestInFull ? large_text(size, decimals, style) : digits_of(size, decimals, style);
    const bool shown_as_zero = digits.find_first_of("123456789") == std::string::npos;
    return value < 0 && !shown_as_zero ? std::string(style.minus) + digits : digits;
}

std::string p_text(double p, const NumberStyle& style) {
    constexpr double smallest_shown = 0.001;
    if (p < smallest_shown) {
        return "<" + fixed_text(smallest_shown, 3, style);
    }
    return fixed_text(p, 3, style);
}

std::string statistic_text(double value, const NumberStyle& style) {
    return fixed_text(value, 3, style);
}

std::string full_text(double value) {
    std::array<char, 32> buffer{};
    const auto [end, error] = std::to_chars(buffer.data(), buffer.data() + buffer.size(), value);
    return {buffer.data(), error == std::errc() ? end : buffer.data()};
}

} // namespace filial::report
