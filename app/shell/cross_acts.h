// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QString>

#include "app/common/workbook.h"

class QMenu;

// What can be done to the chosen cross as a whole; each is one undoable edit.
namespace filial::app {

void duplicateCross(Workbook* workbook);
void removeCross(Workbook* workbook);
void moveCross(Workbook* workbook, int by);
void addCrossActs(QMenu& menu, Workbook* workbook);

/// "K14 × M02" of the cross' parents.
QString parentsText(const book::Book& book, const book::Cross& cross);
/// The lines of the book with these names; those that are new are added to `after`.
std::vector<book::Id> parentsNamed(const QStringList& names, book::Book& after);
/// Gives the current cross these parents, as one undo step.
void setParents(Workbook* workbook, const QStringList& names);
/// Adds a cross with its parents as one undo step and makes it current.
bool addCross(Workbook* workbook, book::Cross cross, const QStringList& parents);

} // namespace filial::app
