(** Model of a generated proof: a denominator that nothing absorbs, and signs.
    sum over k = 0..n of (-1)^k binomial(n, k) / (2 k + 1)  =  4^n n!^2 / (2 n + 1)!,  n >= 0. *)

Require Import ZArith Lia Ring Field.
From Sumwright Require Import Statement Support.
Local Open Scope Z_scope.
Set Default Proof Using "All".

Section Claim.
Variable K : char0_field.
Add Field K_field : (field_axioms K)
  (morphism (inj_morph K), constants [inj_cst],
   power_tac (pow_th K) [exponent_cst], completeness (inj_complete K)).
Local Notation inj := (@Statement.inj K).
Local Notation zpow := (@Statement.zpow K).
Local Notation factorial := (@Statement.factorial K).
Local Notation rfactorial := (@Statement.rfactorial K).
Local Notation binomial := (@Statement.binomial K).
Local Notation gbinomial := (@Statement.gbinomial K).
Local Notation sum := (@Statement.sum K).
Local Notation ip := (@Products.ip K).

Definition summand (n k : Z) : K :=
  (zpow (- inj 1) k * binomial n k / (inj 2 * inj k + inj 1))%K.
Definition left_side (n : Z) : K := sum 0 n (fun k => summand n k).
Definition right_side (n : Z) : K :=
  (zpow (inj 4) n * factorial n ^ 2 * rfactorial (2 * n + 1))%K.

Lemma nonzero_minus_1 : (- inj 1)%K <> 0%K.
Proof. apply (neq0_by K _ (-1)); [pq | lia]. Qed.

Lemma nonzero_2 : inj 2 <> 0%K.
Proof. apply inj_neq0. lia. Qed.

Lemma nonzero_denominator (k : Z) : 0 <= k -> (inj 0 + inj (2 * k + 1))%K <> 0%K.
Proof. intros Hk. apply (neq0_by K _ (2 * k + 1)); [pq | lia]. Qed.

(** ** The term, the base term and the certificate *)

Definition term (n k : Z) : K :=
  (zpow (- inj 1) k * factorial n * rfactorial k * rfactorial (n - k) *
   rlin (inj 0) (2 * k + 1))%K.

Lemma summand_term (n k : Z) : 0 <= n -> summand n k = term n k.
Proof.
  intros Hn. unfold summand, term. rewrite (div_inv K _ (inj 2 * inj k + inj 1)%K).
  rewrite (rlin_of K (inj 2 * inj k + inj 1)%K (inj 0) (2 * k + 1)) by pq.
  rewrite (binomial_to K n k (n - k)) by lia. ring.
Qed.

Definition base (n k : Z) : K :=
  (zpow (- inj 1) k * factorial n * rfactorial k * rfactorial (n + 1 - k) *
   rlin (inj 0) (2 * k + 1))%K.

Definition a0 (n : K) : K := (- inj 2 * n - inj 2)%K.
Definition a1 (n : K) : K := (inj 2 * n + inj 3)%K.
Definition p0 (n k : K) : K := (n + inj 1 - k)%K.
Definition p1 (n k : K) : K := (n + inj 1)%K.
Definition c (n k : K) : K := (- inj 1)%K.
Definition q0 (n k : K) : K := (k * (inj 2 * k + inj 1) * c n k)%K.
Definition q1 (n k : K) : K :=
  (- (n + inj 1 - k) * (inj 2 * k + inj 1) * c n (k + inj 1))%K.

Lemma term_shift_0 (n k : Z) : 0 <= n -> term n k = (p0 (inj n) (inj k) * base n k)%K.
Proof.
  intros Hn. unfold term, base, p0.
  rewrite (rfact_to K 1 (n + 1 - k) (n - k) (inj n + inj 1 - inj k)%K) by first [lia | pq].
  ring.
Qed.

Lemma term_shift_1 (n k : Z) : 0 <= n -> term (n + 1) k = (p1 (inj n) (inj k) * base n k)%K.
Proof.
  intros Hn. unfold term, base, p1.
  rewrite (fact_to K 1 n (n + 1) (inj n + inj 1)%K) by first [lia | pq]. ring.
Qed.

Lemma certificate_shift (n k : Z) : 0 <= n -> 0 <= k ->
  (q0 (inj n) (inj (k + 1)) * base n (k + 1)%Z = q1 (inj n) (inj k) * base n k)%K.
Proof.
  intros Hn Hk. unfold base, q0, q1, c.
  rewrite (zpow_to K 1 (- inj 1)%K k (k + 1) (- inj 1)%K)
    by first [lia | left; exact nonzero_minus_1 | cbn; pq].
  rewrite (rfact_to K 1 (k + 1) k (inj k + inj 1)%K) by first [lia | pq].
  rewrite (rfact_to K 1 (n + 1 - k) (n + 1 - (k + 1)) (inj n + inj 1 - inj k)%K)
    by first [lia | pq].
  apply (left_unit K (inj 0) (2 * k + 1)); [apply nonzero_denominator; lia|].
  apply (right_unit K (inj 0) (2 * (k + 1) + 1)); [apply nonzero_denominator; lia|].
  inj_norm. ring.
Qed.

(** ** The polynomial equality *)

Lemma equality (n k : K) : (a0 n * p0 n k + a1 n * p1 n k = q1 n k - q0 n k)%K.
Proof. unfold a0, a1, p0, p1, q0, q1, c. ring. Qed.

Lemma telescoping (n k : Z) : 0 <= n ->
  (a0 (inj n) * term n k + a1 (inj n) * term (n + 1)%Z k =
   q1 (inj n) (inj k) * base n k - q0 (inj n) (inj k) * base n k)%K.
Proof.
  intros Hn. rewrite (term_shift_0 n k), (term_shift_1 n k) by lia.
  comb (base n k) (equality (inj n) (inj k)).
Qed.

(** ** Ranges and ends *)

Lemma range_0 (n : Z) : 0 <= n -> left_side n = sum 0 (n + 1) (fun k => term n k).
Proof.
  intros Hn. unfold left_side. rewrite (sum_same K 0 n 0 (n + 1)).
  - apply sum_ext; try lia. intros k Hk. apply summand_term; lia.
  - intros; lia.
  - intros k Hk Ho. rewrite (summand_term n k) by lia. unfold term.
    rewrite (rfact_neg K (n - k)) by lia. ring.
Qed.

Lemma range_1 (n : Z) : 0 <= n -> left_side (n + 1) = sum 0 (n + 1) (fun k => term (n + 1) k).
Proof.
  intros Hn. unfold left_side. apply sum_ext; try lia. intros k Hk. apply summand_term; lia.
Qed.

Lemma left_end (n : Z) : 0 <= n -> (q0 (inj n) (inj 0) * base n 0 = inj 0)%K.
Proof. intros Hn. unfold q0. ring. Qed.

Lemma right_end (n : Z) : 0 <= n -> (q1 (inj n) (inj (n + 1)) * base n (n + 1)%Z = inj 0)%K.
Proof. intros Hn. unfold q1. rewrite (inj_add K n 1). ring. Qed.

Lemma left_recurrence (n : Z) : 0 <= n ->
  (a0 (inj n) * left_side n + a1 (inj n) * left_side (n + 1)%Z = inj 0)%K.
Proof.
  intros Hn. rewrite (range_0 n), (range_1 n) by lia. rewrite !sum_scal, !sum_add.
  rewrite (sum_tele_ends K 0 (n + 1) _ (fun k => q1 (inj n) (inj k) * base n k)%K
             (fun k => q0 (inj n) (inj k) * base n k)%K 0 (n + 1)); try lia.
  - rewrite (left_end n), (right_end n) by lia. ring.
  - intros k Hk. apply telescoping; lia.
  - intros k Hk. apply certificate_shift; lia.
Qed.

(** ** The closed form *)

Definition right_base (n : Z) : K :=
  (zpow (inj 2) (2 * n) * factorial n ^ 2 * rfactorial (2 * n + 3))%K.

Lemma right_term (n : Z) : right_side n = (zpow (inj 2) (2 * n) * factorial n ^ 2 * rfactorial (2 * n + 1))%K.
Proof.
  unfold right_side. rewrite (zpow_pow_base K (inj 4) (inj 2) 2 n (2 * n)) by first [lia | cbn; pq].
  ring.
Qed.

Lemma right_shift_0 (n : Z) : 0 <= n ->
  right_side n = ((inj 2 * inj n + inj 3) * (inj 2 * inj n + inj 2) * right_base n)%K.
Proof.
  intros Hn. rewrite (right_term n). unfold right_base.
  rewrite (rfact_to K 2 (2 * n + 3) (2 * n + 1)
             ((inj 2 * inj n + inj 3) * (inj 2 * inj n + inj 2))%K) by first [lia | pq]. ring.
Qed.

Lemma right_shift_1 (n : Z) : 0 <= n ->
  right_side (n + 1) = (inj 4 * (inj n + inj 1) ^ 2 * right_base n)%K.
Proof.
  intros Hn. rewrite (right_term (n + 1)). unfold right_base.
  rewrite (zpow_to K 2 (inj 2) (2 * n) (2 * (n + 1)) (inj 4))
    by first [lia | left; exact nonzero_2 | cbn; pq].
  rewrite (fact_to K 1 n (n + 1) (inj n + inj 1)%K) by first [lia | pq].
  rewrite (rfact_to K 0 (2 * n + 3) (2 * (n + 1) + 1) (inj 1)) by first [lia | pq]. ring.
Qed.

Lemma right_recurrence (n : Z) : 0 <= n ->
  (a0 (inj n) * right_side n + a1 (inj n) * right_side (n + 1)%Z = inj 0)%K.
Proof.
  intros Hn. rewrite (right_shift_0 n), (right_shift_1 n) by lia. unfold a0, a1. ring.
Qed.

(** ** Conclusion *)

Lemma leading (n : Z) : 0 <= n -> a1 (inj n) <> 0%K.
Proof. intros Hn. apply (neq0_by K _ (2 * n + 3)); [unfold a1; pq | lia]. Qed.

Lemma initial : forall n, 0 <= n <= 0 -> left_side n = right_side n.
Proof. range_cases. unfold left_side, right_side, summand. values. field. Qed.

Lemma conclusion (n : Z) : 0 <= n -> left_side n = right_side n.
Proof.
  apply (same_recurrence K [fun n => a0 (inj n); fun n => a1 (inj n)] 0 (fun _ => inj 0)).
  - exact left_recurrence.
  - exact right_recurrence.
  - exact leading.
  - exact initial.
Qed.

Lemma defined (n : Z) : 0 <= n ->
  (forall k : Z, 0 <= k <= n -> (inj 2 * inj k + inj 1)%K <> 0%K) /\ 0 <= n.
Proof.
  intros Hn. split; [intros k Hk; apply (neq0_by K _ (2 * k + 1)); [pq|]|]; lia.
Qed.

End Claim.

Theorem claim : forall (K : char0_field) (n : Z), 0 <= n ->
  sum 0 n (fun k => zpow (- inj 1) k * binomial n k / (inj 2 * inj k + inj 1))%K =
  (zpow (inj 4) n * factorial n ^ 2 * rfactorial (2 * n + 1))%K :> K.
Proof. exact conclusion. Qed.

Theorem claim_defined : forall (K : char0_field) (n : Z), 0 <= n ->
  (forall k : Z, 0 <= k <= n -> (inj 2 * inj k + inj 1)%K <> 0%K :> K) /\ 0 <= n.
Proof. exact defined. Qed.
