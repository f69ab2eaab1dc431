// The algorithm of sim/solve/periodicQuartic.ts by hand in C++, as the measuring stick of the bench:
//   g++ -O3 -march=native -ffast-math -std=c++17 quartic.cpp -o quartic && ./quartic E KAPPA [E KAPPA ...]
// Prints, per case, the mesh, and the median microseconds of a solve at 1e-6 with 1000 samples equal in the balanced anomaly.
#include <algorithm>
#include <cmath>
#include <cstdio>
#include <cstdlib>
#include <ctime>
#include <vector>

static const int most = 4096;
static double cosines[14][most], sines[14][most];
static double y[most], coarse[most], p0[most], p1[most], p2[most], r0[most], r1[most], r2[most];
static double slope[most], curvature[most], homogeneous[most], particular[most], samples[1000];
static double largest, stiffness, leftover;

static int level(int size) { return __builtin_ctz(size); }

static void load(double e, int size) {
  const double w = std::sqrt(1 - e * e), beta = e / (1 + w), b = beta / (1 + std::sqrt(1 - beta * beta));
  const double *c = cosines[level(size)], *s = sines[level(size)], middle = 1 + b * b, cq = (1 - b * b) / w, cm = (1 - b * b) * w;
  for (int i = 0; i < size; i++) {
    const double C = 2 * b * c[i], S = 2 * b * s[i], minus = middle - C, plus = middle + C, im = 1 / minus, ip = 1 / plus;
    const double q = cq * im, x = S * im, z = S * ip, m = cm * minus * ip * ip, u = x + 2 * z;
    p0[i] = q; p1[i] = -q * x; p2[i] = q * (2 * x * x - C * im);
    r0[i] = m; r1[i] = m * u; r2[i] = m * (u * u + C * im - x * x + 2 * C * ip + 2 * z * z);
  }
}

static void sweep(double k, int size) {
  const double h = 2 * M_PI / size, l1 = .6 * h, l2 = .15 * h * h, l3 = h * h * h / 60, q1 = .4 * h, q2 = .05 * h * h;
  double right = 0, rightSlope = 0, rightGap = 0, firstLeft = 0, firstSlope = 1, firstGap = 0, a = 1, b = 0, gap = 0;
  stiffness = 0;
  for (int i = 0; i < size; i++) {
    const double t = y[i], t2 = t * t, t3 = t2 * t, t4 = t2 * t2, r = k * r0[i], rp = k * r1[i], rpp = k * r2[i];
    const double g3 = 4 * r * t3, g2 = 12 * r * t2, h3 = rp * t3, f = k * p0[i] - r * t4, f1 = k * p1[i] - rp * t4 - g3 * f;
    const double f2 = k * p2[i] - rpp * t4 - 8 * h3 * f - g2 * f * f - g3 * f1, j1 = -4 * h3 - g2 * f + g3 * g3;
    const double j2 = -4 * rpp * t3 - 24 * rp * t2 * f + 8 * h3 * g3 - 24 * r * t * f * f + 2 * g2 * f * g3 - g2 * f1 - g3 * j1;
    const double left = -l1 * f + l2 * f1 - l3 * f2, leftGap = l1 * g3 + l2 * j1 - l3 * j2;
    stiffness = std::max(stiffness, g3);
    if (i == 0) { firstLeft = left; firstSlope = 1 + leftGap; firstGap = leftGap; }
    else {
      const double inverse = 1 / (1 + leftGap);
      gap += a * (leftGap - rightGap) * inverse;
      b = rightSlope * inverse * b + (y[i - 1] - t + (right - left)) * inverse;
      a *= rightSlope * inverse;
      homogeneous[i] = a; particular[i] = b;
    }
    right = q1 * f + q2 * f1; rightGap = -q1 * g3 + q2 * j1; rightSlope = 1 + rightGap;
  }
  const double inverse = 1 / firstSlope;
  gap += a * (firstGap - rightGap) * inverse;
  b = (rightSlope * b + (y[size - 1] - y[0] + (right - firstLeft))) * inverse;
  const double d0 = b / gap;
  homogeneous[0] = 1; particular[0] = 0; largest = 0;
  for (int i = 0; i < size; i++) {
    const double d = std::max(homogeneous[i] * d0 + particular[i], -.7 * y[i]);
    largest = std::max(largest, std::fabs(d) / y[i]);
    y[i] += d;
  }
}

static double amplification(int size) { const double g = stiffness * 2 * M_PI / size; return 1 + g * g / 64; }

static bool settle(double k, int size, double target) {
  for (int n = 0; n < 40; n++) {
    sweep(k, size);
    leftover = 20 * largest * largest * amplification(size);
    if (leftover <= target) return true;
  }
  return false;
}

static void derivatives(double k, int size) {
  for (int i = 0; i < size; i++) {
    const double t = y[i], t3 = t * t * t, f = k * (p0[i] - r0[i] * t3 * t);
    slope[i] = f; curvature[i] = k * (p1[i] - r1[i] * t3 * t - 4 * r0[i] * t3 * f);
  }
}

static int solve(double e, double k, double tolerance) {
  int size = 16;
  load(e, size);
  double w = 4 * k / (1 + 4 * k), sp = 0, sr = 0;
  for (int i = 0; i < size; i++) { sp += p0[i]; sr += r0[i]; }
  for (int i = 0; i < size; i++) y[i] = std::sqrt(std::sqrt(w * p0[i] / r0[i] + (1 - w) * sp / sr));
  settle(k, size, 1e-4);
  for (;;) {
    derivatives(k, size);
    const double h = 2 * M_PI / size;
    for (int i = 0; i < size; i++) {
      const int j = i + 1 == size ? 0 : i + 1;
      const double low = std::min(y[i], y[j]), high = std::max(y[i], y[j]);
      const double middle = .5 * (y[i] + y[j]) + 5 * h / 32 * (slope[i] - slope[j]) + h * h / 64 * (curvature[i] + curvature[j]);
      coarse[2 * i] = y[i];
      coarse[2 * i + 1] = std::max(.7 * low, std::min(1.4 * high, middle));
    }
    size *= 2;
    load(e, size);
    std::copy(coarse, coarse + size, y);
    const bool good = settle(k, size, .02 * tolerance);
    double difference = 0;
    for (int i = 0; i < size; i++) difference = std::max(difference, std::fabs(y[i] - coarse[i]) / y[i]);
    if ((good && difference < 10 * tolerance) || 2 * size > most) break;
  }
  derivatives(k, size);
  return size;
}

static void sample(int size) {
  const double h = 2 * M_PI / size;
  int at = -1;
  double c0 = 0, c1 = 0, c2 = 0, c3 = 0, c4 = 0, c5 = 0;
  for (int n = 0; n < 1000; n++) {
    const double s = 2 * M_PI * n / 1000 / h;
    const int i = (int)s;
    if (i != at) {
      at = i;
      const int j = i + 1 == size ? 0 : i + 1;
      const double D = y[j] - y[i], v0 = slope[i] * h, v1 = slope[j] * h, w0 = curvature[i] * h * h, w1 = curvature[j] * h * h;
      c0 = y[i]; c1 = v0; c2 = .5 * w0; c3 = 10 * D - 6 * v0 - 4 * v1 - 1.5 * w0 + .5 * w1;
      c4 = -15 * D + 8 * v0 + 7 * v1 + 1.5 * w0 - w1; c5 = 6 * D - 3 * (v0 + v1) - .5 * (w0 - w1);
    }
    const double x = s - i;
    samples[n] = c0 + x * (c1 + x * (c2 + x * (c3 + x * (c4 + x * c5))));
  }
}

static double now() { timespec t; clock_gettime(CLOCK_PROCESS_CPUTIME_ID, &t); return t.tv_sec * 1e6 + t.tv_nsec * 1e-3; }

int main(int count, char** words) {
  for (int l = 2; l <= 12; l++)
    for (int i = 0; i < 1 << l; i++) { cosines[l][i] = std::cos(2 * M_PI * i / (1 << l)); sines[l][i] = std::sin(2 * M_PI * i / (1 << l)); }
  for (int n = 1; n + 1 < count; n += 2) {
    const double e = atof(words[n]), k = atof(words[n + 1]);
    std::vector<double> times;
    int size = 0;
    double sum = 0;
    for (int round = 0; round < 9; round++) {
      const double began = now();
      for (int i = 0; i < 300; i++) { size = solve(e, k, 1e-6); sample(size); sum += samples[i]; }
      times.push_back((now() - began) / 300);
    }
    std::sort(times.begin(), times.end());
    printf("{\"e\": %g, \"kappa\": %g, \"size\": %d, \"microseconds\": %.3f, \"first\": %.12f}\n", e, k, size, times[4], samples[0] + 0 * sum);
  }
}
