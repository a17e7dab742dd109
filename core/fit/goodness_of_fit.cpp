// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/goodness_of_fit.h"
