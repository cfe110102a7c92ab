"""An internal fault: its traceback goes to a log, a person reads one line."""

import sys
import tempfile
import traceback
from datetime import UTC, datetime
from pathlib import Path
from types import TracebackType

from lineplanner import __version__

ExceptionInfo = tuple[type[BaseException], BaseException, TracebackType | None] | tuple[None, None, None]


def kept(arguments: list[str], raised: ExceptionInfo) -> str:
    """Writes the log; returns the line that asks to report it."""
    now = datetime.now(UTC)
    text = "".join(
        [
            f"lineplanner {__version__}, Python {sys.version.split()[0]}, {sys.platform}, {now.isoformat()}\n",
            f"arguments: {arguments}\n",
            *traceback.format_exception(*raised),
        ]
    )
    where = _written(text, f"fault-{now:%Y%m%d-%H%M%S-%f}.txt")
    return f"this is a fault of lineplanner, not of your files. Please report it with the log {where}"


def _written(text: str, name: str) -> str:
    """The log in the user's data folder, else among temporary files; the text itself if neither can be written."""
    from lineplanner.files.site import user_folder

    for folder in (user_folder() / "logs", Path(tempfile.gettempdir())):
        try:
            folder.mkdir(parents=True, exist_ok=True)
            path = folder / name
            path.write_text(text, encoding="utf-8")
        except OSError:
            continue
        return str(path)
    return "(could not be written)"
