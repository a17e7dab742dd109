// SPDX-License-Identifier: GPL-3.0-or-later
// Writing of the family model: cells, blocks and rows become edits of the book.
#include <algorithm>

#include "app/common/text.h"
#include "app/score/family_model.h"
#include "core/book/count_table.h"

namespace filial::app {

namespace {

bool sameButCells(const book::Family& a, const book::Family& b) {
    book::Family c = a;
    c.typed = b.typed;
    c.not_scored_typed = b.not_scored_typed;
    c.plants = b.plants;
    return c == b;
}

} // namespace

QString FamilyModel::problem(const QModelIndex& index, const QString& text) const {
    if (kind(index.column()) == ColumnKind::Family)
        return text.trimmed().isEmpty() ? tr("a family needs a name") : QString();
    const auto cell = book::read_cell(text.toStdString());
    return cell ? QString() : say(cell.error().message);
}

void FamilyModel::put(book::Family& family, int column, const QString& text, std::map<Place, Invalid>& wrong) const {
    const ColumnKind what = kind(column);
    if (what == ColumnKind::Total || what == ColumnKind::P)
        return;
    wrong.erase({family.id, column});
    if (what == ColumnKind::Family) {
        if (!text.trimmed().isEmpty())
            family.label = text.trimmed().toStdString();
        return;
    }
    const auto read = book::read_cell(text.toStdString());
    if (!read)
        wrong[{family.id, column}] = {text, say(read.error().message)};
    const book::Cell cell = read ? read.value() : book::Cell();
    const std::optional<Count> count =
        cell.state == book::CellState::Number ? std::optional<Count>(cell.count) : std::nullopt;
    if (what == ColumnKind::Class) {
        family.typed.resize(std::max(family.typed.size(), classes_));
        family.typed[static_cast<std::size_t>(column - 1)] = cell;
    } else if (what == ColumnKind::NotScored) {
        family.not_scored_typed = cell;
    } else if (what == ColumnKind::Sown) {
        family.sown = count;
    } else if (what == ColumnKind::Emerged) {
        family.emerged = count;
    } else {
        family.alive = count;
    }
}

void FamilyModel::addEdits(std::vector<book::Edit>& edits, const book::Family& before,
                           const book::Family& after) const {
    for (std::size_t i = 0; i < after.typed.size(); ++i) {
        const book::Cell was = i < before.typed.size() ? before.typed[i] : book::Cell();
        if (was != after.typed[i])
            edits.push_back({book::SetCell{cross_, before.id, static_cast<int>(i), was, after.typed[i]}});
    }
    if (before.not_scored_typed != after.not_scored_typed)
        edits.push_back({book::SetCell{cross_, before.id, -1, before.not_scored_typed, after.not_scored_typed}});
    if (!sameButCells(before, after)) {
        book::Family rest = after;
        rest.typed = before.typed;
        rest.not_scored_typed = before.not_scored_typed;
        edits.push_back({book::SetFamily{cross_, before, rest}});
    }
}

bool FamilyModel::commit(std::vector<book::Edit> edits) {
    workbook_->setPreview({});
    if (edits.empty()) {
        announce();
        return true;
    }
    if (edits.size() == 1)
        return workbook_->perform(std::move(edits.front()));
    return workbook_->perform({book::Macro{std::move(edits)}});
}

bool FamilyModel::setData(const QModelIndex& index, const QVariant& value, int role) {
    if (role != Qt::EditRole || !(flags(index) & Qt::ItemIsEditable))
        return false;
    const QString text = value.toString();
    if (isNextFamily(index.row()) && text.trimmed().isEmpty()) {
        workbook_->setPreview({});
        return true;
    }
    setBlock(index.row(), {index.column()}, {{text.toStdString()}});
    return true;
}

void FamilyModel::preview(const QModelIndex& index, const QString& text) {
    const book::Cross* cross = workbook_->currentCross();
    if (cross == nullptr || !problem(index, text).isEmpty())
        return;
    book::Cross shown = *cross;
    if (isNextFamily(index.row()))
        shown.families.push_back(book::new_family(book::next_family_label(shown), classes_));
    const auto row = static_cast<std::size_t>(index.row());
    if (row >= shown.families.size())
        return;
    std::map<Place, Invalid> ignored;
    put(shown.families[row], index.column(), text, ignored);
    workbook_->setPreview(std::move(shown));
}

QStringList FamilyModel::setBlock(int row, const std::vector<int>& columns,
                                  const std::vector<std::vector<std::string>>& block) {
    const book::Cross* cross = workbook_->currentCross();
    QStringList complaints;
    if (cross == nullptr || workbook_->readOnly())
        return complaints;
    book::Cross work = *cross;
    std::map<Place, Invalid> wrong = invalid_;
    std::vector<book::Edit> edits;
    for (std::size_t r = 0; r < block.size(); ++r) {
        const std::size_t place = static_cast<std::size_t>(row) + r;
        const bool fresh = place >= work.families.size();
        if (fresh)
            work.families.push_back(book::new_family(book::next_family_label(work), classes_));
        book::Family& family = work.families[std::min(place, work.families.size() - 1)];
        const book::Family before = family;
        for (std::size_t c = 0; c < block[r].size(); ++c) {
            if (c >= columns.size()) {
                complaints
                    << tr("%1, column %2: beyond the table").arg(QString::fromStdString(family.label)).arg(c + 1);
                break;
            }
            const QModelIndex at = index(std::min(static_cast<int>(place), rowCount() - 1), columns[c]);
            if (!fresh && !(flags(at) & Qt::ItemIsEditable))
                continue;
            put(family, columns[c], QString::fromStdString(block[r][c]), wrong);
            if (const auto bad = wrong.find({family.id, columns[c]}); bad != wrong.end())
                complaints << tr("%1, %2: %3")
                                  .arg(QString::fromStdString(family.label),
                                       headerData(columns[c], Qt::Horizontal, Qt::DisplayRole).toString(),
                                       bad->second.reason);
        }
        if (fresh)
            edits.push_back({book::InsertFamily{cross_, work.families.size() - 1, family}});
        else
            addEdits(edits, before, family);
    }
    invalid_ = std::move(wrong);
    commit(std::move(edits));
    return complaints;
}

void FamilyModel::clear(const QModelIndexList& indexes) {
    const book::Cross* cross = workbook_->currentCross();
    if (cross == nullptr)
        return;
    book::Cross work = *cross;
    std::vector<book::Edit> edits;
    for (std::size_t row = 0; row < work.families.size(); ++row) {
        for (const QModelIndex& at : indexes) {
            if (at.row() == static_cast<int>(row) && (flags(at) & Qt::ItemIsEditable) && at.column() > 0)
                put(work.families[row], at.column(), {}, invalid_);
        }
        addEdits(edits, cross->families[row], work.families[row]);
    }
    commit(std::move(edits));
}

void FamilyModel::insertFamily(int row) {
    const book::Cross* cross = workbook_->currentCross();
    if (cross == nullptr || row < 0)
        return;
    const auto place = std::min(static_cast<std::size_t>(row), cross->families.size());
    commit({{book::InsertFamily{cross_, place, book::new_family(book::next_family_label(*cross), classes_)}}});
}

void FamilyModel::removeFamilies(const std::vector<int>& rows) {
    const book::Cross* cross = workbook_->currentCross();
    if (cross == nullptr)
        return;
    std::vector<int> order(rows);
    std::sort(order.rbegin(), order.rend());
    order.erase(std::unique(order.begin(), order.end()), order.end());
    std::vector<book::Edit> edits;
    for (const int row : order) {
        const auto place = static_cast<std::size_t>(row);
        if (row >= 0 && place < cross->families.size())
            edits.push_back({book::RemoveFamily{cross_, place, cross->families[place]}});
    }
    commit(std::move(edits));
}

bool FamilyModel::moveFamily(int row, int by) {
    const int to = row + by;
    if (row < 0 || to < 0 || std::max(row, to) >= static_cast<int>(rows_.size()))
        return false;
    return commit({{book::MoveFamily{cross_, static_cast<std::size_t>(row), static_cast<std::size_t>(to)}}});
}

bool FamilyModel::setAside(int row, const std::optional<QString>& reason) {
    const book::Cross* cross = workbook_->currentCross();
    if (cross == nullptr || row < 0 || static_cast<std::size_t>(row) >= cross->families.size())
        return false;
    const book::Family& before = cross->families[static_cast<std::size_t>(row)];
    book::Family after = before;
    after.set_aside = reason ? std::optional<std::string>(reason->trimmed().toStdString()) : std::nullopt;
    return commit({{book::SetFamily{cross_, before, after}}});
}

} // namespace filial::app
