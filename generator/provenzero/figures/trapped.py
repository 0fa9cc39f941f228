"""Lines full of trapped liquid: what comes out when they are released, and what warming does to them."""

from typing import TypeAlias

from provenzero.physics.liquid import HOSE_BULK_MODULUS_PA, STEEL_VOLUME_EXPANSION_PER_K, liquid_properties
from provenzero.physics.trapped import pressure_rise_pa_k, released_volume_m3
from provenzero.unit.model import FluidKind, Function, LineKind

Band: TypeAlias = tuple[float, float]


def stiffness_pa(fluid: FluidKind, line: LineKind) -> Band:
    """Effective bulk modulus of a filled line [Pa], softest first: a hose is softer than the fluid in it.

    Source: `physics.liquid`, bands from memory where it says so.
    """
    low, high = liquid_properties(fluid.value).bulk_modulus_pa
    if line is LineKind.PIPE:
        return (low, high)
    if line is LineKind.HOSE:
        return HOSE_BULK_MODULUS_PA
    return (HOSE_BULK_MODULUS_PA[0], high)


def released_m3(item: Function, fluid: FluidKind, volume_m3: float, pressure_pag: float) -> Band:
    """Liquid that comes out of a function's line when it drops from a pressure [Pa gauge] to zero [m3].

    Source: definition of the bulk modulus.
    """
    soft, stiff = stiffness_pa(fluid, item.lines.kind)
    return (
        released_volume_m3(volume_m3, pressure_pag, stiff),
        released_volume_m3(volume_m3, pressure_pag, soft),
    )


def rise_pa_k(fluid: FluidKind, line: LineKind) -> Band:
    """Pressure rise of a blocked-in line for each kelvin of warming [Pa/K].

    Source: thermal expansion of trapped liquid, `physics.trapped`.
    """
    expansion = liquid_properties(fluid.value).expansion_per_k
    soft, stiff = stiffness_pa(fluid, line)
    wall = 0.0 if line is not LineKind.PIPE else STEEL_VOLUME_EXPANSION_PER_K
    found = [pressure_rise_pa_k(e, k, wall) for e in expansion for k in (soft, stiff)]
    return (max(min(found), 0.0), max(found))
