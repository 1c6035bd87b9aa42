(** Model of a generated proof: a leading coefficient with a factor that is not linear.
    sum over k = 0..n of binomial(n, k)  =  2^n,  n >= 0, by an evidence multiplied by n^2 - n + 1. *)

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

Definition summand (n k : Z) : K := binomial n k.
Definition left_side (n : Z) : K := sum 0 n (fun k => summand n k).
Definition right_side (n : Z) : K := zpow (inj 2) n.

Lemma nonzero_2 : inj 2 <> 0%K.
Proof. apply inj_neq0. lia. Qed.

(** ** The term, the base term and the certificate *)

Definition term (n k : Z) : K := (factorial n * rfactorial k * rfactorial (n - k))%K.

Lemma summand_term (n k : Z) : 0 <= n -> summand n k = term n k.
Proof.
  intros Hn. unfold summand, term. rewrite (binomial_to K n k (n - k)) by lia. ring.
Qed.

Definition base (n k : Z) : K := (factorial n * rfactorial k * rfactorial (n + 1 - k))%K.

Definition a0 (n : K) : K := (- inj 2 * (n ^ 2 - n + inj 1))%K.
Definition a1 (n : K) : K := (n ^ 2 - n + inj 1)%K.
Definition p0 (n k : K) : K := (n + inj 1 - k)%K.
Definition p1 (n k : K) : K := (n + inj 1)%K.
Definition c (n k : K) : K := (- (n ^ 2 - n + inj 1))%K.
Definition q0 (n k : K) : K := (k * c n k)%K.
Definition q1 (n k : K) : K := ((n + inj 1 - k) * c n (k + inj 1))%K.

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

Lemma certificate_shift (n k : Z) : 0 <= n ->
  (q0 (inj n) (inj (k + 1)) * base n (k + 1)%Z = q1 (inj n) (inj k) * base n k)%K.
Proof.
  intros Hn. unfold base, q0, q1. rewrite (inj_add K k 1).
  rewrite (rfact_to K 1 (k + 1) k (inj k + inj 1)%K) by first [lia | pq].
  rewrite (rfact_to K 1 (n + 1 - k) (n + 1 - (k + 1)) (inj n + inj 1 - inj k)%K)
    by first [lia | pq].
  ring.
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

Lemma right_recurrence (n : Z) : 0 <= n ->
  (a0 (inj n) * right_side n + a1 (inj n) * right_side (n + 1)%Z = inj 0)%K.
Proof.
  intros Hn. unfold right_side, a0, a1.
  rewrite (zpow_to K 1 (inj 2) n (n + 1) (inj 2)) by first [lia | left; exact nonzero_2 | cbn; pq].
  ring.
Qed.

(** ** Conclusion: from n = 1 on the coefficient is positive, at n = 0 both sides are computed. *)

Lemma leading (n : Z) : 1 <= n -> a1 (inj n) <> 0%K.
Proof.
  intros Hn. apply (neq0_by K _ (1 + (n - 1) * (1 + (n - 1) * 1))); [unfold a1; pq|].
  apply neq0_pos. positive.
Qed.

Lemma initial : forall n, 0 <= n <= 1 -> left_side n = right_side n.
Proof. range_cases; unfold left_side, right_side, summand; values; field. Qed.

Lemma conclusion (n : Z) : 0 <= n -> left_side n = right_side n.
Proof.
  intros Hn. destruct (Z_le_gt_dec n 1) as [Hs|Hs]; [apply initial; lia|].
  revert n Hn Hs. assert (E : forall n, 1 <= n -> left_side n = right_side n).
  { apply (same_recurrence K [fun n => a0 (inj n); fun n => a1 (inj n)] 1 (fun _ => inj 0)).
    - intros n Hn. apply left_recurrence; lia.
    - intros n Hn. apply right_recurrence; lia.
    - exact leading.
    - intros n Hn. apply initial. cbn in Hn. lia. }
  intros n Hn Hs. apply E. lia.
Qed.

End Claim.

Theorem claim : forall (K : char0_field) (n : Z), 0 <= n ->
  sum 0 n (fun k => binomial n k)%K = zpow (inj 2) n :> K.
Proof. exact conclusion. Qed.

Theorem claim_defined : forall (K : char0_field) (n : Z), 0 <= n -> True.
Proof. trivial. Qed.
