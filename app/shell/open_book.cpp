// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/shell/open_book.h"

#include <QFileInfo>

#include "app/shell/places.h"
#include "core/book/count_table.h"

namespace filial::app {
namespace {

/// Traits and classes for the labels of a table: one trait, the labels its levels.
void giveClasses(book::Cross& cross, const std::vector<std::string>& labels) {
    book::Trait trait;
    trait.name = "class";
    for (const std::string& label : labels)
        trait.levels.push_back({label, {}});
    cross.traits = {trait};
    cross.classes = book::product_classes(cross.traits);
}

} // namespace

OpenedSession openBookFile(const QString& path) {
    return book::Session::open(book::disk(), sessionPlaces(), QFileInfo(path).absoluteFilePath().toStdString());
}

OpenedSession openAsCopy(const QString& path) {
    Result<book::OpenedBook> opened = book::open_book(book::disk(), path.toStdString());
    if (!opened)
        return opened.error();
    book::Book copy = std::move(opened.value().book);
    copy.id = book::new_id();
    if (copy.title.empty())
        copy.title = QFileInfo(path).completeBaseName().toStdString();
    return book::Session::create(book::disk(), sessionPlaces(), std::move(copy));
}

OpenedSession newBook(const QString& title) {
    book::Book fresh;
    fresh.id = book::new_id();
    fresh.title = title.toStdString();
    return book::Session::create(book::disk(), sessionPlaces(), std::move(fresh));
}

Result<book::Cross> crossFromTable(const QString& path) {
    Result<std::string> text = book::disk().read(path.toStdString(), book::kLargestFile);
    if (!text)
        return text.error();
    Result<book::CountTable> table = book::read_count_table(text.value());
    if (!table)
        return table.error();
    book::Cross cross;
    cross.id = book::new_id();
    cross.name = QFileInfo(path).completeBaseName().toStdString();
    giveClasses(cross, table.value().class_labels);
    cross.families = std::move(table.value().families);
    return cross;
}

book::Edit insertCross(const book::Book& book, book::Cross cross) {
    return book::Edit{book::InsertCross{book.crosses.size(), std::move(cross)}};
}

} // namespace filial::app
