"""A new load in a few questions: its name, the recipe, the tank, the rack, the first part."""

from __future__ import annotations

from collections.abc import Callable
from typing import TYPE_CHECKING, Any

from lineplanner.errors import PlannerError
from lineplanner.tui.screens.ask import PickScreen, PromptScreen

if TYPE_CHECKING:
    from lineplanner.tui.screens.base import PlannerScreen


class NewLoad:
    """Asks one question after the other; leaving one of them leaves everything as it is. then opens the load."""

    def __init__(self, screen: PlannerScreen, then: Callable[[], object]) -> None:
        self.screen, self.session, self.then = screen, screen.session, then
        self.name = self.recipe = self.rack = ""
        self.tank = ("", "")

    def begin(self) -> None:
        """Ask for the name."""
        ascii_only = self.session.style.ascii
        prompt = PromptScreen("Name of the new load", self._name_problem, ascii_only=ascii_only)
        self.screen.app.push_screen(prompt, self._named)

    def _name_problem(self, name: str) -> str | None:
        if name in self.session.names("load"):
            return f"{name} is there already. Choose another name"
        if not name or not all(letter.isascii() and (letter.isalnum() or letter == "-") for letter in name):
            return "lower case letters, digits and hyphens, such as brackets-24"
        return None

    def _named(self, name: str | None) -> None:
        if name:
            self.name = name.lower()
            self._pick("Recipe", [(one, one) for one in self.session.names("recipe")], self._with_recipe)

    def _with_recipe(self, recipe: str | None) -> None:
        if recipe is None:
            return
        self.recipe = recipe
        try:
            tanks = self.session.tanks_for(recipe)
        except PlannerError as error:
            self.screen.cannot(error)
            return
        if not tanks:
            self.screen.say(f"no tank of the line runs {recipe}", grave=True)
        elif len(tanks) == 1:
            self._with_tank(tanks[0][:2])
        else:
            choices = [(f"{tank} of {line}, bath {bath}", (line, tank)) for line, tank, bath in tanks]
            self._pick("Tank", choices, self._with_tank)

    def _with_tank(self, tank: tuple[str, str] | None) -> None:
        if tank is not None:
            self.tank = tank
            self._pick("Rack", [(one, one) for one in self.session.names("rack")], self._with_rack)

    def _with_rack(self, rack: str | None) -> None:
        if rack is not None:
            self.rack = rack
            self._pick("First part", [(one, one) for one in self.session.names("part")], self._with_part)

    def _with_part(self, part: str | None) -> None:
        if part is None:
            return
        try:
            self.session.new_load(self.name, self.recipe, self.tank, self.rack, part)
        except PlannerError as error:
            self.screen.cannot(error)
            return
        self.then()

    def _pick(self, question: str, choices: list[tuple[str, Any]], then: Callable[[Any], None]) -> None:
        ascii_only = self.session.style.ascii
        self.screen.app.push_screen(PickScreen(question, choices, ascii_only=ascii_only), then)
