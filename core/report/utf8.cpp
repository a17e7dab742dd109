// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/report/utf8.h"

#include <algorithm>
#include <array>

namespace filial::report {

namespace {

constexpr char32_t kReplacement = 0xFFFD;

struct Span {
    char32_t first, last;
};

bool in_any(char32_t c, const Span* begin, const Span* end) {
    return std::any_of(begin, end, [c](const Span& span) { return c >= span.first && c <= span.last; });
}

/// Length of the sequence a lead byte opens, or 0.
std::size_t sequence_length(unsigned char lead) {
    if (lead < 0x80) {
        return 1;
    }
    if (lead >= 0xC2 && lead < 0xE0) {
        return 2;
    }
    if (lead >= 0xE0 && lead < 0xF0) {
        return 3;
    }
    return lead >= 0xF0 && lead < 0xF5 ? 4 : 0;
}

/// The code point at the start of `text`, or U+FFFD with length 1 (overlong forms, surrogates and stray bytes).
char32_t decode(std::string_view text, std::size_t& length) {
    const auto byte = [&](std::size_t i) { return static_cast<unsigned char>(text[i]); };
    const std::size_t wanted = sequence_length(byte(0));
    length = 1;
    if (wanted == 1) {
        return byte(0);
    }
    if (wanted == 0 || wanted > text.size()) {
        return kReplacement;
    }
    char32_t c = static_cast<char32_t>(byte(0) & (0xFFU >> (wanted + 1)));
    for (std::size_t i = 1; i < wanted; ++i) {
        if ((byte(i) & 0xC0U) != 0x80U) {
            return kReplacement;
        }
        c = (c << 6U) | (byte(i) & 0x3FU);
    }
    static constexpr std::array<char32_t, 5> smallest{0, 0, 0x80, 0x800, 0x10000};
    if (c < smallest[wanted] || (c >= 0xD800 && c <= 0xDFFF) || c > 0x10FFFF) {
        return kReplacement;
    }
    length = wanted;
    return c;
}

bool is_space_like(char32_t c) {
    return c == '\t' || c == '\n' || c == '\r' || c == 0x2028 || c == 0x2029;
}

bool is_control(char32_t c) {
    return c < 0x20 || (c >= 0x7F && c < 0xA0) || c == 0xFFFE || c == 0xFFFF;
}

std::size_t cells(char32_t c) {
    static constexpr std::array<Span, 5> none{
        {{0x300, 0x36F}, {0x200B, 0x200F}, {0x202A, 0x202E}, {0x2060, 0x2069}, {0xFE00, 0xFE0F}}};
    static constexpr std::array<Span, 6> two{
        {{0x1100, 0x115F}, {0x2E80, 0xA4CF}, {0xAC00, 0xD7A3}, {0xF900, 0xFAFF}, {0xFF00, 0xFF60}, {0x1F300, 0x1FAFF}}};
    if (in_any(c, none.begin(), none.end())) {
        return 0;
    }
    return in_any(c, two.begin(), two.end()) ? 2 : 1;
}

} // namespace

std::vector<char32_t> code_points(std::string_view text) {
    std::vector<char32_t> points;
    while (!text.empty()) {
        std::size_t length = 1;
        points.push_back(decode(text, length));
        text.remove_prefix(length);
    }
    return points;
}

void append_utf8(std::string& text, char32_t c) {
    const auto tail = [&](unsigned shift) { text += static_cast<char>(0x80U | ((c >> shift) & 0x3FU)); };
    if (c < 0x80) {
        text += static_cast<char>(c);
    } else if (c < 0x800) {
        text += static_cast<char>(0xC0U | (c >> 6U));
        tail(0);
    } else if (c < 0x10000) {
        text += static_cast<char>(0xE0U | (c >> 12U));
        tail(6);
        tail(0);
    } else {
        text += static_cast<char>(0xF0U | (c >> 18U));
        tail(12);
        tail(6);
        tail(0);
    }
}

std::string clean_line(std::string_view text) {
    std::string clean;
    for (const char32_t c : code_points(text)) {
        if (is_space_like(c)) {
            clean += ' ';
        } else {
            append_utf8(clean, is_control(c) ? kReplacement : c);
        }
    }
    return clean;
}

std::size_t display_width(std::string_view text) {
    std::size_t width = 0;
    for (const char32_t c : code_points(text)) {
        width += cells(c);
    }
    return width;
}

} // namespace filial::report
