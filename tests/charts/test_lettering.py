"""Words on a sheet: none over another, none off the sheet, off the lines where there is room."""

from __future__ import annotations

import numpy as np

from navcore.charts.lettering import Board, Lettering, boxes_meet, points_along

NOTHING = np.empty((0, 2))


def test_boxes_that_touch_are_found_and_those_that_do_not_are_not() -> None:
    level = Lettering("a", 0.0, 0.0, 10.0, 2.0).corners_mm()
    others = [
        Lettering("b", 9.0, 1.0, 10.0, 2.0),
        Lettering("c", 11.0, 0.0, 10.0, 2.0),
        Lettering("d", 5.0, -5.0, 20.0, 2.0, 90.0),
        Lettering("e", 9.0, 3.5, 10.0, 2.0, 45.0),
        Lettering("f", 12.0, 6.0, 20.0, 2.0, 170.0),
    ]
    met = boxes_meet(level, np.stack([other.corners_mm() for other in others]))
    assert met.tolist() == [True, False, True, False, False]


def test_fifty_names_in_a_cluster_never_stand_over_one_another_or_off_the_sheet() -> None:
    rng = np.random.default_rng(1)
    board = Board(180.0, 120.0, NOTHING)
    placed = [
        board.set_beside(f"{number} Waypoint", (20.0, 3.0), (float(x), float(y)))
        for number, (x, y) in enumerate(rng.normal((90.0, 60.0), 14.0, (50, 2)))
    ]
    found = [lettering for lettering in placed if lettering is not None]
    assert len(found) >= 40
    boxes = np.stack([lettering.corners_mm() for lettering in found])
    for index, box in enumerate(boxes):
        assert not np.any(boxes_meet(box, np.delete(boxes, index, axis=0)))
        assert box.min() >= 0.0
        assert box[:, 0].max() <= 180.0
        assert box[:, 1].max() <= 120.0


def test_words_that_stand_off_have_a_line_to_their_point() -> None:
    board = Board(100.0, 100.0, NOTHING)
    placed = [board.set_beside("ten words", (20.0, 3.0), (50.0, 50.0)) for _ in range(12)]
    leaders = [lettering.leader_mm for lettering in placed if lettering is not None and lettering.leader_mm]
    assert leaders
    assert all(leader[:2] == (50.0, 50.0) for leader in leaders)


def test_words_keep_off_a_line_where_there_is_room() -> None:
    line = np.array([[0.0, 50.0], [100.0, 50.0]])
    board = Board(100.0, 100.0, points_along([line]))
    placed = board.set_beside("name", (15.0, 3.0), (50.0, 50.0))
    assert placed is not None
    assert placed.y_mm > 50.4 or placed.y_mm + placed.height_mm < 49.6


def test_words_along_a_leg_lie_beside_it_and_are_read_from_below() -> None:
    line = np.array([[90.0, 80.0], [10.0, 20.0]])
    board = Board(100.0, 100.0, points_along([line]))
    placed = board.set_along("RL 233.1°T", (20.0, 3.0), line)
    assert placed is not None
    assert -90.0 <= placed.turn_deg <= 90.0
    across = np.array([-0.6, 0.8])
    off = (placed.corners_mm() - line[1]) @ across
    assert off.min() > 0.4 or off.max() < -0.4


def test_words_longer_than_their_leg_are_left_out() -> None:
    line = np.array([[10.0, 10.0], [20.0, 10.0]])
    assert Board(100.0, 100.0, NOTHING).set_along("too long", (30.0, 3.0), line) is None


def test_words_without_any_room_are_left_out() -> None:
    assert Board(10.0, 10.0, NOTHING).set_beside("far too long", (30.0, 3.0), (5.0, 5.0)) is None


def test_a_blocked_place_is_not_written_on() -> None:
    board = Board(100.0, 100.0, NOTHING)
    wall = np.array([[50.0, 0.0], [100.0, 0.0], [100.0, 100.0], [50.0, 100.0]])
    board.block(wall)
    placed = board.set_beside("name", (15.0, 3.0), (49.0, 50.0))
    assert placed is not None
    assert placed.corners_mm()[:, 0].max() < 50.0
