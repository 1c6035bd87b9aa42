#!/usr/bin/env python3
"""Exact evaluation of claim files, independent of the program under test.

    evaluate_claim.py FILE... [--up-to N] [--json]

Reads each claim by itself (standard library only) and evaluates it with exact fractions for
n = from .. from+N and several parameter values.  One line per claim: "true so far", or the
first counterexample with both sides.  A certificate is tried at random rational, non-integer
points, where every factorial is a gamma value taken modulo integer shifts.  When the first
line of the file reads "# false at: n = 4, m = 1", that point is evaluated as well.

Exit status: 0 nothing false found, 1 something false found, 2 a file could not be read.
"""

import argparse
import json
import random
import re
import sys
import tomllib
from fractions import Fraction
from itertools import product
from math import floor

HARD = "division by zero"
FUNCTIONS = ("binomial", "factorial", "rising", "falling", "floor", "min", "max")


class NoValue(Exception):
    """A division by zero: no surrounding product can repair it."""


class BadClaim(Exception):
    """The file is not a claim this evaluator can read."""


class Undefined:
    """The value of a factorial, rising or falling outside its domain."""

    def __init__(self, why):
        self.why = why


# ---------------------------------------------------------------- expressions

TOKEN = re.compile(r"\s*(?:(\d+)|([A-Za-z][A-Za-z0-9_]*)|([-+*/^(),]))")


def tokens_of(text):
    found, place, text = [], 0, text.rstrip()
    while place < len(text):
        match = TOKEN.match(text, place)
        if not match:
            raise BadClaim(f"unexpected {text[place:place + 10]!r} in {text!r}")
        number, name, sign = match.groups()
        found.append(("number", int(number)) if number else ("name", name) if name else (sign, sign))
        place = match.end()
    return found + [("end", None)]


class Parser:
    """expr = term {(+|-) term}; term = signed {(*|/) signed}; signed = (+|-) signed | power;
    power = atom [^ signed-power].  Nodes are tuples whose first entry names the operation."""

    def __init__(self, text):
        self.tokens, self.place = tokens_of(text), 0

    def peek(self):
        return self.tokens[self.place][0]

    def take(self, kind=None):
        token = self.tokens[self.place]
        if kind and token[0] != kind:
            raise BadClaim(f"expected {kind}, got {token[1]!r}")
        self.place += 1
        return token[1]

    def whole(self):
        tree = self.sum()
        self.take("end")
        return tree

    def sum(self):
        tree = self.term()
        while self.peek() in "+-" and self.peek() != "end":
            sign = self.take()
            tree = ("+" if sign == "+" else "-", tree, self.term())
        return tree

    def term(self):
        tree = self.signed()
        while self.peek() in ("*", "/"):
            tree = (self.take(), tree, self.signed())
        return tree

    def signed(self):
        if self.peek() in ("+", "-"):
            return ("neg", self.signed()) if self.take() == "-" else self.signed()
        return self.power()

    def power(self):
        base = self.atom()
        if self.peek() == "^":
            self.take()
            return ("^", base, self.signed())
        return base

    def atom(self):
        kind = self.peek()
        if kind == "number":
            return ("number", Fraction(self.take()))
        if kind == "(":
            self.take()
            tree = self.sum()
            self.take(")")
            return tree
        name = self.take("name")
        if self.peek() != "(":
            if name in FUNCTIONS:
                raise BadClaim(f"{name} needs arguments")
            return ("symbol", name)
        if name not in FUNCTIONS:
            raise BadClaim(f"unknown function {name}")
        self.take("(")
        arguments = [self.sum()]
        while self.peek() == ",":
            self.take()
            arguments.append(self.sum())
        self.take(")")
        return (name, *arguments)


def parse(text):
    return Parser(str(text)).whole()


def symbols_of(tree):
    if tree[0] == "symbol":
        return {tree[1]}
    return set().union(*(symbols_of(t) for t in tree[1:] if isinstance(t, tuple)), set())


def integer_or_none(value):
    return value.numerator if isinstance(value, Fraction) and value.denominator == 1 else None


def binomial(a, b):
    if b < 0:
        return Fraction(0)
    value = Fraction(1)
    for i in range(b):
        value = value * (a - i) / (i + 1)
    return value


def factorial(m):
    value = 1
    for i in range(2, m + 1):
        value *= i
    return Fraction(value)


def evaluate(tree, point, reciprocal=False):
    """The exact value of tree (or of 1/tree), an Undefined, or the exception NoValue."""
    kind = tree[0]
    if kind == "*" or kind == "/":
        left = evaluate(tree[1], point, reciprocal)
        right = evaluate(tree[2], point, reciprocal != (kind == "/"))
        return times(left, right)
    if kind == "neg":
        value = evaluate(tree[1], point, reciprocal)
        return value if isinstance(value, Undefined) else -value
    if kind == "^":
        return power(tree, point, reciprocal)
    if kind == "factorial":
        m = integer_or_none(definite(tree[1], point))
        if m is None or m < 0:
            if m is not None and reciprocal:
                return Fraction(0)
            return Undefined(f"factorial of {definite(tree[1], point)}")
        return 1 / factorial(m) if reciprocal else factorial(m)
    value = plain(tree, point)
    if not reciprocal or isinstance(value, Undefined):
        return value
    if value == 0:
        raise NoValue(HARD)
    return 1 / value


def times(left, right):
    for one in (left, right):
        if not isinstance(one, Undefined) and one == 0:
            return Fraction(0)
    for one in (left, right):
        if isinstance(one, Undefined):
            return one
    return left * right


def power(tree, point, reciprocal):
    exponent = integer_or_none(definite(tree[2], point))
    if exponent is None:
        raise NoValue("an exponent that is not an integer")
    if reciprocal:
        exponent = -exponent
    base = evaluate(tree[1], point, exponent < 0)
    return base if isinstance(base, Undefined) else base ** abs(exponent)


def definite(tree, point):
    value = evaluate(tree, point)
    if isinstance(value, Undefined):
        raise NoValue(value.why)
    return value


def plain(tree, point):
    kind = tree[0]
    if kind == "number":
        return tree[1]
    if kind == "symbol":
        if tree[1] not in point:
            raise BadClaim(f"undeclared symbol {tree[1]}")
        return point[tree[1]]
    if kind in ("+", "-"):
        left, right = evaluate(tree[1], point), evaluate(tree[2], point)
        for one in (left, right):
            if isinstance(one, Undefined):
                return one
        return left + right if kind == "+" else left - right
    arguments = [definite(t, point) for t in tree[1:]]
    if kind == "floor":
        return Fraction(floor(arguments[0]))
    if kind in ("min", "max"):
        return min(arguments) if kind == "min" else max(arguments)
    return two_place(kind, *arguments)


def two_place(kind, a, b):
    m = integer_or_none(b)
    if m is None:
        return Undefined(f"{kind} with the second argument {b}")
    if kind == "binomial":
        return binomial(a, m)
    if m < 0:
        return Undefined(f"{kind} of length {m}")
    value = Fraction(1)
    for i in range(m):
        value *= a + i if kind == "rising" else a - i
    return value


# ---------------------------------------------------------------- claims


class Claim:
    def __init__(self, path):
        with open(path, "rb") as stream:
            text = stream.read().decode("utf-8-sig")
        data = tomllib.loads(text.replace("\r\n", "\n"))
        self.first_line = text.splitlines()[0] if text else ""
        if data.get("format") != 1:
            raise BadClaim("format must be 1")
        self.title, self.running, self.start = data["title"], data["running"], data["from"]
        self.assume = [comparison(text) for text in data.get("assume", [])]
        self.left = Sum(data["sum"])
        self.right = self.recurrence = self.certificate = None
        if "equals" in data:
            equals = data["equals"]
            self.right = Sum({"summand": equals["closed"]} if "closed" in equals else equals)
        evidence = data.get("evidence", {})
        if "recurrence" in evidence:
            self.recurrence = [parse(a) for a in evidence["recurrence"]]
            self.right_side = parse(evidence.get("right_side", "0"))
        if "certificate" in evidence:
            self.certificate = {k: parse(r) for k, r in evidence["certificate"].items()}
        self.parameters = data.get("parameters", {})
        self.check_symbols()

    def check_symbols(self):
        indices = [r[0] for r in self.left.ranges]
        known = {self.running, *self.parameters, *indices}
        trees = [self.left.summand, *(self.recurrence or []), *(self.certificate or {}).values()]
        for tree in trees:
            if symbols_of(tree) - known:
                raise BadClaim(f"undeclared: {symbols_of(tree) - known}")
        if self.certificate is not None and set(self.certificate) != set(indices):
            raise BadClaim("the certificate needs one entry for each index")

    def allows(self, point):
        """Whether the point satisfies not, at_least, from and assume (as far as it has values)."""
        for name, about in self.parameters.items():
            value = point[name]
            if about["in"] == "integers":
                if value.denominator != 1 or value < about.get("at_least", value):
                    return False
            elif any(excluded(value, text) for text in about.get("not", [])):
                return False
        if self.running in point and (point[self.running] < self.start):
            return False
        return all(holds(c, point) for c in self.assume)


class Sum:
    def __init__(self, table):
        self.summand = parse(table["summand"])
        self.ranges = [(r["index"], parse(r["low"]), parse(r["high"])) for r in table.get("over", [])]

    def value(self, point):
        return self.inner(dict(point), 0)

    def inner(self, point, depth):
        if depth == len(self.ranges):
            value = evaluate(self.summand, point)
            if isinstance(value, Undefined):
                raise NoValue(value.why + " at " + show(point))
            return value
        index, low, high = self.ranges[depth]
        bounds = definite(low, point), definite(high, point)
        if any(b.denominator != 1 for b in bounds):
            raise BadClaim("a bound that is not an integer")
        total = Fraction(0)
        for k in range(int(bounds[0]), int(bounds[1]) + 1):
            point[index] = Fraction(k)
            total += self.inner(point, depth + 1)
        point.pop(index, None)
        return total


def comparison(text):
    match = re.fullmatch(r"(.*?)(<=|>=|!=|<|>)(.*)", text, re.S)
    if not match:
        raise BadClaim(f"no comparison in {text!r}")
    return parse(match[1]), match[2], parse(match[3])


def holds(condition, point):
    left, sign, right = condition
    if (symbols_of(left) | symbols_of(right)) - set(point):
        return True
    a, b = definite(left, point), definite(right, point)
    return {"<=": a <= b, "<": a < b, ">=": a >= b, ">": a > b, "!=": a != b}[sign]


def excluded(value, text):
    words = {"integers": None, "positive integers": 1, "negative integers": -1}
    if text in words:
        sign = words[text]
        return value.denominator == 1 and (sign is None or value * sign > 0)
    if text in ("nonnegative integers", "nonpositive integers"):
        return value.denominator == 1 and (value >= 0 if text.startswith("nonneg") else value <= 0)
    return value == definite(parse(text), {})


RATIONALS = [Fraction(a, b) for a, b in
             ((1, 3), (2, 1), (-2, 1), (5, 2), (1, 1), (0, 1), (-1, 2), (-7, 3), (3, 1), (-1, 1), (4, 1))]


def parameter_points(claim, most=60):
    """Parameter values to try, the plain ones first, thinned out to at most `most` points."""
    lists = []
    for about in claim.parameters.values():
        if about["in"] == "rationals":
            lists.append(RATIONALS)
        elif "at_least" in about:
            lists.append([Fraction(about["at_least"] + i) for i in (0, 1, 2, 3, 4, 7)])
        else:
            lists.append([Fraction(i) for i in (0, 1, 2, 3, 4, -1, -2, -3, 7)])
    points = [dict(zip(claim.parameters, values)) for values in product(*lists)]
    points = [p for p in points if claim.allows(p)]
    step = -(-len(points) // most) or 1
    return points[::step]


# ---------------------------------------------------------------- rational functions of n


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
    return lowest(poly_add(poly_mul(p, s), poly_mul(r, q), 1 if kind == "+" else -1), poly_mul(q, s))


def lowest(p, q):
    if not q:
        raise NoValue(HARD)
    g = poly_gcd(p, q)
    return poly_divmod(p, g)[0], poly_divmod(q, g)[0]


def cleared(claim, parameters):
    """The recurrence at these parameter values with its denominators cleared: polynomials, factor."""
    pairs = [rational_function(a, claim.running, parameters) for a in claim.recurrence]
    common = [Fraction(1)]
    for _, q in pairs:
        common = poly_mul(common, poly_divmod(q, poly_gcd(common, q))[0])
    return [poly_mul(p, poly_divmod(common, q)[0]) for p, q in pairs], common


# ---------------------------------------------------------------- tests at integer points


def sides(claim, point):
    """The claimed two sides at one point: of the equality if there is one, else of the recurrence."""
    if claim.right is not None:
        return claim.left.value(point), claim.right.value(point)
    return recurrence_sides(claim, point)


def recurrence_sides(claim, point):
    n = point[claim.running]
    parameters = {p: v for p, v in point.items() if p != claim.running}
    polynomials, common = cleared(claim, parameters)
    left = Fraction(0)
    for i, a in enumerate(polynomials):
        if poly_at(a, n) != 0:
            left += poly_at(a, n) * claim.left.value({**point, claim.running: n + i})
    right = evaluate(claim.right_side, point)
    if isinstance(right, Undefined):
        raise NoValue(right.why)
    return left, poly_at(common, n) * right


def compare(function, claim, point):
    """None when both sides agree, else a record of the point and both sides (or why there is none)."""
    try:
        left, right = function(claim, point)
    except NoValue as problem:
        return {"point": show(point), "no value": str(problem)}
    return None if left == right else {"point": show(point), "left": str(left), "right": str(right)}


def defined(claim, point):
    return claim.left.value(point), claim.left.value(point)


def first_counterexample(claim, function, up_to):
    names = parameter_points(claim)
    for n in range(claim.start, claim.start + up_to + 1):
        for parameters in names:
            point = {claim.running: Fraction(n), **parameters}
            if claim.allows(point) and (wrong := compare(function, claim, point)):
                return wrong
    return None


def show(point):
    return ", ".join(f"{name} = {value}" for name, value in point.items())


# ---------------------------------------------------------------- the certificate identity


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


def random_point(claim, chance):
    """Non-integer values with a prime denominator of their own each, so that no two forms meet."""
    primes = iter((101, 103, 107, 109, 113, 127, 131, 137, 139, 149))
    names = [claim.running, *(r[0] for r in claim.left.ranges), *claim.parameters]
    point = {}
    for name in names:
        q = next(primes)
        point[name] = Fraction(chance.randrange(1, 6 * q), q)
        if point[name].denominator == 1:
            point[name] += Fraction(1, q)
    return point


def certificate_residue(claim, point):
    """sum_i a_i F(n+i,k) - sum_j (forward difference in k_j of R_j F), as a Formal."""
    n = claim.running
    total = Formal({})
    for i, a in enumerate(claim.recurrence):
        shifted = {**point, n: point[n] + i}
        total = total.add(formal(a, point).times(formal(claim.left.summand, shifted)))
    for index, certificate in claim.certificate.items():
        for at, sign in (({**point, index: point[index] + 1}, -1), (point, 1)):
            total = total.add(formal(certificate, at).times(formal(claim.left.summand, at)), sign)
    return total


def certificate_failure(claim, tries=8, seed=20):
    chance = random.Random(seed)
    done = 0
    for _ in range(20 * tries):
        point = random_point(claim, chance)
        try:
            residue = certificate_residue(claim, point)
        except NoValue:
            continue
        if residue.terms:
            return {"point": show(point), "residue": "not zero"}
        done += 1
        if done == tries:
            return None
    raise BadClaim("the certificate has no value at any point tried")


# ---------------------------------------------------------------- reports


def stated_point(claim):
    """The point of a first line '# false at: n = 4, m = 1', or None."""
    match = re.match(r"#\s*false at:\s*(.+)", claim.first_line)
    if not match:
        return None
    pairs = (part.split("=") for part in match[1].split(","))
    return {name.strip(): Fraction(value.strip()) for name, value in pairs}


def examine(path, up_to=12):
    """A record: what was claimed, and the first failure of each part, or None."""
    claim = Claim(path)
    record = {"file": str(path), "title": claim.title, "kind": "question"}
    if claim.right is not None:
        record["kind"] = "equality"
        record["equality"] = first_counterexample(claim, sides, up_to)
    if claim.recurrence is not None:
        record["kind"] = "recurrence" if claim.right is None else "equality with evidence"
        record["recurrence"] = first_counterexample(claim, recurrence_sides, up_to)
    if claim.certificate is not None:
        record["certificate"] = certificate_failure(claim)
    if record["kind"] == "question":
        record["definedness"] = first_counterexample(claim, defined, up_to)
    if (point := stated_point(claim)) is not None:
        wrong = compare(sides, claim, point) if claim.allows(point) else None
        record["stated point"] = wrong or "no difference there"
    return record


def failures(record):
    return {part: record[part] for part in ("equality", "recurrence", "certificate", "definedness")
            if record.get(part)}


def line(record):
    wrong = failures(record)
    parts = "; ".join(f"{part}: " + ", ".join(f"{k} {v}" if k != "point" else f"at {v}"
                                             for k, v in what.items()) for part, what in wrong.items())
    text = f"{record['file']}: {record['kind']}: {'false: ' + parts if wrong else 'true so far'}"
    if "stated point" in record:
        text += f" [stated point: {record['stated point']}]"
    return text


def main():
    reader = argparse.ArgumentParser(description="exact evaluation of claim files")
    reader.add_argument("files", nargs="+")
    reader.add_argument("--up-to", type=int, default=12, metavar="N")
    reader.add_argument("--json", action="store_true")
    options = reader.parse_args()
    status, records = 0, []
    for path in options.files:
        try:
            record = examine(path, options.up_to)
            status = max(status, 1 if failures(record) else 0)
        except (BadClaim, KeyError, OSError, ValueError) as problem:
            record, status = {"file": path, "kind": "unreadable", "problem": str(problem)}, 2
        records.append(record)
        if not options.json:
            print(line(record) if record["kind"] != "unreadable" else f"{path}: unreadable: {problem}",
                  flush=True)
    if options.json:
        print(json.dumps(records, indent=1))
    return status


if __name__ == "__main__":
    sys.exit(main())
