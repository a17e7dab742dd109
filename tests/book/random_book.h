// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <random>

#include "core/book/edit.h"

// Books and edits made at random from a seed, for tests of properties that hold for every book.
namespace filial::test {

class RandomBook {
public:
    explicit RandomBook(unsigned seed) : random_(seed) {}

    book::Book book();
    /// An edit that fits the book; of any kind.
    book::Edit edit(const book::Book& book, bool macros = true);
    /// A number from 0 to `most`.
    std::size_t up_to(std::size_t most);

private:
    book::Edit edit_of_kind(std::size_t kind, const book::Book& book);
    book::Edit family_edit(std::size_t kind, const book::Book& book);
    std::string text();
    book::Id id();
    book::Cell cell();
    book::Plant plant(std::size_t classes);
    book::Family family(std::size_t classes);
    book::Cross cross(const book::Book& book);
    book::HypothesisUse hypothesis(std::size_t classes);
    std::optional<Count> maybe_count();
    void fill_shared(book::Book& book);

    std::mt19937 random_;
    unsigned long ids_ = 0;
};

} // namespace filial::test
