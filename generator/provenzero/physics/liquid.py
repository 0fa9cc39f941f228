"""The control fluid: what is known of its kind as bands, how stiff a filled line is, and its static head."""

from collections.abc import Sequence
from dataclasses import dataclass
from typing import Final, TypeAlias

from provenzero.physics.standard import GRAVITY_M_S2, check_range

Band: TypeAlias = tuple[float, float]

# Effective bulk modulus of a hose with oil in it; value from memory. ISO 6801 tests a hose's expansion.
HOSE_BULK_MODULUS_PA: Final[Band] = (0.3e9, 1.0e9)
STEEL_MODULUS_PA: Final = 2.0e11
STEEL_VOLUME_EXPANSION_PER_K: Final = 36e-6  # three times the linear expansion of carbon steel


@dataclass(frozen=True, slots=True, kw_only=True)
class LiquidProperties:
    """What is known of a kind of control fluid, each as (low, high), from 5 to 50 degC and to 350 bar.

    Attributes:
        density_kg_m3: Density [kg/m3].
        bulk_modulus_pa: Isothermal bulk modulus [Pa].
        expansion_per_k: Cubical expansion [1/K].
        viscosity_pa_s: Dynamic viscosity [Pa s].
    """

    density_kg_m3: Band
    bulk_modulus_pa: Band
    expansion_per_k: Band
    viscosity_pa_s: Band


# Value from memory, but: upper bulk modulus 3.0e5 psi and upper expansion 4.6e-4 per degF are published for
# MIL-H-83282 oil; the viscosity covers ISO VG 10 to 46 from warm to near freezing.
_MINERAL_OIL: Final = LiquidProperties(
    density_kg_m3=(830.0, 900.0),
    bulk_modulus_pa=(1.4e9, 2.07e9),
    expansion_per_k=(6.5e-4, 8.3e-4),
    viscosity_pa_s=(5e-3, 0.5),
)
# Value from memory.
_WATER_GLYCOL: Final = LiquidProperties(
    density_kg_m3=(1040.0, 1110.0),
    bulk_modulus_pa=(2.5e9, 3.5e9),
    expansion_per_k=(5e-4, 7e-4),
    viscosity_pa_s=(2e-3, 0.2),
)
# Water by IAPWS-95, widened for a few per cent of additive (value from memory).
_WATER_BASED: Final = LiquidProperties(
    density_kg_m3=(985.0, 1030.0),
    bulk_modulus_pa=(2.0e9, 2.5e9),
    expansion_per_k=(0.1e-4, 4.6e-4),
    viscosity_pa_s=(5e-4, 2.5e-3),
)
_KNOWN: Final = (_MINERAL_OIL, _WATER_GLYCOL, _WATER_BASED)
_UNKNOWN: Final = LiquidProperties(
    density_kg_m3=(min(k.density_kg_m3[0] for k in _KNOWN), max(k.density_kg_m3[1] for k in _KNOWN)),
    bulk_modulus_pa=(min(k.bulk_modulus_pa[0] for k in _KNOWN), max(k.bulk_modulus_pa[1] for k in _KNOWN)),
    expansion_per_k=(min(k.expansion_per_k[0] for k in _KNOWN), max(k.expansion_per_k[1] for k in _KNOWN)),
    viscosity_pa_s=(min(k.viscosity_pa_s[0] for k in _KNOWN), max(k.viscosity_pa_s[1] for k in _KNOWN)),
)
_BY_KIND: Final = {
    "mineral_oil": _MINERAL_OIL,
    "water_glycol": _WATER_GLYCOL,
    "water_based": _WATER_BASED,
    "unknown": _UNKNOWN,
}


def liquid_properties(kind: str) -> LiquidProperties:
    """Give the bands of a kind of control fluid; an unknown kind gets the widest of all.

    Args:
        kind: `mineral_oil`, `water_glycol`, `water_based` or `unknown`.

    Returns:
        The bands.

    Raises:
        ValueError: There is no such kind.

    Source: water by IAPWS R6-95(2018); the others values from memory, with the published ends beside them.
    """
    if kind not in _BY_KIND:
        raise ValueError(f"{kind!r} is no kind of control fluid; known are {', '.join(_BY_KIND)}")
    return _BY_KIND[kind]


def pipe_compliance_per_pa(diameter_over_wall: float, youngs_modulus_pa: float = STEEL_MODULUS_PA) -> float:
    """Give how much a thin pipe grows in volume, for its volume and pressure.

    Formula: D/(t E).

    Args:
        diameter_over_wall: D/t [-], diameter over wall thickness, above 0.
        youngs_modulus_pa: E of the wall [Pa]; steel unless given.

    Returns:
        Compliance [1/Pa].

    Raises:
        ValueError: A value is not above zero.

    Source: thin-wall hoop strain; 1/Be = 1/(t E/D) + 1/Bl + x/Bg in fluid-power texts.
    """
    check_range("diameter_over_wall", diameter_over_wall, 1e-9, 1e4)
    check_range("youngs_modulus_pa", youngs_modulus_pa, 1.0, 1e13)
    return diameter_over_wall / youngs_modulus_pa


def air_compliance_per_pa(air_fraction: float, pressure_pa: float) -> float:
    """Give what free air in a liquid adds to its compliance, when the air keeps its temperature.

    Formula: x/Bg with Bg = p.

    Args:
        air_fraction: x [-], volume of air over volume of liquid at that pressure, 0 to 1.
        pressure_pa: Absolute pressure [Pa], above 0.

    Returns:
        Compliance [1/Pa].

    Raises:
        ValueError: Outside the range.

    Source: Boyle's law; 1/Be = 1/(t E/D) + 1/Bl + x/Bg in fluid-power texts.
    """
    check_range("air_fraction", air_fraction, 0.0, 1.0)
    check_range("pressure_pa", pressure_pa, 1.0, 1e10)
    return air_fraction / pressure_pa


def effective_bulk_modulus_pa(bulk_modulus_pa: float, *compliances_per_pa: float) -> float:
    """Give the stiffness of a liquid with what yields around and in it.

    Formula: 1/Be = 1/Bl + sum of the compliances of pipe, hose, air.

    Args:
        bulk_modulus_pa: Bulk modulus of the liquid alone [Pa], above 0.
        *compliances_per_pa: What yields beside it [1/Pa], each 0 or more.

    Returns:
        Effective bulk modulus [Pa].

    Raises:
        ValueError: Outside the range.

    Source: 1/Be = 1/(t E/D) + 1/Bl + x/Bg in fluid-power texts.
    """
    check_range("bulk_modulus_pa", bulk_modulus_pa, 1.0, 1e13)
    total = 1.0 / bulk_modulus_pa
    for compliance in compliances_per_pa:
        check_range("compliances_per_pa", compliance, 0.0, 1.0)
        total += compliance
    return 1.0 / total


def joined_bulk_modulus_pa(volumes_m3: Sequence[float], bulk_moduli_pa: Sequence[float]) -> float:
    """Give the stiffness of parts in one line, such as a steel pipe and its hose.

    Formula: 1/Be = sum(Vi/Bi)/sum(Vi).

    Args:
        volumes_m3: Volume of each part [m3], each above 0.
        bulk_moduli_pa: Effective bulk modulus of each part [Pa], each above 0.

    Returns:
        Effective bulk modulus of the whole [Pa].

    Raises:
        ValueError: No parts, or a value that is not above zero, or lists of unequal length.

    Source: the same pressure in all parts, volumes added (Reuss's average).
    """
    if not volumes_m3 or len(volumes_m3) != len(bulk_moduli_pa):
        raise ValueError(f"{len(volumes_m3)} volumes and {len(bulk_moduli_pa)} bulk moduli; one each is needed")
    yielding = 0.0
    for volume, modulus in zip(volumes_m3, bulk_moduli_pa, strict=True):
        check_range("volumes_m3", volume, 1e-12, 1e6)
        check_range("bulk_moduli_pa", modulus, 1.0, 1e13)
        yielding += volume / modulus
    return sum(volumes_m3) / yielding


def static_head_pa(height_m: float, density_kg_m3: float) -> float:
    """Give the pressure that standing fluid leaves at the foot of a line.

    Formula: p = rho g h.

    Args:
        height_m: Height of the fluid above the point [m].
        density_kg_m3: Density of the fluid [kg/m3].

    Returns:
        Pressure above that at the top [Pa].

    Source: hydrostatics; standard gravity 9.80665 m/s2, ISO 80000-3.
    """
    return density_kg_m3 * GRAVITY_M_S2 * height_m
