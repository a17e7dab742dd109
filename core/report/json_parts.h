// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string_view>

#include <nlohmann/json_fwd.hpp>

#include "core/families/heterogeneity.h"
#include "core/fit/goodness_of_fit.h"

// Pieces the JSON writers share. Numbers that are not finite become null, so that no result is ever NaN or infinite.
namespace filial::report {

using Json = nlohmann::ordered_json;

[[nodiscard]] Json number_or_null(double value);
[[nodiscard]] Json number_or_null(const Maybe<double>& value);
/// Puts `p` and its `log10_p` under names with this prefix: "", "chi_square_", "williams_".
void put_p(Json& object, std::string_view prefix, const Maybe<fit::Tail>& p);

[[nodiscard]] Json fit_object(const fit::GoodnessOfFit& result);
[[nodiscard]] Json exact_object(const Maybe<fit::Exact>& exact);
[[nodiscard]] Json source_object(const families::SourceRow& row);
[[nodiscard]] Json contingency_object(const Maybe<families::Contingency>& contingency);
/// JSON text of one object with a line end; malformed UTF-8 in labels becomes U+FFFD.
[[nodiscard]] std::string json_text(const Json& object);

} // namespace filial::report
