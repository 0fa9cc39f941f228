"""The reference equation of state of nitrogen: reduced Helmholtz energy and its derivatives.

The published equation is evaluated directly, in plain Python, instead of interpolating a table or loading a
property library: it is exact (the tests hold it against the library to 1e-9), it needs no data file and no
generator, it covers every state a bottle can reach, and it costs microseconds where the library costs
seconds at start-up.

Source of all coefficients: Span, Lemmon, Jacobsen, Wagner, Yokozeki, "A Reference Equation of State for the
Thermodynamic Properties of Nitrogen", J. Phys. Chem. Ref. Data 29 (2000) 1361-1433. Stated uncertainty in
density 0.02 % up to 30 MPa from 240 to 523 K and 0.6 % at the worst elsewhere; valid from 63.151 to 1000 K
and to 2200 MPa, with sound extrapolation in temperature (values of this sentence from memory).
"""

import math
from dataclasses import dataclass
from functools import lru_cache
from typing import Final

CRITICAL_TEMPERATURE_K: Final = 126.192
CRITICAL_PRESSURE_PA: Final = 3.3958e6
CRITICAL_DENSITY_KG_M3: Final = 313.3  # 11.1839 mol/dm3
TRIPLE_TEMPERATURE_K: Final = 63.151
GAS_CONSTANT_J_KG_K: Final = 8.31451 / 0.02801348

# (N, power of delta, power of tau), by the power l of delta inside exp(-delta^l); l = 0 has no exponential.
_RESIDUAL: Final = (
    (
        0,
        (
            (0.924803575275, 1, 0.25),
            (-0.492448489428, 1, 0.875),
            (0.661883336938, 2, 0.5),
            (-1.92902649201, 2, 0.875),
            (-0.0622469309629, 3, 0.375),
            (0.349943957581, 3, 0.75),
        ),
    ),
    (
        1,
        (
            (0.564857472498, 1, 0.5),
            (-1.61720005987, 1, 0.75),
            (-0.481395031883, 1, 2.0),
            (0.421150636384, 3, 1.25),
            (-0.0161962230825, 3, 3.5),
            (0.172100994165, 4, 1.0),
            (0.00735448924933, 6, 0.5),
            (0.0168077305479, 6, 3.0),
            (-0.00107626664179, 7, 0.0),
            (-0.0137318088513, 7, 2.75),
            (0.000635466899859, 8, 0.75),
            (0.00304432279419, 8, 2.5),
        ),
    ),
    (
        2,
        (
            (-0.0435762336045, 1, 4.0),
            (-0.0723174889316, 2, 6.0),
            (0.0389644315272, 3, 6.0),
            (-0.021220136391, 4, 3.0),
            (0.00408822981509, 5, 3.0),
            (-5.51990017984e-05, 8, 6.0),
        ),
    ),
    (
        3,
        (
            (-0.0462016716479, 4, 16.0),
            (-0.00300311716011, 5, 11.0),
            (0.0368825891208, 5, 15.0),
            (-0.0025585684622, 8, 12.0),
        ),
    ),
    (
        4,
        (
            (0.00896915264558, 3, 12.0),
            (-0.0044151337035, 5, 7.0),
            (0.00133722924858, 6, 4.0),
            (0.000264832491957, 9, 16.0),
        ),
    ),
)

# (N, power of delta, power of tau, phi, beta, gamma): the four terms of the critical region.
_CRITICAL: Final = (
    (19.6688194015, 1, 0, 20.0, 325.0, 1.16),
    (-20.911560073, 1, 1, 20.0, 325.0, 1.16),
    (0.0167788306989, 3, 2, 15.0, 300.0, 1.13),
    (2627.67566274, 2, 3, 25.0, 275.0, 1.25),
)
_NOTHING: Final = 1e-20  # a critical-region term weaker than this is below double precision

# Ideal gas: ln(delta) + a1 ln(tau) + a2 + a3 tau + a4/tau + a5/tau^2 + a6/tau^3 + a7 ln(1 - exp(-a8 tau)).
_A1, _A2, _A3, _A4, _A5, _A6, _A7, _A8 = (
    2.5,
    -12.76952708,
    -0.00784163,
    -1.934819e-4,
    -1.247742e-5,
    6.678326e-8,
    1.012941,
    3364.011 / CRITICAL_TEMPERATURE_K,  # 26.65788
)


@dataclass(frozen=True, slots=True, kw_only=True)
class Isotherm:
    """The equation at one temperature: what is left is a function of density alone."""

    tau: float  # [-] critical over actual temperature
    # by l: (power of delta, N tau^t, t N tau^t, t (t - 1) N tau^t)
    groups: tuple[tuple[int, tuple[tuple[int, float, float, float], ...]], ...]
    # (d, N tau^t exp(-beta (tau - gamma)^2), phi, tau d/dtau and tau^2 d2/dtau2 over the value)
    critical: tuple[tuple[int, float, float, float, float], ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class Helmholtz:
    """Residual reduced Helmholtz energy and its scaled derivatives, all dimensionless [-]."""

    value: float  # [-] a
    delta: float  # [-] delta da/ddelta
    delta2: float  # [-] delta^2 d2a/ddelta2
    tau: float  # [-] tau da/dtau
    tau2: float  # [-] tau^2 d2a/dtau2
    delta_tau: float  # [-] delta tau d2a/(ddelta dtau)


def _by_power_of_delta() -> tuple[tuple[int, tuple[tuple[int, tuple[tuple[float, float], ...]], ...]], ...]:
    return tuple(
        (
            exponent,
            tuple(
                (power, tuple((factor, t) for factor, d, t in terms if d == power))
                for power in sorted({d for _, d, _ in terms})
            ),
        )
        for exponent, terms in _RESIDUAL
    )


_GROUPED: Final = _by_power_of_delta()


@lru_cache(maxsize=256)
def _isotherm(temperature_k: float) -> Isotherm:
    tau = CRITICAL_TEMPERATURE_K / temperature_k
    groups = []
    for exponent, powers in _GROUPED:
        group = []
        for d, terms in powers:
            a = b = c = 0.0
            for factor, t in terms:
                value = factor * tau**t
                a += value
                value *= t
                b += value
                c += value * (t - 1.0)
            group.append((d, a, b, c))
        groups.append((exponent, tuple(group)))
    critical = []
    for factor, d, t, phi, beta, gamma in _CRITICAL:
        off = tau - gamma
        value = factor * tau**t * math.exp(-beta * off * off)
        if abs(value) > _NOTHING:
            first = t - 2.0 * beta * tau * off
            critical.append((d, value, phi, first, first * first - t - 2.0 * beta * tau * tau))
    return Isotherm(tau=tau, groups=tuple(groups), critical=tuple(critical))


def isotherm(temperature_k: float) -> Isotherm:
    """Prepare the equation for one temperature.

    Args:
        temperature_k: Temperature [K], above 0.

    Returns:
        The coefficients that are left when tau = Tc/T is put in.

    Source: Span et al. (2000), residual part, terms 1 to 36.
    """
    return _isotherm(temperature_k)


def pressure_terms(at: Isotherm, delta: float) -> tuple[float, float]:
    """Give the two density derivatives that a pressure and its slope need.

    Formula: p = rho R T (1 + A) and dp/drho = R T (1 + 2 A + B), A = delta a_delta, B = delta^2 a_deltadelta.

    Args:
        at: The equation at the temperature.
        delta: Density over critical density [-].

    Returns:
        A and B [-].

    Source: Span et al. (2000), residual part and relations of thermodynamic properties to it.
    """
    powers = _powers(delta)
    first = second = 0.0
    for exponent, terms in at.groups:
        s = s1 = s2 = 0.0
        for d, a, _, _ in terms:
            v = a * powers[d]
            s += v
            v *= d
            s1 += v
            s2 += v * (d - 1)
        if exponent:
            g = exponent * powers[exponent]
            damping = math.exp(-powers[exponent])
            first += damping * (s1 - g * s)
            second += damping * (s2 - 2.0 * g * s1 + s * g * (g - exponent + 1))
        else:
            first, second = s1, s2  # the group without exponential comes first
    for d, a, phi, _, _ in at.critical:
        off = delta - 1.0
        v = a * powers[d] * math.exp(-phi * off * off)
        w = d - 2.0 * phi * delta * off
        first += v * w
        second += v * (w * w - d - 2.0 * phi * delta * delta)
    return first, second


def residual(at: Isotherm, delta: float) -> Helmholtz:
    """Give the residual Helmholtz energy with all first and second derivatives.

    Args:
        at: The equation at the temperature.
        delta: Density over critical density [-].

    Returns:
        Value and scaled derivatives.

    Source: Span et al. (2000), residual part, terms 1 to 36 and their derivatives.
    """
    powers = _powers(delta)
    value = first = second = tau = tau2 = delta_tau = 0.0
    for exponent, terms in at.groups:
        s = s1 = s2 = b0 = b1 = c0 = 0.0
        for d, a, b, c in terms:
            power = powers[d]
            v = a * power
            s += v
            v *= d
            s1 += v
            s2 += v * (d - 1)
            v = b * power
            b0 += v
            b1 += v * d
            c0 += c * power
        if exponent:
            x = powers[exponent]
            g = exponent * x
            damping = math.exp(-x)
            value += damping * s
            first += damping * (s1 - g * s)
            second += damping * (s2 - 2.0 * g * s1 + s * g * (g - exponent + 1))
            tau += damping * b0
            tau2 += damping * c0
            delta_tau += damping * (b1 - g * b0)
        else:
            value, first, second = s, s1, s2
            tau, tau2, delta_tau = b0, c0, b1
    for d, a, phi, t1, t2 in at.critical:
        off = delta - 1.0
        v = a * powers[d] * math.exp(-phi * off * off)
        w = d - 2.0 * phi * delta * off
        value += v
        first += v * w
        second += v * (w * w - d - 2.0 * phi * delta * delta)
        tau += v * t1
        tau2 += v * t2
        delta_tau += v * t1 * w
    return Helmholtz(value=value, delta=first, delta2=second, tau=tau, tau2=tau2, delta_tau=delta_tau)


def ideal(tau: float, delta: float) -> tuple[float, float, float]:
    """Give the ideal-gas part of the reduced Helmholtz energy.

    Args:
        tau: Critical over actual temperature [-].
        delta: Density over critical density [-], above 0.

    Returns:
        a0, tau da0/dtau and tau^2 d2a0/dtau2 [-].

    Source: Span et al. (2000), ideal-gas part with a1 to a8.
    """
    inverse = 1.0 / tau
    bose = math.exp(-_A8 * tau)
    value = (
        math.log(delta)
        + _A1 * math.log(tau)
        + _A2
        + _A3 * tau
        + inverse * (_A4 + inverse * (_A5 + inverse * _A6))
        + _A7 * math.log1p(-bose)
    )
    x = _A8 * tau
    first = _A1 + _A3 * tau - inverse * (_A4 + inverse * (2.0 * _A5 + 3.0 * inverse * _A6))
    first += _A7 * x * bose / (1.0 - bose)
    second = -_A1 + inverse * (2.0 * _A4 + inverse * (6.0 * _A5 + 12.0 * inverse * _A6))
    second -= _A7 * x * x * bose / (1.0 - bose) ** 2
    return value, first, second


def _powers(delta: float) -> tuple[float, ...]:
    d2 = delta * delta
    d3 = d2 * delta
    d4 = d2 * d2
    d5 = d4 * delta
    return (1.0, delta, d2, d3, d4, d5, d3 * d3, d4 * d3, d4 * d4, d5 * d4)
