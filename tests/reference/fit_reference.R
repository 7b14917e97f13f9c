# Reference values for `notchwright fit` from R.
#
#   Rscript tests/reference/fit_reference.R       (Debian: r-base-core, r-cran-survival)
#
# Writes, beside itself:
#   fit_nelson.csv, fit_made_1.csv, fit_made_2.csv   data for the censored regressions (x, life, runout)
#   fit_made_curve.csv                               coupon tests for the strain-life curve
#   fit_reference.csv                                dataset, model, quantity, value (tolerance factors too)
# Censored regressions are by survival::survreg. The strain-life curve has no such function: its likelihood is
# written out below and maximised by optim(), polished by Newton steps on numerical derivatives.
#
# Nelson superalloy data: W. Nelson, Accelerated Testing, Wiley 1990 (as in Meeker & Escobar 1998), from memory,
# confirmed by the published fits. The other sets are made here with fixed seeds.
library(survival)

script <- sub("^--file=", "", grep("^--file=", commandArgs(FALSE), value = TRUE))
here <- dirname(script)
out <- function(name) file.path(here, name)

nelson <- data.frame(
  x = log(c(80.3, 80.6, 80.8, 84.3, 85.2, 85.6, 85.8, 86.4, 86.7, 87.2, 87.3, 89.7, 91.3, 99.8, 100.1,
            100.5, 113.0, 114.8, 116.4, 118.0, 118.4, 118.6, 120.4, 142.5, 144.5, 145.9)),
  life = c(211.629, 200.027, 57.923, 155.000, 13.949, 112.968, 152.680, 156.725, 138.114, 56.723,
           121.075, 122.372, 112.002, 43.331, 12.076, 13.181, 18.067, 21.300, 15.616, 13.030, 8.489,
           12.434, 9.750, 11.865, 6.705, 5.733),
  runout = c(0, 0, 1, 0, 0, 1, 0, 0, 1, 0, 0, 1, rep(0, 14)))

set.seed(41)
x <- rep(log(c(250, 280, 320, 370, 430)), each = 8)
life <- round(exp(56.5 - 8 * x + 0.5 * rnorm(40)), 1)
stop_at <- 2e5
made_1 <- data.frame(x = x, life = pmin(life, stop_at), runout = as.integer(life >= stop_at))

set.seed(42)
x <- runif(200, 5.2, 6.3)
life <- exp(14 - 2.5 * (x - 5.7) + 0.8 * (x - 5.7)^2 + 0.4 * log(-log(runif(200))))
stop_at <- exp(14 + 0.8 * rnorm(200))
made_2 <- data.frame(x = round(x, 5), life = signif(pmin(life, stop_at), 7),
                     runout = as.integer(life >= stop_at))

save_data <- function(data, name) {
  write.csv(lapply(data, sprintf, fmt = "%.15g"), out(name), row.names = FALSE, quote = FALSE)
}
save_data(nelson, "fit_nelson.csv")
save_data(made_1, "fit_made_1.csv")
save_data(made_2, "fit_made_2.csv")

rows <- NULL
record <- function(dataset, model, quantity, value) {
  rows <<- rbind(rows, data.frame(dataset = dataset, model = model, quantity = quantity,
                                  value = sprintf("%.15g", value)))
}

tight <- survreg.control(maxiter = 500, rel.tolerance = 1e-14)
for (name in c("nelson", "made_1", "made_2")) {
  data <- get(name)
  for (distribution in c("lognormal", "weibull")) {
    for (degree in 1:2) {
      formula <- if (degree == 1) Surv(life, 1 - runout) ~ x else Surv(life, 1 - runout) ~ x + I(x^2)
      fit <- survreg(formula, data = data, dist = distribution, control = tight)
      model <- paste0(distribution, "_", degree)
      value <- c(coef(fit), log(fit$scale))
      error <- sqrt(diag(vcov(fit)))
      for (i in seq_along(value)) {
        record(name, model, paste0("coefficient_", i - 1), value[i])
        record(name, model, paste0("standard_error_", i - 1), error[i])
      }
      record(name, model, "log_likelihood", fit$loglik[2])
      record(name, model, "aic", 2 * length(value) - 2 * fit$loglik[2])
    }
  }
}

# ---- the strain-life curve ----

log_life_at <- function(theta, strain) {            # ln(2N) by bisection, then Newton
  value <- function(w) exp(theta[1] + theta[2] * w) + exp(theta[3] + theta[4] * w)
  low <- rep(-100, length(strain)); high <- rep(200, length(strain))
  for (i in 1:60) {
    middle <- (low + high) / 2
    above <- value(middle) > strain
    low <- ifelse(above, middle, low); high <- ifelse(above, high, middle)
  }
  w <- (low + high) / 2
  for (i in 1:6) {
    p <- exp(theta[1] + theta[2] * w); q <- exp(theta[3] + theta[4] * w)
    w <- w - (log(p + q) - log(strain)) * (p + q) / (theta[2] * p + theta[4] * q)
  }
  w
}

set.seed(46)
truth <- c(log(1100 / 206000), -0.09, log(0.5), -0.6)
strain <- rep(c(0.03, 0.015, 0.007, 0.0035, 0.0021, 0.0016, 0.0014), each = 6)
w <- log_life_at(truth, strain)
cycles <- signif(exp(w + 0.3 * rnorm(42)) / 2, 4)
stop_at <- 5e5
curve <- data.frame(strain_amplitude = strain, cycles = pmin(cycles, stop_at),
                    runout = as.integer(cycles >= stop_at))
save_data(curve, "fit_made_curve.csv")

# Value of the log-likelihood of the lives in cycles. Z is centred at its median.
log_likelihood <- function(theta, distribution, growing, reference) {
  if (theta[2] >= 0 || theta[4] >= 0) return(-1e10)
  w <- log_life_at(theta, curve$strain_amplitude)
  s <- exp(theta[5] + if (growing) theta[6] * (w - reference) else 0)
  r <- (log(2 * curve$cycles) - w) / s
  if (distribution == "lognormal") {
    failed <- dnorm(r, log = TRUE); survived <- pnorm(r, lower.tail = FALSE, log.p = TRUE)
  } else {
    z <- r + log(log(2))
    failed <- z - exp(z); survived <- -exp(z)
  }
  sum(ifelse(curve$runout == 1, survived, failed - log(s) - log(curve$cycles)))
}

derivatives <- function(f, at, step) {              # fourth-order differences
  n <- length(at)
  g <- function(x) sapply(seq_len(n), function(i) {
    e <- replace(numeric(n), i, step[i])
    (8 * (f(x + e) - f(x - e)) - (f(x + 2 * e) - f(x - 2 * e))) / (12 * step[i])
  })
  h <- sapply(seq_len(n), function(i) {
    e <- replace(numeric(n), i, step[i])
    (8 * (g(at + e) - g(at - e)) - (g(at + 2 * e) - g(at - 2 * e))) / (12 * step[i])
  })
  list(gradient = g(at), hessian = (h + t(h)) / 2)
}

reference <- mean(log(2 * curve$cycles))
# Each line about the middle of the lives, where its two parameters are nearly independent.
to_plain <- function(u) {
  u[1] <- u[1] - u[2] * reference; u[3] <- u[3] - u[4] * reference
  u
}
for (distribution in c("lognormal", "weibull")) {
  for (growing in c(FALSE, TRUE)) {
    f <- function(u) log_likelihood(to_plain(u), distribution, growing, reference)
    u <- c(truth[1] + truth[2] * reference, truth[2], truth[3] + truth[4] * reference, truth[4], log(0.3),
           if (growing) 0)
    for (i in 1:5) u <- optim(u, f, control = list(fnscale = -1, maxit = 5000, reltol = 1e-15))$par
    step <- c(1e-3, 2e-4, 1e-3, 5e-4, 1e-3, 1e-3)[seq_along(u)] * 2
    for (i in 1:6) {
      d <- derivatives(f, u, step)
      u <- u - solve(d$hessian, d$gradient)
    }
    covariance <- solve(-derivatives(f, u, step)$hessian)
    matrix <- diag(length(u)); matrix[1, 2] <- matrix[3, 4] <- -reference
    error <- sqrt(diag(matrix %*% covariance %*% t(matrix)))
    plain <- to_plain(u)
    model <- paste0(distribution, if (growing) "_growing" else "_constant")
    for (i in seq_along(u)) {
      record("made_curve", model, paste0("theta_", i - 1), plain[i])
      record("made_curve", model, paste0("standard_error_", i - 1), error[i])
    }
    record("made_curve", model, "log_likelihood", f(u))
    record("made_curve", model, "aic", 2 * length(u) - 2 * f(u))
  }
}
# ---- one-sided tolerance factors: quantiles of R's own noncentral t (algorithm AS 243) ----
for (n in c(3, 5, 10, 30, 100)) {
  for (survival in c(0.5, 0.9, 0.99)) {
    for (confidence in c(0.05, 0.5, 0.9, 0.99)) {
      factor <- qt(confidence, n - 1, qnorm(survival) * sqrt(n)) / sqrt(n)
      record("tolerance", sprintf("n%g_%g", n, survival), sprintf("confidence_%g", confidence), factor)
    }
  }
}
write.csv(rows, out("fit_reference.csv"), row.names = FALSE, quote = FALSE)
