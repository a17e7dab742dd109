// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QString>
#include <QStringList>

#include "core/book/session.h"

// Terms. Where things are: journals of unsaved books (the user's state folder), the sample books (beside the source or
// installed), and the books opened lately.
namespace filial::app {

/// Made when missing; nobody but the user may look into it.
book::Session::Places sessionPlaces();

/// The sample books found, by path, in the order of their names.
QStringList sampleBooks();

QStringList recentBooks(); ///< newest first; only those still there
void rememberBook(const QString& path);

} // namespace filial::app
