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


def in_pairs(blocks: list[Block], width: float, apart: float, gap: float) -> list[Block]:
    """Put the second of two neighbours right of the first, a little higher, so that the line of the first runs under it."""
    found: list[Block] = []
    for block in blocks:
        first = found[-1] if found else None
        if first is not None and first.roomy and block.roomy and first.width + gap + block.width <= width:
            found[-1] = _pair(first, block, apart, gap)
        else:
            found.append(block)
    return found


def _pair(first: Block, second: Block, apart: float, gap: float) -> Block:
    rise = second.down + apart

    def draw(canvas: Canvas, x: float, y: float, end: float) -> None:
        first.draw(canvas, x, y, end)
        second.draw(canvas, x + first.width + gap, y - rise, end)

    return Block(
        names=(*first.names, *second.names),
        width=first.width + gap + second.width,
        up=max(first.up, second.up + rise),
        down=first.down,
        right=(*first.right, *(Tap(tap.line, tap.offset - rise) for tap in second.right)),
        draw=draw,
    )


def in_nooks(blocks: list[Block], small: list[Block], width: float, gap: float) -> tuple[list[Block], list[Block]]:
    """Put blocks that tap nothing into the free corners over the lines that leave others; returns all, and what is left over.

    Each goes where it adds least height, and stays over where it would add as much as a row of its own.
    """
    found, left = list(blocks), []
    for item in small:
        costs = [
            (max(item.height + 2 * gap - block.up, 0.0), place)
            for place, block in enumerate(found)
            if block.roomy and width - block.width >= item.width + gap
        ]
        cost, place = min(costs, default=(item.height, 0))
        if cost < item.height:
            found[place] = _beside(found[place], item, width, gap)
        else:
            left.append(item)
    return found, left


def _beside(block: Block, item: Block, width: float, gap: float) -> Block:
    def draw(canvas: Canvas, x: float, y: float, end: float) -> None:
        block.draw(canvas, x, y, end)
        item.draw(canvas, x + width - item.width, y - 2 * gap - item.down, end)

    return Block(
        names=(*block.names, *item.names),
        width=width,
        up=max(block.up, item.height + 2 * gap),
        down=block.down,
        left=block.left,
        right=block.right,
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
        names=tuple(name for block in row for name in block.names),
        width=sum(b.width + gap for b in row) - gap,
        up=max(b.up for b in row),
        down=max(b.down for b in row),
        draw=draw,
    )
