"""The two solvers, on functions whose roots are known."""

import math

import pytest

from provenzero.physics.roots import bracketed_root, rising_root


def test_a_rising_function_is_solved_from_any_start() -> None:
    for start in (0.0, 0.1, 1.0, 1.9, 2.0, -5.0):
        assert rising_root(lambda x: (x * x - 2.0, 2.0 * x), 0.0, 2.0, start) == pytest.approx(math.sqrt(2))


def test_a_flat_spot_does_not_throw_the_solver_out_of_its_bracket() -> None:
    assert rising_root(lambda x: ((x - 1.0) ** 3, 3.0 * (x - 1.0) ** 2), -10.0, 11.0, 10.0) == pytest.approx(
        1.0, abs=1e-6
    )
    assert rising_root(lambda x: (math.atan(x - 3.0), 1.0 / (1.0 + (x - 3.0) ** 2)), -1e3, 1e3, 900.0) == (
        pytest.approx(3.0)
    )


def test_a_rising_function_without_a_root_ends_at_the_nearer_end() -> None:
    assert rising_root(lambda x: (x + 10.0, 1.0), 1.0, 2.0, 1.5) == pytest.approx(1.0)
    assert rising_root(lambda x: (x - 10.0, 1.0), 1.0, 2.0, 1.5) == pytest.approx(2.0)


@pytest.mark.parametrize("power", [1, 3, 9, 19])
def test_a_bracketed_root_is_found_without_a_slope(power: int) -> None:
    assert bracketed_root(lambda x: x**power - 0.5, 0.0, 5.0) == pytest.approx(0.5 ** (1 / power), rel=1e-10)


def test_a_falling_function_and_a_root_at_an_end_are_solved_too() -> None:
    assert bracketed_root(math.cos, 0.0, 3.0) == pytest.approx(math.pi / 2)
    assert bracketed_root(lambda x: x - 5.0, 0.0, 5.0) == 5.0
    assert bracketed_root(lambda x: x, 0.0, 5.0) == pytest.approx(0.0, abs=1e-12)
    assert bracketed_root(lambda x: math.exp(-x) - 1e-6, 0.0, 100.0) == pytest.approx(6 * math.log(10))


def test_a_bracket_without_a_change_of_sign_is_refused() -> None:
    with pytest.raises(ValueError, match="no root between 1 and 2"):
        bracketed_root(lambda x: x, 1.0, 2.0)
