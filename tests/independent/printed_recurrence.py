"""The recurrence that the program under test prints, taken over only after verification.

A claimed recurrence with denominators: the printed one must be c times the least common
denominator times the claimed one, c a nonzero number.  A question: the printed recurrence must be
one that holds for the first values of n, with coefficients that are not all 0.  All by exact
evaluation at random points.
"""

import random
from fractions import Fraction

from evaluate_claim import Claim as ValueClaim
from evaluate_claim import compare, parameter_points
from expressions import BadClaim, NoValue, Undefined, evaluate, parse, symbols_of
from rational_functions import poly_add, poly_divmod, poly_gcd, poly_mul, rational_function
from statement_translation import has_denominator

POINTS = 30
FIRST_VALUES = 8


def take_printed(claim, path, printed, seed=11):
    """Puts the printed recurrence in the place of the claimed one, or raises BadClaim."""
    coefficients = [parse(a) for a in printed["recurrence"]]
    right_side = parse(printed.get("right_side", "0"))
    if any(has_denominator(a) for a in coefficients):
        raise BadClaim("a printed coefficient with a denominator")
    check_symbols(claim, [*coefficients, right_side])
    chance = random.Random(seed)
    check_nonzero(claim, coefficients, chance)
    if claim.recurrence:
        check_multiple(claim, coefficients, chance)
        check_right_sides(claim, coefficients, right_side, chance)
    else:
        check_first_values(path, coefficients, right_side)
    claim.recurrence, claim.right_side = coefficients, right_side


def check_symbols(claim, trees):
    for tree in trees:
        unknown = symbols_of(tree) - {claim.running, *claim.parameters}
        if unknown:
            raise BadClaim(f"the printed recurrence has the symbols {sorted(unknown)}")


def random_point(claim, chance):
    names = [claim.running, *claim.parameters]
    return {name: Fraction(chance.randrange(-10**9, 10**9), chance.randrange(1, 10**6))
            for name in names}


def check_nonzero(claim, coefficients, chance):
    for _ in range(POINTS):
        point = random_point(claim, chance)
        if any(evaluate(a, point) != 0 for a in coefficients):
            return
    raise BadClaim("all printed coefficients are zero")


# ---------------------------------------------------------------- claimed with denominators


def check_multiple(claim, printed, chance):
    """The printed coefficients are c L a_i: L the least common denominator, c a number."""
    if len(printed) != len(claim.recurrence):
        raise BadClaim(f"{len(printed)} printed coefficients for {len(claim.recurrence)}")
    for _ in range(POINTS):
        point = random_point(claim, chance)
        try:
            written = [evaluate(a, point) for a in claim.recurrence]
        except NoValue:
            continue
        values = [evaluate(p, point) for p in printed]
        place = next((i for i, a in enumerate(written) if a != 0), None)
        if place is None:
            continue
        for a, p in zip(written, values):
            if a * values[place] != written[place] * p:
                raise BadClaim("the printed recurrence is not a multiple of the claimed one")
    # The factor must be the least common denominator in each symbol, the others being numbers.
    for symbol in (claim.running, *claim.parameters):
        for _ in range(3):
            point = random_point(claim, chance)
            factor, common = factors(claim, printed, symbol, point)
            if poly_add(monic(factor), monic(common), -1):
                raise BadClaim("the printed recurrence is not cleared by the least common "
                               f"denominator in {symbol}")


def monic(a):
    return [c / a[-1] for c in a]


def factors(claim, printed, symbol, point):
    """In one symbol: the printed recurrence over the claimed one, and the common denominator."""
    common, factor = [Fraction(1)], None
    for a, p in zip(claim.recurrence, printed):
        top, bottom = rational_function(a, symbol, point)
        common = poly_mul(common, poly_divmod(bottom, poly_gcd(common, bottom))[0])
        if top and factor is None:
            numerator = poly_mul(rational_function(p, symbol, point)[0], bottom)
            factor, rest = poly_divmod(numerator, top)
            if rest or not factor:
                raise BadClaim("the printed recurrence is not a polynomial multiple")
    if factor is None:
        raise BadClaim("all claimed coefficients are zero")
    return factor, common


def check_right_sides(claim, printed, right_side, chance):
    """a_i b' = p_i b at points with integers where the author's right side needs them."""
    found = 0
    for _ in range(40 * POINTS):
        point = random_point(claim, chance)
        point[claim.running] = Fraction(claim.start + chance.randrange(0, 15))
        for name in claim.integers:
            low = claim.parameters[name].get("at_least", -20)
            point[name] = Fraction(low + chance.randrange(0, 20))
        try:
            written, clear = evaluate(claim.right_side, point), evaluate(right_side, point)
            pairs = [(evaluate(a, point), evaluate(p, point))
                     for a, p in zip(claim.recurrence, printed)]
        except NoValue:
            continue
        if isinstance(written, Undefined) or isinstance(clear, Undefined):
            continue
        if any(a * clear != p * written for a, p in pairs):
            raise BadClaim("the printed right side is not the same multiple of the claimed one")
        found += 1
        if found == POINTS:
            return
    raise BadClaim("the right sides could not be compared at enough points")


# ---------------------------------------------------------------- questions


def check_first_values(path, coefficients, right_side):
    """The printed recurrence holds for the first values of n (a proof is Coq's business)."""
    claim, compared = ValueClaim(path), 0

    def both(_, point):
        n, left = point[claim.running], Fraction(0)
        for i, a in enumerate(coefficients):
            left += evaluate(a, point) * claim.left.value({**point, claim.running: n + i})
        right = evaluate(right_side, point)
        if isinstance(right, Undefined):
            raise NoValue(right.why)
        return left, right

    for parameters in parameter_points(claim, 12):
        for n in range(claim.start, claim.start + FIRST_VALUES):
            point = {claim.running: Fraction(n), **parameters}
            if not claim.allows(point):
                continue
            wrong = compare(both, claim, point)
            if wrong:
                raise BadClaim(f"the printed recurrence fails: {wrong}")
            compared += 1
    if not compared:
        raise BadClaim("the printed recurrence could not be tried at any point")
