"""The order of cautions: signal word, then what kills first, then the id."""

from collections.abc import Iterable, Mapping
from dataclasses import dataclass, replace
from datetime import date

from lineplanner.cautions.facts import Applied
from lineplanner.errors import Fact, InputError
from lineplanner.inputs.cautions import DECLARED, MOMENTS, WORDS, CautionText, CautionTexts, Moment, Word
from lineplanner.sources import Source


@dataclass(frozen=True, slots=True, kw_only=True)
class Caution:
    """A caution ready to be shown: words from the site's file, values from the rule."""

    id: str
    word: Word
    rank: int
    moments: tuple[Moment, ...]
    text: str
    facts: Mapping[str, Fact]
    source: Source
    as_of: date

    @property
    def order(self) -> tuple[int, int, str]:
        """The key that every list of cautions is sorted by."""
        return (WORDS.index(self.word), self.rank, self.id)


def graver(*words: Word) -> Word:
    """The gravest of several words.

    >>> graver("NOTICE", "DANGER", "WARNING")
    'DANGER'
    """
    return min(words, key=WORDS.index)


def ranked(applied: Iterable[Applied], texts: CautionTexts) -> tuple[Caution, ...]:
    """The cautions with their words, gravest first. One without a text is an error, not silence."""
    worded = {text.id: text for text in texts.cautions}
    cautions = []
    for one in applied:
        if one.id not in worded:
            raise InputError("caution.missing", id=one.id)
        cautions.append(_joined(one, worded[one.id]))
    return merged(cautions)


def _joined(applied: Applied, text: CautionText) -> Caution:
    """A rule's answer with the site's words. A file cannot lower a word."""
    word = applied.word or graver(text.word, DECLARED[text.id][0])
    return Caution(
        id=applied.id,
        word=word,
        rank=text.rank,
        moments=text.moment if applied.moments is None else applied.moments,
        text=text.text,
        facts=applied.facts,
        source=Source(text.source, text.status),
        as_of=text.as_of,
    )


def merged(cautions: Iterable[Caution]) -> tuple[Caution, ...]:
    """One caution for each hazard, gravest first: the graver word's text and values, the moments of both."""
    kept: dict[str, Caution] = {}
    for caution in sorted(cautions, key=lambda one: one.order):
        first = kept.get(caution.id, caution)
        moments = tuple(moment for moment in MOMENTS if moment in first.moments or moment in caution.moments)
        kept[caution.id] = first if moments == first.moments else replace(first, moments=moments)
    return tuple(kept.values())


def at_moment(cautions: Iterable[Caution], moment: Moment) -> tuple[Caution, ...]:
    """The cautions of one moment, gravest first."""
    found = (caution for caution in cautions if moment in caution.moments)
    return tuple(sorted(found, key=lambda one: one.order))


def gravest(cautions: Iterable[Caution], moment: Moment | None = None) -> Caution | None:
    """The gravest caution of a moment, or of all moments."""
    found = [caution for caution in cautions if moment is None or moment in caution.moments]
    return min(found, key=lambda one: one.order, default=None)


def capped(cautions: Iterable[Caution], most: int) -> tuple[tuple[Caution, ...], int]:
    """The gravest cautions that a short list shows, and how many more there are. Every DANGER is shown."""
    ordered = sorted(cautions, key=lambda one: one.order)
    dangers = sum(caution.word == "DANGER" for caution in ordered)
    shown = tuple(ordered[: max(most, dangers)])
    return shown, len(ordered) - len(shown)
