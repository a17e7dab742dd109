# SPDX-License-Identifier: GPL-3.0-or-later
# Families of a cross by R's own stats. One line a table on standard input: id, families, classes, the weights, the
# counts family by family. Columns without plants and families without plants are dropped from the contingency.
lines <- readLines(file("stdin"))
cat("id,contingency,df,p,total,total_p,pooled,pooled_p,outliers\n")
show <- function(x) sprintf("%.17g", x)
plain <- function(...) suppressWarnings(chisq.test(...))
for (line in lines) {
  cells <- strsplit(line, ",")[[1]]
  numbers <- as.numeric(cells[-1])
  f <- numbers[1]
  k <- numbers[2]
  weights <- numbers[3:(2 + k)]
  counts <- matrix(numbers[-(1:(2 + k))], nrow = f, ncol = k, byrow = TRUE)
  shares <- weights / sum(weights)
  with_plants <- rowSums(counts) > 0
  total <- 0
  for (j in which(with_plants)) total <- total + unname(plain(counts[j, ], p = shares)$statistic)
  pooled <- plain(colSums(counts), p = shares)
  table <- counts[with_plants, colSums(counts) > 0, drop = FALSE]
  between <- plain(table, correct = FALSE)
  p <- sapply(seq_len(nrow(table)), function(j)
    plain(rbind(table[j, ], colSums(table[-j, , drop = FALSE])), correct = FALSE)$p.value)
  holm <- p.adjust(p, "holm")
  bh <- p.adjust(p, "BH")
  if (nrow(table) == 2) holm <- bh <- p
  total_p <- pchisq(total, sum(with_plants) * (k - 1), lower.tail = FALSE)
  cat(paste(c(cells[1], show(c(between$statistic, between$parameter, between$p.value, total, total_p,
                               pooled$statistic, pooled$p.value, rbind(p, holm, bh)))), collapse = ","), "\n", sep = "")
}
