(* Support library of Sumwright. SPDX-License-Identifier: 0BSD *)

(** The real numbers of the standard library are a field of characteristic zero.
    Their axioms appear here and in what uses this file, nowhere else. *)

Require Import ZArith Reals Lra Lia.
From Sumwright Require Import Statement Scalars.

Lemma R_multiple (n : nat) : multiple_of_one 0%R 1%R Rplus n = INR n.
Proof.
  induction n as [|n IH]; [reflexivity|].
  rewrite S_INR, <- IH. reflexivity.
Qed.

Lemma R_char0 (n : nat) : multiple_of_one 0%R 1%R Rplus (S n) <> 0%R.
Proof. rewrite R_multiple. apply not_0_INR. discriminate. Qed.

Definition R_field : char0_field :=
  Char0Field R 0%R 1%R Rplus Rmult Rminus Ropp Rdiv Rinv RealField.Rfield R_char0.

(** [inj] over R is the usual embedding of Z. *)
Lemma inj_R (z : Z) : @inj R_field z = IZR z.
Proof.
  destruct (Z_lt_le_dec z 0) as [H|H].
  - replace z with (- Z.of_nat (Z.to_nat (- z)))%Z by lia.
    rewrite inj_opp, inj_of_nat, opp_IZR, <- INR_IZR_INZ.
    cbn [kopp kzero kone kadd R_field]. rewrite R_multiple. reflexivity.
  - replace z with (Z.of_nat (Z.to_nat z)) by lia.
    rewrite inj_of_nat, <- INR_IZR_INZ. cbn [kzero kone kadd R_field]. apply R_multiple.
Qed.
