// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/book/edit.h"

// Terms. Several edits concern a part of a family, cross or book. These give that part with the rest empty, so that
// parts can be compared, set and written without what the edit does not touch.
namespace filial::book {

[[nodiscard]] Family without_cells(const Family& family);
[[nodiscard]] Cross without_families(const Cross& cross); ///< nor hypothesis
[[nodiscard]] Book without_crosses(const Book& book);     ///< nor unknown fields
[[nodiscard]] bool same_but_crosses(const Book& left, const Book& right);
void take_all_but_crosses(Book& book, const Book& from);

/// The edit holding only what it changes; applies and reverts the same.
[[nodiscard]] Edit trimmed(Edit edit);

} // namespace filial::book
