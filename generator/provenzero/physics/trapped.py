"""Liquid shut in a line: what warming does, what comes out, and what a creeping gauge tells of a leak."""

from provenzero.physics.standard import check_range


def pressure_rise_pa_k(expansion_per_k: float, bulk_modulus_pa: float, wall_expansion_per_k: float = 0.0) -> float:
    """Give the pressure that a blocked-in line gains for each kelvin of warming.

    Formula: dp/dT = (af - av) Be; with Be from the liquid and the stretch of the pipe this is
    (af - av)/(b + D/(t E)).

    Args:
        expansion_per_k: Cubical expansion af of the liquid [1/K].
        bulk_modulus_pa: Effective bulk modulus Be of liquid and walls [Pa], above 0.
        wall_expansion_per_k: Cubical expansion av of the walls [1/K]; 0 for a rigid line.

    Returns:
        Pressure rise [Pa/K].

    Raises:
        ValueError: The bulk modulus is not above zero.

    Source: thermal expansion of trapped liquid with pipe stretch, as in pipe-engineering texts.
    """
    check_range("bulk_modulus_pa", bulk_modulus_pa, 1.0, 1e13)
    return (expansion_per_k - wall_expansion_per_k) * bulk_modulus_pa


def released_volume_m3(volume_m3: float, pressure_pag: float, bulk_modulus_pa: float) -> float:
    """Give the liquid that comes out until a trapped line is at zero; much more tells of a passing barrier.

    Formula: dV = V p/Be.

    Args:
        volume_m3: Volume of the line [m3].
        pressure_pag: Gauge pressure that is trapped [Pa], small against Be.
        bulk_modulus_pa: Effective bulk modulus of liquid and walls [Pa], above 0.

    Returns:
        Volume at atmospheric pressure [m3].

    Raises:
        ValueError: The bulk modulus is not above zero.

    Source: definition of the bulk modulus.
    """
    check_range("bulk_modulus_pa", bulk_modulus_pa, 1.0, 1e13)
    return volume_m3 * pressure_pag / bulk_modulus_pa


def leak_rate_m3_s(volume_m3: float, bulk_modulus_pa: float, pressure_rise_pa: float, hold_time_s: float) -> float:
    """Give the leak into a closed line that a pressure rise in a hold time implies.

    Formula: q = (V/Be) dp/t.

    Args:
        volume_m3: Volume of the line [m3].
        bulk_modulus_pa: Effective bulk modulus of liquid and walls [Pa], above 0.
        pressure_rise_pa: Rise of the gauge [Pa].
        hold_time_s: Time between the readings [s], above 0.

    Returns:
        Leak rate [m3/s].

    Raises:
        ValueError: Bulk modulus or time not above zero.

    Source: definition of the bulk modulus; temperature steady meanwhile.
    """
    check_range("bulk_modulus_pa", bulk_modulus_pa, 1.0, 1e13)
    check_range("hold_time_s", hold_time_s, 1e-9, 1e9)
    return volume_m3 / bulk_modulus_pa * pressure_rise_pa / hold_time_s


def hold_time_s(volume_m3: float, bulk_modulus_pa: float, gauge_resolution_pa: float, leak_m3_s: float) -> float:
    """Give how long a closed line must be watched before a leak of a stated size can be seen.

    Formula: t = V dp/(Be q).

    Args:
        volume_m3: Volume of the line [m3].
        bulk_modulus_pa: Effective bulk modulus of liquid and walls [Pa], above 0.
        gauge_resolution_pa: Least change that the gauge shows [Pa].
        leak_m3_s: Leak that must be found [m3/s], above 0.

    Returns:
        Hold time [s].

    Raises:
        ValueError: Bulk modulus or leak not above zero.

    Source: definition of the bulk modulus; temperature steady meanwhile.
    """
    check_range("bulk_modulus_pa", bulk_modulus_pa, 1.0, 1e13)
    check_range("leak_m3_s", leak_m3_s, 1e-18, 1e6)
    return volume_m3 * gauge_resolution_pa / (bulk_modulus_pa * leak_m3_s)
