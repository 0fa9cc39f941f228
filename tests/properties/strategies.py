"""Descriptions of units of every kind that the schema allows: 1 to 4 banks and pumps, 1 to 8 functions."""

from typing import Any

from hypothesis import strategies as st

Data = dict[str, Any]
Draw = st.DrawFn

MOSTLY = ("yes", "yes", "yes", "yes", "no", "unknown")
ANSWER = ("yes", "no", "unknown")


class Maker:
    """Draws the parts of one description; keeps tags apart."""

    def __init__(self, draw: Draw) -> None:
        self.draw = draw
        self.common = self.one_of("common_header", "individual", "unknown")
        self.outlets = ["reservoir", "atmosphere"] + ([] if self.common == "individual" else ["returns"])

    def one_of(self, *words: Any) -> Any:
        return self.draw(st.sampled_from(words))

    def chance(self, percent: int) -> bool:
        return self.draw(st.integers(1, 100)) <= percent

    def valve(self, tag: str, **more: Any) -> Data:
        return {"tag": tag, "location": f"at {tag}", "lockable": self.one_of(*MOSTLY), **more}

    def air_valve(self, tag: str) -> Data:
        return self.valve(tag, exhausts=self.one_of("yes", "yes", "yes", "no", "unknown"))

    def isolator(self, tag: str) -> Data:
        return {"tag": tag, "location": "switch room", "lockable": self.one_of(*MOSTLY)}

    def bleed(self, tag: str) -> Data:
        return {**self.valve(tag), "to": self.one_of(*self.outlets)}

    def maybe(self, percent: int, part: Data) -> Any:
        return part if self.chance(percent) else self.one_of("none", "none", "unknown")

    def gauge(self, tag: str, kind: str = "gauge") -> Data:
        found: Data = {"kind": kind, "tag": tag, "location": "board", "full_scale": self.one_of("6000 psi", "unknown")}
        if self.chance(40):
            found["valve"] = self.valve(f"{tag}V", normal=self.one_of("open", "open", "closed"))
        return found

    def fittings(self, stem: str) -> list[Data]:
        found: list[Data] = []
        if self.chance(70):
            found.append(self.gauge(f"{stem}G", self.one_of("gauge", "gauge", "transmitter", "switch")))
        if self.chance(35):
            found.append({"kind": "bleed", **self.bleed(f"{stem}B")})
        if self.chance(40):
            opens = self.one_of("3300 psi", "unknown")
            to = self.one_of(*self.outlets[:1])
            found.append({"kind": "relief", "tag": f"{stem}R", "location": "board", "set_pressure": opens, "to": to})
        return found

    def bank(self, i: int) -> Data:
        bottles = self.draw(st.integers(1, 4))
        valves: Any = "none"
        if self.chance(25):
            valves = [self.valve(f"BB{i}-{k}") for k in range(bottles)]
        charge = {"pressure": self.one_of("1000 psi", "70 bar"), "temperature": "20 degC"}
        return {
            "tag": f"BK-{i}",
            "location": "rack",
            "bottles": bottles,
            "gas_volume": "10 gal",
            "separator": self.one_of("bladder", "piston", "diaphragm", "unknown"),
            "precharge": self.one_of(charge, charge, charge, "unknown"),
            "isolation": self.maybe(80, self.valve(f"IV-{i}")),
            "bleed": self.maybe(85, self.bleed(f"BV-{i}")),
            "bottle_valves": valves,
        }

    def pump(self, i: int, *, air: bool) -> Data:
        drive = self.one_of("electric", "diesel", "hand", *(["air", "air"] if air else []))
        energy = self.maybe(94, self.air_valve(f"AE-{i}") if drive == "air" else self.isolator(f"Q-{i}"))
        discharge: list[Data] = []
        if self.chance(80):
            discharge.append({"kind": "check", "tag": f"CV-{i}", "location": "pump"})
        if self.chance(75):
            discharge.append({"kind": "bleed", **self.bleed(f"PB-{i}")})
        if self.chance(80):
            discharge.append({"kind": "valve", **self.valve(f"DV-{i}")})
        if self.chance(10):
            discharge.reverse()
        suction: list[Data] = []
        if self.chance(90):
            suction.append({"kind": "valve", **self.valve(f"SV-{i}")})
        if self.chance(50):
            suction.append({"kind": "strainer", "tag": f"ST-{i}", "location": "pump"})
        if self.chance(60):
            suction.append({"kind": "bleed", **self.valve(f"SD-{i}"), "to": "atmosphere"})
        hand = drive == "hand"
        return {
            "tag": f"P-{i}",
            "location": "skid",
            "drive": drive,
            "supply": "air" if drive == "air" else "hand" if hand else self.one_of("board A", "board B"),
            "energy": energy,
            "flow": self.one_of("6 gal/min", "unknown"),
            "automatic": "no" if hand else self.one_of("yes", "yes", "yes", "no", "unknown"),
            "start_pressure": "none" if hand else self.one_of("2700 psi", "2600 psi"),
            "stop_pressure": self.one_of("3000 psi", "2900 psi"),
            "suction": suction,
            "discharge": discharge,
        }

    def regulator(self, tag: str, serves: str, fed_from: str, pressure: str, *, air: bool) -> Data:
        upstream = [{"kind": "valve", **self.valve(f"{tag}U")}] if self.chance(30) else []
        return {
            "tag": tag,
            "location": "board",
            "serves": serves,
            "fed_from": fed_from,
            "control": self.one_of("manual", "manual", "air") if air else "manual",
            "relieving": self.one_of("yes", "yes", "yes", "no", "unknown"),
            "set_pressure": pressure,
            "lockable": self.one_of("no", "no", "yes", "unknown"),
            "air_failure": self.one_of("closes", "holds", "opens", "unknown"),
            "upstream": upstream,
            "fittings": self.fittings(tag),
        }

    def function(self, i: int, lines: list[str], panels: list[str], centre: str) -> Data:
        supply: list[Data] = []
        if self.chance(15):
            supply.append({"kind": "check", "tag": f"FC-{i}", "location": "manifold"})
            if self.chance(70):
                supply.append({"kind": "bleed", **self.bleed(f"FB-{i}")})
        if self.chance(10):
            supply.append({"kind": "valve", **self.valve(f"FS-{i}")})
        valve: Data = {
            "tag": f"HV-{i}",
            "location": "manifold",
            "centre": centre if self.chance(90) else "unknown",
            "normal": self.one_of("open", "open", "close", "centre"),
            "lockable": self.one_of(*MOSTLY),
            "lock_holds_against_pilot": self.one_of("no", "no", "yes", "unknown"),
            "supply": supply,
            "panels": [p for p in panels if self.chance(80)],
            "pilot_isolation": self.maybe(40, self.air_valve(f"PV-{i}")),
        }
        kind = "annular" if i == 0 else self.one_of("pipe_ram", "blind_ram", "blind_shear_ram", "gate_valve", "spare")
        return {
            "name": f"f{i}",
            "label": f"FUNCTION {i}",
            "kind": kind,
            "bore": self.one_of("13-5/8 in", "unknown"),
            "open_volume": self.one_of("5 gal", "unknown"),
            "close_volume": self.one_of("6 gal", "unknown"),
            "ram_lock": self.one_of("none", "manual", "remote", "unknown"),
            "fed_from": self.one_of(*lines),
            "valve": valve,
            "lines": {
                "kind": self.one_of("hose", "pipe", "unknown"),
                "length": self.one_of("30 m", "unknown"),
                "bore": self.one_of("1 in", "unknown"),
                "height": self.one_of("4 m", "-2 m", "unknown"),
            },
            "close_fittings": self.fittings(f"F{i}C") if self.chance(20) else [],
        }

    def panel(self, i: int, *, air: bool) -> Data:
        kind = self.one_of("electric", *(["pneumatic", "pneumatic"] if air else []))
        found: Data = {"tag": f"RP-{i}", "location": "floor", "kind": kind, "supply": "board C"}
        own = self.air_valve(f"PA-{i}") if kind == "pneumatic" else self.isolator(f"PQ-{i}")
        found["energy"] = self.maybe(90, own)
        if kind == "electric" and air:
            found["through_pilot_air"] = self.one_of("yes", "yes", "no")
            found["pilot_air"] = self.maybe(80, self.air_valve(f"PP-{i}"))
        return found

    def backup(self) -> Data:
        run: list[Data] = [{"kind": "valve", **self.valve("NV-1", normal=self.one_of("closed", "closed", "open"))}]
        if self.chance(50):
            run.append({"kind": "reducer", "tag": "NR-1", "location": "rack", "set_pressure": "2500 psi"})
        if self.chance(70):
            run.append({"kind": "bleed", **self.bleed("NX-1")})
        if self.chance(80):
            run.append({"kind": "check", "tag": "NC-1", "location": "rack"})
        return {
            "tag": "NB-1",
            "location": "rack",
            "bottles": 2,
            "bottle_volume": "50 L",
            "pressure": "2800 psi",
            "run": run,
        }


@st.composite
def unit_data(draw: Draw, most_functions: int = 8, most_banks: int = 4, most_pumps: int = 4) -> Data:
    """A description that fits the schema and is consistent."""
    make = Maker(draw)
    air = make.chance(85)
    panels = [make.panel(i, air=air) for i in range(draw(st.integers(0, 2)))]
    lines = ["header", "manifold"]
    regulators = [make.regulator("RG-1", "manifold", "header", "1500 psi", air=air)]
    if make.chance(80):
        lines.append("annular-line")
        regulators.append(make.regulator("RG-2", "annular-line", make.one_of("header", "manifold"), "900 psi", air=air))
    bypasses = []
    if make.chance(60):
        valve = make.valve("BP-1", normal="closed")
        bypasses.append({"valve": valve, "around": "RG-1", "from": "header", "to": "manifold"})
    banks = [make.bank(i) for i in range(draw(st.integers(1, most_banks)))]
    if make.chance(25):
        surge = {**make.bank(9), "tag": "SB-1", "attached_to": "f0.close", "bottles": 1, "bottle_valves": "none"}
        banks.append({**surge, "precharge": {"pressure": "400 psi", "temperature": "20 degC"}})
    centre = make.one_of("vents", "blocks")
    tags = [p["tag"] for p in panels]
    drain = make.valve("DR-1", normal="closed")
    supply = [{"kind": "valve", **make.air_valve("AV-1")}] if make.chance(80) else []
    return {
        "format": 1,
        "unit": {
            "tag": "HCU-0",
            "name": "generated",
            "site": "nowhere",
            "jurisdiction": "other",
            "rated_pressure": "3000 psi",
        },
        "description": {"revision": "1", "date": "2026-01-01", "written_by": "generator", "verified": "no"},
        "fluid": {"kind": make.one_of("mineral_oil", "water_glycol", "water_based", "unknown")},
        "reservoir": {
            "tag": "T-1",
            "location": "skid",
            "volume": make.one_of("400 gal", "unknown"),
            "fluid_volume": make.one_of("150 gal", "unknown"),
            "suction_head": make.one_of("1 m", "unknown"),
            "drain": make.maybe(60, drain),
        },
        "returns": make.common,
        "header": {"fittings": make.fittings("H")},
        "banks": banks,
        "pumps": [make.pump(i, air=air) for i in range(draw(st.integers(1, most_pumps)))],
        "regulators": regulators,
        "bypasses": bypasses,
        "functions": [make.function(i, lines, tags, centre) for i in range(draw(st.integers(1, most_functions)))],
        "air": {"pressure": "125 psi", "run": supply} if air else "none",
        "panels": panels,
        "nitrogen_backup": [make.backup()] if make.chance(30) else [],
    }
