"""What people write is taken as they mean it, or refused with the cure; what is printed reads like a gauge."""

import math

import pytest

from provenzero.quantity import (
    METRIC,
    US,
    Dimension,
    LengthUnit,
    PressureUnit,
    QuantityError,
    TemperatureUnit,
    Units,
    VolumeUnit,
    parse,
)
from provenzero.quantity.measures import MEASURES

PSI = 6894.757293168361
GALLON = 3.785411784e-3
BOTH = Units(
    pressure_units=(PressureUnit.PSI, PressureUnit.BAR),
    volume_units=(VolumeUnit.GAL, VolumeUnit.LITRE),
    temperature_units=(TemperatureUnit.DEG_F, TemperatureUnit.DEG_C),
    length_units=(LengthUnit.FT, LengthUnit.M),
)


def plain(text: str) -> str:
    return text.replace("\u00a0", " ")


@pytest.mark.parametrize(
    ("text", "dimension", "value"),
    [
        ("3000 psi", Dimension.PRESSURE, 3000 * PSI),
        ("3000 psig", Dimension.PRESSURE, 3000 * PSI),
        ("3000psi", Dimension.PRESSURE, 3000 * PSI),
        ("3000 PSI", Dimension.PRESSURE, 3000 * PSI),
        ("3000\u00a0psi", Dimension.PRESSURE, 3000 * PSI),
        ("  210  bar ", Dimension.PRESSURE, 21.0e6),
        ("210 barg", Dimension.PRESSURE, 21.0e6),
        ("21 MPa", Dimension.PRESSURE, 21.0e6),
        ("0.5 bar", Dimension.PRESSURE, 50_000.0),
        (".5 bar", Dimension.PRESSURE, 50_000.0),
        ("0 psi", Dimension.PRESSURE, 0.0),
        ("1.6 GPa", Dimension.BULK_MODULUS, 1.6e9),
        ("11 gal", Dimension.VOLUME, 11 * GALLON),
        ("40 L", Dimension.VOLUME, 0.04),
        ("2 bbl", Dimension.VOLUME, 84 * GALLON),
        ("0.3 m³", Dimension.VOLUME, 0.3),
        ("20 degC", Dimension.TEMPERATURE, 293.15),
        ("68 degF", Dimension.TEMPERATURE, 293.15),
        ("68 °F", Dimension.TEMPERATURE, 293.15),
        ("-40 C", Dimension.TEMPERATURE, 233.15),
        ("−40 F", Dimension.TEMPERATURE, 233.15),  # noqa: RUF001 - a minus sign as a word processor writes it
        ("0.5 in", Dimension.LENGTH, 0.0127),
        ("13-5/8 in", Dimension.LENGTH, 0.346075),
        ("13 5/8 in", Dimension.LENGTH, 0.346075),
        ('2-1/16"', Dimension.LENGTH, 0.0523875),
        ("3/4 in", Dimension.LENGTH, 0.01905),
        ("25 mm", Dimension.LENGTH, 0.025),
        ("50 ft", Dimension.LENGTH, 15.24),
        ("-10 ft", Dimension.HEIGHT, -3.048),
        ("12 L/min", Dimension.FLOW, 2e-4),
        ("3 gpm", Dimension.FLOW, 3 * GALLON / 60),
        ("3 gal/min", Dimension.FLOW, 3 * GALLON / 60),
        ("15 min", Dimension.DURATION, 900.0),
        ("12 h", Dimension.DURATION, 43_200.0),
        ("870 kg/m3", Dimension.DENSITY, 870.0),
        ("12 Cv", Dimension.FLOW_COEFFICIENT, 12.0),
        ("12", Dimension.FLOW_COEFFICIENT, 12.0),
        ("500 kJ", Dimension.ENERGY, 5e5),
        ("1.5 %", Dimension.FRACTION, 0.015),
        ("2.5e-4 m3", Dimension.VOLUME, 2.5e-4),
    ],
)
def test_what_the_trade_writes_is_taken(text: str, dimension: Dimension, value: float) -> None:
    assert parse(text, dimension) == pytest.approx(value, rel=1e-15)


@pytest.mark.parametrize("dimension", Dimension)
def test_the_examples_of_every_dimension_can_be_read(dimension: Dimension) -> None:
    for example in MEASURES[dimension].example.replace(" or ", ", ").split(", "):
        assert math.isfinite(parse(example, dimension))


@pytest.mark.parametrize("dimension", Dimension)
def test_every_unit_that_is_offered_is_taken(dimension: Dimension) -> None:
    for unit in MEASURES[dimension].shown.replace("(US)", "").replace(" or ", ", ").split(", "):
        assert parse(f"2 {unit.strip()}", dimension) > 0.0


@pytest.mark.parametrize(
    ("text", "cure"),
    [
        ("1,500 psi", "1500 psi, or 1.5 psi"),
        ("1,250,000 psi", "1250000 psi"),
        ("1 500 psi", "1500 psi"),
        ("1'500 psi", "1500 psi"),
        ("1_500 psi", "1500 psi"),
        ("1\u202f500 psi", "1500 psi"),
        ("1,5 bar", "1.5 bar"),
        ("1.500 psi", "1500 psi or 1.5 psi"),
        ("3.000 psi", "3000 psi or 3 psi"),
        ("1.035 bar", "1035 bar or 1.0350 bar"),
    ],
)
def test_a_number_that_two_readers_take_differently_is_refused_with_both_ways(text: str, cure: str) -> None:
    with pytest.raises(QuantityError) as refusal:
        parse(text, Dimension.PRESSURE)
    assert text in refusal.value.found
    assert cure in refusal.value.expected


def test_three_decimals_are_taken_where_nobody_writes_thousands() -> None:
    assert parse("1.125 in", Dimension.LENGTH) == pytest.approx(0.028575)
    assert parse("0.250 bar", Dimension.PRESSURE) == pytest.approx(25_000.0)


@pytest.mark.parametrize("text", ["3015 psia", "208 bara", "208 bar(a)", "208 bar abs", "1 atm", "300 kPa(a)"])
def test_an_absolute_pressure_is_refused_and_the_gauge_pressure_asked_for(text: str) -> None:
    with pytest.raises(QuantityError) as refusal:
        parse(text, Dimension.PRESSURE)
    assert "an absolute pressure" in refusal.value.found
    assert "take off the pressure of the air (14.7 psi" in refusal.value.expected


@pytest.mark.parametrize(
    ("text", "dimension", "found", "expected"),
    [
        ("3000", Dimension.PRESSURE, "without its unit", "a pressure in psi, bar"),
        ("15 m", Dimension.PRESSURE, "a length", "a pressure in psi, bar"),
        ("20 degC", Dimension.ENERGY, "a temperature", "an energy in J"),
        ("3 mPa", Dimension.PRESSURE, "the unit 'mPa'", "'MPa', if that is meant"),
        ("10 imp gal", Dimension.VOLUME, "imperial gallons", "a gal is a US gallon"),
        ("3000 furlongs", Dimension.LENGTH, "the unit 'furlongs'", "a length in m"),
        ("-1 psi", Dimension.PRESSURE, "-1 psi", "a pressure of zero or more"),
        ("0 Cv", Dimension.FLOW_COEFFICIENT, "0 Cv", "a flow coefficient above zero"),
        ("-300 degC", Dimension.TEMPERATURE, "at or below absolute zero", "20 degC"),
        ("1/3 in", Dimension.LENGTH, "a fraction", "only inches take halves to 64ths"),
        ("4/4 in", Dimension.LENGTH, "a fraction", "a decimal number"),
        ("5/4 in", Dimension.LENGTH, "a fraction", "a decimal number"),
        ("1/2 m", Dimension.LENGTH, "a fraction", "a decimal number"),
        ("1/0 in", Dimension.LENGTH, "a fraction", "a decimal number"),
    ],
)
def test_what_is_refused_says_what_was_found_and_what_is_expected(
    text: str, dimension: Dimension, found: str, expected: str
) -> None:
    with pytest.raises(QuantityError) as refusal:
        parse(text, dimension)
    assert found in refusal.value.found
    assert expected in refusal.value.expected
    assert str(refusal.value) == f"found {refusal.value.found}; expected {refusal.value.expected}"


@pytest.mark.parametrize(
    "text",
    [
        "",
        " ",
        "psi",
        "psi 3000",
        "nan psi",
        "inf psi",
        "1e999 psi",
        "2900-3000 psi",
        "~3000 psi",
        "3000 psi\n",
        "٣ psi",
    ],
)
def test_what_is_not_one_number_with_its_unit_is_refused(text: str) -> None:
    with pytest.raises(QuantityError, match="expected"):
        parse(text, Dimension.PRESSURE)


def test_long_text_is_refused_and_not_repeated_in_full() -> None:
    with pytest.raises(QuantityError) as refusal:
        parse("9" * 10_000 + " psi", Dimension.PRESSURE)
    assert len(str(refusal.value)) < 200


@pytest.mark.parametrize(
    ("psi", "text"),
    [
        (3000, "3000 psi (207 bar)"),
        (1234, "1230 psi (85 bar)"),
        (1235, "1240 psi (85 bar)"),
        (99.4, "99 psi (6.9 bar)"),
        (12.3, "12 psi (0.85 bar)"),
        (3.21, "3.2 psi (0.22 bar)"),
        (0, "0 psi (0 bar)"),
        (-14, "-14 psi (-0.97 bar)"),
    ],
)
def test_pressure_is_rounded_as_a_gauge_is_read(psi: float, text: str) -> None:
    assert plain(BOTH.pressure(psi * PSI)) == text


def test_a_pressure_above_zero_is_never_printed_as_zero() -> None:
    assert plain(BOTH.pressure(1.0)) == "0.1 psi (0.01 bar)"
    assert plain(BOTH.volume(1e-9)) == "0.01 gal (0.01 L)"


def test_a_band_is_rounded_outward() -> None:
    assert plain(BOTH.pressure_band(2893 * PSI, 3001 * PSI)) == "2890 to 3010 psi (199 to 207 bar)"
    assert plain(US.pressure_band(0.0, 0.02 * PSI)) == "0 to 0.1 psi"
    assert plain(US.pressure_band(3000 * PSI, 3000 * PSI)) == "3000 psi"


def test_number_and_unit_do_not_part_at_the_end_of_a_line() -> None:
    printed = [
        BOTH.pressure(1e7),
        BOTH.volume(0.04),
        BOTH.temperature(293.15),
        BOTH.length(15.0),
        BOTH.energy(5e5),
        BOTH.flow(2e-4),
    ]
    assert [text.count(" ") for text in printed] == [1, 1, 1, 1, 0, 1]  # only that before the bracket


def test_each_site_prints_its_own_units() -> None:
    assert plain(US.volume(11 * GALLON)) == "11.0 gal"
    assert plain(METRIC.volume(0.04)) == "40.0 L"
    assert plain(METRIC.volume(0.16)) == "160 L"
    assert plain(METRIC.flow(2e-4)) == "12.0 L/min"
    assert plain(BOTH.temperature(293.15)) == "68 °F (20 °C)"
    assert plain(METRIC.temperature(273.0)) == "0 °C"
    assert plain(BOTH.length(15.24)) == "50 ft (15 m)"
    assert plain(METRIC.pressure(21e6)) == "210 bar"
    assert plain(METRIC.pressure(1e6)) == "10 bar"
    assert plain(METRIC.volume(0.1)) == "100 L"


def test_a_bore_is_printed_as_the_trade_says_it() -> None:
    assert plain(BOTH.bore(0.346075)) == "13-5/8 in (346 mm)"
    assert plain(US.bore(0.0254)) == "1 in"
    assert plain(US.bore(0.0127)) == "1/2 in"
    assert plain(US.bore(0.05)) == "1.97 in"


def test_energy_is_printed_in_kilojoule_and_from_ten_thousand_in_megajoule() -> None:
    assert plain(US.energy(518e3)) == "518 kJ"
    assert plain(US.energy(25.4e6)) == "25 MJ"
    assert plain(US.energy(9.99e6)) == "9990 kJ"
    assert plain(US.energy(10e6)) == "10 MJ"
    assert plain(US.energy(500.0)) == "0.50 kJ"


@pytest.mark.parametrize(
    ("seconds", "text"),
    [
        (0.0, "0 s"),
        (0.2, "1 s"),
        (30.0, "30 s"),
        (89.4, "89 s"),
        (90.0, "1 min 30 s"),
        (125.0, "2 min 5 s"),
        (120.0, "2 min"),
        (599.0, "9 min 59 s"),
        (600.0, "10 min"),
        (610.0, "10 min"),
        (899.0, "15 min"),
        (5400.0, "1 h 30 min"),
        (172_800.0, "2 d"),
        (176_400.0, "2 d 1 h"),
        (7290.0, "2 h 2 min"),
        (7200.0, "2 h"),
        (263_000.0, "3 d 1 h"),
    ],
)
def test_a_time_is_printed_in_the_two_units_that_matter(seconds: float, text: str) -> None:
    assert plain(US.duration(seconds)) == text


@pytest.mark.parametrize("value", [math.nan, math.inf, -math.inf])
def test_what_is_not_finite_is_never_printed(value: float) -> None:
    for write in (US.pressure, US.volume, US.temperature, US.length, US.energy, US.flow, US.duration, US.bore):
        with pytest.raises(ValueError, match=r"nan|inf"):
            write(value)
