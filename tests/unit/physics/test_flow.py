"""Flow through valves, orifices and pipes."""

import math

import pytest

from provenzero.physics.flow import (
    GALLON_M3,
    PSI_PA,
    friction_factor,
    orifice_flow_m3_s,
    pipe_flow_m3_s,
    pipe_pressure_drop_pa,
    reynolds_number,
    valve_flow_m3_s,
    valves_in_series,
)


def colebrook(reynolds: float, roughness: float) -> float:
    # Colebrook and White (1939), solved by repeated substitution: a formula other than the one under test.
    root = 8.0
    for _ in range(50):
        root = -2.0 * math.log10(roughness / 3.7 + 2.51 * root / reynolds)
    return 1.0 / (root * root)


@pytest.mark.parametrize("reynolds", [1.0, 100.0, 1000.0])
def test_laminar_friction_is_64_over_reynolds(reynolds: float) -> None:
    # Hagen and Poiseuille.
    assert friction_factor(reynolds) == pytest.approx(64.0 / reynolds, rel=1e-3)


@pytest.mark.parametrize("roughness", [0.0, 1e-4, 1e-3, 1e-2])
@pytest.mark.parametrize("reynolds", [1e4, 1e5, 1e6, 1e7])
def test_turbulent_friction_is_that_of_colebrook_and_white(reynolds: float, roughness: float) -> None:
    # Churchill (1977) states a few per cent against the chart of Moody.
    assert friction_factor(reynolds, roughness) == pytest.approx(colebrook(reynolds, roughness), rel=0.035)


def test_friction_at_one_published_point() -> None:
    # Worked example in the documentation of the `fluids` library: Churchill (1977), Re 1e5, roughness 1e-4,
    # gives 0.018462624566 (value from memory).
    assert friction_factor(1e5, 1e-4) == pytest.approx(0.018462624566, rel=1e-9)


def test_gallon_and_psi_are_the_exact_ones() -> None:
    # NIST SP 811, appendix B: 3.785 411 784 L and 6894.757 Pa.
    assert pytest.approx(3.785411784e-3, rel=1e-12) == GALLON_M3
    assert pytest.approx(6894.757, rel=1e-7) == PSI_PA


def test_slow_oil_in_a_hose_follows_hagen_and_poiseuille() -> None:
    # By hand: 1 in, 15 m, 0.1 Pa s, 1 L/s: 128 * 0.1 * 15 * 1e-3/(pi * 0.0254^4) = 146.8 kPa at Re = 436.
    assert reynolds_number(1e-3, 0.0254, 870.0, 0.1) == pytest.approx(436, abs=1)
    assert pipe_pressure_drop_pa(1e-3, 0.0254, 15.0, 870.0, 0.1) == pytest.approx(146.8e3, rel=1e-3)


@pytest.mark.parametrize("viscosity", [1e-3, 1e-2, 0.1, 0.5])
@pytest.mark.parametrize("drop", [1e2, 1e4, 1e6, 2e7])
def test_flow_in_a_pipe_and_its_loss_belong_together(drop: float, viscosity: float) -> None:
    flow = pipe_flow_m3_s(drop, 0.0254, 15.0, 870.0, viscosity)
    assert pipe_pressure_drop_pa(flow, 0.0254, 15.0, 870.0, viscosity) == pytest.approx(drop, rel=1e-9)


def test_nothing_flows_without_a_difference() -> None:
    assert pipe_flow_m3_s(0.0, 0.0254, 15.0, 870.0, 0.1) == 0.0
    assert pipe_pressure_drop_pa(0.0, 0.0254, 15.0, 870.0, 0.1) == 0.0
    assert valve_flow_m3_s(10.0, 0.0, 1.0) == 0.0
    assert valve_flow_m3_s(0.0, 1e6, 1.0) == 0.0
    assert orifice_flow_m3_s(1e-4, 0.0, 870.0) == 0.0


def test_a_jet_from_an_orifice_has_the_speed_of_torricelli() -> None:
    # By hand: 1 mm2, 20 MPa, 870 kg/m3: sqrt(2 * 20e6/870) = 214.4 m/s, times 0.61.
    assert orifice_flow_m3_s(1e-6, 20e6, 870.0) == pytest.approx(0.61 * 214.4e-6, rel=1e-3)
    assert orifice_flow_m3_s(1e-6, 20e6, 870.0, 1.0) == pytest.approx(214.4e-6, rel=1e-3)


def test_two_equal_valves_in_series_pass_less_than_one_by_root_two() -> None:
    assert valves_in_series(10.0, 10.0) == pytest.approx(10.0 / math.sqrt(2.0))
    assert valves_in_series(10.0) == pytest.approx(10.0)
    assert valves_in_series(0.1, 100.0) == pytest.approx(0.1, rel=1e-5)
    with pytest.raises(ValueError, match="at least one Cv"):
        valves_in_series()
    with pytest.raises(ValueError, match="flow_coefficients"):
        valves_in_series(1.0, 0.0)


def test_impossible_flows_are_refused() -> None:
    with pytest.raises(ValueError, match="pressure_drop_pa"):
        valve_flow_m3_s(1.0, -1.0, 1.0)
    with pytest.raises(ValueError, match="specific_gravity"):
        valve_flow_m3_s(1.0, 1.0, 0.0)
    with pytest.raises(ValueError, match="bore_m"):
        reynolds_number(1.0, 0.0, 870.0, 0.1)
    with pytest.raises(ValueError, match="viscosity_pa_s"):
        pipe_flow_m3_s(1e5, 0.0254, 15.0, 870.0, 0.0)
    with pytest.raises(ValueError, match="relative_roughness"):
        friction_factor(1e5, 0.1)
