# SPDX-License-Identifier: GPL-3.0-or-later
# work.R TABLES: the benchmarks' work in R. One line each: name, the best of three times in milliseconds, sum of results.
tables <- as.matrix(read.csv(commandArgs(TRUE)[1], header = FALSE))
dihybrid <- c(9, 3, 3, 1) / 16

best <- function(name, work) {
  sum <- 0
  times <- sapply(1:3, function(i) system.time(sum <<- work())[["elapsed"]])
  cat(sprintf("%s,%.17g,%.17g\n", name, 1000 * min(times), sum))
}

p_of <- function(counts) suppressWarnings(chisq.test(counts, p = dihybrid))$p.value

best("goodness_of_fit", function() {
  sum(apply(tables, 1, function(counts) {
    tested <- suppressWarnings(chisq.test(counts, p = dihybrid))
    unname(tested$statistic) + tested$p.value
  }))
})
best("exact_two_classes", function() {
  sum(apply(tables[1:500, ], 1, function(counts) binom.test(counts[1] + counts[2], sum(counts), 3 / 4)$p.value))
})
# Too quick for the clock one at a time.
best("heterogeneity", function() {
  for (i in 1:100) tested <- suppressWarnings(chisq.test(tables[1:50, ]))
  unname(tested$statistic) + tested$p.value
})
best("key_press", function() {
  for (i in 1:20) {
    families <- apply(tables[1:50, ], 1, p_of)
    among <- suppressWarnings(chisq.test(tables[1:50, ]))$p.value
    all <- sum(families) + p_of(colSums(tables[1:50, ])) + among
  }
  all
})
