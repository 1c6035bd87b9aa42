(* Support library of Sumwright. SPDX-License-Identifier: 0BSD *)

(** Polynomial functions of one variable in K: what holds outside the zeros of a
    polynomial that is somewhere nonzero holds everywhere. *)

Require Import ZArith Lia List Ring Field.
From Sumwright Require Import Statement Scalars Products Factorials Sums.
Import ListNotations.
Local Open Scope Z_scope.

Section Polynomials.
Variable K : char0_field.

Add Field K_field : (field_axioms K)
  (morphism (inj_morph K), constants [inj_cst],
   power_tac (pow_th K) [exponent_cst], completeness (inj_complete K)).

Implicit Types (cs ds : list K) (x y r : K) (f g : K -> K).

(** Coefficients from the constant one upwards. *)
Fixpoint eval_poly (cs : list K) (x : K) : K :=
  match cs with
  | nil => 0
  | c :: rest => c + x * eval_poly rest x
  end%K.

Definition polynomial (f : K -> K) : Prop := exists cs, forall x, f x = eval_poly cs x.

(** ** Closure *)

Lemma polynomial_ext f g : (forall x, g x = f x) -> polynomial f -> polynomial g.
Proof. intros E [cs C]. exists cs. intros x. rewrite E. apply C. Qed.

Lemma polynomial_const (c : K) : polynomial (fun _ => c).
Proof. exists [c]. intros x. cbn. ring. Qed.

Lemma polynomial_var : polynomial (fun x => x).
Proof. exists [0%K; 1%K]. intros x. cbn. ring. Qed.

Lemma polynomial_scal (c : K) f : polynomial f -> polynomial (fun x => c * f x)%K.
Proof.
  intros [cs C]. exists (map (kmul c) cs). intros x. rewrite C.
  induction cs as [|d rest IH] in C |- *; cbn; [ring|].
  clear C. transitivity (c * d + x * (c * eval_poly rest x))%K; [ring|].
  f_equal. f_equal. clear. induction rest as [|d rest IH]; cbn; [ring|]. rewrite <- IH. ring.
Qed.

Lemma polynomial_add f g : polynomial f -> polynomial g -> polynomial (fun x => f x + g x)%K.
Proof.
  intros [cs C] [ds D].
  assert (A : exists es, forall x, (eval_poly cs x + eval_poly ds x)%K = eval_poly es x).
  { clear. revert ds. induction cs as [|c cs IH]; intros ds.
    - exists ds. intros x. cbn. ring.
    - destruct ds as [|d ds].
      + exists (c :: cs). intros x. cbn. ring.
      + destruct (IH ds) as [es E]. exists ((c + d)%K :: es). intros x. cbn.
        rewrite <- E. ring. }
  destruct A as [es E]. exists es. intros x. rewrite C, D. apply E.
Qed.

Lemma polynomial_shift_up f : polynomial f -> polynomial (fun x => x * f x)%K.
Proof. intros [cs C]. exists (0%K :: cs). intros x. cbn. rewrite C. ring. Qed.

Lemma polynomial_mul f g : polynomial f -> polynomial g -> polynomial (fun x => f x * g x)%K.
Proof.
  intros [cs C] G.
  apply (polynomial_ext (fun x => eval_poly cs x * g x)%K).
  { intros x. rewrite C. reflexivity. }
  clear C f. induction cs as [|c rest IH]; cbn [eval_poly].
  - apply (polynomial_ext (fun _ => 0%K)); [intros x; ring | apply polynomial_const].
  - apply (polynomial_ext (fun x => c * g x + x * (eval_poly rest x * g x))%K); [intros x; ring|].
    apply polynomial_add; [apply polynomial_scal, G | apply polynomial_shift_up, IH].
Qed.

Lemma polynomial_opp f : polynomial f -> polynomial (fun x => - f x)%K.
Proof.
  intros F. apply (polynomial_ext (fun x => inj (-1) * f x)%K); [intros x; ring|].
  apply polynomial_scal, F.
Qed.

Lemma polynomial_sub f g : polynomial f -> polynomial g -> polynomial (fun x => f x - g x)%K.
Proof.
  intros F G. apply (polynomial_ext (fun x => f x + - g x)%K); [intros x; ring|].
  apply polynomial_add; [exact F | apply polynomial_opp, G].
Qed.

(** By a constant, whatever its value. *)
Lemma polynomial_div f (c : K) : polynomial f -> polynomial (fun x => f x / c)%K.
Proof.
  intros F. apply (polynomial_ext (fun x => / c * f x)%K);
    [intros x; rewrite (div_inv K); ring | apply polynomial_scal, F].
Qed.

Lemma polynomial_pow f (n : nat) : polynomial f -> polynomial (fun x => pow (f x) n).
Proof.
  intros F. induction n as [|n IH]; cbn [pow]; [apply polynomial_const|].
  apply polynomial_mul; assumption.
Qed.

Lemma polynomial_sum lo hi (f : Z -> K -> K) :
  (forall k, lo <= k <= hi -> polynomial (f k)) -> polynomial (fun x => sum lo hi (fun k => f k x)).
Proof.
  pattern hi. apply (range_length_ind lo); clear hi; intros hi H.
  - intros _. apply (polynomial_ext (fun _ => 0%K)); [|apply polynomial_const].
    intros x. apply sum_empty. exact H.
  - intros IH P.
    apply (polynomial_ext (fun x => sum lo (hi - 1) (fun k => f k x) + f hi x)%K).
    { intros x. apply sum_last_pred. exact H. }
    apply polynomial_add; [apply IH; intros; apply P; lia | apply P; lia].
Qed.

Lemma polynomial_product lo hi (f : Z -> K -> K) :
  (forall k, lo <= k <= hi -> polynomial (f k)) ->
  polynomial (fun x => product lo hi (fun k => f k x)).
Proof.
  pattern hi. apply (range_length_ind lo); clear hi; intros hi H.
  - intros _. apply (polynomial_ext (fun _ => inj 1)); [|apply polynomial_const].
    intros x. apply product_empty. exact H.
  - intros IH P.
    apply (polynomial_ext (fun x => product lo (hi - 1) (fun k => f k x) * f hi x)%K).
    { intros x. apply product_last. exact H. }
    apply polynomial_mul; [apply IH; intros; apply P; lia | apply P; lia].
Qed.

Lemma polynomial_ip f i j : polynomial f -> polynomial (fun x => ip (f x) i j).
Proof.
  intros F. apply (polynomial_product i (j - 1) (fun t x => f x + inj t)%K). intros t _.
  apply polynomial_add; [exact F | apply polynomial_const].
Qed.

Lemma polynomial_rising f m : polynomial f -> polynomial (fun x => rising (f x) m).
Proof.
  intros F. apply (polynomial_product 0 (m - 1) (fun t x => f x + inj t)%K). intros t _.
  apply polynomial_add; [exact F | apply polynomial_const].
Qed.

Lemma polynomial_falling f m : polynomial f -> polynomial (fun x => falling (f x) m).
Proof.
  intros F. apply (polynomial_product 0 (m - 1) (fun t x => f x - inj t)%K). intros t _.
  apply polynomial_sub; [exact F | apply polynomial_const].
Qed.

Lemma polynomial_gbinomial f m : polynomial f -> polynomial (fun x => gbinomial (f x) m).
Proof.
  intros F. destruct (Z_lt_ge_dec m 0).
  - apply (polynomial_ext (fun _ => inj 0)); [|apply polynomial_const].
    intros x. apply gbinomial_neg. exact l.
  - apply (polynomial_ext (fun x => falling (f x) m * rfactorial m)%K).
    { intros x. apply gbinomial_falling. lia. }
    apply polynomial_mul; [apply polynomial_falling, F | apply polynomial_const].
Qed.

Lemma polynomial_zpow f e : 0 <= e -> polynomial f -> polynomial (fun x => zpow (f x) e).
Proof.
  intros H F. apply (polynomial_ext (fun x => pow (f x) (Z.to_nat e))).
  - intros x. unfold zpow. destruct (Z.ltb_spec e 0); [lia | reflexivity].
  - apply polynomial_pow, F.
Qed.

(** ** Zeros *)

(** Division by x - r, by Horner's scheme. *)
Lemma divide cs r :
  exists ds, (length ds <= pred (length cs))%nat /\
             forall x, eval_poly cs x = (eval_poly cs r + (x - r) * eval_poly ds x)%K.
Proof.
  induction cs as [|c rest IH].
  - exists nil. split; [cbn; lia|]. intros x. cbn. ring.
  - destruct IH as [ds [L D]]. destruct rest as [|c' rest].
    + exists nil. split; [cbn; lia|]. intros x. cbn. ring.
    + exists (eval_poly (c' :: rest) r :: ds). split; [cbn [length pred] in *; lia|].
      intros x. cbn [eval_poly] in *. rewrite (D x). ring.
Qed.

Lemma zero_by_points cs r :
  (forall j : Z, 0 < j -> eval_poly cs (r + inj j) = 0%K) -> forall x, eval_poly cs x = 0%K.
Proof.
  assert (A : forall (n : nat) cs r, (length cs <= n)%nat ->
    (forall j : Z, 0 < j -> eval_poly cs (r + inj j) = 0%K) -> forall x, eval_poly cs x = 0%K).
  { clear. induction n as [|n IH]; intros cs r L H x.
    - destruct cs; [reflexivity | cbn in L; lia].
    - destruct (divide cs (r + inj 1)%K) as [ds [M D]].
      assert (Z1 : eval_poly cs (r + inj 1)%K = 0%K) by (apply H; lia).
      rewrite D, Z1, (IH ds (r + inj 1)%K); [ring | lia |].
      intros j J. apply (mul_eq0 K (inj j)); [apply inj_neq0; lia|].
      transitivity (eval_poly cs (r + inj (1 + j))%K); [|apply H; lia].
      rewrite (D (r + inj (1 + j))%K), Z1, inj_add.
      replace (r + (inj 1 + inj j))%K with (r + inj 1 + inj j)%K by ring. ring. }
  apply (A (length cs)). exact (Nat.le_refl _).
Qed.

(** Zero at r + 1, r + 2, ...: zero everywhere. *)
Theorem polynomial_zero f r :
  polynomial f -> (forall j : Z, 0 < j -> f (r + inj j)%K = 0%K) -> forall x, f x = 0%K.
Proof.
  intros [cs C] H x. rewrite C. apply (zero_by_points cs r). intros j J. rewrite <- C. apply H, J.
Qed.

(** A polynomial factor that is nonzero somewhere cancels everywhere. *)
Theorem polynomial_cancel f g x0 :
  polynomial f -> polynomial g -> f x0 <> 0%K -> (forall x, (f x * g x = 0)%K) ->
  forall x, g x = 0%K.
Proof.
  intros F [ds D] N.
  assert (A : forall (n : nat) ds, (length ds <= n)%nat ->
    (forall x, (f x * eval_poly ds x = 0)%K) -> forall x, eval_poly ds x = 0%K).
  { clear - F N. induction n as [|n IH]; intros ds L H x.
    - destruct ds; [reflexivity | cbn in L; lia].
    - destruct (divide ds x0) as [es [M E]].
      assert (Z0 : eval_poly ds x0 = 0%K) by exact (mul_eq0 K _ _ N (H x0)).
      rewrite E, Z0. rewrite (IH es); [ring | lia |].
      apply (polynomial_zero (fun t => f t * eval_poly es t)%K x0).
      + apply polynomial_mul; [exact F | exists es; reflexivity].
      + intros j J. apply (mul_eq0 K (inj j)); [apply inj_neq0; lia|].
        transitivity (f (x0 + inj j) * eval_poly ds (x0 + inj j))%K; [|apply H].
        rewrite (E (x0 + inj j)%K), Z0. ring. }
  intros H x. rewrite D. apply (A (length ds) ds); [exact (Nat.le_refl _)|].
  intros y. rewrite <- D. apply H.
Qed.

(** The form used for claims: two sides that agree at r + 1, r + 2, ... agree everywhere. *)
Theorem continuation f g r :
  polynomial f -> polynomial g -> (forall j : Z, 0 < j -> f (r + inj j)%K = g (r + inj j)%K) ->
  forall x, f x = g x.
Proof.
  intros F G H x. apply (eq_of_sub K).
  apply (polynomial_zero (fun t => f t - g t)%K r (polynomial_sub f g F G)).
  intros j J. rewrite (H j J). ring.
Qed.

End Polynomials.

Arguments polynomial {K} f.

(** [polynomial f] by the form of f. *)
Ltac polynomial_of :=
  first
  [ apply polynomial_var
  | apply polynomial_const
  | lazymatch goal with
    | |- polynomial (fun x => kadd _ _) => apply polynomial_add; polynomial_of
    | |- polynomial (fun x => ksub _ _) => apply polynomial_sub; polynomial_of
    | |- polynomial (fun x => kmul _ _) => apply polynomial_mul; polynomial_of
    | |- polynomial (fun x => kopp _) => apply polynomial_opp; polynomial_of
    | |- polynomial (fun x => kdiv _ _) => apply polynomial_div; polynomial_of
    | |- polynomial (fun x => pow _ _) => apply polynomial_pow; polynomial_of
    | |- polynomial (fun x => zpow _ _) => apply polynomial_zpow; [lia | polynomial_of]
    | |- polynomial (fun x => ip _ _ _) => apply polynomial_ip; polynomial_of
    | |- polynomial (fun x => rising _ _) => apply polynomial_rising; polynomial_of
    | |- polynomial (fun x => falling _ _) => apply polynomial_falling; polynomial_of
    | |- polynomial (fun x => gbinomial _ _) => apply polynomial_gbinomial; polynomial_of
    | |- polynomial (fun x => sum _ _ (fun k => @?f x k)) =>
        apply (polynomial_sum _ _ _ (fun k x => f x k)); intros; cbv beta; polynomial_of
    end ].
