"""`check` of a claim with evidence is a matter of moments; `find --write` gives such a claim."""

import os

from processes import in_parallel, run

MOST_SECONDS = 0.2
MOST_MEMORY_KIB = 1 << 20
TRIES = 3


def best_check(context, path):
    """The run with the least processor time of a few: others share the machine."""
    runs = []
    for _ in range(TRIES):
        runs.append(run([*context.sumwright, "check", path]))
        if runs[-1].status != 0 or runs[-1].cpu_seconds < MOST_SECONDS:
            break
    return min(runs, key=lambda done: done.cpu_seconds)


def problem_of(done):
    if done.status != 0:
        return f"exit status {done.status}: {done.reason()}"
    if done.cpu_seconds >= MOST_SECONDS:
        return f"check took {done.cpu_seconds:.2f} s"
    if done.peak_kib > MOST_MEMORY_KIB:
        return f"check took {done.peak_kib} KiB"
    return None


def speed(context):
    report = context.report
    report.start("check with evidence")
    costs = []

    def one(claim):
        done = best_check(context, claim.path)
        costs.append(done.cpu_seconds)
        report.case(claim.name, problem_of(done))

    in_parallel(one, [c for c in context.claims if c.has_evidence])
    report.numbers("check", costs)

    report.start("find, write, check")
    costs = []

    def found(claim):
        copy = context.place("found", claim.folder + ".toml")
        done = run([*context.sumwright, "find", claim.path, "--write", copy])
        if done.status != 0 or not os.path.exists(copy):
            report.case(claim.name, f"find: exit status {done.status}: {done.reason()}")
            return
        done = best_check(context, copy)
        costs.append(done.cpu_seconds)
        report.case(claim.name, problem_of(done))

    in_parallel(found, [c for c in context.claims if not c.has_evidence])
    report.numbers("check of the copy", costs)
