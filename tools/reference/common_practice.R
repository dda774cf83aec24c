# Reference values of what everybody knows of splines and polynomials, from R's splinefun and lm.
#
# usage: Rscript common_practice.R OUTPUT.json
#
# interpolant: the natural cubic spline through Nile's values, splinefun(method = "natural"): values, slopes and curvatures at the middles between the points
# and, where it is straight, beyond both ends. runAway: lm(y ~ poly(x, 4)) on LakeHuron, predicted a quarter, a half and the whole of the record
# beyond its ends; straight: lm(y ~ ns(x, knots)) with three interior knots, predicted there too.

args <- commandArgs(trailingOnly = TRUE)
if (length(args) != 1 || args[1] %in% c("-h", "--help")) {
  cat("usage: Rscript common_practice.R OUTPUT.json\n")
  quit(status = if (length(args) == 1) 0 else 2)
}
library(splines)
number <- function(v) paste0("[", paste(formatC(as.numeric(v), digits = 17, format = "g", width = 1), collapse = ","), "]")

x <- as.numeric(time(Nile)); y <- as.numeric(Nile)
f <- splinefun(x, y, method = "natural")
at <- c(min(x) - c(10, 1), (x[-1] + x[-length(x)]) / 2, max(x) + c(1, 10))
u <- as.numeric(time(LakeHuron)); v <- as.numeric(LakeHuron)
beyond <- c(min(u) - c(1, 0.5, 0.25) * diff(range(u)), max(u) + c(0.25, 0.5, 1) * diff(range(u)))
knots <- quantile(u, c(0.25, 0.5, 0.75), names = FALSE)
polynomial <- lm(v ~ poly(u, 4))
natural <- lm(v ~ ns(u, knots = knots))
new <- data.frame(u = beyond)
writeLines(c(
  "{",
  sprintf('"madeBy":"tools/reference/common_practice.R, %s",', R.version.string),
  sprintf('"interpolant":{"x":%s,\n "y":%s,\n "at":%s,\n "value":%s,\n "slope":%s,\n "curvature":%s},', number(x), number(y), number(at), number(f(at)), number(f(at, 1)), number(f(at, 2))),
  sprintf('"beyond":{"x":%s,\n "y":%s,\n "at":%s,\n "runAway":%s,\n "knots":%s,\n "straight":%s}}',
    number(u), number(v), number(beyond), number(predict(polynomial, new)), number(knots), number(predict(natural, new)))
), args[1])
