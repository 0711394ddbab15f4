# One series by exact Gaussian likelihood as R's arima computes it, with gaps too.
# Rscript --vanilla arima.R DATA_FOLDER > ../r-arima.json     No random numbers are drawn.
folder <- commandArgs(trailingOnly = TRUE)[1]
number <- function(v) ifelse(is.na(v), "null", formatC(v, digits = 17, format = "g"))
listed <- function(v) paste0("[", paste(number(v), collapse = ","), "]")
huron <- read.csv(file.path(folder, "LakeHuron.csv"))$LakeHuron
lynx <- log(read.csv(file.path(folder, "lynx.csv"))$lynx)
gappy <- function(x) { x[c(5, 6, 20, 40:42, 60)] <- NA; x }
case <- function(name, x, p, q) {
  fit <- arima(x, order = c(p, 0, q), method = "ML", optim.control = list(reltol = 1e-16, maxit = 1000))
  ahead <- predict(fit, n.ahead = 6)
  sprintf(
    '{"name":"%s","x":%s,"p":%d,"q":%d,"coefficients":%s,"errors":%s,"variance":%s,"logLikelihood":%s,"forecast":%s,"spread":%s}',
    name, listed(x), p, q, listed(fit$coef), listed(sqrt(diag(fit$var.coef))), number(fit$sigma2), number(fit$loglik),
    listed(ahead$pred), listed(ahead$se)
  )
}
cases <- c(
  case("Lake Huron, two lags", huron, 2, 0),
  case("Lake Huron, one lag and a moving average", huron, 1, 1),
  case("Lake Huron with gaps, one lag and a moving average", gappy(huron), 1, 1),
  case("lynx, three lags", lynx, 3, 0),
  case("lynx with gaps, two lags", gappy(lynx), 2, 0)
)
cat(sprintf(
  '{"provenance":{"kind":"library","by":"%s","script":"scripts/arima.R","seed":null},"cases":[%s]}\n',
  R.version.string, paste(cases, collapse = ",")
))
