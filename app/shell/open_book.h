// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <memory>

#include <QString>

#include "core/book/session.h"

// The ways a book comes into the window. Errors are those of core/book, with their reasons.
namespace filial::app {

using OpenedSession = Result<std::unique_ptr<book::Session>>;

OpenedSession openBookFile(const QString& path);
/// A fresh unsaved book with the content of a file: samples are never overwritten.
OpenedSession openAsCopy(const QString& path);
OpenedSession newBook(const QString& title = {});

/// A cross with the classes and families of a count table in a CSV or TSV file.
Result<book::Cross> crossFromTable(const QString& path);
/// Adds a cross at the end of the book, as an edit.
book::Edit insertCross(const book::Book& book, book::Cross cross);

} // namespace filial::app
