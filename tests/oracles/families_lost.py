# SPDX-License-Identifier: GPL-3.0-or-later
"""P if every lost plant were of one class. One line a case: id, lost, classes, the weights, the counts.

SciPy's chi-square for three or more classes; for two its binomial probabilities added over every outcome at least as far
from the expected number, which is the order of chi-square.
"""
import sys

from scipy.stats import binom, chisquare

print("id,now,then")
for line in sys.stdin:
    name, *numbers = line.strip().split(",")
    lost, k, *numbers = (int(x) for x in numbers)
    weights, counts = numbers[:k], numbers[k:]

    def p(row):
        if k == 2:
            n, whole = sum(row), sum(weights)
            far = abs(row[0] * whole - n * weights[0])
            return sum(binom.pmf(o, n, weights[0] / whole)
                       for o in range(n + 1) if abs(o * whole - n * weights[0]) >= far)
        return chisquare(row, [sum(row) * w / sum(weights) for w in weights]).pvalue

    then = [p([o + (lost if i == j else 0) for j, o in enumerate(counts)]) for i in range(k)]
    print(",".join([name] + [repr(float(x)) for x in [p(counts)] + then]))
