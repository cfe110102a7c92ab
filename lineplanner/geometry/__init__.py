"""From the drawing of a part to its areas: what is wet, what carries current, where thickness is promised.

outline.py   closed lines: exact area and length, chords where a level has to cut them
pose.py      how a part hangs, and the height of each of its points
surface.py   what a face can be: flat, straight wall, share of a box; round.py: a wall around an axis
faces.py     the faces of a part, form by form; zones.py cuts stop-off polygons into them
refusals.py  everything that is refused, with its place; by subject: values.py, outline_rules.py,
             form_rules.py, opening_rules.py, face_rules.py
shape.py     the checked faces of a part, and its extent in the rack plane
counting.py  what of a face counts: masks, bands, contact marks, hole rules
areas.py     the three areas, face by face
measure.py   volume and drawn area; drawing.py: the outline as placed; pockets.py: gas and solution kept
"""

from lineplanner.geometry.areas import FaceRow, Ledger, ledger
from lineplanner.geometry.counting import Reason
from lineplanner.geometry.drawing import silhouette
from lineplanner.geometry.measure import drawn_total, volume
from lineplanner.geometry.outline import drawing_rings, edge_length, enclosed_area
from lineplanner.geometry.pockets import traps_gas, traps_liquid
from lineplanner.geometry.pose import Pose
from lineplanner.geometry.refusals import problems
from lineplanner.geometry.shape import extent, shape_of

__all__ = [
    "FaceRow", "Ledger", "Pose", "Reason", "drawing_rings", "drawn_total", "edge_length", "enclosed_area",
    "extent", "ledger", "problems", "shape_of", "silhouette", "traps_gas", "traps_liquid", "volume",
]  # fmt: skip
