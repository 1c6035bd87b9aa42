(* Support library of Sumwright. SPDX-License-Identifier: 0BSD *)

(** Induction over windows of a sequence; two solutions of one recurrence. *)

Require Import ZArith Lia List Ring Field.
From Sumwright Require Import Statement Scalars.
Local Open Scope Z_scope.

Lemma seq_ind (J : nat) (from : Z) (P : Z -> Prop) :
  (forall n, from <= n < from + Z.of_nat J -> P n) ->
  (forall n, from <= n -> (forall i, n <= i < n + Z.of_nat J -> P i) -> P (n + Z.of_nat J)) ->
  forall n, from <= n -> P n.
Proof.
  intros I T.
  assert (W : forall (m : nat) i, from <= i < from + Z.of_nat m + Z.of_nat J -> P i).
  { induction m as [|m IH]; intros i R.
    - apply I. lia.
    - destruct (Z.eq_dec i (from + Z.of_nat m + Z.of_nat J)) as [->|N].
      + apply T; [lia|]. intros j H. apply IH. lia.
      + apply IH. lia. }
  intros n H. destruct (Z_lt_ge_dec n (from + Z.of_nat J)) as [L|L]; [apply I; lia|].
  apply (W (S (Z.to_nat (n - from)))). lia.
Qed.

(** Finitely many cases: [P] at every point of a list that covers lo..hi. *)
Fixpoint all_of (P : Z -> Prop) (points : list Z) : Prop :=
  match points with
  | nil => True
  | k :: nil => P k
  | k :: rest => P k /\ all_of P rest
  end.

Fixpoint z_points (lo : Z) (count : nat) : list Z :=
  match count with
  | O => nil
  | S m => lo :: z_points (lo + 1) m
  end.

Lemma range_cases (lo hi : Z) (points : list Z) (P : Z -> Prop) :
  points = z_points lo (Z.to_nat (hi - lo + 1)) -> all_of P points ->
  forall n, lo <= n <= hi -> P n.
Proof.
  intros -> A n R.
  assert (F : forall (m : nat) a, all_of P (z_points a m) -> forall k, a <= k < a + Z.of_nat m -> P k).
  { induction m as [|m IH]; intros a; [intros; lia|].
    intros C k H. destruct (Z.eq_dec k a) as [->|N].
    - cbn [z_points all_of] in C. destruct (z_points (a + 1) m); [exact C | exact (proj1 C)].
    - apply (IH (a + 1)); [|lia]. cbn [z_points all_of] in C.
      destruct (z_points (a + 1) m); [exact Logic.I | exact (proj2 C)]. }
  apply (F _ lo A). lia.
Qed.

Section Recurrences.
Variable K : char0_field.

Add Field K_field : (field_axioms K)
  (morphism (inj_morph K), constants [inj_cst],
   power_tac (pow_th K) [exponent_cst], completeness (inj_complete K)).

(** a0(n) s(n) + a1(n) s(n + 1) + ... + aJ(n) s(n + J), associated to the left:
    convertible with the same expression written out. *)
Fixpoint recurrence_after (x : K) (cs : list (Z -> K)) (s : Z -> K) (n i : Z) : K :=
  match cs with
  | nil => x
  | c :: rest => recurrence_after (x + c n * s (n + i)%Z)%K rest s n (i + 1)
  end.

Definition recurrence (cs : list (Z -> K)) (s : Z -> K) (n : Z) : K :=
  match cs with
  | nil => 0%K
  | c :: rest => recurrence_after (c n * s n)%K rest s n 1
  end.

Fixpoint weighted (cs : list (Z -> K)) (n : Z) (s : Z -> K) (m : Z) : K :=
  match cs with
  | nil => 0
  | c :: rest => c n * s m + weighted rest n s (m + 1)
  end%K.

Lemma recurrence_after_eq cs s n i x :
  recurrence_after x cs s n i = (x + weighted cs n s (n + i))%K.
Proof.
  revert i x. induction cs as [|c rest IH]; intros i x; cbn [recurrence_after weighted].
  - ring.
  - rewrite IH, Z.add_assoc. ring.
Qed.

Lemma recurrence_eq cs s n : recurrence cs s n = weighted cs n s n.
Proof.
  destruct cs as [|c rest]; cbn [recurrence weighted]; [reflexivity|].
  apply recurrence_after_eq.
Qed.

Lemma weighted_last cs n (s t : Z -> K) m :
  last cs (fun _ => 0%K) n <> 0%K ->
  weighted cs n s m = weighted cs n t m ->
  (forall i, m <= i < m + Z.of_nat (length cs) - 1 -> s i = t i) ->
  s (m + Z.of_nat (length cs) - 1) = t (m + Z.of_nat (length cs) - 1).
Proof.
  revert m. induction cs as [|c rest IH]; intros m L E W.
  - exfalso. apply L. reflexivity.
  - destruct rest as [|c' rest].
    + cbn [length weighted last] in *. replace (m + Z.of_nat 1 - 1) with m by lia.
      apply (mul_cancel K (c n)); [exact L|].
      transitivity (c n * s m + 0)%K; [ring|]. rewrite E. ring.
    + change (length (c :: c' :: rest)) with (S (length (c' :: rest))) in *.
      rewrite Nat2Z.inj_succ in *.
      replace (m + Z.succ (Z.of_nat (length (c' :: rest))) - 1)
        with (m + 1 + Z.of_nat (length (c' :: rest)) - 1) by lia.
      apply IH; [exact L | | intros i R; apply W; lia].
      change (c n * s m + weighted (c' :: rest) n s (m + 1) =
              c n * t m + weighted (c' :: rest) n t (m + 1))%K in E.
      rewrite (W m) in E.
      * apply (eq_of_sub K).
        transitivity ((c n * t m + weighted (c' :: rest) n s (m + 1)) -
                      (c n * t m + weighted (c' :: rest) n t (m + 1)))%K; [ring|].
        rewrite E. ring.
      * cbn [length] in *. lia.
Qed.

(** Two sequences that satisfy one recurrence of order J = length cs - 1 from [from] on,
    whose leading coefficient does not vanish there, and that agree at [from], ...,
    [from + J - 1], are equal. *)
Theorem same_recurrence (cs : list (Z -> K)) (from : Z) (b s t : Z -> K) :
  (forall n, from <= n -> recurrence cs s n = b n) ->
  (forall n, from <= n -> recurrence cs t n = b n) ->
  (forall n, from <= n -> last cs (fun _ => 0%K) n <> 0%K) ->
  (forall n, from <= n <= from + Z.of_nat (length cs) - 2 -> s n = t n) ->
  forall n, from <= n -> s n = t n.
Proof.
  intros RS RT L I.
  assert (N : cs <> nil).
  { intros ->. apply (L from); [lia | reflexivity]. }
  assert (E : Z.of_nat (length cs - 1) = Z.of_nat (length cs) - 1).
  { destruct cs; [contradiction | cbn [length]; lia]. }
  apply (seq_ind (length cs - 1)); rewrite E.
  - intros n H. apply I. lia.
  - intros n H W. replace (n + (Z.of_nat (length cs) - 1)) with (n + Z.of_nat (length cs) - 1) by lia.
    apply (weighted_last cs n); [apply L, H | | intros i R; apply W; lia].
    rewrite <- !recurrence_eq, RS, RT by exact H. reflexivity.
Qed.

(** Order 0: the sum is determined directly. *)
Lemma same_quotient (a x y : K) : (a <> 0 -> a * x = a * y -> x = y)%K.
Proof. apply mul_cancel. Qed.

End Recurrences.

Arguments recurrence {K} cs s n.
Arguments recurrence_after {K} x%K cs s n i.

(** For a goal [forall n, lo <= n <= hi -> P n] with literal ends. *)
Ltac range_cases :=
  lazymatch goal with
  | |- forall n : Z, ?lo <= n <= ?hi -> _ =>
      let l := eval vm_compute in (z_points lo (Z.to_nat (hi - lo + 1))) in
      apply (range_cases lo hi l); [vm_compute; reflexivity | cbn [all_of]; repeat apply conj]
  end.
