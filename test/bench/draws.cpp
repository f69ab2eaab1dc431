// 100000 random plain worlds to four findings each (maximum, minimum and mean temperature, lag of the maximum), one at a time, as
// a careful hand would write it in scalar C++: the measuring stick of draws.ts. The same algorithm as sim/ (balanced anomaly,
// Padé (2,3) steps all at once, mesh doubling, quintic pieces); the first mesh is 16, as there, unless another is asked for.
//   g++ -O3 -march=native -ffast-math -std=c++17 draws.cpp -o draws && ./draws 100000 1e-6 16
// Prints JSON: the median microseconds of CPU a draw of three rounds, and the findings of the first 100 draws.
#include <algorithm>
#include <cmath>
#include <cstdio>
#include <cstdlib>
#include <ctime>
#include <vector>

static const int most = 1026;
static double cosines[11][most], sines[11][most];
static double th[most], q0[most], q1[most], q2[most], m0[most], m1[most], m2[most], f0[most], f1s[most], al[most], be[most], old[most];
static double b;
static int K, firstMesh = 16;

static void setup(double e, int size) {
  const double w = std::sqrt(1 - e * e), beta = e / (1 + w);
  b = beta / (1 + std::sqrt(1 - beta * beta));
  const int level = __builtin_ctz(size);
  const double *c = cosines[level], *s = sines[level], B = 1 + b * b, b2 = b + b, cq = (1 - b * b) / w, cm = (1 - b * b) * w;
  for (int i = 0; i < size; i++) {
    const double C = b2 * c[i], S = b2 * s[i], minus = B - C, plus = B + C, im = 1 / minus, ip = 1 / plus, q = cq * im, x = S * im;
    const double y = S * ip, m = cm * minus * ip * ip, u = x + 2 * y;
    q0[i] = q; q1[i] = -q * x; q2[i] = q * (2 * x * x - C * im);
    m0[i] = m; m1[i] = m * u; m2[i] = m * (u * u + C * im - x * x + 2 * C * ip + 2 * y * y);
  }
}

static double newton(double k, int size) {
  const double h = 2 * M_PI / size, a1 = .6 * h, a2 = .15 * h * h, a3 = h * h * h / 60, c1 = .4 * h, c2 = .05 * h * h;
  double R = 0, dR = 0, L0 = 0, dL0 = 0, A = 1, Bc = 0;
  for (int i = 0; i < size; i++) {
    const double t = th[i], t2 = t * t, t3 = t2 * t, t4 = t2 * t2, m = k * m0[i], mp = k * m1[i], mpp = k * m2[i];
    const double f = k * q0[i] - m * t4, g3 = 4 * m * t3, g2 = 12 * m * t2, h3 = mp * t3, f1 = k * q1[i] - mp * t4 - g3 * f;
    const double f2 = k * q2[i] - mpp * t4 - 8 * h3 * f - g2 * f * f - g3 * f1, J = -g3, J1 = -4 * h3 - g2 * f + g3 * g3;
    const double J2 = -4 * mpp * t3 - 24 * mp * t2 * f + 8 * h3 * g3 - 24 * m * t * f * f - 2 * g2 * f * J - g2 * f1 - g3 * J1;
    const double L = t - a1 * f + a2 * f1 - a3 * f2, dL = 1 - a1 * J + a2 * J1 - a3 * J2;
    if (i == 0) { L0 = L; dL0 = dL; }
    else {
      const double id = 1 / dL, k1 = dR * id, k0 = (R - L) * id;
      Bc = k1 * Bc + k0; A *= k1; al[i] = A; be[i] = Bc;
    }
    R = t + c1 * f + c2 * f1; dR = 1 + c1 * J + c2 * J1;
  }
  const double id = 1 / dL0;
  Bc = (dR * Bc + R - L0) * id; A = dR * A * id;
  const double d0 = Bc / (1 - A);
  al[0] = 1; be[0] = 0;
  double largest = 0;
  for (int i = 0; i < size; i++) {
    const double d = std::max(al[i] * d0 + be[i], -.7 * th[i]);
    largest = std::max(largest, std::fabs(d) / th[i]);
    th[i] += d;
  }
  return largest;
}

static void derivatives(double k, int size) {
  for (int i = 0; i < size; i++) {
    const double t = th[i], t2 = t * t, f = k * (q0[i] - m0[i] * t2 * t2);
    f0[i] = f; f1s[i] = k * (q1[i] - m1[i] * t2 * t2 - 4 * m0[i] * t2 * t * f);
  }
}

static void guess(double e, double k, int size) {
  const double w = 4 * k / (1 + 4 * k), c = (1 - w) / std::sqrt(1 - e * e);
  for (int i = 0; i < size; i++) th[i] = std::sqrt(std::sqrt(w * q0[i] / m0[i] + c));
}

static void prolong(int size) {
  const double h = 2 * M_PI / size, a = 5 * h / 32, c = h * h / 64;
  for (int i = 0; i < size; i++) old[i] = th[i];
  for (int i = 0; i < size; i++) {
    const int j = i + 1 == size ? 0 : i + 1;
    const double low = std::min(old[i], old[j]), high = std::max(old[i], old[j]);
    const double v = .5 * (old[i] + old[j]) + a * (f0[i] - f0[j]) + c * (f1s[i] + f1s[j]);
    th[2 * i] = old[i];
    th[2 * i + 1] = std::min(std::max(v, .7 * low), 1.4 * high);
  }
}

static void solve(double e, double k, double tolerance) {
  K = firstMesh;
  setup(e, K);
  guess(e, k, K);
  for (int n = 0; n < 30 && newton(k, K) > 1e-2; n++) {}
  for (;;) {
    derivatives(k, K);
    prolong(K);
    K *= 2;
    setup(e, K);
    std::copy(th, th + K, old);
    const double amplification = 1 + 25 * k / K;
    double d = 1;
    for (int n = 0; n < 20 && d * d * amplification > .02 * tolerance; n++) d = newton(k, K);
    double error = 1;
    if (d * d * amplification <= .02 * tolerance) {
      error = 0;
      for (int i = 0; i < K; i++) error = std::max(error, std::fabs(th[i] - old[i]) / th[i]);
    }
    if (error / 15 < tolerance || K * 2 > 1024) return;
    if (error == 1) { guess(e, k, K); for (int n = 0; n < 30 && newton(k, K) > 1e-2; n++) {} }
  }
}

// Maximum, minimum, mean, and the place of the maximum in turns of the mean anomaly.
static void findings(double e, double k, double* out) {
  const double h = 2 * M_PI / K;
  derivatives(k, K);
  double sum = 0;
  int most = 0, least = 0;
  for (int i = 0; i < K; i++) {
    sum += th[i] * m0[i];
    if (th[i] > th[most]) most = i;
    if (th[i] < th[least]) least = i;
  }
  out[2] = sum / K;
  for (int which = 0; which < 2; which++) {
    int i = which ? least : most;
    const double up = which ? -1 : 1;
    if (f0[i] * up < 0) i = i == 0 ? K - 1 : i - 1;
    const int j = i + 1 == K ? 0 : i + 1;
    const double D = th[j] - th[i], v0 = f0[i] * h, v1 = f0[j] * h, w0 = f1s[i] * h * h, w1 = f1s[j] * h * h;
    const double k2 = .5 * w0, k3 = 10 * D - 6 * v0 - 4 * v1 - 1.5 * w0 + .5 * w1, k4 = -15 * D + 8 * v0 + 7 * v1 + 1.5 * w0 - w1;
    const double k5 = 6 * D - 3 * (v0 + v1) - .5 * (w0 - w1);
    double x = v0 / (v0 - v1);
    for (int n = 0; n < 6; n++) {
      const double g = v0 + x * (2 * k2 + x * (3 * k3 + x * (4 * k4 + x * 5 * k5)));
      const double step = g / (2 * k2 + x * (6 * k3 + x * (12 * k4 + x * 20 * k5)));
      x -= step;
      if (std::fabs(step) < 1e-9) break;
    }
    out[which] = th[i] + x * (v0 + x * (k2 + x * (k3 + x * (k4 + x * k5))));
    if (which == 0) {
      const double s = h * (i + x), E = s - 2 * std::atan2(b * std::sin(s), 1 + b * std::cos(s));
      out[3] = (E - e * std::sin(E)) / (2 * M_PI);
    }
  }
}

struct Random {
  unsigned a;
  double operator()() {
    a += 0x6D2B79F5u;
    unsigned t = a;
    t = (t ^ (t >> 15)) * (t | 1);
    t ^= t + (t ^ (t >> 7)) * (t | 61);
    return (t ^ (t >> 14)) / 4294967296.0;
  }
};

static double now() { timespec t; clock_gettime(CLOCK_PROCESS_CPUTIME_ID, &t); return t.tv_sec * 1e6 + t.tv_nsec * 1e-3; }

int main(int count, char** words) {
  const int draws = count > 1 ? atoi(words[1]) : 100000;
  const double tolerance = count > 2 ? atof(words[2]) : 1e-6, sigma = 5.670374419e-8;
  if (count > 3) firstMesh = atoi(words[3]);
  for (int l = 2; l <= 10; l++)
    for (int i = 0; i < 1 << l; i++) { cosines[l][i] = std::cos(2 * M_PI * i / (1 << l)); sines[l][i] = std::sin(2 * M_PI * i / (1 << l)); }
  Random random{1};
  std::vector<double> e(draws), k(draws), scale(draws), out(4 * draws), times;
  for (int i = 0; i < draws; i++) {
    e[i] = .8 * random();
    const double C = std::pow(10, 4 + 5 * random()), A = .6 * random();
    scale[i] = std::pow((1 - A) * 1361 / 4 / sigma, .25);
    k[i] = sigma * scale[i] * scale[i] * scale[i] * 365 * 86400 / (2 * M_PI * C);
  }
  for (int round = 0; round < 3; round++) {
    const double began = now();
    for (int i = 0; i < draws; i++) {
      solve(e[i], k[i], tolerance);
      findings(e[i], k[i], &out[4 * i]);
      for (int n = 0; n < 3; n++) out[4 * i + n] *= scale[i];
    }
    times.push_back((now() - began) / draws);
  }
  std::sort(times.begin(), times.end());
  printf("{\"microseconds\": %.4f, \"findings\": [", times[1]);
  for (int i = 0; i < 400 && i < 4 * draws; i++) printf("%s%.10g", i == 0 ? "" : ", ", out[i]);
  printf("]}\n");
}
