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

from expressions import BadClaim, NoValue, Undefined, definite, evaluate, parse, symbols_of
from formal_terms import Formal, formal
from rational_functions import poly_at, poly_divmod, poly_gcd, poly_mul, rational_function

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
        ranges = table.get("over", [])
        self.ranges = [(r["index"], bound(r["low"]), bound(r["high"])) for r in ranges]

    def value(self, point):
        return self.inner(dict(point), 0)

    def inner(self, point, depth):
        if depth == len(self.ranges):
            value = evaluate(self.summand, point)
            if isinstance(value, Undefined):
                raise NoValue(value.why + " at " + show(point))
            return value
        index, low, high = self.ranges[depth]
        first, last = window(low, high, point)
        total = Fraction(0)
        for k in range(first, last + 1):
            point[index] = Fraction(k)
            term = self.inner(point, depth + 1)
            margin = low is None and k < first + MARGIN or high is None and k > last - MARGIN
            if margin and term != 0:
                raise BadClaim(f"the support of an infinite range reaches {show(point)}")
            total += term
        point.pop(index, None)
        return total


MARGIN = 4  # terms next to the window of an infinite range that must be 0


def bound(text):
    """A finite bound as an expression, an infinite one as None."""
    return None if str(text).strip() in ("inf", "-inf") else parse(text)


def window(low, high, point):
    """First and last index: far beyond the support of terms with arguments of this size."""
    reach = 2 * MARGIN + sum(2 * abs(int(v)) for v in point.values() if v.denominator == 1)
    ends = [definite(b, point) if b is not None else None for b in (low, high)]
    if any(e is not None and e.denominator != 1 for e in ends):
        raise BadClaim("a bound that is not an integer")
    known = [int(e) for e in ends if e is not None]
    first = int(ends[0]) if ends[0] is not None else min([-reach, *known])
    last = int(ends[1]) if ends[1] is not None else max([reach, *known])
    return first, last


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


RATIONALS = [Fraction(text) for text in "1/3 2 -2 5/2 1 0 -1/2 -7/3 3 -1 4".split()]


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


def cleared(claim, parameters):
    """The recurrence at these parameter values, cleared of denominators: polynomials, factor."""
    pairs = [rational_function(a, claim.running, parameters) for a in claim.recurrence]
    common = [Fraction(1)]
    for _, q in pairs:
        common = poly_mul(common, poly_divmod(q, poly_gcd(common, q))[0])
    return [poly_mul(p, poly_divmod(common, q)[0]) for p, q in pairs], common


# ---------------------------------------------------------------- tests at integer points


def sides(claim, point):
    """The two sides claimed at one point: of the equality if there is one, else the recurrence."""
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
    """None when both sides agree, else a record of the point and the sides (or why not)."""
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


def identity_sides(claim, point):
    """Both sides of the certificate identity at an integer point where every term has a value."""
    left, right, n = Fraction(0), Fraction(0), claim.running
    for i, a in enumerate(claim.recurrence):
        shifted = {**point, n: point[n] + i}
        left += definite(a, point) * definite(claim.left.summand, shifted)
    for index, certificate in claim.certificate.items():
        for at, sign in (({**point, index: point[index] + 1}, 1), (point, -1)):
            right += sign * definite(("*", certificate, claim.left.summand), at)
    return left, right


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
        record["stated point"] = wrong
    return record


def failures(record):
    parts = ("equality", "recurrence", "certificate", "definedness", "stated point")
    return {part: record[part] for part in parts if record.get(part)}


def line(record):
    if record["kind"] == "unreadable":
        return f"{record['file']}: unreadable: {record['problem']}"
    wrong = failures(record)
    told = []
    for part, what in wrong.items():
        about = ", ".join(f"{key} {value}" for key, value in what.items() if key != "point")
        told.append(f"{part} at {what['point']}: {about}")
    verdict = "false: " + "; ".join(told) if wrong else "true so far"
    if record.get("stated point", True) is None:
        verdict += " (no difference at the point stated in the first line)"
    return f"{record['file']}: {record['kind']}: {verdict}"


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
            print(line(record), flush=True)
    if options.json:
        print(json.dumps(records, indent=1))
    return status


if __name__ == "__main__":
    sys.exit(main())
