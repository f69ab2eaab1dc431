"""Reference solutions of the lumped heat balance by a general-purpose stiff integrator (scipy's Radau, rtol 1e-11).

Writes the JSON that test/sim/models/lumped/reference.test.ts reads; run again whenever the cases change:

    python3 test/published/lumpedReference.py > test/published/lumpedReference.json

The equation is integrated in mean anomaly M with Kepler's equation solved at every call: nothing of Perilag's own method
(balanced anomaly, all steps at once) is in it. y = T / T0:

    dy/dM = kappa ((a/r)^2 u(y) - v(y))

Periodic states: orbit after orbit with Newton's correction of the start, until the start repeats to 1e-12.
"""
import json
import math
import sys

import numpy as np
import scipy
from scipy.integrate import solve_ivp

POINTS = 48  # uniform in mean anomaly


def eccentric(mean, e):
    big = mean + e * math.sin(mean) if e < 0.8 else math.pi
    for _ in range(60):
        step = (big - e * math.sin(big) - mean) / (1 - e * math.cos(big))
        big -= step
        if abs(step) < 1e-14:
            break
    return big


def arrival(mean, e):
    wrapped = mean % (2 * math.pi)
    return 1.0 / (1 - e * math.cos(eccentric(wrapped, e))) ** 2


def ice(y):
    """Share of the ice-albedo ramp that is ice, from 1 at y = 0.940 to 0 at 0.955, and its slope: the cubic smoothstep."""
    x = min(1.0, max(0.0, (y - 0.940) / 0.015))
    return 1 - x * x * (3 - 2 * x), -6 * x * (1 - x) / 0.015


LAWS = {
    "plain": (lambda y: 1.0, lambda y: y**4, lambda y: 4 * y**3, lambda y: 0.0),
    # emission linear in temperature, as A + B T_C with A = 203.3, B = 2.09 and T0 = 290 K, absorbed 238 W/m2 at distance a
    "linear": (
        lambda y: 1.0,
        lambda y: (203.3 + 2.09 * (290 * y - 273.15)) / 238.0,
        lambda y: 2.09 * 290 / 238.0,
        lambda y: 0.0,
    ),
    # internal heat of 0.3 of the flux absorbed at distance a
    "heated": (lambda y: 1.0, lambda y: y**4 - 0.3, lambda y: 4 * y**3, lambda y: 0.0),
    # albedo 0.6 where icy, 0.3 where warm; T0 is the steady temperature at distance a without ice
    "ramp": (
        lambda y: 1 - 0.3 / 0.7 * ice(y)[0],
        lambda y: y**4,
        lambda y: 4 * y**3,
        lambda y: -0.3 / 0.7 * ice(y)[1],
    ),
}


def orbit(e, kappa, law, start, dense):
    gain, loss, loss_slope, gain_slope = LAWS[law]
    rhs = lambda m, y: [kappa * (arrival(m, e) * gain(y[0]) - loss(y[0]))]
    jac = lambda m, y: [[kappa * (arrival(m, e) * gain_slope(y[0]) - loss_slope(y[0]))]]
    # One quarter orbit at a time: a step must not jump over periapsis.
    values, y = [], start
    grid = 2 * np.pi * np.arange(POINTS + 1) / POINTS
    for part in range(4):
        inside = grid[part * POINTS // 4 : (part + 1) * POINTS // 4 + 1]
        run = solve_ivp(rhs, (inside[0], inside[-1]), [y], method="Radau", rtol=1e-11, atol=1e-13, t_eval=inside, jac=jac)
        assert run.success, run.message
        values.extend(run.y[0][:-1])
        y = run.y[0][-1]
    return y, values


def periodic(e, kappa, law):
    start = (1 - e * e) ** -0.125
    for _ in range(60):
        end, _ = orbit(e, kappa, law, start, False)
        nudge = 1e-5 * start
        above, _ = orbit(e, kappa, law, start + nudge, False)
        slope = (above - end) / nudge
        correction = (end - start) / (1 - slope)
        start += correction
        if abs(correction) < 1e-12 * start:
            break
    else:
        raise RuntimeError(f"no periodic state at e={e}, kappa={kappa}")
    return orbit(e, kappa, law, start, True)[1]


CASES = [(e, kappa, "plain") for e in (0.02, 0.3, 0.7, 0.95) for kappa in (472.0, 47.2, 4.72, 0.472, 0.0472, 0.00472)]
CASES += [(0.5, 0.7, "linear"), (0.2, 30.0, "linear"), (0.6, 1.1, "heated"), (0.9, 12.0, "heated")]
CASES += [(0.2, 4.7, "ramp"), (0.4, 15.7, "ramp"), (0.7, 1.3, "ramp")]


def main():
    wanted = sys.argv[1:]
    chosen = CASES if not wanted else [CASES[int(i)] for i in wanted]
    out = []
    for e, kappa, law in chosen:
        out.append({"eccentricity": e, "kappa": kappa, "law": law, "temperature": periodic(e, kappa, law)})
        print(e, kappa, law, file=sys.stderr)
    json.dump({"made": f"scipy {scipy.__version__}, Radau, rtol 1e-11", "points": POINTS, "cases": out}, sys.stdout)


main()
