// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/headless/input.h"

#include <filesystem>

#include "app/headless/options.h"
#include "core/book/book_file.h"
#include "core/report/plain_counts.h"

namespace filial::app {

namespace {

Result<std::string> read_file(const std::string& path) {
    if (is_folder(path)) {
        return error_at(path, {MessageId::HeadlessIsFolder, {}}, ErrorKind::File);
    }
    Result<std::string> bytes = book::disk().read(path, book::kLargestFile);
    if (!bytes) {
        return error_at(path, bytes.error());
    }
    return bytes;
}

bool is_book(const std::string& path, const std::string& bytes) {
    const std::size_t first = bytes.find_first_not_of(" \t\r\n");
    return path.ends_with(".filial") || (first != std::string::npos && bytes[first] == '{');
}

std::string crosses_listed(const book::Book& book) {
    std::string names;
    for (const book::Cross& cross : book.crosses) {
        names += (names.empty() ? "" : "; ") + (cross.name.empty() ? cross.id : cross.name);
    }
    return names;
}

/// The one cross, or the one selected by name or id.
Result<book::Cross> choose_cross(const book::Book& book, const std::string& path, const Arguments& arguments) {
    if (book.crosses.empty()) {
        return error_at(path, {MessageId::HeadlessNoCrosses, {}});
    }
    const std::optional<std::string> wanted = arguments.value("--select");
    std::vector<const book::Cross*> fitting;
    for (const book::Cross& cross : book.crosses) {
        if (!wanted || cross.name == *wanted || cross.id == *wanted) {
            fitting.push_back(&cross);
        }
    }
    if (fitting.size() == 1) {
        return *fitting.front();
    }
    if (fitting.empty()) {
        return error_at(option_place("--select"),
                        {MessageId::HeadlessSelectNone, {text_argument(*wanted), text_argument(crosses_listed(book))}});
    }
    return error_at(path, {MessageId::HeadlessSelectWhich, {text_argument(crosses_listed(book))}});
}

Result<CrossInput> from_book(const std::string& path, const std::string& bytes, const Arguments& arguments) {
    Result<book::OpenedBook> opened = book::read_book(bytes);
    if (!opened) {
        return error_at(path, opened.error());
    }
    Result<book::Cross> cross = choose_cross(opened.value().book, path, arguments);
    if (!cross) {
        return cross.error();
    }
    CrossInput input{std::move(cross).value(), std::nullopt, book::sha256_hex(bytes), opened.value().warnings};
    input.book = std::move(opened).value().book;
    if (arguments.has("--ratio")) {
        const Result<inheritance::Hypothesis> hypothesis = ratio_option(arguments);
        if (!hypothesis) {
            return hypothesis.error();
        }
        input.cross.hypothesis = {};
        input.cross.hypothesis.notation = *arguments.value("--ratio");
    }
    if (input.cross.hypothesis.notation.empty()) {
        return error_at(path, {MessageId::HeadlessBookWithoutHypothesis, {}});
    }
    return input;
}

Result<CrossInput> from_table(const std::string& path, const std::string& bytes, const Arguments& arguments) {
    if (arguments.has("--select")) {
        return error_at(option_place("--select"), {MessageId::HeadlessSelectWithCounts, {}});
    }
    const Result<inheritance::Hypothesis> hypothesis = ratio_option(arguments);
    if (!hypothesis) {
        return hypothesis.error();
    }
    Result<book::CountTable> table = book::read_count_table(bytes);
    if (!table) {
        return error_at(path, table.error());
    }
    return CrossInput{
        report::cross_of(std::move(table).value(), hypothesis.value()), std::nullopt, book::sha256_hex(bytes), {}};
}

/// Joins and charges given on the command line take the place of the book's.
Result<CrossInput> with_options(CrossInput input, const Arguments& arguments) {
    if (arguments.has("--join")) {
        Result<std::vector<std::vector<std::size_t>>> joins = join_option(arguments, input.cross.classes.size());
        if (!joins) {
            return joins.error();
        }
        input.cross.hypothesis.joins = std::move(joins).value();
    }
    if (arguments.has("--fitted")) {
        const Result<int> fitted = fitted_option(arguments);
        if (!fitted) {
            return fitted.error();
        }
        input.cross.hypothesis.fitted_elsewhere = fitted.value();
    }
    return input;
}

} // namespace

bool is_folder(const std::string& path) {
    std::error_code ignored;
    return std::filesystem::is_directory(path, ignored);
}

Result<CrossInput> read_cross_input(const Arguments& arguments) {
    if (arguments.plain.empty()) {
        return error_at("FILE", {MessageId::HeadlessNoFile, {}});
    }
    if (arguments.plain.size() > 1) {
        return error_at(argument_place(1, arguments.plain[1]), {MessageId::HeadlessOneFile, {}});
    }
    const std::string& path = arguments.plain.front();
    const Result<std::string> bytes = read_file(path);
    if (!bytes) {
        return bytes.error();
    }
    Result<CrossInput> input = is_book(path, bytes.value()) ? from_book(path, bytes.value(), arguments)
                                                            : from_table(path, bytes.value(), arguments);
    return input ? with_options(std::move(input).value(), arguments) : std::move(input);
}

Result<AnalysedFile> analyse_file(const Arguments& arguments) {
    const Result<report::AnalysisOptions> options = analysis_options(arguments);
    if (!options) {
        return options.error();
    }
    Result<CrossInput> input = read_cross_input(arguments);
    if (!input) {
        return input.error();
    }
    AnalysedFile file{std::move(input).value(), {}};
    file.analysis = report::analyse(file.input.cross, options.value());
    if (file.analysis.hypothesis_error) {
        const Error& error = *file.analysis.hypothesis_error;
        const bool typed = arguments.has("--ratio");
        return error_at(typed ? option_place("--ratio", error) : arguments.plain.front(), error);
    }
    if (const inheritance::Hypothesis* tested = file.analysis.hypothesis ? &*file.analysis.hypothesis : nullptr;
        tested != nullptr && tested->ratio() != nullptr) {
        const std::vector<Message>& warnings = tested->ratio()->warnings();
        file.input.warnings.insert(file.input.warnings.end(), warnings.begin(), warnings.end());
    }
    if (file.analysis.error) {
        return error_at(arguments.plain.front(), *file.analysis.error);
    }
    return file;
}

} // namespace filial::app
