// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/common/text.h"

#include <QCoreApplication>

#include "core/report/wording.h"

namespace filial::app {
namespace {

/// The English wording is the source text of the translation.
std::string translated(MessageId id) {
    const std::string english(report::english(id));
    return QCoreApplication::translate("core", english.c_str()).toStdString();
}

} // namespace

QString say(const Message& message) {
    return QString::fromStdString(report::render(message, translated));
}

QString pText(double p) {
    return QString::fromStdString(report::p_text(p));
}

QString statisticText(double value) {
    return QString::fromStdString(report::statistic_text(value));
}

QString fixedText(double value, int decimals) {
    return QString::fromStdString(report::fixed_text(value, decimals));
}

QString fullText(double value) {
    return QString::fromStdString(report::full_text(value));
}

} // namespace filial::app
