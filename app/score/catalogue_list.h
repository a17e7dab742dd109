// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QAbstractListModel>
#include <QListView>

#include "core/inheritance/catalogue.h"

namespace filial::app {

/// The catalogue grouped by what it means, filtered by words; entries with another number of classes come last, muted.
class CatalogueModel : public QAbstractListModel {
    Q_OBJECT
public:
    enum Role { HeadingRole = Qt::UserRole + 1, NotationRole, NameRole, DetailRole, OtherCountRole, TypedRole };

    using QAbstractListModel::QAbstractListModel;
    void setClassCount(std::size_t classes);
    /// `typed`: what was typed, where it is a hypothesis; it comes first.
    void setFilter(const QString& words, const std::optional<inheritance::Hypothesis>& typed);
    const inheritance::CatalogueEntry* entry(int row) const; ///< null for a heading or the typed row
    bool selectable(int row) const;
    int firstSelectable() const; ///< -1 where there is none
    int entryCount() const;

    int rowCount(const QModelIndex& parent = {}) const override;
    QVariant data(const QModelIndex& index, int role) const override;
    Qt::ItemFlags flags(const QModelIndex& index) const override;

private:
    struct Row {
        QString heading;
        const inheritance::CatalogueEntry* entry = nullptr;
        bool other_count = false;
    };
    void rebuild();
    void addGroups(bool other);

    std::size_t classes_ = 0;
    QString words_;
    std::optional<inheritance::Hypothesis> typed_;
    std::vector<Row> rows_;
};

class CatalogueList : public QListView {
    Q_OBJECT
public:
    explicit CatalogueList(CatalogueModel* model, QWidget* parent = nullptr);
};

} // namespace filial::app
