(* Support library of Sumwright. SPDX-License-Identifier: 0BSD *)

(** The vocabulary over Z, and claims between integers carried over from a field:
    if the values in K are [inj] of integers, an equation in K is one in Z. *)

Require Import ZArith Lia Ring Field.
From Sumwright Require Import Statement Scalars Products Powers Factorials Sums.
Local Open Scope Z_scope.

Fixpoint zsum_from (lo : Z) (count : nat) (f : Z -> Z) : Z :=
  match count with
  | O => 0
  | S m => zsum_from lo m f + f (lo + Z.of_nat m)
  end.

Definition zsum (lo hi : Z) (f : Z -> Z) : Z := zsum_from lo (Z.to_nat (hi - lo + 1)) f.

Fixpoint zproduct_from (lo : Z) (count : nat) (f : Z -> Z) : Z :=
  match count with
  | O => 1
  | S m => zproduct_from lo m f * f (lo + Z.of_nat m)
  end.

Definition zproduct (lo hi : Z) (f : Z -> Z) : Z := zproduct_from lo (Z.to_nat (hi - lo + 1)) f.

Definition zrising (a m : Z) : Z := zproduct 0 (m - 1) (fun i => a + i).
Definition zfalling (a m : Z) : Z := zproduct 0 (m - 1) (fun i => a - i).

Section Integers.
Variable K : char0_field.

Add Field K_field : (field_axioms K)
  (morphism (inj_morph K), constants [inj_cst],
   power_tac (pow_th K) [exponent_cst], completeness (inj_complete K)).

(** The value v is the integer z. *)
Definition is_integer (v : K) (z : Z) : Prop := v = inj z.

Lemma integer_inj z : is_integer (inj z) z.
Proof. reflexivity. Qed.

Lemma integer_add v w a b : is_integer v a -> is_integer w b -> is_integer (v + w)%K (a + b).
Proof. unfold is_integer. intros -> ->. symmetry. apply inj_add. Qed.

Lemma integer_sub v w a b : is_integer v a -> is_integer w b -> is_integer (v - w)%K (a - b).
Proof. unfold is_integer. intros -> ->. symmetry. apply inj_sub. Qed.

Lemma integer_mul v w a b : is_integer v a -> is_integer w b -> is_integer (v * w)%K (a * b).
Proof. unfold is_integer. intros -> ->. symmetry. apply inj_mul. Qed.

Lemma integer_opp v a : is_integer v a -> is_integer (- v)%K (- a).
Proof. unfold is_integer. intros ->. symmetry. apply inj_opp. Qed.

Lemma integer_pow v a (n : nat) (e : Z) :
  is_integer v a -> e = Z.of_nat n -> is_integer (pow v n) (a ^ e).
Proof. unfold is_integer. intros -> ->. symmetry. apply inj_pow_nat. Qed.

Lemma integer_zpow v a e : is_integer v a -> 0 <= e -> is_integer (zpow v e) (a ^ e).
Proof.
  intros V H. rewrite zpow_nonneg by exact H. apply integer_pow; [exact V | lia].
Qed.

Lemma integer_sum lo hi (f : Z -> K) (g : Z -> Z) :
  (forall k, lo <= k <= hi -> is_integer (f k) (g k)) -> is_integer (sum lo hi f) (zsum lo hi g).
Proof.
  intros H. unfold is_integer. rewrite (sum_ext K lo hi lo hi f (fun k => inj (g k)) eq_refl eq_refl H).
  unfold sum, zsum. induction (Z.to_nat (hi - lo + 1)) as [|n IH]; cbn [sum_from zsum_from].
  - symmetry. apply inj_0.
  - rewrite inj_add, IH. reflexivity.
Qed.

Lemma integer_product lo hi (f : Z -> K) (g : Z -> Z) :
  (forall k, is_integer (f k) (g k)) -> is_integer (product lo hi f) (zproduct lo hi g).
Proof.
  intros H. unfold is_integer, product, zproduct.
  induction (Z.to_nat (hi - lo + 1)) as [|n IH]; cbn [product_from zproduct_from].
  - symmetry. apply inj_1.
  - rewrite inj_mul, IH, (H (lo + Z.of_nat n)). reflexivity.
Qed.

Lemma integer_rising v a m : is_integer v a -> is_integer (rising v m) (zrising a m).
Proof.
  intros V. apply integer_product. intros k. apply integer_add; [exact V | apply integer_inj].
Qed.

Lemma integer_falling v a m : is_integer v a -> is_integer (falling v m) (zfalling a m).
Proof.
  intros V. apply integer_product. intros k. apply integer_sub; [exact V | apply integer_inj].
Qed.

Lemma integer_factorial m : is_integer (factorial m) (zfactorial m).
Proof.
  unfold is_integer. destruct (Z_lt_ge_dec m 0) as [H|H].
  - rewrite factorial_neg by exact H. unfold zfactorial.
    destruct (Z.ltb_spec m 0); [reflexivity | lia].
  - apply factorial_value; [lia | reflexivity].
Qed.

(** Binomial coefficients are integers, by Pascal's rule and reflection. *)
Lemma binomial_integer_nat (n : nat) k : exists z, is_integer (binomial (Z.of_nat n) k) z.
Proof.
  revert k. induction n as [|n IH]; intros k.
  - destruct (Z.lt_trichotomy k 0) as [H|[->|H]].
    + exists 0. apply binomial_below. exact H.
    + exists 1. apply binomial_0_r.
    + exists 0. apply binomial_above. lia.
  - destruct (IH k) as [a A], (IH (k - 1)) as [b B]. exists (a + b).
    unfold is_integer. rewrite Nat2Z.inj_succ, <- Z.add_1_r, binomial_pascal, A, B.
    symmetry. apply inj_add.
Qed.

Lemma binomial_integer n k : exists z, is_integer (binomial n k) z.
Proof.
  destruct (Z_lt_ge_dec n 0) as [N|N].
  2: { destruct (binomial_integer_nat (Z.to_nat n) k) as [z Z]. exists z.
       rewrite Z2Nat.id in Z by lia. exact Z. }
  destruct (Z_lt_ge_dec k 0) as [H|H]; [exists 0; apply binomial_below; exact H|].
  destruct (binomial_integer_nat (Z.to_nat (k - n - 1)) k) as [z Z].
  rewrite Z2Nat.id in Z by lia. exists ((-1) ^ k * z). unfold is_integer.
  rewrite (binomial_reflect K n k (k - n - 1) (- n - 1)) by lia.
  rewrite inj_mul, <- Z, (binomial_to K (k - n - 1) k (- n - 1)) by lia.
  rewrite (integer_zpow (inj (-1)) (-1) k (integer_inj (-1))) by lia. ring.
Qed.

Lemma integer_binomial n k : is_integer (binomial n k) (zbinomial n k).
Proof.
  unfold zbinomial. destruct (Z.ltb_spec k 0) as [H|H]; [apply binomial_below; exact H|].
  destruct (binomial_integer n k) as [z Z]. unfold is_integer. rewrite Z. f_equal.
  assert (E : z * zfactorial k = zfalling_nat n (Z.to_nat k)).
  { apply (inj_inj K). rewrite inj_mul, <- Z, zfalling_value.
    unfold binomial. rewrite (gbinomial_value K (inj n) k (Z.to_nat k) (zfactorial k)) by lia.
    field. apply inj_neq0, zfactorial_neq0. exact H. }
  rewrite <- E. symmetry. apply Z.div_mul, zfactorial_neq0. exact H.
Qed.

(** The step from K to Z. *)
Lemma between_integers v w a b : is_integer v a -> is_integer w b -> v = w -> a = b.
Proof.
  unfold is_integer. intros V W E. apply (inj_inj K). rewrite <- V, <- W. exact E.
Qed.

End Integers.

Arguments is_integer {K} v%K z%Z.

(** Proves [is_integer v z] where z repeats v over Z; exponents are left to [lia]. *)
Ltac integer :=
  lazymatch goal with
  | |- is_integer (inj _) _ => apply integer_inj
  | |- is_integer (kadd _ _) _ => apply integer_add; integer
  | |- is_integer (ksub _ _) _ => apply integer_sub; integer
  | |- is_integer (kmul _ _) _ => apply integer_mul; integer
  | |- is_integer (kopp _) _ => apply integer_opp; integer
  | |- is_integer (pow _ _) _ => apply integer_pow; [integer | reflexivity]
  | |- is_integer (zpow _ _) _ => apply integer_zpow; [integer | lia]
  | |- is_integer (sum _ _ _) _ => apply integer_sum; intros; integer
  | |- is_integer (rising _ _) _ => apply integer_rising; integer
  | |- is_integer (falling _ _) _ => apply integer_falling; integer
  | |- is_integer (factorial _) _ => apply integer_factorial
  | |- is_integer (binomial _ _) _ => apply integer_binomial
  end.
