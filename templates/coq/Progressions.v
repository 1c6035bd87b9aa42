(* Support library of Sumwright. SPDX-License-Identifier: 0BSD *)

(** Products over an arithmetic progression of integers that misses 0,
    ap u v i j = (u + v i) (u + v (i + 1)) ... (u + v (j - 1)),  continued to j < i by
    reciprocals: rising and falling factorials of a rational number that is no integer. *)

Require Import ZArith Lia Ring Field.
From Sumwright Require Import Statement Scalars Products Powers Factorials.
Local Open Scope Z_scope.

Section Progressions.
Variable K : char0_field.

Add Field K_field : (field_axioms K)
  (morphism (inj_morph K), constants [inj_cst],
   power_tac (pow_th K) [exponent_cst], completeness (inj_complete K)).

Implicit Types (u v i j m e : Z) (p r : K) (d : nat).

Definition ap (u v i j : Z) : K :=
  if j <? i then (/ product j (i - 1) (fun t => inj (u + v * t)))%K
  else product i (j - 1) (fun t => inj (u + v * t)).

Lemma ap_empty u v i j : i = j -> ap u v i j = inj 1.
Proof.
  intros ->. unfold ap. destruct (Z.ltb_spec j j); [lia|]. apply product_empty. lia.
Qed.

Lemma ap_last u v i j :
  (forall t, u + v * t <> 0) -> ap u v i (j + 1) = (inj (u + v * j) * ap u v i j)%K.
Proof.
  intros N. unfold ap. destruct (Z.ltb_spec (j + 1) i), (Z.ltb_spec j i); try lia.
  - rewrite (product_first K j) by lia.
    assert (P : product (j + 1) (i - 1) (fun t => inj (u + v * t)) <> (0 : K)%K).
    { apply product_neq0. intros t _. apply inj_neq0, N. }
    field. split; [exact P | apply inj_neq0, N].
  - replace (j + 1 - 1) with j by lia. replace (i - 1) with j by lia.
    rewrite product_empty, (product_last K j), product_empty by lia.
    field. apply inj_neq0, N.
  - replace (j + 1 - 1) with j by lia. rewrite (product_last K i) by lia. ring.
Qed.

Lemma ap_up d u v i j :
  (forall t, u + v * t <> 0) ->
  ap u v i (j + Z.of_nat d) = (product 0 (Z.of_nat d - 1) (fun t => inj (u + v * (j + t))) *
                              ap u v i j)%K.
Proof.
  intros N. induction d as [|d IH].
  - rewrite Z.add_0_r, product_empty by lia. ring.
  - rewrite Nat2Z.inj_succ, <- Z.add_1_r, Z.add_assoc, ap_last, IH by exact N.
    rewrite (product_last K 0 (Z.of_nat d + 1 - 1)) by lia.
    replace (Z.of_nat d + 1 - 1) with (Z.of_nat d) by lia. ring.
Qed.

Lemma ap_split u v i m j :
  (forall t, u + v * t <> 0) -> ap u v i j = (ap u v i m * ap u v m j)%K.
Proof.
  intros N. destruct (Z_le_gt_dec m j) as [H|H].
  - replace j with (m + Z.of_nat (Z.to_nat (j - m))) by lia.
    rewrite !(ap_up (Z.to_nat (j - m))), (ap_empty u v m m) by (exact N || reflexivity). ring.
  - assert (E : ap u v i m = (ap u v i j * ap u v j m)%K).
    { replace m with (j + Z.of_nat (Z.to_nat (m - j))) by lia.
      rewrite !(ap_up (Z.to_nat (m - j))), (ap_empty u v j j) by (exact N || reflexivity). ring. }
    assert (U : (ap u v j m * ap u v m j = inj 1)%K).
    { unfold ap. destruct (Z.ltb_spec m j), (Z.ltb_spec j m); try lia.
      rewrite inj_1. apply inv_r, product_neq0. intros t _. apply inj_neq0, N. }
    rewrite E. transitivity (ap u v i j * (ap u v j m * ap u v m j))%K; [rewrite U|]; ring.
Qed.

Lemma ap_neq0 u v i j : (forall t, u + v * t <> 0) -> ap u v i j <> 0%K.
Proof.
  intros N. unfold ap. destruct (j <? i); [apply inv_neq0|];
    apply product_neq0; intros t _; apply inj_neq0, N.
Qed.

Lemma ap_terms_eq d u v i j :
  (forall t, u + v * t <> 0) -> ap u v i (j + Z.of_nat d) = (ap_terms u v j d * ap u v i j)%K.
Proof.
  intros N. induction d as [|d IH]; cbn [ap_terms].
  - rewrite Z.add_0_r. ring.
  - rewrite Nat2Z.inj_succ, <- Z.add_1_r, Z.add_assoc, ap_last, IH by exact N. ring.
Qed.

Lemma ap_translate du u u' v i j :
  u' = u + v * du -> ap u' v i j = ap u v (i + du) (j + du).
Proof.
  intros ->. unfold ap.
  assert (T : forall a b, product a (b - 1) (fun t => inj (u + v * du + v * t)) =
              product (a + du) (b + du - 1) (fun t => inj (u + v * t)) :> K).
  { intros a b. rewrite (product_shift K du). replace (b - 1 + du) with (b + du - 1) by lia.
    apply product_ext. intros t _. f_equal. ring. }
  rewrite !T. destruct (Z.ltb_spec j i), (Z.ltb_spec (j + du) (i + du)); reflexivity || lia.
Qed.

(** The law, at every pair of integers: the lower end down by d1, the upper end up by d2. *)
Lemma ap_to (du : Z) (d1 d2 : nat) u u' v i i' j j' p :
  (forall t, u + v * t <> 0) -> u' = u + v * du ->
  i' + du = i - Z.of_nat d1 -> j' + du = j + Z.of_nat d2 ->
  (p = ap_terms u v (i - Z.of_nat d1) d1 * ap_terms u v j d2)%K ->
  ap u' v i' j' = (p * ap u v i j)%K.
Proof.
  intros N U I J ->. rewrite (ap_translate du u u' v i' j' U), I, J.
  rewrite (ap_terms_eq d2) by exact N.
  rewrite (ap_split u v (i - Z.of_nat d1) i j N).
  replace i with (i - Z.of_nat d1 + Z.of_nat d1) at 2 by lia.
  rewrite (ap_terms_eq d1), ap_empty by (exact N || reflexivity). ring.
Qed.

(** Values at literal ends. *)
Lemma ap_at u v i j d : j = i + Z.of_nat d -> ap u v i j = ap_terms u v i d.
Proof.
  intros ->. unfold ap. destruct (Z.ltb_spec (i + Z.of_nat d) i); [lia|]. clear H.
  induction d as [|d IH]; cbn [ap_terms].
  - apply product_empty. lia.
  - rewrite (product_last K i) by lia.
    replace (i + Z.of_nat (S d) - 1 - 1) with (i + Z.of_nat d - 1) by lia. rewrite IH.
    replace (i + Z.of_nat (S d) - 1) with (i + Z.of_nat d) by lia. reflexivity.
Qed.

Lemma ap_at_inverse u v i j d : i = j + Z.of_nat d -> ap u v i j = (/ ap_terms u v j d)%K.
Proof.
  intros E. rewrite <- (ap_at u v j i d E). unfold ap.
  destruct (Z.ltb_spec j i), (Z.ltb_spec i j); try lia; [reflexivity|].
  rewrite !product_empty, inj_1 by lia. symmetry. apply inv_unique. ring.
Qed.

(** ** Rising and falling factorials of r = u / v + i *)

Lemma product_scaled d (c : K) (f g : Z -> K) i :
  (forall t, f t = (g t * c)%K) ->
  product i (i + Z.of_nat d - 1) f = (product i (i + Z.of_nat d - 1) g * pow c d)%K.
Proof.
  intros H. induction d as [|d IH]; cbn [pow].
  - rewrite !product_empty by lia. ring.
  - rewrite (product_last K i _ f), (product_last K i _ g) by lia.
    replace (i + Z.of_nat (S d) - 1 - 1) with (i + Z.of_nat d - 1) by lia.
    rewrite IH, H. ring.
Qed.

Lemma rising_ap r u v m i j e :
  v <> 0 -> (r * inj v = inj (u + v * i))%K -> 0 <= m -> j = i + m -> e = - m ->
  rising r m = (ap u v i j * zpow (inj v) e)%K.
Proof.
  intros V R M -> ->.
  assert (V' : inj v <> (0 : K)%K) by (apply inj_neq0; exact V).
  rewrite (rising_ip K r (r - inj i) m i (i + m)) by (reflexivity || ring).
  unfold ip, ap. destruct (Z.ltb_spec (i + m) i); [lia|].
  rewrite (zpow_nonpos K (inj v) (- m)), Z.opp_involutive, inv_pow by (exact V' || lia).
  replace m with (Z.of_nat (Z.to_nat m)) at 1 2 by lia.
  apply product_scaled. intros t.
  apply (mul_cancel K (inj v)); [exact V'|].
  transitivity (r * inj v + inj v * (inj t - inj i))%K; [ring|]. rewrite R.
  transitivity (@inj K (u + v * t) * (inj v * / inj v))%K; [|ring].
  rewrite (inv_r K _ V'), !inj_add, !inj_mul. ring.
Qed.

Lemma falling_ap r u v m i j e :
  v <> 0 -> (r * inj v = inj (u + v * (j - 1)))%K -> 0 <= m -> i = j - m -> e = - m ->
  falling r m = (ap u v i j * zpow (inj v) e)%K.
Proof.
  intros V R M I E.
  assert (V' : inj v <> (0 : K)%K) by (apply inj_neq0; exact V).
  rewrite (falling_ip K r (r - inj j + 1) m i j) by (exact I || ring).
  rewrite <- (rising_ip K (r - inj j + 1 + inj i) (r - inj j + 1) m i j) by (reflexivity || lia).
  apply rising_ap; try assumption; [|lia].
  subst i. transitivity (r * inj v + inj v * (inj (j - m) - inj j + 1))%K; [ring|]. rewrite R.
  rewrite !inj_add, !inj_mul, !inj_sub, inj_1. ring.
Qed.

(** At every k. *)
Lemma gbinomial_ap r u v k i j e :
  v <> 0 -> (r * inj v = inj (u + v * (j - 1)))%K -> i = j - k -> e = - k ->
  gbinomial r k = (ap u v i j * zpow (inj v) e * rfactorial k)%K.
Proof.
  intros V R I E. destruct (Z_lt_ge_dec k 0).
  - rewrite gbinomial_neg, rfact_neg by lia. ring.
  - rewrite gbinomial_falling, (falling_ap r u v k i j e) by (assumption || lia). reflexivity.
Qed.

End Progressions.

Arguments ap {K} (u v i j)%Z.
