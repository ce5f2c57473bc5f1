"""Curves as text: one letter or shape per curve, so that they are told apart without colour."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from typing import Any

import numpy as np
from numpy.typing import ArrayLike, NDArray
from rich.cells import cell_len
from rich.text import Text
from textual.app import RenderResult
from textual.widget import Widget

from stillroom.tui.widgets.columns import cell_text
from stillroom.tui.widgets.printable import printable
from stillroom.tui.widgets.ticks import log_ticks, tick_labels, ticks

SMALLEST = (24, 7)
"""Width and height below which a plot says nothing."""
_MARK_LINE = "┊"
_ZERO_LINE = "┄"


@dataclass(frozen=True, slots=True)
class Series:
    """One curve: its label, x and y (same length, NaN where not known), its one-cell mark.

    `joined` draws a line through the points in the order of x, otherwise only the points.
    """

    label: str
    x: ArrayLike
    y: ArrayLike
    mark: str
    joined: bool = True


@dataclass(frozen=True, slots=True)
class _Axis:
    """Places numbers on `cells` cells, evenly or by their logarithm."""

    low: float
    high: float
    cells: int
    log: bool = False

    def __post_init__(self) -> None:
        if not self.high > self.low or (self.log and self.low <= 0):
            raise ValueError(f"no axis from {self.low} to {self.high}")

    def scaled(self, values: ArrayLike) -> NDArray[np.float64]:
        """Return the numbers on the scale of the axis, NaN where it has no place for them."""
        numbers = np.asarray(values, dtype=float)
        return np.log10(np.where(numbers > 0, numbers, np.nan)) if self.log else numbers

    def place(self, value: float) -> int | None:
        """Return the cell of a number, None if it is not finite or off the axis."""
        low, high, at = self.scaled([self.low, self.high, value]).tolist()
        share = (at - low) / (high - low)
        return round(share * (self.cells - 1)) if -1e-9 <= share <= 1 + 1e-9 else None

    def centres(self) -> NDArray[np.float64]:
        """Return the scaled number at the middle of each cell."""
        low, high = self.scaled([self.low, self.high])
        return np.linspace(float(low), float(high), self.cells)


def plot(
    series: Sequence[Series],
    width: int,
    height: int,
    *,
    x_label: str = "",
    y_label: str = "",
    x_log: bool = False,
    x_range: tuple[float, float] | None = None,
    y_range: tuple[float, float] | None = None,
    mark_x: float | None = None,
    mark_label: str = "",
) -> list[Text]:
    """Return at most `height` lines of at most `width` cells.

    Where curves share a cell their marks take turns. A dashed vertical line stands at `mark_x`, a
    dotted one at y = 0. Ranges default to the finite data; numbers outside are not drawn, nor are
    x <= 0 on a logarithmic axis. Nothing finite to draw, or too little room, gives one line that
    says so.
    """
    if width < SMALLEST[0] or height < SMALLEST[1]:
        return [Text(cell_text("no room to plot", max(0, width)))]
    data = [(s, *_finite(s, x_log)) for s in series]
    xs = np.concatenate([x for _, x, _ in data]) if data else np.empty(0)
    if not xs.size:
        return [Text(cell_text("nothing to plot", width))]
    low, high = x_range or _span(xs)
    ys = np.concatenate([y[(x >= low) & (x <= high)] for _, x, y in data])
    legend = _legend(series, width, max(1, height // 5), mark_label if mark_x is not None else "")
    rows = height - 3 - len(legend)  # the y label, the axis, its numbers
    bottom, top = y_range or _span(ys)
    y_axis = _Axis(bottom, top, rows)
    y_ticks = ticks(bottom, top, min(rows, max(4, rows // 3)))
    labels = dict(zip(map(y_axis.place, y_ticks), tick_labels(y_ticks), strict=True))
    margin = max(map(len, labels.values()), default=0)
    x_axis = _Axis(low, high, width - margin - 1, x_log)

    cells = _background(x_axis, y_axis, mark_x)
    for (row, column), marks in _occupied(data, x_axis, y_axis).items():
        cells[row][column] = marks[(row + column) % len(marks)]
    lines = [cell_text(y_label, width).rstrip()]
    for row in range(rows - 1, -1, -1):
        label = labels.get(row, "")
        lines.append(f"{label:>{margin}}{'┤' if label else '│'}{''.join(cells[row])}")
    lines += [" " * margin + line for line in _x_axis_lines(x_axis, x_label)]
    return [Text(line.rstrip()) for line in lines] + legend


def _finite(s: Series, x_log: bool) -> tuple[NDArray[np.float64], NDArray[np.float64]]:
    x, y = np.asarray(s.x, dtype=float), np.asarray(s.y, dtype=float)
    if x.ndim != 1 or x.shape != y.shape:
        raise ValueError(f"{s.label}: x has shape {x.shape}, y {y.shape}, expected two equal rows")
    good = np.isfinite(x) & np.isfinite(y) & ((x > 0) | (not x_log))
    return x[good], y[good]


def _span(values: NDArray[np.float64]) -> tuple[float, float]:
    low, high = (float(values.min()), float(values.max())) if values.size else (0.0, 1.0)
    if high > low:
        return low, high
    spread = abs(low) * 0.1 or 1.0
    return low - spread, high + spread


def _background(x_axis: _Axis, y_axis: _Axis, mark_x: float | None) -> list[list[str]]:
    cells = [[" "] * x_axis.cells for _ in range(y_axis.cells)]
    zero = y_axis.place(0.0)
    if zero:  # not where it would lie on the axis itself
        cells[zero] = [_ZERO_LINE] * x_axis.cells
    column = None if mark_x is None else x_axis.place(mark_x)
    if column is not None:
        for row in cells:
            row[column] = _MARK_LINE
    return cells


def _occupied(
    data: Sequence[tuple[Series, NDArray[np.float64], NDArray[np.float64]]],
    x_axis: _Axis,
    y_axis: _Axis,
) -> dict[tuple[int, int], list[str]]:
    taken: dict[tuple[int, int], list[str]] = {}
    for s, x, y in data:
        mark = cell_text(s.mark, 1)
        if s.joined and len(x) > 1:
            order = np.argsort(x, kind="stable")
            at = np.interp(
                x_axis.centres(), x_axis.scaled(x[order]), y[order], left=np.nan, right=np.nan
            )
            places = _joined([y_axis.place(v) for v in at])
        else:
            pairs = [(y_axis.place(b), x_axis.place(a)) for a, b in zip(x, y, strict=True)]
            places = [(r, c) for r, c in pairs if r is not None and c is not None]
        for cell in dict.fromkeys(places):
            taken.setdefault(cell, []).append(mark)
    return taken


def _joined(rows: Sequence[int | None]) -> list[tuple[int, int]]:
    """Return the cells of a line through one row a column, steep steps filled half and half."""
    cells = []
    before: int | None = None
    for column, row in enumerate(rows):
        if row is not None:
            cells.append((row, column))
            if before is not None and abs(row - before) > 1:
                middle = (row + before) / 2
                for r in range(min(row, before) + 1, max(row, before)):
                    near_row = abs(r - row) <= abs(r - before) if r != middle else True
                    cells.append((r, column if near_row else column - 1))
        before = row
    return cells


def _x_axis_lines(axis: _Axis, label: str) -> list[str]:
    find = log_ticks if axis.log else ticks
    at = find(axis.low, axis.high, max(2, axis.cells // 9))
    line, numbers = ["─"] * axis.cells, ""
    room = axis.cells + 1 - (cell_len(printable(label)) + 2 if label else 0)
    for tick, text in zip(at, tick_labels(at), strict=True):
        column = axis.place(tick)
        if column is None:
            continue
        line[column] = "┬"
        start = max(0, column + 1 - len(text) // 2)
        if start >= len(numbers) + (1 if numbers else 0) and start + len(text) <= room:
            numbers = numbers.ljust(start) + text
    tail = printable(label).rjust(max(0, axis.cells + 1 - len(numbers)))
    return ["└" + "".join(line), cell_text(numbers + tail, axis.cells + 1)]


def _legend(series: Sequence[Series], width: int, most: int, mark_label: str) -> list[Text]:
    items = [f"{cell_text(s.mark, 1)} {printable(s.label)}" for s in series]
    if mark_label:
        items.append(f"{_MARK_LINE} {printable(mark_label)}")
    lines = [""]
    for item in items:
        joined = f"{lines[-1]}   {item}" if lines[-1] else item
        if cell_len(joined) > width and lines[-1]:
            lines.append(item)
        else:
            lines[-1] = joined
    if len(lines) > most:
        lines = [*lines[: most - 1], f"{lines[most - 1][: width - 2]} …"]
    return [Text(cell_text(line, width).rstrip()) for line in lines]


class Curves(Widget):
    """A plot as large as the widget; `show` takes what `plot` takes, without the size."""

    DEFAULT_CSS = "Curves { height: 1fr; width: 1fr; }"
    ALLOW_SELECT = False

    def __init__(self, *, id: str | None = None) -> None:
        super().__init__(id=id)
        self._series: Sequence[Series] = ()
        self._options: dict[str, Any] = {}

    def show(self, series: Sequence[Series], **options: Any) -> None:
        """Show other curves; the options are those of `plot`."""
        self._series, self._options = series, options
        self.refresh()

    def render(self) -> RenderResult:
        """Return the plot at the present size."""
        lines = plot(self._series, self.size.width, self.size.height, **self._options)
        return Text("\n", no_wrap=True).join(lines)
