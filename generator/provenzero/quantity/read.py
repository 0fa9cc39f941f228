"""What a person wrote, `3000 psi` or `13-5/8 in`, to an SI float; refuses what can be read in two ways."""

import re
from fractions import Fraction
from typing import Final

from provenzero.quantity.measures import ANY_CASE, MEASURES, Dimension, Measure, Scale, si_value

_LONGEST: Final = 60
_SHOWN: Final = 40
_MIXED: Final = r"(?:(?P<whole>\d+)[- ])?(?P<over>\d+)/(?P<under>\d+)"
_DECIMAL: Final = r"(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d{1,2})?"
_QUANTITY: Final = re.compile(
    rf"(?P<sign>[+-]?)(?:{_MIXED}|(?P<decimal>{_DECIMAL})) ?(?P<unit>[^0-9+. -].*)?",
    re.ASCII,
)
_COMMA_THOUSANDS: Final = re.compile(r"[+-]?\d{1,3}(?:,\d{3})+(?![\d,])", re.ASCII)
_COMMA: Final = re.compile(r"(\d),(\d)", re.ASCII)
_SPACE_THOUSANDS: Final = re.compile(r"[+-]?\d{1,3}(?:[ '’_]\d{3})+(?!\d)", re.ASCII)  # noqa: RUF001 - as typed
_POINT_THOUSANDS: Final = re.compile(r"[+-]?[1-9]\d{0,2}\.\d{3}", re.ASCII)
_ABSOLUTE: Final = re.compile(
    r"psia|psi *\(?a\)?|psi abs\.?|bara|bar *\(?a\)?|bar abs\.?|kPaa|kPa *\(?a\)?|atm", re.IGNORECASE
)
_IMPERIAL: Final = re.compile(r"imp\.? *gal|UK *gal|gal *\(?(?:UK|imp)\.?\)?", re.IGNORECASE)
_UNDERS: Final = frozenset({2, 4, 8, 16, 32, 64})
_INCHES: Final = frozenset({"in", '"'})
_SPACES: Final = str.maketrans({"\u00a0": " ", "\u202f": " ", "\u2009": " ", "\u2212": "-"})


class QuantityError(ValueError):
    """A value that cannot be taken as written: what was found, and what would be right."""

    def __init__(self, found: str, expected: str) -> None:
        super().__init__(f"found {found}; expected {expected}")
        self.found = found
        self.expected = expected


def parse(text: str, dimension: Dimension) -> float:
    """The SI value of a number with its unit; pressures are gauge pressures or differences.

    The result is the float nearest to what was written. A space between number and unit may be missing, and
    inches may be written as a fraction (`13-5/8 in`).

    Raises:
        QuantityError: no number, no unit, a unit of something else, a number that could be read in two ways,
            an absolute pressure, or a value that is impossible for the dimension.
    """
    measure = MEASURES[dimension]
    plain = re.sub(" +", " ", text.translate(_SPACES)).strip(" ")
    found = _quoted(text)
    if len(plain) > _LONGEST:
        raise QuantityError(found, f"one number and its unit, such as {measure.example}")
    _refuse_two_readings(plain, found, measure)
    match = _QUANTITY.fullmatch(plain)
    if match is None:
        raise QuantityError(found, f"one number and its unit, such as {measure.example}")
    scale = _scale(match["unit"] or "", found, dimension)
    number = _number(match, found, dimension)
    si = si_value(number, scale)
    _refuse_impossible(si, found, dimension)
    return float(si)


def _quoted(text: str) -> str:
    return f"'{text}'" if len(text) <= _SHOWN else f"'{text[: _SHOWN - 1]}…'"


def _refuse_two_readings(plain: str, found: str, measure: Measure) -> None:
    """Raise for a number whose comma, space or point some people read as thousands and others as decimals."""
    if match := _COMMA_THOUSANDS.match(plain):
        joined, unit = match[0].replace(",", ""), plain[match.end() :].strip()
        decimal = match[0].replace(",", ".", 1).rstrip("0").rstrip(".")
        other = f", or {decimal} {unit}".rstrip() if match[0].count(",") == 1 else ""
        raise QuantityError(
            f"{found}, where the comma may mean thousands or decimals",
            f"{joined} {unit}".rstrip() + f"{other}: no separator between thousands, and a point before decimals",
        )
    if _COMMA.search(plain):
        raise QuantityError(
            f"{found}, with a comma in the number", _COMMA.sub(r"\1.\2", plain) + ": a point before decimals"
        )
    if match := _SPACE_THOUSANDS.match(plain):
        joined, unit = re.sub(r"[^\d+-]", "", match[0]), plain[match.end() :].strip()
        raise QuantityError(
            f"{found}, with a gap in the number",
            f"{joined} {unit}".rstrip() + ": no separator between thousands",
        )
    match = _POINT_THOUSANDS.match(plain)
    unit = plain[match.end() :].strip() if match else ""
    if match and measure is MEASURES[Dimension.PRESSURE] and unit.casefold() in {"psi", "psig", "bar", "barg"}:
        decimal = match[0].rstrip("0").rstrip(".")
        decimal = f"{decimal}0" if decimal == match[0] else decimal
        raise QuantityError(
            f"{found}, where the point may mean thousands or decimals",
            f"{match[0].replace('.', '')} {unit} or {decimal} {unit}",
        )


def _scale(unit: str, found: str, dimension: Dimension) -> Scale:
    measure = MEASURES[dimension]
    scale = measure.scales.get(unit) or measure.scales.get(ANY_CASE.get(unit.casefold(), unit))
    if scale is not None:
        return scale
    article = _with_article(dimension)
    if not unit:
        raise QuantityError(
            f"{found}, a number without its unit", f"{article} in {measure.shown}, such as {measure.example}"
        )
    if dimension is Dimension.PRESSURE and _ABSOLUTE.fullmatch(unit):
        raise QuantityError(
            f"{found}, an absolute pressure",
            "a gauge pressure, as a gauge shows it: take off the pressure of the air (14.7 psi, 1.01 bar) "
            f"and write {measure.example}",
        )
    if _IMPERIAL.fullmatch(unit):
        raise QuantityError(f"{found}, in imperial gallons", f"{article} in {measure.shown}: a gal is a US gallon here")
    kin = next((name for name in measure.scales if name.casefold() == unit.casefold()), None)
    if kin is not None:
        raise QuantityError(f"{found}, with the unit '{unit}'", f"'{kin}', if that is meant: capitals matter in it")
    other = next((d for d, m in MEASURES.items() if unit in m.scales), None)
    what = f"{found}, {_with_article(other)}" if other else f"{found}, with the unit '{unit[:_SHOWN]}'"
    raise QuantityError(what, f"{article} in {measure.shown}, such as {measure.example}")


def _number(match: re.Match[str], found: str, dimension: Dimension) -> Fraction:
    sign = -1 if match["sign"] == "-" else 1
    if match["decimal"] is not None:
        return sign * Fraction(match["decimal"])
    under = int(match["under"])
    if match["unit"] not in _INCHES or under not in _UNDERS or int(match["over"]) >= under:
        raise QuantityError(
            f"{found}, a fraction",
            f"a decimal number, such as {MEASURES[dimension].example}; only inches take halves to 64ths",
        )
    return sign * (Fraction(match["whole"] or 0) + Fraction(int(match["over"]), under))


def _refuse_impossible(si: Fraction, found: str, dimension: Dimension) -> None:
    measure = MEASURES[dimension]
    if measure.least is None or si > measure.least or (si == measure.least and not measure.more):
        return
    if dimension is Dimension.TEMPERATURE:
        raise QuantityError(f"{found}, at or below absolute zero", f"a temperature such as {measure.example}")
    bound = "above zero" if measure.more else "of zero or more"
    raise QuantityError(found, f"{_with_article(dimension)} {bound}, such as {measure.example}")


def _with_article(dimension: Dimension) -> str:
    return f"an {dimension}" if dimension[0] in "aeiou" else f"a {dimension}"
