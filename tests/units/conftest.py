import pytest

from lineplanner.units import reading, registry


@pytest.fixture
def no_library(monkeypatch: pytest.MonkeyPatch) -> None:
    """The unit library fails when anything asks for it, and no unit is known yet."""

    def fail() -> None:
        raise AssertionError("the unit library was asked")

    monkeypatch.setattr(registry, "registry", fail)
    monkeypatch.setattr(reading, "_known", {})
