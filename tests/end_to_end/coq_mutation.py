"""Places in a generated Claim.v where one change must make Coq refuse it.

Polynomials: the definitions that `equality` is about are read and evaluated here; a changed
number, exponent or sign counts only when the equality then fails at a random point, so that no
mutant is an equivalent one.  Statements: a number in the conclusion of `claim`.
"""

import random
import re
from dataclasses import dataclass
from fractions import Fraction

TOKEN = re.compile(r"\s*(?:(\d+)|([A-Za-z_][A-Za-z0-9_']*)|(%[KZ])|(<>|[-+*/^()=]))")
DEFINITION = re.compile(r"^\s*Definition\s+(\w+)((?:\s*\([\w\s]+:\s*K\s*\))*)\s*:\s*K"
                        r"\s*:=\s*(.*?)\.(?=\s|$)", re.M | re.S)
EQUALITY = re.compile(r"^\s*Lemma\s+(equality\w*)((?:\s*\([\w\s]+:\s*K\s*\))*)\s*:"
                      r"\s*(.*?)\.\s*Proof", re.M | re.S)
CLAIM = re.compile(r"^Theorem\s+claim\s*:(.*?)\.\s*Proof", re.M | re.S)


class NotPolynomial(Exception):
    pass


@dataclass
class Mutant:
    kind: str  # "polynomial" or "statement"
    about: str
    text: str


def tokens_of(text):
    out, place = [], 0
    text = text.rstrip()
    while place < len(text):
        match = TOKEN.match(text, place)
        if not match:
            raise NotPolynomial(text[place:place + 20])
        if match[1]:
            out.append(("number", int(match[1]), match.start(1)))
        elif match[2]:
            out.append(("name", match[2], match.start(2)))
        elif match[4]:
            out.append((match[4], match[4], match.start(4)))
        place = match.end()
    return out + [("end", "", len(text))]


class Reader:
    """sum = product {(+|-) product}; product = signed {(*|/) signed}; power = call [^ number]."""

    def __init__(self, text):
        self.tokens, self.place = tokens_of(text), 0

    def peek(self):
        return self.tokens[self.place][0]

    def take(self, kind=None):
        token = self.tokens[self.place]
        if kind and token[0] != kind:
            raise NotPolynomial(f"{token[1]} in place of {kind}")
        self.place += 1
        return token[1]

    def sum(self):
        tree = self.product()
        while self.peek() in "+-":
            tree = (self.take(), tree, self.product())
        return tree

    def product(self):
        tree = self.signed()
        while self.peek() in "*/":
            tree = (self.take(), tree, self.signed())
        return tree

    def signed(self):
        if self.peek() == "-":
            self.take()
            return ("neg", self.signed())
        tree = self.call()
        if self.peek() == "^":
            self.take()
            return ("^", tree, self.take("number"))
        return tree

    def call(self):
        head = self.atom()
        arguments = []
        while self.peek() in ("name", "number", "("):
            arguments.append(self.atom())
        if not arguments:
            return head
        if head[0] != "name":
            raise NotPolynomial("an application")
        return ("call", head[1], arguments)

    def atom(self):
        if self.peek() == "number":
            return ("number", self.take())
        if self.peek() == "name":
            return ("name", self.take())
        self.take("(")
        tree = self.sum()
        if self.peek() == "=":  # brackets around an equation
            self.take()
            tree = ("=", tree, self.sum())
        self.take(")")
        return tree


def whole(text):
    reader = Reader(text)
    tree = reader.sum()
    if reader.peek() == "=":
        reader.take()
        tree = ("=", tree, reader.sum())
    reader.take("end")
    return tree


def binders(text):
    return [name for group in re.findall(r"\(([\w\s]+):", text) for name in group.split()]


class Polynomials:
    """The polynomial definitions of a script and its equality."""

    def __init__(self, text):
        self.definitions, self.spans = {}, {}
        for match in DEFINITION.finditer(text):
            try:
                self.definitions[match[1]] = (binders(match[2]), whole(match[3]))
                self.spans[match[1]] = match.span(3)
            except NotPolynomial:
                continue
        match = EQUALITY.search(text)
        if not match:
            raise NotPolynomial("no lemma `equality`")
        self.variables, self.equation = binders(match[2]), whole(match[3])
        if self.equation[0] != "=":
            raise NotPolynomial("`equality` is no equation")

    def used(self):
        """Names of the definitions that the equality rests on."""
        found, todo = set(), [self.equation]
        while todo:
            tree = todo.pop()
            if not isinstance(tree, (tuple, list)):
                continue
            todo += [part for part in tree if isinstance(part, (tuple, list))]
            name = tree[1] if tree and tree[0] in ("call", "name") else None
            if name in self.definitions and name not in found:
                found.add(name)
                todo.append(self.definitions[name][1])
        return found

    def holds_at(self, seed):
        chance = random.Random(seed)
        scope = {}
        left, right = (self.value(side, scope, chance) for side in self.equation[1:])
        return left == right

    def value(self, tree, scope, chance):
        kind = tree[0]
        if kind == "number":
            return Fraction(tree[1])
        if kind == "name":
            if tree[1] in self.definitions and not self.definitions[tree[1]][0]:
                return self.value(self.definitions[tree[1]][1], self.shared(scope), chance)
            return self.symbol(tree[1], scope, chance)
        if kind == "call":
            return self.call(tree, scope, chance)
        if kind == "neg":
            return -self.value(tree[1], scope, chance)
        left = self.value(tree[1], scope, chance)
        if kind == "^":
            return left ** tree[2]
        right = self.value(tree[2], scope, chance)
        if kind == "/" and right == 0:
            raise NotPolynomial("division by zero at a random point")
        return {"+": lambda: left + right, "-": lambda: left - right,
                "*": lambda: left * right, "/": lambda: left / right}[kind]()

    def shared(self, scope):
        return scope.setdefault("shared scope", scope)

    def symbol(self, name, scope, chance):
        if name not in scope:  # a variable of the equality, or a parameter of the section
            shared = self.shared(scope)
            if name not in shared:
                shared[name] = Fraction(chance.randrange(10**6, 10**9))
            return shared[name]
        return scope[name]

    def call(self, tree, scope, chance):
        _, name, arguments = tree
        values = [self.value(argument, scope, chance) for argument in arguments]
        if name == "inj" and len(values) == 1:
            return values[0]
        if name not in self.definitions or len(self.definitions[name][0]) != len(values):
            raise NotPolynomial(f"{name} applied to {len(values)} arguments")
        names, body = self.definitions[name]
        inner = dict(zip(names, values))
        inner["shared scope"] = self.shared(scope)
        return self.value(body, inner, chance)


def holds(text):
    polynomials = Polynomials(text)
    return all(polynomials.holds_at(seed) for seed in (1, 2))


def changes(text, start, end):
    """(place, old, new) for the numbers and signs between two places of the text."""
    found = []
    for match in re.finditer(r"(?<![\w'])\d+(?![\w'%])|(?<=\s)[+-](?=\s)", text[start:end]):
        old = match[0]
        new = {"+": "-", "-": "+"}.get(old) or str(int(old) + 1)
        if old in "+-" and not re.search(r"[\w)]\s*$", text[start:start + match.start()]):
            continue  # a sign, not an operator
        found.append((start + match.start(), old, new))
    return found


def changed(text, change):
    place, old, new = change
    return text[:place] + new + text[place + len(old):]


def line_of(text, place):
    return text.count("\n", 0, place) + 1


def polynomial_mutants(text, chance, most):
    """Mutants of the definitions below `equality`, none of them an equivalent one."""
    polynomials = Polynomials(text)
    if not holds(text):
        raise NotPolynomial("the equality does not hold as it is read here")
    places = [change for name in sorted(polynomials.used())
              for change in changes(text, *polynomials.spans[name])]
    chance.shuffle(places)
    out = []
    for change in places:
        if len(out) == most:
            break
        mutant = changed(text, change)
        if not holds(mutant):
            about = f"line {line_of(text, change[0])}, {change[1]} -> {change[2]}"
            out.append(Mutant("polynomial", about, mutant))
    return out


def statement_mutants(text, chance, most):
    """Mutants of the conclusion of `claim`."""
    match = CLAIM.search(text)
    if not match:
        raise NotPolynomial("no theorem `claim`")
    start = match.start(1) + (match[1].rfind("->") + 2 if "->" in match[1] else 0)
    places = changes(text, start, match.end(1))
    chance.shuffle(places)
    return [Mutant("statement", f"line {line_of(text, place[0])}, {place[1]} -> {place[2]}",
                   changed(text, place)) for place in places[:most]]
