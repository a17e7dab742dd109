// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/numeric/quantities.h"

#include <stdexcept>

namespace filial {

Count::Count(std::int64_t value) : value_(value) {
    if (value < 0 || value > kLargest)
        throw std::out_of_range("a count lies between 0 and the largest count");
}

std::optional<Count> Count::from(std::int64_t value) {
    if (value < 0 || value > kLargestTyped)
        return std::nullopt;
    return Count(value);
}

Count& Count::operator+=(Count other) {
    *this = Count(value_ + other.value_);
    return *this;
}

Probability::Probability(double value) : value_(value) {
    if (!(value >= 0.0 && value <= 1.0))
        throw std::out_of_range("a probability lies between 0 and 1");
}

std::optional<Probability> Probability::from(double value) {
    if (!(value >= 0.0 && value <= 1.0))
        return std::nullopt;
    return Probability(value);
}

RecombinationFraction::RecombinationFraction(double value) : value_(value) {
    if (!(value >= 0.0 && value <= 0.5))
        throw std::out_of_range("a recombination fraction lies between 0 and 1/2");
}

std::optional<RecombinationFraction> RecombinationFraction::from(double value) {
    if (!(value >= 0.0 && value <= 0.5))
        return std::nullopt;
    return RecombinationFraction(value);
}

} // namespace filial
