// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/shell/places.h"

#include <QCoreApplication>
#include <QDir>
#include <QFileInfo>
#include <QSettings>
#include <QStandardPaths>

namespace filial::app {
namespace {

constexpr int kRecentKept = 8;
const char* const kRecentKey = "recent";

QString stateFolder() {
    // Qt 6.4 knows no state folder; this is the one the XDG base directories name.
    const QString own = qEnvironmentVariable("XDG_STATE_HOME");
    const QString base = QDir::isAbsolutePath(own) ? own : QDir::homePath() + QStringLiteral("/.local/state");
    return base + QStringLiteral("/filial");
}

QStringList sampleFolders() {
    QStringList folders;
    const QDir program(QCoreApplication::applicationDirPath());
    // From a build folder inside the source upwards, then where it is installed.
    for (const char* up : {".", "..", "../..", "../../.."})
        folders << program.absoluteFilePath(QLatin1String(up) + QStringLiteral("/sample-crosses"));
    folders << program.absoluteFilePath(QStringLiteral("../share/filial/sample-crosses"));
    for (const QString& data : QStandardPaths::standardLocations(QStandardPaths::GenericDataLocation))
        folders << data + QStringLiteral("/filial/sample-crosses");
#ifdef FILIAL_SOURCE_SAMPLES
    folders << QStringLiteral(FILIAL_SOURCE_SAMPLES);
#endif
    return folders;
}

} // namespace

book::Session::Places sessionPlaces() {
    const QString folder = stateFolder();
    if (QDir().mkpath(folder))
        QFile::setPermissions(folder, QFile::ReadOwner | QFile::WriteOwner | QFile::ExeOwner);
    return {folder.toStdString()};
}

QStringList sampleBooks() {
    for (const QString& folder : sampleFolders()) {
        QStringList found;
        const QFileInfoList files = QDir(folder).entryInfoList({QStringLiteral("*.filial")}, QDir::Files, QDir::Name);
        for (const QFileInfo& file : files)
            found << QDir::cleanPath(file.absoluteFilePath());
        if (!found.isEmpty())
            return found;
    }
    return {};
}

QStringList recentBooks() {
    QStringList there;
    for (const QString& path : QSettings().value(QLatin1String(kRecentKey)).toStringList())
        if (QFileInfo::exists(path))
            there << path;
    return there;
}

void rememberBook(const QString& path) {
    QStringList paths = recentBooks();
    const QString absolute = QFileInfo(path).absoluteFilePath();
    paths.removeAll(absolute);
    paths.prepend(absolute);
    QSettings().setValue(QLatin1String(kRecentKey), paths.mid(0, kRecentKept));
}

} // namespace filial::app
