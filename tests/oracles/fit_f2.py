# SPDX-License-Identifier: GPL-3.0-or-later
"""id, a, b, c, d, phase: r of an F2 by SciPy (the likelihood maximised on [0, 1/2], then the score solved)."""
import sys
import numpy as np
from scipy import optimize

print("id,r,boundary")
for line in sys.stdin:
    name, a, b, c, d, phase = line.strip().split(",")
    o = np.array([float(v) for v in (a, b, c, d)])
    theta = (lambda r: (1 - r) ** 2) if phase == "coupling" else (lambda r: r * r)

    def minus(r):
        t = theta(r)
        p = np.array([2 + t, 1 - t, 1 - t, t]) / 4
        with np.errstate(divide="ignore", invalid="ignore"):
            return -np.where(o > 0, o * np.log(p), 0.0).sum()

    def score(t):
        return o[0] / (2 + t) - (o[1] + o[2]) / (1 - t) + o[3] / t

    rough = optimize.minimize_scalar(minus, bounds=(0, 0.5), method="bounded", options={"xatol": 1e-10}).x
    r, boundary = rough, 1
    if 1e-4 < rough < 0.4999:
        t = optimize.brentq(score, theta(rough + 5e-5), theta(rough - 5e-5), xtol=1e-15, rtol=1e-14)
        r, boundary = (1 - t**0.5 if phase == "coupling" else t**0.5), 0
    print("%s,%.17g,%d" % (name, r, boundary))
