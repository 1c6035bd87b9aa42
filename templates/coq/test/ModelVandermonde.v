(** Model of a generated proof: rational parameters, interval products, a point split off.
    sum over k = 0..n of gbinomial(x, k) gbinomial(y, n - k)  =  gbinomial(x + y, n),  n >= 0. *)

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

Variables x y : K.

Definition summand (n k : Z) : K := (gbinomial x k * gbinomial y (n - k))%K.
Definition left_side (n : Z) : K := sum 0 n (fun k => summand n k).
Definition right_side (n : Z) : K := gbinomial (x + y)%K n.

(** ** The term, the base term and the certificate *)

Definition term (n k : Z) : K :=
  (ip x (1 - k) 1 * ip y (k - n + 1) 1 * rfactorial k * rfactorial (n - k))%K.

Lemma summand_term (n k : Z) : summand n k = term n k.
Proof.
  unfold summand, term.
  rewrite (gbinomial_ip K x x k (1 - k) 1) by first [lia | pq].
  rewrite (gbinomial_ip K y y (n - k) (k - n + 1) 1) by first [lia | pq].
  ring.
Qed.

Definition base (n k : Z) : K :=
  (ip x (1 - k) 1 * ip y (k - n + 1) 1 * rfactorial k * rfactorial (n + 1 - k))%K.

Definition a0 (n : K) : K := (- (x + y - n))%K.
Definition a1 (n : K) : K := (n + inj 1)%K.
Definition p0 (n k : K) : K := (n + inj 1 - k)%K.
Definition p1 (n k : K) : K := (y - n + k)%K.
Definition c (n k : K) : K := (- inj 1)%K.
Definition q0 (n k : K) : K := (k * (y - n + k) * c n k)%K.
Definition q1 (n k : K) : K := ((x - k) * (n + inj 1 - k) * c n (k + inj 1))%K.

Lemma term_shift_0 (n k : Z) : 0 <= k <= n -> term n k = (p0 (inj n) (inj k) * base n k)%K.
Proof.
  intros Hk. unfold term, base, p0.
  rewrite (rfact_to K 1 (n + 1 - k) (n - k) (inj n + inj 1 - inj k)%K) by first [lia | pq].
  ring.
Qed.

Lemma term_shift_1 (n k : Z) : 0 <= k <= n -> term (n + 1) k = (p1 (inj n) (inj k) * base n k)%K.
Proof.
  intros Hk. unfold term, base, p1.
  rewrite (ip_to K 0 1 0 y y (k - n + 1) (k - (n + 1) + 1) 1 1 (y - inj n + inj k)%K)
    by first [lia | pq].
  ring.
Qed.

Lemma certificate_shift (n k : Z) : 0 <= k < n ->
  (q0 (inj n) (inj (k + 1)) * base n (k + 1)%Z = q1 (inj n) (inj k) * base n k)%K.
Proof.
  intros Hk. unfold base, q0, q1, c.
  rewrite (ip_to K 0 1 0 x x (1 - k) (1 - (k + 1)) 1 1 (x - inj k)%K) by first [lia | pq].
  rewrite (ip_to K 0 1 0 y y (k + 1 - n + 1) (k - n + 1) 1 1 (y - inj n + inj k + inj 1)%K)
    by first [lia | pq].
  rewrite (rfact_to K 1 (k + 1) k (inj k + inj 1)%K) by first [lia | pq].
  rewrite (rfact_to K 1 (n + 1 - k) (n + 1 - (k + 1)) (inj n + inj 1 - inj k)%K)
    by first [lia | pq].
  rewrite (inj_add K k 1). ring.
Qed.

(** ** The polynomial equality *)

Lemma equality (n k : K) : (a0 n * p0 n k + a1 n * p1 n k = q1 n k - q0 n k)%K.
Proof. unfold a0, a1, p0, p1, q0, q1, c. ring. Qed.

Lemma telescoping (n k : Z) : 0 <= k <= n ->
  (a0 (inj n) * term n k + a1 (inj n) * term (n + 1)%Z k =
   q1 (inj n) (inj k) * base n k - q0 (inj n) (inj k) * base n k)%K.
Proof.
  intros Hk. rewrite (term_shift_0 n k), (term_shift_1 n k) by lia.
  comb (base n k) (equality (inj n) (inj k)).
Qed.

(** ** Ranges, explicit points and ends *)

Lemma range_0 (n : Z) : 0 <= n -> left_side n = sum 0 n (fun k => term n k).
Proof.
  intros Hn. unfold left_side. apply sum_ext; try lia. intros k Hk. apply summand_term; lia.
Qed.

Lemma range_1 (n : Z) : 0 <= n ->
  left_side (n + 1) = (sum 0 n (fun k => term (n + 1) k) + term (n + 1) (n + 1))%K.
Proof.
  intros Hn. unfold left_side. rewrite (sum_last K 0 (n + 1) n (n + 1)) by lia.
  rewrite (summand_term (n + 1) (n + 1)) by lia.
  f_equal. apply sum_ext; try lia. intros k Hk. apply summand_term; lia.
Qed.

Lemma left_end (n : Z) : 0 <= n -> (q0 (inj n) (inj 0) * base n 0 = inj 0)%K.
Proof. intros Hn. unfold q0. ring. Qed.

(** Factors at constant arguments stay as they are: one class of their own. *)
Definition boundary_base (n : Z) : K := (ip x (1 - n) 1 * rfactorial (n + 1) * rfactorial 1)%K.

Lemma boundary_end (n : Z) : 0 <= n ->
  (q1 (inj n) (inj n) * base n n = - (x - inj n) * (inj n + inj 1) * boundary_base n)%K.
Proof.
  intros Hn. unfold q1, c, base, boundary_base.
  rewrite (ip_empty K y (n - n + 1) 1) by lia.
  rewrite (rfact_to K 0 1 (n + 1 - n) (inj 1)) by first [lia | pq].
  rewrite (rfact_to K 1 (n + 1) n (inj n + inj 1)%K) by first [lia | pq]. ring.
Qed.

Lemma boundary_point (n : Z) : 0 <= n ->
  term (n + 1) (n + 1) = ((x - inj n) * boundary_base n)%K.
Proof.
  intros Hn. unfold term, boundary_base.
  rewrite (ip_to K 0 1 0 x x (1 - n) (1 - (n + 1)) 1 1 (x - inj n)%K) by first [lia | pq].
  rewrite (ip_empty K y (n + 1 - (n + 1) + 1) 1) by lia.
  rewrite (rfact_to K 1 1 (n + 1 - (n + 1)) (inj 1)) by first [lia | pq].
  ring.
Qed.

Lemma left_recurrence (n : Z) : 0 <= n ->
  (a0 (inj n) * left_side n + a1 (inj n) * left_side (n + 1)%Z = inj 0)%K.
Proof.
  intros Hn. rewrite (range_0 n), (range_1 n) by lia.
  transitivity ((a0 (inj n) * sum 0 n (fun k => term n k) +
                 a1 (inj n) * sum 0 n (fun k => term (n + 1) k)) +
                a1 (inj n) * term (n + 1) (n + 1))%K; [ring|].
  rewrite !sum_scal, !sum_add.
  rewrite (sum_tele_ends K 0 n _ (fun k => q1 (inj n) (inj k) * base n k)%K
             (fun k => q0 (inj n) (inj k) * base n k)%K 0 n); try lia.
  - rewrite (left_end n), (boundary_end n), (boundary_point n) by lia. unfold a1. ring.
  - intros k Hk. apply telescoping; lia.
  - intros k Hk. apply certificate_shift; lia.
Qed.

(** ** The closed form *)

Definition right_base (n : Z) : K := (ip (x + y) (1 - n) 1 * rfactorial (n + 1))%K.

Lemma right_shift_0 (n : Z) : 0 <= n -> right_side n = ((inj n + inj 1) * right_base n)%K.
Proof.
  intros Hn. unfold right_side, right_base.
  rewrite (gbinomial_ip K (x + y)%K (x + y)%K n (1 - n) 1) by first [lia | pq].
  rewrite (rfact_to K 1 (n + 1) n (inj n + inj 1)%K) by first [lia | pq]. ring.
Qed.

Lemma right_shift_1 (n : Z) : 0 <= n ->
  right_side (n + 1) = ((x + y - inj n) * right_base n)%K.
Proof.
  intros Hn. unfold right_side, right_base.
  rewrite (gbinomial_ip K (x + y)%K (x + y)%K (n + 1) (1 - (n + 1)) 1) by first [lia | pq].
  rewrite (ip_to K 0 1 0 (x + y)%K (x + y)%K (1 - n) (1 - (n + 1)) 1 1 (x + y - inj n)%K)
    by first [lia | pq].
  ring.
Qed.

Lemma right_recurrence (n : Z) : 0 <= n ->
  (a0 (inj n) * right_side n + a1 (inj n) * right_side (n + 1)%Z = inj 0)%K.
Proof.
  intros Hn. rewrite (right_shift_0 n), (right_shift_1 n) by lia. unfold a0, a1. ring.
Qed.

(** ** Conclusion *)

Lemma leading (n : Z) : 0 <= n -> a1 (inj n) <> 0%K.
Proof. intros Hn. apply (neq0_by K _ (n + 1)); [unfold a1; pq | lia]. Qed.

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

End Claim.

Theorem claim : forall (K : char0_field) (x y : K) (n : Z), 0 <= n ->
  sum 0 n (fun k => gbinomial x k * gbinomial y (n - k))%K = gbinomial (x + y)%K n :> K.
Proof. exact conclusion. Qed.

Theorem claim_defined : forall (K : char0_field) (x y : K) (n : Z), 0 <= n -> True.
Proof. trivial. Qed.
