from hypothesis import given, settings
from hypothesis import strategies as st
from tests.properties.oracle_parts.freedom import freedoms
from tests.properties.oracle_parts.reach import origins, reach
from tests.properties.oracle_parts.small_unit import FULL, Entry, bottles, device, line, live, step, way
from tests.properties.oracle_parts.stands import flood_every_stand
from tests.properties.oracle_parts.walk import walk

LINES = ("a", "b", "c", "d", "e", "f", "tank")
_ways = st.builds(
    lambda one, kind, other: way(f"{one} {kind} {other}"),
    st.sampled_from(LINES),
    st.sampled_from(["open", "check", "regulator", "relief", "open"]),
    st.sampled_from(LINES),
)
_positions = st.lists(st.lists(_ways, max_size=2), min_size=2, max_size=3)


@st.composite
def _circuits(draw: st.DrawFn) -> Entry:
    devices, positions, locks, steps = [], {}, [], []
    for k in range(draw(st.integers(1, 7))):
        new = device(f"D{k}", {f"p{n}": ways for n, ways in enumerate(draw(_positions))})
        new["movable"] = draw(st.booleans()) or k == 0
        new["moved_by"] = ["hand", *draw(st.lists(st.sampled_from(LINES), max_size=1))]
        devices.append(new)
        positions[new["tag"]] = "p0"
        if draw(st.booleans()):
            locks.append({"number": k, "device": new["tag"], "position": "p0"})
            steps.append(step(k, "isolate", lock=k))
    driven = live("pump", draw(st.sampled_from(LINES)), FULL, draw(st.sampled_from(LINES)))
    return {
        "network": {
            "lines": list(map(line, LINES)),
            "devices": devices,
            "sources": [driven, bottles("bottles", draw(st.sampled_from(LINES)))],
            "functions": [],
            "initial": {"positions": positions, "pressures_pag": {draw(st.sampled_from(LINES)): FULL}},
        },
        "zone": ["f"],
        "steps": steps,
        "locks": locks,
        "open_to_vent": [],
    }


@settings(max_examples=150, deadline=None)
@given(plan=_circuits())
def test_growing_one_set_finds_what_trying_every_stand_finds(plan: Entry) -> None:
    walked = walk(plan)
    state = walked.during_work
    free = freedoms(walked.circuit, state, state.locked)
    begin = origins(walked.circuit, state)
    every_stand = flood_every_stand(walked.circuit, frozenset(begin), free)
    assert every_stand is not None
    assert reach(walked.circuit, begin, free).hot == every_stand
