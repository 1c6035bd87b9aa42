"""Tests of the evaluator by known values, and of the claim files by the evaluator.

    python3 tests/independent/test_evaluate_claim.py
"""

import glob
import os
import sys
import unittest
from fractions import Fraction

HERE = os.path.dirname(os.path.abspath(__file__))
sys.path.insert(0, HERE)

import evaluate_claim as evaluator  # noqa: E402
from expressions import NoValue, Undefined, evaluate, parse  # noqa: E402
from formal_terms import formal  # noqa: E402

ROOT = os.path.dirname(os.path.dirname(HERE))


def value(text, **symbols):
    return evaluate(parse(text), {name: Fraction(v) for name, v in symbols.items()})


def files(*pattern):
    found = sorted(glob.glob(os.path.join(ROOT, *pattern)))
    assert found, pattern
    return found


def stated(path, heading):
    """The point and both sides of a comment '# heading n = 3, k = 1; sides 2 and 5', or None."""
    with open(path, encoding="utf-8") as stream:
        for text in stream:
            if text.startswith("# " + heading):
                where, what = text[2 + len(heading):].split("; sides ")
                pairs = (part.split("=") for part in where.split(","))
                point = {name.strip(): Fraction(number.strip()) for name, number in pairs}
                return point, tuple(Fraction(side) for side in what.split(" and "))
    return None


def first_words(path, heading):
    with open(path, encoding="utf-8") as stream:
        first = stream.readline()
    assert first.startswith(heading), path
    return first[len(heading):].strip()


class Notation(unittest.TestCase):
    def test_signs_and_powers(self):
        cases = {"-1^k": -1, "(-1)^k": 1, "2^-k": Fraction(1, 16), "2^3^2": 512, "-k*3": -12,
                 "k--1": 5, "k/2/2": 1, "0^(k - 4)": 1, "2*-k": -8, "-2^-k": Fraction(-1, 16)}
        for text, expected in cases.items():
            self.assertEqual(value(text, k=4), expected, text)

    def test_functions(self):
        cases = {"binomial(-2, 3)": -4, "binomial(5, -1)": 0, "binomial(3, 7)": 0,
                 "binomial(1/2, 2)": Fraction(-1, 8), "rising(1/2, 2)": Fraction(3, 4),
                 "falling(5, 2)": 20, "rising(7, 0)": 1, "factorial(5)": 120,
                 "1/factorial(-1)": 0, "factorial(-3)^-2": 0, "floor(7/2)": 3, "min(3, 2)": 2}
        for text, expected in cases.items():
            self.assertEqual(value(text), expected, text)

    def test_values_that_do_not_exist(self):
        self.assertIsInstance(value("factorial(-1)"), Undefined)
        self.assertIsInstance(value("rising(2, -1)"), Undefined)
        self.assertEqual(value("0*factorial(-1)"), 0)
        self.assertEqual(value("factorial(-1)/factorial(-2)"), 0)
        for text in ("1/0", "0*(1/0)", "0/0", "0^-1", "1/binomial(2, 3)"):
            with self.assertRaises(NoValue, msg=text):
                value(text)

    def test_shift_quotients_of_terms(self):
        def at(text, **symbols):
            return formal(parse(text), {name: Fraction(v) for name, v in symbols.items()})

        k = Fraction(7, 5)
        upper, lower = at("factorial(k)", k=k + 1), at("factorial(k)", k=k)
        self.assertEqual(upper.times(lower.inverse()).as_rational(), k + 1)
        upper, lower = at("(-1)^k*binomial(-3, k)", k=k + 2), at("(-1)^k*binomial(-3, k)", k=k)
        expected = (k + 3) * (k + 4) / ((k + 1) * (k + 2))
        self.assertEqual(upper.times(lower.inverse()).as_rational(), expected)


class ClaimFiles(unittest.TestCase):
    def test_true_claims(self):
        paths = files("exemplars", "*.toml") + files("tests", "corpus", "*", "*.toml")
        paths += files("tests", "false-claims", "disguised", "*.toml")
        for path in paths:
            with self.subTest(path):
                self.assertEqual(evaluator.failures(evaluator.examine(path)), {})

    def test_false_claims_are_false_where_they_say(self):
        for path in files("tests", "false-claims", "claims", "*.toml"):
            with self.subTest(path):
                first_words(path, "# false at:")
                self.assertIsNotNone(evaluator.examine(path, up_to=2)["stated point"])

    def test_wrong_evidence_is_wrong_in_the_part_named(self):
        for path in files("tests", "false-claims", "evidence", "*.toml"):
            with self.subTest(path):
                part = first_words(path, "# wrong:")
                found = evaluator.failures(evaluator.examine(path))
                self.assertNotIn("equality", found)
                self.confirm_stated_points(path, part, "certificate" in found)
                if part == "certificate":
                    self.assertEqual(set(found), {"certificate"})
                elif part == "recurrence":
                    self.assertIn("recurrence", found)
                else:
                    self.assertEqual((part, set(found)), ("right_side", {"recurrence"}))

    def confirm_stated_points(self, path, part, identity_is_wrong):
        claim = evaluator.Claim(path)
        if identity_is_wrong:
            point, sides = stated(path, "identity false at:")
            self.assertNotEqual(*sides)
            self.assertEqual(evaluator.identity_sides(claim, point), sides)
        if part != "certificate":
            point, sides = stated(path, "recurrence false at:")
            self.assertNotEqual(*sides)
            self.assertEqual(evaluator.recurrence_sides(claim, point), sides)


if __name__ == "__main__":
    unittest.main()
