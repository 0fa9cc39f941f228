"""One unknown from one equation: Newton's step where it stays in the bracket, else the middle."""

import math
from collections.abc import Callable
from typing import Final

_STEPS: Final = 200
_RELATIVE: Final = 4e-15
_SETTLED: Final = 1e-7  # the step after one this small is below double precision
_BRACKET: Final = 1e-12


def rising_root(
    value_and_slope: Callable[[float], tuple[float, float]], low: float, high: float, start: float
) -> float:
    """Solve f(x) = 0 for an f that rises from a value <= 0 at `low` to a value >= 0 at `high`.

    Formula: x <- x - f/f', and x <- (low + high)/2 when that would leave the bracket.

    Args:
        value_and_slope: Gives f and f' at x.
        low: Lower end of the bracket [-, in the unit of x].
        high: Upper end of the bracket [-, in the unit of x].
        start: First guess [-, in the unit of x].

    Returns:
        The root [-, in the unit of x], to about double precision; the nearer end if f has no root inside.

    Source: Press et al., Numerical Recipes, 3rd ed. 2007, section 9.4 (safeguarded Newton).
    """
    x = start if low < start < high else 0.5 * (low + high)
    for _ in range(_STEPS):
        value, slope = value_and_slope(x)
        if value == 0.0:
            return x
        if value > 0.0:
            high = x
        else:
            low = x
        newton = x - value / slope if slope > 0.0 else math.inf
        if low <= newton <= high:
            if abs(newton - x) <= _SETTLED * abs(newton):
                return newton
            x = newton
        else:
            x = 0.5 * (low + high)
        if high - low <= _RELATIVE * abs(high):
            return x
    return x


def bracketed_root(value: Callable[[float], float], low: float, high: float) -> float:
    """Solve f(x) = 0 for a continuous f whose sign differs at `low` and `high`; no slope is needed.

    Formula: inverse quadratic interpolation where three points allow it, else the middle.

    Args:
        value: Gives f at x.
        low: One end of the bracket [-, in the unit of x].
        high: The other end of the bracket [-, in the unit of x].

    Returns:
        The root [-, in the unit of x], to about 12 digits.

    Raises:
        ValueError: f has the same sign at both ends.

    Source: Chandrupatla, Advances in Engineering Software 28 (1997) 145-149.
    """
    a, b = high, low
    fa, fb = value(a), value(b)
    if fa == 0.0:
        return a
    if fa * fb > 0.0:
        raise ValueError(f"no root between {low:.6g} and {high:.6g}")
    c, fc, share = a, fa, 0.5
    for _ in range(_STEPS):
        x = a + share * (b - a)
        fx = value(x)
        if fx * fa > 0.0:
            c, fc = a, fa
        else:
            c, fc, b, fb = b, fb, a, fa
        a, fa = x, fx
        best = a if abs(fa) < abs(fb) else b
        least = (_BRACKET * abs(best) + 1e-300) / abs(b - a)
        if least > 0.5 or fa == 0.0 or fb == 0.0:  # noqa: PLR2004 - the bracket is within the tolerance
            return best
        share = _next_share((a, b, c), (fa, fb, fc))
        share = min(1.0 - least, max(least, share))
    return best


def _next_share(x: tuple[float, float, float], f: tuple[float, float, float]) -> float:
    (a, b, c), (fa, fb, fc) = x, f
    if len({fa, fb, fc}) < len(f):
        return 0.5
    xi = (a - b) / (c - b)
    phi = (fa - fb) / (fc - fb)
    if phi * phi < xi and (1.0 - phi) ** 2 < 1.0 - xi:
        alpha = (c - a) / (b - a)
        return fa / (fb - fa) * fc / (fb - fc) + alpha * fa / (fc - fa) * fb / (fc - fb)
    return 0.5
