// SPDX-License-Identifier: GPL-3.0-or-later
#include <algorithm>
#include <cctype>
#include <limits>
#include <numeric>
#include <optional>
#include <utility>

#include <boost/multiprecision/cpp_int.hpp>

#include "core/numeric/ascii.h"
#include "core/ratio/notation.h"
#include "core/ratio/ratio.h"

namespace filial::ratio {
namespace {

using ascii::is_digit;
using ascii::is_space;

using Whole = boost::multiprecision::cpp_int;
using Exact = boost::multiprecision::cpp_rational;

// Longer numbers cannot fit a common denominator of 2^62 and would only cost time.
constexpr std::size_t kLongestTerm = 60;

struct Token {
    std::size_t place = 0;
    std::string_view text;
};

enum class Form : std::uint8_t { Integer, Decimal, Fraction, Percentage };

struct Term {
    Exact value;
    Form form = Form::Integer;
    std::string typed;
};

Argument term_number(std::size_t index) {
    return count_argument(static_cast<std::int64_t>(index + 1));
}

Token trimmed(std::string_view text, std::size_t begin, std::size_t end) {
    while (begin < end && is_space(text[begin]))
        ++begin;
    while (end > begin && is_space(text[end - 1]))
        --end;
    return {begin, text.substr(begin, end - begin)};
}

/// Whether the blank at `at` stands between two terms: "9 / 16" and "75 %" are one term each.
bool blank_separates(std::string_view text, std::size_t at) {
    std::size_t after = at;
    while (after < text.size() && is_space(text[after]))
        ++after;
    std::size_t before = at;
    while (before > 0 && is_space(text[before - 1]))
        --before;
    if (after == text.size() || before == 0)
        return false;
    return text[after] != '/' && text[after] != '%' && text[before - 1] != '/';
}

std::vector<Token> split_at(std::string_view text, char separator) {
    std::vector<Token> tokens;
    std::size_t begin = 0;
    for (std::size_t i = 0; i <= text.size(); ++i)
        if (i == text.size() || text[i] == separator) {
            tokens.push_back(trimmed(text, begin, i));
            begin = i + 1;
        }
    return tokens;
}

std::vector<Token> split_at_blanks(std::string_view text) {
    std::vector<Token> tokens;
    std::size_t begin = 0;
    for (std::size_t i = 0; i <= text.size(); ++i)
        if (i == text.size() || (is_space(text[i]) && blank_separates(text, i))) {
            if (const Token token = trimmed(text, begin, i); !token.text.empty())
                tokens.push_back(token);
            begin = i;
        }
    return tokens;
}

/// "0,75" or "0,75, 0,25": a comma meant as a decimal point would silently make more terms.
bool commas_look_decimal(std::string_view text, const std::vector<Token>& tokens) {
    bool zero_led = tokens.size() % 2 == 0;
    bool tight = false;
    bool wide = false;
    for (std::size_t i = 0; i < tokens.size(); ++i) {
        zero_led = zero_led && (i % 2 == 1 || tokens[i].text == "0");
        for (std::size_t j = 0; j < tokens[i].text.size(); ++j)
            if (is_space(tokens[i].text[j]) && blank_separates(tokens[i].text, j))
                return true;
    }
    for (std::size_t i = 0; i + 1 < text.size(); ++i)
        if (text[i] == ',')
            (is_space(text[i + 1]) ? wide : tight) = true;
    return zero_led || (tight && wide);
}

Result<std::vector<Token>> split(std::string_view text) {
    const std::size_t comma = text.find(',');
    for (const char separator : {':', ';'})
        if (text.find(separator) != std::string_view::npos) {
            if (comma != std::string_view::npos)
                return refusal_at(MessageId::RatioDecimalComma, comma);
            return split_at(text, separator);
        }
    if (comma == std::string_view::npos)
        return split_at_blanks(text);
    std::vector<Token> tokens = split_at(text, ',');
    if (commas_look_decimal(text, tokens))
        return refusal_at(MessageId::RatioDecimalComma, comma);
    return tokens;
}

std::string without_leading_zeros(std::string_view digits) {
    const std::size_t first = std::min(digits.find_first_not_of('0'), digits.size());
    return first == digits.size() ? "0" : std::string(digits.substr(first));
}

bool all_digits(std::string_view text) {
    return !text.empty() && std::all_of(text.begin(), text.end(), is_digit);
}

/// "12", "0.75" or ".75"; the tidied text goes to `tidy`.
std::optional<Exact> read_decimal(std::string_view text, std::string& tidy) {
    const std::size_t point = text.find('.');
    const std::string_view whole = text.substr(0, point);
    if (point == std::string_view::npos) {
        if (!all_digits(whole))
            return std::nullopt;
        tidy = without_leading_zeros(whole);
        return Exact(Whole(tidy));
    }
    const std::string_view part = text.substr(point + 1);
    if (!all_digits(part) || !(whole.empty() || all_digits(whole)))
        return std::nullopt;
    tidy = (whole.empty() ? "0" : without_leading_zeros(whole)) + "." + std::string(part);
    const Whole digits(without_leading_zeros(std::string(whole) + std::string(part)));
    return Exact(digits, boost::multiprecision::pow(Whole(10), static_cast<unsigned>(part.size())));
}

Error not_a_weight(const Token& token, std::size_t index) {
    if (token.text.empty())
        return refusal_at(MessageId::RatioTermMissing, token.place, {term_number(index)});
    const std::string shown(token.text.substr(0, kLongestTerm));
    if (token.text.front() == '-' || token.text.substr(0, 3) == "\xE2\x88\x92") // a typographic minus
        return refusal_at(MessageId::RatioNegativeTerm, token.place, {term_number(index), text_argument(shown)});
    return refusal_at(MessageId::RatioNotANumber, token.place, {term_number(index), text_argument(shown)});
}

Result<Term> read_fraction(const Token& token, std::size_t index) {
    const std::size_t slash = token.text.find('/');
    const std::string_view over = trimmed(token.text, 0, slash).text;
    const std::string_view under = trimmed(token.text, slash + 1, token.text.size()).text;
    if (!all_digits(over) || !all_digits(under))
        return not_a_weight(token, index);
    const std::string numerator = without_leading_zeros(over);
    const std::string denominator = without_leading_zeros(under);
    if (denominator == "0")
        return refusal_at(MessageId::RatioZeroDenominator, token.place,
                          {term_number(index), text_argument(std::string(token.text))});
    return Term{Exact(Whole(numerator), Whole(denominator)), Form::Fraction, numerator + "/" + denominator};
}

Result<Term> read_term(const Token& token, std::size_t index) {
    // A leading point is kept with a 0 before it, which counts.
    const bool bare_point = !token.text.empty() && token.text.front() == '.';
    if (token.text.size() + (bare_point ? 1 : 0) > kLongestTerm && (bare_point || is_digit(token.text.front())))
        return refusal_at(MessageId::RatioTooFine, token.place);
    if (token.text.find('/') != std::string_view::npos)
        return read_fraction(token, index);
    Term term;
    std::string_view number = token.text;
    if (!number.empty() && number.back() == '%') {
        term.form = Form::Percentage;
        number = trimmed(number, 0, number.size() - 1).text;
    }
    const auto value = read_decimal(number, term.typed);
    if (!value)
        return not_a_weight(token, index);
    if (term.form == Form::Percentage) {
        term.value = *value / 100;
        term.typed += '%';
    } else {
        term.value = *value;
        term.form = number.find('.') == std::string_view::npos ? Form::Integer : Form::Decimal;
    }
    return term;
}

Result<std::vector<Term>> read_terms(const std::vector<Token>& tokens) {
    std::vector<Term> terms;
    for (std::size_t i = 0; i < tokens.size(); ++i) {
        Result<Term> term = read_term(tokens[i], i);
        if (!term)
            return term.error();
        const bool percentage = term.value().form == Form::Percentage;
        if (i > 0 && percentage != (terms.front().form == Form::Percentage))
            return refusal_at(MessageId::RatioMixedPercentages, tokens[i].place,
                              {term_number(i), text_argument(std::string(tokens[i].text))});
        terms.push_back(std::move(term).value());
    }
    return terms;
}

/// Integer weights in lowest terms; empty where the common denominator or the sum passes 2^62.
std::vector<std::int64_t> lowest_terms(const std::vector<Term>& terms) {
    const Whole largest = Whole(1) << 62U;
    Whole denominator = 1;
    for (const Term& term : terms)
        denominator = boost::multiprecision::lcm(denominator, boost::multiprecision::denominator(term.value));
    if (denominator > largest)
        return {};
    std::vector<Whole> scaled;
    Whole divisor = 0;
    for (const Term& term : terms) {
        scaled.push_back(boost::multiprecision::numerator(term.value) *
                         (denominator / boost::multiprecision::denominator(term.value)));
        divisor = boost::multiprecision::gcd(divisor, scaled.back());
    }
    std::vector<std::int64_t> weights;
    Whole total = 0;
    for (const Whole& weight : scaled) {
        total += weight / divisor;
        if (total > largest)
            return {};
        weights.push_back(static_cast<std::int64_t>(weight / divisor));
    }
    return weights;
}

/// The sum as a decimal number of up to `decimals` places, rounded half up, without trailing zeros.
std::string decimal_text(const Exact& value, unsigned decimals) {
    const Whole scale = boost::multiprecision::pow(Whole(10), decimals);
    const Whole scaled =
        (boost::multiprecision::numerator(value) * scale * 2 + boost::multiprecision::denominator(value)) /
        (boost::multiprecision::denominator(value) * 2);
    std::string part = Whole(scaled % scale).str();
    part.insert(0, decimals - part.size(), '0');
    part.erase(part.find_last_not_of('0') + 1);
    return Whole(scaled / scale).str() + (part.empty() ? "" : "." + part);
}

std::vector<Message> sum_warnings(const std::vector<Term>& terms) {
    Exact sum = 0;
    for (const Term& term : terms)
        sum += term.value;
    const auto all = [&](Form form) {
        return std::all_of(terms.begin(), terms.end(), [form](const Term& term) { return term.form == form; });
    };
    if (all(Form::Percentage) && sum != 1)
        return {{MessageId::RatioPercentagesDoNotAdd, {text_argument(decimal_text(sum * 100, 6))}}};
    if (all(Form::Fraction) && sum != 1)
        return {{MessageId::RatioFractionsDoNotAdd, {text_argument(sum.str())}}};
    return {};
}

} // namespace

Result<Ratio> read_ratio(std::string_view text) {
    if (trimmed(text, 0, text.size()).text.empty())
        return refusal_at(MessageId::RatioEmpty, 0);
    const Result<std::vector<Token>> tokens = split(text);
    if (!tokens)
        return tokens.error();
    if (tokens.value().size() > kMostTerms)
        return refusal_at(MessageId::RatioTooManyTerms, tokens.value()[kMostTerms].place,
                          {count_argument(static_cast<std::int64_t>(tokens.value().size()))});
    const Result<std::vector<Term>> terms = read_terms(tokens.value());
    if (!terms)
        return terms.error();
    const std::size_t place = tokens.value().front().place;
    if (terms.value().size() < 2)
        return refusal_at(MessageId::RatioTooFewTerms, place);
    if (std::all_of(terms.value().begin(), terms.value().end(), [](const Term& term) { return term.value == 0; }))
        return refusal_at(MessageId::RatioAllZero, place);
    Ratio ratio;
    ratio.weights_ = lowest_terms(terms.value());
    if (ratio.weights_.empty())
        return refusal_at(MessageId::RatioTooFine, place);
    ratio.total_ = std::accumulate(ratio.weights_.begin(), ratio.weights_.end(), std::int64_t{0});
    for (const Term& term : terms.value())
        ratio.typed_.push_back(term.typed);
    ratio.notation_ = joined_notation(ratio.typed_);
    ratio.warnings_ = sum_warnings(terms.value());
    return ratio;
}

} // namespace filial::ratio
