// SPDX-License-Identifier: GPL-3.0-or-later
#include <filesystem>
#include <system_error>

#include "app/headless/input.h"
#include "app/headless/options.h"
#include "app/headless/verbs.h"
#include "core/book/count_table.h"
#include "core/fit/goodness_of_fit.h"
#include "core/report/document.h"
#include "core/report/plain_counts.h"
#include "core/report/result_documents.h"
#include "core/report/results_json.h"

// Counts given as arguments, or the families of a file, tested against a hypothesis.
namespace filial::app {

namespace {

/// A single argument that is no number at all is a file.
bool is_file(const std::vector<std::string>& plain) {
    if (plain.size() != 1) {
        return false;
    }
    const Result<book::Cell> cell = book::read_cell(plain.front());
    const bool number_like = cell.ok() || cell.error().message.id != MessageId::CountNotANumber;
    return !number_like || (cell.ok() && cell.value().state != book::CellState::Number);
}

/// A word that names no file, and does not look as if it should.
bool names_no_file(const std::string& word) {
    std::error_code ignored;
    return word.find_first_of("./") == std::string::npos && !std::filesystem::exists(word, ignored);
}

Result<std::vector<Count>> read_counts(const std::vector<std::string>& plain) {
    std::vector<Count> counts;
    for (std::size_t i = 0; i < plain.size(); ++i) {
        const Result<book::Cell> cell = book::read_cell(plain[i]);
        if (!cell) {
            return error_at(argument_place(i, plain[i]), cell.error());
        }
        if (cell.value().state != book::CellState::Number) {
            return error_at(argument_place(i, plain[i]), {MessageId::CountNotANumber, {text_argument(plain[i])}});
        }
        counts.push_back(cell.value().count);
    }
    return counts;
}

Done check_classes(std::size_t classes, const inheritance::Hypothesis& hypothesis) {
    if (classes == hypothesis.class_count()) {
        return done();
    }
    return error_at(option_place("--ratio"), {MessageId::HeadlessTermsAndClasses,
                                              {ratio_argument(hypothesis.notation()),
                                               count_argument(static_cast<std::int64_t>(hypothesis.class_count())),
                                               count_argument(static_cast<std::int64_t>(classes))}});
}

Result<std::vector<std::string>> labels_of(const Arguments& arguments, const inheritance::Hypothesis& hypothesis) {
    const std::optional<std::string> typed = arguments.value("--labels");
    if (!typed) {
        return report::plain_labels(hypothesis);
    }
    std::vector<std::string> labels = split_at_commas(*typed);
    if (labels.size() != hypothesis.class_count()) {
        return error_at(option_place("--labels"),
                        {MessageId::HeadlessLabels,
                         {count_argument(static_cast<std::int64_t>(labels.size())),
                          count_argument(static_cast<std::int64_t>(hypothesis.class_count()))}});
    }
    return labels;
}

std::vector<Message> warnings_of(const inheritance::Hypothesis& hypothesis) {
    return hypothesis.ratio() == nullptr ? std::vector<Message>{} : hypothesis.ratio()->warnings();
}

fit::Input fit_input(std::vector<Count> counts, const inheritance::Hypothesis& hypothesis,
                     const report::AnalysisOptions& options) {
    fit::Input input{{}, std::move(counts), hypothesis, {}, false, 0, report::loci_levels(hypothesis), {}};
    input.trait_names = report::loci_names(input.level_counts.size());
    input.alpha = options.alpha;
    input.method = options.method;
    input.order = options.order;
    input.replicates = options.replicates;
    input.seed = options.seed;
    return input;
}

/// Everything the command line says about one sample.
Result<fit::Input> read_sample(const Arguments& arguments) {
    if (arguments.has("--select")) {
        return error_at(option_place("--select"), {MessageId::HeadlessSelectWithCounts, {}});
    }
    Result<std::vector<Count>> counts = read_counts(arguments.plain);
    if (!counts) {
        return counts.error();
    }
    const Result<inheritance::Hypothesis> hypothesis = ratio_option(arguments);
    if (!hypothesis) {
        return hypothesis.error();
    }
    if (const Done same = check_classes(counts.value().size(), hypothesis.value()); !same) {
        return same.error();
    }
    const Result<report::AnalysisOptions> options = analysis_options(arguments);
    Result<std::vector<std::string>> labels = labels_of(arguments, hypothesis.value());
    Result<std::vector<std::vector<std::size_t>>> joins = join_option(arguments, counts.value().size());
    const Result<int> fitted = fitted_option(arguments);
    if (!options || !labels || !joins || !fitted) {
        return !options ? options.error() : !labels ? labels.error() : !joins ? joins.error() : fitted.error();
    }
    fit::Input input = fit_input(std::move(counts).value(), hypothesis.value(), options.value());
    input.labels = std::move(labels).value();
    input.joins = std::move(joins).value();
    input.fitted_elsewhere = fitted.value();
    return input;
}

Result<Answer> score_sample(const Arguments& arguments) {
    if (arguments.plain.size() == 1) {
        return error_at(argument_place(0, arguments.plain.front()), {MessageId::HeadlessClassOne, {}});
    }
    const Result<fit::Input> input = read_sample(arguments);
    if (!input) {
        return input.error();
    }
    const Result<fit::GoodnessOfFit> result = fit::goodness_of_fit(input.value());
    if (!result) {
        return error_at("score", result.error());
    }
    const std::string text = arguments.has("--json") ? report::to_json(result.value())
                                                     : report::write_text(report::score_document(result.value()));
    return Answer{text, warnings_of(input.value().hypothesis)};
}

Result<Answer> score_file(const Arguments& arguments) {
    if (names_no_file(arguments.plain.front())) {
        return error_at(argument_place(0, arguments.plain.front()), {MessageId::HeadlessNeitherCountNorFile, {}});
    }
    if (arguments.has("--labels")) {
        return error_at(option_place("--labels"), {MessageId::HeadlessLabelsFile, {}});
    }
    const Result<AnalysedFile> file = analyse_file(arguments);
    if (!file) {
        return file.error();
    }
    if (!file.value().analysis.totals) {
        return error_at(arguments.plain.front(), {MessageId::HeadlessNothingToTest, {}});
    }
    const AnalysedFile& found = file.value();
    const std::string text = arguments.has("--json")
                                 ? report::to_json(found.analysis)
                                 : report::write_text(report::cross_score_document(found.input.cross, found.analysis));
    return Answer{text, found.input.warnings};
}

} // namespace

Result<Answer> score(std::span<const std::string> given) {
    const Result<Arguments> arguments = read_arguments("score", given, test_options());
    if (!arguments) {
        return arguments.error();
    }
    if (arguments.value().has("--help")) {
        return Answer{help_text("score"), {}};
    }
    if (arguments.value().plain.empty()) {
        return error_at("score", {MessageId::HeadlessNoCounts, {}});
    }
    return is_file(arguments.value().plain) ? score_file(arguments.value()) : score_sample(arguments.value());
}

} // namespace filial::app
