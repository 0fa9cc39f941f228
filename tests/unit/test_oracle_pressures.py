from typing import Any

from tests.properties.oracle_parts.small_unit import (
    FULL,
    Entry,
    bottles,
    device,
    fixed,
    line,
    live,
    valve,
    way,
)
from tests.properties.oracle_parts.walk import walk

NOTHING = (0.0, 0.0)


def circuit_at_rest(
    lines: dict[str, Any], *devices: Entry, sources: tuple[Entry, ...] = (), **positions: str
) -> dict[str, tuple[float, float]]:
    """The pressures that a circuit comes to, from those given for its lines (a tank is added)."""
    plan = {
        "network": {
            "lines": [line(name, "electric" if name.startswith("e_") else "control_fluid") for name in lines]
            + [line("tank")],
            "devices": list(devices),
            "sources": list(sources),
            "functions": [],
            "initial": {
                "positions": {d["tag"]: next(iter(d["positions"])) for d in devices} | positions,
                "pressures_pag": {k: list(v) for k, v in lines.items()},
            },
        },
        "zone": [],
        "steps": [],
        "locks": [],
        "open_to_vent": [],
    }
    pressures = walk(plan).start.pressures
    return {name: (pressures.low[k], pressures.high[k]) for k, name in enumerate(lines)}


def test_trapped_lines_that_are_joined_hold_anything_in_between() -> None:
    found = circuit_at_rest({"a": (1e6, 2e6), "b": (3e6, 4e6)}, fixed("P", way("a open b")))
    assert found == {"a": (1e6, 4e6), "b": (1e6, 4e6)}


def test_a_vent_takes_all_bottles_included() -> None:
    found = circuit_at_rest({"a": FULL}, fixed("P", way("a open tank")), sources=(bottles("b", "a"),))
    assert found["a"] == NOTHING


def test_bottles_keep_their_pressure_against_an_empty_line_and_a_leaking_check() -> None:
    devices = (fixed("P", way("a open b")), fixed("C", way("c check a")), fixed("D", way("c open tank")))
    found = circuit_at_rest({"a": FULL, "b": NOTHING, "c": NOTHING}, *devices, sources=(bottles("s", "a"),))
    assert found == {"a": tuple(FULL), "b": tuple(FULL), "c": NOTHING}


def test_empty_bottles_keep_nothing() -> None:
    lines = {"a": NOTHING, "b": (1e6, 1e6)}
    found = circuit_at_rest(lines, fixed("P", way("a open b")), sources=(bottles("s", "a"),))
    assert found["b"] == (0.0, 1e6)


def test_a_check_valve_lets_forward_and_leaks_back() -> None:
    lines = {"a": (5e6, 5e6), "b": NOTHING, "c": (8e6, 8e6)}
    found = circuit_at_rest(lines, fixed("C1", way("a check b")), fixed("C2", way("a check c")))
    assert found == {"a": (0.0, 8e6), "b": (0.0, 8e6), "c": (0.0, 8e6)}


def test_trapped_fluid_follows_down_through_check_valves_into_a_vent() -> None:
    lines = {"a": (5e6, 5e6), "b": (4e6, 4e6)}
    found = circuit_at_rest(lines, fixed("C1", way("a check b")), fixed("C2", way("b check tank")))
    assert found == {"a": NOTHING, "b": NOTHING}


def test_a_check_valve_that_may_be_missing_drains_nothing_for_sure() -> None:
    found = circuit_at_rest({"a": (5e6, 5e6)}, fixed("C1", way("maybe a check tank")))
    assert found == {"a": (0.0, 5e6)}


def test_a_live_source_keeps_a_vented_line_above_zero() -> None:
    devices = (fixed("R", way("a regulator b", 10e6)), fixed("P", way("b open tank")))
    found = circuit_at_rest({"a": FULL, "b": NOTHING}, *devices, sources=(live("pump", "a", FULL),))
    assert found == {"a": tuple(FULL), "b": (0.0, 10e6)}


def test_a_regulator_gives_its_setting_and_no_more() -> None:
    lines = {"a": FULL, "b": NOTHING, "c": NOTHING, "d": (15e6, 15e6)}
    devices = [fixed(f"R{k}", way(f"a regulator {k}", p)) for k, p in (("b", 10e6), ("c", 0.0), ("d", 10e6))]
    found = circuit_at_rest(lines, *devices, sources=(bottles("s", "a"),))
    assert found == {"a": tuple(FULL), "b": (10e6, 10e6), "c": NOTHING, "d": (15e6, 15e6)}


def test_a_regulator_is_not_relied_on_to_drain_what_is_upstream() -> None:
    devices = (fixed("R", way("a regulator b", 10e6)), fixed("P", way("b open tank")))
    found = circuit_at_rest({"a": FULL, "b": FULL}, *devices, sources=(bottles("s", "a"),))
    assert found == {"a": (0.0, FULL[1]), "b": NOTHING}


def test_a_relief_valve_takes_only_what_is_above_its_setting() -> None:
    lines = {"a": (30e6, 30e6), "b": (10e6, 10e6)}
    devices = [fixed(f"R{k}", way(f"{k} relief tank", 22e6)) for k in lines]
    assert circuit_at_rest(lines, *devices) == {"a": (22e6, 30e6), "b": (10e6, 10e6)}


def test_bottles_under_a_relief_valve_keep_their_pressure() -> None:
    found = circuit_at_rest({"a": FULL}, fixed("R", way("a relief tank", 22e6)), sources=(bottles("s", "a"),))
    assert found["a"] == tuple(FULL)


def test_a_relief_valve_passes_on_what_is_above_its_setting() -> None:
    lines = {"a": (30e6, 30e6), "b": NOTHING, "c": (10e6, 10e6), "d": NOTHING}
    devices = (fixed("R1", way("a relief b", 22e6)), fixed("R2", way("c relief d", 22e6)))
    found = circuit_at_rest(lines, *devices)
    assert found["b"] == (0.0, 30e6)
    assert found["d"] == NOTHING


def test_a_vented_line_that_a_live_source_flows_through_drains_nothing_for_sure() -> None:
    devices = (
        fixed("R", way("a regulator b", 10e6)),
        fixed("C", way("b check c"), way("d check c")),
        fixed("P", way("c open tank")),
    )
    lines = {"a": FULL, "b": NOTHING, "c": NOTHING, "d": (4e6, 4e6)}
    found = circuit_at_rest(lines, *devices, sources=(live("pump", "a", FULL),))
    assert found == {"a": tuple(FULL), "b": (0.0, 10e6), "c": (0.0, 10e6), "d": (0.0, 10e6)}


def test_a_line_that_a_live_source_flows_through_is_not_drained_by_its_check_valve() -> None:
    devices = (fixed("R", way("a regulator b", 10e6)), fixed("C", way("b check tank")))
    found = circuit_at_rest({"a": FULL, "b": NOTHING}, *devices, sources=(live("pump", "a", FULL),))
    assert found["b"] == (0.0, 10e6)


def test_a_closed_relief_valve_and_a_backed_off_regulator_feed_nothing() -> None:
    for idle in (way("a relief ret", 22e6), way("a regulator ret", 0.0)):
        devices = (fixed("V", idle), fixed("P", way("ret open tank")), fixed("C", way("x check ret")))
        lines = {"a": FULL, "ret": NOTHING, "x": (3e6, 3e6)}
        assert circuit_at_rest(lines, *devices, sources=(live("pump", "a", FULL),))["x"] == NOTHING


def test_bottles_that_flow_out_through_a_chain_keep_nothing_up() -> None:
    devices = (fixed("R", way("a regulator b", 10e6)), fixed("C", way("b regulator tank", 5e6)))
    lines = {"a": FULL, "b": (4e6, 4e6)}
    found = circuit_at_rest(lines, *devices, sources=(bottles("s", "a"),))
    assert found["b"] == (0.0, 10e6)


def test_a_live_source_that_flows_into_the_tank_itself_presses_on_nothing() -> None:
    devices = (
        fixed("R", way("a regulator tank", 10e6)),
        fixed("P", way("ret open tank")),
        fixed("C", way("x check tank"), way("tank check y")),
    )
    lines = {"a": FULL, "ret": NOTHING, "x": (3e6, 3e6), "y": (2e6, 2e6)}
    found = circuit_at_rest(lines, *devices, sources=(live("pump", "a", FULL),))
    assert found == {"a": tuple(FULL), "ret": NOTHING, "x": NOTHING, "y": (0.0, 2e6)}


def test_a_vented_live_line_may_be_anywhere_and_the_tank_stays_empty() -> None:
    devices = (fixed("P", way("a open tank")), fixed("C", way("tank check y"), way("x check tank")))
    lines = {"a": FULL, "x": (3e6, 3e6), "y": NOTHING}
    found = circuit_at_rest(lines, *devices, sources=(live("pump", "a", FULL),))
    assert found == {"a": (0.0, FULL[1]), "x": (0.0, 3e6), "y": NOTHING}


def test_a_passage_that_may_be_there_brings_pressure_and_keeps_none_up() -> None:
    for kind in ("open", "check", "regulator"):
        lines = {"a": FULL, "b": NOTHING}
        devices = (fixed("P", way(f"maybe a {kind} b", 30e6)),)
        found = circuit_at_rest(lines, *devices, sources=(bottles("s", "a"),))
        assert found == {"a": tuple(FULL), "b": (0.0, FULL[1])}


def test_a_passage_that_may_be_there_brings_pressure_against_its_writing_too() -> None:
    assert circuit_at_rest({"a": (5e6, 5e6), "b": NOTHING}, fixed("P", way("maybe b open a")))["b"] == (
        0,
        5e6,
    )


def test_bottles_may_empty_through_a_passage_that_may_be_there() -> None:
    devices = (fixed("P", way("maybe a open tank")),)
    assert circuit_at_rest({"a": FULL}, *devices, sources=(bottles("s", "a"),))["a"] == (0.0, FULL[1])


def test_bottles_at_two_pressures_that_are_joined_hold_anything_in_between() -> None:
    lines = {"a": (5e6, 6e6), "b": (7e6, 8e6), "c": (1e6, 9e6)}
    joint = fixed("P", way("a open b"), way("b open c"))
    for sources in ((bottles("s", "a"), bottles("t", "b")), (bottles("t", "b"), bottles("s", "a"))):
        assert circuit_at_rest(lines, joint, sources=sources)["c"] == (5e6, 8e6)


def test_a_running_source_sets_the_pressure_of_trapped_fluid() -> None:
    found = circuit_at_rest({"a": (30e6, 30e6)}, sources=(live("pump", "a", FULL),))
    assert found["a"] == tuple(FULL)


def test_two_running_sources_keep_up_the_higher_of_their_lows() -> None:
    weak, strong = live("weak", "a", [1e6, 2e6]), live("strong", "a", [3e6, 4e6])
    for sources in ((weak, strong), (strong, weak)):
        assert circuit_at_rest({"a": NOTHING}, sources=sources)["a"] == (3e6, 4e6)


def test_a_weak_source_on_strong_bottles_takes_nothing_from_them() -> None:
    found = circuit_at_rest({"a": FULL}, sources=(live("weak", "a", [1e6, 2e6]), bottles("s", "a")))
    assert found["a"] == tuple(FULL)


def test_a_regulator_takes_from_upstream_until_downstream_is_at_its_setting() -> None:
    for downstream, left in (((4e6, 5e6), 8e6), (NOTHING, 0.0)):
        lines = {"a": (8e6, 8e6), "b": downstream}
        assert circuit_at_rest(lines, fixed("R", way("a regulator b", 5e6)))["a"] == (left, 8e6)


def test_electricity_does_not_leak_backwards() -> None:
    lines = {"e_a": NOTHING, "e_b": (400.0, 400.0)}
    sources = (live("utility", "e_b", [400.0, 400.0]),)
    assert circuit_at_rest(lines, fixed("C", way("e_a check e_b")), sources=sources)["e_a"] == NOTHING
    assert circuit_at_rest(lines, fixed("C", way("e_b check e_a")), sources=sources)["e_a"] == (
        400.0,
        400.0,
    )


def test_electricity_is_never_trapped() -> None:
    found = circuit_at_rest({"e_a": (400.0, 400.0), "e_b": (400.0, 400.0)}, valve("EB", "e_a", "e_b"))
    assert found == {"e_a": NOTHING, "e_b": NOTHING}


def test_a_pump_with_a_dead_drive_gives_nothing_and_one_with_an_uncertain_drive_may() -> None:
    for drive, left in ((NOTHING, NOTHING), ((0.0, 7e5), (0.0, 20.7e6)), ((6e5, 7e5), tuple(FULL))):
        found = circuit_at_rest({"air": drive, "a": NOTHING}, sources=(live("pump", "a", FULL, "air"),))
        assert found["a"] == left


def test_a_device_falls_on_loss_of_its_pilot() -> None:
    spring = device("SP", {"held": [], "fallen": [way("a open tank")]})
    spring["on_loss"] = {"line": "pilot", "position": "fallen"}
    for pilot, left in (((5e5, 5e5), (5e6, 5e6)), (NOTHING, NOTHING)):
        assert circuit_at_rest({"a": (5e6, 5e6), "pilot": pilot}, spring)["a"] == left


def test_a_device_falls_as_its_pilot_is_drained_in_the_same_moment() -> None:
    spring = device("SP", {"held": [], "fallen": [way("a open tank")]})
    spring["on_loss"] = {"line": "pilot", "position": "fallen"}
    drain = fixed("P", way("pilot open tank"))
    assert circuit_at_rest({"a": (5e6, 5e6), "pilot": (5e5, 5e5)}, spring, drain)["a"] == NOTHING


def test_a_device_that_takes_and_gives_its_own_pilot_leaves_the_pressure_open() -> None:
    restless = device("SP", {"held": [way("pilot open tank")], "fallen": [way("air open pilot")]})
    restless["on_loss"] = {"line": "pilot", "position": "fallen"}
    lines = {"air": (7e5, 7e5), "pilot": NOTHING}
    found = circuit_at_rest(lines, restless, sources=(live("rig", "air", [7e5, 7e5]),))
    assert found["pilot"] == (0.0, 7e5)
