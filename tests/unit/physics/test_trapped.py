"""Liquid shut in a line."""

import pytest

from provenzero.physics.trapped import hold_time_s, leak_rate_m3_s, pressure_rise_pa_k, released_volume_m3


def test_a_hold_that_is_long_enough_for_a_leak_finds_just_that_leak() -> None:
    # By hand: 8 L, 1 GPa, 0.1 mL/min, 5 bar: 8e-3 * 5e5 / (1e9 * 1.667e-9) = 2400 s.
    leak = 0.1e-6 / 60
    watched = hold_time_s(8e-3, 1e9, 5e5, leak)
    assert watched == pytest.approx(2400, rel=1e-3)
    assert leak_rate_m3_s(8e-3, 1e9, 5e5, watched) == pytest.approx(leak, rel=1e-12)


def test_walls_that_grow_with_the_liquid_leave_no_rise() -> None:
    assert pressure_rise_pa_k(36e-6, 1e9, 36e-6) == 0.0
    assert pressure_rise_pa_k(7e-4, 1e9) == pytest.approx(7e5)


def test_released_volume_is_the_compressed_part() -> None:
    assert released_volume_m3(8e-3, 20e6, 1e9) == pytest.approx(0.16e-3)


def test_impossible_lines_are_refused() -> None:
    with pytest.raises(ValueError, match="bulk_modulus_pa"):
        pressure_rise_pa_k(7e-4, 0.0)
    with pytest.raises(ValueError, match="bulk_modulus_pa"):
        released_volume_m3(1.0, 1.0, 0.0)
    with pytest.raises(ValueError, match="hold_time_s"):
        leak_rate_m3_s(1.0, 1e9, 1.0, 0.0)
    with pytest.raises(ValueError, match="leak_m3_s"):
        hold_time_s(1.0, 1e9, 1.0, 0.0)
