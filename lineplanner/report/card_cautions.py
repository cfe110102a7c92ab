"""The cautions of a run card: gravest in full, the others by a short phrase, all of them by moment."""

from dataclasses import dataclass

from lineplanner.cautions.ranking import Caution
from lineplanner.inputs.cautions import WORDS
from lineplanner.plan import Plan
from lineplanner.report.cautions_text import by_moment
from lineplanner.report.layout import WIDTH, typed, wrapped
from lineplanner.report.setpoints import caution_lines, caution_short, caution_text
from lineplanner.report.style import Style

# Moments of this run; a danger that holds at several of them is named again.
_OF_THE_RUN = ("before loading", "before current", "while current flows", "unloading", "after")


@dataclass(frozen=True, slots=True)
class Shown:
    """The lines of a card's cautions, and how many of the gravest are in full."""

    lines: list[str]
    full: int


def card_cautions(plan: Plan, style: Style, room: int) -> Shown:
    """All cautions by moment, as many of them in full as there is room for, gravest first.

    Where not every danger finds room, each moment becomes a paragraph, then the moments one paragraph.
    """
    ordered = sorted(plan.cautions, key=lambda c: c.order)
    dangers = sum(c.word == "DANGER" for c in ordered)
    for count in range(len(ordered), dangers - 1, -1):
        lines = _grouped(plan, {c.id for c in ordered[:count]}, style)
        if len(lines) <= room:
            return Shown(lines, count)
    for count in range(dangers, -1, -1):
        full = {c.id for c in ordered[:count]}
        for lines in (_by_paragraph(plan, full, style), _run_in(plan, full, style)):
            if len(lines) <= room:
                return Shown(lines, count)
    return Shown(_by_word(plan, ordered, style) if ordered else [], 0)


def _grouped(plan: Plan, full: set[str], style: Style) -> list[str]:
    """Moment by moment; those not in full by word and short phrase."""
    lines = ["", _heading(plan, len(full))]
    for when, new, again in by_moment(plan.cautions):
        dangers = [c for c in again if c.word == "DANGER" and when in _OF_THE_RUN]
        told = [c for c in new if c.id in full]
        short = _phrases([c for c in new if c.id not in full], plan, style)
        head = [f"again {_phrases(dangers, plan, style)}"] if dangers else []
        if not told and short:
            head.append(short)
        if told or head:
            lines += wrapped(f"{when}: {'; '.join(head)}".rstrip(), first=" ", rest="    ")
        for caution in told:
            lines += caution_lines(caution, style, WIDTH, "  ")
        lines += wrapped(short, first="  ", rest="    ") if told and short else []
    return lines


def _paragraphs(plan: Plan, full: set[str], style: Style) -> list[str]:
    """A text for each moment: dangers that hold again, those in full, the others by phrase."""
    found = []
    for when, new, again in by_moment(plan.cautions):
        dangers = [c for c in again if c.word == "DANGER" and when in _OF_THE_RUN]
        said = [f"again {_phrases(dangers, plan, style)};"] if dangers else []
        said += [f"[{c.word}] {caution_text(c, style)}" for c in new if c.id in full]
        said.append(_phrases([c for c in new if c.id not in full], plan, style))
        text = " ".join(one for one in said if one).removesuffix(";")
        found += [f"{when}: {text}"] if text else []
    return found


def _by_paragraph(plan: Plan, full: set[str], style: Style) -> list[str]:
    texts = _paragraphs(plan, full, style)
    return [
        _heading(plan, len(full)),
        *(line for text in texts for line in wrapped(text, first=" ", rest="  ")),
    ]


def _run_in(plan: Plan, full: set[str], style: Style) -> list[str]:
    """All moments in one paragraph, each in capitals."""
    texts = (text.partition(": ") for text in _paragraphs(plan, full, style))
    whole = " ".join(f"{when.upper()}: {said.rstrip('.')}." for when, _, said in texts)
    return [_heading(plan, len(full)), *wrapped(whole, first=" ", rest=" ")]


def _heading(plan: Plan, full: int) -> str:
    rest = "" if full == len(plan.cautions) else f"  (in full: lineplanner plan {typed(plan.case.name)})"
    return f"CAUTIONS  {len(plan.cautions)}{rest}"


def _phrases(cautions: list[Caution], plan: Plan, style: Style) -> str:
    by_word = {word: [caution_short(c, plan, style) for c in cautions if c.word == word] for word in WORDS}
    return "; ".join(f"[{word}] {'; '.join(said)}" for word, said in by_word.items() if said)


def _by_word(plan: Plan, ordered: list[Caution], style: Style) -> list[str]:
    """No room for moments: every caution still by word and phrase."""
    return [_heading(plan, 0), *wrapped(_phrases(ordered, plan, style), first="  ", rest="    ")]
