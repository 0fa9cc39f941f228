"""Where no safe plan exists the planner says so, and names the line and the reason."""

from typing import Any

import pytest
from tests.properties.planning import example, plan_of, unit_from
from tests.unit.plan.changing import changed

from provenzero.plan.model import Plan, Refusal


def _without_bleeds(data: dict[str, Any]) -> None:
    for bank in data["banks"]:
        bank["bleed"] = "none"
    for pump in data["pumps"]:
        pump["discharge"] = [e for e in pump["discharge"] if e["kind"] != "bleed"]
    for regulator in data["regulators"]:
        regulator["relieving"] = "no"
    for function in data["functions"]:
        function["valve"]["centre"] = "blocks"


def test_blocked_centres_and_no_bleed_anywhere_are_refused_with_the_line_that_cannot_be_let_out() -> None:
    refused = plan_of(unit_from(changed("land-rig", _without_bleeds)), "replace-hoses", "upper-pipe-rams")
    assert isinstance(refused, Refusal)
    assert ("upper-pipe-rams.open", "trapped") in [(o.line, o.words) for o in refused.obstacles]


def test_a_pump_that_cannot_be_cut_off_from_its_energy_is_named() -> None:
    def no_isolator(data: dict[str, Any]) -> None:
        data["pumps"][0]["energy"] = "none"

    refused = plan_of(unit_from(changed("land-rig", no_isolator)), "replace-bypass-valve", "BP-1")
    assert isinstance(refused, Refusal)
    assert "no_isolator" in {o.words for o in refused.obstacles}


def test_an_isolator_that_takes_no_lock_is_as_good_as_none() -> None:
    def no_lock(data: dict[str, Any]) -> None:
        data["pumps"][0]["energy"]["lockable"] = "unknown"

    refused = plan_of(unit_from(changed("land-rig", no_lock)), "replace-bypass-valve", "BP-1")
    assert isinstance(refused, Refusal)


def test_a_stub_behind_a_check_valve_without_a_bleed_cannot_be_shown_dead() -> None:
    def check_only(data: dict[str, Any]) -> None:
        valve = data["functions"][2]["valve"]
        valve["supply"] = [e for e in valve["supply"] if e["kind"] == "check"]

    refused = plan_of(unit_from(changed("jack-up", check_only)), "replace-four-way-valve", "HV-3")
    assert isinstance(refused, Refusal)
    assert "blind-shear-rams.supply" in {o.line for o in refused.obstacles}
    assert isinstance(plan_of(example("jack-up"), "replace-four-way-valve", "HV-3"), Plan)


def test_a_port_that_is_not_there_is_a_mistake_of_the_caller() -> None:
    with pytest.raises(ValueError, match="no port"):
        plan_of(example("jack-up"), "replace-hoses", "P-1")


def test_a_panel_that_hangs_on_its_supply_without_an_isolator_keeps_the_unit_from_being_locked_out() -> None:
    def no_isolator(data: dict[str, Any]) -> None:
        data["panels"][1]["energy"] = "none"

    refused = plan_of(unit_from(changed("jack-up", no_isolator)), "lock-out-for-transport", "unit")
    assert isinstance(refused, Refusal)
    assert ("supply.emergency switchboard", "no_isolator") in {(o.line, o.words) for o in refused.obstacles}
