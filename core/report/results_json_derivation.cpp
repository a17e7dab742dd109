// SPDX-License-Identifier: GPL-3.0-or-later
#include <nlohmann/json.hpp>

#include "core/report/results_json.h"
#include "core/report/wording.h"

namespace filial::report {
namespace {

using Json = nlohmann::ordered_json;

Json text_or_null(const std::string& text) {
    return text.empty() ? Json() : Json(text);
}

} // namespace

std::string to_json(const inheritance::Derivation& result) {
    Json json;
    json["genotypes"] = Json::array();
    for (const inheritance::GenotypeRow& row : result.genotypes)
        json["genotypes"].push_back({{"genotype", row.genotype},
                                     {"fraction", text_or_null(row.fraction)},
                                     {"probability", row.probability},
                                     {"phenotype", row.phenotype}});
    json["classes"] = Json::array();
    for (const inheritance::DerivedClass& one : result.classes)
        json["classes"].push_back({{"label", one.label},
                                   {"genotypes", one.genotypes},
                                   {"fraction", text_or_null(one.fraction)},
                                   {"probability", one.probability}});
    json["ratio"] = result.ratio ? Json(result.ratio->weights()) : Json();
    json["notation"] = result.ratio ? Json(result.ratio->notation()) : Json();
    json["notes"] = Json::array();
    for (const Message& note : result.notes)
        json["notes"].push_back(render(note));
    // A label may hold bytes that are no UTF-8; they are replaced, never thrown over.
    return json.dump(2, ' ', false, Json::error_handler_t::replace);
}

} // namespace filial::report
