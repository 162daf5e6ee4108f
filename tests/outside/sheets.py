"""Starting sheets, recomputed with numpy from their inputs: as they are, and with an input changed.

The formulas are written down here from the methods, not read from the sheets; the inputs stand here once more. What a
change does to the greatest loads is demanded too, so that no result stands still.
"""

import os
import re

import numpy
from support import ROOT, Comparison, run

FOOT, POUND, KNOT, G0, RHO0 = 0.3048, 4.4482216152605, 1852.0 / 3600.0, 9.80665, 1.225
SLUG = POUND / FOOT


def text_of(name):
    """The text of a starting sheet."""
    with open(os.path.join(ROOT, "www", "sheets", f"{name}.pitchwright"), encoding="utf-8") as file:
        return file.read()


def changed(text, symbol, side):
    """The text with another right side for an input; its remark stays."""
    pattern = re.compile(rf"(?m)^({re.escape(symbol)}(?=[ \[])[^=\n]*=)[^;\n]*")
    text, count = pattern.subn(rf"\1 {side} ", text)
    assert count == 1, f"{count} lines give {symbol}"
    return text


def osier_balance(compare):
    """P_t over six corners, two loadings and two centres of gravity, in lb; and the same with each input changed."""
    speed = numpy.array([55, 65, 90, 90, 65, 48.0])
    n = numpy.array([3.8, 1.0, 3.8, 0.0, -1.5, -1.5])
    cm = numpy.array([-0.055, -0.060, -0.062, -0.068, -0.052, -0.048])

    def loads(weight, x_cg, wing=142.0, x_ac=6.10):
        q = 0.5 * RHO0 * (speed * KNOT) ** 2
        moment = cm * q * wing * FOOT**2 * 4.6 * FOOT
        lift = n[:, None, None] * numpy.array(weight)[None, :, None] * POUND
        arm = (numpy.array(x_cg) - x_ac)[None, None, :] * FOOT
        return (moment[:, None, None] + lift * arm) / ((17.30 - x_ac) * FOOT) / POUND

    base = text_of("osier-balancing-loads")
    cases = {
        "as it is": (base, loads([430, 560], [5.95, 6.45])),
        "weight up 10 %": (changed(base, "W", "light: 473 | gross: 616"), loads([473, 616], [5.95, 6.45])),
        "centre of gravity 2 % of the chord aft": (changed(base, "x_cg", "fwd: 6.042 | aft: 6.542"), loads([430, 560], [6.042, 6.542])),
        "a larger wing": (changed(base, "S", "160"), loads([430, 560], [5.95, 6.45], wing=160.0)),
    }
    before = None
    for case, (text, expected) in cases.items():
        report = run(text)
        for at, value in enumerate(expected.ravel()):
            compare(f"P_t {at}, {case}", report.values("P_t")[at], value, rel=1e-11, abs=1e-9, source="Osier's balance")
        largest, smallest = expected.max(), expected.min()
        found = report.quantity("P_t")
        compare(f"largest, {case}", found["largest"]["value"], largest, rel=1e-11, source="Osier's balance")
        compare(f"smallest, {case}", found["smallest"]["value"], smallest, rel=1e-11, source="Osier's balance")
        if before is not None:
            assert (largest, smallest) != before, case
        before = before or (largest, smallest)


def teasel_balance(compare):
    """P_c over six points, two powers, two loadings and two centres of gravity, in N."""
    speed = numpy.array([105, 198, 215, 290, 290, 150]) / 3.6
    n = numpy.array([1.0, 3.8, 1.0, 3.8, 0.0, -1.5])
    cm = numpy.array([-0.040, -0.040, -0.042, -0.050, -0.052, -0.035])

    def loads(mass, x_cg):
        q = 0.5 * RHO0 * speed**2
        moment = (cm * q * 11.4 * 1.05)[:, None, None, None]
        thrust = (-numpy.array([0.0, 1450.0]) * (1.15 - 0.95))[None, :, None, None]
        lift = n[:, None, None, None] * numpy.array(mass)[None, None, :, None] * G0
        arm = (numpy.array(x_cg) - 3.42)[None, None, None, :]
        return (moment + thrust + lift * arm) / (0.95 - 3.42)

    base = text_of("teasel-balancing-loads")
    cases = {
        "as it is": (base, loads([380, 520], [2.98, 3.08])),
        "mass up 10 %": (changed(base, "m", "418 | 572"), loads([418, 572], [2.98, 3.08])),
        "centre of gravity 2 % of the chord aft": (changed(base, "x_cg", "3.001 | 3.101"), loads([380, 520], [3.001, 3.101])),
    }
    before = None
    for case, (text, expected) in cases.items():
        report = run(text)
        assert report.quantity("P_c")["axes"] == ["point", "power", "loading", "cg"]
        for at, value in enumerate(expected.ravel()):
            compare(f"P_c {at}, {case}", report.values("P_c")[at], value, rel=1e-11, abs=1e-8, source="Teasel's balance")
        # The canard lifts up in steady flight: no sign is changed by hand anywhere.
        assert expected[0].min() > 0.0
        if before is not None:
            assert expected.max() != before, case
        before = before or expected.max()


def osier_weight(compare):
    """Centre of gravity in parts of the mean aerodynamic chord, from the stations of the wing and the list of items."""
    y, c, x = (numpy.array(list) for list in ([0, 7.5, 14.4], [5.0, 5.0, 3.9], [4.90, 4.90, 5.10]))
    # Straight edges between stations: Simpson's rule is exact for the products.
    area = chord = leading = 0.0
    for a, b in ((0, 1), (1, 2)):
        width, c_m, x_m = y[b] - y[a], (c[a] + c[b]) / 2, (x[a] + x[b]) / 2
        area += width * (c[a] + 4 * c_m + c[b]) / 6
        chord += width * (c[a] ** 2 + 4 * c_m**2 + c[b] ** 2) / 6
        leading += width * (c[a] * x[a] + 4 * c_m * x_m + c[b] * x[b]) / 6
    mac, x_le = chord / area, leading / area
    station = numpy.array([6.42, 5.60, 6.90, 7.60])

    def chords(airframe):
        pilot, fuel, bag = [0, 121, 121, 243, 243], [0, 0, 60, 0, 60], [0, 0, 0, 0, 15]
        weights = numpy.array([[airframe, *items] for items in zip(pilot, fuel, bag)], dtype=float)
        return weights.sum(axis=1), ((weights @ station) / weights.sum(axis=1) - x_le) / mac

    base = text_of("osier-weight-and-balance")
    for case, text, airframe in [("as it is", base, 298.0), ("airframe up 5 %", changed(base, "W_0", "312.9"), 312.9)]:
        report = run(text)
        compare(f"mac, {case}", report.values("mac")[0], mac, rel=1e-12, source="Osier's weight")
        weight, part = chords(airframe)
        for at in range(5):
            compare(f"W {at}, {case}", report.values("W")[at], weight[at], rel=1e-12, source="Osier's weight")
            compare(f"h {at}, {case}", report.values("h")[at] / 100, part[at], rel=1e-11, source="Osier's weight")


def osier_controls(compare):
    """Elevator to trim and stick force: two linear equations in each condition."""
    speeds = numpy.arange(30.0, 91.0, 10.0)
    incidences = numpy.radians([-4.0, -2.0, 0.0])
    cos = 2 * 0.40 - 1
    theta = numpy.arccos(cos)
    tau = 0.8 * (1 - (theta - numpy.sin(theta)) / numpy.pi)

    def trimmed(weight, x_cg, speed, incidence):
        q = 0.5 * RHO0 * (speed * KNOT) ** 2
        s, s_t, a, a_t, e = 142.0 * FOOT**2, 24.0 * FOOT**2, 4.45, 3.8, 0.42
        al_0, ratio = numpy.radians(-3.5), 0.9
        x_ac, x_t, x = 6.10 * FOOT, 17.30 * FOOT, x_cg * FOOT
        wing, tail = q * s * a, ratio * q * s_t * a_t
        # Unknown are the angle above that of no lift, u = al - al_0, and the elevator.
        matrix = [[wing + tail * (1 - e), tail * tau], [wing * (x - x_ac) + tail * (1 - e) * (x - x_t), tail * tau * (x - x_t)]]
        fixed = tail * (al_0 + incidence)
        right = [weight * POUND - fixed, 0.064 * q * s * 4.6 * FOOT - fixed * (x - x_t)]
        u, d = numpy.linalg.solve(matrix, right)
        at_tail = u * (1 - e) + al_0 + incidence
        hinge = ratio * q * (0.4 * s_t) * (0.4 * 2.6 * FOOT) * (-0.25 * at_tail - 0.60 * d)
        force = numpy.radians(45.0) / (0.75 * FOOT) * hinge
        return numpy.degrees(d), force / POUND

    base = text_of("osier-controls")
    for case, text, weight in [("as it is", base, 560.0), ("weight up 10 %", changed(base, "W", "616"), 616.0)]:
        report = run(text)
        assert report.quantity("d")["axes"] == ["cg", "V", "i_t"], report.quantity("d")["axes"]
        at = 0
        for x_cg in (5.95, 6.45):
            for speed in speeds:
                for incidence in incidences:
                    d, force = trimmed(weight, x_cg, speed, incidence)
                    compare(f"d {at}, {case}", report.values("d")[at], d, rel=1e-7, abs=1e-7, source="Osier's elevator")
                    compare(f"F {at}, {case}", report.values("F")[at], force, rel=1e-7, abs=1e-7, source="Osier's elevator")
                    at += 1


with Comparison("sheets") as compare:
    osier_balance(compare)
    teasel_balance(compare)
    osier_weight(compare)
    osier_controls(compare)
