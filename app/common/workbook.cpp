// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/common/workbook.h"

#include <algorithm>

#include <QFileInfo>
#include <QSettings>

#include "app/common/runner.h"
#include "app/common/text.h"

namespace filial::app {

namespace {
const double kUsualAlpha = report::AnalysisOptions().alpha;
constexpr std::size_t kManyFamilies = 1000; // more: a full analysis could hold up a key press
} // namespace

struct Workbook::Private {
    std::unique_ptr<book::Session> session;
    book::Id cross;
    std::size_t crossIndex = 0; // where the current cross stood, to choose a neighbour when it goes
    std::vector<book::Id> families;
    std::optional<book::Cross> preview;
    using Analysis = std::shared_ptr<const report::CrossAnalysis>;
    Analysis analysis;
    Analysis previous; // the last one: what has not changed is taken over from it
    Runner<Analysis> runner;
    bool pending = false; // the runner is at it
    double alpha = kUsualAlpha;
};

Workbook::Workbook(std::unique_ptr<book::Session> session, QObject* parent)
    : QObject(parent), p_(std::make_unique<Private>()) {
    p_->session = std::move(session);
    const QSettings settings;
    p_->session->set_who(settings.value(QStringLiteral("who")).toString().toStdString());
    p_->alpha = rememberedAlpha();
    if (!book().crosses.empty())
        p_->cross = book().crosses.front().id;
    connect(&p_->runner, &RunnerBase::busyChanged, this, &Workbook::busyChanged);
    outdateAnalysis();
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
    outdateAnalysis();
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
    outdateAnalysis();
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
    outdateAnalysis();
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

void Workbook::goToChange(const std::vector<book::Cross>& before) {
    const auto changed = [&before](const book::Cross& now) {
        return std::none_of(before.begin(), before.end(), [&now](const book::Cross& one) { return one == now; });
    };
    if (currentCross() == nullptr || changed(*currentCross()))
        return;
    const auto& crosses = book().crosses;
    const auto found = std::find_if(crosses.begin(), crosses.end(), changed);
    if (found != crosses.end())
        setCurrentCross(book::Id(found->id));
}

void Workbook::undo() {
    const std::vector<book::Cross> before = book().crosses;
    const auto message = p_->session->undo();
    if (!message)
        return;
    afterChange();
    goToChange(before);
    Q_EMIT said(tr("Undid: %1").arg(say(*message)));
}

void Workbook::redo() {
    const std::vector<book::Cross> before = book().crosses;
    const auto message = p_->session->redo();
    if (!message)
        return;
    afterChange();
    goToChange(before);
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
    outdateAnalysis();
    Q_EMIT analysisChanged();
}

const book::Cross* Workbook::shownCross() const {
    return p_->preview ? &*p_->preview : currentCross();
}

report::AnalysisOptions Workbook::analysisOptions() const {
    report::AnalysisOptions options;
    options.alpha = p_->alpha;
    options.selection = p_->families;
    return options;
}

void Workbook::outdateAnalysis() {
    if (p_->analysis)
        p_->previous = std::move(p_->analysis);
    p_->analysis.reset();
    const book::Cross* cross = shownCross();
    p_->pending = cross != nullptr && cross->families.size() > kManyFamilies;
    if (!p_->pending) {
        p_->runner.cancel();
        return;
    }
    p_->runner.request(
        [cross = *cross, options = analysisOptions(), previous = p_->previous](const CancellationToken& cancel,
                                                                               const Progress&) {
            return std::make_shared<const report::CrossAnalysis>(
                report::analyse(cross, options, cancel, previous.get()));
        },
        [this](std::uint64_t, const Private::Analysis& found) {
            p_->analysis = found;
            p_->pending = false;
            Q_EMIT analysisChanged();
        });
}

bool Workbook::analysing() const {
    return p_->pending;
}

const report::CrossAnalysis& Workbook::analysis() const {
    if (p_->analysis)
        return *p_->analysis;
    const book::Cross* cross = shownCross();
    if (p_->pending) {
        static const report::CrossAnalysis kNothingYet;
        const bool fits = p_->previous && p_->previous->class_labels.size() == cross->classes.size();
        return fits ? *p_->previous : kNothingYet;
    }
    p_->analysis = std::make_shared<const report::CrossAnalysis>(
        cross != nullptr ? report::analyse(*cross, analysisOptions(), {}, p_->previous.get())
                         : report::CrossAnalysis{});
    return *p_->analysis;
}

double Workbook::alpha() const {
    return p_->alpha;
}

double Workbook::rememberedAlpha() {
    const double alpha = QSettings().value(QStringLiteral("alpha"), kUsualAlpha).toDouble();
    return alpha > 0.0 && alpha < 1.0 ? alpha : kUsualAlpha;
}

bool Workbook::rememberAlpha(double alpha) {
    if (!(alpha > 0.0 && alpha < 1.0))
        return false;
    QSettings().setValue(QStringLiteral("alpha"), alpha);
    return true;
}

void Workbook::setAlpha(double alpha) {
    if (!rememberAlpha(alpha) || alpha == p_->alpha)
        return;
    p_->alpha = alpha;
    outdateAnalysis();
    Q_EMIT analysisChanged();
}

bool Workbook::readOnly() const {
    return p_->session->read_only();
}

} // namespace filial::app
