"""In which order the moves are made, so that nothing moves, starts or is let out on the way.

Remote commands first, then energy, then other barriers, then bleeds; within these, whatever raises no pressure
anywhere. Each choice is simulated; an order that cannot be found is reported, not forced.
"""

from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass

from provenzero.network.model import DeviceKind, DeviceTag, LineId, Medium
from provenzero.plan.hold import Leg, way_out
from provenzero.plan.model import Obstacle, Purpose
from provenzero.plan.region import Region
from provenzero.state.action import Effect, act
from provenzero.state.model import State, Wiring


@dataclass(frozen=True, slots=True, kw_only=True)
class Move:
    """A device to be put in a position, and locked there or not."""

    device: DeviceTag
    position: str
    purpose: Purpose
    locks: bool


@dataclass(frozen=True, slots=True, kw_only=True)
class Made:
    """A move with what it did."""

    move: Move
    before: State
    effect: Effect


_TURN = {Purpose.REMOTE: 0, Purpose.ENERGY: 1, Purpose.BARRIER: 2, Purpose.VENT: 3}
_PILOT_KINDS = frozenset({DeviceKind.PILOT_VALVE, DeviceKind.PANEL_CONTROL})


def purpose_of(wiring: Wiring, device: DeviceTag, dead: frozenset[LineId], *, barrier: bool) -> Purpose:
    """Why a device is put where it is: to keep a mover, an energy or a line's pressure away, or to let out."""
    if not barrier:
        return Purpose.VENT
    lines = [line for line in wiring.anywhere[device] if line in dead]
    drives = {s.drive for s in wiring.network.sources if s.drive is not None}
    media = {wiring.network.lines[line].medium for line in lines}
    if wiring.device(device).kind in _PILOT_KINDS:
        return Purpose.REMOTE
    if any(line in drives for line in lines):
        return Purpose.ENERGY
    if media & {Medium.AIR, Medium.ELECTRIC}:
        return Purpose.REMOTE
    return Purpose.BARRIER


def perform(wiring: Wiring, state: State, moves: Sequence[Move]) -> tuple[list[Made], State, list[Move]]:
    """Make the moves in a quiet order. Returns what was made, the state reached and the moves that found no place."""
    pending = sorted(moves, key=lambda m: (_TURN[m.purpose], _late(wiring, m)))
    made: list[Made] = []
    while pending:
        choice = _first(wiring, state, pending, _gentle) or _first(wiring, state, pending, _quiet)
        if choice is None:
            break
        move, effect = choice
        made.append(Made(move=move, before=state, effect=effect))
        state = effect.after
        pending.remove(move)
    return made, state, pending


def _late(wiring: Wiring, move: Move) -> int:
    """Nitrogen is let out after the fluid; a device that no lock can hold after those that one can."""
    device = wiring.device(move.device)
    gas = device.kind is DeviceKind.GAS_VALVE
    handle = device.kind is DeviceKind.FOUR_WAY_VALVE
    return (4 if gas else 0) + (0 if move.locks else 2) + (0 if handle or move.locks else 1)


def _first(
    wiring: Wiring, state: State, pending: Sequence[Move], good: Callable[[Effect], bool]
) -> tuple[Move, Effect] | None:
    for move in pending:
        effect = act(wiring, state, move.device, move.position)
        if good(effect):
            return move, effect
    return None


def _gentle(effect: Effect) -> bool:
    return effect.quiet and not effect.risen


def _quiet(effect: Effect) -> bool:
    return effect.quiet


def let_out_rest(
    wiring: Wiring, state: State, region: Region, fixed: Mapping[DeviceTag, str]
) -> tuple[list[Made], State, list[Obstacle]]:
    """Let out what still holds pressure in the dead region, by moves that no lock need hold.

    `fixed` devices stay where they are. Returns the moves made, the state reached and the lines that stay trapped.
    """
    made: list[Made] = []
    tried: set[LineId] = set()
    while True:
        line = next((k for k in remaining(wiring, state, region.dead) if k not in tried), None)
        if line is None:
            break
        tried.add(line)
        legs = way_out(wiring, state, region.outside.lines, line, fixed, through_checks=True, to_hold=False)
        for leg in legs or []:
            if state.positions[leg.device] != leg.position:
                effect = act(wiring, state, leg.device, leg.position)
                if not effect.quiet:
                    break
                made.append(Made(move=_loose(leg), before=state, effect=effect))
                state = effect.after
    return made, state, [Obstacle(line=k, words="trapped") for k in remaining(wiring, state, region.dead)]


def _loose(leg: Leg) -> Move:
    return Move(device=leg.device, position=leg.position, purpose=Purpose.VENT, locks=False)


def remaining(wiring: Wiring, state: State, dead: frozenset[LineId]) -> list[LineId]:
    """Lines of the dead region that may still hold more than the fluid column standing on them."""
    return [
        line
        for line in wiring.network.lines
        if line in dead and line not in wiring.vents and state.high(line) > wiring.network.lines[line].static_head_pag
    ]
