#!/usr/bin/env bash
# Compile test of the support library: every file, every model proof, no axioms
# (OverR.v apart, which says so), and altered models that Coq must refuse at the
# place where they were altered.  Works in a copy; exit status 0 when all is well.
set -euo pipefail

source_dir=$(cd "$(dirname "$0")/.." && pwd)
work=$(mktemp -d)
trap 'rm -rf "$work"' EXIT
mkdir "$work/test"
cp "$source_dir"/*.v "$source_dir"/_CoqProject "$work"
cp "$source_dir"/test/*.v "$work/test"
cd "$work"

coqc=(coqc -q -Q . Sumwright)
failures=0
passed=0
fail() { echo "FAIL: $*"; failures=$((failures + 1)); }
pass() { passed=$((passed + 1)); }

seconds() { # the wall time of a command that must succeed, on stdout
  local start end
  start=$(date +%s%N)
  "$@" >log 2>&1 || { cat log >&2; return 1; }
  end=$(date +%s%N)
  printf '%d.%02d' $(((end - start) / 1000000000)) $(((end - start) / 10000000 % 100))
}

if grep -nE '\b(Admitted|admit|Axiom|Parameter|Conjecture|native_compute|From Coq|Unset Guard)\b' *.v test/*.v; then
  fail "a word that has no place in a proof"
else pass; fi

for file in $(grep '\.v$' _CoqProject); do
  if t=$(seconds "${coqc[@]}" "$file"); then pass; echo "$t s  $file"; else fail "$file"; fi
done
listed=$(grep '\.v$' _CoqProject | sort)
[ "$listed" = "$(ls *.v | sort)" ] && pass || fail "_CoqProject does not list the files that are there"

echo 'Require Import ZArith Lia Ring Field. From Sumwright Require Import Statement Support.' >empty.v
echo "$(seconds "${coqc[@]}" empty.v) s  (an empty file with the same imports)"

models=(Squares MovingEnd Vandermonde IntegerParameters Indefinite Denominator Recurrence
        Positivity Progression ExcludedValues Zeta3 Corollaries)
[ "${#models[@]}" = "$(ls test/Model*.v | wc -l)" ] && pass || fail "a model is not in the list"
for model in "${models[@]}"; do
  if t=$(seconds "${coqc[@]}" "test/Model$model.v"); then pass; echo "$t s  Model$model.v"
  else fail "Model$model.v"; fi
done

# No axioms under any theorem; over R those of the real numbers.
for model in "${models[@]}"; do
  if [ "$model" = Corollaries ]; then
    theorems="claim_over_Z claim_over_Qc vandermonde_continued"
  else
    theorems="claim claim_defined"
  fi
  {
    echo "From Sumwright.test Require Import Model$model."
    for theorem in $theorems; do echo "Print Assumptions $theorem."; done
  } >assumptions.v
  "${coqc[@]}" assumptions.v >log 2>&1 || fail "assumptions of Model$model"
  if [ "$(grep -c 'Closed under the global context' log)" = "$(wc -w <<<"$theorems")" ]; then pass
  else cat log; fail "axioms under Model$model"; fi
done

# The statement of a claim is the claim's, not the proof's: written before the proof is loaded.
cat >statement.v <<'END'
Require Import ZArith.
From Sumwright Require Import Statement.
Local Open Scope Z_scope.
Definition the_statement : Prop := forall (K : char0_field) (n : Z), 0 <= n ->
  sum 0 n (fun k => binomial n k ^ 2)%K = binomial (2 * n) n :> K.
From Sumwright.test Require Import ModelSquares.
Goal the_statement.
Proof. exact claim. Qed.
END
"${coqc[@]}" statement.v >log 2>&1 && pass || { cat log; fail "statement written first"; }

# One alteration, one place where Coq must stop: the message and the lemma.
refused() { # model, sed expression, lemma, pattern of the message
  local model=$1 edit=$2 lemma=$3 message=$4 line start
  sed "$edit" "test/Model$model.v" >altered.v
  if cmp -s altered.v "test/Model$model.v"; then fail "no alteration of Model$model: $edit"; return; fi
  if "${coqc[@]}" altered.v >log 2>&1; then fail "accepted: Model$model with $edit"; return; fi
  line=$(sed -n 's/^File "[^"]*", line \([0-9]*\),.*/\1/p' log | head -1)
  start=$(grep -nE "^(Lemma|Theorem) $lemma\b" altered.v | head -1 | cut -d: -f1)
  if [ -n "$line" ] && [ -n "$start" ] && [ "$line" -ge "$start" ] &&
     [ "$line" -le $((start + 12)) ] && tr '\n' ' ' <log | grep -qE "$message"; then pass
  else cat log; fail "refused for another reason: Model$model with $edit"; fi
}

ring='not a valid ring equation'
refused Squares     's/inj 2 \* k - inj 3 \* n - inj 3/inj 2 * k - inj 5 * n - inj 3/' equality "$ring"
refused Squares     's/Definition a1 (n : K) : K := (n + inj 1)/Definition a1 (n : K) : K := (n + inj 2)/' equality "$ring"
refused Squares     's/Definition p1 (n k : K) : K := ((n + inj 1) ^ 2)/Definition p1 (n k : K) : K := ((n + inj 1) ^ 3)/' term_shift_1 "$ring"
refused Recurrence  's/- (inj 2 \* n + inj 3) \* (inj 1 + x)/- (inj 2 * n + inj 3) * (inj 1 - x)/' equality "$ring"
refused Recurrence  's/rfactorial (n + 2 - k) ^ 2 \* zpow x k/rfactorial (n + 2 - k) ^ 2 * zpow x (k + 1)/' term_shift_0 "$ring"
refused MovingEnd   's/inj 2 \* inj n + inj 1) \* (inj n + inj 1) \* boundary_base/inj 2 * inj n + inj 1) * (inj n + inj 2) * boundary_base/' boundary_end "$ring"
refused Vandermonde 's/Lemma term_shift_1 (n k : Z) : 0 <= k <= n ->/Lemma term_shift_1 (n k : Z) : 0 <= k <= n + 1 ->/' term_shift_1 'No applicable tactic'
refused Positivity  's/Lemma leading (n : Z) : 1 <= n/Lemma leading (n : Z) : 0 <= n/' leading 'No applicable tactic'
refused Squares     's/binomial (2 \* n) n :> K/binomial (2 * n) (n + 1) :> K/' claim 'Unable to unify|has type'
refused Indefinite  's/Definition right_side (n : Z) : K := (factorial (n + 1) - inj 1)/Definition right_side (n : Z) : K := (factorial (n + 1) - inj 2)/' right_terms "$ring"

echo "$passed checks passed, $failures failed"
[ "$failures" = 0 ]
