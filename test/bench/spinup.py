"""What a practitioner would write: scipy's LSODA in time, Kepler's equation in the right-hand side, orbit after orbit until the
start repeats to 1e-8. Prints one JSON line per case: orbits, CPU milliseconds, largest relative error at 1000 equal times is left to
the caller through the last orbit's temperatures when --values is given.

    python3 test/bench/spinup.py E KAPPA [E KAPPA ...]
"""
import json
import math
import sys
import time

import numpy as np
from scipy.integrate import solve_ivp


def eccentric(mean, e):
    big = mean + e * math.sin(mean) if e < 0.8 else math.pi
    for _ in range(50):
        step = (big - e * math.sin(big) - mean) / (1 - e * math.cos(big))
        big -= step
        if abs(step) < 1e-13:
            break
    return big


def spin_up(e, kappa, rtol=1e-8, most=6000, patience=20.0):
    def rate(m, y):
        r = 1 - e * math.cos(eccentric(m % (2 * math.pi), e))
        return [kappa * (1 / (r * r) - y[0] ** 4)]

    def jacobian(m, y):
        return [[-4 * kappa * y[0] ** 3]]

    start = (1 - e * e) ** -0.125
    times = 2 * np.pi * np.arange(1001) / 1000
    began = time.process_time()
    for orbits in range(1, most + 1):
        run = solve_ivp(
            rate, (0, 2 * math.pi), [start], method="LSODA", rtol=rtol, atol=rtol * 1e-2, t_eval=times, jac=jacobian
        )
        end = run.y[0, -1]
        change = abs(end - start) / end
        start = end
        if change < 1e-8 or time.process_time() - began > patience:
            break
    return {
        "e": e,
        "kappa": kappa,
        "orbits": orbits,
        "settled": bool(change < 1e-8),
        "milliseconds": (time.process_time() - began) * 1e3,
        "temperature": list(run.y[0, :1000:50]),
    }


numbers = [float(x) for x in sys.argv[1:]]
for e, kappa in zip(numbers[::2], numbers[1::2]):
    print(json.dumps(spin_up(e, kappa)), flush=True)
