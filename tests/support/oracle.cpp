// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/oracle.h"

#include <array>
#include <cstdio>
#include <cstdlib>
#include <filesystem>
#include <fstream>
#include <sstream>
#include <stdexcept>

#include <unistd.h>

namespace filial::test {
namespace {

Row split(const std::string& line) {
    Row row;
    std::stringstream stream(line);
    std::string cell;
    while (std::getline(stream, cell, ','))
        row.push_back(cell);
    return row;
}

std::string slurp(const std::filesystem::path& path) {
    std::ifstream file(path);
    std::stringstream text;
    text << file.rdbuf();
    return text.str();
}

} // namespace

std::map<std::string, Row> run_oracle(const std::string& script, const std::vector<Row>& rows) {
    namespace fs = std::filesystem;
    std::array<char, 64> name{"/tmp/filial-oracle-XXXXXX"};
    if (mkdtemp(name.data()) == nullptr)
        throw std::runtime_error("no temporary folder for the oracle");
    const fs::path folder = name.data();
    {
        std::ofstream input(folder / "in.csv");
        for (const Row& row : rows) {
            for (std::size_t i = 0; i < row.size(); ++i)
                input << (i == 0 ? "" : ",") << row[i];
            input << '\n';
        }
    }
    const std::string path = std::string(FILIAL_TEST_DATA) + "/oracles/" + script;
    const std::string interpreter = script.ends_with(".R") ? "Rscript --vanilla" : "/usr/bin/python3";
    const std::string command = interpreter + " '" + path + "' < '" + (folder / "in.csv").string() + "' > '" +
                                (folder / "out.csv").string() + "' 2> '" + (folder / "err.txt").string() + "'";
    const int status = std::system(command.c_str());
    const std::string errors = slurp(folder / "err.txt");
    std::ifstream output(folder / "out.csv");
    std::map<std::string, Row> result;
    std::string line;
    std::getline(output, line); // header
    while (std::getline(output, line))
        if (Row row = split(line); !row.empty()) {
            const std::string id = row.front();
            result.emplace(id, std::move(row));
        }
    fs::remove_all(folder);
    if (status != 0)
        throw std::runtime_error(script + " failed: " + errors);
    return result;
}

std::string exact_text(double value) {
    std::array<char, 40> text{};
    std::snprintf(text.data(), text.size(), "%.17g", value);
    return text.data();
}

} // namespace filial::test
