"""Simulated upper-tail points of the Lilliefors distance, as copied into src/numerics/checks/lilliefors-table.ts.

For each n: RUNS normal samples, D with estimated mean and SD, scaled by sqrt(n) - .01 + .85 / sqrt(n) (Stephens 1974),
points exceeded with the probabilities in ALPHA. Run with Python 3, NumPy 1.24, SciPy 1.10; about ten minutes.
"""
import numpy as np
from scipy.special import ndtr

SEED = 20240512
SIZES = [4, 5, 6, 7, 8, 9, 10, 12, 15, 20, 30, 50, 100, 200, 500, 1000]
ALPHA = [.99, .975, .95, .9, .85, .8, .7, .6, .5, .4, .3, .25, .2, .15, .1, .075, .05, .025, .01, .005, .0025, .001]


def distances(n, runs, rng):
    out = np.empty(runs)
    step = max(1, 4_000_000 // n)
    for start in range(0, runs, step):
        m = min(step, runs - start)
        x = np.sort(rng.standard_normal((m, n)), axis=1)
        z = (x - x.mean(axis=1, keepdims=True)) / x.std(axis=1, ddof=1, keepdims=True)
        f = ndtr(z)
        k = np.arange(1, n + 1)
        out[start:start + m] = np.maximum((k / n - f).max(axis=1), (f - (k - 1) / n).max(axis=1))
    return out


for n in SIZES:
    runs = 2_000_000 if n <= 100 else 400_000
    d = distances(n, runs, np.random.default_rng([SEED, n]))
    scaled = d * (np.sqrt(n) - .01 + .85 / np.sqrt(n))
    points = np.quantile(scaled, 1 - np.array(ALPHA))
    print(f"  [{n}, [{', '.join(f'{v:.5f}'.rstrip('0') for v in points)}]],", flush=True)
