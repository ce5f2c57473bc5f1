"""How a number tabulated at one temperature is carried to another, and where it may not be."""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike, NDArray

Array = NDArray[np.float64]

WATSON_EXPONENT = 0.38
"""K. M. Watson, Ind. Eng. Chem. 35 (1943) 398."""

RACKETT_BASE = 0.27
"""Typical Rackett parameter Z_RA of organic liquids, 0.23 to 0.29 (C. F. Spencer, R. P. Danner,
J. Chem. Eng. Data 17 (1972) 236)."""

GULDBERG = 1.5
"""Tc/Tb where no critical temperature is known: C. M. Guldberg, Z. phys. Chem. 5 (1890) 374; it
holds within about 10 % (common practice), enough to carry a density."""

RACKETT_ERROR, RACKETT_GUESS_ERROR = 0.1, 0.15
WATSON_ERROR, WATSON_GUESS_ERROR = 0.2, 0.3
"""Relative standard uncertainty of the change that each rule gives, with the critical temperature
known and with Guldberg's.

Fit report: changes by 10 K and more from 25 degC, between melting and boiling point, of 15 organic
and silicone fluids against CoolProp's reference equations: root mean square error of the change
0.07 and 0.15 (Rackett), 0.19 and 0.29 (Watson); alcohols and long chains are worst (up to twice
that). Water's density, with its maximum at 4 degC, is the exception: off by 0.8 of the change, 3 %
at 97 degC."""

NEAR = 5.0
"""K: a tabulated value is used unchanged within this distance of its temperature."""

NEAR_CRITICAL = 0.95
"""Both rules are used up to this fraction of the critical temperature."""


def watson_ratio(temperature: ArrayLike, reference: ArrayLike, critical: ArrayLike) -> Array:
    """Return dHvap(T)/dHvap(T0) = ((1 - T/Tc)/(1 - T0/Tc))^0.38 (K, shapes broadcast; NaN if not
    both temperatures are below `NEAR_CRITICAL` Tc)."""
    t, t0 = _reduced(temperature, critical), _reduced(reference, critical)
    return np.asarray(((1 - t) / (1 - t0)) ** WATSON_EXPONENT)


def rackett_density_ratio(
    temperature: ArrayLike, reference: ArrayLike, critical: ArrayLike
) -> Array:
    """Return rho(T)/rho(T0) = Z^(f(T0) - f(T)), f = (1 - T/Tc)^(2/7), Z = `RACKETT_BASE`.

    Shapes broadcast, temperatures in K; NaN if not both temperatures are below `NEAR_CRITICAL` Tc.
    Source: H. G. Rackett, J. Chem. Eng. Data 15 (1970) 514.
    """
    t, t0 = _reduced(temperature, critical), _reduced(reference, critical)
    return np.asarray(RACKETT_BASE ** ((1 - t0) ** (2 / 7) - (1 - t) ** (2 / 7)))


def _reduced(temperature: ArrayLike, critical: ArrayLike) -> Array:
    ratio = np.asarray(temperature, float) / np.asarray(critical, float)
    return np.where(ratio < NEAR_CRITICAL, ratio, np.nan)
