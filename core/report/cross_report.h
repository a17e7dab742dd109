// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>

#include "core/report/cross_analysis.h"
#include "core/report/document.h"

// Terms. The report of one cross with its families: material, counts, source table, methods, cautions, re-run command.
namespace filial::report {

struct Provenance {
    std::string program_version;
    std::string input_name; ///< file name as given
    std::string input_sha256;
    std::string command; ///< the headless command that reproduces it
    std::string date;    ///< said by the caller; core has no clock
};

[[nodiscard]] Document cross_report(const book::Cross& cross, const CrossAnalysis& analysis,
                                    const Provenance& provenance);

/// The cautions shown in About, help and reports.
[[nodiscard]] std::vector<std::string> standing_cautions();

} // namespace filial::report
