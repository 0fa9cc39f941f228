"""The same gas by the ideal-gas hand rules, so that a person can check a figure with a pocket calculator."""

from typing import Final

from provenzero.physics.nitrogen import GAS_CONSTANT_J_KG_K

HEAT_CAPACITY_RATIO: Final = 1.4  # [-] two-atom gas


def ideal_density_kg_m3(pressure_pa: float, temperature_k: float) -> float:
    """Give the density of nitrogen taken as an ideal gas.

    Formula: rho = p/(R T), R = 296.8 J/(kg K).

    Args:
        pressure_pa: Absolute pressure [Pa].
        temperature_k: Temperature [K], above 0.

    Returns:
        Density [kg/m3].

    Source: ideal-gas law; R from Span et al. (2000), 8.31451 J/(mol K) over 28.01348 g/mol.
    """
    return pressure_pa / (GAS_CONSTANT_J_KG_K * temperature_k)


def ideal_pressure_pa(density_kg_m3: float, temperature_k: float) -> float:
    """Give the absolute pressure of nitrogen taken as an ideal gas.

    Formula: p = rho R T, R = 296.8 J/(kg K).

    Args:
        density_kg_m3: Density [kg/m3].
        temperature_k: Temperature [K].

    Returns:
        Absolute pressure [Pa].

    Source: ideal-gas law; R from Span et al. (2000), 8.31451 J/(mol K) over 28.01348 g/mol.
    """
    return density_kg_m3 * GAS_CONSTANT_J_KG_K * temperature_k


def ideal_isentropic_temperature_k(
    temperature_k: float, start_pa: float, end_pa: float, heat_capacity_ratio: float = HEAT_CAPACITY_RATIO
) -> float:
    """Give the temperature after a fast change of pressure, for an ideal gas.

    Formula: T2 = T1 (p2/p1)^((k - 1)/k).

    Args:
        temperature_k: Temperature before [K].
        start_pa: Absolute pressure before [Pa], above 0.
        end_pa: Absolute pressure after [Pa].
        heat_capacity_ratio: k [-]; 1.4 for a two-atom gas.

    Returns:
        Temperature after [K].

    Source: Poisson's law; k = 1.4 as in ASME PCC-2, Article 501, Appendix II.
    """
    ratio: float = (end_pa / start_pa) ** ((heat_capacity_ratio - 1.0) / heat_capacity_ratio)
    return temperature_k * ratio


def ideal_isentropic_density_kg_m3(
    density_kg_m3: float, start_pa: float, end_pa: float, heat_capacity_ratio: float = HEAT_CAPACITY_RATIO
) -> float:
    """Give the density after a fast change of pressure, for an ideal gas.

    Formula: rho2 = rho1 (p2/p1)^(1/k).

    Args:
        density_kg_m3: Density before [kg/m3].
        start_pa: Absolute pressure before [Pa], above 0.
        end_pa: Absolute pressure after [Pa].
        heat_capacity_ratio: k [-]; 1.4 for a two-atom gas.

    Returns:
        Density after [kg/m3].

    Source: Poisson's law; k = 1.4 as in ASME PCC-2, Article 501, Appendix II.
    """
    ratio: float = (end_pa / start_pa) ** (1.0 / heat_capacity_ratio)
    return density_kg_m3 * ratio
