"""What the circuit does once hands are off, on the land rig's unit."""

import pytest
from tests.properties.planning import network_of

from provenzero.network.model import DeviceTag, LineId
from provenzero.state.action import act, initial
from provenzero.state.may import reach
from provenzero.state.model import State, Wiring, wire
from provenzero.state.must import vented

PSI = 6894.757293168


def _land() -> tuple[Wiring, State]:
    wiring = wire(network_of("land-rig"))
    return wiring, initial(wiring)


def _psi(state: State, line: str) -> tuple[int, int]:
    low, high = state.pressures[LineId(line)]
    return round(low / PSI), round(high / PSI)


def _do(wiring: Wiring, state: State, *moves: tuple[str, str]) -> State:
    for device, position in moves:
        state = act(wiring, state, DeviceTag(device), position).after
    return state


def test_in_service_the_header_stands_between_start_and_stop_and_regulated_lines_at_their_set_pressure() -> None:
    _, state = _land()
    assert _psi(state, "header") == (2700, 3000)
    assert _psi(state, "manifold") == (1500, 1500)
    assert _psi(state, "annular-line") == (900, 900)
    assert _psi(state, "upper-pipe-rams.open") == (1500, 1500)
    assert _psi(state, "upper-pipe-rams.close") == (0, 0)
    assert state.pistons["upper-pipe-rams"] == "open"
    assert state.pistons["kill-gate"] == "close"


def test_a_blocked_centre_keeps_what_the_line_had() -> None:
    wiring, state = _land()
    state = _do(wiring, state, ("HV-2", "centre"))
    assert _psi(state, "upper-pipe-rams.open") == (1500, 1500)


def test_a_bank_shut_in_keeps_its_pressure_and_one_bled_falls_to_zero() -> None:
    wiring, state = _land()
    state = _do(wiring, state, ("IV-1", "closed"), ("BV-1", "open"))
    assert _psi(state, "BK-1.fluid") == (0, 0)
    assert _psi(state, "header") == (2700, 3000)


def test_a_header_let_out_leaves_a_regulated_line_uncertain_because_a_regulator_is_not_relied_on_backwards() -> None:
    wiring, state = _land()
    off = (("Q-1", "off"), ("AV-2", "closed"))
    state = _do(wiring, state, *off, ("BV-1", "open"))
    assert _psi(state, "header") == (0, 0)
    assert _psi(state, "annular-line") == (0, 900)
    state = _do(wiring, state, ("RG-2", "backed_off"))
    assert _psi(state, "annular-line") == (0, 0)


def test_a_live_pump_over_an_open_bleed_is_reported() -> None:
    wiring, state = _land()
    effect = act(wiring, state, DeviceTag("BV-1"), "open")
    assert "P-1" in effect.live_vented
    assert not effect.quiet


def test_a_charged_bank_that_meets_a_drained_one_promises_no_low_end() -> None:
    wiring, state = _land()
    state = _do(
        wiring, state, ("Q-1", "off"), ("AV-2", "closed"), ("IV-1", "closed"), ("BV-1", "open"), ("BV-1", "closed")
    )
    state = _do(wiring, state, ("IV-1", "open"))
    assert _psi(state, "header") == (0, 3000)


def test_a_handle_thrown_under_pressure_moves_the_piston() -> None:
    wiring, state = _land()
    assert act(wiring, state, DeviceTag("HV-2"), "close").moved == ("upper-pipe-rams",)


def test_a_position_that_a_device_does_not_have_is_a_mistake_of_the_caller() -> None:
    wiring, state = _land()
    with pytest.raises(ValueError, match="no position"):
        act(wiring, state, DeviceTag("HV-2"), "ajar")


def test_pressure_may_come_backwards_through_checks_and_regulators_and_through_unlocked_devices() -> None:
    wiring, state = _land()
    flood = reach(wiring, {}, state.pressures)
    assert {"upper-pipe-rams.close", "P-1.outlet", "BK-1.fluid"} <= flood.lines
    path = flood.path(LineId("upper-pipe-rams.close"))
    assert path[-1] == "upper-pipe-rams.close"
    assert "HV-2" in path


def test_a_lock_that_a_live_pilot_can_overcome_holds_nothing() -> None:
    wiring, state = _land()
    locks = {DeviceTag("HV-2"): "centre"}
    assert reach(wiring, locks, state.pressures).freed == {"HV-2"}
    dead = _do(wiring, state, ("PV-2", "closed"))
    both = {**locks, DeviceTag("PV-2"): "closed"}
    assert not reach(wiring, both, dead.pressures).freed


def test_only_held_devices_count_for_a_sure_vent() -> None:
    wiring, _ = _land()
    assert LineId("BK-1.fluid") not in vented(wiring, {})
    assert LineId("BK-1.fluid") in vented(wiring, {DeviceTag("BV-1"): "open"})
