# SPDX-License-Identifier: GPL-3.0-or-later
"""id, counts, weights (joined by ";"), our X2, our G: SciPy's statistics, and its P of the statistics given."""
import sys
import numpy as np
from scipy import special, stats

print("id,chi2,g,p_chi2,p_g")
for line in sys.stdin:
    name, counts, weights, chi2, g = line.strip().split(",")
    o = np.array([float(x) for x in counts.split(";")])
    w = np.array([float(x) for x in weights.split(";")])
    e = o.sum() * w / w.sum()
    x2 = float(((o - e) ** 2 / e).sum())
    lr = stats.power_divergence(o, e, lambda_="log-likelihood").statistic
    df = len(o) - 1
    print("%s,%.17g,%.17g,%.17g,%.17g" % (name, x2, lr, special.chdtrc(df, float(chi2)), special.chdtrc(df, float(g))))
