# Reference values of the smoothing spline with its penalty chosen by restricted maximum likelihood, from mgcv's gam.
#
# usage: Rscript mgcv.R R_REFERENCE.json OUTPUT.json
#
# gam(y ~ s(x, bs = "cr", k = number of distinct x), method = "REML"): with a knot at every distinct x the basis is the whole natural cubic spline, so that
# the fit is the smoothing spline with lambda = sp / S.scale (mgcv rescales the penalty matrix by S.scale; x is in its own unit). Written are the
# penalty, edf, scale (sigma^2), fitted values and standard errors from Vp (Bayesian, penalty taken as known) at the distinct x, and the REML score at
# the penalty and at 0.1, 10 and 100 times it.
# The series are those of smooth_spline.R (R's data sets and a made one) with at most 130 distinct times.

args <- commandArgs(trailingOnly = TRUE)
if (length(args) != 2 || args[1] %in% c("-h", "--help")) {
  cat("usage: Rscript mgcv.R R_REFERENCE.json OUTPUT.json\n")
  quit(status = if (length(args) == 1) 0 else 2)
}
suppressPackageStartupMessages(library(mgcv))

digits <- function(v) formatC(v, digits = 17, format = "g", width = 1)
number <- function(v) paste0("[", paste(digits(v), collapse = ","), "]")

# The x, y and w of a series stand in that file on lines of their own: no package is needed to read them.
lines <- readLines(args[1])
values <- function(key, from) {
  line <- grep(sprintf('"%s":[', key), lines[from:length(lines)], fixed = TRUE, value = TRUE)[1]
  scan(text = gsub(".*\\[|\\].*", "", line), sep = ",", quiet = TRUE)
}
series_of <- function(name) {
  from <- grep(sprintf('"%s":{"x":', name), lines, fixed = TRUE)
  list(x = values("x", from), y = values("y", from), w = values("w", from))
}

control <- gam.control(epsilon = 1e-10, newton = list(conv.tol = 1e-8))
fit_gam <- function(s, sp = NULL) {
  k <- length(unique(s$x))
  gam(y ~ s(x, bs = "cr", k = k), data = s, weights = w, method = "REML", sp = sp, control = control)
}
one_series <- function(name) {
  s <- series_of(name)
  f <- fit_gam(s)
  scale <- f$smooth[[1]]$S.scale
  x <- sort(unique(s$x))
  p <- predict(f, data.frame(x = x), se.fit = TRUE, unconditional = FALSE)
  scores <- vapply(c(0.1, 1, 10, 100), function(r) as.numeric(fit_gam(s, f$sp * r)$gcv.ubre), 0)
  sprintf('"%s":{"x":%s,\n "y":%s,\n "w":%s,\n "lambda":%s,"edf":%s,"scale":%s,\n "scores":%s,\n "at":%s,\n "fitted":%s,\n "standardError":%s}',
    name, number(s$x), number(s$y), number(s$w), digits(f$sp / scale), digits(sum(f$edf)), digits(f$sig2), number(scores), number(x),
    number(as.numeric(p$fit)), number(as.numeric(p$se.fit)))
}
names <- c("cars", "faithful", "ozone", "Nile", "LakeHuron", "mcycle", "coat")
out <- c(
  "{",
  sprintf('"madeBy":"tools/reference/mgcv.R, mgcv %s, %s",', packageVersion("mgcv"), R.version.string),
  '"series":{',
  paste(vapply(names, one_series, ""), collapse = ",\n"),
  "}}"
)
writeLines(out, args[2])
