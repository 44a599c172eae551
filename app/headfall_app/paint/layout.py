"""Where everything stands: one level scale for section, staff and plot, one number of pixels a metre."""

from __future__ import annotations

from dataclasses import dataclass

from headfall_app.paint.cut import BREAK_WIDTH, Across, shown_stretches
from headfall_app.paint.dimension_plan import COLUMN, ROW, DimensionPlan, plan_dimensions
from headfall_app.paint.fonts import text_width
from headfall_app.paint.level_axis import BREAK_HEIGHT, drawn_depth, left_out
from headfall_app.paint.outline_geometry import extent
from headfall_app.paint.scene import Scene
from headfall_app.paint.scene_levels import LevelMark
from headfall_app.paint.ticks import TimeAxis, time_axis

TOP_ZONE = 54.0
PLOT_GAP = 44.0
AXIS_ZONE = 34.0
LEAST_FLOW = 56.0
SLIDER = 80.0
STAFF = 11.0
LEAD, FLAG, TAIL = 16.0, 104.0, 12.0
WIDEST_FLAG = 186.0
STAFF_NUMBERS = 50.0
RIGHT_EDGE = 12.0
TAILWATER_ROOM, PIPE_ROOM, WEIR_ROOM = 74.0, 96.0, 40.0
PIPE_STEP = 30.0
"""How far apart pipes through the wall turn down."""
RECEIVER_GAP, RECEIVER_LEAST, RECEIVER_EDGE = 66.0, 76.0, 8.0
JET = 50.0
STANDPIPE_PLACE = 0.86
"""Where across its vessel a standpipe stands."""
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
    flag: float = FLAG
    """How wide the flags are."""
    lowest: float = 0.0
    """The lowest level that is drawn [m]."""
    left_out: tuple[float, float] | None = None
    """The levels (low, high) below the vessel that are left out, see ``level_axis``."""
    receiver_gap: float = RECEIVER_GAP
    """Room between the vessel and a receiving one."""
    origin: float = 0.0
    """The upper end of the page's picture; nil on the screen."""

    @property
    def top(self) -> float:
        """The row of the vessel's top."""
        return self.y(self.vessel_height)

    def y(self, level: float) -> float:
        """Return the height on the page of a level [m]; below what is left out it stands that much higher."""
        if self.left_out is not None and level < self.left_out[1]:
            low, high = self.left_out
            return self.bottom - (min(level - low, 0.0) + high) * self.pixels_per_metre + BREAK_HEIGHT
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
        return self.flags_left + self.flag

    @property
    def dimension_rows(self) -> list[float]:
        """The heights of the dimension lines below the vessel."""
        return [self.bottom + self.first_row + ROW * index for index in range(self.plan.below_count)]


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
    downs = sum(outlet.facing == "down" or outlet.is_pipe for outlet in scene.outlets)
    first_row = 66.0 if downs else 24.0
    if downs > 2:
        first_row = 96.0
    rows = plan.below_count
    if rows == 0 and (scene.stands or scene.farthest_reach > 0.0):
        rows = 1
    under = first_row + (rows - 1) * ROW + 12.0 if rows else (JET + 12.0 if downs else 12.0)
    under += _room_for_words(scene)
    left = 32.0 + 26.0 + COLUMN * (plan.column_count - 1) if plan.column_count else 30.0
    return _Room(plan, TOP_ZONE + ROW * plan.above_count, left, first_row, under)


def _room_for_words(scene: Scene) -> float:
    """Return the room under what is outside for its level and for a pipe's words, over what a dimension row has."""
    if scene.receiver is not None:
        return 18.0
    piped = [outlet for outlet in scene.outlets if outlet.is_pipe]
    more = 17.0 if any(outlet.more_text for outlet in piped) else 0.0
    more += 34.0 * max(sum(outlet.facing == "down" or outlet.is_pipe for outlet in scene.outlets) - 2, 0)
    if any(outlet.tail is not None for outlet in piped):
        return more + 34.0
    return more + (22.0 if any(outlet.tail is not None for outlet in scene.outlets) else 0.0)


def _band_limit(height: float, room: _Room, scene: Scene) -> tuple[float, bool]:
    """Return the tallest level band and whether the flow plot has room under it.

    The vessel takes a share of all that is drawn: a pipe that falls needs room below it.
    """
    depth, gap = drawn_depth(scene)
    beside_slider = (height - room.top - room.under - SLIDER - 14.0 - gap) * scene.height / (scene.height + depth)
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
    places = [one.across for one in scene.outlets if one.facing in ("down", "pipe")]
    if any(one.facing == "standpipe" for one in scene.outlets):
        places.append(whole[0] + STANDPIPE_PLACE * (whole[1] - whole[0]))
    shown = limit / scale - reach - BREAK_WIDTH / scale
    stretches = shown_stretches(whole, uniform, places, shown, 46.0 / scale)
    if len(stretches) > 2:
        stretches = shown_stretches(whole, uniform, places, shown - BREAK_WIDTH / scale, 46.0 / scale)
    return stretches, True


def _column(width: float, flag: float) -> float:
    """Return how wide the section's column may be: half the stage, less where the plot would starve, more beside a
    plot that has plenty."""
    rest = width - (STAFF + LEAD + flag + TAIL) - RIGHT_EDGE
    wide = max(COLUMN_SHARE * width, min(WIDEST_SHARE * width, rest - AMPLE_PLOT))
    return max(min(wide, rest - LEAST_PLOT), LEAST_COLUMN)


def flag_width(scene: Scene) -> float:
    """Return how wide the flags are: as always, wider where a level is told in two forms."""
    seconds = [mark for mark in scene.marks if mark.second]
    needed = [31.0 + sum(text_width(*text) for text in _flag_texts(mark)) for mark in seconds]
    return min(max([FLAG, *needed]), WIDEST_FLAG)


def _flag_texts(mark: LevelMark) -> tuple[tuple[str, int, int], ...]:
    return (mark.name, 12, 400), (mark.second, 11, 400), (mark.text, 12, 600)


def receiver_gap(scene: Scene) -> float:
    """Return the room [px] between the vessel and a receiving one: for a pipe, or for an opening's words."""
    outlet = scene.outlets[0]
    if outlet.is_pipe or outlet.facing == "down":
        return RECEIVER_GAP
    # Not the flow of the moment: the picture must not shift with the time.
    flow = f"{scene.display.number(88.8 * scene.display.factor('flow'), 'flow')} {scene.display.unit('flow')} out"
    return max(RECEIVER_GAP, 30.0 + max(text_width(text, 12) for text in (outlet.size_text, flow)))


def aside(scene: Scene) -> float:
    """Return the room [px] kept to the right of the vessel at least for what its outlets discharge into."""
    if scene.receiver is not None:
        return receiver_gap(scene) + RECEIVER_LEAST + RECEIVER_EDGE
    rooms, step = [0.0], 0.0
    for outlet in scene.outlets:
        if outlet.facing == "weir":
            rooms.append(min(max(WEIR_ROOM, text_width(outlet.size_text, 12) + 10.0), 140.0))
        if outlet.facing == "pipe" and outlet.by_wall:
            rooms.append(PIPE_ROOM + step)
            step += PIPE_STEP
        if outlet.tail is not None and not outlet.is_pipe:
            rooms.append(TAILWATER_ROOM)
    return max(rooms)


def room_aside(scene: Scene, scale: float, spare: float) -> float:
    """Return the room to the right; a receiving vessel takes what is spare until it is as wide as it is true."""
    least = aside(scene)
    if scene.receiver is None:
        return least
    left, right = extent(scene.receiver.outline)
    return least + min(max((right - left) * scale - RECEIVER_LEAST, 0.0), max(spare, 0.0))


def arrange(width: float, height: float, scene: Scene, show: str = "auto") -> Frame:
    """Return the geometry of the stage; ``show`` is ``auto`` or ``whole`` (never cut)."""
    room = room_about(scene)
    flag = flag_width(scene)
    band, with_flow = _band_limit(height, room, scene)
    reach = scene.farthest_reach
    column = _column(width, flag)
    limit = max(column - room.left - STAFF_NUMBERS - aside(scene), 80.0)
    stretches, can_be_cut = _stretches(scene, limit, band, show)
    shown = sum(end - start for start, end in stretches) + reach
    breaks = (len(stretches) - 1) * BREAK_WIDTH
    scale = min(band / scene.height, (limit - breaks) / shown)
    drawn = shown * scale + breaks
    beside = room_aside(scene, scale, limit - drawn)
    taken = max(drawn + beside, LEAST_COLUMN - room.left - STAFF_NUMBERS)
    left = room.left + 0.5 * (taken - drawn - beside)
    bottom = float(round(room.top + scene.height * scale))
    staff_left = float(round(room.left + taken + STAFF_NUMBERS))
    plot_left = staff_left + STAFF + LEAD + flag + TAIL
    plot = (plot_left, bottom - scene.height * scale, max(width - RIGHT_EDGE, plot_left + 40.0), bottom)
    flow = None
    if with_flow:
        tall = max(min(height - bottom - PLOT_GAP - AXIS_ZONE, max(scene.height * scale, LEAST_FLOW)), LEAST_FLOW)
        flow = (plot[0], bottom + PLOT_GAP, plot[2], float(round(bottom + PLOT_GAP + tall)))
    axis_bottom = (flow[3] if flow else bottom) + AXIS_ZONE
    depth, gap = drawn_depth(scene)
    under = room.under + depth * scale + gap
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
        needed=max(axis_bottom, bottom + under + 14.0 + SLIDER),
        under=under,
        flag=flag,
        lowest=scene.lowest,
        left_out=left_out(scene),
        receiver_gap=receiver_gap(scene),
    )
