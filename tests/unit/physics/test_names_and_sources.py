"""A number in this room says its unit in its name, and a formula says where it is from."""

import ast
import dataclasses
import importlib
import inspect
import pkgutil
import re
import sys
import types
import typing
from collections.abc import Callable, Iterator
from pathlib import Path

import pytest

from provenzero import physics

# Suffix of a name, and the unit as the docstring writes it; the longest suffix that fits counts.
UNITS = {
    "pa": "Pa",
    "pag": "Pa",
    "k": "K",
    "m": "m",
    "m2": "m2",
    "m3": "m3",
    "kg": "kg",
    "j": "J",
    "s": "s",
    "kg_m3": "kg/m3",
    "m3_s": "m3/s",
    "m_s2": "m/s2",
    "j_kg": "J/kg",
    "j_kg_k": "J/(kg K)",
    "pa_s": "Pa s",
    "pa_k": "Pa/K",
    "per_k": "1/K",
    "per_pa": "1/Pa",
    "m_per_cbrt_kg": "m/kg^(1/3)",
}
STANDARD_LIBRARY_ONLY = {"collections", "dataclasses", "functools", "math", "typing"}
NUMBERS = re.compile(r"\bfloat\b|\bBand\b")


def modules() -> list[types.ModuleType]:
    found = pkgutil.iter_modules(physics.__path__, "provenzero.physics.")
    return [importlib.import_module(each.name) for each in found]


def public(module: types.ModuleType, kind: Callable[[object], bool]) -> Iterator[tuple[str, typing.Any]]:
    for name, thing in vars(module).items():
        if not name.startswith("_") and kind(thing) and thing.__module__ == module.__name__:
            yield name, thing


def unit_of(name: str) -> str | None:
    fitting = [suffix for suffix in UNITS if name == suffix or name.endswith("_" + suffix)]
    return UNITS[max(fitting, key=len)] if fitting else None


def described(docstring: str, section: str) -> str:
    after = docstring.split(f"\n{section}:\n", 1)
    return after[1].split("\n\n", 1)[0] if len(after) > 1 else ""


def entry(docstring: str, parameter: str) -> str:
    match = re.search(
        rf"^ +\*?{parameter}: (.*?)(?=^    \S|\Z)", described(docstring, "Args"), re.MULTILINE | re.DOTALL
    )
    return match.group(1) if match else ""


def says(text: str, name: str) -> bool:
    """Tell whether the text gives the unit that the name says, or calls the number dimensionless."""
    if "[-" in text:
        return True
    unit = unit_of(name)
    return unit is not None and f"[{unit}]" in text


def faults_of(function: Callable[..., object]) -> list[str]:
    docstring = inspect.getdoc(function) or ""
    signature = inspect.signature(function)
    faults = [
        f"parameter {name}"
        for name, parameter in signature.parameters.items()
        if "Callable" not in str(parameter.annotation)
        and NUMBERS.search(annotation(parameter.annotation))
        and not says(entry(docstring, name), name)
    ]
    if NUMBERS.search(annotation(signature.return_annotation)) and not says(
        described(docstring, "Returns"), function.__name__
    ):
        faults.append("return value")
    if not re.search(r"^Source: \S", docstring, re.MULTILINE):
        faults.append("source")
    return faults


def annotation(hint: object) -> str:
    return hint.__name__ if isinstance(hint, type) else str(hint)


FUNCTIONS = [function for module in modules() for _, function in public(module, inspect.isfunction)]
CLASSES = [each for module in modules() for _, each in public(module, inspect.isclass)]


@pytest.mark.parametrize("function", FUNCTIONS, ids=lambda f: f.__name__)
def test_every_public_formula_names_its_units_and_its_source(function: Callable[..., object]) -> None:
    assert faults_of(function) == []


@pytest.mark.parametrize("kind", CLASSES, ids=lambda c: c.__name__)
def test_every_public_field_that_is_a_number_names_its_unit(kind: type) -> None:
    text = inspect.getsource(kind)
    for field in dataclasses.fields(kind):
        if NUMBERS.search(annotation(field.type)) and unit_of(field.name) is None:
            assert re.search(rf"^ +{field.name}\b.*\[-|^ +# .*\n +{field.name}: tuple", text, re.MULTILINE), field


def test_there_is_something_to_look_at() -> None:
    assert len(FUNCTIONS) > 50
    assert len(CLASSES) > 5


def test_the_check_sees_a_name_without_unit_a_wrong_unit_and_a_missing_source() -> None:
    def volume(pressure: float, bore_m: float) -> float:
        """Give a volume.

        Args:
            pressure: Absolute pressure [Pa].
            bore_m: Inner diameter [mm].

        Returns:
            Volume [m3].
        """
        return pressure * bore_m

    assert faults_of(volume) == ["parameter pressure", "parameter bore_m", "return value", "source"]


def test_nothing_but_the_standard_library_is_imported() -> None:
    for module in modules():
        assert module.__file__ is not None
        for node in ast.walk(ast.parse(Path(module.__file__).read_text(encoding="utf-8"))):
            if isinstance(node, ast.Import):
                names = [alias.name for alias in node.names]
            elif isinstance(node, ast.ImportFrom):
                names = [node.module or ""]
            else:
                continue
            for name in names:
                assert name.split(".")[0] in STANDARD_LIBRARY_ONLY or name.startswith("provenzero.physics.")
    assert sys.stdlib_module_names >= STANDARD_LIBRARY_ONLY
