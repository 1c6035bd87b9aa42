(* Support library of Sumwright. SPDX-License-Identifier: 0BSD *)

(** Interval products  ip a i j = (a + i) (a + i + 1) ... (a + j - 1),  their
    reciprocals, and rising and falling factorials written with them. *)

Require Import ZArith Lia Ring Field.
From Sumwright Require Import Statement Scalars.
Local Open Scope Z_scope.

Section Products.
Variable K : char0_field.

Add Field K_field : (field_axioms K)
  (morphism (inj_morph K), constants [inj_cst],
   power_tac (pow_th K) [exponent_cst], completeness (inj_complete K)).

Implicit Types (a b p v : K) (i j m : Z) (f g : Z -> K).

(** ** Finite products *)

Lemma product_empty lo hi f : hi < lo -> product lo hi f = inj 1.
Proof.
  intros H. unfold product. replace (Z.to_nat (hi - lo + 1)) with O by lia.
  rewrite inj_1. reflexivity.
Qed.

Lemma product_last lo hi f :
  lo <= hi -> product lo hi f = (product lo (hi - 1) f * f hi)%K.
Proof.
  intros H. unfold product.
  replace (Z.to_nat (hi - lo + 1)) with (S (Z.to_nat (hi - lo))) by lia.
  cbn [product_from].
  replace (hi - 1 - lo + 1) with (hi - lo) by lia.
  replace (lo + Z.of_nat (Z.to_nat (hi - lo))) with hi by lia. reflexivity.
Qed.

(** Induction on the length of a range that may be empty. *)
Lemma range_length_ind lo (P : Z -> Prop) :
  (forall hi, hi < lo -> P hi) -> (forall hi, lo <= hi -> P (hi - 1) -> P hi) -> forall hi, P hi.
Proof.
  intros E S hi.
  assert (A : forall n hi, (hi - lo < Z.of_nat n) -> P hi).
  { induction n as [|n IH]; intros h H.
    - apply E. lia.
    - destruct (Z_lt_ge_dec h lo) as [L|L]; [exact (E h L)|].
      apply S; [lia|]. apply IH. lia. }
  apply (A (Z.to_nat (hi - lo + 1))). lia.
Qed.

Lemma product_ext lo hi f g :
  (forall t, lo <= t <= hi -> f t = g t) -> product lo hi f = product lo hi g.
Proof.
  pattern hi. apply (range_length_ind lo); clear hi; intros hi H.
  - intros _. rewrite !product_empty by lia. reflexivity.
  - intros IH E. rewrite (product_last lo hi f), (product_last lo hi g) by lia.
    rewrite IH, (E hi); [reflexivity | lia | intros; apply E; lia].
Qed.

Lemma product_first lo hi f :
  lo <= hi -> product lo hi f = (f lo * product (lo + 1) hi f)%K.
Proof.
  pattern hi. apply (range_length_ind (lo + 1)); clear hi; intros hi H.
  - intros L. assert (hi = lo) as -> by lia.
    rewrite product_last, !product_empty by lia. ring.
  - intros IH L. rewrite (product_last lo hi), (product_last (lo + 1) hi), IH by lia. ring.
Qed.

Lemma product_shift d lo hi f :
  product lo hi f = product (lo + d) (hi + d) (fun t => f (t - d)).
Proof.
  pattern hi. apply (range_length_ind lo); clear hi; intros hi H.
  - rewrite !product_empty by lia. reflexivity.
  - intros IH. rewrite (product_last lo hi), (product_last (lo + d) (hi + d)), IH by lia.
    replace (hi + d - d) with hi by lia. replace (hi - 1 + d) with (hi + d - 1) by lia.
    reflexivity.
Qed.

Lemma product_reverse c lo hi f :
  product lo hi f = product (c - hi) (c - lo) (fun t => f (c - t)).
Proof.
  pattern hi. apply (range_length_ind lo); clear hi; intros hi H.
  - rewrite !product_empty by lia. reflexivity.
  - intros IH. rewrite (product_last lo hi), (product_first (c - hi) (c - lo)), IH by lia.
    replace (c - (c - hi)) with hi by lia. replace (c - (hi - 1)) with (c - hi + 1) by lia.
    ring.
Qed.

Lemma product_neq0 lo hi f :
  (forall t, lo <= t <= hi -> f t <> 0%K) -> product lo hi f <> 0%K.
Proof.
  pattern hi. apply (range_length_ind lo); clear hi; intros hi H.
  - intros _. rewrite product_empty by lia. apply inj_neq0. lia.
  - intros IH E. rewrite product_last by lia.
    apply mul_neq0; [apply IH; intros; apply E; lia | apply E; lia].
Qed.

(** ** Interval products *)

Definition ip (a : K) (i j : Z) : K := product i (j - 1) (fun t => a + inj t)%K.

Lemma ip_empty a i j : j <= i -> ip a i j = inj 1.
Proof. intros H. apply product_empty. lia. Qed.

Lemma ip_last a i j : i <= j -> ip a i (j + 1) = ((a + inj j) * ip a i j)%K.
Proof.
  intros H. unfold ip. replace (j + 1 - 1) with j by lia. rewrite product_last by lia. ring.
Qed.

Lemma ip_first a i j : i <= j -> ip a (i - 1) j = ((a + inj i - 1) * ip a i j)%K.
Proof.
  intros H. unfold ip. rewrite product_first by lia.
  replace (i - 1 + 1) with i by lia. rewrite inj_sub, inj_1. ring.
Qed.

Lemma ip_split_length a i m (n : nat) :
  i <= m -> ip a i (m + Z.of_nat n) = (ip a i m * ip a m (m + Z.of_nat n))%K.
Proof.
  intros H. induction n as [|n IH].
  - rewrite Z.add_0_r, (ip_empty a m m) by lia. ring.
  - rewrite Nat2Z.inj_succ, <- Z.add_1_r, Z.add_assoc.
    rewrite (ip_last a i), (ip_last a m), IH by lia. ring.
Qed.

Lemma ip_split a i m j : i <= m <= j -> ip a i j = (ip a i m * ip a m j)%K.
Proof.
  intros H. replace j with (m + Z.of_nat (Z.to_nat (j - m))) by lia.
  apply ip_split_length. lia.
Qed.

Lemma ip_translate a (u i j : Z) : ip (a + inj u)%K i j = ip a (i + u) (j + u).
Proof.
  unfold ip. rewrite (product_shift u i (j - 1)).
  replace (j - 1 + u) with (j + u - 1) by lia.
  apply product_ext. intros t _. rewrite inj_sub. ring.
Qed.

Lemma ip_neq0 a i j :
  (forall t, i <= t < j -> (a + inj t)%K <> 0%K) -> ip a i j <> 0%K.
Proof. intros H. apply product_neq0. intros t L. apply H. lia. Qed.

Lemma ip_up (d : nat) a i j :
  i <= j -> ip a i (j + Z.of_nat d) = (rising_terms (a + inj j) d * ip a i j)%K.
Proof.
  intros H. induction d as [|d IH]; cbn [rising_terms].
  - rewrite Z.add_0_r. ring.
  - rewrite Nat2Z.inj_succ, <- Z.add_1_r, Z.add_assoc, ip_last, IH, inj_add by lia. ring.
Qed.

Lemma ip_low (d : nat) a i j :
  i <= j -> ip a (i - Z.of_nat d) j = (falling_terms (a + inj i - 1) d * ip a i j)%K.
Proof.
  intros H. induction d as [|d IH]; cbn [falling_terms].
  - rewrite Z.sub_0_r. ring.
  - rewrite Nat2Z.inj_succ, <- Z.add_1_r, Z.sub_add_distr, ip_first, IH, inj_sub by lia. ring.
Qed.

(** The law: both ends outwards, the first argument spelled differently or moved by [du]. *)
Lemma ip_to (du : Z) (d1 d2 : nat) a a' i i' j j' p :
  i <= j -> (a' = a + inj du)%K ->
  i' + du = i - Z.of_nat d1 -> j' + du = j + Z.of_nat d2 ->
  (p = falling_terms (a + inj i - 1) d1 * rising_terms (a + inj j) d2)%K ->
  ip a' i' j' = (p * ip a i j)%K.
Proof.
  intros H -> I J ->. rewrite ip_translate, I, J, ip_up, ip_low by lia. ring.
Qed.

(** ** Reciprocals *)

Definition rip (a : K) (i j : Z) : K := (/ ip a i j)%K.

Lemma rip_ip a i j :
  (forall t, i <= t < j -> (a + inj t)%K <> 0%K) -> (ip a i j * rip a i j = 1)%K.
Proof. intros H. apply inv_r, ip_neq0, H. Qed.

(** Both ends inwards. *)
Lemma rip_to (du : Z) (d1 d2 : nat) a a' i i' j j' p :
  i' <= j' -> (a' = a + inj du)%K ->
  i' + du = i + Z.of_nat d1 -> j' + du = j - Z.of_nat d2 ->
  (p = rising_terms (a + inj i) d1 * falling_terms (a + inj j - 1) d2)%K ->
  (forall t, i <= t < j -> (a + inj t)%K <> 0%K) ->
  rip a' i' j' = (p * rip a i j)%K.
Proof.
  intros H -> I J -> N. unfold rip.
  assert (E : ip a i j =
    (rising_terms (a + inj i) d1 * falling_terms (a + inj j - 1) d2 * ip (a + inj du) i' j')%K).
  { rewrite ip_translate, I, J.
    rewrite (ip_split a i (j - Z.of_nat d2) j), (ip_low d2 a j j), (ip_empty a j j) by lia.
    rewrite (ip_split a i (i + Z.of_nat d1) (j - Z.of_nat d2)) by lia.
    rewrite (ip_up d1 a i i), (ip_empty a i i) by lia. ring. }
  pose proof (ip_neq0 a i j N) as Z. rewrite E in Z. rewrite E.
  symmetry. field. repeat split; intros W; apply Z; rewrite W; ring.
Qed.

(** ** Extension to j < i, where no factor vanishes at any integer *)

Definition gip (a : K) (i j : Z) : K := if j <? i then rip a j i else ip a i j.

Lemma gip_ip a i j : i <= j -> gip a i j = ip a i j.
Proof. intros H. unfold gip. destruct (Z.ltb_spec j i); [lia|reflexivity]. Qed.

Lemma gip_rip a i j : j <= i -> gip a i j = rip a j i.
Proof.
  intros H. unfold gip, rip. destruct (Z.ltb_spec j i); [reflexivity|].
  rewrite !ip_empty by lia. symmetry. apply inv_unique. ring.
Qed.

Section NoZero.
Variable a : K.
Hypothesis no_zero : forall t, (a + inj t)%K <> 0%K.

Lemma gip_last i j : gip a i (j + 1) = ((a + inj j) * gip a i j)%K.
Proof.
  destruct (Z_le_gt_dec i j) as [H|H].
  - rewrite !gip_ip by lia. apply ip_last. exact H.
  - rewrite !gip_rip by lia.
    rewrite (rip_to 0 1 0 a a j (j + 1) i i (a + inj j)%K); try lia.
    + reflexivity.
    + rewrite inj_0. ring.
    + cbn [rising_terms falling_terms Z.of_nat]. rewrite inj_0. ring.
    + intros; apply no_zero.
Qed.

Lemma gip_first i j : gip a (i - 1) j = ((a + inj i - 1) * gip a i j)%K.
Proof.
  destruct (Z_le_gt_dec i j) as [H|H].
  - rewrite !gip_ip by lia. apply ip_first. exact H.
  - rewrite !gip_rip by lia.
    rewrite (rip_to 0 0 1 a a j j i (i - 1) (a + inj i - 1)%K); try lia.
    + reflexivity.
    + rewrite inj_0. ring.
    + cbn [rising_terms falling_terms Z.of_nat]. rewrite inj_0. ring.
    + intros; apply no_zero.
Qed.

Lemma gip_up (d : nat) i j :
  gip a i (j + Z.of_nat d) = (rising_terms (a + inj j) d * gip a i j)%K.
Proof.
  induction d as [|d IH]; cbn [rising_terms].
  - rewrite Z.add_0_r. ring.
  - rewrite Nat2Z.inj_succ, <- Z.add_1_r, Z.add_assoc, gip_last, IH, inj_add. ring.
Qed.

Lemma gip_low (d : nat) i j :
  gip a (i - Z.of_nat d) j = (falling_terms (a + inj i - 1) d * gip a i j)%K.
Proof.
  induction d as [|d IH]; cbn [falling_terms].
  - rewrite Z.sub_0_r. ring.
  - rewrite Nat2Z.inj_succ, <- Z.add_1_r, Z.sub_add_distr, gip_first, IH, inj_sub. ring.
Qed.

Lemma gip_neq0 i j : gip a i j <> 0%K.
Proof.
  unfold gip, rip. destruct (j <? i); [apply inv_neq0|]; apply ip_neq0; intros; apply no_zero.
Qed.

End NoZero.

Lemma gip_translate a (u i j : Z) : gip (a + inj u)%K i j = gip a (i + u) (j + u).
Proof.
  unfold gip, rip. rewrite !ip_translate.
  destruct (Z.ltb_spec j i), (Z.ltb_spec (j + u) (i + u)); reflexivity || lia.
Qed.

(** The law, at every pair of integers. *)
Lemma gip_to (du : Z) (d1 d2 : nat) a a' i i' j j' p :
  (forall t, (a + inj t)%K <> 0%K) -> (a' = a + inj du)%K ->
  i' + du = i - Z.of_nat d1 -> j' + du = j + Z.of_nat d2 ->
  (p = falling_terms (a + inj i - 1) d1 * rising_terms (a + inj j) d2)%K ->
  gip a' i' j' = (p * gip a i j)%K.
Proof.
  intros H -> I J ->. rewrite gip_translate, I, J, gip_up, gip_low by exact H. ring.
Qed.

(** ** Rising and falling factorials *)

Lemma rising_ip v a m i j : (v = a + inj i)%K -> j = i + m -> rising v m = ip a i j.
Proof.
  intros -> ->. unfold rising, ip.
  rewrite (product_shift i 0 (m - 1)).
  replace (m - 1 + i) with (i + m - 1) by lia. rewrite Z.add_0_l.
  apply product_ext. intros t _. rewrite inj_sub. ring.
Qed.

Lemma falling_ip v a m i j : (v = a + inj j - 1)%K -> i = j - m -> falling v m = ip a i j.
Proof.
  intros -> ->. unfold falling, ip.
  rewrite (product_reverse (j - 1) 0 (m - 1)).
  replace (j - 1 - (m - 1)) with (j - m) by lia. rewrite Z.sub_0_r.
  apply product_ext. intros t _. rewrite !inj_sub, inj_1. ring.
Qed.

Lemma rising_step v m : 0 <= m -> rising v (m + 1) = ((v + inj m) * rising v m)%K.
Proof.
  intros H. unfold rising. rewrite product_last by lia.
  replace (m + 1 - 1) with m by lia. ring.
Qed.

Lemma falling_step v m : 0 <= m -> falling v (m + 1) = ((v - inj m) * falling v m)%K.
Proof.
  intros H. unfold falling. rewrite product_last by lia.
  replace (m + 1 - 1) with m by lia. ring.
Qed.

(** Values at a literal length. *)
Lemma rising_value v m (d : nat) : m = Z.of_nat d -> rising v m = rising_terms v d.
Proof.
  intros ->. induction d as [|d IH]; cbn [rising_terms].
  - unfold rising. rewrite product_empty, inj_1 by lia. reflexivity.
  - rewrite Nat2Z.inj_succ, <- Z.add_1_r, rising_step, IH by lia. ring.
Qed.

Lemma falling_value v m (d : nat) : m = Z.of_nat d -> falling v m = falling_terms v d.
Proof.
  intros ->. induction d as [|d IH]; cbn [falling_terms].
  - unfold falling. rewrite product_empty, inj_1 by lia. reflexivity.
  - rewrite Nat2Z.inj_succ, <- Z.add_1_r, falling_step, IH by lia. ring.
Qed.

Lemma ip_value a i j (d : nat) : j = i + Z.of_nat d -> ip a i j = rising_terms (a + inj i) d.
Proof. intros ->. rewrite ip_up, ip_empty, inj_1 by lia. ring. Qed.

End Products.

Arguments ip {K} a%K (i j)%Z.
Arguments rip {K} a%K (i j)%Z.
Arguments gip {K} a%K (i j)%Z.
