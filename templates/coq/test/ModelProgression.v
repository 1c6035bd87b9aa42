(** Model of a generated proof: a rising factorial of a number that is no integer.
    sum over k = 0..n of rising(1/2, k) / k!  =  rising(3/2, n) / n!,  n >= 0. *)

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

Local Notation rising := (@Statement.rising K).
Local Notation ap := (@Progressions.ap K).

Definition summand (n k : Z) : K := (rising (inj 1 / inj 2) k * rfactorial k)%K.
Definition left_side (n : Z) : K := sum 0 n (fun k => summand n k).
Definition right_side (n : Z) : K := (rising (inj 3 / inj 2) n * rfactorial n)%K.

Lemma nonzero_2 : inj 2 <> 0%K.
Proof. apply inj_neq0. lia. Qed.

(** No factor of a progression 1 + 2 t is 0. *)
Lemma progression_1 (t : Z) : 1 + 2 * t <> 0.
Proof. lia. Qed.

(** ** The term, the base term and the certificate *)

Definition term (n k : Z) : K := (ap 1 2 0 k * zpow (inj 2) (- k) * rfactorial k)%K.

Lemma summand_term (n k : Z) : 0 <= k -> summand n k = term n k.
Proof.
  intros Hk. unfold summand, term.
  rewrite (rising_ap K (inj 1 / inj 2)%K 1 2 k 0 k (- k)) by first [lia | pqf]. ring.
Qed.

Definition base (n k : Z) : K := (ap 1 2 0 k * zpow (inj 2) (- k - 1) * rfactorial k)%K.

Definition a0 (n : K) : K := inj 1.
Definition p0 (n k : K) : K := inj 2.
Definition c (n k : K) : K := inj 4.
Definition q0 (n k : K) : K := (k * c n k)%K.
Definition q1 (n k : K) : K := (inj 2 * (inj 1 + inj 2 * k))%K.

Lemma term_shift_0 (n k : Z) : term n k = (p0 (inj n) (inj k) * base n k)%K.
Proof.
  unfold term, base, p0.
  rewrite (zpow_to K 1 (inj 2) (- k - 1) (- k) (inj 2)) by first [lia | left; exact nonzero_2 | cbn; pq].
  ring.
Qed.

Lemma certificate_shift (n k : Z) :
  (q0 (inj n) (inj (k + 1)) * base n (k + 1)%Z = q1 (inj n) (inj k) * base n k)%K.
Proof.
  unfold base, q0, q1, c.
  rewrite (ap_to K 0 0 1 1 1 2 0 0 k (k + 1) (inj 1 + inj 2 * inj k)%K)
    by first [exact progression_1 | lia | pq].
  rewrite (zpow_to K 1 (inj 2) (- (k + 1) - 1) (- k - 1) (inj 2))
    by first [lia | left; exact nonzero_2 | cbn; pq].
  rewrite (rfact_to K 1 (k + 1) k (inj k + inj 1)%K) by first [lia | pq].
  inj_norm. ring.
Qed.

(** ** The polynomial equality *)

Lemma equality (n k : K) : (a0 n * p0 n k = q1 n k - q0 n k)%K.
Proof. unfold a0, p0, q0, q1, c. ring. Qed.

Lemma telescoping (n k : Z) :
  (a0 (inj n) * term n k =
   q1 (inj n) (inj k) * base n k - q0 (inj n) (inj k) * base n k)%K.
Proof. rewrite (term_shift_0 n k). comb (base n k) (equality (inj n) (inj k)). Qed.

(** ** Ranges and ends *)

Lemma range_0 (n : Z) : 0 <= n -> left_side n = sum 0 n (fun k => term n k).
Proof.
  intros Hn. unfold left_side. apply sum_ext; try lia. intros k Hk. apply summand_term; lia.
Qed.

Lemma left_end (n : Z) : 0 <= n -> (q0 (inj n) (inj 0) * base n 0 = inj 0)%K.
Proof. intros Hn. unfold q0. ring. Qed.

Lemma left_recurrence (n : Z) : 0 <= n ->
  (a0 (inj n) * left_side n = q1 (inj n) (inj n) * base n n)%K.
Proof.
  intros Hn. rewrite (range_0 n) by lia. rewrite !sum_scal.
  rewrite (sum_tele_ends K 0 n _ (fun k => q1 (inj n) (inj k) * base n k)%K
             (fun k => q0 (inj n) (inj k) * base n k)%K 0 n); try lia.
  - rewrite (left_end n) by lia. ring.
  - intros k Hk. apply telescoping; lia.
  - intros k Hk. apply certificate_shift; lia.
Qed.

(** ** The closed form *)

Definition right_base (n : Z) : K := (ap 1 2 1 n * zpow (inj 2) (- n - 1) * rfactorial n)%K.

Lemma boundary_1 (n : Z) : 0 <= n ->
  (q1 (inj n) (inj n) * base n n = inj 2 * (inj 1 + inj 2 * inj n) * right_base n)%K.
Proof.
  intros Hn. unfold q1, base, right_base.
  rewrite (ap_to K 0 1 0 1 1 2 1 0 n n (inj 1)) by first [exact progression_1 | lia | pq]. ring.
Qed.

Lemma right_shift_0 (n : Z) : 0 <= n ->
  right_side n = (inj 2 * (inj 1 + inj 2 * inj n) * right_base n)%K.
Proof.
  intros Hn. unfold right_side, right_base.
  rewrite (rising_ap K (inj 3 / inj 2)%K 1 2 n 1 (n + 1) (- n)) by first [lia | pqf].
  rewrite (ap_to K 0 0 1 1 1 2 1 1 n (n + 1) (inj 1 + inj 2 * inj n)%K)
    by first [exact progression_1 | lia | pq].
  rewrite (zpow_to K 1 (inj 2) (- n - 1) (- n) (inj 2)) by first [lia | left; exact nonzero_2 | cbn; pq].
  ring.
Qed.

Lemma right_recurrence (n : Z) : 0 <= n ->
  (a0 (inj n) * right_side n = q1 (inj n) (inj n) * base n n)%K.
Proof. intros Hn. rewrite (boundary_1 n), (right_shift_0 n) by lia. unfold a0. ring. Qed.

(** ** Conclusion *)

Lemma leading (n : Z) : 0 <= n -> a0 (inj n) <> 0%K.
Proof. intros Hn. apply (neq0_by K _ 1); [unfold a0; pq | lia]. Qed.

Lemma initial : forall n, 0 <= n <= -1 -> left_side n = right_side n.
Proof. intros n Hn. exfalso. lia. Qed.

Lemma conclusion (n : Z) : 0 <= n -> left_side n = right_side n.
Proof.
  apply (same_recurrence K [fun n => a0 (inj n)] 0
           (fun n => q1 (inj n) (inj n) * base n n)%K).
  - exact left_recurrence.
  - exact right_recurrence.
  - exact leading.
  - exact initial.
Qed.

End Claim.

Theorem claim : forall (K : char0_field) (n : Z), 0 <= n ->
  sum 0 n (fun k => rising (inj 1 / inj 2) k * rfactorial k)%K =
  (rising (inj 3 / inj 2) n * rfactorial n)%K :> K.
Proof. exact conclusion. Qed.

Theorem claim_defined : forall (K : char0_field) (n : Z), 0 <= n ->
  (forall k : Z, 0 <= k <= n -> inj 2 <> 0%K :> K /\ 0 <= k) /\ (inj 2 <> 0%K :> K /\ 0 <= n).
Proof.
  intros K n Hn. split; [intros k Hk|]; (split; [apply inj_neq0|]; lia).
Qed.
