# Reference values of the smoothing spline from R's smooth.spline(all.knots = TRUE).
#
# usage: Rscript smooth_spline.R OUTPUT.json
#
# For each series and each lambda (R's convention: time on [0, 1], weights scaled to sum to the number of points): fitted values, first derivative and
# leverage at the distinct times, degrees of freedom and weighted residual sum of squares. Series: R's own data sets, and one made here.

args <- commandArgs(trailingOnly = TRUE)
if (length(args) != 1 || args[1] %in% c("-h", "--help")) {
  cat("usage: Rscript smooth_spline.R OUTPUT.json\n")
  quit(status = if (length(args) == 1) 0 else 2)
}

number <- function(v) paste0("[", paste(formatC(v, digits = 17, format = "g", width = 1), collapse = ","), "]")

# An invented coat weight: 60 uneven times in s, a rise with a wiper's drop of slope, weights of one to three readings.
i <- 0:59
made <- list(
  x = cumsum(c(0, 300 + 97 * ((7 * i[-1]) %% 11))),
  y = 42 + 0.02 * i + ifelse(i > 35, -0.03 * (i - 35), 0) + 0.2 * (((13 * i) %% 17) / 17 - 0.5),
  w = 1 + (i %% 3)
)
temperature <- airquality$Temp
series <- list(
  cars = list(x = cars$speed, y = cars$dist, w = rep(1, nrow(cars))),
  faithful = local({ o <- order(faithful$eruptions); list(x = faithful$eruptions[o], y = faithful$waiting[o], w = rep(1, length(o))) }),
  airquality = list(x = seq_along(temperature), y = temperature, w = rep(1, length(temperature))),
  Nile = list(x = as.numeric(time(Nile)), y = as.numeric(Nile), w = rep(1, length(Nile))),
  LakeHuron = list(x = as.numeric(time(LakeHuron)), y = as.numeric(LakeHuron), w = rep(1, length(LakeHuron))),
  coat = made
)
lambdas <- c(1e-6, 1e-4, 1e-2, 1)

one_fit <- function(s, lambda) {
  f <- smooth.spline(s$x, s$y, s$w, lambda = lambda, all.knots = TRUE)
  stopifnot(abs(f$lambda / lambda - 1) < 1e-12)
  d <- predict(f, f$x, deriv = 1)$y
  rss <- sum(s$w * (s$y - predict(f, s$x)$y)^2)
  sprintf('{"lambda":%s,"df":%s,"weightedRss":%s,\n  "fitted":%s,\n  "slope":%s,\n  "leverage":%s}',
    format(lambda, digits = 17), formatC(f$df, digits = 17, format = "g"), formatC(rss, digits = 17, format = "g"), number(f$y), number(d), number(f$lev))
}
one_series <- function(name) {
  s <- series[[name]]
  fits <- vapply(lambdas, function(l) one_fit(s, l), "")
  sprintf('"%s":{"x":%s,\n "y":%s,\n "w":%s,\n "fits":[\n %s]}', name, number(s$x), number(s$y), number(s$w), paste(fits, collapse = ",\n "))
}
out <- c(
  "{",
  sprintf('"madeBy":"tools/reference/smooth_spline.R, %s",', R.version.string),
  '"series":{',
  paste(vapply(names(series), one_series, ""), collapse = ",\n"),
  "}}"
)
writeLines(out, args[1])
