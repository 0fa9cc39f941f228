"""How long bleeding, charging and draining take."""

import pytest

from provenzero.physics.accumulator import GasCharge, fluid_volume_m3, gas_volume_m3, nitrogen_mass_kg
from provenzero.physics.discharge import bleed_fast
from provenzero.physics.flow import GALLON_M3, PSI_PA, valve_flow_m3_s
from provenzero.physics.gas import gas_pressure_pa
from provenzero.physics.isentrope import gas_state, to_density_fast
from provenzero.physics.liquid import static_head_pa
from provenzero.physics.times import (
    Outlet,
    bleed_down,
    charging_time,
    decompression_time_s,
    gravity_drain_time_s,
)

MPA = 1e6
AIR = 101_325.0
WARM = 293.15
BANK = GasCharge(gas_volume_m3=0.45, precharge_pag=7 * MPA, precharge_temperature_k=WARM)
FLAT = GasCharge(gas_volume_m3=0.45, precharge_pag=0.0, precharge_temperature_k=WARM)
VALVE = Outlet(flow_coefficient=5.0, specific_gravity=0.87)


@pytest.mark.parametrize("end", [0.0, 8 * MPA, 15 * MPA])
def test_bleed_down_agrees_with_a_plain_step_by_step_count(end: float) -> None:
    mass, first = nitrogen_mass_kg(BANK), gas_volume_m3(BANK, 20 * MPA, WARM)
    start = gas_state(20 * MPA + AIR, WARM)
    slow_last = gas_volume_m3(BANK, end, WARM)
    fast_last = bleed_fast(BANK, 20 * MPA, WARM, end).gas_volume_m3
    steps = 2000
    slow = fast = 0.0
    for i in range(steps):
        part = (i + 0.5) / steps
        volume = first + part * (slow_last - first)
        pressure = gas_pressure_pa(mass / volume, WARM) - AIR
        slow += (slow_last - first) / steps / valve_flow_m3_s(5.0, pressure, 0.87)
        volume = first + part * (fast_last - first)
        pressure = to_density_fast(start, mass / volume).pressure_pa - AIR
        fast += (fast_last - first) / steps / valve_flow_m3_s(5.0, pressure, 0.87)
    found = bleed_down(BANK, 20 * MPA, end, WARM, VALVE)
    assert found.slow_s == pytest.approx(slow, rel=1e-5)
    assert found.fast_s == pytest.approx(fast, rel=1e-5)
    assert found.slow_m3 == pytest.approx(slow_last - first)
    assert found.fast_m3 == pytest.approx(fast_last - first)


def test_a_full_drain_lets_out_the_same_fluid_but_takes_longer_when_the_gas_is_cold() -> None:
    drained = bleed_down(BANK, 20 * MPA, 0.0, WARM, VALVE)
    assert drained.slow_m3 == pytest.approx(drained.fast_m3, rel=1e-12)
    assert drained.slow_m3 == pytest.approx(fluid_volume_m3(BANK, 20 * MPA, WARM), rel=1e-12)
    assert drained.fast_s > drained.slow_s


def test_a_flow_that_dies_away_at_the_end_still_has_an_end() -> None:
    # The flow falls as the square root of what is left; a count with a fine step is the reference.
    bank = GasCharge(gas_volume_m3=0.45, precharge_pag=3 * MPA, precharge_temperature_k=WARM)
    against = Outlet(flow_coefficient=5.0, specific_gravity=0.87, back_pag=6 * MPA)
    mass = nitrogen_mass_kg(bank)
    first, last = gas_volume_m3(bank, 20 * MPA, WARM), gas_volume_m3(bank, 6 * MPA, WARM)
    steps, total = 4000, 0.0
    for i in range(steps):
        x = 1.0 - (i + 0.5) / steps
        volume = last - (last - first) * x * x
        drop = gas_pressure_pa(mass / volume, WARM) - AIR - 6 * MPA
        total += 2.0 * x * (last - first) / steps / valve_flow_m3_s(5.0, drop, 0.87)
    assert bleed_down(bank, 20 * MPA, 6 * MPA, WARM, against).slow_s == pytest.approx(total, rel=1e-4)


def test_a_bank_without_fluid_needs_no_time() -> None:
    for found in (
        bleed_down(BANK, 5 * MPA, 0.0, WARM, VALVE),
        charging_time(BANK, 1 * MPA, 5 * MPA, WARM, 1e-3),
    ):
        assert (found.slow_s, found.fast_s, found.slow_m3, found.fast_m3) == (0.0, 0.0, 0.0, 0.0)


def test_charging_from_empty_takes_the_fluid_of_the_full_bank_when_slow_and_less_when_fast() -> None:
    found = charging_time(BANK, 0.0, 20 * MPA, WARM, 1e-3)
    inside = fluid_volume_m3(BANK, 20 * MPA, WARM)
    assert found.slow_m3 == pytest.approx(inside, rel=1e-12)
    assert found.slow_s == pytest.approx(inside / 1e-3, rel=1e-12)
    assert found.fast_s == pytest.approx(found.fast_m3 / 1e-3, rel=1e-12)
    assert 0.0 < found.fast_m3 < found.slow_m3
    twice = charging_time(BANK, 0.0, 20 * MPA, WARM, 2e-3)
    assert twice.slow_s == pytest.approx(found.slow_s / 2)


def test_a_bank_that_lost_its_precharge_can_still_be_bled() -> None:
    assert bleed_down(FLAT, 5 * MPA, 1e5, WARM, VALVE).slow_m3 > 0.0
    assert bleed_down(FLAT, 5 * MPA, 0.0, WARM, VALVE).slow_s > 0.0


def test_impossible_bleeds_and_charges_are_refused() -> None:
    with pytest.raises(ValueError, match="flow_coefficient"):
        bleed_down(BANK, 20 * MPA, 0.0, WARM, Outlet(flow_coefficient=0.0, specific_gravity=0.87))
    high = Outlet(flow_coefficient=5.0, specific_gravity=0.87, back_pag=9 * MPA)
    with pytest.raises(ValueError, match="back_pag"):
        bleed_down(BANK, 20 * MPA, 8 * MPA, WARM, high)
    with pytest.raises(ValueError, match="end_pag"):
        bleed_down(BANK, 20 * MPA, 21 * MPA, WARM, VALVE)
    with pytest.raises(ValueError, match="end_pag"):
        charging_time(BANK, 20 * MPA, 10 * MPA, WARM, 1e-3)
    with pytest.raises(ValueError, match="pump_flow_m3_s"):
        charging_time(BANK, 0.0, 10 * MPA, WARM, 0.0)


def test_a_trapped_line_falls_as_the_step_by_step_count_says() -> None:
    volume, stiffness, pressure = 8e-3, 1e9, 20 * MPA
    step, elapsed, left = 1e-6, 0.0, pressure
    small = Outlet(flow_coefficient=0.5, specific_gravity=0.87)
    while left > 1.0:
        flow = valve_flow_m3_s(0.5, left, 0.87)
        left -= flow * step * stiffness / volume
        elapsed += step
        left = max(left, 0.0)
        step = 1e-6 if left > 1e5 else 1e-7
    found = decompression_time_s(volume, pressure, stiffness, small)
    assert found == pytest.approx(elapsed, rel=5e-3)
    assert decompression_time_s(volume, 0.0, stiffness, small) == 0.0
    with pytest.raises(ValueError, match="pressure_drop_pa"):
        decompression_time_s(volume, -1.0, stiffness, small)


def test_a_standing_line_drains_in_twice_the_time_of_its_first_flow() -> None:
    # By hand: 10 m of water is 14.22 psi; Cv 1: 3.771 gpm at first; 10 gal: 2 * 10/3.771 min = 318.2 s.
    water = Outlet(flow_coefficient=1.0, specific_gravity=1.0)
    assert static_head_pa(10.0, 1000.0) / PSI_PA == pytest.approx(14.22, abs=0.005)
    assert gravity_drain_time_s(10 * GALLON_M3, 10.0, water) == pytest.approx(318.2, abs=0.2)
    with pytest.raises(ValueError, match="height_m"):
        gravity_drain_time_s(0.01, 0.0, water)
