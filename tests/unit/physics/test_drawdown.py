"""The inverse problem at its edges."""

import pytest

from provenzero.physics.accumulator import GasCharge, usable_slow_m3
from provenzero.physics.discharge import bleed_fast, deliver_fast
from provenzero.physics.drawdown import (
    bottles_from_fast,
    bottles_from_slow,
    precharge_by_hand_rule_pag,
    precharge_from_fast_pag,
    precharge_from_slow_pag,
)

MPA = 1e6
WARM = 293.15
BOTTLE = GasCharge(gas_volume_m3=0.04, precharge_pag=7 * MPA, precharge_temperature_k=WARM)


def test_a_reading_straight_after_must_be_explained_as_fast() -> None:
    removed = 12 * bleed_fast(BOTTLE, 20 * MPA, WARM, 8 * MPA).delivered_m3
    assert precharge_from_fast_pag(removed, 0.48, 20 * MPA, 8 * MPA, WARM) == pytest.approx(7 * MPA, rel=1e-9)
    assert bottles_from_fast(BOTTLE, removed, 20 * MPA, 8 * MPA, WARM) == pytest.approx(12.0, rel=1e-9)
    # taken for a warm reading it would cry wolf
    assert precharge_from_slow_pag(removed, 0.48, 20 * MPA, 8 * MPA, WARM) < 4 * MPA
    assert bottles_from_slow(BOTTLE, removed, 20 * MPA, 8 * MPA, WARM) < 6.5


def test_more_gas_than_can_be_there_is_refused_not_guessed() -> None:
    with pytest.raises(ValueError, match="more gas volume than was said"):
        precharge_from_slow_pag(0.40, 0.48, 20 * MPA, 8 * MPA, WARM)


def test_a_drawdown_without_a_fall_says_nothing() -> None:
    for end in (20 * MPA, 21 * MPA):
        with pytest.raises(ValueError, match="end_pag"):
            precharge_from_slow_pag(0.1, 0.48, 20 * MPA, end, WARM)
        with pytest.raises(ValueError, match="end_pag"):
            precharge_by_hand_rule_pag(0.1, 0.48, 20 * MPA, end)
    with pytest.raises(ValueError, match="removed_m3"):
        precharge_from_fast_pag(0.5, 0.48, 20 * MPA, 8 * MPA, WARM)


def test_a_bottle_that_gives_nothing_explains_nothing() -> None:
    for count in (bottles_from_slow, bottles_from_fast):
        with pytest.raises(ValueError, match="no fluid between these pressures"):
            count(BOTTLE, 0.1, 6 * MPA, 5 * MPA, WARM)


def test_a_missing_bottle_shows() -> None:
    removed = 11 * usable_slow_m3(BOTTLE, 20 * MPA, 10 * MPA, WARM)
    assert bottles_from_slow(BOTTLE, removed, 20 * MPA, 10 * MPA, WARM) == pytest.approx(11.0, rel=1e-12)
    assert precharge_from_slow_pag(removed, 0.48, 20 * MPA, 10 * MPA, WARM) < 6.6 * MPA
    assert deliver_fast(BOTTLE, 20 * MPA, WARM, 0.001).fluid_pag < 20 * MPA
