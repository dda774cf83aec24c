# Reference values of every baseline under grouped data, by refitting without each lot, with dense algebra.
#
# usage: Rscript leave_lot_out.R OUTPUT.json
#
# One invented series: uneven times in s with ties, rows out of order, lots that interleave, weights of 1 to 3 and some of 0, among them a whole lot.
# With B the basis (splines::ns, splines::bs, poly, a column of ones) and W the weights, g = C W y with C = B (B'WB)^-1 B'; for the smoothing spline
# C = N (N'WN + lambda K)^-1 N', N the incidence of the distinct times and K = Q R^-1 Q' (Green & Silverman 1994, 2.1.2). Without a lot its
# weights are 0. sigma2 = RSS / (N - tr S); a lot's residual is the mean over its rows of positive weight, its variance
# sigma2 (sum a_i^2 / w_i + a' C a) with C from the fit without it. Rows are answered in the order of the file, lots by their first time.

args <- commandArgs(trailingOnly = TRUE)
if (length(args) != 1 || args[1] %in% c("-h", "--help")) {
  cat("usage: Rscript leave_lot_out.R OUTPUT.json\n")
  quit(status = if (length(args) == 1) 0 else 2)
}
library(splines)
digits <- function(v) ifelse(is.na(v), "null", formatC(v, digits = 17, format = "g", width = 1))
number <- function(v) paste0("[", paste(digits(v), collapse = ","), "]")
text <- function(v) paste0("[", paste0('"', v, '"', collapse = ","), "]")

i <- 0:59
t <- cumsum(300 + 97 * ((7 * i) %% 11))
t[c(11, 32)] <- t[c(10, 31)]
y <- 42 + 0.4 * sin(t / 9000) + 0.05 * (((13 * i) %% 17) / 17 - 0.5) + 0.03 * ((i %/% 4) %% 3)
w <- 1 + (i %% 3)
lot <- paste0("L", i %/% 4)
lot[c(22, 23, 26, 27)] <- lot[c(26, 27, 22, 23)]
lot[c(34, 35)] <- "Z"
w[c(7, 22, 34, 35, 45)] <- 0
rows <- order((17 * i) %% 60)
t <- t[rows]; y <- y[rows]; w <- w[rows]; lot <- lot[rows]
pulls <- w > 0
ends <- range(t[pulls])
knots <- function(count) quantile(unique(sort(t[pulls])), seq_len(count) / (count + 1), type = 7, names = FALSE)

regression <- function(B) function(w) {
  used <- w > 0
  r <- backsolve(qr.R(qr(sqrt(w[used]) * B[used, , drop = FALSE])), diag(ncol(B)))
  tcrossprod(B %*% r)
}
smoothing <- function(lambda) {
  u <- sort(unique(t))
  h <- diff(u) / diff(range(t))
  m <- length(u)
  Q <- matrix(0, m, m - 2)
  R <- matrix(0, m - 2, m - 2)
  for (k in seq_len(m - 2)) {
    Q[k:(k + 2), k] <- c(1 / h[k], -1 / h[k] - 1 / h[k + 1], 1 / h[k + 1])
    R[k, k] <- (h[k] + h[k + 1]) / 3
    if (k < m - 2) R[k, k + 1] <- R[k + 1, k] <- h[k + 1] / 6
  }
  penalty <- lambda / diff(range(t))^3 * Q %*% solve(R, t(Q))
  N <- outer(t, u, "==") + 0
  function(w) N %*% solve(crossprod(N, w * N) + penalty, t(N))
}

scored <- function(name, options, covariance, extra = "") {
  C <- covariance(w)
  g <- drop(C %*% (w * y))
  leverage <- diag(C) * w
  sigma2 <- sum(w * (y - g)^2) / (sum(pulls) - sum(leverage))
  deleted <- numeric(length(t))
  names <- unique(lot[order(t, seq_along(t))])
  residual <- variance <- setNames(rep(NA_real_, length(names)), names)
  for (j in names) {
    mine <- lot == j
    rest <- ifelse(mine, 0, w)
    Cj <- covariance(rest)
    deleted[mine] <- (y - drop(Cj %*% (rest * y)))[mine]
    a <- (mine & pulls) / sum(mine & pulls)
    if (!any(mine & pulls)) { residual[j] <- mean(deleted[mine]); next }
    residual[j] <- sum(a * deleted)
    variance[j] <- sigma2 * (sum((a^2 / w)[mine & pulls]) + drop(a %*% Cj %*% a))
  }
  sprintf('{"name":"%s","options":%s,"edf":%s,"sigma2":%s,\n "fitted":%s,\n "standardError":%s,\n "leverage":%s,\n "deletedResidual":%s,\n "lots":%s,"residual":%s,\n "variance":%s,"score":%s%s}',
    name, text(options), digits(sum(leverage)), digits(sigma2), number(g), number(sqrt(sigma2 * diag(C))), number(leverage), number(deleted),
    text(names), number(residual), number(variance), number(residual / sqrt(variance)), extra)
}

natural <- function(at) cbind(1, ns(at, knots = knots(4), Boundary.knots = ends))
# At 3600 s inside the first stretch of the record, and an hour beyond its end.
at <- c(min(t) + 3600, ends[2] + 3600)
projection <- local({
  C <- regression(natural(c(t, at)))(c(w, 0, 0))
  g <- drop(C %*% (c(w, 0, 0) * c(y, 0, 0)))
  # sigma2 as in scored
  own <- seq_along(t)
  sigma2 <- sum(w * (y - g[own])^2) / (sum(pulls) - sum(diag(C)[own] * w))
  sprintf(',\n "at":%s,"value":%s,"valueError":%s', number(at), number(g[-own]), number(sqrt(sigma2 * diag(C)[-own])))
})
lambda <- 5e-4 * diff(range(t))^3
cubic <- cbind(1, bs(t, knots = seq(ends[1], ends[2], length.out = 5)[2:4], Boundary.knots = ends))
fits <- c(
  scored("smoothing-spline", c("--lambda", digits(lambda)), smoothing(lambda)),
  scored("natural-spline", c("--method", "natural-spline", "--knots", "4", "--project", paste(digits(at), collapse = ",")), regression(natural(t)), projection),
  scored("b-spline", c("--method", "b-spline", "--knots", "3", "--placement", "even"), regression(cubic)),
  scored("polynomial", c("--method", "polynomial", "--degree", "3"), regression(cbind(1, poly(t, 3)))),
  scored("constant", c("--method", "constant"), regression(cbind(rep(1, length(t)))))
)
writeLines(c(
  "{",
  sprintf('"madeBy":"tools/reference/leave_lot_out.R, %s",', R.version.string),
  sprintf('"t":%s,\n"y":%s,\n"w":%s,\n"lot":%s,', number(t), number(y), number(w), text(lot)),
  sprintf('"fits":[\n%s]}', paste(fits, collapse = ",\n"))
), args[1])
