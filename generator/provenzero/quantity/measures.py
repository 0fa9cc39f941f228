"""The units of measure people write, each with its exact factor to SI.

Inch, pound and gallon are exact by definition (international yard and pound, 1959; US gallon of 231 cubic
inches), so every factor is a rational number and a reading is the float nearest to what was written.
"""

from dataclasses import dataclass
from enum import StrEnum
from fractions import Fraction
from typing import Final


class Dimension(StrEnum):
    """What a value measures, and so which units it may carry. The SI unit of each is in brackets."""

    PRESSURE = "pressure"  # gauge, or a difference of pressures [Pa]
    BULK_MODULUS = "bulk modulus"  # [Pa]
    VOLUME = "volume"  # [m3]
    TEMPERATURE = "temperature"  # absolute [K]
    LENGTH = "length"  # also a bore [m]
    HEIGHT = "height"  # signed: a negative one is below [m]
    DURATION = "duration"  # [s]
    FLOW = "flow"  # [m3/s]
    DENSITY = "density"  # [kg/m3]
    FLOW_COEFFICIENT = "flow coefficient"  # Cv, US gallons a minute of water at 1 psi [-]
    ENERGY = "energy"  # [J]
    FRACTION = "fraction"  # [-]


@dataclass(frozen=True, slots=True, kw_only=True)
class Scale:
    """SI value = (written value + offset) x factor."""

    factor: Fraction
    offset: Fraction = Fraction(0)


@dataclass(frozen=True, slots=True, kw_only=True)
class Measure:
    """What a dimension may be written in. `least` is the lowest SI value; `more` if it must be exceeded."""

    scales: dict[str, Scale]
    shown: str
    example: str
    least: Fraction | None = Fraction(0)
    more: bool = False


INCH: Final = Fraction("0.0254")
FOOT: Final = 12 * INCH
LITRE: Final = Fraction(1, 1000)
GALLON: Final = 231 * INCH**3
BARREL: Final = 42 * GALLON
POUND: Final = Fraction("0.45359237")
GRAVITY: Final = Fraction("9.80665")
PSI: Final = POUND * GRAVITY / INCH**2
BAR: Final = Fraction(100_000)
ICE_POINT_K: Final = Fraction("273.15")
ZERO_F_OFFSET: Final = Fraction("459.67")
MINUTE: Final = Fraction(60)
HOUR: Final = Fraction(3600)
# Kv is the flow of water in m3/h at 1 bar, Cv the same in US gallons a minute at 1 psi: Cv = 1.1561 Kv.
CV_PER_KV: Final = Fraction("1.15609922835")


def _scales(*units: tuple[str, Fraction | int]) -> dict[str, Scale]:
    """A table of scales; the names of one unit stand in one word with bars between."""
    return {name: Scale(factor=Fraction(factor)) for names, factor in units for name in names.split("|")}


_PRESSURES: Final = _scales(
    ("psi|psig", PSI),
    ("bar|barg", BAR),
    ("Pa", 1),
    ("kPa", 1000),
    ("MPa", 10**6),
    ("kgf/cm2|kg/cm2|kgf/cm²|kg/cm²", GRAVITY * 10**4),
)
_LENGTHS: Final = _scales(("m", 1), ("cm", Fraction(1, 100)), ("mm", Fraction(1, 1000)), ('in|"', INCH), ("ft|'", FOOT))

MEASURES: Final[dict[Dimension, Measure]] = {
    Dimension.PRESSURE: Measure(
        scales=_PRESSURES, shown="psi, bar, kPa, MPa or kgf/cm2", example="3000 psi or 210 bar"
    ),
    Dimension.BULK_MODULUS: Measure(
        scales=_PRESSURES | _scales(("GPa", 10**9)),
        shown="psi, bar, MPa or GPa",
        example="1.6 GPa or 230000 psi",
        more=True,
    ),
    Dimension.VOLUME: Measure(
        scales=_scales(
            ("gal", GALLON),
            ("L|l", LITRE),
            ("mL|ml|cm3|cm³|cc", LITRE / 1000),
            ("m3|m³", 1),
            ("bbl", BARREL),
            ("ft3|ft³", FOOT**3),
            ("in3|in³", INCH**3),
        ),
        shown="gal (US), L, mL, m3, bbl, ft3 or in3",
        example="11 gal or 40 L",
    ),
    Dimension.TEMPERATURE: Measure(
        scales={
            **dict.fromkeys(("degC", "°C", "C"), Scale(factor=Fraction(1), offset=ICE_POINT_K)),
            **dict.fromkeys(("degF", "°F", "F"), Scale(factor=Fraction(5, 9), offset=ZERO_F_OFFSET)),
            "K": Scale(factor=Fraction(1)),
        },
        shown="degC, degF or K",
        example="20 degC or 68 degF",
        more=True,
    ),
    Dimension.LENGTH: Measure(scales=_LENGTHS, shown="m, cm, mm, in or ft", example="15 m, 50 ft or 13-5/8 in"),
    Dimension.HEIGHT: Measure(scales=_LENGTHS, shown="m, cm, mm, in or ft", example="3 m or -10 ft", least=None),
    Dimension.DURATION: Measure(
        scales=_scales(("s|sec", 1), ("min", MINUTE), ("h|hr", HOUR), ("d", 24 * HOUR)),
        shown="s, min, h or d",
        example="30 s, 15 min or 12 h",
    ),
    Dimension.FLOW: Measure(
        scales=_scales(
            ("L/min|l/min|lpm", LITRE / MINUTE),
            ("L/s|l/s", LITRE),
            ("mL/min|ml/min|cm3/min", LITRE / 1000 / MINUTE),
            ("gal/min|gpm", GALLON / MINUTE),
            ("bbl/min", BARREL / MINUTE),
            ("m3/h|m³/h", 1 / HOUR),
            ("m3/s|m³/s", 1),
        ),
        shown="L/min, gal/min, mL/min, bbl/min or m3/h",
        example="12 L/min or 3 gal/min",
    ),
    Dimension.DENSITY: Measure(
        scales=_scales(
            ("kg/m3|kg/m³", 1),
            ("kg/L|kg/l|g/cm3|g/cm³", 1000),
            ("lb/gal|ppg", POUND / GALLON),
            ("lb/ft3|lb/ft³", POUND / FOOT**3),
        ),
        shown="kg/m3, kg/L, lb/gal or lb/ft3",
        example="870 kg/m3 or 7.3 lb/gal",
        more=True,
    ),
    Dimension.FLOW_COEFFICIENT: Measure(
        scales=_scales(("Cv|", 1), ("Kv", CV_PER_KV)), shown="Cv or Kv", example="12 Cv", more=True
    ),
    Dimension.ENERGY: Measure(
        scales=_scales(("J", 1), ("kJ", 1000), ("MJ", 10**6), ("ft.lbf|ft-lbf|ft lbf|ft·lbf", FOOT * POUND * GRAVITY)),
        shown="J, kJ, MJ or ft.lbf",
        example="500 kJ",
    ),
    Dimension.FRACTION: Measure(scales=_scales(("%", Fraction(1, 100))), shown="%", example="1 %"),
}

# Units read in any mixture of capitals, because no other unit differs from them by its capitals only.
ANY_CASE: Final = {
    name.casefold(): name
    for name in (
        "psi",
        "psig",
        "bar",
        "barg",
        "gal",
        "gpm",
        "lpm",
        "bbl",
        "degC",
        "degF",
        "in",
        "ft",
        "min",
        "ppg",
    )
}


def si_value(written: Fraction, scale: Scale) -> Fraction:
    """The exact SI value of a written number on a scale."""
    return (written + scale.offset) * scale.factor


def written_value(si: float, scale: Scale) -> float:
    """The number to write for an SI value on a scale."""
    return si / float(scale.factor) - float(scale.offset)
