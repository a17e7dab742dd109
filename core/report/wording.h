// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <functional>
#include <string>
#include <string_view>

#include "core/numeric/result.h"

// Terms. The wording is the one English catalogue of what core says. A catalogue maps an id to a template; the window
// hands in a translated one. A template has {1}, {2} … where the message's arguments go, each shown by its kind, and
// {1?family|families} where a word depends on whether the first argument is the count 1.
namespace filial::report {

/// How many messages there are; their ids count from 0.
[[nodiscard]] std::size_t message_count();
/// The id as written in message_ids.inc, for translators and tests.
[[nodiscard]] std::string_view message_name(MessageId id);
/// The English template of a message.
[[nodiscard]] std::string_view english(MessageId id);

struct NumberStyle {
    char decimal_mark = '.';
    std::string_view minus = "−"; ///< U+2212
};

using Catalogue = std::function<std::string(MessageId)>;

/// The sentence, with arguments put in; `catalogue` empty means English. A placeholder that has no argument stays as it
/// is written, so that a slip in a translation is seen and harms nothing.
[[nodiscard]] std::string render(const Message& message, const Catalogue& catalogue = {},
                                 const NumberStyle& style = {});

/// Numbers as shown everywhere: P to three decimals, and <0.001 for every P below 0.001; a statistic to three decimals;
/// counts plain. Nothing is ever shown as a negative zero; from 10^15 a power of ten is shown; NaN is "–".
[[nodiscard]] std::string p_text(double p, const NumberStyle& style = {});
[[nodiscard]] std::string statistic_text(double value, const NumberStyle& style = {});
[[nodiscard]] std::string fixed_text(double value, int decimals, const NumberStyle& style = {});
/// The fewest digits that read back to the identical double, with a plain hyphen for minus; for tooltips and exports.
[[nodiscard]] std::string full_text(double value);

} // namespace filial::report
