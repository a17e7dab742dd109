# SPDX-License-Identifier: GPL-3.0-or-later
"""id, x, df: chi-square tails by mpmath in 60 digits, as log10 too, and a noncentral tail by SciPy (lambda = df + 5)."""
import sys
import mpmath as mp
from scipy import stats

mp.mp.dps = 60
print("id,upper,log10_upper,lower,log10_lower,noncentral,end")
for line in sys.stdin:
    name, x, df = line.strip().split(",")
    a, half = mp.mpf(df) / 2, mp.mpf(float(x)) / 2
    upper = mp.gammainc(a, half, mp.inf, regularized=True)
    lower = mp.gammainc(a, 0, half, regularized=True)
    shown = [mp.nstr(v, 20, min_fixed=0, max_fixed=0) for v in (upper, mp.log10(upper), lower, mp.log10(lower))]
    moderate = float(x) <= 300 and float(df) <= 26  # beyond, SciPy's own noncentral tail overflows
    noncentral = "%.17g" % stats.ncx2.sf(float(x), float(df), float(df) + 5) if moderate else ""
    print(",".join([name] + shown + [noncentral, "end"]))
