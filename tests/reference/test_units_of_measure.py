"""Every factor of the program's own units against the unit library pint, which carries the published definitions."""

from math import sqrt

import pint
import pytest

from provenzero.quantity import Dimension, parse
from provenzero.quantity.measures import MEASURES

SI = {
    Dimension.PRESSURE: "pascal",
    Dimension.BULK_MODULUS: "pascal",
    Dimension.VOLUME: "meter ** 3",
    Dimension.TEMPERATURE: "kelvin",
    Dimension.LENGTH: "meter",
    Dimension.HEIGHT: "meter",
    Dimension.DURATION: "second",
    Dimension.FLOW: "meter ** 3 / second",
    Dimension.DENSITY: "kilogram / meter ** 3",
    Dimension.ENERGY: "joule",
    Dimension.FRACTION: "dimensionless",
}
# How pint spells what is written otherwise on a rig.
SPELT = {
    "psig": "psi",
    "barg": "bar",
    "kgf/cm2": "kilogram_force / centimeter ** 2",
    "kg/cm2": "kilogram_force / centimeter ** 2",
    "gal": "US_liquid_gallon",
    "L": "liter",
    "l": "liter",
    "mL": "milliliter",
    "ml": "milliliter",
    "cm3": "centimeter ** 3",
    "cc": "centimeter ** 3",
    "m3": "meter ** 3",
    "bbl": "oil_barrel",
    "ft3": "foot ** 3",
    "in3": "inch ** 3",
    "C": "degC",
    "F": "degF",
    "in": "inch",
    '"': "inch",
    "'": "foot",
    "sec": "second",
    "hr": "hour",
    "d": "day",
    "L/min": "liter / minute",
    "l/min": "liter / minute",
    "lpm": "liter / minute",
    "L/s": "liter / second",
    "l/s": "liter / second",
    "mL/min": "milliliter / minute",
    "ml/min": "milliliter / minute",
    "cm3/min": "centimeter ** 3 / minute",
    "gal/min": "US_liquid_gallon / minute",
    "gpm": "US_liquid_gallon / minute",
    "bbl/min": "oil_barrel / minute",
    "m3/h": "meter ** 3 / hour",
    "m3/s": "meter ** 3 / second",
    "kg/m3": "kilogram / meter ** 3",
    "kg/L": "kilogram / liter",
    "kg/l": "kilogram / liter",
    "g/cm3": "gram / centimeter ** 3",
    "lb/gal": "pound / US_liquid_gallon",
    "ppg": "pound / US_liquid_gallon",
    "lb/ft3": "pound / foot ** 3",
    "ft.lbf": "foot * force_pound",
    "ft-lbf": "foot * force_pound",
    "ft lbf": "foot * force_pound",
    "ft·lbf": "foot * force_pound",
    "%": "percent",
}
WRITTEN = 137.5


@pytest.fixture(scope="module")
def library() -> pint.UnitRegistry[float]:
    return pint.UnitRegistry()


def spelt(unit: str) -> str:
    plain = unit.replace("²", "2").replace("³", "3").replace("°", "deg")
    return SPELT.get(plain, plain)


@pytest.mark.parametrize(
    ("dimension", "unit"), [(dimension, unit) for dimension in SI for unit in MEASURES[dimension].scales]
)
def test_every_unit_has_the_published_factor(
    library: pint.UnitRegistry[float], dimension: Dimension, unit: str
) -> None:
    published = library.Quantity(WRITTEN, spelt(unit)).to(SI[dimension]).magnitude
    assert parse(f"{WRITTEN} {unit}", dimension) == pytest.approx(published, rel=1e-12)


def test_the_flow_coefficients_stand_to_each_other_as_their_definitions_do(
    library: pint.UnitRegistry[float],
) -> None:
    """Cv: US gallons a minute at 1 psi; Kv: cubic metres an hour at 1 bar; flow goes with the root of the drop."""
    gallons = library.Quantity(1.0, "meter ** 3 / hour").to("US_liquid_gallon / minute").magnitude
    drop_psi = library.Quantity(1.0, "bar").to("psi").magnitude
    assert parse("1 Kv", Dimension.FLOW_COEFFICIENT) == pytest.approx(gallons / sqrt(drop_psi), rel=1e-10)
