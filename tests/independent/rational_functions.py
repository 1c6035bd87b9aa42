"""Rational functions of one variable over the rational numbers, as pairs of coefficient lists."""

from fractions import Fraction

from expressions import HARD, BadClaim, NoValue, definite, plain

def poly_trim(a):
    while a and a[-1] == 0:
        a.pop()
    return a


def poly_add(a, b, sign=1):
    size = max(len(a), len(b))
    pad = lambda c: c + [Fraction(0)] * (size - len(c))
    return poly_trim([x + sign * y for x, y in zip(pad(a), pad(b))])


def poly_mul(a, b):
    out = [Fraction(0)] * max(len(a) + len(b) - 1, 0)
    for i, x in enumerate(a):
        for j, y in enumerate(b):
            out[i + j] += x * y
    return poly_trim(out)


def poly_divmod(a, b):
    quotient, a = [Fraction(0)] * max(len(a) - len(b) + 1, 0), list(a)
    while len(a) >= len(b):
        factor, shift = a[-1] / b[-1], len(a) - len(b)
        quotient[shift] = factor
        a = poly_add(a, [Fraction(0)] * shift + [factor * c for c in b], -1)
    return poly_trim(quotient), a


def poly_gcd(a, b):
    while b:
        a, b = b, poly_divmod(a, b)[1]
    return [c / a[-1] for c in a] if a else [Fraction(1)]


def poly_at(a, x):
    value = Fraction(0)
    for c in reversed(a):
        value = value * x + c
    return value


def rational_function(tree, running, point):
    """(numerator, denominator) in lowest terms, the parameters having their values in point."""
    kind = tree[0]
    one = [Fraction(1)]
    if kind == "symbol" and tree[1] == running:
        return [Fraction(0), Fraction(1)], one
    if kind in ("number", "symbol"):
        return poly_trim([plain(tree, point)]), one
    if kind == "^":
        (p, q), exponent = rational_function(tree[1], running, point), int(definite(tree[2], point))
        if exponent < 0:
            p, q = q, p
        top, bottom = one, one
        for _ in range(abs(exponent)):
            top, bottom = poly_mul(top, p), poly_mul(bottom, q)
        return lowest(top, bottom)
    if kind == "neg":
        p, q = rational_function(tree[1], running, point)
        return [-c for c in p], q
    if kind not in ("+", "-", "*", "/"):
        raise BadClaim(f"{kind} in a coefficient")
    (p, q), (r, s) = (rational_function(t, running, point) for t in tree[1:])
    if kind == "*":
        return lowest(poly_mul(p, r), poly_mul(q, s))
    if kind == "/":
        return lowest(poly_mul(p, s), poly_mul(q, r))
    sign = 1 if kind == "+" else -1
    return lowest(poly_add(poly_mul(p, s), poly_mul(r, q), sign), poly_mul(q, s))


def lowest(p, q):
    if not q:
        raise NoValue(HARD)
    g = poly_gcd(p, q)
    return poly_divmod(p, g)[0], poly_divmod(q, g)[0]
