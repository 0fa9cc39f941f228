"""The way back: not the reverse list, but the reverse sense. Vents shut, valves back, stored pressure, then energy."""

from collections.abc import Mapping

from provenzero.network.devices.regulators import BACKED_OFF, SET
from provenzero.network.model import DeviceKind, DeviceTag, LineId, Medium
from provenzero.plan.model import Purpose, Section
from provenzero.plan.sequence import Move
from provenzero.plan.steps import Script
from provenzero.state.action import Effect, act
from provenzero.state.model import State, Wiring

_ENERGY = 6
_BY_PURPOSE = {Purpose.ENERGY: _ENERGY, Purpose.REMOTE: 7}
_BY_KIND = {DeviceKind.GAS_VALVE: 0, DeviceKind.FOUR_WAY_VALVE: 4, DeviceKind.REGULATOR: 8}
_VENT, _INNER, _BARRIER = 1, 2, 5


def restore_all(
    script: Script,
    start: State,
    purposes: Mapping[DeviceTag, Purpose],
    zone: tuple[LineId, ...],
    emptied: list[LineId],
) -> list[DeviceTag]:
    """Add the steps that put every device back where it stood, filling what was `emptied` before energy comes back.

    Returns the devices for which no quiet turn was found.
    """
    wiring = script.wiring
    pending = [
        tag for tag in wiring.network.devices if tag in script.on or script.state.positions[tag] != start.positions[tag]
    ]
    turns = {tag: _turn(wiring, tag, script.state.positions[tag], purposes) for tag in pending}
    while pending:
        tag = _next(script, pending, turns, start)
        if tag is None:
            return pending
        if turns[tag] >= _ENERGY:
            _fill(script, emptied)
        announce = _announce(wiring, script.state, tag, start.positions[tag], zone)
        script.restore(Section.REINSTATE, tag, start.positions[tag], announce=announce)
        pending.remove(tag)
    _fill(script, emptied)
    _reset_regulators(script, start)
    _charge(script, start)
    return []


def _reset_regulators(script: Script, start: State) -> None:
    """Back off and set again each relieving regulator that passed more than its set pressure while its air was off."""
    for tag, device in script.wiring.network.devices.items():
        if device.kind is not DeviceKind.REGULATOR or not device.positions.get(BACKED_OFF):
            continue
        served = device.positions[SET][0].target
        if start.low(served) > 0.0 and script.state.pressures[served] != start.pressures[served]:
            off = Move(device=tag, position=BACKED_OFF, purpose=Purpose.VENT, locks=False)
            script.move(Section.REINSTATE, off, "reset")
            script.restore(Section.REINSTATE, tag, SET, announce=())


def _charge(script: Script, start: State) -> None:
    """Charge by hand what no automatic pump charges."""
    for source in script.wiring.network.sources:
        charged = source.gas and source.line in start.fed and start.low(source.line) > 0.0
        if charged and script.state.pressures[source.line] != start.pressures[source.line]:
            script.recharge(Section.REINSTATE, source.line, {})


def _fill(script: Script, emptied: list[LineId]) -> None:
    while emptied:
        script.recharge(Section.REINSTATE, emptied.pop(0), {})


def _turn(wiring: Wiring, tag: DeviceTag, position: str, purposes: Mapping[DeviceTag, Purpose]) -> int:
    device = wiring.device(tag)
    opened_to_vent = any(
        there in wiring.vents for here in wiring.joined[tag, position] for there in wiring.joined[tag, position][here]
    )
    purpose = purposes.get(tag, Purpose.VENT)
    if purpose in _BY_PURPOSE:
        return _BY_PURPOSE[purpose]
    if device.kind in _BY_KIND:
        return _BY_KIND[device.kind]
    if opened_to_vent:
        return _VENT
    return _INNER if purpose is Purpose.VENT else _BARRIER


def _next(script: Script, pending: list[DeviceTag], turns: Mapping[DeviceTag, int], start: State) -> DeviceTag | None:
    """The device whose turn it is: in each turn first what makes nothing happen, then what a step can announce."""
    wiring = script.wiring
    for turn in sorted({turns[tag] for tag in pending}):
        effects: dict[DeviceTag, Effect] = {}
        for tag in pending:
            if turns[tag] != turn:
                continue
            effect = act(wiring, script.state, tag, start.positions[tag])
            if _wasted(wiring, script.state, effect):
                continue
            if effect.quiet:
                return tag
            effects[tag] = effect
        for good in (_only_pumps, _announced):
            for tag, effect in effects.items():
                if good(effect):
                    return tag
    return None


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
