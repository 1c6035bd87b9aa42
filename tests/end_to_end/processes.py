"""Programs run with limits: seconds, address space; what they used is measured."""

import os
import re
import signal
import subprocess
import tempfile
import threading
import time
from concurrent.futures import ThreadPoolExecutor
from dataclasses import dataclass

WORKERS = 2


@dataclass
class Finished:
    status: int  # negative: the signal that ended it
    stdout: str
    stderr: str
    seconds: float  # on the wall clock
    cpu_seconds: float
    peak_kib: int
    stopped: bool  # by the time limit

    def reason(self):
        """For a verdict: its reason in one line; else what it said."""
        match = (re.search(r"^reason\s+(.*(?:\n\s+.*)*)", self.stdout, re.M)
                 or re.search(r'^  "reason": "(.*)",$', self.stdout, re.M)
                 or re.search(r"^sumwright: (.*(?:\n\s+.*)*)", self.stderr, re.M))
        return " ".join(match[1].split()) if match else self.text()

    def text(self, most=1500):
        """What it said, shortened in the middle, for a report."""
        said = (self.stdout + self.stderr).strip()
        if self.stopped:
            said += f"\n(stopped after {self.seconds:.0f} s)"
        return said if len(said) <= most else said[: most // 2] + "\n...\n" + said[-most // 2:]


def run(command, cwd=None, env=None, seconds=120, memory_gib=4):
    """Runs the command in a process group of its own; the whole group ends with it."""
    limited = ["sh", "-c", 'ulimit -c 0; ulimit -v "$1"; shift; exec "$@"', "sh",
               str(memory_gib << 20), *map(str, command)]
    with tempfile.TemporaryFile() as out, tempfile.TemporaryFile() as err:
        start = time.monotonic()
        process = subprocess.Popen(limited, cwd=cwd, env=env, stdin=subprocess.DEVNULL,
                                   stdout=out, stderr=err, start_new_session=True)
        stopped = threading.Event()

        def stop():
            stopped.set()
            os.killpg(process.pid, signal.SIGKILL)

        timer = threading.Timer(seconds, stop)
        timer.start()
        try:
            _, status, usage = os.wait4(process.pid, 0)
        finally:
            timer.cancel()
        process.returncode = os.waitstatus_to_exitcode(status)
        texts = []
        for stream in (out, err):
            stream.seek(0)
            texts.append(stream.read().decode("utf-8", "replace"))
        return Finished(process.returncode, *texts, time.monotonic() - start,
                        usage.ru_utime + usage.ru_stime, usage.ru_maxrss, stopped.is_set())


def in_parallel(function, items):
    """[function(item), ...] with two at a time, in the order of the items."""
    with ThreadPoolExecutor(WORKERS) as pool:
        return list(pool.map(function, items))
