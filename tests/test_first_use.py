"""What a first use costs: heavy libraries are imported only where they are needed."""

import subprocess
import sys

import pytest


@pytest.mark.parametrize(
    ("code", "never"),
    [
        ("import stillroom.chem", ["pandas", "scipy", "pint", "textual", "sqlite3"]),
        (
            "from stillroom.tui.cli import main; main(['rank', '--with', 'acetone'])",
            ["pandas", "scipy", "pint", "textual"],
        ),
        ("import stillroom.tui.app", ["pandas", "scipy", "pint"]),
    ],
)
def test_heavy_libraries_stay_out(code: str, never: list[str]) -> None:
    check = f"{code}\nimport sys; print('LOADED', *[m for m in {never!r} if m in sys.modules])"
    done = subprocess.run([sys.executable, "-c", check], capture_output=True, text=True, check=True)
    assert done.stdout.splitlines()[-1].split() == ["LOADED"]
