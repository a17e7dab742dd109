// SPDX-License-Identifier: GPL-3.0-or-later
#include <algorithm>
#include <array>
#include <charconv>

#include "core/book/count_table.h"

namespace filial::book {

namespace {

Error wrong_cell(MessageId id, std::string_view found, std::size_t place) {
    return Error{ErrorKind::Input, Message{id, {text_argument(std::string(found))}}, place};
}

// What spreadsheets and phones put around a number: no-break, figure, thin and narrow no-break space.
constexpr std::array<std::string_view, 6> kSpaces{" ", "\t", "\u00A0", "\u2007", "\u2009", "\u202F"};

std::size_t space_at(std::string_view text, std::size_t at) {
    for (const std::string_view space : kSpaces)
        if (text.substr(at).starts_with(space))
            return space.size();
    return 0;
}

std::string_view trimmed_text(std::string_view text) {
    while (!text.empty() && space_at(text, 0) > 0)
        text.remove_prefix(space_at(text, 0));
    for (bool again = true; again;) {
        again = false;
        for (const std::string_view space : kSpaces)
            if (text.ends_with(space)) {
                text.remove_suffix(space.size());
                again = true;
            }
    }
    return text;
}

bool digit(char c) {
    return c >= '0' && c <= '9';
}

/// "-12" and "−12": a number below 0. "−" alone is a dash.
bool negative(std::string_view text) {
    for (const std::string_view minus : {"-", "−", "–"})
        if (text.starts_with(minus)) {
            const std::string_view rest = trimmed_text(text.substr(minus.size()));
            return !rest.empty() && (digit(rest.front()) || rest.front() == '.');
        }
    return false;
}

/// "3.5", "3,5", "1/2" and "50%": a share, or a decimal mark; "1e30" is too large and not a count.
bool fractional(std::string_view text) {
    const auto mark = text.find_first_of(".,/%");
    return mark != std::string_view::npos && std::any_of(text.begin(), text.end(), digit) &&
           std::all_of(text.begin(), text.end(),
                       [](char c) { return digit(c) || c == '.' || c == ',' || c == '/' || c == '%'; });
}

/// "1e30"; 1e2 is no way to write a count either, but it is not too large.
bool beyond_range(std::string_view text) {
    double value = 0.0;
    const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), value);
    return error == std::errc::result_out_of_range ||
           (error == std::errc{} && value > static_cast<double>(Count::kLargestTyped));
}

bool in_exponent_form(std::string_view text) {
    const auto e = text.find_first_of("eE");
    return e != std::string_view::npos && e > 0 && e + 1 < text.size() &&
           std::all_of(text.begin(), text.end(),
                       [](char c) { return digit(c) || c == '.' || c == 'e' || c == 'E' || c == '+' || c == '-'; });
}

/// Digits, where groups of three may be set apart by a thin, narrow, figure or no-break space. A plain space is not
/// taken: "31 100" is more likely two counts that went into one cell.
std::optional<std::string> digits_only(std::string_view text) {
    std::string digits;
    std::size_t since_space = 0;
    bool grouped = false;
    for (std::size_t at = 0; at < text.size();) {
        if (digit(text[at])) {
            digits += text[at++];
            ++since_space;
            continue;
        }
        const std::size_t space = text[at] == '\t' || text[at] == ' ' ? 0 : space_at(text, at);
        const bool first_group = !grouped && since_space >= 1 && since_space <= 3;
        if (space == 0 || !(first_group || (grouped && since_space == 3)))
            return std::nullopt;
        grouped = true;
        since_space = 0;
        at += space;
    }
    if (digits.empty() || (grouped && since_space != 3))
        return std::nullopt;
    return digits;
}

Result<Count> read_term(std::string_view term, std::size_t place) {
    if (negative(term))
        return wrong_cell(MessageId::CountNegative, term, place);
    const auto digits = digits_only(term);
    if (!digits) {
        if (in_exponent_form(term))
            return wrong_cell(beyond_range(term) ? MessageId::CountTooLarge : MessageId::CountNotANumber, term, place);
        return wrong_cell(fractional(term) ? MessageId::CountNotWhole : MessageId::CountNotANumber, term, place);
    }
    std::int64_t value = 0;
    for (const char c : *digits) {
        value = value * 10 + (c - '0');
        if (value > Count::kLargestTyped)
            return wrong_cell(MessageId::CountTooLarge, term, place);
    }
    return Count(value);
}

} // namespace

Result<Cell> read_cell(std::string_view text) {
    const std::string_view whole = trimmed_text(text);
    if (whole.empty())
        return Cell{};
    for (const std::string_view dash : {"–", "-", "—", "−"})
        if (whole == dash)
            return Cell{CellState::NotLooked, {}};
    Count sum;
    std::size_t begin = 0;
    while (begin <= whole.size()) {
        const std::size_t end = in_exponent_form(whole) ? whole.size() : std::min(whole.find('+', begin), whole.size());
        const std::string_view term = trimmed_text(whole.substr(begin, end - begin));
        const auto place = static_cast<std::size_t>(whole.data() - text.data()) + begin;
        Result<Count> read = read_term(term, place);
        if (!read) {
            // An empty term has nothing to show: the whole text was found.
            return term.empty() ? wrong_cell(MessageId::CountNotANumber, whole, place) : read.error();
        }
        if (sum.value() + read.value().value() > Count::kLargestTyped)
            return wrong_cell(MessageId::CountTooLarge, whole, 0);
        sum += read.value();
        begin = end + 1;
    }
    return Cell{CellState::Number, sum};
}

std::string cell_text(const Cell& cell) {
    switch (cell.state) {
    case CellState::Number:
        return std::to_string(cell.count.value());
    case CellState::NotLooked:
        return "–";
    case CellState::Blank:
        break;
    }
    return {};
}

} // namespace filial::book
