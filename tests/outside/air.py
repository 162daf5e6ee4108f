"""The standard atmosphere and airspeeds, against fluids (US Standard Atmosphere 1976) and mpmath (40 digits)."""

import fluids.atmosphere
import mpmath
from support import Comparison, run

mpmath.mp.dps = 40

# Radius of the Earth in the standard, m: geopotential height H belongs to the geometric height r H/(r - H).
EARTH = 6356766.0

# Heights in each layer and at the ends of layers; those of airspeeds, where all of these are subsonic.
HEIGHTS = ["-1500", "0", "500", "3000", "8000", "11000", "15000", "20000", "24000", "31000"]
LEVELS = ["0", "1500", "4000", "9000", "14000"]
SPEEDS = ["20", "35", "50", "90", "120"]

SHEET = f"""
title Air
vary h [m]: {" | ".join(HEIGHTS)}
a = standard_atmosphere(h)
T [K] = a.temperature
p [Pa] = a.pressure
rho [kg/m^3] = a.density
sound [m/s] = a.sound_speed
mu [Pa.s] = a.viscosity
height [m] = density_altitude(rho)
vary level [m]: {" | ".join(LEVELS)}
flown = standard_atmosphere(level)
p_l [Pa] = flown.pressure
rho_l [kg/m^3] = flown.density
vary V [m/s EAS]: {" | ".join(SPEEDS)}
true [m/s TAS] = tas_of_eas(V, rho_l)
cal [m/s CAS] = cas_of_eas(V, p_l)
back [m/s EAS] = eas_of_cas(cal, p_l)
M = mach_number(true, flown.sound_speed)
q_c [Pa] = impact_pressure(M, p_l)
q [Pa] = dynamic_pressure_of_eas(V)
"""


def atmosphere(compare, report):
    """Geopotential heights of ours are geometric heights of the library, so its own conversion goes first."""
    for height in HEIGHTS:
        at = {"h": f"{height} m"}
        H = float(height)
        radius = EARTH
        air = fluids.atmosphere.ATMOSPHERE_1976(radius * H / (radius - H))
        source = "fluids, US Standard Atmosphere 1976"
        for symbol, expected, rel in [
            ("T", air.T, 1e-9),
            ("p", air.P, 5e-6),
            ("rho", air.rho, 5e-6),
            ("sound", air.v_sonic, 5e-6),
            ("mu", air.mu, 1e-6),
        ]:
            compare(f"{symbol} at {height} m", report.number(symbol, **at), expected, rel=rel, source=source)
        compare(f"density altitude at {height} m", report.number("height", **at), H, abs=1e-6, source="the height itself")


def speeds(compare, report):
    """From equivalent airspeed, with gamma 1.4 exactly, in 40 digits from the pressure and density of the sheet."""
    p0, rho0 = mpmath.mpf(101325), mpmath.mpf("1.225")
    # ISO 2533: R = 287.05287 J/(kg K), 288.15 K. The rounded density would give a speed of sound 7e-9 higher.
    a0 = mpmath.sqrt(mpmath.mpf("1.4") * mpmath.mpf("287.05287") * mpmath.mpf("288.15"))
    source = "mpmath, isentropic flow of gamma 1.4"
    for level in LEVELS:
        p = mpmath.mpf(report.number("p_l", level=f"{level} m"))
        rho = mpmath.mpf(report.number("rho_l", level=f"{level} m"))
        for speed in SPEEDS:
            at = {"level": f"{level} m", "V": f"{speed} m/s EAS"}
            eas = mpmath.mpf(speed)
            mach = eas / (a0 * mpmath.sqrt(p / p0))
            qc = p * ((1 + mach**2 / 5) ** mpmath.mpf("3.5") - 1)
            cas = a0 * mpmath.sqrt(5 * ((qc / p0 + 1) ** (mpmath.mpf(2) / 7) - 1))
            for symbol, expected, rel in [
                ("true", eas * mpmath.sqrt(rho0 / rho), 1e-14),
                ("cal", cas, 1e-12),
                ("back", eas, 1e-12),
                ("q_c", qc, 2e-8),
                ("M", mach, 1e-8),
            ]:
                compare(f"{symbol} at {at}", report.number(symbol, **at), expected, rel=rel, source=source)
    for speed in SPEEDS:
        expected = rho0 * mpmath.mpf(speed) ** 2 / 2
        compare(f"q at {speed}", report.number("q", V=f"{speed} m/s EAS"), expected, rel=1e-15, source=source)


with Comparison("air") as compare:
    report = run(SHEET)
    atmosphere(compare, report)
    speeds(compare, report)
