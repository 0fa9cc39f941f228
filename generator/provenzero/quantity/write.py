"""SI floats to text in the units of a site, rounded the way a gauge, a sight glass or a watch is read."""

import math
from collections.abc import Callable
from dataclasses import dataclass
from enum import StrEnum
from typing import Final

from provenzero.quantity.measures import INCH, MEASURES, MINUTE, Dimension, written_value

NO_BREAK: Final = "\u00a0"
_NOISE: Final = 1e-9  # of a step: what floats lose between the SI value and the unit
_SIXTEENTHS: Final = 16
_BORE_SLACK_IN: Final = 0.01
_MINUTE_S: Final = 60
_KILO_UP_TO: Final = 1e4
_SECONDS_UP_TO_S: Final = 90
_SECONDS_BESIDE_MINUTES_UP_TO_S: Final = 600
_MINUTES_UP_TO_S: Final = 90 * 60
_HOURS_UP_TO_S: Final = 48 * 3600


class PressureUnit(StrEnum):
    """Units in which gauges are printed."""

    PSI = "psi"
    BAR = "bar"
    MPA = "MPa"


class VolumeUnit(StrEnum):
    """Units in which volumes are printed; flows are printed in the same, a minute."""

    GAL = "gal"
    LITRE = "L"


class TemperatureUnit(StrEnum):
    """Units in which temperatures are printed."""

    DEG_F = "degF"
    DEG_C = "degC"


class LengthUnit(StrEnum):
    """Units in which lengths are printed; bores are in inches where these are feet, else in millimetres."""

    FT = "ft"
    M = "m"


# From which written value on, in which steps; the last row is for all that is smaller.
_Steps = tuple[tuple[float, float], ...]
_PRESSURE_STEPS: Final[dict[PressureUnit, _Steps]] = {
    PressureUnit.PSI: ((100.0, 10.0), (10.0, 1.0), (0.0, 0.1)),
    PressureUnit.BAR: ((10.0, 1.0), (1.0, 0.1), (0.0, 0.01)),
    PressureUnit.MPA: ((1.0, 0.1), (0.1, 0.01), (0.0, 0.001)),
}
_VOLUME_STEPS: Final[_Steps] = ((100.0, 1.0), (1.0, 0.1), (0.0, 0.01))
_TEMPERATURE_STEPS: Final[_Steps] = ((0.0, 1.0),)
_LENGTH_STEPS: Final[_Steps] = ((10.0, 1.0), (0.0, 0.1))
_ENERGY_STEPS: Final[_Steps] = ((1000.0, 10.0), (10.0, 1.0), (1.0, 0.1), (0.0, 0.01))
_SIGNS: Final = {TemperatureUnit.DEG_F: "°F", TemperatureUnit.DEG_C: "°C"}
_Rounding = Callable[[float], float]


def _finite(value: float) -> float:
    if not math.isfinite(value):
        raise ValueError(f"{value} is no measured value")
    return value


def _nearest(value: float) -> float:
    return math.floor(value + 0.5 + _NOISE)


def _nearest_or_one(value: float) -> float:
    """To the nearest step; what is not zero does not become zero."""
    return _nearest(value) or math.copysign(1.0, value)


def _down(value: float) -> float:
    return math.floor(value + _NOISE)


def _up(value: float) -> float:
    return math.ceil(value - _NOISE)


@dataclass(frozen=True, slots=True, kw_only=True)
class Units:
    """The units a site prints in, one or two of each kind: the second stands in brackets behind the first.

    A value other than zero is never printed as zero: the smallest step stands for what is smaller. Every
    method raises ValueError for a value that is not finite.
    """

    pressure_units: tuple[PressureUnit, ...]
    volume_units: tuple[VolumeUnit, ...]
    temperature_units: tuple[TemperatureUnit, ...]
    length_units: tuple[LengthUnit, ...]

    def pressure(self, pag: float) -> str:
        """A gauge pressure or a difference [Pa]."""
        return _joined(
            [_written(pag, Dimension.PRESSURE, u, _PRESSURE_STEPS[u], _nearest_or_one) for u in self.pressure_units]
        )

    def pressure_band(self, low_pag: float, high_pag: float) -> str:
        """A band of gauge pressures [Pa], rounded outward: the printed band holds all that was computed."""
        bands = []
        for unit in self.pressure_units:
            low = _written(low_pag, Dimension.PRESSURE, unit, _PRESSURE_STEPS[unit], _down)
            high = _written(high_pag, Dimension.PRESSURE, unit, _PRESSURE_STEPS[unit], _up)
            bands.append(high if low == high else f"{low.partition(NO_BREAK)[0]} to {high}")
        return _joined(bands)

    def volume(self, m3: float) -> str:
        """A volume [m3]."""
        return _joined([_written(m3, Dimension.VOLUME, u, _VOLUME_STEPS, _nearest_or_one) for u in self.volume_units])

    def flow(self, m3_s: float) -> str:
        """A flow [m3/s], a minute."""
        a_minute = m3_s * float(MINUTE)
        return _joined(
            [
                _written(a_minute, Dimension.VOLUME, u, _VOLUME_STEPS, _nearest_or_one) + "/min"
                for u in self.volume_units
            ]
        )

    def temperature(self, kelvin: float) -> str:
        """An absolute temperature [K]."""
        written = []
        for unit in self.temperature_units:
            value = written_value(kelvin, MEASURES[Dimension.TEMPERATURE].scales[unit])
            written.append(_number(value, _TEMPERATURE_STEPS, _nearest) + NO_BREAK + _SIGNS[unit])
        return _joined(written)

    def length(self, metre: float) -> str:
        """A length or a height [m]."""
        return _joined(
            [_written(metre, Dimension.LENGTH, u, _LENGTH_STEPS, _nearest_or_one) for u in self.length_units]
        )

    def bore(self, metre: float) -> str:
        """A bore [m]: in inches and sixteenths where it is one, as the trade says it, else in decimals."""
        _finite(metre)
        return _joined([_bore_in(metre) if u is LengthUnit.FT else _bore_mm(metre) for u in self.length_units])

    def energy(self, joule: float) -> str:
        """An energy [J], in kJ or MJ: one unit serves all sites."""
        kilo = joule / 1e3
        if abs(kilo) < _KILO_UP_TO:
            return _number(kilo, _ENERGY_STEPS, _nearest_or_one) + NO_BREAK + "kJ"
        return _number(joule / 1e6, _ENERGY_STEPS, _nearest_or_one) + NO_BREAK + "MJ"

    def duration(self, seconds: float) -> str:
        """A time [s], in the two largest units that matter."""
        if _finite(seconds) < 0.0:
            raise ValueError(f"{seconds} s is not a duration")
        if seconds == 0.0:
            return f"0{NO_BREAK}s"
        if seconds < _SECONDS_UP_TO_S:
            return f"{max(1, _nearest(seconds)):.0f}{NO_BREAK}s"
        if seconds < _SECONDS_BESIDE_MINUTES_UP_TO_S:
            return _two(_nearest(seconds), _MINUTE_S, "min", "s")
        if seconds < _MINUTES_UP_TO_S:
            return f"{_nearest(seconds / _MINUTE_S):.0f}{NO_BREAK}min"
        if seconds < _HOURS_UP_TO_S:
            return _two(_nearest(seconds / _MINUTE_S), 60, "h", "min")
        return _two(_nearest(seconds / 3600), 24, "d", "h")


US: Final = Units(
    pressure_units=(PressureUnit.PSI,),
    volume_units=(VolumeUnit.GAL,),
    temperature_units=(TemperatureUnit.DEG_F,),
    length_units=(LengthUnit.FT,),
)
METRIC: Final = Units(
    pressure_units=(PressureUnit.BAR,),
    volume_units=(VolumeUnit.LITRE,),
    temperature_units=(TemperatureUnit.DEG_C,),
    length_units=(LengthUnit.M,),
)


def _joined(texts: list[str]) -> str:
    first, *others = texts
    return f"{first} ({', '.join(others)})" if others else first


def _written(si: float, dimension: Dimension, unit: str, steps: _Steps, rounding: _Rounding) -> str:
    value = written_value(si, MEASURES[dimension].scales[unit])
    return _number(value, steps, rounding) + NO_BREAK + unit


def _number(value: float, steps: _Steps, rounding: _Rounding) -> str:
    if abs(_finite(value)) < _NOISE:
        return "0"
    step = next(step for least, step in steps if abs(value) >= least * (1.0 - _NOISE))
    rounded = rounding(value / step) * step
    decimals = max(0, -math.floor(math.log10(step)))
    return f"{rounded:.{decimals}f}" if rounded else "0"


def _two(count: float, size: int, large: str, small: str) -> str:
    many, few = divmod(int(count), size)
    return f"{many}{NO_BREAK}{large} {few}{NO_BREAK}{small}" if few else f"{many}{NO_BREAK}{large}"


def _bore_in(metre: float) -> str:
    inches = metre / float(INCH)
    sixteenths = _nearest(inches * _SIXTEENTHS)
    if abs(inches - sixteenths / _SIXTEENTHS) > _BORE_SLACK_IN:
        return f"{inches:.2f}{NO_BREAK}in"
    whole, over = divmod(int(sixteenths), _SIXTEENTHS)
    shrink = math.gcd(over, _SIXTEENTHS)
    part = f"{over // shrink}/{_SIXTEENTHS // shrink}" if over else ""
    number = f"{whole}-{part}" if whole and part else part or str(whole)
    return f"{number}{NO_BREAK}in"


def _bore_mm(metre: float) -> str:
    return f"{_nearest(metre * 1000):.0f}{NO_BREAK}mm"
