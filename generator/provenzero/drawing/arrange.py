"""The whole circuit on as few sheets as it needs.

The rules, in this order. Everything that makes or stores pressure stands left of a corridor, from the foot up: reservoir,
pumps, header, banks, nitrogen, air, panels. Everything that spends it stands right, from the top down: regulators with
their bypasses, then the functions in the order of the description. Each piece is a row that reads from left to right;
the lines that rows share run up and down in the corridor. What does not fit goes on to the next sheet, where the same
shared lines stand again under the same letters; sheets with functions alone carry two corridors.
"""

from collections.abc import Sequence
from dataclasses import dataclass

from provenzero.drawing.alternative import alternative
from provenzero.drawing.banks import bank_block, header_block
from provenzero.drawing.block import Block
from provenzero.drawing.canvas import Canvas
from provenzero.drawing.functions import function_block
from provenzero.drawing.legend import legend_block
from provenzero.drawing.marks import Marks
from provenzero.drawing.model import Drawing
from provenzero.drawing.pumps import pump_block
from provenzero.drawing.regulators import bypass_block, regulator_block
from provenzero.drawing.remote import air_block, backup_block, panel_block
from provenzero.drawing.reservoir import reservoir_block
from provenzero.drawing.route import corridor, draw_corridor, raised, stacked, vertical, width_of
from provenzero.drawing.scene import AIR, Scene, letters_of
from provenzero.drawing.wording import ENGLISH, Wording
from provenzero.network.devices.pumps import LIQUID
from provenzero.network.model import LineId, Network
from provenzero.unit.model import ATMOSPHERE, HEADER, RESERVOIR, RETURNS, Unit

WIDTH_MM = 190.0
HEIGHT_MM = 250.0
