"""Water by the formulations of the International Association for the Properties of Water and Steam.

They are the reference; the general tables carry water too, less exactly, and one has a wrong
refractive index.
"""

from __future__ import annotations

from chemicals.interface import sigma_IAPWS
from chemicals.permittivity import permittivity_IAPWS
from chemicals.refractivity import RI_IAPWS
from chemicals.vapor_pressure import Psat_IAPWS
from chemicals.viscosity import mu_IAPWS

from steps.candidate import Candidate
from steps.equations import water_density
from steps.liquid import Liquid

ATMOSPHERE = 101325.0
_INDEX_TEMPERATURE = 293.15

# The formulation is against vacuum; handbooks give indices against air (n - 1 = 2.7e-4 at 589 nm,
# 20 degC and 1 atm: P. E. Ciddor, Appl. Opt. 35, 1566 (1996), from memory).
_AIR = 1.00027


def water_values(liquid: Liquid) -> list[Candidate]:
    """Return the values of ordinary water at 25 degC (index at 20 degC); none for others."""
    if liquid.id != "water":
        return []
    kelvin = liquid.temperature
    density = water_density(kelvin, ATMOSPHERE)
    index = RI_IAPWS(_INDEX_TEMPERATURE, water_density(_INDEX_TEMPERATURE, ATMOSPHERE)) / _AIR
    found = (
        ("density", density, kelvin, "iapws-95", 1e-5),
        ("viscosity", mu_IAPWS(kelvin, density) * 1e3, kelvin, "iapws-2008-viscosity", 0.01),
        ("surface_tension", sigma_IAPWS(kelvin) * 1e3, kelvin, "iapws-1994-tension", 0.005),
        (
            "permittivity",
            permittivity_IAPWS(kelvin, density),
            kelvin,
            "iapws-1997-permittivity",
            0.002,
        ),
        ("vapor_pressure", Psat_IAPWS(kelvin) / 1e3, kelvin, "iapws-if97", 0.001),
        ("refractive_index", index, _INDEX_TEMPERATURE, "iapws-1997-index", 2e-5),
    )
    return [
        liquid.value(quantity, value, at, "derived", source, relative * value).change(
            chosen_by_hand=True
        )
        for quantity, value, at, source, relative in found
    ]
