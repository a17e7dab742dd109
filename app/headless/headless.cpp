// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/headless/headless.h"

#include <filesystem>
#include <ostream>

#include "app/common/version.h"
#include "app/headless/verbs.h"
#include "core/report/utf8.h"
#include "core/report/wording.h"

namespace filial::app {

namespace {

constexpr int kInputIsWrong = 2;
constexpr int kFileFailed = 3;

using Verb = Result<Answer> (*)(std::span<const std::string>);

Verb verb_named(const std::string& name) {
    if (name == "score") {
        return score;
    }
    if (name == "families") {
        return families;
    }
    if (name == "derive") {
        return derive;
    }
    return name == "report" ? write_report : nullptr;
}

/// A bare word that is neither a verb nor a file is a slip in a verb, not a book to open.
bool looks_like_a_verb(const std::string& word) {
    std::error_code ignored;
    return word.find_first_of("./\\") == std::string::npos && !std::filesystem::exists(word, ignored);
}

Result<Answer> answer_to(std::span<const std::string> arguments) {
    if (arguments.empty() || arguments.front() == "--help" || arguments.front() == "-h") {
        return Answer{help_text(""), {}};
    }
    if (arguments.front() == "--version") {
        return Answer{std::string("filial ") + version() + "\n", {}};
    }
    const Verb verb = verb_named(arguments.front());
    if (verb == nullptr) {
        return error_at(argument_place(0, arguments.front()),
                        {MessageId::HeadlessUnknownVerb, {text_argument(arguments.front())}});
    }
    return verb(arguments.subspan(1));
}

void print_line(std::ostream& err, const Message& message) {
    err << report::clean_line(report::render(message)) << '\n';
}

} // namespace

bool is_headless(std::span<const std::string> arguments) {
    if (arguments.empty()) {
        return false;
    }
    const std::string& first = arguments.front();
    return verb_named(first) != nullptr || first == "-h" || first.starts_with("--") ||
           (!first.starts_with('-') && looks_like_a_verb(first));
}

int run_headless(std::span<const std::string> arguments, std::ostream& out, std::ostream& err) {
    const Result<Answer> answer = answer_to(arguments);
    if (!answer) {
        print_line(err, answer.error().message);
        return answer.error().kind == ErrorKind::File ? kFileFailed : kInputIsWrong;
    }
    for (const Message& warning : answer.value().warnings) {
        print_line(err, {MessageId::HeadlessWarning, {text_argument(report::render(warning))}});
    }
    out << answer.value().text << std::flush;
    if (!out) {
        print_line(err, error_at("filial", {MessageId::HeadlessOutputFailed, {}}, ErrorKind::File).message);
        return kFileFailed;
    }
    return 0;
}

} // namespace filial::app
