// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <map>
#include <string>
#include <vector>

// Runs a reference script (R or Python, in tests/oracles) once for all its cases: a CSV goes in, a CSV comes out,
// numbers with 17 significant digits, each row with its id.
namespace filial::test {

using Row = std::vector<std::string>;

/// Rows of the script's output without its header, by their id (first column). A script that fails throws with what it
/// printed, so that a missing R or SciPy fails the test and never skips it.
std::map<std::string, Row> run_oracle(const std::string& script, const std::vector<Row>& rows);

/// A double with 17 significant digits.
std::string exact_text(double value);

} // namespace filial::test
