"""Compares `npm run passes` with an independent search on random spacecraft, stations and masks.

For a maintainer with Debian's python3-skyfield and python3-sgp4:

    /usr/bin/python3 tests/reference/compare-with-skyfield/compare.py [--seed N] [--satellites N] [--stations N] [--days N]

Positions come from python-sgp4, sidereal time and places from Skyfield; the search is a fine grid with every sign change
halved down and every near touch looked at again. Nothing of the engine is used but its command. Exit status 1 if a pass is
missing or extra, or an AOS or LOS is off by more than 5 ms.
"""

import argparse
import json
import os
import random
import subprocess
import sys
import tempfile
import time

import numpy as np
from sgp4.api import WGS72, Satrec
from sgp4.exporter import export_tle
from skyfield.api import wgs84
from skyfield.sgp4lib import theta_GMST1982

ROOT = os.path.abspath(os.path.join(os.path.dirname(__file__), "..", "..", ".."))
START_JD, START_FRACTION = 2461375.5, 0.0  # 2026-12-01T00:00:00Z
START_ISO = "2026-12-01T00:00:00Z"
DAY_S = 86400.0
# A stay shorter than the grid can hide from the reference; such ones are checked at their middle instead.
TOUCH_DEG = 1.0


def random_elements(rng, number):
    """Mean motion (rev/day), eccentricity, inclination, B*, by a random choice of orbit."""
    kind = rng.choice(["leo", "leo", "leo", "low", "meo", "molniya", "gto", "geo", "tundra", "retrograde", "equatorial"])
    angle = lambda: rng.uniform(0, 360)
    motion, eccentricity, inclination, drag = {
        "leo": (rng.uniform(13.0, 15.5), rng.uniform(0, 0.02), rng.uniform(0, 100), 4e-5),
        "low": (rng.uniform(15.6, 16.1), rng.uniform(0, 0.003), rng.uniform(20, 98), 3e-4),
        "meo": (rng.uniform(1.9, 6.0), rng.uniform(0, 0.3), rng.uniform(0, 70), 0.0),
        "molniya": (2.006, rng.uniform(0.68, 0.74), 63.4, 0.0),
        "gto": (rng.uniform(2.2, 2.4), rng.uniform(0.70, 0.73), rng.uniform(5, 30), 1e-5),
        "geo": (1.0027379, rng.uniform(0, 0.001), rng.uniform(0.01, 6), 0.0),
        "tundra": (1.0027, rng.uniform(0.2, 0.4), 63.4, 0.0),
        "retrograde": (rng.uniform(12.5, 15.0), rng.uniform(0, 0.05), rng.uniform(120, 179), 2e-5),
        "equatorial": (rng.uniform(13.5, 15.0), rng.uniform(0, 0.01), rng.uniform(0, 2), 2e-5),
    }[kind]
    satellite = Satrec()
    satellite.sgp4init(
        WGS72, "i", number, START_JD - 2433281.5 - rng.choice([0.25, 1.5, 8.0, -3.0]) - rng.random() / 10, drag, 0.0, 0.0,
        round(eccentricity, 7), np.radians(angle()), np.radians(inclination), np.radians(angle()),
        motion * 2 * np.pi / 1440, np.radians(angle()),
    )
    satellite.classification = "U"
    satellite.intldesg = "26900A"
    satellite.elnum, satellite.revnum = 1, 1
    return kind, export_tle(satellite)


def random_mask(rng):
    kind = rng.choice(["flat", "flat", "rolling", "cliffs", "spikes", "walled", "turned"])
    if kind == "flat":
        return [[0, rng.choice([0, 5, 10, 15, 30])]]
    if kind == "rolling":
        return [[round(azimuth + rng.uniform(0, 20), 2), round(rng.uniform(0, 25), 2)] for azimuth in range(0, 340, 30)]
    if kind == "turned":
        points = [[round(azimuth + rng.uniform(0, 20), 2), round(rng.uniform(2, 12), 2)] for azimuth in range(0, 340, 45)]
        return points[4:] + points[:4]
    if kind == "cliffs":
        mask = []
        for azimuth in range(10, 350, 85):
            at, low, high = azimuth + rng.randint(0, 30), rng.uniform(0, 6), rng.uniform(12, 40)
            mask += [[at, low], [at, high], [at + 20, high], [at + 20, low]]
        return mask
    if kind == "spikes":
        mask = []
        for azimuth in range(5, 350, 40):
            mask += [[azimuth, 3], [azimuth + 1.5, rng.uniform(20, 60)], [azimuth + 3, 3]]
        return mask
    return [[0, 5], [90, 5], [100, 80], [170, 90], [200, 85], [210, 6]]


def random_station(rng, index):
    latitude = rng.choice([rng.uniform(-80, 80), rng.uniform(-80, 80), 90.0, -90.0, 89.9, 0.0])
    longitude = rng.choice([rng.uniform(-180, 180), 179.99, -179.99])
    return {
        "id": f"st-{index:02d}", "name": f"Station {index}", "latitudeDeg": round(latitude, 4),
        "longitudeDeg": round(longitude, 4), "altitudeM": round(rng.uniform(0, 4000)), "mask": random_mask(rng),
    }


class Mask:
    """Straight lines between corners, closed across north; equal azimuths are a cliff."""

    def __init__(self, points):
        start = min(range(len(points)), key=lambda at: points[at][0])
        corners = points[start:] + points[:start]
        if len(corners) > 1 and corners[0][0] == corners[-1][0]:
            corners = corners[-1:] + corners[:-1]
        corners = [[corners[-1][0] - 360, corners[-1][1]]] + corners + [[corners[0][0] + 360, corners[0][1]]]
        self.azimuth = np.array([azimuth for azimuth, _ in corners], float)
        self.elevation = np.array([elevation for _, elevation in corners], float)

    def __call__(self, azimuth):
        line = np.clip(np.searchsorted(self.azimuth, azimuth, side="right") - 1, 0, len(self.azimuth) - 2)
        width = self.azimuth[line + 1] - self.azimuth[line]
        part = np.where(width > 0, (azimuth - self.azimuth[line]) / np.where(width > 0, width, 1), 0)
        return self.elevation[line] + part * (self.elevation[line + 1] - self.elevation[line])


class View:
    def __init__(self, satellite, station):
        self.satellite, self.mask = satellite, Mask(station["mask"])
        place = wgs84.latlon(station["latitudeDeg"], station["longitudeDeg"], elevation_m=station["altitudeM"])
        self.place = place.itrs_xyz.km
        lat, lon = np.radians(station["latitudeDeg"]), np.radians(station["longitudeDeg"])
        self.axes = np.array([
            [-np.sin(lon), np.cos(lon), 0],
            [-np.sin(lat) * np.cos(lon), -np.sin(lat) * np.sin(lon), np.cos(lat)],
            [np.cos(lat) * np.cos(lon), np.cos(lat) * np.sin(lon), np.sin(lat)],
        ])

    def angles_from(self, position):
        east, north, up = self.axes @ (position.T - self.place[:, None])
        return np.degrees(np.arctan2(up, np.hypot(east, north))), np.degrees(np.arctan2(east, north)) % 360

    def over(self, seconds):
        elevation, azimuth = self.angles_from(earth_fixed(self.satellite, seconds))
        return elevation - self.mask(azimuth)


    def corner_times(self, grid, azimuth):
        """Just before and just after the azimuth passes a corner of the mask, where a narrow wall can hide from the grid."""
        times = []
        for corner in np.unique(self.mask.azimuth % 360):
            off = (azimuth - corner + 180) % 360 - 180
            at = np.flatnonzero((off[1:] > 0) != (off[:-1] > 0))
            at = at[np.abs(off[at + 1] - off[at]) < 90]
            low, high, before = grid[at].copy(), grid[at + 1].copy(), off[at] > 0
            for _ in range(40 if len(at) else 0):
                middle = 0.5 * (low + high)
                _, there = self.angles_from(earth_fixed(self.satellite, middle))
                same = (((there - corner + 180) % 360 - 180) > 0) == before
                low, high = np.where(same, middle, low), np.where(same, high, middle)
            times += [low, high]
        return np.concatenate(times) if times and len(self.mask.azimuth) > 3 else np.empty(0)


def earth_fixed(satellite, seconds):
    day = np.full(len(seconds), START_JD)
    fraction = START_FRACTION + np.asarray(seconds) / DAY_S
    errors, position, _ = satellite.sgp4_array(day, fraction)
    if errors.any():
        raise RuntimeError(f"SGP4 code {errors.max()}")
    theta, _ = theta_GMST1982(day, fraction)
    x, y = position[:, 0], position[:, 1]
    turned = np.stack([np.cos(theta) * x + np.sin(theta) * y, np.cos(theta) * y - np.sin(theta) * x, position[:, 2]], 1)
    return turned


def stays(view, grid, positions):
    """Unbroken stretches over the mask: [start, stop] in seconds, by sign changes and a second look at near touches."""
    elevation, azimuth = view.angles_from(positions)
    # Near the zenith the azimuth races; the grid is made as fine there as the mask needs.
    racing = np.flatnonzero(np.abs((np.diff(azimuth) + 180) % 360 - 180) > 5)
    if len(racing) and len(view.mask.azimuth) > 3:
        fine = np.concatenate([np.linspace(grid[at], grid[at + 1], 400)[1:-1] for at in racing])
        fine_elevation, fine_azimuth = view.angles_from(earth_fixed(view.satellite, fine))
        grid = np.concatenate([grid, fine])
        order = np.argsort(grid, kind="stable")
        grid = grid[order]
        elevation = np.concatenate([elevation, fine_elevation])[order]
        azimuth = np.concatenate([azimuth, fine_azimuth])[order]
    over = elevation - view.mask(azimuth)
    corners = view.corner_times(grid, azimuth)
    times = np.concatenate([grid, corners])
    values = np.concatenate([over, view.over(corners)]) if len(corners) else over
    turns = np.flatnonzero((np.diff(over)[:-1] * np.diff(over)[1:] <= 0) & (np.abs(over[1:-1]) < TOUCH_DEG)) + 1
    if len(turns):
        left, right = grid[turns - 1].copy(), grid[turns + 1].copy()
        sign = np.where(over[turns] < 0, 1.0, -1.0)
        for _ in range(60):
            a, b = left + (right - left) / 3, right - (right - left) / 3
            better = sign * view.over(a) > sign * view.over(b)
            right, left = np.where(better, b, right), np.where(better, left, a)
        extra = 0.5 * (left + right)
        times = np.concatenate([times, extra])
        values = np.concatenate([values, view.over(extra)])
    order = np.argsort(times, kind="stable")
    times, values = times[order], values[order]
    visible = values > 0
    change = np.flatnonzero(visible[1:] != visible[:-1])
    low, high = times[change].copy(), times[change + 1].copy()
    rising = visible[change + 1]
    for _ in range(50):
        if not len(low):
            break
        middle = 0.5 * (low + high)
        after = (view.over(middle) > 0) == rising
        high, low = np.where(after, middle, high), np.where(after, low, middle)
    edges = list(0.5 * (low + high))
    if visible[0]:
        edges.insert(0, times[0])
    if visible[-1]:
        edges.append(times[-1])
    return np.array(edges).reshape(-1, 2)


def run_engine(scenario):
    with tempfile.NamedTemporaryFile("w", suffix=".json") as file:
        json.dump(scenario, file)
        file.flush()
        command = ["npm", "run", "--silent", "passes", "--", "--scenario", file.name]
        done = subprocess.run(command, cwd=ROOT, capture_output=True, text=True, check=False)
    if done.returncode != 0:
        sys.exit(f"The command failed:\n{done.stderr}")
    found = {}
    for one in json.loads(done.stdout)["passes"]:
        found.setdefault((one["satelliteId"], one["stationId"]), []).append(one)
    return found


def seconds_of(iso):
    return (np.datetime64(iso.rstrip("Z")) - np.datetime64(START_ISO.rstrip("Z"))) / np.timedelta64(1, "ms") / 1000


def match(view, wanted, found, step, worst, label):
    """Pairs stays by overlap; returns how many are missing and extra."""
    missing = extra = 0
    pairs = [(seconds_of(one["aosUtc"]), seconds_of(one["losUtc"]), one) for one in found]
    used = set()
    for start, stop in wanted:
        hit = next((at for at, (aos, los, _) in enumerate(pairs)
                    if at not in used and abs(aos - start) < 1 and abs(los - stop) < 1), None)
        if hit is None:
            if stop - start < 0.002:
                continue
            missing += 1
            print(f"missing: {label} {start:.3f} .. {stop:.3f} s")
            continue
        used.add(hit)
        aos, los, one = pairs[hit]
        for error in (abs(aos - start), abs(los - stop)):
            if error > worst["seconds"]:
                worst["seconds"], worst["where"] = error, label
        top, _ = view.angles_from(earth_fixed(view.satellite, [seconds_of(one["tcaUtc"])]))
        worst["elevation"] = max(worst["elevation"], abs(top[0] - one["maxElevationDeg"]))
    for at, (aos, los, _) in enumerate(pairs):
        if at in used:
            continue
        # The grid may have stepped over a stay this short. It is real if the middle is over the mask and both ends are edges.
        middle = view.over([aos + (los - aos) / 2])[0]
        if los - aos < 2 * step and middle > -1e-5:
            worst["short"] += 1
            continue
        extra += 1
        print(f"extra: {label} {aos:.3f} .. {los:.3f} s, middle {middle:.5f} degrees over")
    return missing, extra


def main():
    parser = argparse.ArgumentParser()
    parser.add_argument("--seed", type=int, default=int(time.time()))
    parser.add_argument("--satellites", type=int, default=24)
    parser.add_argument("--stations", type=int, default=12)
    parser.add_argument("--days", type=int, default=3)
    options = parser.parse_args()
    rng = random.Random(options.seed)
    satellites, kinds = [], {}
    while len(satellites) < options.satellites:
        number = 82001 + len(satellites)
        kind, lines = random_elements(rng, number)
        try:
            earth_fixed(Satrec.twoline2rv(*lines), np.linspace(0, options.days * DAY_S, 5000))
        except RuntimeError:
            continue
        kinds[str(number)] = kind
        satellites.append({"id": str(number), "name": f"{kind} {number}", "tle": list(lines)})
    stop = np.datetime64(START_ISO.rstrip("Z")) + np.timedelta64(options.days, "D")
    scenario = {
        "from": START_ISO, "to": f"{stop}Z", "satellites": satellites,
        "stations": [random_station(rng, index) for index in range(options.stations)],
    }
    found = run_engine(scenario)
    worst = {"seconds": 0.0, "where": "", "elevation": 0.0, "short": 0}
    missing = extra = count = 0
    for one in satellites:
        satellite = Satrec.twoline2rv(*one["tle"])
        step = 2.0 if satellite.no_kozai > 2 * np.pi / 225 else 10.0
        grid = np.linspace(0, options.days * DAY_S, int(options.days * DAY_S / step) + 1)
        positions = earth_fixed(satellite, grid)
        for station in scenario["stations"]:
            view = View(satellite, station)
            wanted = stays(view, grid, positions)
            count += len(wanted)
            label = f"{one['name']} over {station['id']} ({station['latitudeDeg']}, mask of {len(station['mask'])})"
            result = match(view, wanted, found.get((one["id"], station["id"]), []), step, worst, label)
            missing, extra = missing + result[0], extra + result[1]
    print(f"seed {options.seed}: {count} passes, {missing} missing, {extra} extra, {worst['short']} too short for the grid")
    print(f"worst AOS or LOS {worst['seconds'] * 1000:.3f} ms ({worst['where']}), elevation {worst['elevation']:.5f} degrees")
    sys.exit(1 if missing or extra or worst["seconds"] > 0.005 else 0)


if __name__ == "__main__":
    main()
