// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <memory>
#include <string>

#include "core/numeric/result.h"

namespace filial::book {

/// Takes the lock file itself; it says who holds it, and goes with the lock.
[[nodiscard]] Result<std::shared_ptr<void>> take_lock(const std::string& lock_path, const std::string& book_path);

} // namespace filial::book
