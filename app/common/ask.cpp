// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/common/ask.h"

#include <utility>

#include <QDesktopServices>
#include <QDialog>
#include <QFileDialog>
#include <QHBoxLayout>
#include <QLabel>
#include <QPushButton>
#include <QUrl>
#include <QVBoxLayout>

#include "app/common/theme.h"

namespace filial::app {
namespace {

class RealAsk : public Ask {
public:
    QString openFile(QWidget* parent, const QString& title, const QString& filter) override {
        return QFileDialog::getOpenFileName(parent, title, {}, filter);
    }
    QString saveFile(QWidget* parent, const QString& title, const QString& suggestion, const QString& filter) override {
        return QFileDialog::getSaveFileName(parent, title, suggestion, filter);
    }
    int choose(QWidget* parent, const QString& question, const QString& detail, const QStringList& answers) override;
    void showFile(const QString& path) override { QDesktopServices::openUrl(QUrl::fromLocalFile(path)); }
};

int RealAsk::choose(QWidget* parent, const QString& question, const QString& detail, const QStringList& answers) {
    QDialog dialog(parent);
    dialog.setWindowTitle(question);
    auto* column = new QVBoxLayout(&dialog);
    column->setContentsMargins(space::kXl, space::kXl, space::kXl, space::kL);
    column->setSpacing(space::kS);
    auto* head = new QLabel(question);
    head->setFont(font(TextRole::Verdict));
    head->setWordWrap(true);
    column->addWidget(head);
    auto* body = new QLabel(detail);
    body->setWordWrap(true);
    body->setMinimumWidth(420);
    column->addWidget(body);
    column->addSpacing(space::kM);
    auto* row = new QHBoxLayout;
    row->setSpacing(space::kM);
    int chosen = -1;
    row->addStretch(1);
    for (int i = static_cast<int>(answers.size()) - 1; i >= 0; --i) {
        auto* button = new QPushButton(answers[i]);
        setLook(button, look::kPrimary, i == 0);
        button->setDefault(i == 0);
        QObject::connect(button, &QPushButton::clicked, &dialog, [&dialog, &chosen, i] {
            chosen = i;
            dialog.accept();
        });
        row->addWidget(button);
    }
    column->addLayout(row);
    dialog.exec();
    return chosen;
}

std::unique_ptr<Ask>& current() {
    static std::unique_ptr<Ask> ask = std::make_unique<RealAsk>();
    return ask;
}

} // namespace

Ask& Ask::instance() {
    return *current();
}

void Ask::replace(std::unique_ptr<Ask> other) {
    if (other)
        current() = std::move(other);
    else
        current() = std::make_unique<RealAsk>();
}

} // namespace filial::app
