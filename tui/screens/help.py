"""The help screen: signs, conventions, verdicts, marks and keys."""

from __future__ import annotations

from collections.abc import Iterable
from typing import ClassVar

from rich.text import Text
from textual.binding import Binding, BindingType
from textual.containers import VerticalScroll
from textual.widget import Widget
from textual.widgets import Static

from stillroom.chem.forces.contact import PACKING_FRACTION
from stillroom.chem.pairs.ranking import KEYS
from stillroom.chem.pairs.reliability import (
    CANCELLED_BELOW,
    ELONGATED_ABOVE,
    KIRKWOOD_RANGE,
    SOUND_BELOW,
    STRAINED_BELOW,
)
from stillroom.chem.shelf.cautions import DEFER
from stillroom.tui.screens.base import WorkScreen


def help_text() -> str:
    """Return the help as plain text; numbers come from where they are used."""
    keys = "\n".join(
        f"  {name:14} {key.meaning},\n{'':17}{'largest' if key.largest_first else 'smallest'} first"
        for name, key in KEYS.items()
    )
    return f"""\
SIGNS
  Energies are negative when the two molecules attract. kJ/mol is per mole
  of pairs.
  The force -dw/dr is negative when it pulls them together.

ENERGY AND FREE ENERGY
  Shares, totals and cohesion are internal energies; forces and phases
  follow the free energy. The leading orientation term is -2/3 x² kT as
  internal energy and -1/3 x² kT as free energy, with the coupling
  x = mu1 mu2 / (4 pi eps0 r³ kT). "exact" is the full Boltzmann average
  over all orientations; "aligned" (-2x kT) has the dipoles head to tail.

CONTACT
  Unless you give a distance, molecules touch: the mean of both contact
  diameters, of spheres that fill {PACKING_FRACTION:.0%} of the molar volume.

SHARES
  The bar shows █ orientation, ▒ induction, ░ dispersion.

VERDICT on the freely rotating average
  + sound       leading term off by less than {SOUND_BELOW:.0%} (internal energy)
  ! strained    off by less than {STRAINED_BELOW:.0%}
  x unreliable  off by more, or a strong reason against it
  Reasons can only lower it:
  hydrogen-bond         donor meets acceptor (not part of the three forces)
  vapour-dimer          carboxylic acids pair up
  cancelled-dipole      polar groups that sum to less than {CANCELLED_BELOW:g} of their size
  conformers            bonds whose rotation changes the dipole moment
  kirkwood              Kirkwood factor outside {KIRKWOOD_RANGE[0]:g} to {KIRKWOOD_RANGE[1]:g}
  one-centre            molecule longer than {ELONGATED_ABOVE:g} contact diameters
  estimated-input       a value that was not measured
  outside-liquid-range  frozen or boiling at 1 atm
  no-ionization-energy  for information: dispersion by the model without it

RANKING KEYS
{keys}
  Interchange is taken with each pair at its own contact. Positive: unlike
  neighbours are worse off. It is not a prediction of mixing.

MARKS AFTER A NUMBER
  none measured   = derived   c computed   ~ estimated   u yours   - missing
  In the shelf: 1 first of a pair, * on the shortlist.

FILTER
  Plain text searches names, CAS numbers, formulas, families. With a
  comparison it is an expression, with units, joined by and, or, not:
    dipole > 3 D and boiling_point < 180 degC and not family = nitrile
  known(flash_point) asks for a value; hazard ~ peroxide searches hazards.

TEMPERATURE
  t sets it for everything. Density and vaporization enthalpy are carried
  along (~ beyond 10 °C); what cannot be carried is missing and says so.

CAUTIONS
  A caution line names what is known here. Nothing recorded means not known
  here, never safe.
  {DEFER}

KEYS THAT WORK EVERYWHERE
  1 shelf   2 pairs   3 shortlist   t temperature   ? help   q quit
  ctrl+p lists all actions. Arrows, page up and down, home, end move; left
  and right scroll columns.
"""


class HelpScreen(WorkScreen):
    """What signs, conventions, verdicts, marks and keys mean."""

    name_in_heading = " help "
    BINDINGS: ClassVar[list[BindingType]] = [Binding("escape", "app.step_back", "back")]

    def body(self) -> Iterable[Widget]:
        """Return the text."""
        yield VerticalScroll(Static(Text(help_text())), id="help")

    def focus_body(self) -> None:
        """Focus the text, which scrolls."""
        self.query_one("#help").focus()

    def refresh_data(self) -> None:
        """Nothing changes."""
        self.take_focus()
