"""What a schema cannot see is found on the circuit: one broken description for each rule, with place and cure."""

from collections.abc import Callable
from typing import Any

import pytest
from tests.unit.plan.changing import changed

from provenzero.finding import Severity
from provenzero.unit.load import Loaded, load_data

Data = dict[str, Any]
Case = tuple[str, Callable[[Data], object], str, str, str]


def add_regulator(serves: str, fed_from: str = "header", tag: str = "RG-9") -> Callable[[Data], object]:
    """A further regulator, a copy of the first one without its gauges."""

    def change(data: Data) -> None:
        first = {key: value for key, value in data["regulators"][0].items() if key != "fittings"}
        data["regulators"].append(first | {"tag": tag, "serves": serves, "fed_from": fed_from})

    return change


def ring(data: Data) -> None:
    data["regulators"][0]["fed_from"] = "annular-line"
    data["regulators"][1]["fed_from"] = "manifold"


def backup(data: Data) -> None:
    run = [{"kind": "valve", "tag": "NV-1", "location": "rack", "lockable": "yes"}]
    data["nitrogen_backup"] = [
        {
            "tag": "NB-1",
            "location": "rack",
            "bottles": 2,
            "bottle_volume": "50 L",
            "pressure": "2400 psi",
            "run": run,
            "delivers_to": "manifolt",
        }
    ]


def bottle_valves(data: Data) -> None:
    data["banks"][0]["bottle_valves"] = [
        {"tag": f"XV-{n}", "location": "bank BK-1", "lockable": "yes"} for n in range(1, 4)
    ]


def no_air(data: Data) -> None:
    data["air"] = "none"


def relief_behind_valve(data: Data) -> None:
    data["pumps"][0]["discharge"].append(data["pumps"][0]["discharge"].pop(2))


ERRORS: dict[str, Case] = {
    "two functions of one name": (
        "land-rig",
        lambda d: d["functions"][3].update(name="upper-pipe-rams"),
        "functions[3].name",
        "the name upper-pipe-rams a second time",
        "a name of its own",
    ),
    "a function named as a line": (
        "land-rig",
        lambda d: d["functions"][0].update(name="header"),
        "functions[0].name",
        "the name header",
        "a name of its own",
    ),
    "two regulators on one line": (
        "land-rig",
        add_regulator("manifold"),
        "regulators[2].serves",
        "a second regulator on the line manifold",
        "one regulator a line",
    ),
    "a regulator that serves the header": (
        "land-rig",
        add_regulator("header"),
        "regulators[2].serves",
        "the name header",
        "a name of its own",
    ),
    "a line named as a function": (
        "land-rig",
        add_regulator("blind-rams"),
        "regulators[2].serves",
        "the name blind-rams",
        "a name of its own",
    ),
    "a tag twice": (
        "land-rig",
        lambda d: d["pumps"][1]["suction"][0].update(tag="SV-1"),
        "pumps[1].suction[0].tag",
        "the tag SV-1 a second time",
        "each tag once",
    ),
    "a tag twice but for its capitals": (
        "land-rig",
        lambda d: d["pumps"][1]["suction"][0].update(tag="sv-1"),
        "pumps[1].suction[0].tag",
        "the tag sv-1 a second time",
        "each tag once",
    ),
    "the tag of a bleed twice": (
        "land-rig",
        lambda d: d["banks"][1]["bleed"].update(tag="BV-1"),
        "banks[1].bleed.tag",
        "the tag BV-1 a second time",
        "each tag once",
    ),
    "a tag that is the name of a line": (
        "land-rig",
        lambda d: d["banks"][0].update(tag="Header"),
        "banks[0].tag",
        "the tag Header",
        "a tag other than the names of lines",
    ),
    "a function on no line": (
        "land-rig",
        lambda d: d["functions"][1].update(fed_from="manifolt"),
        "functions[1].fed_from",
        "manifolt, which is no pressure line here",
        "did you mean manifold?",
    ),
    "a valve moved from no panel": (
        "land-rig",
        lambda d: d["functions"][1]["valve"].update(panels=["RP-2"]),
        "functions[1].valve.panels[0]",
        "RP-2, which is no panel here",
        "one of RP-1",
    ),
    "a bank on no line": (
        "land-rig",
        lambda d: d["banks"][0].update(attached_to="anular.open"),
        "banks[0].attached_to",
        "anular.open, which is no line here",
        "did you mean annular.open?",
    ),
    "a pump into no line": (
        "land-rig",
        lambda d: d["pumps"][0].update(delivers_to="heder"),
        "pumps[0].delivers_to",
        "heder, which is no pressure line here",
        "did you mean header?",
    ),
    "a regulator fed from no line": (
        "land-rig",
        lambda d: d["regulators"][1].update(fed_from="manifolt"),
        "regulators[1].fed_from",
        "manifolt, which is no pressure line here",
        "did you mean manifold?",
    ),
    "a bypass around no regulator": (
        "land-rig",
        lambda d: d["bypasses"][0].update(around="RG-3"),
        "bypasses[0].around",
        "RG-3, which is no regulator here",
        "one of RG-1, RG-2",
    ),
    "a bypass from no line": (
        "land-rig",
        lambda d: d["bypasses"][0].update({"from": "heder"}),
        "bypasses[0].from",
        "heder, which is no pressure line here",
        "did you mean header?",
    ),
    "a bypass to no line": (
        "land-rig",
        lambda d: d["bypasses"][0].update(to="manifolt"),
        "bypasses[0].to",
        "manifolt, which is no pressure line here",
        "did you mean manifold?",
    ),
    "a bypass to itself": (
        "land-rig",
        lambda d: d["bypasses"][0].update(to="header"),
        "bypasses[0].to",
        "a bypass from header to itself",
        "two different lines",
    ),
    "nitrogen into no line": (
        "land-rig",
        backup,
        "nitrogen_backup[0].delivers_to",
        "manifolt, which is no pressure line here",
        "did you mean manifold?",
    ),
    "regulators in a ring": (
        "land-rig",
        ring,
        "regulators[0].fed_from",
        "a ring of regulators",
        "a way that begins at the header",
    ),
    "a regulator set above the rating": (
        "land-rig",
        lambda d: d["regulators"][0].update(set_pressure="3500 psi", fittings=[]),
        "regulators[0].set_pressure",
        "3500 psi",
        "at most 3000 psi, the rating",
    ),
    "a gauge too small for the header": (
        "land-rig",
        lambda d: d["header"]["fittings"][0].update(full_scale="2000 psi"),
        "header.fittings[0].full_scale",
        "a full scale of 2000 psi",
        "at least 3000 psi, the pressure of its line",
    ),
    "a gauge too small for its regulator": (
        "land-rig",
        lambda d: d["regulators"][0]["fittings"][0].update(full_scale="1000 psi"),
        "regulators[0].fittings[0].full_scale",
        "a full scale of 1000 psi",
        "at least 1500 psi, the pressure of its line",
    ),
    "a pump that starts above its stop": (
        "land-rig",
        lambda d: d["pumps"][1].update(start_pressure="2950 psi"),
        "pumps[1].start_pressure",
        "a start at 2950 psi",
        "less than the stop at 2900 psi",
    ),
    "a pump that stops above the rating": (
        "land-rig",
        lambda d: d["pumps"][0].update(stop_pressure="3100 psi"),
        "pumps[0].stop_pressure",
        "a stop at 3100 psi",
        "at most the rating, 3000 psi",
    ),
    "a relief below the stop": (
        "land-rig",
        lambda d: d["pumps"][0]["discharge"][2].update(set_pressure="2800 psi"),
        "pumps[0].discharge[2].set_pressure",
        "a relief at 2800 psi",
        "more than the stop pressure, 3000 psi",
    ),
    "bottle valves that are too few": (
        "land-rig",
        bottle_valves,
        "banks[0].bottle_valves",
        "3 bottle valves for 8 bottles",
        "one valve a bottle, or none",
    ),
    "a precharge too high": (
        "land-rig",
        lambda d: d["banks"][1]["precharge"].update(pressure="2600 psi"),
        "banks[1].precharge.pressure",
        "a precharge of 2600 psi",
        "less than the lowest pressure in service, 2600 psi",
    ),
    "more fluid than tank": (
        "land-rig",
        lambda d: d["reservoir"].update(fluid_volume="401 gal"),
        "reservoir.fluid_volume",
        "more fluid than the tank holds",
        "at most the volume of the tank",
    ),
    "a summer colder than winter": (
        "land-rig",
        lambda d: d.update(ambient={"low": "35 degC", "high": "-10 degC"}),
        "ambient.low",
        "a low above the high",
        "the colder one first",
    ),
    "an air pump without air": (
        "land-rig",
        no_air,
        "pumps[1].drive",
        "an air pump on a unit without air",
        "the air supply under `air`",
    ),
    "an air panel without air": (
        "land-rig",
        no_air,
        "panels[0].kind",
        "a panel that works with air on a unit without air",
        "the air supply under `air`",
    ),
    "an air-operated regulator without air": (
        "jack-up",
        no_air,
        "regulators[1].control",
        "an air-operated regulator on a unit without air",
        "the air supply under `air`",
    ),
    "a bleed into returns that are not there": (
        "land-rig",
        lambda d: d["banks"][0]["bleed"].update(to="returns"),
        "banks[0].bleed.to",
        "returns, on a unit without a common return header",
        "reservoir or atmosphere",
    ),
    "a relief into returns that are not there": (
        "land-rig",
        lambda d: d["header"]["fittings"][1].update(to="returns"),
        "header.fittings[1].to",
        "returns, on a unit without a common return header",
        "reservoir or atmosphere",
    ),
}
WARNINGS: dict[str, Case] = {
    "a relief set far above the rating": (
        "land-rig",
        lambda d: d["header"]["fittings"][1].update(set_pressure="3301 psi"),
        "header.fittings[1].set_pressure",
        "a relief at 3301 psi",
        "at most 110 % of the rating, 3300 psi",
    ),
    "a relief behind a valve": (
        "land-rig",
        relief_behind_valve,
        "pumps[0].discharge[3]",
        "the relief RV-2 behind a shut-off valve",
        "a relief that no valve can part from its pump",
    ),
}


def check(case: Case) -> tuple[Loaded, Severity]:
    """The description after the change, and how grave the finding is that was asked for."""
    example, change, path, found, expected = case
    loaded = load_data(changed(example, change))
    told = [f for f in loaded.findings if f.place.path == path]
    assert len(told) == 1, [str(f) for f in loaded.findings]
    assert found in told[0].found
    assert expected in told[0].expected
    assert told[0].place.line is not None
    return loaded, told[0].severity


@pytest.mark.parametrize("case", ERRORS.values(), ids=ERRORS.keys())
def test_a_circuit_that_cannot_be_stops_the_work(case: Case) -> None:
    loaded, severity = check(case)
    assert severity is Severity.ERROR
    assert loaded.unit is None


@pytest.mark.parametrize("case", WARNINGS.values(), ids=WARNINGS.keys())
def test_a_circuit_that_should_not_be_is_told_and_still_planned(case: Case) -> None:
    loaded, severity = check(case)
    assert severity is Severity.WARNING
    assert loaded.unit is not None


ALLOWED: dict[str, tuple[str, Callable[[Data], object]]] = {
    "a gauge that ends where the pump stops": (
        "land-rig",
        lambda d: d["header"]["fittings"][0].update(full_scale="3000 psi"),
    ),
    "a precharge just below service": (
        "land-rig",
        lambda d: d["banks"][1]["precharge"].update(pressure="2599 psi"),
    ),
    "a relief at the stop": (
        "land-rig",
        lambda d: d["pumps"][0]["discharge"][2].update(set_pressure="3000 psi"),
    ),
    "a relief at 110 per cent": (
        "land-rig",
        lambda d: d["header"]["fittings"][1].update(set_pressure="3300 psi"),
    ),
    "a bank on a chamber": ("land-rig", lambda d: d["banks"][0].update(attached_to="annular.close")),
    "a line named annular beside the function": (
        "land-rig",
        lambda d: (d["regulators"][1].update(serves="annular"), d["functions"][0].update(fed_from="annular")),
    ),
    "regulators one behind the other": ("land-rig", lambda d: d["regulators"][1].update(fed_from="manifold")),
    "a tank full to the brim": ("land-rig", lambda d: d["reservoir"].update(fluid_volume="400 gal")),
}


@pytest.mark.parametrize("case", ALLOWED.values(), ids=ALLOWED.keys())
def test_what_is_just_right_is_not_told(case: tuple[str, Callable[[Data], object]]) -> None:
    example, change = case
    assert [str(f) for f in load_data(changed(example, change)).findings] == []
