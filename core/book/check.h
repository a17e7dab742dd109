// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>

#include "core/book/model.h"
#include "core/numeric/result.h"

// Terms. A sound book is one that can be written and read back: as many cells as classes, levels that exist, ids that
// are unique, parents that are lines of the book. Reading checks it, and so does every edit; a book that was edited can
// therefore always be read again.
namespace filial::book {

/// Whether a cell can stand in a table: a number within the range of a typed count, and no number where none is meant.
[[nodiscard]] Done check_cell(const Cell& cell, const std::string& path);
[[nodiscard]] Done check_plant(const Plant& plant, std::size_t class_count, const std::string& path);
/// Everything of a family that its cross decides. `path` is put before the place in the error ("crosses[0].").
[[nodiscard]] Done check_family(const Family& family, std::size_t class_count, const std::string& path);
/// Everything of a cross that it decides alone: classes, families, hypothesis.
[[nodiscard]] Done check_cross(const Cross& cross, const std::string& path);
/// The parents of a cross are lines of the book.
[[nodiscard]] Done check_parents(const Book& book, const Cross& cross, const std::string& path);
/// The whole book, with its ids.
[[nodiscard]] Done check_book(const Book& book);
/// Ids are 1 to 64 of a–z, A–Z, 0–9, - and _.
[[nodiscard]] bool id_sound(const Id& id);
/// Whether any cross, family, line, hypothesis, plan or import of the book has this id.
[[nodiscard]] bool id_taken(const Book& book, const Id& id);

/// "crosses[3]" and the like.
[[nodiscard]] std::string indexed(const std::string& path, std::size_t index);

} // namespace filial::book
