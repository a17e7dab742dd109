// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/headless/options.h"

#include <set>

namespace filial::app {

namespace {

constexpr std::uint64_t kMostFitted = 64;
constexpr std::uint64_t kFewestReplicates = 100;
constexpr std::uint64_t kMostReplicates = 100'000'000;

Error wrong_value(const std::string& option, MessageId what, const std::string& typed) {
    return error_at(option_place(option), {what, {text_argument(typed)}});
}

template <class T> struct Name {
    const char* text;
    T value;
};

/// One of a few names; false where `typed` is none of them.
template <class T, std::size_t N> bool read_name(const Name<T> (&names)[N], const std::string& typed, T& value) {
    for (const Name<T>& name : names) {
        if (typed == name.text) {
            value = name.value;
            return true;
        }
    }
    return false;
}

Done read_names(const Arguments& arguments, report::AnalysisOptions& options) {
    static constexpr Name<fit::Method> methods[]{{"auto", fit::Method::Auto},
                                                 {"chi-square", fit::Method::ChiSquare},
                                                 {"exact", fit::Method::Exact},
                                                 {"simulate", fit::Method::Simulate}};
    static constexpr Name<fit::Order> orders[]{
        {"chi-square", fit::Order::ChiSquare}, {"g", fit::Order::G}, {"probability", fit::Order::Probability}};
    if (const auto typed = arguments.value("--method"); typed && !read_name(methods, *typed, options.method)) {
        return wrong_value("--method", MessageId::HeadlessMethod, *typed);
    }
    if (const auto typed = arguments.value("--order"); typed && !read_name(orders, *typed, options.order)) {
        return wrong_value("--order", MessageId::HeadlessOrder, *typed);
    }
    return done();
}

Result<std::vector<std::size_t>> read_join(const std::string& typed, std::size_t classes) {
    const Error wrong =
        error_at(option_place("--join"),
                 {MessageId::HeadlessJoin, {text_argument(typed), count_argument(static_cast<std::int64_t>(classes))}});
    std::vector<std::size_t> join;
    for (const std::string& part : split_at_commas(typed)) {
        const std::optional<std::uint64_t> number = read_whole(part);
        if (!number || *number < 1 || *number > classes) {
            return wrong;
        }
        join.push_back(static_cast<std::size_t>(*number) - 1);
    }
    if (join.size() < 2 || std::set<std::size_t>(join.begin(), join.end()).size() != join.size()) {
        return wrong;
    }
    return join;
}

} // namespace

OptionNames test_options() {
    return {{"--ratio", "--join", "--fitted", "--alpha", "--select", "--method", "--order", "--replicates", "--seed",
             "--labels"},
            {"--json", "--help"},
            {"--join"}};
}

Result<report::AnalysisOptions> analysis_options(const Arguments& arguments) {
    report::AnalysisOptions options;
    if (const auto typed = arguments.value("--alpha")) {
        const std::optional<double> alpha = read_number(*typed);
        if (!alpha || *alpha <= 0.0 || *alpha >= 1.0) {
            return wrong_value("--alpha", MessageId::HeadlessAlpha, *typed);
        }
        options.alpha = *alpha;
    }
    if (const Done named = read_names(arguments, options); !named) {
        return named.error();
    }
    if (const auto typed = arguments.value("--replicates")) {
        const std::optional<std::uint64_t> number = read_whole(*typed);
        if (!number || *number < kFewestReplicates || *number > kMostReplicates) {
            return wrong_value("--replicates", MessageId::HeadlessReplicates, *typed);
        }
        options.replicates = static_cast<std::int64_t>(*number);
    }
    if (const auto typed = arguments.value("--seed")) {
        const std::optional<std::uint64_t> seed = read_whole(*typed);
        if (!seed) {
            return wrong_value("--seed", MessageId::HeadlessSeed, *typed);
        }
        options.seed = *seed;
    }
    return options;
}

Result<inheritance::Hypothesis> ratio_option(const Arguments& arguments) {
    const std::optional<std::string> typed = arguments.value("--ratio");
    if (!typed) {
        return error_at(option_place("--ratio"), {MessageId::HeadlessNoRatio, {}});
    }
    Result<inheritance::Hypothesis> hypothesis = inheritance::read_hypothesis(*typed);
    if (!hypothesis) {
        return error_at(option_place("--ratio", hypothesis.error()), hypothesis.error());
    }
    return hypothesis;
}

Result<std::vector<std::vector<std::size_t>>> join_option(const Arguments& arguments, std::size_t classes) {
    std::vector<std::vector<std::size_t>> joins;
    std::set<std::size_t> used;
    const auto found = arguments.values.find("--join");
    if (found == arguments.values.end()) {
        return joins;
    }
    for (const std::string& typed : found->second) {
        Result<std::vector<std::size_t>> join = read_join(typed, classes);
        if (!join) {
            return join.error();
        }
        for (const std::size_t member : join.value()) {
            if (!used.insert(member).second) {
                return error_at(option_place("--join"),
                                {MessageId::HeadlessJoin,
                                 {text_argument(typed), count_argument(static_cast<std::int64_t>(classes))}});
            }
        }
        joins.push_back(std::move(join).value());
    }
    return joins;
}

Result<int> fitted_option(const Arguments& arguments) {
    const std::optional<std::string> typed = arguments.value("--fitted");
    if (!typed) {
        return 0;
    }
    const std::optional<std::uint64_t> number = read_whole(*typed);
    if (!number || *number > kMostFitted) {
        return wrong_value("--fitted", MessageId::HeadlessFitted, *typed);
    }
    return static_cast<int>(*number);
}

} // namespace filial::app
