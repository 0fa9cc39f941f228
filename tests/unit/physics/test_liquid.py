"""Control fluids as bands, and how stiff a filled line is."""

import pytest
from CoolProp import CoolProp

from provenzero.physics.liquid import (
    air_compliance_per_pa,
    effective_bulk_modulus_pa,
    joined_bulk_modulus_pa,
    liquid_properties,
    pipe_compliance_per_pa,
    static_head_pa,
)

KINDS = ("mineral_oil", "water_glycol", "water_based")


@pytest.mark.parametrize("celsius", [5, 10, 20, 35, 50])
@pytest.mark.parametrize("bar", [1.01325, 100, 208, 350])
def test_water_lies_within_the_band_of_water_based_fluid(celsius: float, bar: float) -> None:
    # IAPWS-95 through CoolProp.
    water = CoolProp.AbstractState("HEOS", "Water")
    water.update(CoolProp.PT_INPUTS, bar * 1e5, 273.15 + celsius)
    band = liquid_properties("water_based")
    for (low, high), value in (
        (band.density_kg_m3, water.rhomass()),
        (band.bulk_modulus_pa, 1.0 / water.isothermal_compressibility()),
        (band.expansion_per_k, water.isobaric_expansion_coefficient()),
        (band.viscosity_pa_s, water.viscosity()),
    ):
        assert low <= value <= high


def test_published_oil_and_glycol_figures_lie_within_their_bands() -> None:
    # MIL-H-83282, published data: 3.0e5 psi and 4.6e-4 per degF. Mineral oil 7e-4 per K, water-glycol 2.5
    # to 3.5 GPa and 5 to 7e-4 per K: values from memory.
    oil = liquid_properties("mineral_oil")
    assert oil.bulk_modulus_pa[0] < 3.0e5 * 6894.757 <= oil.bulk_modulus_pa[1]
    assert oil.expansion_per_k[0] < 7e-4 < 4.6e-4 * 1.8 <= oil.expansion_per_k[1]
    glycol = liquid_properties("water_glycol")
    assert glycol.bulk_modulus_pa == (2.5e9, 3.5e9)
    assert glycol.expansion_per_k == (5e-4, 7e-4)


def test_an_unknown_fluid_gets_the_widest_band_of_all() -> None:
    unknown = liquid_properties("unknown")
    for kind in KINDS:
        known = liquid_properties(kind)
        for name in ("density_kg_m3", "bulk_modulus_pa", "expansion_per_k", "viscosity_pa_s"):
            low, high = getattr(known, name)
            assert getattr(unknown, name)[0] <= low < high <= getattr(unknown, name)[1]


def test_a_fluid_that_does_not_exist_is_refused_with_the_names_that_do() -> None:
    with pytest.raises(ValueError, match="'milk' is no kind of control fluid; known are mineral_oil, "):
        liquid_properties("milk")


def test_everything_that_yields_makes_a_line_softer() -> None:
    assert effective_bulk_modulus_pa(1.5e9) == pytest.approx(1.5e9)
    pipe = pipe_compliance_per_pa(10.0)
    air = air_compliance_per_pa(0.01, 20e6)
    with_pipe = effective_bulk_modulus_pa(1.5e9, pipe)
    assert effective_bulk_modulus_pa(1.5e9, pipe, air) < with_pipe < 1.5e9
    # by hand: 1/(1/1.5e9 + 10/2e11) = 1.395 GPa
    assert with_pipe == pytest.approx(1.395e9, rel=1e-3)


def test_a_line_of_pipe_and_hose_is_between_the_two() -> None:
    # By hand: 3 L at 1.5 GPa and 1 L at 0.5 GPa: 4/(3/1.5 + 1/0.5) = 1.0 GPa.
    assert joined_bulk_modulus_pa([3.0, 1.0], [1.5e9, 0.5e9]) == pytest.approx(1.0e9)
    for volumes, moduli in (([], []), ([1.0], [1e9, 2e9])):
        with pytest.raises(ValueError, match="one each is needed"):
            joined_bulk_modulus_pa(volumes, moduli)
    with pytest.raises(ValueError, match="volumes_m3"):
        joined_bulk_modulus_pa([0.0], [1e9])


def test_impossible_stiffness_is_refused() -> None:
    with pytest.raises(ValueError, match="diameter_over_wall"):
        pipe_compliance_per_pa(0.0)
    with pytest.raises(ValueError, match="air_fraction"):
        air_compliance_per_pa(1.1, 1e5)
    with pytest.raises(ValueError, match="bulk_modulus_pa"):
        effective_bulk_modulus_pa(0.0)
    with pytest.raises(ValueError, match="compliances_per_pa"):
        effective_bulk_modulus_pa(1e9, -1e-10)


def test_ten_metres_of_water_press_with_one_bar() -> None:
    # 10 m of water is 0.98 bar, any text on hydrostatics.
    assert static_head_pa(10.0, 1000.0) == pytest.approx(98_066.5)
