// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <cstdint>
#include <optional>
#include <utility>
#include <variant>
#include <vector>

#include "core/numeric/message.h"

// Terms. Errors in what a user gave are values: a `Result` holds either what was asked for or an `Error`
// that says where, what was found and what is allowed. Exceptions are for programming errors.
namespace filial {

enum class ErrorKind : std::uint8_t {
    Input, ///< what was given is wrong (headless exit status 2)
    File,  ///< a file could not be read or written (headless exit status 3)
};

struct Error {
    ErrorKind kind = ErrorKind::Input;
    Message message;
    /// The place in a typed text, in bytes from its start, where one is known; for marking it in an editor.
    std::optional<std::size_t> place;

    friend bool operator==(const Error&, const Error&) = default;
};

/// An input error, and one with the byte place of what is wrong.
[[nodiscard]] inline Error refusal(MessageId id, std::vector<Argument> arguments = {}) {
    return Error{ErrorKind::Input, Message{id, std::move(arguments)}, std::nullopt};
}
[[nodiscard]] inline Error refusal_at(MessageId id, std::optional<std::size_t> place,
                                      std::vector<Argument> arguments = {}) {
    return Error{ErrorKind::Input, Message{id, std::move(arguments)}, place};
}

template <class T> class [[nodiscard]] Result {
public:
    Result(T value) : content_(std::move(value)) {}     // NOLINT: implicit by design, so `return value;` reads well
    Result(Error error) : content_(std::move(error)) {} // NOLINT: likewise

    [[nodiscard]] bool ok() const { return std::holds_alternative<T>(content_); }
    explicit operator bool() const { return ok(); }
    [[nodiscard]] const T& value() const& { return std::get<T>(content_); }
    [[nodiscard]] T& value() & { return std::get<T>(content_); }
    [[nodiscard]] T&& value() && { return std::get<T>(std::move(content_)); }
    [[nodiscard]] const Error& error() const { return std::get<Error>(content_); }

private:
    std::variant<T, Error> content_;
};

/// A result without a value: done, or the error.
using Done = Result<std::monostate>;
[[nodiscard]] inline Done done() {
    return Done(std::monostate{});
}

/// A quantity that may be absent, with the reason when it is: what does not apply, or cannot be computed.
template <class T> struct Maybe {
    std::optional<T> value;
    Message why_not; ///< meaningful only where `value` is empty

    Maybe() : why_not{MessageId::NotComputed, {}} {}
    Maybe(T v) : value(std::move(v)), why_not{} {}        // NOLINT: implicit by design
    Maybe(Message reason) : why_not(std::move(reason)) {} // NOLINT: implicit by design
    [[nodiscard]] bool has_value() const { return value.has_value(); }
    explicit operator bool() const { return has_value(); }
    const T& operator*() const { return *value; }
    const T* operator->() const { return &*value; }
};

} // namespace filial
