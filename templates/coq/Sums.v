(* Support library of Sumwright. SPDX-License-Identifier: 0BSD *)

(** Finite sums: changing the range, splitting off points, telescoping. *)

Require Import ZArith Lia Bool List Ring Field.
From Sumwright Require Import Statement Scalars Products.
Local Open Scope Z_scope.

Section Sums.
Variable K : char0_field.

Add Field K_field : (field_axioms K)
  (morphism (inj_morph K), constants [inj_cst],
   power_tac (pow_th K) [exponent_cst], completeness (inj_complete K)).

Implicit Types (c x y : K) (lo hi mid k d : Z) (f g h : Z -> K).

Lemma sum_empty lo hi f : hi < lo -> sum lo hi f = 0%K.
Proof.
  intros H. unfold sum. replace (Z.to_nat (hi - lo + 1)) with O by lia. reflexivity.
Qed.

Lemma sum_last_pred lo hi f : lo <= hi -> sum lo hi f = (sum lo (hi - 1) f + f hi)%K.
Proof.
  intros H. unfold sum.
  replace (Z.to_nat (hi - lo + 1)) with (S (Z.to_nat (hi - lo))) by lia.
  cbn [sum_from].
  replace (hi - 1 - lo + 1) with (hi - lo) by lia.
  replace (lo + Z.of_nat (Z.to_nat (hi - lo))) with hi by lia. reflexivity.
Qed.

(** Equal ranges and equal summands on them. *)
Lemma sum_ext lo hi lo' hi' f g :
  lo' = lo -> hi' = hi -> (forall k, lo <= k <= hi -> f k = g k) ->
  sum lo hi f = sum lo' hi' g.
Proof.
  intros -> ->. pattern hi. apply (range_length_ind lo); clear hi; intros hi H.
  - intros _. rewrite !sum_empty by lia. reflexivity.
  - intros IH E. rewrite (sum_last_pred lo hi f), (sum_last_pred lo hi g) by lia.
    rewrite IH, (E hi); [reflexivity | lia | intros; apply E; lia].
Qed.

Lemma sum_zero lo hi f : (forall k, lo <= k <= hi -> f k = 0%K) -> sum lo hi f = 0%K.
Proof.
  pattern hi. apply (range_length_ind lo); clear hi; intros hi H.
  - intros _. apply sum_empty. exact H.
  - intros IH E. rewrite sum_last_pred, IH, (E hi); [ring | lia | | lia].
    intros; apply E; lia.
Qed.

(** Merging rules: the left sides have plain variables, so rewriting finds them. *)
Lemma sum_add lo hi f g : (sum lo hi f + sum lo hi g = sum lo hi (fun k => f k + g k))%K.
Proof.
  pattern hi. apply (range_length_ind lo); clear hi; intros hi H.
  - rewrite !sum_empty by lia. ring.
  - intros IH. rewrite !(sum_last_pred lo hi), <- IH by lia. ring.
Qed.

Lemma sum_sub lo hi f g : (sum lo hi f - sum lo hi g = sum lo hi (fun k => f k - g k))%K.
Proof.
  pattern hi. apply (range_length_ind lo); clear hi; intros hi H.
  - rewrite !sum_empty by lia. ring.
  - intros IH. rewrite !(sum_last_pred lo hi), <- IH by lia. ring.
Qed.

Lemma sum_scal c lo hi f : (c * sum lo hi f = sum lo hi (fun k => c * f k))%K.
Proof.
  pattern hi. apply (range_length_ind lo); clear hi; intros hi H.
  - rewrite !sum_empty by lia. ring.
  - intros IH. rewrite !(sum_last_pred lo hi), <- IH by lia. ring.
Qed.

Lemma sum_scal_r c lo hi f : (sum lo hi f * c = sum lo hi (fun k => f k * c))%K.
Proof.
  transitivity (c * sum lo hi f)%K; [ring|]. rewrite sum_scal.
  apply sum_ext; try reflexivity. intros k _. ring.
Qed.

Lemma sum_opp lo hi f : (- sum lo hi f = sum lo hi (fun k => - f k))%K.
Proof.
  pattern hi. apply (range_length_ind lo); clear hi; intros hi H.
  - rewrite !sum_empty by lia. ring.
  - intros IH. rewrite !(sum_last_pred lo hi), <- IH by lia. ring.
Qed.

(** ** Splitting *)

Lemma sum_split lo mid mid' hi f :
  mid' = mid + 1 -> lo <= mid + 1 -> mid <= hi ->
  sum lo hi f = (sum lo mid f + sum mid' hi f)%K.
Proof.
  intros -> L. pattern hi. apply (range_length_ind (mid + 1)); clear hi; intros hi H.
  - intros E. rewrite (sum_empty (mid + 1)) by lia. replace hi with mid by lia. ring.
  - intros IH _. rewrite (sum_last_pred lo hi), (sum_last_pred (mid + 1) hi), IH by lia. ring.
Qed.

Lemma sum_one lo hi k f : lo = k -> hi = k -> sum lo hi f = f k.
Proof. intros -> ->. rewrite sum_last_pred, sum_empty by lia. ring. Qed.

Lemma sum_last lo hi hi' k f :
  lo <= hi -> hi' = hi - 1 -> k = hi -> sum lo hi f = (sum lo hi' f + f k)%K.
Proof. intros H -> ->. apply sum_last_pred, H. Qed.

Lemma sum_first lo hi lo' k f :
  lo <= hi -> lo' = lo + 1 -> k = lo -> sum lo hi f = (f k + sum lo' hi f)%K.
Proof.
  intros H -> ->. rewrite (sum_split lo lo (lo + 1) hi), (sum_one lo lo lo) by lia. reflexivity.
Qed.

(** The range [lo..hi] listed point by point. *)
Fixpoint lists_range (lo : Z) (points : list Z) (hi : Z) : Prop :=
  match points with
  | nil => hi = lo - 1
  | k :: rest => k = lo /\ lists_range (lo + 1) rest hi
  end.

Fixpoint sum_terms_after (x : K) (f : Z -> K) (points : list Z) : K :=
  match points with
  | nil => x
  | k :: rest => sum_terms_after (x + f k)%K f rest
  end.

Definition sum_terms (f : Z -> K) (points : list Z) : K :=
  match points with
  | nil => 0%K
  | k :: rest => sum_terms_after (f k) f rest
  end.

Lemma sum_terms_after_eq lo hi f x points :
  lists_range lo points hi -> sum_terms_after x f points = (x + sum lo hi f)%K.
Proof.
  revert lo x. induction points as [|k rest IH]; intros lo x; cbn [lists_range sum_terms_after].
  - intros ->. rewrite sum_empty by lia. ring.
  - intros [-> H]. rewrite (IH _ _ H).
    assert (L : lo <= hi).
    { clear -H. revert lo H. induction rest as [|j rest IH]; intros lo; cbn [lists_range].
      - lia.
      - intros [_ H]. apply IH in H. lia. }
    rewrite (sum_first lo hi (lo + 1) lo) by lia. ring.
Qed.

Lemma sum_explicit lo hi points f : lists_range lo points hi -> sum lo hi f = sum_terms f points.
Proof.
  destruct points as [|k rest]; cbn [lists_range sum_terms].
  - intros H. apply sum_empty. lia.
  - intros H. pose proof (sum_terms_after_eq lo hi f 0%K (k :: rest) H) as E.
    destruct H as [-> H]. cbn [sum_terms_after] in E.
    transitivity (0 + sum lo hi f)%K; [ring|]. rewrite <- E.
    f_equal. ring.
Qed.

(** ** The same sum over another range *)

Lemma sum_indicator lo hi lo2 hi2 f :
  lo2 <= lo -> hi <= hi2 ->
  sum lo hi f = sum lo2 hi2 (fun k => if (lo <=? k) && (k <=? hi) then f k else 0%K)%bool.
Proof.
  intros L. revert hi. pattern hi2. apply (range_length_ind lo2); clear hi2; intros hi2 H.
  - intros hi E. rewrite !sum_empty by lia. reflexivity.
  - intros IH hi E. rewrite (sum_last_pred lo2 hi2) by lia.
    destruct (Z.eq_dec hi hi2) as [->|N].
    + destruct (Z_le_gt_dec lo hi2) as [M|M].
      * rewrite (sum_last_pred lo hi2), (IH (hi2 - 1)) by lia.
        replace ((lo <=? hi2) && (hi2 <=? hi2))%bool with true
          by (symmetry; apply andb_true_intro; split; apply Z.leb_le; lia).
        f_equal. apply sum_ext; try reflexivity. intros k R.
        replace (k <=? hi2) with true by (symmetry; apply Z.leb_le; lia).
        replace (k <=? hi2 - 1) with true by (symmetry; apply Z.leb_le; lia). reflexivity.
      * rewrite (sum_empty lo hi2), sum_zero; [ | | lia].
        { destruct (Z.leb_spec lo hi2); [lia | cbn; ring]. }
        intros k R. destruct (Z.leb_spec lo k); [lia | reflexivity].
    + rewrite (IH hi) by lia.
      replace (hi2 <=? hi) with false by (symmetry; apply Z.leb_gt; lia).
      rewrite andb_false_r. ring.
Qed.

(** Ranges that differ only in points where the summand is 0; either may be empty. *)
Lemma sum_same lo hi lo' hi' f :
  (forall k, lo <= k <= hi -> k < lo' \/ hi' < k -> f k = 0%K) ->
  (forall k, lo' <= k <= hi' -> k < lo \/ hi < k -> f k = 0%K) ->
  sum lo hi f = sum lo' hi' f.
Proof.
  intros A B.
  rewrite (sum_indicator lo hi (Z.min lo lo') (Z.max hi hi')) by lia.
  rewrite (sum_indicator lo' hi' (Z.min lo lo') (Z.max hi hi')) by lia.
  apply sum_ext; try reflexivity. intros k _.
  destruct (Z.leb_spec lo k), (Z.leb_spec k hi), (Z.leb_spec lo' k), (Z.leb_spec k hi');
    cbn [andb]; try reflexivity; first [apply A; lia | symmetry; apply B; lia].
Qed.

Lemma sum_shift d lo hi lo' hi' f :
  lo' = lo + d -> hi' = hi + d -> sum lo hi f = sum lo' hi' (fun k => f (k - d)).
Proof.
  intros -> ->. pattern hi. apply (range_length_ind lo); clear hi; intros hi H.
  - rewrite !sum_empty by lia. reflexivity.
  - intros IH. rewrite (sum_last_pred lo hi), (sum_last_pred (lo + d) (hi + d)), IH by lia.
    replace (hi + d - d) with hi by lia. replace (hi - 1 + d) with (hi + d - 1) by lia.
    reflexivity.
Qed.

(** The range run through backwards, k -> c - k. *)
Lemma sum_reverse (c : Z) lo hi lo' hi' f :
  lo' = c - hi -> hi' = c - lo -> sum lo hi f = sum lo' hi' (fun k => f (c - k)).
Proof.
  intros -> ->. pattern hi. apply (range_length_ind lo); clear hi; intros hi H.
  - rewrite !sum_empty by lia. reflexivity.
  - intros IH.
    rewrite (sum_last_pred lo hi), (sum_first (c - hi) (c - lo) (c - hi + 1) (c - hi)), IH by lia.
    replace (c - (c - hi)) with hi by lia. replace (c - (hi - 1)) with (c - hi + 1) by lia. ring.
Qed.

(** ** Telescoping *)

Lemma sum_tele lo hi f g (a b : Z) :
  lo <= hi + 1 -> a = lo -> b = hi + 1 ->
  (forall k, lo <= k <= hi -> f k = (g (k + 1)%Z - g k)%K) ->
  sum lo hi f = (g b - g a)%K.
Proof.
  intros H -> ->. revert H. pattern hi. apply (range_length_ind lo); clear hi; intros hi H.
  - intros L _. rewrite sum_empty by lia. replace (hi + 1) with lo by lia. ring.
  - intros IH L E. rewrite sum_last_pred, IH, (E hi); try lia.
    + replace (hi - 1 + 1) with hi by lia. ring.
    + intros; apply E; lia.
Qed.

(** The same with the two end values written by their own formulas: [u k] is the
    certificate at k + 1 and [v k] at k, and they need to fit only inside the range. *)
Lemma sum_tele_ends lo hi f (u v : Z -> K) (a b : Z) :
  lo <= hi -> a = lo -> b = hi ->
  (forall k, lo <= k <= hi -> f k = (u k - v k)%K) ->
  (forall k, lo <= k < hi -> v (k + 1)%Z = u k) ->
  sum lo hi f = (u b - v a)%K.
Proof.
  intros H -> -> E M.
  rewrite (sum_last lo hi (hi - 1) hi), (E hi) by lia.
  rewrite (sum_tele lo (hi - 1) f v lo hi); try lia.
  - ring.
  - intros k R. rewrite E, M by lia. reflexivity.
Qed.

(** ** Double sums *)

Lemma sum_exchange (a b : Z) lo hi (f : Z -> Z -> K) :
  sum a b (fun i => sum lo hi (fun j => f i j)) = sum lo hi (fun j => sum a b (fun i => f i j)).
Proof.
  pattern b. apply (range_length_ind a); clear b; intros b H.
  - rewrite sum_empty by lia. symmetry. apply sum_zero. intros j _. apply sum_empty. lia.
  - intros IH. rewrite (sum_last_pred a b), IH, sum_add by lia.
    apply sum_ext; try reflexivity. intros j _. rewrite (sum_last_pred a b) by lia. reflexivity.
Qed.

Lemma sum_exchange_dependent (a b c d : Z) (lo hi lo' hi' : Z -> Z) (f : Z -> Z -> K) :
  (forall i j, (a <= i <= b /\ lo i <= j <= hi i) <-> (c <= j <= d /\ lo' j <= i <= hi' j)) ->
  sum a b (fun i => sum (lo i) (hi i) (fun j => f i j)) =
  sum c d (fun j => sum (lo' j) (hi' j) (fun i => f i j)).
Proof.
  intros R.
  set (F := fun i j => if ((lo i <=? j) && (j <=? hi i))%bool then f i j else 0%K).
  set (G := fun i j => if ((lo' j <=? i) && (i <=? hi' j))%bool then f i j else 0%K).
  transitivity (sum a b (fun i => sum c d (fun j => F i j))).
  - apply sum_ext; try reflexivity. intros i I.
    rewrite (sum_same c d (lo i) (hi i)).
    + apply sum_ext; try reflexivity. intros j J. unfold F.
      destruct (Z.leb_spec (lo i) j), (Z.leb_spec j (hi i)); cbn; reflexivity || lia.
    + intros j J O. unfold F.
      destruct (Z.leb_spec (lo i) j), (Z.leb_spec j (hi i)); cbn; reflexivity || lia.
    + intros j J O. exfalso. destruct (proj1 (R i j) (conj I J)). lia.
  - rewrite sum_exchange. apply sum_ext; try reflexivity. intros j J.
    transitivity (sum a b (fun i => G i j)).
    + apply sum_ext; try reflexivity. intros i I. unfold F, G.
      destruct (Z.leb_spec (lo i) j), (Z.leb_spec j (hi i)),
               (Z.leb_spec (lo' j) i), (Z.leb_spec i (hi' j)); cbn; try reflexivity;
        exfalso; pose proof (R i j); lia.
    + rewrite (sum_same a b (lo' j) (hi' j)).
      * apply sum_ext; try reflexivity. intros i I. unfold G.
        destruct (Z.leb_spec (lo' j) i), (Z.leb_spec i (hi' j)); cbn; reflexivity || lia.
      * intros i I O. unfold G.
        destruct (Z.leb_spec (lo' j) i), (Z.leb_spec i (hi' j)); cbn; reflexivity || lia.
      * intros i I O. exfalso. destruct (proj2 (R i j) (conj J I)). lia.
Qed.

End Sums.

Arguments sum_terms {K} f points.
Arguments sum_terms_after {K} x%K f points.

(** [rewrite (sum_explicit K lo hi (k1 :: ... :: nil) f) by list_range], then [sum_terms_cbn]. *)
Ltac list_range := cbn [lists_range]; repeat split; lia.
Ltac sum_terms_cbn := cbn [sum_terms sum_terms_after].
