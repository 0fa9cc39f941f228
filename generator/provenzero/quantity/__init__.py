"""Text with a unit to SI floats, and SI floats to text in the units a site prints.

A small table of exact factors serves in place of a general library of units: importing one costs more time
than everything else a permit needs. Tests hold every factor against such a library.
"""

from provenzero.quantity.measures import Dimension
from provenzero.quantity.read import QuantityError, parse
from provenzero.quantity.write import (
    METRIC,
    US,
    LengthUnit,
    PressureUnit,
    TemperatureUnit,
    Units,
    VolumeUnit,
)

__all__ = [
    "METRIC",
    "US",
    "Dimension",
    "LengthUnit",
    "PressureUnit",
    "QuantityError",
    "TemperatureUnit",
    "Units",
    "VolumeUnit",
    "parse",
]
