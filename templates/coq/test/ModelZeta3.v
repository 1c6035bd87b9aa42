(** Model of a generated proof: the recurrence of Apery's numbers for zeta(3),
    s(n) = sum over k = 0..n of (binomial(n, k) binomial(n + k, k))^2.
    The recurrence: van der Poorten, "A proof that Euler missed", Math. Intelligencer 1 (1979). *)

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

Definition summand (n k : Z) : K := ((binomial n k * binomial (n + k) k) ^ 2)%K.
Definition left_side (n : Z) : K := sum 0 n (fun k => summand n k).

(** ** The term, the base term and the certificate *)

Definition term (n k : Z) : K :=
  (factorial (n + k) ^ 2 * rfactorial k ^ 4 * rfactorial (n - k) ^ 2)%K.

Lemma summand_term (n k : Z) : 0 <= n -> 0 <= k -> summand n k = term n k.
Proof.
  intros Hn Hk. unfold summand, term. rewrite (binomial_to K n k (n - k)) by lia.
  rewrite (binomial_to K (n + k) k n) by lia.
  apply (right_fact_unit K n); [lia|].
  apply (right_fact_unit K n); [lia|]. ring.
Qed.

Definition base (n k : Z) : K :=
  (factorial (n + k) ^ 2 * rfactorial k ^ 4 * rfactorial (n + 2 - k) ^ 2)%K.

Definition a0 (n : K) : K := ((n + inj 1) ^ 3)%K.
Definition a1 (n : K) : K :=
  (- (inj 2 * n + inj 3) * (inj 17 * n ^ 2 + inj 51 * n + inj 39))%K.
Definition a2 (n : K) : K := ((n + inj 2) ^ 3)%K.
Definition p0 (n k : K) : K := (((n + inj 2 - k) * (n + inj 1 - k)) ^ 2)%K.
Definition p1 (n k : K) : K := (((n + k + inj 1) * (n + inj 2 - k)) ^ 2)%K.
Definition p2 (n k : K) : K := (((n + k + inj 1) * (n + k + inj 2)) ^ 2)%K.
Definition c (n k : K) : K :=
  (inj 4 * (inj 2 * n + inj 3) * (inj 2 * k ^ 2 - inj 3 * k - inj 4 * n ^ 2 - inj 12 * n - inj 8))%K.
Definition q0 (n k : K) : K := (k ^ 4 * c n k)%K.
Definition q1 (n k : K) : K :=
  (((n + k + inj 1) * (n + inj 2 - k)) ^ 2 * c n (k + inj 1))%K.

Lemma term_shift_0 (n k : Z) : 0 <= n + k -> term n k = (p0 (inj n) (inj k) * base n k)%K.
Proof.
  intros Hp. unfold term, base, p0.
  rewrite (rfact_to K 2 (n + 2 - k) (n - k)
             ((inj n + inj 2 - inj k) * (inj n + inj 1 - inj k))%K) by first [lia | pq].
  ring.
Qed.

Lemma term_shift_1 (n k : Z) : 0 <= n + k -> term (n + 1) k = (p1 (inj n) (inj k) * base n k)%K.
Proof.
  intros Hp. unfold term, base, p1.
  rewrite (fact_to K 1 (n + k) (n + 1 + k) (inj n + inj k + inj 1)%K) by first [lia | pq].
  rewrite (rfact_to K 1 (n + 2 - k) (n + 1 - k) (inj n + inj 2 - inj k)%K) by first [lia | pq].
  ring.
Qed.

Lemma term_shift_2 (n k : Z) : 0 <= n + k -> term (n + 2) k = (p2 (inj n) (inj k) * base n k)%K.
Proof.
  intros Hp. unfold term, base, p2.
  rewrite (fact_to K 2 (n + k) (n + 2 + k)
             ((inj n + inj k + inj 1) * (inj n + inj k + inj 2))%K) by first [lia | pq].
  ring.
Qed.

Lemma certificate_shift (n k : Z) : 0 <= n + k ->
  (q0 (inj n) (inj (k + 1)) * base n (k + 1)%Z = q1 (inj n) (inj k) * base n k)%K.
Proof.
  intros Hp. unfold base, q0, q1. rewrite (inj_add K k 1).
  rewrite (fact_to K 1 (n + k) (n + (k + 1)) (inj n + inj k + inj 1)%K) by first [lia | pq].
  rewrite (rfact_to K 1 (k + 1) k (inj k + inj 1)%K) by first [lia | pq].
  rewrite (rfact_to K 1 (n + 2 - k) (n + 2 - (k + 1)) (inj n + inj 2 - inj k)%K)
    by first [lia | pq].
  ring.
Qed.
(** ** The polynomial equality *)

Lemma equality (n k : K) :
  (a0 n * p0 n k + a1 n * p1 n k + a2 n * p2 n k = q1 n k - q0 n k)%K.
Proof. unfold a0, a1, a2, p0, p1, p2, q0, q1, c. ring. Qed.

Lemma telescoping (n k : Z) : 0 <= n + k ->
  (a0 (inj n) * term n k + a1 (inj n) * term (n + 1)%Z k + a2 (inj n) * term (n + 2)%Z k =
   q1 (inj n) (inj k) * base n k - q0 (inj n) (inj k) * base n k)%K.
Proof.
  intros Hp. rewrite (term_shift_0 n k), (term_shift_1 n k), (term_shift_2 n k) by lia.
  comb (base n k) (equality (inj n) (inj k)).
Qed.

(** ** Ranges and ends *)

Lemma range_0 (n : Z) : 0 <= n -> left_side n = sum 0 (n + 2) (fun k => term n k).
Proof.
  intros Hn. unfold left_side. rewrite (sum_same K 0 n 0 (n + 2)).
  - apply sum_ext; try lia. intros k Hk. apply summand_term; lia.
  - intros; lia.
  - intros k Hk Ho. rewrite (summand_term n k) by lia. unfold term.
    rewrite (rfact_neg K (n - k)) by lia. ring.
Qed.

Lemma range_1 (n : Z) : 0 <= n -> left_side (n + 1) = sum 0 (n + 2) (fun k => term (n + 1) k).
Proof.
  intros Hn. unfold left_side. rewrite (sum_same K 0 (n + 1) 0 (n + 2)).
  - apply sum_ext; try lia. intros k Hk. apply summand_term; lia.
  - intros; lia.
  - intros k Hk Ho. rewrite (summand_term (n + 1) k) by lia. unfold term.
    rewrite (rfact_neg K (n + 1 - k)) by lia. ring.
Qed.

Lemma range_2 (n : Z) : 0 <= n -> left_side (n + 2) = sum 0 (n + 2) (fun k => term (n + 2) k).
Proof.
  intros Hn. unfold left_side. apply sum_ext; try lia. intros k Hk. apply summand_term; lia.
Qed.

Lemma left_end (n : Z) : 0 <= n -> (q0 (inj n) (inj 0) * base n 0 = inj 0)%K.
Proof. intros Hn. unfold q0. ring. Qed.

Lemma right_end (n : Z) : 0 <= n -> (q1 (inj n) (inj (n + 2)) * base n (n + 2)%Z = inj 0)%K.
Proof. intros Hn. unfold q1. rewrite (inj_add K n 2). ring. Qed.

Lemma left_recurrence (n : Z) : 0 <= n ->
  (a0 (inj n) * left_side n + a1 (inj n) * left_side (n + 1)%Z +
   a2 (inj n) * left_side (n + 2)%Z = inj 0)%K.
Proof.
  intros Hn. rewrite (range_0 n), (range_1 n), (range_2 n) by lia. rewrite !sum_scal, !sum_add.
  rewrite (sum_tele_ends K 0 (n + 2) _ (fun k => q1 (inj n) (inj k) * base n k)%K
             (fun k => q0 (inj n) (inj k) * base n k)%K 0 (n + 2)); try lia.
  - rewrite (left_end n), (right_end n) by lia. ring.
  - intros k Hk. apply telescoping; lia.
  - intros k Hk. apply certificate_shift; lia.
Qed.

(** ** Conclusion *)

Lemma conclusion (s : Z -> K) (Hs : forall n, s n = left_side n) (n : Z) : 0 <= n ->
  ((inj n + inj 1) ^ 3 * s n +
   - (inj 2 * inj n + inj 3) * (inj 17 * inj n ^ 2 + inj 51 * inj n + inj 39) * s (n + 1)%Z +
   (inj n + inj 2) ^ 3 * s (n + 2)%Z = inj 0)%K.
Proof. intros Hn. rewrite !Hs. exact (left_recurrence n Hn). Qed.

End Claim.

Theorem claim : forall (K : char0_field) (s : Z -> K),
  (forall n : Z, s n = sum 0 n (fun k => (binomial n k * binomial (n + k) k) ^ 2)%K) ->
  forall n : Z, 0 <= n ->
  ((inj n + inj 1) ^ 3 * s n +
   - (inj 2 * inj n + inj 3) * (inj 17 * inj n ^ 2 + inj 51 * inj n + inj 39) * s (n + 1)%Z +
   (inj n + inj 2) ^ 3 * s (n + 2)%Z)%K = inj 0 :> K.
Proof. intros K s Hs n Hn. exact (conclusion K s Hs n Hn). Qed.

Theorem claim_defined : forall (K : char0_field) (n : Z), 0 <= n -> True.
Proof. trivial. Qed.
