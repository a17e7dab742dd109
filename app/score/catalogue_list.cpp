// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/score/catalogue_list.h"

#include <algorithm>

#include <QPainter>
#include <QStyledItemDelegate>

#include "app/common/theme.h"

namespace filial::app {

namespace {

using inheritance::CatalogueEntry;
using inheritance::CatalogueGroup;

QString groupName(CatalogueGroup group) {
    switch (group) {
    case CatalogueGroup::OneLocus:
        return CatalogueModel::tr("One locus");
    case CatalogueGroup::TwoLociDominant:
        return CatalogueModel::tr("Two loci, both dominant");
    case CatalogueGroup::TwoLociInteracting:
        return CatalogueModel::tr("Two loci that interact");
    case CatalogueGroup::TwoLociCodominant:
        return CatalogueModel::tr("Two loci, codominant");
    case CatalogueGroup::ThreeLoci:
        return CatalogueModel::tr("Three loci");
    case CatalogueGroup::TestCross:
        return CatalogueModel::tr("Test cross and back-cross");
    case CatalogueGroup::Selfing:
        return CatalogueModel::tr("Later generations of selfing");
    case CatalogueGroup::Lethal:
        return CatalogueModel::tr("A lethal class");
    case CatalogueGroup::SexLinked:
        return CatalogueModel::tr("Sex-linked");
    case CatalogueGroup::Linked:
        break;
    }
    return CatalogueModel::tr("Linked loci");
}

QString joined(const std::vector<std::string>& texts) {
    QStringList list;
    for (const std::string& text : texts)
        list << QString::fromStdString(text);
    return list.join(QStringLiteral(" : "));
}

bool matches(const CatalogueEntry& entry, const QString& words) {
    QString all = QString::fromStdString(entry.name) + u' ' + QString::fromStdString(entry.hypothesis.notation()) +
                  u' ' + QString::fromStdString(entry.cross) + u' ' + groupName(entry.group) + u' ' +
                  joined(entry.meanings);
    for (const std::string& keyword : entry.keywords)
        all += u' ' + QString::fromStdString(keyword);
    const QStringList wanted = words.split(u' ', Qt::SkipEmptyParts);
    return std::all_of(wanted.begin(), wanted.end(),
                       [&](const QString& word) { return all.contains(word, Qt::CaseInsensitive); });
}

class EntryDelegate : public QStyledItemDelegate {
public:
    using QStyledItemDelegate::QStyledItemDelegate;

    QSize sizeHint(const QStyleOptionViewItem& option, const QModelIndex& index) const override {
        Q_UNUSED(option)
        return {200, index.data(CatalogueModel::HeadingRole).toBool() ? 30 : 42};
    }

    void paint(QPainter* painter, const QStyleOptionViewItem& option, const QModelIndex& index) const override {
        const Tokens& t = tokens();
        painter->save();
        const QRect rect = option.rect.adjusted(space::kM, 0, -space::kS, 0);
        if (index.data(CatalogueModel::HeadingRole).toBool()) {
            painter->setFont(app::font(TextRole::Label));
            painter->setPen(t.muted);
            painter->drawText(rect, Qt::AlignBottom | Qt::AlignLeft, index.data().toString());
            painter->restore();
            return;
        }
        const bool chosen = option.state & QStyle::State_Selected;
        if (chosen) {
            painter->fillRect(option.rect, t.selected);
            painter->fillRect(QRect(option.rect.left(), option.rect.top(), 3, option.rect.height()), t.accent);
        } else if (option.state & QStyle::State_MouseOver) {
            painter->fillRect(option.rect, QColor(t.ink.red(), t.ink.green(), t.ink.blue(), 13));
        }
        const bool muted = index.data(CatalogueModel::OtherCountRole).toBool() && !chosen;
        painter->setFont(app::font(TextRole::BodyBold));
        painter->setPen(muted ? t.muted : t.ink);
        const QString notation = index.data(CatalogueModel::NotationRole).toString();
        const int own = std::min(painter->fontMetrics().horizontalAdvance(notation) + space::kM, rect.width() * 2 / 3);
        painter->drawText(rect.adjusted(0, 4, 0, -20), Qt::AlignLeft | Qt::AlignVCenter,
                          painter->fontMetrics().elidedText(notation, Qt::ElideRight, own));
        painter->setFont(app::font(TextRole::Body));
        const QRect name = rect.adjusted(std::max(own, 92), 4, 0, -20);
        painter->drawText(name, Qt::AlignLeft | Qt::AlignVCenter,
                          painter->fontMetrics().elidedText(index.data(CatalogueModel::NameRole).toString(),
                                                            Qt::ElideRight, name.width()));
        painter->setFont(app::font(TextRole::Note));
        painter->setPen(chosen ? t.ink : t.muted);
        painter->drawText(rect.adjusted(0, 21, 0, -2), Qt::AlignLeft | Qt::AlignVCenter,
                          painter->fontMetrics().elidedText(index.data(CatalogueModel::DetailRole).toString(),
                                                            Qt::ElideRight, rect.width()));
        painter->restore();
    }
};

} // namespace

void CatalogueModel::setClassCount(std::size_t classes) {
    classes_ = classes;
    rebuild();
}

void CatalogueModel::setFilter(const QString& words, const std::optional<inheritance::Hypothesis>& typed) {
    words_ = words.trimmed();
    typed_ = typed;
    rebuild();
}

void CatalogueModel::addGroups(bool other) {
    const auto& entries = inheritance::catalogue();
    bool said = false;
    for (int group = 0; group <= static_cast<int>(CatalogueGroup::Linked); ++group) {
        bool headed = false;
        for (const CatalogueEntry& entry : entries) {
            const bool differs = entry.hypothesis.class_count() != classes_;
            if (static_cast<int>(entry.group) != group || differs != other)
                continue;
            // A typed hypothesis keeps the entries that are the same one, so that their meanings show.
            if (typed_ ? !(entry.hypothesis.notation() == typed_->notation() || matches(entry, words_))
                       : !matches(entry, words_))
                continue;
            if (other && !said)
                rows_.push_back({tr("With another number of classes than this cross"), nullptr, true});
            said = true;
            if (!headed && !other)
                rows_.push_back({groupName(entry.group), nullptr, false});
            headed = true;
            rows_.push_back({{}, &entry, other});
        }
    }
}

void CatalogueModel::rebuild() {
    beginResetModel();
    rows_.clear();
    if (typed_)
        rows_.push_back({{}, nullptr, typed_->class_count() != classes_});
    addGroups(false);
    addGroups(true);
    endResetModel();
}

int CatalogueModel::rowCount(const QModelIndex& parent) const {
    return parent.isValid() ? 0 : static_cast<int>(rows_.size());
}

const CatalogueEntry* CatalogueModel::entry(int row) const {
    return row >= 0 && row < rowCount() ? rows_[static_cast<std::size_t>(row)].entry : nullptr;
}

bool CatalogueModel::selectable(int row) const {
    return row >= 0 && row < rowCount() && rows_[static_cast<std::size_t>(row)].heading.isEmpty();
}

int CatalogueModel::firstSelectable() const {
    for (int row = 0; row < rowCount(); ++row) {
        if (selectable(row))
            return row;
    }
    return -1;
}

int CatalogueModel::entryCount() const {
    return static_cast<int>(
        std::count_if(rows_.begin(), rows_.end(), [](const Row& row) { return row.entry != nullptr; }));
}

QVariant CatalogueModel::data(const QModelIndex& index, int role) const {
    if (!index.isValid())
        return {};
    const Row& row = rows_[static_cast<std::size_t>(index.row())];
    const bool typed = row.heading.isEmpty() && row.entry == nullptr;
    const inheritance::Hypothesis* hypothesis =
        row.entry != nullptr ? &row.entry->hypothesis : (typed && typed_ ? &*typed_ : nullptr);
    switch (role) {
    case HeadingRole:
        return !row.heading.isEmpty();
    case NotationRole:
        return hypothesis != nullptr ? QString::fromStdString(hypothesis->notation()) : QString();
    case NameRole:
        return row.entry != nullptr ? QString::fromStdString(row.entry->name) : typed ? tr("as typed") : QString();
    case OtherCountRole:
        return row.other_count;
    case TypedRole:
        return typed;
    case DetailRole: {
        QString detail = row.entry != nullptr ? joined(row.entry->meanings) : QString();
        if (row.other_count && hypothesis != nullptr)
            detail = tr("%1 classes; this cross has %2").arg(hypothesis->class_count()).arg(classes_) +
                     (detail.isEmpty() ? QString() : QStringLiteral(" · ") + detail);
        return detail;
    }
    case Qt::DisplayRole:
        return row.heading.isEmpty()
                   ? data(index, NotationRole).toString() + QStringLiteral(", ") + data(index, NameRole).toString()
                   : row.heading;
    case Qt::ToolTipRole:
        return data(index, DetailRole);
    default:
        return {};
    }
}

Qt::ItemFlags CatalogueModel::flags(const QModelIndex& index) const {
    return selectable(index.row()) ? Qt::ItemIsSelectable | Qt::ItemIsEnabled : Qt::ItemFlags(Qt::NoItemFlags);
}

CatalogueList::CatalogueList(CatalogueModel* model, QWidget* parent) : QListView(parent) {
    setObjectName("catalogue");
    setAccessibleName(tr("Catalogue of inheritances"));
    setModel(model);
    setItemDelegate(new EntryDelegate(this));
    setFrameShape(QFrame::NoFrame);
    setMouseTracking(true);
    setVerticalScrollMode(ScrollPerPixel);
    setHorizontalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
}

} // namespace filial::app
