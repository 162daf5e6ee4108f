"""Thin-airfoil theory of mean lines and flaps, by adaptive quadrature of scipy."""

import math

from scipy.integrate import quad
from support import Comparison, run

# Four-digit designations; of the five-digit ones m and k1 as NASA TM 4741 lists them, the reflexed ones with k2/k1.
FOUR = ["1408", "2412", "3515", "6315", "6712"]
FIVE = {"21012": (0.0580, 361.400), "22012": (0.1260, 51.640), "24012": (0.2900, 6.643), "25012": (0.3910, 3.230)}
REFLEXED = {
    "22112": (0.1300, 51.990, 0.000764),
    "23112": (0.2170, 15.793, 0.006770),
    "24112": (0.3180, 6.520, 0.030300),
    "25112": (0.4410, 3.191, 0.135500),
}
FLAPS = ["0.1", "0.22", "0.35", "0.5"]


def four(name):
    """Slope of a four-digit mean line (NACA Report 460), and where its two curves meet."""
    m, p = int(name[0]) / 100, int(name[1]) / 10
    return lambda x: 2 * m * (p - x) / (p * p if x < p else (1 - p) ** 2), p


def five(name):
    """Slope of a five-digit mean line (NACA Report 537), and where its two curves meet."""
    m, k1 = FIVE[name]
    return lambda x: k1 / 6 * ((3 * x * x - 6 * m * x + m * m * (3 - m)) if x < m else -(m**3)), m


def reflexed(name):
    """The same of a reflexed line."""
    m, k1, ratio = REFLEXED[name]

    def slope(x):
        tail = -ratio * (1 - m) ** 3 - m**3
        return k1 / 6 * ((3 * (x - m) ** 2 if x < m else 3 * ratio * (x - m) ** 2) + tail)

    return slope, m


def theory(slope, joint):
    """Angle of no lift, moment about the quarter chord, ideal lift coefficient and angle, by quadrature over the angle."""
    break_at = math.acos(1 - 2 * joint)

    def integral(factor):
        parts = [(0, break_at), (break_at, math.pi)]
        of = lambda t: slope((1 - math.cos(t)) / 2) * factor(t)
        return sum(quad(of, a, b, epsabs=1e-14, epsrel=1e-13, limit=200)[0] for a, b in parts)

    plain = integral(lambda t: 1.0)
    first = integral(math.cos)
    second = integral(lambda t: math.cos(2 * t))
    a1, a2 = 2 / math.pi * first, 2 / math.pi * second
    return [(plain - first) / math.pi, math.pi / 4 * (a2 - a1), math.pi * a1, plain / math.pi]


def lines(compare):
    names = [*FOUR, *FIVE, *REFLEXED]
    report = run(
        f"vary section: {' | '.join(names)}\n"
        "s = thin_section(section)\n"
        "angle [rad] = s.alpha_zero_lift\ncm = s.cm_quarter\ncl = s.cl_ideal\nideal [rad] = s.alpha_ideal\n"
    )
    for name in names:
        known = four if name in FOUR else five if name in FIVE else reflexed
        for symbol, expected in zip(["angle", "cm", "cl", "ideal"], theory(*known(name))):
            obtained = report.number(symbol, section=name)
            compare(f"{symbol} of {name}", obtained, expected, abs=1e-10, source="scipy, quadrature of mean lines")


def flaps(compare):
    """A plain flap is a mean line with a kink at the hinge: its slope is -1 aft of it."""
    report = run(
        f"vary flap: {' | '.join(FLAPS)}\nE by flap = {' | '.join(FLAPS)}\n"
        "f = flap_effect(E)\ntau = f.effectiveness\ndcm = f.moment_slope\n"
    )
    for flap in FLAPS:
        hinge = math.acos(2 * float(flap) - 1)
        turned = lambda factor: quad(lambda t: -factor(t), hinge, math.pi, epsabs=1e-13)[0]
        plain, first, second = turned(lambda t: 1.0), turned(math.cos), turned(lambda t: math.cos(2 * t))
        source = "scipy, quadrature of flaps"
        compare(f"tau {flap}", report.number("tau", flap=flap), -(plain - first) / math.pi, abs=1e-12, source=source)
        expected = (second - first) / 2
        compare(f"dcm {flap}", report.number("dcm", flap=flap), expected, abs=1e-12, source=source)


with Comparison("sections") as compare:
    lines(compare)
    flaps(compare)
