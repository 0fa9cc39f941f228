"""What a gas-loaded accumulator holds: nitrogen, gas volume, fluid, and usable fluid between two pressures.

A bank of alike bottles is one large bottle: the sum of their gas volumes with their common precharge.
"""

from dataclasses import dataclass

from provenzero.physics.gas import gas_density_kg_m3, gas_pressure_pa, gas_temperature_k
from provenzero.physics.standard import absolute_pa, check_range, gauge_pag


@dataclass(frozen=True, slots=True, kw_only=True)
class GasCharge:
    """The nitrogen of a bottle, or of a bank of alike bottles, as it was put in without fluid.

    Attributes:
        gas_volume_m3: Space for gas when there is no fluid [m3], above 0.
        precharge_pag: Gauge pressure of the nitrogen alone [Pa]; 0 is a bottle that has lost its charge.
        precharge_temperature_k: Temperature at which that was read [K].
    """

    gas_volume_m3: float
    precharge_pag: float
    precharge_temperature_k: float

    def __post_init__(self) -> None:
        """Refuse a bottle without space, or a precharge below the atmosphere."""
        check_range("gas_volume_m3", self.gas_volume_m3, 1e-9, 1e6)
        check_range("precharge_pag", self.precharge_pag, 0.0, 150e6)


def nitrogen_mass_kg(charge: GasCharge) -> float:
    """Give the mass of nitrogen in the bottle, which no fluid movement changes.

    Formula: m = rho(p0, T0) V0.

    Args:
        charge: The bottle and its precharge.

    Returns:
        Mass [kg].

    Raises:
        ValueError: Pressure or temperature outside the range of the gas equation.

    Source: conservation of mass; density by Span et al. (2000).
    """
    pressure = absolute_pa(charge.precharge_pag)
    return charge.gas_volume_m3 * gas_density_kg_m3(pressure, charge.precharge_temperature_k)


def precharge_at_temperature_pag(charge: GasCharge, temperature_k: float) -> float:
    """Give what the precharge reads at another temperature, without fluid in the bottle.

    Formula: p at the same density and the new temperature.

    Args:
        charge: The bottle and its precharge.
        temperature_k: Temperature of the gas now [K].

    Returns:
        Gauge pressure of the precharge now [Pa].

    Raises:
        ValueError: Temperature outside the range of the gas equation.

    Source: conservation of mass in a fixed volume; Span et al. (2000).
    """
    if temperature_k == charge.precharge_temperature_k:
        return charge.precharge_pag
    pressure = absolute_pa(charge.precharge_pag)
    density = gas_density_kg_m3(pressure, charge.precharge_temperature_k)
    return gauge_pag(gas_pressure_pa(density, temperature_k))


def ideal_precharge_at_temperature_pag(charge: GasCharge, temperature_k: float) -> float:
    """Give what the precharge reads at another temperature, by the ideal-gas hand rule.

    Formula: p = p0 T/T0 with absolute pressures.

    Args:
        charge: The bottle and its precharge.
        temperature_k: Temperature of the gas now [K].

    Returns:
        Gauge pressure of the precharge now [Pa].

    Source: Gay-Lussac's law.
    """
    return gauge_pag(absolute_pa(charge.precharge_pag) * temperature_k / charge.precharge_temperature_k)


def gas_volume_m3(charge: GasCharge, pressure_pag: float, temperature_k: float) -> float:
    """Give the volume that the gas takes at a fluid pressure, once it has the given temperature.

    Formula: V = m/rho(p, T), never more than the bottle.

    Args:
        charge: The bottle and its precharge.
        pressure_pag: Gauge pressure of the fluid [Pa].
        temperature_k: Temperature of the gas [K].

    Returns:
        Gas volume [m3].

    Raises:
        ValueError: Outside the range of the gas equation.

    Source: conservation of mass; Span et al. (2000).
    """
    density = gas_density_kg_m3(absolute_pa(pressure_pag), temperature_k)
    mass = nitrogen_mass_kg(charge)
    return min(charge.gas_volume_m3, mass / density) if density > 0.0 else charge.gas_volume_m3


def fluid_volume_m3(charge: GasCharge, pressure_pag: float, temperature_k: float) -> float:
    """Give the fluid in the bottle at a pressure; none at or below the precharge.

    Formula: V0 - m/rho(p, T).

    Args:
        charge: The bottle and its precharge.
        pressure_pag: Gauge pressure of the fluid [Pa].
        temperature_k: Temperature of the gas [K].

    Returns:
        Fluid volume [m3].

    Raises:
        ValueError: Outside the range of the gas equation.

    Source: conservation of mass; Span et al. (2000).
    """
    return charge.gas_volume_m3 - gas_volume_m3(charge, pressure_pag, temperature_k)


def usable_slow_m3(charge: GasCharge, start_pag: float, end_pag: float, temperature_k: float) -> float:
    """Give the fluid that comes out between two pressures when the gas has time to keep its temperature.

    Formula: m/rho(p2, T) - m/rho(p1, T), each gas volume at most the bottle.

    Args:
        charge: The bottle and its precharge.
        start_pag: Gauge pressure before [Pa].
        end_pag: Gauge pressure after [Pa], at most the one before.
        temperature_k: Temperature of the gas [K].

    Returns:
        Fluid volume [m3].

    Raises:
        ValueError: The end lies above the start, or outside the range of the gas equation.

    Source: isothermal change of a real gas, API Spec 16D (value from memory); Span et al. (2000).
    """
    check_range("end_pag", end_pag, -101_325.0, start_pag)
    end = gas_volume_m3(charge, end_pag, temperature_k)
    return max(0.0, end - gas_volume_m3(charge, start_pag, temperature_k))


def usable_ideal_gauge_m3(charge: GasCharge, start_pag: float, end_pag: float) -> float:
    """Give the usable fluid by the hand rule of the trade: ideal gas, gauge pressures as they are read.

    Formula: V0 p0/p2 - V0 p0/p1, each at most V0.

    Args:
        charge: The bottle and its precharge, taken as read at working temperature.
        start_pag: Gauge pressure before [Pa], above 0.
        end_pag: Gauge pressure after [Pa], above 0.

    Returns:
        Fluid volume [m3].

    Raises:
        ValueError: The end lies above the start, or not above zero.

    Source: Crumpton, Well Control for Completions and Interventions, 2018, 4.9.7; the sheets of API RP 53.
    """
    check_range("end_pag", end_pag, 1.0, start_pag)
    return _boyle_m3(charge.gas_volume_m3, charge.precharge_pag, start_pag, end_pag)


def usable_ideal_absolute_m3(charge: GasCharge, start_pag: float, end_pag: float) -> float:
    """Give the usable fluid by the hand rule with absolute pressures.

    Formula: V0 p0/p2 - V0 p0/p1 with absolute pressures, each at most V0.

    Args:
        charge: The bottle and its precharge, taken as read at working temperature.
        start_pag: Gauge pressure before [Pa].
        end_pag: Gauge pressure after [Pa], at most the one before.

    Returns:
        Fluid volume [m3].

    Raises:
        ValueError: The end lies above the start, or below zero.

    Source: Boyle's law; teaching sheet to API RP 53.
    """
    check_range("end_pag", end_pag, 0.0, start_pag)
    precharge = absolute_pa(charge.precharge_pag)
    return _boyle_m3(charge.gas_volume_m3, precharge, absolute_pa(start_pag), absolute_pa(end_pag))


def _boyle_m3(gas_volume: float, precharge: float, start: float, end: float) -> float:
    return gas_volume * (min(1.0, precharge / end) - min(1.0, precharge / start))


def warmed_pag(charge: GasCharge, pressure_pag: float, temperature_k: float, warmed_k: float) -> float:
    """Give the pressure of an isolated, charged bottle after it has warmed or cooled as a whole.

    The fluid is taken as stiff and of fixed volume, so the gas keeps its volume.

    Formula: p at the density rho(p1, T1) and the temperature T2.

    Args:
        charge: The bottle and its precharge.
        pressure_pag: Gauge pressure before [Pa].
        temperature_k: Temperature before [K].
        warmed_k: Temperature after [K].

    Returns:
        Gauge pressure after [Pa] on the gas side.

    Raises:
        ValueError: Outside the range of the gas equation.

    Source: conservation of mass in a fixed volume; Span et al. (2000).
    """
    volume = gas_volume_m3(charge, pressure_pag, temperature_k)
    return gauge_pag(gas_pressure_pa(nitrogen_mass_kg(charge) / volume, warmed_k))


def temperature_at_pressure_k(
    charge: GasCharge, pressure_pag: float, temperature_k: float, reached_pag: float
) -> float:
    """Give the temperature at which an isolated, charged bottle reaches a pressure, such as its relief's.

    Formula: root in T of p(rho(p1, T1), T) = p2.

    Args:
        charge: The bottle and its precharge.
        pressure_pag: Gauge pressure before [Pa].
        temperature_k: Temperature before [K].
        reached_pag: Gauge pressure that is reached [Pa].

    Returns:
        Temperature [K].

    Raises:
        ValueError: Outside the range of the gas equation, or the pressure is not reached from 130 to 2000 K.

    Source: conservation of mass in a fixed volume; Span et al. (2000).
    """
    volume = gas_volume_m3(charge, pressure_pag, temperature_k)
    return gas_temperature_k(nitrogen_mass_kg(charge) / volume, absolute_pa(reached_pag))
