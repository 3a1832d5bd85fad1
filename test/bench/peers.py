"""Line server of the benchmark: `name number number ...` in, CPU time in ms out. Data are made before the clock starts."""

import sys
import time

import numpy as np
import pandas as pd
from scipy import special, stats

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


def welch_t(a, b):
    """Welch's t along the last axis."""
    n, m = a.shape[-1], b.shape[-1]
    return (a.mean(axis=-1) - b.mean(axis=-1)) / np.sqrt(a.var(axis=-1, ddof=1) / n + b.var(axis=-1, ddof=1) / m)


def closed_form(x, y):
    """Student, Welch, Yuen and Mann-Whitney of every experiment at once."""
    n = x.shape[1]
    v1, v2 = x.var(axis=1, ddof=1) / n, y.var(axis=1, ddof=1) / n
    t = (x.mean(axis=1) - y.mean(axis=1)) / np.sqrt(v1 + v2)
    df = (v1 + v2) ** 2 / (v1**2 / (n - 1) + v2**2 / (n - 1))
    m1, d1 = yuen_parts(np.sort(x, axis=1))
    m2, d2 = yuen_parts(np.sort(y, axis=1))
    h = n - 2 * int(0.2 * n)
    robust = (d1 + d2) ** 2 / (d1**2 / (h - 1) + d2**2 / (h - 1))
    u = (x[:, :, None] > y[:, None, :]).sum(axis=(1, 2))
    return [
        2 * stats.t.sf(np.abs(t), 2 * n - 2) <= 0.05,
        2 * stats.t.sf(np.abs(t), df) <= 0.05,
        2 * stats.t.sf(np.abs(m1 - m2) / np.sqrt(d1 + d2), robust) <= 0.05,
        np.minimum(u, n * n - u) <= 127,
    ]


def error_rates_numpy(experiments, b):
    """Eight tests of 20 + 20 scores; resamples and relabellings of one experiment are drawn together."""
    n = 20
    rng = np.random.default_rng(1)

    def resampled(x, y):
        m1, d1 = yuen_parts(np.sort(x[rng.integers(0, n, (b, n))], axis=1))
        m2, d2 = yuen_parts(np.sort(y[rng.integers(0, n, (b, n))], axis=1))
        own1, own2 = yuen_parts(np.sort(x)[None, :]), yuen_parts(np.sort(y)[None, :])
        own = own1[0][0] - own2[0][0]
        d = m1 - m2
        p = 2 * min(np.mean(d < 0), np.mean(d > 0))
        t = np.abs(d - own) / np.sqrt(d1 + d2)
        larger = np.sum(t >= abs(own) / np.sqrt(own1[1][0] + own2[1][0]))
        both = np.concatenate([x, y])[np.argsort(rng.random((b, 2 * n)), axis=1)]
        first, second = both[:, :n], both[:, n:]
        far = np.sum(np.abs(first.mean(axis=1) - second.mean(axis=1)) >= abs(x.mean() - y.mean()))
        farther = np.sum(np.abs(welch_t(first, second)) >= abs(welch_t(x, y)))
        return [p <= 0.05, larger + 1 <= 0.05 * (b + 1), far + 1 <= 0.05 * (b + 1), farther + 1 <= 0.05 * (b + 1)]

    def work():
        x = rng.standard_normal((experiments, n))
        y = rng.standard_normal((experiments, n))
        rates = [each.mean() for each in closed_form(x, y)]
        return rates + list(np.mean([resampled(x[i], y[i]) for i in range(experiments)], axis=0))

    return work


def error_rates_scipy(experiments, b):
    """The same by the library's own tests, vectorized where they can be."""
    n = 20
    rng = np.random.default_rng(1)

    def apart(a, c, axis=-1):
        return trimmed(a, axis=axis) - trimmed(c, axis=axis)

    def difference(a, c, axis=-1):
        return np.mean(a, axis=axis) - np.mean(c, axis=axis)

    def studentized(a, c, axis=-1):
        return stats.ttest_ind(a, c, axis=axis, equal_var=False).statistic

    def one(x, y):
        boot = stats.bootstrap((x, y), apart, n_resamples=b, vectorized=True, method="percentile", random_state=rng)
        low, high = boot.confidence_interval
        a, c = x - trimmed(x), y - trimmed(y)
        drawn = a[rng.integers(0, n, (b, n))], c[rng.integers(0, n, (b, n))]
        t = stats.ttest_ind(*drawn, axis=1, equal_var=False, trim=0.2).statistic
        own = stats.ttest_ind(x, y, equal_var=False, trim=0.2)
        kind = {"n_resamples": b, "vectorized": True, "random_state": rng}
        return [
            stats.ttest_ind(x, y).pvalue <= 0.05,
            stats.ttest_ind(x, y, equal_var=False).pvalue <= 0.05,
            own.pvalue <= 0.05,
            stats.mannwhitneyu(x, y, method="exact").pvalue <= 0.05,
            low > 0 or high < 0,
            np.sum(np.abs(t) >= abs(own.statistic)) + 1 <= 0.05 * (b + 1),
            stats.permutation_test((x, y), difference, **kind).pvalue <= 0.05,
            stats.permutation_test((x, y), studentized, **kind).pvalue <= 0.05,
        ]

    def work():
        x = rng.standard_normal((experiments, n))
        y = rng.standard_normal((experiments, n))
        return np.mean([one(x[i], y[i]) for i in range(experiments)], axis=0)

    return work


TRIMS = np.array([0, 5, 10, 15, 20, 25])


def kept_sets(n, rules):
    """Marks of those within each rule's limits: no rule, then cutoffs of MAD, SD and quartile fences."""
    x = scores(2 * n)
    steps = np.arange(13) / 4
    middle = np.median(x)
    mad = 1.4826 * np.median(np.abs(x - middle))
    low, high = np.quantile(x, [0.25, 0.75])
    marks = [np.ones(2 * n, bool)]
    marks += [np.abs(x - middle) <= (1.5 + k) * mad for k in steps]
    marks += [np.abs(x - x.mean()) <= (1.5 + k) * x.std(ddof=1) for k in steps]
    marks += [(x >= low - (0.5 + k) * (high - low)) & (x <= high + (0.5 + k) * (high - low)) for k in steps]
    return x, marks[:rules]


def labels_of(n, relabellings, rng):
    """The data's own labels first."""
    first = np.argsort(rng.random((relabellings, 2 * n)), axis=1) < n
    return np.concatenate([[np.arange(2 * n) < n], first])


def joint_p(estimates, z):
    """Median raw estimate, average Z, share significant, largest |Z|: how often each reaches the data's."""
    sure = stats.norm.ppf(0.975)
    share = np.maximum((z >= sure).mean(axis=1), (z <= -sure).mean(axis=1))
    found = np.stack([np.abs(np.median(estimates, axis=1)), np.abs(z.mean(axis=1)), share, np.abs(z).max(axis=1)])
    return (1 + np.sum(found[:, 1:] >= found[:, :1], axis=1)) / found.shape[1]


def group_parts(values, n):
    """Trimmed mean, (n-1) winsorized variance and h for every trim of rows sorted into their first n places."""
    total = np.concatenate([np.zeros((len(values), 1)), np.cumsum(values, axis=1)], axis=1)
    square = np.concatenate([np.zeros((len(values), 1)), np.cumsum(values * values, axis=1)], axis=1)
    rows = np.arange(len(values))[:, None]
    g = TRIMS * n[:, None] // 100
    last = n[:, None] - g
    low, high = values[rows, g], values[rows, last - 1]
    sums = total[rows, last] - total[rows, g]
    mean = (sums + g * (low + high)) / n[:, None]
    q = square[rows, last] - square[rows, g] + g * (low * low + high * high) - n[:, None] * mean * mean
    return sums / (last - g), q, last - g


def joint_grid_numpy(n, rules, relabellings):
    """Each rule's scores sorted once; labels bring them into two sorted groups, cumulative sums give every trim."""
    x, marks = kept_sets(n, rules)
    rng = np.random.default_rng(1)

    def work():
        labels = labels_of(n, relabellings, rng)
        estimates, z = [], []
        for mark in marks:
            order = np.flatnonzero(mark)[np.argsort(x[mark])]
            first = labels[:, order]
            n1 = first.sum(axis=1)
            n2 = len(order) - n1
            place1 = np.argsort(~first, axis=1, kind="stable")
            place2 = np.argsort(first, axis=1, kind="stable")
            for log in (False, True):
                v = np.log(x[order]) if log else x[order]
                v = v - np.median(v)
                m1, q1, h1 = group_parts(v[place1], n1)
                m2, q2, h2 = group_parts(v[place2], n2)
                d1, d2 = q1 / (h1 * (h1 - 1)), q2 / (h2 * (h2 - 1))
                df = (d1 + d2) ** 2 / (d1**2 / (h1 - 1) + d2**2 / (h2 - 1))
                t = (m1 - m2) / np.sqrt(d1 + d2)
                z.append(-np.sign(t) * special.ndtri(special.stdtr(df, -np.abs(t))))
                if not log:
                    estimates.append(m1 - m2)
        return joint_p(np.concatenate(estimates, axis=1), np.concatenate(z, axis=1))

    return work


def joint_grid_scipy(n, rules, relabellings):
    """Every specification under every relabelling by the library's own test."""
    x, marks = kept_sets(n, rules)
    rng = np.random.default_rng(1)

    def work():
        labels = labels_of(n, relabellings, rng)[1:]
        found = []
        for first in labels:
            for mark in marks:
                for v in (x, np.log(x)):
                    a, b = v[mark & first], v[mark & ~first]
                    for trim in TRIMS:
                        test = stats.ttest_ind(a, b, equal_var=False, trim=trim / 100)
                        found.append(np.sign(test.statistic) * stats.norm.isf(test.pvalue / 2))
        return np.mean(found)

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


def two_of(n):
    return scores(n), scores(2 * n)[n:]


def repeated(work):
    """Short work is done often enough for the clock: the time is of one."""
    work.short = True
    return work


def shapiro_scipy(n):
    x = scores(n)
    return repeated(lambda: stats.shapiro(x))


def theil_sen_scipy(n):
    x, y = two_of(n)
    return repeated(lambda: stats.theilslopes(y, x))


def walsh_numpy(n):
    x = scores(n)
    i, j = np.triu_indices(n)
    return repeated(lambda: np.median((x[i] + x[j]) / 2))


def shift_numpy(n):
    x, y = two_of(n)
    return repeated(lambda: np.median(np.subtract.outer(x, y)))


def mann_whitney_scipy(n):
    x, y = two_of(n)
    return repeated(lambda: stats.mannwhitneyu(x, y, method="exact"))


def signed_rank_scipy(n):
    x = scores(n) - 0.7
    return repeated(lambda: stats.wilcoxon(x, mode="exact"))


WORK = {
    f.__name__: f
    for f in [
        bootstrap_numpy,
        bootstrap_scipy,
        bootstrap_t_numpy,
        bootstrap_t_scipy,
        error_rates_numpy,
        error_rates_scipy,
        joint_grid_numpy,
        joint_grid_scipy,
        rule_scores_pandas,
        rule_step_pandas,
        shapiro_scipy,
        theil_sen_scipy,
        walsh_numpy,
        shift_numpy,
        mann_whitney_scipy,
        signed_rank_scipy,
    ]
}


def main():
    for line in sys.stdin:
        name, *args = line.split()
        work = WORK[name](*[int(each) for each in args])
        before = time.process_time()
        work()
        spent = time.process_time() - before
        times = 1
        while spent < 0.02 and getattr(work, "short", False):
            times *= 2
            before = time.process_time()
            for _ in range(times):
                work()
            spent = time.process_time() - before
        print(spent * 1000 / times, flush=True)


main()
