"""Line server of the benchmark: `name number number ...` in, CPU time in ms out. Data are made before the clock starts."""

import sys
import time

import numpy as np
import pandas as pd
from scipy import stats

CHUNK = 4_000_000


def scores(n):
    """Skewed scores, the same in every language: -log of an evenly spread sequence."""
    i = np.arange(1, n + 1)
    return -np.log(((i * 7919) % 10007 + 1) / 10008)


def trimmed(x, axis=-1):
    return stats.trim_mean(x, 0.2, axis=axis)


def chunks(n, b):
    per = max(1, CHUNK // n)
    return [min(per, b - start) for start in range(0, b, per)]


def estimates_by(order, x, b, rng):
    n = len(x)
    g = int(0.2 * n)
    parts = []
    for rows in chunks(n, b):
        drawn = x[rng.integers(0, n, (rows, n))]
        parts.append(order(drawn, g, n)[:, g : n - g].mean(axis=1))
    return np.concatenate(parts)


def by_sort(drawn, g, n):
    return np.sort(drawn, axis=1)


def by_partition(drawn, g, n):
    return np.partition(drawn, (g, n - g - 1), axis=1)


def rank_sorted(x, b, rng):
    """Sort once, draw small ranks, sort those."""
    x = np.sort(x)
    n = len(x)
    g = int(0.2 * n)
    kind = np.uint16 if n < 65536 else np.uint32
    parts = []
    for rows in chunks(n, b):
        ranks = rng.integers(0, n, (rows, n), dtype=kind)
        ranks.sort(axis=1)
        parts.append(x[ranks[:, g : n - g]].mean(axis=1))
    return np.concatenate(parts)


def percentile(x, method, b, rng):
    if method == 2:
        means = rank_sorted(x, b, rng)
    else:
        means = estimates_by(by_sort if method == 0 else by_partition, x, b, rng)
    return np.quantile(means, [0.025, 0.975])


def bca(x, method, b, rng):
    n = len(x)
    if method == 2:
        means = rank_sorted(x, b, rng)
    else:
        means = estimates_by(by_sort if method == 0 else by_partition, x, b, rng)
    own = trimmed(x)
    z = stats.norm.ppf((np.sum(means < own) + np.sum(means <= own)) / (2 * b))
    s = np.sort(x)
    g = int(0.2 * (n - 1))
    total = np.concatenate([[0], np.cumsum(s)])
    out = np.arange(n)
    low = np.where(out < g, g + 1, g)
    high = np.where(out <= n - 2 - g, n - g, n - 1 - g)
    inside = (out >= low) & (out < high)
    jack = (total[high] - total[low] - np.where(inside, s, 0)) / (n - 1 - 2 * g)
    d = jack.mean() - jack
    a = np.sum(d**3) / (6 * np.sum(d**2) ** 1.5)
    zq = z + stats.norm.ppf([0.025, 0.975])
    return np.quantile(means, stats.norm.cdf(z + zq / (1 - a * zq)))


def bootstrap_numpy(n, b, method, corrected):
    x = scores(n)
    rng = np.random.default_rng(1)
    return lambda: (bca if corrected else percentile)(x, method, b, rng)


def bootstrap_scipy(n, b, corrected):
    x = scores(n)
    batch = max(1, CHUNK // n)
    name = "BCa" if corrected else "percentile"
    return lambda: stats.bootstrap((x,), trimmed, n_resamples=b, batch=batch, vectorized=True, method=name, random_state=1)


def yuen_parts(s):
    """Trimmed mean and its squared standard error of each row; rows are sorted."""
    n = s.shape[1]
    g = int(0.2 * n)
    h = n - 2 * g
    mean = s[:, g : n - g].mean(axis=1)
    w = s.copy()
    w[:, :g] = s[:, g : g + 1]
    w[:, n - g :] = s[:, n - g - 1 : n - g]
    return mean, w.var(axis=1, ddof=1) * (n - 1) / (h * (h - 1))


def two_groups(n):
    x = scores(n)
    y = scores(2 * n)[n:] + 0.5
    return x, y, x - trimmed(x), y - trimmed(y)


def bootstrap_t_numpy(n, b):
    x, y, a, c = two_groups(n)
    rng = np.random.default_rng(1)

    def work():
        m1, v1 = yuen_parts(np.sort(a[rng.integers(0, n, (b, n))], axis=1))
        m2, v2 = yuen_parts(np.sort(c[rng.integers(0, n, (b, n))], axis=1))
        t = np.abs((m1 - m2) / np.sqrt(v1 + v2))
        return np.quantile(t, 0.95)

    return work


def bootstrap_t_scipy(n, b):
    """The statistic of each resample by the library's own trimmed test, all resamples in one call."""
    x, y, a, c = two_groups(n)
    rng = np.random.default_rng(1)

    def work():
        drawn = a[rng.integers(0, n, (b, n))], c[rng.integers(0, n, (b, n))]
        found = stats.ttest_ind(*drawn, axis=1, equal_var=False, trim=0.2)
        return np.quantile(np.abs(found.statistic), 0.95)

    return work


def trials(rows, people):
    """Trials of people under four conditions, in file order."""
    i = np.arange(rows)
    person = i * people // rows
    return pd.DataFrame(
        {
            "person": pd.Categorical.from_codes(person, [str(each) for each in range(people)]),
            "condition": pd.Categorical.from_codes(i % 4, ["a", "b", "c", "d"]),
            "ms": 400 + 100 * scores(rows) + person % 50,
        }
    )


def trimmed_scores(kept):
    """20 % trimmed mean of each person under each condition, without a Python call per cell."""
    s = kept.sort_values("ms", kind="stable")
    cells = s.groupby(["person", "condition"], observed=False, sort=False)["ms"]
    place = cells.cumcount().to_numpy()
    n = cells.transform("size").to_numpy()
    g = n // 5
    inside = s[(place >= g) & (place < n - g)]
    return inside.groupby(["person", "condition"], observed=False)["ms"].mean().unstack()


def middle_and_mad(data):
    middle = data.groupby("person", observed=False)["ms"].transform("median")
    away = (data["ms"] - middle).abs()
    return away, 1.4826 * away.groupby(data["person"], observed=False).transform("median")


def rule_scores_pandas(rows, people):
    data = trials(rows, people)

    def work():
        away, mad = middle_and_mad(data)
        return trimmed_scores(data[away <= 2.5 * mad])

    return work


def rule_step_pandas(rows, people):
    """One step of the cutoff with the medians and MADs kept."""
    data = trials(rows, people)
    away, mad = middle_and_mad(data)
    return lambda: trimmed_scores(data[away <= 2.6 * mad])


WORK = {
    f.__name__: f
    for f in [
        bootstrap_numpy,
        bootstrap_scipy,
        bootstrap_t_numpy,
        bootstrap_t_scipy,
        rule_scores_pandas,
        rule_step_pandas,
    ]
}


def main():
    for line in sys.stdin:
        name, *args = line.split()
        work = WORK[name](*[int(each) for each in args])
        before = time.process_time()
        work()
        print((time.process_time() - before) * 1000, flush=True)


main()
