(* Support library of Sumwright. SPDX-License-Identifier: 0BSD *)

(** From the vocabulary of a claim to the atoms of a proof, with every argument spelled
    as the proof needs it: the premises are integer equations (for [lia]) and equations in K
    (for [pq]). *)

Require Import ZArith Lia Ring Field.
From Sumwright Require Import Statement Scalars Products Powers Factorials.
Local Open Scope Z_scope.

Section Leaves.
Variable K : char0_field.

Add Field K_field : (field_axioms K)
  (morphism (inj_morph K), constants [inj_cst],
   power_tac (pow_th K) [exponent_cst], completeness (inj_complete K)).

Lemma leaf_factorial m a : a = m -> factorial m = factorial a :> K.
Proof. intros ->. reflexivity. Qed.

Lemma leaf_rfactorial m a : a = m -> rfactorial m = rfactorial a :> K.
Proof. intros ->. reflexivity. Qed.

Lemma leaf_binomial n k a b c :
  0 <= n -> a = n -> b = k -> c = n - k ->
  binomial n k = (factorial a * rfactorial b * rfactorial c)%K :> K.
Proof. intros Hn -> -> Hc. exact (binomial_to K n k c Hn Hc). Qed.

(** An integer upper argument of unknown sign, at every k. *)
Lemma leaf_binomial_ip n k i j b :
  j = n + 1 -> i = j - k -> b = k ->
  binomial n k = (ip (inj 0) i j * rfactorial b)%K :> K.
Proof.
  intros Hj Hi ->. apply (binomial_ip K (inj 0) 0); [reflexivity | lia | lia].
Qed.

(** The same through K, for an upper argument written in K. *)
Lemma leaf_gbinomial_ip v x k i j b :
  (v = x + inj j - 1)%K -> i = j - k -> b = k ->
  gbinomial v k = (ip x i j * rfactorial b)%K :> K.
Proof. intros Hv Hi ->. exact (gbinomial_ip K v x k i j Hv Hi). Qed.

Lemma leaf_rising_ip v x m i j :
  (v = x + inj i)%K -> j = i + m -> rising v m = ip x i j :> K.
Proof. exact (rising_ip K v x m i j). Qed.

Lemma leaf_falling_ip v x m i j :
  (v = x + inj j - 1)%K -> i = j - m -> falling v m = ip x i j :> K.
Proof. exact (falling_ip K v x m i j). Qed.

Lemma leaf_rising_factorials v u m a b :
  v = inj u -> 1 <= u -> 0 <= m -> a = u + m - 1 -> b = u - 1 ->
  rising v m = (factorial a * rfactorial b)%K :> K.
Proof.
  intros Hv Hu Hm Ha Hb.
  rewrite (rising_ip K v (inj 0) m u (u + m)); [| rewrite Hv, inj_0; ring | lia].
  apply (ip_fact K (inj 0) 0); lia || reflexivity.
Qed.

Lemma leaf_rising_reflected v u m e a b :
  v = inj u -> u <= 0 -> 0 <= m -> e = m -> a = - u -> b = - u - m ->
  rising v m = (zpow (inj (-1)) e * factorial a * rfactorial b)%K :> K.
Proof.
  intros Hv Hu Hm He Ha Hb.
  rewrite (rising_ip K v (inj 0) m u (u + m)); [| rewrite Hv, inj_0; ring | lia].
  apply (ip_reflect K (inj 0) 0); lia || reflexivity.
Qed.

Lemma leaf_falling_factorials v u m a b :
  v = inj u -> 0 <= u -> 0 <= m -> a = u -> b = u - m ->
  falling v m = (factorial a * rfactorial b)%K :> K.
Proof.
  intros Hv Hu Hm -> Hb.
  assert (E : (falling v m * rfactorial m = (factorial u * rfactorial b) * rfactorial m)%K).
  { rewrite <- (gbinomial_falling K v m Hm).
    rewrite (binomial_gbinomial K v u m Hv), (binomial_to K u m b Hu Hb). ring. }
  apply (mul_cancel K (rfactorial m)); [exact (rfactorial_neq0 K m Hm)|].
  transitivity (falling v m * rfactorial m)%K; [ring|].
  rewrite E. ring.
Qed.

(** A power whose base and exponent are only spelled differently. *)
Lemma leaf_zpow x y m e : x = y -> e = m -> zpow x m = zpow y e :> K.
Proof. intros -> ->. reflexivity. Qed.

(** Nonvanishing through another spelling. *)
Lemma neq0_eq (x y : K) : x = y -> (y <> 0)%K -> (x <> 0)%K.
Proof. intros ->. exact (fun H => H). Qed.

(** A divisor with a known reciprocal. *)
Lemma divide_by (v w : K) : (v * w = inj 1)%K -> forall u : K, (u / v = u * w)%K.
Proof.
  intros E u. rewrite (div_inv K u v), (inv_unique K v w); [reflexivity|].
  rewrite E. exact (inj_1 K).
Qed.

Lemma invert_by (v w : K) : (v * w = inj 1)%K -> (/ v = w)%K.
Proof. intros E. apply (inv_unique K). rewrite E. exact (inj_1 K). Qed.

Lemma divisor_neq0 (v w : K) : (v * w = inj 1)%K -> (v <> 0)%K.
Proof.
  intros E. apply (mul_neq0_l K v w). rewrite E, inj_1. exact (one_neq0 K).
Qed.

(** Units: pairs whose product is 1. *)
Lemma unit_inv (p : K) : (p <> 0 -> p * / p = inj 1)%K.
Proof. intros H. rewrite (inv_r K p H). symmetry. exact (inj_1 K). Qed.

Lemma unit_fact m : 0 <= m -> (factorial m * rfactorial m = inj 1 :> K)%K.
Proof. intros H. apply (fact_rfact K m m H eq_refl). Qed.

Lemma unit_rfact m : 0 <= m -> (rfactorial m * factorial m = inj 1 :> K)%K.
Proof. intros H. transitivity (factorial m * rfactorial m : K)%K; [ring | exact (unit_fact m H)]. Qed.

Lemma unit_zpow (x : K) m m' : (x <> 0)%K -> m' = - m -> (zpow x m * zpow x m' = inj 1)%K.
Proof.
  intros H E. rewrite <- (zpow_inv K x m m' H E), (inv_r K _ (zpow_neq0 K x m H)).
  symmetry. exact (inj_1 K).
Qed.

Lemma unit_ip (a : K) i j :
  (forall t, i <= t < j -> (a + inj t)%K <> 0%K) -> (ip a i j * rip a i j = inj 1)%K.
Proof. intros H. rewrite (rip_ip K a i j H). symmetry. exact (inj_1 K). Qed.

Lemma unit_rip (a : K) i j :
  (forall t, i <= t < j -> (a + inj t)%K <> 0%K) -> (rip a i j * ip a i j = inj 1)%K.
Proof. intros H. transitivity (ip a i j * rip a i j)%K; [ring | exact (unit_ip a i j H)]. Qed.

(** A factor that is 1, put into one side of an equation. *)
Lemma left_by (u x y : K) : (u = inj 1)%K -> (x * u = y)%K -> x = y.
Proof. intros -> E. rewrite <- E, inj_1. ring. Qed.

Lemma right_by (u x y : K) : (u = inj 1)%K -> (x = y * u)%K -> x = y.
Proof. intros -> E. rewrite E, inj_1. ring. Qed.

End Leaves.

(** Products and powers of nonzero integers. *)
Ltac numeric_neq0 :=
  repeat lazymatch goal with
         | |- kmul _ _ <> _ => apply mul_neq0
         | |- pow _ _ <> _ => apply pow_neq0
         end;
  apply inj_neq0; lia.
