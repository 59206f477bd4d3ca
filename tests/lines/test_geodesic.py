"""The array geodesic against geographiclib's, on the hard cases and on figures that no plan names."""

from __future__ import annotations

import numpy as np
import pytest
from geographiclib.geodesic import Geodesic

from navcore.earth.figure import FIGURES, SPHERE, WGS_84, Figure
from navcore.errors import RangeError
from navcore.lines.geodesic_direct import line
from navcore.lines.geodesic_inverse import inverse

METRES_15_NM = 15e-9
OTHERS = [Figure("flattened by 1/50", 6.4e6, 50.0), Figure("drawn out by 1/50", 6.4e6, -50.0)]
ALL = [*FIGURES.values(), *OTHERS]


def hard_pairs(count: int) -> np.ndarray[tuple[int, int], np.dtype[np.float64]]:
    """Return pairs of every difficult kind, shape (4, n)."""
    generator = np.random.default_rng(43)
    lat_deg, lon_deg = generator.uniform(-89.0, 89.0, count), generator.uniform(-170.0, 170.0, count)
    tiny = 10.0 ** generator.uniform(-12.0, 0.3, (2, count)) * generator.choice([-1.0, 1.0], (2, count))
    anywhere = generator.uniform(-180.0, 180.0, count)
    opposite = (lon_deg + tiny[1]) % 360.0 - 180.0
    kinds = [
        (lat_deg, lon_deg, generator.uniform(-90.0, 90.0, count), anywhere),
        (lat_deg, lon_deg, np.clip(-lat_deg + tiny[0], -90.0, 90.0), opposite),
        (lat_deg, lon_deg, -lat_deg, (lon_deg + generator.uniform(-2.0, 2.0, count)) % 360.0 - 180.0),
        (tiny[0], lon_deg, tiny[1], opposite),
        (0.0 * lat_deg, lon_deg, 0.0 * lat_deg, opposite),
        (lat_deg, lon_deg, np.clip(lat_deg + 1e-3 * tiny[0], -90.0, 90.0), lon_deg + 1e-3 * tiny[1]),
        (lat_deg, lon_deg, generator.uniform(-90.0, 90.0, count), lon_deg + 1e-6 * tiny[1]),
        (90.0 - abs(tiny[0]), lon_deg, -90.0 + abs(tiny[1]), anywhere),
        (90.0 - abs(tiny[0]), lon_deg, 90.0 - abs(tiny[1]), anywhere),
    ]
    return np.concatenate([np.array(kind) for kind in kinds], axis=1)


@pytest.mark.parametrize("figure", ALL, ids=lambda figure: figure.name)
def test_distances_and_courses_are_geographiclibs(figure: Figure) -> None:
    pairs = hard_pairs(60)
    ours = inverse(pairs[0], pairs[1], pairs[2], pairs[3], figure)
    theirs = Geodesic(figure.equatorial_radius_m, figure.flattening)
    found = [theirs.Inverse(*pair) for pair in pairs.T.tolist()]
    distance_m = np.array([one["s12"] for one in found])
    # The C++ reference is matched to 15 nm in tests/published; here both are Python, each with its own rounding.
    assert np.max(abs(ours.distance_m - distance_m)) <= 2.0 * METRES_15_NM
    allowed_deg = np.maximum(1e-7, np.degrees(10e-9 / np.maximum(distance_m, 1e-9)))
    only = _has_one_answer(pairs)
    for mine_deg, key in ((ours.azimuth1_deg, "azi1"), (ours.azimuth2_deg, "azi2")):
        off_deg = abs((mine_deg - np.array([one[key] for one in found]) + 180.0) % 360.0 - 180.0)
        assert np.all((off_deg <= allowed_deg)[only])


def _has_one_answer(
    pairs: np.ndarray[tuple[int, int], np.dtype[np.float64]],
) -> np.ndarray[tuple[int], np.dtype[np.bool_]]:
    """Leave out what a convention decides: mirrored latitudes nearly half-way round, and points at a pole."""
    lat1_deg, lon1_deg, lat2_deg, lon2_deg = pairs
    round_deg = abs((lon2_deg - lon1_deg) % 360.0 - 180.0)
    return ~((abs(lat1_deg + lat2_deg) < 1e-9) & (round_deg < 4.0)) & ~(
        (abs(lat1_deg + lat2_deg) < 4.0) & (round_deg < 1e-9)
    )


@pytest.mark.parametrize("figure", ALL, ids=lambda figure: figure.name)
def test_a_line_from_the_inverse_arrives(figure: Figure) -> None:
    lat1_deg, lon1_deg, lat2_deg, lon2_deg = hard_pairs(200)
    found = inverse(lat1_deg, lon1_deg, lat2_deg, lon2_deg, figure)
    reached = line(lat1_deg, lon1_deg, found.azimuth1_deg, figure).at_distance(found.distance_m)
    missed = inverse(reached.lat_deg, reached.lon_deg, lat2_deg, lon2_deg, figure).distance_m
    # A direction kept to a double turns a line of 10,000 km by 2 nm; ends, courses and lengths add theirs.
    assert np.max(missed) <= 5.0 * METRES_15_NM


@pytest.mark.parametrize("figure", [WGS_84, SPHERE, *OTHERS], ids=lambda figure: figure.name)
def test_points_at_distances_and_arcs_are_geographiclibs(figure: Figure) -> None:
    generator = np.random.default_rng(7)
    lat_deg, lon_deg, azimuth_deg = (
        generator.uniform(low, high, 100) for low, high in ((-90, 90), (-180, 180), (0, 360))
    )
    distance_m, arc_deg = generator.uniform(-2e7, 2e7, 100), generator.uniform(-180.0, 180.0, 100)
    lines = line(lat_deg, lon_deg, azimuth_deg, figure)
    by_distance, by_arc = lines.at_distance(distance_m), lines.at_arc(arc_deg)
    theirs = Geodesic(figure.equatorial_radius_m, figure.flattening)
    for index, start in enumerate(zip(lat_deg, lon_deg, azimuth_deg, strict=True)):
        reference = theirs.Line(*map(float, start))
        for point, other in (
            (by_distance, reference.Position(float(distance_m[index]))),
            (by_arc, reference.ArcPosition(float(arc_deg[index]))),
        ):
            apart = theirs.Inverse(
                float(point.lat_deg[index]), float(point.lon_deg[index]), other["lat2"], other["lon2"]
            )
            assert apart["s12"] <= METRES_15_NM
            assert point.distance_m[index] == pytest.approx(other["s12"], abs=METRES_15_NM)


def test_a_single_pair_and_a_long_list_agree_to_the_bit() -> None:
    pairs = hard_pairs(1200)
    together = inverse(pairs[0], pairs[1], pairs[2], pairs[3], WGS_84)
    for index in (0, 1234, 4321, 9999):
        lat1_deg, lon1_deg, lat2_deg, lon2_deg = pairs[:, index].tolist()
        alone = inverse(lat1_deg, lon1_deg, lat2_deg, lon2_deg, WGS_84)
        assert [part.ndim for part in map(np.asarray, alone)] == [0, 0, 0, 0]
        assert [float(part) for part in alone] == pytest.approx([float(part[index]) for part in together], rel=1e-15)


def test_shapes_broadcast() -> None:
    found = inverse([[10.0], [20.0]], 0.0, [30.0, 40.0, 50.0], 5.0, WGS_84)
    assert found.distance_m.shape == (2, 3)
    assert line([10.0, 20.0], 0.0, 45.0, WGS_84).at_distance([[0.0], [1e6]]).lat_deg.shape == (2, 2)


@pytest.mark.parametrize("bad", [(91.0, 0.0, 0.0, 0.0), (0.0, np.inf, 0.0, 0.0), (0.0, 0.0, np.nan, 0.0)])
def test_what_is_no_position_is_refused(bad: tuple[float, float, float, float]) -> None:
    with pytest.raises(RangeError):
        inverse(*bad, WGS_84)


def test_the_papers_inverse_example() -> None:
    """Karney (2013), Table 3: WGS 84, φ1 = -30.12345°, φ2 = -30.12344°, λ12 = 0.00005° (values from memory)."""
    found = inverse(-30.12345, 0.0, -30.12344, 0.00005, WGS_84)
    assert found.azimuth1_deg == pytest.approx(77.04353354237, abs=5e-9)
    assert found.azimuth2_deg == pytest.approx(77.04350844913, abs=5e-9)
    assert found.distance_m == pytest.approx(4.944208, abs=5e-7)


def test_the_papers_direct_example() -> None:
    """Karney (2013), Table 2: WGS 84, φ1 = 40°, α1 = 30°, s12 = 10,000 km (values from memory)."""
    reached = line(40.0, 0.0, 30.0, WGS_84).at_distance(10_000_000.0)
    assert reached.lat_deg == pytest.approx(41.79331020506, abs=5e-12)
    assert reached.lon_deg == pytest.approx(137.84490004377, abs=5e-12)
    assert reached.azimuth_deg == pytest.approx(149.09016931807, abs=5e-12)


def test_the_papers_antipodal_example() -> None:
    """Karney (2013), Table 4: WGS 84, φ1 = -30°, φ2 = 29.9°, λ12 = 179.8° (values from memory)."""
    found = inverse(-30.0, 0.0, 29.9, 179.8, WGS_84)
    assert found.azimuth1_deg == pytest.approx(161.89052473633, abs=5e-11)
    assert found.azimuth2_deg == pytest.approx(18.09073724574, abs=5e-11)
    assert found.distance_m == pytest.approx(19_989_832.827610, abs=5e-7)
