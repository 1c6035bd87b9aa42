"""Tests of the end-to-end steps: what is right passes, and every kind of fault is found.

The exports are made from the hand-written model proofs of the support library, so that this
needs no built program.  Also: each model's theorem is the statement that the independent program
writes from a claim file.
"""

import io
import json
import os
import shutil
import stat
import sys
import tempfile
import unittest
from unittest import mock

HERE = os.path.dirname(os.path.abspath(__file__))
sys.path.insert(0, HERE)

sys.dont_write_bytecode = True
import run  # noqa: E402
from claims import LIBRARY, Context, claims_in  # noqa: E402
from report import Report  # noqa: E402
from step_latex import complaints  # noqa: E402

BINOMIAL = "binomial(n, k)"
MODELS = {  # model -> claim
    "Squares": dict(summand=BINOMIAL + "^2", closed="binomial(2*n, n)"),
    "MovingEnd": dict(summand="binomial(n + k, k)*(1/2)^k", closed="2^n"),
    "Vandermonde": dict(summand="binomial(x, k)*binomial(y, n - k)", closed="binomial(x + y, n)",
                        parameters='x = { in = "rationals" }\ny = { in = "rationals" }'),
    "IntegerParameters": dict(
        summand="binomial(m, k)*binomial(p, n - k)", closed="binomial(m + p, n)",
        parameters='m = { in = "integers", at_least = 0 }\np = { in = "integers", at_least = 0 }'),
    "Indefinite": dict(summand="k*factorial(k)", closed="factorial(n + 1) - 1"),
    "Denominator": dict(summand=f"(-1)^k*{BINOMIAL}/(2*k + 1)",
                        closed="4^n*factorial(n)^2/factorial(2*n + 1)"),
    "Recurrence": dict(summand=BINOMIAL + "^2*x^k", parameters='x = { in = "rationals" }',
                       recurrence=["(n + 1)*(1 - x)^2", "-(2*n + 3)*(1 + x)", "n + 2"]),
    "Positivity": dict(summand=BINOMIAL, closed="2^n"),
    "Progression": dict(summand="rising(1/2, k)/factorial(k)",
                        closed="rising(3/2, n)/factorial(n)"),
    "ExcludedValues": dict(
        summand=f"(-1)^k*{BINOMIAL}/(x + k)", closed="factorial(n)/rising(x, n + 1)",
        parameters='x = { in = "rationals", not = ["nonpositive integers"] }'),
    "Zeta3": dict(summand=f"({BINOMIAL}*binomial(n + k, k))^2",
                  recurrence=["(n + 1)^3", "-(2*n + 3)*(17*n^2 + 51*n + 39)", "(n + 2)^3"]),
}
APPENDIX = r"""\ifdefined\sumwrighttheorem\else\newtheorem*{sumwrighttheorem}{Theorem}\fi
\begin{sumwrighttheorem} A sum.\begin{equation}\label{LABEL:sum}1+1=2\end{equation}
\end{sumwrighttheorem} By \eqref{LABEL:sum}.
"""


def claim_text(summand, closed=None, recurrence=None, parameters=""):
    text = ('format = 1\ntitle = "t"\nrunning = "n"\nfrom = 0\n[sum]\n'
            f'summand = "{summand}"\nover = [ {{ index = "k", low = "0", high = "n" }} ]\n')
    if closed:
        text += f'[equals]\nclosed = "{closed}"\n'
    if recurrence:
        text += f"[evidence]\nrecurrence = {json.dumps(recurrence)}\n"
    return text + (f"[parameters]\n{parameters}\n" if parameters else "")


def write(path, text):
    os.makedirs(os.path.dirname(path), exist_ok=True)
    with open(path, "w", encoding="utf-8") as stream:
        stream.write(text)


def read(*parts):
    with open(os.path.join(*parts), encoding="utf-8") as stream:
        return stream.read()


class World:
    """A folder with claims, a fake program and what it hands out."""

    def __init__(self, folder, models, library=True):
        self.folder = folder
        self.program = os.path.join(folder, "program")
        shutil.copy(os.path.join(HERE, "fake_program.py"), self.program)
        os.chmod(self.program, os.stat(self.program).st_mode | stat.S_IXUSR)
        for model in models:
            write(os.path.join(folder, "exemplars", model + ".toml"), claim_text(**MODELS[model]))
            self.answer(model, {"verdict": "established"}, 0)
            self.export_of(model)

    def answer(self, name, record, status):
        place = os.path.join(self.folder, "prepared", name)
        write(os.path.join(place, "check.json"), json.dumps(record))
        write(os.path.join(place, "status"), str(status))

    def place(self, model, *parts):
        return os.path.join(self.folder, "prepared", model, "export", *parts)

    def export_of(self, model):
        for name in os.listdir(LIBRARY):
            if name.endswith(".v") or name == "_CoqProject":
                os.makedirs(self.place(model, "coq"), exist_ok=True)
                shutil.copy(os.path.join(LIBRARY, name), self.place(model, "coq"))
        shutil.copy(os.path.join(LIBRARY, "test", f"Model{model}.v"),
                    self.place(model, "coq", "Claim.v"))
        body = APPENDIX.replace("LABEL", model)
        write(self.place(model, "obligations.txt"), "obligations\n")
        write(self.place(model, "appendix.tex"), body)
        write(self.place(model, "appendix-standalone.tex"),
              "\\documentclass{amsart}\n\\usepackage{amsmath,amsthm}\n\\begin{document}\n"
              + body + "\\end{document}\n")

    def change(self, model, path, old, new):
        text = read(self.place(model, path))
        assert old in text, old
        write(self.place(model, path), text.replace(old, new))

    def run(self, *steps, mutants=8):
        out = io.StringIO()
        context = Context(
            sumwright=[self.program], work=run.emptied(os.path.join(self.folder, "work")),
            claims=claims_in(self.folder, "exemplars/*.toml"),
            false_root=os.path.join(self.folder, "false"),
            undecided_root=os.path.join(self.folder, "undecided"), library=LIBRARY,
            report=Report(out), seed=1, mutants=mutants)
        status = run.run_steps(context, steps)
        return status, out.getvalue()


class Steps(unittest.TestCase):
    def setUp(self):
        self.place = tempfile.TemporaryDirectory()
        self.addCleanup(self.place.cleanup)

    def world(self, *models):
        return World(self.place.name, models)

    def passes(self, world, *steps, **options):
        status, said = world.run(*steps, **options)
        self.assertEqual(status, 0, said)
        return said

    def fails(self, world, expected, *steps, **options):
        status, said = world.run(*steps, **options)
        self.assertEqual(status, 1, said)
        last = said.strip().splitlines()[-1]
        self.assertTrue(last.startswith("failed: "), said)
        self.assertRegex(" ".join(said.split()), expected)


class Exports(Steps):
    def test_all_is_well(self):
        said = self.passes(self.world("Squares", "Zeta3"), "exports", "latex")
        self.assertRegex(said, r"exports +2 cases +0 failures")
        self.assertRegex(said, r"the same bytes twice +2 cases +0 failures")
        self.assertRegex(said, r"appendices in one paper +2 cases +0 failures")

    def test_no_claims(self):
        self.fails(self.world(), "failed: exports: \\(no case\\)", "exports")

    def test_restless(self):
        world = self.world("Squares", "Zeta3")
        write(world.place("Zeta3", "restless"), "")
        self.fails(world, "exemplars/Zeta3: two runs differ in record.json", "exports")

    def test_not_established(self):
        world = self.world("Squares")
        world.answer("Squares", {"verdict": "undecided"}, 3)
        self.fails(world, "exemplars/Squares: exit status 3", "exports")
        world.answer("Squares", {"verdict": "undecided"}, 0)
        self.fails(world, "exemplars/Squares: verdict undecided", "exports")

    def test_missing_file(self):
        world = self.world("Squares")
        os.remove(world.place("Squares", "obligations.txt"))
        self.fails(world, "not written: obligations.txt", "exports")


class Latex(Steps):
    def test_overfull_box(self):
        world = self.world("Squares")
        world.change("Squares", "appendix-standalone.tex", "A sum.",
                     "\\hbox to 1pt{A long text in a short box}")
        self.fails(world, "exemplars/Squares: 1 complaints: Overfull", "exports", "latex")

    def test_undefined_reference(self):
        world = self.world("Squares")
        world.change("Squares", "appendix-standalone.tex", "\\eqref{Squares:sum}", "\\eqref{other}")
        self.fails(world, "Squares: . complaints: LaTeX Warning: Reference", "exports", "latex")

    def test_error(self):
        world = self.world("Squares")
        world.change("Squares", "appendix-standalone.tex", "A sum.", "\\nosuchcommand")
        self.fails(world, "Squares: pdflatex: exit status 1: ! Undefined control sequence",
                   "exports", "latex")

    def test_labels_that_clash(self):
        world = self.world("Squares", "Zeta3")
        world.change("Zeta3", "appendix.tex", "Zeta3:", "Squares:")
        self.fails(world, "paper: two: .*multiply.defined", "exports", "latex")

    def test_missing_tool(self):
        world = self.world("Squares")
        with mock.patch.dict(os.environ, {"CI": "true"}), \
                mock.patch("step_latex.shutil.which", return_value=None):
            self.fails(world, "pdflatex: not installed", "exports", "latex")
        with mock.patch.dict(os.environ, {"CI": "false"}), \
                mock.patch("step_latex.shutil.which", return_value=None):
            said = self.passes(world, "exports", "latex")
        self.assertIn("skipped: appendices: no pdflatex", said)

    def test_reading_of_logs(self):
        log = ("Underfull \\hbox (badness 10000) in paragraph\nLaTeX Font Warning: size\n"
               "LaTeX Warning: There were undefined references.\nfine\n! Emergency stop.\n")
        self.assertEqual(len(complaints(log)), 3)


@unittest.skipIf(shutil.which("coqc") is None and os.environ.get("CI") != "true", "no coqc")
class Coq(Steps):
    def test_models_are_the_statements_of_their_claims(self):
        said = self.passes(self.world(*MODELS), "coq", "mutants", "coqchk", mutants=40)
        self.assertIn("11 theorems are the statements of their claims, without axioms", said)
        self.assertRegex(said, r"[45]\d refused by coqc")
        self.assertRegex(said, r"coqchk: 11 modules, \d+ s")

    def test_faults(self):
        """One run for many faults: each is reported under the name of its claim."""
        world = self.world("Squares", "MovingEnd", "Vandermonde", "IntegerParameters", "Indefinite",
                           "Denominator", "Recurrence", "Positivity")
        end = "Theorem claim_defined"
        world.change("Squares", "coq/Claim.v", "End Claim.",
                     "End Claim.\nDefinition another := True.")
        world.change("MovingEnd", "coq/Claim.v", end, "Theorem claim_undefined")
        world.change("Vandermonde", "coq/Claim.v", "Theorem claim :",
                     "Axiom shortcut : False.\nTheorem claim :")
        text = read(world.place("IntegerParameters", "coq/Claim.v"))
        head, tail = text.split("Theorem claim :")
        statement = tail.split("Proof.")[0]
        rest = tail[tail.index("Theorem claim_defined"):]
        write(world.place("IntegerParameters", "coq/Claim.v"),
              f"{head}Axiom shortcut : False.\nTheorem claim :{statement}"
              f"Proof. destruct shortcut. Qed.\n{rest}")
        world.change("Indefinite", "coq/Claim.v", "factorial (n + 1) - inj 1)%K :> K",
                     "factorial (n + 1) - inj 2)%K :> K")
        world.change("Denominator", "coq/Statement.v", "The vocabulary", "The new vocabulary")
        world.change("Recurrence", "coq/Claim.v", "Theorem claim :", "Theorem another :")
        write(world.place("Positivity", "coq/Claim.v"),
              "Definition the_statement : Prop := True.\n"
              "Theorem claim : True. Proof. trivial. Qed.\n"
              "Theorem claim_defined : True. Proof. trivial. Qed.\n")
        status, said = world.run("coq")
        self.assertEqual(status, 1, said)
        said = " ".join(said.split())
        for expected in (
                "failed: theorems: exemplars/IntegerParameters: axioms",
                "failed: theorems: exemplars/Indefinite: Claim.v: File",
                "failed: theorems: exemplars/Denominator: Statement.v is not the file",
                "failed: theorems: exemplars/Recurrence: not the statement",
                "failed: theorems: exemplars/MovingEnd: not the statement",
                "failed: theorems: exemplars/Positivity: not the statement"):
            self.assertIn(expected, said)
        self.assertNotIn("failed: theorems: exemplars/Squares", said)
        self.assertNotIn("failed: theorems: exemplars/Vandermonde", said)  # an axiom not used


FALSE = dict(summand=BINOMIAL, closed="2^n + n")


class Undecided(Steps):
    OPEN = {"verdict": "undecided", "reason": "r", "would_settle": "R7"}

    def test_undecided(self):
        for answer, status, files, expected in (
                (self.OPEN, 3, ["obligations.txt"], None),
                (self.OPEN, 3, ["obligations.txt", "appendix.tex"], "exported: appendix.tex"),
                ({**self.OPEN, "verdict": "established"}, 0, [], "belongs in the corpus"),
                ({**self.OPEN, "would_settle": ""}, 3, ["obligations.txt"], "would settle it"),
                (self.OPEN, 4, [], "exit status 4 in place of 3")):
            shutil.rmtree(os.path.join(self.place.name, "prepared"), ignore_errors=True)
            world = FalseClaims.false_world(self, POINT)
            write(os.path.join(world.folder, "undecided", "open.toml"), claim_text(BINOMIAL))
            world.answer("open", answer, status)
            for name in files:
                write(world.place("open", name), "text")
            if not files:
                os.makedirs(world.place("open"))
            if expected:
                self.fails(world, expected, "false")
            else:
                self.assertRegex(self.passes(world, "false"), r"undecided claims +1 cases +0 fail")


class FalseClaims(Steps):
    def false_world(self, answer, status=1, kind="claims", claim=None):
        world = self.world()
        for folder in ("claims", "evidence", "disguised"):
            write(os.path.join(world.folder, "false", folder, folder + ".toml"),
                  claim_text(**(claim if claim and folder == kind else FALSE)))
            world.answer(folder, POINT, 0 if folder == "disguised" else 1)
        world.answer(kind, answer, status)
        return world

    def test_confirmed(self):
        said = self.passes(self.false_world(POINT), "false")
        self.assertRegex(said, r"false claims +1 cases +0 failures")
        self.assertRegex(said, r"right in disguise +1 cases +0 failures")

    def test_established(self):
        self.fails(self.false_world({"verdict": "established"}, 0),
                   "claims: exit status 0 in place of 1", "false")

    def test_disguised_and_refused(self):
        self.fails(self.false_world(POINT, 1, "disguised"),
                   "disguised: exit status 1", "false")

    def test_points(self):
        cases = {
            "both sides are 1": point(n="0", left="0", right="1"),
            "5 and 4 printed, 2 and 3 true": point(n="1", left="5", right="4"),
            "does not give every symbol": point(m="1"),
            "excluded by the claim itself": point(n="-1"),
            "no point": {"verdict": "refuted"},
        }
        for expected, answer in cases.items():
            self.fails(self.false_world(answer), expected, "false")

    def test_certificates(self):
        claim = dict(summand=BINOMIAL, recurrence=["-2", "1"])
        text = claim_text(**claim).replace("[evidence]\n",
                                           '[evidence]\ncertificate = { k = "k/(n + 1 - k)" }\n')
        for answer, status in ((identity(n="2", k="1", left="-1", right="1"), 0),
                               (identity(n="2", k="0", left="-1", right="1"), 0),
                               (identity(n="2", k="1", left="7", right="5"), 1),
                               (identity(n="1/2", k="1/3", left="1", right="2"), 0)):
            world = self.false_world(answer, 1, "evidence", claim)
            write(os.path.join(world.folder, "false", "evidence", "evidence.toml"), text)
            found, said = world.run("false")
            self.assertEqual(found, status, said)


def point(left="2", right="3", **values):
    return {"verdict": "refuted", "counterexample": {
        "what": "the claimed equality", "values": values, "left": left, "right": right}}


def identity(left, right, **values):
    return {"verdict": "refuted", "counterexample": {
        "what": "the telescoping identity", "values": values, "left": left, "right": right}}


POINT = point(n="1")


class Speed(Steps):
    def test_speed(self):
        said = self.passes(self.world("Squares", "Zeta3"), "speed")
        self.assertRegex(said, r"check with evidence +1 cases +0 failures")
        self.assertRegex(said, r"find, write, check +1 cases +0 failures")

    def test_slow(self):
        world = self.world("Squares", "Zeta3")
        with mock.patch("step_speed.MOST_SECONDS", 0.001):
            self.fails(world, "Zeta3: check took", "speed")


if __name__ == "__main__":
    unittest.main()
