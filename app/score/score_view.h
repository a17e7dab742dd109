// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QObject>

#include "app/common/workbook.h"

namespace filial::app {

/// What the Score desk shows: the workbook's analysis, with or without the families set aside.
class ScoreView : public QObject {
    Q_OBJECT
public:
    explicit ScoreView(Workbook* workbook, QObject* parent = nullptr);

    Workbook* workbook() const { return workbook_; }
    const report::CrossAnalysis& analysis() const;
    bool withSetAside() const { return with_; }
    bool canShowSetAside() const; ///< there is one with plants
    void setWithSetAside(bool with);
    QString scope() const; ///< "F2-03 alone", "3 families"; empty: all

Q_SIGNALS:
    void changed();

private:
    Workbook* workbook_;
    bool with_ = false;
    mutable std::optional<report::CrossAnalysis> altered_;
};

} // namespace filial::app
