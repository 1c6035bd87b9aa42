(* Support library of Sumwright. SPDX-License-Identifier: 0BSD *)

(** Integers that are positive because a polynomial has coefficients of one sign:
    a + m (b + m (c + ...)) with a > 0, the others and m >= 0 (Horner's form). *)

Require Import ZArith Lia.
Local Open Scope Z_scope.

Lemma pos_add_l (a b : Z) : 0 < a -> 0 <= b -> 0 < a + b.
Proof. lia. Qed.

Lemma pos_add_r (a b : Z) : 0 <= a -> 0 < b -> 0 < a + b.
Proof. lia. Qed.

Lemma nonneg_add (a b : Z) : 0 <= a -> 0 <= b -> 0 <= a + b.
Proof. lia. Qed.

Lemma pos_mul (a b : Z) : 0 < a -> 0 < b -> 0 < a * b.
Proof. intros. apply Z.mul_pos_pos; assumption. Qed.

Lemma nonneg_mul (a b : Z) : 0 <= a -> 0 <= b -> 0 <= a * b.
Proof. intros. apply Z.mul_nonneg_nonneg; assumption. Qed.

Lemma pos_pow (a e : Z) : 0 < a -> 0 <= e -> 0 < a ^ e.
Proof. intros. apply Z.pow_pos_nonneg; assumption. Qed.

Lemma nonneg_pow (a e : Z) : 0 <= a -> 0 <= a ^ e.
Proof. intros. apply Z.pow_nonneg; assumption. Qed.

Lemma pos_horner (c m p : Z) : 0 < c -> 0 <= m -> 0 <= p -> 0 < c + m * p.
Proof. intros. apply pos_add_l; [assumption|]. apply nonneg_mul; assumption. Qed.

Lemma nonneg_horner (c m p : Z) : 0 <= c -> 0 <= m -> 0 <= p -> 0 <= c + m * p.
Proof. intros. apply nonneg_add; [assumption|]. apply nonneg_mul; assumption. Qed.

(** Follows the form of the term; linear facts about its leaves come from [lia].
    A square is nonnegative whatever its base. *)
Ltac nonneg :=
  lazymatch goal with
  | |- 0 <= ?a + ?b => first [apply nonneg_add; nonneg | lia]
  | |- 0 <= ?a * ?a => first [apply Z.square_nonneg | apply nonneg_mul; nonneg]
  | |- 0 <= ?a * ?b => first [apply nonneg_mul; nonneg | lia]
  | |- 0 <= ?a ^ ?e => first [apply nonneg_pow; nonneg | apply Z.pow_even_nonneg; now exists 1]
  | |- _ => lia
  end.

Ltac positive :=
  lazymatch goal with
  | |- 0 < ?a + ?b =>
      first [ apply pos_add_l; [solve [positive] | nonneg]
            | apply pos_add_r; [solve [nonneg] | positive] | lia]
  | |- 0 < ?a * ?b => first [apply pos_mul; positive | lia]
  | |- 0 < ?a ^ ?e => apply pos_pow; [positive | lia]
  | |- _ => lia
  end.

(** [z <> 0] for a term that is positive, or whose negative is. *)
Lemma neq0_pos (z : Z) : 0 < z -> z <> 0.
Proof. lia. Qed.

Lemma neq0_neg (z p : Z) : z = - p -> 0 < p -> z <> 0.
Proof. lia. Qed.
