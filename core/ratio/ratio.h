// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <cstdint>
#include <span>
#include <string>
#include <string_view>
#include <vector>

#include "core/numeric/result.h"

// Terms. A ratio is an ordered list of terms; a term has an exact weight (9 of 16) and may have a label.
// A forbidden class has weight 0. The notation is what a person types: 9:3:3:1, 9 3 3 1, 9/16, 7/16,
// 0.75:0.25, 75%:25%.
namespace filial::ratio {

inline constexpr std::size_t kMostTerms = 64;

class Ratio {
public:
    /// Integer weights as they stand; 2 to 64 of them, not all zero, none negative.
    [[nodiscard]] static Result<Ratio> from_weights(std::vector<std::int64_t> weights);

    [[nodiscard]] std::size_t size() const { return weights_.size(); }
    /// Integer weights in lowest terms (9, 3, 3, 1), whatever was typed (0.5625:…, 9/16, …).
    [[nodiscard]] const std::vector<std::int64_t>& weights() const { return weights_; }
    /// Sum of `weights()`; at most 2^62.
    [[nodiscard]] std::int64_t total() const { return total_; }
    [[nodiscard]] double probability(std::size_t term) const;
    [[nodiscard]] std::vector<double> probabilities() const;
    /// The ratio as typed, tidied to one form ("10:6" stays "10:6"); reads back to an equal ratio.
    [[nodiscard]] const std::string& notation() const { return notation_; }
    /// One term as shown beside a class: "9 of 16", or as typed where it was a decimal or a percentage.
    [[nodiscard]] std::string term_text(std::size_t term) const;
    /// The same terms in another order: term i is this ratio's term order[i]. `order` names every term once; anything
    /// else throws std::invalid_argument.
    [[nodiscard]] Ratio permuted(std::span<const std::size_t> order) const;
    /// Percentages that did not add to 100, or fractions that did not add to 1, and were scaled; warnings to show.
    [[nodiscard]] const std::vector<Message>& warnings() const { return warnings_; }

    /// Equality on lowest terms: 10:6 equals 5:3.
    friend bool operator==(const Ratio& left, const Ratio& right) { return left.weights_ == right.weights_; }

private:
    friend Result<Ratio> read_ratio(std::string_view);
    Ratio() = default;
    std::vector<std::int64_t> weights_;
    std::vector<std::string> typed_; ///< each term as typed
    std::int64_t total_ = 0;
    std::string notation_;
    std::vector<Message> warnings_;
};

/// Reads the notation above. Terms are separated by one of : ; , or by blanks, never mixed; the decimal sign is a point
/// (a decimal comma is refused by name). Errors carry the byte place of the offending term and what is allowed:
/// negative, NaN or other text, all zero, fewer than two or more than 64 terms, weights whose common denominator or sum
/// passes 2^62, percentages mixed with other terms.
[[nodiscard]] Result<Ratio> read_ratio(std::string_view text);

} // namespace filial::ratio
