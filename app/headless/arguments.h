// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <map>
#include <set>
#include <span>
#include <string>
#include <vector>

#include "core/numeric/result.h"

// Terms. An option starts with two hyphens and is followed by its value (`--ratio 3:1` or `--ratio=3:1`), unless it is
// a switch. Everything else is a plain argument; a negative number is one too, so that it is refused as a count.
namespace filial::app {

struct OptionNames {
    std::set<std::string> valued;
    std::set<std::string> switches;
    std::set<std::string> repeatable; ///< of the valued ones
};

struct Arguments {
    std::vector<std::string> plain;
    std::map<std::string, std::vector<std::string>> values;
    std::set<std::string> switches;

    [[nodiscard]] bool has(const std::string& option) const;
    /// The value of an option, or empty where it was not given.
    [[nodiscard]] std::optional<std::string> value(const std::string& option) const;
};

/// Errors name the option: not one of the verb's, without its value, or given twice.
[[nodiscard]] Result<Arguments> read_arguments(const std::string& verb, std::span<const std::string> arguments,
                                               const OptionNames& names);

/// An error whose sentence says the place first: "filial: option --alpha: …".
[[nodiscard]] Error error_at(const std::string& place, const Error& error);
[[nodiscard]] Error error_at(const std::string& place, Message message, ErrorKind kind = ErrorKind::Input);
/// "option --ratio", "option --ratio, character 5".
[[nodiscard]] std::string option_place(const std::string& option, const Error& error = {});
[[nodiscard]] std::string argument_place(std::size_t index, const std::string& text);

/// A number typed as an option's value; the whole text has to be one. Empty otherwise (and for NaN and infinity).
[[nodiscard]] std::optional<double> read_number(const std::string& text);
[[nodiscard]] std::optional<std::uint64_t> read_whole(const std::string& text);
[[nodiscard]] std::vector<std::string> split_at_commas(const std::string& text);

} // namespace filial::app
