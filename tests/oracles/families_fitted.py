# SPDX-License-Identifier: GPL-3.0-or-later
"""Families of an F2 with one recombination fraction common to all, by the closed form.

One line a table: id, families, then four counts a family in the order A_B_, A_bb, aaB_, aabb. theta solves
N theta^2 - B theta - 2d = 0, B = a - 2b - 2c - d (Fisher & Balmukand 1928); in coupling theta = (1 - r)^2.
"""
import sys

import mpmath

mpmath.mp.dps = 40


def chi_square(row, p):
    n = sum(row)
    return mpmath.fsum((o - n * q) ** 2 / (n * q) for o, q in zip(row, p))


def g(row, p):
    n = sum(row)
    return 2 * mpmath.fsum(o * mpmath.log(o / (n * q)) for o, q in zip(row, p) if o)


def upper(x, df):
    return mpmath.gammainc(mpmath.mpf(df) / 2, x / 2, mpmath.inf, regularized=True)


print("id,r,total,total_p,pooled,pooled_p,between,between_p,total_g,pooled_g,phi")
for line in sys.stdin:
    name, *numbers = line.strip().split(",")
    f, *numbers = (int(x) for x in numbers)
    rows = [numbers[4 * j:4 * j + 4] for j in range(f)]
    a, b, c, d = (sum(column) for column in zip(*rows))
    n = mpmath.mpf(a + b + c + d)
    linear = a - 2 * b - 2 * c - d
    theta = (linear + mpmath.sqrt(linear ** 2 + 8 * n * d)) / (2 * n)
    p = [(2 + theta) / 4, (1 - theta) / 4, (1 - theta) / 4, theta / 4]
    total = mpmath.fsum(chi_square(row, p) for row in rows)
    pooled = chi_square((a, b, c, d), p)
    results = [1 - mpmath.sqrt(theta), total, upper(total, 3 * f - 1), pooled, upper(pooled, 2), total - pooled,
               upper(total - pooled, 3 * (f - 1)), mpmath.fsum(g(row, p) for row in rows), g((a, b, c, d), p),
               total / (3 * f - 1)]
    print(",".join([name] + [mpmath.nstr(x, 20) for x in results]))
