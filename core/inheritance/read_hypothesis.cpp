// SPDX-License-Identifier: GPL-3.0-or-later
#include <algorithm>
#include <charconv>
#include <cmath>
#include <utility>

#include "core/inheritance/hypothesis.h"

#include "core/numeric/ascii.h"

namespace filial::inheritance {
namespace {

using ascii::is_letter;
using ascii::is_space;
using ascii::lower;

struct Piece {
    std::size_t place = 0;
    std::string text;
};

Piece trimmed(std::string_view text, std::size_t begin, std::size_t end) {
    while (begin < end && is_space(text[begin]))
        ++begin;
    while (end > begin && is_space(text[end - 1]))
        --end;
    return {begin, std::string(text.substr(begin, end - begin))};
}

/// The value after "r=": nothing for "fit".
Result<std::optional<RecombinationFraction>> read_r(const Piece& value) {
    if (lower(value.text) == "fit")
        return std::optional<RecombinationFraction>{};
    double number = 0.0;
    const char* end = value.text.data() + value.text.size();
    const auto read = std::from_chars(value.text.data(), end, number);
    if (read.ec == std::errc::result_out_of_range || (read.ec == std::errc{} && read.ptr == end)) {
        const auto r = read.ec == std::errc{} ? RecombinationFraction::from(number) : std::nullopt;
        if (r && !std::signbit(number))
            return std::optional(*r);
        if (!std::isnan(number))
            return refusal_at(MessageId::HypothesisROutside, value.place, {text_argument(value.text)});
    }
    return refusal_at(MessageId::HypothesisRNotANumber, value.place, {text_argument(value.text)});
}

struct Arguments {
    std::optional<Phase> phase;
    bool has_r = false;
    std::optional<RecombinationFraction> r;
};

Done read_argument(const Piece& piece, Arguments& into) {
    const std::string word = lower(piece.text);
    if (word == "coupling" || word == "repulsion") {
        if (into.phase)
            return refusal_at(MessageId::HypothesisPhaseTwice, piece.place);
        into.phase = word == "coupling" ? Phase::Coupling : Phase::Repulsion;
        return done();
    }
    const std::size_t equals = word.find('=');
    if (equals == std::string::npos || trimmed(word, 0, equals).text != "r")
        return refusal_at(MessageId::HypothesisUnknownArgument, piece.place, {text_argument(piece.text)});
    if (into.has_r)
        return refusal_at(MessageId::HypothesisRTwice, piece.place);
    Piece value = trimmed(piece.text, equals + 1, piece.text.size());
    value.place += piece.place;
    const auto r = read_r(value);
    if (!r)
        return r.error();
    into.has_r = true;
    into.r = r.value();
    return done();
}

Result<Arguments> read_arguments(std::string_view text, std::size_t open, std::size_t close) {
    Arguments arguments;
    std::size_t begin = open + 1;
    for (std::size_t i = begin; i <= close; ++i) {
        if (i != close && text[i] != ',')
            continue;
        const Piece piece = trimmed(text, begin, i);
        begin = i + 1;
        if (piece.text.empty() && i == close)
            break;
        if (const Done read = read_argument(piece, arguments); !read)
            return read.error();
    }
    if (!arguments.phase)
        return refusal_at(MessageId::HypothesisMissingPhase, open + 1);
    if (!arguments.has_r)
        return refusal_at(MessageId::HypothesisMissingR, close);
    return arguments;
}

Result<Hypothesis> read_cross(std::string_view text, std::size_t start) {
    const std::size_t open = text.find('(', start);
    const Piece name = trimmed(text, start, std::min(open, text.size()));
    const std::string word = lower(name.text);
    if (word != "f2" && word != "testcross")
        return refusal_at(MessageId::HypothesisUnknownCross, name.place, {text_argument(name.text)});
    if (open == std::string_view::npos)
        return refusal_at(MessageId::HypothesisMissingOpening, name.place + name.text.size(), {text_argument(word)});
    const std::size_t close = text.find(')', open);
    if (close == std::string_view::npos)
        return refusal_at(MessageId::HypothesisMissingClosing, text.size());
    if (const Piece rest = trimmed(text, close + 1, text.size()); !rest.text.empty())
        return refusal_at(MessageId::HypothesisTextAfter, rest.place, {text_argument(rest.text)});
    const Result<Arguments> arguments = read_arguments(text, open, close);
    if (!arguments)
        return arguments.error();
    return Hypothesis::from_linked_cross(
        {word == "f2" ? CrossKind::F2 : CrossKind::TestCross, *arguments.value().phase, arguments.value().r});
}

} // namespace

Result<Hypothesis> read_hypothesis(std::string_view text) {
    std::size_t start = 0;
    while (start < text.size() && is_space(text[start]))
        ++start;
    if (start < text.size() && is_letter(text[start]) && lower(std::string(text.substr(start, 3))) != "nan")
        return read_cross(text, start);
    Result<ratio::Ratio> ratio = ratio::read_ratio(text);
    if (!ratio)
        return ratio.error();
    return Hypothesis::from_ratio(std::move(ratio).value());
}

} // namespace filial::inheritance
