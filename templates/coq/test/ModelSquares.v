(** Model of a generated proof: one closed form, natural ends.
    sum over k = 0..n of binomial(n, k)^2  =  binomial(2 n, n),  n >= 0. *)

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
Local Notation factorial := (@Statement.factorial K).
Local Notation rfactorial := (@Statement.rfactorial K).
Local Notation binomial := (@Statement.binomial K).
Local Notation sum := (@Statement.sum K).

(** ** The two sides *)

Definition summand (n k : Z) : K := (binomial n k ^ 2)%K.
Definition left_side (n : Z) : K := sum 0 n (fun k => summand n k).
Definition right_side (n : Z) : K := binomial (2 * n) n.

(** ** The term, the base term and the certificate *)

Definition term (n k : Z) : K :=
  (factorial n ^ 2 * rfactorial k ^ 2 * rfactorial (n - k) ^ 2)%K.

Lemma summand_term (n k : Z) : 0 <= n -> summand n k = term n k.
Proof.
  intros Hn. unfold summand, term. rewrite (binomial_to K n k (n - k)) by lia. ring.
Qed.

Definition base (n k : Z) : K :=
  (factorial n ^ 2 * rfactorial k ^ 2 * rfactorial (n + 1 - k) ^ 2)%K.

Definition a0 (n : K) : K := (- inj 2 * (inj 2 * n + inj 1))%K.
Definition a1 (n : K) : K := (n + inj 1)%K.
Definition p0 (n k : K) : K := ((n + inj 1 - k) ^ 2)%K.
Definition p1 (n k : K) : K := ((n + inj 1) ^ 2)%K.
Definition c (n k : K) : K := (inj 2 * k - inj 3 * n - inj 3)%K.
Definition q0 (n k : K) : K := (k ^ 2 * c n k)%K.
Definition q1 (n k : K) : K := ((n + inj 1 - k) ^ 2 * c n (k + inj 1))%K.

Definition G (n k : Z) : K := (q0 (inj n) (inj k) * base n k)%K.

Lemma term_shift_0 (n k : Z) : 0 <= n -> term n k = (p0 (inj n) (inj k) * base n k)%K.
Proof.
  intros Hn. unfold term, base, p0.
  rewrite (rfact_to K 1 (n + 1 - k) (n - k) (inj n + inj 1 - inj k)%K) by first [lia | pq].
  ring.
Qed.

Lemma term_shift_1 (n k : Z) : 0 <= n -> term (n + 1) k = (p1 (inj n) (inj k) * base n k)%K.
Proof.
  intros Hn. unfold term, base, p1.
  rewrite (fact_to K 1 n (n + 1) (inj n + inj 1)%K) by first [lia | pq].
  ring.
Qed.

Lemma certificate_shift (n k : Z) : 0 <= n -> G n (k + 1) = (q1 (inj n) (inj k) * base n k)%K.
Proof.
  intros Hn. unfold G, base, q0, q1.
  rewrite (rfact_to K 1 (k + 1) k (inj k + inj 1)%K) by first [lia | pq].
  rewrite (rfact_to K 1 (n + 1 - k) (n + 1 - (k + 1)) (inj n + inj 1 - inj k)%K)
    by first [lia | pq].
  rewrite (inj_add K k 1). ring.
Qed.

(** ** The polynomial equality *)

Lemma equality (n k : K) : (a0 n * p0 n k + a1 n * p1 n k = q1 n k - q0 n k)%K.
Proof. unfold a0, a1, p0, p1, q0, q1, c. ring. Qed.

Lemma telescoping (n k : Z) : 0 <= n ->
  (a0 (inj n) * term n k + a1 (inj n) * term (n + 1)%Z k = G n (k + 1)%Z - G n k)%K.
Proof.
  intros Hn. rewrite (certificate_shift n k), (term_shift_0 n k), (term_shift_1 n k) by lia.
  unfold G. comb (base n k) (equality (inj n) (inj k)).
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

Lemma left_end (n : Z) : 0 <= n -> G n 0 = inj 0.
Proof. intros Hn. unfold G, q0. ring. Qed.

Lemma right_end (n : Z) : 0 <= n -> G n (n + 2) = inj 0.
Proof.
  intros Hn. unfold G, base. rewrite (rfact_neg K (n + 1 - (n + 2))) by lia. ring.
Qed.

Lemma left_recurrence (n : Z) : 0 <= n ->
  (a0 (inj n) * left_side n + a1 (inj n) * left_side (n + 1)%Z = inj 0)%K.
Proof.
  intros Hn. rewrite (range_0 n), (range_1 n) by lia. rewrite !sum_scal, !sum_add.
  rewrite (sum_tele K 0 (n + 1) _ (G n) 0 (n + 2)); try lia.
  - rewrite (left_end n), (right_end n) by lia. ring.
  - intros k Hk. apply telescoping; lia.
Qed.

(** ** The closed form *)

Definition right_base (n : Z) : K := (factorial (2 * n) * rfactorial (n + 1) ^ 2)%K.

Lemma right_shift_0 (n : Z) : 0 <= n ->
  right_side n = ((inj n + inj 1) ^ 2 * right_base n)%K.
Proof.
  intros Hn. unfold right_side, right_base. rewrite (binomial_to K (2 * n) n n) by lia.
  rewrite (rfact_to K 1 (n + 1) n (inj n + inj 1)%K) by first [lia | pq]. ring.
Qed.

Lemma right_shift_1 (n : Z) : 0 <= n ->
  right_side (n + 1) = ((inj 2 * inj n + inj 1) * (inj 2 * inj n + inj 2) * right_base n)%K.
Proof.
  intros Hn. unfold right_side, right_base. rewrite (binomial_to K (2 * (n + 1)) (n + 1) (n + 1)) by lia.
  rewrite (fact_to K 2 (2 * n) (2 * (n + 1)) ((inj 2 * inj n + inj 1) * (inj 2 * inj n + inj 2))%K)
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

Theorem claim : forall (K : char0_field) (n : Z), 0 <= n ->
  sum 0 n (fun k => binomial n k ^ 2)%K = binomial (2 * n) n :> K.
Proof. exact conclusion. Qed.

(** No factorial, no division: nothing can be undefined. *)
Theorem claim_defined : forall (K : char0_field) (n : Z), 0 <= n -> True.
Proof. trivial. Qed.
