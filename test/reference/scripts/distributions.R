# Upper tails and quantiles as R computes them.
# Rscript distributions.R > ../r-distributions.json     No random numbers are drawn.
number <- function(v) sprintf("%.17g", v)
row <- function(...) paste0("[", paste(number(c(...)), collapse = ","), "]")
rows <- function(grid, f) paste0("[", paste(apply(grid, 1, function(g) row(g, f(g))), collapse = ",\n  "), "]")
x <- c(1e-8, 0.01, 0.5, 1, 1.96, 3, 5.5, 8, 12, 20, 35)
p <- c(1e-100, 1e-20, 1e-10, 1e-5, 0.001, 0.025, 0.05, 0.3, 0.5, 0.7, 0.95, 0.975, 0.999, 1 - 1e-10)
cat(paste0(
  '{"provenance": {"kind": "library", "by": "', R.version.string,
  ': pnorm, pchisq, pf, pt, qnorm, qt", "script": "test/reference/scripts/distributions.R", "seed": null},\n',
  ' "normalUpper": ', rows(matrix(c(-x, 0, x)), function(g) pnorm(g, lower.tail = FALSE)), ",\n",
  ' "chiSquareUpper": ', rows(expand.grid(c(0.01, 1, 5, 30, 100, 400, 1000), c(1, 2, 4, 9, 90, 400)), function(g) pchisq(g[1], g[2], lower.tail = FALSE)), ",\n",
  ' "fUpper": ', rows(expand.grid(c(0.01, 0.5, 1, 3, 10, 50, 200), c(1, 2, 4, 36), c(3, 20, 198, 1000)), function(g) pf(g[1], g[2], g[3], lower.tail = FALSE)), ",\n",
  ' "studentTwoSided": ', rows(expand.grid(c(1e-6, 0.5, 1, 2, 5, 12, 40), c(1, 2, 5, 30, 200, 5000)), function(g) 2 * pt(g[1], g[2], lower.tail = FALSE)), ",\n",
  ' "normalQuantile": ', rows(matrix(p), function(g) qnorm(g)), ",\n",
  ' "studentQuantile": ', rows(expand.grid(p[3:13], c(1, 2, 5, 30, 200, 5000)), function(g) qt(g[1], g[2])), "}\n"
))
