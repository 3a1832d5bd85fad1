"""Writes the grids in this folder: tails at random arguments over wide ranges, from mpmath at 50 digits.

Run: python3 wide.py (mpmath 1.2 or later; about three minutes). Rows whose sum needs too long are drawn again.
Names of grids as arguments write only those.
"""
import os
import random
import signal
import sys

from mpmath import atan, binomial, digamma, erf, erfc, exp, fabs, linspace, log, log1p, loggamma, mp, mpf, ncdf, nstr, pi, quad, re, sign, sqrt

HERE = os.path.dirname(os.path.abspath(__file__))


class TooLong(Exception):
    pass


def stop(*_):
    raise TooLong()


signal.signal(signal.SIGPROF, stop)


def text(x):
    return nstr(mpf(x), 17)


def spread(low, high):
    return float(10 ** random.uniform(float(log(low, 10)), float(log(high, 10))))


def usable(*values):
    return all(mpf(10) ** -300 < v <= 1 for v in values)


def write(name, head, count, draw):
    if sys.argv[1:] and name not in sys.argv[1:]:
        return
    random.seed(name)
    rows = [head]
    while len(rows) <= count:
        mp.dps = 50
        signal.setitimer(signal.ITIMER_PROF, 5)
        try:
            row = draw()
        except TooLong:
            row = None
        finally:
            signal.setitimer(signal.ITIMER_PROF, 0)
        if row:
            rows.append(row)
    with open(os.path.join(HERE, name + '.csv'), 'w') as out:
        out.write('\n'.join(rows) + '\n')


def beta_below(x, a, b):
    """I_x(a, b) by the power series with positive terms."""
    lead = exp(a * log(x) + b * log1p(-x) - log(a) - loggamma(a) - loggamma(b) + loggamma(a + b))
    total = term = mpf(1)
    n = 0
    while term > total * mpf(10) ** -45:
        term *= x * (a + b + n) / (a + 1 + n)
        total += term
        n += 1
    return lead * total


def beta_tails(x, y, a, b):
    x, y, a, b = mpf(x), mpf(y), mpf(a), mpf(b)
    if x <= (a + 1) / (a + b + 2):
        below = beta_below(x, a, b)
        return below, 1 - below
    above = beta_below(y, b, a)
    return 1 - above, above


def beta_row():
    a, b = spread(1e-3, 3e4), spread(1e-3, 3e4)
    mean = a / (a + b)
    sd = (mean * (1 - mean) / (a + b + 1)) ** 0.5
    x = mean + random.uniform(-12, 12) * sd if random.random() < 0.6 else spread(1e-60, 1)
    if not 0 < x < 1:
        return None
    lower, upper = beta_tails(x, 1 - mpf(x), a, b)
    return f'{x!r},{a!r},{b!r},{text(lower)},{text(upper)}' if usable(lower, upper) else None


def t_row():
    df = spread(0.01, 1e5)
    t = random.choice([-1, 1]) * (spread(1e-9, 1e12) if random.random() < 0.4 else random.uniform(0, 30))
    square = mpf(t) * mpf(t)
    both, _ = beta_tails(df / (df + square), square / (df + square), mpf(df) / 2, mpf(0.5))
    lower, upper = (both / 2, 1 - both / 2) if t < 0 else (1 - both / 2, both / 2)
    return f'{t!r},{df!r},{text(lower)},{text(upper)}' if usable(lower, upper) else None


def f_row():
    df1, df2 = spread(0.02, 1e4), spread(0.02, 1e4)
    x = spread(1e-30, 1e30) if random.random() < 0.4 else spread(0.1, 10)
    z = mpf(df1) * x
    lower, upper = beta_tails(z / (z + df2), df2 / (z + df2), mpf(df1) / 2, mpf(df2) / 2)
    return f'{x!r},{df1!r},{df2!r},{text(lower)},{text(upper)}' if usable(lower, upper) else None


def gamma_row():
    a = spread(1e-4, 3e4)
    x = a + random.uniform(-12, 14) * a**0.5 if random.random() < 0.6 else spread(1e-40, 600)
    if not 0 < x < a + 2000:
        return None
    mp.dps = 50 + int(max(0.0, x - a) / 2.3)
    total = term = mpf(1)
    n = 0
    while term > total * mpf(10) ** -mp.dps:
        n += 1
        term *= mpf(x) / (mpf(a) + n)
        total += term
    lower = exp(mpf(a) * log(mpf(x)) - mpf(x) - loggamma(mpf(a) + 1)) * total
    upper = 1 - lower
    return f'{x!r},{a!r},1,{text(lower)},{text(upper)}' if usable(lower, upper) else None


def binomial_row():
    n = random.choice([3, 17, 100, 3000, 20000])
    prob = random.choice([spread(1e-9, 1), 1 - spread(1e-4, 1)])
    k = int(max(0, min(n - 1, n * prob + random.uniform(-8, 8) * (n * prob * (1 - prob)) ** 0.5)))
    p = mpf(prob)
    mass = term = binomial(n, k) * p**k * (1 - p) ** (n - k)
    lower = upper = mpf(0)
    for j in range(k, -1, -1):
        lower += term
        term *= mpf(j) / (n - j + 1) * (1 - p) / p
    term = mass * (n - k) / (k + 1) * p / (1 - p)
    for j in range(k + 1, n + 1):
        upper += term
        term *= mpf(n - j) / (j + 1) * p / (1 - p)
    return f'{k},{n},{prob!r},{text(mass)},{text(lower)},{text(upper)}' if usable(mass, lower, upper) else None


def noncentral_f_row():
    df1, df2, ncp = spread(0.3, 200), spread(1, 3000), spread(1e-3, 2000)
    x = spread(0.02, 50) * (1 + ncp / df1)
    z = mpf(df1) * x
    share, rest, half = z / (z + df2), df2 / (z + df2), mpf(ncp) / 2
    a, b = mpf(df1) / 2, mpf(df2) / 2
    if min(share, rest) < 1e-3:
        return None
    last = int(half + 60 * sqrt(half) + 400)
    term = exp(a * log(share) + b * log(rest) - log(a) - loggamma(a) - loggamma(b) + loggamma(a + b))
    weight, above, upper, steps = exp(-half), beta_below(rest, b, a), mpf(0), []
    for j in range(last):
        steps.append((weight, term))
        upper += weight * above
        above += term
        term *= share * (a + b + j) / (a + j + 1)
        weight *= half / (j + 1)
    if weight * above > upper * mpf(10) ** -25:
        return None
    below, lower = beta_below(share, a + last, b), mpf(0)
    for weight, term in reversed(steps):
        below += term
        lower += weight * below
    good = usable(lower, upper) and fabs(lower + upper - 1) < mpf(10) ** -20
    return f'{x!r},{df1!r},{df2!r},{ncp!r},{text(lower)},{text(upper)}' if good else None


def noncentral_t_row():
    mp.dps = 30
    df = random.choice([1, 1.7, 3, 8.4, 30, 200.5])
    ncp = random.uniform(-6, 36)
    t = ncp * spread(0.2, 4) + random.uniform(-3, 3)
    if abs(t - ncp) > 7 * (1 + t * t / (2 * df)) ** 0.5:
        return None
    a, scale = mpf(df) / 2, mpf(10) ** 32
    lead = scale * 2 * exp(a * log(a) - loggamma(a))

    def density(s):
        return lead * exp((2 * a - 1) * log(s) - a * s * s)

    places = linspace(mpf(0), 1 + 12 / sqrt(2 * a) + 3, 24)
    places[0] = mpf(10) ** -40
    lower = quad(lambda s: density(s) * ncdf(t * s - ncp), places) / scale
    upper = quad(lambda s: density(s) * ncdf(ncp - t * s), places) / scale
    good = lower > 1e-20 and upper > 1e-20 and fabs(lower + upper - 1) < mpf(10) ** -16
    return f'{t!r},{df!r},{ncp!r},{text(lower)},{text(upper)}' if good else None


def owen_row():
    h = random.choice([0, spread(1e-6, 36)])
    a = random.choice([-1, 1]) * spread(1e-8, 1e4)
    if h == 0:
        value = atan(fabs(mpf(a))) / (2 * pi)
    else:
        # Divided by its leading factor, because the quadrature stops at an absolute error.
        places = linspace(0, min(fabs(mpf(a)), 16 / mpf(h)), 16)
        inner = quad(lambda x: exp(-mpf(h) ** 2 * x * x / 2) / (1 + x * x), places)
        value = exp(-mpf(h) ** 2 / 2) * inner / (2 * pi)
    return f'{h!r},{a!r},{text(value * sign(a))}' if usable(value) else None


def lgamma_row():
    near = random.choice([-1, 1]) * spread(1e-12, 0.1)
    x = random.choice([spread(1e-300, 1e300), random.uniform(0, 4), 1 + near, 2 + near, -random.uniform(0, 50), -spread(1e-300, 1)])
    return f'{x!r},{text(re(loggamma(mpf(x))))}'


def digamma_row():
    near = random.choice([-1, 1]) * spread(1e-15, 0.1)
    x = random.choice([spread(1e-300, 1e300), random.uniform(0, 4), 1.4616321449683622 + near, -random.uniform(0, 50)])
    return f'{x!r},{text(digamma(mpf(x)))}'


def erf_row():
    x = random.choice([-1, 1]) * spread(1e-300, 6) if random.random() < 0.3 else random.uniform(-6, 26)
    return f'{x!r},{text(erf(mpf(x)))},{text(erfc(mpf(x)))}'


write('beta_cdf', 'x,a,b,lower,upper', 150, beta_row)
write('t_cdf', 'x,df,lower,upper', 150, t_row)
write('f_cdf', 'x,df1,df2,lower,upper', 150, f_row)
write('gamma_cdf', 'x,shape,scale,lower,upper', 150, gamma_row)
write('binom_cdf', 'k,n,prob,pmf,lower,upper', 100, binomial_row)
write('ncf_cdf', 'x,df1,df2,ncp,lower,upper', 80, noncentral_f_row)
write('nct_cdf', 'x,df,ncp,lower,upper', 30, noncentral_t_row)
write('owens_t', 'h,a,value', 80, owen_row)
write('lgamma', 'x,value', 150, lgamma_row)
write('digamma', 'x,value', 150, digamma_row)
write('erf', 'x,erf,erfc', 150, erf_row)
