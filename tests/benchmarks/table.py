#!/usr/bin/env python3
"""One table of what a result costs against its floor.

For sums of binomial(n,k)^r, r = 2..6, and the zeta(3) sum: time to find, time to verify exactly and their
ratio (from search_benchmark), the time of the whole export, and the time of coqc on the exported Claim.v
over an empty file with the same imports. Medians of three runs.

    python3 tests/benchmarks/table.py BUILD_FOLDER
"""
import os
import statistics
import subprocess
import sys
import tempfile
import time

CLAIM = '''format  = 1
title   = "benchmark"
running = "n"
from    = 0
[sum]
summand = "{summand}"
over    = [ {{ index = "k", low = "0", high = "n" }} ]
'''

SUMMANDS = [(f"C(n,k)^{r}", f"binomial(n, k)^{r}") for r in range(2, 7)]
SUMMANDS.append(("C(n,k)^2 C(n+k,k)^2", "binomial(n, k)^2*binomial(n + k, k)^2"))


def timed(command, cwd):
    times = []
    for _ in range(3):
        start = time.monotonic()
        done = subprocess.run(command, cwd=cwd, capture_output=True, text=True)
        times.append(time.monotonic() - start)
        if done.returncode != 0:
            sys.exit(f"{' '.join(command)} failed:\n{done.stdout}{done.stderr}")
    return statistics.median(times)


def search_rows(build):
    out = subprocess.run([os.path.join(build, "tests", "search_benchmark")], capture_output=True,
                         text=True, check=True).stdout.splitlines()
    rows = {}
    for line in out[1:]:
        rows[line[:22].strip()] = line[22:].split()
    return rows


def main():
    build = os.path.abspath(sys.argv[1])
    program = os.path.join(build, "sumwright")
    rows = search_rows(build)
    print(f"{'summand':<22}{'order':>6}{'bytes a':>9}{'bytes R':>9}{'find ms':>9}{'verify ms':>10}"
          f"{'ratio':>7}{'export ms':>11}{'coqc s':>8}{'empty s':>9}{'net s':>7}")
    with tempfile.TemporaryDirectory() as work:
        library = None
        for name, summand in SUMMANDS:
            claim = os.path.join(work, "claim.toml")
            with open(claim, "w", encoding="utf-8") as file:
                file.write(CLAIM.format(summand=summand))
            out = os.path.join(work, "out")
            export = timed([program, "export", claim, "--out", out], work)
            coq = os.path.join(out, "coq")
            if library is None:
                library = os.path.join(work, "library")
                os.makedirs(library)
                with open(os.path.join(coq, "_CoqProject"), encoding="utf-8") as project:
                    files = [line.strip() for line in project if line.strip().endswith(".v")]
                for file in files:
                    if file.startswith("Claim"):
                        continue
                    os.link(os.path.join(coq, file), os.path.join(library, file))
                    subprocess.run(["coqc", "-Q", library, "Sumwright", file], cwd=library, check=True)
                with open(os.path.join(work, "Empty.v"), "w", encoding="utf-8") as file:
                    file.write("Require Import ZArith Lia Ring Field.\n"
                               "From Sumwright Require Import Statement Support.\n")
                empty = timed(["coqc", "-Q", library, "Sumwright", "Empty.v"], work)
            full = timed(["coqc", "-Q", library, "Sumwright", os.path.join(coq, "Claim.v")], work)
            order, _, _, _, bytes_a, bytes_r, find, verify, ratio = rows[name]
            print(f"{name:<22}{order:>6}{bytes_a:>9}{bytes_r:>9}{find:>9}{verify:>10}{ratio:>7}"
                  f"{export * 1000:>11.0f}{full:>8.2f}{empty:>9.2f}{full - empty:>7.2f}")


if __name__ == "__main__":
    main()
