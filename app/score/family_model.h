// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <map>
#include <optional>
#include <utility>

#include <QAbstractTableModel>

#include "app/common/workbook.h"

// Terms. The family model is the table of the Score desk: a row a family and one for the next family; columns family,
// one a class, sown, up, alive, not scored, total, P. It reads the workbook and writes by edits.
namespace filial::app {

enum class ColumnKind { Family, Class, Sown, Emerged, Alive, NotScored, Total, P };

class FamilyModel : public QAbstractTableModel {
    Q_OBJECT
public:
    enum Role {
        InvalidRole = Qt::UserRole + 1, ///< bool: the text is not a count
        BandRole,                       ///< sentence below the row: error, or reason of setting aside
        SetAsideRole,                   ///< bool
        MutedRole,                      ///< bool
        BandIsErrorRole,                ///< bool
    };

    explicit FamilyModel(Workbook* workbook, QObject* parent = nullptr);

    int rowCount(const QModelIndex& parent = {}) const override;
    int columnCount(const QModelIndex& parent = {}) const override;
    QVariant data(const QModelIndex& index, int role) const override;
    bool setData(const QModelIndex& index, const QVariant& value, int role) override;
    QVariant headerData(int section, Qt::Orientation orientation, int role) const override;
    Qt::ItemFlags flags(const QModelIndex& index) const override;

    ColumnKind kind(int column) const;
    std::size_t classCount() const { return classes_; }
    int firstClassColumn() const { return 1; }
    int columnOf(ColumnKind kind) const; ///< of a kind other than Class
    bool isNextFamily(int row) const { return row == static_cast<int>(rows_.size()); }
    const std::vector<book::Id>& familyIds() const { return rows_; }
    const book::Family* family(int row) const; ///< as shown (with the preview); null for a row without one
    int rowOf(const book::Id& id) const;       ///< -1 where it is not there

    /// Text of a cell as typed: "31", "–", "", or the text that could not be read.
    QString cellText(const QModelIndex& index) const;
    /// Shows the valid text of an open editor everywhere without committing it; what is not valid keeps the last one.
    void preview(const QModelIndex& index, const QString& text);
    /// Why a text cannot stand in this cell; empty where it can.
    QString problem(const QModelIndex& index, const QString& text) const;
    /// Puts a block of texts at a place as one undo step; rows beyond the end become families. Cells that cannot be
    /// read stay as typed, marked; their places are returned in words. `columns` are the table's columns the block's
    /// columns go to; those that are computed are passed over.
    QStringList setBlock(int row, const std::vector<int>& columns, const std::vector<std::vector<std::string>>& block);
    void clear(const QModelIndexList& indexes); ///< to blank, one undo step
    void insertFamily(int row);
    void removeFamilies(const std::vector<int>& rows);
    bool moveFamily(int row, int by);
    /// Sets a family aside with its reason, or takes it back (empty optional).
    bool setAside(int row, const std::optional<QString>& reason);

Q_SIGNALS:
    void structureChanged(); ///< classes or columns differ: lay out anew
    void bandsChanged();     ///< a row's band came or went

private:
    struct Invalid {
        QString text, reason;
    };
    using Place = std::pair<book::Id, int>;

    void synchronise();
    void announce();
    const report::FamilyAnalysis* analysed(int row) const; ///< of the family shown in a row; null where none
    const Invalid* invalid(const QModelIndex& index) const;
    const Invalid* firstInvalid(const book::Id& family) const;
    /// Puts a text into a copy of a family; what cannot be read is remembered in `wrong` and leaves the cell blank.
    void put(book::Family& family, int column, const QString& text, std::map<Place, Invalid>& wrong) const;
    void addEdits(std::vector<book::Edit>& edits, const book::Family& before, const book::Family& after) const;
    bool commit(std::vector<book::Edit> edits);
    QVariant display(const QModelIndex& index) const;
    QVariant toolTip(const QModelIndex& index) const;
    QString spoken(const QModelIndex& index) const;
    QString band(int row) const;

    Workbook* workbook_;
    book::Id cross_;
    std::size_t classes_ = 0;
    std::vector<book::Id> rows_;
    std::map<Place, Invalid> invalid_;
};

} // namespace filial::app
