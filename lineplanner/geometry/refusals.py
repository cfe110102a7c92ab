"""Everything that is wrong with a part, all at once, each with its place. Nothing is repaired silently."""

from lineplanner.errors import Problem
from lineplanner.geometry.face_rules import face_problems, zone_outline_problems
from lineplanner.geometry.faces import build_shape
from lineplanner.geometry.form_rules import plate_problems, section_problems, tube_problems, turned_problems
from lineplanner.geometry.outline_rules import outline_problems
from lineplanner.geometry.values import value_problems
from lineplanner.inputs.part import Part, Plate, Section, Tube, Turned


def problems(part: Part) -> list[Problem]:
    """What is wrong with a part: first single values, then outlines, form, and what is said of faces.

    Later rules speak once the earlier ones are content.
    """
    found = list(value_problems(part))
    if not found:
        found = [*_outline_problems(part), *zone_outline_problems(part)]
    if not found:
        found = list(_form_problems(part))
    return found or list(face_problems(build_shape(part, zones=False)))


def _outline_problems(part: Part) -> list[Problem]:
    if not isinstance(part, Plate | Section):
        return []
    found = outline_problems(part.outline, ("outline",))
    if isinstance(part, Section):
        for number, hollow in enumerate(part.hollows):
            found += outline_problems(hollow, ("hollows", number))
    return found


def _form_problems(part: Part) -> list[Problem]:
    match part:
        case Plate():
            return list(plate_problems(part))
        case Section():
            return list(section_problems(part))
        case Turned():
            return list(turned_problems(part))
        case Tube():
            return list(tube_problems(part))
        case _:
            return []
