"""A bottle that gives out fluid: the reading straight after, and the reading once the gas is warm again.

A fast discharge follows the line of constant entropy, a slow one that of constant temperature. With the
valve shut the gas then warms in a fixed volume, so the pressure comes back to what a slow discharge leaves.
"""

import math
from dataclasses import dataclass
from typing import Final

from provenzero.physics.accumulator import (
    GasCharge,
    gas_volume_m3,
    nitrogen_mass_kg,
    precharge_at_temperature_pag,
)
from provenzero.physics.gas import gas_pressure_pa
from provenzero.physics.isentrope import GasState, gas_state, to_density_fast, to_pressure_fast
from provenzero.physics.standard import absolute_pa, check_range, gauge_pag

_FULL: Final = 1.0 - 1e-12  # share of the bottle at which rounding alone still speaks of fluid


@dataclass(frozen=True, slots=True, kw_only=True)
class Discharge:
    """The bottle after it has given out fluid.

    Attributes:
        delivered_m3: Fluid that came out [m3].
        gas_volume_m3: Space that the gas takes [m3].
        gas_pag: Gauge pressure on the gas side [Pa].
        gas_temperature_k: Temperature of the gas [K].
        fluid_pag: Gauge pressure on the fluid side [Pa]; 0 where no fluid is left.
        emptied: All fluid is out, and the gas stands alone.
    """

    delivered_m3: float
    gas_volume_m3: float
    gas_pag: float
    gas_temperature_k: float
    fluid_pag: float
    emptied: bool


def deliver_slow(charge: GasCharge, start_pag: float, temperature_k: float, delivered_m3: float) -> Discharge:
    """Give the bottle after a volume has come out, slowly or long ago: the gas has its old temperature.

    Formula: p(m/(V1 + dV), T).

    Args:
        charge: The bottle and its precharge.
        start_pag: Gauge pressure before [Pa].
        temperature_k: Temperature of the gas before and after [K].
        delivered_m3: Fluid asked for [m3]; no more than there is comes out.

    Returns:
        The bottle after.

    Raises:
        ValueError: Negative volume, or outside the range of the gas equation.

    Source: isothermal change of a real gas; Span et al. (2000).
    """
    start, end = _volumes(charge, start_pag, temperature_k, delivered_m3)
    if end == start:
        return _still(charge, start_pag, temperature_k, start)
    pressure = gas_pressure_pa(nitrogen_mass_kg(charge) / end, temperature_k)
    return _after(charge, start, end, (pressure, temperature_k))


def deliver_fast(charge: GasCharge, start_pag: float, temperature_k: float, delivered_m3: float) -> Discharge:
    """Give the bottle straight after a volume has come out fast: the gas is cold.

    Formula: p(m/(V1 + dV), s1).

    Args:
        charge: The bottle and its precharge.
        start_pag: Gauge pressure before [Pa].
        temperature_k: Temperature of the gas before [K].
        delivered_m3: Fluid asked for [m3]; no more than there is comes out.

    Returns:
        The bottle straight after.

    Raises:
        ValueError: Negative volume, or outside the range of the gas equation.

    Source: constant entropy as the limit of a fast discharge; Span et al. (2000).
    """
    start, end = _volumes(charge, start_pag, temperature_k, delivered_m3)
    if end == start:
        return _still(charge, start_pag, temperature_k, start)
    state = to_density_fast(_start_state(charge, start_pag, temperature_k, start), nitrogen_mass_kg(charge) / end)
    return _after(charge, start, end, (state.pressure_pa, state.temperature_k))


def bleed_fast(charge: GasCharge, start_pag: float, temperature_k: float, end_pag: float) -> Discharge:
    """Give the bottle straight after a fast discharge down to a pressure: the isentropic usable fluid.

    Formula: V2 = m/rho(p2, s1), at most the bottle; the gas is then at p(m/V0, s1).

    Args:
        charge: The bottle and its precharge.
        start_pag: Gauge pressure before [Pa].
        temperature_k: Temperature of the gas before [K].
        end_pag: Gauge pressure of the fluid at which the valve is shut [Pa], at most the one before.

    Returns:
        The bottle straight after.

    Raises:
        ValueError: The end lies above the start, or outside the range of the gas equation.

    Source: constant entropy as the limit of a fast discharge; Span et al. (2000).
    """
    check_range("end_pag", end_pag, 0.0, start_pag)
    mass = nitrogen_mass_kg(charge)
    start = gas_volume_m3(charge, start_pag, temperature_k)
    if end_pag == start_pag or _is_empty(charge, start):
        return _still(charge, start_pag, temperature_k, start)
    before = gas_state(absolute_pa(start_pag), temperature_k)
    if end_pag < precharge_at_temperature_pag(charge, temperature_k):
        empty = to_density_fast(before, mass / charge.gas_volume_m3)
        if empty.pressure_pa >= absolute_pa(end_pag):
            cold = (empty.pressure_pa, empty.temperature_k)
            return _after(charge, start, charge.gas_volume_m3, cold)
    after = to_pressure_fast(before, absolute_pa(end_pag))
    return _after(charge, start, mass / after.density_kg_m3, (absolute_pa(end_pag), after.temperature_k))


def rewarmed_pag(charge: GasCharge, after: Discharge, temperature_k: float) -> float:
    """Give the gas-side pressure once the gas has a given temperature again, with no fluid in or out.

    Formula: p(m/V, T).

    Args:
        charge: The bottle and its precharge.
        after: The bottle after the discharge.
        temperature_k: Temperature that the gas has reached [K].

    Returns:
        Gauge pressure on the gas side [Pa]; of the fluid too, unless the bottle is empty of it.

    Raises:
        ValueError: Outside the range of the gas equation.

    Source: conservation of mass in a fixed volume; Span et al. (2000).
    """
    if _is_empty(charge, after.gas_volume_m3):
        return precharge_at_temperature_pag(charge, temperature_k)
    density = nitrogen_mass_kg(charge) / after.gas_volume_m3
    return gauge_pag(gas_pressure_pa(density, temperature_k))


def rebound_pag(charge: GasCharge, start_pag: float, temperature_k: float, end_pag: float) -> float:
    """Give the pressure that comes back after a fast bleed was shut too early and the gas has warmed.

    Formula: p(m/V2, T1) with V2 of the isentropic discharge from p1 to p2.

    Args:
        charge: The bottle and its precharge.
        start_pag: Gauge pressure before [Pa].
        temperature_k: Temperature of the gas before, and after warming [K].
        end_pag: Gauge pressure at which the bleed was shut [Pa].

    Returns:
        Gauge pressure of the fluid after warming [Pa]; 0 if no fluid was left.

    Raises:
        ValueError: The end lies above the start, or outside the range of the gas equation.

    Source: constant entropy, then constant volume; Span et al. (2000).
    """
    after = bleed_fast(charge, start_pag, temperature_k, end_pag)
    return 0.0 if after.emptied else rewarmed_pag(charge, after, temperature_k)


def heat_exchanged(time_s: float, time_constant_s: float) -> float:
    """Give the share of the temperature difference that the gas has lost to its shell after a time.

    Formula: 1 - exp(-t/tau).

    Args:
        time_s: Time since the discharge [s], 0 or more.
        time_constant_s: tau [s], above 0; tens of seconds to minutes for a bottle, so ask for it.

    Returns:
        Share [-], from 0 straight after to 1 when warm.

    Raises:
        ValueError: A negative time, or a time constant of zero.

    Source: thermal time constant of a gas-loaded accumulator, as in Pourmovahed and Otis, ASME J. Dyn. Syst.
        Meas. Control 112 (1990) 116 (value from memory).
    """
    check_range("time_s", time_s, 0.0, math.inf)
    check_range("time_constant_s", time_constant_s, 1e-9, math.inf)
    return -math.expm1(-time_s / time_constant_s)


def gas_temperature_after_k(
    gas_temperature_k: float, surroundings_k: float, time_s: float, time_constant_s: float
) -> float:
    """Give the temperature of the gas some time after a discharge.

    Formula: T = T1 + (Ts - T1)(1 - exp(-t/tau)).

    Args:
        gas_temperature_k: Temperature straight after the discharge [K].
        surroundings_k: Temperature of the shell [K].
        time_s: Time since the discharge [s], 0 or more.
        time_constant_s: tau [s], above 0.

    Returns:
        Temperature of the gas [K].

    Raises:
        ValueError: A negative time, or a time constant of zero.

    Source: as for `heat_exchanged`; the gas volume does not change meanwhile.
    """
    return gas_temperature_k + (surroundings_k - gas_temperature_k) * heat_exchanged(time_s, time_constant_s)


def _volumes(charge: GasCharge, start_pag: float, temperature_k: float, delivered_m3: float) -> tuple[float, float]:
    check_range("delivered_m3", delivered_m3, 0.0, math.inf)
    start = gas_volume_m3(charge, start_pag, temperature_k)
    return start, min(charge.gas_volume_m3, start + delivered_m3)


def _start_state(charge: GasCharge, start_pag: float, temperature_k: float, volume: float) -> GasState:
    if _is_empty(charge, volume):
        return gas_state(absolute_pa(precharge_at_temperature_pag(charge, temperature_k)), temperature_k)
    return gas_state(absolute_pa(start_pag), temperature_k)


def _is_empty(charge: GasCharge, volume: float) -> bool:
    return volume >= charge.gas_volume_m3 * _FULL


def _still(charge: GasCharge, start_pag: float, temperature_k: float, volume: float) -> Discharge:
    state = _start_state(charge, start_pag, temperature_k, volume)
    return _after(charge, volume, volume, (state.pressure_pa, temperature_k))


def _after(charge: GasCharge, start: float, end: float, pressure_and_temperature: tuple[float, float]) -> Discharge:
    pressure, temperature = pressure_and_temperature
    emptied = _is_empty(charge, end)
    return Discharge(
        delivered_m3=end - start,
        gas_volume_m3=end,
        gas_pag=gauge_pag(pressure),
        gas_temperature_k=temperature,
        fluid_pag=0.0 if emptied else gauge_pag(pressure),
        emptied=emptied,
    )
