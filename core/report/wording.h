// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <functional>
#include <string>
#include <string_view>

#include "core/numeric/result.h"

// Terms. The wording is the one English catalogue of what core says. A catalogue maps an id to a template with
// {1}, {2} …; the window hands in a translated one.
namespace filial::report {

/// The English template of a message.
[[nodiscard]] std::string_view english(MessageId id);

struct NumberStyle {
    char decimal_mark = '.';
    std::string_view minus = "−"; ///< U+2212
};

using Catalogue = std::function<std::string(MessageId)>;

/// The sentence, with arguments put in; `catalogue` empty means English.
[[nodiscard]] std::string render(const Message& message, const Catalogue& catalogue = {},
                                 const NumberStyle& style = {});

/// Numbers as shown everywhere: P to three decimals then <0.001; a statistic to three decimals; counts plain.
[[nodiscard]] std::string p_text(double p, const NumberStyle& style = {});
[[nodiscard]] std::string statistic_text(double value, const NumberStyle& style = {});
[[nodiscard]] std::string fixed_text(double value, int decimals, const NumberStyle& style = {});
/// All digits that tell a double from its neighbours; for tooltips.
[[nodiscard]] std::string full_text(double value);

} // namespace filial::report
