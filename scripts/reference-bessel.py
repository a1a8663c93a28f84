#!/usr/bin/env python3
"""Makes fixtures/bessel/*.json: reference values of 40 digits for the Bessel functions of the skin folder.

Needs mpmath (Debian: apt-get install python3-mpmath). Run from the root of the repository:

    /usr/bin/python3 scripts/reference-bessel.py              writes the fixtures (a quarter of an hour)
    /usr/bin/python3 scripts/reference-bessel.py --constants  prints the constants of src/skin/dd/elementary.ts

The code is deliberately naive: power series and plain recurrences in long arithmetic where that is affordable, the
general routines of mpmath elsewhere, no method of the code under test at its working precision. Every point is checked
by the Wronskian I_n K_{n+1} + I_{n+1} K_n = 1/z to 50 digits before it is written.
"""
import json
import sys
from pathlib import Path

from mpmath import (besseli, besseljzero, besselk, bei, ber, cos, euler, exp, findroot, floor, kei, ker, log, mp,
                    mpc, mpf, nstr, pi, radians, sin, sqrt, workdps)

DIGITS = 40
# the regular part of K_10 on the imaginary axis at 1e-8 is 1e-178 of the other
WORKING = 250
FOLDER = Path(__file__).resolve().parent.parent / 'fixtures' / 'bessel'
ORDERS = [0, 1, 2, 3, 5, 10, 30, 100, 200, 400, 700]
# power series up to here: its working digits grow like |z|
SERIES_MODULUS = 200

# [name, moduli]: one band of |z|; the moduli are ordinary numbers, no powers of two
BANDS = [
    ['1e-8..1e-4', [1e-8, 3.7e-7, 2.9e-5]],
    ['1e-4..1e-1', [1.7e-4, 2.3e-3, 4.1e-2]],
    ['0.1..2', [0.13, 0.77, 1.9]],
    ['2..10', [2.1, 3.3, 5.7, 9.1]],
    ['10..40', [12.3, 21.7, 39.3]],
    ['40..1e3', [40.7, 97.1, 213.0, 733.0]],
    ['1e3..1e6', [1.9e3, 1.37e4, 1.53e5, 1e6]],
]
FAN = [0, 1, 10, 22.5, 30, 60, 75, 89, 90]
# more points on the ray of 45 degrees
RAY_FACTORS = [1, 1.618]


def text(x):
    """40 digits."""
    return nstr(x, DIGITS, strip_zeros=True, min_fixed=-3, max_fixed=3) if x else '0'


def binary(v):
    """[re, im, exponent] with v = (re + j im) 2^exponent and the larger part in 1 .. 2."""
    size = max(abs(v.real), abs(v.imag))
    exponent = int(floor(log(size, 2)))
    return [text(v.real / mpf(2) ** exponent), text(v.imag / mpf(2) ** exponent), exponent]


def point(modulus, degrees):
    """A point of doubles; 45 degrees and the axes exactly."""
    if degrees == 45:
        part = float(mpf(modulus) * sqrt(mpf(1) / 2))
        return part, part
    if degrees == 90:
        return 0.0, modulus
    if degrees == 0:
        return modulus, 0.0
    return float(modulus * cos(radians(mpf(degrees)))), float(modulus * sin(radians(mpf(degrees))))


def on_axis(n, z, v):
    """Removes what rounding leaves in the part that is zero (I only)."""
    if z.imag == 0:
        return mpc(v.real, 0)
    if z.real == 0:
        return mpc(v.real, 0) if n % 2 == 0 else mpc(0, v.imag)
    return v


def series_i(n, z):
    """I_n(z) by its power series with enough digits for the cancellation."""
    digits = mp.dps
    mp.dps = digits + int(abs(z)) + 20
    x = z * z / 4
    term = mpc(1)
    for k in range(1, n + 1):
        term = term * z / (2 * k)
    total = term
    k = 0
    size = abs(total)
    while True:
        k += 1
        term = term * x / (k * (n + k))
        total += term
        if k > abs(z) and abs(term) < size * mpf(10) ** (-mp.dps):
            break
    mp.dps = digits
    return +total


def functions(z):
    """{n: I_n}, {n: K_n} for the orders and their successors."""
    wanted = sorted(set(ORDERS + [n + 1 for n in ORDERS]))
    i = {n: on_axis(n, z, series_i(n, z) if abs(z) <= SERIES_MODULUS else besseli(n, z)) for n in wanted}
    k = {}
    lower, upper = besselk(0, z), besselk(1, z)
    if z.imag == 0:
        lower, upper = mpc(lower.real), mpc(upper.real)
    for n in range(wanted[-1] + 1):
        if n in i:
            k[n] = lower
        lower, upper = upper, lower + 2 * (n + 1) / z * upper
    for n in ORDERS:
        defect = abs((i[n] * k[n + 1] + i[n + 1] * k[n]) * z - 1)
        if not defect < mpf(10) ** -50:
            raise ValueError(f'Wronskian of order {n} at {z}: {nstr(defect, 3)}')
    return i, k


def reflection(n, r, mu):
    return (n + r - n * mu) / (n + r + n * mu)


def write(name, what, data):
    origin = {
        'what': what,
        'origin': 'scripts/reference-bessel.py, mpmath, %d digits kept of %d working digits' % (DIGITS, WORKING),
    }
    lines = ',\n'.join(json.dumps(row, separators=(',', ':')) for row in data)
    path = FOLDER / name
    path.write_text(json.dumps(origin)[:-1] + ', "rows": [\n' + lines + '\n]}\n')
    print(path.name, len(data), 'rows', path.stat().st_size, 'bytes')


def fan():
    """I_n, K_n with and without exponential, and reflections, over the right half plane."""
    rows, reflections = [], []
    for band, moduli in BANDS:
        for degrees in sorted(FAN + [45]):
            for modulus in moduli:
                for factor in RAY_FACTORS if degrees == 45 and modulus < 6e5 else [1]:
                    re, im = point(modulus * factor, degrees)
                    z = mpc(re, im)
                    i, k = functions(z)
                    plus, minus = exp(z), exp(-z)
                    here = {'band': band, 'degrees': degrees, 're': re, 'im': im}
                    rows.append({**here, 'scaled': [[n, binary(i[n] * minus), binary(k[n] * plus)] for n in ORDERS],
                                 'plain': [[n, binary(i[n]), binary(k[n])] for n in (0, 1, 10)]})
                    g = []
                    for n in (1, 2, 5, 30, 200, 700):
                        r = z * i[n + 1] / i[n]
                        g.append([n, binary(reflection(n, r, 1)), binary(reflection(n, r, 50))])
                    reflections.append({**here, 'g': g})
    write('fan.json', 'scaled: [n, e^-z I_n(z), e^z K_n(z)], plain: [n, I_n(z), K_n(z)], each [re, im, exponent of 2]', rows)
    write('fan-reflections.json', 'g: [n, G_n for mu = 1, for mu = 50], G_n = (n + r - n mu)/(n + r + n mu), '
          'r = z I_{n+1}(z)/I_n(z), each [re, im, exponent of 2]', reflections)


def ray():
    """r_n and G_n on the ray z^2 = jT, T a double: what the hot path computes."""
    rows = []
    for e in range(-32, 29):
        t = float(mpf(10) ** (mpf(e) / 2) * mpf('1.2345'))
        s = mpc(0, t)
        row = {'t': t, 'r': []}
        rows.append(row)
        for n in [0, 1, 2, 3, 5, 10, 20, 30, 43, 44, 60, 100, 200, 400, 700, 1500]:
            # backward recurrence from far above, started at 0: the start is forgotten
            top = n + 200 + int(30 * sqrt(sqrt(mpf(t)))) + int(2 * min(mpf(300), sqrt(mpf(t))))
            w = sqrt(top * top + s)
            r = s / (w + top)
            for m in range(top, n, -1):
                r = s / (2 * m + r)
            if n in (0, 1, 30) and 1e-4 < t < 1e4:
                q = sqrt(s)
                direct = q * series_i(n + 1, q) / series_i(n, q)
                if not abs(r / direct - 1) < mpf(10) ** -45:
                    raise ValueError(f'ratio of order {n} at T = {t}')
            row['r'].append([n, binary(r)] + ([binary(reflection(n, r, mu)) for mu in (1, 300)] if n > 0 else []))
            if n == 1:
                row['z'] = binary(1 + r / 2)
            if n == 2:
                row['l'] = binary(4 / (4 + r))
    write('ray.json', 'r: [n, r_n, G_n for mu = 1, for mu = 300] with r_n = q I_{n+1}(q)/I_n(q), q^2 = jT; z = Z_int/R_dc; '
          'l = L_int 8 pi/mu; each [re, im, exponent of 2]', rows)


def zeros():
    """Zeros of J_1, and Kelvin functions at the doubles next to their own zeros."""
    data = {'j1': [[k, text(besseljzero(1, k))] for k in list(range(1, 21)) + [50, 100, 1000]], 'kelvin': []}
    starts = {'ber': [2.84892, 7.23883, 11.67396], 'bei': [5.02622, 9.45541, 13.89349],
              'ker': [1.71854, 6.12728, 10.56294], 'kei': [3.91467, 8.34422, 12.78256]}
    for name, function in (('ber', ber), ('bei', bei), ('ker', ker), ('kei', kei)):
        for start in starts[name]:
            with workdps(60):
                x = float(findroot(lambda y: function(0, y), start))
            data['kelvin'].append([name, x, text(function(0, mpf(x)))])
    write('zeros.json', 'j1: zeros of J_1 [k, j_{1,k}]; kelvin: [function, x, value] at the doubles next to zeros', [data])


def parts(x, count):
    """x as a sum of doubles."""
    found = []
    for _ in range(count):
        found.append(float(x))
        x -= mpf(found[-1])
    return found


if __name__ == '__main__':
    mp.dps = WORKING
    if '--constants' in sys.argv:
        for name, value, count in (('pi', pi, 2), ('gamma', euler, 2), ('sqrt(1/2)', sqrt(mpf(1) / 2), 2),
                                   ('ln 2', log(mpf(2)), 3), ('pi/2', pi / 2, 4)):
            print(name, parts(+value, count))
    else:
        FOLDER.mkdir(parents=True, exist_ok=True)
        zeros()
        ray()
        fan()
