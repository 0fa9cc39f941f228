"""A bottle at the edges: without fluid, without precharge, with impossible figures."""

import pytest

from provenzero.physics.accumulator import (
    GasCharge,
    fluid_volume_m3,
    gas_volume_m3,
    nitrogen_mass_kg,
    precharge_at_temperature_pag,
    temperature_at_pressure_k,
    usable_ideal_absolute_m3,
    usable_ideal_gauge_m3,
    usable_slow_m3,
    warmed_pag,
)

MPA = 1e6
WARM = 293.15
BOTTLE = GasCharge(gas_volume_m3=0.04, precharge_pag=7 * MPA, precharge_temperature_k=WARM)
FLAT = GasCharge(gas_volume_m3=0.04, precharge_pag=0.0, precharge_temperature_k=WARM)


def test_there_is_no_fluid_at_or_below_the_precharge() -> None:
    assert fluid_volume_m3(BOTTLE, 7 * MPA, WARM) == pytest.approx(0.0, abs=1e-15)
    assert fluid_volume_m3(BOTTLE, 3 * MPA, WARM) == 0.0
    assert fluid_volume_m3(BOTTLE, 0.0, WARM) == 0.0
    assert usable_slow_m3(BOTTLE, 6 * MPA, 3 * MPA, WARM) == 0.0


def test_in_the_cold_the_precharge_is_lower_and_fluid_stays_longer() -> None:
    assert precharge_at_temperature_pag(BOTTLE, 263.15) < 7 * MPA
    assert fluid_volume_m3(BOTTLE, 6.8 * MPA, 263.15) > 0.0
    assert fluid_volume_m3(BOTTLE, 6.8 * MPA, WARM) == 0.0


def test_discharge_below_the_precharge_gives_no_more_than_was_in() -> None:
    inside = fluid_volume_m3(BOTTLE, 20 * MPA, WARM)
    assert usable_slow_m3(BOTTLE, 20 * MPA, 0.0, WARM) == pytest.approx(inside, rel=1e-15)
    assert usable_slow_m3(BOTTLE, 20 * MPA, 6 * MPA, WARM) == pytest.approx(inside, rel=1e-15)
    assert usable_ideal_gauge_m3(BOTTLE, 20 * MPA, 1 * MPA) == pytest.approx(0.04 * (1 - 7 / 20), rel=1e-12)
    assert usable_ideal_absolute_m3(BOTTLE, 20 * MPA, 0.0) == pytest.approx(0.04 * (1 - 7.101325 / 20.101325))


def test_a_bottle_that_lost_its_precharge_fills_with_fluid() -> None:
    assert nitrogen_mass_kg(FLAT) == pytest.approx(0.0466, abs=2e-4)  # 0.04 m3 of nitrogen at 1 atm and 20 degC
    assert fluid_volume_m3(FLAT, 20 * MPA, WARM) > 0.0397
    assert gas_volume_m3(FLAT, 0.0, WARM) == pytest.approx(0.04, rel=1e-12)


def test_a_vacuum_on_the_fluid_side_leaves_the_gas_the_whole_bottle() -> None:
    assert gas_volume_m3(BOTTLE, -101_325.0, WARM) == 0.04


def test_an_isolated_bottle_that_warms_gains_pressure_and_loses_it_again() -> None:
    warm = warmed_pag(BOTTLE, 20 * MPA, WARM, 313.15)
    assert warm > 21 * MPA
    assert temperature_at_pressure_k(BOTTLE, 20 * MPA, WARM, warm) == pytest.approx(313.15, rel=1e-12)


@pytest.mark.parametrize(
    ("volume", "precharge", "named"),
    [(0.0, 7e6, "gas_volume_m3"), (-1.0, 7e6, "gas_volume_m3"), (0.04, -1.0, "precharge_pag")],
)
def test_an_impossible_bottle_is_refused(volume: float, precharge: float, named: str) -> None:
    with pytest.raises(ValueError, match=named):
        GasCharge(gas_volume_m3=volume, precharge_pag=precharge, precharge_temperature_k=WARM)


def test_an_end_above_the_start_is_refused() -> None:
    with pytest.raises(ValueError, match="end_pag"):
        usable_slow_m3(BOTTLE, 10 * MPA, 20 * MPA, WARM)
    with pytest.raises(ValueError, match="end_pag"):
        usable_ideal_gauge_m3(BOTTLE, 10 * MPA, 20 * MPA)
    with pytest.raises(ValueError, match="end_pag"):
        usable_ideal_absolute_m3(BOTTLE, 10 * MPA, 20 * MPA)
    with pytest.raises(ValueError, match="end_pag"):
        usable_ideal_gauge_m3(BOTTLE, 10 * MPA, 0.0)
