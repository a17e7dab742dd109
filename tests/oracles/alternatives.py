# SPDX-License-Identifier: GPL-3.0-or-later
"""id, counts joined by ";", a hypothesis in its notation (its commas written as ";"): the P of X2, or "none" where the
estimate of r lies at an end of 0 to 1/2; 0 where a class of weight 0 has offspring."""
import re
import sys
import numpy as np
from scipy import optimize, stats

print("id,p")


def shares(cross, phase, r):
    if cross == "testcross":
        outer = (1 - r if phase == "coupling" else r) / 2
        return np.array([outer, 0.5 - outer, 0.5 - outer, outer])
    t = (1 - r) ** 2 if phase == "coupling" else r * r
    return np.array([2 + t, 1 - t, 1 - t, t]) / 4


def p_fitted(o, cross, phase):
    def minus(r):
        with np.errstate(divide="ignore", invalid="ignore"):
            return -np.where(o > 0, o * np.log(shares(cross, phase, r)), 0.0).sum()

    grid = np.linspace(0, 0.5, 2001)
    start = grid[np.argmin([minus(r) for r in grid])]
    r = optimize.minimize_scalar(minus, bounds=(max(0, start - 3e-4), min(0.5, start + 3e-4)), method="bounded",
                                 options={"xatol": 1e-13}).x
    if r < 1e-6 or r > 0.5 - 1e-6:
        return None
    e = o.sum() * shares(cross, phase, r)
    return stats.chi2.sf(((o - e) ** 2 / e).sum(), 2)


for line in sys.stdin:
    name, counts, notation = line.strip().split(",")
    o = np.array([float(v) for v in counts.split(";")])
    linked = re.fullmatch(r"(f2|testcross)\((coupling|repulsion); r=fit\)", notation)
    if linked:
        p = p_fitted(o, *linked.groups())
    else:
        w = np.array([float(v) for v in notation.split(":")])
        if o[w == 0].sum() > 0:
            p = 0.0
        else:
            o, w = o[w > 0], w[w > 0]
            p = stats.chisquare(o, o.sum() * w / w.sum()).pvalue
    print("%s,%s" % (name, "none" if p is None else "%.17g" % p))
