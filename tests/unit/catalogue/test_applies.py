"""A job applies to the equipment of its kind that meets all its conditions, named as the description names it."""

from dataclasses import replace

import pytest
from tests.properties.planning import EXAMPLES
from tests.unit.plan.changing import data_of

from provenzero.catalogue.applies import Misfit, applies_to, misfit
from provenzero.catalogue.job import Condition, Equipment, Job, Leave
from provenzero.catalogue.load import catalogue
from provenzero.unit.load import load, load_data
from provenzero.unit.model import Unit

JOB = Job(
    id="job",
    title="A job",
    equipment=Equipment.FUNCTION,
    conditions=(),
    opens=("open_line",),
    leave=Leave.AS_FOUND,
    limits=(),
    hazards=(),
    tools=(),
    prepare=(),
    work=(),
    restore=(),
    tests=(),
)
LAND_RIG_FUNCTIONS = ("annular", "upper-pipe-rams", "blind-rams", "lower-pipe-rams", "choke-gate", "kill-gate")
JACK_UP_PREVENTERS = ("annular", "upper-pipe-rams", "blind-shear-rams", "middle-pipe-rams", "lower-pipe-rams")
JACK_UP_FUNCTIONS = (*JACK_UP_PREVENTERS, "inner-choke-gate", "outer-choke-gate", "kill-gate")
WORKOVER_FUNCTIONS = ("annular", "pipe-rams", "blind-rams")


def unit_of(name: str) -> Unit:
    unit = load(EXAMPLES / f"{name}.yaml").unit
    assert unit is not None
    return unit


def bottles(bank: str, count: int) -> tuple[str, ...]:
    return tuple(f"{bank}/{n}" for n in range(1, count + 1))


APPLIES = {
    "land-rig": {
        "lock-out-for-transport": ("unit",),
        "overhaul-air-pump": ("P-2",),
        "overhaul-electric-pump": ("P-1",),
        "replace-annular-regulator": ("RG-2",),
        "replace-bottle-bladder": bottles("BK-1", 8) + bottles("BK-2", 8),
        "replace-bypass-valve": ("BP-1",),
        "replace-four-way-valve": tuple(f"HV-{n}" for n in range(1, 7)),
        "replace-hoses": LAND_RIG_FUNCTIONS,
        "replace-manifold-regulator": ("RG-1",),
        "work-on-preventer-end": LAND_RIG_FUNCTIONS[:4],
    },
    "jack-up": {
        "lock-out-for-transport": ("unit",),
        "overhaul-air-pump": ("P-3", "P-4"),
        "overhaul-electric-pump": ("P-1", "P-2"),
        "replace-annular-regulator": ("RG-2",),
        "replace-bottle-bladder": (*(b for n in range(1, 5) for b in bottles(f"BK-{n}", 8)), "SB-1/1"),
        "replace-bypass-valve": ("BP-1",),
        "replace-four-way-valve": tuple(f"HV-{n}" for n in range(1, 9)),
        "replace-hoses": JACK_UP_FUNCTIONS,
        "replace-manifold-regulator": ("RG-1",),
        "work-on-preventer-end": JACK_UP_PREVENTERS,
    },
    "workover": {
        "lock-out-for-transport": ("unit",),
        "overhaul-air-pump": ("PA-1", "PA-2"),
        "overhaul-electric-pump": (),
        "replace-annular-regulator": ("RG-B",),
        "replace-bottle-bladder": bottles("BK-A", 4),
        "replace-bypass-valve": (),
        "replace-four-way-valve": ("HV-A", "HV-B", "HV-C"),
        "replace-hoses": WORKOVER_FUNCTIONS,
        "replace-manifold-regulator": ("RG-A",),
        "work-on-preventer-end": WORKOVER_FUNCTIONS,
    },
}


@pytest.mark.parametrize("name", sorted(APPLIES))
def test_the_shipped_jobs_apply_to_the_equipment_of_an_example(name: str) -> None:
    unit = unit_of(name)
    assert {job.id: applies_to(job, unit) for job in catalogue().jobs} == APPLIES[name]


@pytest.mark.parametrize(
    ("equipment", "names"),
    [
        (Equipment.FUNCTION, LAND_RIG_FUNCTIONS),
        (Equipment.FOUR_WAY_VALVE, ("HV-1", "HV-2", "HV-3", "HV-4", "HV-5", "HV-6")),
        (Equipment.PUMP, ("P-1", "P-2")),
        (Equipment.REGULATOR, ("RG-1", "RG-2")),
        (Equipment.BYPASS, ("BP-1",)),
        (Equipment.BOTTLE, bottles("BK-1", 8) + bottles("BK-2", 8)),
        (Equipment.UNIT, ("unit",)),
    ],
)
def test_a_job_without_conditions_applies_to_all_of_its_kind(equipment: Equipment, names: tuple[str, ...]) -> None:
    assert applies_to(replace(JOB, equipment=equipment), unit_of("land-rig")) == names


def test_a_condition_lets_through_any_of_its_words() -> None:
    condition = Condition(attribute="kind", allowed=("gate_valve", "annular"))
    job = replace(JOB, conditions=(condition,))
    assert applies_to(job, unit_of("land-rig")) == ("annular", "choke-gate", "kill-gate")


def test_all_conditions_must_hold() -> None:
    conditions = (
        Condition(attribute="kind", allowed=("gate_valve", "annular")),
        Condition(attribute="kind", allowed=("annular", "blind_ram")),
    )
    assert applies_to(replace(JOB, conditions=conditions), unit_of("land-rig")) == ("annular",)


def test_a_condition_on_what_the_equipment_has_not_lets_nothing_through() -> None:
    job = replace(JOB, conditions=(Condition(attribute="drive", allowed=("electric",)),))
    assert applies_to(job, unit_of("land-rig")) == ()


def test_a_regulator_that_serves_more_than_annulars_is_a_manifold_regulator() -> None:
    data = data_of("land-rig")
    data["functions"][4]["fed_from"] = "annular-line"
    unit = load_data(data).unit
    assert unit is not None
    annular = replace(
        JOB, equipment=Equipment.REGULATOR, conditions=(Condition(attribute="serves", allowed=("annular",)),)
    )
    assert applies_to(annular, unit_of("land-rig")) == ("RG-2",)
    assert applies_to(annular, unit) == ()


def misfit_of(name: str, on: str) -> Misfit:
    job = catalogue().job(name)
    assert job is not None
    return misfit(job, unit_of("land-rig"), on)


@pytest.mark.parametrize(
    ("job", "on", "words"),
    [
        ("replace-hoses", "P-1", "P-1 is a pump; replace-hoses is done on a function"),
        ("replace-hoses", "RP-1", "RP-1 is a remote panel; replace-hoses is done on a function"),
        ("replace-hoses", "HCU-7", "HCU-7 is the whole unit; replace-hoses is done on a function"),
        ("overhaul-air-pump", "P-1", "P-1 is a pump (drive: electric); overhaul-air-pump asks for drive: air"),
    ],
)
def test_a_thing_that_is_there_is_named_for_what_it_is(job: str, on: str, words: str) -> None:
    assert misfit_of(job, on) == Misfit(words=words, known=True, meant=None)


@pytest.mark.parametrize(
    ("job", "on", "meant"),
    [
        ("replace-hoses", "HV-2", "upper-pipe-rams"),
        ("replace-four-way-valve", "upper-pipe-rams", "HV-2"),
        ("replace-bottle-bladder", "BK-2", "BK-2/1"),
        ("work-on-preventer-end", "HV-5", None),  # its function is a gate valve, which the job does not take
    ],
)
def test_a_piece_leads_to_the_one_of_the_right_kind_that_goes_with_it(job: str, on: str, meant: str | None) -> None:
    assert misfit_of(job, on).known
    assert misfit_of(job, on).meant == meant


def test_a_name_that_nothing_has_is_not_known() -> None:
    found = misfit_of("replace-hoses", "upper-rams")
    assert found == Misfit(words="there is no function upper-rams on HCU-7", known=False, meant=None)


def test_a_job_on_the_whole_unit_leads_to_the_word_unit() -> None:
    assert misfit_of("lock-out-for-transport", "HCU-7").meant == "unit"
