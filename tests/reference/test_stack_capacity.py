"""What a stack needs from its accumulators, against published worked examples."""

from dataclasses import replace
from math import ceil

import pytest
from tests.unit.plan.changing import changed

from provenzero.figures.bank import charge_of, usable_by_hand_m3
from provenzero.figures.need import closing_time_s, closing_volume_m3, least_useful_pag
from provenzero.unit.load import load_data
from provenzero.unit.model import Unit

GALLON_M3 = 0.003785411784
PSI_PA = 6894.757293168


def _stack(*pieces: tuple[str, float]) -> Unit:
    """A unit whose functions have these kinds and volumes [gal]."""

    def change(data: dict[str, object]) -> None:
        functions = data["functions"]
        assert isinstance(functions, list)
        model = functions[1]
        data["functions"] = [
            {
                **model,
                "name": f"f{i}",
                "kind": kind,
                "close_volume": f"{gal} gal",
                "open_volume": f"{gal} gal",
                "valve": {"tag": f"HV-{i}", "location": "m", "centre": "blocks", "lockable": "yes"},
            }
            for i, (kind, gal) in enumerate(pieces)
        ]

    unit = load_data(changed("land-rig", change)).unit
    assert unit is not None
    return unit


def test_an_annular_three_rams_and_two_gate_valves_with_half_in_reserve_need_nineteen_bottles() -> None:
    # Crumpton, Well Control for Completions and Interventions, 2018, p. 182: 90.63 gal; at 5 gal a bottle 19 bottles.
    unit = _stack(("annular", 24.1), *[("pipe_ram", 11.8)] * 3, *[("gate_valve", 0.46)] * 2)
    need = closing_volume_m3(unit.functions)
    assert need is not None
    with_reserve = 1.5 * need / GALLON_M3
    assert with_reserve == pytest.approx(90.63, abs=0.01)
    assert ceil(with_reserve / 5.0) == 19


def test_a_small_stack_with_half_in_reserve_needs_five_bottles() -> None:
    # Drilling formula collection, 2011: annular 4.5, rams 3.5, 4.0, 3.5, gate valves 0.5, 0.5 gal; 24.75 gal.
    rams = [("pipe_ram", 3.5), ("blind_ram", 4.0), ("pipe_ram", 3.5)]
    unit = _stack(("annular", 4.5), *rams, *[("gate_valve", 0.5)] * 2)
    need = closing_volume_m3(unit.functions)
    assert need is not None
    assert 1.5 * need / GALLON_M3 == pytest.approx(24.75, abs=1e-9)
    assert ceil(24.75 / 5.0) == 5


def test_one_bottle_gives_five_gallons_by_the_hand_rule() -> None:
    # Crumpton 2018, 4.9.7: 10 gal gas volume, precharge 1000 psi, 3000 to 1200 psi: 5.0 gal.
    bank = _stack(("annular", 1.0)).banks[0]
    charge = charge_of(bank, 1)
    assert charge is not None
    assert usable_by_hand_m3(charge, 3000 * PSI_PA, 1200 * PSI_PA) / GALLON_M3 == pytest.approx(5.0, abs=1e-9)


def test_fluid_counts_as_usable_down_to_1200_psi_or_200_psi_over_precharge() -> None:
    # API RP 53, 3rd ed.: 200 psi above precharge; training text: at least 1200 psi.
    bank = _stack(("annular", 1.0)).banks[0]
    assert least_useful_pag(bank) / PSI_PA == pytest.approx(1200.0)


def test_closing_times_are_30_seconds_and_45_for_large_annulars() -> None:
    # API RP 16E 2.1; API Std 53: 45 s from 18-3/4 in up.
    unit = _stack(("annular", 1.0), ("pipe_ram", 1.0))
    assert [closing_time_s(f) for f in unit.functions] == [30.0, 30.0]
    assert closing_time_s(replace(unit.functions[0], bore_m=18.75 * 0.0254)) == 45.0
    assert closing_time_s(replace(unit.functions[1], bore_m=18.75 * 0.0254)) == 30.0
