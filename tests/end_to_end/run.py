#!/usr/bin/env python3
"""Every claim from its file to a theorem and an appendix, judged by Coq and pdflatex.

    run.py --sumwright PROGRAM --work FOLDER [--steps a,b] [--only TEXT]

Steps: exports, latex, coq, mutants, coqchk, replay, false, speed.  The folder is emptied first; it
must be one that this program made, or not exist.  Environment: SUMWRIGHT_SEED and SUMWRIGHT_MUTANTS
choose and multiply the mutated scripts; CI=true makes a missing tool a failure.
"""

import argparse
import os
import shutil
import sys
import time

sys.dont_write_bytecode = True

from claims import LIBRARY, ROOT, Context, claims_in  # noqa: E402
from report import Report  # noqa: E402
from step_coq import coq, coqchk  # noqa: E402
from step_exports import exports  # noqa: E402
from step_false_claims import false_claims  # noqa: E402
from step_latex import latex  # noqa: E402
from step_mutants import mutants  # noqa: E402
from step_replay import replay  # noqa: E402
from step_speed import speed  # noqa: E402
from step_undecided import undecided  # noqa: E402

STEPS = ("exports", "latex", "coq", "mutants", "coqchk", "replay", "false", "speed")
MARK = "made-by-end-to-end-tests"


def emptied(folder):
    if os.path.exists(folder):
        if os.listdir(folder) and not os.path.exists(os.path.join(folder, MARK)):
            sys.exit(f"{folder}: not a folder of these tests; not emptied")
        shutil.rmtree(folder)
    os.makedirs(folder)
    open(os.path.join(folder, MARK), "w", encoding="utf-8").close()
    return os.path.abspath(folder)


def environment_number(name, default):
    text = os.environ.get(name, str(default))
    if not text.isdigit() or int(text) < 1:
        sys.exit(f"{name}={text}: a number above 0 is needed")
    return int(text)


def run_steps(context, steps):
    report, start = context.report, time.monotonic()
    if {"exports", "latex", "coq", "mutants", "coqchk"} & set(steps):
        exports(context)
    if "latex" in steps:
        latex(context)
    if {"coq", "mutants", "coqchk"} & set(steps):
        folder, accepted = coq(context)
        if "mutants" in steps:
            mutants(context, folder, accepted)
        if "coqchk" in steps:
            coqchk(context, folder, accepted)
    if "replay" in steps:
        replay(context)
    if "false" in steps:
        false_claims(context)
        undecided(context)
    if "speed" in steps:
        speed(context)
    report.say(f"   {time.monotonic() - start:.0f} s in all")
    return report.finish()


def main():
    reader = argparse.ArgumentParser(description="end-to-end tests")
    reader.add_argument("--sumwright", required=True)
    reader.add_argument("--work", required=True)
    reader.add_argument("--steps", default=",".join(STEPS))
    reader.add_argument("--only", default="", help="claims whose name contains this text")
    reader.add_argument("--root", default=ROOT)
    reader.add_argument("--library", default=LIBRARY)
    options = reader.parse_args()
    steps = options.steps.split(",")
    if set(steps) - set(STEPS):
        sys.exit(f"the steps are {', '.join(STEPS)}")
    claims = claims_in(options.root, "exemplars/*.toml", "tests/corpus/*/*.toml",
                       "tests/end_to_end/claims/*.toml")
    context = Context(
        sumwright=[os.path.abspath(options.sumwright)], work=emptied(options.work),
        claims=[c for c in claims if options.only in c.name],
        false_root=os.path.join(options.root, "tests", "false-claims"),
        undecided_root=os.path.join(options.root, "tests", "undecided"),
        library=options.library, report=Report(), seed=environment_number("SUMWRIGHT_SEED", 20),
        mutants=environment_number("SUMWRIGHT_MUTANTS", 60))
    return run_steps(context, steps)


if __name__ == "__main__":
    sys.exit(main())
