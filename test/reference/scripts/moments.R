# Lagged covariances (acf), multivariate Yule-Walker (ar) and linear models (lm) as R computes them.
# Rscript moments.R DATA_FOLDER > ../r-moments.json     No random numbers are drawn.
folder <- commandArgs(trailingOnly = TRUE)[1]

number <- function(v) ifelse(is.na(v), "null", sprintf("%.17g", v))
vec <- function(v) paste0("[", paste(number(as.numeric(v)), collapse = ","), "]")
mat <- function(m) {
  m <- as.matrix(m)
  paste0("[", paste(apply(m, 1, function(r) vec(r)), collapse = ","), "]")
}
list_of <- function(items) paste0("[", paste(items, collapse = ",\n    "), "]")
object <- function(...) {
  parts <- list(...)
  paste0("{", paste0('"', names(parts), '": ', unlist(parts), collapse = ",\n   "), "}")
}

read <- function(file, columns) as.matrix(read.csv(file.path(folder, file))[, columns, drop = FALSE])
sets <- list(
  bjsales = list(x = diff(read("BJsales.csv", c("lead", "sales"))), order = 5, most = 10),
  german = list(x = diff(log(read("e1_west_german_inv_inc_cons_1960Q1_1982Q4.csv", c("invest", "income", "cons"))[1:76, ])), order = 2, most = 4),
  macro = list(x = diff(log(read("macrodata.csv", c("realgdp", "realcons", "realinv")))), order = 3, most = 6),
  lynx = list(x = log(read("lynx.csv", "lynx")), order = 3, most = 6)
)

moment_case <- function(name) {
  set <- sets[[name]]
  x <- set$x
  dimnames(x) <- NULL
  k <- ncol(x)
  n <- nrow(x)
  covariances <- acf(ts(x), lag.max = 6, type = "covariance", plot = FALSE)$acf
  correlations <- acf(ts(x), lag.max = 6, type = "correlation", plot = FALSE)$acf
  at <- function(a, lag) matrix(a[lag + 1, , ], k, k)
  fitted <- ar(ts(x), aic = FALSE, order.max = set$order, method = "yule-walker")
  chosen <- ar(ts(x), aic = TRUE, order.max = set$most, method = "yule-walker")
  lags <- array(fitted$ar, c(set$order, k, k))
  ahead <- predict(fitted, n.ahead = 5, se.fit = FALSE)
  object(
    name = paste0('"', name, '"'),
    series = k, rows = n, order = set$order, most = set$most,
    covariances = list_of(sapply(0:6, function(l) mat(at(covariances, l)))),
    correlations = list_of(sapply(0:6, function(l) mat(at(correlations, l)))),
    lagMatrices = list_of(sapply(seq_len(set$order), function(j) mat(matrix(lags[j, , ], k, k)))),
    partial = list_of(sapply(seq_len(set$most), function(j) mat(matrix(chosen$partialacf[j, , ], k, k)))),
    mean = vec(fitted$x.mean),
    varPred = mat(fitted$var.pred),
    aic = vec(chosen$aic),
    aicOrder = chosen$order,
    ahead = mat(ahead)
  )
}

# least squares with a chosen set of lags, a season and a driver, all written out by hand
regression_case <- function(name, lags, cycle, trend) {
  x <- sets[[name]]$x
  dimnames(x) <- NULL
  n <- nrow(x)
  k <- ncol(x)
  p <- max(lags)
  t <- (p + 1):n
  driver <- cos((1:n)^2 / 7)
  z <- matrix(1, length(t), 1)
  if (trend) z <- cbind(z, t)
  if (cycle > 0) for (s in 1:(cycle - 1)) z <- cbind(z, ((t - s) %% cycle == 0) - 1 / cycle)
  for (l in lags) z <- cbind(z, x[t - l, ])
  z <- cbind(z, driver[t])
  fit <- lm(x[t, ] ~ z - 1)
  u <- as.matrix(residuals(fit))
  first <- lm(x[t, 1] ~ z - 1)
  object(
    name = paste0('"', name, " lags ", paste(lags, collapse = " "), '"'),
    set = paste0('"', name, '"'), driver = mat(matrix(driver)),
    lags = vec(lags), cycle = cycle, trend = ifelse(trend, "true", "false"),
    coefficients = mat(coef(fit)),
    covariance = mat(crossprod(u) / (length(t) - ncol(z))),
    errors = vec(summary(first)$coefficients[, 2])
  )
}

cat(object(
  provenance = object(
    kind = '"library"',
    by = paste0('"', R.version.string, ': stats::acf, stats::ar, stats::lm"'),
    script = '"test/reference/scripts/moments.R"',
    seed = "null",
    note = '"multivariate ar divides the innovation covariance by n - K(p + 1), scalar ar by n - (p + 1); acf[lag, i, j] is the covariance of series i at t with series j at t - lag"'
  ),
  cases = list_of(sapply(names(sets), moment_case)),
  regressions = list_of(c(
    regression_case("macro", c(1, 2), 0, FALSE),
    regression_case("macro", c(1, 4), 4, TRUE),
    regression_case("bjsales", c(2, 3), 0, TRUE),
    regression_case("german", c(1), 4, FALSE)
  ))
))
cat("\n")
