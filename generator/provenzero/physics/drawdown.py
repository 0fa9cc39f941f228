"""The inverse problem: what a measured drawdown says of the precharge, or of bottles that are missing."""

from provenzero.physics.accumulator import GasCharge, usable_slow_m3
from provenzero.physics.discharge import bleed_fast
from provenzero.physics.gas import gas_density_kg_m3, gas_pressure_pa
from provenzero.physics.isentrope import gas_state, to_pressure_fast
from provenzero.physics.standard import absolute_pa, check_range, gauge_pag


def precharge_by_hand_rule_pag(removed_m3: float, gas_volume_m3: float, start_pag: float, end_pag: float) -> float:
    """Give the precharge that a drawdown shows, by the hand rule of the trade: ideal gas, gauge pressures.

    Formula: p0 = (Vr/Va) pf ps/(ps - pf).

    Args:
        removed_m3: Fluid that came out [m3].
        gas_volume_m3: Gas volume of all bottles without fluid [m3].
        start_pag: Gauge pressure before [Pa].
        end_pag: Gauge pressure after, warm again [Pa].

    Returns:
        Mean gauge precharge of all bottles [Pa].

    Raises:
        ValueError: The end is not below the start, or a volume is not positive.

    Source: drilling formula collections (values from memory); it is Boyle's law solved for the precharge.
    """
    _check(removed_m3, gas_volume_m3, start_pag, end_pag)
    return removed_m3 / gas_volume_m3 * end_pag * start_pag / (start_pag - end_pag)


def precharge_from_slow_pag(
    removed_m3: float, gas_volume_m3: float, start_pag: float, end_pag: float, temperature_k: float
) -> float:
    """Give the precharge that a drawdown shows, when the end was read with the gas warm again.

    Formula: m = Vr/(1/rho(p2, T) - 1/rho(p1, T)), then p0 = p(m/Va, T).

    Args:
        removed_m3: Fluid that came out [m3].
        gas_volume_m3: Gas volume of all bottles without fluid [m3].
        start_pag: Gauge pressure before [Pa].
        end_pag: Gauge pressure after, warm again [Pa].
        temperature_k: Temperature of the gas at both readings [K].

    Returns:
        Mean gauge precharge of all bottles at that temperature [Pa].

    Raises:
        ValueError: The end is not below the start, or no precharge explains the readings: more gas would be
            needed than lies below the end pressure.

    Source: conservation of mass; Span et al. (2000).
    """
    _check(removed_m3, gas_volume_m3, start_pag, end_pag)
    start = gas_density_kg_m3(absolute_pa(start_pag), temperature_k)
    end = gas_density_kg_m3(absolute_pa(end_pag), temperature_k)
    return _precharge_pag(removed_m3 / gas_volume_m3, (start, end), temperature_k, end)


def precharge_from_fast_pag(
    removed_m3: float, gas_volume_m3: float, start_pag: float, end_pag: float, temperature_k: float
) -> float:
    """Give the precharge that a drawdown shows, when the end was read straight after a fast discharge.

    Formula: m = Vr/(1/rho(p2, s1) - 1/rho(p1, T)), then p0 = p(m/Va, T).

    Args:
        removed_m3: Fluid that came out [m3].
        gas_volume_m3: Gas volume of all bottles without fluid [m3].
        start_pag: Gauge pressure before [Pa].
        end_pag: Gauge pressure straight after [Pa].
        temperature_k: Temperature of the gas before [K].

    Returns:
        Mean gauge precharge of all bottles at that temperature [Pa].

    Raises:
        ValueError: The end is not below the start, or no precharge explains the readings.

    Source: conservation of mass and entropy; Span et al. (2000).
    """
    _check(removed_m3, gas_volume_m3, start_pag, end_pag)
    start = gas_state(absolute_pa(start_pag), temperature_k)
    end = to_pressure_fast(start, absolute_pa(end_pag)).density_kg_m3
    return _precharge_pag(removed_m3 / gas_volume_m3, (start.density_kg_m3, end), temperature_k, end)


def bottles_from_slow(
    one_bottle: GasCharge, removed_m3: float, start_pag: float, end_pag: float, temperature_k: float
) -> float:
    """Give how many bottles with a known precharge explain a drawdown that was read warm.

    Formula: Vr over the isothermal usable fluid of one bottle.

    Args:
        one_bottle: One bottle and its precharge.
        removed_m3: Fluid that came out of all [m3].
        start_pag: Gauge pressure before [Pa].
        end_pag: Gauge pressure after, warm again [Pa].
        temperature_k: Temperature of the gas at both readings [K].

    Returns:
        Number of bottles [-], not rounded.

    Raises:
        ValueError: One bottle would give nothing between these pressures, or outside the gas equation.

    Source: conservation of mass; Span et al. (2000).
    """
    return _bottles(removed_m3, usable_slow_m3(one_bottle, start_pag, end_pag, temperature_k))


def bottles_from_fast(
    one_bottle: GasCharge, removed_m3: float, start_pag: float, end_pag: float, temperature_k: float
) -> float:
    """Give how many bottles with a known precharge explain a drawdown that was read straight after.

    Formula: Vr over the isentropic usable fluid of one bottle.

    Args:
        one_bottle: One bottle and its precharge.
        removed_m3: Fluid that came out of all [m3].
        start_pag: Gauge pressure before [Pa].
        end_pag: Gauge pressure straight after [Pa].
        temperature_k: Temperature of the gas before [K].

    Returns:
        Number of bottles [-], not rounded.

    Raises:
        ValueError: One bottle would give nothing between these pressures, or outside the gas equation.

    Source: conservation of mass and entropy; Span et al. (2000).
    """
    return _bottles(removed_m3, bleed_fast(one_bottle, start_pag, temperature_k, end_pag).delivered_m3)


def _check(removed_m3: float, gas_volume_m3: float, start_pag: float, end_pag: float) -> None:
    check_range("removed_m3", removed_m3, 0.0, gas_volume_m3)
    check_range("end_pag", end_pag, 0.0, start_pag)
    if end_pag == start_pag:
        raise ValueError("end_pag equals start_pag; a drawdown without a fall of pressure says nothing")


def _precharge_pag(removed_share: float, densities: tuple[float, float], temperature_k: float, densest: float) -> float:
    start, end = densities
    needed = removed_share / (1.0 / end - 1.0 / start)
    if needed > densest * (1.0 + 1e-12):
        raise ValueError(
            f"the bottles would hold {needed:.4g} kg/m3 of nitrogen, more than the {densest:.4g} kg/m3 at the"
            " end: all fluid was out before the end, or there is more gas volume than was said"
        )
    return gauge_pag(gas_pressure_pa(needed, temperature_k))


def _bottles(removed_m3: float, each_m3: float) -> float:
    check_range("removed_m3", removed_m3, 0.0, 1e6)
    if each_m3 <= 0.0:
        raise ValueError("one bottle gives no fluid between these pressures; no number of them explains it")
    return removed_m3 / each_m3
