// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/reference.h"

#include <cmath>
#include <fstream>
#include <stdexcept>

namespace filial::test {

nlohmann::json reference_case(const std::string& id) {
    std::ifstream file(std::string(FILIAL_TEST_DATA) + "/reference/" + id + ".json");
    if (!file)
        throw std::runtime_error("no reference case " + id);
    return nlohmann::json::parse(file);
}

double printed_tolerance(const std::string& as_printed) {
    const auto exponent_at = as_printed.find_first_of("eE");
    const std::string digits = as_printed.substr(0, exponent_at);
    const double exponent = exponent_at == std::string::npos ? 0.0 : std::stod(as_printed.substr(exponent_at + 1));
    const auto point = digits.find('.');
    const double decimals = point == std::string::npos ? 0.0 : static_cast<double>(digits.size() - point - 1);
    return 0.5000001 * std::pow(10.0, exponent - decimals);
}

std::vector<Count> counts(const std::vector<long>& values) {
    std::vector<Count> result;
    result.reserve(values.size());
    for (const long value : values)
        result.emplace_back(value);
    return result;
}

} // namespace filial::test
