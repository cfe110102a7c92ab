"""To how many digits each figure is printed; JSON rounded to these digits says the same."""

import math

from lineplanner.errors import KindOfQuantity
from lineplanner.findings import Finding
from lineplanner.inputs.line import Rectifier
from lineplanner.program.panel import panel_step
from lineplanner.quantities import (
    CHARGE,
    CURRENT,
    RATIO,
    TEMPERATURE,
    TIME,
    VOLTAGE,
    Charge,
    Current,
    Ratio,
    Time,
    Voltage,
)
from lineplanner.report.style import Style

NONE = "-"  # a figure that the process does not have, or that a stop prevents
CHROME = "chrome-hard"


def amperes(current: Current | None, rectifier: Rectifier | None, style: Style) -> str:
    """To the step the panel can be set in."""
    if current is None:
        return NONE
    return style.show(current, CURRENT, step=None if rectifier is None else panel_step(rectifier))


def volts(voltage: Voltage | None, style: Style) -> str:
    """To 0.1 V, as a panel meter reads."""
    return NONE if voltage is None else style.show(voltage, VOLTAGE, unit="V")


def charge(amount: Charge | None, style: Style) -> str:
    """Three significant digits, whole ampere-hours in full."""
    return NONE if amount is None else style.show(amount, CHARGE, unit="Ah")


def percent(share: Ratio, style: Style) -> str:
    """To 1 %."""
    return style.show(share, RATIO, unit="%")


def run_time(time: Time | None, process: str, style: Style) -> str:
    """How long a run takes: minutes to 0.5; hard chrome in h:min."""
    if time is None:
        return NONE
    return hours(time) if process == CHROME else style.show(time, TIME, unit="min")


def run_time_said(time: Time | None, process: str, style: Style) -> str:
    """A run time in a line of text, so that h:min cannot be read as min:s."""
    text = run_time(time, process, style)
    return f"{text} h:min" if time is not None and process == CHROME else text


def hours(time: Time) -> str:
    """Hours and minutes.

    >>> hours(19_560.0), hours(29.0), hours(30.0)
    ('5:26', '0:00', '0:01')
    """
    minutes = math.floor(time / 60.0 + 0.5)
    return f"{minutes // 60}:{minutes % 60:02d}"


def duration(time: Time, style: Style) -> str:
    """A stage's length as it is timed: seconds up to two minutes, then minutes."""
    return style.show(time, TIME)


def moment(time: Time, process: str) -> str:
    """A time on the clock of a run: minutes, or h:min and seconds where a stage ends between minutes.

    >>> moment(330.0, "anodize-hard"), moment(645.0, "chrome-hard"), moment(7_200.0, "chrome-hard")
    ('5.5', '0:10:45', '2:00')
    """
    if process != CHROME:
        return f"{math.floor(time / 30.0 + 0.5) * 0.5:g}"
    seconds = math.floor(time + 0.5)
    text = f"{seconds // 3600}:{seconds // 60 % 60:02d}"
    return f"{text}:{seconds % 60:02d}" if seconds % 60 else text


_FINE = 0.1  # a share below a tenth is compared to two digits, not to whole percents
_MOST_DIGITS = 9  # beyond, two numbers differ by the noise of a conversion
_DUST = 1e-9


def told_apart(first: float, second: float, kind: KindOfQuantity, style: Style) -> tuple[str, str]:
    """Two numbers that are compared: as usual, or to as many digits as it takes for them to differ.

    >>> told_apart(0.0531, 0.05, RATIO, Style()), told_apart(0.0502, 0.05, RATIO, Style())
    (('5.3 %', '5 %'), ('5.02 %', '5 %'))
    """
    fine = kind.name == RATIO.name and max(abs(first), abs(second)) < _FINE
    texts = _pair(first, second, kind, style, 2 if fine else None)
    if abs(first - second) <= _DUST * max(abs(first), abs(second)):
        return texts
    digits = max(sum(letter.isdigit() for letter in text.partition(" ")[0].lstrip("-0.")) for text in texts)
    while texts[0] == texts[1] and digits < _MOST_DIGITS:
        digits += 1
        texts = _pair(first, second, kind, style, digits)
    return texts


def _pair(
    first: float, second: float, kind: KindOfQuantity, style: Style, digits: int | None
) -> tuple[str, str]:
    return style.show(first, kind, digits=digits), style.show(second, kind, digits=digits)


def is_lower_limit(finding: Finding) -> bool:
    """Whether the limit must be reached rather than kept below."""
    if finding.value is None or finding.limit is None or finding.margin is None:
        return False
    return (finding.value - finding.limit) * finding.margin > 0.0


def use(finding: Finding, style: Style) -> str:
    """Demand against limit in percent; past the limit never printed as the limit itself."""
    if finding.margin is None or finding.value is None or not finding.limit or finding.kind == TEMPERATURE:
        return NONE
    lower = is_lower_limit(finding)
    share = 1.0 if finding.value == finding.limit else 1.0 + finding.margin * (1.0 if lower else -1.0)
    text = percent(share, style)
    if text == percent(1.0, style) and share != 1.0 and finding.margin < 0.0:
        return f"{'under' if lower else 'over'} {text}"
    return text
