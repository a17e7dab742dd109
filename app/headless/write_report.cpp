// SPDX-License-Identifier: GPL-3.0-or-later
#include <chrono>
#include <ctime>
#include <filesystem>

#include "app/common/version.h"
#include "app/headless/input.h"
#include "app/headless/verbs.h"
#include "core/book/files.h"
#include "core/report/cross_report.h"
#include "core/report/wording.h"

// The report of one cross of a book, as an HTML page.
namespace filial::app {

namespace {

std::string today() {
    const std::time_t now = std::chrono::system_clock::to_time_t(std::chrono::system_clock::now());
    std::tm utc{};
    gmtime_r(&now, &utc);
    char text[16] = "";
    return std::string(text, std::strftime(text, sizeof text, "%Y-%m-%d", &utc));
}

/// As a shell reads it back: quoted unless every character is harmless.
std::string quoted(const std::string& text) {
    static const std::string harmless = "abcdefghijklmnopqrstuvwxyzABCDEFGHIJKLMNOPQRSTUVWXYZ0123456789_-./:,=+%@";
    if (!text.empty() && text.find_first_not_of(harmless) == std::string::npos) {
        return text;
    }
    std::string inside;
    for (const char c : text) {
        inside += c == '\'' ? std::string("'\\''") : std::string(1, c);
    }
    return "'" + inside + "'";
}

std::string rerun_command(std::span<const std::string> given) {
    std::string command = "filial report";
    for (const std::string& argument : given) {
        command += " " + quoted(argument);
    }
    return command;
}

bool same_file(const std::string& left, const std::string& right) {
    std::error_code missing;
    return std::filesystem::equivalent(left, right, missing) && !missing;
}

Result<std::string> out_path(const Arguments& arguments) {
    const std::optional<std::string> out = arguments.value("--out");
    if (!out) {
        return error_at(option_place("--out"), {MessageId::HeadlessNoOut, {}});
    }
    if (!out->ends_with(".html") || out->ends_with("/.html") || *out == ".html") {
        return error_at(option_place("--out"), {MessageId::HeadlessOutKind, {text_argument(*out)}});
    }
    if (!arguments.plain.empty() && same_file(arguments.plain.front(), *out)) {
        return error_at(option_place("--out"), {MessageId::HeadlessOutIsInput, {}});
    }
    if (is_folder(*out)) {
        return error_at(option_place("--out"), {MessageId::HeadlessIsFolder, {}}, ErrorKind::File);
    }
    return *out;
}

report::Document document_of(const AnalysedFile& file, const std::string& name, std::string command) {
    report::Provenance provenance;
    provenance.program_version = version();
    provenance.input_name = name;
    provenance.input_sha256 = file.input.sha256;
    provenance.command = std::move(command);
    provenance.date = today();
    provenance.parents = report::parent_names(*file.input.book, file.input.cross);
    return report::cross_report(file.input.cross, file.analysis, provenance);
}

} // namespace

Result<Answer> write_report(std::span<const std::string> given) {
    const Result<Arguments> arguments =
        read_arguments("report", given, {{"--out", "--select", "--ratio", "--alpha"}, {"--help"}, {}});
    if (!arguments) {
        return arguments.error();
    }
    if (arguments.value().has("--help")) {
        return Answer{help_text("report"), {}};
    }
    const Result<std::string> out = out_path(arguments.value());
    if (!out) {
        return out.error();
    }
    const Result<AnalysedFile> file = analyse_file(arguments.value());
    if (!file) {
        return file.error();
    }
    const std::string& name = arguments.value().plain.front();
    if (!file.value().input.book) {
        return error_at(name, {MessageId::HeadlessReportNeedsBook, {}});
    }
    const report::Document document = document_of(file.value(), name, rerun_command(given));
    if (const Done written = book::disk().write_atomically(out.value(), report::write_html(document)); !written) {
        return error_at(out.value(), written.error());
    }
    return Answer{report::render({MessageId::HeadlessWritten, {text_argument(out.value())}}) + "\n",
                  file.value().input.warnings};
}

} // namespace filial::app
