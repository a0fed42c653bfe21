"""Sections as plates: shapes, nominal and remaining properties, slenderness.

>>> stacked = stack([built(section) for section in sections])
>>> left = properties(stacked, stacked.thickness * 0.9)
"""

from models.section.nominal import Built, built, depth_in_plane
from models.section.plate import Plate
from models.section.registry import SHAPES, faults, plate_names, shape_of
from models.section.shape import Key, Option, Shape
from models.section.sheet import write_plates, write_section
from models.section.slenderness import Plates, Ring, Strip, WrittenPlates, plates_of
from models.section.stacked import Stack, centroid_shift, properties, stack
from models.section.values import Properties

__all__ = [
    "SHAPES",
    "Built",
    "Key",
    "Option",
    "Plate",
    "Plates",
    "Properties",
    "Ring",
    "Shape",
    "Stack",
    "Strip",
    "WrittenPlates",
    "built",
    "centroid_shift",
    "depth_in_plane",
    "faults",
    "plate_names",
    "plates_of",
    "properties",
    "shape_of",
    "stack",
    "write_plates",
    "write_section",
]
