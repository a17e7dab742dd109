// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/common/house_style.h"

#include <algorithm>

#include <QAbstractButton>
#include <QComboBox>
#include <QFrame>
#include <QLineEdit>
#include <QPainter>
#include <QStyleFactory>
#include <QStyleOption>
#include <QTabBar>

#include "app/common/style_parts.h"
#include "app/common/theme.h"

namespace filial::app {
namespace {

constexpr int kControlHeight = 32;
constexpr int kStepWidth = 20; // the two steps of a spin box
constexpr int kRingRoom = 4;   // a ring of 2 px, 2 px away

template <class Option> const Option* as(const QStyleOption* option) {
    return qstyleoption_cast<const Option*>(option);
}

} // namespace

HouseStyle::HouseStyle() : QProxyStyle(QStyleFactory::create(QStringLiteral("Fusion"))) {}

void HouseStyle::polish(QWidget* widget) {
    QProxyStyle::polish(widget);
    if (qobject_cast<QAbstractButton*>(widget) != nullptr || qobject_cast<QComboBox*>(widget) != nullptr ||
        qobject_cast<QTabBar*>(widget) != nullptr || qobject_cast<QLineEdit*>(widget) != nullptr)
        widget->setAttribute(Qt::WA_Hover);
    if (auto* field = qobject_cast<QLineEdit*>(widget); field != nullptr && field->hasFrame() &&
                                                        field->textMargins().isNull() &&
                                                        !field->property(look::kBare).toBool())
        field->setTextMargins(6, 0, 6, 0);
}

void HouseStyle::drawPrimitive(PrimitiveElement element, const QStyleOption* option, QPainter* painter,
                               const QWidget* widget) const {
    const Tokens& t = tokens();
    switch (element) {
    case PE_PanelButtonCommand:
    case PE_PanelButtonTool:
        parts::buttonPanel(*painter, *option, widget);
        return;
    case PE_FrameDefaultButton:
    case PE_FrameFocusRect: // the ring round a widget is the focus frame's; cells draw their own
    case PE_FrameTabBarBase:
    case PE_PanelStatusBar:
    case PE_FrameStatusBarItem:
        return;
    case PE_PanelLineEdit:
        if (const auto* frame = as<QStyleOptionFrame>(option); frame != nullptr && frame->lineWidth > 0)
            parts::fieldPanel(*painter, *option, widget);
        else if (widget == nullptr || qobject_cast<const QComboBox*>(widget->parentWidget()) == nullptr)
            painter->fillRect(option->rect, t.surface);
        return;
    case PE_FrameLineEdit:
        return;
    case PE_Frame:
        painter->save();
        painter->setPen(t.rule);
        painter->drawRect(option->rect.adjusted(0, 0, -1, -1));
        painter->restore();
        return;
    case PE_FrameMenu:
    case PE_PanelTipLabel:
        painter->save();
        painter->setPen(t.controlBorder);
        painter->setBrush(element == PE_FrameMenu ? QBrush(Qt::NoBrush) : QBrush(t.surface));
        painter->drawRect(option->rect.adjusted(0, 0, -1, -1));
        painter->restore();
        return;
    case PE_PanelMenu:
        painter->fillRect(option->rect, t.surface);
        return;
    case PE_IndicatorCheckBox:
    case PE_IndicatorItemViewItemCheck:
        parts::checkIndicator(*painter, *option, false);
        return;
    case PE_IndicatorRadioButton:
        parts::checkIndicator(*painter, *option, true);
        return;
    case PE_IndicatorArrowDown:
        parts::chevron(*painter, option->rect, 0, t.muted);
        return;
    case PE_IndicatorArrowRight:
        parts::chevron(*painter, option->rect, -90, t.muted);
        return;
    default:
        QProxyStyle::drawPrimitive(element, option, painter, widget);
    }
}

void HouseStyle::drawControl(ControlElement element, const QStyleOption* option, QPainter* painter,
                             const QWidget* widget) const {
    if (element == CE_PushButtonLabel && widget != nullptr && widget->property(look::kPrimary).toBool()) {
        if (const auto* button = as<QStyleOptionButton>(option)) {
            QStyleOptionButton copy(*button);
            const bool enabled = (copy.state & State_Enabled) != 0;
            copy.palette.setColor(QPalette::ButtonText, enabled ? tokens().onAccent : tokens().muted);
            QProxyStyle::drawControl(element, &copy, painter, widget);
            return;
        }
    }
    if (const auto* item = as<QStyleOptionMenuItem>(option); element == CE_MenuItem && item != nullptr)
        return parts::menuItem(*painter, *item);
    if (const auto* header = as<QStyleOptionHeader>(option)) {
        if (element == CE_HeaderSection)
            return parts::headerSection(*painter, *header);
        if (element == CE_HeaderLabel)
            return parts::headerLabel(*painter, *header);
    }
    if (const auto* tab = as<QStyleOptionTab>(option)) {
        if (element == CE_TabBarTabShape)
            return parts::tabShape(*painter, *tab);
        if (element == CE_TabBarTabLabel)
            return parts::tabLabel(*painter, *tab);
    }
    if (element == CE_Splitter)
        return painter->fillRect(option->rect, tokens().rule);
    if (element == CE_MenuEmptyArea || element == CE_MenuScroller)
        return painter->fillRect(option->rect, tokens().surface);
    if (element == CE_HeaderEmptyArea)
        return painter->fillRect(option->rect, tokens().background);
    if (element == CE_FocusFrame)
        return parts::focusRing(*painter, option->rect, radius::kButton + kRingRoom - 1);
    QProxyStyle::drawControl(element, option, painter, widget);
}

void HouseStyle::drawComplexControl(ComplexControl control, const QStyleOptionComplex* option, QPainter* painter,
                                    const QWidget* widget) const {
    if (const auto* combo = as<QStyleOptionComboBox>(option); control == CC_ComboBox && combo != nullptr)
        return parts::comboBox(*painter, *combo, widget);
    if (const auto* spin = as<QStyleOptionSpinBox>(option); control == CC_SpinBox && spin != nullptr)
        return parts::spinBox(*painter, *spin, widget);
    if (const auto* bar = as<QStyleOptionSlider>(option); control == CC_ScrollBar && bar != nullptr)
        return parts::scrollBar(*painter, *bar, subControlRect(control, option, SC_ScrollBarSlider, widget));
    QProxyStyle::drawComplexControl(control, option, painter, widget);
}

QRect HouseStyle::subControlRect(ComplexControl control, const QStyleOptionComplex* option, SubControl part,
                                 const QWidget* widget) const {
    if (control == CC_SpinBox) {
        const QRect inside = option->rect.adjusted(1, 1, -1, -1);
        const QRect steps(inside.right() + 1 - kStepWidth, inside.top(), kStepWidth, inside.height());
        switch (part) {
        case SC_SpinBoxUp:
            return {steps.left(), steps.top(), steps.width(), steps.height() / 2};
        case SC_SpinBoxDown:
            return {steps.left(), steps.top() + steps.height() / 2, steps.width(), steps.height() - steps.height() / 2};
        case SC_SpinBoxEditField:
            return inside.adjusted(0, 0, -kStepWidth, 0);
        default:
            return option->rect;
        }
    }
    const auto* bar = as<QStyleOptionSlider>(option);
    if (control != CC_ScrollBar || bar == nullptr)
        return QProxyStyle::subControlRect(control, option, part, widget);
    // No arrow buttons: the whole length is the groove.
    const QRect& r = bar->rect;
    const bool vertical = bar->orientation == Qt::Vertical;
    const int length = vertical ? r.height() : r.width();
    const double range = static_cast<double>(bar->maximum) - bar->minimum;
    const int size = range <= 0.0 ? length
                                  : std::clamp(static_cast<int>(length * bar->pageStep / (range + bar->pageStep)),
                                               std::min(kControlHeight, length), length);
    const int at =
        sliderPositionFromValue(bar->minimum, bar->maximum, bar->sliderPosition, length - size, bar->upsideDown);
    const auto along = [&r, vertical](int start, int extent) {
        return vertical ? QRect(r.left(), r.top() + start, r.width(), extent)
                        : QRect(r.left() + start, r.top(), extent, r.height());
    };
    switch (part) {
    case SC_ScrollBarGroove:
        return r;
    case SC_ScrollBarSlider:
        return along(at, size);
    case SC_ScrollBarSubPage:
        return along(0, at);
    case SC_ScrollBarAddPage:
        return along(at + size, length - at - size);
    default:
        return {};
    }
}

QSize HouseStyle::sizeFromContents(ContentsType type, const QStyleOption* option, const QSize& contents,
                                   const QWidget* widget) const {
    QSize size = QProxyStyle::sizeFromContents(type, option, contents, widget);
    switch (type) {
    case CT_PushButton:
        return {contents.width() + 2 * space::kM + 2, std::max(kControlHeight, contents.height() + 2 * 6)};
    case CT_ToolButton:
        return {std::max(kControlHeight, contents.width() + 2 * space::kS), std::max(kControlHeight, size.height())};
    case CT_LineEdit:
        if (const auto* frame = as<QStyleOptionFrame>(option); frame != nullptr && frame->lineWidth > 0)
            size.setHeight(std::max(kControlHeight, size.height()));
        return size;
    case CT_SpinBox:
    case CT_ComboBox:
        return {size.width() + space::kM, std::max(kControlHeight, size.height())};
    case CT_MenuItem:
        if (const auto* item = as<QStyleOptionMenuItem>(option);
            item != nullptr && item->menuItemType == QStyleOptionMenuItem::Separator)
            return {size.width(), 9};
        return {size.width() + 56, kControlHeight};
    case CT_TabBarTab: {
        // Room for the bold label, so that choosing a tab moves nothing.
        const auto* tab = as<QStyleOptionTab>(option);
        const QFontMetrics bold(font(TextRole::BodyBold));
        return {tab != nullptr ? bold.size(Qt::TextShowMnemonic, tab->text).width() + 36 : size.width(), 48};
    }
    default:
        return size;
    }
}

int HouseStyle::pixelMetric(PixelMetric metric, const QStyleOption* option, const QWidget* widget) const {
    switch (metric) {
    case PM_ScrollBarExtent:
        return 12;
    case PM_ScrollBarSliderMin:
        return kControlHeight;
    case PM_SplitterWidth:
        return 1;
    case PM_FocusFrameHMargin:
    case PM_FocusFrameVMargin:
        return kRingRoom;
    case PM_MenuPanelWidth:
        return 1;
    case PM_MenuVMargin:
        return space::kXs;
    case PM_MenuHMargin:
    case PM_ButtonShiftHorizontal:
    case PM_ButtonShiftVertical:
    case PM_TabBarTabShiftVertical:
    case PM_TabBarTabOverlap:
    case PM_TabBarBaseOverlap:
    case PM_ButtonDefaultIndicator:
        return 0;
    case PM_IndicatorWidth:
    case PM_IndicatorHeight:
    case PM_ExclusiveIndicatorWidth:
    case PM_ExclusiveIndicatorHeight:
        return 18;
    case PM_CheckBoxLabelSpacing:
    case PM_RadioButtonLabelSpacing:
        return space::kS;
    default:
        return QProxyStyle::pixelMetric(metric, option, widget);
    }
}

int HouseStyle::styleHint(StyleHint hint, const QStyleOption* option, const QWidget* widget,
                          QStyleHintReturn* data) const {
    switch (hint) {
    case SH_EtchDisabledText:
    case SH_DitherDisabledText:
    case SH_UnderlineShortcut:
    case SH_ScrollBar_ContextMenu:
    case SH_ComboBox_Popup:
        return 0;
    case SH_FocusFrame_AboveWidget:
    case SH_ScrollView_FrameOnlyAroundContents:
        return hint == SH_FocusFrame_AboveWidget ? 1 : 0;
    case SH_ToolTip_WakeUpDelay:
        return 400;
    default:
        return QProxyStyle::styleHint(hint, option, widget, data);
    }
}

} // namespace filial::app
