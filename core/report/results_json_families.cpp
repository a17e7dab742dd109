// SPDX-License-Identifier: GPL-3.0-or-later
#include <nlohmann/json.hpp>

#include "core/report/json_parts.h"
#include "core/report/results_json.h"

namespace filial::report {

namespace {

Json free_mean_object(const Maybe<families::FreeMean>& free) {
    if (!free) {
        return nullptr;
    }
    Json object;
    object["mean"] = nullptr;
    if (free->mean) {
        object["mean"] = Json::array();
        for (const double share : *free->mean) {
            object["mean"].push_back(number_or_null(share));
        }
    }
    object["rho"] = number_or_null(free->rho);
    object["phi"] = number_or_null(free->phi);
    object["lr"] = number_or_null(free->lr);
    put_p(object, "", free->p);
    object["log_likelihood"] = number_or_null(free->log_likelihood);
    return object;
}

Json overdispersion_object(const Maybe<families::Overdispersion>& extra) {
    if (!extra) {
        return nullptr;
    }
    Json object;
    object["phi"] = number_or_null(extra->phi);
    object["rho"] = number_or_null(extra->rho);
    object["rho_low"] = number_or_null(extra->rho_low);
    object["rho_high"] = number_or_null(extra->rho_high);
    object["lr"] = number_or_null(extra->lr);
    put_p(object, "", extra->p);
    object["p_method"] = extra->p_method.empty() ? Json(nullptr) : Json(extra->p_method);
    object["z"] = number_or_null(extra->z);
    put_p(object, "z_", extra->z_p);
    object["free"] = free_mean_object(extra->free);
    return object;
}

Json outlier_list(const std::vector<families::OddFamily>& outliers) {
    Json list = Json::array();
    for (const families::OddFamily& family : outliers) {
        Json object;
        object["label"] = family.label;
        object["statistic"] = number_or_null(family.statistic);
        object["df"] = family.df;
        put_p(object, "", family.p);
        object["p_holm"] = number_or_null(family.p_holm);
        object["p_bh"] = number_or_null(family.p_bh);
        list.push_back(std::move(object));
    }
    return list;
}

Json labelled(const std::string& label, const fit::GoodnessOfFit& fit) {
    Json object;
    object["label"] = label;
    const Json fields = fit_object(fit); // kept, because items() refers to it
    for (const auto& [name, value] : fields.items()) {
        object[name] = value;
    }
    return object;
}

/// Every family in a total, in table order, with its own result.
Json tested_families(const CrossAnalysis& analysis) {
    Json list = Json::array();
    for (const FamilyAnalysis& family : analysis.families) {
        if (family.state == FamilyState::Tested && family.fit) {
            list.push_back(labelled(family.label, *family.fit));
        }
    }
    return list;
}

void put_left_out(Json& object, const CrossAnalysis& analysis) {
    object["set_aside"] = Json::array();
    object["incomplete"] = Json::array();
    object["empty"] = Json::array();
    for (const FamilyAnalysis& family : analysis.families) {
        if (family.state == FamilyState::SetAside) {
            object["set_aside"].push_back(family.label);
        } else if (family.state == FamilyState::Empty) {
            object["empty"].push_back(family.label);
        } else if (family.state != FamilyState::Tested) {
            object["incomplete"].push_back(family.label);
        }
    }
}

void put_heterogeneity(Json& object, const families::Heterogeneity& result) {
    object["total"] = source_object(result.total);
    object["pooled"] = source_object(result.pooled);
    object["heterogeneity"] = source_object(result.heterogeneity);
    object["heterogeneity_exact"] = exact_object(result.exact);
    object["contingency"] = contingency_object(result.contingency);
    object["overdispersion"] = overdispersion_object(result.overdispersion);
    object["outliers"] = outlier_list(result.outliers);
}

} // namespace

Json source_object(const families::SourceRow& row) {
    Json object;
    object["df"] = row.df;
    object["chi_square"] = number_or_null(row.chi_square);
    put_p(object, "chi_square_", row.chi_square_p);
    object["g"] = number_or_null(row.g);
    put_p(object, "g_", row.g_p);
    return object;
}

Json contingency_object(const Maybe<families::Contingency>& contingency) {
    if (!contingency) {
        return nullptr;
    }
    Json object;
    object["df"] = contingency->df;
    object["statistic"] = number_or_null(contingency->statistic);
    put_p(object, "", contingency->p);
    return object;
}

std::string to_json(const families::Heterogeneity& result) {
    Json object;
    object["per_family"] = Json::array();
    for (const fit::GoodnessOfFit& fit : result.per_family) {
        object["per_family"].push_back(fit_object(fit));
    }
    put_heterogeneity(object, result);
    return json_text(object);
}

std::string families_json(const CrossAnalysis& analysis) {
    Json object;
    object["per_family"] = tested_families(analysis);
    if (analysis.heterogeneity) {
        put_heterogeneity(object, *analysis.heterogeneity);
    }
    put_left_out(object, analysis);
    return json_text(object);
}

std::string to_json(const CrossAnalysis& analysis) {
    Json object;
    object["per_family"] = tested_families(analysis);
    object["totals"] = analysis.totals ? fit_object(*analysis.totals) : Json(nullptr);
    const bool several = analysis.heterogeneity.has_value();
    object["heterogeneity"] = several ? source_object(analysis.heterogeneity->heterogeneity) : Json(nullptr);
    object["contingency"] = several ? contingency_object(analysis.heterogeneity->contingency) : Json(nullptr);
    put_left_out(object, analysis);
    return json_text(object);
}

} // namespace filial::report
