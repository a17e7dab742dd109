# SPDX-License-Identifier: GPL-3.0-or-later
"""id, four counts, cross (f2 or testcross), phase: r by maximising the likelihood, X2 and P on 2 df, adjusted residuals
and their normal P. The variance of O - E is that of a residual: the part of the unit vectors that is left when the
directions of the total and of r (its derivative taken numerically) are projected out."""
import sys
import numpy as np
from scipy import optimize, stats

print("id,r,chi2,p,adjusted,p_class")


def shares(cross, phase, r):
    if cross == "testcross":
        p = np.array([1 - r, r, r, 1 - r]) / 2
        return p if phase == "coupling" else p[[1, 0, 3, 2]]
    t = (1 - r) ** 2 if phase == "coupling" else r * r
    return np.array([2 + t, 1 - t, 1 - t, t]) / 4


for line in sys.stdin:
    name, a, b, c, d, cross, phase = line.strip().split(",")
    o = np.array([float(v) for v in (a, b, c, d)])
    n = o.sum()

    def slope(r, h=1e-4):  # five-point derivative of the shares
        f = [shares(cross, phase, r + s * h) for s in (-2, -1, 1, 2)]
        return (f[0] - 8 * f[1] + 8 * f[2] - f[3]) / (12 * h)

    rough = optimize.minimize_scalar(lambda r: -(o * np.log(shares(cross, phase, r))).sum(), bounds=(0.001, 0.499),
                                     method="bounded", options={"xatol": 1e-9}).x
    r = optimize.brentq(lambda r: (o * slope(r) / shares(cross, phase, r)).sum(), rough - 1e-3, rough + 1e-3, xtol=1e-14)
    p = shares(cross, phase, r)
    x2 = ((o - n * p) ** 2 / (n * p)).sum()
    basis, _ = np.linalg.qr(np.column_stack([np.sqrt(p), slope(r) / np.sqrt(p)]))
    left = np.eye(4) - basis @ basis.T
    z = (o - n * p) / np.sqrt(n * p) / np.sqrt(np.diag(left))
    print(",".join([name, "%.17g" % r, "%.17g" % x2, "%.17g" % stats.chi2.sf(x2, 2),
                    ";".join("%.17g" % v for v in z), ";".join("%.17g" % v for v in 2 * stats.norm.sf(abs(z)))]))
