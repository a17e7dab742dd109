// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/book/edit.h"
#include "core/book/json_reader.h"

namespace filial::book {

[[nodiscard]] OrderedJson edit_json(const Edit& edit);
void read_edit_json(Reading& reading, const Json& json, const Place& place, Edit& into);

} // namespace filial::book
