"""A fast change of volume or pressure: nitrogen keeps its entropy and cools or heats, down into condensation.

A bottle that is emptied in seconds has no time to take heat from its shell; the gas then follows a line of
constant entropy. A very deep discharge ends where a part of the gas would condense; liquid and vapour are
then taken in equilibrium.
"""

import math
from dataclasses import dataclass
from typing import Final

from provenzero.physics.gas import (
    HIGHEST_DENSITY_KG_M3,
    HIGHEST_PRESSURE_PA,
    HIGHEST_TEMPERATURE_K,
    LOWEST_TEMPERATURE_K,
    gas_density_kg_m3,
    gas_entropy_j_kg_k,
    gas_internal_energy_j_kg,
)
from provenzero.physics.nitrogen import (
    CRITICAL_DENSITY_KG_M3,
    CRITICAL_TEMPERATURE_K,
    GAS_CONSTANT_J_KG_K,
    TRIPLE_TEMPERATURE_K,
    Helmholtz,
    ideal,
    isotherm,
    pressure_terms,
    residual,
)
from provenzero.physics.roots import bracketed_root, rising_root
from provenzero.physics.saturation import (
    HIGHEST_SATURATION_K,
    Saturation,
    saturation_at_pressure,
    saturation_at_temperature,
)
from provenzero.physics.standard import check_range

_POISSON: Final = 0.4  # [-] k - 1, for the first guess only
_LOG_LOWEST: Final = math.log(LOWEST_TEMPERATURE_K)
_LOG_HIGHEST: Final = math.log(HIGHEST_TEMPERATURE_K)
_SURELY_GAS_K: Final = 160.0  # Poisson's law is at most 5 K too warm: above this nothing condenses


@dataclass(frozen=True, slots=True, kw_only=True)
class GasState:
    """One state of nitrogen."""

    pressure_pa: float
    temperature_k: float
    density_kg_m3: float
    entropy_j_kg_k: float
    internal_energy_j_kg: float
    vapour_fraction: float = 1.0  # [-] by mass; 1 for gas, less where a part has condensed


def gas_state(pressure_pa: float, temperature_k: float) -> GasState:
    """Give the whole state of nitrogen at a pressure and temperature.

    Args:
        pressure_pa: Absolute pressure [Pa], above 0, to 150 MPa.
        temperature_k: Temperature [K], 130 to 2000 K (above 1000 K extrapolated).

    Returns:
        The state.

    Raises:
        ValueError: Outside the range.

    Source: Span et al., J. Phys. Chem. Ref. Data 29 (2000) 1361.
    """
    density = gas_density_kg_m3(pressure_pa, temperature_k)
    return GasState(
        pressure_pa=pressure_pa,
        temperature_k=temperature_k,
        density_kg_m3=density,
        entropy_j_kg_k=gas_entropy_j_kg_k(density, temperature_k),
        internal_energy_j_kg=gas_internal_energy_j_kg(density, temperature_k),
    )


def to_density_fast(start: GasState, density_kg_m3: float) -> GasState:
    """Give the state after a fast change of volume.

    Formula: s(rho, T) = s of the start, solved for ln T, in which entropy is nearly straight.

    Args:
        start: The state before.
        density_kg_m3: Density after [kg/m3], above 0, to 1200 kg/m3.

    Returns:
        The state after, with its vapour fraction if a part condenses.

    Raises:
        ValueError: The end is below 63.151 K, above 2000 K, or is liquid.

    Source: Span et al., J. Phys. Chem. Ref. Data 29 (2000) 1361; constant entropy as the limit of a fast
        change, API Spec 16D (fast discharge is taken as adiabatic; value from memory).
    """
    check_range("density_kg_m3", density_kg_m3, 1e-6, HIGHEST_DENSITY_KG_M3)
    entropy = start.entropy_j_kg_k
    delta = density_kg_m3 / CRITICAL_DENSITY_KG_M3
    guess = start.temperature_k * (density_kg_m3 / start.density_kg_m3) ** _POISSON
    if entropy < gas_entropy_j_kg_k(density_kg_m3, LOWEST_TEMPERATURE_K):
        return _deep_to_density(entropy, density_kg_m3)

    reduced = entropy / GAS_CONSTANT_J_KG_K

    def excess(log_temperature: float) -> tuple[float, float]:
        at = isotherm(math.exp(log_temperature))
        real = residual(at, delta)
        value, tau, tau2 = ideal(at.tau, delta)
        return tau + real.tau - value - real.value - reduced, -tau2 - real.tau2

    temperature = math.exp(rising_root(excess, _LOG_LOWEST, _LOG_HIGHEST, math.log(guess)))
    _check_hot_end(temperature)
    return _single(density_kg_m3, temperature)


def to_pressure_fast(start: GasState, pressure_pa: float) -> GasState:
    """Give the state after a fast change of pressure.

    Formula: s(p, T) = s of the start, solved for T.

    Args:
        start: The state before.
        pressure_pa: Absolute pressure after [Pa], 12.52 kPa to 150 MPa.

    Returns:
        The state after, with its vapour fraction if a part condenses.

    Raises:
        ValueError: The end is below 63.151 K, above 2000 K, or is liquid.

    Source: Span et al., J. Phys. Chem. Ref. Data 29 (2000) 1361; constant entropy as the limit of a fast
        change, API Spec 16D (fast discharge is taken as adiabatic; value from memory).
    """
    check_range("pressure_pa", pressure_pa, 1.0, HIGHEST_PRESSURE_PA)
    guess = start.temperature_k * (pressure_pa / start.pressure_pa) ** (_POISSON / (1.0 + _POISSON))
    if guess < _SURELY_GAS_K:
        lowest = gas_density_kg_m3(pressure_pa, LOWEST_TEMPERATURE_K)
        if start.entropy_j_kg_k < gas_entropy_j_kg_k(lowest, LOWEST_TEMPERATURE_K):
            return _deep_to_pressure(start.entropy_j_kg_k, pressure_pa)
    return _on_isobar(start.entropy_j_kg_k, pressure_pa, (LOWEST_TEMPERATURE_K, guess), HIGHEST_DENSITY_KG_M3)


def _on_isobar(entropy: float, pressure_pa: float, lowest_and_guess_k: tuple[float, float], densest: float) -> GasState:
    density = 0.0
    reduced = entropy / GAS_CONSTANT_J_KG_K

    def excess(log_temperature: float) -> tuple[float, float]:
        nonlocal density
        temperature = math.exp(log_temperature)
        density = _gas_branch(pressure_pa, temperature, densest, density)
        at = isotherm(temperature)
        delta = density / CRITICAL_DENSITY_KG_M3
        real = residual(at, delta)
        value, tau, tau2 = ideal(at.tau, delta)
        return tau + real.tau - value - real.value - reduced, _isobaric(real) - tau2 - real.tau2

    lowest, guess = lowest_and_guess_k
    temperature = math.exp(rising_root(excess, math.log(lowest), _LOG_HIGHEST, math.log(guess)))
    _check_hot_end(temperature)
    state = _single(_gas_branch(pressure_pa, temperature, densest, density), temperature)
    return GasState(
        pressure_pa=pressure_pa,
        temperature_k=temperature,
        density_kg_m3=state.density_kg_m3,
        entropy_j_kg_k=state.entropy_j_kg_k,
        internal_energy_j_kg=state.internal_energy_j_kg,
    )


def _isobaric(real: Helmholtz) -> float:
    return (1.0 + real.delta - real.delta_tau) ** 2 / (1.0 + 2.0 * real.delta + real.delta2)


def _gas_branch(pressure_pa: float, temperature_k: float, densest: float, guess: float) -> float:
    at = isotherm(temperature_k)
    scale = GAS_CONSTANT_J_KG_K * temperature_k

    def excess(density: float) -> tuple[float, float]:
        first, second = pressure_terms(at, density / CRITICAL_DENSITY_KG_M3)
        return density * scale * (1.0 + first) - pressure_pa, scale * (1.0 + 2.0 * first + second)

    return rising_root(excess, 0.0, densest, guess or pressure_pa / (scale + pressure_pa / 1100.0))


def _deep_to_density(entropy: float, density_kg_m3: float) -> GasState:
    dense = density_kg_m3 >= CRITICAL_DENSITY_KG_M3
    coldest = CRITICAL_TEMPERATURE_K if dense else TRIPLE_TEMPERATURE_K

    def excess(temperature: float) -> float:
        return _any(density_kg_m3, temperature).entropy_j_kg_k - entropy

    if excess(coldest) > 0.0:
        raise ValueError(_LIQUID if dense else _FROZEN)
    return _any(density_kg_m3, bracketed_root(excess, coldest, LOWEST_TEMPERATURE_K))


def _any(density_kg_m3: float, temperature_k: float) -> GasState:
    if temperature_k <= HIGHEST_SATURATION_K:
        both = saturation_at_temperature(temperature_k)
        if both.vapour.density_kg_m3 < density_kg_m3:
            vapour, liquid = 1.0 / both.vapour.density_kg_m3, 1.0 / both.liquid.density_kg_m3
            return _mixed(both, (1.0 / density_kg_m3 - liquid) / (vapour - liquid))
    return _single(density_kg_m3, temperature_k)


def _deep_to_pressure(entropy: float, pressure_pa: float) -> GasState:
    if pressure_pa >= saturation_at_temperature(HIGHEST_SATURATION_K).pressure_pa:
        lowest = _gas_branch(pressure_pa, CRITICAL_TEMPERATURE_K, HIGHEST_DENSITY_KG_M3, 0.0)
        if entropy < _single(lowest, CRITICAL_TEMPERATURE_K).entropy_j_kg_k:
            raise ValueError(_LIQUID)
        return _on_isobar(entropy, pressure_pa, (CRITICAL_TEMPERATURE_K, LOWEST_TEMPERATURE_K), lowest)
    both = saturation_at_pressure(pressure_pa)
    if entropy >= both.vapour.entropy_j_kg_k:
        lowest = both.vapour.density_kg_m3
        return _on_isobar(entropy, pressure_pa, (both.temperature_k, LOWEST_TEMPERATURE_K), lowest)
    fraction = (entropy - both.liquid.entropy_j_kg_k) / (both.vapour.entropy_j_kg_k - both.liquid.entropy_j_kg_k)
    if fraction < 0.0:
        raise ValueError(_LIQUID)
    return _mixed(both, fraction)


def _mixed(both: Saturation, fraction: float) -> GasState:
    def share(of: float, and_of: float) -> float:
        return fraction * of + (1.0 - fraction) * and_of

    gas, liquid = both.vapour, both.liquid
    return GasState(
        pressure_pa=both.pressure_pa,
        temperature_k=both.temperature_k,
        density_kg_m3=1.0 / share(1.0 / gas.density_kg_m3, 1.0 / liquid.density_kg_m3),
        entropy_j_kg_k=share(gas.entropy_j_kg_k, liquid.entropy_j_kg_k),
        internal_energy_j_kg=share(gas.internal_energy_j_kg, liquid.internal_energy_j_kg),
        vapour_fraction=fraction,
    )


def _single(density_kg_m3: float, temperature_k: float) -> GasState:
    at = isotherm(temperature_k)
    delta = density_kg_m3 / CRITICAL_DENSITY_KG_M3
    real = residual(at, delta)
    value, tau, _ = ideal(at.tau, delta)
    return GasState(
        pressure_pa=density_kg_m3 * GAS_CONSTANT_J_KG_K * temperature_k * (1.0 + real.delta),
        temperature_k=temperature_k,
        density_kg_m3=density_kg_m3,
        entropy_j_kg_k=GAS_CONSTANT_J_KG_K * (tau + real.tau - value - real.value),
        internal_energy_j_kg=GAS_CONSTANT_J_KG_K * temperature_k * (tau + real.tau),
    )


def _check_hot_end(temperature_k: float) -> None:
    if temperature_k >= HIGHEST_TEMPERATURE_K * (1.0 - 1e-9):
        raise ValueError(f"the gas would be hotter than {HIGHEST_TEMPERATURE_K:.0f} K; the formula ends there")


_LIQUID: Final = "the nitrogen would become liquid; the formula is for gas, or gas that begins to condense"
_FROZEN: Final = f"the nitrogen would be colder than {TRIPLE_TEMPERATURE_K} K; the formula ends there"
