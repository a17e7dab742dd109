// SPDX-License-Identifier: GPL-3.0-or-later
// The work that tests/bench/check gives to R and SciPy as well, on the same tables. Each benchmark carries the sum of
// its results, so that the check can see that the same work was done.
#include <cmath>
#include <cstdlib>
#include <fstream>
#include <iostream>
#include <sstream>
#include <string>
#include <vector>

#include <benchmark/benchmark.h>

#include "core/book/book_file.h"
#include "core/book/model.h"
#include "core/families/heterogeneity.h"
#include "core/fit/goodness_of_fit.h"
#include "core/inheritance/hypothesis.h"
#include "core/report/cross_analysis.h"

namespace filial {
namespace {

using Counts = std::vector<std::vector<Count>>;

/// Lines of comma-separated counts in the file that the environment names.
Counts read_tables() {
    const char* path = std::getenv("FILIAL_BENCH_TABLES");
    std::ifstream file(path == nullptr ? "" : path);
    Counts tables;
    std::string line;
    while (std::getline(file, line)) {
        std::stringstream cells(line);
        std::string cell;
        std::vector<Count> counts;
        while (std::getline(cells, cell, ','))
            counts.emplace_back(std::stol(cell));
        tables.push_back(counts);
    }
    if (tables.empty()) {
        std::cerr << "FILIAL_BENCH_TABLES names no file of counts\n";
        std::exit(2);
    }
    return tables;
}

const Counts& tables() {
    static const Counts all = read_tables();
    return all;
}

fit::Input input(const std::string& notation, const std::vector<Count>& observed) {
    fit::Input result{.labels = {},
                      .observed = observed,
                      .hypothesis = inheritance::read_hypothesis(notation).value(),
                      .joins = {},
                      .level_counts = {},
                      .trait_names = {}};
    for (std::size_t i = 0; i < observed.size(); ++i)
        result.labels.push_back("class " + std::to_string(i + 1));
    return result;
}

void goodness_of_fit(benchmark::State& state) {
    fit::Input asked = input("9:3:3:1", tables().front());
    asked.level_counts = {2, 2};
    asked.trait_names = {"stem", "leaf"};
    double sum = 0.0;
    for (auto _ : state) {
        sum = 0.0;
        for (const auto& counts : tables()) {
            asked.observed = counts;
            const auto result = fit::goodness_of_fit(asked);
            sum += result.value().chi_square->statistic + result.value().chi_square->p->p;
        }
    }
    state.counters["sum"] = sum;
}
BENCHMARK(goodness_of_fit)->Unit(benchmark::kMillisecond);

void exact_two_classes(benchmark::State& state) {
    double sum = 0.0;
    for (auto _ : state) {
        sum = 0.0;
        for (std::size_t i = 0; i < 500; ++i) {
            const auto& counts = tables()[i];
            fit::Input asked = input("3:1", {counts[0] + counts[1], counts[2] + counts[3]});
            asked.order = fit::Order::Probability;
            sum += fit::goodness_of_fit(asked).value().exact->p.p;
        }
    }
    state.counters["sum"] = sum;
}
BENCHMARK(exact_two_classes)->Unit(benchmark::kMillisecond);

/// The first 50 tables as families.
book::Cross cross_of(std::size_t families) {
    book::Cross cross;
    cross.id = book::new_id();
    cross.name = "K14 × M02, F2";
    cross.traits = {{"stem", {{"purple", ""}, {"green", ""}}}, {"leaf", {{"hairy", ""}, {"smooth", ""}}}};
    cross.classes = book::product_classes(cross.traits);
    cross.hypothesis.notation = "9:3:3:1";
    for (std::size_t j = 0; j < families; ++j) {
        book::Family family = book::new_family("F2-" + std::to_string(j + 1), 4);
        for (std::size_t i = 0; i < 4; ++i)
            family.typed[i] = {book::CellState::Number, tables()[j % tables().size()][i]};
        cross.families.push_back(family);
    }
    return cross;
}

void heterogeneity(benchmark::State& state) {
    families::Input asked{.families = {}, .common = input("9:3:3:1", tables().front())};
    for (std::size_t j = 0; j < 50; ++j)
        asked.families.push_back({"F2-" + std::to_string(j + 1), tables()[j]});
    double sum = 0.0;
    for (auto _ : state) {
        const auto result = families::heterogeneity(asked);
        sum = result.value().contingency->statistic + result.value().contingency->p->p;
    }
    state.counters["sum"] = sum;
}
BENCHMARK(heterogeneity)->Unit(benchmark::kMillisecond);

/// What one key press computes: every family, the totals, the families' heterogeneity.
void key_press(benchmark::State& state) {
    const book::Cross cross = cross_of(50);
    double sum = 0.0;
    for (auto _ : state) {
        const report::CrossAnalysis result = report::analyse(cross, {});
        sum = result.totals->chi_square->p->p + result.heterogeneity->contingency->p->p;
        for (const auto& family : result.families)
            sum += family.fit->chi_square->p->p;
    }
    state.counters["sum"] = sum;
}
BENCHMARK(key_press)->Unit(benchmark::kMillisecond);

/// A book of 10,000 families, from its bytes to the model. The text is written where the check can read it, too.
void open_book(benchmark::State& state) {
    book::Book season;
    season.id = book::new_id();
    season.title = "many families";
    season.crosses.push_back(cross_of(10'000));
    const std::string text = book::write_book(season);
    if (const char* path = std::getenv("FILIAL_BENCH_BOOK"); path != nullptr)
        std::ofstream(path) << text;
    double sum = 0.0;
    for (auto _ : state) {
        const auto opened = book::read_book(text);
        sum = static_cast<double>(opened.value().book.crosses[0].families.size());
    }
    state.counters["sum"] = sum;
}
BENCHMARK(open_book)->Unit(benchmark::kMillisecond);

} // namespace
} // namespace filial

BENCHMARK_MAIN();
