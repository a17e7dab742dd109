# SPDX-License-Identifier: GPL-3.0-or-later
# id, P of the classes joined by ";": p.adjust's Holm.
rows <- read.csv(file("stdin"), header = FALSE, colClasses = "character")
cat("id,adjusted\n")
for (i in seq_len(nrow(rows))) {
  p <- as.numeric(strsplit(rows[i, 2], ";")[[1]])
  cat(sprintf("%s,%s\n", rows[i, 1], paste(sprintf("%.17g", p.adjust(p, "holm")), collapse = ";")))
}
