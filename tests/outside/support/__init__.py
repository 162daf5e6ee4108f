"""What the scripts of this folder share: running a sheet with the command line, and comparing numbers.

A script beside this folder recomputes with a library what a sheet says:

    from support import Comparison, run

    report = run("S [m^2] = 2*3 m^2")
    with Comparison("area") as compare:
        compare("S", report.number("S"), 6.0, rel=1e-15, source="a product")
"""

import json
import math
import os
import subprocess
import sys

ROOT = os.path.normpath(os.path.join(os.path.dirname(os.path.abspath(__file__)), "..", "..", ".."))


class Report:
    """The JSON of a sheet, read by symbol."""

    def __init__(self, read):
        self.read = read
        self.axes = {axis["name"]: axis for axis in read["axes"]}
        self.quantities = {quantity["symbol"]: quantity for quantity in read["quantities"]}

    def quantity(self, symbol):
        """Everything said of a symbol."""
        return self.quantities[symbol]

    def unit(self, symbol):
        """The unit its values are in; None for a pure number."""
        return self.quantity(symbol)["unit"]

    def values(self, symbol):
        """All values, row-major over the axes of the symbol; None where there is no value."""
        return self.quantity(symbol)["values"]

    def number(self, symbol, **labels):
        """The value in one condition, named by a label of each axis of the symbol."""
        quantity = self.quantity(symbol)
        if set(labels) != set(quantity["axes"]):
            raise KeyError(f"{symbol} varies over {quantity['axes']}, not over {list(labels)}")
        at = 0
        for name in quantity["axes"]:
            known = self.axes[name]["labels"]
            at = at * len(known) + known.index(labels[name])
        return quantity["values"][at]

    def findings(self, *severities):
        """The findings of these severities; of all without."""
        return [f for f in self.read["findings"] if not severities or f["severity"] in severities]


def run(text, sound=True):
    """Works a sheet out, given as text. A sheet that is to be sound may give advice only."""
    return _report(["-"], text, sound)


def run_file(path, sound=True):
    """Works out a sheet of the repository, by its path from the root."""
    return _report([os.path.join(ROOT, path)], None, sound)


def _report(arguments, text, sound):
    command = [os.environ["PITCHWRIGHT"], "run", *arguments, "--json"]
    ended = subprocess.run(command, input=text, capture_output=True, encoding="utf-8", check=False)
    if not ended.stdout:
        raise RuntimeError(f"{' '.join(command)} printed nothing: {ended.stderr}")
    report = Report(json.loads(ended.stdout))
    found = report.findings("error", "warning")
    if sound and found:
        raise RuntimeError("the sheet is not sound:\n" + json.dumps(found, indent=1))
    return report


class Comparison:
    """Compares numbers, counts them, and closes with the line that the runner reads."""

    def __init__(self, name):
        self.name = name
        self.passed = 0
        self.failed = 0
        self.largest = {}

    def __enter__(self):
        return self

    def __call__(self, what, obtained, expected, rel=0.0, abs=0.0, source=""):
        """One number: right within abs plus rel of the value expected."""
        difference = math.nan if obtained is None else obtained - float(expected)
        allowed = abs + rel * math.fabs(float(expected))
        if math.isfinite(difference) and math.fabs(difference) <= allowed:
            self.passed += 1
            part = math.fabs(difference) / allowed if allowed else 0.0
            group = source or self.name
            self.largest[group] = max(self.largest.get(group, (0.0, "")), (part, what))
        else:
            self.failed += 1
            print(f"{self.name}: {what}: {obtained} is not {expected} within {allowed:g} ({source})")

    def __exit__(self, kind, error, trace):
        if kind is not None:
            return False
        for source, (part, what) in sorted(self.largest.items()):
            print(f"{self.name}: {source}: largest difference {part:.0%} of what is allowed, {what}")
        print(f"{self.name}: {self.passed} passed, {self.failed} failed")
        sys.stdout.flush()
        if self.failed or not self.passed:
            sys.exit(1)
        return False
