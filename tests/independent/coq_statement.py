#!/usr/bin/env python3
"""The Coq statement of a claim, written from the claim file alone.

    coq_statement.py CLAIM [--printed-recurrence FILE] [--library NAME] [--statement-only]

Prints a Coq file that fixes the statement first and then asks Coq whether the exported theorem
NAME.Claim.claim (NAME is Sumwright unless given) is that statement.  Knows nothing of the
exported files.  FILE holds {"recurrence": ["...", ...], "right_side": "..."} as printed by the
program under test.  It is needed for a question, and for a claimed recurrence whose coefficients
have denominators; it is then verified here to be the claimed one times the least common
denominator (printed_recurrence.py).

Exit status: 0 printed, 2 the claim or the recurrence cannot be used.
"""

import argparse
import json
import sys
import tomllib

sys.dont_write_bytecode = True

from expressions import BadClaim, NoValue, parse  # noqa: E402
from statement_translation import (  # noqa: E402
    Names, Translation, comparison, has_denominator, within)

EXCLUDED_INTEGERS = {
    "integers": "{x} <> inj {z} :> K",
    "positive integers": "(0 < {z})%Z -> {x} <> inj {z} :> K",
    "negative integers": "({z} < 0)%Z -> {x} <> inj {z} :> K",
    "nonnegative integers": "(0 <= {z})%Z -> {x} <> inj {z} :> K",
    "nonpositive integers": "({z} <= 0)%Z -> {x} <> inj {z} :> K",
}


class Range:
    """One index with its two ends; an infinite end is None until a variable is put in its place."""

    def __init__(self, table):
        self.index = table["index"]
        self.low, self.high = end(table["low"]), end(table["high"])


def end(bound):
    if isinstance(bound, int):
        return ("literal", bound)
    if "".join(bound.split()) in ("inf", "+inf", "-inf"):
        return None
    return parse(bound)


class Side:
    """A sum of the claim file: ranges, outermost first, and the summand; or an expression."""

    def __init__(self, table):
        self.summand = parse(table["summand"])
        self.ranges = [Range(entry) for entry in table.get("over", [])]


class Claim:
    def __init__(self, data):
        if data.get("format") != 1:
            raise BadClaim("format must be 1")
        self.running, self.start = data["running"], data["from"]
        self.parameters = data.get("parameters", {})
        self.rationals = [p for p, about in self.parameters.items() if about["in"] == "rationals"]
        self.integers = [p for p, about in self.parameters.items() if about["in"] == "integers"]
        if len(self.rationals) + len(self.integers) != len(self.parameters):
            raise BadClaim("a parameter that is neither rational nor an integer")
        self.assume = [comparison(text) for text in data.get("assume", [])]
        self.left, self.right = Side(data["sum"]), None
        if "equals" in data:
            equals = data["equals"]
            table = {"summand": equals["closed"]} if "closed" in equals else equals
            self.right = Side(table)
        evidence = data.get("evidence", {})
        self.recurrence = [parse(a) for a in evidence.get("recurrence", [])]
        self.right_side = parse(evidence.get("right_side", "0"))

    def needs_printed_recurrence(self):
        if self.right is not None:
            return False
        return not self.recurrence or any(has_denominator(a) for a in self.recurrence)


def read_claim(path):
    with open(path, "rb") as stream:
        text = stream.read().decode("utf-8-sig")
    return Claim(tomllib.loads(text.replace("\r\n", "\n")))


# ---------------------------------------------------------------- the statement


class Writer:
    """Writes the statement of one claim; `hypotheses` and `binders` are lists of Coq texts."""

    def __init__(self, claim):
        self.claim = claim
        sides = [claim.left] + ([claim.right] if claim.right else [])
        indices = [r.index for side in sides for r in side.ranges]
        self.names = Names([*claim.parameters, claim.running, *indices])
        self.k = Translation(self.names, {*claim.integers, claim.running, *indices},
                             set(claim.rationals))
        self.z = self.names.fresh("z")
        self.ends = {}  # id of a range and "low" or "high" -> the variable in place of infinity

    def statement(self):
        claim = self.claim
        if claim.right is None:
            return self.recurrence_statement()
        n = self.names[claim.running]
        sides = [claim.left, claim.right]
        ends = [v for side in sides for v in self.end_variables(side)]
        hypotheses = self.parameter_hypotheses() + [f"({claim.start} <= {n})%Z"]
        for side in sides:
            hypotheses += self.vanishing(side)
        binders = self.parameter_binders() + [f"({v} : Z)" for v in [n, *ends]]
        equation = f"{self.sum(claim.left)} = {self.sum(claim.right)} :> K"
        return quantified(binders, hypotheses + [equation])

    def recurrence_statement(self):
        claim = self.claim
        if not claim.recurrence:
            raise BadClaim("no recurrence")
        n, s = self.names[claim.running], self.names.fresh("s")
        ends = self.end_variables(claim.left)
        for key, variable in self.ends.items():
            self.ends[key] = f"({variable} {n})"
        from_n = f"({claim.start} <= {n})%Z"
        hypotheses = self.parameter_hypotheses()
        hypotheses.append(f"(forall {n} : Z, {s} {n} = {self.sum(claim.left)} :> K)")
        for text in self.vanishing(claim.left):
            hypotheses.append(f"(forall {n} : Z, {from_n} -> {text})")
        total = None
        for i, a in enumerate(claim.recurrence):
            at = f"{s} ({n} + {i})%Z" if i else f"{s} {n}"
            term = f"({self.k.in_field(a)} * {at})"
            total = term if total is None else f"({total} + {term})"
        equation = f"{total}%K = {self.field(claim.right_side)} :> K"
        conclusion = f"forall {n} : Z, {from_n} -> {equation}"
        binders = self.parameter_binders() + [f"({v} : Z -> Z)" for v in ends]
        return quantified(binders + [f"({s} : Z -> K)"], hypotheses + [conclusion])

    def parameter_binders(self):
        rationals = [f"({self.names[p]} : K)" for p in self.claim.rationals]
        return ["(K : char0_field)"] + rationals + [f"({self.names[p]} : Z)"
                                                    for p in self.claim.integers]

    def parameter_hypotheses(self):
        out, about = [], self.claim.parameters
        for p in self.claim.rationals:
            out += [self.exclusion(p, " ".join(text.split())) for text in about[p].get("not", [])]
        for m in self.claim.integers:
            if "at_least" in about[m]:
                out.append(f"({about[m]['at_least']} <= {self.names[m]})%Z")
        return out + [self.k.assumption(c) for c in self.claim.assume]

    def exclusion(self, parameter, text):
        x = self.names[parameter]
        if text in EXCLUDED_INTEGERS:
            return f"(forall {self.z} : Z, {EXCLUDED_INTEGERS[text].format(x=x, z=self.z)})"
        return f"({x} <> {self.field(parse(text))} :> K)"

    # ------------------------------------------------------------ sums

    def field(self, tree):
        return within("K", self.k.in_field(tree))

    def end_variables(self, side):
        found = []
        for one in side.ranges:
            for which, at in (("lo", one.low), ("hi", one.high)):
                if at is None:
                    self.ends[id(one), which] = self.names.fresh(which)
                    found.append(self.ends[id(one), which])
        return found

    def end(self, one, which):
        at = one.low if which == "lo" else one.high
        return self.ends[id(one), which] if at is None else self.k.argument(at)

    def sum(self, side):
        text = self.field(side.summand)
        for one in reversed(side.ranges):
            index = self.names[one.index]
            low, high = self.end(one, "lo"), self.end(one, "hi")
            text = f"(sum {low} {high} (fun {index} : Z => {text}))"
        return text

    def vanishing(self, side):
        """Per index with an infinite end: the summand is 0 beyond what was put in its place."""
        out = []
        for place, one in enumerate(side.ranges):
            beyond = []
            if one.low is None:
                beyond.append(f"({self.names[one.index]} < {self.end(one, 'lo')})%Z")
            if one.high is None:
                beyond.append(f"({self.end(one, 'hi')} < {self.names[one.index]})%Z")
            if not beyond:
                continue
            condition = " \\/ ".join(beyond)
            outside = f"forall {self.names[one.index]} : Z, ({condition}) -> "
            text = "".join(self.inside(r) for r in side.ranges[:place]) + outside
            text += "".join(self.inside(r) for r in side.ranges[place + 1:])
            out.append(f"({text}{self.field(side.summand)} = 0%K :> K)")
        return out

    def inside(self, one):
        index = self.names[one.index]
        low = "" if one.low is None else f"{self.end(one, 'lo')} <= "
        high = "" if one.high is None else f" <= {self.end(one, 'hi')}"
        bounds = f"({low}{index}{high})%Z -> " if low or high else ""
        return f"forall {index} : Z, {bounds}"


def quantified(binders, parts):
    return f"forall {' '.join(binders)},\n  " + " ->\n  ".join(parts)


def check_file(statement, library="Sumwright"):
    return (
        "Require Import ZArith.\n"
        "From Sumwright Require Import Statement.\n"
        "Local Open Scope Z_scope.\n"
        f"Definition the_statement : Prop :=\n  {statement}.\n"
        f"From {library} Require Import Claim.\n"
        "Goal the_statement.\n"
        "Proof. exact claim. Qed.\n"
    )


def statement_of(path, printed=None):
    """The Coq text of the statement; `printed` is the recurrence that was printed, or None."""
    claim = read_claim(path)
    if claim.needs_printed_recurrence():
        if printed is None:
            raise BadClaim("a printed recurrence is needed")
        from printed_recurrence import take_printed
        take_printed(claim, path, printed)
    return Writer(claim).statement()


def main():
    reader = argparse.ArgumentParser(description="the Coq statement of a claim file")
    reader.add_argument("claim")
    reader.add_argument("--printed-recurrence", metavar="FILE")
    reader.add_argument("--library", default="Sumwright", metavar="NAME")
    reader.add_argument("--statement-only", action="store_true")
    options = reader.parse_args()
    try:
        printed = None
        if options.printed_recurrence:
            with open(options.printed_recurrence, encoding="utf-8") as stream:
                printed = json.load(stream)
        statement = statement_of(options.claim, printed)
    except (BadClaim, NoValue, KeyError, OSError, ValueError) as problem:
        print(f"{options.claim}: {problem}", file=sys.stderr)
        return 2
    print(statement if options.statement_only else check_file(statement, options.library), end="")
    return 0


if __name__ == "__main__":
    sys.exit(main())
