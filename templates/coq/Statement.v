(* Support library of Sumwright. SPDX-License-Identifier: 0BSD *)

(** The vocabulary of the theorems: everything a reader has to believe besides
    the theorem itself.  Definitions only; all proofs are in the other files. *)

Require Import ZArith Field_theory.

(** The natural number n as an element of a structure with 0, 1 and +. *)
Fixpoint multiple_of_one {T : Type} (zero one : T) (add : T -> T -> T) (n : nat) : T :=
  match n with
  | O => zero
  | S m => add (multiple_of_one zero one add m) one
  end.

(** A field in which no positive natural number is 0.  Division by 0 has some
    value, about which nothing is assumed. *)
Record char0_field : Type := Char0Field {
  carrier :> Type;
  kzero : carrier;
  kone : carrier;
  kadd : carrier -> carrier -> carrier;
  kmul : carrier -> carrier -> carrier;
  ksub : carrier -> carrier -> carrier;
  kopp : carrier -> carrier;
  kdiv : carrier -> carrier -> carrier;
  kinv : carrier -> carrier;
  field_axioms : field_theory kzero kone kadd kmul ksub kopp kdiv kinv (@eq carrier);
  char0_axiom : forall n : nat, multiple_of_one kzero kone kadd (S n) <> kzero
}.

Arguments kzero {_}.
Arguments kone {_}.
Arguments kadd {_} _ _.
Arguments kmul {_} _ _.
Arguments ksub {_} _ _.
Arguments kopp {_} _.
Arguments kdiv {_} _ _.
Arguments kinv {_} _.

Declare Scope K_scope.
Delimit Scope K_scope with K.
Bind Scope K_scope with carrier.

Notation "0" := kzero : K_scope.
Notation "1" := kone : K_scope.
Notation "x + y" := (kadd x y) : K_scope.
Notation "x * y" := (kmul x y) : K_scope.
Notation "x - y" := (ksub x y) : K_scope.
Notation "x / y" := (kdiv x y) : K_scope.
Notation "- x" := (kopp x) : K_scope.
Notation "/ x" := (kinv x) : K_scope.

Section Vocabulary.
Context {K : char0_field}.

(** The integer z as an element of K, from its binary digits. *)
Fixpoint inj_positive (p : positive) : K :=
  match p with
  | xH => 1
  | xO q => (1 + 1) * inj_positive q
  | xI q => 1 + (1 + 1) * inj_positive q
  end%K.

Definition inj (z : Z) : K :=
  match z with
  | Z0 => 0
  | Zpos p => inj_positive p
  | Zneg p => - inj_positive p
  end%K.

(** Powers: [pow x 0 = 1], and [zpow x e = 1 / x ^ (-e)] for e < 0. *)
Fixpoint pow (x : K) (n : nat) : K :=
  match n with
  | O => 1
  | S m => pow x m * x
  end%K.

Definition zpow (x : K) (e : Z) : K :=
  if (e <? 0)%Z then (/ pow x (Z.to_nat (- e)))%K else pow x (Z.to_nat e).

(** f lo + f (lo + 1) + ... + f hi, which is 0 when hi < lo; the product likewise,
    1 when hi < lo. *)
Fixpoint sum_from (lo : Z) (count : nat) (f : Z -> K) : K :=
  match count with
  | O => 0
  | S m => sum_from lo m f + f (lo + Z.of_nat m)%Z
  end%K.

Definition sum (lo hi : Z) (f : Z -> K) : K := sum_from lo (Z.to_nat (hi - lo + 1)) f.

Fixpoint product_from (lo : Z) (count : nat) (f : Z -> K) : K :=
  match count with
  | O => 1
  | S m => product_from lo m f * f (lo + Z.of_nat m)%Z
  end%K.

Definition product (lo hi : Z) (f : Z -> K) : K := product_from lo (Z.to_nat (hi - lo + 1)) f.

(** m!, and 1 / m! with value 0 for m < 0. *)
Definition factorial (m : Z) : K := if (m <? 0)%Z then 0%K else product 1 m inj.

Definition rfactorial (m : Z) : K := if (m <? 0)%Z then 0%K else (/ factorial m)%K.

(** a (a + 1) ... (a + m - 1)  and  a (a - 1) ... (a - m + 1). *)
Definition rising (a : K) (m : Z) : K := product 0 (m - 1) (fun i => a + inj i)%K.

Definition falling (a : K) (m : Z) : K := product 0 (m - 1) (fun i => a - inj i)%K.

(** a (a - 1) ... (a - k + 1) / k!, and 0 for k < 0; a in K, or an integer. *)
Definition gbinomial (a : K) (k : Z) : K :=
  if (k <? 0)%Z then 0%K else (falling a k / factorial k)%K.

Definition binomial (n k : Z) : K := gbinomial (inj n) k.

End Vocabulary.

Arguments inj {K} z%Z.
Arguments pow {K} x%K n%nat.
Arguments zpow {K} x%K e%Z.
Arguments sum {K} (lo hi)%Z f%K.
Arguments product {K} (lo hi)%Z f%K.
Arguments factorial {K} m%Z.
Arguments rfactorial {K} m%Z.
Arguments rising {K} a%K m%Z.
Arguments falling {K} a%K m%Z.
Arguments gbinomial {K} a%K k%Z.
Arguments binomial {K} (n k)%Z.

Notation "x ^ n" := (pow x n) : K_scope.
