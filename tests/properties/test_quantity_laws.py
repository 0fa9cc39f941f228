"""Laws of quantities: what is printed can be read back to within the step of the print, and no text is fatal."""

from collections.abc import Callable
from contextlib import suppress
from fractions import Fraction

import pytest
from hypothesis import given
from hypothesis import strategies as st

from provenzero.quantity import METRIC, US, Dimension, QuantityError, Units, parse
from provenzero.quantity.measures import MEASURES, Scale

SITES = st.sampled_from([US, METRIC])
PRESSURES = st.floats(1.0, 2e8)
WRITTEN: list[tuple[Dimension, Callable[[Units], Callable[[float], str]], float]] = [
    (Dimension.PRESSURE, lambda units: units.pressure, 0.06),
    (Dimension.VOLUME, lambda units: units.volume, 0.06),
    (Dimension.LENGTH, lambda units: units.length, 0.06),
    (Dimension.FLOW, lambda units: units.flow, 0.06),
]
UNITS = [(d, unit, scale) for d, m in MEASURES.items() for unit, scale in m.scales.items()]


@pytest.mark.parametrize(("dimension", "writer", "share"), WRITTEN)
@given(units=SITES, value=st.floats(1.0, 1e3))
def test_what_is_printed_is_read_back_to_within_the_step_of_the_print(
    dimension: Dimension, writer: Callable[[Units], Callable[[float], str]], share: float, units: Units, value: float
) -> None:
    si = value * float(MEASURES[dimension].scales[units_of(units, dimension)].factor)
    assert parse(writer(units)(si), dimension) == pytest.approx(si, rel=share)


def units_of(units: Units, dimension: Dimension) -> str:
    first = {
        Dimension.PRESSURE: units.pressure_units[0],
        Dimension.VOLUME: units.volume_units[0],
        Dimension.LENGTH: units.length_units[0],
        Dimension.FLOW: f"{units.volume_units[0]}/min",
    }
    return str(first[dimension])


@given(units=SITES, kelvin=st.floats(150.0, 450.0))
def test_a_printed_temperature_is_read_back_to_half_a_degree(units: Units, kelvin: float) -> None:
    assert parse(units.temperature(kelvin), Dimension.TEMPERATURE) == pytest.approx(kelvin, abs=0.501)


@given(units=SITES, low=PRESSURES, more=st.floats(0.0, 1e8))
def test_a_printed_band_holds_the_band_that_was_computed(units: Units, low: float, more: float) -> None:
    printed = units.pressure_band(low, low + more)
    number, _, top = printed.rpartition(" to ")
    unit = top.rpartition("\u00a0")[2]
    bottom = parse(f"{number or top.rpartition(chr(0xA0))[0]} {unit}", Dimension.PRESSURE)
    assert bottom <= low * (1.0 + 1e-9)
    assert parse(top, Dimension.PRESSURE) >= (low + more) * (1.0 - 1e-9)


@given(units=SITES, one=PRESSURES, other=PRESSURES)
def test_a_higher_pressure_is_never_printed_as_a_lower_one(units: Units, one: float, other: float) -> None:
    low, high = sorted((one, other))
    assert parse(units.pressure(low), Dimension.PRESSURE) <= parse(units.pressure(high), Dimension.PRESSURE)


@given(st.sampled_from(UNITS), st.integers(1, 10**8).map(lambda n: f"{n / 10**4:.4f}"))
def test_reading_gives_the_float_nearest_to_what_was_written(unit: tuple[Dimension, str, Scale], number: str) -> None:
    dimension, name, scale = unit
    exact = (Fraction(number) + scale.offset) * scale.factor
    assert parse(f"{number} {name}", dimension) == float(exact)


@given(st.text(max_size=80), st.sampled_from(Dimension))
def test_any_text_is_read_or_refused_with_a_cure(text: str, dimension: Dimension) -> None:
    with suppress(QuantityError):
        value = parse(text, dimension)
        least = MEASURES[dimension].least
        assert least is None or value >= least
