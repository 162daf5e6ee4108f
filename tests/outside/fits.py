"""Least squares and integrals along lines of values, against numpy and scipy."""

import numpy as np
from scipy.integrate import trapezoid
from scipy.stats import linregress
from support import Comparison, run

# A polar about the quarter chord, made by a linear congruence so that no two points lie on one line.
COUNT = 40


def noise():
    state, values = 12345, []
    for _ in range(COUNT):
        state = (1103515245 * state + 12345) % 2**31
        values.append(state / 2**31 - 0.5)
    return np.array(values)


ALPHA = np.linspace(-6.0, 10.0, COUNT)
LIFT = 0.21 + 0.083 * ALPHA + 0.01 * noise()
MOMENT = -0.051 + 0.017 * LIFT + 0.002 * noise()[::-1]
# A polar far from the origin, where normal equations would lose their digits.
FAR = 1.0e5 + ALPHA

rows = "\n".join(
    f"{a!r} | {l!r} | {m!r} | {f!r}" for a, l, m, f in zip(*(v.tolist() for v in (ALPHA, LIFT, MOMENT, FAR)))
)
SHEET = f"""
table alpha [deg] | CN | Cm | far
{rows}
end
ac = aerodynamic_center(CN, Cm, 1.5 m, 1.2 m over alpha)
x [m] = ac.x
Cm_0 = ac.Cm
residual = ac.residual
a [/deg] = slope(CN, alpha over alpha)
b = intercept(CN, alpha over alpha)
a_far = slope(CN, far over alpha)
b_far = intercept(CN, far over alpha)
area [deg] = integral(CN, alpha over alpha)
total = sum(CN over alpha)
middle = mean(CN over alpha)
square = rms(CN over alpha)
"""

with Comparison("fits") as compare:
    report = run(SHEET)
    moment = linregress(LIFT, MOMENT)
    lift = linregress(ALPHA, LIFT)
    source = "scipy, linear regression"
    compare("x", report.number("x"), 1.5 - 1.2 * moment.slope, rel=1e-12, source=source)
    compare("Cm about it", report.number("Cm_0"), moment.intercept, rel=1e-11, source=source)
    apart = np.max(np.abs(MOMENT - moment.intercept - moment.slope * LIFT))
    compare("residual", report.number("residual"), apart, rel=1e-10, source=source)
    compare("slope", report.number("a"), lift.slope, rel=1e-12, source=source)
    compare("intercept", report.number("b"), lift.intercept, rel=1e-12, source=source)
    solved = np.linalg.lstsq(np.vander(FAR - 1.0e5, 2), LIFT, rcond=None)[0]
    source = "numpy, orthogonal least squares"
    compare("slope far away", report.number("a_far"), solved[0], rel=1e-9, source=source)
    compare("intercept far away", report.number("b_far"), solved[1] - 1.0e5 * solved[0], rel=1e-9, source=source)
    source = "numpy, sums"
    compare("integral", report.number("area"), trapezoid(LIFT, ALPHA), rel=1e-13, source=source)
    compare("sum", report.number("total"), LIFT.sum(), rel=1e-13, source=source)
    compare("mean", report.number("middle"), LIFT.mean(), rel=1e-13, source=source)
    compare("rms", report.number("square"), np.sqrt(np.mean(LIFT**2)), rel=1e-13, source=source)
