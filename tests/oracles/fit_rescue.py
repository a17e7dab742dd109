# SPDX-License-Identifier: GPL-3.0-or-later
"""id, seen, plants, alpha: the rate of mis-scoring at which `seen` or more of the plants have probability alpha."""
import sys
from scipy import optimize, stats

print("id,rate")
for line in sys.stdin:
    name, seen, plants, alpha = line.strip().split(",")
    x, n, alpha = int(seen), int(plants), float(alpha)
    rate = optimize.brentq(lambda e: stats.binom.sf(x - 1, n, e) - alpha, 0, 1, xtol=1e-15, rtol=1e-14)
    print("%s,%.17g" % (name, rate))
