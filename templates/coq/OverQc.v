(* Support library of Sumwright. SPDX-License-Identifier: 0BSD *)

(** The rational numbers of the standard library are a field of characteristic zero. *)

Require Import ZArith QArith Qcanon Lia.
From Sumwright Require Import Statement Scalars.

Lemma Qc_multiple (n : nat) :
  multiple_of_one 0%Qc 1%Qc Qcplus n = Q2Qc (inject_Z (Z.of_nat n)).
Proof.
  induction n as [|n IH]; [reflexivity|].
  rewrite Nat2Z.inj_succ, <- Z.add_1_r. cbn [multiple_of_one]. rewrite IH.
  apply Qc_is_canon. unfold Qcplus, Q2Qc. cbn [this].
  rewrite !Qred_correct, inject_Z_plus. reflexivity.
Qed.

Lemma Qc_char0 (n : nat) : multiple_of_one 0%Qc 1%Qc Qcplus (S n) <> 0%Qc.
Proof.
  rewrite Qc_multiple. intros E.
  assert (Q : (inject_Z (Z.of_nat (S n)) == 0)%Q).
  { transitivity (this (Q2Qc (inject_Z (Z.of_nat (S n))))); [symmetry; apply Qred_correct|].
    rewrite E. reflexivity. }
  unfold Qeq in Q. cbn in Q. lia.
Qed.

Definition Qc_field : char0_field :=
  Char0Field Qc 0%Qc 1%Qc Qcplus Qcmult Qcminus Qcopp Qcdiv Qcinv Qcft Qc_char0.

(** [inj] over Qc is the usual embedding of Z. *)
Lemma inj_Qc (z : Z) : @inj Qc_field z = Q2Qc (inject_Z z).
Proof.
  destruct (Z_lt_le_dec z 0) as [H|H].
  - replace z with (- Z.of_nat (Z.to_nat (- z)))%Z at 1 by lia.
    rewrite inj_opp, inj_of_nat. cbn [kopp kzero kone kadd Qc_field].
    rewrite Qc_multiple. apply Qc_is_canon. unfold Qcopp, Q2Qc. cbn [this].
    rewrite !Qred_correct.
    replace (Z.of_nat (Z.to_nat (- z))) with (- z)%Z by lia.
    rewrite inject_Z_opp. ring.
  - replace z with (Z.of_nat (Z.to_nat z)) at 1 by lia.
    rewrite inj_of_nat. cbn [kzero kone kadd Qc_field]. rewrite Qc_multiple.
    replace (Z.of_nat (Z.to_nat z)) with z by lia. reflexivity.
Qed.
