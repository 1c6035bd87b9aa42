"""True claims that need a rule not yet there: said to be undecided, with a reason and what would
settle them, and nothing that reads like a proof is exported."""

import json
import os

from claims import claims_in
from processes import in_parallel, run
from step_exports import files_below

EXPECTED = {"obligations.txt", "record.json", "run.json"}


def problem_of(done, folder):
    if done.status == 0:
        return "established now: it belongs in the corpus"
    if done.status != 3:
        return f"exit status {done.status} in place of 3: {done.reason()}"
    answer = json.loads(done.stdout)
    if answer.get("verdict") != "undecided" or not answer.get("reason"):
        return f"verdict {answer.get('verdict')}, reason {answer.get('reason')!r}"
    if not answer.get("would_settle"):
        return f"not said what would settle it: {answer['reason']}"
    there = set(files_below(folder))
    if there != EXPECTED:
        return f"exported: {', '.join(sorted(there ^ EXPECTED))} too many or too few"
    return None


def undecided(context):
    claims = claims_in(context.undecided_root, "*.toml")
    if not claims:
        return
    context.report.start("undecided claims")

    def one(claim):
        out = os.path.join(context.folder("undecided"), claim.folder)
        done = run([*context.sumwright, "export", claim.path, "--out", out, "--json"])
        context.report.case(claim.name, problem_of(done, out))

    in_parallel(one, claims)
