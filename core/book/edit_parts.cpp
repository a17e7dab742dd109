// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/book/edit_parts.h"

namespace filial::book {

Family without_cells(const Family& family) {
    Family part;
    part.id = family.id;
    part.label = family.label;
    part.not_scored = family.not_scored;
    part.sown = family.sown;
    part.emerged = family.emerged;
    part.alive = family.alive;
    part.tags = family.tags;
    part.note = family.note;
    part.date = family.date;
    part.who = family.who;
    part.set_aside = family.set_aside;
    part.dismissed_hints = family.dismissed_hints;
    part.complete_at = family.complete_at;
    return part;
}

Cross without_families(const Cross& cross) {
    Cross part;
    part.id = cross.id;
    part.name = cross.name;
    part.generation = cross.generation;
    part.parents = cross.parents;
    part.date = cross.date;
    part.who = cross.who;
    part.note = cross.note;
    part.stage = cross.stage;
    part.traits = cross.traits;
    part.classes = cross.classes;
    return part;
}

Book without_crosses(const Book& book) {
    Book part;
    part.id = book.id;
    take_all_but_crosses(part, book);
    return part;
}

bool same_but_crosses(const Book& left, const Book& right) {
    return left.title == right.title && left.note == right.note && left.lines == right.lines &&
           left.hypotheses == right.hypotheses && left.plans == right.plans && left.imports == right.imports;
}

void take_all_but_crosses(Book& book, const Book& from) {
    book.title = from.title;
    book.note = from.note;
    book.lines = from.lines;
    book.hypotheses = from.hypotheses;
    book.plans = from.plans;
    book.imports = from.imports;
}

Edit trimmed(Edit edit) {
    if (auto* family = std::get_if<SetFamily>(&edit.change)) {
        family->before = without_cells(family->before);
        family->after = without_cells(family->after);
    } else if (auto* cross = std::get_if<SetCross>(&edit.change)) {
        cross->before = without_families(cross->before);
        cross->after = without_families(cross->after);
    } else if (auto* book = std::get_if<SetBook>(&edit.change)) {
        book->before = without_crosses(book->before);
        book->after = without_crosses(book->after);
    } else if (auto* macro = std::get_if<Macro>(&edit.change)) {
        for (Edit& one : macro->edits)
            one = trimmed(std::move(one));
    }
    return edit;
}

} // namespace filial::book
