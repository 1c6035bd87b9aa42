"""What the steps found: cases, failures by name, skips, and measured numbers."""

import os
import statistics
import sys
import threading


class Report:
    def __init__(self, out=sys.stdout):
        self.out, self.lock = out, threading.Lock()
        self.cases, self.failures, self.skips, self.step = {}, [], [], None

    def start(self, step):
        self.step = step
        self.cases[step] = 0
        self.say(f"== {step}")

    def say(self, text):
        with self.lock:
            print(text, file=self.out, flush=True)

    def case(self, name, problem=None):
        """One thing tried; `problem` says what was wrong with it. True when nothing was."""
        with self.lock:
            self.cases[self.step] += 1
            if problem:
                self.failures.append((self.step, name, problem))
                print(f"FAIL {self.step}: {name}: {problem}", file=self.out, flush=True)
        return not problem

    def missing_tool(self, tool):
        """A tool that is not there: a failure in CI, a counted skip elsewhere."""
        if os.environ.get("CI") == "true":
            self.case(tool, "not installed")
        else:
            self.skips.append((self.step, tool))
            self.say(f"SKIPPED {self.step}: {tool} is not installed")

    def numbers(self, what, values, unit="s"):
        if values:
            median, worst = statistics.median(values), max(values)
            self.say(f"   {what}: {len(values)}, median {median:.2f} {unit}, "
                     f"worst {worst:.2f} {unit}")

    def finish(self):
        """Prints the summary, failing names last; the exit status."""
        skipped = {step for step, _ in self.skips}
        for step, count in self.cases.items():
            if count == 0 and step not in skipped:
                self.failures.append((step, "(no case)", "nothing was tried"))
        self.say("\n== summary")
        for step, count in self.cases.items():
            failed = sum(1 for s, _, _ in self.failures if s == step)
            note = " (SKIPPED in part or whole)" if step in skipped else ""
            self.say(f"{step:<28} {count:>5} cases  {failed:>4} failures{note}")
        self.say(f"{sum(self.cases.values())} cases, {len(self.failures)} failures, "
                 f"{len(self.skips)} skips")
        for step, tool in self.skips:
            self.say(f"skipped: {step}: no {tool}")
        if not self.cases:
            self.say("nothing was run")
            return 1
        for step, name, problem in self.failures:
            self.say(f"failed: {step}: {name}: {one_line(problem)}")
        return 1 if self.failures else 0


def one_line(text, most=220):
    text = " ".join(str(text).split())
    return text if len(text) <= most else text[:most] + " ..."
