"""Findings read well on one line and steer no terminal."""

import pytest

from provenzero.finding import Finding, Place, Severity, has_errors, in_order


def finding(line: int | None = 12, severity: Severity = Severity.ERROR, found: str = "'3000'") -> Finding:
    place = Place(file="rig.yaml", line=line, column=5 if line else None, path="pumps[0].start_pressure")
    return Finding(place=place, found=found, expected="a pressure such as 3000 psi", severity=severity)


def test_a_finding_is_one_line_with_place_path_found_and_expected() -> None:
    assert str(finding()) == (
        "rig.yaml:12:5: pumps[0].start_pressure: found '3000'; expected a pressure such as 3000 psi"
    )


def test_a_warning_says_so() -> None:
    assert str(finding(severity=Severity.WARNING)).startswith("rig.yaml:12:5: pumps[0].start_pressure: warning: ")


@pytest.mark.parametrize(
    ("place", "text"),
    [
        (Place(file="rig.yaml"), "rig.yaml"),
        (Place(file="rig.yaml", line=3), "rig.yaml:3"),
        (Place(file="rig.yaml", path="unit"), "rig.yaml: unit"),
    ],
)
def test_a_place_leaves_out_what_is_not_known(place: Place, text: str) -> None:
    assert str(place) == text


def test_characters_that_could_steer_a_terminal_are_shown_instead_of_sent() -> None:
    text = str(finding(found="'\x1b[2J\nrm\u202egpj'"))
    assert text.isprintable()
    assert "\\x1b[2J\\nrm\\u202egpj" in text


def test_a_space_that_does_not_break_is_a_space_on_the_terminal() -> None:
    assert "'3000 psi'" in str(finding(found="'3000\u00a0psi'"))


def test_findings_come_in_the_order_of_the_file() -> None:
    assert [f.place.line for f in in_order([finding(30), finding(None), finding(4)])] == [None, 4, 30]


def test_findings_of_one_line_come_in_the_order_of_its_columns() -> None:
    places = [Place(file="rig.yaml", line=1, column=column) for column in (9, 2)]
    ordered = in_order(Finding(place=place, found="x", expected="y") for place in places)
    assert [finding.place.column for finding in ordered] == [2, 9]


def test_warnings_alone_are_no_errors() -> None:
    assert not has_errors([finding(severity=Severity.WARNING)])
    assert has_errors([finding(severity=Severity.WARNING), finding()])
