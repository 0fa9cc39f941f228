"""The two examples of the design, by computation: one description, two centres, two different plans."""

from tests.properties.planning import example, plan_of, unit_from
from tests.unit.plan.changing import changed, data_of

from provenzero.network.model import DeviceTag
from provenzero.plan.model import Plan, Purpose, Section, StepKind


def _plan(unit_name: str, job: str, on: str) -> Plan:
    plan = plan_of(example(unit_name), job, on)
    assert isinstance(plan, Plan)
    return plan


def _locks(plan: Plan) -> dict[str, str]:
    return {lock.device: lock.position for lock in plan.locks}


def test_where_the_centre_vents_one_handle_in_centre_and_its_dead_pilot_are_enough() -> None:
    plan = _plan("jack-up", "replace-hoses", "upper-pipe-rams")
    assert _locks(plan) == {"PV-2": "closed", "HV-2": "centre"}
    assert set(plan.open_to_vent) >= {"upper-pipe-rams.open", "upper-pipe-rams.close", "upper-pipe-rams.pilot"}
    assert plan.impairment.functions_lost == ("upper-pipe-rams",)
    assert not plan.impairment.banks_lost
    assert not plan.impairment.pumps_lost


def test_where_the_centre_blocks_the_manifold_has_to_come_down() -> None:
    plan = _plan("land-rig", "replace-hoses", "upper-pipe-rams")
    assert "manifold" in plan.dead
    assert set(plan.impairment.functions_lost) == {f.name for f in plan.unit.functions}
    assert set(plan.impairment.pumps_lost) == {"P-1", "P-2"}
    assert "centre" not in _locks(plan).values()
    assert all(grade.survives_single_leak for grade in plan.grades if not grade.source.startswith("supply."))


def test_the_word_for_the_centre_alone_turns_one_plan_into_the_other() -> None:
    blocks = plan_of(unit_from(data_of("land-rig")), "replace-hoses", "upper-pipe-rams")
    vents = plan_of(
        unit_from(changed("land-rig", lambda d: d["functions"][1]["valve"].update(centre="vents"))),
        "replace-hoses",
        "upper-pipe-rams",
    )
    assert isinstance(blocks, Plan)
    assert isinstance(vents, Plan)
    assert _locks(vents) == {"PV-2": "closed", "HV-2": "centre"}
    assert len(blocks.locks) > len(vents.locks)
    moved = [(s.device, s.position) for s in vents.steps if s.section is Section.ISOLATE and s.device]
    assert moved == [("PV-2", "closed"), ("HV-2", "centre")]
    assert {"Q-1", "AV-2"} <= {s.device for s in blocks.steps if s.section is Section.ISOLATE}


def test_an_unknown_centre_is_not_trusted_to_let_anything_out() -> None:
    unit = unit_from(changed("land-rig", lambda d: d["functions"][1]["valve"].update(centre="unknown")))
    plan = plan_of(unit, "replace-hoses", "upper-pipe-rams")
    assert isinstance(plan, Plan)
    assert "manifold" in plan.dead


def test_a_pump_is_cut_at_its_energy_and_closed_on_both_sides_and_its_check_valve_is_no_barrier() -> None:
    plan = _plan("land-rig", "overhaul-electric-pump", "P-1")
    assert _locks(plan) == {"Q-1": "off", "SV-1": "closed", "DV-1": "closed", "SD-1": "open", "PB-1": "open"}
    assert plan.impairment.pumps_lost == ("P-1",)
    assert plan.impairment.power_sources_left == ("rig air",)
    assert not plan.impairment.functions_lost
    purposes = {lock.device: lock.purpose for lock in plan.locks}
    assert purposes[DeviceTag("Q-1")] is Purpose.ENERGY


def test_every_pump_that_is_stopped_is_tried_at_its_own_control_right_after_its_lock() -> None:
    plan = _plan("land-rig", "replace-bypass-valve", "BP-1")
    kinds = [(s.kind, s.device or s.facts.get("pump")) for s in plan.steps]
    for pump, device in (("P-1", "Q-1"), ("P-2", "AV-2")):
        locked = kinds.index((StepKind.SET_AND_LOCK, device))
        assert kinds[locked + 1] == (StepKind.TRY_START, pump)


def test_all_pumps_are_cut_off_before_the_first_bleed_is_opened() -> None:
    plan = _plan("jack-up", "replace-bypass-valve", "BP-1")
    devices = [s.device for s in plan.steps]
    first_bleed = devices.index(DeviceTag("HB-1"))
    assert all(devices.index(DeviceTag(tag)) < first_bleed for tag in ("Q-1", "Q-2", "AV-3", "AV-4", "NV-1"))


def test_the_way_back_shuts_the_bleeds_first_and_gives_remote_control_back_last() -> None:
    plan = _plan("jack-up", "replace-hoses", "upper-pipe-rams")
    back = [s.device for s in plan.steps if s.section is Section.REINSTATE and s.device]
    assert back == ["HV-2", "PV-2"]
    plan = _plan("land-rig", "replace-bypass-valve", "BP-1")
    back = [s.device for s in plan.steps if s.section is Section.REINSTATE and s.device]
    opened = [s.device for s in plan.steps if s.section is Section.RELEASE and s.device and s.position == "open"]
    bleeds = [d for d in opened if d.startswith(("BV", "PB", "HB"))]
    assert bleeds
    assert all(back.index(b) < back.index(DeviceTag("Q-1")) for b in bleeds)


def test_a_function_whose_chamber_gets_pressure_again_is_announced() -> None:
    plan = _plan("jack-up", "replace-hoses", "upper-pipe-rams")
    step = next(s for s in plan.steps if s.section is Section.REINSTATE and s.device == "HV-2")
    assert step.moves_function == "upper-pipe-rams"


def test_one_bottle_of_a_bank_takes_only_its_bank_out_of_service() -> None:
    plan = _plan("jack-up", "replace-bottle-bladder", "BK-2/3")
    assert plan.impairment.banks_lost == ("BK-2",)
    assert not plan.impairment.functions_lost
    assert not plan.impairment.pumps_lost
