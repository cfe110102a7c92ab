"""The sentences of what can be wrong with a part as drawn."""

PART_MESSAGES = {
    "not-finite": "the {field} is not a number that can be used. Give an ordinary number",
    "not-above": "the {field} {value} is not more than {limit}. Check number and unit",
    "not-below": "the {field} {value} is not less than {limit}. Check number and unit",
    "too-low": "the {field} {value} is less than the least allowed, {limit}. Check number and unit",
    "too-high": "the {field} {value} is more than the most allowed, {limit}. Check number and unit",
    # outlines
    "dimension-missing": "the shape `{shape}` needs its `{dimension}`. Add it",
    "dimension-not-used": "the shape `{shape}` has no `{dimension}`. Take it out, or choose another shape",
    "corners-too-few": "an outline of {count} corners encloses nothing. Give at least {least}",
    "corner-repeated": "corner {corner} lies on the corner before it, at ({u}, {v}). Take one of the two out",
    "bulge-too-large": "the bulge {bulge} is more than a half circle over this side. At most {limit}: add a corner",
    "corner-radius-too-large": "the corner radius {radius} does not fit. It can be {limit} at most",
    "ring-inner-not-smaller": "the inner diameter {inner} is not smaller than the outer one, {outer}. Check both",
    "outline-crosses-itself": "the outline crosses or touches itself at ({u}, {v}). Check the order of the corners",
    # openings
    "slot-shorter-than-wide": "`{slot}` is {length} long and {width} wide. Give the longer one as length",
    "blind-too-deep": "`{opening}` is {depth} deep in {limit} of metal. Leave the depth out if it goes through",
    "opening-outside-outline": "`{opening}` lies outside the outline, at ({u}, {v}). Check its place",
    "opening-breaks-edge": "`{opening}` breaks through the edge: its middle is {distance} from it and needs more "
    "than {needed}. Draw a notch as part of the outline",
    "openings-overlap": "`{opening}` and `{other}` run into each other: {distance} between their middles, more "
    "than {needed} needed. Draw them as one",
    "hollow-not-simple": "`{hollow}` is a ring. Draw its outer line only: a hollow holds no metal",
    # tubes and turned parts
    "tube-inner-not-smaller": "the inner diameter {inner} is not smaller than the outer one, {outer}. Check both",
    "profile-too-short": "a profile of {count} points has no length. Give at least a bottom and a top",
    "profile-goes-back": "the profile goes back from {before} to {axis}. Give the points from bottom to top",
    "profile-point-repeated": "the point at {axis} with radius {radius} is there twice. Take one out",
    "profile-shoulder-twice": "there are more than two points at {axis}. A shoulder has two: radius before and after",
    "profile-flange-without-thickness": "the end face at {axis} would be a flange without thickness. Check the radii",
    "profile-without-body": "the part has no body at {axis}, where its radius is nothing. Check the radius",
    "bores-share-mouth": "another bore opens at the {mouth} already. Give one through, or one from each end",
    "bores-meet": "the bores from both ends are {depth} deep together in {limit}. Give one through bore",
    "bore-too-large": "the bore of {diameter} does not fit in the part, {part_diameter} wide at {axis}. Check both",
    # faces
    "face-unknown": "`{face}` is not a face of this part. Its faces: {known}",
    "zone-place-not-used": "a place without an outline says nothing. Add the outline of the zone, or take `at` out",
    "zone-and-band": "the stop-off on `{face}` is given as outline and as band. Keep one of the two",
    "zone-not-flat": "`{face}` is not flat. Give its stop-off as a band with `start` and `end`",
    "zone-misses-face": "the zone does not touch `{face}`. Check its place",
    "band-not-along-axis": "`{face}` does not run along the axis. Cover all of it, or give an outline",
    "band-outside-face": "{value} is beyond `{face}`, which runs from {low} to {high}. Check the band",
    "band-empty": "the band from {start} to {end} covers nothing. Check both ends",
    "textures-overlap": "two surface factors hold for one place on `{face}`. Part the bands",
    "contact-larger-than-face": "the contacts on `{face}` cover {area}, more than the {limit} there. Check both",
}
