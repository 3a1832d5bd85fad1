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

yuen_parts <- function(x) {
  n <- length(x)
  g <- floor(0.2 * n)
  h <- n - 2 * g
  s <- sort(x)
  w <- pmin(pmax(s, s[g + 1]), s[n - g])
  c(mean(s[(g + 1):(n - g)]), var(w) * (n - 1) / (h * (h - 1)))
}

bootstrap_t_r <- function(n, b) {
  x <- scores(n)
  y <- scores(2 * n)[(n + 1):(2 * n)] + 0.5
  a <- x - mean(x, trim = 0.2)
  c2 <- y - mean(y, trim = 0.2)
  function() {
    t <- numeric(b)
    for (i in seq_len(b)) {
      p <- yuen_parts(sample(a, n, replace = TRUE))
      q <- yuen_parts(sample(c2, n, replace = TRUE))
      t[i] <- abs(p[1] - q[1]) / sqrt(p[2] + q[2])
    }
    quantile(t, 0.95)
  }
}

error_rates_r <- function(experiments, b) {
  n <- 20
  welch <- function(x, y) (mean(x) - mean(y)) / sqrt(var(x) / n + var(y) / n)
  one <- function(x, y) {
    p <- yuen_parts(x)
    q <- yuen_parts(y)
    own <- p[1] - q[1]
    se <- sqrt(p[2] + q[2])
    df <- (p[2] + q[2])^2 / (p[2]^2 / 11 + q[2]^2 / 11)
    d <- numeric(b)
    t <- numeric(b)
    apart <- numeric(b)
    student <- numeric(b)
    both <- c(x, y)
    for (i in seq_len(b)) {
      u <- yuen_parts(sample(x, n, replace = TRUE))
      v <- yuen_parts(sample(y, n, replace = TRUE))
      d[i] <- u[1] - v[1]
      t[i] <- abs(d[i] - own) / sqrt(u[2] + v[2])
      mixed <- sample(both)
      apart[i] <- abs(mean(mixed[1:n]) - mean(mixed[(n + 1):(2 * n)]))
      student[i] <- abs(welch(mixed[1:n], mixed[(n + 1):(2 * n)]))
    }
    c(
      t.test(x, y, var.equal = TRUE)$p.value <= 0.05,
      t.test(x, y)$p.value <= 0.05,
      2 * pt(-abs(own) / se, df) <= 0.05,
      wilcox.test(x, y)$p.value <= 0.05,
      2 * min(mean(d < 0), mean(d > 0)) <= 0.05,
      (sum(t >= abs(own) / se) + 1) / (b + 1) <= 0.05,
      (sum(apart >= abs(mean(x) - mean(y))) + 1) / (b + 1) <= 0.05,
      (sum(student >= abs(welch(x, y))) + 1) / (b + 1) <= 0.05
    )
  }
  function() rowMeans(replicate(experiments, one(rnorm(n), rnorm(n))))
}

# Trimmed mean, squared standard error and degrees of freedom of a group.
trimmed_parts <- function(x, trim) {
  n <- length(x)
  g <- floor(trim * n / 100)
  h <- n - 2 * g
  s <- sort(x)
  w <- pmin(pmax(s, s[g + 1]), s[n - g])
  c(sum(s[(g + 1):(n - g)]) / h, var(w) * (n - 1) / (h * (h - 1)), h - 1)
}

joint_grid_r <- function(n, rules, relabellings) {
  x <- scores(2 * n)
  steps <- (0:12) / 4
  q <- quantile(x, c(0.25, 0.75), names = FALSE)
  marks <- c(
    list(rep(TRUE, 2 * n)),
    lapply(steps, function(k) abs(x - median(x)) <= (1.5 + k) * mad(x)),
    lapply(steps, function(k) abs(x - mean(x)) <= (1.5 + k) * sd(x)),
    lapply(steps, function(k) x >= q[1] - (0.5 + k) * diff(q) & x <= q[2] + (0.5 + k) * diff(q))
  )[seq_len(rules)]
  trims <- c(0, 5, 10, 15, 20, 25)
  function() {
    joint <- numeric(relabellings)
    for (b in seq_len(relabellings)) {
      first <- sample(rep(c(TRUE, FALSE), each = n))
      z <- numeric(0)
      for (mark in marks) {
        for (v in list(x, log(x))) {
          for (trim in trims) {
            p <- trimmed_parts(v[mark & first], trim)
            r <- trimmed_parts(v[mark & !first], trim)
            t <- (p[1] - r[1]) / sqrt(p[2] + r[2])
            df <- (p[2] + r[2])^2 / (p[2]^2 / p[3] + r[2]^2 / r[3])
            z <- c(z, sign(t) * qnorm(pt(-abs(t), df), lower.tail = FALSE))
          }
        }
      }
      joint[b] <- mean(z)
    }
    joint
  }
}

work_of <- list(bootstrap_boot = bootstrap_boot, bootstrap_t_r = bootstrap_t_r, error_rates_r = error_rates_r, joint_grid_r = joint_grid_r)

input <- file("stdin", "r")
while (length(line <- readLines(input, n = 1)) > 0) {
  parts <- strsplit(line, " ")[[1]]
  work <- do.call(work_of[[parts[1]]], as.list(as.numeric(parts[-1])))
  taken <- system.time(work())
  cat((taken[["user.self"]] + taken[["sys.self"]]) * 1000, "\n", sep = "")
  flush(stdout())
}
