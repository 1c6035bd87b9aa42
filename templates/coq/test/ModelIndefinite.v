(** Model of a generated proof: an indefinite sum (order 0), a closed form of two terms.
    sum over k = 0..n of k k!  =  (n + 1)! - 1,  n >= 0. *)

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

Definition summand (n k : Z) : K := (inj k * factorial k)%K.
Definition left_side (n : Z) : K := sum 0 n (fun k => summand n k).
Definition right_side (n : Z) : K := (factorial (n + 1) - inj 1)%K.

(** ** The term, the base term and the certificate *)

Definition term (n k : Z) : K := (inj k * factorial k)%K.

Lemma summand_term (n k : Z) : summand n k = term n k.
Proof. unfold summand, term. ring. Qed.

Definition base (n k : Z) : K := factorial k.

Definition a0 (n : K) : K := inj 1.
Definition p0 (n k : K) : K := k.
Definition c (n k : K) : K := inj 1.
Definition q0 (n k : K) : K := c n k.
Definition q1 (n k : K) : K := ((k + inj 1) * c n (k + inj 1))%K.

Lemma term_shift_0 (n k : Z) : 0 <= k -> term n k = (p0 (inj n) (inj k) * base n k)%K.
Proof. intros Hk. unfold term, base, p0. ring. Qed.

Lemma certificate_shift (n k : Z) : 0 <= k ->
  (q0 (inj n) (inj (k + 1)) * base n (k + 1)%Z = q1 (inj n) (inj k) * base n k)%K.
Proof.
  intros Hk. unfold base, q0, q1, c.
  rewrite (fact_to K 1 k (k + 1) (inj k + inj 1)%K) by first [lia | pq]. ring.
Qed.

(** ** The polynomial equality *)

Lemma equality (n k : K) : (a0 n * p0 n k = q1 n k - q0 n k)%K.
Proof. unfold a0, p0, q0, q1, c. ring. Qed.

Lemma telescoping (n k : Z) : 0 <= k ->
  (a0 (inj n) * term n k =
   q1 (inj n) (inj k) * base n k - q0 (inj n) (inj k) * base n k)%K.
Proof.
  intros Hk. rewrite (term_shift_0 n k) by lia. comb (base n k) (equality (inj n) (inj k)).
Qed.

(** ** Ranges and ends *)

Lemma range_0 (n : Z) : 0 <= n -> left_side n = sum 0 n (fun k => term n k).
Proof.
  intros Hn. unfold left_side. apply sum_ext; try lia. intros k Hk. apply summand_term; lia.
Qed.

Lemma left_recurrence (n : Z) : 0 <= n ->
  (a0 (inj n) * left_side n =
   q1 (inj n) (inj n) * base n n - q0 (inj n) (inj 0) * base n 0)%K.
Proof.
  intros Hn. rewrite (range_0 n) by lia. rewrite !sum_scal.
  rewrite (sum_tele_ends K 0 n _ (fun k => q1 (inj n) (inj k) * base n k)%K
             (fun k => q0 (inj n) (inj k) * base n k)%K 0 n); try lia.
  - reflexivity.
  - intros k Hk. apply telescoping; lia.
  - intros k Hk. apply certificate_shift; lia.
Qed.

(** ** The closed form, one base term for each class of similar terms *)

Definition right_base_1 (n : Z) : K := factorial n.
Definition right_base_2 (n : Z) : K := factorial 0.

Lemma boundary_1 (n : Z) : 0 <= n ->
  (q1 (inj n) (inj n) * base n n = (inj n + inj 1) * right_base_1 n)%K.
Proof. intros Hn. unfold q1, c, base, right_base_1. ring. Qed.

Lemma boundary_2 (n : Z) : 0 <= n -> (q0 (inj n) (inj 0) * base n 0 = right_base_2 n)%K.
Proof. intros Hn. unfold q0, c, base, right_base_2. ring. Qed.

Lemma right_terms (n : Z) : 0 <= n ->
  right_side n = ((inj n + inj 1) * right_base_1 n - right_base_2 n)%K.
Proof.
  intros Hn. unfold right_side, right_base_1, right_base_2.
  rewrite (fact_to K 1 n (n + 1) (inj n + inj 1)%K) by first [lia | pq]. values. ring.
Qed.

Lemma right_recurrence (n : Z) : 0 <= n ->
  (a0 (inj n) * right_side n =
   q1 (inj n) (inj n) * base n n - q0 (inj n) (inj 0) * base n 0)%K.
Proof.
  intros Hn. rewrite (boundary_1 n), (boundary_2 n), (right_terms n) by lia. unfold a0. ring.
Qed.

(** ** Conclusion *)

Lemma leading (n : Z) : 0 <= n -> a0 (inj n) <> 0%K.
Proof. intros Hn. apply (neq0_by K _ 1); [unfold a0; pq | lia]. Qed.

Lemma initial : forall n, 0 <= n <= -1 -> left_side n = right_side n.
Proof. intros n Hn. exfalso. lia. Qed.

Lemma conclusion (n : Z) : 0 <= n -> left_side n = right_side n.
Proof.
  apply (same_recurrence K [fun n => a0 (inj n)] 0
           (fun n => q1 (inj n) (inj n) * base n n - q0 (inj n) (inj 0) * base n 0)%K).
  - exact left_recurrence.
  - exact right_recurrence.
  - exact leading.
  - exact initial.
Qed.

End Claim.

Theorem claim : forall (K : char0_field) (n : Z), 0 <= n ->
  sum 0 n (fun k => inj k * factorial k)%K = (factorial (n + 1) - inj 1)%K :> K.
Proof. exact conclusion. Qed.

Theorem claim_defined : forall (K : char0_field) (n : Z), 0 <= n ->
  (forall k : Z, 0 <= k <= n -> 0 <= k) /\ 0 <= n + 1.
Proof. intros K n Hn. split; [intros k Hk|]; lia. Qed.
