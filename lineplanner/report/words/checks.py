"""What recipe, alloy, substrate and window say of a run; value and limit are facts of every comparison."""

MESSAGES = {
    # the load
    "area-stated": "{part}: stated area {stated}, drawn {drawn}, {value} apart",
    "area-stated.measure": "Measure one part again, or correct the drawing; the drawn area is in use",
    "level.dry": "{count} x {part}: no part of them is in the solution",
    "level.raise": "Raise the solution, or hang the parts lower",
    "level.nothing-wet": "Nothing on this rack is in the solution, so there is nothing to set",
    "recipe-base": "{part} is of {base}; the recipe is for {bases}",
    "recipe-base.choose": "Choose a recipe for {base}, or let the owner of the recipe add it",
    "deviation.outside": "{setting} {here}, outside the range of the recipe around {filed}",
    "deviation.unnamed": "{setting} {here}, a setting that the recipe leaves to the tables",
    "deviation.owner": "Have the owner of the recipe agree, or go back to the recipe",
    "places.counted": "Parts are only counted: all of them taken as in the solution, places and contacts not known",
    "places.hang": "Name tips or places in the load",
    "bath-temperature": "Bath at {bath}, outside the recipe's range around {recipe}",
    "bath-temperature.bring": "Bring the bath to {recipe} before loading",
    "rectifier.none": "No rectifier of this line feeds tank {tank}",
    "rectifier.enter": "Add tank {tank} to a rectifier of the line, or choose another tank",
    # the aim
    "aim.unreachable": "No time reaches the aim of {limit}; at most {value} comes",
    "aim.more-current": "Raise the current density, cool the bath, or lower the aim",
    "voltage-limit.short": "Volts reach their limit {limit} after {time}; the longest extension "
    "allowed gives only {thickness}",
    "voltage-limit.reached": "Volts reach their limit {limit} after {time}; the current falls from there, "
    "and the run takes {stretch} longer",
    "voltage-limit.lower": "Lower the current density, or take parts off until the volts stay below {limit}",
    # anodizing
    "mixed-alloys": "Alloys that should not share a rack: {families}",
    "mixed-alloys.part": "Run each alloy family on a rack of its own",
    "burning": "{family} at {value}; usual limit {limit}",
    "burning.lower": "Lower the current density to {limit} or less",
    "ceiling": "{family}: {value} of film; practical ceiling {limit}",
    "ceiling.ask": "Agree on a thinner film with the customer",
    "soft-film": "{family}: loss to the acid is {value} of the film; outer film turns soft from {limit}",
    "soft-film.faster": "Raise the current density or cool the bath, so that the run is shorter",
    "growth-law.apart": "The other growth law ({law}) gives {other}: {apart} apart",
    "growth-law.coupon": "Run a coupon of this alloy and enter it in the bath's file",
    # hard chrome
    "bright-window.high": "{value} is above the bright window, which ends at {limit} in this bath: rough or burnt "
    "edges",
    "bright-window.lower": "Lower the current density to {limit}, or warm the bath",
    "bright-window.low": "{value} is below the bright window, which begins at {limit} in this bath: milky deposit",
    "bright-window.raise": "Raise the current density to {limit}, or cool the bath",
    "efficiency-range": "{condition} is outside the range the efficiency model was fitted to",
    "efficiency-range.coupon": "Plate a coupon under these conditions and enter it in the bath's file",
    "efficiency-cap": "Efficiency taken at the ceiling of its model",
    "preset.no-reverse": "{substrate} is not etched in reverse, and the recipe does it",
    "preset.follow": 'Write `reverse = "none"` in the recipe, or get its owner to confirm',
    "preset.no-soak": "{substrate} is not soaked in the plating bath, and the recipe does it",
    "preset.fluoride-soak": "The recipe soaks in a bath that holds fluoride, which attacks the steel",
    "preset.preheat": "Warm the parts in hot water instead",
    "steel-strength.unknown": "{part}: strength and hardness of the steel are not known; taken as the worst case",
    "steel-strength.enter": "Enter tensile strength or hardness in the material's file",
    "design-authority.entered": "{part} is steel of {limit} or more, or as hard; authority entered: {authority}",
    "design-authority.missing": "{part} is steel of {limit} or more, or as hard, and no authority of the "
    "design owner is entered",
    "design-authority.enter": "Get the design owner's written authority, and enter document and date in the recipe",
    # the window
    "band-minimum.ok": "Low end of the band {value}, minimum {limit}",
    "band-minimum.out": "Low end of the band {value} is under the minimum {limit}",
    "band-maximum.ok": "High end of the band {value}, maximum {limit}",
    "band-maximum.out": "High end of the band {value} is over the maximum {limit}",
    "band.none-cures": "No time brings both ends of the band in: narrow it with a coupon, a measured "
    "area or better racking",
    "band.longer": "Run {time} in all; {thickness} is then expected",
    "band.shorter": "Run {time} in all; {thickness} is then expected",
}
