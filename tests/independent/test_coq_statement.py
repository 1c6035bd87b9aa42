"""Tests of the statement writer: every row of the translation, and Coq on every claim file.

    python3 tests/independent/test_coq_statement.py

Without coqc the tests that need it fail when CI=true, and are skipped and counted elsewhere.
"""

import glob
import json
import os
import re
import shutil
import subprocess
import sys
import tempfile
import tomllib
import unittest

HERE = os.path.dirname(os.path.abspath(__file__))
ROOT = os.path.dirname(os.path.dirname(HERE))
sys.path.insert(0, HERE)

sys.dont_write_bytecode = True
import coq_statement  # noqa: E402
from expressions import BadClaim, parse  # noqa: E402
from printed_recurrence import take_printed  # noqa: E402
from statement_translation import Names, Translation, comparison  # noqa: E402

HEAD = 'format = 1\ntitle = "t"\nrunning = "n"\nfrom = 0\n'

# For the questions: recurrences from the sources named in the files, from memory; each is tried
# on the first values before it is used.
PRINTED = {
    "almkvist-zudilin": ["81*(n + 1)^3", "-(2*n + 3)*(7*n^2 + 21*n + 17)", "(n + 2)^3"],
    "bessel-polynomials-at-one": ["-1", "-(2*n + 3)", "1"],
    "central-coefficients": ["12*(n + 1)", "-4*(2*n + 3)", "n + 2"],
    "involutions": ["-(n + 1)", "-1", "1"],
    "partial-permutations": ["(n + 1)^2", "-2*(n + 2)", "1"],
    "parcels-in-lockers": ["(n + 1)^2", "-2*(n + 2)", "1"],
}


def squeeze(text):
    return " ".join(text.split())


def statement(text, printed=None):
    claim = coq_statement.Claim(tomllib.loads(text))
    if printed is not None:
        with tempfile.NamedTemporaryFile("w", suffix=".toml") as file:
            file.write(text)
            file.flush()
            take_printed(claim, file.name, printed)
    return squeeze(coq_statement.Writer(claim).statement())


def claim_files():
    found = sorted(glob.glob(os.path.join(ROOT, "exemplars", "*.toml"))
                   + glob.glob(os.path.join(ROOT, "tests", "corpus", "*", "*.toml"))
                   + glob.glob(os.path.join(ROOT, "tests", "false-claims", "*", "*.toml")))
    assert len(found) > 200, "the claim files are not there"
    return found


class Rows(unittest.TestCase):
    """The table of the translation, row by row; n, k, m are integers, x, y rational."""

    def setUp(self):
        names = Names(["n", "k", "m", "x", "y"])
        self.translation = Translation(names, {"n", "k", "m"}, {"x", "y"})

    def in_field(self, cases):
        for text, expected in cases.items():
            self.assertEqual(self.translation.in_field(parse(text)), expected, text)

    def in_integers(self, cases):
        for text, expected in cases.items():
            self.assertEqual(self.translation.in_integers(parse(text)), expected, text)

    def refused(self, function, *texts):
        for text in texts:
            with self.assertRaises(BadClaim, msg=text):
                function(parse(text))

    def test_atoms(self):
        self.in_field({"7": "(inj 7%Z)", "n": "(inj n)", "x": "x", "(((k)))": "(inj k)",
                       "+n": "(inj n)", "-1": "(- (inj 1%Z))"})
        self.in_integers({"7": "7", "n": "n", "+(k)": "k", "-1": "(- 1)"})
        self.refused(self.translation.in_integers, "x", "n + x")
        self.refused(self.translation.in_field, "w")

    def test_arithmetic_associates_as_parsed(self):
        self.in_field({
            "n + k - x": "(((inj n) + (inj k)) - x)",
            "n - (k - x)": "((inj n) - ((inj k) - x))",
            "-x*y": "((- x) * y)",
            "-(x*y)": "(- (x * y))",
            "x*-y": "(x * (- y))",
            "x/y/2": "((x / y) / (inj 2%Z))",
            "x/(y/2)": "(x / (y / (inj 2%Z)))",
            "-1/2": "((- (inj 1%Z)) / (inj 2%Z))",
            "--x": "(- (- x))",
        })
        self.in_integers({"n + k - 1": "((n + k) - 1)", "n - (k - 1)": "(n - (k - 1))",
                          "2*n - -k": "((2 * n) - (- k))", "2^3*n": "((2 ^ 3) * n)"})

    def test_powers(self):
        self.in_field({
            "x^2": "(x ^ 2%nat)",
            "x^(2)": "(x ^ 2%nat)",
            "x^0": "(x ^ 0%nat)",
            "-x^2": "(- (x ^ 2%nat))",
            "(-1)^2": "((- (inj 1%Z)) ^ 2%nat)",
            "x^-2": "(/ (x ^ 2%nat))",
            "x^(-2)": "(/ (x ^ 2%nat))",
            "x^--2": "(zpow x (- (- 2))%Z)",
            "x^k": "(zpow x k)",
            "(-1)^k": "(zpow (- (inj 1%Z)) k)",
            "-1^k": "(- (zpow (inj 1%Z) k))",
            "2^(2*n - k)": "(zpow (inj 2%Z) ((2 * n) - k)%Z)",
            "2^-k": "(zpow (inj 2%Z) (- k)%Z)",
            "x^(1 + 1)": "(zpow x (1 + 1)%Z)",
            "x^2^3": "(zpow x (2 ^ 3)%Z)",
            "(x^2)^3": "((x ^ 2%nat) ^ 3%nat)",
        })
        self.refused(self.translation.in_field, "2^x", "2^(n/2)")
        self.refused(self.translation.in_integers, "2^-1", "2^n")

    def test_functions(self):
        self.in_field({
            "factorial(n - k)": "(factorial (n - k)%Z)",
            "rising(x, k)": "(rising x k)",
            "rising(1/2, k + 1)": "(rising ((inj 1%Z) / (inj 2%Z))%K (k + 1)%Z)",
            "rising(-n, k)": "(rising (- (inj n))%K k)",
            "falling(n, 3)": "(falling (inj n)%K 3%Z)",
            "binomial(n, k)": "(binomial n k)",
            "binomial(2*n - 1, -k)": "(binomial ((2 * n) - 1)%Z (- k)%Z)",
            "binomial(-n, 2)": "(binomial (- n)%Z 2%Z)",
            "binomial(x, k)": "(gbinomial x k)",
            "binomial(n/2, k)": "(gbinomial ((inj n) / (inj 2%Z))%K k)",
            "binomial(n^2, k)": "(gbinomial ((inj n) ^ 2%nat)%K k)",
            "binomial(n + 2^2, k)": "(gbinomial ((inj n) + ((inj 2%Z) ^ 2%nat))%K k)",
        })
        self.refused(self.translation.in_field, "binomial(n)", "floor(n/2)", "min(n, k)",
                     "factorial(x)", "rising(n, x)")

    def test_integers_only(self):
        self.in_integers({
            "floor((n + 1)/2)": "((n + 1) / 2)",
            "floor(floor(n/2)/3)": "((n / 2) / 3)",
            "min(n, k)": "(Z.min n k)",
            "max(0, n - k, m)": "(Z.max (Z.max 0 (n - k)) m)",
        })
        self.refused(self.translation.in_integers, "n/2", "floor(n/0)", "floor(n/k)",
                     "floor(n/-2)", "floor(n)", "binomial(n, k)", "factorial(n)")

    def test_factorials_in_denominators(self):
        self.in_field({
            "1/factorial(k)": "((inj 1%Z) * (rfactorial k))",
            "x/(factorial(k)*y)": "(x * ((rfactorial k) * (/ y)))",
            "x/(y*factorial(n - k)^2)": "(x * ((/ y) * ((rfactorial (n - k)%Z) ^ 2%nat)))",
            "x/(factorial(k)/y)": "(x * ((rfactorial k) * y))",
            "x/(y/factorial(k))": "(x * ((/ y) * (factorial k)))",
            "x/(-factorial(k))": "(x * (- (rfactorial k)))",
            "x/-factorial(k)": "(x * (- (rfactorial k)))",
            "x/(factorial(k) + 1)": "(x * (/ ((factorial k) + (inj 1%Z))))",
            "x/factorial(k)^n": "(x * (/ (zpow (factorial k) n)))",
            "x/factorial(k)^-2": "(x * (/ ((rfactorial k) ^ 2%nat)))",
            "factorial(k)^-2": "((rfactorial k) ^ 2%nat)",
            "(2*factorial(k))^-1": "(((/ (inj 2%Z)) * (rfactorial k)) ^ 1%nat)",
            "x/rising(y, k)": "(x / (rising y k))",
            "x/(rising(y, k)*factorial(k))": "(x * ((/ (rising y k)) * (rfactorial k)))",
            "x/y/factorial(k)": "((x / y) * (rfactorial k))",
        })

    def test_assumptions(self):
        cases = {
            "n >= m": "(n >= m)%Z",
            "n > 2*m - 1": "(n > ((2 * m) - 1))%Z",
            "n < m": "(n < m)%Z",
            "n <= m": "(n <= m)%Z",
            "n != m": "(n <> m)%Z",
            "x != y": "(x <> y :> K)",
            "x != n": "(x <> (inj n)%K :> K)",
            "2*x - 1 != -1/2": "((((inj 2%Z) * x) - (inj 1%Z))%K <> ((- (inj 1%Z)) / (inj 2%Z))%K"
                               " :> K)",
            "n != m/2": "((inj n)%K <> ((inj m) / (inj 2%Z))%K :> K)",
        }
        for text, expected in cases.items():
            self.assertEqual(self.translation.assumption(comparison(text)), expected, text)
        for text in ("x >= 0", "n >= m/2", "n = m", "n <= m <= k"):
            with self.assertRaises(BadClaim, msg=text):
                self.translation.assumption(comparison(text))


class Statements(unittest.TestCase):
    def test_published_example(self):
        text = HEAD + '''[sum]\nsummand = "binomial(n, k)^2"
over = [ { index = "k", low = "0", high = "n" } ]
[equals]\nclosed = "binomial(2*n, n)"'''
        self.assertEqual(statement(text), squeeze("""
            forall (K : char0_field) (n : Z), (0 <= n)%Z ->
            (sum 0%Z n (fun k : Z => ((binomial n k) ^ 2%nat)%K)) = (binomial (2 * n)%Z n)%K :> K"""))

    def test_order_of_binders_and_hypotheses(self):
        text = 'format = 1\ntitle = "t"\nrunning = "n"\nfrom = -3\nassume = ["b >= a", "x != y"]\n'
        text += '''[sum]\nsummand = "x"
[equals]\nclosed = "y"
[parameters]
b = { in = "integers", at_least = -2 }
y = { in = "rationals", not = ["integers", "1/2"] }
a = { in = "integers" }
x = { in = "rationals", not = ["positive  integers", "negative integers"] }
c = { in = "integers", at_least = 1 }
u = { in = "rationals", not = ["nonnegative integers", "nonpositive integers", "-1/2"] }'''
        self.assertEqual(statement(text), squeeze("""
            forall (K : char0_field) (y : K) (x : K) (u : K) (b : Z) (a : Z) (c : Z) (n : Z),
            (forall z : Z, y <> inj z :> K) ->
            (y <> ((inj 1%Z) / (inj 2%Z))%K :> K) ->
            (forall z : Z, (0 < z)%Z -> x <> inj z :> K) ->
            (forall z : Z, (z < 0)%Z -> x <> inj z :> K) ->
            (forall z : Z, (0 <= z)%Z -> u <> inj z :> K) ->
            (forall z : Z, (z <= 0)%Z -> u <> inj z :> K) ->
            (u <> ((- (inj 1%Z)) / (inj 2%Z))%K :> K) ->
            (-2 <= b)%Z -> (1 <= c)%Z -> (b >= a)%Z -> (x <> y :> K) -> (-3 <= n)%Z ->
            x = y :> K"""))

    def test_sum_equals_sum_over_two_indices(self):
        text = HEAD + '''[sum]\nsummand = "i*j"
over = [ { index = "i", low = -1, high = "n" }, { index = "j", low = "i", high = "min(n, 2*i)" } ]
[equals]\nsummand = "i"\nover = [ { index = "i", low = "0", high = "floor(n/2)" } ]'''
        self.assertEqual(statement(text), squeeze("""
            forall (K : char0_field) (n : Z), (0 <= n)%Z ->
            (sum (-1)%Z n (fun i : Z => (sum i (Z.min n (2 * i))%Z
              (fun j : Z => ((inj i) * (inj j))%K))))
            = (sum 0%Z (n / 2)%Z (fun i : Z => (inj i)%K)) :> K"""))

    def test_recurrence(self):
        text = HEAD + '''[sum]\nsummand = "s*k"
over = [ { index = "k", low = "0", high = "n" } ]
[parameters]\ns = { in = "rationals", not = ["0"] }
[evidence]\nrecurrence = ["-2*n", "0", "s"]\nright_side = "1/(n + 1)"'''
        self.assertEqual(statement(text), squeeze("""
            forall (K : char0_field) (s : K) (s_ : Z -> K),
            (s <> (inj 0%Z)%K :> K) ->
            (forall n : Z, s_ n = (sum 0%Z n (fun k : Z => (s * (inj k))%K)) :> K) ->
            forall n : Z, (0 <= n)%Z ->
            (((((- (inj 2%Z)) * (inj n)) * s_ n) + ((inj 0%Z) * s_ (n + 1)%Z))
              + (s * s_ (n + 2)%Z))%K = ((inj 1%Z) / ((inj n) + (inj 1%Z)))%K :> K"""))

    def test_infinite_ends(self):
        text = HEAD + '''[sum]\nsummand = "binomial(n, i)*binomial(n, j)"
over = [ { index = "i", low = "-inf", high = "inf" }, { index = "j", low = "i", high = "inf" } ]
[equals]\nsummand = "binomial(lo, k)"\nover = [ { index = "k", low = " - inf", high = 3 } ]
[parameters]\nlo = { in = "integers" }'''
        self.assertEqual(statement(text), squeeze("""
            forall (K : char0_field) (lo : Z) (n : Z) (lo_ : Z) (hi : Z) (hi_ : Z) (lo__ : Z),
            (0 <= n)%Z ->
            (forall i : Z, ((i < lo_)%Z \\/ (hi < i)%Z) -> forall j : Z, (i <= j)%Z ->
              ((binomial n i) * (binomial n j))%K = 0%K :> K) ->
            (forall i : Z, forall j : Z, ((hi_ < j)%Z) ->
              ((binomial n i) * (binomial n j))%K = 0%K :> K) ->
            (forall k : Z, ((k < lo__)%Z) -> (binomial lo k)%K = 0%K :> K) ->
            (sum lo_ hi (fun i : Z => (sum i hi_ (fun j : Z =>
              ((binomial n i) * (binomial n j))%K))))
            = (sum lo__ 3%Z (fun k : Z => (binomial lo k)%K)) :> K"""))

    def test_infinite_ends_of_a_recurrence(self):
        text = HEAD + '''[sum]\nsummand = "binomial(n, i)*binomial(n, j)"
over = [ { index = "i", low = "0", high = "n" }, { index = "j", low = "-inf", high = "i" } ]
[evidence]\nrecurrence = ["1"]'''
        self.assertEqual(statement(text), squeeze("""
            forall (K : char0_field) (lo : Z -> Z) (s : Z -> K),
            (forall n : Z, s n = (sum 0%Z n (fun i : Z => (sum (lo n) i (fun j : Z =>
              ((binomial n i) * (binomial n j))%K)))) :> K) ->
            (forall n : Z, (0 <= n)%Z -> (forall i : Z, (0%Z <= i <= n)%Z ->
              forall j : Z, ((j < (lo n))%Z) -> ((binomial n i) * (binomial n j))%K = 0%K :> K)) ->
            forall n : Z, (0 <= n)%Z -> ((inj 1%Z) * s n)%K = (inj 0%Z)%K :> K"""))

    def test_names_that_coq_uses(self):
        text = HEAD + '''[sum]\nsummand = "fun*K + sum + inj + z^forall + K_"
over = [ { index = "forall", low = "0", high = "n" } ]
[equals]\nclosed = "Z + S"
[parameters]
fun = { in = "rationals", not = ["integers"] }
K = { in = "rationals" }
K_ = { in = "rationals" }
sum = { in = "rationals" }
inj = { in = "rationals" }
z = { in = "rationals" }
Z = { in = "integers" }
S = { in = "integers" }'''
        self.assertEqual(statement(text), squeeze("""
            forall (K : char0_field) (fun_ : K) (K__ : K) (K___ : K) (sum_ : K) (inj_ : K) (z : K)
              (Z_ : Z) (S_ : Z) (n : Z),
            (forall z_ : Z, fun_ <> inj z_ :> K) -> (0 <= n)%Z ->
            (sum 0%Z n (fun forall_ : Z =>
              (((((fun_ * K__) + sum_) + inj_) + (zpow z forall_)) + K___)%K))
            = ((inj Z_) + (inj S_))%K :> K"""))


class PrintedRecurrences(unittest.TestCase):
    SUM = '''[sum]\nsummand = "x^k*binomial(n, k)"
over = [ { index = "k", low = "0", high = "n" } ]
[parameters]\nx = { in = "rationals" }\n'''
    CLAIMED = HEAD + SUM + '''[evidence]
recurrence = ["-(1 + x)/((n + 1)*(x - 1))", "1/(2*(n + 1)*(x - 1))*2"]
right_side = "factorial(n)/factorial(n - 3)*x^n/((n + 1)*(x - 1))"'''
    RIGHT = "factorial(n)/factorial(n - 3)*x^n"

    def test_cleared(self):
        text = statement(self.CLAIMED, {"recurrence": ["-(1 + x)", "1"], "right_side": self.RIGHT})
        self.assertTrue(text.endswith("(((- ((inj 1%Z) + x)) * s n) + ((inj 1%Z) * s (n + 1)%Z))"
                                      "%K = (((factorial n) * (rfactorial (n - 3)%Z)) * (zpow x n))"
                                      "%K :> K"), text)
        statement(self.CLAIMED, {"recurrence": ["2 + 2*x", "-2"], "right_side": "-2*" + self.RIGHT})

    def test_refused(self):
        for coefficients, right_side, why in (
                (["-(1 + x)", "2"], self.RIGHT, "not a multiple"),
                (["-(1 + x)", "1"], "2*" + self.RIGHT, "right side"),
                (["-(1 + x)", "1"], "0", "right side"),
                (["-(1 + x)*(n + 1)", "n + 1"], "(n + 1)*" + self.RIGHT, "cleared"),
                (["-(1 + x)*(x - 1)", "x - 1"], "(x - 1)*" + self.RIGHT, "cleared"),
                (["0", "0"], "0", "zero"),
                (["n - n", "(x + 1)^2 - x^2 - 2*x - 1"], "0", "zero"),
                (["-(1 + x)", "1", "0"], self.RIGHT, "printed coefficients for"),
                (["-(1 + x)/2", "1/2"], self.RIGHT + "/2", "denominator"),
                (["-(1 + y)", "1"], self.RIGHT, "symbols"),
                (["-(1 + k)", "1"], self.RIGHT, "symbols")):
            with self.assertRaisesRegex(BadClaim, why):
                statement(self.CLAIMED, {"recurrence": coefficients, "right_side": right_side})

    def test_question(self):
        good = {"recurrence": ["-(1 + x)", "1"]}
        self.assertIn("s (n + 1)%Z", statement(HEAD + self.SUM, good))
        for coefficients, why in ((["-(1 + 2*x)", "1"], "fails"), (["0", "0"], "zero")):
            with self.assertRaisesRegex(BadClaim, why):
                statement(HEAD + self.SUM, {"recurrence": coefficients})

    def test_needed(self):
        with tempfile.NamedTemporaryFile("w", suffix=".toml") as file:
            file.write(self.CLAIMED)
            file.flush()
            with self.assertRaisesRegex(BadClaim, "needed"):
                coq_statement.statement_of(file.name)


class Program(unittest.TestCase):
    def run_program(self, *arguments):
        program = os.path.join(HERE, "coq_statement.py")
        return subprocess.run([sys.executable, program, *arguments], capture_output=True, text=True)

    def test_check_file(self):
        path = os.path.join(ROOT, "exemplars", "equal-faults.toml")
        done = self.run_program(path, "--library", "Depot.Lines")
        self.assertEqual((done.returncode, done.stderr), (0, ""))
        pieces = ["Require Import ZArith.", "From Sumwright Require Import Statement.",
                  "Local Open Scope Z_scope.", "Definition the_statement : Prop :=",
                  "From Depot.Lines Require Import Claim.", "Goal the_statement.",
                  "Proof. exact claim. Qed."]
        places = [done.stdout.index(piece) for piece in pieces]
        self.assertEqual(places, sorted(places))

    def test_question_with_file(self):
        path = os.path.join(ROOT, "exemplars", "parcels-in-lockers.toml")
        self.assertEqual(self.run_program(path).returncode, 2)
        with tempfile.NamedTemporaryFile("w", suffix=".json") as file:
            json.dump({"recurrence": PRINTED["parcels-in-lockers"], "right_side": "0"}, file)
            file.flush()
            done = self.run_program(path, "--printed-recurrence", file.name)
        self.assertEqual((done.returncode, done.stderr), (0, ""))
        self.assertIn("s (n + 2)%Z", done.stdout)

    def test_unreadable(self):
        done = self.run_program("/nowhere.toml")
        self.assertEqual((done.returncode, done.stdout), (2, ""))


@unittest.skipIf(shutil.which("coqc") is None and os.environ.get("CI") != "true", "no coqc")
class InCoq(unittest.TestCase):
    """Coq reads every statement, as definitions only, in one run."""

    def compile(self, text):
        with tempfile.TemporaryDirectory() as folder:
            shutil.copy(os.path.join(ROOT, "templates", "coq", "Statement.v"), folder)
            with open(os.path.join(folder, "definitions.v"), "w", encoding="utf-8") as stream:
                stream.write(text)
            for file in ("Statement.v", "definitions.v"):
                done = subprocess.run(["coqc", "-q", "-Q", ".", "Sumwright", file], cwd=folder,
                                      capture_output=True, text=True, timeout=300)
                if done.returncode and file == "definitions.v":
                    line = int(re.search(r"line (\d+)", done.stderr)[1])
                    done.stderr += text.splitlines()[line - 1]
                self.assertEqual(done.returncode, 0, done.stdout + done.stderr)
            return done.stdout

    def head(self):
        return ("Require Import ZArith.\nFrom Sumwright Require Import Statement.\n"
                "Local Open Scope Z_scope.\n")

    def test_every_claim_file_elaborates(self):
        text, count = self.head(), 0
        for path in claim_files():
            name = os.path.basename(path)[:-len(".toml")]
            printed = {"recurrence": PRINTED[name]} if name in PRINTED else None
            try:
                body = coq_statement.statement_of(path, printed)
            except BadClaim as problem:
                # A false claim with denominators has no cleared form to be printed.
                self.assertIn("false-claims", path, problem)
                continue
            count += 1
            text += f"Module M{count}. (* {name} *)\nDefinition the_statement : Prop :=\n  {body}.\n"
            text += f"End M{count}.\n"
        self.compile(text)
        self.assertGreater(count, 200)
        print(f"{count} statements read by Coq")

    def test_every_word_of_coq_can_be_a_name(self):
        """Symbols named like words of Coq or of the vocabulary, bound and used."""
        listing = self.compile(self.head() + "Print Grammar constr.\nPrint Grammar tactic.\n"
                               "Print Grammar vernac.\n")
        words = set(re.findall(r'"([A-Za-z][A-Za-z0-9_]*)"', listing))
        vocabulary = os.path.join(ROOT, "templates", "coq", "Statement.v")
        with open(vocabulary, encoding="utf-8") as stream:
            words |= set(re.findall(r"[A-Za-z][A-Za-z0-9_]*", stream.read()))
        words |= set("""end with match return as at where using cofix fix struct let in IF Prop Set
            Type SProp Z K N Q s lo hi z S O eq le lt not pair Axiom Theorem ltac rem quot mod by
            coqc do first now of to is by_ over for the then else if inf_ pos neg""".split())
        words -= {"binomial", "factorial", "rising", "falling", "floor", "min", "max", "inf"}
        words = sorted(words)
        self.assertGreater(len(words), 100)
        text = self.head()
        for place, word in enumerate(words):
            other = "b" if word == "a" else "a"
            free = [w for w in ("n", "k", "i", "j") if w not in (word, other)]
            n, k = free[0], free[1]
            for kind in ("integers", "rationals"):
                claim = f'''format = 1\ntitle = "t"\nrunning = "{n}"\nfrom = 0
[sum]\nsummand = "{word}*{k} + binomial({word}, {k}) + 2^{k}/factorial({k})"
over = [ {{ index = "{k}", low = "-inf", high = "{n}" }} ]
[equals]\nclosed = "{word} - {other}"
[parameters]\n{word} = {{ in = "{kind}" }}\n{other} = {{ in = "rationals", not = ["integers"] }}'''
                name = f"M{place}_{kind}"
                text += f"Module {name}.\nDefinition d : Prop := {statement(claim)}.\nEnd {name}.\n"
            claim = f'''format = 1\ntitle = "t"\nrunning = "{word}"\nfrom = 0
[sum]\nsummand = "binomial({word}, {k})"\nover = [ {{ index = "{k}", low = "0", high = "{word}" }} ]
[evidence]\nrecurrence = ["{word}", "{word} + 1"]'''
            text += f"Module M{place}_r.\nDefinition d : Prop := {statement(claim)}.\nEnd M{place}_r.\n"
        self.compile(text)


if __name__ == "__main__":
    unittest.main()
