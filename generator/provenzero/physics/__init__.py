"""Formulas of gas, liquid, flow and energy on plain SI floats; they know no unit of a unit and no network.

Every name says its unit: `_pa` is absolute pressure or a difference, `_pag` gauge pressure, both in pascal;
`_k` kelvin, `_m3` cubic metres. "Slow" is a change in which the gas keeps its temperature (isothermal),
"fast" one in which it exchanges no heat (isentropic); what happens lies between the two. Only the standard
library is needed at run time.
"""
