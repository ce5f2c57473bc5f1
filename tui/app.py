"""The workbench: wires session and screens together."""

from __future__ import annotations

from collections.abc import Iterable
from functools import partial
from pathlib import Path
from typing import ClassVar

from textual.actions import parse
from textual.app import SystemCommand
from textual.binding import Binding, BindingType
from textual.dom import DOMNode
from textual.screen import Screen

from stillroom.chem.choosing.store import Store
from stillroom.chem.data.errors import StillroomError
from stillroom.chem.data.units import parse_temperature
from stillroom.chem.shelf.shelf import load_shelf
from stillroom.tui.screens.base import WorkScreen
from stillroom.tui.screens.help import HelpScreen
from stillroom.tui.screens.pair import PairScreen
from stillroom.tui.screens.pairs import PairsScreen
from stillroom.tui.screens.sheet import SheetScreen
from stillroom.tui.screens.shelf import ShelfScreen
from stillroom.tui.screens.shortlist import ShortlistScreen
from stillroom.tui.session import Session
from stillroom.tui.terminal import TerminalApp
from stillroom.tui.widgets.keys import key_name

MAIN = ("shelf", "pairs", "shortlist")


class Workbench(TerminalApp):
    """The full-screen program."""

    CSS_PATH = "workbench.tcss"
    TITLE = "stillroom"
    ENABLE_COMMAND_PALETTE = True
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("1", "go('shelf')", "shelf"),
        Binding("2", "go('pairs')", "pairs"),
        Binding("3", "go('shortlist')", "shortlist"),
        Binding("t", "temperature", "temp"),
        Binding("question_mark", "help", "help"),
        Binding("ctrl+p", "command_palette", "all"),
        Binding("q", "quit", "quit"),
    ]

    def __init__(self, session: Session) -> None:
        super().__init__()
        self.session = session
        self._screens: dict[str, WorkScreen] = {
            "shelf": ShelfScreen(),
            "pairs": PairsScreen(),
            "shortlist": ShortlistScreen(),
            "sheet": SheetScreen(),
            "pair": PairScreen(),
            "help": HelpScreen(),
        }

    def on_mount(self) -> None:
        """Open where the last session ended."""
        for name, screen in self._screens.items():
            self.install_screen(screen, name)
        self.push_screen("shelf")
        if self.session.screen in MAIN[1:]:
            self.go(self.session.screen)

    def go(self, name: str) -> None:
        """Show one of the main screens, leaving whatever lies on top."""
        while len(self.screen_stack) > 2:
            self.pop_screen()
        if name != "shelf":
            self.push_screen(name)
        self.session.screen = name
        self.session.save()

    def action_go(self, name: str) -> None:
        """Show one of the main screens."""
        self.go(name)

    def action_step_back(self) -> None:
        """Leave the screen on top."""
        if len(self.screen_stack) > 2:
            self.pop_screen()

    def open_sheet(self, liquid: str) -> None:
        """Show the sheet of a liquid (by id) on top."""
        self.session.view.liquid = liquid
        self.session.save()
        self.push_screen("sheet")

    def open_pair(self, a: str, b: str) -> None:
        """Show the pair of two liquids (by id) on top."""
        screen = self._screens["pair"]
        assert isinstance(screen, PairScreen)
        screen.show_pair(a, b)
        self.push_screen("pair")

    def action_help(self) -> None:
        """Show the help on top."""
        if self.screen is not self._screens["help"]:
            self.push_screen("help")

    def action_temperature(self) -> None:
        """Ask for the temperature of everything."""
        screen = self.screen
        if not isinstance(screen, WorkScreen):
            return

        def check(text: str) -> str | None:
            try:
                parse_temperature(text)
            except StillroomError as problem:
                return str(problem)
            return None

        def submitted(text: str) -> None:
            self.session.set_temperature(text)
            screen.refresh_data()
            screen.refresh_heading()

        value = f"{self.session.temperature - 273.15:g} degC"
        screen.ask("temperature", value, submitted, check=check, placeholder="40 degC or 313 K")

    def get_system_commands(self, screen: Screen[object]) -> Iterable[SystemCommand]:
        """Offer every action of the present screen in the palette, in whole sentences."""
        seen = {"command_palette"}
        for active in screen.active_bindings.values():
            binding, node = active.binding, active.node
            if binding.action in seen or binding.key not in _own_keys(type(node)):
                continue
            seen.add(binding.action)
            yield SystemCommand(
                f"{binding.description} ({key_name(binding.key)})",
                _sentence(node, binding.action),
                partial(self._run_later, binding.action, node),
            )

    def _run_later(self, action: str, node: DOMNode) -> None:
        self.call_later(self.run_action, action, default_namespace=node)


def _own_keys(node: type[DOMNode]) -> set[str]:
    """Return the keys that our own classes bind, not those that come with Textual's."""
    found: set[str] = set()
    for kind in node.__mro__:
        if kind.__module__.startswith("stillroom."):
            for binding in vars(kind).get("BINDINGS", ()):
                key = binding.key if isinstance(binding, Binding) else binding[0]
                found.update(key.split(","))
    return found


def _sentence(node: DOMNode, action: str) -> str:
    """Return the first line of an action's docstring."""
    _, name, _ = parse(action)
    for owner in (node, node.app):
        method = getattr(owner, f"action_{name}", None)
        if method is not None and method.__doc__:
            return str(method.__doc__.splitlines()[0])
    return ""


def open_workbench(store_path: Path | None, temperature: str | None) -> int:
    """Open the workbench and return its exit status."""
    with Store.open(store_path) as store:
        session = Session(load_shelf(), store)
        if temperature is not None:
            session.set_temperature(temperature)
        app = Workbench(session)
        app.run(mouse=False)
        return app.return_code or 0
