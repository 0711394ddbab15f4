# Burg's recursion for one series as R computes it.
# Rscript burg.R DATA_FOLDER > ../r-burg.json     No random numbers are drawn.
folder <- commandArgs(TRUE)[1]
lynx <- log(read.csv(file.path(folder, "lynx.csv"))$lynx)
numbers <- function(x) paste0("[", paste(format(x, digits = 17), collapse = ", "), "]")
fit <- function(order) {
  a <- ar.burg(lynx, aic = FALSE, order.max = order, demean = TRUE)
  sprintf('{"order": %d, "coefficients": %s, "mean": %s, "innovation": %s}',
          order, numbers(a$ar), format(a$x.mean, digits = 17), format(a$var.pred, digits = 17))
}
cat(sprintf('{"provenance": {"kind": "library", "by": "%s stats::ar.burg", "script": "test/reference/scripts/burg.R", "seed": null}, "cases": [%s]}\n',
            R.version.string, paste(sapply(c(1, 2, 5), fit), collapse = ", ")))
