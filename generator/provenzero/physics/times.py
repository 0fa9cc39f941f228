"""How long it takes: bleeding a bank down, charging it, letting a trapped line go, draining one."""

from collections.abc import Callable
from dataclasses import dataclass
from typing import Final

from provenzero.physics.accumulator import (
    GasCharge,
    gas_volume_m3,
    nitrogen_mass_kg,
    precharge_at_temperature_pag,
)
from provenzero.physics.discharge import bleed_fast
from provenzero.physics.flow import valve_flow_m3_s
from provenzero.physics.gas import gas_pressure_pa
from provenzero.physics.isentrope import GasState, gas_state, to_density_fast, to_pressure_fast
from provenzero.physics.liquid import static_head_pa
from provenzero.physics.standard import WATER_DENSITY_KG_M3, absolute_pa, check_range, gauge_pag

# Gauss and Legendre, six points on 0 to 1: exact for polynomials up to the eleventh degree.
_GAUSS: Final = (
    (0.033765242898423989, 0.085662246189585178),
    (0.169395306766867743, 0.180380786524069303),
    (0.380690406958401545, 0.233956967286345519),
    (0.619309593041598455, 0.233956967286345519),
    (0.830604693233132257, 0.180380786524069303),
    (0.966234757101576011, 0.085662246189585178),
)


@dataclass(frozen=True, slots=True, kw_only=True)
class Outlet:
    """Where fluid leaves: one valve, or the sum of those in series.

    Attributes:
        flow_coefficient: Cv [-, by custom; US gpm at 1 psi], above 0.
        specific_gravity: SG of the fluid [-].
        back_pag: Gauge pressure behind the valve [Pa].
    """

    flow_coefficient: float
    specific_gravity: float
    back_pag: float = 0.0


@dataclass(frozen=True, slots=True, kw_only=True)
class Duration:
    """Volume and time of a change, with the gas warm throughout and with no heat exchanged at all.

    Attributes:
        slow_s: Time if the gas keeps its temperature [s].
        fast_s: Time if the gas exchanges no heat [s].
        slow_m3: Fluid that moves if the gas keeps its temperature [m3].
        fast_m3: Fluid that moves if the gas exchanges no heat [m3].
    """

    slow_s: float
    fast_s: float
    slow_m3: float
    fast_m3: float


def bleed_down(charge: GasCharge, start_pag: float, end_pag: float, temperature_k: float, outlet: Outlet) -> Duration:
    """Give volume and time of bleeding a bank down through a valve, to a pressure or until it is drained.

    Formula: t = integral of dV/Q(p(V) - pb), p(V) at constant temperature and at constant entropy.

    Args:
        charge: The bank and its precharge.
        start_pag: Gauge pressure before [Pa].
        end_pag: Gauge pressure at which the bleed is shut [Pa]; 0 for a full drain.
        temperature_k: Temperature of the gas before [K].
        outlet: The bleed path.

    Returns:
        Both limits; a real bleed lies between them.

    Raises:
        ValueError: The end lies above the start or below the back pressure, or the outlet is shut, or outside
            the range of the gas equation.

    Source: ANSI/ISA-75.01.01 for the valve, Span et al. (2000) for the gas; six-point Gauss-Legendre rule
        (Abramowitz and Stegun, table 25.4).
    """
    check_range("flow_coefficient", outlet.flow_coefficient, 1e-9, 1e6)
    check_range("end_pag", end_pag, 0.0, start_pag)
    mass = nitrogen_mass_kg(charge)
    first = gas_volume_m3(charge, start_pag, temperature_k)
    slow_end = gas_volume_m3(charge, end_pag, temperature_k)
    after = bleed_fast(charge, start_pag, temperature_k, end_pag)
    if after.delivered_m3 <= 0.0:
        return Duration(slow_s=0.0, fast_s=0.0, slow_m3=0.0, fast_m3=0.0)
    slow_last = max(end_pag, precharge_at_temperature_pag(charge, temperature_k))
    check_range("back_pag", outlet.back_pag, -101_325.0, min(slow_last, after.gas_pag))
    before = gas_state(absolute_pa(start_pag), temperature_k)
    return Duration(
        slow_s=_outflow_s(first, slow_end, outlet, lambda v: gas_pressure_pa(mass / v, temperature_k)),
        fast_s=_outflow_s(first, after.gas_volume_m3, outlet, _fast_pressures(before, mass)),
        slow_m3=slow_end - first,
        fast_m3=after.delivered_m3,
    )


def _fast_pressures(before: GasState, mass: float) -> Callable[[float], float]:
    state = before

    def pressure_pa(volume: float) -> float:
        nonlocal state  # each point starts from the one before it, which is near
        state = to_density_fast(state, mass / volume)
        return state.pressure_pa

    return pressure_pa


def _outflow_s(first: float, last: float, outlet: Outlet, pressure_pa: Callable[[float], float]) -> float:
    # Points crowd toward the end, where the flow may die away as a root: v = last - (last - first) x^2.
    total = 0.0
    for x, weight in reversed(_GAUSS):
        volume = last - (last - first) * x * x
        drop = gauge_pag(pressure_pa(volume)) - outlet.back_pag
        flow = valve_flow_m3_s(outlet.flow_coefficient, drop, outlet.specific_gravity)
        total += weight * 2.0 * x * (last - first) / flow
    return total


def charging_time(
    charge: GasCharge, start_pag: float, end_pag: float, temperature_k: float, pump_flow_m3_s: float
) -> Duration:
    """Give volume and time of charging a bank by pumps of constant flow.

    Formula: t = (V1 - V2)/q, V2 at constant temperature and at constant entropy; a bank below its precharge
    starts empty of fluid.

    Args:
        charge: The bank and its precharge.
        start_pag: Gauge pressure before [Pa].
        end_pag: Gauge pressure after [Pa], at least the one before.
        temperature_k: Temperature of the gas before [K].
        pump_flow_m3_s: Flow of all pumps that run [m3/s], above 0.

    Returns:
        Both limits; the fluid of a warm bank takes longer, and the real time lies between.

    Raises:
        ValueError: The end lies below the start, or no flow, or outside the range of the gas equation.

    Source: conservation of volume, stiff fluid; gas by Span et al. (2000).
    """
    check_range("pump_flow_m3_s", pump_flow_m3_s, 1e-12, 1e3)
    check_range("end_pag", end_pag, start_pag, 150e6)
    first = gas_volume_m3(charge, start_pag, temperature_k)
    slow = first - gas_volume_m3(charge, end_pag, temperature_k)
    if slow <= 0.0:
        return Duration(slow_s=0.0, fast_s=0.0, slow_m3=0.0, fast_m3=0.0)
    lowest = max(start_pag, precharge_at_temperature_pag(charge, temperature_k))
    hot = to_pressure_fast(gas_state(absolute_pa(lowest), temperature_k), absolute_pa(end_pag))
    fast = first - nitrogen_mass_kg(charge) / hot.density_kg_m3
    return Duration(slow_s=slow / pump_flow_m3_s, fast_s=fast / pump_flow_m3_s, slow_m3=slow, fast_m3=fast)


def decompression_time_s(volume_m3: float, pressure_pag: float, bulk_modulus_pa: float, outlet: Outlet) -> float:
    """Give how long a trapped line needs to fall to the pressure behind its outlet.

    Formula: t = 2 V dp/(Be Q1), from dp/dt = -(Be/V) Q and Q growing as the square root of dp.

    Args:
        volume_m3: Volume of the line [m3].
        pressure_pag: Gauge pressure that is trapped [Pa], at least that behind the outlet.
        bulk_modulus_pa: Effective bulk modulus of liquid and walls [Pa], above 0.
        outlet: The vent path.

    Returns:
        Time [s].

    Raises:
        ValueError: Outside the range.

    Source: definition of the bulk modulus with the valve equation of ANSI/ISA-75.01.01, integrated.
    """
    check_range("bulk_modulus_pa", bulk_modulus_pa, 1.0, 1e13)
    check_range("flow_coefficient", outlet.flow_coefficient, 1e-9, 1e6)
    drop = pressure_pag - outlet.back_pag
    check_range("pressure_drop_pa", drop, 0.0, 1e10)
    if drop == 0.0:
        return 0.0
    flow = valve_flow_m3_s(outlet.flow_coefficient, drop, outlet.specific_gravity)
    return 2.0 * volume_m3 * drop / (bulk_modulus_pa * flow)


def gravity_drain_time_s(volume_m3: float, height_m: float, outlet: Outlet) -> float:
    """Give how long a standing line of even bore needs to run empty by its own weight, with air let in above.

    Formula: t = 2 V/Q1, Q1 the flow at the full height, as the head falls with the level.

    Args:
        volume_m3: Volume of the line [m3].
        height_m: Height of the line above its outlet [m], above 0.
        outlet: The drain path; it ends in the air.

    Returns:
        Time [s].

    Raises:
        ValueError: Outside the range.

    Source: Torricelli's law for a vessel of even section, with the valve equation of ANSI/ISA-75.01.01.
    """
    check_range("height_m", height_m, 1e-6, 1e4)
    check_range("flow_coefficient", outlet.flow_coefficient, 1e-9, 1e6)
    head = static_head_pa(height_m, outlet.specific_gravity * WATER_DENSITY_KG_M3)
    return 2.0 * volume_m3 / valve_flow_m3_s(outlet.flow_coefficient, head, outlet.specific_gravity)
