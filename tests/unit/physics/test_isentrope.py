"""A fast change of state: what is refused, and what is announced as condensing."""

import pytest

from provenzero.physics.isentrope import GasState, gas_state, to_density_fast, to_pressure_fast
from provenzero.physics.saturation import saturation_at_pressure, saturation_at_temperature

START = gas_state(20.8e6, 293.15)


def test_a_moderate_discharge_stays_gas() -> None:
    assert to_pressure_fast(START, 8.4e6).vapour_fraction == 1.0
    assert to_density_fast(START, 80.8).vapour_fraction == 1.0


def test_a_discharge_to_the_atmosphere_condenses_in_part_and_stays_at_the_boiling_point() -> None:
    # Boiling point of nitrogen at 1 atm: 77.355 K, Span et al. (2000).
    end = to_pressure_fast(START, 101_325.0)
    assert 0.8 < end.vapour_fraction < 1.0
    assert end.temperature_k == pytest.approx(77.355, abs=1e-3)


def test_a_deep_change_of_volume_condenses_as_the_same_change_of_pressure_does() -> None:
    by_pressure = to_pressure_fast(START, 300e3)
    by_volume = to_density_fast(START, by_pressure.density_kg_m3)
    assert by_volume.vapour_fraction < 1.0
    assert by_volume.pressure_pa == pytest.approx(300e3, rel=1e-9)
    assert by_volume.vapour_fraction == pytest.approx(by_pressure.vapour_fraction, rel=1e-9)


@pytest.mark.parametrize("pressure_pa", [5e5, 1e6, 3e6])
def test_cold_vapour_above_its_boiling_point_is_gas(pressure_pa: float) -> None:
    boiling = saturation_at_pressure(pressure_pa)
    start = gas_state(pressure_pa, 131.0)
    warmer = GasState(
        pressure_pa=pressure_pa,
        temperature_k=131.0,
        density_kg_m3=start.density_kg_m3,
        entropy_j_kg_k=0.5 * (start.entropy_j_kg_k + boiling.vapour.entropy_j_kg_k),
        internal_energy_j_kg=start.internal_energy_j_kg,
    )
    end = to_pressure_fast(warmer, pressure_pa)
    assert end.vapour_fraction == 1.0
    assert boiling.temperature_k < end.temperature_k < 131.0
    assert to_density_fast(warmer, end.density_kg_m3).temperature_k == pytest.approx(end.temperature_k, rel=1e-9)


def test_what_becomes_liquid_or_solid_or_too_hot_is_refused() -> None:
    dense = gas_state(100e6, 193.15)
    with pytest.raises(ValueError, match="liquid"):
        to_pressure_fast(gas_state(150e6, 140.0), 4e6)
    with pytest.raises(ValueError, match="liquid"):
        to_pressure_fast(gas_state(150e6, 140.0), 3e6)
    with pytest.raises(ValueError, match="liquid"):
        to_density_fast(gas_state(150e6, 140.0), 600.0)
    with pytest.raises(ValueError, match="colder than"):
        to_density_fast(dense, 0.01)
    with pytest.raises(ValueError, match="pressure_pa"):
        to_pressure_fast(dense, 5e3)
    with pytest.raises(ValueError, match="hotter than"):
        to_pressure_fast(gas_state(101_325.0, 393.15), 100e6)
    with pytest.raises(ValueError, match="hotter than"):
        to_density_fast(gas_state(101_325.0, 393.15), 600.0)


def test_condensation_is_given_between_the_triple_and_the_critical_point_only() -> None:
    for temperature_k in (63.0, 126.192):
        with pytest.raises(ValueError, match="temperature_k"):
            saturation_at_temperature(temperature_k)
    for pressure_pa in (12e3, 3.4e6):
        with pytest.raises(ValueError, match="pressure_pa"):
            saturation_at_pressure(pressure_pa)


def test_both_phases_in_equilibrium_have_the_same_pressure_and_gibbs_energy() -> None:
    # Clausius and Clapeyron: dp/dT = (sv - sl)/(vv - vl), checked by differences.
    below, here, above = (saturation_at_temperature(t) for t in (99.99, 100.0, 100.01))
    slope = (above.pressure_pa - below.pressure_pa) / 0.02
    entropy = here.vapour.entropy_j_kg_k - here.liquid.entropy_j_kg_k
    volume = 1 / here.vapour.density_kg_m3 - 1 / here.liquid.density_kg_m3
    assert slope == pytest.approx(entropy / volume, rel=1e-6)
