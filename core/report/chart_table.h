// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/report/document.h"

namespace filial::report {

/// A chart's numbers as a table: a row a label, a column a series (and its interval where it has one).
[[nodiscard]] Table chart_table(const Chart& chart);

} // namespace filial::report
