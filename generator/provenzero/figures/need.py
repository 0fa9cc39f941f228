"""What the functions need from the accumulators, and how soon each must have moved."""

from collections.abc import Iterable
from typing import TypeAlias

from provenzero.unit.model import Bank, Function, FunctionKind, Pump

Band: TypeAlias = tuple[float, float]

PSI_PA = 6894.757293168
LOWEST_USEFUL_PAG = 1200 * PSI_PA
OVER_PRECHARGE_PA = 200 * PSI_PA
LARGE_ANNULAR_BORE_M = 18.75 * 0.0254
CLOSE_S = 30.0
CLOSE_LARGE_ANNULAR_S = 45.0


def closing_volume_m3(functions: Iterable[Function]) -> float | None:
    """Fluid to close all preventers and open all gate valves once [m3]; None if a volume is not known.

    Source: drawdown sequence, common practice, no source.
    """
    total = 0.0
    for item in functions:
        volume = item.open_volume_m3 if item.kind is FunctionKind.GATE_VALVE else item.close_volume_m3
        if volume is None:
            return None
        total += volume
    return total


def least_useful_pag(bank: Bank) -> float:
    """The lowest pressure at which fluid of a bank still counts as usable [Pa gauge].

    Source: the largest of 1200 psi and precharge + 200 psi, training text and API RP 53, 3rd ed.
    """
    return max(LOWEST_USEFUL_PAG, (bank.precharge_pag or 0.0) + OVER_PRECHARGE_PA)


def closing_time_s(item: Function) -> float:
    """The longest closing time allowed [s].

    Source: API RP 16E 2.1 and API Std 53: 30 s for rams and for annulars below 18-3/4 in, 45 s from there up. A gate
    valve may be no slower than the slowest ram is allowed to be. An annular of unknown bore gets the shorter time.
    """
    large = item.kind is FunctionKind.ANNULAR and item.bore_m is not None and item.bore_m >= LARGE_ANNULAR_BORE_M
    return CLOSE_LARGE_ANNULAR_S if large else CLOSE_S


def joined_flow_m3_s(pumps: Iterable[Pump]) -> float | None:
    """Flow of several pumps together [m3/s]; None if one is not known or there is none.

    Source: flows in parallel add.
    """
    flows = [p.flow_m3_s for p in pumps]
    if not flows or any(f is None for f in flows):
        return None
    return sum(f for f in flows if f is not None)
