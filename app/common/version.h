// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

namespace filial::app {

/// "0.1.0"
const char* version();

} // namespace filial::app
