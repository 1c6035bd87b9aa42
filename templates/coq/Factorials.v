(* Support library of Sumwright. SPDX-License-Identifier: 0BSD *)

(** Factorials, reciprocal factorials and binomial coefficients: the laws by which
    a shifted one becomes a polynomial times another. *)

Require Import ZArith Lia Ring Field.
From Sumwright Require Import Statement Scalars Products Powers.
Local Open Scope Z_scope.

(** The same functions in Z, for computing values. *)
Fixpoint zfactorial_nat (n : nat) : Z :=
  match n with
  | O => 1
  | S m => Z.of_nat n * zfactorial_nat m
  end.

Definition zfactorial (m : Z) : Z := if m <? 0 then 0 else zfactorial_nat (Z.to_nat m).

Fixpoint zfalling_nat (a : Z) (d : nat) : Z :=
  match d with
  | O => 1
  | S e => zfalling_nat a e * (a - Z.of_nat e)
  end.

Definition zbinomial (n k : Z) : Z :=
  if k <? 0 then 0 else zfalling_nat n (Z.to_nat k) / zfactorial k.

Section Factorials.
Variable K : char0_field.

Add Field K_field : (field_axioms K)
  (morphism (inj_morph K), constants [inj_cst],
   power_tac (pow_th K) [exponent_cst], completeness (inj_complete K)).

Implicit Types (a b p v : K) (d : nat) (i j k m n u : Z).

(** ** Factorials *)

Lemma factorial_ip m i j : 0 <= m -> i = 1 -> j = m + 1 -> factorial m = ip (inj 0 : K)%K i j.
Proof.
  intros H -> ->. unfold factorial, ip. destruct (Z.ltb_spec m 0); [lia|].
  replace (m + 1 - 1) with m by lia. apply product_ext. intros t _. rewrite inj_0. ring.
Qed.

Lemma factorial_0 : factorial 0 = inj 1 :> K.
Proof. rewrite (factorial_ip 0 1 1), ip_empty by lia. reflexivity. Qed.

Lemma factorial_neg m : m < 0 -> factorial m = inj 0 :> K.
Proof.
  intros H. unfold factorial. destruct (Z.ltb_spec m 0); [rewrite inj_0; reflexivity|lia].
Qed.

Lemma factorial_succ m m' : 0 <= m -> m' = m + 1 -> factorial m' = (inj m' * factorial m)%K :> K.
Proof.
  intros H ->. rewrite (factorial_ip (m + 1) 1 (m + 1 + 1)), (factorial_ip m 1 (m + 1)) by lia.
  rewrite ip_last by lia. rewrite inj_0. ring.
Qed.

Lemma factorial_neq0 m : 0 <= m -> factorial m <> (0 : K)%K.
Proof.
  intros H. rewrite (factorial_ip m 1 (m + 1)) by lia. apply ip_neq0.
  intros t T. apply (neq0_by K _ t); [rewrite inj_0; ring | lia].
Qed.

Lemma fact_to d m m' p :
  0 <= m -> m' = m + Z.of_nat d -> p = rising_terms (inj m + inj 1)%K d ->
  factorial m' = (p * factorial m)%K.
Proof.
  intros H -> ->. induction d as [|d IH]; cbn [rising_terms].
  - rewrite Z.add_0_r. ring.
  - rewrite Nat2Z.inj_succ, <- Z.add_1_r, Z.add_assoc.
    rewrite (factorial_succ (m + Z.of_nat d)), IH, !inj_add by lia. ring.
Qed.

(** ** Reciprocal factorials *)

Lemma rfactorial_nonneg m : 0 <= m -> rfactorial m = (/ factorial m)%K :> K.
Proof. intros H. unfold rfactorial. destruct (Z.ltb_spec m 0); [lia|reflexivity]. Qed.

Lemma rfact_neg m : m < 0 -> rfactorial m = inj 0 :> K.
Proof.
  intros H. unfold rfactorial. destruct (Z.ltb_spec m 0); [rewrite inj_0; reflexivity|lia].
Qed.

Lemma fact_rfact m m' : 0 <= m -> m' = m -> (factorial m * rfactorial m' = inj 1 :> K)%K.
Proof.
  intros H ->. rewrite rfactorial_nonneg, inj_1 by lia. apply inv_r, factorial_neq0, H.
Qed.

(** A unit m! / m! put into one side of an equation, where a pair has cancelled. *)
Lemma left_fact_unit m (x y : K) :
  0 <= m -> (x * (factorial m * rfactorial m) = y -> x = y)%K.
Proof. intros H <-. rewrite fact_rfact by (exact H || reflexivity). ring. Qed.

Lemma right_fact_unit m (x y : K) :
  0 <= m -> (x = y * (factorial m * rfactorial m) -> x = y)%K.
Proof. intros H ->. rewrite fact_rfact by (exact H || reflexivity). ring. Qed.

Lemma rfactorial_0 : rfactorial 0 = inj 1 :> K.
Proof.
  transitivity (factorial 0 * rfactorial 0 : K)%K; [rewrite factorial_0; ring|].
  apply fact_rfact; lia.
Qed.

Lemma rfactorial_neq0 m : 0 <= m -> rfactorial m <> (0 : K)%K.
Proof. intros H. rewrite rfactorial_nonneg by lia. apply inv_neq0, factorial_neq0, H. Qed.

Lemma inv_fact m : 0 <= m -> (/ factorial m = rfactorial m :> K)%K.
Proof. intros H. symmetry. apply rfactorial_nonneg, H. Qed.

Lemma inv_rfact m : 0 <= m -> (/ rfactorial m = factorial m :> K)%K.
Proof. intros H. rewrite rfactorial_nonneg by lia. apply inv_inv, factorial_neq0, H. Qed.

Lemma rfact_pred m : rfactorial (m - 1) = (inj m * rfactorial m)%K :> K.
Proof.
  destruct (Z.lt_trichotomy m 0) as [H|[H|H]].
  - rewrite !rfact_neg by lia. ring.
  - subst m. rewrite rfact_neg by lia. ring.
  - rewrite !rfactorial_nonneg, (factorial_succ (m - 1) m) by lia.
    field. split; [apply factorial_neq0; lia | apply inj_neq0; lia].
Qed.

(** No condition at all: this law makes poles disappear. *)
Lemma rfact_to d m m' p :
  m' = m - Z.of_nat d -> p = falling_terms (inj m) d -> rfactorial m' = (p * rfactorial m)%K.
Proof.
  intros -> ->. induction d as [|d IH]; cbn [falling_terms].
  - rewrite Z.sub_0_r. ring.
  - rewrite Nat2Z.inj_succ, <- Z.add_1_r, Z.sub_add_distr, rfact_pred, IH, inj_sub. ring.
Qed.

(** Both at a point where the argument is 0: 1, else 0. *)
Lemma rfact_opposite m m' : m' = - m -> m <> 0 -> (rfactorial m * rfactorial m' = inj 0 :> K)%K.
Proof.
  intros -> H. destruct (Z_lt_ge_dec m 0); [rewrite (rfact_neg m) by lia; ring|].
  rewrite (rfact_neg (- m)) by lia. ring.
Qed.

(** ** Interval products that are factorials *)

Lemma ip_fact a u i j m m' :
  a = inj u -> 1 <= u + i -> i <= j -> m = u + j - 1 -> m' = u + i - 1 ->
  ip a i j = (factorial m * rfactorial m')%K.
Proof.
  intros -> U H -> ->. rewrite (factorial_ip (u + j - 1) 1 (u + j)) by lia.
  rewrite (ip_split K (inj 0) 1 (u + i) (u + j)) by lia.
  rewrite <- (factorial_ip (u + i - 1) 1 (u + i)) by lia.
  rewrite (ip_to K u 0 0 (inj 0) (inj u) (u + i) i (u + j) j (inj 1)); try lia.
  - transitivity ((factorial (u + i - 1) * rfactorial (u + i - 1)) *
                  ip (inj 0) (u + i) (u + j) : K)%K; [rewrite fact_rfact by lia|]; ring.
  - rewrite inj_0. ring.
  - cbn [rising_terms falling_terms]. rewrite inj_1. ring.
Qed.

(** Reflection: all factors <= 0, or one of them 0. *)
Lemma ip_reflect a u i j e m m' :
  a = inj u -> u + i <= 0 -> i <= j -> e = j - i -> m = - (u + i) -> m' = - (u + j) ->
  ip a i j = (zpow (inj (-1)) e * factorial m * rfactorial m')%K.
Proof.
  intros -> U H -> -> ->.
  rewrite ip_value with (d := Z.to_nat (j - i)) by lia.
  replace (zpow (inj (-1)) (j - i)) with (pow (inj (-1) : K) (Z.to_nat (j - i)))
    by (symmetry; apply zpow_nonneg; lia).
  replace (- (u + j)) with (- (u + i) - Z.of_nat (Z.to_nat (j - i))) by lia.
  generalize (Z.to_nat (j - i)) as d. intros d.
  rewrite (rfact_to d (- (u + i)) _ (falling_terms (inj (- (u + i))) d) eq_refl eq_refl).
  transitivity (pow (inj (-1)) d * falling_terms (inj (- (u + i))) d *
                (factorial (- (u + i)) * rfactorial (- (u + i))) : K)%K; [|ring].
  rewrite fact_rfact by lia.
  induction d as [|d IH]; cbn [rising_terms falling_terms pow]; [rewrite inj_1; ring|].
  rewrite IH, inj_opp, inj_add. ring.
Qed.

(** ** Binomial coefficients *)

Lemma gbinomial_neg v k : k < 0 -> gbinomial v k = inj 0.
Proof.
  intros H. unfold gbinomial. destruct (Z.ltb_spec k 0); [rewrite inj_0; reflexivity|lia].
Qed.

Lemma gbinomial_falling v k : 0 <= k -> gbinomial v k = (falling v k * rfactorial k)%K.
Proof.
  intros H. unfold gbinomial. destruct (Z.ltb_spec k 0); [lia|].
  rewrite rfactorial_nonneg, div_inv by lia. reflexivity.
Qed.

(** At every k. *)
Lemma gbinomial_ip v a k i j :
  (v = a + inj j - 1)%K -> i = j - k -> gbinomial v k = (ip a i j * rfactorial k)%K.
Proof.
  intros V I. destruct (Z_lt_ge_dec k 0).
  - rewrite gbinomial_neg, rfact_neg by lia. ring.
  - rewrite gbinomial_falling, (falling_ip K v a k i j V I) by lia. reflexivity.
Qed.

Lemma binomial_gbinomial v n k : v = inj n -> gbinomial v k = binomial n k.
Proof. intros ->. reflexivity. Qed.

Lemma binomial_ip a u n k i j :
  a = inj u -> u + j = n + 1 -> i = j - k -> binomial n k = (ip a i j * rfactorial k)%K.
Proof.
  intros -> J I. apply gbinomial_ip; [|exact I].
  replace n with (u + j - 1) by lia. rewrite inj_sub, inj_add, inj_1. ring.
Qed.

(** At every k, for n >= 0. *)
Lemma binomial_to n k m :
  0 <= n -> m = n - k -> binomial n k = (factorial n * rfactorial k * rfactorial m)%K :> K.
Proof.
  intros N ->. destruct (Z_lt_ge_dec k 0).
  { unfold binomial. rewrite gbinomial_neg, rfact_neg by lia. ring. }
  rewrite (binomial_ip (inj 0) 0 n k (n + 1 - k) (n + 1)) by (reflexivity || lia).
  destruct (Z_le_gt_dec k n).
  - rewrite (ip_fact (inj 0) 0 (n + 1 - k) (n + 1) n (n - k)) by (reflexivity || lia). ring.
  - rewrite (ip_reflect (inj 0) 0 (n + 1 - k) (n + 1) k (k - n - 1) (- n - 1))
      by (reflexivity || lia).
    rewrite (rfact_neg (- n - 1)), (rfact_neg (n - k)) by lia. ring.
Qed.

(** At every k, for n < 0: the upper argument reflected. *)
Lemma binomial_reflect n k m m' :
  n < 0 -> m = k - n - 1 -> m' = - n - 1 ->
  binomial n k = (zpow (inj (-1)) k * factorial m * rfactorial m' * rfactorial k)%K :> K.
Proof.
  intros N -> ->. destruct (Z_lt_ge_dec k 0).
  { unfold binomial. rewrite gbinomial_neg, (rfact_neg k) by lia. ring. }
  rewrite (binomial_ip (inj 0) 0 n k (n + 1 - k) (n + 1)) by (reflexivity || lia).
  rewrite (ip_reflect (inj 0) 0 (n + 1 - k) (n + 1) k (k - n - 1) (- n - 1))
    by (reflexivity || lia). ring.
Qed.

Lemma gbinomial_pascal v k :
  (gbinomial (v + 1) k = gbinomial v k + gbinomial v (k - 1))%K.
Proof.
  destruct (Z_lt_ge_dec k 0); [rewrite !gbinomial_neg by lia; ring|].
  destruct (Z.eq_dec k 0) as [->|].
  { rewrite (gbinomial_neg v (0 - 1)) by lia.
    rewrite !gbinomial_falling by lia. unfold falling. rewrite !product_empty by lia. ring. }
  rewrite (gbinomial_ip (v + 1) v k (2 - k) 2) by first [lia | pq].
  rewrite (gbinomial_ip v v k (1 - k) 1) by first [lia | pq].
  rewrite (gbinomial_ip v v (k - 1) (2 - k) 1) by first [lia | pq].
  rewrite (ip_to K 0 0 1 v v (2 - k) (2 - k) 1 2 (v + inj 1)%K)
    by first [lia | pq].
  rewrite (ip_to K 0 1 0 v v (2 - k) (1 - k) 1 1 (v + inj 1 - inj k)%K)
    by first [lia | pq].
  rewrite (rfact_pred k). ring.
Qed.

(** Pascal's rule at every pair of integers: the definition is the usual one. *)
Theorem binomial_pascal n k :
  (binomial (n + 1) k = binomial n k + binomial n (k - 1) :> K)%K.
Proof. unfold binomial. rewrite inj_add, inj_1. apply gbinomial_pascal. Qed.

Theorem binomial_0_r n : binomial n 0 = inj 1 :> K.
Proof.
  rewrite (binomial_ip (inj n) n n 0 1 1), ip_empty, rfactorial_0 by (reflexivity || lia). ring.
Qed.

Theorem binomial_above n k : 0 <= n < k -> binomial n k = inj 0 :> K.
Proof.
  intros H. rewrite (binomial_to n k (n - k)), (rfact_neg (n - k)) by lia. ring.
Qed.

Theorem binomial_below n k : k < 0 -> binomial n k = inj 0 :> K.
Proof. intros H. apply gbinomial_neg, H. Qed.

(** ** Values *)

Lemma factorial_value m z : 0 <= m -> zfactorial m = z -> factorial m = inj z :> K.
Proof.
  intros H <-. unfold zfactorial. destruct (Z.ltb_spec m 0); [lia|]. rewrite <- (Z2Nat.id m H) at 1.
  generalize (Z.to_nat m) as n. induction n as [|n IH]; [apply factorial_0|].
  cbn [zfactorial_nat]. rewrite (factorial_succ (Z.of_nat n)), IH, inj_mul by lia. reflexivity.
Qed.

Lemma rfactorial_value m z : 0 <= m -> zfactorial m = z -> rfactorial m = (/ inj z)%K :> K.
Proof.
  intros H E. rewrite rfactorial_nonneg, (factorial_value m z H E) by lia. reflexivity.
Qed.

Lemma gbinomial_value v k d z :
  k = Z.of_nat d -> zfactorial k = z -> gbinomial v k = (falling_terms v d / inj z)%K.
Proof.
  intros -> E. rewrite gbinomial_falling, (falling_value K v _ d eq_refl) by lia.
  rewrite (rfactorial_value _ z), div_inv by (lia || exact E). reflexivity.
Qed.

Lemma zfalling_value n d : inj (zfalling_nat n d) = falling_terms (inj n) d :> K.
Proof.
  induction d as [|d IH]; cbn [zfalling_nat falling_terms]; [apply inj_1|].
  rewrite inj_mul, inj_sub, IH. reflexivity.
Qed.

End Factorials.

Lemma zfactorial_neq0 (m : Z) : 0 <= m -> zfactorial m <> 0.
Proof.
  intros H. unfold zfactorial. destruct (Z.ltb_spec m 0); [lia|].
  induction (Z.to_nat m) as [|n IH]; cbn [zfactorial_nat]; [lia|].
  intros E. apply Z.mul_eq_0 in E. lia.
Qed.
