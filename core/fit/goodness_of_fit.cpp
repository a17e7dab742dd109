// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/goodness_of_fit.h"

#include <cmath>
#include <limits>

#include "core/fit/account.h"
#include "core/fit/cautions.h"
#include "core/fit/detectable.h"
#include "core/fit/exact_two_class.h"
#include "core/fit/maximise.h"
#include "core/fit/partition.h"
#include "core/fit/residuals.h"
#include "core/fit/sample.h"
#include "core/fit/statistics.h"
#include "core/fit/verdict.h"

namespace filial::fit {
namespace {

constexpr double kMinusInfinity = -std::numeric_limits<double>::infinity();

Fitted fit_parameters(const Input& input, const Sample& sample) {
    std::vector<std::vector<std::size_t>> groups;
    std::vector<std::int64_t> counts;
    for (const Cell& cell : sample.cells) {
        groups.push_back(cell.members);
        counts.push_back(cell.observed);
    }
    if (sample.n > 0)
        return maximise(input.hypothesis, groups, counts);
    Fitted nothing; // expected counts need some value of the parameter: the middle of its range
    nothing.identified = identified_parameters(input.hypothesis, groups) > 0;
    for (const auto& parameter : input.hypothesis.free_parameters())
        nothing.beta.push_back(0.5 * (parameter.low + parameter.high));
    return nothing;
}

std::vector<Estimate> estimates_of(const Input& input, const Sample& sample, const Fitted& fitted) {
    std::vector<Estimate> estimates;
    if (sample.n == 0 || !fitted.identified)
        return estimates;
    const auto& parameters = input.hypothesis.free_parameters();
    for (std::size_t i = 0; i < parameters.size(); ++i) {
        Estimate estimate;
        estimate.name = parameters[i].name;
        estimate.value = fitted.beta[i];
        estimate.at_boundary = fitted.at_boundary;
        if (fitted.standard_error)
            estimate.standard_error = *fitted.standard_error;
        else
            estimate.standard_error = plain_message(MessageId::FitEstimateAtBoundary);
        estimates.push_back(std::move(estimate));
    }
    return estimates;
}

Maybe<Exact> exact_of(const Input& input, const Sample& sample, const TestSituation& situation) {
    if (sample.n == 0)
        return plain_message(MessageId::FitNoPlants);
    if (impossible(sample)) {
        Exact exact;
        exact.p = {0.0, kMinusInfinity};
        exact.p_too_close = 1.0;
        exact.order = input.order;
        exact.method = "exact";
        return exact;
    }
    if (!situation.fixed)
        return plain_message(MessageId::FitOnlyNothingFitted);
    if (sample.possible > 2)
        return plain_message(MessageId::FitExactTwoClassesOnly);
    if (sample.possible < 2)
        return plain_message(MessageId::FitNoDegreesOfFreedom);
    return exact_two_class(sample, input.order);
}

Maybe<double> effect_of(const GoodnessOfFit& result, const Sample& sample) {
    if (!result.chi_square)
        return result.chi_square.why_not;
    if (impossible(sample))
        return plain_message(MessageId::FitForbiddenSeen);
    return std::sqrt(result.chi_square->statistic / static_cast<double>(sample.n));
}

// Asking by name for what cannot be given is an error; a table then never shows another P than the one asked for.
std::optional<Error> refused_method(const Input& input, const Maybe<Exact>& exact) {
    if (input.method != Method::Exact || exact || exact.why_not.id == MessageId::FitNoPlants)
        return std::nullopt;
    return Error{ErrorKind::Input, plain_message(MessageId::FitExactUnavailable), {}};
}

void note_unidentified(GoodnessOfFit& result, const Fitted& fitted) {
    const auto& parameters = result.input.hypothesis.free_parameters();
    if (!parameters.empty() && !fitted.identified)
        result.cautions.push_back({MessageId::FitNotIdentified, {text_argument(parameters.front().name)}});
}

void run_tests(GoodnessOfFit& result, const Sample& sample, const Fitted& fitted) {
    const Input& input = result.input;
    const int free = fitted.identified ? static_cast<int>(input.hypothesis.free_parameters().size()) : 0;
    TestSituation situation;
    situation.fixed = input.hypothesis.free_parameters().empty() && input.fitted_elsewhere == 0;
    situation.at_boundary = fitted.at_boundary;

    result.n = sample.n;
    result.classes =
        class_results(sample, input.labels, {situation.fixed, input.fitted_elsewhere > 0, fitted.at_boundary});
    std::vector<std::string> cell_labels;
    for (const ClassResult& one : result.classes)
        cell_labels.push_back(one.label);
    result.df_account = degrees_of_freedom_account(input, sample, cell_labels, free);
    result.df = situation.df = sum_of_charges(result.df_account);
    result.estimates = estimates_of(input, sample, fitted);
    result.chi_square = chi_square_test(sample, situation);
    result.g = likelihood_ratio_test(sample, situation);
    result.yates = yates_test(sample, situation);
    result.exact = exact_of(input, sample, situation);
    result.simulated = plain_message(MessageId::FitNotSimulated);
    result.partition = partition_by_traits(input);
    result.effect_w = effect_of(result, sample);
    result.detectable = detectable_departures(sample, input.alpha, result.df);
}

} // namespace

Result<GoodnessOfFit> goodness_of_fit(const Input& input, const CancellationToken& cancel, const Progress& progress) {
    if (Done checked = check_input(input); !checked)
        return checked.error();
    if (cancel.cancelled())
        return Error{ErrorKind::Input, plain_message(MessageId::Cancelled), {}};
    Sample sample = join_classes(input);
    const Fitted fitted = fit_parameters(input, sample);
    set_probabilities(sample, input.hypothesis, fitted.beta);

    GoodnessOfFit result(input);
    run_tests(result, sample, fitted);
    if (auto refused = refused_method(input, result.exact))
        return *refused;
    set_verdict(result, sample);
    set_cautions(result, sample);
    note_unidentified(result, fitted);
    if (progress)
        progress(1.0);
    return result;
}

} // namespace filial::fit
