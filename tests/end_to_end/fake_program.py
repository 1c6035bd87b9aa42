#!/usr/bin/env python3
"""A stand-in for the program under test, for the tests of these tests: it hands out prepared
answers.  Beside it lies prepared/NAME/ with `export/` (files), `check.json`, and `status`."""

import hashlib
import json
import os
import shutil
import sys
import time

HERE = os.path.dirname(os.path.abspath(__file__))


def prepared(path):
    """The folder for a claim file, or for a copy of one under the name of its export."""
    name = os.path.basename(path).rsplit(".", 1)[0].removeprefix("Of_exemplars_")
    return os.path.join(HERE, "prepared", name)


def read(*parts):
    with open(os.path.join(*parts), "rb") as stream:
        return stream.read()


def export(claim, out):
    source = os.path.join(prepared(claim), "export")
    shutil.copytree(source, out)
    record = json.loads(read(prepared(claim), "check.json"))
    if os.path.exists(os.path.join(source, "restless")):
        record["now"] = time.time_ns()
    record["files"] = []
    for here, _, names in sorted(os.walk(out)):
        for name in sorted(names):
            path = os.path.join(here, name)
            record["files"].append({"path": os.path.relpath(path, out),
                                    "sha256": hashlib.sha256(read(path)).hexdigest()})
    for name, content in (("record.json", record), ("run.json", {"now": time.time_ns()})):
        with open(os.path.join(out, name), "w", encoding="utf-8") as stream:
            json.dump(content, stream)


def main():
    command, path = sys.argv[1], sys.argv[2]
    if path == "--help":
        print("--out --coq-prefix --json")
        return 0
    if command == "check" and path == "--json":
        path = sys.argv[3]
    if os.path.basename(path) == "obligations.txt":
        return 0
    if command == "export":
        export(path, sys.argv[sys.argv.index("--out") + 1])
    if command == "find":
        shutil.copy(path, sys.argv[sys.argv.index("--write") + 1])
    print(read(prepared(path), "check.json").decode())
    return int(read(prepared(path), "status"))


if __name__ == "__main__":
    sys.exit(main())
