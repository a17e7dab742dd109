// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <vector>

#include <QAbstractButton>

#include "core/book/model.h"

namespace filial::app {

/// A book to open, as a card: its name, a line about it, and the classes of its first cross as a band of swatches whose
/// lengths are the plants counted.
class BookCard : public QAbstractButton {
    Q_OBJECT
public:
    BookCard(const QString& title, const QString& about, QWidget* parent = nullptr);
    void setCross(const book::Cross& cross);
    QSize sizeHint() const override;

protected:
    void paintEvent(QPaintEvent* event) override;

private:
    QString about_;
    book::Cross cross_; ///< classes only
    std::vector<double> shares_;
};

} // namespace filial::app
