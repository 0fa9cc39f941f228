"""Where the gas equation ends it says so, and what it gives is consistent in itself."""

import math

import pytest

from provenzero.physics import ideal_gas
from provenzero.physics.gas import (
    compressibility_factor,
    free_volume_m3,
    gas_density_kg_m3,
    gas_entropy_j_kg_k,
    gas_internal_energy_j_kg,
    gas_pressure_pa,
    gas_temperature_k,
)

WARM = 293.15


@pytest.mark.parametrize(
    ("pressure_pa", "temperature_k", "named"),
    [
        (-1.0, WARM, "pressure_pa"),
        (151e6, WARM, "pressure_pa"),
        (math.nan, WARM, "pressure_pa"),
        (1e7, 129.0, "temperature_k"),
        (1e7, 2001.0, "temperature_k"),
        (1e7, math.nan, "temperature_k"),
    ],
)
def test_a_state_outside_the_range_is_refused_by_name(pressure_pa: float, temperature_k: float, named: str) -> None:
    with pytest.raises(ValueError, match=f"{named} is .*; the formula holds from"):
        gas_density_kg_m3(pressure_pa, temperature_k)


def test_densities_and_temperatures_outside_the_range_are_refused_everywhere() -> None:
    for formula in (gas_pressure_pa, gas_entropy_j_kg_k, gas_internal_energy_j_kg):
        with pytest.raises(ValueError, match="density_kg_m3"):
            formula(1201.0, WARM)
        with pytest.raises(ValueError, match="temperature_k"):
            formula(100.0, 100.0)
    with pytest.raises(ValueError, match="density_kg_m3"):
        gas_entropy_j_kg_k(0.0, WARM)
    with pytest.raises(ValueError, match="pressure_pa"):
        compressibility_factor(0.0, WARM)


def test_a_pressure_that_no_temperature_gives_is_refused() -> None:
    with pytest.raises(ValueError, match="pressure_pa"):
        gas_temperature_k(225.9, 1e5)


def test_nothing_presses_without_gas() -> None:
    assert gas_density_kg_m3(0.0, WARM) == 0.0
    assert gas_pressure_pa(0.0, WARM) == 0.0


def test_thin_gas_is_ideal() -> None:
    # Boyle's law is the limit of every gas at low pressure.
    assert compressibility_factor(100.0, WARM) == pytest.approx(1.0, abs=1e-5)
    thin = gas_density_kg_m3(100.0, WARM)
    assert thin == pytest.approx(ideal_gas.ideal_density_kg_m3(100.0, WARM), rel=1e-5)
    assert gas_pressure_pa(thin, WARM) == pytest.approx(ideal_gas.ideal_pressure_pa(thin, WARM), rel=1e-5)


def test_heat_capacity_of_thin_nitrogen_is_that_of_a_two_atom_gas() -> None:
    # cv = 5/2 R = 742 J/(kg K) near room temperature, kinetic theory of gases.
    rise = gas_internal_energy_j_kg(0.01, 300.0) - gas_internal_energy_j_kg(0.01, 299.0)
    assert rise == pytest.approx(2.5 * 8.314 / 0.0280134, rel=2e-3)


def test_air_at_atmospheric_pressure_weighs_what_is_known() -> None:
    # Nitrogen at 0 degC and 1 atm: 1.2504 to 1.2506 kg/m3 (CRC Handbook; value from memory).
    assert gas_density_kg_m3(101_325.0, 273.15) == pytest.approx(1.2505, abs=3e-4)
    assert free_volume_m3(1.2505, 273.15) == pytest.approx(1.0, abs=3e-4)


def test_ideal_gas_cools_as_poisson_says() -> None:
    # By hand: 293.15 K from 3000 to 1200 psia: 293.15 * 0.4^(2/7) = 225.6 K; 0.4^(1/1.4) = 0.5197.
    assert ideal_gas.ideal_isentropic_temperature_k(WARM, 3000.0, 1200.0) == pytest.approx(225.6, abs=0.1)
    assert ideal_gas.ideal_isentropic_density_kg_m3(1.0, 3000.0, 1200.0) == pytest.approx(0.5197, abs=1e-4)
