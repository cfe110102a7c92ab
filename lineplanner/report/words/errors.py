"""What cannot be computed, and what a command was asked for that is not there: what is wrong, what to do."""

MESSAGES = {
    "conductivity.aluminium": "{aluminium} of dissolved aluminium is more than the acid could bind. Check the "
    "analysis in the bath's file",
    "conductivity.metals": "trivalent chromium {trivalent_chromium} and iron {iron} leave no conductivity in the "
    "model. Check the analysis in the bath's file",
    "acid.strength": "sulfuric acid of {acid} is past the density table. Check the analysis in the bath's file",
    "dilution.share": "a hydrogen share must be more than 0 and less than 1. Check the limits table",
    "exhaust.negative": "a flow of {exhaust} is below zero. Check the exhaust in the line's file",
    "coupons.same-time": "two coupons of the same time cannot be told apart. Keep one, or run one at another "
    "current density",
    "bake.refer": "no bake time is tabled for steel of {tensile_strength}. Ask the owner of the standard",
    "bake.refer-hardness": "no bake time is tabled for {hardness} HRC. Ask the owner of the standard",
    "film-voltage.temperature": "a bath of {temperature} is outside the range of the film voltage. Check the "
    "bath's file",
    "derating.not-a-number": "air or altitude at a rectifier is no number. Check both in the files of line and site",
    "dimension-missing": "the outline lacks a dimension that its shape needs. Add it to the part's file",
    # what a command was asked for
    "figure.unknown": "`{figure}` is not a figure of this plan. The nearest: {nearest}",
    "figure.none": "`{figure}` has no value in this plan: the process does not have it, or a stop prevents it",
    "file.unknown": "`{file}` is neither a file nor a load, rack or part of this site. The nearest: {nearest}",
    "area.kind": "`{file}` is a file of kind `{kind}`, which has no area. Name a part, a rack or a load",
    "schema.unknown": "`{kind}` is not a kind of file. Kinds: {kinds}",
    "check.nothing": "no file is named. Name one or more files, or `--schema KIND`",
    "start.nowhere": "no folder is named. Name an empty or a new one: `lineplanner start DIR`",
    "approve.nobody": "nobody is named. Say who approves it: `--by NAME`",
    # files of the site
    "stock.used": "{file} is used by {users}. Change that first",
    "stock.open": "{file} is needed by the load that is open, {load}. Open another load first",
    "stock.changed": "{file} holds changes that are not saved. Save or undo them first",
    "site.no_loads": "this site holds no load. Write one, or begin with the demo shop: `lineplanner start DIR`",
}
