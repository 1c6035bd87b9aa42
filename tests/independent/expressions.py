"""Expressions of claim files: parser and exact values, independent of the program under test."""

import re
from fractions import Fraction
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


TOKEN = re.compile(r"\s*(?:(\d+)|([A-Za-z][A-Za-z0-9_]*)|([-+*/^(),]))")


def tokens_of(text):
    found, place, text = [], 0, text.rstrip()
    while place < len(text):
        match = TOKEN.match(text, place)
        if not match:
            raise BadClaim(f"unexpected {text[place:place + 10]!r} in {text!r}")
        number, name, sign = match.groups()
        if number:
            found.append(("number", int(number)))
        else:
            found.append(("name", name) if name else (sign, sign))
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
        while self.peek() in ("+", "-"):
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
