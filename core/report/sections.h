// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>
#include <vector>

#include "core/report/cross_analysis.h"
#include "core/report/cross_report.h"
#include "core/report/document.h"

// Terms. A section is a heading with its blocks, put at the end of a document. Sections are shared by the report of a
// cross and by the readable answers of the command line; one that has nothing to say adds nothing.
namespace filial::report {

/// A message as an English sentence or label.
[[nodiscard]] std::string say(MessageId id, std::vector<Argument> arguments = {});
void add_heading(Document& document, int level, std::string text);
void add_text(Document& document, std::string text, Paragraph::Role role = Paragraph::Role::Body);
/// A table of two columns without titles; rows without a value are left out.
void add_facts(Document& document, const std::vector<std::pair<std::string, std::string>>& facts);

/// "–" where there is no value; a P that is exactly 0 (an impossible hypothesis) is "0", and has no finite statistic.
[[nodiscard]] std::string shown_p(const Maybe<fit::Tail>& p);
[[nodiscard]] std::string shown_statistic(const Maybe<double>& value);
[[nodiscard]] std::string shown_count(std::int64_t count);

// One sample against a hypothesis.
void add_verdict(Document& document, const fit::GoodnessOfFit& result);
void add_tests(Document& document, const fit::GoodnessOfFit& result);
void add_classes(Document& document, const fit::GoodnessOfFit& result);
void add_account(Document& document, const fit::GoodnessOfFit& result);
void add_partition(Document& document, const fit::GoodnessOfFit& result);
void add_detectable(Document& document, const fit::GoodnessOfFit& result);

// A cross with its families. `cross` is the one `analysis` was made of.
void add_material(Document& document, const book::Cross& cross, const std::vector<std::string>& parents);
void add_hypothesis(Document& document, const book::Cross& cross, const CrossAnalysis& analysis);
void add_sown_to_scored(Document& document, const CrossAnalysis& analysis);
void add_family_table(Document& document, const book::Cross& cross, const CrossAnalysis& analysis);
void add_sources(Document& document, const families::Heterogeneity& result);
void add_odd_families(Document& document, const families::Heterogeneity& result, double alpha);
void add_set_aside(Document& document, const book::Cross& cross, const CrossAnalysis& analysis);
void add_incomplete(Document& document, const CrossAnalysis& analysis);
void add_methods(Document& document, const CrossAnalysis& analysis);
void add_standing_cautions(Document& document);
void add_provenance(Document& document, const Provenance& provenance);

} // namespace filial::report
