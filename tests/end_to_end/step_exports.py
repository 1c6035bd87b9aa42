"""Every claim exported twice: what is written, that it is the same bytes, and what it costs."""

import hashlib
import json
import os
from dataclasses import dataclass

from processes import in_parallel, run

NEEDED = ["obligations.txt", "appendix.tex", "appendix-standalone.tex", "coq/_CoqProject",
          "record.json", "run.json"]
MOST_MEMORY_KIB = 1 << 20


@dataclass
class Export:
    claim: object
    folder: str
    record: dict
    good: bool

    @property
    def script(self):
        """The path of Claim.v: in coq/, or in a folder of its own when its library has a name."""
        own = os.path.join(self.folder, "coq", self.claim.library, "Claim.v")
        return own if os.path.exists(own) else os.path.join(self.folder, "coq", "Claim.v")


def read(path):
    with open(path, "rb") as stream:
        return stream.read()


def files_below(folder):
    found = {}
    for here, _, names in os.walk(folder):
        for name in names:
            path = os.path.join(here, name)
            found[os.path.relpath(path, folder)] = read(path)
    return found


def environment(**changes):
    kept = {k: v for k, v in os.environ.items() if not k.startswith("LC_") and k != "LANG"}
    return {**kept, **changes}


def other_locale():
    """A locale with its own sorting and decimal comma, if there is one; it need not exist."""
    done = run(["locale", "-a"])
    wished = [name for name in done.stdout.split()
              if name.lower().startswith(("de_", "tr_", "fr_"))]
    return wished[0] if wished else "C.UTF-8"


def export(context, claim, out, cwd, path, env):
    command = [*context.sumwright, "export", path, "--out", out, "--coq-prefix", claim.library,
               "--json"]
    return run(command, cwd=cwd, env=env, seconds=120)


def problem_of(done, folder):
    if done.status != 0:
        return f"exit status {done.status}: {done.reason()}"
    if done.peak_kib > MOST_MEMORY_KIB:
        return f"{done.peak_kib} KiB of memory"
    there = files_below(folder)
    missing = [name for name in NEEDED if name not in there]
    if not any(os.path.basename(name) == "Claim.v" for name in there):
        missing.append("Claim.v")
    if missing:
        return f"not written: {', '.join(missing)}"
    record = json.loads(read(os.path.join(folder, "record.json")))
    if record.get("verdict") != "established":
        return f"verdict {record.get('verdict')}"
    return wrong_hash(record, folder)


def wrong_hash(record, folder):
    listed = {file["path"]: file["sha256"] for file in record["files"]}
    there = {path for path in files_below(folder) if path not in ("record.json", "run.json")}
    if set(listed) != there:
        return f"record.json and the folder differ in {sorted(set(listed) ^ there)}"
    for path, digest in listed.items():
        if hashlib.sha256(read(os.path.join(folder, path))).hexdigest() != digest:
            return f"record.json has another hash of {path}"
    return None


def difference(first, second):
    a, b = files_below(first), files_below(second)
    names = sorted(name for name in set(a) | set(b)
                   if name != "run.json" and a.get(name) != b.get(name))
    return f"two runs differ in {', '.join(names)}" if names else None


def exports(context):
    """Fills context.exports."""
    report = context.report
    report.start("exports")
    first_env, second_env = environment(LC_ALL="C", TZ="UTC"), environment(
        LC_ALL=other_locale(), TZ="Asia/Kathmandu")
    second_jobs = ["--jobs", "1"] if "--jobs" in run(
        [*context.sumwright, "export", "--help"]).stdout else []
    costs = []

    def one(claim):
        folder = os.path.join(context.folder("exports"), claim.folder)
        done = export(context, claim, folder, None, claim.path, first_env)
        problem = problem_of(done, folder)
        costs.append((done.seconds, done.peak_kib / 1024))
        report.case(claim.name, problem)
        record = {} if done.status else json.loads(read(os.path.join(folder, "record.json")))
        return Export(claim, folder, record, not problem)

    found = in_parallel(one, context.claims)
    context.exports = {e.claim.name: e for e in found}
    report.numbers("export", [seconds for seconds, _ in costs])
    report.numbers("peak memory", [memory for _, memory in costs], "MiB")

    report.start("the same bytes twice")

    def again(first):
        cwd = context.folder("again")
        out = first.claim.folder  # relative, from another folder, in another locale
        path = os.path.relpath(first.claim.path, cwd)
        command_env = dict(second_env)
        done = run([*context.sumwright, "export", path, "--out", out, "--coq-prefix",
                    first.claim.library, *second_jobs], cwd=cwd, env=command_env)
        problem = f"exit status {done.status}" if done.status else difference(
            first.folder, os.path.join(cwd, out))
        report.case(first.claim.name, problem)

    in_parallel(again, [e for e in found if e.good])

    report.start("obligations read back")

    def recheck(first):
        done = run([*context.sumwright, "check", os.path.join(first.folder, "obligations.txt")])
        report.case(first.claim.name,
                    None if done.status == 0 else f"exit status {done.status}: {done.reason()}")

    in_parallel(recheck, [e for e in found if e.good])
