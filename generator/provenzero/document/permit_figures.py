"""The figures of one permit: what each step lets out and how long it takes, energy, room in the tank, what is left."""

from collections.abc import Iterable

from provenzero.document.figures import Band, BankFigures, PermitFigures, StepFigures, TrappedFigures
from provenzero.figures.bank import (
    backup_figures,
    charge_of,
    charging_s,
    drain_time_s,
    drained_fluid_m3,
    energy_j,
    free_gas_m3,
    precharge_today_pag,
    rebound_band_pag,
    usable_m3,
)
from provenzero.figures.need import closing_time_s, closing_volume_m3, joined_flow_m3_s, least_useful_pag
from provenzero.figures.trapped import released_m3, rise_pa_k
from provenzero.network.model import LineId
from provenzero.physics.liquid import liquid_properties
from provenzero.physics.standard import WATER_DENSITY_KG_M3
from provenzero.physics.times import Outlet
from provenzero.plan.model import Plan, Section, Step, StepKind
from provenzero.state.model import State
from provenzero.unit.model import Bank, Function, Pump


def permit_figures(plan: Plan) -> PermitFigures:
    """Compute all figures of a plan from its own states, over the temperatures of the description."""
    unit = plan.unit
    temperature = (unit.ambient_low_k, unit.ambient_high_k)
    steps = {}
    returned: list[Band] = []
    sure = True
    for index, step in enumerate(plan.steps):
        found = _step(plan, step, plan.states[index], plan.states[index + 1], temperature)
        if found is not None:
            steps[step.id] = found
        if step.section in (Section.PREPARE, Section.ISOLATE, Section.RELEASE):
            part, known = _returned(plan, plan.states[index], plan.states[index + 1], temperature)
            returned.append(part)
            sure = sure and known
    tank = unit.reservoir
    room = None if tank.volume_m3 is None or tank.fluid_volume_m3 is None else tank.volume_m3 - tank.fluid_volume_m3
    lost = plan.impairment
    left = [b for b in unit.banks if b.tag not in lost.banks_lost and b.attached_to == "header"]
    serving = [f for f in unit.functions if f.name not in lost.functions_lost]
    return PermitFigures(
        returned_total_m3=(sum(b[0] for b in returned), sum(b[1] for b in returned)) if sure else None,
        reservoir_room_m3=room,
        usable_left_m3=_usable(plan, left, temperature),
        usable_needed_m3=closing_volume_m3(serving),
        charging_s=_charging(plan, left, [p for p in unit.pumps if p.tag not in lost.pumps_lost], temperature),
        temperature_k=temperature,
        steps=steps,
        banks=tuple(_bank(plan, bank, temperature) for bank in unit.banks),
        trapped=tuple(_trapped(plan, item) for item in unit.functions if _opened(plan, item)),
        energy_j={n.tag: backup_figures(n, temperature).energy_j for n in unit.nitrogen_backups},
    )


def _opened(plan: Plan, item: Function) -> bool:
    return any(f"{item.name}.{side}" in plan.zone for side in ("open", "close"))


def _header(plan: Plan) -> Band:
    return plan.start().pressures[LineId("header")]


def _usable(plan: Plan, banks: Iterable[Bank], temperature: Band) -> Band | None:
    low = high = 0.0
    for bank in banks:
        charge = charge_of(bank)
        if charge is None:
            return None
        part = usable_m3(charge, _header(plan), least_useful_pag(bank), temperature)
        low, high = low + part[0], high + part[1]
    return (low, high)


def _charging(plan: Plan, banks: list[Bank], pumps: list[Pump], temperature: Band) -> Band | None:
    """Time to charge the banks left from precharge to stop pressure with the pumps left."""
    flow = joined_flow_m3_s(pumps)
    charges = [charge_of(b) for b in banks]
    if flow is None or not charges or any(c is None for c in charges):
        return None
    low = high = 0.0
    for charge in charges:
        if charge is not None:
            end = max(_header(plan)[1], charge.precharge_pag * temperature[1] / charge.precharge_temperature_k)
            part = charging_s(charge, charge.precharge_pag, end, temperature, flow)
            low, high = low + part[0], high + part[1]
    return (low, high)


def _bank(plan: Plan, bank: Bank, temperature: Band) -> BankFigures:
    charge = charge_of(bank)
    if charge is None:
        return BankFigures(tag=bank.tag)
    lines = [f"{bank.tag}/{n}.fluid" for n in range(1, bank.bottles + 1)] if bank.bottle_valves else []
    name = lines[0] if lines else f"{bank.tag}.fluid" if bank.isolation is not None else bank.attached_to
    pressure = plan.start().pressures[LineId(name)]
    charged = [energy_j(charge, max(pressure[1], 0.0), t) for t in temperature]
    drained = [energy_j(charge, 0.0, t) for t in temperature]
    gas = free_gas_m3(charge)
    return BankFigures(
        tag=bank.tag,
        fluid_m3=drained_fluid_m3(charge, pressure, temperature),
        energy_charged_j=(min(e[0] for e in charged), max(e[1] for e in charged)),
        energy_drained_j=(min(e[0] for e in drained), max(e[1] for e in drained)),
        precharge_pag=precharge_today_pag(charge, temperature),
        free_gas_m3=(gas, gas),
    )


def _trapped(plan: Plan, item: Function) -> TrappedFigures:
    line = plan.network.lines[LineId(f"{item.name}.close")]
    known = item.lines.length_m is not None and item.lines.bore_m is not None and item.close_volume_m3 is not None
    volume = line.volume_m3 if known else None
    high = max(plan.start().high(LineId(f"{item.name}.{side}")) for side in ("open", "close"))
    return TrappedFigures(
        line=line.id,
        volume_m3=volume,
        returned_m3=None if volume is None else released_m3(item, plan.unit.fluid, volume, high),
        rise_pa_per_k=rise_pa_k(plan.unit.fluid, item.lines.kind),
    )


def _emptied(plan: Plan, before: State, after: State) -> list[tuple[Bank, int]]:
    """Banks (with how many of their bottles) that a step lets out."""
    gone = {s.id for s in plan.network.sources if s.gas and before.high(s.line) > 0.0 >= after.high(s.line)}
    found = []
    for bank in plan.unit.banks:
        bottles = (
            bank.bottles if bank.tag in gone else sum(f"{bank.tag}/{n}" in gone for n in range(1, bank.bottles + 1))
        )
        if bottles:
            found.append((bank, bottles))
    return found


def _line_of(plan: Plan, bank: Bank) -> LineId:
    return next(s.line for s in plan.network.sources if s.id in (bank.tag, f"{bank.tag}/1"))


def _returned(plan: Plan, before: State, after: State, temperature: Band) -> tuple[Band, bool]:
    """Fluid that a step gives back to the tank, and whether all of it could be computed."""
    low = high = 0.0
    known = True
    for bank, bottles in _emptied(plan, before, after):
        charge = charge_of(bank, bottles)
        if charge is None:
            known = False
            continue
        part = drained_fluid_m3(charge, before.pressures[_line_of(plan, bank)], temperature)
        low, high = low + part[0], high + part[1]
    for item in plan.unit.functions:
        for side in ("open", "close"):
            line = LineId(f"{item.name}.{side}")
            if before.high(line) > 0.0 >= after.high(line):
                volume = plan.network.lines[line].volume_m3
                if volume <= 0.0:
                    known = known and item.lines.length_m is not None
                    continue
                low_part, high_part = released_m3(item, plan.unit.fluid, volume, before.high(line))
                low, high = low + low_part * (before.low(line) > 0.0), high + high_part
    return (low, high), known


def _step(plan: Plan, step: Step, before: State, after: State, temperature: Band) -> StepFigures | None:
    if step.kind is StepKind.FUNCTION_TEST:
        item = next(f for f in plan.unit.functions if f.name == step.facts["function"])
        return StepFigures(accept_s=closing_time_s(item))
    if step.kind is StepKind.RECHARGE and step.recharges is not None:
        return _recharge(plan, step.recharges, temperature)
    if step.kind is StepKind.PUMP_TEST:
        return _pump_test(plan, step, temperature)
    if step.device is None or step.section not in (Section.ISOLATE, Section.RELEASE):
        return None
    returned, known = _returned(plan, before, after, temperature)
    emptied = _emptied(plan, before, after)
    if not emptied and returned == (0.0, 0.0):
        return None
    return StepFigures(
        returned_m3=returned if known else None,
        time_s=_drain_time(plan, step, before, emptied, temperature),
        rebound_pag=_rebound(plan, before, emptied, temperature),
    )


def _rebound(plan: Plan, before: State, emptied: list[tuple[Bank, int]], temperature: Band) -> Band | None:
    found = []
    for bank, bottles in emptied:
        charge = charge_of(bank, bottles)
        if charge is not None:
            band = rebound_band_pag(charge, before.high(_line_of(plan, bank)), temperature)
            if band is not None:
                found.append(band)
    return (min(b[0] for b in found), max(b[1] for b in found)) if found else None


def _drain_time(
    plan: Plan, step: Step, before: State, emptied: list[tuple[Bank, int]], temperature: Band
) -> Band | None:
    """Time to drain through the valve of the step; None where its flow coefficient or a precharge is not known."""
    device = plan.network.devices[step.device] if step.device is not None else None
    if device is None or device.flow_coefficient_cv is None or not emptied:
        return None
    density = plan.unit.fluid_density_kg_m3 or liquid_properties(plan.unit.fluid.value).density_kg_m3[1]
    outlet = Outlet(flow_coefficient=device.flow_coefficient_cv, specific_gravity=density / WATER_DENSITY_KG_M3)
    low = high = 0.0
    for bank, bottles in emptied:
        charge = charge_of(bank, bottles)
        if charge is None:
            return None
        part = drain_time_s(charge, before.pressures[_line_of(plan, bank)], temperature, outlet)
        low, high = low + part[0], high + part[1]
    return (low, high)


def _recharge(plan: Plan, line: LineId, temperature: Band) -> StepFigures | None:
    """What a bottle's precharge must read over the temperatures of the day."""
    for bank in plan.unit.banks:
        charge = charge_of(bank, 1)
        if charge is not None and any(line == f"{bank.tag}/{n}.gas" for n in range(1, bank.bottles + 1)):
            return StepFigures(accept_pag=precharge_today_pag(charge, temperature))
    return None


def _pump_test(plan: Plan, step: Step, temperature: Band) -> StepFigures | None:
    """How long the pump alone takes from its start to its stop pressure, with all banks on."""
    pump = next((p for p in plan.unit.pumps if p.tag == step.facts["on"]), None)
    if pump is None:
        return None
    accept = (pump.start_pressure_pag or 0.0, pump.stop_pressure_pag)
    charges = [charge_of(b) for b in plan.unit.banks if b.attached_to == pump.delivers_to]
    if pump.flow_m3_s is None or pump.start_pressure_pag is None or not charges or any(c is None for c in charges):
        return StepFigures(accept_pag=accept)
    parts = [charging_s(c, accept[0], accept[1], temperature, pump.flow_m3_s) for c in charges if c is not None]
    return StepFigures(accept_pag=accept, time_s=(sum(p[0] for p in parts), sum(p[1] for p in parts)))
