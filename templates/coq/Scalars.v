(* Support library of Sumwright. SPDX-License-Identifier: 0BSD *)

(** Arithmetic in a field of characteristic zero: the morphism [inj], cancelling,
    products that are nonzero, and the data that [Add Field] wants. *)

Require Import ZArith Lia Ring Ring_theory Field Field_theory.
From Sumwright Require Import Statement.
Local Open Scope Z_scope.

(** What [ring] takes for a coefficient: [inj] of an integer literal. *)
Ltac inj_cst t :=
  match t with
  | @inj _ ?z =>
      match isZcst z with
      | true => z
      | _ =>
          match z with
          | Z.of_nat ?n =>
              match isnatcst n with
              | true => eval compute in (Z.of_nat n)
              | _ => constr:(InitialRing.NotConstant)
              end
          | _ => constr:(InitialRing.NotConstant)
          end
      end
  | _ => constr:(InitialRing.NotConstant)
  end.

(** What [ring] takes for an exponent: a literal of type [nat]. *)
Ltac exponent_cst t :=
  match isnatcst t with
  | true => eval compute in (N.of_nat t)
  | _ => constr:(InitialRing.NotConstant)
  end.

Section Morphism.
Variable K : char0_field.

Lemma k_ring : ring_theory (@kzero K) kone kadd kmul ksub kopp eq.
Proof. exact (F_R (field_axioms K)). Qed.

Lemma inj_is_gen_phiZ (z : Z) :
  inj z = InitialRing.gen_phiZ kzero kone (@kadd K) kmul kopp z.
Proof.
  rewrite (InitialRing.same_genZ (Eqsth K) (Eq_ext kadd kmul kopp) k_ring).
  destruct z as [|p|p]; reflexivity.
Qed.

Lemma inj_morph :
  ring_morph (@kzero K) kone kadd kmul ksub kopp eq
             0%Z 1%Z Z.add Z.mul Z.sub Z.opp Z.eqb inj.
Proof.
  destruct (InitialRing.gen_phiZ_morph (Eqsth K) (Eq_ext kadd kmul kopp) k_ring)
    as [m0 m1 ma ms mm mo _].
  constructor; intros; rewrite ?inj_is_gen_phiZ; auto.
  f_equal. apply Z.eqb_eq. assumption.
Qed.

Add Ring K_ring : k_ring (morphism inj_morph, constants [inj_cst]).

Lemma inj_add (a b : Z) : inj (a + b) = (inj a + inj b)%K :> K.
Proof. exact (morph_add inj_morph a b). Qed.

Lemma inj_sub (a b : Z) : inj (a - b) = (inj a - inj b)%K :> K.
Proof. exact (morph_sub inj_morph a b). Qed.

Lemma inj_mul (a b : Z) : inj (a * b) = (inj a * inj b)%K :> K.
Proof. exact (morph_mul inj_morph a b). Qed.

Lemma inj_opp (a : Z) : inj (- a) = (- inj a)%K :> K.
Proof. exact (morph_opp inj_morph a). Qed.

Lemma inj_0 : inj 0 = (0)%K :> K.
Proof. reflexivity. Qed.

Lemma inj_1 : inj 1 = (1)%K :> K.
Proof. reflexivity. Qed.

Lemma inj_succ_nat (n : nat) : inj (Z.of_nat (S n)) = (inj (Z.of_nat n) + 1)%K :> K.
Proof. rewrite Nat2Z.inj_succ, <- Z.add_1_r, inj_add. reflexivity. Qed.

Lemma inj_pow_nat (a : Z) (n : nat) : inj (a ^ Z.of_nat n) = pow (inj a) n :> K.
Proof.
  induction n as [|n IH]; [reflexivity|].
  rewrite Nat2Z.inj_succ, Z.pow_succ_r, inj_mul, IH by lia. simpl. ring.
Qed.

Lemma inj_of_nat (n : nat) : inj (Z.of_nat n) = multiple_of_one (@kzero K) kone kadd n.
Proof.
  induction n as [|n IH]; [reflexivity|].
  rewrite inj_succ_nat, IH. reflexivity.
Qed.

Lemma one_neq0 : ((1 : K) <> 0)%K.
Proof. exact (F_1_neq_0 (field_axioms K)). Qed.

Lemma inv_l (x : K) : (x <> 0 -> / x * x = 1)%K.
Proof. exact (Finv_l (field_axioms K) x). Qed.

Lemma inv_r (x : K) : (x <> 0 -> x * / x = 1)%K.
Proof. intros H. rewrite <- (inv_l x H). ring. Qed.

Lemma div_inv (x y : K) : (x / y = x * / y)%K.
Proof. exact (Fdiv_def (field_axioms K) x y). Qed.

Lemma inj_neq0 (z : Z) : z <> 0 -> inj z <> (0 : K)%K.
Proof.
  assert (P : forall p, inj (Zpos p) <> (0 : K)%K).
  { intros p. rewrite <- (positive_nat_Z p), inj_of_nat.
    destruct (Pos2Nat.is_succ p) as [n ->]. exact (char0_axiom K n). }
  destruct z as [|p|p]; intros H.
  - contradiction.
  - exact (P p).
  - change (Zneg p) with (- Zpos p). rewrite inj_opp. intros E. apply (P p).
    assert (T : inj (Zpos p) = (- - inj (Zpos p))%K :> K) by ring. rewrite T, E. ring.
Qed.

Lemma inj_inj (a b : Z) : inj a = inj b :> K -> a = b.
Proof.
  intros E. destruct (Z.eq_dec (a - b) 0) as [H|H]; [lia|].
  exfalso. apply (inj_neq0 _ H). rewrite inj_sub, E. ring.
Qed.

Lemma inj_complete (a b : Z) : inj a = inj b :> K -> Z.eqb a b = true.
Proof. intros E. apply inj_inj in E. subst. apply Z.eqb_refl. Qed.

Lemma pow_add (x : K) (a b : nat) : pow x (a + b) = (pow x a * pow x b)%K.
Proof.
  induction b as [|b IH]; simpl.
  - rewrite Nat.add_0_r. ring.
  - rewrite Nat.add_succ_r. simpl. rewrite IH. ring.
Qed.

Lemma pow_th : power_theory (@kone K) kmul eq N.to_nat pow.
Proof.
  constructor. intros x [|p]; [reflexivity|]. cbn [N.to_nat pow_N].
  induction p as [p IH|p IH|]; cbn [pow_pos].
  - rewrite Pos2Nat.inj_xI. cbn [pow Nat.mul]. rewrite Nat.add_0_r, pow_add, IH. ring.
  - rewrite Pos2Nat.inj_xO. cbn [Nat.mul]. rewrite Nat.add_0_r, pow_add, IH. ring.
  - change (Pos.to_nat 1) with 1%nat. cbn [pow]. ring.
Qed.

End Morphism.

Section Fields.
Variable K : char0_field.

Add Field K_field : (field_axioms K)
  (morphism (inj_morph K), constants [inj_cst],
   power_tac (pow_th K) [exponent_cst], completeness (inj_complete K)).

Implicit Types c u v w x y : K.

(** Equality by ring arithmetic for arguments of *_to lemmas: [v = inj z]. *)
Lemma neq0_by x (z : Z) : x = inj z -> z <> 0 -> (x <> 0)%K.
Proof. intros -> H. exact (inj_neq0 K z H). Qed.

(** The same for a value z/d. *)
Lemma neq0_by_quotient x (z d : Z) : (x * inj d = inj z)%K -> z <> 0 -> (x <> 0)%K.
Proof. intros E H ->. apply (inj_neq0 K z H). rewrite <- E. ring. Qed.

(** The same from an exclusion of the claim: [x] differs from every integer, say. *)
Lemma neq0_sub x y v : (x <> y -> v = x - y -> v <> 0)%K.
Proof. intros N -> E. apply N. transitivity (x - y + y)%K; [ring|]. rewrite E. ring. Qed.

(** [v] is c * (x - y) with c <> 0. *)
Lemma neq0_scaled c x y v : (c <> 0 -> x <> y -> v = c * (x - y) -> v <> 0)%K.
Proof.
  intros C N -> E. apply N.
  transitivity (/ c * (c * (x - y)) + y)%K; [field; exact C|]. rewrite E. ring.
Qed.

Lemma mul_neq0 x y : (x <> 0 -> y <> 0 -> x * y <> 0)%K.
Proof.
  intros X Y E. apply Y. transitivity (/ x * (x * y))%K; [field; exact X|].
  rewrite E. ring.
Qed.

Lemma mul_neq0_l x y : (x * y <> 0 -> x <> 0)%K.
Proof. intros H ->. apply H. ring. Qed.

Lemma mul_neq0_r x y : (x * y <> 0 -> y <> 0)%K.
Proof. intros H ->. apply H. ring. Qed.

Lemma opp_neq0 x : (x <> 0 -> - x <> 0)%K.
Proof. intros X E. apply X. transitivity (- - x)%K; [ring|]. rewrite E. ring. Qed.

Lemma inv_neq0 x : (x <> 0 -> / x <> 0)%K.
Proof.
  intros X E. apply (one_neq0 K). rewrite <- (inv_l K x X), E. ring.
Qed.

Lemma pow_neq0 x (n : nat) : (x <> 0 -> pow x n <> 0)%K.
Proof.
  intros X. induction n as [|n IH]; [exact (one_neq0 K)|].
  exact (mul_neq0 _ _ IH X).
Qed.

Lemma mul_cancel c x y : (c <> 0 -> c * x = c * y -> x = y)%K.
Proof.
  intros C E. transitivity (/ c * (c * x))%K; [field; exact C|].
  rewrite E. field. exact C.
Qed.

Lemma mul_eq0 c x : (c <> 0 -> c * x = 0 -> x = 0)%K.
Proof. intros C E. apply (mul_cancel c); [exact C|]. rewrite E. ring. Qed.

Lemma eq_of_sub x y : (x - y = 0 -> x = y)%K.
Proof. intros E. transitivity (x - y + y)%K; [ring|]. rewrite E. ring. Qed.

Lemma inv_unique x y : (x * y = 1 -> / x = y)%K.
Proof.
  intros E. assert (X : (x <> 0)%K).
  { intros ->. apply (one_neq0 K). rewrite <- E. ring. }
  apply (mul_cancel x); [exact X|]. rewrite E. apply inv_r, X.
Qed.

Lemma inv_mul x y : (x <> 0 -> y <> 0 -> / (x * y) = / x * / y)%K.
Proof. intros X Y. field. split; assumption. Qed.

Lemma inv_inv x : (x <> 0 -> / / x = x)%K.
Proof. intros X. apply inv_unique. apply inv_l, X. Qed.

Lemma inv_pow x (n : nat) : (x <> 0)%K -> (/ pow x n)%K = pow (/ x)%K n.
Proof.
  intros X. apply inv_unique. induction n as [|n IH]; simpl; [ring|].
  transitivity ((pow x n * pow (/ x) n) * (x * / x))%K; [ring|].
  rewrite IH, (inv_r K x X). ring.
Qed.

(** A factor 1 put in, and the factor w put into 1/v. *)
Lemma insert_unit u x : (u = 1 -> x = x * u)%K.
Proof. intros ->. ring. Qed.

Lemma inv_insert v w : (w <> 0 -> / v = w * (/ v * / w))%K.
Proof. intros W. transitivity (/ v * (w * / w))%K; [rewrite (inv_r K w W)|]; ring. Qed.

(** 1/v at another spelling of v, or at a multiple c * v. *)
Lemma inv_to v v' c : (v <> 0 -> c <> 0 -> c * v' = v -> / v' = c * / v)%K.
Proof.
  intros V C E. subst v. assert (V' : (v' <> 0)%K) by exact (mul_neq0_r _ _ V).
  field. split; assumption.
Qed.

(** Reciprocals of linear forms: v is free of the integer variables, m is all the rest. *)
Definition rlin (v : K) (m : Z) : K := (/ (v + inj m))%K.

Lemma rlin_of w v (m : Z) : (w = v + inj m -> / w = rlin v m)%K.
Proof. intros ->. reflexivity. Qed.

(** 1/w for w = c (v + m). *)
Lemma rlin_scaled w c v (m : Z) :
  (c <> 0 -> v + inj m <> 0 -> w = c * (v + inj m) -> / w = / c * rlin v m)%K.
Proof. intros C N ->. apply inv_mul; assumption. Qed.

Lemma rlin_to v v' (m m' : Z) : v' = v -> m' = m -> rlin v' m' = rlin v m.
Proof. intros -> ->. reflexivity. Qed.

Lemma rlin_unit v (m : Z) : ((v + inj m <> 0) -> (v + inj m) * rlin v m = 1)%K.
Proof. apply inv_r. Qed.

(** A unit (v + m) / (v + m) put into one side of an equation: how a side that lacks
    a reciprocal gets it. *)
Lemma left_unit v (m : Z) x y :
  (v + inj m <> 0 -> x * ((v + inj m) * rlin v m) = y -> x = y)%K.
Proof. intros N <-. rewrite (rlin_unit v m N). ring. Qed.

Lemma right_unit v (m : Z) x y :
  (v + inj m <> 0 -> x = y * ((v + inj m) * rlin v m) -> x = y)%K.
Proof. intros N ->. rewrite (rlin_unit v m N). ring. Qed.

(** The same for any denominator u. *)
Lemma left_unit_inv u x y : (u <> 0 -> x * (u * / u) = y -> x = y)%K.
Proof. intros N <-. rewrite (inv_r K u N). ring. Qed.

Lemma right_unit_inv u x y : (u <> 0 -> x = y * (u * / u) -> x = y)%K.
Proof. intros N ->. rewrite (inv_r K u N). ring. Qed.

(** Exclusions of the claim at work: x differs from every integer, from those > 0, ... *)
Lemma neq0_integers x (v : K) (t : Z) : (forall z : Z, x <> inj z) -> (v = x - inj t -> v <> 0)%K.
Proof. intros N E. exact (neq0_sub x (inj t) v (N t) E). Qed.

Lemma neq0_integers_such (P : Z -> Prop) x (v : K) (t : Z) :
  (forall z : Z, P z -> x <> inj z) -> P t -> (v = x - inj t -> v <> 0)%K.
Proof. intros N T E. exact (neq0_sub x (inj t) v (N t T) E). Qed.

Lemma pow_one (n : nat) : pow (1 : K)%K n = (1 : K)%K.
Proof. induction n as [|n IH]; simpl; [reflexivity|]. rewrite IH. ring. Qed.

Lemma pow_mul_base x y (n : nat) : pow (x * y)%K n = (pow x n * pow y n)%K.
Proof. induction n as [|n IH]; simpl; [ring|]. rewrite IH. ring. Qed.

Lemma pow_pow x (a b : nat) : pow (pow x a) b = pow x (a * b).
Proof.
  induction b as [|b IH]; simpl.
  - rewrite Nat.mul_0_r. reflexivity.
  - rewrite IH, Nat.mul_succ_r, (pow_add K). reflexivity.
Qed.

(** a (a + 1) ..., a (a - 1) ... and (u + v j) (u + v (j + 1)) ..., d factors of each:
    explicit products for a literal d. *)
Fixpoint rising_terms (a : K) (d : nat) : K :=
  match d with
  | O => 1
  | S e => rising_terms a e * (a + inj (Z.of_nat e))
  end%K.

Fixpoint falling_terms (a : K) (d : nat) : K :=
  match d with
  | O => 1
  | S e => falling_terms a e * (a - inj (Z.of_nat e))
  end%K.

Fixpoint ap_terms (u v j : Z) (d : nat) : K :=
  match d with
  | O => inj 1
  | S e => (ap_terms u v j e * inj (u + v * (j + Z.of_nat e)))%K
  end.

End Fields.

Arguments rlin {K} v%K m%Z.
Arguments rising_terms {K} a%K d%nat.
Arguments falling_terms {K} a%K d%nat.
Arguments ap_terms {K} (u v j)%Z d%nat.

(** [inj_norm]: every [inj] of a compound integer term becomes a polynomial in
    [inj] of its atoms.  One proof term for each such subterm, by reflection. *)
Inductive zexpr : Type :=
| ZAtom (z : Z)
| ZAdd (a b : zexpr)
| ZSub (a b : zexpr)
| ZMul (a b : zexpr)
| ZOpp (a : zexpr)
| ZPow (a : zexpr) (n : nat).

Fixpoint z_value (e : zexpr) : Z :=
  match e with
  | ZAtom z => z
  | ZAdd a b => z_value a + z_value b
  | ZSub a b => z_value a - z_value b
  | ZMul a b => z_value a * z_value b
  | ZOpp a => - z_value a
  | ZPow a n => z_value a ^ Z.of_nat n
  end.

Fixpoint k_value (K : char0_field) (e : zexpr) : K :=
  match e with
  | ZAtom z => inj z
  | ZAdd a b => k_value K a + k_value K b
  | ZSub a b => k_value K a - k_value K b
  | ZMul a b => k_value K a * k_value K b
  | ZOpp a => - k_value K a
  | ZPow a n => pow (k_value K a) n
  end%K.

Lemma inj_value (K : char0_field) (e : zexpr) : inj (z_value e) = k_value K e.
Proof.
  induction e; simpl; rewrite ?inj_add, ?inj_sub, ?inj_mul, ?inj_opp, ?inj_pow_nat; congruence.
Qed.

Ltac reify_Z t :=
  match isZcst t with
  | true => constr:(ZAtom t)
  | _ =>
      match t with
      | (?a + ?b)%Z => let x := reify_Z a in let y := reify_Z b in constr:(ZAdd x y)
      | (?a - ?b)%Z => let x := reify_Z a in let y := reify_Z b in constr:(ZSub x y)
      | (?a * ?b)%Z => let x := reify_Z a in let y := reify_Z b in constr:(ZMul x y)
      | (- ?a)%Z => let x := reify_Z a in constr:(ZOpp x)
      | Z.succ ?a => let x := reify_Z a in constr:(ZAdd x (ZAtom 1))
      | Z.pred ?a => let x := reify_Z a in constr:(ZSub x (ZAtom 1))
      | (?a ^ ?n)%Z =>
          match isZcst n with
          | true =>
              let x := reify_Z a in
              let m := eval compute in (Z.to_nat n) in
              constr:(ZPow x m)
          | _ => constr:(ZAtom t)
          end
      | Z.of_nat ?n =>
          match isnatcst n with
          | true => let z := eval compute in (Z.of_nat n) in constr:(ZAtom z)
          | _ => constr:(ZAtom t)
          end
      | _ => constr:(ZAtom t)
      end
  end.

Ltac inj_norm_term K t :=
  let e := reify_Z t in
  lazymatch e with
  | ZAtom t => fail
  | _ =>
      let r := eval cbn [k_value] in (k_value K e) in
      let H := fresh "inj_value" in
      assert (H : @inj K t = r) by exact (inj_value K e);
      rewrite H; clear H
  end.

Ltac inj_norm :=
  repeat match goal with |- context [@inj ?K ?t] => progress inj_norm_term K t end.

(** Equality of polynomials in K whose atoms are integers, parameters and K-valued terms. *)
Ltac pq := cbn [rising_terms falling_terms ap_terms]; inj_norm; ring.

(** The same where constant denominators occur, 1/2 say. *)
Ltac pqf := cbn [rising_terms falling_terms ap_terms]; inj_norm; field.

(** Indices that contain a division by a literal, a minimum or a maximum. *)
Ltac index := first [lia | Z.div_mod_to_equations; lia].

(** From [E : c0 * r0 + ... = s1 - s0] to the same equation with a common factor b:
    the goal is [c0 * (r0 * b) + ... = s1 * b - s0 * b]. *)
Ltac comb b E :=
  lazymatch type of E with
  | @eq _ ?l ?r =>
      transitivity (kmul l b);
      [ ring | transitivity (kmul r b); [ apply (f_equal (fun t => kmul t b)); exact E | ring ] ]
  end.

Global Opaque inj.
