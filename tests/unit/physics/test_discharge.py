"""A bottle that gives out fluid, at its edges, and how it warms again."""

import math

import pytest

from provenzero.physics.accumulator import GasCharge, fluid_volume_m3, precharge_at_temperature_pag
from provenzero.physics.discharge import (
    bleed_fast,
    deliver_fast,
    deliver_slow,
    gas_temperature_after_k,
    heat_exchanged,
    rebound_pag,
    rewarmed_pag,
)

MPA = 1e6
WARM = 293.15
BOTTLE = GasCharge(gas_volume_m3=0.04, precharge_pag=7 * MPA, precharge_temperature_k=WARM)
INSIDE = fluid_volume_m3(BOTTLE, 20 * MPA, WARM)


def test_giving_nothing_changes_nothing() -> None:
    for deliver in (deliver_slow, deliver_fast):
        after = deliver(BOTTLE, 20 * MPA, WARM, 0.0)
        assert after.delivered_m3 == 0.0
        assert after.fluid_pag == pytest.approx(20 * MPA, rel=1e-12)
        assert after.gas_temperature_k == WARM
    assert bleed_fast(BOTTLE, 20 * MPA, WARM, 20 * MPA).delivered_m3 == 0.0


@pytest.mark.parametrize("asked", [INSIDE, 2 * INSIDE])
def test_asking_for_all_or_more_empties_the_bottle_and_the_fluid_gauge_falls_to_zero(asked: float) -> None:
    slow = deliver_slow(BOTTLE, 20 * MPA, WARM, asked)
    assert slow.emptied
    assert slow.delivered_m3 == pytest.approx(INSIDE, rel=1e-12)
    assert slow.fluid_pag == 0.0
    assert slow.gas_pag == pytest.approx(7 * MPA, rel=1e-9)
    fast = deliver_fast(BOTTLE, 20 * MPA, WARM, asked)
    assert fast.emptied
    assert fast.fluid_pag == 0.0
    assert fast.gas_pag < 4 * MPA
    assert rewarmed_pag(BOTTLE, fast, WARM) == pytest.approx(7 * MPA, rel=1e-12)
    assert rewarmed_pag(BOTTLE, fast, 273.15) == precharge_at_temperature_pag(BOTTLE, 273.15)


def test_just_before_the_last_drop_the_fluid_gauge_still_shows_the_precharge() -> None:
    after = deliver_slow(BOTTLE, 20 * MPA, WARM, INSIDE * (1 - 1e-6))
    assert not after.emptied
    assert after.fluid_pag == pytest.approx(7 * MPA, rel=1e-5)


def test_a_bottle_without_fluid_gives_nothing_however_it_is_asked() -> None:
    for after in (
        deliver_slow(BOTTLE, 5 * MPA, WARM, 0.01),
        deliver_fast(BOTTLE, 5 * MPA, WARM, 0.01),
        bleed_fast(BOTTLE, 5 * MPA, WARM, 0.0),
    ):
        assert after.emptied
        assert after.delivered_m3 == 0.0
        assert after.gas_pag == pytest.approx(7 * MPA, rel=1e-12)


def test_a_fast_bleed_can_leave_fluid_below_the_warm_precharge() -> None:
    after = bleed_fast(BOTTLE, 20 * MPA, WARM, 6 * MPA)
    assert not after.emptied
    assert after.fluid_pag == 6 * MPA
    assert after.delivered_m3 < INSIDE
    assert rebound_pag(BOTTLE, 20 * MPA, WARM, 6 * MPA) > 7 * MPA
    assert bleed_fast(BOTTLE, 20 * MPA, WARM, 0.0).emptied
    assert rebound_pag(BOTTLE, 20 * MPA, WARM, 0.0) == 0.0


def test_a_negative_volume_or_a_rising_bleed_is_refused() -> None:
    with pytest.raises(ValueError, match="delivered_m3"):
        deliver_slow(BOTTLE, 20 * MPA, WARM, -0.001)
    with pytest.raises(ValueError, match="end_pag"):
        bleed_fast(BOTTLE, 10 * MPA, WARM, 20 * MPA)
    with pytest.raises(ValueError, match="end_pag"):
        bleed_fast(BOTTLE, 10 * MPA, WARM, -1.0)


def test_after_one_time_constant_63_per_cent_of_the_heat_has_come() -> None:
    # 1 - 1/e = 0.632, definition of a time constant.
    assert heat_exchanged(60.0, 60.0) == pytest.approx(0.632, abs=5e-4)
    assert heat_exchanged(0.0, 60.0) == 0.0
    assert heat_exchanged(math.inf, 60.0) == 1.0
    assert gas_temperature_after_k(225.0, 293.0, 60.0, 60.0) == pytest.approx(225 + 68 * 0.632, abs=0.05)
    for time, tau in ((-1.0, 60.0), (60.0, 0.0)):
        with pytest.raises(ValueError, match="time"):
            heat_exchanged(time, tau)
