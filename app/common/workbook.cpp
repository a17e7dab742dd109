// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/common/workbook.h"

#include <algorithm>

#include <QFileInfo>
#include <QSettings>

#include "app/common/text.h"

namespace filial::app {

struct Workbook::Private {
    std::unique_ptr<book::Session> session;
    book::Id cross;
    std::size_t crossIndex = 0; // where the current cross stood, to choose a neighbour when it goes
    std::vector<book::Id> families;
    std::optional<book::Cross> preview;
    std::optional<report::CrossAnalysis> analysis;
    double alpha = 0.05;
};

Workbook::Workbook(std::unique_ptr<book::Session> session, QObject* parent)
    : QObject(parent), p_(std::make_unique<Private>()) {
    p_->session = std::move(session);
    const QSettings settings;
    p_->session->set_who(settings.value(QStringLiteral("who")).toString().toStdString());
    p_->alpha = settings.value(QStringLiteral("alpha"), 0.05).toDouble();
    if (!(p_->alpha > 0.0 && p_->alpha < 1.0))
        p_->alpha = 0.05;
    if (!book().crosses.empty())
        p_->cross = book().crosses.front().id;
}

Workbook::~Workbook() = default;

const book::Book& Workbook::book() const {
    return p_->session->book();
}

book::Session& Workbook::session() {
    return *p_->session;
}

QString Workbook::displayName() const {
    const std::string& path = p_->session->path();
    if (!path.empty())
        return QFileInfo(QString::fromStdString(path)).completeBaseName();
    if (!book().title.empty())
        return QString::fromStdString(book().title);
    return tr("new book");
}

book::Id Workbook::currentCrossId() const {
    return p_->cross;
}

const book::Cross* Workbook::currentCross() const {
    return book().find_cross(p_->cross);
}

void Workbook::setCurrentCross(const book::Id& id) {
    if (id == p_->cross || book().find_cross(id) == nullptr)
        return;
    p_->cross = id;
    p_->preview.reset();
    p_->analysis.reset();
    const bool hadSelection = !p_->families.empty();
    p_->families.clear();
    rememberPlace();
    Q_EMIT crossChanged();
    if (hadSelection)
        Q_EMIT selectionChanged();
    Q_EMIT analysisChanged();
}

const std::vector<book::Id>& Workbook::selectedFamilies() const {
    return p_->families;
}

void Workbook::setSelectedFamilies(std::vector<book::Id> families) {
    if (families == p_->families)
        return;
    p_->families = std::move(families);
    p_->analysis.reset();
    Q_EMIT selectionChanged();
    Q_EMIT analysisChanged();
}

void Workbook::rememberPlace() {
    const auto& crosses = book().crosses;
    for (std::size_t i = 0; i < crosses.size(); ++i)
        if (crosses[i].id == p_->cross)
            p_->crossIndex = i;
}

void Workbook::afterChange() {
    p_->preview.reset();
    p_->analysis.reset();
    bool moved = false;
    if (currentCross() == nullptr) {
        const auto& crosses = book().crosses;
        const book::Id next = crosses.empty() ? book::Id() : crosses[std::min(p_->crossIndex, crosses.size() - 1)].id;
        moved = next != p_->cross;
        p_->cross = next;
    }
    rememberPlace();
    const std::size_t chosen = p_->families.size();
    std::erase_if(p_->families, [this](const book::Id& id) {
        const book::Cross* cross = currentCross();
        return cross == nullptr || std::none_of(cross->families.begin(), cross->families.end(),
                                                [&id](const book::Family& family) { return family.id == id; });
    });
    Q_EMIT bookChanged();
    if (moved)
        Q_EMIT crossChanged();
    if (chosen != p_->families.size())
        Q_EMIT selectionChanged();
    Q_EMIT analysisChanged();
    Q_EMIT savedStateChanged();
}

bool Workbook::perform(book::Edit edit, const QString& mergeKey) {
    if (readOnly()) {
        Q_EMIT refused(tr("This book is read-only here. Save it under another name to change it."));
        return false;
    }
    const Done result = p_->session->perform(std::move(edit), mergeKey.toStdString());
    if (!result) {
        Q_EMIT refused(say(result.error().message));
        return false;
    }
    afterChange();
    return true;
}

void Workbook::undo() {
    const auto message = p_->session->undo();
    if (!message)
        return;
    afterChange();
    Q_EMIT said(tr("Undid: %1").arg(say(*message)));
}

void Workbook::redo() {
    const auto message = p_->session->redo();
    if (!message)
        return;
    afterChange();
    Q_EMIT said(tr("Redid: %1").arg(say(*message)));
}

bool Workbook::tell(const Done& result, const QString& sentence) {
    Q_EMIT savedStateChanged();
    if (!result) {
        Q_EMIT refused(say(result.error().message));
        return false;
    }
    Q_EMIT said(sentence);
    return true;
}

bool Workbook::save() {
    return tell(p_->session->save(), tr("Saved"));
}

bool Workbook::saveAs(const QString& path) {
    return tell(p_->session->save_as(path.toStdString()), tr("Saved as %1").arg(QFileInfo(path).fileName()));
}

bool Workbook::revertToSaved() {
    const Done result = p_->session->revert_to_saved();
    if (result)
        afterChange();
    return tell(result, tr("Back to the saved book. Undo brings your changes back."));
}

void Workbook::setPreview(std::optional<book::Cross> preview) {
    if (preview == p_->preview)
        return;
    p_->preview = std::move(preview);
    p_->analysis.reset();
    Q_EMIT analysisChanged();
}

const book::Cross* Workbook::shownCross() const {
    return p_->preview ? &*p_->preview : currentCross();
}

const report::CrossAnalysis& Workbook::analysis() const {
    if (!p_->analysis) {
        report::AnalysisOptions options;
        options.alpha = p_->alpha;
        options.selection = p_->families;
        const book::Cross* cross = shownCross();
        p_->analysis = cross != nullptr ? report::analyse(*cross, options) : report::CrossAnalysis{};
    }
    return *p_->analysis;
}

double Workbook::alpha() const {
    return p_->alpha;
}

void Workbook::setAlpha(double alpha) {
    if (!(alpha > 0.0 && alpha < 1.0) || alpha == p_->alpha)
        return;
    p_->alpha = alpha;
    QSettings().setValue(QStringLiteral("alpha"), alpha);
    p_->analysis.reset();
    Q_EMIT analysisChanged();
}

bool Workbook::readOnly() const {
    return p_->session->read_only();
}

} // namespace filial::app
