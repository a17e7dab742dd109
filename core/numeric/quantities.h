// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <compare>
#include <cstddef>
#include <cstdint>
#include <optional>

// Terms. A count is a number of offspring. A probability lies in [0, 1]. A recombination fraction lies
// in [0, 1/2]. A class index numbers the phenotype classes of one cross from 0 in the order shown.
namespace filial {

/// A number of offspring, 0 to `kLargest`. One cell never holds more than `kLargestTyped`; sums may.
class Count {
public:
    static constexpr std::int64_t kLargestTyped = 1'000'000'000'000;
    static constexpr std::int64_t kLargest = 4'000'000'000'000'000;

    constexpr Count() = default;
    /// Throws std::out_of_range outside 0..kLargest: a programming error, user input goes through `from`.
    explicit Count(std::int64_t value);
    /// Empty outside 0..kLargestTyped.
    [[nodiscard]] static std::optional<Count> from(std::int64_t value);

    [[nodiscard]] constexpr std::int64_t value() const { return value_; }
    [[nodiscard]] double as_double() const { return static_cast<double>(value_); }

    Count& operator+=(Count other);
    friend Count operator+(Count left, Count right) { return left += right; }
    friend constexpr auto operator<=>(Count, Count) = default;

private:
    std::int64_t value_ = 0;
};

/// A probability in [0, 1]. The constructor throws std::out_of_range outside it, and for NaN.
class Probability {
public:
    constexpr Probability() = default;
    explicit Probability(double value);
    [[nodiscard]] static std::optional<Probability> from(double value);
    [[nodiscard]] constexpr double value() const { return value_; }
    friend constexpr auto operator<=>(Probability, Probability) = default;

private:
    double value_ = 0.0;
};

/// A recombination fraction in [0, 1/2]. The constructor throws std::out_of_range outside it, and for NaN.
class RecombinationFraction {
public:
    constexpr RecombinationFraction() = default;
    explicit RecombinationFraction(double value);
    [[nodiscard]] static std::optional<RecombinationFraction> from(double value);
    [[nodiscard]] constexpr double value() const { return value_; }
    friend constexpr auto operator<=>(RecombinationFraction, RecombinationFraction) = default;

private:
    double value_ = 0.0;
};

/// The place of a phenotype class in its cross, from 0. A distinct type, so that a class is not mistaken
/// for a term of a ratio or a family's row.
struct ClassIndex {
    std::size_t value = 0;
    friend constexpr auto operator<=>(ClassIndex, ClassIndex) = default;
};

} // namespace filial
