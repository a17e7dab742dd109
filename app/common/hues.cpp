// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/common/hues.h"

#include <array>

#include <QRegularExpression>
#include <QStringList>

namespace filial::app {
namespace {

struct Word {
    const char* word;
    const char* name;
    const char* light;
    const char* dark;
};

constexpr std::array<Word, 32> kWords{{
    {"purple", "purple", "#7A3E98", "#A96BCB"},  {"violet", "purple", "#7A3E98", "#A96BCB"},
    {"lilac", "purple", "#A878C4", "#C197DC"},   {"mauve", "purple", "#A878C4", "#C197DC"},
    {"green", "green", "#2E8B57", "#3FA86E"},    {"olive", "green", "#6B7A2A", "#96A64B"},
    {"white", "white", "#FFFFFF", "#FFFFFF"},    {"albino", "white", "#FFFFFF", "#FFFFFF"},
    {"yellow", "yellow", "#F0D93C", "#F2DE55"},  {"gold", "yellow", "#D9AE2B", "#E2BD4A"},
    {"golden", "yellow", "#D9AE2B", "#E2BD4A"},  {"red", "red", "#C0392B", "#E06152"},
    {"scarlet", "red", "#D0342C", "#EA5E50"},    {"crimson", "red", "#A61C3C", "#D9506F"},
    {"pink", "pink", "#E79AB8", "#EDAAC4"},      {"magenta", "pink", "#B83280", "#DA63A8"},
    {"black", "black", "#1A1A1A", "#050505"},    {"brown", "brown", "#7B4B2A", "#A97249"},
    {"chestnut", "brown", "#7A3B22", "#A9614A"}, {"tan", "brown", "#C49A6C", "#CDA77C"},
    {"buff", "brown", "#D8B98A", "#DDC196"},     {"blue", "blue", "#2F6DB5", "#5C97DA"},
    {"orange", "orange", "#E0812B", "#EE9A4D"},  {"amber", "orange", "#E0A02B", "#EBB24F"},
    {"bronze", "bronze", "#8C6A2F", "#B8935A"},  {"copper", "bronze", "#A5643A", "#C98A60"},
    {"cream", "cream", "#F3E6C0", "#F3E6C0"},    {"ivory", "cream", "#F6EFD9", "#F6EFD9"},
    {"grey", "grey", "#8B9194", "#9CA3A6"},      {"gray", "grey", "#8B9194", "#9CA3A6"},
    {"silver", "grey", "#BCC1C4", "#C4C9CC"},    {"turquoise", "blue", "#2A9D9B", "#4DBDBB"},
}};

QColor modified(const QColor& colour, const QString& modifier) {
    if (modifier == QLatin1String("pale") || modifier == QLatin1String("light"))
        return QColor::fromHslF(colour.hslHueF(), colour.hslSaturationF(),
                                colour.lightnessF() + (1.0F - colour.lightnessF()) * 0.5F);
    if (modifier == QLatin1String("dark") || modifier == QLatin1String("deep"))
        return colour.darker(145);
    return colour;
}

} // namespace

std::optional<Hue> hueNamedBy(const QString& label) {
    static const QRegularExpression kNotLetter(QStringLiteral("[^\\p{L}]+"));
    static const QStringList kNegations{QStringLiteral("not"), QStringLiteral("non"), QStringLiteral("no"),
                                        QStringLiteral("without")};
    const QStringList words = label.toLower().split(kNotLetter, Qt::SkipEmptyParts);
    for (qsizetype i = 0; i < words.size(); ++i) {
        if (i > 0 && kNegations.contains(words[i - 1]))
            continue;
        for (const Word& entry : kWords) {
            if (words[i] != QLatin1String(entry.word))
                continue;
            const QString modifier = i > 0 ? words[i - 1] : QString();
            return Hue{QLatin1String(entry.name), modified(QColor(entry.light), modifier),
                       modified(QColor(entry.dark), modifier)};
        }
    }
    return std::nullopt;
}

} // namespace filial::app
