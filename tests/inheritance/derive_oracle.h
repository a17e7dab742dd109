// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <algorithm>
#include <map>
#include <string>
#include <vector>

#include "tests/support/oracle.h"

// Cases for tests/oracles/catalogue.py, which enumerates gametes and zygotes and knows no ratio.
namespace filial::inheritance {

struct OracleCase {
    std::string cross;
    std::string linkage; ///< empty: unlinked
    std::string show;    ///< empty: genotype counts
};

struct OracleShare {
    std::string share; ///< "9/16", or a decimal where linked
    std::string slope; ///< by r, where linked
};

/// For each case, each label with its share.
inline std::vector<std::map<std::string, OracleShare>> enumerate(const std::vector<OracleCase>& cases) {
    std::vector<test::Row> rows;
    for (std::size_t i = 0; i < cases.size(); ++i) {
        std::string show = cases[i].show;
        std::replace(show.begin(), show.end(), ',', ';');
        rows.push_back({std::to_string(i), cases[i].cross, cases[i].linkage, show});
    }
    const auto output = test::run_oracle("catalogue.py", rows);
    std::vector<std::map<std::string, OracleShare>> result;
    for (std::size_t i = 0; i < cases.size(); ++i) {
        const test::Row& row = output.at(std::to_string(i));
        std::map<std::string, OracleShare> shares;
        for (std::size_t j = 1; j < row.size(); ++j) {
            const std::size_t first = row[j].find('=');
            const std::size_t second = row[j].find('=', first + 1);
            shares[row[j].substr(0, first)] = {row[j].substr(first + 1, second - first - 1), row[j].substr(second + 1)};
        }
        result.push_back(std::move(shares));
    }
    return result;
}

__extension__ using Wide = __int128;

/// a/b == c/d, in integers of 128 bits.
inline bool same_fraction(const std::string& one, const std::string& other) {
    const auto parts = [](const std::string& text) {
        const std::size_t slash = text.find('/');
        return std::pair<Wide, Wide>{std::stoll(text.substr(0, slash)), std::stoll(text.substr(slash + 1))};
    };
    const auto [a, b] = parts(one);
    const auto [c, d] = parts(other);
    return a * d == c * b;
}

} // namespace filial::inheritance
