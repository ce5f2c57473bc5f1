"""Cost of the exact angle average against the leading term alone: `python angle_average.py`.

Both are timed in one run, alternating, as part of what is always needed (the coupling from dipole
moments, distances and temperature), on a million pairs.
"""

from __future__ import annotations

import time
from collections.abc import Callable

import numpy as np

from stillroom.chem.data.constants import DEBYE
from stillroom.chem.forces.angle_average import angle_average, leading_terms
from stillroom.chem.forces.polar import coupling

PAIRS, ROUNDS = 1_000_000, 7


def main() -> None:
    """Print the median seconds and the ratio."""
    rng = np.random.default_rng(1)
    a, b = rng.uniform(0.1, 4.0, (2, PAIRS)) * DEBYE
    r = rng.uniform(0.4e-9, 0.7e-9, PAIRS)

    def exact() -> None:
        angle_average(coupling(a, b, r, 298.15))

    def leading() -> None:
        leading_terms(coupling(a, b, r, 298.15))

    exact()
    times: dict[Callable[[], None], list[float]] = {exact: [], leading: []}
    for _ in range(ROUNDS):
        for function, seconds in times.items():
            start = time.perf_counter()
            function()
            seconds.append(time.perf_counter() - start)
    slow, fast = (float(np.median(times[f])) for f in (exact, leading))
    print(f"{PAIRS} pairs: exact {slow:.3f} s, leading {fast:.3f} s, ratio {slow / fast:.1f}")


if __name__ == "__main__":
    main()
