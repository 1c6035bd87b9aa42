"""Hypergeometric terms at rational points: factorials as gamma values modulo integer shifts."""

from fractions import Fraction
from math import floor

from expressions import HARD, BadClaim, NoValue, factorial, plain, two_place


class Formal:
    """A sum of rational multiples of formal products of gamma values and fractional powers.

    terms: {monomial: Fraction}; a monomial is a frozenset of (symbol, exponent).  Gamma(v) is
    taken modulo integer shifts of v, a power modulo integer exponents, so that the quotient of
    two similar hypergeometric terms at a rational point is the exact rational number it is.
    """

    def __init__(self, terms):
        self.terms = {m: c for m, c in terms.items() if c != 0}

    @staticmethod
    def rational(value):
        return Formal({frozenset(): Fraction(value)})

    def add(self, other, sign=1):
        terms = dict(self.terms)
        for m, c in other.terms.items():
            terms[m] = terms.get(m, 0) + sign * c
        return Formal(terms)

    def times(self, other):
        terms = {}
        for m, c in self.terms.items():
            for m2, c2 in other.terms.items():
                joined, value = join(m, m2)
                terms[joined] = terms.get(joined, 0) + c * c2 * value
        return Formal(terms)

    def inverse(self):
        if len(self.terms) != 1:
            raise NoValue(HARD if not self.terms else "the reciprocal of a sum of unlike terms")
        (m, c), = self.terms.items()
        joined, value = join(frozenset((s, -e) for s, e in m), frozenset())
        return Formal({joined: value / c})

    def raised(self, exponent):
        base = self if exponent >= 0 else self.inverse()
        out = Formal.rational(1)
        for _ in range(abs(exponent)):
            out = out.times(base)
        return out

    def as_rational(self):
        if any(m for m in self.terms):
            raise NoValue("not a rational value")
        return sum(self.terms.values(), Fraction(0))


def join(first, second):
    exponents, value = {}, Fraction(1)
    for symbol, exponent in list(first) + list(second):
        exponents[symbol] = exponents.get(symbol, 0) + exponent
    for symbol, exponent in list(exponents.items()):
        if symbol[0] == "base":  # a power: whole parts of the exponent become numbers
            whole = floor(exponent)
            value *= Fraction(symbol[1]) ** whole
            exponents[symbol] = exponent - whole
    return frozenset((s, e) for s, e in exponents.items() if e != 0), value


def gamma(v):
    """Gamma(v), v rational: a rational number times the symbol Gamma(v - floor v)."""
    whole = floor(v)
    part = v - whole
    if part == 0:
        if whole <= 0:
            raise NoValue("a pole of the gamma function")
        return Formal.rational(factorial(whole - 1))
    value = Fraction(1)
    for i in range(abs(whole)):
        value *= part + i if whole > 0 else 1 / (part - 1 - i)
    return Formal({frozenset({(("gamma", part), 1)}): value})


def reciprocal_gamma(v):
    return Formal({}) if v.denominator == 1 and v <= 0 else gamma(v).inverse()


def formal_falling(a, m):
    """a(a-1)...(a-m+1) = Gamma(a+1)/Gamma(a-m+1), reflected where that has poles."""
    if m.denominator == 1 and 0 <= m < 1000:
        return Formal.rational(two_place("falling", a, m))
    if a.denominator == 1 and a < 0:
        return formal_power(Fraction(-1), m).times(gamma(m - a)).times(reciprocal_gamma(-a))
    return gamma(a + 1).times(reciprocal_gamma(a - m + 1))


def formal_power(base, exponent):
    if base == 0:
        raise NoValue("a power of 0")
    out = Formal.rational(1)
    for prime, multiplicity in factors(base):
        joined, value = join(frozenset({(("base", prime), exponent * multiplicity)}), frozenset())
        out = out.times(Formal({joined: value}))
    return out


def factors(base):
    found = [(-1, 1)] if base < 0 else []
    for number, sign in ((abs(base.numerator), 1), (base.denominator, -1)):
        prime = 2
        while number > 1:
            if prime * prime > number:
                prime = number
            count = 0
            while number % prime == 0:
                number, count = number // prime, count + 1
            if count:
                found.append((prime, sign * count))
            prime += 1
    return found


def formal(tree, point):
    """The term at a rational point, as a Formal."""
    kind = tree[0]
    if kind in ("number", "symbol"):
        return Formal.rational(plain(tree, point))
    if kind == "neg":
        return Formal.rational(-1).times(formal(tree[1], point))
    if kind in ("+", "-"):
        return formal(tree[1], point).add(formal(tree[2], point), 1 if kind == "+" else -1)
    if kind == "*":
        return formal(tree[1], point).times(formal(tree[2], point))
    if kind == "/":
        return formal(tree[1], point).times(formal(tree[2], point).inverse())
    arguments = [formal(t, point) for t in tree[1:]]
    if kind == "^":
        exponent = arguments[1].as_rational()
        if exponent.denominator == 1 and abs(exponent) < 1000:
            return arguments[0].raised(int(exponent))
        return formal_power(arguments[0].as_rational(), exponent)
    numbers = [a.as_rational() for a in arguments]
    if kind == "factorial":
        return gamma(numbers[0] + 1)
    a, m = numbers
    if kind == "binomial":
        return formal_falling(a, m).times(reciprocal_gamma(m + 1))
    if kind == "falling":
        return formal_falling(a, m)
    if kind == "rising":
        return formal_falling(-a, m).times(formal_power(Fraction(-1), m)) if (
            a.denominator == 1 and a <= 0) else gamma(a + m).times(reciprocal_gamma(a))
    raise BadClaim(f"{kind} in a term")
