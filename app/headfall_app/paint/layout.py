"""Where everything stands: one level scale for section, staff and plot, one number of pixels a metre."""

from __future__ import annotations

from dataclasses import dataclass

from headfall_app.paint.cut import BREAK_WIDTH, Across, shown_stretches
from headfall_app.paint.dimension_plan import COLUMN, ROW, DimensionPlan, plan_dimensions
from headfall_app.paint.outline_geometry import extent, outlet_across
from headfall_app.paint.scene import Scene
from headfall_app.paint.ticks import TimeAxis, time_axis

TOP_ZONE = 54.0
PLOT_GAP = 44.0
AXIS_ZONE = 34.0
LEAST_FLOW = 56.0
SLIDER = 80.0
STAFF = 11.0
LEAD, FLAG, TAIL = 16.0, 104.0, 12.0
STAFF_NUMBERS = 50.0
RIGHT_EDGE = 12.0
RECEIVER_ROOM, TAILWATER_ROOM, WEIR_ROOM = 140.0, 74.0, 40.0
JET = 50.0
FLOW_SHARE = 0.39
# A vessel that would fill less of the band than this, and less than so many pixels, is drawn cut.
CUT_SHARE, CUT_HEIGHT = 0.7, 320.0
LEAST_COLUMN, COLUMN_SHARE, WIDEST_SHARE = 300.0, 0.53, 0.62
LEAST_PLOT, AMPLE_PLOT = 250.0, 760.0


@dataclass(frozen=True, slots=True)
class Frame:
    """The page's geometry [logical px]. ``plot`` and ``flow`` are (left, top, right, bottom), None where left out."""

    width: float
    height: float
    pixels_per_metre: float
    bottom: float
    vessel_height: float
    across: Across
    plan: DimensionPlan
    lines_left: float
    staff_left: float
    plot: tuple[float, float, float, float] | None
    flow: tuple[float, float, float, float] | None
    times: TimeAxis
    first_row: float
    can_be_cut: bool
    needed: float
    under: float = 0.0
    origin: float = 0.0
    """The upper end of the page's picture; nil on the screen."""

    @property
    def top(self) -> float:
        """The row of the vessel's top."""
        return self.y(self.vessel_height)

    def y(self, level: float) -> float:
        """Return the height on the page of a level [m]."""
        return self.bottom - level * self.pixels_per_metre

    def row(self, level: float) -> int:
        """Return the whole pixel row of a level [m]: the same for section, staff and plot."""
        return round(self.y(level))

    def level(self, y: float) -> float:
        """Return the level [m] at a height on the page."""
        return (self.bottom - y) / self.pixels_per_metre

    def time_x(self, time: float) -> float:
        """Return where a time [s] stands in the plot."""
        left, _, right, _ = self.plot or (0.0, 0.0, 1.0, 0.0)
        return left + time / self.times.end * (right - left)

    def time(self, x: float) -> float:
        """Return the time [s] at a place of the plot."""
        left, _, right, _ = self.plot or (0.0, 0.0, 1.0, 0.0)
        return (x - left) / (right - left) * self.times.end

    @property
    def flags_left(self) -> float:
        """Left side of the flags."""
        return self.staff_left + STAFF + LEAD

    @property
    def flags_right(self) -> float:
        """Right side of the flags."""
        return self.flags_left + FLAG


@dataclass(frozen=True, slots=True)
class _Room:
    """What the section needs about the vessel [px]."""

    plan: DimensionPlan
    top: float
    left: float
    first_row: float
    under: float


def room_about(scene: Scene) -> _Room:
    """Return the room for dimension lines, jets and the stream about the vessel."""
    plan = plan_dimensions(scene)
    downs = sum(outlet.facing in ("down", "pipe", "standpipe") for outlet in scene.outlets)
    first_row = 66.0 if downs else 24.0
    if downs > 2:
        first_row = 96.0
    rows = plan.below_count
    if rows == 0 and (scene.stands or scene.farthest_reach > 0.0):
        rows = 1
    under = first_row + (rows - 1) * ROW + 12.0 if rows else (JET + 12.0 if downs else 12.0)
    left = 32.0 + 26.0 + COLUMN * (plan.column_count - 1) if plan.column_count else 30.0
    return _Room(plan, TOP_ZONE + ROW * plan.above_count, left, first_row, under)


def _band_limit(height: float, room: _Room, share: float) -> tuple[float, bool]:
    """Return the tallest level band and whether the flow plot has room under it.

    ``share`` is how much of all that is drawn the vessel takes: a pipe that falls needs room below it.
    """
    beside_slider = (height - room.top - room.under - SLIDER - 14.0) * share
    shared = height - room.top - PLOT_GAP - AXIS_ZONE
    with_flow = min(shared / (1.0 + FLOW_SHARE), shared - LEAST_FLOW)
    if with_flow < 130.0:
        return max(min(beside_slider, height - room.top - AXIS_ZONE), 60.0), False
    return max(min(beside_slider, with_flow), 60.0), True


def _stretches(scene: Scene, limit: float, band: float, show: str) -> tuple[tuple[tuple[float, float], ...], bool]:
    """Return the stretches of the vessel to draw and whether it is one that may be cut."""
    whole = extent(scene.outline)
    reach = scene.farthest_reach
    scale = min(band / scene.height, limit / (whole[1] - whole[0] + reach))
    tall = scale * scene.height
    uniform = scene.uniform
    if uniform is None or tall >= CUT_HEIGHT:
        return (whole,), False
    if show == "whole":
        # The page gives a flat picture less height; that must not take away the way back.
        return (whole,), True
    if tall >= CUT_SHARE * band:
        return (whole,), False
    scale = band / scene.height
    places = [outlet_across(scene.outline, one.station) for one in scene.outlets if one.facing in ("down", "pipe")]
    shown = limit / scale - reach - BREAK_WIDTH / scale
    stretches = shown_stretches(whole, uniform, places, shown, 46.0 / scale)
    if len(stretches) > 2:
        stretches = shown_stretches(whole, uniform, places, shown - BREAK_WIDTH / scale, 46.0 / scale)
    return stretches, True


def _column(width: float) -> float:
    """Return how wide the section's column may be: half the stage, less where the plot would starve, more beside a
    plot that has plenty."""
    rest = width - (STAFF + LEAD + FLAG + TAIL) - RIGHT_EDGE
    wide = max(COLUMN_SHARE * width, min(WIDEST_SHARE * width, rest - AMPLE_PLOT))
    return max(min(wide, rest - LEAST_PLOT), LEAST_COLUMN)


def _aside(scene: Scene) -> float:
    """Return the room [px] kept to the right of the vessel for what its outlets discharge into."""
    if scene.receiver is not None:
        return RECEIVER_ROOM
    beside = [outlet for outlet in scene.outlets if outlet.facing not in ("pipe", "standpipe")]
    if any(outlet.tail is not None for outlet in beside):
        return TAILWATER_ROOM
    return WEIR_ROOM if any(outlet.facing == "weir" for outlet in beside) else 0.0


def arrange(width: float, height: float, scene: Scene, show: str = "auto") -> Frame:
    """Return the geometry of the stage; ``show`` is ``auto`` or ``whole`` (never cut)."""
    room = room_about(scene)
    depth = -scene.lowest
    band, with_flow = _band_limit(height, room, scene.height / (scene.height + depth))
    reach = scene.farthest_reach
    column = _column(width)
    aside = _aside(scene)
    limit = max(column - room.left - STAFF_NUMBERS - aside, 80.0)
    stretches, can_be_cut = _stretches(scene, limit, band, show)
    shown = sum(end - start for start, end in stretches) + reach
    breaks = (len(stretches) - 1) * BREAK_WIDTH
    scale = min(band / scene.height, (limit - breaks) / shown)
    drawn = shown * scale + breaks
    taken = max(drawn + aside, LEAST_COLUMN - room.left - STAFF_NUMBERS)
    left = room.left + 0.5 * (taken - drawn - aside)
    bottom = float(round(room.top + scene.height * scale))
    staff_left = float(round(room.left + taken + STAFF_NUMBERS))
    plot_left = staff_left + STAFF + LEAD + FLAG + TAIL
    plot = (plot_left, bottom - scene.height * scale, max(width - RIGHT_EDGE, plot_left + 40.0), bottom)
    flow = None
    if with_flow:
        tall = max(min(height - bottom - PLOT_GAP - AXIS_ZONE, max(scene.height * scale, LEAST_FLOW)), LEAST_FLOW)
        flow = (plot[0], bottom + PLOT_GAP, plot[2], float(round(bottom + PLOT_GAP + tall)))
    axis_bottom = (flow[3] if flow else bottom) + AXIS_ZONE
    return Frame(
        width=width,
        height=height,
        pixels_per_metre=scale,
        bottom=bottom,
        vessel_height=scene.height,
        across=Across(stretches, left, scale),
        plan=room.plan,
        lines_left=left - 18.0,
        staff_left=staff_left,
        plot=plot,
        flow=flow,
        times=time_axis(scene.longest, plot[2] - plot[0]),
        first_row=room.first_row,
        can_be_cut=can_be_cut,
        needed=max(axis_bottom, bottom + depth * scale + room.under + 14.0 + SLIDER),
        under=room.under + depth * scale,
    )
