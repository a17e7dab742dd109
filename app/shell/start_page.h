// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QScrollArea>

#include "core/book/session.h"

class QVBoxLayout;

namespace filial::app {

/// What is shown while no book is open: a new cross, the sample books, books opened lately, and what can be recovered.
class StartPage : public QScrollArea {
    Q_OBJECT
public:
    explicit StartPage(QWidget* parent = nullptr);
    void refresh(); ///< looks again at what there is

Q_SIGNALS:
    void newCrossWanted();
    void openWanted();
    void sampleChosen(const QString& path);
    void recentChosen(const QString& path);
    void recoverChosen(const filial::book::Session::Recoverable& which);

private:
    void fillSamples(QVBoxLayout* column);
    void fillRecent(QVBoxLayout* column);
    void fillRecovered(QVBoxLayout* column);
};

} // namespace filial::app
