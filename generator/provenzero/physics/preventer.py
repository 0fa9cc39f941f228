"""The one ratio between well and control pressure: what closing a ram against a well needs."""

from provenzero.physics.standard import check_range


def closing_pressure_pa(well_pressure_pa: float, closing_ratio: float) -> float:
    """Give the closing pressure that a ram needs against a well pressure, both gauge or both absolute.

    Formula: p = pw/r.

    Args:
        well_pressure_pa: Pressure in the bore [Pa].
        closing_ratio: r [-], well pressure over closing pressure; 6 to 9 is typical.

    Returns:
        Closing pressure [Pa], in the kind (gauge or absolute) of the well pressure.

    Raises:
        ValueError: The ratio is not above zero.

    Source: Crumpton, Well Control for Completions and Interventions, 2018 (closing ratio).
    """
    check_range("closing_ratio", closing_ratio, 0.1, 100.0)
    return well_pressure_pa / closing_ratio
