"""A plan as the contract form: one JSON file, complete enough that another program can repeat the proof."""

import json
from collections.abc import Mapping
from dataclasses import fields, is_dataclass
from typing import TypeAlias

from provenzero.document.brief import Brief
from provenzero.document.context import PermitContext
from provenzero.document.figures import PermitFigures
from provenzero.document.steps import sentence
from provenzero.document.wording import Wording
from provenzero.network.model import Device, Network, Passage
from provenzero.plan.model import Lock, Plan, Step, Verdict
from provenzero.state.model import State

VERSION = 1

Json: TypeAlias = bool | int | float | str | list["Json"] | dict[str, "Json"] | None


def plan_json(
    plan: Plan,
    proof: Mapping[str, Verdict],
    figures: PermitFigures,
    context: PermitContext,
    wording: Wording,
) -> str:
    """The text of the file, the same for the same input. Pressures are gauge [Pa], volumes m3, temperatures K."""
    brief = Brief(plan=plan, figures=figures, proof=proof, context=context, wording=wording)
    return json.dumps(_plan(brief), indent=1, ensure_ascii=False, allow_nan=False) + "\n"


def _plan(brief: Brief) -> Json:
    plan = brief.plan
    return {
        "plan_version": VERSION,
        "job": {"id": plan.job.id, "title": plan.job.title},
        "on": plan.on,
        "network": _network(plan.network, plan.start()),
        "zone": list(plan.zone),
        "dead": list(plan.dead),
        "steps": [_step(brief, step) for step in plan.steps],
        "locks": [_lock(lock) for lock in plan.locks],
        "open_to_vent": list(plan.open_to_vent),
        "unheld": list(plan.unheld),
        "proof": {k: {"holds": v.holds, "evidence": v.evidence} for k, v in sorted(brief.proof.items())},
        "grades": [
            {
                "source": grade.source,
                "barriers": list(grade.barriers),
                "grade": grade.grade.value,
                "survives_single_leak": grade.survives_single_leak,
            }
            for grade in plan.grades
        ],
        "impairment": _plain(plan.impairment),
        "figures": _plain(brief.figures),
        "assumptions": [{"path": a.path, "line": a.line, "taken": a.taken} for a in plan.unit.assumptions],
        "inputs": {
            "unit": plan.unit.identity.tag,
            "unit_revision": plan.unit.description.revision,
            "job": plan.job.id,
            "site": brief.context.site,
            "tool_version": brief.context.tool_version,
            "fingerprint": brief.context.fingerprint,
        },
    }


def _network(network: Network, start: State) -> Json:
    return {
        "lines": [
            {
                "id": line.id,
                "name": line.name,
                "medium": line.medium.value,
                "volume_m3": line.volume_m3,
                "vent": line.vent,
                "static_head_pag": line.static_head_pag,
            }
            for line in network.lines.values()
        ],
        "devices": [_device(device) for device in network.devices.values()],
        "sources": [
            {
                "id": source.id,
                "name": source.name,
                "line": source.line,
                "kind": source.kind.value,
                "pressure_pag": source.pressure_pag,
                "low_pag": source.low_pag,
                "drive": source.drive,
                "senses": source.senses,
                "starts_below_pag": source.starts_below_pag,
                "gas": source.gas,
            }
            for source in network.sources
        ],
        "functions": [
            {
                "name": item.name,
                "label": item.label,
                "open_line": item.open_line,
                "close_line": item.close_line,
                "valve": item.valve,
            }
            for item in network.actuators
        ],
        "gauges": [
            {
                "tag": gauge.tag,
                "location": gauge.location,
                "line": gauge.line,
                "reads": gauge.reads,
                "full_scale_pag": gauge.full_scale_pag,
                "accuracy_fraction": gauge.accuracy_fraction,
                "readable": gauge.readable,
            }
            for gauge in network.gauges
        ],
        "initial": {
            "positions": {str(tag): position for tag, position in start.positions.items()},
            "pressures_pag": {line: list(interval) for line, interval in start.pressures.items()},
            "pistons": dict(start.pistons),
        },
    }


def _device(device: Device) -> Json:
    return {
        "tag": device.tag,
        "kind": device.kind.value,
        "name": device.name,
        "location": device.location,
        "positions": {name: [_passage(item) for item in items] for name, items in device.positions.items()},
        "normal": device.normal,
        "movable": device.movable,
        "lockable": device.lockable,
        "moved_by": list(device.moved_by),
        "lock_holds_against": list(device.lock_holds_against),
        "on_loss": (
            None if device.on_loss is None else {"line": device.on_loss.line, "position": device.on_loss.position}
        ),
    }


def _passage(item: Passage) -> Json:
    found: dict[str, Json] = {
        "passage": item.kind.value,
        "from": item.source,
        "to": item.target,
        "certain": item.certain,
    }
    if item.set_pag is not None:
        found["set_pag"] = item.set_pag
    return found


def _step(brief: Brief, step: Step) -> Json:
    action: Json = None
    if step.device is not None and step.position is not None:
        action = {"device": step.device, "position": step.position}
    return {
        "id": step.id,
        "section": step.section.value,
        "kind": step.kind.value,
        "action": action,
        "lock": step.lock,
        "unlock": step.unlock,
        "moves_function": step.moves_function,
        "starts_pump": step.starts_pump,
        "recharges": step.recharges,
        "hold_point": step.hold_point,
        "lines": list(step.lines),
        "expect": [
            {"gauge": e.gauge, "line": e.line, "low_pag": e.low_pag, "high_pag": e.high_pag} for e in step.expect
        ],
        "reason": step.reason,
        "text": sentence(brief, step),
    }


def _lock(lock: Lock) -> Json:
    return {
        "number": lock.number,
        "device": lock.device,
        "position": lock.position,
        "purpose": lock.purpose.value,
        "holds_back": [list(way) for way in lock.holds_back],
        "keeps_open": list(lock.keeps_open),
    }


def _plain(value: object) -> Json:
    """Every figure under its own name; what is not known is null."""
    if is_dataclass(value):
        return {f.name: _plain(getattr(value, f.name)) for f in fields(value)}
    match value:
        case None | bool() | int() | float() | str():
            return value
        case Mapping():
            return {str(k): _plain(v) for k, v in value.items()}
        case tuple() | list():
            return [_plain(item) for item in value]
    raise TypeError(f"a figure cannot be {type(value).__name__}")
