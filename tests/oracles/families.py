# SPDX-License-Identifier: GPL-3.0-or-later
"""Families of a cross by SciPy, and by rational arithmetic with mpmath where SciPy would round.

One line a table on standard input: id, families, classes, the weights, the counts family by family. Statistics are
exact fractions turned into doubles at the end; P are SciPy's and mpmath's.
"""
import sys
from fractions import Fraction

import mpmath
import numpy
from scipy.stats import chi2_contingency

mpmath.mp.dps = 40


def real(fraction):
    return mpmath.mpf(fraction.numerator) / fraction.denominator


def upper(x, df):
    return mpmath.gammainc(mpmath.mpf(df) / 2, real(x) / 2, mpmath.inf, regularized=True)


def pearson(row, shares):
    n = sum(row)
    return sum((o - n * p) ** 2 / (n * p) for o, p in zip(row, shares)) if n else Fraction(0)


def likelihood_ratio(row, shares):
    n = sum(row)
    return 2 * mpmath.fsum(o * mpmath.log(real(o / (n * p))) for o, p in zip(row, shares) if o)


def score(rows, shares):
    k = len(shares)
    top = sum(sum(o * (o - 1) / p for o, p in zip(row, shares)) - sum(row) * (sum(row) - 1) for row in rows)
    pairs = sum(sum(row) * (sum(row) - 1) for row in rows)
    return real(Fraction(top)) / mpmath.sqrt(2 * (k - 1) * pairs)


def show(x):
    return mpmath.nstr(x, 20) if isinstance(x, mpmath.mpf) else repr(float(x))


print("id,scipy,scipy_p,scipy_df,scipy_g,contingency,p,g,total,total_p,pooled,between,total_g,pooled_g,z,z_p,phi,free_phi")
for line in sys.stdin:
    name, *numbers = line.strip().split(",")
    f, k, *numbers = (int(x) for x in numbers)
    weights, numbers = numbers[:k], numbers[k:]
    rows = [[Fraction(x) for x in numbers[j * k:(j + 1) * k]] for j in range(f)]
    rows = [row for row in rows if sum(row)]
    shares = [Fraction(w, sum(weights)) for w in weights]
    columns = [sum(column) for column in zip(*rows)]
    kept = [i for i in range(k) if columns[i]]
    n = sum(columns)
    table = numpy.array([[int(row[i]) for i in kept] for row in rows])
    scipy_x, scipy_p, scipy_df, _ = chi2_contingency(table, correction=False)
    scipy_g = chi2_contingency(table, correction=False, lambda_="log-likelihood")[0]
    pooled_shares = [columns[i] / n for i in kept]
    joined = [[row[i] for i in kept] for row in rows]
    contingency = sum(pearson(row, pooled_shares) for row in joined)
    df = (len(rows) - 1) * (len(kept) - 1)
    g = mpmath.fsum(likelihood_ratio(row, pooled_shares) for row in joined)
    total = sum(pearson(row, shares) for row in rows)
    pooled = pearson(columns, shares)
    total_g = mpmath.fsum(likelihood_ratio(row, shares) for row in rows)
    z = score(rows, shares)
    print(",".join([name] + [show(x) for x in (
        scipy_x, scipy_p, scipy_df, scipy_g, real(contingency), upper(contingency, df), g, real(total),
        upper(total, len(rows) * (k - 1)), real(pooled), real(total - pooled), total_g,
        likelihood_ratio(columns, shares), z, mpmath.erfc(z / mpmath.sqrt(2)) / 2,
        real(total / (len(rows) * (k - 1))), real(contingency / df))]))
