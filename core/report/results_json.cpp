// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/report/results_json.h"

#include <cmath>

#include <nlohmann/json.hpp>

#include "core/report/json_parts.h"
#include "core/report/wording.h"

namespace filial::report {

namespace {

Json class_object(const fit::ClassResult& c) {
    Json object;
    object["label"] = c.label;
    object["observed"] = c.observed.value();
    object["expected"] = number_or_null(c.expected);
    object["residual"] = number_or_null(c.residual);
    object["adjusted_residual"] = number_or_null(c.adjusted_residual);
    object["p_holm"] = number_or_null(c.p_holm);
    object["interval_low"] = number_or_null(c.interval_low);
    object["interval_high"] = number_or_null(c.interval_high);
    return object;
}

/// A forbidden class with offspring: no statistic is large enough, and P is 0.
Json impossible_object() {
    Json object;
    object["statistic"] = nullptr;
    object["p"] = 0.0;
    object["log10_p"] = nullptr;
    return object;
}

Json chi_square_object(const fit::GoodnessOfFit& result) {
    if (!result.chi_square && result.verdict != fit::Verdict::Impossible) {
        return nullptr;
    }
    if (!result.chi_square) {
        Json object = impossible_object();
        object["p_too_close"] = nullptr;
        return object;
    }
    Json object;
    object["statistic"] = number_or_null(result.chi_square->statistic);
    put_p(object, "", result.chi_square->p);
    object["p_too_close"] = number_or_null(result.chi_square->p_too_close);
    return object;
}

Json g_object(const fit::GoodnessOfFit& result) {
    if (!result.g && result.verdict != fit::Verdict::Impossible) {
        return nullptr;
    }
    const fit::LikelihoodRatio none;
    const fit::LikelihoodRatio& g = result.g ? *result.g : none;
    Json object;
    if (result.g) {
        object["statistic"] = number_or_null(g.statistic);
        put_p(object, "", g.p);
    } else {
        object = impossible_object();
    }
    object["williams_statistic"] = number_or_null(g.williams_statistic);
    put_p(object, "williams_", g.williams_p);
    object["williams_general_statistic"] = number_or_null(g.williams_general_statistic);
    put_p(object, "williams_general_", g.williams_general_p);
    return object;
}

Json yates_object(const Maybe<fit::Yates>& yates) {
    if (!yates) {
        return nullptr;
    }
    Json object;
    object["statistic"] = number_or_null(yates->statistic);
    put_p(object, "", yates->p);
    return object;
}

Json simulated_object(const Maybe<fit::Simulated>& simulated) {
    if (!simulated) {
        return nullptr;
    }
    Json object;
    object["p"] = number_or_null(simulated->p);
    object["log10_p"] = number_or_null(std::log10(simulated->p));
    object["low"] = number_or_null(simulated->low);
    object["high"] = number_or_null(simulated->high);
    object["replicates"] = simulated->replicates;
    object["seed"] = simulated->seed;
    return object;
}

Json partition_list(const Maybe<std::vector<fit::PartitionRow>>& partition) {
    if (!partition) {
        return nullptr;
    }
    Json list = Json::array();
    for (const fit::PartitionRow& row : *partition) {
        Json object;
        object["what"] = render(row.what);
        object["df"] = row.df;
        object["statistic"] = number_or_null(row.statistic);
        put_p(object, "", row.p);
        list.push_back(std::move(object));
    }
    return list;
}

Json account_list(const std::vector<fit::Charge>& account) {
    Json list = Json::array();
    for (const fit::Charge& charge : account) {
        Json object;
        object["what"] = render(charge.what);
        object["charge"] = charge.charge;
        list.push_back(std::move(object));
    }
    return list;
}

Json estimate_list(const std::vector<fit::Estimate>& estimates) {
    Json list = Json::array();
    for (const fit::Estimate& estimate : estimates) {
        Json object;
        object["what"] = estimate.name;
        object["estimate"] = number_or_null(estimate.value);
        object["standard_error"] = number_or_null(estimate.standard_error);
        object["at_boundary"] = estimate.at_boundary;
        list.push_back(std::move(object));
    }
    return list;
}

/// The smallest w noticed with power 0.8 and 0.9.
Json detectable_list(const std::vector<fit::Detectable>& detectable) {
    Json list = Json::array();
    for (const fit::Detectable& one : detectable) {
        Json object;
        object["power"] = number_or_null(one.power);
        object["w"] = number_or_null(one.w);
        list.push_back(std::move(object));
    }
    return list;
}

const char* verdict_name(fit::Verdict verdict) {
    switch (verdict) {
    case fit::Verdict::NotContradicted:
        return "not contradicted";
    case fit::Verdict::Contradicted:
        return "contradicted";
    case fit::Verdict::Impossible:
        return "impossible";
    case fit::Verdict::NotTested:
        break;
    }
    return "not tested";
}

const char* order_name(fit::Order order) {
    switch (order) {
    case fit::Order::ChiSquare:
        return "chi-square";
    case fit::Order::G:
        return "g";
    case fit::Order::Probability:
        break;
    }
    return "probability";
}

} // namespace

Json number_or_null(double value) {
    return std::isfinite(value) ? Json(value) : Json(nullptr);
}

Json number_or_null(const Maybe<double>& value) {
    return value ? number_or_null(*value) : Json(nullptr);
}

void put_p(Json& object, std::string_view prefix, const Maybe<fit::Tail>& p) {
    const std::string name(prefix);
    object[name + "p"] = p ? number_or_null(p->p) : Json(nullptr);
    object[name + "log10_p"] = p ? number_or_null(p->log10_p) : Json(nullptr);
}

Json exact_object(const Maybe<fit::Exact>& exact) {
    if (!exact) {
        return nullptr;
    }
    Json object;
    put_p(object, "", exact->p);
    object["mid_p"] = number_or_null(exact->mid_p);
    object["lower"] = number_or_null(exact->lower);
    object["upper"] = number_or_null(exact->upper);
    object["p_too_close"] = number_or_null(exact->p_too_close);
    object["other_reading"] = exact->other_reading ? number_or_null(*exact->other_reading) : Json(nullptr);
    object["order"] = order_name(exact->order);
    object["method"] = exact->method;
    return object;
}

Json fit_object(const fit::GoodnessOfFit& result) {
    Json object;
    object["classes"] = Json::array();
    for (const fit::ClassResult& c : result.classes) {
        object["classes"].push_back(class_object(c));
    }
    object["n"] = result.n;
    object["df"] = result.df;
    object["df_account"] = account_list(result.df_account);
    object["chi_square"] = chi_square_object(result);
    object["g"] = g_object(result);
    object["yates"] = yates_object(result.yates);
    object["exact"] = exact_object(result.exact);
    object["simulated"] = simulated_object(result.simulated);
    object["partition"] = partition_list(result.partition);
    object["effect_w"] = number_or_null(result.effect_w);
    object["detectable_w"] = detectable_list(result.detectable);
    object["verdict"] = verdict_name(result.verdict);
    object["hypothesis"] = result.input.hypothesis.notation();
    object["alpha"] = number_or_null(result.input.alpha);
    object["estimates"] = estimate_list(result.estimates);
    object["cautions"] = Json::array();
    for (const Message& caution : result.cautions) {
        object["cautions"].push_back(render(caution));
    }
    return object;
}

std::string json_text(const Json& object) {
    return object.dump(2, ' ', false, Json::error_handler_t::replace) + "\n";
}

std::string to_json(const fit::GoodnessOfFit& result) {
    return json_text(fit_object(result));
}

} // namespace filial::report
