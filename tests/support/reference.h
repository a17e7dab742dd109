// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>
#include <vector>

#include <nlohmann/json.hpp>

#include "core/numeric/quantities.h"

// Published check values, one JSON file a case in tests/reference, with source, page and printed digits.
namespace filial::test {

/// The case with this id ("A04"); throws where it is missing.
nlohmann::json reference_case(const std::string& id);

/// Half a unit of the last printed digit: "0.47002" gives 5e-6, "2.05" gives 5e-3.
double printed_tolerance(const std::string& as_printed);

std::vector<Count> counts(const std::vector<long>& values);

} // namespace filial::test
