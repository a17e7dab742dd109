// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/common/version.h"

namespace filial::app {

const char* version() {
    return FILIAL_VERSION;
}

} // namespace filial::app
