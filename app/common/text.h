// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QString>

#include "core/numeric/result.h"

// Sentences and numbers as the window shows them: core's wording, through the translated catalogue.
namespace filial::app {

QString say(const Message& message);
QString pText(double p); ///< "0.498", "<0.001"
QString statisticText(double value);
QString fixedText(double value, int decimals);
QString fullText(double value); ///< all digits, for tooltips

} // namespace filial::app
