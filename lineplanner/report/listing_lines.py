"""The lines below the list of loads, made of texts alone: nothing is planned and nothing heavy loaded for them."""

from lineplanner.report.layout import shortened, shortened_verdict, wrapped
from lineplanner.report.rows import Listed

UNREAD = "cannot be read"
MOST_LINES = 4  # of a problem below the list


def said_below(one: Listed, width: int) -> list[str]:
    """The whole verdict and the gravest caution of a load, a line each."""
    if one.level == "unread":
        return wrapped(one.verdict, width)[:MOST_LINES]
    said = [shortened_verdict(one.verdict, width)] if one.verdict else []
    text, plus, more = one.caution.rpartition(" + ")
    if not plus:
        text, more = more, ""
    return said + ([f"{shortened(text, width - len(plus) - len(more))}{plus}{more}"] if text else [])
