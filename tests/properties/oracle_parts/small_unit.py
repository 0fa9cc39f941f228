"""A unit of a few lines and its sound plan, as the plan JSON has them: for trying the oracle on."""

from typing import Any

Entry = dict[str, Any]
FULL = [18.9e6, 20.7e6]


def line(name: str, medium: str = "control_fluid", *, head: float = 0.0) -> Entry:
    """A line; the one called tank is the vent."""
    return {
        "id": name,
        "name": name,
        "medium": medium,
        "volume_m3": 0.001,
        "vent": name == "tank",
        "static_head_pag": head,
    }


def way(text: str, set_pag: float | None = None) -> Entry:
    """A passage from words like `header check run`; `maybe` before them where nobody knows of it for sure."""
    words = text.removeprefix("maybe ").split()
    entry = {"passage": words[1], "from": words[0], "to": words[2], "certain": not text.startswith("maybe ")}
    return entry if set_pag is None else entry | {"set_pag": set_pag}


def valve(tag: str, one: str, other: str) -> Entry:
    """A stop valve between two lines, moved and locked by hand."""
    return device(tag, {"open": [way(f"{one} open {other}")], "closed": []})


def device(tag: str, positions: dict[str, list[Entry]]) -> Entry:
    """A device that people move and can lock."""
    return {
        "tag": tag,
        "kind": "shut_off_valve",
        "location": "front",
        "positions": positions,
        "movable": True,
        "lockable": True,
        "moved_by": ["hand"],
        "lock_holds_against": ["hand"],
        "on_loss": None,
    }


def fixed(tag: str, *ways: Entry) -> Entry:
    """Something that stands as it is: a pipe, a check valve, a relief valve."""
    return device(tag, {"fitted": list(ways)}) | {"movable": False, "lockable": False, "moved_by": []}


def live(name: str, at: str, pressures: list[float], drive: str | None = None) -> Entry:
    """A source that keeps coming while its drive is live."""
    low, high = pressures
    return {
        "id": name,
        "line": at,
        "kind": "live",
        "pressure_pag": high,
        "low_pag": low,
        "drive": drive,
        "gas": False,
    }


def bottles(name: str, at: str) -> Entry:
    """Charged bottles."""
    return live(name, at, FULL) | {"kind": "stored", "gas": True}


def step(number: int, section: str, **more: Any) -> Entry:
    """A step that does nothing but what is said of it; `sets` is a device and its position."""
    device_and_position = more.pop("sets", None)
    action = None
    if device_and_position is not None:
        action = dict(zip(("device", "position"), device_and_position.split(), strict=True))
    empty: Entry = {"lock": None, "unlock": None, "moves_function": None, "starts_pump": None, "expect": []}
    return {"id": f"s{number}", "section": section, "action": action, "text": ""} | empty | more


def reads(at: str, low: float, high: float) -> list[Entry]:
    """The reading that a step promises on the gauge of a line."""
    return [{"gauge": f"PI-{at}", "line": at, "low_pag": low, "high_pag": high}]


def small_plan() -> Entry:
    """Take the supply pipe `run` of one ram out of service, work on it, and put it back.

    Mains and breaker EB drive a pump on the header, where bottles stand behind valve BV; SV leads on to the
    run, DV drains it, and four-way valve FW gives it to either side of the ram, which stands closed.
    """
    ram = {
        "open": [way("run open opening"), way("closing open tank")],
        "centre": [],
        "close": [way("run open closing"), way("opening open tank")],
    }
    automatic = {"senses": "header", "starts_below_pag": FULL[0]}
    return {
        "plan_version": 1,
        "network": {
            "lines": [
                line("mains", "electric"),
                line("motor", "electric"),
                *map(line, ("header", "bank", "run", "opening", "closing", "tank")),
            ],
            "devices": [
                valve("EB", "mains", "motor"),
                valve("BV", "bank", "header"),
                valve("SV", "header", "run"),
                valve("DV", "run", "tank"),
                device("FW", ram),
                fixed("RV", way("header relief tank", 22e6)),
            ],
            "sources": [
                live("utility", "mains", [400.0, 400.0]),
                live("pump", "header", FULL, "motor") | automatic,
                bottles("bottles", "bank"),
            ],
            "functions": [{"name": "ram", "open_line": "opening", "close_line": "closing", "valve": "FW"}],
            "initial": {
                "positions": {
                    "EB": "open",
                    "BV": "open",
                    "SV": "open",
                    "DV": "closed",
                    "FW": "close",
                    "RV": "fitted",
                },
                "pressures_pag": {
                    "mains": [400.0, 400.0],
                    "motor": [400.0, 400.0],
                    "header": FULL,
                    "bank": FULL,
                    "run": FULL,
                    "closing": FULL,
                    "opening": [0.0, 0.0],
                },
            },
        },
        "zone": ["run"],
        "steps": [
            step(1, "isolate", sets="SV closed", lock=1, expect=reads("header", 18.8e6, 20.8e6)),
            step(2, "release", sets="DV open", lock=2, expect=reads("run", 0.0, 0.2e6)),
            step(3, "verify", expect=reads("run", 0.0, 0.2e6)),
            step(4, "work"),
            step(5, "reinstate", sets="DV closed", unlock=2),
            step(6, "reinstate", sets="SV open", unlock=1, expect=reads("run", 18.8e6, 20.8e6)),
        ],
        "locks": [
            {"number": 1, "device": "SV", "position": "closed"},
            {"number": 2, "device": "DV", "position": "open"},
        ],
        "open_to_vent": ["run"],
    }
