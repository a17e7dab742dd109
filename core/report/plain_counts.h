// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <string>
#include <vector>

#include "core/book/count_table.h"
#include "core/book/model.h"
#include "core/inheritance/hypothesis.h"

// Terms. Plain counts come without a book: as arguments, or as a table with a column a class. They know no traits, but
// a ratio that is a product over loci (9:3:3:1) tells how its classes are made of two or three, first locus slowest.
namespace filial::report {

/// Numbers of levels of the loci the hypothesis' classes are a product of ({2, 2} for 9:3:3:1); empty where it is none.
[[nodiscard]] std::vector<std::size_t> loci_levels(const inheritance::Hypothesis& hypothesis);
/// "locus A", "locus B", … as many as wanted.
[[nodiscard]] std::vector<std::string> loci_names(std::size_t count);
/// "class 1", … or the genotype classes of a cross with linkage.
[[nodiscard]] std::vector<std::string> plain_labels(const inheritance::Hypothesis& hypothesis);

/// A cross with the table's families, to be tested against `hypothesis`.
[[nodiscard]] book::Cross cross_of(book::CountTable table, const inheritance::Hypothesis& hypothesis);

} // namespace filial::report
