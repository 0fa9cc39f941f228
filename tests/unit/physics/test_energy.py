"""Stored energy at its edges."""

import pytest

from provenzero.physics.accumulator import GasCharge
from provenzero.physics.energy import (
    bottle_energy_j,
    bottle_expansion_work_j,
    safe_distance_m,
    stored_gas_energy_j,
    tnt_equivalent_kg,
    trapped_liquid_energy_j,
)

BOTTLE = GasCharge(gas_volume_m3=0.04, precharge_pag=7e6, precharge_temperature_k=293.15)


def test_gas_at_the_atmosphere_stores_nothing() -> None:
    assert stored_gas_energy_j(101_000.0, 1.0) == 0.0
    with pytest.raises(ValueError, match="pressure_pa"):
        stored_gas_energy_j(100_000.0, 1.0)
    with pytest.raises(ValueError, match="heat_capacity_ratio"):
        stored_gas_energy_j(1e6, 1.0, 1.0)


def test_the_general_form_and_the_printed_factor_agree_for_a_ratio_of_one_point_four() -> None:
    # ASME PCC-2, Article 501, Appendix II prints 2.5 and 0.286 for k = 1.4.
    printed = 2.5 * 7e6 * 0.04 * (1 - (101e3 / 7e6) ** 0.286)
    assert stored_gas_energy_j(7e6, 0.04) == pytest.approx(printed, rel=1e-3)
    assert stored_gas_energy_j(7e6, 0.04, 1.66) != pytest.approx(printed, rel=0.1)


def test_a_drained_bottle_holds_the_energy_of_its_precharge_whatever_the_fluid_gauge_says() -> None:
    for work in (bottle_energy_j, bottle_expansion_work_j):
        drained = work(BOTTLE, 0.0, 293.15)
        assert drained == work(BOTTLE, 3e6, 293.15)
        assert drained == pytest.approx(work(BOTTLE, 7e6, 293.15), rel=1e-9)
        assert work(BOTTLE, 0.0, 273.15) < drained < work(BOTTLE, 20e6, 293.15)
    assert bottle_energy_j(BOTTLE, 0.0, 293.15) == pytest.approx(stored_gas_energy_j(7e6 + 101_325, 0.04))


def test_distance_is_never_less_than_the_floor_and_grows_past_it() -> None:
    # ASME PCC-2, Article 501, Appendix III, 2015: 30 m up to 135.5 MJ.
    assert safe_distance_m(0.0) == 30.0
    assert safe_distance_m(5e6) == 30.0
    assert safe_distance_m(50e6) > 30.0
    assert safe_distance_m(272e6) == pytest.approx(20 * (2 * tnt_equivalent_kg(272e6)) ** (1 / 3))
    assert safe_distance_m(272e6, 30.0) == pytest.approx(1.5 * safe_distance_m(272e6))
    with pytest.raises(ValueError, match="energy_j"):
        safe_distance_m(-1.0)
    with pytest.raises(ValueError, match="scaled_distance"):
        safe_distance_m(1e6, 10.0)


def test_trapped_liquid_stores_little_against_gas() -> None:
    # By hand: 7.7 L at 20.7 MPa and 1 GPa: 20.7e6^2 * 7.7e-3 / 2e9 = 1650 J.
    assert trapped_liquid_energy_j(20.7e6, 7.7e-3, 1e9) == pytest.approx(1650, abs=1)
    with pytest.raises(ValueError, match="bulk_modulus_pa"):
        trapped_liquid_energy_j(20.7e6, 7.7e-3, 0.0)
