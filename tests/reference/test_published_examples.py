"""Worked examples that others have published, in their own units, and figures a mechanic meets on a unit."""

import pytest

from provenzero.physics.accumulator import (
    GasCharge,
    gas_volume_m3,
    ideal_precharge_at_temperature_pag,
    nitrogen_mass_kg,
    precharge_at_temperature_pag,
    temperature_at_pressure_k,
    usable_ideal_absolute_m3,
    usable_ideal_gauge_m3,
    usable_slow_m3,
)
from provenzero.physics.discharge import bleed_fast, deliver_fast, deliver_slow, rebound_pag, rewarmed_pag
from provenzero.physics.drawdown import bottles_from_slow, precharge_by_hand_rule_pag
from provenzero.physics.energy import (
    bottle_energy_j,
    bottle_expansion_work_j,
    safe_distance_m,
    stored_gas_energy_j,
    tnt_equivalent_kg,
)
from provenzero.physics.flow import valve_flow_m3_s
from provenzero.physics.gas import compressibility_factor, free_volume_m3, gas_density_kg_m3
from provenzero.physics.liquid import (
    HOSE_BULK_MODULUS_PA,
    air_compliance_per_pa,
    effective_bulk_modulus_pa,
    liquid_properties,
    pipe_compliance_per_pa,
)
from provenzero.physics.preventer import closing_pressure_pa
from provenzero.physics.trapped import pressure_rise_pa_k, released_volume_m3

PSI = 6894.757293168  # Pa, NIST SP 811
GALLON = 0.003785411784  # m3, US gallon, NIST SP 811
AIR = 101_325.0
ICE = 273.15
WARM = 293.15
PER_DEGF = 1.8  # per kelvin


def fahrenheit(degf: float) -> float:
    return (degf - 32.0) / 1.8 + ICE


def bottle(gallons: float = 10.0, precharge_psi: float = 1000.0, temperature: float = WARM) -> GasCharge:
    return GasCharge(
        gas_volume_m3=gallons * GALLON,
        precharge_pag=precharge_psi * PSI,
        precharge_temperature_k=temperature,
    )


# --- usable fluid by hand rules


def test_ten_gallon_bottle_by_the_hand_rule_with_gauge_pressures() -> None:
    # Crumpton, Well Control for Completions and Interventions, 2018, 4.9.7: gas takes 8.33 gal at 1200 psi
    # and 3.33 gal at 3000 psi, usable 5.0 gal.
    one = bottle()
    at_1200 = 10.0 - usable_ideal_gauge_m3(one, 1200 * PSI, 1000 * PSI) / GALLON
    at_3000 = 10.0 - usable_ideal_gauge_m3(one, 3000 * PSI, 1000 * PSI) / GALLON
    assert at_1200 == pytest.approx(8.33, abs=0.005)
    assert at_3000 == pytest.approx(3.33, abs=0.005)
    assert usable_ideal_gauge_m3(one, 3000 * PSI, 1200 * PSI) / GALLON == pytest.approx(5.0, abs=0.005)


def test_ten_gallon_bottle_by_the_hand_rule_with_absolute_pressures() -> None:
    # Teaching sheet to API RP 53: 1015, 3015, 1215 psia give 3.366 and 8.352 gal, usable 4.986 gal. The
    # sheet's own numbers give 10 * 1015/1215 = 8.354, so its usable volume is 0.002 gal short; an
    # atmosphere is 14.696 psi here.
    one = bottle()
    at_3000 = 10.0 - usable_ideal_absolute_m3(one, 3000 * PSI, 1000 * PSI) / GALLON
    assert at_3000 == pytest.approx(3.366, abs=0.001)
    assert usable_ideal_absolute_m3(one, 3000 * PSI, 1200 * PSI) / GALLON == pytest.approx(4.986, abs=0.002)


@pytest.mark.parametrize(("precharge", "usable"), [(750.0, 30.0), (1000.0, 40.0)])
def test_eighty_gallon_bank_gives_less_with_a_lower_precharge(precharge: float, usable: float) -> None:
    # Well-control article: 80 gal, 3000 to 1200 psi.
    bank = bottle(80.0, precharge)
    assert usable_ideal_gauge_m3(bank, 3000 * PSI, 1200 * PSI) / GALLON == pytest.approx(usable, abs=0.01)


def test_the_same_bottle_with_published_compressibility_factors() -> None:
    # Crumpton 2018, p. 182: Z 1.01, 1.02 and 1.06 at 1000, 1200 and 3000 psi give 4.91 gal. Those read from
    # a chart are 1.5 to 2 % above the reference equation at low pressure (0.995, 0.997, 1.058 at 20 degC;
    # 0.998, 1.001, 1.062 near 26 degC), so the 4.91 gal is not reproduced: 4.79 gal is.
    published = (1.01, 1.02, 1.06)
    pressures = (1000 * PSI + AIR, 1200 * PSI + AIR, 3000 * PSI + AIR)
    by_hand = 10 * pressures[0] / published[0] * (published[1] / pressures[1] - published[2] / pressures[2])
    assert by_hand == pytest.approx(4.91, abs=0.01)
    at_20 = [compressibility_factor(p, WARM) for p in pressures]
    assert at_20 == pytest.approx([0.995, 0.997, 1.058], abs=5e-4)
    assert [compressibility_factor(p, 299.0) for p in pressures] == pytest.approx([0.998, 1.001, 1.062], abs=6e-4)
    assert at_20 == pytest.approx(published, rel=0.025)
    assert usable_slow_m3(bottle(), 3000 * PSI, 1200 * PSI, WARM) / GALLON == pytest.approx(4.79, abs=0.005)


def test_precharge_from_a_drawdown_by_the_hand_rule() -> None:
    # Drilling formula collections (value from memory): 20 of 180 gal, 3000 to 2200 psi, 917 psi.
    shown = precharge_by_hand_rule_pag(20 * GALLON, 180 * GALLON, 3000 * PSI, 2200 * PSI)
    assert shown / PSI == pytest.approx(917.0, abs=0.5)


# --- liquid


def test_trapped_oil_in_a_rigid_container_gains_6900_psi() -> None:
    # Published engineering data for MIL-H-83282: 3.0e5 psi, 4.6e-4 per degF, 70 to 120 degF: 6900 psi; 3000
    # psi compresses it by 1.0 %.
    rise = pressure_rise_pa_k(4.6e-4 * PER_DEGF, 3.0e5 * PSI)
    assert rise * (fahrenheit(120) - fahrenheit(70)) / PSI == pytest.approx(6900.0, rel=1e-6)
    assert released_volume_m3(1.0, 3000 * PSI, 3.0e5 * PSI) == pytest.approx(0.010, rel=1e-6)


def test_trapped_mineral_oil_gains_about_eleven_bar_per_kelvin() -> None:
    # Fluid-power reference page: about 11 bar per degC, about 90 psi per degF.
    oil = liquid_properties("mineral_oil")
    low, high = (pressure_rise_pa_k(e, k) for e, k in zip(oil.expansion_per_k, oil.bulk_modulus_pa, strict=True))
    assert low < 11e5 < high
    assert low < 90 * PSI * PER_DEGF < high


def test_a_blocked_oil_line_goes_from_3000_to_3300_psi_in_about_three_degrees_fahrenheit() -> None:
    # Follows from the rule of thumb above: 300/90 = 3.3 degF.
    oil = liquid_properties("mineral_oil")
    degrees = [
        300 * PSI / pressure_rise_pa_k(e, k) * PER_DEGF
        for e, k in zip(oil.expansion_per_k, oil.bulk_modulus_pa, strict=True)
    ]
    assert min(degrees) < 3.3 < max(degrees)
    assert min(degrees) > 1.5
    assert max(degrees) < 5.0


def test_trapped_water_in_a_steel_pipe_stretches_the_pipe() -> None:
    # Pipe-engineering FAQ: dP = (af - av) dT/(b + D/(t E)), af 210e-6, av 36e-6 per degC, E 2e5 MPa. It
    # gives no result; by hand with b = 1/2180 MPa and D/t = 20: 174e-6/(4.587e-4 + 1.0e-4) MPa = 0.3114 MPa
    # per degC.
    stiff = effective_bulk_modulus_pa(2.18e9, pipe_compliance_per_pa(20.0, 2e11))
    assert pressure_rise_pa_k(210e-6, stiff, 36e-6) == pytest.approx(0.3114e6, rel=1e-3)


def test_effective_bulk_modulus_of_a_pipe_with_one_per_cent_of_air() -> None:
    # Published inputs: D/t 10 (steel, 30e6 psi), 1 % air at 500 psi, liquid 250 000 psi: 41 100 psi.
    effective = effective_bulk_modulus_pa(
        250_000 * PSI, pipe_compliance_per_pa(10.0, 30e6 * PSI), air_compliance_per_pa(0.01, 500 * PSI)
    )
    assert effective / PSI == pytest.approx(41_100, rel=1e-3)


@pytest.mark.parametrize(("specific_gravity", "gpm"), [(1.0, 50.0), (0.8, 55.9)])
def test_flow_through_a_valve_with_cv_ten(specific_gravity: float, gpm: float) -> None:
    # Control-valve texts: Cv 10, 25 psi.
    flow = valve_flow_m3_s(10.0, 25 * PSI, specific_gravity)
    assert flow / GALLON * 60 == pytest.approx(gpm, abs=0.05)


def test_a_released_hose_gives_back_only_little() -> None:
    # 1 in x 50 ft of hose, 7.7 L, from 3000 psi. Bands from memory. The least is that of a stiff hose, 0.16
    # L; the trade's figure of 0.1 to 0.3 L holds for effective moduli from 0.5 to 1.6 GPa, and the softest
    # hose of the band gives back 0.53 L.
    soft, stiff = (released_volume_m3(7.7, 3000 * PSI, k) for k in HOSE_BULK_MODULUS_PA)
    assert stiff == pytest.approx(0.16, abs=0.005)
    assert soft == pytest.approx(0.53, abs=0.005)


# --- rams


@pytest.mark.parametrize(("well", "ratio", "needed"), [(15_000.0, 7.0, 2143.0), (3000.0, 6.0, 500.0)])
def test_closing_pressure_against_a_well(well: float, ratio: float, needed: float) -> None:
    # Published training examples.
    assert closing_pressure_pa(well * PSI, ratio) / PSI == pytest.approx(needed, abs=0.5)


# --- energy


def test_stored_energy_with_the_printed_exponent() -> None:
    # ASME PCC-2, Article 501, Appendix II: 2.5 Pat V (1 - (Pa/Pat)^0.286), Pa = 101 kPa. By hand: 20.786
    # MPa, 10 L: 2.5 * 20.786e6 * 0.010 * (1 - 0.004859^0.286) = 406.3 kJ.
    assert stored_gas_energy_j(20.786e6, 0.010) == pytest.approx(406.3e3, rel=1e-3)


def test_tnt_and_distance_of_the_energy_limits() -> None:
    # ASME PCC-2, Article 501, Appendix II: 4 266 920 J/kg. Appendix III (2015): 30 m up to 135.5 MJ, 60 m
    # up to 271 MJ, or 20 (2 TNT)^(1/3) if that is more; by hand 20 * (2 * 31.76)^(1/3) = 79.8 m and 20 *
    # (127.0)^(1/3) = 100.5 m.
    assert tnt_equivalent_kg(135.5e6) == pytest.approx(31.76, abs=0.005)
    assert safe_distance_m(500e3) == 30.0
    assert safe_distance_m(135.5e6) == pytest.approx(79.8, abs=0.05)
    assert safe_distance_m(271e6) == pytest.approx(100.5, abs=0.05)


def test_energy_of_a_bottle_by_the_printed_formula_is_518_kj_charged_and_465_kj_drained() -> None:
    # The formula of ASME PCC-2, Article 501, App. II. The 518 kJ belong to the gas volume of Boyle's law
    # (3.366 gal); with the real gas volume, 3.577 gal, it is 550 kJ, which this program prints since it is
    # the volume that is there.
    one = bottle()
    charged, drained = 3000 * PSI + AIR, 1000 * PSI + AIR
    boyle = one.gas_volume_m3 * drained / charged
    assert stored_gas_energy_j(charged, boyle) == pytest.approx(518e3, abs=0.5e3)
    assert bottle_energy_j(one, 3000 * PSI, WARM) == pytest.approx(550e3, abs=0.5e3)
    assert gas_volume_m3(one, 3000 * PSI, WARM) / GALLON == pytest.approx(3.577, abs=5e-4)
    assert bottle_energy_j(one, 0.0, WARM) == pytest.approx(465e3, abs=0.5e3)
    assert stored_gas_energy_j(drained, one.gas_volume_m3) == pytest.approx(465e3, abs=0.5e3)


def test_real_expansion_work_of_a_bottle_hardly_falls_when_the_fluid_is_drained() -> None:
    # Reference equation of Span et al. (2000): about 435 and 433 kJ.
    assert bottle_expansion_work_j(bottle(), 3000 * PSI, WARM) == pytest.approx(435e3, abs=0.5e3)
    assert bottle_expansion_work_j(bottle(), 0.0, WARM) == pytest.approx(433e3, abs=0.5e3)


# --- nitrogen in the bottle; the figures are those of the reference equation through CoolProp, run beforehand


@pytest.mark.parametrize(
    ("psig", "celsius", "density"),
    [
        (1000, 0, 87.82),
        (1000, 20, 80.80),
        (1000, 40, 74.95),
        (3000, 0, 246.52),
        (3000, 20, 225.88),
        (3000, 40, 208.86),
    ],
)
def test_density_at_bottle_pressures(psig: float, celsius: float, density: float) -> None:
    assert gas_density_kg_m3(psig * PSI + AIR, ICE + celsius) == pytest.approx(density, abs=0.005)


@pytest.mark.parametrize(("celsius", "real", "ideal"), [(0, 919, 931), (40, 1081, 1069)])
def test_precharge_reads_otherwise_at_another_temperature(celsius: float, real: float, ideal: float) -> None:
    one = bottle()
    assert precharge_at_temperature_pag(one, ICE + celsius) / PSI == pytest.approx(real, abs=0.5)
    assert ideal_precharge_at_temperature_pag(one, ICE + celsius) / PSI == pytest.approx(ideal, abs=0.5)


def test_one_bottle_slow_fast_and_by_hand() -> None:
    one = bottle()
    assert usable_slow_m3(one, 3000 * PSI, 1200 * PSI, WARM) / GALLON == pytest.approx(4.79, abs=0.005)
    fast = bleed_fast(one, 3000 * PSI, WARM, 1200 * PSI)
    assert fast.delivered_m3 / GALLON == pytest.approx(2.34, abs=0.005)
    assert fast.gas_temperature_k - ICE == pytest.approx(-48.5, abs=0.5)
    assert usable_ideal_absolute_m3(one, 3000 * PSI, 1200 * PSI) / GALLON == pytest.approx(4.99, abs=0.005)


def test_twelve_bottles_worked_through_read_1000_psi_at_once_and_1530_psi_warm() -> None:
    given = sum((18.5, 5.6, 5.6, 5.6, 0.6, 0.6)) * GALLON
    bank = bottle(120.0)
    assert deliver_slow(bank, 3000 * PSI, WARM, given).fluid_pag / PSI == pytest.approx(1530, abs=1)
    straight = deliver_fast(bank, 3000 * PSI, WARM, given)
    assert straight.fluid_pag / PSI == pytest.approx(1000, abs=5)
    assert rewarmed_pag(bank, straight, WARM) / PSI == pytest.approx(1530, abs=1)


def test_eleven_bottles_recover_to_1466_psi_only_and_the_inverse_counts_them() -> None:
    given = 36.5 * GALLON
    after = deliver_slow(bottle(110.0), 3000 * PSI, WARM, given).fluid_pag
    assert after / PSI == pytest.approx(1466, abs=0.5)
    assert bottles_from_slow(bottle(), given, 3000 * PSI, after, WARM) == pytest.approx(11.0, abs=1e-6)


def test_a_bleed_shut_too_early_comes_back_to_about_1718_psi() -> None:
    # About 1718 psi was quoted; at 20 degC throughout it is 1720.
    assert rebound_pag(bottle(), 3000 * PSI, WARM, 1200 * PSI) / PSI == pytest.approx(1718, abs=3)


def test_after_a_fast_dump_the_gas_reads_about_520_psi_until_it_is_warm() -> None:
    one = bottle()
    dumped = bleed_fast(one, 3000 * PSI, WARM, 0.0)
    assert dumped.emptied
    assert dumped.fluid_pag == 0.0
    assert dumped.gas_pag / PSI == pytest.approx(520, abs=3)
    assert rewarmed_pag(one, dumped, WARM) / PSI == pytest.approx(1000, abs=1e-6)


def test_an_isolated_charged_bank_reaches_its_relief_near_107_degf() -> None:
    one = bottle(temperature=fahrenheit(70))
    reached = temperature_at_pressure_k(one, 3000 * PSI, fahrenheit(70), 3300 * PSI)
    assert (reached - ICE) * 1.8 + 32 == pytest.approx(107, abs=0.5)


def test_nitrogen_of_one_bottle_fills_two_and_a_half_cubic_metres() -> None:
    mass = nitrogen_mass_kg(bottle())
    assert mass == pytest.approx(3.05, abs=0.01)
    assert free_volume_m3(mass) == pytest.approx(2.6, abs=0.05)


def test_sixteen_bottles_dump_about_103_gallons() -> None:
    bank = bottle(160.0)
    assert bleed_fast(bank, 3000 * PSI, WARM, 0.0).delivered_m3 / GALLON == pytest.approx(103, abs=0.5)
    assert usable_ideal_absolute_m3(bank, 3000 * PSI, 0.0) / GALLON == pytest.approx(106, abs=0.5)
