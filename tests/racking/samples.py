"""A rack of tips, a rack without, and loads on them."""

from lineplanner.inputs.load import Hang, Load
from lineplanner.inputs.rack import Rack, TipRow


def rows(*names: str, count: int = 4, side: str = "both") -> tuple[TipRow, ...]:
    return tuple(
        TipRow(
            name=name,
            count=count,
            start=(0.1, 0.2 + 0.2 * number),
            step=(0.1, 0.0),
            kind="spring",
            conductor="titanium-2",
            side=side,  # type: ignore[arg-type]
        )
        for number, name in enumerate(names)
    )


TIPS = Rack(
    name="three rows of four", conductor="titanium-2", width=0.5, height=1.0, tips=rows("A", "B", "C")
)
FREE = Rack(name="frame", conductor="copper", width=0.5, height=1.0, hanging="free", grid=0.01)


def load(*hangs: Hang, rack: str = "tips") -> Load:
    return Load(name="x", recipe="r", rack=rack, line="l", tank="t", hangs=hangs)
