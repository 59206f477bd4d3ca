"""Make coast_gshhg_i.npz from GMT's own copy of the shoreline; needs Debian's packages gmt and gmt-gshhg-low.

Run `python navcore/charts/data/make_coast.py`: it writes the file beside itself, the same bytes from the same data.

The shoreline is GSHHG (P. Wessel and W. H. F. Smith, A global, self-consistent, hierarchical, high-resolution shoreline
database, J. Geophys. Res. 101 (1996) 8741-8743), intermediate resolution, level 1: land against sea. GMT gives it cut
along its 1° bins: right for distances, crossings and drawing, not as closed rings.

The file holds `d`, int32 (2, n): longitude and latitude in units of 1e-4 degree, each the difference from the one
before along one running list, the first from 0; and `lens`, int32: how many points each piece has.
"""

from __future__ import annotations

import subprocess
from pathlib import Path
from tempfile import TemporaryDirectory

import numpy as np

UNITS_PER_DEGREE = 1e4
TARGET = Path(__file__).with_name("coast_gshhg_i.npz")


def dumped_shoreline() -> str:
    """Return GMT's dump: a line that begins with > before each piece, then a longitude and latitude a line."""
    command = ["gmt", "coast", "-R0/360/-90/90", "-Di", "-W", "-M"]
    # GMT leaves a file of its history where it runs.
    with TemporaryDirectory() as folder:
        ran = subprocess.run(command, capture_output=True, text=True, check=True, cwd=folder)  # noqa: S603 a fixed command
    return ran.stdout


def pieces_of_level_1(dump: str) -> list[list[tuple[float, float]]]:
    """Return the pieces of the shore between land and sea, as longitudes and latitudes; lakes are left out."""
    pieces = []
    for block in dump.split(">")[1:]:
        heading, *lines = block.strip().splitlines()
        if heading.rsplit("Level", 1)[-1].strip() == "1":
            lon_lat = [(float(lon), float(lat)) for lon, lat in (line.split() for line in lines)]
            pieces.append(lon_lat)
    return pieces


def main() -> None:
    """Write the file."""
    pieces = pieces_of_level_1(dumped_shoreline())
    points = np.array([point for piece in pieces for point in piece])
    units = np.rint(points * UNITS_PER_DEGREE).astype(np.int32)
    differences = np.diff(units, axis=0, prepend=np.zeros((1, 2), dtype=np.int32)).T
    np.savez_compressed(TARGET, d=differences, lens=np.array([len(piece) for piece in pieces], dtype=np.int32))


if __name__ == "__main__":
    main()
