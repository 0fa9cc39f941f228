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
    """A piece of the sheet. `draw` takes the left end, the height of the block's line, and how far right its line goes."""

    names: tuple[str, ...]
    width: float
    up: float
    down: float
    left: tuple[Tap, ...] = ()
    right: tuple[Tap, ...] = ()
    draw: Callable[[Canvas, float, float, float], None]

    @property
    def height(self) -> float:
        """Height [mm]."""
        return self.up + self.down
