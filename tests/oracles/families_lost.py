# SPDX-License-Identifier: GPL-3.0-or-later
"""P if every lost plant were of one class. One line a case: id, lost, classes, the weights, the counts.

SciPy's chi-square for three or more classes, its exact binomial test for two.
"""
import sys

from scipy.stats import binomtest, chisquare

print("id,now,then")
for line in sys.stdin:
    name, *numbers = line.strip().split(",")
    lost, k, *numbers = (int(x) for x in numbers)
    weights, counts = numbers[:k], numbers[k:]

    def p(row):
        if k == 2:
            return binomtest(row[0], sum(row), weights[0] / sum(weights)).pvalue
        return chisquare(row, [sum(row) * w / sum(weights) for w in weights]).pvalue

    then = [p([o + (lost if i == j else 0) for j, o in enumerate(counts)]) for i in range(k)]
    print(",".join([name] + [repr(float(x)) for x in [p(counts)] + then]))
