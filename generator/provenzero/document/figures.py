"""The computed figures a permit prints, in SI and as bands; whatever is None is printed as not known, never as zero."""

from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import TypeAlias

Band: TypeAlias = tuple[float, float]


@dataclass(frozen=True, slots=True, kw_only=True)
class StepFigures:
    """What one step is expected to bring.

    `returned_m3`: fluid that comes out. `time_s`: how long it takes. `rebound_pag`: where the reading climbs to if the
    bleed is shut too early. `accept_pag`, `accept_s`: acceptance values of a test. `limit`: any other limit, in words.
    """

    returned_m3: Band | None = None
    time_s: Band | None = None
    rebound_pag: Band | None = None
    accept_pag: Band | None = None
    accept_s: float | None = None
    limit: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class BankFigures:
    """One bank: fluid let out when drained, stored energy before and after, precharge today, free nitrogen."""

    tag: str
    fluid_m3: Band | None = None
    energy_charged_j: Band | None = None
    energy_drained_j: Band | None = None
    precharge_pag: Band | None = None
    free_gas_m3: Band | None = None


@dataclass(frozen=True, slots=True, kw_only=True)
class TrappedFigures:
    """One blocked-in line: its volume, what comes out of it, and its rise for each kelvin of warming."""

    line: str
    volume_m3: float | None = None
    returned_m3: Band | None = None
    rise_pa_per_k: Band | None = None


@dataclass(frozen=True, slots=True, kw_only=True)
class PermitFigures:
    """All figures of a permit. `steps` by step id; `energy_j` by source id, where no bank tells it."""

    returned_total_m3: Band | None = None
    reservoir_room_m3: float | None = None
    usable_left_m3: Band | None = None
    usable_needed_m3: float | None = None
    charging_s: Band | None = None
    temperature_k: Band | None = None
    steps: Mapping[str, StepFigures] = field(default_factory=dict)
    banks: tuple[BankFigures, ...] = ()
    trapped: tuple[TrappedFigures, ...] = ()
    energy_j: Mapping[str, Band] = field(default_factory=dict)

    def bank(self, tag: str) -> BankFigures | None:
        """The figures of one bank, if there are any."""
        return next((b for b in self.banks if b.tag == tag), None)

    def room_short(self) -> bool:
        """Whether more fluid may come back than the reservoir can take."""
        if self.returned_total_m3 is None or self.reservoir_room_m3 is None:
            return False
        return self.returned_total_m3[1] > self.reservoir_room_m3
