"""Every export through Coq: compiled, its theorem compared with the statement that a program
writes from the claim file alone, its axioms printed; then coqchk once over everything."""

import json
import os
import re
import shutil
import sys

from claims import INDEPENDENT
from processes import in_parallel, run

SECONDS_PER_FILE = 120
SECONDS_COQCHK = 900
CLOSED = "Closed under the global context"
COQCHK_SUMMARY = ["* Axioms: <none>", "type-in-type: <none>", "unsafe (co)fixpoints: <none>",
                  "positivity is assumed: <none>"]


class CoqFolder:
    """The support library, compiled once, and a folder with a logical name for every claim."""

    def __init__(self, context):
        self.context, self.library = context, context.folder("coq", "library")

    def options(self, *claims):
        out = ["-Q", self.library, "Sumwright"]
        for claim in claims:
            out += ["-Q", self.folder(claim), claim.library]
        return out

    def folder(self, claim):
        return self.context.folder("coq", claim.folder)

    def coqc(self, claim, file, cwd=None):
        return run(["coqc", "-q", *self.options(claim), file], cwd=cwd or self.folder(claim),
                   seconds=SECONDS_PER_FILE)


def library(context, coq):
    """Compiles the support library; False when it does not compile."""
    report = context.report
    report.start("support library")
    for name in os.listdir(context.library):
        if name.endswith(".v") or name == "_CoqProject":
            shutil.copy(os.path.join(context.library, name), coq.library)
    with open(os.path.join(coq.library, "_CoqProject"), encoding="utf-8") as stream:
        files = re.findall(r"^\S+\.v$", stream.read(), re.M)
    for file in files:
        done = run(["coqc", "-q", "-Q", ".", "Sumwright", file], cwd=coq.library,
                   seconds=SECONDS_PER_FILE)
        if not report.case(file, done.text() if done.status else None):
            return False
    return bool(files)


def exported_scripts(export):
    folder = os.path.join(export.folder, "coq")
    return {os.path.relpath(os.path.join(here, name), folder)
            for here, _, names in os.walk(folder) for name in names if name.endswith(".v")}


def library_problem(context, export):
    """The support files of an export are those of the repository, byte for byte, and all there."""
    shipped = {name for name in os.listdir(context.library) if name.endswith(".v")}
    there = {os.path.basename(path): path for path in exported_scripts(export)}
    if shipped - set(there):
        return f"not exported: {', '.join(sorted(shipped - set(there)))}"
    for name in shipped:
        with open(os.path.join(context.library, name), "rb") as one, open(
                os.path.join(export.folder, "coq", there[name]), "rb") as other:
            if one.read() != other.read():
                return f"{name} is not the file of the support library"
    return None


def compile_claim(context, coq, export):
    """(problem, seconds, MiB) of Claim.v and of the corollaries beside it."""
    problem = library_problem(context, export)
    if problem:
        return problem, None
    folder, claim = coq.folder(export.claim), export.claim
    shipped = set(os.listdir(context.library))
    own = sorted(path for path in exported_scripts(export)
                 if os.path.basename(path) not in shipped)
    for path in own:
        shutil.copy(os.path.join(export.folder, "coq", path), folder)
    measured = None
    for name in sorted(map(os.path.basename, own), key=lambda name: (name != "Claim.v", name)):
        done = coq.coqc(claim, name)
        measured = measured or done
        if done.status != 0:
            return f"{name}: {done.text()}", measured
    return None, measured


def printed_recurrence(context, export):
    """The file with the recurrence that the export says it proves."""
    recurrence = export.record.get("recurrence")
    if not recurrence:
        return None
    path = context.place("printed", export.claim.folder + ".json")
    with open(path, "w", encoding="utf-8") as stream:
        json.dump({"recurrence": recurrence["coefficients"],
                   "right_side": recurrence["right_side"]}, stream)
    return path


def statement_file(context, export):
    """(text, problem): the check file, by the program that reads only the claim file."""
    command = [sys.executable, os.path.join(INDEPENDENT, "coq_statement.py"), export.claim.path,
               "--library", export.claim.library]
    printed = printed_recurrence(context, export)
    done = run([*command, "--printed-recurrence", printed] if printed else command)
    return (done.stdout, None) if done.status == 0 else (None, done.text())


def with_assumptions(text, library_name):
    """The check file, with a first comparison before any name of Claim can hide another, and
    with the axioms of both theorems printed at the end."""
    loading = f"From {library_name} Require Import Claim.\n"
    before, after = text.split(loading)
    return (f"{before}From {library_name} Require Claim.\n"
            f"Goal the_statement.\nProof. exact {library_name}.Claim.claim. Qed.\n"
            f"{loading}{after}"
            f"Print Assumptions {library_name}.Claim.claim.\n"
            f"Print Assumptions {library_name}.Claim.claim_defined.\n")


def statement_problem(context, coq, export):
    text, problem = statement_file(context, export)
    if problem:
        return f"no statement: {problem}"
    path = os.path.join(coq.folder(export.claim), "statement_check.v")
    with open(path, "w", encoding="utf-8") as stream:
        stream.write(with_assumptions(text, export.claim.library))
    done = coq.coqc(export.claim, "statement_check.v")
    if done.status != 0:
        return f"not the statement of the claim: {done.text()}"
    if done.stdout.count(CLOSED) != 2 or "Axioms:" in done.stdout:
        return f"axioms: {done.text()}"
    return None


def exchanged(context, coq, accepted):
    """A theorem about another claim is not taken for the claim's: the comparison can fail."""
    context.report.start("exchanged statements")
    pairs = list(zip(accepted, accepted[1:] + accepted[:1]))[:: max(1, len(accepted) // 8)]

    def one(pair):
        claim, other = pair[0].claim, pair[1].claim
        text, problem = statement_file(context, pair[0])
        text = (text or "").replace(f"From {claim.library} ", f"From {other.library} ")
        path = os.path.join(coq.folder(claim), "exchanged_check.v")
        with open(path, "w", encoding="utf-8") as stream:
            stream.write(text)
        done = run(["coqc", "-q", *coq.options(claim, other), "exchanged_check.v"],
                   cwd=coq.folder(claim), seconds=SECONDS_PER_FILE)
        said = " ".join(done.stderr.split())
        refused = done.status != 0 and "has type" in said and "while it is expected" in said
        context.report.case(f"{claim.name} by {other.name}",
                            problem or (None if refused else f"not refused: {done.text()}"))

    in_parallel(one, pairs if len(accepted) > 1 else [])


def coqchk(context, coq, accepted):
    context.report.start("coqchk")
    if shutil.which("coqchk") is None:
        context.report.missing_tool("coqchk")
        return
    if not accepted:
        return
    claims = [export.claim for export in accepted]
    done = run(["coqchk", "-silent", "-o", *coq.options(*claims),
                *(claim.library + ".Claim" for claim in claims)],
               seconds=SECONDS_COQCHK, memory_gib=8)
    said = " ".join((done.stdout + done.stderr).split())
    missing = [line for line in COQCHK_SUMMARY if line not in said]
    problem = done.text() if done.status != 0 or missing else None
    context.report.case(f"{len(claims)} modules", problem)
    context.report.say(f"   coqchk: {len(claims)} modules, {done.seconds:.0f} s, "
                       f"{done.peak_kib / 1024:.0f} MiB")


def coq(context):
    """The exports whose theorem is accepted and is the statement of the claim."""
    report, folder = context.report, CoqFolder(context)
    report.start("theorems")
    if shutil.which("coqc") is None:
        report.missing_tool("coqc")
        return folder, []
    if not library(context, folder):
        return folder, []
    report.start("theorems")
    measured = []

    def one(export):
        problem, cost = compile_claim(context, folder, export)
        if cost:
            measured.append(cost)
        problem = problem or statement_problem(context, folder, export)
        return export if report.case(export.claim.name, problem) else None

    exports = [e for e in context.exports.values() if e.good]
    accepted = [e for e in in_parallel(one, exports) if e]
    report.say(f"   {len(accepted)} theorems are the statements of their claims, without axioms")
    report.numbers("coqc of Claim.v", [done.seconds for done in measured])
    report.numbers("peak memory", [done.peak_kib / 1024 for done in measured], "MiB")
    exchanged(context, folder, accepted)
    return folder, accepted
