// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/score/family_model.h"

#include <algorithm>

#include "app/common/text.h"
#include "core/book/count_table.h"

namespace filial::app {

FamilyModel::FamilyModel(Workbook* workbook, QObject* parent) : QAbstractTableModel(parent), workbook_(workbook) {
    synchronise();
    connect(workbook_, &Workbook::bookChanged, this, &FamilyModel::synchronise);
    connect(workbook_, &Workbook::crossChanged, this, &FamilyModel::synchronise);
    connect(workbook_, &Workbook::analysisChanged, this, &FamilyModel::announce);
}

void FamilyModel::announce() {
    if (rowCount() > 0 && columnCount() > 0)
        Q_EMIT dataChanged(index(0, 0), index(rowCount() - 1, columnCount() - 1));
    Q_EMIT bandsChanged();
}

void FamilyModel::synchronise() {
    const book::Cross* cross = workbook_->currentCross();
    std::vector<book::Id> now;
    if (cross != nullptr) {
        for (const book::Family& family : cross->families)
            now.push_back(family.id);
    }
    const book::Id id = cross != nullptr ? cross->id : book::Id();
    const std::size_t classes = cross != nullptr ? cross->classes.size() : 0;
    if (id != cross_ || classes != classes_) {
        beginResetModel();
        cross_ = id;
        classes_ = classes;
        rows_ = now;
        invalid_.clear();
        endResetModel();
        Q_EMIT structureChanged();
        return;
    }
    const auto [was, is] = std::mismatch(rows_.begin(), rows_.end(), now.begin(), now.end());
    const auto place = static_cast<int>(was - rows_.begin());
    const auto old_rest = static_cast<std::size_t>(rows_.end() - was);
    const auto new_rest = static_cast<std::size_t>(now.end() - is);
    if (new_rest > old_rest && std::equal(was, rows_.end(), now.end() - static_cast<std::ptrdiff_t>(old_rest))) {
        // Appended families take the place of the row "next family…", which moves on; a cell being edited there stays.
        const int first = old_rest == 0 ? place + 1 : place;
        beginInsertRows({}, first, first + static_cast<int>(new_rest - old_rest) - 1);
        rows_ = now;
        endInsertRows();
    } else if (old_rest > new_rest && std::equal(is, now.end(), rows_.end() - static_cast<std::ptrdiff_t>(new_rest))) {
        beginRemoveRows({}, place, place + static_cast<int>(old_rest - new_rest) - 1);
        rows_ = now;
        endRemoveRows();
    } else if (now != rows_) {
        beginResetModel();
        rows_ = now;
        endResetModel();
    }
    if (classes_ > 0)
        Q_EMIT headerDataChanged(Qt::Horizontal, 0, columnCount() - 1);
    announce();
}

int FamilyModel::rowCount(const QModelIndex& parent) const {
    return parent.isValid() || classes_ == 0 ? 0 : static_cast<int>(rows_.size()) + 1;
}

int FamilyModel::columnCount(const QModelIndex& parent) const {
    return parent.isValid() || classes_ == 0 ? 0 : static_cast<int>(classes_) + 7;
}

ColumnKind FamilyModel::kind(int column) const {
    const int k = static_cast<int>(classes_);
    if (column <= 0)
        return ColumnKind::Family;
    if (column <= k)
        return ColumnKind::Class;
    static constexpr ColumnKind kRest[] = {ColumnKind::Sown,      ColumnKind::Emerged, ColumnKind::Alive,
                                           ColumnKind::NotScored, ColumnKind::Total,   ColumnKind::P};
    return kRest[std::min(column - k - 1, 5)];
}

int FamilyModel::columnOf(ColumnKind wanted) const {
    for (int column = 0; column < columnCount(); ++column) {
        if (kind(column) == wanted)
            return column;
    }
    return -1;
}

const book::Family* FamilyModel::family(int row) const {
    const book::Cross* cross = workbook_->shownCross();
    if (cross == nullptr || row < 0 || row > static_cast<int>(rows_.size()))
        return nullptr;
    const auto place = static_cast<std::size_t>(row);
    if (place == rows_.size()) // what is being typed into the row "next family…"
        return place < cross->families.size() ? &cross->families[place] : nullptr;
    // By id: while rows come or go, the book is already ahead of the rows the view knows.
    if (place < cross->families.size() && cross->families[place].id == rows_[place])
        return &cross->families[place];
    const auto found = std::find_if(cross->families.begin(), cross->families.end(),
                                    [&](const book::Family& one) { return one.id == rows_[place]; });
    return found == cross->families.end() ? nullptr : &*found;
}

const report::FamilyAnalysis* FamilyModel::analysed(int row) const {
    const book::Family* shown = family(row);
    if (shown == nullptr)
        return nullptr;
    const auto& all = workbook_->analysis().families;
    const auto place = static_cast<std::size_t>(row);
    if (place < all.size() && all[place].id == shown->id)
        return &all[place];
    const auto found = std::find_if(all.begin(), all.end(), [&](const auto& one) { return one.id == shown->id; });
    return found == all.end() ? nullptr : &*found;
}

int FamilyModel::rowOf(const book::Id& id) const {
    const auto found = std::find(rows_.begin(), rows_.end(), id);
    return found == rows_.end() ? -1 : static_cast<int>(found - rows_.begin());
}

const FamilyModel::Invalid* FamilyModel::invalid(const QModelIndex& index) const {
    if (isNextFamily(index.row()))
        return nullptr;
    const auto found = invalid_.find({rows_[static_cast<std::size_t>(index.row())], index.column()});
    if (found == invalid_.end())
        return nullptr;
    // The text belongs to a blank cell; a number that came in its place (undo, paste) wins.
    const book::Family* shown = family(index.row());
    if (shown == nullptr)
        return nullptr;
    const int phenotype = index.column() - 1;
    const bool blank =
        kind(index.column()) == ColumnKind::Class
            ? shown->cell(ClassIndex{static_cast<std::size_t>(phenotype)}).state == book::CellState::Blank
            : kind(index.column()) != ColumnKind::NotScored || shown->not_scored_typed.state == book::CellState::Blank;
    return blank ? &found->second : nullptr;
}

const FamilyModel::Invalid* FamilyModel::firstInvalid(const book::Id& id) const {
    for (auto found = invalid_.lower_bound({id, 0}); found != invalid_.end() && found->first.first == id; ++found) {
        const int row = rowOf(id);
        if (row >= 0 && invalid(index(row, found->first.second)) != nullptr)
            return &found->second;
    }
    return nullptr;
}

namespace {

QString optionalText(const std::optional<Count>& count) {
    return count ? QString::number(count->value()) : QString();
}

} // namespace

QString FamilyModel::cellText(const QModelIndex& index) const {
    if (const Invalid* wrong = invalid(index))
        return wrong->text;
    const book::Family* shown = family(index.row());
    if (shown == nullptr)
        return {};
    switch (kind(index.column())) {
    case ColumnKind::Family:
        return QString::fromStdString(shown->label);
    case ColumnKind::Class:
        return QString::fromStdString(
            book::cell_text(shown->cell(ClassIndex{static_cast<std::size_t>(index.column() - 1)})));
    case ColumnKind::Sown:
        return optionalText(shown->sown);
    case ColumnKind::Emerged:
        return optionalText(shown->emerged);
    case ColumnKind::Alive:
        return optionalText(shown->alive);
    case ColumnKind::NotScored:
        return QString::fromStdString(book::cell_text(shown->not_scored_cell()));
    case ColumnKind::Total:
    case ColumnKind::P:
        break;
    }
    return {};
}

QVariant FamilyModel::display(const QModelIndex& index) const {
    const ColumnKind what = kind(index.column());
    if (what == ColumnKind::Family && isNextFamily(index.row()) && family(index.row()) == nullptr)
        return tr("next family…");
    if (what != ColumnKind::Total && what != ColumnKind::P)
        return cellText(index);
    const report::FamilyAnalysis* found = analysed(index.row());
    if (found == nullptr)
        return {};
    const report::FamilyAnalysis& one = *found;
    if (one.state == report::FamilyState::Blank && band(index.row()).isEmpty())
        return {};
    if (what == ColumnKind::Total)
        return one.total ? QString::number(*one.total) : QStringLiteral("–");
    const bool has = one.fit && one.fit->chi_square && one.fit->chi_square->p;
    return has ? pText(one.fit->chi_square->p->p) : tr("none");
}

QVariant FamilyModel::toolTip(const QModelIndex& index) const {
    if (const Invalid* wrong = invalid(index))
        return wrong->reason;
    const report::FamilyAnalysis* found = kind(index.column()) == ColumnKind::P ? analysed(index.row()) : nullptr;
    if (found == nullptr)
        return {};
    const report::FamilyAnalysis& one = *found;
    if (!one.fit)
        return one.state == report::FamilyState::Incomplete ? tr("no P: a class is blank or was not looked at")
                                                            : tr("no P: no plants counted");
    if (!one.fit->chi_square)
        return say(one.fit->chi_square.why_not);
    if (!one.fit->chi_square->p)
        return say(one.fit->chi_square->p.why_not);
    return tr("χ² %1, %2 df, P %3")
        .arg(fullText(one.fit->chi_square->statistic))
        .arg(one.fit->df)
        .arg(fullText(one.fit->chi_square->p->p));
}

QString FamilyModel::band(int row) const {
    if (isNextFamily(row))
        return {};
    const book::Family* shown = family(row);
    if (shown == nullptr)
        return {};
    if (const Invalid* wrong = firstInvalid(shown->id))
        return wrong->reason;
    return shown->set_aside ? QStringLiteral("⊘ ") + QString::fromStdString(*shown->set_aside) : QString();
}

QString FamilyModel::spoken(const QModelIndex& index) const {
    if (const Invalid* wrong = invalid(index))
        return tr("%1, not a count: %2").arg(wrong->text, wrong->reason);
    const QString text = display(index).toString();
    if (text.isEmpty())
        return tr("blank");
    if (text == QStringLiteral("–") && kind(index.column()) != ColumnKind::Total)
        return tr("not looked");
    return text;
}

QVariant FamilyModel::data(const QModelIndex& index, int role) const {
    if (!index.isValid())
        return {};
    const book::Family* shown = family(index.row());
    const bool aside = shown != nullptr && shown->set_aside.has_value();
    const ColumnKind what = kind(index.column());
    switch (role) {
    case Qt::DisplayRole:
        return display(index);
    case Qt::EditRole:
        return cellText(index);
    case Qt::ToolTipRole:
        return toolTip(index);
    case Qt::AccessibleTextRole:
        return spoken(index);
    case Qt::TextAlignmentRole:
        return ((what == ColumnKind::Family ? Qt::AlignLeft : Qt::AlignRight) | Qt::AlignVCenter).toInt();
    case InvalidRole:
        return invalid(index) != nullptr;
    case BandRole:
        return band(index.row());
    case BandIsErrorRole:
        return shown != nullptr && firstInvalid(shown->id) != nullptr;
    case SetAsideRole:
        return aside;
    case MutedRole:
        return aside || shown == nullptr || what == ColumnKind::NotScored || what == ColumnKind::P ||
               what == ColumnKind::Sown || what == ColumnKind::Emerged || what == ColumnKind::Alive;
    default:
        return {};
    }
}

QVariant FamilyModel::headerData(int section, Qt::Orientation orientation, int role) const {
    if (orientation != Qt::Horizontal || (role != Qt::DisplayRole && role != Qt::AccessibleTextRole))
        return {};
    switch (kind(section)) {
    case ColumnKind::Family:
        return tr("Family");
    case ColumnKind::Class: {
        const book::Cross* cross = workbook_->shownCross();
        const auto phenotype = static_cast<std::size_t>(section - 1);
        return cross != nullptr && phenotype < cross->classes.size()
                   ? QString::fromStdString(cross->class_label(ClassIndex{phenotype}))
                   : QString();
    }
    case ColumnKind::Sown:
        return tr("Sown");
    case ColumnKind::Emerged:
        return tr("Up");
    case ColumnKind::Alive:
        return tr("Alive");
    case ColumnKind::NotScored:
        return tr("Not scored");
    case ColumnKind::Total:
        return tr("Total");
    case ColumnKind::P:
        break;
    }
    return tr("P");
}

Qt::ItemFlags FamilyModel::flags(const QModelIndex& index) const {
    if (!index.isValid())
        return Qt::NoItemFlags;
    Qt::ItemFlags flags = Qt::ItemIsSelectable | Qt::ItemIsEnabled;
    const ColumnKind what = kind(index.column());
    if (workbook_->readOnly() || what == ColumnKind::Total || what == ColumnKind::P)
        return flags;
    // Plants scored one by one are corrected where they were scored, not by typing over their number.
    if (const book::Family* shown = family(index.row()); shown != nullptr && what == ColumnKind::Class) {
        const auto scored = [column = index.column()](const book::Plant& plant) {
            return plant.phenotype && static_cast<int>(plant.phenotype->value) == column - 1;
        };
        if (std::any_of(shown->plants.begin(), shown->plants.end(), scored))
            return flags;
    }
    return flags | Qt::ItemIsEditable;
}

} // namespace filial::app
