(* Support library of Sumwright. SPDX-License-Identifier: 0BSD *)

(** [values]: everything at closed integer arguments is computed; a symbolic first
    argument of a product is left in explicit products.  [field] or [ring] ends it. *)

Require Import ZArith Lia List Ring Field.
From Sumwright Require Import Statement Scalars Products Powers Factorials Progressions Sums Induction.
Local Open Scope Z_scope.

Section Values.
Variable K : char0_field.

Add Field K_field : (field_axioms K)
  (morphism (inj_morph K), constants [inj_cst],
   power_tac (pow_th K) [exponent_cst], completeness (inj_complete K)).

Implicit Types (a v : K) (m k n z : Z) (d : nat).

(** Premises of the *_at lemmas are equalities of booleans or literals, by computing. *)
Lemma factorial_at m z : (0 <=? m) = true -> zfactorial m = z -> factorial m = inj z :> K.
Proof. intros H E. apply factorial_value; [apply Z.leb_le, H | exact E]. Qed.

Lemma rfactorial_at m z :
  (0 <=? m) = true -> zfactorial m = z -> rfactorial m = (/ inj z)%K :> K.
Proof. intros H E. apply rfactorial_value; [apply Z.leb_le, H | exact E]. Qed.

Lemma rfactorial_at_neg m : (m <? 0) = true -> rfactorial m = inj 0 :> K.
Proof. intros H. apply rfact_neg, Z.ltb_lt, H. Qed.

Lemma zpow_at v m d : m = Z.of_nat d -> zpow v m = pow v d.
Proof. apply zpow_value. Qed.

Lemma zpow_at_neg v m d : m = - Z.of_nat d -> zpow v m = (/ pow v d)%K.
Proof. apply zpow_value_neg. Qed.

Lemma gbinomial_at v k d z :
  k = Z.of_nat d -> zfactorial k = z -> gbinomial v k = (falling_terms v d / inj z)%K.
Proof. apply gbinomial_value. Qed.

Lemma gbinomial_at_neg v k : (k <? 0) = true -> gbinomial v k = inj 0.
Proof. intros H. apply gbinomial_neg, Z.ltb_lt, H. Qed.

Lemma binomial_terms_at n k d z :
  k = Z.of_nat d -> zfactorial k = z -> binomial n k = (falling_terms (inj n) d / inj z)%K :> K.
Proof. apply gbinomial_value. Qed.

Lemma binomial_at_neg n k : (k <? 0) = true -> binomial n k = inj 0 :> K.
Proof. apply gbinomial_at_neg. Qed.

(** [z] is the value when z * k! is the falling product. *)
Lemma binomial_at n k d z :
  k = Z.of_nat d -> z * zfactorial k = zfalling_nat n d -> binomial n k = inj z :> K.
Proof.
  intros E V. rewrite (binomial_terms_at n k d (zfactorial k) E eq_refl).
  rewrite <- zfalling_value, <- V, inj_mul. field. apply inj_neq0, zfactorial_neq0. lia.
Qed.

Lemma rising_at v m d : m = Z.of_nat d -> rising v m = rising_terms v d.
Proof. apply rising_value. Qed.

Lemma falling_at v m d : m = Z.of_nat d -> falling v m = falling_terms v d.
Proof. apply falling_value. Qed.

Lemma ip_at a (i j : Z) d : j = i + Z.of_nat d -> ip a i j = rising_terms (a + inj i)%K d.
Proof. apply ip_value. Qed.

Lemma ip_at_empty a (i j : Z) : (j <=? i) = true -> ip a i j = inj 1.
Proof. intros H. apply ip_empty, Z.leb_le, H. Qed.

Lemma gip_at a (i j : Z) d : j = i + Z.of_nat d -> gip a i j = rising_terms (a + inj i)%K d.
Proof. intros E. rewrite gip_ip by lia. apply ip_value, E. Qed.

Lemma gip_at_inverse a (i j : Z) d :
  i = j + Z.of_nat d -> gip a i j = (/ rising_terms (a + inj j) d)%K.
Proof. intros E. rewrite gip_rip by lia. unfold rip. rewrite (ip_value K a j i d E). reflexivity. Qed.

Lemma ap_at_forward (u v i j : Z) d : j = i + Z.of_nat d -> ap u v i j = ap_terms u v i d :> K.
Proof. apply ap_at. Qed.

Lemma ap_at_backward (u v i j : Z) d :
  i = j + Z.of_nat d -> ap u v i j = (/ ap_terms u v j d)%K :> K.
Proof. apply ap_at_inverse. Qed.

Lemma rip_at a (i j : Z) d : j = i + Z.of_nat d -> rip a i j = (/ rising_terms (a + inj i) d)%K.
Proof. intros E. unfold rip. rewrite (ip_value K a i j d E). reflexivity. Qed.

End Values.

(** Fails unless t is built from literals. *)
Ltac closed_Z t :=
  lazymatch isZcst t with
  | true => idtac
  | _ =>
      lazymatch t with
      | (?a + ?b)%Z => closed_Z a; closed_Z b
      | (?a - ?b)%Z => closed_Z a; closed_Z b
      | (?a * ?b)%Z => closed_Z a; closed_Z b
      | (?a / ?b)%Z => closed_Z a; closed_Z b
      | (?a ^ ?b)%Z => closed_Z a; closed_Z b
      | (- ?a)%Z => closed_Z a
      | Z.min ?a ?b => closed_Z a; closed_Z b
      | Z.max ?a ?b => closed_Z a; closed_Z b
      | Z.of_nat ?n => lazymatch isnatcst n with true => idtac end
      | _ => fail "not a closed integer"
      end
  end.

Ltac compute_eq := vm_compute; reflexivity.

(** The sign of a closed integer, as a term of type [bool]. *)
Ltac nonneg_Z t := eval vm_compute in (Z.leb 0 t).

Ltac value_step :=
  match goal with
  | |- context [@sum ?K ?lo ?hi ?f] =>
      closed_Z lo; closed_Z hi;
      let l := eval vm_compute in (z_points lo (Z.to_nat (hi - lo + 1))) in
      rewrite (sum_explicit K lo hi l f) by list_range; sum_terms_cbn
  | |- context [@factorial ?K ?m] =>
      closed_Z m;
      let z := eval vm_compute in (zfactorial m) in
      rewrite (factorial_at K m z) by compute_eq
  | |- context [@rfactorial ?K ?m] =>
      closed_Z m;
      lazymatch nonneg_Z m with
      | true => let z := eval vm_compute in (zfactorial m) in
                rewrite (rfactorial_at K m z) by compute_eq
      | _ => rewrite (rfactorial_at_neg K m) by compute_eq
      end
  | |- context [@zpow ?K ?v ?m] =>
      closed_Z m;
      lazymatch nonneg_Z m with
      | true => let d := eval vm_compute in (Z.to_nat m) in rewrite (zpow_at K v m d) by compute_eq
      | _ => let d := eval vm_compute in (Z.to_nat (- m)) in
             rewrite (zpow_at_neg K v m d) by compute_eq
      end
  | |- context [@binomial ?K ?n ?k] =>
      closed_Z k;
      lazymatch nonneg_Z k with
      | true =>
          let d := eval vm_compute in (Z.to_nat k) in
          first [ closed_Z n;
                  let z := eval vm_compute in (zbinomial n k) in
                  rewrite (binomial_at K n k d z) by compute_eq
                | let z := eval vm_compute in (zfactorial k) in
                  rewrite (binomial_terms_at K n k d z) by compute_eq ]
      | _ => rewrite (binomial_at_neg K n k) by compute_eq
      end
  | |- context [@gbinomial ?K ?v ?k] =>
      closed_Z k;
      lazymatch nonneg_Z k with
      | true =>
          let d := eval vm_compute in (Z.to_nat k) in
          let z := eval vm_compute in (zfactorial k) in
          rewrite (gbinomial_at K v k d z) by compute_eq
      | _ => rewrite (gbinomial_at_neg K v k) by compute_eq
      end
  | |- context [@rising ?K ?v ?m] =>
      closed_Z m;
      let d := eval vm_compute in (Z.to_nat m) in rewrite (rising_at K v m d) by compute_eq
  | |- context [@falling ?K ?v ?m] =>
      closed_Z m;
      let d := eval vm_compute in (Z.to_nat m) in rewrite (falling_at K v m d) by compute_eq
  | |- context [@ip ?K ?a ?i ?j] =>
      closed_Z i; closed_Z j;
      lazymatch nonneg_Z (j - i) with
      | true => let d := eval vm_compute in (Z.to_nat (j - i)) in
                rewrite (ip_at K a i j d) by compute_eq
      | _ => rewrite (ip_at_empty K a i j) by compute_eq
      end
  | |- context [@gip ?K ?a ?i ?j] =>
      closed_Z i; closed_Z j;
      lazymatch nonneg_Z (j - i) with
      | true => let d := eval vm_compute in (Z.to_nat (j - i)) in
                rewrite (gip_at K a i j d) by compute_eq
      | _ => let d := eval vm_compute in (Z.to_nat (i - j)) in
             rewrite (gip_at_inverse K a i j d) by compute_eq
      end
  | |- context [@ap ?K ?u ?v ?i ?j] =>
      closed_Z i; closed_Z j;
      lazymatch nonneg_Z (j - i) with
      | true => let d := eval vm_compute in (Z.to_nat (j - i)) in
                rewrite (ap_at_forward K u v i j d) by compute_eq
      | _ => let d := eval vm_compute in (Z.to_nat (i - j)) in
             rewrite (ap_at_backward K u v i j d) by compute_eq
      end
  | |- context [@rip ?K ?a ?i ?j] =>
      closed_Z i; closed_Z j;
      let d := eval vm_compute in (Z.to_nat (j - i)) in rewrite (rip_at K a i j d) by compute_eq
  end.

Ltac values := repeat value_step; cbn [rising_terms falling_terms ap_terms]; inj_norm.
