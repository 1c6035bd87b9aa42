"""No false claim and no wrong evidence is established, and the point given is a true one.

The point is confirmed by exact evaluation that shares no code with the program under test.
"""

import json
from fractions import Fraction

from claims import claims_in
from processes import in_parallel, run

import evaluate_claim as evaluator  # found through claims.py
from expressions import BadClaim, NoValue


def number(text):
    try:
        return Fraction(text)
    except ValueError:
        return None  # "no value: ..."


def sides_claimed(what, claim, point):
    """Both sides, by the evaluator, of what is said to fail; NoValue when a side has none."""
    if "telescoping" in what:
        return identity_sides(claim, point)
    if "recurrence" in what:
        return evaluator.recurrence_sides(claim, point)
    return evaluator.sides(claim, point)


def identity_sides(claim, point):
    if all(value.denominator == 1 for name, value in point.items()
           if name == claim.running or name in [r[0] for r in claim.left.ranges]):
        return evaluator.identity_sides(claim, point)
    residue = evaluator.certificate_residue(claim, point)  # modulo shifts of gamma values
    return (residue.terms, {})


def unconfirmed(path, what, values, left, right):
    """What is wrong with the point, or None."""
    claim = evaluator.Claim(path)
    point = {name: Fraction(value) for name, value in values.items()}
    if claim.running not in point or set(claim.parameters) - set(point):
        return f"the point {values} does not give every symbol a value"
    if not claim.allows(point):
        return f"the point {values} is excluded by the claim itself"
    try:
        true_sides = sides_claimed(what, claim, point)
    except NoValue as problem:
        if number(left) is None or number(right) is None:
            return None
        return f"at {values}: {left} and {right} printed, but there is no value: {problem}"
    if true_sides[0] == true_sides[1]:
        return f"at {values} both sides are {true_sides[0]}"
    if isinstance(true_sides[0], Fraction) and not same_up_to_a_factor(
            true_sides, (number(left), number(right))):
        return f"at {values}: {left} and {right} printed, {true_sides[0]} and {true_sides[1]} true"
    return None


def same_up_to_a_factor(a, b):
    """A cleared recurrence or identity has both sides multiplied by one number that is not 0."""
    if None in b or b[0] == b[1]:
        return False
    return a == b or a[0] * b[1] == a[1] * b[0]


def refusal_problem(done, path):
    if done.status != 1:
        return f"exit status {done.status} in place of 1: {done.reason()}"
    answer = json.loads(done.stdout)
    if answer.get("verdict") != "refuted":
        return f"verdict {answer.get('verdict')}"
    point = answer.get("counterexample")
    if not point:
        return f"no point: {answer.get('reason', '')}"
    return unconfirmed(path, point["what"], point["values"], point["left"], point["right"])


def false_claims(context):
    report = context.report
    for kind, title in (("claims", "false claims"), ("evidence", "wrong evidence")):
        report.start(title)

        def refuse(claim):
            done = run([*context.sumwright, "check", "--json", claim.path])
            try:
                problem = refusal_problem(done, claim.path)
            except (ValueError, KeyError, BadClaim, NoValue) as unreadable:
                problem = f"{type(unreadable).__name__}: {unreadable}; {done.text()}"
            report.case(claim.name, problem)

        in_parallel(refuse, claims_in(context.false_root, kind + "/*.toml"))

    report.start("right in disguise")

    def accept(claim):
        done = run([*context.sumwright, "check", claim.path])
        report.case(claim.name,
                    None if done.status == 0 else f"exit status {done.status}: {done.reason()}")

    in_parallel(accept, claims_in(context.false_root, "disguised/*.toml"))
