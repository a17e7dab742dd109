// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <memory>

#include <QString>
#include <QStringList>

class QWidget;

// Terms. Ask is the seam for the few questions that need a dialog (a file name, what to do with unsaved changes) and
// for what opens in another program, so that tests can answer them.
namespace filial::app {

class Ask {
public:
    virtual ~Ask() = default;
    virtual QString openFile(QWidget* parent, const QString& title, const QString& filter) = 0;
    virtual QString saveFile(QWidget* parent, const QString& title, const QString& suggestion,
                             const QString& filter) = 0;
    /// One of `answers` by index, or -1 when dismissed.
    virtual int choose(QWidget* parent, const QString& question, const QString& detail, const QStringList& answers) = 0;
    /// Shows a file that was written in the program the desktop has for it.
    virtual void showFile(const QString& path) = 0;

    static Ask& instance();
    static void replace(std::unique_ptr<Ask> other); ///< tests; null puts the real one back
};

} // namespace filial::app
