"""Constants of the surroundings, gauge against absolute pressure, and the check of a formula's range."""

from typing import Final

ATMOSPHERE_PA: Final = 101_325.0
GRAVITY_M_S2: Final = 9.80665
FREE_GAS_TEMPERATURE_K: Final = 288.15
WATER_DENSITY_KG_M3: Final = 1000.0


def absolute_pa(pressure_pag: float) -> float:
    """Give the absolute pressure behind a gauge reading.

    Formula: p = pg + 101 325 Pa.

    Args:
        pressure_pag: Gauge pressure [Pa].

    Returns:
        Absolute pressure [Pa].

    Source: standard atmosphere, ISO 2533:1975, sea level.
    """
    return pressure_pag + ATMOSPHERE_PA


def gauge_pag(pressure_pa: float) -> float:
    """Give the gauge reading of an absolute pressure.

    Formula: pg = p - 101 325 Pa.

    Args:
        pressure_pa: Absolute pressure [Pa].

    Returns:
        Gauge pressure [Pa].

    Source: standard atmosphere, ISO 2533:1975, sea level.
    """
    return pressure_pa - ATMOSPHERE_PA


def check_range(name: str, value: float, low: float, high: float) -> None:
    """Refuse a value outside the range in which a formula holds; the name carries the unit.

    Args:
        name: What the value is, with its unit suffix.
        value: The value [-, in the unit that the name says].
        low: Least value that is accepted [-, in the unit that the name says].
        high: Largest value that is accepted [-, in the unit that the name says].

    Raises:
        ValueError: The value is below, above, or not a number.

    Source: none needed; the range itself is given by the formula that asks.
    """
    if not low <= value <= high:
        raise ValueError(f"{name} is {value:.6g}; the formula holds from {low:.6g} to {high:.6g}")
