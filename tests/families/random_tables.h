// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstdint>
#include <string>
#include <vector>

#include "core/families/count_table.h"
#include "tests/support/oracle.h"

// Random count tables of families against a ratio: sizes from a handful of plants to thousands, ratios right and wrong,
// some columns and families empty.
namespace filial::test {

struct RandomTable {
    std::vector<std::int64_t> weights;
    std::vector<std::vector<std::int64_t>> rows;
};

/// The same tables on every machine. In each at least two families with plants, one of
/// them with two or more, and two classes with plants.
std::vector<RandomTable> random_tables(std::size_t how_many, std::uint64_t seed);

families::Shares shares_of(const std::vector<std::int64_t>& weights);

/// As the oracle scripts read it: id, families, classes, weights, counts.
Row oracle_row(const std::string& id, const RandomTable& table);

} // namespace filial::test
