"""Generated scripts with one change: Coq must refuse them."""

import os
import random

from coq_mutation import NotPolynomial, polynomial_mutants, statement_mutants
from processes import in_parallel, run
from step_coq import SECONDS_PER_FILE, statement_file

FEWEST = 40


def choose(context, accepted):
    """(export, mutant) pairs: from as many claims as there are, reproducible by the seed."""
    chance = random.Random(context.seed)
    order = list(accepted)
    chance.shuffle(order)
    each = max(1, -(-context.mutants // max(1, len(order))))
    chosen, unread = [], []
    for place, export in enumerate(order):
        if len(chosen) >= context.mutants:
            break
        with open(export.script, encoding="utf-8") as stream:
            text = stream.read()
        statements = -(-each // 2) if place % 2 == 0 else 0  # one for two polynomials
        for mutate, most in ((polynomial_mutants, each), (statement_mutants, statements)):
            try:
                chosen += [(export, mutant) for mutant in mutate(text, chance, most)]
            except NotPolynomial as problem:
                unread.append((export.claim.name, f"{mutate.__name__}: {problem}"))
    return chosen, unread


def verdict_on(context, coq, number, export, mutant):
    """(refused by coqc, problem)."""
    claim = export.claim
    folder = context.folder("mutants", str(number))
    with open(os.path.join(folder, "Claim.v"), "w", encoding="utf-8") as stream:
        stream.write(mutant.text)
    options = ["-Q", coq.library, "Sumwright", "-Q", folder, claim.library]
    done = run(["coqc", "-q", *options, "Claim.v"], cwd=folder, seconds=SECONDS_PER_FILE)
    if done.stopped:
        return False, f"coqc did not end within {SECONDS_PER_FILE} s"
    if done.status != 0:
        return True, None if "Error:" in done.stderr else f"no refusal: {done.text()}"
    if mutant.kind == "polynomial":
        return False, "accepted by coqc"
    text, problem = statement_file(context, export)
    if problem:
        return False, f"no statement: {problem}"
    with open(os.path.join(folder, "check.v"), "w", encoding="utf-8") as stream:
        stream.write(text)
    done = run(["coqc", "-q", *options, "check.v"], cwd=folder, seconds=SECONDS_PER_FILE)
    return False, "accepted as the statement of the claim" if done.status == 0 else None


def mutants(context, coq, accepted):
    report = context.report
    report.start("mutated scripts")
    if not accepted:
        return
    chosen, unread = choose(context, accepted)
    refused = []

    def one(numbered):
        number, (export, mutant) = numbered
        by_coqc, problem = verdict_on(context, coq, number, export, mutant)
        refused.append(by_coqc)
        report.case(f"{export.claim.name}, {mutant.kind}, {mutant.about}", problem)

    in_parallel(one, list(enumerate(chosen)))
    for name, problem in unread[:5]:
        report.say(f"   not mutated: {name}: {problem}")
    kinds = {kind: sum(1 for _, mutant in chosen if mutant.kind == kind)
             for kind in ("polynomial", "statement")}
    report.say(f"   seed {context.seed}: {kinds['polynomial']} changed polynomials, "
               f"{kinds['statement']} changed statements, {sum(refused)} refused by coqc; "
               f"{len(unread)} times nothing to change was found")
    wanted = min(FEWEST, context.mutants)
    report.case("number of mutants",
                None if sum(refused) >= wanted else f"{sum(refused)} refused, {wanted} wanted")
