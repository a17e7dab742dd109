// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/shell/new_cross_page.h"

#include <QButtonGroup>
#include <QHBoxLayout>
#include <QKeyEvent>
#include <QLabel>
#include <QLineEdit>
#include <QPushButton>
#include <QRadioButton>
#include <QRegularExpression>
#include <QVBoxLayout>

#include "app/common/theme.h"
#include "app/shell/class_preview.h"
#include "app/shell/proposed_ratio.h"

namespace filial::app {
namespace {

constexpr std::size_t kClassesAtMost = 64; // as many terms as a ratio may have
constexpr int kFirstFamilies = 4;          // empty rows to begin with

/// A question: its number, the words, what helps, then the fields.
QVBoxLayout* question(QWidget* box, const QString& words, const QString& help) {
    auto* column = new QVBoxLayout(box);
    column->setContentsMargins(0, 0, 0, 0);
    column->setSpacing(space::kS);
    auto* head = new QLabel(words);
    head->setFont(app::font(TextRole::Verdict));
    column->addWidget(head);
    auto* note = new QLabel(help);
    note->setFont(app::font(TextRole::Note));
    note->setWordWrap(true);
    setInk(note, Ink::Muted);
    column->addWidget(note);
    return column;
}

QLineEdit* lineEdit(const QString& name, const QString& example) {
    auto* edit = new QLineEdit;
    edit->setAccessibleName(name);
    edit->setPlaceholderText(example);
    edit->setMinimumHeight(32);
    return edit;
}

QStringList pieces(const QString& text) {
    static const QRegularExpression kBetween(QStringLiteral("\\s*[,;]\\s*"));
    QStringList found;
    for (const QString& piece : text.split(kBetween, Qt::SkipEmptyParts))
        if (!piece.trimmed().isEmpty())
            found << piece.trimmed();
    return found;
}

} // namespace

NewCrossPage::NewCrossPage(QWidget* parent) : QScrollArea(parent) {
    setWidgetResizable(true);
    setFrameShape(QFrame::NoFrame);
    setHorizontalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
    setFocusPolicy(Qt::NoFocus);
    setAccessibleName(tr("New cross"));
}

void NewCrossPage::begin() {
    rows_.clear();
    build();
    addTrait(QString(), QString());
    follow();
    first_->setFocus(Qt::TabFocusReason);
}

void NewCrossPage::build() {
    auto* page = new QWidget;
    auto* outer = new QHBoxLayout(page);
    outer->setContentsMargins(space::kXl, space::kXxl, space::kXl, space::kXl);
    auto* centre = new QWidget;
    centre->setMaximumWidth(720);
    outer->addStretch(1);
    outer->addWidget(centre, 100);
    outer->addStretch(1);
    auto* column = new QVBoxLayout(centre);
    column->setContentsMargins(0, 0, 0, 0);
    column->setSpacing(space::kXxl);
    column->addWidget(crossedQuestion());
    column->addWidget(generationQuestion());
    column->addWidget(classesQuestion());
    auto* acts = new QHBoxLayout;
    acts->setSpacing(space::kM);
    create_ = new QPushButton(tr("Begin counting"));
    setLook(create_, look::kPrimary);
    cancel_ = new QPushButton(tr("Cancel"));
    problem_ = new QLabel;
    problem_->setWordWrap(true);
    setInk(problem_, Ink::Muted);
    acts->addWidget(create_);
    acts->addWidget(cancel_);
    acts->addWidget(problem_, 1);
    column->addLayout(acts);
    column->addStretch(1);
    connect(create_, &QPushButton::clicked, this, &NewCrossPage::answered);
    connect(cancel_, &QPushButton::clicked, this, &NewCrossPage::cancelled);
    setWidget(page);
}

QWidget* NewCrossPage::crossedQuestion() {
    auto* box = new QWidget;
    auto* column =
        question(box, tr("1  What was crossed?"), tr("Two lines or plants. Leave it empty if you do not know."));
    auto* row = new QHBoxLayout;
    row->setSpacing(space::kS);
    first_ = lineEdit(tr("First parent"), tr("K14"));
    second_ = lineEdit(tr("Second parent"), tr("M02"));
    auto* times = new QLabel(QStringLiteral("×"));
    row->addWidget(first_, 1);
    row->addWidget(times);
    row->addWidget(second_, 1);
    row->addStretch(1);
    column->addLayout(row);
    return box;
}

QWidget* NewCrossPage::generationQuestion() {
    auto* box = new QWidget;
    auto* column = question(box, tr("2  Which generation was scored?"),
                            tr("It decides which ratio is proposed; you can change the ratio at any time."));
    auto* row = new QHBoxLayout;
    row->setSpacing(space::kXl);
    generations_ = new QButtonGroup(box);
    for (const char* one : kGenerations) {
        auto* choice = new QRadioButton(QString::fromLatin1(one));
        generations_->addButton(choice, static_cast<int>(generations_->buttons().size()));
        row->addWidget(choice);
    }
    generations_->button(0)->setChecked(true);
    row->addStretch(1);
    column->addLayout(row);
    connect(generations_, &QButtonGroup::idToggled, this, &NewCrossPage::follow);
    return box;
}

QWidget* NewCrossPage::classesQuestion() {
    auto* box = new QWidget;
    auto* column = question(box, tr("3  Which classes?"),
                            tr("A trait, and its levels with commas between. Write the dominant level first; of three, "
                               "the heterozygote in the middle."));
    traitRows_ = new QVBoxLayout;
    traitRows_->setSpacing(space::kS);
    column->addLayout(traitRows_);
    more_ = new QPushButton(tr("Another trait"));
    setLook(more_, look::kQuiet);
    column->addWidget(more_, 0, Qt::AlignLeft);
    connect(more_, &QPushButton::clicked, this, [this] {
        addTrait({}, {});
        rows_.last().name->setFocus(Qt::TabFocusReason);
    });
    preview_ = new ClassPreview;
    column->addWidget(preview_);
    return box;
}

void NewCrossPage::addTrait(const QString& name, const QString& levels) {
    static const char* const kNames[] = {"stem", "leaf", "flower"};
    static const char* const kLevels[] = {"purple, green", "hairy, smooth", "single, double"};
    const auto at = static_cast<std::size_t>(rows_.size());
    auto* box = new QWidget;
    auto* row = new QHBoxLayout(box);
    row->setContentsMargins(0, 0, 0, 0);
    row->setSpacing(space::kS);
    auto* nameEdit = lineEdit(tr("Trait %1").arg(at + 1), QString::fromLatin1(kNames[at % 3]));
    auto* levelsEdit = lineEdit(tr("Levels of trait %1").arg(at + 1), QString::fromLatin1(kLevels[at % 3]));
    nameEdit->setText(name);
    levelsEdit->setText(levels);
    nameEdit->setMaximumWidth(180);
    row->addWidget(nameEdit, 1);
    row->addWidget(new QLabel(QStringLiteral(":")));
    row->addWidget(levelsEdit, 3);
    traitRows_->addWidget(box);
    rows_.append({box, nameEdit, levelsEdit});
    orderTabs();
    for (QLineEdit* edit : {nameEdit, levelsEdit}) {
        connect(edit, &QLineEdit::textEdited, this, &NewCrossPage::follow);
        connect(edit, &QLineEdit::returnPressed, this, [this] {
            if (create_->isEnabled())
                Q_EMIT answered();
        });
    }
}

void NewCrossPage::orderTabs() {
    // Rows are made after the buttons below them, but are gone through before.
    QList<QWidget*> order{first_, second_};
    for (QAbstractButton* choice : generations_->buttons())
        order << choice;
    for (const TraitRow& row : rows_)
        order << row.name << row.levels;
    order << more_ << create_ << cancel_;
    for (qsizetype i = 1; i < order.size(); ++i)
        setTabOrder(order[i - 1], order[i]);
}

std::vector<book::Trait> NewCrossPage::traits() const {
    std::vector<book::Trait> found;
    for (const TraitRow& row : rows_) {
        book::Trait trait;
        trait.name = row.name->text().trimmed().toStdString();
        for (const QString& level : pieces(row.levels->text()))
            trait.levels.push_back({level.toStdString(), {}});
        if (trait.levels.empty())
            continue;
        if (trait.name.empty())
            trait.name = tr("trait %1").arg(found.size() + 1).toStdString();
        found.push_back(std::move(trait));
    }
    return found;
}

QString NewCrossPage::problem() const {
    const std::vector<book::Trait> found = traits();
    if (found.empty())
        return tr("Write the levels of at least one trait.");
    std::size_t classes = 1;
    for (const book::Trait& trait : found) {
        const QString name = QString::fromStdString(trait.name);
        if (trait.levels.size() < 2)
            return tr("%1 has one level; a trait that segregates has two or more.").arg(name);
        for (std::size_t i = 0; i < trait.levels.size(); ++i)
            for (std::size_t j = 0; j < i; ++j)
                if (trait.levels[i].label == trait.levels[j].label)
                    return tr("%1 names %2 twice.").arg(name, QString::fromStdString(trait.levels[i].label));
        classes *= trait.levels.size();
        if (classes > kClassesAtMost)
            return tr("These traits make more than %1 classes.").arg(kClassesAtMost);
    }
    for (std::size_t i = 0; i < found.size(); ++i)
        for (std::size_t j = 0; j < i; ++j)
            if (found[i].name == found[j].name)
                return tr("Two traits are called %1.").arg(QString::fromStdString(found[i].name));
    return {};
}

void NewCrossPage::follow() {
    const QString missing = problem();
    problem_->setText(missing);
    create_->setEnabled(missing.isEmpty());
    more_->setVisible(!traits().empty() && traits().size() == static_cast<std::size_t>(rows_.size()));
    preview_->setCross(missing.isEmpty() ? cross() : book::Cross());
}

QString NewCrossPage::generation() const {
    const int chosen = generations_->checkedId();
    return chosen == 3 ? QString() : QString::fromLatin1(kGenerations[chosen]);
}

QStringList NewCrossPage::parents() const {
    QStringList names;
    for (const QLineEdit* edit : {first_, second_})
        if (!edit->text().trimmed().isEmpty())
            names << edit->text().trimmed();
    return names;
}

book::Cross NewCrossPage::cross() const {
    book::Cross made;
    made.id = book::new_id();
    made.generation = generation().toStdString();
    QStringList words;
    if (!parents().isEmpty())
        words << parents().join(QStringLiteral(" × "));
    if (!generation().isEmpty())
        words << generation();
    made.name = words.isEmpty() ? tr("New cross").toStdString() : words.join(QStringLiteral(", ")).toStdString();
    made.traits = traits();
    made.classes = book::product_classes(made.traits);
    made.hypothesis.notation = proposedRatio(made.generation, made.traits);
    const std::string stem = made.generation.empty() || made.generation == "test cross" ? "" : made.generation + "-";
    for (int i = 1; i <= kFirstFamilies; ++i) {
        const std::string label = stem.empty() ? "family " + std::to_string(i) : stem + "0" + std::to_string(i);
        made.families.push_back(book::new_family(label, made.classes.size()));
    }
    return made;
}

void NewCrossPage::keyPressEvent(QKeyEvent* event) {
    if (event->key() == Qt::Key_Escape)
        Q_EMIT cancelled();
    else
        QScrollArea::keyPressEvent(event);
}

} // namespace filial::app
