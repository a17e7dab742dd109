// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <cstdint>
#include <string>
#include <utility>
#include <vector>

// Terms. A message is what core has to say to a person: an id and typed arguments, no sentence. The one
// English catalogue that turns ids into sentences is core/report/wording; the window may hand in another.
namespace filial {

/// Every message core can give. One line per message in core/report/wording_en.inc, in the same order; a test
/// checks that none is missing. Grouped by the folder that raises it.
enum class MessageId : std::uint16_t {
#define FILIAL_MESSAGE(name) name,
#include "core/numeric/message_ids.inc"
#undef FILIAL_MESSAGE
};

/// How an argument is to be shown. The value itself stays exact.
enum class ArgumentKind : std::uint8_t {
    Text,      ///< shown as it is: a label, what was typed
    RatioText, ///< a ratio or notation; never broken across lines
    Count,     ///< whole number
    Number,    ///< real number, shown with `decimals`
    PValue,    ///< a P: three decimals, then <0.001
    Percent,   ///< a share in 0..1 shown as a percentage with `decimals`
};

struct Argument {
    ArgumentKind kind = ArgumentKind::Text;
    std::string text;       ///< Text, RatioText
    std::int64_t count = 0; ///< Count
    double number = 0.0;    ///< Number, PValue, Percent
    int decimals = 0;       ///< Number, Percent

    friend bool operator==(const Argument&, const Argument&) = default;
};

[[nodiscard]] Argument text_argument(std::string text);
[[nodiscard]] Argument ratio_argument(std::string notation);
[[nodiscard]] Argument count_argument(std::int64_t count);
/// A count argument from a size or a place.
[[nodiscard]] Argument size_argument(std::size_t size);
[[nodiscard]] Argument number_argument(double number, int decimals);
[[nodiscard]] Argument p_argument(double p);
[[nodiscard]] Argument percent_argument(double share, int decimals);

struct Message {
    MessageId id{};
    std::vector<Argument> arguments; ///< {1}, {2}, … in the wording

    friend bool operator==(const Message&, const Message&) = default;
};

/// A message without arguments.
[[nodiscard]] Message plain_message(MessageId id);

} // namespace filial
