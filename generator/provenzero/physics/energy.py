"""Stored energy of compressed gas and of trapped liquid, its TNT equivalent, and the distance to keep."""

from typing import Final

from provenzero.physics.accumulator import (
    GasCharge,
    gas_volume_m3,
    nitrogen_mass_kg,
    precharge_at_temperature_pag,
)
from provenzero.physics.ideal_gas import HEAT_CAPACITY_RATIO
from provenzero.physics.isentrope import gas_state, to_pressure_fast
from provenzero.physics.standard import ATMOSPHERE_PA, absolute_pa, check_range

PCC2_ATMOSPHERE_PA: Final = 101_000.0
TNT_J_KG: Final = 4_266_920.0
SCALED_DISTANCE_M_PER_CBRT_KG: Final = 20.0  # m/kg^(1/3)
_SMALL_ENERGY_J: Final = 135.5e6
_MIDDLE_ENERGY_J: Final = 271e6
_SMALL_DISTANCE_M: Final = 30.0
_MIDDLE_DISTANCE_M: Final = 60.0


def stored_gas_energy_j(
    pressure_pa: float, volume_m3: float, heat_capacity_ratio: float = HEAT_CAPACITY_RATIO
) -> float:
    """Give the energy of compressed gas by the formula of the pressure-test rules.

    Formula: E = 1/(k - 1) p V (1 - (pa/p)^((k - 1)/k)), pa = 101 kPa; for k = 1.4 the factor is 2.5.

    Args:
        pressure_pa: Absolute pressure of the gas [Pa], at least 101 kPa.
        volume_m3: Volume of the gas [m3].
        heat_capacity_ratio: k [-], above 1; 1.4 for nitrogen and air.

    Returns:
        Stored energy [J].

    Raises:
        ValueError: Pressure below the atmosphere, or k not above 1.

    Source: ASME PCC-2, Article 501, Mandatory Appendix II.
    """
    check_range("pressure_pa", pressure_pa, PCC2_ATMOSPHERE_PA, 1e10)
    check_range("heat_capacity_ratio", heat_capacity_ratio, 1.0001, 2.0)
    power = (heat_capacity_ratio - 1.0) / heat_capacity_ratio
    share: float = 1.0 - (PCC2_ATMOSPHERE_PA / pressure_pa) ** power
    return pressure_pa * volume_m3 * share / (heat_capacity_ratio - 1.0)


def bottle_energy_j(charge: GasCharge, pressure_pag: float, temperature_k: float) -> float:
    """Give the stored energy of a bottle's gas at a fluid pressure, by the pressure-test formula.

    At and below the precharge it is the energy of the precharge: draining the fluid leaves it.

    Formula: as `stored_gas_energy_j`, with the real gas volume.

    Args:
        charge: The bottle and its precharge.
        pressure_pag: Gauge pressure of the fluid [Pa].
        temperature_k: Temperature of the gas [K].

    Returns:
        Stored energy [J].

    Raises:
        ValueError: Outside the range of the gas equation.

    Source: ASME PCC-2, Article 501, Mandatory Appendix II; gas volume by Span et al. (2000).
    """
    pressure, volume = _gas_side(charge, pressure_pag, temperature_k)
    return stored_gas_energy_j(pressure, volume)


def bottle_expansion_work_j(charge: GasCharge, pressure_pag: float, temperature_k: float) -> float:
    """Give the work that a bottle's gas can do if it bursts: real gas, expanding fast to the atmosphere.

    Formula: m (u1 - u2), state 2 at 101 325 Pa and the entropy of state 1; a part may condense.

    Args:
        charge: The bottle and its precharge.
        pressure_pag: Gauge pressure of the fluid [Pa].
        temperature_k: Temperature of the gas [K].

    Returns:
        Work [J], that done against the atmosphere included.

    Raises:
        ValueError: Outside the range of the gas equation.

    Source: first law for constant entropy; Span et al. (2000).
    """
    pressure, _ = _gas_side(charge, pressure_pag, temperature_k)
    start = gas_state(pressure, temperature_k)
    end = to_pressure_fast(start, ATMOSPHERE_PA)
    return nitrogen_mass_kg(charge) * (start.internal_energy_j_kg - end.internal_energy_j_kg)


def tnt_equivalent_kg(energy_j: float) -> float:
    """Give the mass of TNT with the same energy.

    Formula: TNT = E/4 266 920 J/kg.

    Args:
        energy_j: Stored energy [J].

    Returns:
        Mass of TNT [kg].

    Source: ASME PCC-2, Article 501, Mandatory Appendix II.
    """
    return energy_j / TNT_J_KG


def safe_distance_m(energy_j: float, scaled_distance_m_per_cbrt_kg: float = SCALED_DISTANCE_M_PER_CBRT_KG) -> float:
    """Give the distance to keep from a gas-filled space of a stored energy.

    Formula: the greater of R = Rs (2 TNT)^(1/3) and 30 m up to 135.5 MJ, 60 m up to 271 MJ.

    Args:
        energy_j: Stored energy [J], 0 or more.
        scaled_distance_m_per_cbrt_kg: Rs [m/kg^(1/3)], at least 20.

    Returns:
        Distance [m].

    Raises:
        ValueError: Negative energy, or a scaled distance below 20.

    Source: ASME PCC-2, Article 501, Mandatory Appendix III, 2015 and later (2008 has no factor 2).
    """
    check_range("energy_j", energy_j, 0.0, 1e15)
    check_range("scaled_distance_m_per_cbrt_kg", scaled_distance_m_per_cbrt_kg, SCALED_DISTANCE_M_PER_CBRT_KG, 1000.0)
    by_blast: float = scaled_distance_m_per_cbrt_kg * (2.0 * tnt_equivalent_kg(energy_j)) ** (1.0 / 3.0)
    if energy_j <= _SMALL_ENERGY_J:
        return max(_SMALL_DISTANCE_M, by_blast)
    if energy_j <= _MIDDLE_ENERGY_J:
        return max(_MIDDLE_DISTANCE_M, by_blast)
    return by_blast


def trapped_liquid_energy_j(pressure_pag: float, volume_m3: float, bulk_modulus_pa: float) -> float:
    """Give the elastic energy of liquid that is shut in under pressure.

    Formula: E = p^2 V/(2 K).

    Args:
        pressure_pag: Gauge pressure [Pa], small against K.
        volume_m3: Volume of the liquid [m3].
        bulk_modulus_pa: Effective bulk modulus of liquid and walls [Pa], above 0.

    Returns:
        Stored energy [J].

    Raises:
        ValueError: The bulk modulus is not above zero.

    Source: work of linear compression, in any text on elasticity.
    """
    check_range("bulk_modulus_pa", bulk_modulus_pa, 1.0, 1e13)
    return 0.5 * pressure_pag * pressure_pag * volume_m3 / bulk_modulus_pa


def _gas_side(charge: GasCharge, pressure_pag: float, temperature_k: float) -> tuple[float, float]:
    volume = gas_volume_m3(charge, pressure_pag, temperature_k)
    if volume < charge.gas_volume_m3:
        return absolute_pa(pressure_pag), volume
    return absolute_pa(precharge_at_temperature_pag(charge, temperature_k)), volume
