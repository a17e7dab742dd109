// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/common/theme.h"

#include <QApplication>
#include <QFile>
#include <QJsonDocument>
#include <QJsonObject>
#include <QPalette>
#include <QStyle>
#include <QToolTip>
#include <QWidget>

#include "app/common/house_style.h"

namespace filial::app {
namespace {

QString fileOf(ThemeName name) {
    switch (name) {
    case ThemeName::Dark:
        return QStringLiteral(":/themes/dark.json");
    case ThemeName::DimRed:
        return QStringLiteral(":/themes/dim-red.json");
    case ThemeName::Light:
        break;
    }
    return QStringLiteral(":/themes/light.json");
}

QPalette paletteOf(const Tokens& t) {
    QPalette p;
    const auto set = [&p](QPalette::ColorRole role, const QColor& colour) { p.setColor(QPalette::All, role, colour); };
    set(QPalette::Window, t.background);
    set(QPalette::WindowText, t.ink);
    set(QPalette::Base, t.surface);
    set(QPalette::AlternateBase, t.background);
    set(QPalette::Text, t.ink);
    set(QPalette::PlaceholderText, t.muted);
    set(QPalette::Button, t.surface);
    set(QPalette::ButtonText, t.ink);
    set(QPalette::BrightText, t.error);
    set(QPalette::Light, t.surface);
    set(QPalette::Midlight, t.rule);
    set(QPalette::Mid, t.rule);
    set(QPalette::Dark, t.controlBorder);
    set(QPalette::Shadow, t.rule);
    set(QPalette::Highlight, t.selected);
    set(QPalette::HighlightedText, t.ink);
    set(QPalette::Link, t.accent);
    set(QPalette::LinkVisited, t.warning);
    set(QPalette::ToolTipBase, t.surface);
    set(QPalette::ToolTipText, t.ink);
    for (const auto role : {QPalette::WindowText, QPalette::Text, QPalette::ButtonText, QPalette::HighlightedText})
        p.setColor(QPalette::Disabled, role, t.muted);
    return p;
}

struct TypeSize {
    int pixels, line;
    bool bold;
};

TypeSize sizeOf(TextRole role) {
    switch (role) {
    case TextRole::Note:
        return {12, 16, false};
    case TextRole::Label:
        return {12, 16, true};
    case TextRole::Body:
        return {14, 20, false};
    case TextRole::BodyBold:
        return {14, 20, true};
    case TextRole::Count:
        return {16, 20, false};
    case TextRole::CountBold:
        return {16, 20, true};
    case TextRole::Verdict:
        return {18, 24, true};
    case TextRole::Sentence:
        return {21, 40, false};
    case TextRole::Answer:
        return {40, 44, true};
    }
    return {14, 20, false};
}

} // namespace

Theme::Theme() : tokens_(read(ThemeName::Light)) {}

Theme& Theme::instance() {
    static Theme theme;
    return theme;
}

const Tokens& Theme::tokens() const {
    return tokens_;
}

ThemeName Theme::name() const {
    return name_;
}

Tokens Theme::read(ThemeName name) {
    QFile file(fileOf(name));
    const bool opened = file.open(QIODevice::ReadOnly);
    Q_ASSERT_X(opened, "Theme", "the theme files are part of the program");
    const QJsonObject json = opened ? QJsonDocument::fromJson(file.readAll()).object() : QJsonObject();
    const auto colour = [&json](const char* key) { return QColor(json.value(QLatin1String(key)).toString()); };
    Tokens t;
    t.background = colour("background");
    t.surface = colour("surface");
    t.selected = colour("selected");
    t.ink = colour("ink");
    t.muted = colour("muted");
    t.accent = colour("accent");
    t.onAccent = colour("on accent");
    t.warning = colour("warning");
    t.error = colour("error");
    t.controlBorder = colour("control border");
    t.rule = colour("rule");
    t.paleBand = colour("pale band");
    t.hues = json.value(QLatin1String("hues")).toBool(true);
    t.dark = json.value(QLatin1String("dark")).toBool(false);
    return t;
}

void Theme::apply(ThemeName name) {
    name_ = name;
    tokens_ = read(name);
    if (qobject_cast<HouseStyle*>(QApplication::style()) == nullptr)
        QApplication::setStyle(new HouseStyle);
    QApplication::setFont(font(TextRole::Body));
    QApplication::setPalette(paletteOf(tokens_));
    QToolTip::setPalette(paletteOf(tokens_));
    QToolTip::setFont(font(TextRole::Note));
    // The palette may be equal in all but tokens that no role carries, so every widget is repainted anyway.
    for (QWidget* widget : QApplication::allWidgets())
        widget->update();
    Q_EMIT changed();
}

QFont font(TextRole role) {
    const TypeSize size = sizeOf(role);
    QFont result;
    result.setFamilies({QStringLiteral("Noto Sans"), QStringLiteral("Noto Sans Math"),
                        QStringLiteral("Noto Sans Symbols2"), QStringLiteral("DejaVu Sans")});
    result.setPixelSize(size.pixels);
    result.setWeight(size.bold ? QFont::Bold : QFont::Normal);
    result.setHintingPreference(QFont::PreferNoHinting);
    return result;
}

int lineHeight(TextRole role) {
    return sizeOf(role).line;
}

void setInk(QWidget* widget, Ink ink) {
    switch (ink) {
    case Ink::Normal:
        widget->setForegroundRole(QPalette::WindowText);
        break;
    case Ink::Muted:
        widget->setForegroundRole(QPalette::PlaceholderText);
        break;
    case Ink::Accent:
        widget->setForegroundRole(QPalette::Link);
        break;
    case Ink::Error:
        widget->setForegroundRole(QPalette::BrightText);
        break;
    case Ink::Warning:
        widget->setForegroundRole(QPalette::LinkVisited);
        break;
    }
}

void setLook(QWidget* widget, const char* name, bool on) {
    if (widget->property(name).toBool() == on)
        return;
    widget->setProperty(name, on);
    widget->updateGeometry();
    widget->update();
}

} // namespace filial::app
