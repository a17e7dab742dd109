// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/common/class_style.h"

#include <algorithm>
#include <array>

#include "app/common/hues.h"
#include "app/common/theme.h"

namespace filial::app {
namespace {

constexpr std::size_t kPatterns = 8;

/// Okabe & Ito (2008), "Color Universal Design", in the order of the design; `kin` names the hue a label would have to
/// name for the two to contradict each other.
struct Published {
    const char* light;
    const char* dark;
    const char* kin;
};
constexpr std::array<Published, 8> kPublished{{{"#0072B2", "#3D97D3", "blue"},
                                               {"#D55E00", "#D55E00", "red"},
                                               {"#F0E442", "#F0E442", "yellow"},
                                               {"#56B4E9", "#56B4E9", "blue"},
                                               {"#000000", "", "black"},
                                               {"#CC79A7", "#CC79A7", "pink"},
                                               {"#E69F00", "#E69F00", "orange"},
                                               {"#009E73", "#009E73", "green"}}};

QColor published(std::size_t index) {
    const Published& entry = kPublished[index % kPublished.size()];
    if (!tokens().dark)
        return QColor(entry.light);
    return *entry.dark == '\0' ? tokens().ink : QColor(entry.dark);
}

QColor mixed(const QColor& a, const QColor& b, double share) {
    const auto part = [share](int x, int y) { return static_cast<int>(x + (y - x) * share + 0.5); };
    return {part(a.red(), b.red()), part(a.green(), b.green()), part(a.blue(), b.blue())};
}

/// What a class is coloured by, before shading: owner's choice for a level, or the hue its label names.
struct Source {
    QColor colour;   ///< invalid: neither
    QString hueName; ///< "" where it is the owner's
};

Source sourceOf(const book::Cross& cross, std::size_t phenotype) {
    const book::PhenotypeClass& one = cross.classes[phenotype];
    for (std::size_t t = 0; t < one.levels.size() && t < cross.traits.size(); ++t) {
        const int level = one.levels[t];
        const auto& levels = cross.traits[t].levels;
        if (level < 0 || static_cast<std::size_t>(level) >= levels.size())
            continue;
        const book::Level& chosen = levels[static_cast<std::size_t>(level)];
        if (const QColor own(QString::fromStdString(chosen.colour)); own.isValid())
            return {own, QString::fromStdString(chosen.colour)};
        if (const auto hue = hueNamedBy(QString::fromStdString(chosen.label)))
            return {tokens().dark ? hue->dark : hue->light, hue->name};
    }
    if (const auto hue = hueNamedBy(QString::fromStdString(one.label)))
        return {tokens().dark ? hue->dark : hue->light, hue->name};
    return {};
}

/// The n-th class of one hue is paler, so that combinations are told apart by shade as well as by pattern.
QColor shaded(const QColor& colour, std::size_t rank) {
    constexpr std::array<double, 4> kShares{0.0, 0.5, 0.28, 0.7};
    const QColor towards(QStringLiteral("#FFFFFF"));
    return mixed(colour, towards, kShares[rank % kShares.size()]);
}

/// Dim red has no hues: shades of the one ink, and patterns.
QColor dimShade(std::size_t index) {
    constexpr std::array<double, 4> kShares{0.55, 0.1, 0.3, 0.2};
    return mixed(tokens().surface, tokens().ink, kShares[index % kShares.size()]);
}

QColor publishedFor(const book::Cross& cross, std::size_t phenotype) {
    QStringList named;
    std::size_t before = 0; // classes before this one that also take a published colour
    for (std::size_t i = 0; i < cross.classes.size(); ++i) {
        const Source source = sourceOf(cross, i);
        if (!source.hueName.isEmpty())
            named << source.hueName;
        else if (i < phenotype)
            ++before;
    }
    std::vector<std::size_t> free;
    for (std::size_t i = 0; i < kPublished.size(); ++i)
        if (!named.contains(QLatin1String(kPublished[i].kin)))
            free.push_back(i);
    return published(free.empty() ? before : free[before % free.size()]);
}

} // namespace

ClassStyle classStyle(const book::Cross& cross, std::size_t phenotype) {
    ClassStyle style;
    style.pattern = static_cast<Pattern>(phenotype % kPatterns);
    if (phenotype >= cross.classes.size()) {
        style.colour = tokens().hues ? published(phenotype) : dimShade(phenotype);
        return style;
    }
    if (!tokens().hues) {
        style.colour = dimShade(phenotype);
        return style;
    }
    if (const QColor own(QString::fromStdString(cross.classes[phenotype].colour)); own.isValid()) {
        style.colour = own;
        return style;
    }
    const Source source = sourceOf(cross, phenotype);
    if (!source.colour.isValid()) {
        style.colour = publishedFor(cross, phenotype);
        return style;
    }
    std::size_t rank = 0;
    for (std::size_t i = 0; i < phenotype; ++i)
        if (sourceOf(cross, i).colour == source.colour)
            ++rank;
    style.colour = shaded(source.colour, rank);
    return style;
}

} // namespace filial::app
