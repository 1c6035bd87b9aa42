(** Model of a generated proof: integer parameters with lower bounds.
    sum over k = 0..n of binomial(m, k) binomial(p, n - k)  =  binomial(m + p, n),
    m, p, n >= 0. *)

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

Variables m p : Z.
Hypothesis lower_m : 0 <= m.
Hypothesis lower_p : 0 <= p.

Definition summand (n k : Z) : K := (binomial m k * binomial p (n - k))%K.
Definition left_side (n : Z) : K := sum 0 n (fun k => summand n k).
Definition right_side (n : Z) : K := binomial (m + p) n.

(** ** The term, the base term and the certificate *)

Definition term (n k : Z) : K :=
  (factorial m * rfactorial k * rfactorial (m - k) * factorial p * rfactorial (n - k) *
   rfactorial (p - n + k))%K.

Lemma summand_term (n k : Z) : summand n k = term n k.
Proof.
  unfold summand, term. rewrite (binomial_to K m k (m - k)) by lia.
  rewrite (binomial_to K p (n - k) (p - n + k)) by lia. ring.
Qed.

Definition base (n k : Z) : K :=
  (factorial m * rfactorial k * rfactorial (m - k) * factorial p * rfactorial (n + 1 - k) *
   rfactorial (p - n + k))%K.

Definition a0 (n : K) : K := (- (inj m + inj p - n))%K.
Definition a1 (n : K) : K := (n + inj 1)%K.
Definition p0 (n k : K) : K := (n + inj 1 - k)%K.
Definition p1 (n k : K) : K := (inj p - n + k)%K.
Definition c (n k : K) : K := (- inj 1)%K.
Definition q0 (n k : K) : K := (k * (inj p - n + k) * c n k)%K.
Definition q1 (n k : K) : K := ((inj m - k) * (n + inj 1 - k) * c n (k + inj 1))%K.

Lemma term_shift_0 (n k : Z) : term n k = (p0 (inj n) (inj k) * base n k)%K.
Proof.
  unfold term, base, p0.
  rewrite (rfact_to K 1 (n + 1 - k) (n - k) (inj n + inj 1 - inj k)%K) by first [lia | pq].
  ring.
Qed.

Lemma term_shift_1 (n k : Z) : term (n + 1) k = (p1 (inj n) (inj k) * base n k)%K.
Proof.
  unfold term, base, p1.
  rewrite (rfact_to K 1 (p - n + k) (p - (n + 1) + k) (inj p - inj n + inj k)%K)
    by first [lia | pq].
  ring.
Qed.

Lemma certificate_shift (n k : Z) :
  (q0 (inj n) (inj (k + 1)) * base n (k + 1)%Z = q1 (inj n) (inj k) * base n k)%K.
Proof.
  unfold base, q0, q1, c.
  rewrite (rfact_to K 1 (k + 1) k (inj k + inj 1)%K) by first [lia | pq].
  rewrite (rfact_to K 1 (m - k) (m - (k + 1)) (inj m - inj k)%K) by first [lia | pq].
  rewrite (rfact_to K 1 (p - n + (k + 1)) (p - n + k) (inj p - inj n + inj k + inj 1)%K)
    by first [lia | pq].
  rewrite (rfact_to K 1 (n + 1 - k) (n + 1 - (k + 1)) (inj n + inj 1 - inj k)%K)
    by first [lia | pq].
  rewrite (inj_add K k 1). ring.
Qed.

(** ** The polynomial equality *)

Lemma equality (n k : K) : (a0 n * p0 n k + a1 n * p1 n k = q1 n k - q0 n k)%K.
Proof. unfold a0, a1, p0, p1, q0, q1, c. ring. Qed.

Lemma telescoping (n k : Z) :
  (a0 (inj n) * term n k + a1 (inj n) * term (n + 1)%Z k =
   q1 (inj n) (inj k) * base n k - q0 (inj n) (inj k) * base n k)%K.
Proof.
  rewrite (term_shift_0 n k), (term_shift_1 n k).
  comb (base n k) (equality (inj n) (inj k)).
Qed.

(** ** Ranges and ends *)

Lemma range_0 (n : Z) : 0 <= n -> left_side n = sum 0 (n + 1) (fun k => term n k).
Proof.
  intros Hn. unfold left_side. rewrite (sum_same K 0 n 0 (n + 1)).
  - apply sum_ext; try lia. intros k Hk. apply summand_term; lia.
  - intros; lia.
  - intros k Hk Ho. rewrite (summand_term n k). unfold term.
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
  (factorial (m + p) * rfactorial (n + 1) * rfactorial (m + p - n))%K.

Lemma right_shift_0 (n : Z) : 0 <= n -> right_side n = ((inj n + inj 1) * right_base n)%K.
Proof.
  intros Hn. unfold right_side, right_base.
  rewrite (binomial_to K (m + p) n (m + p - n)) by lia.
  rewrite (rfact_to K 1 (n + 1) n (inj n + inj 1)%K) by first [lia | pq]. ring.
Qed.

Lemma right_shift_1 (n : Z) : 0 <= n ->
  right_side (n + 1) = ((inj m + inj p - inj n) * right_base n)%K.
Proof.
  intros Hn. unfold right_side, right_base.
  rewrite (binomial_to K (m + p) (n + 1) (m + p - (n + 1))) by lia.
  rewrite (rfact_to K 1 (m + p - n) (m + p - (n + 1)) (inj m + inj p - inj n)%K)
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

Theorem claim : forall (K : char0_field) (m p n : Z), 0 <= m -> 0 <= p -> 0 <= n ->
  sum 0 n (fun k => binomial m k * binomial p (n - k))%K = binomial (m + p) n :> K.
Proof. intros K m p n Hm Hp. exact (conclusion K m p Hm Hp n). Qed.

Theorem claim_defined : forall (K : char0_field) (m p n : Z),
  0 <= m -> 0 <= p -> 0 <= n -> True.
Proof. trivial. Qed.
