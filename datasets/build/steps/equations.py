"""Correlation equations of the `chemicals` package, with types.

Each function hands on to the one named in its docstring, where formula and reference stand.
Temperatures in K, results in SI unless said otherwise.
"""

from __future__ import annotations

from chemicals import dippr, iapws, interface, permittivity, phase_change, viscosity, volume


def equation_101(temperature: float, coefficients: list[float]) -> float:
    """`chemicals.dippr.EQ101`: exp(A + B/T + C ln T + D T^E)."""
    return float(dippr.EQ101(temperature, *coefficients))  # type: ignore[no-untyped-call]


def equation_105(temperature: float, coefficients: list[float]) -> float:
    """`chemicals.dippr.EQ105`: A / B^(1 + (1 - T/C)^D)."""
    return float(dippr.EQ105(temperature, *coefficients))  # type: ignore[no-untyped-call]


def equation_106(temperature: float, critical: float, coefficients: list[float]) -> float:
    """`chemicals.dippr.EQ106`: A (1 - Tr)^(B + C Tr + D Tr^2)."""
    return float(dippr.EQ106(temperature, critical, *coefficients))  # type: ignore[no-untyped-call]


def ppds_9(temperature: float, coefficients: list[float]) -> float:
    """`chemicals.viscosity.PPDS9`: viscosity in Pa s."""
    return float(viscosity.PPDS9(temperature, *coefficients))  # type: ignore[no-untyped-call]


def ppds_12(temperature: float, critical: float, coefficients: list[float]) -> float:
    """`chemicals.phase_change.PPDS12`: vaporization enthalpy in J/mol."""
    enthalpy = phase_change.PPDS12
    return float(enthalpy(temperature, critical, *coefficients))  # type: ignore[no-untyped-call]


def ppds_14(temperature: float, critical: float, coefficients: list[float]) -> float:
    """`chemicals.interface.PPDS14`: surface tension in N/m."""
    value = interface.PPDS14(temperature, critical, *coefficients)  # type: ignore[no-untyped-call]
    return float(value)


def vdi_density(temperature: float, critical: float, coefficients: list[float]) -> float:
    """`chemicals.volume.volume_VDI_PPDS`: density in kg/m^3; coefficient 1 is the critical one."""
    density = volume.volume_VDI_PPDS
    return float(density(temperature, critical, *coefficients))  # type: ignore[no-untyped-call]


def crc_permittivity(temperature: float, coefficients: list[float]) -> float:
    """`chemicals.permittivity.permittivity_CRC`: A + B T + C T^2 + D T^3."""
    value = permittivity.permittivity_CRC(temperature, *coefficients)  # type: ignore[no-untyped-call]
    return float(value)


def water_density(temperature: float, pressure: float) -> float:
    """`chemicals.iapws.iapws95_rho`: density of water in kg/m^3 at a pressure in Pa."""
    return float(iapws.iapws95_rho(temperature, pressure))  # type: ignore[no-untyped-call]
