# SPDX-License-Identifier: GPL-3.0-or-later
"""id, counts, weights (joined by ";"), alpha. Class by class: adjusted residual, exact P, Goodman's joint limits as
roots of their quadratic; G divided by both corrections of Williams; the departures a sample of this size would notice,
w from SciPy's noncentral chi-square, the move of a class solved from the definition of w."""
import sys
import numpy as np
from scipy import optimize, stats

print("id,adjusted,p,low,high,customary,customary_p,general,general_p,w80,move80,class80,w90,move90,class90")


def text(values):
    return ";".join("%.17g" % v for v in np.atleast_1d(values))


def effect(p, i, d):
    moved = p * (1 - p[i] - d) / (1 - p[i])  # the others keep their proportions
    moved[i] = p[i] + d
    return np.sqrt(((moved - p) ** 2 / p).sum())


def least_move(p, w):
    best = (2.0, -1)
    for i in range(len(p)):
        room = min(p[i], 1 - p[i])
        if effect(p, i, room) >= w:
            move = optimize.brentq(lambda d: effect(p, i, d) - w, 0, room, xtol=1e-15, rtol=1e-14)
            if move < best[0] * (1 - 1e-9):
                best = (move, i)
    return best


for line in sys.stdin:
    name, counts, weights, alpha = line.strip().split(",")
    o = np.array([int(v) for v in counts.split(";")])
    a = np.array([int(v) for v in weights.split(";")])
    alpha, n, k, p = float(alpha), int(o.sum()), len(o), a / a.sum()
    adjusted = (o - n * p) / np.sqrt(n * p * (1 - p))
    exact = [stats.binomtest(int(x), n, share).pvalue for x, share in zip(o, p)]
    point = stats.chi2.isf(0.05 if k == 2 else 0.05 / k, 1)
    roots = [np.sort(np.roots([n + point, -(2 * x + point), x * x / n]).real) for x in o]
    g = stats.power_divergence(o, n * p, lambda_="log-likelihood").statistic
    customary = g / (1 + (k + 1) / (6 * n))
    general = g / (1 + ((1 / p).sum() - 1) / (6 * n * (k - 1)))
    row = [text(adjusted), text(exact), text([r[0] for r in roots]), text([r[1] for r in roots]),
           text(customary), text(stats.chi2.sf(customary, k - 1)), text(general), text(stats.chi2.sf(general, k - 1))]
    critical = stats.chi2.isf(alpha, k - 1)
    for power in (0.8, 0.9):
        lam = optimize.brentq(lambda v: stats.ncx2.sf(critical, k - 1, v) - power, 1e-9, 500, xtol=1e-13, rtol=1e-14)
        w = (lam / n) ** 0.5
        move, place = least_move(p, w)
        row += [text(w), text(move), str(place)]
    print(",".join([name] + row))
