"""What a practitioner would write for the zonal model: scipy's LSODA with bands, insolation and Kepler's equation in the right-hand
side, year after year until the start repeats to 3e-6 K (or 60 years). Prints CPU milliseconds and years.

    python3 test/bench/zonalSpinup.py BANDS RTOL
"""
import json
import sys
import time

import numpy as np
from scipy.integrate import solve_ivp

YEAR = 365.25 * 86400
Q, E, A, B, D, C = 340.0, 0.3, 203.3, 2.09, 0.65, 2.1e8
TILT, PERI = np.radians(23.4), np.radians(250)


def main(bands, rtol):
    dx = 2 / bands
    x = -1 + dx * (np.arange(bands) + 0.5)
    edges = -1 + dx * np.arange(1, bands)
    conduct = D * (1 - edges**2) / dx**2
    cosine = np.sqrt(1 - x * x)

    def insolation(t):
        mean = (2 * np.pi * t / YEAR) % (2 * np.pi)
        big = mean + E * np.sin(mean)
        for _ in range(20):
            step = (big - E * np.sin(big) - mean) / (1 - E * np.cos(big))
            big -= step
            if abs(step) < 1e-13:
                break
        r = 1 - E * np.cos(big)
        nu = 2 * np.arctan2(np.sqrt(1 + E) * np.sin(big / 2), np.sqrt(1 - E) * np.cos(big / 2))
        sd = np.sin(TILT) * np.sin(nu + PERI)
        cd = np.sqrt(1 - sd * sd)
        h = np.arccos(np.clip(-x * sd / (cosine * cd), -1, 1))
        return 4 * Q / (np.pi * r * r) * (h * x * sd + cosine * cd * np.sin(h))

    def rate(t, y):
        u = np.clip((y - 258) / 10, 0, 1)
        albedo = 0.62 - 0.30 * u * u * (3 - 2 * u)
        flow = conduct * np.diff(y)
        f = insolation(t) * (1 - albedo) - A - B * (y - 273.15)
        f[:-1] += flow
        f[1:] -= flow
        return f / C

    y = 303.0 - 45 * x * x
    days = YEAR * np.arange(366) / 365
    began = time.process_time()
    for years in range(1, 61):
        run = solve_ivp(rate, (0, YEAR), y, method="LSODA", rtol=rtol, atol=rtol * 10, lband=1, uband=1, t_eval=days)
        change = np.max(np.abs(run.y[:, -1] - y))
        y = run.y[:, -1]
        if change < 3e-6:
            break
    spent = (time.process_time() - began) * 1e3
    print(json.dumps({"milliseconds": spent, "years": years, "temperature": y.tolist()}))


main(int(sys.argv[1]), float(sys.argv[2]))
