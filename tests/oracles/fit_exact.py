# SPDX-License-Identifier: GPL-3.0-or-later
"""Two classes: id, x, n, a, b. Exact P by brute force over all outcomes, X2 order in whole numbers, G and probability
order in 50 digits with the tie rule |s - s_obs| <= 1e-12 max(1, s_obs); left tail of X2; Clopper-Pearson, Wilson."""
import sys
import mpmath as mp
from scipy import stats

mp.mp.dps = 50
print("id,chi2,chi2_left,chi2_mid,g,probability,cp_low,cp_high,wilson_low,wilson_high,log10_chi2")


def text(x):
    return mp.nstr(x, 20, min_fixed=0, max_fixed=0)


for line in sys.stdin:
    name, x, n, a, b = line.strip().split(",")
    x, n, a, b = int(x), int(n), int(a), int(b)
    total = a + b
    p, q = mp.mpf(a) / total, mp.mpf(b) / total
    pmf = [q**n]
    for i in range(n):
        pmf.append(pmf[-1] * (n - i) * a / ((i + 1) * b))
    far = [abs(total * i - n * a) for i in range(n + 1)]
    chi2 = mp.fsum(pmf[i] for i in range(n + 1) if far[i] >= far[x])
    left = mp.fsum(pmf[i] for i in range(n + 1) if far[i] <= far[x])
    tie = mp.fsum(pmf[i] for i in range(n + 1) if far[i] == far[x])

    def half(o, e):
        return o * mp.log(o / e) if o else mp.mpf(0)

    g = [2 * (half(i, n * p) + half(n - i, n * q)) for i in range(n + 1)]
    s = [-2 * mp.log(v) for v in pmf]

    def ordered(t):
        tol = mp.mpf("1e-12") * max(1, t[x])
        return mp.fsum(pmf[i] for i in range(n + 1) if t[i] >= t[x] - tol)

    cp = stats.binomtest(x, n).proportion_ci(method="exact")
    wilson = stats.binomtest(x, n).proportion_ci(method="wilson")
    print(",".join([name, text(chi2), text(left), text(chi2 - tie / 2), text(ordered(g)), text(ordered(s))] +
                   ["%.17g" % v for v in (cp.low, cp.high, wilson.low, wilson.high)] + [text(mp.log10(chi2))]))
