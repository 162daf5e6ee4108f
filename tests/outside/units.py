"""The whole table of units, and compounds of them as sheets hold them, against pint."""

import os
import subprocess

import pint
from support import Comparison, run

# Each symbol of the table and what pint calls it. A symbol that is missing here fails.
NAMES = {
    "m": "meter", "ft": "foot", "in": "inch", "yd": "yard", "mi": "mile", "NM": "nautical_mile", "ha": "hectare",
    "L": "liter", "USgal": "gallon", "impgal": "imperial_gallon", "g": "gram", "lbm": "pound", "slug": "slug",
    "s": "second", "min": "minute", "h": "hour", "K": "kelvin", "degR": "delta_degree_Fahrenheit", "N": "newton",
    "kgf": "kilogram_force", "lb": "pound_force", "oz": "force_ounce", "Pa": "pascal", "bar": "bar", "atm": "atmosphere",
    "psf": "force_pound/foot**2", "psi": "pound_force_per_square_inch", "ksi": "1000*pound_force_per_square_inch",
    "inHg": "inch_Hg", "mmHg": "millimeter_Hg", "J": "joule", "W": "watt", "hp": "horsepower", "kt": "knot",
    "KEAS": "knot", "KCAS": "knot", "KTAS": "knot", "mph": "mile/hour", "kph": "kilometer/hour", "fpm": "foot/minute",
    "rad": "radian", "deg": "degree", "arcmin": "arcminute", "rpm": "revolution/minute", "Hz": "1/second",
    "%": "percent",
}
# Temperatures with a zero of their own, by readings.
READINGS = {"degC": "degree_Celsius", "degF": "degree_Fahrenheit"}
# Units as they stand on sheets, the SI unit they are shown in, and the same for pint.
COMPOUNDS = [
    ("lb/ft^2", "Pa", "force_pound/foot**2"),
    ("slug/ft^3", "kg/m^3", "slug/foot**3"),
    ("slug.ft^2", "kg.m^2", "slug*foot**2"),
    ("in.lb", "N.m", "inch*force_pound"),
    ("ft.lb", "N.m", "foot*force_pound"),
    ("lb/in", "N/m", "force_pound/inch"),
    ("ft/s^2", "m/s^2", "foot/second**2"),
    ("kg/m^2", "kg/m^2", "kilogram/meter**2"),
    ("lbm/USgal", "kg/m^3", "pound/gallon"),
    ("L/h", "m^3/s", "liter/hour"),
    ("deg/s", "rad/s", "degree/second"),
    ("/deg", "/rad", "1/degree"),
    ("daN", "N", "decanewton"),
    ("kN.m", "N.m", "kilonewton*meter"),
    ("hPa", "Pa", "hectopascal"),
    ("MPa", "Pa", "megapascal"),
    ("mm", "m", "millimeter"),
    ("km", "m", "kilometer"),
    ("mrad", "rad", "milliradian"),
    ("kW", "W", "kilowatt"),
]


def table():
    """The first symbol and the SI dimension of every row that the command line lists."""
    listed = subprocess.run(
        [os.environ["PITCHWRIGHT"], "units"], capture_output=True, encoding="utf-8", check=True
    ).stdout
    rows = []
    for line in listed.splitlines():
        symbols, said = line.split(": ", 1)
        rows.append((symbols.split()[0], said))
    return rows


def single(compare, registry):
    """Each unit of the table, shown in the unit of SI with the same dimension."""
    rows = [(symbol, said) for symbol, said in table() if symbol not in READINGS]
    known = {symbol for symbol, _ in rows}
    if known != set(NAMES):
        raise RuntimeError(f"not in both tables: {sorted(known ^ set(NAMES))}")
    lines = []
    for at, (symbol, _) in enumerate(rows):
        base = base_unit(registry, NAMES[symbol])
        lines.append(f"u_{at} [{base or 1}] = 1 {symbol}")
    report = run("\n".join(lines))
    for at, (symbol, _) in enumerate(rows):
        expected = registry(NAMES[symbol]).to_base_units().magnitude
        compare(symbol, report.number(f"u_{at}"), expected, rel=2e-15, source="pint, one of each unit")


def base_unit(registry, name):
    """The product of SI base units that a unit of pint reduces to, as a sheet writes it; empty for a pure number."""
    short = {"meter": "m", "kilogram": "kg", "second": "s", "kelvin": "K", "radian": "rad"}
    units = registry(name).to_base_units().units
    parts = [(short[unit], power) for unit, power in sorted(units._units.items())]
    over = [text(unit, power) for unit, power in parts if power > 0]
    under = [text(unit, -power) for unit, power in parts if power < 0]
    return ".".join(over) + ("/" + ".".join(under) if under else "")


def text(unit, power):
    return unit if power == 1 else f"{unit}^{power:g}"


def readings(compare, registry):
    values = [-56.5, -40.0, 0.0, 15.0, 212.0]
    lines = [
        f"t_{symbol}_{at} [K] = {value} {symbol}" for symbol in READINGS for at, value in enumerate(values)
    ]
    report = run("\n".join(lines))
    for symbol, name in READINGS.items():
        for at, value in enumerate(values):
            expected = registry.Quantity(value, name).to("kelvin").magnitude
            compare(f"{value} {symbol}", report.number(f"t_{symbol}_{at}"), expected, rel=4e-16, source="pint, temperatures")


def compounds(compare, registry):
    """There and back: 7.3 of each unit in SI, and 7.3 of SI in the unit."""
    lines = []
    for at, (unit, si, _) in enumerate(COMPOUNDS):
        lines += [f"to_{at} [{si}] = 7.3 {unit}", f"from_{at} [{unit}] = 7.3 {si}"]
    report = run("\n".join(lines))
    for at, (unit, _, name) in enumerate(COMPOUNDS):
        factor = registry(name).to_base_units().magnitude
        source = "pint, compounds there and back"
        compare(f"7.3 {unit}", report.number(f"to_{at}"), 7.3 * factor, rel=2e-15, source=source)
        compare(f"7.3 SI in {unit}", report.number(f"from_{at}"), 7.3 / factor, rel=2e-15, source=source)


with Comparison("units") as compare:
    registry = pint.UnitRegistry()
    single(compare, registry)
    readings(compare, registry)
    compounds(compare, registry)
