// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/score/score_pane.h"

#include <algorithm>
#include <map>

#include <QAction>
#include <QEvent>
#include <QHeaderView>
#include <QScrollBar>

#include "app/common/text.h"
#include "app/score/hypothesis_panel.h"
#include "core/inheritance/catalogue.h"
#include "core/inheritance/class_order.h"
#include "core/report/cross_analysis.h"

namespace filial::app {

namespace {

TextButton* toggle(const QString& text, const char* id, QWidget* parent) {
    auto* button = new TextButton(text, parent);
    button->setObjectName(QString::fromLatin1(id));
    button->setCheckable(true);
    return button;
}

/// The name chosen with the hypothesis, or the catalogue's where the notation has one meaning only.
QString meaningOf(const book::HypothesisUse& use) {
    if (!use.name.empty() || use.notation.empty())
        return QString::fromStdString(use.name);
    static std::map<std::string, QString> known;
    const auto found = known.find(use.notation);
    if (found != known.end())
        return found->second;
    QStringList names;
    for (const inheritance::CatalogueEntry& entry : inheritance::catalogue()) {
        if (entry.hypothesis.notation() == use.notation)
            names << QString::fromStdString(entry.name);
    }
    return known[use.notation] = names.size() == 1 ? names.front() : QString();
}

bool countsSeen(const book::Cross& cross) {
    return std::any_of(cross.families.begin(), cross.families.end(),
                       [&](const book::Family& family) { return !family.blank(cross.classes.size()); });
}

} // namespace

ScorePane::ScorePane(ScoreView* view, QWidget* parent)
    : QWidget(parent), view_(view), workbook_(view->workbook()), model_(new FamilyModel(workbook_, this)),
      name_(new Words(TextRole::Verdict, Ink::Normal, this)), against_(new Words(TextRole::Verdict, Ink::Normal, this)),
      sub_(new Words(TextRole::Body, Ink::Muted, this)), notes_(new Words(TextRole::Note, Ink::Muted, this)),
      blank_(new HypothesisBlank(this)), sown_(new QPushButton(tr("Sown, up, alive"), this)),
      paste_(new QPushButton(tr("Paste"), this)), join_(new TextButton({}, this)), with_(new TextButton({}, this)),
      table_(new FamilyTable(workbook_, model_, this)), totals_(new TotalsTable(view, table_, this)),
      map_(new DepartureMapWidget(view, table_, this)), chart_(new ChartWidget(this)), twin_(new QTableWidget(this)),
      show_map_(toggle(tr("Departure"), "show-departure", this)),
      show_chart_(toggle(tr("Observed and expected"), "show-chart", this)),
      as_table_(toggle(tr("As table"), "show-as-table", this)), panel_(new HypothesisPanel(workbook_, this)) {
    build();
    wire();
    refresh();
    showPicture();
}

void ScorePane::build() {
    setObjectName("score-pane");
    setAccessibleName(tr("Score: families and counts"));
    name_->setObjectName("cross-name");
    against_->say(tr("tested against"));
    sub_->setObjectName("hypothesis-meaning");
    notes_->setObjectName("table-notes");
    sown_->setObjectName("sown-columns");
    sown_->setCheckable(true);
    sown_->setToolTip(tr("Columns for seeds sown, plants up and plants alive"));
    paste_->setObjectName("paste");
    paste_->setToolTip(tr("Paste a block copied from a spreadsheet at the current cell (Ctrl+V)"));
    join_->setObjectName("join");
    with_->setObjectName("with-set-aside");
    twin_->setObjectName("twin-table");
    twin_->setAccessibleName(tr("Departure, observed and expected as a table"));
    twin_->setEditTriggers(QAbstractItemView::NoEditTriggers);
    twin_->setFrameShape(QFrame::NoFrame);
    twin_->setShowGrid(false);
    twin_->verticalHeader()->hide();
    twin_->verticalHeader()->setDefaultSectionSize(26);
    twin_->horizontalHeader()->setDefaultAlignment(Qt::AlignRight | Qt::AlignVCenter);
    chart_->setObjectName("observed-expected-chart");
    chart_->setAccessibleName(tr("Observed and expected"));
    auto* pictures = new QButtonGroup(this);
    pictures->addButton(show_map_);
    pictures->addButton(show_chart_);
    show_map_->setChecked(true);
    twin_->viewport()->setAutoFillBackground(false);
    // A click does not take the keys away from the table.
    for (QPushButton* button :
         std::initializer_list<QPushButton*>{sown_, paste_, join_, with_, show_map_, show_chart_, as_table_})
        button->setFocusPolicy(Qt::TabFocus);
    panel_->hide();
    setFocusProxy(table_);
}

void ScorePane::wire() {
    connect(view_, &ScoreView::changed, this, &ScorePane::refresh);
    connect(table_, &FamilyTable::heightChanged, this, &ScorePane::arrange);
    connect(model_, &FamilyModel::structureChanged, this, &ScorePane::arrange);
    connect(table_, &FamilyTable::joinRequested, this, &ScorePane::joinClasses);
    connect(table_->classHeader(), &ClassHeader::splitRequested, this, &ScorePane::split);
    connect(table_->classHeader(), &ClassHeader::chosenChanged, this, [this] {
        const std::size_t chosen = table_->classHeader()->chosenClasses().size();
        join_->setText(tr("Join %n classes", nullptr, static_cast<int>(chosen)));
        arrange();
    });
    connect(join_, &QPushButton::clicked, this, [this] {
        const auto& chosen = table_->classHeader()->chosenClasses();
        joinClasses({chosen.begin(), chosen.end()});
    });
    connect(blank_, &QPushButton::clicked, this, &ScorePane::chooseHypothesis);
    connect(sown_, &QPushButton::toggled, this, [this](bool on) {
        table_->showSownColumns(on);
        arrange();
    });
    connect(paste_, &QPushButton::clicked, this, [this] {
        if (!table_->currentIndex().isValid())
            table_->setCurrentIndex(model_->index(0, std::min(1, model_->columnCount() - 1)));
        table_->setFocus();
        for (QAction* action : table_->tableActions()) {
            if (action->objectName() == QStringLiteral("paste-block"))
                action->trigger();
        }
    });
    connect(with_, &QPushButton::clicked, this, [this] { view_->setWithSetAside(!view_->withSetAside()); });
    for (TextButton* button : {show_map_, show_chart_, as_table_})
        connect(button, &QPushButton::toggled, this, &ScorePane::showPicture);
    connect(panel_, &HypothesisPanel::closed, this, [this] { table_->setFocus(); });
}

void ScorePane::refresh() {
    const book::Cross* cross = workbook_->shownCross();
    const bool any = cross != nullptr;
    if (!any)
        name_->say(tr("No cross in this book yet."));
    for (QWidget* widget : std::initializer_list<QWidget*>{against_, blank_, sown_, paste_, table_, totals_})
        widget->setVisible(any);
    if (!any) {
        arrange();
        return;
    }
    const auto bound = report::bound_hypothesis(*cross);
    blank_->setNotation(QString::fromStdString(bound ? inheritance::notation_in_class_order(bound.value())
                                                     : cross->hypothesis.notation));
    QStringList meaning;
    if (const QString means = meaningOf(cross->hypothesis); !means.isEmpty())
        meaning << means;
    if (!cross->date.empty())
        meaning << tr("sown %1").arg(QString::fromStdString(cross->date));
    if (!cross->stage.empty())
        meaning << tr("scored at the %1").arg(QString::fromStdString(cross->stage));
    meaning_ = meaning.join(QStringLiteral(" · "));
    sub_->say(meaning_, meaning_);
    paste_->setEnabled(!workbook_->readOnly());
    refreshNotes();
    refreshChart();
    if (twin_->isVisible())
        refreshTwin();
    arrange();
}

void ScorePane::refreshNotes() {
    QStringList notes;
    for (const Message& note : view_->analysis().notes)
        notes << say(note);
    if (const auto& error = view_->analysis().hypothesis_error;
        error && !blank_->text().isEmpty() && !workbook_->shownCross()->hypothesis.notation.empty())
        notes << say(error->message);
    notes_->setText(notes.join(QStringLiteral(" · ")));
    with_->setText(view_->withSetAside() ? tr("without the set aside") : tr("with the set aside"));
}

void ScorePane::refreshChart() {
    if (!chart_->isVisible())
        return;
    report::Chart shown;
    shown.kind = report::Chart::Kind::ObservedExpected;
    shown.title = tr("Observed (filled) beside expected (outline)").toStdString();
    shown.y_title = tr("plants").toStdString();
    shown.series = {{tr("Observed").toStdString(), {}, {}, {}}, {tr("Expected").toStdString(), {}, {}, {}}};
    for (const report::ClassDeparture& one : map_->map().classes) {
        shown.labels.push_back(one.label);
        shown.series[0].values.push_back(one.observed);
        shown.series[1].values.push_back(one.expected);
    }
    chart_->setData(shown);
    chart_->setAccessibleDescription(map_->accessibleDescription());
}

void ScorePane::refreshTwin() {
    const auto rows = map_->tableRows();
    twin_->setColumnCount(static_cast<int>(rows.front().size()));
    twin_->setRowCount(static_cast<int>(rows.size()) - 1);
    twin_->setHorizontalHeaderLabels(rows.front());
    for (std::size_t r = 1; r < rows.size(); ++r) {
        for (int c = 0; c < twin_->columnCount(); ++c) {
            auto* item = new QTableWidgetItem(rows[r][c]);
            item->setTextAlignment((c == 0 ? Qt::AlignLeft : Qt::AlignRight) | Qt::AlignVCenter);
            twin_->setItem(static_cast<int>(r) - 1, c, item);
        }
    }
    twin_->horizontalHeaderItem(0)->setTextAlignment(Qt::AlignLeft | Qt::AlignVCenter);
    twin_->setColumnWidth(0, 170);
    for (int c = 1; c < twin_->columnCount(); ++c)
        twin_->setColumnWidth(c, c + 1 == twin_->columnCount() ? 140 : 104);
}

void ScorePane::showPicture() {
    const bool table = as_table_->isChecked();
    const bool chart = show_chart_->isChecked();
    map_->setVisible(!table && !chart);
    chart_->setVisible(!table && chart);
    twin_->setVisible(table);
    refreshChart();
    if (table)
        refreshTwin();
    arrange();
}

void ScorePane::showAsTable() {
    as_table_->toggle();
}

void ScorePane::chooseHypothesis() {
    if (workbook_->currentCross() == nullptr || workbook_->readOnly())
        return;
    panel_->openBelow(blank_->geometry());
}

void ScorePane::joinClasses(const std::vector<std::size_t>& classes) {
    const book::Cross* cross = workbook_->currentCross();
    if (cross == nullptr || classes.size() < 2)
        return;
    book::HypothesisUse after = cross->hypothesis;
    std::vector<std::size_t> joined = classes;
    // A class that was joined already brings its partners along.
    std::erase_if(after.joins, [&](const std::vector<std::size_t>& group) {
        const bool touched = std::any_of(group.begin(), group.end(), [&](std::size_t member) {
            return std::find(classes.begin(), classes.end(), member) != classes.end();
        });
        if (touched)
            joined.insert(joined.end(), group.begin(), group.end());
        return touched;
    });
    std::sort(joined.begin(), joined.end());
    joined.erase(std::unique(joined.begin(), joined.end()), joined.end());
    after.joins.push_back(joined);
    after.joins_after_seeing = after.joins_after_seeing || countsSeen(*cross);
    table_->classHeader()->clearChosen();
    workbook_->perform({book::SetHypothesis{cross->id, cross->hypothesis, after}});
}

void ScorePane::split(std::size_t join) {
    const book::Cross* cross = workbook_->currentCross();
    if (cross == nullptr || join >= cross->hypothesis.joins.size())
        return;
    book::HypothesisUse after = cross->hypothesis;
    after.joins.erase(after.joins.begin() + static_cast<std::ptrdiff_t>(join));
    after.joins_after_seeing = after.joins_after_seeing && !after.joins.empty();
    workbook_->perform({book::SetHypothesis{cross->id, cross->hypothesis, after}});
}

void ScorePane::resizeEvent(QResizeEvent* event) {
    QWidget::resizeEvent(event);
    arrange();
}

bool ScorePane::event(QEvent* event) {
    if (event->type() == QEvent::PaletteChange)
        update();
    return QWidget::event(event);
}

void ScorePane::arrangeHead(int left, int width) {
    const int top = space::kL;
    const int right = left + width;
    const QSize pasteSize(paste_->sizeHint().width(), 32);
    paste_->setGeometry(right - pasteSize.width(), top, pasteSize.width(), 32);
    const int sownWidth = sown_->sizeHint().width();
    sown_->setGeometry(paste_->x() - space::kS - sownWidth, top, sownWidth, 32);
    const int againstWidth = against_->sizeHint().width();
    const QString name =
        workbook_->shownCross() == nullptr ? name_->text() : QString::fromStdString(workbook_->shownCross()->name);
    const QFontMetrics metrics(name_->font());
    const int wanted = metrics.horizontalAdvance(name) + 1;
    // Where the head is too long, the button that also has a key makes room.
    const bool tight = wanted + againstWidth + blank_->sizeHint().width() + 34 > sown_->x() - left;
    paste_->setVisible(workbook_->shownCross() != nullptr && !tight);
    if (tight)
        sown_->move(right - sownWidth, top);
    const int room = sown_->x() - space::kM - left;
    const int blankWidth = std::min(blank_->sizeHint().width(), std::max(80, room - againstWidth - 100));
    const int nameWidth = workbook_->shownCross() == nullptr
                              ? width
                              : std::clamp(room - againstWidth - blankWidth - 22, std::min(60, wanted), wanted);
    const QString shown = metrics.elidedText(name, Qt::ElideRight, nameWidth);
    name_->say(shown, name);
    // No wider than its letters: what follows stands beside them.
    name_->setGeometry(left, top, std::min(nameWidth, metrics.horizontalAdvance(shown) + 1), 32);
    against_->setGeometry(name_->x() + name_->width() + 14, top, againstWidth, 32);
    blank_->setGeometry(against_->x() + againstWidth + 6, top, blankWidth, 32);
    const bool joinable = table_->classHeader()->chosenClasses().size() >= 2;
    join_->setVisible(joinable);
    const int joinWidth = joinable ? join_->sizeHint().width() : 0;
    join_->setGeometry(right - joinWidth, top + 34, joinWidth, 24);
    sub_->setGeometry(left, top + 34, width - joinWidth - space::kS, 22);
    sub_->say(QFontMetrics(sub_->font()).elidedText(meaning_, Qt::ElideRight, sub_->width()), meaning_);
}

void ScorePane::showPictures(bool pictured) {
    for (QWidget* button : std::initializer_list<QWidget*>{show_map_, show_chart_, as_table_})
        button->setVisible(pictured);
    map_->setVisible(pictured && show_map_->isChecked() && !as_table_->isChecked());
    const bool stale = !chart_->isVisible() && !twin_->isVisible();
    chart_->setVisible(pictured && show_chart_->isChecked() && !as_table_->isChecked());
    twin_->setVisible(pictured && as_table_->isChecked());
    if (stale && chart_->isVisible())
        refreshChart();
    if (stale && twin_->isVisible())
        refreshTwin();
}

void ScorePane::arrange() {
    const int left = space::kXl;
    const int width = this->width() - 2 * space::kXl;
    if (width <= 0)
        return;
    arrangeHead(left, width);
    const bool any = workbook_->shownCross() != nullptr && model_->classCount() > 0;
    for (QWidget* widget : std::initializer_list<QWidget*>{show_map_, show_chart_, as_table_, notes_, with_})
        widget->setVisible(any);
    if (!any) {
        for (QWidget* widget : std::initializer_list<QWidget*>{map_, chart_, twin_, table_, totals_})
            widget->hide();
        return;
    }
    int y = space::kL + 34 + (sub_->text().isEmpty() && !join_->isVisible() ? 0 : 22) + space::kXs;
    const int bottom = height() - space::kS;
    const bool noted = !notes_->text().isEmpty();
    const int notesHeight = noted ? 22 : 0;
    const int pictureLeast = height() < 560 ? 96 : 150;
    // A low window folds the picture away before the counts.
    const bool pictured = bottom - y - totals_->height() - notesHeight >= 30 + pictureLeast + 96;
    const int below = totals_->height() + notesHeight + space::kXs + (pictured ? 26 + pictureLeast : 0);
    table_->layOutColumns(width);
    const int tableHeight = std::clamp(table_->contentHeight(), 96, std::max(96, bottom - y - below));
    // A scroll bar takes its width from the columns, so that nothing hides under it.
    const bool scrolls = table_->contentHeight() > tableHeight;
    if (scrolls)
        table_->layOutColumns(width - table_->verticalScrollBar()->sizeHint().width());
    table_->setGeometry(left, y, width, tableHeight);
    y += tableHeight;
    totals_->setGeometry(left, y, width, totals_->height());
    totals_->follow();
    y += totals_->height();
    notes_->setGeometry(left, y, std::min(width - 150, notes_->sizeHint().width() + space::kS), notesHeight);
    notes_->setVisible(noted);
    with_->setGeometry(notes_->x() + notes_->width(), y - 1, with_->sizeHint().width(), 24);
    with_->setVisible(noted && view_->canShowSetAside());
    y += notesHeight + space::kXs;
    int x = left + width;
    for (TextButton* button : {as_table_, show_chart_, show_map_}) {
        const int own = button->sizeHint().width() + space::kS;
        x -= own;
        button->setGeometry(x, y, own, 24);
    }
    y += 26;
    const QRect picture(left, y, width, std::min(bottom - y, 280));
    map_->setGeometry(picture);
    chart_->setGeometry(picture);
    twin_->setGeometry(picture);
    showPictures(pictured);
    if (panel_->isVisible())
        panel_->place(blank_->geometry());
}

} // namespace filial::app
