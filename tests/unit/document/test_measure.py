"""Figures in words: bands, unknowns, and zero only where it is zero."""

from provenzero.document.measure import Measure
from provenzero.document.wording import Wording
from provenzero.quantity import METRIC, US

PSI = 6894.757293168361
NB = "\u00a0"


def test_a_band_says_its_unit_once(wording: Wording) -> None:
    measure = Measure(units=US, wording=wording)
    assert measure.volumes((0.0379, 0.0757)) == f"10.0 to 20.0{NB}gal"
    assert measure.pressures((2700 * PSI, 3000 * PSI)) == f"2700 to 3000{NB}psi"


def test_a_band_without_width_is_one_figure(wording: Wording) -> None:
    assert Measure(units=METRIC, wording=wording).energies((5e6, 5e6)) == f"5000{NB}kJ"


def test_a_band_over_two_units_of_time_keeps_both(wording: Wording) -> None:
    assert Measure(units=US, wording=wording).durations((30.0, 300.0)) == f"30{NB}s to 5{NB}min"


def test_what_is_not_known_is_said_to_be_not_known(wording: Wording) -> None:
    measure = Measure(units=US, wording=wording)
    told = [measure.volumes(None), measure.volume(None), measure.energies(None), measure.durations(None)]
    told += [measure.temperatures(None), measure.pressures(None)]
    assert set(told) == {"not known"}


def test_a_trace_of_pressure_is_never_printed_as_zero(wording: Wording) -> None:
    measure = Measure(units=US, wording=wording)
    assert measure.pressures((0.0, 3.0)) == f"0 to 0.1{NB}psi"
    assert measure.pressure(3.0) != measure.pressure(0.0)


def test_a_pressure_below_zero_is_printed_as_zero(wording: Wording) -> None:
    assert Measure(units=US, wording=wording).pressures((-5.0, 0.0)) == f"0{NB}psi"
