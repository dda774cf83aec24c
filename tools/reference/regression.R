# Reference values of regression baselines from R's splines::ns, splines::bs and poly with lm.
#
# usage: Rscript regression.R OUTPUT.json
#
# For each series and each method: fitted values, standard errors of the fit at sigma = 1, hat values and deleted residuals e / (1 - h) at the points named by
# "at" (from 1), and the weighted residual sum of squares. Knots are type 7 quantiles of the distinct times; boundary knots are the first and the last time. Natural
# splines are also predicted beyond both ends. Series: R's own data sets; weights are 1 + (i mod 3) in the weighted fits.

args <- commandArgs(trailingOnly = TRUE)
if (length(args) != 1 || args[1] %in% c("-h", "--help")) {
  cat("usage: Rscript regression.R OUTPUT.json\n")
  quit(status = if (length(args) == 1) 0 else 2)
}
library(splines)

number <- function(v) paste0("[", paste(formatC(as.numeric(v), digits = 17, format = "g", width = 1), collapse = ","), "]")

sorted <- function(x, y) { o <- order(x); list(x = as.numeric(x)[o], y = as.numeric(y)[o]) }
series <- list(
  cars = sorted(cars$speed, cars$dist),
  faithful = sorted(faithful$eruptions, faithful$waiting),
  airquality = sorted(seq_along(airquality$Temp), airquality$Temp),
  Nile = sorted(time(Nile), Nile),
  LakeHuron = sorted(time(LakeHuron), LakeHuron),
  mcycle = sorted(MASS::mcycle$times, MASS::mcycle$accel),
  co2 = sorted(time(co2), co2)
)
methods <- list(
  list(method = "natural-spline", count = 1, weighted = TRUE),
  list(method = "natural-spline", count = 4, weighted = FALSE),
  list(method = "natural-spline", count = 7, weighted = TRUE),
  list(method = "b-spline", count = 0, weighted = FALSE),
  list(method = "b-spline", count = 5, weighted = TRUE),
  list(method = "polynomial", count = 2, weighted = FALSE),
  list(method = "polynomial", count = 4, weighted = TRUE)
)

one_fit <- function(s, m) {
  x <- s$x; y <- s$y
  w <- if (m$weighted) 1 + seq_along(x) %% 3 else rep(1, length(x))
  ends <- range(x)
  knots <- if (m$count > 0) quantile(unique(x), seq_len(m$count) / (m$count + 1), type = 7, names = FALSE) else numeric(0)
  f <- switch(m$method,
    "natural-spline" = lm(y ~ ns(x, knots = knots, Boundary.knots = ends), weights = w),
    "b-spline" = lm(y ~ bs(x, knots = knots, Boundary.knots = ends), weights = w),
    "polynomial" = lm(y ~ poly(x, m$count), weights = w))
  at <- unique(round(seq(1, length(x), length.out = min(length(x), 80))))
  p <- predict(f, se.fit = TRUE)
  h <- hatvalues(f)
  beyond <- ends + c(-0.25, 0.25) * diff(ends)
  q <- if (m$method == "natural-spline") predict(f, data.frame(x = beyond), se.fit = TRUE)
  paste0(
    sprintf('{"method":"%s","count":%d,"weighted":%s,', m$method, m$count, if (m$weighted) "true" else "false"),
    sprintf('"weightedRss":%s,\n', formatC(sum(w * resid(f)^2), digits = 17, format = "g")),
    if (m$method != "polynomial") sprintf(' "knots":%s,\n', number(knots)),
    sprintf(' "at":%s,\n "fitted":%s,\n', number(at), number(p$fit[at])),
    sprintf(' "standardError":%s,\n "leverage":%s,\n', number(p$se.fit[at] / p$residual.scale), number(h[at])),
    if (!is.null(q)) sprintf(' "beyond":%s,\n "projected":%s,\n "projectedError":%s,\n', number(beyond), number(q$fit), number(q$se.fit / p$residual.scale)),
    sprintf(' "deletedResidual":%s}', number((resid(f) / (1 - h))[at])))
}
one_series <- function(name) {
  s <- series[[name]]
  fits <- vapply(methods, function(m) one_fit(s, m), "")
  sprintf('"%s":{"x":%s,\n "y":%s,\n "fits":[\n %s]}', name, number(s$x), number(s$y), paste(fits, collapse = ",\n "))
}
out <- c(
  "{",
  sprintf('"madeBy":"tools/reference/regression.R, %s, splines %s, MASS %s",', R.version.string, packageVersion("splines"), packageVersion("MASS")),
  '"series":{',
  paste(vapply(names(series), one_series, ""), collapse = ",\n"),
  "}}"
)
writeLines(out, args[1])
