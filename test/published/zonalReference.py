"""Reference solution of the zonal heat balance by a general-purpose stiff integrator (scipy's LSODA with bands, rtol 1e-9).

Writes the JSON that test/sim/models/zonal/reference.test.ts reads:

    python3 test/published/zonalReference.py [case ...] > test/published/zonalReference.json

Cases are counted from 0; without a number all are computed.

18 equal-area bands, grey emission, constant albedo, diffusive transport; daily-mean insolation by Berger (1978) averaged over each
band by 400-point quadrature; year after year from a guess until the start repeats to 1e-7 K, or no better than the year before:
what is left then is the integrator's own noise. Nothing of Perilag is in it.
"""
import json
import sys

import numpy as np
import scipy
from scipy.integrate import solve_ivp

SIGMA = 5.670374419e-8
YEAR = 365.25 * 86400
BANDS = 18
POINTS = 400
TIMES = 12


def eccentric(mean, e):
    big = mean + e * np.sin(mean)
    for _ in range(50):
        step = (big - e * np.sin(big) - mean) / (1 - e * np.cos(big))
        big -= step
        if abs(step) < 1e-14:
            break
    return big


def make(case):
    e, tilt, peri = case["eccentricity"], np.radians(case["obliquityDeg"]), np.radians(case["solarLongitudeDeg"])
    dx = 2 / BANDS
    edges = -1 + dx * np.arange(1, BANDS)
    conduct = case["heatTransport"] * (1 - edges**2) / dx**2
    offsets = (np.arange(POINTS) + 0.5) / POINTS
    x = (-1 + dx * (np.arange(BANDS)[:, None] + offsets[None, :])).ravel()
    cosine = np.sqrt(1 - x * x)

    def insolation(t):
        big = eccentric((2 * np.pi * t / YEAR) % (2 * np.pi), e)
        r = 1 - e * np.cos(big)
        nu = 2 * np.arctan2(np.sqrt(1 + e) * np.sin(big / 2), np.sqrt(1 - e) * np.cos(big / 2))
        sd = np.sin(tilt) * np.sin(nu + peri)
        cd = np.sqrt(1 - sd * sd)
        q = np.clip(-x * sd / (cosine * cd), -1, 1)
        h = np.arccos(q)
        daily = 4 * case["q"] / (np.pi * r * r) * (h * x * sd + cosine * cd * np.sin(h))
        return daily.reshape(BANDS, POINTS).mean(axis=1)

    def rate(t, y):
        flow = conduct * np.diff(y)
        f = 0.7 * insolation(t) - SIGMA * y**4
        f[:-1] += flow
        f[1:] -= flow
        return f / case["heatCapacity"]

    return rate


CASES = [
    {"q": 340.0, "eccentricity": 0.3, "obliquityDeg": 23.44, "solarLongitudeDeg": 250.0, "heatCapacity": 3e7, "heatTransport": 0.6},
    {"q": 400.0, "eccentricity": 0.1, "obliquityDeg": 80.0, "solarLongitudeDeg": 30.0, "heatCapacity": 2e7, "heatTransport": 0.4},
]


def main():
    out = []
    chosen = [int(word) for word in sys.argv[1:]] or range(len(CASES))
    for case in (CASES[index] for index in chosen):
        rate = make(case)
        y = np.full(BANDS, (0.7 * case["q"] / SIGMA) ** 0.25)
        times = YEAR * np.arange(TIMES + 1) / TIMES
        before = np.inf
        for year in range(60):
            run = solve_ivp(rate, (0, YEAR), y, method="LSODA", rtol=1e-9, atol=1e-7, lband=1, uband=1, t_eval=times, max_step=YEAR / 60)
            change = np.max(np.abs(run.y[:, -1] - y))
            y = run.y[:, -1]
            if change < 1e-7 or (change < 1e-4 and change >= before):
                break
            before = change
        print(year, change, file=sys.stderr)
        out.append({**case, "temperature": run.y[:, :TIMES].T.tolist()})
    json.dump({"made": f"scipy {scipy.__version__}, LSODA, rtol 1e-9", "bands": BANDS, "times": TIMES, "cases": out}, sys.stdout)


main()
