"""Every standalone appendix through pdflatex without a complaint; all fragments in one paper."""

import os
import re
import shutil

from processes import in_parallel, run

SECONDS = 120
COMPLAINTS = re.compile(
    r"^(?:! .*|Overfull .*|Underfull .*|(?:LaTeX|Package|Class)(?: \S+)? Warning: .*"
    r"|pdfTeX warning.*|Missing character: .*)", re.M)
# How full a page is depends on the paper around the appendices, hence \raggedbottom.
PAPER = r"""\documentclass{amsart}
\usepackage{amsmath,amsthm}
\raggedbottom
\begin{document}
\title{Several appendices}
\author{A. Author}
\maketitle
%s
\end{document}
"""


def complaints(log):
    """The lines of a log that are errors, warnings, boxes or references gone wrong."""
    return [line for line in COMPLAINTS.findall(log) if "Font Warning" not in line]


def typeset(folder, name):
    """Two runs; what is wrong with the second, or None."""
    command = ["pdflatex", "-interaction=nonstopmode", "-halt-on-error", "-no-shell-escape", name]
    for _ in range(2):
        done = run(command, cwd=folder, env={**os.environ, "max_print_line": "1000"},
                   seconds=SECONDS)
        if done.status != 0:
            errors = [line for line in complaints(done.stdout) if line.startswith("!")]
            return f"pdflatex: exit status {done.status}: {errors[0] if errors else done.text()}"
    base = name[:-len(".tex")]
    with open(os.path.join(folder, base + ".log"), encoding="latin-1") as stream:
        found = complaints(stream.read())
    if not os.path.exists(os.path.join(folder, base + ".pdf")):
        return "no PDF"
    return f"{len(found)} complaints: " + "; ".join(found[:3]) if found else None


def paper(context, exports, name, opening=""):
    folder = context.folder("latex", name)
    inputs = []
    for place, export in enumerate(exports):
        fragment = f"appendix{place}.tex"
        shutil.copy(os.path.join(export.folder, "appendix.tex"), os.path.join(folder, fragment))
        inputs.append(rf"\input{{{fragment}}}")
    with open(os.path.join(folder, "paper.tex"), "w", encoding="utf-8") as stream:
        stream.write(PAPER % "\n".join([opening, *inputs]))
    return typeset(folder, "paper.tex")


def latex(context):
    report = context.report
    report.start("appendices")
    if shutil.which("pdflatex") is None:
        report.missing_tool("pdflatex")
        return
    exports = [e for e in context.exports.values() if e.good]

    def one(export):
        folder = context.folder("latex", export.claim.folder)
        for name in ("appendix.tex", "appendix-standalone.tex"):
            shutil.copy(os.path.join(export.folder, name), folder)
        report.case(export.claim.name, typeset(folder, "appendix-standalone.tex"))

    in_parallel(one, exports)
    report.start("appendices in one paper")
    if len(exports) >= 2:
        report.case("two", paper(context, [exports[0], exports[-1]], "two", r"\appendix"))
        report.case(f"all {len(exports)}", paper(context, exports, "all"))
