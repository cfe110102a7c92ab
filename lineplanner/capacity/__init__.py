"""Program and line give findings: it compares, it never derives again."""

from lineplanner.capacity.binding import binding, can_bind
from lineplanner.capacity.bus import check_bus, check_joints
from lineplanner.capacity.contacts import check_contacts
from lineplanner.capacity.propose import Proposal, propose
from lineplanner.capacity.rack import check_rack
from lineplanner.capacity.rectifier import check_rectifier
from lineplanner.capacity.services import check_cooling, check_hydrogen, check_titanium_volts

__all__ = [
    "Proposal",
    "binding",
    "can_bind",
    "check_bus",
    "check_contacts",
    "check_cooling",
    "check_hydrogen",
    "check_joints",
    "check_rack",
    "check_rectifier",
    "check_titanium_volts",
    "propose",
]
