"""`replay` with the real assistant: a good export is accepted, a false script with a right record
is refused, and run.json says so."""

import hashlib
import json
import os
import random
import shutil

from coq_mutation import polynomial_mutants
from processes import run

SECONDS = 600


def last_replay(folder):
    with open(os.path.join(folder, "run.json"), encoding="utf-8") as stream:
        return json.load(stream)["replays"][-1]


def accepted_problem(done, folder):
    if done.status != 0:
        return f"exit status {done.status}: {done.text()}"
    said = last_replay(folder)
    if said["exit_status"] != 0 or not all(step["accepted"] for step in said["steps"]):
        return f"run.json: {said}"
    return None


def refused_problem(done, folder):
    if done.status != 1:
        return f"exit status {done.status} in place of 1: {done.text()}"
    if "Claim.v" not in done.stderr or last_replay(folder)["exit_status"] != 1:
        return f"refused for another reason: {done.text()}"
    return None


def falsify(folder):
    """Makes a polynomial of Claim.v wrong and the record agree with the file."""
    script = os.path.join(folder, "coq", "Claim.v")
    with open(script, encoding="utf-8") as stream:
        mutant = polynomial_mutants(stream.read(), random.Random(3), 1)[0]
    with open(script, "w", encoding="utf-8") as stream:
        stream.write(mutant.text)
    path = os.path.join(folder, "record.json")
    with open(path, encoding="utf-8") as stream:
        record = json.load(stream)
    for file in record["files"]:
        if file["path"] == "coq/Claim.v":
            file["sha256"] = hashlib.sha256(mutant.text.encode()).hexdigest()
    with open(path, "w", encoding="utf-8") as stream:
        json.dump(record, stream)


def replay(context):
    report = context.report
    report.start("replay")
    if shutil.which("coqc") is None:
        report.missing_tool("coqc")
        return
    claim = next((c for c in context.claims if c.name == "exemplars/equal-faults"),
                 context.claims[0] if context.claims else None)
    if claim is None:
        return
    good, bad = (os.path.join(context.folder("replay"), name) for name in ("good", "bad"))
    done = run([*context.sumwright, "export", claim.path, "--out", good])
    if done.status != 0:
        report.case(claim.name, f"export: exit status {done.status}: {done.reason()}")
        return
    shutil.copytree(good, bad)
    falsify(bad)
    done = run([*context.sumwright, "replay", good], seconds=SECONDS)
    report.case(f"{claim.name}, as exported", accepted_problem(done, good))
    report.say(f"   replay: {done.seconds:.0f} s")
    done = run([*context.sumwright, "replay", bad], seconds=SECONDS)
    report.case(f"{claim.name}, with a wrong polynomial", refused_problem(done, bad))
