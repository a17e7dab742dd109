// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/families/random_tables.h"

#include <array>
#include <numeric>

#include <gtest/gtest.h>

namespace filial::test {
namespace {

// splitmix64: the standard engines' distributions differ between libraries, and the tables must not.
class Numbers {
public:
    explicit Numbers(std::uint64_t seed) : state_(seed) {}
    std::uint64_t next() {
        std::uint64_t z = (state_ += 0x9e3779b97f4a7c15ULL);
        z = (z ^ (z >> 30U)) * 0xbf58476d1ce4e5b9ULL;
        z = (z ^ (z >> 27U)) * 0x94d049bb133111ebULL;
        return z ^ (z >> 31U);
    }
    std::int64_t below(std::int64_t limit) {
        return static_cast<std::int64_t>(next() % static_cast<std::uint64_t>(limit));
    }

private:
    std::uint64_t state_;
};

// Each plant falls into a class by the weights; then, for one table in three, every class is stretched so that the
// ratio is wrong or the families differ.
std::vector<std::int64_t> family(Numbers& numbers, const std::vector<std::int64_t>& weights, bool stretch) {
    const std::array<std::int64_t, 6> sizes{4, 12, 40, 60, 160, 900};
    const std::int64_t plants = 1 + numbers.below(sizes.at(static_cast<std::size_t>(numbers.below(6))));
    const auto whole = std::accumulate(weights.begin(), weights.end(), std::int64_t{0});
    std::vector<std::int64_t> row(weights.size(), 0);
    for (std::int64_t i = 0; i < plants; ++i) {
        std::int64_t at = numbers.below(whole);
        std::size_t c = 0;
        while (at >= weights[c])
            at -= weights[c++];
        ++row[c];
    }
    if (stretch)
        for (auto& count : row)
            count *= 1 + numbers.below(3);
    return row;
}

bool usable(const RandomTable& table) {
    const families::CountTable counts(table.rows);
    return counts.families_with_plants() >= 2 && counts.classes_with_plants() >= 2 &&
           counts.total() > static_cast<std::int64_t>(counts.families_with_plants());
}

} // namespace

std::vector<RandomTable> random_tables(std::size_t how_many, std::uint64_t seed) {
    const std::vector<std::vector<std::int64_t>> ratios{
        {3, 1},       {1, 1},  {1, 2, 1}, {9, 3, 3, 1}, {9, 7},
        {1, 1, 1, 1}, {15, 1}, {9, 3, 4}, {63, 1},      {27, 9, 9, 9, 3, 3, 3, 1},
        {12, 3, 1}};
    Numbers numbers(seed);
    std::vector<RandomTable> tables;
    while (tables.size() < how_many) {
        RandomTable table;
        table.weights = ratios[static_cast<std::size_t>(numbers.below(static_cast<std::int64_t>(ratios.size())))];
        const std::int64_t families = 2 + numbers.below(11);
        const bool stretch = numbers.below(3) == 0;
        for (std::int64_t j = 0; j < families; ++j)
            table.rows.push_back(numbers.below(20) == 0 ? std::vector<std::int64_t>(table.weights.size(), 0)
                                                        : family(numbers, table.weights, stretch));
        if (usable(table))
            tables.push_back(std::move(table));
    }
    return tables;
}

families::Shares shares_of(const std::vector<std::int64_t>& weights) {
    families::Shares shares;
    shares.weights = weights;
    shares.weight_total = std::accumulate(weights.begin(), weights.end(), std::int64_t{0});
    for (const auto weight : weights)
        shares.p.push_back(static_cast<double>(weight) / static_cast<double>(shares.weight_total));
    return shares;
}

Row oracle_row(const std::string& id, const RandomTable& table) {
    Row row{id, std::to_string(table.rows.size()), std::to_string(table.weights.size())};
    for (const auto weight : table.weights)
        row.push_back(std::to_string(weight));
    for (const auto& counts : table.rows)
        for (const auto count : counts)
            row.push_back(std::to_string(count));
    return row;
}

namespace {

TEST(RandomTablesTest, AreMixedAndTheSameEveryTime) {
    const auto tables = random_tables(300, 7);
    EXPECT_EQ(tables.front().rows, random_tables(1, 7).front().rows);
    std::size_t with_empty_family = 0, with_empty_class = 0, small = 0;
    for (const auto& table : tables) {
        const families::CountTable counts(table.rows);
        with_empty_family += counts.families_with_plants() < table.rows.size() ? 1U : 0U;
        with_empty_class += counts.classes_with_plants() < table.weights.size() ? 1U : 0U;
        small += counts.total() < 60 ? 1U : 0U;
    }
    EXPECT_GT(with_empty_family, 10U);
    EXPECT_GT(with_empty_class, 5U);
    EXPECT_GT(small, 10U);
}

} // namespace
} // namespace filial::test
