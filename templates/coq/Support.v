(* Support library of Sumwright. SPDX-License-Identifier: 0BSD *)

(** Everything that a generated proof uses.

    [Add Field] does not survive the end of a section, and no tactic can give it, so
    each file begins its section with these lines:

<<
    Require Import ZArith Lia Ring Field.
    From Sumwright Require Import Statement Support.
    Local Open Scope Z_scope.

    Section Claim.
    Variable K : char0_field.
    Add Field K_field : (field_axioms K)
      (morphism (inj_morph K), constants [inj_cst],
       power_tac (pow_th K) [exponent_cst], completeness (inj_complete K)).
    Local Notation inj := (@Statement.inj K).
    Local Notation factorial := (@Statement.factorial K).
    Local Notation rfactorial := (@Statement.rfactorial K).
    Local Notation binomial := (@Statement.binomial K).
    Local Notation sum := (@Statement.sum K).
>>

    [completeness] lets [field] settle that integer constants are nonzero.  The local
    notations give K to terms from which it cannot be inferred.

    The laws are in the files named after their subjects.  A law [*_to] rewrites one
    function at one argument as a polynomial times the same function at another; its
    premises are integer equations (for [lia]) and one polynomial equation in K
    (for [pq]), so that no argument is ever matched up to arithmetic. *)

Require Export List.
Export ListNotations.
From Sumwright Require Export
  Statement Scalars Products Powers Factorials Progressions Sums Induction Positivity
  Values Leaves Continuation.
