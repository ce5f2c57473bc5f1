"""The key line: every key that works on a screen, in as few lines as the width allows."""

from __future__ import annotations

from collections.abc import Sequence

from rich.cells import cell_len
from rich.text import Text
from textual.app import App, RenderResult
from textual.geometry import Size
from textual.screen import Screen
from textual.widget import Widget
from textual.widgets import Input

NAMES = {
    "slash": "/",
    "question_mark": "?",
    "enter": "enter",
    "escape": "esc",
    "left_square_bracket": "[",
    "right_square_bracket": "]",
    "plus": "+",
    "minus": "-",
    "equals_sign": "=",
    "ctrl+p": "^p",
    "delete": "del",
}


def key_name(key: str) -> str:
    """Return how a key is printed."""
    return NAMES.get(key, key)


def key_lines(pairs: Sequence[tuple[str, str]], width: int, most: int = 2) -> list[Text]:
    """Lay out (key, what it does) pairs in at most `most` lines of `width` cells.

    What does not fit is dropped from the end; callers put what matters first.
    """
    lines = [Text()]
    for key, label in pairs:
        piece = Text.assemble((key_name(key), "bold"), " ", label)
        gap = 2 if lines[-1] else 0
        if cell_len(lines[-1].plain) + gap + cell_len(piece.plain) > width:
            if len(lines) == most:
                break
            lines.append(Text())
            gap = 0
        lines[-1].append(" " * gap)
        lines[-1].append_text(piece)
    return lines


class KeyLine(Widget):
    """Shows the keys of the screen it stands on: the shown bindings of screen and application."""

    DEFAULT_CSS = """
    KeyLine { dock: bottom; height: auto; max-height: 2; padding: 0 1; }
    """

    def render(self) -> RenderResult:
        """Return the key lines."""
        return Text("\n").join(self._lines(self.size.width or self.app.size.width - 2))

    def on_mount(self) -> None:
        """Follow the focus: other keys work in a line to type in."""
        self.watch(self.screen, "focused", self._again)

    def _again(self) -> None:
        self.refresh(layout=True)

    def get_content_height(self, container: Size, viewport: Size, width: int) -> int:
        """Return how many lines the keys need at this width."""
        del container, viewport
        return len(self._lines(width))

    def _lines(self, width: int) -> list[Text]:
        pairs: list[tuple[str, str]] = []
        focused = self.screen.focused
        for active in self.screen.active_bindings.values():
            binding = active.binding
            if isinstance(focused, Input) and isinstance(active.node, Screen | App):
                continue  # letters go into the line, and enter and escape belong to it
            if binding.show and active.enabled and binding.description:
                pair = (binding.key_display or binding.key, binding.description)
                if pair not in pairs:
                    pairs.append(pair)
        return key_lines(pairs, width)
