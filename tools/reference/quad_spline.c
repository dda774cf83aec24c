/*
 * Reference values of slow smoothing splines (3, 12 and 60 degrees of freedom) on series of 1,000 to 1,000,000 points in quadruple precision
 * (gcc's __float128, about 34 digits).
 *
 * usage: quad_spline > OUTPUT.json      (compile: see make.sh; floating-point contraction must be off; half a minute)
 *
 * Solves Reinsch's banded system (R + lambda Q' W^-1 Q) gamma = Q' y by LDL', and takes the central bands of its inverse for the leverages
 * (Hutchinson & de Hoog 1985). Its condition number, about 16 lambda / h^3, costs up to 22 of the 34 digits here.
 * logDet is log|W + alpha K| - (n - 2) log alpha, time on [0, 1], weights of mean 1, alpha = lambda / (range^3 * mean weight) (Green & Silverman 1994,
 * 2.1.2: K = Q R^-1 Q'), from |W + alpha K| = |W| |R + alpha Q' W^-1 Q| / |R|.
 * The series is made in double precision from an integer generator with + - * / alone, so that any language makes the same doubles:
 *   x := (1103515245 x + 12345) mod 2^31 from x = 20240229, u = x / 2^31
 *   t[i] = t[i-1] + 600 + 300 u;  t[0] = 1700000000
 *   s = i / (POINTS - 1);  y = 40 + 8 s (1 - s) (1 - 2 s) + (u1 + u2 + u3 - 1.5);  w = 0.5 + u4
 * with the draws of a point in the order time, three of y, weight (point 0 draws its time too and ignores it).
 */
#include <quadmath.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

typedef __float128 quad;
static unsigned long long state = 20240229ULL;
static double uniform(void) {
  state = (1103515245ULL * state + 12345ULL) % 2147483648ULL;
  return (double)state / 2147483648.0;
}
static quad *array(long n) { return calloc((size_t)n, sizeof(quad)); }

static void fit(long n, long step, const double *t, const double *y, const double *w, double lambda, double mean_weight, int is_last) {
  long m = n - 2;
  quad log_det = 0, range = (quad)t[n - 1] - t[0], r_pivot = 0;
  quad *d0 = array(m), *d1 = array(m), *d2 = array(m), *x = array(m + 2), *b0 = array(m + 2), *b1 = array(m + 2), *b2 = array(m + 2);
  quad l = lambda;
  for (long j = 0; j < m; j++) {
    quad h0 = (quad)t[j + 1] - t[j], h1 = (quad)t[j + 2] - t[j + 1];
    quad a = 1 / h0, b = -1 / h0 - 1 / h1, c = 1 / h1;
    d0[j] = (h0 + h1) / 3 + l * (a * a / w[j] + b * b / w[j + 1] + c * c / w[j + 2]);
    if (j + 1 < m) {
      quad h2 = (quad)t[j + 3] - t[j + 2];
      d1[j] = h1 / 6 + l * (b * (1 / h1) / w[j + 1] + c * (-1 / h1 - 1 / h2) / w[j + 2]);
      if (j + 2 < m) d2[j] = l * c * (1 / h2) / w[j + 2];
    }
    x[j] = (y[j + 2] - (quad)y[j + 1]) / h1 - (y[j + 1] - (quad)y[j]) / h0;
  }
  /* LDL' in place: d0 pivots, d1 and d2 the multipliers below them. */
  for (long j = 0; j < m; j++) {
    quad e1 = d1[j], e2 = d2[j];
    d1[j] = e1 / d0[j];
    d2[j] = e2 / d0[j];
    if (j + 1 < m) { d0[j + 1] -= e1 * d1[j]; d1[j + 1] -= e2 * d1[j]; x[j + 1] -= d1[j] * x[j]; }
    if (j + 2 < m) { d0[j + 2] -= e2 * d2[j]; x[j + 2] -= d2[j] * x[j]; }
  }
  for (long j = 0; j < m; j++) {
    quad h0 = (quad)t[j + 1] - t[j], h1 = (quad)t[j + 2] - t[j + 1];
    r_pivot = (h0 + h1) / 3 - (j > 0 ? h0 * h0 / (36 * r_pivot) : 0);
    log_det += logq(d0[j] / (l * r_pivot)) + 3 * logq(range);
  }
  for (long i = 0; i < n; i++) log_det += logq(w[i]);
  log_det -= 2 * logq(mean_weight);
  quad penalty = 0;
  for (long j = m - 1; j >= 0; j--) {
    x[j] = x[j] / d0[j] - d1[j] * x[j + 1] - d2[j] * x[j + 2];
    b1[j] = -d1[j] * b0[j + 1] - d2[j] * b1[j + 1];
    b2[j] = -d1[j] * b1[j + 1] - d2[j] * b0[j + 2];
    b0[j] = 1 / d0[j] - d1[j] * b1[j] - d2[j] * b2[j];
  }
  quad rss = 0, edf = 0, *g = array(n), *rests = array(n);
  printf("{\"lambda\":%.17g,\"points\":[", lambda);
  for (long i = 0; i < n; i++) {
    /* Row i of Q touches gamma[i-2], gamma[i-1], gamma[i]. */
    quad q[3] = {0, 0, 0};
    long base = i - 2;
    if (i >= 2) q[0] = 1 / ((quad)t[i] - t[i - 1]);
    if (i >= 1 && i - 1 < m) q[1] = -1 / ((quad)t[i] - t[i - 1]) - 1 / ((quad)t[i + 1] - t[i]);
    if (i < m) q[2] = 1 / ((quad)t[i + 1] - t[i]);
    quad qg = 0, qbq = 0;
    for (int a = 0; a < 3; a++) {
      if (base + a < 0 || base + a >= m) continue;
      qg += q[a] * x[base + a];
      qbq += q[a] * q[a] * b0[base + a];
      if (a < 2 && base + a + 1 < m) qbq += 2 * q[a] * q[a + 1] * b1[base + a];
      if (a < 1 && base + a + 2 < m) qbq += 2 * q[a] * q[a + 2] * b2[base + a];
    }
    quad e = l * qg / w[i], rest = l * qbq / w[i];
    rss += w[i] * e * e;
    edf += 1 - rest;
    if (i < m) {
      quad h = (quad)t[i + 2] - t[i + 1];
      quad g1 = x[i], g2 = i + 1 < m ? x[i + 1] : 0;
      penalty += h * (g1 * g1 + g1 * g2 + g2 * g2) / 3;
      if (i == 0) penalty += ((quad)t[1] - t[0]) * g1 * g1 / 3;
    }
    g[i] = y[i] - e;
    rests[i] = rest;
  }
  for (long i = 0; i < n; i++) {
    if (i % step != 0 && i != n - 1) continue;
    /* gamma[j] is g'' at point j + 1; 0 at both ends. */
    quad here = i > 0 && i < n - 1 ? x[i - 1] : 0, slope;
    if (i < n - 1) {
      quad h = (quad)t[i + 1] - t[i], next = i < m ? x[i] : 0;
      slope = (g[i + 1] - g[i]) / h - h * (2 * here + next) / 6;
    } else {
      quad h = (quad)t[i] - t[i - 1];
      slope = (g[i] - g[i - 1]) / h + h * x[m - 1] / 6;
    }
    quad rest = rests[i];
    printf("%s\n[%ld,%.17g,%.17g,%.17g,%.17g,%.17g,%.17g]", i ? "," : "", i, (double)g[i], (double)slope, (double)here, (double)sqrtq((1 - rest) / w[i]),
           (double)(1 - rest), (double)((y[i] - g[i]) / rest));
  }
  printf("],\n\"edf\":%.17g,\"weightedRss\":%.17g,\"penalty\":%.17g,\"logDet\":%.17g}%s\n", (double)edf, (double)rss, (double)penalty, (double)log_det, is_last ? "" : ",");
  free(d0); free(d1); free(d2); free(x); free(b0); free(b1); free(b2); free(g); free(rests);
}

static void series(long n, long step, int is_last) {
  double *t = malloc(sizeof(double) * (size_t)n), *y = malloc(sizeof(double) * (size_t)n), *w = malloc(sizeof(double) * (size_t)n);
  state = 20240229ULL;
  for (long i = 0; i < n; i++) {
    double u = uniform();
    t[i] = i ? t[i - 1] + 600.0 + 300.0 * u : 1700000000.0;
    double s = (double)i / (double)(n - 1);
    double u1 = uniform(), u2 = uniform(), u3 = uniform();
    y[i] = 40.0 + 8.0 * s * (1.0 - s) * (1.0 - 2.0 * s) + (u1 + u2 + u3 - 1.5);
    w[i] = 0.5 + uniform();
  }
  double range = t[n - 1] - t[0], sum = 0;
  for (long i = 0; i < n; i++) sum += w[i];
  double cube = range * range * range * sum;
  printf("{\"n\":%ld,\"lastTime\":%.17g,\"lastValue\":%.17g,\"lastWeight\":%.17g,\n\"fits\":[\n", n, t[n - 1], y[n - 1], w[n - 1]);
  fit(n, step, t, y, w, cube * 1e-3, sum / n, 0);
  fit(n, step, t, y, w, cube * 1e-6, sum / n, 0);
  fit(n, step, t, y, w, cube * 1.3e-9, sum / n, 1);
  printf("]}%s\n", is_last ? "" : ",");
  free(t); free(y); free(w);
}

int main(int argc, char **argv) {
  if (argc != 1) {
    puts("usage: quad_spline > OUTPUT.json");
    return argc == 2 && !strcmp(argv[1], "--help") ? 0 : 2;
  }
  printf("{\"madeBy\":\"tools/reference/quad_spline.c, gcc %s, __float128\",\n", __VERSION__);
  puts("\"columns\":[\"index\",\"fitted\",\"slope\",\"curvature\",\"standardError\",\"leverage\",\"deletedResidual\"],\n\"series\":[");
  series(1000, 10, 0);
  series(10000, 100, 0);
  series(100000, 1000, 0);
  series(1000000, 5000, 1);
  puts("]}");
  return 0;
}
