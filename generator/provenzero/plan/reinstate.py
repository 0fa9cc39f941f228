"""The way back: not the reverse list, but the reverse sense. Vents shut, valves back, stored pressure, then energy."""

from collections.abc import Mapping

from provenzero.network.model import DeviceKind, DeviceTag, LineId, Medium
from provenzero.plan.model import Purpose, Section
from provenzero.plan.steps import Script
from provenzero.state.action import Effect, act
from provenzero.state.model import State, Wiring


def restore_all(
    script: Script, start: State, purposes: Mapping[DeviceTag, Purpose], zone: tuple[LineId, ...]
) -> list[DeviceTag]:
    """Add the steps that put every device back where it stood. Returns the devices for which no quiet turn was found."""
    wiring = script.wiring
    pending = [
        tag
        for tag in wiring.network.devices
        if tag in script.on or script.state.positions[tag] != start.positions[tag]
    ]
    turns = {tag: _turn(wiring, tag, script.state.positions[tag], purposes) for tag in pending}
    while pending:
        tag = _next(script, pending, turns, start)
        if tag is None:
            return pending
        announce = _announce(wiring, script.state, tag, start.positions[tag], zone)
        script.restore(Section.REINSTATE, tag, start.positions[tag], announce=announce)
        pending.remove(tag)
    return []


def _turn(wiring: Wiring, tag: DeviceTag, position: str, purposes: Mapping[DeviceTag, Purpose]) -> int:
    device = wiring.device(tag)
    opened_to_vent = any(
        there in wiring.vents for here in wiring.joined[tag, position] for there in wiring.joined[tag, position][here]
    )
    purpose = purposes.get(tag, Purpose.VENT)
    if purpose is Purpose.REMOTE:
        return 7
    if purpose is Purpose.ENERGY:
        return 6
    if device.kind is DeviceKind.REGULATOR:
        return 8
    if device.kind is DeviceKind.GAS_VALVE:
        return 0
    if device.kind is DeviceKind.FOUR_WAY_VALVE:
        return 4
    if opened_to_vent:
        return 1
    return 2 if purpose is Purpose.VENT else 5


def _next(
    script: Script, pending: list[DeviceTag], turns: Mapping[DeviceTag, int], start: State
) -> DeviceTag | None:
    """The device whose turn it is: in each turn first what makes nothing happen, then what a step can announce."""
    wiring = script.wiring
    for turn in sorted({turns[tag] for tag in pending}):
        effects = {t: act(wiring, script.state, t, start.positions[t]) for t in pending if turns[t] == turn}
        for good in (_nothing, _only_pumps, _announced):
            for tag, effect in effects.items():
                if good(effect) and not _wasted(wiring, script.state, effect):
                    return tag
    return None


def _nothing(effect: Effect) -> bool:
    return effect.quiet


def _only_pumps(effect: Effect) -> bool:
    return not effect.live_vented and not effect.moved


def _announced(effect: Effect) -> bool:
    return not effect.live_vented


def _wasted(wiring: Wiring, before: State, effect: Effect) -> bool:
    """Whether stored pressure would be let out on the way back."""
    return any(
        s.gas
        and wiring.network.lines[s.line].medium is Medium.CONTROL_FLUID
        and before.high(s.line) > wiring.network.lines[s.line].static_head_pag
        and effect.after.high(s.line) <= 0.0
        for s in wiring.network.sources
    )


def _announce(
    wiring: Wiring, before: State, tag: DeviceTag, position: str, zone: tuple[LineId, ...]
) -> tuple[str, ...]:
    """Name the functions whose opened chamber gets pressure again: their pistons may move."""
    effect = act(wiring, before, tag, position)
    names = [
        a.name
        for a in wiring.network.actuators
        for line in (a.open_line, a.close_line)
        if line in zone and line in effect.risen
    ]
    return tuple(dict.fromkeys(names))
