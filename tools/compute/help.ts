/** What --help prints. */
export const HELP = `compute: the baseline of a series, its uncertainty, and every lot against the baseline fitted without it

  npm run -s compute -- fit [options] < series.csv      one JSON object on standard output
  printf 't,y\\n0,1.0\\n10,1.2\\n20,1.1\\n30,1.4\\n40,1.3\\n' | npm run -s compute -- fit --lambda 500

SERIES   comma-separated, with a header that names the columns in any order; a point in decimals; rows in any order
  t      a number as it stands (seconds), or an ISO 8601 time (2026-03-01T06:00:00Z), read as seconds since
         1970-01-01 UTC; without a zone it is read as UTC, and a warning says so
  y      the reading
  w      its weight, >= 0 (1 where there is no such column). A row of weight 0 takes part in nothing, and is answered for
  lot    its lot (where there is no such column, every row is a lot of its own, and lots is empty)

OPTIONS  as --name value or --name=value
  --method M           smoothing-spline (default), natural-spline, b-spline, polynomial, constant
  --choose C           choose the smoothness by lot-cv (default), gcv, gcv14 or reml (smoothing-spline only), among all
                       penalties, 0 to 40 knots, degrees 1 to 4; of several minima the smallest
  --one-standard-error the smoothest whose lot-cv lies within one standard error of the smallest
  --edf E              the smoothness that has E effective degrees of freedom (whole numbers but for smoothing-spline)
  --lambda L           the penalty, > 0; inf is the straight line (smoothing-spline)
  --knots K            number of interior knots (natural-spline, b-spline)
  --degree D           1 to 5 (polynomial)
  --placement P        of the knots: even in time, quantile (default; of the distinct times, R's type 7), variability
                       (more where the residuals of a pilot fit vary more)
  --shortest-period T  seconds: nothing faster counts as drift. lambda is at least kappa (T / 2 pi)^4, at which half the
                       amplitude of a wave of period T passes; kappa is the 90 % quantile over the record of (sum of w in
                       a sliding span T) / T. At most 2 range/T - 1 knots, at least T/2 apart. T longer than the record:
                       the straight line. Nothing is projected further than T
  --robust             reweight lots (not rows) by Tukey's bisquare; a smoothness to choose is chosen on all lots first
  --project T1,T2      also the baseline at these times (numbers or ISO times, as in column t); beyond the record only
                       where the ends are natural: not for b-spline and polynomial

ANSWER   arrays have one entry a row, in the order of the rows. null is what cannot be said; warnings say why
  method, smoothness   rule; value (lambda, K or D; with rule edf the E asked for); lambda (null but for the smoothing
                       spline, and for the straight line); edf = tr S; atFloor: the shortest period decided
  sigma2               RSS / (N - edf), RSS = sum of w (y - g)^2 over the N rows with w > 0; with --robust w times the
                       lot's weight, and N the sum of those weights
  criterion            name, its value, and the curve that was looked at: {lambda | knots | degree, edf, value}
  t, fitted            seconds; g(t)
  standardError        of g(t): sqrt(sigma2) times the posterior standard deviation (smoothing spline: Wahba 1983) or the
                       sampling standard deviation (the others)
  leverage             S_ii of g = S y; 0 for rows of weight 0
  deletedResidual      y - g without the row's whole lot (without the row itself where there is no column lot), at the
                       same smoothness; null where the other lots determine no baseline
  lots                 by time of the first row: lot; residual r = mean of the deleted residuals of its rows with w > 0, each
                       counting once; variance of r = sigma2 a' Cov a; score = r / sqrt(variance); with --robust also
                       weight, the factor on the lot's weights
  projection           t, value, standardError
  warnings             in words

FORMULAS
  smoothing spline     g minimises sum w (y - g(t))^2 + lambda * integral of g''(t)^2 dt, with t and w as given, not
                       rescaled, ISO times in seconds (Green & Silverman 1994, ch. 2)
  without lot j        e = (I - S_jj)^-1 (y - g) over its rows, Cov e = sigma2 (I - S_jj)^-1 W_j^-1
  lot-cv               mean over the lots of W_j m_j^2, m_j the weighted mean of e in lot j, W_j its sum of w
  gcv, gcv14           N RSS / (N - c edf)^2, c = 1 (Craven & Wahba 1979) and 1.4 (Kim & Gu 2004)
  reml                 -2 log restricted likelihood with sigma2 estimated, up to a constant (Wahba 1985)

OTHER PROGRAMS
  R smooth.spline      lambda_R = lambda / (range of t)^3 / (mean w of the rows with w > 0); its spar is
                       lambda_R = ratio * 256^(3 spar - 1), ratio = tr(X'WX) / tr(Omega) of its B-spline basis. Give it
                       all.knots = TRUE. It computes its Gram matrix with .3330 for 1/3: its fit differs by about 1e-4 of
                       the range, its leverages by 3e-4. It merges times nearer than tol (1e-6 of the interquartile range),
                       and its cv.crit counts rows of weight 0. For long records it loses its digits without a word
  SciPy                make_smoothing_spline(t, y, w, lam): lam is lambda. It wants distinct times, and searches lam only
                       between 0 and the number of rows
  mgcv                 s(t, bs = "cr") with a knot at every time: lambda = sp / S.scale
  splines              natural-spline is ns(t, knots = , Boundary.knots = range(t)) + intercept; b-spline is bs, the same
  quantile             type 7 over the distinct times of rows with w > 0
  poly                 polynomial is lm(y ~ poly(t, D), weights = w)

EXIT     0 answered; 1 unexpected failure; 2 bad input or options: one line on standard error, which names the row (the
         header is row 1) or the options
`;
