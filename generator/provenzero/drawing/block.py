"""A block of the circuit, measured and ready to be placed: where it meets the lines that many blocks share."""

from collections.abc import Callable
from dataclasses import dataclass

from provenzero.drawing.canvas import Canvas
from provenzero.network.model import LineId


@dataclass(frozen=True, slots=True)
class Tap:
    """A place where a block meets a shared line, and how far under the block's own height it lies [mm]."""

    line: LineId
    offset: float = 0.0


@dataclass(frozen=True, slots=True, kw_only=True)
class Block:
    """A piece of the sheet. `draw` takes the left end, the height of the block's line, and how far right its line goes.

    `roomy`: over the line that leaves it at the right there is nothing.
    """

    names: tuple[str, ...]
    width: float
    up: float
    down: float
    left: tuple[Tap, ...] = ()
    right: tuple[Tap, ...] = ()
    roomy: bool = False
    draw: Callable[[Canvas, float, float, float], None]

    @property
    def height(self) -> float:
        """Height [mm]."""
        return self.up + self.down


def in_nooks(blocks: list[Block], small: list[Block], width: float, gap: float) -> tuple[list[Block], list[Block]]:
    """Put blocks that tap nothing into the free corners over the lines that leave others; returns all, and what is left over."""
    found, left = list(blocks), []
    for item in small:
        for place, block in enumerate(found):
            if block.roomy and width - block.width >= item.width + gap and block.up >= item.height + gap:
                found[place] = _beside(block, item, width, gap)
                break
        else:
            left.append(item)
    return found, left


def _beside(block: Block, item: Block, width: float, gap: float) -> Block:
    def draw(canvas: Canvas, x: float, y: float, end: float) -> None:
        block.draw(canvas, x, y, end)
        item.draw(canvas, x + width - item.width, y - gap - item.down, end)

    return Block(
        names=(*block.names, *item.names), width=width, up=block.up, down=block.down, left=block.left, right=block.right,
        draw=draw,
    )


def shelves(blocks: list[Block], limit_mm: float, gap: float) -> list[Block]:
    """Blocks that tap nothing, side by side as far as the width allows."""
    rows: list[list[Block]] = []
    for block in blocks:
        if rows and sum(b.width + gap for b in rows[-1]) + block.width <= limit_mm:
            rows[-1].append(block)
        else:
            rows.append([block])
    return [_shelf(row, gap) for row in rows]


def _shelf(row: list[Block], gap: float) -> Block:
    def draw(canvas: Canvas, x: float, y: float, end: float) -> None:
        for block in row:
            block.draw(canvas, x, y, end)
            x += block.width + gap

    return Block(
        names=tuple(name for block in row for name in block.names), width=sum(b.width + gap for b in row) - gap,
        up=max(b.up for b in row), down=max(b.down for b in row), draw=draw,
    )
