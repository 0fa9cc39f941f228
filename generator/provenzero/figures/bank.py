"""Banks in figures: the fluid they give back, the energy they store, their precharge on the day, their nitrogen."""

from dataclasses import dataclass
from typing import TypeAlias

from provenzero.physics.accumulator import (
    GasCharge,
    fluid_volume_m3,
    nitrogen_mass_kg,
    precharge_at_temperature_pag,
    usable_ideal_gauge_m3,
    usable_slow_m3,
)
from provenzero.physics.discharge import rebound_pag
from provenzero.physics.energy import bottle_energy_j, bottle_expansion_work_j
from provenzero.physics.gas import free_volume_m3
from provenzero.physics.times import Outlet, bleed_down, charging_time
from provenzero.unit.model import Bank, NitrogenBackup

Band: TypeAlias = tuple[float, float]


def charge_of(bank: Bank, bottles: int | None = None) -> GasCharge | None:
    """The gas charge of a bank (or of some of its bottles) as one large bottle; None if the precharge is not known.

    Source: bottles in parallel share one pressure, so volumes add.
    """
    if bank.precharge_pag is None or bank.precharge_temperature_k is None:
        return None
    count = bank.bottles if bottles is None else bottles
    return GasCharge(
        gas_volume_m3=count * bank.gas_volume_m3,
        precharge_pag=bank.precharge_pag,
        precharge_temperature_k=bank.precharge_temperature_k,
    )


def drained_fluid_m3(charge: GasCharge, pressure_pag: Band, temperature_k: Band) -> Band:
    """Fluid that a full drain gives back [m3], over the pressures and temperatures it may start from [Pa gauge, K].

    Source: real-gas volume at constant mass, Span et al. (2000).
    """
    found = [fluid_volume_m3(charge, p, t) for p in pressure_pag for t in temperature_k]
    return (min(found), max(found))


def usable_m3(charge: GasCharge, start_pag: Band, end_pag: float, temperature_k: Band) -> Band:
    """Usable fluid [m3] from a start pressure down to an end pressure [Pa gauge], slowly, over the temperatures [K].

    Source: real-gas volume at constant mass, Span et al. (2000).
    """
    found = [usable_slow_m3(charge, max(p, end_pag), end_pag, t) for p in start_pag for t in temperature_k]
    return (min(found), max(found))


def usable_by_hand_m3(charge: GasCharge, start_pag: float, end_pag: float) -> float:
    """Usable fluid [m3] between two gauge pressures [Pa] by the ideal-gas hand rule, for a person to check.

    Source: Crumpton 2018, 4.9.7, and drilling formula collections.
    """
    return usable_ideal_gauge_m3(charge, start_pag, end_pag)


def energy_j(charge: GasCharge, pressure_pag: float, temperature_k: float) -> Band:
    """Stored energy [J] at a fluid pressure [Pa gauge]: real-gas work and the pressure-test formula, least first.

    Source: Span et al. (2000); ASME PCC-2 Article 501, Appendix II.
    """
    found = (
        bottle_expansion_work_j(charge, pressure_pag, temperature_k),
        bottle_energy_j(charge, pressure_pag, temperature_k),
    )
    return (min(found), max(found))


def precharge_today_pag(charge: GasCharge, temperature_k: Band) -> Band:
    """What the precharge reads [Pa gauge] over the temperatures of the day [K].

    Source: real gas at constant density, Span et al. (2000).
    """
    found = [precharge_at_temperature_pag(charge, t) for t in temperature_k]
    return (min(found), max(found))


def free_gas_m3(charge: GasCharge) -> float:
    """Nitrogen of the bottles as free gas at the atmosphere [m3].

    Source: conservation of mass, Span et al. (2000).
    """
    return free_volume_m3(nitrogen_mass_kg(charge))


def rebound_band_pag(charge: GasCharge, start_pag: float, temperature_k: Band) -> Band | None:
    """Where the reading climbs to [Pa gauge] if a fast bleed is shut halfway between start and precharge.

    None where there is no way between the two. Source: isentropic discharge, then warming at constant volume.
    """
    ends = []
    for t in temperature_k:
        low = precharge_at_temperature_pag(charge, t)
        if low < start_pag:
            ends.append(rebound_pag(charge, start_pag, t, (start_pag + low) / 2.0))
    return (min(ends), max(ends)) if ends else None


def drain_time_s(charge: GasCharge, pressure_pag: Band, temperature_k: Band, outlet: Outlet) -> Band:
    """Time to drain a bank through its bleed path [s], warm and cold gas both.

    Source: valve flow integrated over the discharge, isothermal and isentropic.
    """
    found: list[float] = []
    for p in pressure_pag:
        for t in temperature_k:
            if p > precharge_at_temperature_pag(charge, t):
                took = bleed_down(charge, p, 0.0, t, outlet)
                found += [took.slow_s, took.fast_s]
    return (min(found), max(found)) if found else (0.0, 0.0)


def charging_s(charge: GasCharge, start_pag: float, end_pag: float, temperature_k: Band, flow_m3_s: float) -> Band:
    """Time for pumps of a constant flow [m3/s] to charge from one gauge pressure to another [s].

    Source: conservation of volume with real-gas isotherm and isentrope.
    """
    found: list[float] = []
    for t in temperature_k:
        took = charging_time(charge, start_pag, end_pag, t, flow_m3_s)
        found += [took.slow_s, took.fast_s]
    return (min(found), max(found))


@dataclass(frozen=True, slots=True, kw_only=True)
class Backup:
    """The nitrogen backup in figures: stored energy [J] and free gas [m3]."""

    energy_j: Band
    free_gas_m3: float


def backup_figures(item: NitrogenBackup, temperature_k: Band) -> Backup:
    """Stored energy and free gas of the backup bottles, over the temperatures [K].

    Source: as for banks; the pressure is taken as read at the lower temperature.
    """
    charge = GasCharge(
        gas_volume_m3=item.bottles * item.bottle_volume_m3,
        precharge_pag=item.pressure_pag,
        precharge_temperature_k=temperature_k[0],
    )
    low, high = energy_j(charge, item.pressure_pag, temperature_k[0])
    return Backup(energy_j=(low, high), free_gas_m3=free_gas_m3(charge))
