// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

namespace filial::app {

/// Property of a widget that names the page F1 opens on it and on what is inside it.
inline constexpr char kHelpPage[] = "helpPage";

} // namespace filial::app
