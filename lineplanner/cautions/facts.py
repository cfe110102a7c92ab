"""Everything the rules look at: one situation, with what is not known said as not known."""

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Literal

from lineplanner.errors import Fact
from lineplanner.inputs.cautions import CautionThresholds, Moment, Word
from lineplanner.inputs.tables import Process
from lineplanner.quantities import (
    Charge,
    Concentration,
    Current,
    Flow,
    Mass,
    Ratio,
    Stress,
    SurfaceTension,
    Temperature,
    TemperatureDifference,
    Time,
    Voltage,
)

Chemical = Literal[
    "sulfuric acid",
    "nitric acid",
    "hydrochloric acid",
    "phosphoric acid",
    "chromic acid",
    "hexavalent chromium",
    "fluoride",
    "caustic",
    "nickel",
    "cyanide",
    "hypochlorite",
    "sulfide or bisulfite",
    "chloride",
    "organics",
    "not known",
]
StepKind = Literal[
    "solvent-clean",
    "clean",
    "caustic-etch",
    "caustic-strip",
    "sulfuric-pickle",
    "sulfuric-desmut",
    "nitric-desmut",
    "fluoride-desmut",
    "fluoride-etch",
    "chromic-desmut",
    "chromic-strip",
    "chromate-conversion",
    "bright-dip",
    "nitric-strip",
    "hydrochloric-pickle",
    "hydrochloric-strip",
    "dichromate-seal",
    "nickel-acetate-seal",
    "nickel-seal",
    "hot-water-seal",
    "stop-off-removal",
    "oven",
    "rinse",
    "dye",
    "grind",
    "other",
]
StopOff = Literal["tape", "lacquer", "wax", "plastisol", "plug", "lead-tape"]
MadeUp = Literal["sulfuric acid", "nitric acid", "hydrochloric acid", "chromium trioxide", "caustic", "other"]

NOT_KNOWN = "not known"


@dataclass(frozen=True, slots=True, kw_only=True)
class Situation:
    """One load on one line, or a piece of maintenance or make-up work.

    None says "not known" and counts as the worst the rule can meet; what the process itself decides
    (hexavalent chromium, fluoride in an anodizing bath) is taken from the process. Fields that default
    to False or to an empty set are things a plan declares.
    """

    thresholds: CautionThresholds
    process: Process | None  # None: nothing is run (maintenance or make-up alone)

    # the process bath
    holds_hexavalent_chromium: bool | None = None  # None: as the process says
    sulfuric_share: Ratio | None = None  # mass fraction
    holds_nitric: bool = False
    holds_fluoride: bool | None = None  # None: hard chrome counts as holding it, anodizing as free of it
    boric_share: Ratio | None = None  # mass fraction; None counts in a boric-sulfuric bath
    ph: float | None = None
    bath_temperature: Temperature | None = None
    heater: Literal["none", "electric immersion", "steam or hot water"] | None = None
    heater_guards_confirmed: bool = False  # both cutoffs, this month

    # steps before and after, other chemicals at the line, stop-off
    steps: frozenset[StepKind] = frozenset()
    hottest_step: Temperature | None = None  # None: the kinds of step decide
    on_line: frozenset[Chemical] = frozenset()
    stop_off: frozenset[StopOff] = frozenset()
    shower_confirmed: bool = False  # this shift

    # supply and bars
    planned_peak_current: Current | None = None
    planned_peak_voltage: Voltage | None = None
    voltage_limit: Voltage | None = None  # set for this run
    rated_voltage: Voltage | None = None
    full_on_voltage: Voltage | None = None  # None: rated voltage x full_on_ratio
    phase_controlled_unfiltered: bool | None = None
    rated_current: Current | None = None
    reverse_stage: bool = False
    family_changed: bool | None = None  # another process family on this rectifier before
    live_entry: bool = False  # declared by the recipe

    # gas and air
    hydrogen_share: Ratio | None = None  # by volume, in the exhaust of the tank
    exhaust: Flow | Literal["none"] | None = None
    exhaust_proven: bool = False  # this shift
    exhaust_needed: Flow | None = None  # by the tank rule
    exhaust_class: str | None = None
    exhaust_for_hydrogen: Flow | None = None  # that keeps hydrogen at its limit
    current_for_hydrogen: Current | None = None  # most that the exhaust entered allows
    exhaust_sum: Flow | None = None  # all exhausts of the room
    supply_air: Flow | None = None
    foam: bool | None = None  # None counts in a chromic bath
    lid: bool | None = None
    part_traps_gas: bool = False  # a cup, bore or closed end that faces down

    # electrodes
    lead: bool | None = None  # anodes, cathodes, liner

    # steel parts
    steel: bool | None = None
    steel_tensile_strength: Stress | None = None
    steel_hardness: float | None = None  # HRC
    worked_after_hardening: bool | None = None  # ground or cold-worked
    case_hardened: bool | None = None
    tempering_temperature: Temperature | None = None
    design_authority: bool = False  # the design owner's written authority is entered
    bake_within: Time | None = None
    bake_time: Time | None = None
    bake_temperature: Temperature | None = None
    bake_rule: str | None = None

    # hexavalent chromium: people, air, permit
    exposure_result: Concentration | None = None  # latest 8 h mean, as chromium
    exposed_thirty_days: bool | None = None  # anyone at the action level on 30 or more days a year
    wetting_agent_is_control: bool = False
    surface_tension: SurfaceTension | None = None
    surface_tension_meter: Literal["stalagmometer", "tensiometer"] | None = None
    suppressant_pfos: bool | None = None
    installed_chrome_current: Current | None = None  # all hard chrome rectifiers of the site
    permit_by_charge: bool | None = None  # size claim or permit counts ampere-hours
    load_charge: Charge | None = None  # forward and reverse
    rolling_charge: Charge | None = None  # twelve months, with this load
    permit_charge: Charge | None = None
    drag_out_chromium: Mass | None = None
    region_eu: bool | None = None

    # work beside the run
    make_up: frozenset[MadeUp] = frozenset()
    make_up_rise: TemperatureDifference | None = None  # of an uncooled acid make-up
    transfer: bool = False  # pumping over, drums moved
    maintenance: bool = False  # bus, rectifier, anodes, reversing link
    sludge_work: bool = False  # cleaning of electrodes, liner or tank bottom
    tank_entry: bool = False


@dataclass(frozen=True, slots=True, kw_only=True)
class Applied:
    """A caution that a situation demands, with the values its text shows.

    word and moments are given only where the rule decides them instead of the text.
    """

    id: str
    facts: Mapping[str, Fact]
    word: Word | None = None
    moments: tuple[Moment, ...] | None = None
