"""The chemistry of stillroom: the shelf of liquids and the forces between their molecules.

>>> from stillroom.chem import interact, load_shelf
>>> shelf = load_shelf()
>>> interact(shelf["acetone"], shelf["cyclohexane"]).verdict
'sound'
"""

from stillroom.chem.data.errors import StillroomError
from stillroom.chem.data.values import Value
from stillroom.chem.forces.angle_average import angle_average
from stillroom.chem.liquids.liquid import Liquid
from stillroom.chem.pairs.pair import PairInteraction, interact
from stillroom.chem.pairs.ranking import rank_pairs
from stillroom.chem.shelf.shelf import Shelf, load_shelf

__all__ = [
    "Liquid",
    "PairInteraction",
    "Shelf",
    "StillroomError",
    "Value",
    "angle_average",
    "interact",
    "load_shelf",
    "rank_pairs",
]
