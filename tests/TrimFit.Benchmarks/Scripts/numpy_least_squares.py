"""Least squares of a million rows by five columns with NumPy (LAPACK gelsd, as numpy.linalg.lstsq does it); prints the seconds of the second run."""
import time

import numpy as np

random = np.random.default_rng(3)
design = random.random((1_000_000, 5)) - 0.5
design[:, 0] = 1
y = 1 + 2 * design[:, 1] + 0.1 * (random.random(1_000_000) - 0.5)
np.linalg.lstsq(design, y, rcond=None)
start = time.perf_counter()
b = np.linalg.lstsq(design, y, rcond=None)[0]
print(f"{time.perf_counter() - start:.6f} {b[1]}")
