(* Support library of Sumwright. SPDX-License-Identifier: 0BSD *)

(** Powers with an integer exponent. *)

Require Import ZArith Lia Ring Field.
From Sumwright Require Import Statement Scalars.
Local Open Scope Z_scope.

Section Powers.
Variable K : char0_field.

Add Field K_field : (field_axioms K)
  (morphism (inj_morph K), constants [inj_cst],
   power_tac (pow_th K) [exponent_cst], completeness (inj_complete K)).

Implicit Types (v x y p : K) (d : nat) (m e q : Z).

Lemma zpow_nonneg x m : 0 <= m -> zpow x m = pow x (Z.to_nat m).
Proof. intros H. unfold zpow. destruct (Z.ltb_spec m 0); [lia|reflexivity]. Qed.

Lemma zpow_nonpos x m : m <= 0 -> zpow x m = (/ pow x (Z.to_nat (- m)))%K.
Proof.
  intros H. unfold zpow. destruct (Z.ltb_spec m 0); [reflexivity|].
  replace m with 0 by lia. cbn. symmetry. apply inv_unique. ring.
Qed.

(** Value at a literal exponent. *)
Lemma zpow_value x m d : m = Z.of_nat d -> zpow x m = pow x d.
Proof. intros ->. rewrite zpow_nonneg, Nat2Z.id by lia. reflexivity. Qed.

Lemma zpow_value_neg x m d : m = - Z.of_nat d -> zpow x m = (/ pow x d)%K.
Proof. intros ->. rewrite zpow_nonpos, Z.opp_involutive, Nat2Z.id by lia. reflexivity. Qed.

Lemma zpow_0_r x : zpow x 0 = inj 1.
Proof. rewrite (zpow_value x 0 0), inj_1 by reflexivity. reflexivity. Qed.

Lemma zpow_1_r x : zpow x 1 = x.
Proof. rewrite (zpow_value x 1 1) by reflexivity. cbn. ring. Qed.

Lemma zpow_neq0 x m : (x <> 0)%K -> zpow x m <> 0%K.
Proof.
  intros X. unfold zpow. destruct (m <? 0); [apply inv_neq0|]; apply pow_neq0, X.
Qed.

Lemma zpow_succ x m : (x <> 0)%K \/ 0 <= m -> zpow x (m + 1) = (x * zpow x m)%K.
Proof.
  intros H. destruct (Z_lt_ge_dec m 0) as [L|L].
  - destruct H as [X|]; [|lia]. rewrite !zpow_nonpos by lia.
    replace (Z.to_nat (- m)) with (S (Z.to_nat (- (m + 1)))) by lia. cbn [pow].
    field. split; try apply pow_neq0; exact X.
  - rewrite !zpow_nonneg by lia.
    replace (Z.to_nat (m + 1)) with (S (Z.to_nat m)) by lia. cbn [pow]. ring.
Qed.

(** The law: exponents upwards; with x <> 0 any base exponent will do. *)
Lemma zpow_to d x m m' p :
  (x <> 0)%K \/ 0 <= m -> m' = m + Z.of_nat d -> p = pow x d -> zpow x m' = (p * zpow x m)%K.
Proof.
  intros H -> ->. induction d as [|d IH]; cbn [pow].
  - rewrite Z.add_0_r. ring.
  - rewrite Nat2Z.inj_succ, <- Z.add_1_r, Z.add_assoc, zpow_succ, IH.
    + ring.
    + destruct H; [left; assumption | right; lia].
Qed.

Lemma zpow_add x m e e' :
  (x <> 0)%K \/ (0 <= m /\ 0 <= e) -> e' = m + e -> zpow x e' = (zpow x m * zpow x e)%K.
Proof.
  intros H ->. destruct (Z_le_gt_dec 0 e) as [L|L].
  - rewrite (zpow_to (Z.to_nat e) x m _ (pow x (Z.to_nat e))).
    + rewrite (zpow_nonneg x e) by lia. ring.
    + destruct H as [X|[M _]]; [left; exact X | right; exact M].
    + lia.
    + reflexivity.
  - destruct H as [X|]; [|lia].
    rewrite (zpow_to (Z.to_nat (- e)) x (m + e) m (pow x (Z.to_nat (- e)))).
    + rewrite (zpow_nonpos x e) by lia. field. apply pow_neq0, X.
    + left; exact X.
    + lia.
    + reflexivity.
Qed.

Lemma zpow_inv x m m' : (x <> 0)%K -> m' = - m -> (/ zpow x m)%K = zpow x m'.
Proof.
  intros X ->. apply inv_unique. rewrite <- (zpow_add x m (- m) 0).
  - rewrite zpow_0_r. apply inj_1.
  - left; exact X.
  - lia.
Qed.

Lemma zpow_base_inv x m m' : (x <> 0)%K -> m' = - m -> zpow (/ x)%K m = zpow x m'.
Proof.
  intros X ->. destruct (Z_le_gt_dec 0 m) as [L|L].
  - rewrite (zpow_nonneg _ m), (zpow_nonpos x) by lia. rewrite Z.opp_involutive.
    symmetry. apply inv_pow, X.
  - rewrite (zpow_nonpos _ m), (zpow_nonneg x) by lia. rewrite inv_pow, inv_inv.
    + reflexivity.
    + exact X.
    + apply inv_neq0, X.
Qed.

(** Normal form: of one nonzero base there remain the powers to the symbols and to 1.  All
    powers are taken apart alike, on both sides, so that it does not matter which of them
    met in a product. *)
Lemma zpow_plus x m e : (x <> 0)%K -> zpow x (m + e) = (zpow x m * zpow x e)%K.
Proof. intros X. apply zpow_add; [left; exact X | reflexivity]. Qed.

Lemma zpow_opposite x m : (x <> 0)%K -> zpow x (- m) = (/ zpow x m)%K.
Proof. intros X. symmetry. apply zpow_inv; [exact X | reflexivity]. Qed.

Lemma zpow_minus x m e : (x <> 0)%K -> zpow x (m - e) = (zpow x m * / zpow x e)%K.
Proof. intros X. rewrite <- zpow_opposite by exact X. apply (zpow_plus x m (- e) X). Qed.

Lemma zpow_times x c m d : (x <> 0)%K -> c = Z.of_nat d -> zpow x (c * m) = pow (zpow x m) d.
Proof.
  intros X ->. induction d as [|d IH]; cbn [pow].
  - rewrite zpow_0_r. exact (inj_1 K).
  - rewrite <- IH, <- zpow_plus by exact X. f_equal. lia.
Qed.

Lemma zpow_times_neg x c m d :
  (x <> 0)%K -> c = - Z.of_nat d -> zpow x (c * m) = (/ pow (zpow x m) d)%K.
Proof.
  intros X ->. rewrite <- (zpow_times x _ m d X eq_refl), <- zpow_opposite by exact X.
  f_equal. lia.
Qed.

Lemma zpow_literal x c d : c = Z.of_nat d -> zpow x c = pow (zpow x 1) d.
Proof. intros C. rewrite zpow_1_r. exact (zpow_value x c d C). Qed.

Lemma zpow_literal_neg x c d : c = - Z.of_nat d -> zpow x c = (/ pow (zpow x 1) d)%K.
Proof. intros C. rewrite zpow_1_r. exact (zpow_value_neg x c d C). Qed.

(** A unit x^m x^(-m) put into one side of an equation. *)
Lemma left_zpow_unit x m m' (s t : K) :
  (x <> 0)%K -> m' = - m -> (s * (zpow x m * zpow x m') = t -> s = t)%K.
Proof.
  intros X M <-. rewrite <- (zpow_add x m m' 0), zpow_0_r; [ring | left; exact X | lia].
Qed.

Lemma right_zpow_unit x m m' (s t : K) :
  (x <> 0)%K -> m' = - m -> (s = t * (zpow x m * zpow x m') -> s = t)%K.
Proof.
  intros X M ->. rewrite <- (zpow_add x m m' 0), zpow_0_r; [ring | left; exact X | lia].
Qed.

(** A power with a composite base, spelled v. *)
Lemma zpow_mul_base v x y m :
  v = (x * y)%K -> ((x <> 0)%K /\ (y <> 0)%K) \/ 0 <= m -> zpow v m = (zpow x m * zpow y m)%K.
Proof.
  intros -> H. unfold zpow. destruct (Z.ltb_spec m 0).
  - destruct H as [[X Y]|]; [|lia]. rewrite pow_mul_base.
    apply inv_mul; apply pow_neq0; assumption.
  - apply pow_mul_base.
Qed.

Lemma zpow_div_base v x y m m' :
  v = (x / y)%K -> m' = - m -> (y <> 0)%K -> (x <> 0)%K \/ 0 <= m ->
  zpow v m = (zpow x m * zpow y m')%K.
Proof.
  intros -> -> Y H. rewrite (zpow_mul_base _ x (/ y)%K m).
  - rewrite (zpow_base_inv y m (- m)) by (exact Y || reflexivity). reflexivity.
  - apply div_inv.
  - destruct H; [left; split; [assumption | apply inv_neq0, Y] | right; assumption].
Qed.

(** A base that is a power: exponent c * m. *)
Lemma zpow_pow_base v x d m m' : v = pow x d -> m' = Z.of_nat d * m -> zpow v m = zpow x m'.
Proof.
  intros -> ->. destruct (Z_le_gt_dec 0 m) as [L|L].
  - rewrite !zpow_nonneg, pow_pow by lia. f_equal. lia.
  - rewrite !zpow_nonpos, pow_pow by lia. f_equal. f_equal. lia.
Qed.

Lemma zpow_one_base v m : v = inj 1 -> zpow v m = inj 1.
Proof.
  intros ->. rewrite inj_1. unfold zpow. destruct (m <? 0); rewrite pow_one; [|reflexivity].
  apply inv_unique. ring.
Qed.

(** Signs: an even exponent, and the parity of an odd one through [zpow_to 1]. *)
Lemma zpow_sign_even v m e : v = inj (-1) -> e = 2 * m -> zpow v e = inj 1.
Proof.
  intros -> ->. rewrite <- (zpow_pow_base (inj 1) (inj (-1)) 2 m) by (cbn [pow]; ring || lia).
  apply zpow_one_base. reflexivity.
Qed.

(** (-1)^m = (-1)^e when m and e have the same parity. *)
Lemma zpow_sign_to v m e q : v = inj (-1) -> m = e + 2 * q -> zpow v m = zpow v e.
Proof.
  intros V ->. rewrite (zpow_add v e (2 * q)).
  - rewrite (zpow_sign_even v q (2 * q)) by (exact V || reflexivity). ring.
  - left. rewrite V. apply inj_neq0. lia.
  - reflexivity.
Qed.

Lemma zpow_zero_base v m : v = inj 0 -> 0 < m -> zpow v m = inj 0.
Proof.
  intros -> H. rewrite zpow_nonneg by lia.
  replace (Z.to_nat m) with (S (Z.to_nat (m - 1))) by lia. cbn [pow]. ring.
Qed.

End Powers.

(** Every power of x <> 0 in the goal in the normal form; X says that x <> 0.  Exponents beyond
    1000 stay as they are: natural numbers are unary. *)
Ltac split_power K x X e :=
  match isZcst e with
  | true =>
      let small := eval compute in (Z.abs e <=? 1000) in
      lazymatch small with true => idtac end;
      lazymatch e with
      | 1 => fail
      | Zneg _ =>
          let d := eval compute in (Z.to_nat (- e)) in rewrite (zpow_literal_neg K x e d eq_refl)
      | _ => let d := eval compute in (Z.to_nat e) in rewrite (zpow_literal K x e d eq_refl)
      end
  | _ =>
      lazymatch e with
      | ?u + ?v => rewrite (zpow_plus K x u v X)
      | ?u - ?v => rewrite (zpow_minus K x u v X)
      | - ?u => rewrite (zpow_opposite K x u X)
      | ?c * ?u =>
          let d := eval compute in (Z.to_nat (Z.abs c)) in
          first [ rewrite (zpow_times K x c u d X eq_refl)
                | rewrite (zpow_times_neg K x c u d X eq_refl) ]
      end
  end.

Ltac split_powers K x X :=
  repeat match goal with |- context [@zpow K x ?e] => split_power K x X e end.

(** What [field] asks for after that. *)
Ltac nonzero_powers :=
  repeat match goal with |- _ /\ _ => split end; apply zpow_neq0; assumption.
