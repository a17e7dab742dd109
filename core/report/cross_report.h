// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>
#include <vector>

#include "core/report/cross_analysis.h"
#include "core/report/document.h"

// Terms. The report of one cross with its families: material, counts, source table, methods, cautions, re-run command.
namespace filial::report {

struct Provenance {
    std::string program_version;
    std::string input_name; ///< file name as given
    std::string input_sha256;
    std::string command;              ///< the headless command that reproduces it
    std::string date;                 ///< said by the caller; core has no clock
    std::vector<std::string> parents; ///< names of the cross' parents, from `parent_names`: the book holds them
};

/// Names of a cross' parents; a line the book does not hold is left out.
[[nodiscard]] std::vector<std::string> parent_names(const book::Book& book, const book::Cross& cross);

/// The report of one cross. `analysis` was made of `cross`; families set aside are also analysed with the others, so
/// that both readings stand in the report.
[[nodiscard]] Document cross_report(const book::Cross& cross, const CrossAnalysis& analysis,
                                    const Provenance& provenance);

/// The cautions shown in About, help and reports.
[[nodiscard]] std::vector<std::string> standing_cautions();

} // namespace filial::report
