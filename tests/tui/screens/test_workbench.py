"""What holds on every screen: temperature, palette, keys, state, sizes."""

import pytest

from stillroom.tui.app import Workbench
from stillroom.tui.screens.base import WorkScreen
from stillroom.tui.screens.help import help_text
from stillroom.tui.widgets.keys import KeyLine, key_name

OPEN = {
    "shelf": [],
    "pairs": ["2"],
    "shortlist": ["3"],
    "sheet": ["enter"],
    "pair": ["x", "x"],
    "help": ["question_mark"],
}
SCREENS = pytest.mark.parametrize("name", OPEN)


async def opened(w, name: str) -> None:
    await w.go_to("acetone")
    await w.press(*OPEN[name])
    await w.until(lambda: w.lines[0].strip().startswith(name))
    if name == "pairs":
        await w.until(lambda: len(w.grid.source) > 0)


@SCREENS
async def test_fits_80x24_with_heading_and_keys_in_view(workbench, name: str) -> None:
    async with workbench((80, 24)) as w:
        await opened(w, name)
        assert w.app.screen.max_scroll_y == 0
        key_line = w.app.screen.query_one(KeyLine)
        assert key_line.region.bottom == 24
        shown = " ".join(w.lines[key_line.region.y :])
        for active in w.app.screen.active_bindings.values():
            if active.binding.show and isinstance(active.node, WorkScreen | Workbench):
                assert f"{key_name(active.binding.key)} {active.binding.description}" in shown


@SCREENS
async def test_the_temperature_is_set_once_for_all(workbench, name: str) -> None:
    async with workbench() as w:
        await opened(w, name)
        await w.press("t")
        await w.answer("-300 degC")
        await w.until(lambda: "absolute zero" in w.text)
        await w.answer("40 degC")
        await w.until(lambda: " 40 °C " in w.lines[0])
        assert w.app.session.temperature == pytest.approx(313.15)
        if name == "pairs":
            await w.until(lambda: w.grid.source.shelf.temperature == pytest.approx(313.15))
        await w.press("1")
        await w.until(lambda: "shelf" in w.lines[0])
        assert " 40 °C " in w.lines[0]


@SCREENS
async def test_the_palette_offers_every_action(workbench, name: str) -> None:
    async with workbench() as w:
        await opened(w, name)
        screen = w.app.screen
        offered = {c.title.rsplit(" (", 1)[0] for c in w.app.get_system_commands(screen)}
        for active in screen.active_bindings.values():
            if active.binding.show and active.binding.action != "command_palette":
                assert active.binding.description in offered
        assert all(c.help for c in w.app.get_system_commands(screen))


async def test_an_action_runs_from_the_palette(workbench) -> None:
    async with workbench() as w:
        await w.go_to("acetone")
        await w.press("ctrl+p")
        await w.type("keep")
        await w.until(lambda: "shortlist" in w.text)
        await w.press("down", "enter")
        await w.until(lambda: w.app.session.kept_liquids() == {"acetone"})


@pytest.mark.parametrize("size", [(80, 24), (160, 50), (60, 16)])
@SCREENS
async def test_every_size(workbench, name: str, size: tuple[int, int]) -> None:
    async with workbench(size) as w:
        await opened(w, name)
        assert name in w.lines[0]
        assert w.app.screen.query_one(KeyLine).region.bottom == size[1]


async def test_more_room_shows_more_columns(workbench) -> None:
    hidden = {}
    for size in ((80, 24), (160, 50)):
        async with workbench(size) as w:
            hidden[size] = sum(w.grid.hidden_columns())
    assert hidden[160, 50] == 0 < hidden[80, 24]


async def test_shrinking_loses_nothing(workbench) -> None:
    async with workbench() as w:
        await w.press("slash")
        await w.type("acet")
        await w.pilot.resize_terminal(40, 10)
        await w.until(lambda: "too small" in w.text)
        await w.pilot.resize_terminal(80, 24)
        await w.until(lambda: "too small" not in w.text)
        assert w.prompt.text == "acet"
        await w.type("one")
        await w.press("enter")
        await w.until(lambda: w.app.session.view.filter == "acetone")


async def test_the_next_start_takes_up_the_last_state(workbench) -> None:
    async with workbench() as w:
        await w.go_to("nitrile")
        await w.press("o")
        await w.type("boiling")
        await w.press("enter", "t")
        await w.answer("40 degC")
        await w.press("2")
        await w.until(lambda: "pairs" in w.lines[0])
        await w.press("k")
        await w.type("coupling")
        await w.press("enter")
        await w.until(lambda: w.app.session.pairs.key == "coupling")
    async with workbench() as w:
        await w.until(lambda: "by coupling" in w.lines[0])
        assert w.app.session.temperature == pytest.approx(313.15)
        assert w.app.session.view.filter == "nitrile"
        assert w.app.session.view.sort == "boiling_point"
        await w.press("1")
        await w.until(lambda: "filter: nitrile" in w.lines[0])


async def test_a_strange_saved_state_is_mended(workbench, store_path) -> None:
    from stillroom.chem.choosing.store import Store

    with Store.open(store_path) as store:
        store.set_setting(
            "session",
            {
                "temperature_K": "warm",
                "view": {"filter": "dipole >", "sort": "colour", "columns": ["x"], "liquid": 3},
                "pairs": {"scope": "with", "partner": "nobody", "key": "beauty"},
                "screen": "nowhere",
            },
        )
    async with workbench() as w:
        assert len(w.grid.source) == len(w.app.session.shelf)
        await w.press("2")
        await w.until(lambda: "by total" in w.lines[0])


def test_help_explains_every_code_and_fits() -> None:
    text = help_text()
    assert max(map(len, text.splitlines())) <= 76
    for word in (
        "sound strained unreliable hydrogen-bond vapour-dimer cancelled-dipole conformers kirkwood "
        "one-centre estimated-input outside-liquid-range no-ionization-energy interchange "
        "internal free contact"
    ).split():
        assert word in text


async def test_text_from_outside_cannot_reach_the_terminal_raw(workbench) -> None:
    async with workbench() as w:
        await w.go_to("acetone")
        w.app.screen.say("\x1b]52;c;aGk=\x07[/nope] benzo[a]pyrene")
        await w.pilot.pause()
        assert "\x1b" not in w.text
        assert "[/nope] benzo[a]pyrene" in w.text
