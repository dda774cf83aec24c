# Times R's smooth.spline on a series of the bench, inside this process: start-up and reading the data are not counted.
#
# usage: Rscript yardstick.R FOLDER POINTS LAMBDA REPEATS [all-knots]
#
# FOLDER/series.bin holds t (s), y and weights, POINTS doubles each. LAMBDA is in raw units: sum w (y - g)^2 + LAMBDA * integral g''(t)^2 dt.
# Each route is called once to warm up, then timed REPEATS times (a measurement repeats its call until 0.2 s are filled; system.time collects garbage first).
# Writes fitted values to FOLDER/<route>.bin, and prints one JSON object: {"program", "routes": {route: {"seconds": [...], "edf"}}}.
# Routes: r-fixed and r-gcv with R's default knots, r-all-fixed and r-all-gcv with a knot at every point; tol = 1e-9 keeps all points apart.

args <- commandArgs(trailingOnly = TRUE)
if (length(args) < 4) {
  cat("usage: Rscript yardstick.R FOLDER POINTS LAMBDA REPEATS [all-knots]\n")
  quit(status = if (length(args) > 0 && args[1] %in% c("-h", "--help")) 0 else 2)
}
folder <- args[1]
n <- as.integer(args[2])
repeats <- as.integer(args[4])
data <- readBin(file.path(folder, "series.bin"), "double", 3 * n)
t <- data[1:n]
y <- data[n + 1:n]
w <- data[2 * n + 1:n]
# R scales time to [0, 1] and weights to a mean of 1.
lambda <- as.numeric(args[3]) / ((t[n] - t[1])^3 * mean(w))

routes <- list(
  "r-fixed" = function() smooth.spline(t, y, w, lambda = lambda, tol = 1e-9),
  "r-gcv" = function() smooth.spline(t, y, w, tol = 1e-9)
)
if (length(args) > 4 && args[5] == "all-knots") {
  routes[["r-all-fixed"]] <- function() smooth.spline(t, y, w, lambda = lambda, all.knots = TRUE, tol = 1e-9)
  routes[["r-all-gcv"]] <- function() smooth.spline(t, y, w, all.knots = TRUE, tol = 1e-9)
}

measure <- function(name) {
  fit <- NULL
  once <- system.time(fit <- routes[[name]]())[["elapsed"]]
  calls <- max(1, ceiling(0.2 / max(once, 0.002)))
  seconds <- vapply(seq_len(repeats), function(i) system.time(for (k in seq_len(calls)) routes[[name]]())[["elapsed"]] / calls, 0)
  stopifnot(length(fit$y) == n)
  writeBin(fit$y, file.path(folder, paste0(name, ".bin")))
  sprintf('"%s":{"seconds":[%s],"edf":%.15g}', name, paste(formatC(seconds, digits = 9, format = "g"), collapse = ","), fit$df)
}
answers <- vapply(names(routes), measure, "")
cat(sprintf('{"program":"R %s.%s","routes":{%s}}\n', R.version$major, R.version$minor, paste(answers, collapse = ",")))
