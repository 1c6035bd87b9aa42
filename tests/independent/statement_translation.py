"""Expressions of claim files as Coq terms, node by node; nothing is simplified.

The rows of Translation.in_field and in_integers are those of the published table of the form
of the theorem; R is reciprocal().  Every operation is printed in brackets, and every change
between the field and the integers is marked with %K or %Z.
"""

import re

from expressions import BadClaim, parse, symbols_of

# Words that cannot be bound in Coq, and names that the statement itself uses.
RESERVED = set("""
    as at by cofix do else end exists exists2 fix for forall fun if in lazymatch let ltac match
    mod multimatch rem return struct then using where with
    K Z N S O I nat bool eq le lt ge gt not and or ex true false tt
    sum product inj pow zpow factorial rfactorial binomial gbinomial rising falling
    sum_from product_from inj_positive multiple_of_one char0_field carrier kzero kone
    kadd kmul ksub kopp kdiv kinv field_axioms char0_axiom claim claim_defined the_statement
""".split())


def is_reserved(name):
    """Words of Coq's commands are capitalised, and many of them cannot be bound."""
    return name in RESERVED or (len(name) > 1 and name[0].isupper())


class Names:
    """Names of the claim file -> names in Coq; in Coq they differ from all words in use there."""

    def __init__(self, declared):
        self.taken = set(declared) | RESERVED
        self.coq = {}
        for name in declared:
            if name not in self.coq:
                self.coq[name] = self.fresh(name + "_") if is_reserved(name) else name

    def __getitem__(self, name):
        if name not in self.coq:
            raise BadClaim(f"undeclared symbol {name}")
        return self.coq[name]

    def fresh(self, wish):
        while wish in self.taken:
            wish += "_"
        self.taken.add(wish)
        return wish


def literal(tree):
    """The integer c of `c` or `-c` with one sign, or None."""
    if tree[0] == "literal":
        return tree[1]
    if tree[0] == "number":
        return int(tree[1])
    if tree[0] == "neg" and tree[1][0] == "number":
        return -int(tree[1][1])
    return None


def has_factorial(tree):
    return tree[0] == "factorial" or any(has_factorial(t) for t in tree[1:]
                                         if isinstance(t, tuple))


def has_denominator(tree):
    """Whether a division or a negative power stands anywhere in the tree."""
    if tree[0] == "/" or (tree[0] == "^" and (literal(tree[2]) or 0) < 0):
        return True
    return any(has_denominator(t) for t in tree[1:] if isinstance(t, tuple))


def comparison(text):
    match = re.fullmatch(r"([^<>=!]*)(<=|>=|!=|<|>)([^<>=!]*)", text, re.S)
    if not match:
        raise BadClaim(f"no comparison in {text!r}")
    return parse(match[1]), match[2], parse(match[3])


def within(scope, text):
    """The text, which is a name, a number or in brackets, read in the scope %K or %Z."""
    return text if text[0].isalpha() else f"{text}%{scope}"


class Translation:
    def __init__(self, names, integers, rationals):
        self.names, self.integers, self.rationals = names, integers, rationals

    def is_plain_integer(self, tree):
        """Only integer symbols, integer literals and + - *."""
        if tree[0] == "symbol":
            return tree[1] in self.integers
        if tree[0] in ("number", "literal"):
            return True
        return tree[0] in ("+", "-", "*", "neg") and all(map(self.is_plain_integer, tree[1:]))

    def assumption(self, parts):
        left, sign, right = parts
        if self.is_plain_integer(left) and self.is_plain_integer(right):
            coq = "<>" if sign == "!=" else sign
            return f"({self.in_integers(left)} {coq} {self.in_integers(right)})%Z"
        if sign != "!=":
            raise BadClaim("an inequality between elements of a field")
        left, right = (within("K", self.in_field(side)) for side in (left, right))
        return f"({left} <> {right} :> K)"

    # ------------------------------------------------------------ in K

    def in_field(self, tree):
        kind = tree[0]
        if kind in ("number", "literal"):
            return f"(inj {self.argument(tree)})"
        if kind == "symbol":
            name = self.names[tree[1]]
            return name if tree[1] in self.rationals else f"(inj {name})"
        if kind in ("+", "-", "*"):
            return f"({self.in_field(tree[1])} {kind} {self.in_field(tree[2])})"
        if kind == "neg":
            return f"(- {self.in_field(tree[1])})"
        if kind == "/":
            if has_factorial(tree[2]):
                return f"({self.in_field(tree[1])} * {self.reciprocal(tree[2])})"
            return f"({self.in_field(tree[1])} / {self.in_field(tree[2])})"
        if kind == "^":
            return self.power(tree[1], tree[2])
        return self.call(tree)

    def power(self, base, exponent):
        c = literal(exponent)
        if c is None:
            return f"(zpow {self.in_field(base)} {self.argument(exponent)})"
        if c >= 0:
            return f"({self.in_field(base)} ^ {c}%nat)"
        positive = ("^", base, ("literal", -c))
        if has_factorial(base):
            return self.reciprocal(positive)
        return f"(/ {self.in_field(positive)})"

    def call(self, tree):
        kind, arguments = tree[0], tree[1:]
        if kind == "factorial" and len(arguments) == 1:
            return f"(factorial {self.argument(arguments[0])})"
        if kind in ("rising", "falling", "binomial") and len(arguments) == 2:
            a, m = arguments
            if kind == "binomial" and self.is_plain_integer(a):
                return f"(binomial {self.argument(a)} {self.argument(m)})"
            name = "gbinomial" if kind == "binomial" else kind
            return f"({name} {within('K', self.in_field(a))} {self.argument(m)})"
        raise BadClaim(f"{kind} with {len(arguments)} arguments in the field")

    def reciprocal(self, tree):
        """R(v), for a v with a factorial in it."""
        kind = tree[0]
        if kind == "*":
            return f"({self.reciprocal(tree[1])} * {self.reciprocal(tree[2])})"
        if kind == "/":
            return f"({self.reciprocal(tree[1])} * {self.in_field(tree[2])})"
        if kind == "^" and literal(tree[2]) is not None and literal(tree[2]) >= 0:
            return f"({self.reciprocal(tree[1])} ^ {literal(tree[2])}%nat)"
        if kind == "neg":
            return f"(- {self.reciprocal(tree[1])})"
        if kind == "factorial":
            return f"(rfactorial {self.argument(tree[1])})"
        return f"(/ {self.in_field(tree)})"

    # ------------------------------------------------------------ in Z

    def argument(self, tree):
        return within("Z", self.in_integers(tree))

    def in_integers(self, tree):
        kind = tree[0]
        if kind in ("number", "literal"):
            c = int(tree[1])
            return str(c) if c >= 0 else f"({c})"
        if kind == "symbol":
            if tree[1] in self.rationals:
                raise BadClaim(f"the rational parameter {tree[1]} in the place of an integer")
            return self.names[tree[1]]
        if kind in ("+", "-", "*"):
            return f"({self.in_integers(tree[1])} {kind} {self.in_integers(tree[2])})"
        if kind == "neg":
            return f"(- {self.in_integers(tree[1])})"
        if kind == "^" and (literal(tree[2]) or 0) >= 0 and literal(tree[2]) is not None:
            return f"({self.in_integers(tree[1])} ^ {literal(tree[2])})"
        if kind == "floor" and tree[1][0] == "/" and (literal(tree[1][2]) or 0) > 0:
            return f"({self.in_integers(tree[1][1])} / {literal(tree[1][2])})"
        if kind in ("min", "max"):
            text = self.in_integers(tree[1])
            for other in tree[2:]:
                text = f"(Z.{kind} {text} {self.in_integers(other)})"
            return text
        raise BadClaim(f"{kind} in the place of an integer")
