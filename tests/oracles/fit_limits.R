# SPDX-License-Identifier: GPL-3.0-or-later
# id, x, n, low, high, rate: the tails beyond the exact limits given, and P(X >= x) at the rate.
rows <- read.csv(file("stdin"), header = FALSE)
cat("id,below,above,at_rate\n")
for (i in seq_len(nrow(rows))) {
  x <- rows[i, 2]; n <- rows[i, 3]
  cat(sprintf("%s,%.17g,%.17g,%.17g\n", rows[i, 1], pbeta(rows[i, 4], x, n - x + 1),
              pbeta(rows[i, 5], x + 1, n - x, lower.tail = FALSE), pbeta(rows[i, 6], x, n - x + 1)))
}
