from typing import Any

import pytest
from tests.properties.oracle import (
    CannotJudgeError,
    check_all,
    dead,
    honest,
    least,
    locked,
    quiet,
    reversible,
)
from tests.properties.oracle_parts.small_unit import (
    Entry,
    bottles,
    device,
    fixed,
    line,
    live,
    reads,
    small_plan,
    step,
    valve,
    way,
)

PROPERTIES = {"dead", "locked", "least", "quiet", "honest", "reversible"}


def add(plan: Entry, new: Entry, position: str | None = None) -> None:
    """Build a device into the small unit, in its first position unless another is said."""
    plan["network"]["devices"].append(new)
    plan["network"]["initial"]["positions"][new["tag"]] = position or next(iter(new["positions"]))


def add_line(plan: Entry, new: Entry, pressures: list[float] | None = None) -> None:
    plan["network"]["lines"].append(new)
    plan["network"]["initial"]["pressures_pag"][new["id"]] = pressures or [0.0, 0.0]


def find(plan: Entry, tag: str) -> Entry:
    found: Entry = next(d for d in plan["network"]["devices"] if d["tag"] == tag)
    return found


class TestSoundPlan:
    def test_has_every_property(self) -> None:
        verdicts = check_all(small_plan())
        assert set(verdicts) == PROPERTIES
        assert {name: v.evidence for name, v in verdicts.items() if not v.holds} == {}

    def test_is_searched_both_ways(self) -> None:
        assert "stand by stand" in locked(small_plan()).evidence

    def test_is_left_as_it_was_given(self) -> None:
        plan = small_plan()
        check_all(plan)
        assert plan == small_plan()


class TestDead:
    def test_a_zone_that_is_closed_in_and_not_drained_is_not_dead(self) -> None:
        plan = small_plan()
        del plan["steps"][1]
        assert not dead(plan).holds
        assert "run may hold [18900000, 20700000] Pa" in dead(plan).evidence

    def test_a_drain_that_may_be_plugged_makes_nobody_sure(self) -> None:
        plan = small_plan()
        find(plan, "DV")["positions"]["open"] = [way("maybe run open tank")]
        assert not dead(plan).holds

    def test_a_drain_that_is_opened_after_the_work_began_comes_too_late(self) -> None:
        plan = small_plan()
        plan["steps"][1], plan["steps"][3] = plan["steps"][3], plan["steps"][1]
        assert not dead(plan).holds

    def test_draining_into_a_closed_line_only_shares_the_pressure(self) -> None:
        plan = small_plan()
        add_line(plan, line("pot"))
        find(plan, "DV")["positions"]["open"] = [way("run open pot")]
        assert "run may hold [0, 20700000] Pa" in dead(plan).evidence

    def test_what_only_stands_in_the_column_is_stated_apart(self) -> None:
        plan = small_plan()
        del plan["steps"][1]
        plan["network"]["initial"]["pressures_pag"]["run"] = [0.0, 90e3]
        plan["network"]["initial"]["positions"]["SV"] = "closed"
        plan["network"]["initial"]["pressures_pag"]["closing"] = [0.0, 0.0]
        assert not dead(plan).holds
        next(entry for entry in plan["network"]["lines"] if entry["id"] == "run")["static_head_pag"] = 90e3
        assert dead(plan).holds

    def test_a_locked_valve_falls_on_loss_of_air_unless_its_lock_withstands_that(self) -> None:
        plan = small_plan()
        add_line(plan, line("pilot", "air"), [7e5, 8e5])
        add(plan, valve("AV", "pilot", "tank"), "closed")
        find(plan, "SV")["on_loss"] = {"line": "pilot", "position": "open"}
        assert dead(plan).holds
        plan["steps"].insert(2, step(9, "release", sets="AV open"))
        assert not dead(plan).holds
        find(plan, "SV")["lock_holds_against"] = ["hand", "pilot"]
        assert dead(plan).holds

    def test_an_unlocked_valve_falls_on_loss_of_air_whatever_a_lock_would_withstand(self) -> None:
        plan = small_plan()
        add_line(plan, line("pilot", "air"))
        find(plan, "SV")["on_loss"] = {"line": "pilot", "position": "open"}
        find(plan, "SV")["lock_holds_against"] = ["hand", "pilot"]
        plan["steps"][0]["lock"] = None
        assert not dead(plan).holds

    def test_an_electric_line_is_dead_with_its_breaker_off(self) -> None:
        plan = small_plan() | {
            "zone": ["motor"],
            "steps": [step(1, "isolate", sets="EB closed")],
            "locks": [],
        }
        assert dead(plan).holds
        plan["steps"] = []
        assert not dead(plan).holds

    def test_an_empty_zone_shows_nothing(self) -> None:
        assert not dead(small_plan() | {"zone": []}).holds


class TestLocked:
    def test_an_unlocked_way_around_the_locked_valve_lets_pressure_in(self) -> None:
        plan = small_plan()
        add(plan, valve("BY", "header", "run"), "closed")
        assert not locked(plan).holds
        assert "-(BY in open)-> run" in locked(plan).evidence
        assert dead(plan).holds

    def test_a_lock_that_was_not_put_on_lets_pressure_in(self) -> None:
        plan = small_plan()
        plan["steps"][0]["lock"] = None
        assert "-(SV in open)-> run" in locked(plan).evidence

    def test_pressure_is_carried_from_line_to_line_by_one_valve_after_another(self) -> None:
        plan = small_plan()
        for name in ("first", "second"):
            add_line(plan, line(name))
        three_way = {"shut": [], "left": [way("header open first")], "right": [way("second open run")]}
        add(plan, device("TW", three_way))
        add(plan, valve("MV", "first", "second"), "closed")
        assert "header -(TW in left)-> first -(MV in open)-> second -(TW in right)-> run" in locked(plan).evidence

    @pytest.mark.parametrize("kind", ["check", "regulator", "relief"])
    def test_no_valve_that_passes_one_way_is_a_barrier_the_other_way(self, kind: str) -> None:
        plan = small_plan()
        add(plan, fixed("CV", way(f"run {kind} header", 25e6)))
        assert "-(CV in fitted)-> run" in locked(plan).evidence

    @pytest.mark.parametrize(("one", "other"), [("header", "tank"), ("tank", "header")])
    def test_a_vent_swallows_what_comes(self, one: str, other: str) -> None:
        plan = small_plan()
        add(plan, valve("HB", one, other), "closed")
        add(plan, valve("TB", "tank", "run"), "closed")
        assert locked(plan).holds

    def test_what_nobody_can_move_stays_as_it_is(self) -> None:
        plan = small_plan()
        add(plan, fixed("BL") | {"positions": {"blind": [], "swung": [way("header open run")]}})
        assert locked(plan).holds

    def test_bottles_behind_an_unlocked_valve_are_a_source(self) -> None:
        plan = small_plan()
        add(plan, valve("BY", "bank", "run"), "closed")
        assert "(stored source bottles) bank -(BY in open)-> run" in locked(plan).evidence

    def test_a_lock_on_the_handle_does_not_stop_a_pilot_that_can_get_air(self) -> None:
        plan = _with_pilot()
        assert "-(SV in open)-> run" in locked(plan).evidence
        assert "by growth and stand by stand" in locked(_with_pilot(air_locked=True)).evidence
        assert locked(_with_pilot(air_locked=True)).holds

    def test_a_lock_that_withstands_the_pilot_is_enough(self) -> None:
        plan = _with_pilot()
        find(plan, "SV")["lock_holds_against"] = ["hand", "pilot"]
        assert locked(plan).holds

    def test_a_lock_need_not_withstand_a_hand_that_can_not_move_the_device(self) -> None:
        plan = _with_pilot()
        find(plan, "SV").update(moved_by=["pilot"], lock_holds_against=["pilot"])
        assert locked(plan).holds

    def test_a_lock_that_does_not_withstand_the_hand_is_none(self) -> None:
        plan = small_plan()
        find(plan, "SV")["lock_holds_against"] = []
        assert not locked(plan).holds

    def test_a_pump_counts_as_long_as_somebody_can_switch_it_on(self) -> None:
        plan = _only_the_pump_locked_out()
        assert locked(plan).holds
        plan["steps"][0]["lock"] = None
        assert "mains -(EB in open)-> motor -(drives pump)-> header" in locked(plan).evidence

    def test_pressure_closed_in_behind_an_unlocked_valve_is_a_source(self) -> None:
        plan = small_plan()
        add_line(plan, line("pot"), [5e6, 5e6])
        add(plan, valve("PV", "pot", "run"), "closed")
        assert "(holds up to 5000000 Pa) pot -(PV in open)-> run" in locked(plan).evidence

    def test_a_device_that_falls_open_on_loss_of_air_is_no_barrier_even_unmoved(self) -> None:
        plan = small_plan()
        add_line(plan, line("air", "air"), [7e5, 8e5])
        spring = {"held": [], "fallen": [way("header open run")]}
        add(plan, fixed("SP") | {"positions": spring, "on_loss": {"line": "air", "position": "fallen"}})
        assert "-(SP in fallen)-> run" in locked(plan).evidence

    def test_a_device_that_fell_on_loss_of_air_may_come_back_with_it(self) -> None:
        plan = small_plan()
        add_line(plan, line("air", "air"))
        spring = {"held": [way("header open run")], "fallen": []}
        add(plan, fixed("SP") | {"positions": spring, "on_loss": {"line": "air", "position": "fallen"}})
        assert dead(plan).holds
        assert "-(SP in held)-> run" in locked(plan).evidence

    def test_a_locked_device_may_fall_on_loss_of_air_unless_its_lock_withstands_that(self) -> None:
        plan = small_plan()
        add_line(plan, line("air", "air"), [7e5, 8e5])
        find(plan, "SV")["on_loss"] = {"line": "air", "position": "open"}
        assert "-(SV in open)-> run" in locked(plan).evidence
        find(plan, "SV")["lock_holds_against"] = ["hand", "air"]
        assert locked(plan).holds

    def test_many_devices_are_not_tried_stand_by_stand(self) -> None:
        plan = small_plan()
        for k in range(16):
            add(plan, valve(f"XV{k}", "bank", "header"), "closed")
        assert "by growth only" in locked(plan).evidence


def _with_pilot(*, air_locked: bool = False) -> Entry:
    """SV can be driven by a pilot line that panel valve PV gives air to; PV stands closed."""
    plan = small_plan()
    add_line(plan, line("air", "air"), [7e5, 8e5])
    add_line(plan, line("pilot", "air"))
    plan["network"]["sources"].append(live("compressor", "air", [7e5, 8e5]))
    add(plan, valve("PV", "air", "pilot"), "closed")
    find(plan, "SV")["moved_by"] = ["hand", "pilot"]
    if air_locked:
        plan["steps"].insert(0, step(0, "isolate", lock=3))
        plan["locks"].append({"number": 3, "device": "PV", "position": "closed"})
    return plan


def _only_the_pump_locked_out() -> Entry:
    """The breaker is the one barrier; the header is drained with the bottles."""
    plan = small_plan()
    add(plan, valve("HB", "header", "tank"), "closed")
    plan["steps"] = [
        step(1, "isolate", sets="EB closed", lock=1),
        step(2, "release", sets="HB open", lock=2),
    ]
    plan["locks"] = [
        {"number": 1, "device": "EB", "position": "closed"},
        {"number": 2, "device": "HB", "position": "open"},
    ]
    plan["open_to_vent"] = ["header"]
    return plan


class TestLeast:
    def test_a_lock_that_keeps_nothing_out_is_one_too_many(self) -> None:
        plan = small_plan()
        plan["steps"].insert(0, step(0, "isolate", lock=3))
        plan["locks"].append({"number": 3, "device": "FW", "position": "close"})
        assert "without lock 3 on FW nothing comes to the zone" in least(plan).evidence
        assert not least(plan).holds

    def test_a_lock_that_keeps_pressure_from_other_lines_only_is_one_too_many(self) -> None:
        plan = small_plan()
        add_line(plan, line("pot"))
        add(plan, valve("PV", "header", "pot"), "closed")
        plan["steps"].insert(0, step(0, "isolate", lock=3))
        plan["locks"].append({"number": 3, "device": "PV", "position": "closed"})
        assert "without lock 3 on PV nothing comes to the zone" in least(plan).evidence

    def test_a_lock_counts_that_only_keeps_a_vent_open(self) -> None:
        plan = small_plan() | {"open_to_vent": []}
        assert "without lock 2 on DV" in least(plan).evidence

    def test_a_lock_on_a_panel_counts_when_a_pilot_could_lift_another_lock(self) -> None:
        assert least(_with_pilot(air_locked=True)).holds

    def test_a_vent_that_can_be_closed_is_no_sure_vent(self) -> None:
        plan = small_plan() | {"open_to_vent": ["run", "opening"]}
        assert "opening has no sure vent" in least(plan).evidence
        add(plan, fixed("PP", way("opening open tank")))
        assert least(plan).holds

    def test_a_vent_through_a_pipe_that_may_be_missing_is_no_sure_vent(self) -> None:
        plan = small_plan()
        find(plan, "DV")["positions"]["open"] = [way("maybe run open tank")]
        assert "run has no sure vent" in least(plan).evidence

    def test_a_vent_behind_a_lock_that_a_live_pilot_overcomes_is_no_sure_vent(self) -> None:
        plan = small_plan()
        add_line(plan, line("pilot", "air"), [7e5, 8e5])
        find(plan, "DV")["moved_by"] = ["hand", "pilot"]
        assert "run has no sure vent" in least(plan).evidence

    def test_a_vent_behind_a_lock_that_a_dead_pilot_can_not_overcome_is_sure(self) -> None:
        plan = small_plan()
        add_line(plan, line("pilot", "air"))
        find(plan, "DV")["moved_by"] = ["hand", "pilot"]
        assert least(plan).holds

    def test_a_vent_through_a_check_valve_is_no_sure_vent(self) -> None:
        plan = small_plan()
        find(plan, "DV")["positions"]["open"] = [way("run check tank")]
        assert "run has no sure vent" in least(plan).evidence

    @pytest.mark.parametrize("words", ["hose open tank", "tank open hose"])
    def test_a_vent_may_be_several_passages_away(self, words: str) -> None:
        plan = small_plan()
        add_line(plan, line("hose"))
        find(plan, "DV")["positions"]["open"] = [way("run open hose")]
        add(plan, fixed("PP", way(words)))
        assert least(plan).holds

    @pytest.mark.parametrize(
        ("change", "fault"),
        [
            (lambda plan: plan["steps"][1].update(lock=None), "lock 2 is in the list and not in place"),
            (lambda plan: plan["steps"][2].update(unlock=2), "lock 2 is in the list and not in place"),
            (lambda plan: plan["steps"][4].update(unlock=None), "moves DV while it is locked"),
            (lambda plan: plan["steps"][2].update(unlock=7), "takes off lock 7, which isn't in place"),
            (lambda plan: plan["steps"][2].update(lock=7), "lock 7, which isn't in the list"),
            (lambda plan: plan["steps"][2].update(lock=1), "lock 1, which is in place already"),
            (lambda plan: plan["steps"][0].update(lock=2), "moves SV and locks DV"),
            (lambda plan: plan["locks"][0].update(position="open"), "holds SV in closed, the list says open"),
            (
                lambda plan: plan["locks"][0].update(device="RV", position="fitted"),
                "RV, which can't be locked",
            ),
            (lambda plan: plan["locks"].append(plan["locks"][0]), "two locks have the number 1"),
        ],
    )
    def test_steps_and_list_of_locks_must_agree(self, change: Any, fault: str) -> None:
        plan = small_plan()
        change(plan)
        assert fault in least(plan).evidence
        assert not least(plan).holds

    def test_what_can_not_be_moved_is_not_moved(self) -> None:
        plan = small_plan()
        plan["steps"].append(step(7, "test", sets="RV fitted"))
        assert "moves RV, which can't be moved" in least(plan).evidence


class TestQuiet:
    def test_a_piston_that_travels_has_to_be_announced(self) -> None:
        plan = small_plan()
        plan["steps"].insert(0, step(0, "prepare", sets="FW open"))
        assert "in step s0 ram travels to open, unannounced" in quiet(plan).evidence
        plan["steps"][0]["moves_function"] = "ram"
        assert quiet(plan).holds

    def test_the_wrong_name_announces_nothing(self) -> None:
        plan = small_plan()
        plan["steps"].insert(0, step(0, "prepare", sets="FW open", moves_function="other"))
        assert not quiet(plan).holds

    def test_a_piston_that_stands_where_it_is_pushed_to_stays(self) -> None:
        plan = small_plan()
        plan["steps"] = [step(1, "prepare", sets="FW centre"), step(2, "prepare", sets="FW close")]
        assert quiet(plan).holds

    def test_a_piston_that_may_stand_anywhere_travels_at_the_first_push(self) -> None:
        plan = small_plan()
        plan["network"]["initial"]["positions"]["FW"] = "centre"
        plan["steps"] = [step(1, "prepare", sets="FW close")]
        assert "ram travels to close" in quiet(plan).evidence

    def test_a_piston_that_is_said_to_stand_where_it_is_pushed_to_stays(self) -> None:
        for end, calm in (("close", True), ("open", False), ("unknown", False)):
            plan = small_plan()
            plan["network"]["initial"]["positions"]["FW"] = "centre"
            plan["network"]["initial"]["pistons"] = {"ram": end}
            plan["steps"] = [step(1, "prepare", sets="FW close")]
            assert quiet(plan).holds is calm

    def test_what_is_said_of_a_piston_counts_less_than_what_pushes_it(self) -> None:
        plan = small_plan()
        plan["network"]["initial"]["pistons"] = {"ram": "open"}
        plan["steps"] = [step(1, "prepare", sets="FW open")]
        assert "ram travels to open" in quiet(plan).evidence

    def test_the_bottles_alone_move_a_piston(self) -> None:
        plan = small_plan()
        plan["steps"] = [step(1, "isolate", sets="EB closed"), step(2, "prepare", sets="FW open")]
        assert "in step s2 ram travels to open" in quiet(plan).evidence

    def test_a_regulator_that_is_backed_off_pushes_nothing(self) -> None:
        for set_pag, calm in ((0.0, True), (10e6, False)):
            plan = small_plan()
            find(plan, "SV")["positions"] = {
                "closed": [],
                "open": [way("header regulator run", set_pag)],
            }
            plan["network"]["initial"]["positions"] |= {"FW": "open", "SV": "closed"}
            plan["network"]["initial"]["pressures_pag"] |= {"run": [0.0, 0.0], "closing": [0.0, 0.0]}
            plan["steps"] = [step(1, "prepare", sets="SV open")]
            assert quiet(plan).holds is calm

    def test_a_regulator_that_is_backed_off_lets_no_live_source_out(self) -> None:
        for set_pag, calm in ((0.0, True), (10e6, False)):
            plan = small_plan()
            find(plan, "SV")["positions"]["open"] = [way("header regulator run", set_pag)]
            plan["network"]["initial"]["pressures_pag"] |= {"run": [0.0, 0.0], "closing": [0.0, 0.0]}
            plan["steps"] = [step(1, "prepare", sets="DV open")]
            assert quiet(plan).holds is calm

    def test_it_does_not_matter_from_which_side_a_passage_is_written(self) -> None:
        plan = small_plan()
        find(plan, "SV")["positions"]["open"] = [way("run open header")]
        plan["steps"] = [step(1, "prepare", sets="FW open")]
        assert "ram travels to open" in quiet(plan).evidence

    def test_a_blocked_in_line_does_not_push_a_piston(self) -> None:
        plan = small_plan()
        add_line(plan, line("pot"), [5e6, 5e6])
        plan["network"]["sources"].append(bottles("pot", "pot") | {"gas": False})
        add(plan, valve("PV", "pot", "opening"), "closed")
        plan["network"]["initial"]["positions"] |= {"FW": "centre"}
        plan["steps"] = [step(1, "prepare", sets="PV open")]
        assert quiet(plan).holds

    def test_letting_go_of_one_side_moves_a_piston_that_was_pushed_from_both(self) -> None:
        plan = small_plan()
        add(plan, valve("XV", "run", "opening"), "open")
        find(plan, "FW")["positions"]["close"].pop()
        plan["steps"] = [step(1, "prepare", sets="XV closed")]
        assert "ram travels to close" in quiet(plan).evidence

    def test_a_pump_that_starts_has_to_be_announced(self) -> None:
        plan = _header_drained_and_filled_again()
        assert "in step s5 pump starts, unannounced" in quiet(plan).evidence
        plan["steps"][-1]["starts_pump"] = "pump"
        assert quiet(plan).holds

    def test_a_pump_left_on_automatic_starts_as_the_header_falls(self) -> None:
        plan = _header_drained_and_filled_again()
        plan["steps"] = plan["steps"][1:3]
        assert "in step s3 pump starts" in quiet(plan).evidence
        assert "in step s3 pump is let out to a vent" in quiet(plan).evidence

    def test_a_pump_switched_on_under_full_pressure_does_not_start(self) -> None:
        plan = small_plan()
        plan["steps"] = [step(1, "isolate", sets="EB closed"), step(2, "reinstate", sets="EB open")]
        assert quiet(plan).holds

    def test_a_pump_without_a_switch_starts_with_its_supply(self) -> None:
        plan = small_plan()
        del plan["network"]["sources"][1]["senses"]
        plan["steps"] = [step(1, "isolate", sets="EB closed"), step(2, "reinstate", sets="EB open")]
        assert "in step s2 pump starts" in quiet(plan).evidence

    def test_a_power_supply_that_comes_on_is_no_pump(self) -> None:
        plan = small_plan()
        add_line(plan, line("panel", "electric"))
        plan["network"]["sources"].append(live("supply", "panel", [24.0, 24.0], "motor"))
        plan["steps"] = [step(1, "isolate", sets="EB closed"), step(2, "reinstate", sets="EB open")]
        assert quiet(plan).holds

    def test_a_live_source_let_out_to_a_vent_can_not_be_announced(self) -> None:
        plan = small_plan()
        plan["steps"].insert(0, step(0, "prepare", sets="DV open", starts_pump="pump"))
        assert "in step s0 pump is let out to a vent" in quiet(plan).evidence

    def test_a_live_source_is_let_out_through_a_check_valve_too(self) -> None:
        plan = small_plan()
        find(plan, "SV")["positions"]["open"] = [way("header check run")]
        plan["steps"] = [step(0, "prepare", sets="DV open", starts_pump="pump")]
        assert "pump is let out to a vent" in quiet(plan).evidence

    def test_what_was_so_before_the_plan_is_not_its_doing(self) -> None:
        plan = small_plan()
        plan["network"]["initial"]["positions"]["DV"] = "open"
        plan["steps"] = [step(1, "prepare", sets="FW centre")]
        assert quiet(plan).holds


def _header_drained_and_filled_again() -> Entry:
    plan = small_plan()
    add(plan, valve("HB", "header", "tank"), "closed")
    plan["steps"] = [
        step(1, "isolate", sets="EB closed"),
        step(2, "isolate", sets="BV closed"),
        step(3, "release", sets="HB open"),
        step(4, "reinstate", sets="HB closed"),
        step(5, "reinstate", sets="EB open"),
    ]
    return plan


class TestHonest:
    def test_a_band_that_is_too_narrow_promises_too_much(self) -> None:
        for band in (reads("header", 19.5e6, 20.8e6), reads("header", 18.8e6, 20.0e6)):
            plan = small_plan()
            plan["steps"][0]["expect"] = band
            assert "step s1 promises" in honest(plan).evidence
            assert not honest(plan).holds

    def test_the_stated_tolerance_of_a_gauge_widens_the_band(self) -> None:
        plan = small_plan()
        plan["steps"][0]["expect"] = [reads("header", 19.0e6, 20.7e6)[0] | {"tolerance_pa": 0.2e6}]
        assert honest(plan).holds

    def test_a_zero_that_is_not_shown_is_not_printed(self) -> None:
        plan = small_plan()
        plan["steps"][0]["expect"] = reads("run", 0.0, 0.0)
        assert "reads as zero, and run is at [18900000, 20700000] Pa" in honest(plan).evidence

    def test_a_wide_band_of_a_coarse_gauge_does_not_make_a_remnant_zero(self) -> None:
        plan = small_plan()
        add_line(plan, line("pot"), [0.0, 0.5e6])
        plan["steps"][0]["expect"] = reads("pot", 0.0, 1.0e6)
        assert "reads as zero" in honest(plan).evidence

    def test_a_line_behind_a_leaking_check_valve_is_not_printed_as_zero(self) -> None:
        plan = small_plan()
        add_line(plan, line("stub"))
        add(plan, fixed("CV", way("stub check header")))
        plan["steps"][0]["expect"] = reads("stub", 0.0, 0.0)
        assert "stub is at [0, 20700000] Pa" in honest(plan).evidence

    def test_a_line_that_is_called_dead_has_to_be(self) -> None:
        assert honest(small_plan() | {"dead": ["run", "closing"]}).holds
        assert "header is called dead" in honest(small_plan() | {"dead": ["run", "header"]}).evidence

    def test_no_tolerance_makes_a_zero(self) -> None:
        plan = small_plan()
        add_line(plan, line("pot"), [0.0, 0.1e6])
        plan["steps"][0]["expect"] = [reads("pot", 0.0, 0.0)[0] | {"tolerance_pa": 0.2e6}]
        assert "reads as zero" in honest(plan).evidence

    @pytest.mark.parametrize(("low", "high"), [(0.0, 5e6), (1e6, 1.5e6)])
    def test_a_band_that_nobody_takes_for_zero_only_has_to_be_wide_enough(self, low: float, high: float) -> None:
        plan = small_plan()
        add_line(plan, line("pot"), [1.1e6, 1.4e6])
        plan["steps"][0]["expect"] = reads("pot", low, high)
        assert honest(plan).holds

    def test_readings_after_the_work_are_checked_too(self) -> None:
        plan = small_plan()
        plan["steps"][5]["expect"] = reads("run", 0.0, 0.0)
        assert "step s6 promises" in honest(plan).evidence


class TestReversible:
    def test_a_valve_left_closed_is_not_as_it_was(self) -> None:
        plan = small_plan()
        plan["steps"].append(step(7, "test", sets="BV closed"))
        assert "BV ends in closed, began in open" in reversible(plan).evidence

    def test_a_lock_left_on_is_told(self) -> None:
        plan = small_plan()
        plan["steps"][5]["unlock"] = None
        assert "lock 1 is still on SV" in reversible(plan).evidence

    def test_a_zone_that_stays_empty_is_not_put_back(self) -> None:
        plan = small_plan()
        plan["steps"] = plan["steps"][:5]
        assert "run ends at [0, 0] Pa, began at [18900000, 20700000] Pa" in reversible(plan).evidence

    def test_pressure_lost_behind_a_blocking_centre_stays_lost_and_is_told_where_not_drained(self) -> None:
        plan = small_plan()
        add_line(plan, line("pot"), [5e6, 5e6])
        add_line(plan, line("pan"), [4e6, 4e6])
        add(plan, valve("PV", "pot", "pan"), "closed")
        plan["steps"] += [step(7, "test", sets="PV open"), step(8, "test", sets="PV closed")]
        assert "pot ends at [4000000, 5000000] Pa, began at [5000000, 5000000] Pa" in reversible(plan).evidence

    def test_a_line_that_was_emptied_and_has_no_source_may_stay_empty(self) -> None:
        plan = small_plan()
        add_line(plan, line("pot"), [5e6, 5e6])
        add(plan, valve("PV", "pot", "tank"), "closed")
        plan["steps"] += [step(7, "test", sets="PV open"), step(8, "test", sets="PV closed")]
        assert reversible(plan).holds

    def test_a_zone_filled_again_to_another_pressure_is_put_back(self) -> None:
        plan = small_plan()
        find(plan, "SV")["positions"]["open"] = [way("header regulator run", 10e6)]
        plan["network"]["initial"]["pressures_pag"] |= {"run": [15e6, 15e6], "closing": [15e6, 15e6]}
        assert reversible(plan).holds

    def test_gas_that_was_let_out_has_to_be_filled_in_again(self) -> None:
        plan = small_plan()
        plan["network"]["initial"]["positions"]["BV"] = "closed"
        add(plan, valve("BB", "bank", "tank"), "closed")
        plan["steps"] += [step(7, "work", sets="BB open"), step(8, "reinstate", sets="BB closed")]
        plan["steps"].append(step(9, "reinstate", recharges="bank"))
        assert reversible(plan).holds
        plan["steps"][-2:] = reversed(plan["steps"][-2:])
        assert not reversible(plan).holds

    def test_a_line_that_gained_pressure_is_told(self) -> None:
        plan = small_plan()
        add_line(plan, line("pot"))
        add(plan, valve("PV", "header", "pot"), "closed")
        plan["steps"] += [step(7, "test", sets="PV open"), step(8, "test", sets="PV closed")]
        assert "pot ends at [18900000, 20700000] Pa, began at [0, 0] Pa" in reversible(plan).evidence


class TestUnreadablePlan:
    @pytest.mark.parametrize(
        "change",
        [
            lambda plan: plan["zone"].append("nowhere"),
            lambda plan: plan["steps"][0]["action"].update(device="nobody"),
            lambda plan: plan["steps"][0]["action"].update(position="ajar"),
            lambda plan: plan["network"]["initial"]["positions"].pop("FW"),
            lambda plan: plan["steps"][0].update(expect=[{"gauge": "PI", "low_pag": 0, "high_pag": 0}]),
            lambda plan: plan["network"]["devices"].append(fixed("CV", way("run hopefully header"))),
        ],
    )
    def test_gets_no_verdict(self, change: Any) -> None:
        plan = small_plan()
        change(plan)
        with pytest.raises(CannotJudgeError):
            check_all(plan)
