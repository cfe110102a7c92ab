"""lineplanner plans anodizing and hard-chrome loads: amperes, ramp, minutes.

One pure engine, two thin shells. Data flows one way, like a load through the line; a room may use the
rooms below it, never those above.

    __main__    the door: screens without a command, else the command
    tui         the screens                          cli         the headless commands
    report      a plan as text, card and JSON        log         what was run and measured
    files       sites on disk: read, checked, saved
    units       text with a unit to SI, and back

    advice      whatever runs the plan more than once
    plan        the pipeline, one line per stage
    cautions    when a caution applies, and its words
    capacity    program against line                 spread      current distribution over the rack
    program     current, stages, minutes
    circuit     resistance and drop, rectifier to part
    load        the areas of the load, item by item  racking     what each move of the hand does to a load
    geometry    outlines, solids, the three areas    bath        what the solution does
    inputs      records of what a file or form describes
    findings    ok, note, caution, stop
    trace       a figure with its story
    quantities  units in the types                   errors      what cannot be computed
    sources     numbers with their status

Everything from advice down is the engine: no files, no clock, no environment, SI floats throughout.
"""

__version__ = "0.1.0"
