"""The claim files under test, and where everything is."""

import glob
import os
import re
import sys
import tomllib
from dataclasses import dataclass

HERE = os.path.dirname(os.path.abspath(__file__))
ROOT = os.path.dirname(os.path.dirname(HERE))
INDEPENDENT = os.path.join(ROOT, "tests", "independent")
LIBRARY = os.path.join(ROOT, "templates", "coq")
sys.path.insert(0, INDEPENDENT)


@dataclass
class ClaimFile:
    path: str
    group: str  # folder
    data: dict

    @property
    def name(self):
        return self.group + "/" + os.path.basename(self.path)[:-len(".toml")]

    @property
    def library(self):
        """Its logical name in Coq, different for every claim."""
        return "Of_" + re.sub(r"[^A-Za-z0-9]", "_", self.name)[:56]

    @property
    def folder(self):
        return self.library

    @property
    def has_evidence(self):
        return "recurrence" in self.data.get("evidence", {})


def read(path):
    with open(path, "rb") as stream:
        text = stream.read().decode("utf-8-sig").replace("\r\n", "\n")
    return ClaimFile(path, os.path.basename(os.path.dirname(path)), tomllib.loads(text))


def claims_in(root, *patterns):
    paths = sorted(p for pattern in patterns for p in glob.glob(os.path.join(root, pattern)))
    found = [read(path) for path in paths]
    assert len({c.library for c in found}) == len(found), "two claims with one name"
    return found


@dataclass
class Context:
    """What every step is given."""

    sumwright: list  # the command and its first arguments
    work: str
    claims: list  # true ones: exemplars, corpus, and those of this folder
    false_root: str
    undecided_root: str
    library: str
    report: object
    seed: int
    mutants: int
    exports: dict = None  # ClaimFile.name -> Export

    def place(self, *parts):
        path = os.path.join(self.work, *parts)
        os.makedirs(os.path.dirname(path), exist_ok=True)
        return path

    def folder(self, *parts):
        path = os.path.join(self.work, *parts)
        os.makedirs(path, exist_ok=True)
        return path
