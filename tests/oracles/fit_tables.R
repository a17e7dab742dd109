# SPDX-License-Identifier: GPL-3.0-or-later
# id, counts joined by ";", weights joined by ";": chisq.test's statistic and P, and P of the statistic it is given.
rows <- read.csv(file("stdin"), header = FALSE, colClasses = "character")
cat("id,statistic,p_given\n")
for (i in seq_len(nrow(rows))) {
  observed <- as.numeric(strsplit(rows[i, 2], ";")[[1]])
  weights <- as.numeric(strsplit(rows[i, 3], ";")[[1]])
  test <- suppressWarnings(chisq.test(observed, p = weights / sum(weights)))
  given <- pchisq(as.numeric(rows[i, 4]), length(observed) - 1, lower.tail = FALSE)
  cat(sprintf("%s,%.17g,%.17g\n", rows[i, 1], test$statistic, given))
}
