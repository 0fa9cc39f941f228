"""Descriptions of units of any size, all of one pattern, for timing."""

from typing import Any


def sized(functions: int, banks: int, pumps: int) -> dict[str, Any]:
    """A unit with so many functions, banks and pumps."""

    def valve(tag: str, **more: str) -> dict[str, Any]:
        return {"tag": tag, "location": "skid", "lockable": "yes", **more}

    def bleed(tag: str, to: str = "reservoir") -> dict[str, Any]:
        return {"kind": "bleed", **valve(tag), "to": to}

    def bank(i: int) -> dict[str, Any]:
        let_out = {**valve(f"BV-{i}"), "to": "reservoir"}
        return {
            "tag": f"BK-{i}",
            "location": "rack",
            "bottles": 8,
            "gas_volume": "10 gal",
            "separator": "bladder",
            "precharge": {"pressure": "1000 psi", "temperature": "20 degC"},
            "isolation": valve(f"IV-{i}"),
            "bleed": let_out,
        }

    def pump(i: int) -> dict[str, Any]:
        isolator = {"tag": f"Q-{i}", "location": "switch room", "lockable": "yes"}
        return {
            "tag": f"P-{i}",
            "location": "skid",
            "drive": "air" if i % 2 else "electric",
            "supply": "air" if i % 2 else f"board {i}",
            "energy": valve(f"AE-{i}", exhausts="yes") if i % 2 else isolator,
            "flow": "6 gal/min",
            "automatic": "yes",
            "start_pressure": "2700 psi",
            "stop_pressure": "3000 psi",
            "suction": [{"kind": "valve", **valve(f"SV-{i}")}],
            "discharge": [
                {"kind": "check", "tag": f"CV-{i}", "location": "pump"},
                bleed(f"PB-{i}"),
                {"kind": "valve", **valve(f"DV-{i}")},
            ],
        }

    def function(i: int) -> dict[str, Any]:
        handle = {**valve(f"HV-{i}"), "centre": "blocks", "panels": ["RP-1"]}
        handle["pilot_isolation"] = valve(f"PV-{i}", exhausts="yes")
        return {
            "name": f"f{i}",
            "label": f"FUNCTION {i}",
            "kind": "pipe_ram",
            "close_volume": "6 gal",
            "open_volume": "5 gal",
            "fed_from": "manifold",
            "valve": handle,
            "lines": {"kind": "hose", "length": "30 m", "bore": "1 in", "height": "2 m"},
        }

    regulator = {"tag": "RG-1", "location": "board", "serves": "manifold", "fed_from": "header", "control": "manual"}
    return {
        "format": 1,
        "unit": {
            "tag": "HCU-0",
            "name": "sized",
            "site": "bench",
            "jurisdiction": "other",
            "rated_pressure": "3000 psi",
        },
        "description": {"revision": "1", "date": "2026-01-01", "written_by": "bench", "verified": "no"},
        "fluid": {"kind": "mineral_oil"},
        "reservoir": {
            "tag": "T-1",
            "location": "skid",
            "volume": "2000 gal",
            "fluid_volume": "500 gal",
            "suction_head": "1 m",
            "drain": "none",
        },
        "returns": "individual",
        "banks": [bank(i) for i in range(banks)],
        "pumps": [pump(i) for i in range(pumps)],
        "regulators": [{**regulator, "relieving": "yes", "set_pressure": "1500 psi"}],
        "bypasses": [
            {"valve": valve("BP-1", normal="closed"), "around": "RG-1", "from": "header", "to": "manifold"},
        ],
        "functions": [function(i) for i in range(functions)],
        "air": {"pressure": "125 psi", "run": [{"kind": "valve", **valve("AV-1", exhausts="yes")}]},
        "panels": [{"tag": "RP-1", "location": "floor", "kind": "pneumatic", "energy": valve("PA-1", exhausts="yes")}],
    }
