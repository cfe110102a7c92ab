"""What the gaps between parts say, and why a move of the hand is not possible."""

MESSAGES = {
    "gaps.overlap": "parts {one} and {other} overlap (pairs that do: {count}); where they touch nothing grows and "
    "the rest takes their current",
    "gaps.apart": "Hang them apart",
    "gaps": "{least} between parts {one} and {other}, the recipe asks for {asked} (pairs closer: {count})",
    "gaps.wider": "Hang them wider, or leave tips free between them",
    "racking.none": "no part is in hand. Choose one first",
    "racking.last": "one part stays: a load holds at least one",
    "racking.last_of_entry": "one part is left here: take the whole entry out in the records",
    "racking.no_tip": "no free tip is left on rack {rack}",
    "racking.no_room": "no free place on rack {rack} leaves room for the part",
    "racking.no_tip_there": "no free tip {direction} of here on rack {rack}",
    "racking.not_all_there": "the {count} parts in hand do not all find a free tip that way",
    "racking.no_side": "the tips are taken on their other side, or do not reach there, on rack {rack}",
    "racking.no_tips": "rack {rack} has no tips here: its parts hang at free positions",
    "racking.field_full": "no tip of this field and pattern is free",
    "racking.no_field": "`{field}` is no field of tips. Name two tips (A1-C4), a row (A) or rows (A-C)",
    "racking.not_free": "a part on a tip stays there: only parts at free positions are aligned or spaced",
    "racking.mixed": "parts on tips and parts at free positions do not move together. Choose parts of one kind",
    "racking.three": "fewer than three parts are in hand: between two there is nothing to space",
    "racking.off_the_rack": "the part would leave rack {rack}",
    "racking.next_place": "free places have no next one: add a place in the records",
    "racking.too_few": "rack {rack} takes {count} of the {parts} parts",
    "racking.hangs_otherwise": "rack {rack} hangs parts otherwise: tips and free positions do not replace each other",
}
