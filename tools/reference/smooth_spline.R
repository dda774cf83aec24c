# Reference values of the smoothing spline from R's smooth.spline(all.knots = TRUE).
#
# usage: Rscript smooth_spline.R OUTPUT.json
#
# For each series and each lambda (R's convention: time on [0, 1], weights scaled to sum to the number of points): fitted values, first derivative and
# leverage at the distinct times, degrees of freedom and weighted residual sum of squares. Then what R chooses by generalised (cv = FALSE) and by
# leave-one-out cross-validation (cv = TRUE): lambda, df and `crit`, the value of what was minimised. Series: R's own data sets, and one made here.
#
# tol = 1e-9: the default, 1e-6 of the interquartile range, may merge near times; none of these is so near.
# spar is searched from 0 to 1.5. R's default from -1.5 on ends, for LakeHuron and co2, where the criterion is 0/0 in rounding errors, with df equal to the
# number of points; `defaultDf` is the df of that search with cv = FALSE.
#
# `long` is GCV on 40,000 points with R's default knots (some 200), which is its correct way there: values at every 800th point.

args <- commandArgs(trailingOnly = TRUE)
if (length(args) != 1 || args[1] %in% c("-h", "--help")) {
  cat("usage: Rscript smooth_spline.R OUTPUT.json\n")
  quit(status = if (length(args) == 1) 0 else 2)
}

digits <- function(v) formatC(v, digits = 17, format = "g", width = 1)
number <- function(v) paste0("[", paste(digits(v), collapse = ","), "]")

# An invented coat weight: 60 uneven times in s, a rise with a wiper's drop of slope, weights of one to three readings.
i <- 0:59
made <- list(
  x = cumsum(c(0, 300 + 97 * ((7 * i[-1]) %% 11))),
  y = 42 + 0.02 * i + ifelse(i > 35, -0.03 * (i - 35), 0) + 0.2 * (((13 * i) %% 17) / 17 - 0.5),
  w = 1 + (i %% 3)
)
ones <- function(x, y) list(x = as.numeric(x), y = as.numeric(y), w = rep(1, length(x)))
temperature <- airquality$Temp
ozone <- which(!is.na(airquality$Ozone))
series <- list(
  cars = ones(cars$speed, cars$dist),
  faithful = local({ o <- order(faithful$eruptions); ones(faithful$eruptions[o], faithful$waiting[o]) }),
  airquality = ones(seq_along(temperature), temperature),
  ozone = ones(ozone, airquality$Ozone[ozone]),
  Nile = ones(time(Nile), Nile),
  LakeHuron = ones(time(LakeHuron), LakeHuron),
  mcycle = ones(MASS::mcycle$times, MASS::mcycle$accel),
  co2 = ones(time(co2), co2),
  coat = made
)
tol <- 1e-9
lambdas <- c(1e-6, 1e-4, 1e-2, 1)

one_fit <- function(s, lambda) {
  f <- smooth.spline(s$x, s$y, s$w, lambda = lambda, all.knots = TRUE, tol = tol)
  stopifnot(abs(f$lambda / lambda - 1) < 1e-12)
  d <- predict(f, f$x, deriv = 1)$y
  rss <- sum(s$w * (s$y - predict(f, s$x)$y)^2)
  sprintf('{"lambda":%s,"df":%s,"weightedRss":%s,\n  "fitted":%s,\n  "slope":%s,\n  "leverage":%s}',
    format(lambda, digits = 17), digits(f$df), digits(rss), number(f$y), number(d), number(f$lev))
}
choose <- function(s, cv, low) {
  # With ties, cv = TRUE warns that leaving out the mean of a time is not leaving out a point: that is what is wanted here.
  suppressWarnings(smooth.spline(s$x, s$y, s$w, cv = cv, all.knots = TRUE, tol = tol, control.spar = list(low = low, tol = 1e-6, maxit = 500)))
}
one_choice <- function(s, cv) {
  f <- choose(s, cv, 0)
  sprintf('{"cv":%s,"spar":%s,"lambda":%s,"df":%s,"crit":%s}', tolower(cv), digits(f$spar), digits(f$lambda), digits(f$df), digits(f$crit))
}
one_series <- function(name) {
  s <- series[[name]]
  fits <- vapply(lambdas, function(l) one_fit(s, l), "")
  choices <- c(one_choice(s, FALSE), one_choice(s, TRUE))
  sprintf('"%s":{"x":%s,\n "y":%s,\n "w":%s,\n "fits":[\n %s],\n "choices":[\n %s],\n "defaultDf":%s}', name, number(s$x), number(s$y), number(s$w),
    paste(fits, collapse = ",\n "), paste(choices, collapse = ",\n "), format(round(choose(s, FALSE, -1.5)$df, 2)))
}
long <- function(n) {
  i <- 0:(n - 1)
  w <- 1 + i %% 3
  y <- sin(7 * i / n) + ((i * i %% 100003) * i + 17 * i * i) %% 100003 / 100003 - 0.5
  f <- smooth.spline(i, y, w, cv = FALSE, tol = tol, control.spar = list(tol = 1e-6, maxit = 500))
  at <- seq(1, n, by = 800)
  sprintf('{"n":%d,"choices":{"lambda":%s,"df":%s,"crit":%s},\n "fitted":%s}', n, digits(f$lambda), digits(f$df), digits(f$crit), number(f$y[at]))
}
out <- c(
  "{",
  sprintf('"madeBy":"tools/reference/smooth_spline.R, %s",', R.version.string),
  sprintf('"long":%s,', long(40000)),
  '"series":{',
  paste(vapply(names(series), one_series, ""), collapse = ",\n"),
  "}}"
)
writeLines(out, args[1])
