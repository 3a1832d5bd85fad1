# Line server of the benchmark: `name number number ...` in, CPU time in ms out. Data are made before the clock starts.

library(boot)

# Skewed scores, the same in every language: -log of an evenly spread sequence.
scores <- function(n) -log(((seq_len(n) * 7919) %% 10007 + 1) / 10008)

bootstrap_boot <- function(n, b, corrected) {
  x <- scores(n)
  function() {
    drawn <- boot(x, function(d, i) mean(d[i], trim = 0.2), R = b)
    boot.ci(drawn, type = if (corrected == 1) "bca" else "perc")
  }
}

work_of <- list(bootstrap_boot = bootstrap_boot)

input <- file("stdin", "r")
while (length(line <- readLines(input, n = 1)) > 0) {
  parts <- strsplit(line, " ")[[1]]
  work <- do.call(work_of[[parts[1]]], as.list(as.numeric(parts[-1])))
  taken <- system.time(work())
  cat((taken[["user.self"]] + taken[["sys.self"]]) * 1000, "\n", sep = "")
  flush(stdout())
}
