"""First-order propagation of standard uncertainties, by differences, over arrays."""

from __future__ import annotations

from collections.abc import Callable, Sequence

import numpy as np
from numpy.typing import ArrayLike, NDArray

Array = NDArray[np.float64]


def propagate(
    function: Callable[..., ArrayLike], values: Sequence[ArrayLike], spreads: Sequence[ArrayLike]
) -> tuple[Array, Array]:
    """Return `function(*values)` and its standard uncertainty, inputs taken as independent.

    Each input is moved up and down by its own standard uncertainty and half the difference is its
    contribution: u^2 = sum_i ((f(x_i + u_i) - f(x_i - u_i))/2)^2. Source: JCGM 100:2008 (GUM),
    5.1.3 note 2. Shapes broadcast; an unknown (NaN) uncertainty makes the result's unknown.

    Examples
    --------
    >>> value, spread = propagate(lambda m, rho: m / rho, [58.08, 784.0], [0.01, 2.0])
    >>> print(f"{value:.5f} {spread:.5f}")
    0.07408 0.00019
    """
    arrays = [np.asarray(v, float) for v in values]
    result = np.asarray(function(*arrays), float)
    variance = np.zeros_like(result)
    for i, spread in enumerate(spreads):
        step = np.asarray(spread, float)
        if not step.any():  # a sure input costs nothing
            continue
        up, down = list(arrays), list(arrays)
        up[i], down[i] = arrays[i] + step, arrays[i] - step
        half = (np.asarray(function(*up), float) - np.asarray(function(*down), float)) / 2
        variance = variance + np.square(half)
    return result, np.sqrt(variance)
