"""Where nitrogen begins to condense: liquid and vapour in equilibrium, for a deep and fast discharge."""

import math
from dataclasses import dataclass
from functools import lru_cache
from typing import Final

from provenzero.physics.nitrogen import (
    CRITICAL_DENSITY_KG_M3,
    CRITICAL_PRESSURE_PA,
    CRITICAL_TEMPERATURE_K,
    GAS_CONSTANT_J_KG_K,
    TRIPLE_TEMPERATURE_K,
    ideal,
    isotherm,
    residual,
)
from provenzero.physics.roots import bracketed_root
from provenzero.physics.standard import check_range

HIGHEST_SATURATION_K: Final = 126.19
_STEPS: Final = 60
_CLOSE: Final = 1e-12

# (factor, power of 1 - T/Tc) of the published auxiliary equations; they only start the iteration.
_LIQUID: Final = ((1.48654237, 0.3294), (-0.280476066, 2 / 3), (0.0894143085, 8 / 3), (-0.119879866, 35 / 6))
_VAPOUR: Final = (
    (-1.70127164, 0.34),
    (-3.70402649, 5 / 6),
    (1.29859383, 7 / 6),
    (-0.561424977, 13 / 6),
    (-2.68505381, 14 / 3),
)
_PRESSURE: Final = ((-6.12445284, 1.0), (1.2632722, 1.5), (-0.765910082, 2.5), (-1.77570564, 5.0))


@dataclass(frozen=True, slots=True, kw_only=True)
class Phase:
    """One of the two phases in equilibrium."""

    density_kg_m3: float
    entropy_j_kg_k: float
    internal_energy_j_kg: float


@dataclass(frozen=True, slots=True, kw_only=True)
class Saturation:
    """Liquid and vapour in equilibrium at one temperature."""

    temperature_k: float
    pressure_pa: float
    liquid: Phase
    vapour: Phase


@lru_cache(maxsize=64)
def _saturation(temperature_k: float) -> Saturation:
    at = isotherm(temperature_k)
    theta = 1.0 - temperature_k / CRITICAL_TEMPERATURE_K
    liquid = math.exp(_sum(_LIQUID, theta))
    vapour = math.exp(at.tau * _sum(_VAPOUR, theta))
    for _ in range(_STEPS):
        f, g = residual(at, liquid), residual(at, vapour)
        pressure_gap = vapour * (1.0 + g.delta) - liquid * (1.0 + f.delta)
        gibbs_gap = g.delta + g.value + math.log(vapour) - f.delta - f.value - math.log(liquid)
        gap = liquid - vapour
        liquid_step = liquid * (pressure_gap - vapour * gibbs_gap) / (gap * (1.0 + 2.0 * f.delta + f.delta2))
        vapour_step = vapour * (pressure_gap - liquid * gibbs_gap) / (gap * (1.0 + 2.0 * g.delta + g.delta2))
        liquid += liquid_step
        vapour += vapour_step
        if abs(liquid_step) < _CLOSE * liquid and abs(vapour_step) < _CLOSE * vapour:
            break
    return Saturation(
        temperature_k=temperature_k,
        pressure_pa=vapour
        * CRITICAL_DENSITY_KG_M3
        * GAS_CONSTANT_J_KG_K
        * temperature_k
        * (1.0 + residual(at, vapour).delta),
        liquid=_phase(temperature_k, liquid),
        vapour=_phase(temperature_k, vapour),
    )


def saturation_at_temperature(temperature_k: float) -> Saturation:
    """Give liquid and vapour in equilibrium at a temperature.

    Formula: equal pressure and equal Gibbs energy of both phases, by Newton's method.

    Args:
        temperature_k: Temperature [K], 63.151 to 126.19 K.

    Returns:
        Both phases.

    Raises:
        ValueError: Outside the range.

    Source: Span et al., J. Phys. Chem. Ref. Data 29 (2000) 1361 (equation and auxiliary equations);
        Akasaka, J. Thermal Science and Technology 3 (2008) 442 (the iteration).
    """
    check_range("temperature_k", temperature_k, TRIPLE_TEMPERATURE_K, HIGHEST_SATURATION_K)
    return _saturation(temperature_k)


def saturation_at_pressure(pressure_pa: float) -> Saturation:
    """Give liquid and vapour in equilibrium at a pressure.

    Formula: root of p_s(T) = p.

    Args:
        pressure_pa: Absolute pressure [Pa], 12.52 kPa to 3.395 MPa.

    Returns:
        Both phases.

    Raises:
        ValueError: Outside the range.

    Source: Span et al., J. Phys. Chem. Ref. Data 29 (2000) 1361.
    """
    lowest = _saturation(TRIPLE_TEMPERATURE_K).pressure_pa
    highest = _saturation(HIGHEST_SATURATION_K).pressure_pa
    check_range("pressure_pa", pressure_pa, lowest, highest)
    near = bracketed_root(
        lambda t: _auxiliary_pressure_pa(t) - pressure_pa, TRIPLE_TEMPERATURE_K - 0.1, CRITICAL_TEMPERATURE_K
    )
    low, high = max(near - 0.1, TRIPLE_TEMPERATURE_K), min(near + 0.1, HIGHEST_SATURATION_K)
    return _saturation(bracketed_root(lambda t: _saturation(t).pressure_pa - pressure_pa, low, high))


def _auxiliary_pressure_pa(temperature_k: float) -> float:
    theta = 1.0 - temperature_k / CRITICAL_TEMPERATURE_K
    return CRITICAL_PRESSURE_PA * math.exp(CRITICAL_TEMPERATURE_K / temperature_k * _sum(_PRESSURE, theta))


def _sum(terms: tuple[tuple[float, float], ...], theta: float) -> float:
    total = 0.0
    for factor, power in terms:
        total += factor * theta**power
    return total


def _phase(temperature_k: float, delta: float) -> Phase:
    at = isotherm(temperature_k)
    real = residual(at, delta)
    value, tau, _ = ideal(at.tau, delta)
    return Phase(
        density_kg_m3=delta * CRITICAL_DENSITY_KG_M3,
        entropy_j_kg_k=GAS_CONSTANT_J_KG_K * (tau + real.tau - value - real.value),
        internal_energy_j_kg=GAS_CONSTANT_J_KG_K * temperature_k * (tau + real.tau),
    )
