"""Drums on a slope against values worked out apart from this program.

The strapping table of the drum at Quillhaven (2.000 m by 5.600 m, crown 1.0·D, knuckle 0.1·D, slope 1 in 100) was
computed elsewhere by slices: levels above the invert 0.30 m from the low tangent line, volumes printed to 1e-5 m³. Its
rows stand up to 2e-5 m³ above slices taken finely, so it is held to 3e-5 m³. The rest are closed forms.
"""

from __future__ import annotations

import math

import numpy as np
import pytest

from headfall.vessel import ends
from headfall.vessel.drum import Drum
from headfall.vessel.inclined_drum import InclinedDrum

STRAPPING = {
    0.0: 0.00004,
    0.1: 0.22639,
    0.2: 0.79213,
    0.3: 1.54496,
    0.4: 2.43353,
    0.5: 3.42702,
    0.6: 4.50259,
    0.7: 5.64144,
    0.8: 6.82709,
    0.9: 8.04440,
    1.0: 9.27908,
    1.1: 10.51720,
    1.2: 11.74493,
    1.3: 12.94820,
    1.4: 14.11236,
    1.5: 15.22169,
    1.6: 16.25868,
    1.7: 17.20282,
    1.8: 18.02802,
    1.9: 18.69600,
    2.0: 19.12619,
}
INCH = 0.0254
GALLON = 231 * INCH**3


@pytest.fixture(scope="module")
def quillhaven() -> InclinedDrum:
    """The drum of the strapping table."""
    head = ends.torispherical(2.0, 1.0, 0.1)
    return InclinedDrum(2.0, 5.6, head, head, 0.056)


def test_the_strapping_table(quillhaven: InclinedDrum) -> None:
    levels = np.array(list(STRAPPING)) + quillhaven.invert_at(0.30)
    assert quillhaven.volume(levels) == pytest.approx(np.array(list(STRAPPING.values())), rel=0, abs=3e-5)


def test_levels_read_back_from_the_strapping_table(quillhaven: InclinedDrum) -> None:
    volumes = np.array(list(STRAPPING.values())[1:])
    levels = quillhaven.level(volumes) - quillhaven.invert_at(0.30)
    assert levels == pytest.approx(np.array(list(STRAPPING)[1:]), rel=0, abs=1e-5)


def test_the_whole_drum_and_four_fifths_of_it(quillhaven: InclinedDrum) -> None:
    assert quillhaven.capacity == pytest.approx(19.176, abs=5e-4)
    level = float(quillhaven.level(np.asarray(0.8 * quillhaven.capacity))) - quillhaven.invert_at(0.30)
    assert level == pytest.approx(1.511, abs=5e-4)


def test_a_level_drum_would_hold_half_as_much_again_at_the_bottom(quillhaven: InclinedDrum) -> None:
    drum = Drum(2.0, 5.6, quillhaven.low_head, quillhaven.high_head)
    assert drum.volume(np.asarray(0.1)) == pytest.approx(0.342, abs=5e-4)
    assert quillhaven.volume(np.asarray(0.1 + quillhaven.invert_at(0.30))) == pytest.approx(0.226, abs=5e-4)


def test_the_hoof_of_archimedes() -> None:
    # V = (2/3)·R²·H: the surface passes through the axis at the low end and meets the bottom line. From memory.
    slope = math.radians(10)
    drum = InclinedDrum(2.0, 10.0, ends.flat(), ends.flat(), 10.0 * math.sin(slope))
    volume = drum.volume(np.asarray(math.cos(slope)))
    assert volume == pytest.approx(3.7808545464118, rel=1e-12, abs=0)
    assert volume == pytest.approx(2 / (3 * math.tan(slope)), rel=1e-12, abs=0)


@pytest.mark.parametrize("share", [1e-6, 0.01, 0.5, 1.0])
def test_a_film_in_a_hemispherical_head_is_a_cap_of_a_sphere(share: float) -> None:
    # Below the shell's lowest point only the sphere is wet: V = π·h²·(3R − h)/3.
    radius, slope = 1.5, math.radians(40)
    head = ends.hemispherical(2 * radius)
    drum = InclinedDrum(2 * radius, 4.0, head, ends.flat(), 4.0 * math.sin(slope))
    level = share * radius * (1 - math.cos(slope))
    assert level <= drum.invert_at(0.0) * (1 + 1e-12)
    assert drum.volume(np.asarray(level)) == pytest.approx(math.pi * level**2 * (radius - level / 3), rel=1e-12, abs=0)
    assert drum.plan_area(np.asarray(level)) == pytest.approx(math.pi * level * (2 * radius - level), rel=1e-12, abs=0)


def test_the_point_of_a_long_cone_holds_a_skew_elliptic_cone() -> None:
    # The walls fall from the axis's slope b at the half angle a: at h above the point the cut is an ellipse of the
    # axes 2p = h·(cot(b − a) − cot(b + a)) and 2q; V = A·h/3.
    slope, depth, radius, level = math.radians(35), 5.0, 1.0, 0.3
    half_angle = math.atan(radius / depth)
    drum = InclinedDrum(2 * radius, 6.0, ends.cone(depth), ends.flat(), 6.0 * math.sin(slope))
    p = level / 2 * (1 / math.tan(slope - half_angle) - 1 / math.tan(slope + half_angle))
    middle = level / 2 * (1 / math.tan(slope - half_angle) + 1 / math.tan(slope + half_angle))
    along, off = (
        middle * math.cos(slope) + level * math.sin(slope),
        level * math.cos(slope) - middle * math.sin(slope),
    )
    q = math.sqrt((along * radius / depth) ** 2 - off**2)
    assert drum.plan_area(np.asarray(level)) == pytest.approx(math.pi * p * q, rel=1e-11, abs=0)
    assert drum.volume(np.asarray(level)) == pytest.approx(math.pi * p * q * level / 3, rel=1e-11, abs=0)


def test_a_plane_through_the_middle_halves_a_drum_with_like_heads() -> None:
    head = ends.torispherical(2.0, 0.8, 0.154)
    drum = InclinedDrum(2.0, 3.0, head, head, 1.9)
    assert drum.volume(np.asarray(drum.height / 2)) == pytest.approx(drum.capacity / 2, rel=1e-12, abs=0)


@pytest.mark.parametrize(
    ("head", "gallons"),
    [
        # D. Jones's drum of 108 in by 156 in, 36 in deep, as carried by the docstrings of fluids 1.3.1 (read).
        (ends.cone(42 * INCH), 2041.1923581273443),
        (ends.ellipsoidal(108 * INCH, ratio=108 / 84), 2380.9565415578145),
        (ends.torispherical(108 * INCH, 1.0, 0.06), 2028.62667),
    ],
)
def test_drums_in_gallons_on_a_slope_too_small_to_matter(head: ends.End, gallons: float) -> None:
    fall = 1e-9 * 156 * INCH
    drum = InclinedDrum(108 * INCH, 156 * INCH, head, head, fall)
    assert drum.volume(np.asarray(36 * INCH + fall / 2)) / GALLON == pytest.approx(gallons, rel=1e-8, abs=0)
