// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QColor>
#include <QFont>
#include <QObject>
#include <QString>

class QWidget;

// Terms. A theme is a set of tokens (resources/themes/*.json): colours by their use. Tokens are read when painting,
// never stored in a palette, pen or chart item of a widget, so that a change of theme leaves nothing behind.
namespace filial::app {

enum class ThemeName { Light, Dark, DimRed };

struct Tokens {
    QColor background, surface, selected, ink, muted, accent, onAccent, warning, error, controlBorder, rule;
    QColor paleBand;  ///< muted band behind the departure map and pooled estimates
    bool hues = true; ///< dim red has none
    bool dark = false;
};

/// Sizes of the type scale in pixels: note 12, label 12 bold, body 14, count 16, verdict 18 bold, sentence 21, answer
/// 40 bold …
enum class TextRole { Note, Label, Body, BodyBold, Count, CountBold, Verdict, Sentence, Answer };

namespace space {
inline constexpr int kXs = 4, kS = 8, kM = 12, kL = 16, kXl = 24, kXxl = 32;
}
namespace radius {
inline constexpr int kCell = 3, kButton = 6, kLane = 8;
}

/// The present theme; one for the application.
class Theme : public QObject {
    Q_OBJECT
public:
    static Theme& instance();
    const Tokens& tokens() const;
    ThemeName name() const;
    /// Installs palette, style and fonts on the QApplication; callable again to switch.
    void apply(ThemeName name);
    /// The tokens of any theme, without installing it.
    static Tokens read(ThemeName name);
Q_SIGNALS:
    void changed();

private:
    Theme();
    Tokens tokens_;
    ThemeName name_ = ThemeName::Light;
};

inline const Tokens& tokens() {
    return Theme::instance().tokens();
}
QFont font(TextRole role);
int lineHeight(TextRole role);

/// The ink a label is written in, as a palette role, so that it follows a change of theme by itself.
enum class Ink { Normal, Muted, Accent, Error, Warning };
void setInk(QWidget* widget, Ink ink);

/// Looks a widget can ask the style for by a dynamic property.
namespace look {
inline constexpr const char* kPrimary = "primary"; ///< the one filled button of a screen
inline constexpr const char* kQuiet = "quiet";     ///< a button without a frame
inline constexpr const char* kInvalid = "invalid"; ///< a field whose text does not do
inline constexpr const char* kBare = "bare";       ///< a field without a frame, a blank in a sentence
} // namespace look
void setLook(QWidget* widget, const char* name, bool on = true);

} // namespace filial::app
