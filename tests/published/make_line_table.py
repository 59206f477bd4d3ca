"""Write line_table.csv: legs of every awkward kind, solved by GeodSolve and RhumbSolve 2.1.2 of GeographicLib.

Run it where those two programs are installed: python tests/published/make_line_table.py

An empty cell is a figure that the programs leave to convention or can't say: courses of two equally short lines,
courses at a pole, and rhumb lines that end within 10 m of a pole (RhumbSolve before 2.2 puts a pole a hair off itself).
"""

from __future__ import annotations

import csv
import subprocess
from dataclasses import dataclass
from pathlib import Path

import numpy as np

from navcore.earth.figure import FIGURES, WGS_84, Figure

TABLE = Path(__file__).with_name("line_table.csv")
COLUMNS = (
    "kind",
    "figure",
    "lat1_deg",
    "lon1_deg",
    "lat2_deg",
    "lon2_deg",
    "gc_distance_m",
    "gc_initial_course_deg",
    "gc_final_course_deg",
    "rl_course_deg",
    "rl_distance_m",
)
LAST_METRES_DEG = 90.0 - 9e-5

Point = tuple[float, float]


@dataclass(frozen=True, slots=True)
class Leg:
    """Two ends on a figure, and what makes the leg awkward."""

    kind: str
    figure: Figure
    start: Point
    end: Point


class Maker:
    """Makes legs of each kind from one seed."""

    def __init__(self, seed: int) -> None:
        self.random = np.random.default_rng(seed)

    def between(self, low: float, high: float) -> float:
        return float(self.random.uniform(low, high))

    def power(self, low: float, high: float) -> float:
        """A number of either sign whose size is 10 to a power between these."""
        return float(self.random.choice([-1.0, 1.0])) * float(10.0 ** self.between(low, high))

    def anywhere(self) -> Point:
        return float(np.degrees(np.arcsin(self.between(-1.0, 1.0)))), self.between(-180.0, 180.0)

    def random_leg(self) -> tuple[Point, Point]:
        return self.anywhere(), self.anywhere()

    def across_180(self) -> tuple[Point, Point]:
        ends = (self.anywhere()[0], self.between(150.0, 180.0)), (self.anywhere()[0], self.between(-180.0, -150.0))
        return ends if self.random.random() < 0.5 else (ends[1], ends[0])

    def nearly_parallel(self) -> tuple[Point, Point]:
        start, lon2 = self.anywhere(), self.between(-180.0, 180.0)
        return start, (float(np.clip(start[0] + self.power(-12.0, -1.0), -89.9, 89.9)), lon2)

    def on_equator(self) -> tuple[Point, Point]:
        return (0.0, self.between(-180.0, 180.0)), (0.0, self.between(-180.0, 180.0))

    def on_meridian(self) -> tuple[Point, Point]:
        start = self.anywhere()[0], float(self.random.integers(-180, 0))
        return start, (self.anywhere()[0], start[1] + float(self.random.choice([0.0, 0.0, 180.0])))

    def polar(self) -> tuple[Point, Point]:
        pole = float(self.random.choice([-1.0, 1.0]))
        start = pole * (90.0 - 10.0 ** self.between(-4.0, 0.7)), self.between(-180.0, 180.0)
        other = self.anywhere() if self.random.random() < 0.5 else (pole * self.between(80.0, 89.9), self.anywhere()[1])
        return (start, other) if self.random.random() < 0.5 else (other, start)

    def at_pole(self) -> tuple[Point, Point]:
        pole, other = (float(self.random.choice([-90.0, 90.0])), self.between(-180.0, 180.0)), self.anywhere()
        return (pole, other) if self.random.random() < 0.5 else (other, pole)

    def nearly_antipodal(self) -> tuple[Point, Point]:
        start = self.anywhere()
        lat2 = float(np.clip(-start[0] + self.power(-6.0, 0.0), -89.9, 89.9))
        turned = start[1] + 180.0 - abs(self.power(-6.0, 0.0))
        return start, (lat2, turned - 360.0 if turned >= 180.0 else turned)

    def short(self) -> tuple[Point, Point]:
        start = float(self.between(-85.0, 85.0)), self.between(-179.0, 179.0)
        metres, course = 10.0 ** self.between(0.0, 3.0), self.between(0.0, 2.0 * np.pi)
        north, east = metres / 111e3 * np.cos(course), metres / 111e3 * np.sin(course)
        return start, (start[0] + float(north), start[1] + float(east / np.cos(np.radians(start[0]))))

    def legs(self, times: int = 1) -> list[Leg]:
        """The kinds in the numbers that the table holds, or so many times as many."""
        kinds = {
            "random": (self.random_leg, 150),
            "across 180": (self.across_180, 60),
            "nearly parallel": (self.nearly_parallel, 100),
            "on the equator": (self.on_equator, 25),
            "on a meridian": (self.on_meridian, 40),
            "polar": (self.polar, 60),
            "at a pole": (self.at_pole, 15),
            "nearly antipodal": (self.nearly_antipodal, 60),
            "short": (self.short, 80),
        }
        made = [Leg(kind, WGS_84, *make()) for kind, (make, number) in kinds.items() for _ in range(number * times)]
        others = [figure for figure in FIGURES.values() if figure is not WGS_84]
        any_kind = (self.random_leg, self.nearly_parallel, self.polar, self.short)
        made += [
            Leg("other figure", figure, *any_kind[number % 4]()) for figure in others for number in range(16 * times)
        ]
        return made


def _run(program: str, figure: Figure, legs: list[Leg]) -> list[list[str]]:
    lines = "\n".join(" ".join(map(repr, (*leg.start, *leg.end))) for leg in legs)
    ellipsoid = ["-e", repr(figure.equatorial_radius_m), repr(figure.flattening)]
    command = [program, "-i", "-p", "10", *ellipsoid]
    output = subprocess.run(command, input=lines, capture_output=True, text=True, check=True).stdout
    return [line.split() for line in output.splitlines()]


def _rows(figure: Figure, legs: list[Leg]) -> list[tuple[str, ...]]:
    rows = []
    for leg, geodesic, rhumb in zip(
        legs, _run("GeodSolve", figure, legs), _run("RhumbSolve", figure, legs), strict=True
    ):
        (lat1, lon1), (lat2, lon2) = leg.start, leg.end
        at_pole = max(abs(lat1), abs(lat2)) > LAST_METRES_DEG
        tie = lat1 == -lat2 and 179.0 < abs(lon2 - lon1) < 181.0
        courses = ("", "") if at_pole or tie else (geodesic[0], geodesic[1])
        rhumb_line = ("", "") if at_pole else (rhumb[0], rhumb[1])
        ends = tuple(map(repr, (lat1, lon1, lat2, lon2)))
        rows.append((leg.kind, figure.name, *ends, geodesic[2], *courses, *rhumb_line))
    return rows


def solved(legs: list[Leg]) -> list[tuple[str, ...]]:
    """Return a row of the table for each leg, figure by figure."""
    rows: list[tuple[str, ...]] = []
    for figure in FIGURES.values():
        rows += _rows(figure, [leg for leg in legs if leg.figure is figure])
    return rows


def main() -> None:
    """Write the table beside this file."""
    with TABLE.open("w", encoding="utf-8", newline="") as file:
        writer = csv.writer(file, lineterminator="\n")
        writer.writerow(COLUMNS)
        writer.writerows(solved(Maker(seed=20270304).legs()))


if __name__ == "__main__":
    main()
