// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/headless/input.h"
#include "app/headless/options.h"
#include "app/headless/verbs.h"
#include "core/report/document.h"
#include "core/report/result_documents.h"
#include "core/report/results_json.h"

// Whether the families of a file agree.
namespace filial::app {

Result<Answer> families(std::span<const std::string> given) {
    OptionNames names = test_options();
    names.valued.erase("--labels");
    const Result<Arguments> arguments = read_arguments("families", given, names);
    if (!arguments) {
        return arguments.error();
    }
    if (arguments.value().has("--help")) {
        return Answer{help_text("families"), {}};
    }
    const Result<AnalysedFile> file = analyse_file(arguments.value());
    if (!file) {
        return file.error();
    }
    const AnalysedFile& found = file.value();
    if (!found.analysis.heterogeneity) {
        return error_at(
            arguments.value().plain.front(),
            {MessageId::HeadlessTooFewFamilies, {count_argument(static_cast<std::int64_t>(found.analysis.included))}});
    }
    const std::string text = arguments.value().has("--json")
                                 ? report::families_json(found.analysis)
                                 : report::write_text(report::families_document(found.input.cross, found.analysis));
    return Answer{text, found.input.warnings};
}

} // namespace filial::app
