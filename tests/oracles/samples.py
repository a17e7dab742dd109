# SPDX-License-Identifier: GPL-3.0-or-later
# samples: what the sample books should show, from their files alone, by SciPy and not by us.
# in: path of a book, weights joined by ':' (the ratio its cross is tested against)
# out: path, chi-square and P of the column totals, contingency chi-square and P of the families
import csv
import json
import sys

import numpy
import scipy.stats

print("path,chi_square,p,contingency,contingency_p")
for path, ratio in csv.reader(sys.stdin):
    with open(path, encoding="utf-8") as text:
        cross = json.load(text)["crosses"][0]
    counts = numpy.array([[int(cell) for cell in family["typed"]] for family in cross["families"]])
    weights = numpy.array([int(weight) for weight in ratio.split(":")])
    totals = counts.sum(axis=0)
    fit = scipy.stats.chisquare(totals, totals.sum() * weights / weights.sum())
    statistic, p, _, _ = scipy.stats.chi2_contingency(counts, correction=False)
    print(f"{path},{fit.statistic:.17g},{fit.pvalue:.17g},{statistic:.17g},{p:.17g}")
