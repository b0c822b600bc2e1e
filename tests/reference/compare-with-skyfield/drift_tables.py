"""Writes tests/reference/data/drift/tables.json: the passes of a few invented spacecraft by two element sets each.

    /usr/bin/python3 tests/reference/compare-with-skyfield/drift_tables.py

Needs Debian's python3-skyfield and python3-sgp4; uses no code of the product.
"""

import json
import os

import numpy as np
from sgp4.api import WGS72, Satrec
from sgp4.exporter import export_tle

from compare import DAY_S, ROOT, START_ISO, START_JD, View, earth_fixed, stays

PASSES = os.path.join(ROOT, "tests", "reference", "data", "passes", "scenario.json")
OUT = os.path.join(ROOT, "tests", "reference", "data", "drift", "tables.json")
# Spacecraft of the scenario, and by how much the newer set differs: mean anomaly and inclination, in degrees.
CHANGES = {"81001": (0.02, 0.0), "81002": (-0.9, 0.01), "81003": (1.3, 0.0), "81004": (-0.05, -0.02), "81010": (0.3, 0.0)}
STATIONS = ["st-fjord", "st-mesa", "st-basin", "st-ice", "st-moor", "st-cape"]
DAYS = 2


def newer(lines, anomaly_deg, inclination_deg):
    old = Satrec.twoline2rv(*lines)
    changed = Satrec()
    changed.sgp4init(
        WGS72, "i", old.satnum, START_JD - 2433281.5 - 0.75, old.bstar, 0.0, 0.0, old.ecco, old.argpo,
        old.inclo + np.radians(inclination_deg), (old.mo + np.radians(anomaly_deg)) % (2 * np.pi), old.no_kozai, old.nodeo,
    )
    changed.classification, changed.intldesg, changed.elnum, changed.revnum = "U", "26900A", 2, 1
    return list(export_tle(changed))


def table(lines, station):
    satellite = Satrec.twoline2rv(*lines)
    grid = np.linspace(0, DAYS * DAY_S, int(DAYS * DAY_S / 2) + 1)
    view = View(satellite, station)
    found = stays(view, grid, earth_fixed(satellite, grid))
    at = np.datetime64(START_ISO.rstrip("Z"))
    iso = lambda seconds: f"{at + np.timedelta64(int(round(seconds * 1000)), 'ms')}Z"
    # Passes that run past the period have no end of their own.
    return [[iso(start), iso(stop)] for start, stop in found if start > 0 and stop < DAYS * DAY_S]


def main():
    with open(PASSES) as file:
        scenario = json.load(file)
    spacecraft = []
    for one in scenario["satellites"]:
        if one["id"] not in CHANGES:
            continue
        sets = {"sold": one["tle"], "newer": newer(one["tle"], *CHANGES[one["id"]])}
        tables = {
            station["id"]: {name: table(lines, station) for name, lines in sets.items()}
            for station in scenario["stations"]
            if station["id"] in STATIONS
        }
        spacecraft.append({"id": one["id"], **sets, "passes": tables})
    with open(OUT, "w") as file:
        file.write('{"spacecraft":[\n' + ",\n".join(json.dumps(one) for one in spacecraft) + "\n]}\n")


if __name__ == "__main__":
    main()
