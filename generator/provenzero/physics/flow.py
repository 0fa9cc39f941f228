"""Flow of liquid through valves, orifices and pipes, from a pressure difference."""

import math
from typing import Final

from provenzero.physics.roots import bracketed_root
from provenzero.physics.standard import check_range

GALLON_M3: Final = 231.0 * 0.0254**3  # US gallon, 231 cubic inches
PSI_PA: Final = 0.45359237 * 9.80665 / 0.0254**2
_CV_FLOW_M3_S: Final = GALLON_M3 / 60.0  # 1 US gpm at 1 psi with water
SHARP_EDGE: Final = 0.61  # [-] discharge coefficient


def valve_flow_m3_s(flow_coefficient: float, pressure_drop_pa: float, specific_gravity: float) -> float:
    """Give the flow through a valve with a Cv.

    Formula: Q = Cv sqrt(dp/SG), Q in US gpm and dp in psi.

    Args:
        flow_coefficient: Cv [-, by custom; US gpm at 1 psi], 0 or more.
        pressure_drop_pa: Pressure difference [Pa], 0 or more.
        specific_gravity: SG [-], density over that of water, above 0.

    Returns:
        Flow [m3/s].

    Raises:
        ValueError: Outside the range.

    Source: ANSI/ISA-75.01.01 (IEC 60534-2-1), turbulent flow of a liquid without flashing, in US units.
    """
    check_range("flow_coefficient", flow_coefficient, 0.0, 1e6)
    check_range("pressure_drop_pa", pressure_drop_pa, 0.0, 1e10)
    check_range("specific_gravity", specific_gravity, 0.01, 20.0)
    return _CV_FLOW_M3_S * flow_coefficient * math.sqrt(pressure_drop_pa / PSI_PA / specific_gravity)


def valves_in_series(*flow_coefficients: float) -> float:
    """Give the Cv of valves one behind the other.

    Formula: 1/Cv^2 = sum(1/Cvi^2).

    Args:
        *flow_coefficients: Cv of each [-, by custom], above 0.

    Returns:
        Cv of the whole [-, by custom].

    Raises:
        ValueError: No valve, or a Cv that is not above zero.

    Source: the same flow through each, pressure differences added.
    """
    if not flow_coefficients:
        raise ValueError("no valve; at least one Cv is needed")
    total = 0.0
    for each in flow_coefficients:
        check_range("flow_coefficients", each, 1e-9, 1e6)
        total += each**-2.0
    return 1.0 / math.sqrt(total)


def orifice_flow_m3_s(
    area_m2: float, pressure_drop_pa: float, density_kg_m3: float, discharge_coefficient: float = SHARP_EDGE
) -> float:
    """Give the turbulent flow through an orifice, such as a cracked seat or a needle valve.

    Formula: Q = Cd A sqrt(2 dp/rho).

    Args:
        area_m2: Open area [m2].
        pressure_drop_pa: Pressure difference [Pa], 0 or more.
        density_kg_m3: Density of the liquid [kg/m3], above 0.
        discharge_coefficient: Cd [-]; 0.61 for a sharp edge.

    Returns:
        Flow [m3/s].

    Raises:
        ValueError: Outside the range.

    Source: Bernoulli's equation; Cd = 0.611 = pi/(pi + 2), Kirchhoff's contraction of a free jet.
    """
    check_range("pressure_drop_pa", pressure_drop_pa, 0.0, 1e10)
    check_range("density_kg_m3", density_kg_m3, 1.0, 2e4)
    return discharge_coefficient * area_m2 * math.sqrt(2.0 * pressure_drop_pa / density_kg_m3)


def reynolds_number(flow_m3_s: float, bore_m: float, density_kg_m3: float, viscosity_pa_s: float) -> float:
    """Give the Reynolds number of the flow in a round bore.

    Formula: Re = 4 rho Q/(pi D mu); laminar below about 2300.

    Args:
        flow_m3_s: Flow [m3/s].
        bore_m: Inner diameter [m], above 0.
        density_kg_m3: Density [kg/m3].
        viscosity_pa_s: Dynamic viscosity [Pa s], above 0.

    Returns:
        Reynolds number [-].

    Raises:
        ValueError: Bore or viscosity not above zero.

    Source: Reynolds (1883), in any text on hydraulics.
    """
    check_range("bore_m", bore_m, 1e-6, 10.0)
    check_range("viscosity_pa_s", viscosity_pa_s, 1e-7, 1e4)
    return 4.0 * density_kg_m3 * flow_m3_s / (math.pi * bore_m * viscosity_pa_s)


def friction_factor(reynolds: float, relative_roughness: float = 0.0) -> float:
    """Give the Darcy friction factor over laminar, critical and turbulent flow.

    Formula: f = 8 ((8/Re)^12 + (A + B)^-1.5)^(1/12), A = (2.457 ln(1/((7/Re)^0.9 + 0.27 e)))^16,
    B = (37530/Re)^16.

    Args:
        reynolds: Reynolds number [-], above 0.
        relative_roughness: e [-], roughness over bore, 0 to 0.05.

    Returns:
        Darcy friction factor [-]; 64/Re where laminar.

    Raises:
        ValueError: Outside the range.

    Source: Churchill, Chemical Engineering 84 (24), 1977, 91-92.
    """
    check_range("reynolds", reynolds, 1e-6, 1e15)
    check_range("relative_roughness", relative_roughness, 0.0, 0.05)
    a = (2.457 * math.log(1.0 / ((7.0 / reynolds) ** 0.9 + 0.27 * relative_roughness))) ** 16
    b = (37530.0 / reynolds) ** 16
    turbulent: float = (a + b) ** -1.5
    laminar: float = (8.0 / reynolds) ** 12
    total: float = 8.0 * (laminar + turbulent) ** (1.0 / 12.0)
    return total


def pipe_pressure_drop_pa(
    flow_m3_s: float, bore_m: float, length_m: float, density_kg_m3: float, viscosity_pa_s: float
) -> float:
    """Give the pressure that a flow loses in a smooth pipe or hose.

    Formula: dp = f (L/D) rho v^2/2.

    Args:
        flow_m3_s: Flow [m3/s], 0 or more.
        bore_m: Inner diameter [m], above 0.
        length_m: Length [m].
        density_kg_m3: Density [kg/m3].
        viscosity_pa_s: Dynamic viscosity [Pa s], above 0.

    Returns:
        Pressure loss [Pa].

    Raises:
        ValueError: Outside the range.

    Source: Darcy and Weisbach; friction factor by Churchill (1977).
    """
    check_range("flow_m3_s", flow_m3_s, 0.0, 1e6)
    reynolds = reynolds_number(flow_m3_s, bore_m, density_kg_m3, viscosity_pa_s)
    if reynolds <= 1e-6:  # noqa: PLR2004 - the friction factor begins there
        return 0.0
    speed = 4.0 * flow_m3_s / (math.pi * bore_m * bore_m)
    return friction_factor(reynolds) * length_m / bore_m * 0.5 * density_kg_m3 * speed * speed


def pipe_flow_m3_s(
    pressure_drop_pa: float, bore_m: float, length_m: float, density_kg_m3: float, viscosity_pa_s: float
) -> float:
    """Give the flow that a pressure difference drives through a smooth pipe or hose.

    Formula: root of `pipe_pressure_drop_pa`; the laminar flow pi D^4 dp/(128 mu L) is the most it can be.

    Args:
        pressure_drop_pa: Pressure difference [Pa], 0 or more.
        bore_m: Inner diameter [m], above 0.
        length_m: Length [m], above 0.
        density_kg_m3: Density [kg/m3].
        viscosity_pa_s: Dynamic viscosity [Pa s], above 0.

    Returns:
        Flow [m3/s].

    Raises:
        ValueError: Outside the range.

    Source: Darcy and Weisbach; friction factor by Churchill (1977); laminar limit by Hagen and Poiseuille.
    """
    check_range("pressure_drop_pa", pressure_drop_pa, 0.0, 1e10)
    check_range("length_m", length_m, 1e-6, 1e6)
    check_range("bore_m", bore_m, 1e-6, 10.0)
    check_range("viscosity_pa_s", viscosity_pa_s, 1e-7, 1e4)
    laminar = math.pi * bore_m**4 * pressure_drop_pa / (128.0 * viscosity_pa_s * length_m)
    if pressure_drop_pa == 0.0:
        return 0.0

    def excess(share: float) -> float:
        drop = pipe_pressure_drop_pa(share * laminar, bore_m, length_m, density_kg_m3, viscosity_pa_s)
        return drop - pressure_drop_pa

    return bracketed_root(excess, 0.0, 1.0 + 1e-6) * laminar  # a rounding above the most it can be
