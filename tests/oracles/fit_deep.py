# SPDX-License-Identifier: GPL-3.0-or-later
"""id, x, n, a, b: log10 of the exact two-sided P in X2 order, in 60 digits over all outcomes; and the P of the
probability order with ties counted, and without any tie but the outcome itself (and its mirror image where a = b)."""
import sys
from fractions import Fraction
from math import comb
import mpmath as mp

mp.mp.dps = 60
print("id,log10,ties,no_ties")
for line in sys.stdin:
    name, x, n, a, b = line.strip().split(",")
    x, n, a, b = int(x), int(n), int(a), int(b)
    mass = []
    one = Fraction(b) ** n
    for i in range(n + 1):  # whole numbers: C(n, i) a^i b^(n-i)
        mass.append(one)
        one = one * (n - i) * a / ((i + 1) * b)
    whole = Fraction(a + b) ** n
    far = [abs((a + b) * i - n * a) for i in range(n + 1)]
    p = sum(m for m, f in zip(mass, far) if f >= far[x]) / whole
    ties = sum(m for m in mass if m <= mass[x]) / whole
    own = {x, n - x} if a == b else {x}
    no_ties = sum(m for i, m in enumerate(mass) if m < mass[x] or i in own) / whole
    shown = [mp.nstr(mp.log10(mp.mpf(p.numerator)) - mp.log10(mp.mpf(p.denominator)), 20)]
    print(",".join([name] + shown + ["%.17g" % float(v) for v in (ties, no_ties)]))
