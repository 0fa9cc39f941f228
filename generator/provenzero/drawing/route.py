"""The corridor between the two columns of a sheet: shared lines side by side, and what taps them from left and right."""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass

from provenzero.drawing.block import Block
from provenzero.drawing.canvas import Canvas
from provenzero.drawing.scene import Scene
from provenzero.drawing.symbols import ring
from provenzero.network.model import LineId

PITCH = 4.3
EDGE = 2.4
CLEAR = 1.6
_STEP = 0.5
_RING_AT = 2.2


@dataclass(frozen=True, slots=True, kw_only=True)
class Placed:
    """A block and where it stands: its left end and the height of its line [mm]."""

    block: Block
    x: float
    y: float


@dataclass(frozen=True, slots=True, kw_only=True)
class Corridor:
    """Where each shared line runs, and the two sides of the corridor [mm]."""

    left: float
    right: float
    at: Mapping[LineId, float]


def width_of(lines: Sequence[LineId]) -> float:
    """Width of a corridor for these lines [mm]."""
    return 2 * EDGE + max(len(lines) - 1, 0) * PITCH if lines else 2.0


def corridor(lines: Sequence[LineId], left: float) -> Corridor:
    """A corridor from its left side, the lines in order."""
    at = {line: left + EDGE + place * PITCH for place, line in enumerate(lines)}
    return Corridor(left=left, right=left + width_of(lines), at=at)


def stacked(blocks: Sequence[Block], x: float, top: float, gap: float) -> list[Placed]:
    """Blocks one under the other."""
    placed = []
    for block in blocks:
        placed.append(Placed(block=block, x=x, y=top + block.up))
        top += block.height + gap
    return placed


def raised(  # noqa: PLR0913, PLR0917 - a route is its ends and what it must clear
    blocks: Sequence[Block], x: float, bottom: float, gap: float, right: Sequence[Placed], way: Corridor
) -> list[Placed]:
    """Blocks one over the other from the foot, each so high that no line of it runs on a line of the right column."""
    taken = [
        (item.y + tap.offset, way.at[tap.line], tap.line)
        for item in right
        for tap in item.block.left
        if tap.line in way.at
    ]
    placed: list[Placed] = []
    for block in blocks:
        y = bottom - block.down
        while _clashes(block, y, taken, way):
            y -= _STEP
        placed.append(Placed(block=block, x=x, y=y))
        bottom = y - block.up - gap
    return placed


def _clashes(block: Block, y: float, taken: Sequence[tuple[float, float, LineId]], way: Corridor) -> bool:
    return any(
        abs(y + tap.offset - height) < CLEAR and way.at[tap.line] >= other and tap.line != line
        for tap in block.right
        if tap.line in way.at
        for height, other, line in taken
    )


def draw_corridor(  # noqa: PLR0913, PLR0917 - as above
    canvas: Canvas,
    scene: Scene,
    way: Corridor,
    left: Sequence[Placed],
    right: Sequence[Placed],
    ringed: frozenset[LineId],
) -> None:
    """Draw the shared lines and their taps; a line that goes on elsewhere ends in a ring at the top."""
    for line, x in way.at.items():
        heights = []
        for item in left:
            for tap in item.block.right:
                if tap.line == line:
                    heights.append(item.y + tap.offset)
                    canvas.wire(line, (way.left, heights[-1]), (x, heights[-1]))
        for item in right:
            for tap in item.block.left:
                if tap.line == line:
                    heights.append(item.y + tap.offset)
                    canvas.wire(line, (x, heights[-1]), (way.right, heights[-1]))
        vertical(canvas, scene, line, x, heights, ring_at=_RING_AT if line in ringed else None)


def vertical(  # noqa: PLR0913 - as above
    canvas: Canvas, scene: Scene, line: LineId, x: float, heights: Sequence[float], *, ring_at: float | None
) -> None:
    """Draw a shared line up and down, with a dot where it is tapped between its ends."""
    if not heights:
        return
    top, bottom = min(heights), max(heights)
    if ring_at is not None:
        canvas.symbol(ring(scene.letters.get(line, "?")), (x, ring_at))
        top = ring_at + 1.9
    canvas.wire(line, (x, top), (x, bottom))
    for height in sorted(set(heights)):
        if top < height < bottom or heights.count(height) > 1:
            canvas.dot(line, (x, height))
