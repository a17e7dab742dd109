// SPDX-License-Identifier: GPL-3.0-or-later
#include <cmath>
#include <vector>

#include <QImage>
#include <QLabel>
#include <QLineEdit>
#include <QPainter>
#include <QPushButton>
#include <QVBoxLayout>

#include "app/common/class_style.h"
#include "tests/app/shell_fixture.h"

namespace filial::app {
namespace {

/// Relative luminance and contrast as W3C, Web Content Accessibility Guidelines 2.1 (2018), define them.
double luminance(const QColor& colour) {
    const auto part = [](int value) {
        const double share = value / 255.0;
        return share <= 0.03928 ? share / 12.92 : std::pow((share + 0.055) / 1.055, 2.4);
    };
    return 0.2126 * part(colour.red()) + 0.7152 * part(colour.green()) + 0.0722 * part(colour.blue());
}
double contrast(const QColor& a, const QColor& b) {
    const double first = luminance(a) + 0.05;
    const double second = luminance(b) + 0.05;
    return std::max(first, second) / std::min(first, second);
}

TEST(Contrast, AgreesWithTheGuidelinesOwnExtremes) {
    EXPECT_NEAR(contrast(Qt::black, Qt::white), 21.0, 1e-9);
    EXPECT_NEAR(contrast(QColor("#777777"), Qt::white), 4.48, 0.005);
}

TEST(Tokens, EveryTextPairIsReadable) {
    for (const ThemeName name : {ThemeName::Light, ThemeName::Dark, ThemeName::DimRed}) {
        const Tokens t = Theme::read(name);
        for (const QColor& ground : {t.background, t.surface, t.paleBand})
            for (const QColor& text : {t.ink, t.muted, t.accent, t.warning, t.error})
                EXPECT_GE(contrast(ground, text), 4.5) << ground.name().toStdString() << text.name().toStdString();
        EXPECT_GE(contrast(t.selected, t.ink), 4.5);
        EXPECT_GE(contrast(t.accent, t.onAccent), 4.5);
        EXPECT_GE(contrast(t.surface, t.controlBorder), 3.0);
    }
}

class ThemeSwitch : public ShellTest {};

TEST_F(ThemeSwitch, LeavesNoColourOfTheFormerThemeBehind) {
    QWidget window;
    auto* box = new QVBoxLayout(&window);
    auto* primary = new QPushButton("Begin");
    setLook(primary, look::kPrimary);
    auto* muted = new QLabel("muted");
    setInk(muted, Ink::Muted);
    box->addWidget(primary);
    box->addWidget(muted);
    box->addWidget(new QLineEdit("31"));
    showAt(window, 240, 160);
    const QImage light = window.grab().toImage();
    for (const ThemeName name : {ThemeName::Dark, ThemeName::DimRed, ThemeName::Light}) {
        Theme::instance().apply(name);
        QCoreApplication::processEvents();
        const QImage image = window.grab().toImage();
        const Tokens t = Theme::read(name);
        EXPECT_EQ(image.pixelColor(1, 1), t.background);
        EXPECT_EQ(image.pixelColor(primary->geometry().center().x(), primary->geometry().top() + 4), t.accent);
        if (name != ThemeName::Light)
            for (int y = 0; y < image.height(); ++y)
                for (int x = 0; x < image.width(); ++x)
                    ASSERT_NE(image.pixelColor(x, y), Theme::read(ThemeName::Light).background) << x << ' ' << y;
        else
            EXPECT_EQ(image, light);
    }
}

book::Cross cross(const std::vector<std::string>& stem, const std::vector<std::string>& leaf) {
    book::Cross made;
    const auto trait = [](const char* name, const std::vector<std::string>& levels) {
        book::Trait one;
        one.name = name;
        for (const std::string& level : levels)
            one.levels.push_back({level, {}});
        return one;
    };
    made.traits = {trait("stem", stem), trait("leaf", leaf)};
    made.classes = book::product_classes(made.traits);
    return made;
}

TEST_F(ThemeSwitch, SwatchesFollowTheHueTheirLabelNames) {
    const book::Cross f2 = cross({"purple", "green"}, {"hairy", "smooth"});
    for (std::size_t i = 0; i < 4; ++i) {
        const QColor colour = classStyle(f2, i).colour;
        if (i < 2)
            EXPECT_GT(colour.blue(), colour.green());
        else
            EXPECT_GT(colour.green(), colour.red());
    }
    EXPECT_NE(classStyle(f2, 0).colour, classStyle(f2, 1).colour);
    EXPECT_NE(classStyle(f2, 0).pattern, classStyle(f2, 1).pattern);
    const book::Cross not_green = cross({"not green", "green"}, {"hairy", "smooth"});
    EXPECT_EQ(classStyle(not_green, 0).colour, QColor("#0072B2")); // Okabe & Ito (2008), blue
}

TEST_F(ThemeSwitch, OwnersColourGoesBefore) {
    book::Cross f2 = cross({"purple", "green"}, {"hairy", "smooth"});
    f2.classes[0].colour = "#123456";
    EXPECT_EQ(classStyle(f2, 0).colour, QColor("#123456"));
}

TEST_F(ThemeSwitch, DimRedHasNoHues) {
    Theme::instance().apply(ThemeName::DimRed);
    const book::Cross f2 = cross({"purple", "green"}, {"hairy", "smooth"});
    for (std::size_t i = 0; i < 4; ++i) {
        const QColor colour = classStyle(f2, i).colour;
        EXPECT_GT(colour.red(), colour.green());
        EXPECT_GT(colour.red(), colour.blue());
    }
}

TEST_F(ThemeSwitch, SwatchIsOutlinedAndStaysInsideItsRectangle) {
    const book::Cross f2 = cross({"purple", "green"}, {"hairy", "smooth"});
    for (const double scale : {1.0, 1.5, 2.0}) {
        for (int pattern = 0; pattern < 8; ++pattern) {
            QImage image(static_cast<int>(60 * scale), static_cast<int>(60 * scale), QImage::Format_RGB32);
            image.setDevicePixelRatio(scale);
            image.fill(Qt::white);
            QPainter painter(&image);
            ClassStyle style = classStyle(f2, 0);
            style.pattern = static_cast<Pattern>(pattern);
            paintSwatch(painter, QRectF(10, 10, 40, 40), style);
            painter.end();
            const int edge = static_cast<int>(10 * scale);
            EXPECT_EQ(image.pixelColor(edge, edge + 9), tokens().ink) << pattern;
            EXPECT_EQ(image.pixelColor(edge - 1, edge + 9), QColor(Qt::white)) << pattern;
        }
    }
}

} // namespace
} // namespace filial::app
