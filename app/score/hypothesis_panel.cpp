// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/score/hypothesis_panel.h"

#include <algorithm>

#include <QApplication>
#include <QHBoxLayout>
#include <QKeyEvent>
#include <QPainter>

#include "app/common/help_page.h"
#include "app/common/text.h"

namespace filial::app {

PlaceMark::PlaceMark(QLineEdit* field, QWidget* parent) : QWidget(parent), field_(field) {
    setObjectName("hypothesis-error");
    setFixedHeight(38);
    setFont(app::font(TextRole::Note));
}

void PlaceMark::setError(const std::optional<Error>& error) {
    error_ = error;
    setAccessibleName(error ? tr("Error: %1").arg(say(error->message)) : tr("No error"));
    setProperty("reason", error ? say(error->message) : QString());
    setLook(field_, look::kInvalid, error.has_value());
    update();
}

void PlaceMark::paintEvent(QPaintEvent* event) {
    Q_UNUSED(event)
    QPainter painter(this);
    if (!error_) {
        painter.setPen(tokens().muted);
        painter.drawText(rect(), Qt::AlignTop | Qt::AlignLeft | Qt::TextWordWrap,
                         tr("a ratio such as 9:3:3:1, a cross such as f2(coupling, r=fit), or words"));
        return;
    }
    painter.setPen(tokens().error);
    if (error_->place) {
        // The place is in bytes of what was typed; the mark stands under its character.
        const QByteArray typed = field_->text().toUtf8();
        const QString before = QString::fromUtf8(typed.left(static_cast<qsizetype>(*error_->place)));
        const int x = 9 + QFontMetrics(field_->font()).horizontalAdvance(before);
        painter.setRenderHint(QPainter::Antialiasing);
        painter.setPen(QPen(tokens().error, 2));
        painter.drawPolyline(QPolygonF({QPointF(x, 6), QPointF(x + 4, 1), QPointF(x + 8, 6)}));
    }
    painter.drawText(rect().adjusted(0, 7, 0, 0), Qt::AlignTop | Qt::AlignLeft | Qt::TextWordWrap,
                     QStringLiteral("× ") + say(error_->message));
}

HypothesisPanel::HypothesisPanel(Workbook* workbook, QWidget* parent)
    : QFrame(parent), workbook_(workbook), model_(new CatalogueModel(this)), field_(new QLineEdit(this)),
      mark_(new PlaceMark(field_, this)), list_(new CatalogueList(model_, this)),
      binding_title_(new Words(TextRole::Label, Ink::Muted, this)),
      fitted_title_(new Words(TextRole::Note, Ink::Muted, this)),
      verdict_(new Words(TextRole::BodyBold, Ink::Normal, this)), binding_(new BindingEditor(this)),
      fitted_(new QSpinBox(this)), use_(new QPushButton(tr("Use"), this)),
      cancel_(new QPushButton(tr("Cancel"), this)) {
    build();
    connect(field_, &QLineEdit::textEdited, this, &HypothesisPanel::textEdited);
    connect(list_->selectionModel(), &QItemSelectionModel::currentChanged, this,
            [this](const QModelIndex& now) { rowChosen(now.row()); });
    connect(list_, &QListView::doubleClicked, this, [this] { accept(); });
    connect(binding_, &BindingEditor::bindingChanged, this, &HypothesisPanel::preview);
    connect(fitted_, qOverload<int>(&QSpinBox::valueChanged), this, [this] { preview(); });
    connect(use_, &QPushButton::clicked, this, &HypothesisPanel::accept);
    connect(cancel_, &QPushButton::clicked, this, &HypothesisPanel::cancel);
    connect(workbook_, &Workbook::crossChanged, this, &HypothesisPanel::cancel);
    connect(workbook_, &Workbook::analysisChanged, this, [this] {
        if (isVisible())
            showVerdict();
    });
}

HypothesisPanel::~HypothesisPanel() {
    qApp->removeEventFilter(this);
}

void HypothesisPanel::build() {
    setObjectName("hypothesis-panel");
    setProperty(kHelpPage, "hypotheses.md");
    setAccessibleName(tr("Choose what the counts are tested against"));
    field_->setObjectName("hypothesis-field");
    field_->setAccessibleName(tr("Ratio, cross, or words to search for"));
    field_->setPlaceholderText(tr("type or search: 9:7, complementary, linked…"));
    field_->setMinimumHeight(32);
    field_->installEventFilter(this);
    binding_title_->say(tr("Which class is which term"));
    fitted_title_->say(
        tr("Of its proportions, how many were fitted from these counts elsewhere? 0 where they are known "
           "beforehand."));
    fitted_title_->setWordWrap(true);
    fitted_->setObjectName("fitted-elsewhere");
    fitted_->setAccessibleName(tr("Proportions fitted from these counts elsewhere"));
    fitted_->setRange(0, 63);
    fitted_->setFixedWidth(72);
    verdict_->setObjectName("preview-verdict");
    verdict_->setWordWrap(true);
    verdict_->setAlignment(Qt::AlignLeft | Qt::AlignBottom);
    use_->setObjectName("use-hypothesis");
    cancel_->setObjectName("cancel-hypothesis");
    setLook(use_, look::kPrimary);
    auto* left = new QVBoxLayout;
    left->setSpacing(space::kXs);
    left->addWidget(field_);
    left->addWidget(mark_);
    left->addWidget(list_, 1);
    auto* fitted = new QHBoxLayout;
    fitted->addWidget(fitted_title_, 1);
    fitted->addWidget(fitted_);
    auto* buttons = new QHBoxLayout;
    buttons->addStretch(1);
    buttons->addWidget(cancel_);
    buttons->addWidget(use_);
    auto* right = new QVBoxLayout;
    right->setSpacing(space::kS);
    right->addWidget(binding_title_);
    right->addWidget(binding_);
    right->addSpacing(space::kS);
    right->addLayout(fitted);
    right->addStretch(1);
    right->addWidget(verdict_);
    right->addLayout(buttons);
    auto* both = new QHBoxLayout(this);
    both->setContentsMargins(space::kL, space::kL, space::kL, space::kL);
    both->setSpacing(space::kXl);
    both->addLayout(left, 11);
    both->addLayout(right, 9);
}

void HypothesisPanel::paintEvent(QPaintEvent* event) {
    Q_UNUSED(event)
    QPainter painter(this);
    painter.setRenderHint(QPainter::Antialiasing);
    painter.setPen(QPen(tokens().controlBorder, 1));
    painter.setBrush(tokens().surface);
    painter.drawRoundedRect(QRectF(rect()).adjusted(0.5, 0.5, -0.5, -0.5), radius::kLane, radius::kLane);
}

void HypothesisPanel::place(const QRect& blank) {
    const QRect room = parentWidget()->rect().adjusted(space::kM, 0, -space::kM, -space::kM);
    const int width = std::min(room.width(), 740);
    const int top = blank.bottom() + space::kXs;
    const int x = std::clamp(blank.left() - space::kL, room.left(), std::max(room.left(), room.right() - width));
    setGeometry(x, top, width, std::clamp(room.bottom() - top, 260, 470));
}

void HypothesisPanel::openBelow(const QRect& blank) {
    const book::Cross* cross = workbook_->currentCross();
    if (cross == nullptr)
        return;
    place(blank);
    opening_ = true;
    candidate_.reset();
    candidate_name_.clear();
    fitted_->setValue(cross->hypothesis.fitted_elsewhere);
    model_->setFilter({}, {});
    model_->setClassCount(cross->classes.size());
    field_->setText(QString::fromStdString(cross->hypothesis.notation));
    field_->selectAll();
    mark_->setError({});
    if (const auto now = inheritance::read_hypothesis(cross->hypothesis.notation))
        setCandidate(now.value(), QString::fromStdString(cross->hypothesis.name), {});
    binding_->setVisible(candidate_.has_value());
    binding_title_->setVisible(candidate_.has_value());
    opening_ = false;
    show();
    raise();
    field_->setFocus();
    showVerdict();
    qApp->installEventFilter(this);
}

void HypothesisPanel::textEdited(const QString& text) {
    const auto read = inheritance::read_hypothesis(text.toStdString());
    std::optional<inheritance::Hypothesis> typed;
    if (read)
        typed = read.value();
    model_->setFilter(text, typed);
    const bool words = !text.contains(QLatin1Char(':')) && !text.contains(QLatin1Char('(')) && model_->entryCount() > 0;
    const bool wrong = !read && !text.trimmed().isEmpty() && !words;
    mark_->setError(wrong ? std::optional<Error>(read.error()) : std::nullopt);
    candidate_.reset();
    if (wrong || text.trimmed().isEmpty()) {
        model_->setFilter({}, {}); // the whole catalogue is better than an empty list
        workbook_->setPreview({});
        showVerdict();
        return;
    }
    if (const int row = model_->firstSelectable(); row >= 0)
        list_->setCurrentIndex(model_->index(row));
}

void HypothesisPanel::rowChosen(int row) {
    if (!model_->selectable(row))
        return;
    if (const inheritance::CatalogueEntry* entry = model_->entry(row)) {
        setCandidate(entry->hypothesis, QString::fromStdString(entry->name), entry->meanings);
        return;
    }
    if (const auto typed = inheritance::read_hypothesis(field_->text().toStdString()))
        setCandidate(typed.value(), {}, {});
}

void HypothesisPanel::setCandidate(const inheritance::Hypothesis& hypothesis, const QString& name,
                                   const std::vector<std::string>& meanings) {
    const book::Cross* cross = workbook_->currentCross();
    if (cross == nullptr)
        return;
    candidate_ = hypothesis;
    candidate_name_ = name;
    const bool fits = hypothesis.class_count() == cross->classes.size();
    binding_->setVisible(fits);
    binding_title_->setVisible(fits);
    if (fits) {
        QStringList terms;
        for (std::size_t i = 0; i < hypothesis.class_count(); ++i) {
            QString term = QString::fromStdString(hypothesis.term_text(i));
            if (i < meanings.size() && QString::fromStdString(meanings[i]) != term)
                term += QStringLiteral(" · ") + QString::fromStdString(meanings[i]);
            terms << term;
        }
        const bool same = hypothesis.notation() == cross->hypothesis.notation;
        binding_->setTerms(*cross, terms, same ? cross->hypothesis.binding : std::vector<std::size_t>{});
    }
    preview();
}

book::HypothesisUse HypothesisPanel::use() const {
    const book::Cross& cross = *workbook_->currentCross();
    book::HypothesisUse use = cross.hypothesis;
    use.notation = candidate_->notation();
    use.name = candidate_name_.toStdString();
    use.binding.clear();
    if (candidate_->class_count() == cross.classes.size())
        use.binding = binding_->binding();
    if (std::is_sorted(use.binding.begin(), use.binding.end()))
        use.binding.clear();
    use.fitted_elsewhere = fitted_->value();
    const bool seen = std::any_of(cross.families.begin(), cross.families.end(),
                                  [&](const book::Family& family) { return !family.blank(cross.classes.size()); });
    if (use.notation != cross.hypothesis.notation || use.binding != cross.hypothesis.binding)
        use.chosen_after_seeing = seen;
    return use;
}

void HypothesisPanel::preview() {
    if (opening_ || !candidate_ || workbook_->currentCross() == nullptr)
        return;
    book::Cross shown = *workbook_->currentCross();
    shown.hypothesis = use();
    workbook_->setPreview(std::move(shown));
    showVerdict();
}

void HypothesisPanel::showVerdict() {
    const report::CrossAnalysis& analysis = workbook_->analysis();
    QString text;
    if (candidate_ && analysis.hypothesis_error)
        text = say(analysis.hypothesis_error->message);
    else if (candidate_ && analysis.totals)
        text = say(analysis.totals->verdict_sentence);
    verdict_->say(text);
    use_->setEnabled(usable());
}

bool HypothesisPanel::usable() const {
    const book::Cross* cross = workbook_->currentCross();
    return cross != nullptr && candidate_ && candidate_->class_count() == cross->classes.size();
}

void HypothesisPanel::accept() {
    if (!isVisible() || !usable())
        return;
    const book::Cross& cross = *workbook_->currentCross();
    const book::HypothesisUse after = use();
    const book::HypothesisUse before = cross.hypothesis;
    const book::Id id = cross.id;
    workbook_->setPreview({});
    if (!(after == before))
        workbook_->perform({book::SetHypothesis{id, before, after}});
    close();
}

void HypothesisPanel::cancel() {
    if (!isVisible())
        return;
    workbook_->setPreview({});
    close();
}

void HypothesisPanel::close() {
    qApp->removeEventFilter(this);
    hide();
    Q_EMIT closed();
}

void HypothesisPanel::moveRow(int by) {
    int row = list_->currentIndex().isValid() ? list_->currentIndex().row() : -1;
    do
        row += by;
    while (row >= 0 && row < model_->rowCount() && !model_->selectable(row));
    if (model_->selectable(row))
        list_->setCurrentIndex(model_->index(row));
}

void HypothesisPanel::keyPressEvent(QKeyEvent* event) {
    if (event->key() == Qt::Key_Escape)
        return cancel();
    if (event->key() == Qt::Key_Return || event->key() == Qt::Key_Enter)
        return accept();
    QFrame::keyPressEvent(event);
}

bool HypothesisPanel::eventFilter(QObject* object, QEvent* event) {
    if (object == field_ && event->type() == QEvent::KeyPress) {
        const int key = static_cast<QKeyEvent*>(event)->key(); // NOLINT: the type was asked for above
        if (key == Qt::Key_Up || key == Qt::Key_Down) {
            moveRow(key == Qt::Key_Up ? -1 : 1);
            return true;
        }
    }
    if (event->type() == QEvent::MouseButtonPress && isVisible()) {
        const auto* widget = qobject_cast<QWidget*>(object);
        if (widget != nullptr && widget->window() == window() && widget != this && !isAncestorOf(widget))
            cancel();
    }
    return QFrame::eventFilter(object, event);
}

} // namespace filial::app
