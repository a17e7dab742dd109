// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/inheritance/derive.h"

#include "app/headless/verbs.h"
#include "core/report/document.h"
#include "core/report/result_documents.h"
#include "core/report/results_json.h"
#include "core/report/wording.h"

// Genotypes and classes of a cross, from its parents.
namespace filial::app {

namespace {

constexpr double kLargestFraction = 0.5;

/// The words of the cross, whether they came as one quoted argument or several.
std::string cross_text(const std::vector<std::string>& plain) {
    std::string text;
    for (const std::string& word : plain) {
        text += (text.empty() ? "" : " ") + word;
    }
    return text;
}

std::string derive_place(const Error& error) {
    if (!error.place) {
        return "derive";
    }
    return report::render({MessageId::HeadlessCrossAt, {count_argument(static_cast<std::int64_t>(*error.place) + 1)}});
}

Result<inheritance::DeriveInput> read_input(const Arguments& arguments) {
    if (arguments.plain.empty()) {
        return error_at("derive", {MessageId::HeadlessNoCross, {}});
    }
    inheritance::DeriveInput input{cross_text(arguments.plain), std::nullopt, arguments.value("--show").value_or("")};
    if (const auto typed = arguments.value("--linkage")) {
        const std::optional<double> number = read_number(*typed);
        if (!number || *number < 0.0 || *number > kLargestFraction) {
            return error_at(option_place("--linkage"), {MessageId::HeadlessLinkage, {text_argument(*typed)}});
        }
        input.linkage = RecombinationFraction::from(*number);
    }
    return input;
}

} // namespace

Result<Answer> derive(std::span<const std::string> given) {
    const Result<Arguments> arguments =
        read_arguments("derive", given, {{"--linkage", "--show"}, {"--json", "--help"}, {}});
    if (!arguments) {
        return arguments.error();
    }
    if (arguments.value().has("--help")) {
        return Answer{help_text("derive"), {}};
    }
    const Result<inheritance::DeriveInput> input = read_input(arguments.value());
    if (!input) {
        return input.error();
    }
    const Result<inheritance::Derivation> derivation = inheritance::derive(input.value());
    if (!derivation) {
        return error_at(derive_place(derivation.error()), derivation.error());
    }
    const std::string text = arguments.value().has("--json")
                                 ? report::to_json(derivation.value())
                                 : report::write_text(report::derivation_document(input.value(), derivation.value()));
    return Answer{text, {}};
}

} // namespace filial::app
