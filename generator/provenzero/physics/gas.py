"""Nitrogen as a real gas: pressure, density, entropy and internal energy from one another.

One density belongs to each pressure because only temperatures above the critical one are taken; what lies
below it (a deep, fast discharge) is in `isentrope`.
"""

from functools import lru_cache
from typing import Final

from provenzero.physics.nitrogen import (
    CRITICAL_DENSITY_KG_M3,
    GAS_CONSTANT_J_KG_K,
    ideal,
    isotherm,
    pressure_terms,
    residual,
)
from provenzero.physics.roots import rising_root
from provenzero.physics.standard import ATMOSPHERE_PA, FREE_GAS_TEMPERATURE_K, check_range

LOWEST_TEMPERATURE_K: Final = 130.0
HIGHEST_TEMPERATURE_K: Final = 2000.0
HIGHEST_PRESSURE_PA: Final = 150e6
HIGHEST_DENSITY_KG_M3: Final = 1200.0


@lru_cache(maxsize=512)
def _density_kg_m3(pressure_pa: float, temperature_k: float) -> float:
    at = isotherm(temperature_k)
    scale = GAS_CONSTANT_J_KG_K * temperature_k

    def excess(density: float) -> tuple[float, float]:
        first, second = pressure_terms(at, density / CRITICAL_DENSITY_KG_M3)
        return density * scale * (1.0 + first) - pressure_pa, scale * (1.0 + 2.0 * first + second)

    guess = pressure_pa / (scale + pressure_pa / 1100.0)  # hard spheres that fill space at 1100 kg/m3
    return rising_root(excess, 0.0, HIGHEST_DENSITY_KG_M3, guess)


def gas_density_kg_m3(pressure_pa: float, temperature_k: float) -> float:
    """Give the density of nitrogen.

    Formula: root of p = rho R T (1 + delta a_delta).

    Args:
        pressure_pa: Absolute pressure [Pa], 0 to 150 MPa.
        temperature_k: Temperature [K], 130 to 2000 K (above 1000 K extrapolated).

    Returns:
        Density [kg/m3].

    Raises:
        ValueError: Outside the range.

    Source: Span et al., J. Phys. Chem. Ref. Data 29 (2000) 1361; 0.02 % in density up to 30 MPa.
    """
    check_range("pressure_pa", pressure_pa, 0.0, HIGHEST_PRESSURE_PA)
    check_range("temperature_k", temperature_k, LOWEST_TEMPERATURE_K, HIGHEST_TEMPERATURE_K)
    return _density_kg_m3(pressure_pa, temperature_k)


def gas_pressure_pa(density_kg_m3: float, temperature_k: float) -> float:
    """Give the absolute pressure of nitrogen.

    Formula: p = rho R T (1 + delta a_delta).

    Args:
        density_kg_m3: Density [kg/m3], 0 to 1200 kg/m3.
        temperature_k: Temperature [K], 130 to 2000 K (above 1000 K extrapolated).

    Returns:
        Absolute pressure [Pa].

    Raises:
        ValueError: Outside the range.

    Source: Span et al., J. Phys. Chem. Ref. Data 29 (2000) 1361.
    """
    check_range("density_kg_m3", density_kg_m3, 0.0, HIGHEST_DENSITY_KG_M3)
    check_range("temperature_k", temperature_k, LOWEST_TEMPERATURE_K, HIGHEST_TEMPERATURE_K)
    first, _ = pressure_terms(isotherm(temperature_k), density_kg_m3 / CRITICAL_DENSITY_KG_M3)
    return density_kg_m3 * GAS_CONSTANT_J_KG_K * temperature_k * (1.0 + first)


def gas_entropy_j_kg_k(density_kg_m3: float, temperature_k: float) -> float:
    """Give the specific entropy of nitrogen.

    Formula: s = R (tau (a0_tau + ar_tau) - a0 - ar).

    Args:
        density_kg_m3: Density [kg/m3], above 0, to 1200 kg/m3.
        temperature_k: Temperature [K], 130 to 2000 K (above 1000 K extrapolated).

    Returns:
        Specific entropy [J/(kg K)], with the zero point of the source.

    Raises:
        ValueError: Outside the range.

    Source: Span et al., J. Phys. Chem. Ref. Data 29 (2000) 1361.
    """
    return _caloric(density_kg_m3, temperature_k)[0]


def gas_internal_energy_j_kg(density_kg_m3: float, temperature_k: float) -> float:
    """Give the specific internal energy of nitrogen.

    Formula: u = R T tau (a0_tau + ar_tau).

    Args:
        density_kg_m3: Density [kg/m3], above 0, to 1200 kg/m3.
        temperature_k: Temperature [K], 130 to 2000 K (above 1000 K extrapolated).

    Returns:
        Specific internal energy [J/kg], with the zero point of the source.

    Raises:
        ValueError: Outside the range.

    Source: Span et al., J. Phys. Chem. Ref. Data 29 (2000) 1361.
    """
    return _caloric(density_kg_m3, temperature_k)[1]


def _caloric(density_kg_m3: float, temperature_k: float) -> tuple[float, float]:
    check_range("density_kg_m3", density_kg_m3, 1e-9, HIGHEST_DENSITY_KG_M3)
    check_range("temperature_k", temperature_k, LOWEST_TEMPERATURE_K, HIGHEST_TEMPERATURE_K)
    at = isotherm(temperature_k)
    delta = density_kg_m3 / CRITICAL_DENSITY_KG_M3
    real = residual(at, delta)
    value, tau, _ = ideal(at.tau, delta)
    thermal = tau + real.tau
    return (
        GAS_CONSTANT_J_KG_K * (thermal - value - real.value),
        GAS_CONSTANT_J_KG_K * temperature_k * thermal,
    )


def gas_temperature_k(density_kg_m3: float, pressure_pa: float) -> float:
    """Give the temperature at which nitrogen of a density has a pressure: a closed space that warms.

    Formula: root of p = rho R T (1 + delta a_delta) in T.

    Args:
        density_kg_m3: Density [kg/m3], above 0, to 1200 kg/m3.
        pressure_pa: Absolute pressure [Pa], 0 to 150 MPa.

    Returns:
        Temperature [K], 130 to 2000 K (above 1000 K extrapolated).

    Raises:
        ValueError: Outside the range, or no temperature from 130 to 2000 K gives that pressure.

    Source: Span et al., J. Phys. Chem. Ref. Data 29 (2000) 1361.
    """
    check_range("density_kg_m3", density_kg_m3, 1e-9, HIGHEST_DENSITY_KG_M3)
    check_range(
        "pressure_pa",
        pressure_pa,
        gas_pressure_pa(density_kg_m3, LOWEST_TEMPERATURE_K),
        min(HIGHEST_PRESSURE_PA, gas_pressure_pa(density_kg_m3, HIGHEST_TEMPERATURE_K)),
    )
    delta = density_kg_m3 / CRITICAL_DENSITY_KG_M3

    def excess(temperature: float) -> tuple[float, float]:
        real = residual(isotherm(temperature), delta)
        scale = density_kg_m3 * GAS_CONSTANT_J_KG_K
        return (
            scale * temperature * (1.0 + real.delta) - pressure_pa,
            scale * (1.0 + real.delta - real.delta_tau),
        )

    return rising_root(excess, LOWEST_TEMPERATURE_K, HIGHEST_TEMPERATURE_K, 300.0)


def compressibility_factor(pressure_pa: float, temperature_k: float) -> float:
    """Give how far nitrogen is from the ideal gas.

    Formula: Z = p/(rho R T).

    Args:
        pressure_pa: Absolute pressure [Pa], above 0, to 150 MPa.
        temperature_k: Temperature [K], 130 to 2000 K (above 1000 K extrapolated).

    Returns:
        Compressibility factor [-]; 1 for the ideal gas.

    Raises:
        ValueError: Outside the range.

    Source: Span et al., J. Phys. Chem. Ref. Data 29 (2000) 1361.
    """
    check_range("pressure_pa", pressure_pa, 1e-3, HIGHEST_PRESSURE_PA)
    density = gas_density_kg_m3(pressure_pa, temperature_k)
    return pressure_pa / (density * GAS_CONSTANT_J_KG_K * temperature_k)


def free_volume_m3(mass_kg: float, temperature_k: float = FREE_GAS_TEMPERATURE_K) -> float:
    """Give the space that nitrogen takes once it is let out to the air.

    Formula: V = m/rho(101 325 Pa, T).

    Args:
        mass_kg: Mass [kg].
        temperature_k: Temperature of the air [K]; 15 degC unless given.

    Returns:
        Volume at atmospheric pressure [m3].

    Raises:
        ValueError: The temperature is outside the range of the equation.

    Source: Span et al., J. Phys. Chem. Ref. Data 29 (2000) 1361; 15 degC as in ISO 13443:1996.
    """
    return mass_kg / gas_density_kg_m3(ATMOSPHERE_PA, temperature_k)
