// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/shell/cross_acts.h"

#include <algorithm>

#include <QCoreApplication>
#include <QMenu>
#include <QStringList>

namespace filial::app {
namespace {

QString tr(const char* text) {
    return QCoreApplication::translate("CrossActs", text);
}

std::optional<std::size_t> currentIndex(const Workbook& workbook) {
    const auto& crosses = workbook.book().crosses;
    for (std::size_t i = 0; i < crosses.size(); ++i)
        if (crosses[i].id == workbook.currentCrossId())
            return i;
    return std::nullopt;
}

book::Book withoutCrosses(const book::Book& book) {
    book::Book bare;
    bare.id = book.id;
    bare.title = book.title;
    bare.note = book.note;
    bare.lines = book.lines;
    bare.hypotheses = book.hypotheses;
    bare.plans = book.plans;
    bare.imports = book.imports;
    bare.unknown_fields = book.unknown_fields;
    return bare;
}

} // namespace

void duplicateCross(Workbook* workbook) {
    const auto at = currentIndex(*workbook);
    if (!at)
        return;
    book::Cross copy = workbook->book().crosses[*at];
    copy.id = book::new_id();
    copy.name = tr("%1, copy").arg(QString::fromStdString(copy.name)).toStdString();
    for (book::Family& family : copy.families)
        family.id = book::new_id();
    const book::Id id = copy.id;
    if (workbook->perform({book::InsertCross{*at + 1, std::move(copy)}}))
        workbook->setCurrentCross(id);
}

void removeCross(Workbook* workbook) {
    const auto at = currentIndex(*workbook);
    if (!at)
        return;
    const book::Cross gone = workbook->book().crosses[*at];
    if (workbook->perform({book::RemoveCross{*at, gone}}))
        Q_EMIT workbook->said(tr("Removed %1. Ctrl+Z brings it back.").arg(QString::fromStdString(gone.name)));
}

void moveCross(Workbook* workbook, int by) {
    const auto at = currentIndex(*workbook);
    if (!at)
        return;
    const auto to = static_cast<std::ptrdiff_t>(*at) + by;
    if (to < 0 || to >= static_cast<std::ptrdiff_t>(workbook->book().crosses.size()))
        return;
    workbook->perform({book::MoveCross{*at, static_cast<std::size_t>(to)}});
}

void addCrossActs(QMenu& menu, Workbook* workbook) {
    menu.addAction(tr("Duplicate"), workbook, [workbook] { duplicateCross(workbook); });
    menu.addAction(tr("Move up\tAlt+Up"), workbook, [workbook] { moveCross(workbook, -1); });
    menu.addAction(tr("Move down\tAlt+Down"), workbook, [workbook] { moveCross(workbook, 1); });
    menu.addSeparator();
    menu.addAction(tr("Remove from the book\tDel"), workbook, [workbook] { removeCross(workbook); });
}

QString parentsText(const book::Book& book, const book::Cross& cross) {
    QStringList names;
    for (const book::Id& parent : cross.parents)
        for (const book::Line& line : book.lines)
            if (line.id == parent)
                names << QString::fromStdString(line.name);
    return names.join(QStringLiteral(" × "));
}

std::vector<book::Id> parentsNamed(const QStringList& names, book::Book& after) {
    std::vector<book::Id> parents;
    for (const QString& given : names) {
        const std::string name = given.trimmed().toStdString();
        if (name.empty())
            continue;
        const auto known = std::find_if(after.lines.begin(), after.lines.end(),
                                        [&name](const book::Line& line) { return line.name == name; });
        if (known != after.lines.end()) {
            parents.push_back(known->id);
            continue;
        }
        after.lines.push_back({book::new_id(), name, {}});
        parents.push_back(after.lines.back().id);
    }
    return parents;
}

void setParents(Workbook* workbook, const QStringList& names) {
    const book::Cross* cross = workbook->currentCross();
    if (cross == nullptr)
        return;
    const book::Book before = withoutCrosses(workbook->book());
    book::Book after = before;
    book::Cross was = *cross;
    was.families.clear();
    book::Cross is = was;
    is.parents = parentsNamed(names, after);
    book::Macro macro;
    if (after != before)
        macro.edits.push_back({book::SetBook{before, after}});
    if (is != was)
        macro.edits.push_back({book::SetCross{cross->id, was, is}});
    if (!macro.edits.empty())
        workbook->perform({std::move(macro)});
}

bool addCross(Workbook* workbook, book::Cross cross, const QStringList& parents) {
    const book::Book before = withoutCrosses(workbook->book());
    book::Book after = before;
    cross.parents = parentsNamed(parents, after);
    const book::Id id = cross.id;
    book::Macro macro;
    if (after != before)
        macro.edits.push_back({book::SetBook{before, after}});
    macro.edits.push_back({book::InsertCross{workbook->book().crosses.size(), std::move(cross)}});
    const bool done = workbook->perform({std::move(macro)});
    if (done)
        workbook->setCurrentCross(id);
    return done;
}

} // namespace filial::app
