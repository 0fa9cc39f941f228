"""Closing a ram against a well."""

import pytest

from provenzero.physics.preventer import closing_pressure_pa


def test_a_higher_ratio_needs_less_pressure() -> None:
    assert closing_pressure_pa(70e6, 7.0) == pytest.approx(10e6)
    assert closing_pressure_pa(70e6, 9.0) < closing_pressure_pa(70e6, 6.0)


def test_a_ratio_of_zero_is_refused() -> None:
    with pytest.raises(ValueError, match="closing_ratio"):
        closing_pressure_pa(70e6, 0.0)
