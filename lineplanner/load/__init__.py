"""Parts x placement + rack + thieves: the areas of the load, item by item."""

from lineplanner.load.areas import Item, LoadAreas, load_areas
from lineplanner.load.metal import Metal, conductor_named

__all__ = ["Item", "LoadAreas", "Metal", "conductor_named", "load_areas"]
