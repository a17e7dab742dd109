// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/score/meaning_column.h"

#include <QScrollBar>

#include "app/common/help_page.h"
#include "app/common/text.h"

namespace filial::app {

namespace {

Words* paragraph(TextRole role, Ink ink, const char* id, Section* section) {
    auto* words = new Words(role, ink, section);
    words->setObjectName(QString::fromLatin1(id));
    words->setWordWrap(true);
    words->setTextInteractionFlags(Qt::TextSelectableByMouse);
    section->content()->addWidget(words);
    return words;
}

ResultGrid* grid(const char* id, Section* section) {
    auto* rows = new ResultGrid(section);
    rows->setObjectName(QString::fromLatin1(id));
    section->content()->addWidget(rows);
    return rows;
}

} // namespace

MeaningColumn::MeaningColumn(ScoreView* view, QWidget* parent)
    : QScrollArea(parent), view_(view), fit_(new Section("fit", tr("Do the counts fit?"))),
      families_(new Section("families", tr("Do the families agree?"))), cautions_(new Section("cautions", tr("Mind"))),
      also_(new Section("also", tr("Also not contradicted"))),
      account_(new Section("account", tr("Degrees of freedom"))),
      misfit_(new Section("misfit", tr("Where the misfit sits"))), sown_(new Section("sown", tr("Sown to scored"))),
      detect_(new Section("detect", tr("What would be detected"))) {
    build();
    later_.setSingleShot(true);
    later_.setInterval(150);
    connect(&later_, &QTimer::timeout, this, &MeaningColumn::requestAlternatives);
    connect(view_, &ScoreView::changed, this, &MeaningColumn::refresh);
    refresh();
}

void MeaningColumn::build() {
    setObjectName("meaning-column");
    families_->setProperty(kHelpPage, "heterogeneity.md");
    setAccessibleName(tr("What the counts mean"));
    setFrameShape(QFrame::NoFrame);
    setWidgetResizable(true);
    setHorizontalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
    setFocusPolicy(Qt::NoFocus);
    auto* inside = new QWidget;
    auto* all = new QVBoxLayout(inside);
    all->setContentsMargins(space::kL, space::kM, space::kL, space::kM);
    all->setSpacing(space::kM);
    for (Section* section : {fit_, families_, cautions_, account_, misfit_, sown_, also_, detect_})
        all->addWidget(section);
    all->addStretch(1);
    all_families_ = new TextButton(tr("Back to all families"));
    all_families_->setObjectName("all-families");
    connect(all_families_, &QPushButton::clicked, this, [this] { view_->workbook()->setSelectedFamilies({}); });
    fit_->content()->addWidget(all_families_, 0, Qt::AlignLeft);
    verdict_ = paragraph(TextRole::Verdict, Ink::Normal, "verdict", fit_);
    tests_ = grid("tests", fit_);
    meaning_ = paragraph(TextRole::Note, Ink::Muted, "meaning", fit_);
    heterogeneity_ = paragraph(TextRole::Body, Ink::Normal, "heterogeneity-line", families_);
    sources_ = grid("sources", families_);
    also_rows_ = grid("also-rows", also_);
    also_note_ = paragraph(TextRole::Note, Ink::Muted, "also-note", also_);
    charges_ = grid("charges", account_);
    parts_ = grid("parts", misfit_);
    misfit_note_ = paragraph(TextRole::Note, Ink::Muted, "misfit-note", misfit_);
    sown_line_ = paragraph(TextRole::Body, Ink::Normal, "sown-line", sown_);
    sown_note_ = paragraph(TextRole::Note, Ink::Muted, "sown-note", sown_);
    detect_rows_ = grid("detect-rows", detect_);
    detect_note_ = paragraph(TextRole::Note, Ink::Muted, "detect-note", detect_);
    also_->hide(); // until it has been worked out
    setWidget(inside);
    inside->setAutoFillBackground(false);
    viewport()->setAutoFillBackground(true);
    viewport()->setBackgroundRole(QPalette::Base);
    verticalScrollBar()->setSingleStep(20);
}

void MeaningColumn::refresh() {
    const report::CrossAnalysis& analysis = view_->analysis();
    const fit::GoodnessOfFit* fit = analysis.totals ? &*analysis.totals : nullptr;
    const QString scope = view_->scope();
    fit_->setTitle(scope.isEmpty() ? tr("Do the counts fit?") : tr("%1: do the counts fit?").arg(scope));
    all_families_->setVisible(!scope.isEmpty());
    refreshFit(analysis);
    refreshFamilies(analysis);
    refreshCautions(analysis);
    refreshAccount(fit);
    refreshMisfit(fit);
    refreshSown(analysis);
    refreshDetectable(fit);
    later_.start();
}

void MeaningColumn::requestAlternatives() {
    const report::CrossAnalysis analysis = view_->analysis();
    if (!analysis.totals) {
        also_->hide();
        return;
    }
    runner_.request(
        [analysis](const CancellationToken&, const Progress&) { return report::also_not_contradicted(analysis); },
        [this](std::uint64_t, const report::Alternatives& found) { showAlternatives(found); });
}

void MeaningColumn::showAlternatives(const report::Alternatives& alternatives) {
    std::vector<ResultGrid::Row> rows;
    for (const report::AlsoNotContradicted& one : alternatives.not_contradicted) {
        ResultGrid::Row row;
        row.id = QStringLiteral("also-%1").arg(rows.size());
        row.label = QString::fromStdString(one.name.empty() ? one.notation : one.name);
        row.label_tip = QString::fromStdString(one.notation);
        row.p = tr("P %1").arg(pText(one.p));
        row.p_tip = fullText(one.p);
        rows.push_back(row);
    }
    also_rows_->setRows(rows);
    QStringList notes;
    for (const Message& note : alternatives.notes)
        notes << say(note);
    also_note_->say(notes.join(u' '));
    also_->setVisible(!alternatives.not_contradicted.empty() || !notes.isEmpty());
}

void MeaningColumn::resizeEvent(QResizeEvent* event) {
    QScrollArea::resizeEvent(event);
    // Low windows fold what is not the answer, in the order of the design; verdict, totals and df stay.
    const int room = height();
    detect_->foldForHeight(room < 860);
    also_->foldForHeight(room < 740);
    misfit_->foldForHeight(room < 700);
    sown_->foldForHeight(room < 640);
}

} // namespace filial::app
