// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <span>
#include <string_view>

#include "core/inheritance/catalogue.h"

// Internal to core/inheritance: what the catalogue is derived from. A source gives a cross and a grouping and no ratio.
namespace filial::inheritance {

struct CatalogueSource {
    CatalogueGroup group;
    std::string_view name;
    std::string_view cross;
    std::string_view show;
    std::string_view keywords; ///< separated by commas
};

[[nodiscard]] std::span<const CatalogueSource> one_and_two_locus_sources();
[[nodiscard]] std::span<const CatalogueSource> three_locus_sources();
[[nodiscard]] std::span<const CatalogueSource> other_sources();

} // namespace filial::inheritance
