"""From descriptions to networks: lines, devices and what each position joins."""

from tests.properties.planning import example, network_of, unit_from
from tests.unit.plan.changing import changed

from provenzero.network.compile import compile_network, vents_for
from provenzero.network.model import DeviceTag, LineId, PassageKind


def _joins(unit: str, device: str, position: str) -> set[tuple[str, str]]:
    return {(p.source, p.target) for p in network_of(unit).devices[DeviceTag(device)].positions[position]}


def test_a_centre_that_vents_joins_both_lines_to_the_return_and_one_that_blocks_joins_nothing() -> None:
    assert _joins("jack-up", "HV-2", "centre") == {
        ("upper-pipe-rams.open", "returns"),
        ("upper-pipe-rams.close", "returns"),
    }
    assert _joins("land-rig", "HV-2", "centre") == set()


def test_a_centre_nobody_knows_has_passages_that_are_not_certain() -> None:
    unit = unit_from(changed("land-rig", lambda d: d["functions"][0]["valve"].update(centre="unknown")))
    passages = compile_network(unit).devices[DeviceTag("HV-1")].positions["centre"]
    assert len(passages) == 2
    assert not any(p.certain for p in passages)


def test_a_bank_without_isolation_valve_hangs_on_its_line() -> None:
    network = network_of("workover")
    assert LineId("BK-A.fluid") not in network.lines
    assert {s.line for s in network.sources if s.id == "BK-A"} == {"header"}


def test_every_bottle_has_a_gas_side_that_is_a_source_of_its_own() -> None:
    network = network_of("land-rig")
    gas = [s for s in network.sources if s.id.endswith("nitrogen")]
    assert len(gas) == sum(b.bottles for b in example("land-rig").banks)


def test_a_check_valve_passes_one_way_and_a_closed_exhausting_valve_lets_its_far_side_out() -> None:
    network = network_of("jack-up")
    check = network.devices[DeviceTag("FC-3")]
    assert not check.movable
    assert [p.kind for p in check.positions["fitted"]] == [PassageKind.CHECK]
    assert ("P-3.drive", "atmosphere") in _joins("jack-up", "AV-3", "closed")


def test_a_handle_is_moved_by_hand_and_by_its_pilot_and_its_lock_answers_the_hand_only() -> None:
    valve = network_of("jack-up").devices[DeviceTag("HV-2")]
    assert valve.moved_by == ("hand", "upper-pipe-rams.pilot")
    assert valve.lock_holds_against == ("hand",)


def test_in_a_job_that_opens_the_return_header_only_the_atmosphere_swallows() -> None:
    network = network_of("jack-up")
    assert network.vents() == {"atmosphere", "reservoir", "returns"}
    assert vents_for(network, frozenset({LineId("returns")})).vents() == {"atmosphere"}
    assert vents_for(network, frozenset({LineId("manifold")})).vents() == network.vents()


def test_a_surge_bottle_stands_on_the_closing_line_of_its_function() -> None:
    network = network_of("jack-up")
    valve = network.devices[DeviceTag("SI-1")]
    assert [(p.source, p.target) for p in valve.positions["open"]] == [("annular.close", "SB-1.fluid")]
