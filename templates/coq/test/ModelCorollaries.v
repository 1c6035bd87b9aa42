(** Model of the corollaries: the theorem over Z, over the rational numbers of the
    standard library, and a polynomial identity continued in a parameter. *)

Require Import ZArith Lia Ring Field QArith Qcanon.
From Sumwright Require Import Statement Support Integers OverQc.
From Sumwright.test Require ModelSquares.
Local Open Scope Z_scope.

Theorem claim_over_Z : forall n : Z, 0 <= n ->
  zsum 0 n (fun k => zbinomial n k ^ 2) = zbinomial (2 * n) n.
Proof.
  intros n Hn.
  refine (between_integers Qc_field _ _ _ _ _ _ (ModelSquares.claim Qc_field n Hn)).
  - integer.
  - integer.
Qed.

Theorem claim_over_Qc : forall n : Z, 0 <= n ->
  sum 0 n (fun k => binomial n k ^ 2)%K = binomial (2 * n) n :> Qc_field.
Proof. exact (ModelSquares.claim Qc_field). Qed.

(** Both sides computed for one n: the definitions have the values that they should. *)
Example computed : (zsum 0 6 (fun k => zbinomial 6 k ^ 2), zbinomial 12 6) = (924, 924).
Proof. vm_compute. reflexivity. Qed.

Example computed_over_Qc :
  (this (@sum Qc_field 0 6 (fun k => binomial 6 k ^ 2)%K) = 924 # 1)%Q.
Proof. vm_compute. reflexivity. Qed.

(** From integers x >= 0 to every x in K. *)
Theorem vandermonde_continued : forall (K : char0_field) (y : K) (n : Z), 0 <= n ->
  (forall x : Z, 0 < x ->
     sum 0 n (fun k => gbinomial (inj x) k * gbinomial y (n - k))%K =
     gbinomial (inj x + y)%K n :> K) ->
  forall x : K,
    sum 0 n (fun k => gbinomial x k * gbinomial y (n - k))%K = gbinomial (x + y)%K n :> K.
Proof.
  intros K y n Hn H.
  apply (continuation K (fun x => sum 0 n (fun k => gbinomial x k * gbinomial y (n - k)))%K
                        (fun x => gbinomial (x + y) n)%K (inj 0)).
  - polynomial_of.
  - polynomial_of.
  - intros j J. replace (inj 0 + inj j)%K with (inj j : K); [apply H, J|].
    rewrite <- inj_add. reflexivity.
Qed.
