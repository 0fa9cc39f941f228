"""Laws that hold for every bottle, every line and every temperature a unit can meet."""

import math

import pytest
from hypothesis import assume, given, settings
from hypothesis import strategies as st

from provenzero.physics.accumulator import (
    GasCharge,
    fluid_volume_m3,
    gas_volume_m3,
    nitrogen_mass_kg,
    precharge_at_temperature_pag,
    temperature_at_pressure_k,
    usable_slow_m3,
    warmed_pag,
)
from provenzero.physics.discharge import (
    bleed_fast,
    deliver_fast,
    deliver_slow,
    gas_temperature_after_k,
    rebound_pag,
    rewarmed_pag,
)
from provenzero.physics.drawdown import (
    bottles_from_fast,
    bottles_from_slow,
    precharge_by_hand_rule_pag,
    precharge_from_fast_pag,
    precharge_from_slow_pag,
)
from provenzero.physics.energy import bottle_energy_j, bottle_expansion_work_j, safe_distance_m
from provenzero.physics.flow import pipe_flow_m3_s, pipe_pressure_drop_pa, valve_flow_m3_s
from provenzero.physics.gas import gas_density_kg_m3, gas_entropy_j_kg_k, gas_pressure_pa, gas_temperature_k
from provenzero.physics.isentrope import gas_state, to_density_fast, to_pressure_fast
from provenzero.physics.liquid import effective_bulk_modulus_pa
from provenzero.physics.times import Outlet, bleed_down, charging_time
from provenzero.physics.trapped import hold_time_s, leak_rate_m3_s, released_volume_m3

MPA = 1e6
VALVE = Outlet(flow_coefficient=5.0, specific_gravity=0.9)

law = settings(deadline=None, max_examples=60)
costly_law = settings(deadline=None, max_examples=20)

temperatures = st.floats(243.15, 333.15)
pressures = st.floats(0.2 * MPA, 100 * MPA)
charges = st.builds(
    GasCharge,
    gas_volume_m3=st.floats(0.005, 3.0),
    precharge_pag=st.floats(1 * MPA, 9 * MPA),
    precharge_temperature_k=temperatures,
)
charged = st.floats(14 * MPA, 40 * MPA)
shares = st.floats(0.01, 0.99)


@law
@given(pressures, st.floats(193.15, 393.15))
def test_pressure_density_and_temperature_go_round_in_a_circle(pressure: float, temperature: float) -> None:
    density = gas_density_kg_m3(pressure, temperature)
    assert gas_pressure_pa(density, temperature) == pytest.approx(pressure, rel=1e-12)
    assert gas_temperature_k(density, pressure) == pytest.approx(temperature, rel=1e-12)


@law
@given(pressures, st.floats(193.15, 393.15), st.floats(1.0001, 1.5))
def test_more_pressure_is_more_density_and_more_heat_is_less(
    pressure: float, temperature: float, factor: float
) -> None:
    density = gas_density_kg_m3(pressure, temperature)
    assert gas_density_kg_m3(pressure * factor, temperature) > density
    assert gas_density_kg_m3(pressure, temperature * factor) < density


@law
@given(st.floats(1 * MPA, 60 * MPA), st.floats(233.15, 393.15), st.floats(0.02, 1.5))
def test_a_fast_change_keeps_entropy_and_goes_back_to_where_it_came_from(
    pressure: float, temperature: float, factor: float
) -> None:
    start = gas_state(pressure, temperature)
    end = to_pressure_fast(start, max(pressure * factor, 20e3))
    assert end.entropy_j_kg_k == pytest.approx(start.entropy_j_kg_k, rel=1e-10)
    assert to_density_fast(start, end.density_kg_m3).pressure_pa == pytest.approx(end.pressure_pa, rel=1e-7)
    assert to_pressure_fast(end, pressure).temperature_k == pytest.approx(temperature, rel=1e-8)
    assert to_density_fast(end, start.density_kg_m3).temperature_k == pytest.approx(temperature, rel=1e-8)


@costly_law
@given(st.floats(1 * MPA, 60 * MPA), st.floats(233.15, 393.15), st.floats(0.1, 0.95))
def test_energy_that_leaves_a_fast_expansion_is_the_work_of_its_pressure(
    pressure: float, temperature: float, factor: float
) -> None:
    # First law: du = -p dv at constant entropy, here by Simpson's rule in ln v.
    start = gas_state(pressure, temperature)
    steps = 20
    width = -math.log(factor) / steps
    states = [to_density_fast(start, start.density_kg_m3 * math.exp(-i * width)) for i in range(steps + 1)]
    assume(states[-1].vapour_fraction == 1.0)
    weights = [1] + [4, 2] * (steps // 2 - 1) + [4, 1]
    work = sum(w * s.pressure_pa / s.density_kg_m3 for w, s in zip(weights, states, strict=True)) * width / 3
    fallen = start.internal_energy_j_kg - states[-1].internal_energy_j_kg
    assert work == pytest.approx(fallen, rel=1e-4)


@law
@given(st.floats(1 * MPA, 60 * MPA), st.floats(193.15, 393.15))
def test_heat_at_fixed_volume_raises_entropy_by_heat_over_temperature(pressure: float, temperature: float) -> None:
    # Second law: T ds = du at constant volume; energy by the difference of the states.
    density = gas_density_kg_m3(pressure, temperature)
    step = 1e-3 * temperature
    entropy = gas_entropy_j_kg_k(density, temperature + step) - gas_entropy_j_kg_k(density, temperature - step)
    hot = gas_state(gas_pressure_pa(density, temperature + step), temperature + step)
    cold = gas_state(gas_pressure_pa(density, temperature - step), temperature - step)
    energy = hot.internal_energy_j_kg - cold.internal_energy_j_kg
    assert temperature * entropy == pytest.approx(energy, rel=1e-5)


@law
@given(charges, charged, temperatures)
def test_gas_and_fluid_fill_the_bottle_and_the_nitrogen_stays(
    charge: GasCharge, pressure: float, temperature: float
) -> None:
    gas, fluid = (
        gas_volume_m3(charge, pressure, temperature),
        fluid_volume_m3(charge, pressure, temperature),
    )
    assert 0.0 < gas <= charge.gas_volume_m3
    assert fluid >= 0.0
    assert gas + fluid == pytest.approx(charge.gas_volume_m3, rel=1e-12)
    density = gas_density_kg_m3(pressure + 101_325, temperature)
    assert gas * density == pytest.approx(nitrogen_mass_kg(charge), rel=1e-12)


@law
@given(charges, charged, temperatures, shares)
def test_never_more_comes_out_than_was_in(charge: GasCharge, start: float, temperature: float, share: float) -> None:
    inside = fluid_volume_m3(charge, start, temperature)
    end = start * share
    assert 0.0 <= usable_slow_m3(charge, start, end, temperature) <= inside * (1 + 1e-12)
    assert 0.0 <= bleed_fast(charge, start, temperature, end).delivered_m3 <= inside * (1 + 1e-12)
    asked = 2.0 * share * inside
    for after in (
        deliver_slow(charge, start, temperature, asked),
        deliver_fast(charge, start, temperature, asked),
    ):
        assert after.delivered_m3 == pytest.approx(min(asked, inside), rel=1e-9)
        assert after.gas_volume_m3 <= charge.gas_volume_m3
        assert after.emptied == (after.fluid_pag == 0.0)


@law
@given(charges, charged, temperatures, shares)
def test_a_fast_discharge_gives_less_and_ends_colder_than_a_slow_one(
    charge: GasCharge, start: float, temperature: float, share: float
) -> None:
    fast = bleed_fast(charge, start, temperature, start * share)
    assert fast.delivered_m3 <= usable_slow_m3(charge, start, start * share, temperature) * (1 + 1e-9)
    assert fast.gas_temperature_k < temperature
    assert rebound_pag(charge, start, temperature, start * share) >= 0.0
    if not fast.emptied:
        assert rewarmed_pag(charge, fast, temperature) > fast.fluid_pag


@law
@given(charges, charged, temperatures, shares)
def test_straight_after_reads_lower_than_warm_and_warming_leads_to_the_slow_reading(
    charge: GasCharge, start: float, temperature: float, share: float
) -> None:
    given_out = share * fluid_volume_m3(charge, start, temperature)
    assume(given_out > 0.0)
    slow = deliver_slow(charge, start, temperature, given_out)
    fast = deliver_fast(charge, start, temperature, given_out)
    assert fast.gas_pag < slow.gas_pag < start
    assert rewarmed_pag(charge, fast, temperature) == pytest.approx(slow.gas_pag, rel=1e-10)


@law
@given(charges, charged, temperatures, st.floats(0.1, 0.9), st.floats(0.1, 0.9))
def test_two_discharges_end_where_one_of_their_sum_does(
    charge: GasCharge, start: float, temperature: float, first: float, second: float
) -> None:
    inside = fluid_volume_m3(charge, start, temperature)
    once = deliver_slow(charge, start, temperature, first * inside)
    twice = deliver_slow(charge, once.gas_pag, temperature, second * (inside - first * inside))
    whole = deliver_slow(charge, start, temperature, (first + second * (1 - first)) * inside)
    assert twice.gas_pag == pytest.approx(whole.gas_pag, rel=1e-9)


@law
@given(charges, charged, temperatures, st.floats(0.01, 0.5), st.floats(1.01, 1.9))
def test_the_more_comes_out_the_lower_the_pressure(
    charge: GasCharge, start: float, temperature: float, share: float, factor: float
) -> None:
    inside = fluid_volume_m3(charge, start, temperature)
    for deliver in (deliver_slow, deliver_fast):
        less = deliver(charge, start, temperature, share * inside)
        more = deliver(charge, start, temperature, share * factor * inside)
        assert more.gas_pag < less.gas_pag
        assert more.gas_temperature_k <= less.gas_temperature_k


@law
@given(charges, charged, temperatures, st.floats(0.5, 0.99))
def test_the_inverse_finds_the_precharge_and_the_bottles_that_were_put_in(
    charge: GasCharge, start: float, temperature: float, share: float
) -> None:
    precharge = precharge_at_temperature_pag(charge, temperature)
    end = start * share
    assume(end > precharge)
    volume = charge.gas_volume_m3
    slow = usable_slow_m3(charge, start, end, temperature)
    fast = bleed_fast(charge, start, temperature, end).delivered_m3
    for count, removed in ((bottles_from_slow, slow), (bottles_from_fast, fast)):
        assert count(charge, 7 * removed, start, end, temperature) == pytest.approx(7.0, rel=1e-9)
    by_slow = precharge_from_slow_pag(slow, volume, start, end, temperature)
    by_fast = precharge_from_fast_pag(fast, volume, start, end, temperature)
    assert by_slow == pytest.approx(precharge, rel=1e-8)
    assert by_fast == pytest.approx(precharge, rel=1e-8)
    hand = precharge_by_hand_rule_pag(slow, volume, start, end)
    assert hand == pytest.approx(precharge, rel=0.45)


@law
@given(charges, charged, temperatures, st.floats(1.0, 60.0))
def test_warming_an_isolated_bottle_raises_its_pressure_and_names_the_temperature_again(
    charge: GasCharge, pressure: float, temperature: float, kelvin: float
) -> None:
    warm = warmed_pag(charge, pressure, temperature, temperature + kelvin)
    assert warm > pressure
    again = temperature_at_pressure_k(charge, pressure, temperature, warm)
    assert again == pytest.approx(temperature + kelvin, rel=1e-10)
    assert precharge_at_temperature_pag(charge, temperature + kelvin) > precharge_at_temperature_pag(
        charge, temperature
    )


@law
@given(temperatures, temperatures, st.floats(0.0, 1e4), st.floats(1.0, 1e3), st.floats(1.0, 1e3))
def test_gas_that_warms_never_passes_its_surroundings(
    gas: float, shell: float, time: float, more: float, tau: float
) -> None:
    now = gas_temperature_after_k(gas, shell, time, tau)
    later = gas_temperature_after_k(gas, shell, time + more, tau)
    assert min(gas, shell) - 1e-9 <= now <= max(gas, shell) + 1e-9
    assert abs(later - shell) <= abs(now - shell) + 1e-9


@law
@given(charges, charged, temperatures)
def test_draining_never_adds_energy_and_a_charged_bottle_keeps_most_of_it(
    charge: GasCharge, pressure: float, temperature: float
) -> None:
    full = bottle_energy_j(charge, pressure, temperature)
    drained = bottle_energy_j(charge, 0.0, temperature)
    assert 0.0 < drained < full
    work = bottle_expansion_work_j(charge, pressure, temperature)
    left = bottle_expansion_work_j(charge, 0.0, temperature)
    assert left == pytest.approx(work, rel=0.35)
    assert safe_distance_m(full) >= safe_distance_m(drained) >= 30.0


@costly_law
@given(charges, charged, temperatures, st.floats(0.0, 0.95))
def test_bleeding_takes_at_least_the_time_of_the_first_flow_and_ends_with_what_came_out(
    charge: GasCharge, start: float, temperature: float, share: float
) -> None:
    found = bleed_down(charge, start, start * share, temperature, VALVE)
    most = valve_flow_m3_s(VALVE.flow_coefficient, start, VALVE.specific_gravity)
    assert found.fast_m3 <= found.slow_m3 * (1 + 1e-9)
    assert found.slow_s >= found.slow_m3 / most * (1 - 1e-9)
    assert found.fast_s >= found.fast_m3 / most * (1 - 1e-9)
    wider = bleed_down(charge, start, start * share, temperature, Outlet(flow_coefficient=10.0, specific_gravity=0.9))
    assert wider.slow_s == pytest.approx(found.slow_s / 2, rel=1e-9)


@law
@given(charges, charged, temperatures, shares)
def test_what_was_bled_slowly_is_charged_again_slowly_and_a_fast_charge_takes_less(
    charge: GasCharge, end: float, temperature: float, share: float
) -> None:
    start = end * share
    found = charging_time(charge, start, end, temperature, 1e-3)
    assert found.slow_m3 == pytest.approx(usable_slow_m3(charge, end, start, temperature), rel=1e-9)
    assert found.fast_m3 <= found.slow_m3 * (1 + 1e-12)


@law
@given(st.floats(1e5, 4e7), st.floats(0.004, 0.05), st.floats(0.5, 60.0), st.floats(5e-4, 0.5))
def test_flow_and_loss_in_a_pipe_belong_together_and_grow_together(
    drop: float, bore: float, length: float, viscosity: float
) -> None:
    flow = pipe_flow_m3_s(drop, bore, length, 900.0, viscosity)
    assert pipe_pressure_drop_pa(flow, bore, length, 900.0, viscosity) == pytest.approx(drop, rel=1e-8)
    assert pipe_flow_m3_s(drop * 1.01, bore, length, 900.0, viscosity) > flow
    laminar = math.pi * bore**4 * drop / (128 * viscosity * length)
    assert flow <= laminar * (1 + 1e-6)


@law
@given(st.floats(1e-4, 0.1), st.floats(1e8, 3e9), st.floats(1e4, 4e7), st.floats(1e-10, 1e-5))
def test_a_leak_that_a_hold_is_made_for_is_the_leak_it_shows(
    volume: float, stiffness: float, rise: float, leak: float
) -> None:
    watched = hold_time_s(volume, stiffness, rise, leak)
    assert leak_rate_m3_s(volume, stiffness, rise, watched) == pytest.approx(leak, rel=1e-9)
    assert leak * watched == pytest.approx(released_volume_m3(volume, rise, stiffness), rel=1e-9)


@law
@given(st.floats(1e8, 3e9), st.lists(st.floats(0.0, 1e-8), max_size=4))
def test_nothing_that_yields_can_stiffen_a_line(modulus: float, compliances: list[float]) -> None:
    assert effective_bulk_modulus_pa(modulus, *compliances) <= modulus * (1 + 1e-12)
