package org.minorant.core.pair;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/**
 * A product of powers of rank-one operators, ψ₁ψ₁*^⊗m₁ ⊗ ψ₂ψ₂*^⊗m₂ ⊗ …, against B^⊗n, n = m₁ + m₂ + …: the measure of B^⊗n in the product vector is the convolution of multinomial ones on the types of
 * B's eigenvalues ({@link TypeLattice}), and f is the root of its secular equation.
 *
 * <p><b>Enclosure.</b> As in {@link FixedPointForm} and {@link EigenvalueForm}. Of the vector of length one, a part of square c is cut: in the first form it adds at most c to g; in the second, √f is 1-Lipschitz in
 * the vector: (√f − √c)² ≤ f' ≤ (√f + √c)². c is about 10^-69, or 10^-255 where that does not give the accuracy asked for: answers keep their digits down to about 10^-240 of the traces.
 */
final class RankOneProducts extends PositivePair {

    /** Counts rarer than e^-LIGHT are cut at first, those rarer than e^-DARK where that is too much. */
    private static final double LIGHT = 160;

    private static final double DARK = 700;

    private static final int TERNARY = 40;

    /** Points of at most so many types are kept for the next value. */
    private static final int MOST_KEPT = 8192;

    private final KetPowers letters;
    private final int[] copies;
    private final int n;
    private final Enclosure total;
    private final Effort effort;

    /** Made when first needed; the same value whoever makes it. */
    private volatile Optional<TypeLattice> kept = Optional.empty();

    /**
     * A product of powers.
     *
     * @param letters the vectors and the operator
     * @param copies how often each vector occurs
     * @param effort what it may cost
     */
    RankOneProducts(KetPowers letters, int[] copies, Effort effort) {
        this.letters = letters;
        this.copies = copies;
        this.effort = effort;
        int sum = 0;
        Enclosure product = Enclosure.ONE;
        for (int x = 0; x < copies.length; x++) {
            sum = CopyCount.plus(sum, copies[x]);
            product = product.times(letters.measure(x).totalEnclosure().power(copies[x]));
        }
        n = sum;
        total = product;
        letters.check(n);
    }

    @Override
    PositivePair power(int k) {
        int[] more = new int[copies.length];
        Arrays.setAll(more, x -> CopyCount.times(copies[x], k));
        return new RankOneProducts(letters, more, effort);
    }

    @Override
    public PositivePair withEffort(Effort e) {
        return new RankOneProducts(letters, copies, e);
    }

    @Override
    Enclosure value(WideDouble wa, WideDouble wb) {
        Enclosure scale = total.times(Enclosure.of(wa, wa));
        Enclosure t = Enclosure.of(wb, wb).dividedBy(scale);
        double off = t.relativeWidth() * (1 + 0x1p-20);
        Enclosure f = unit(t.upperWide(), off).times(scale);
        return CopyErrors.apply(CopyErrors.apply(f, first(), wa), List.of(letters.other(n)), wb);
    }

    private List<CopyErrors.Factor> first() {
        return letters.first(copies);
    }

    /** f of the vector of length one, B^⊗n known to a relative error. */
    private Enclosure unit(WideDouble t, double off) {
        Enclosure f = unit(lattice(), t, off);
        if (f.relativeWidth() <= effort.tolerance()) {
            return f;
        }
        return f.intersect(unit(convolution(DARK), t, off)).intersect(Enclosure.of(WideDouble.ZERO, chernoff(t)));
    }

    /** f ≤ Tr[A^(1−s)(tB)^s] = t^s Π (Σ w b^s)^m for every s between 0 and 1 (K. M. R. Audenaert et al., PRL 98, 160501, 2007), with A a projector; at an s near the best one. */
    private WideDouble chernoff(WideDouble t) {
        double lnT = t.lnUp();
        double lo = 0;
        double hi = 1;
        for (int step = 0; step < TERNARY; step++) {
            double third = (hi - lo) / 3;
            if (lnChernoff(lo + third, lnT) < lnChernoff(hi - third, lnT)) {
                hi -= third;
            } else {
                lo += third;
            }
        }
        return WideDouble.expUp(lnChernoff((lo + hi) / 2, lnT));
    }

    private double lnChernoff(double s, double lnT) {
        double ln = s * lnT;
        for (int i = 0; i < copies.length; i++) {
            SpectralMeasure m = letters.measure(i);
            int r = m.values().size();
            double lnTotal = Letters.ln(m.total());
            // the last one is for what is unresolved
            boolean dust = m.unresolved().signum() > 0;
            double[] x = new double[dust ? r + 1 : r];
            double[] y = new double[x.length];
            if (dust) {
                x[r] = m.unresolved().lnUp() - lnTotal;
                y[r] = x[r] + m.unresolvedValue().lnUp();
            }
            for (int j = 0; j < r; j++) {
                x[j] = Letters.ln(m.weights().get(j)) - lnTotal;
                y[j] = x[j] + Letters.ln(m.values().get(j));
            }
            ln += Tilt.at(s, x, y, 0, copies[i]).lnChernoff();
        }
        return ln;
    }

    private Enclosure unit(TypeLattice lattice, WideDouble t, double off) {
        SpectralPoints points = letters.points(lattice, copies, n, off);
        WideDouble cut = WideDouble.of(lattice.leftOut() * (1 + 0x1p-40));
        Optional<Enclosure> small = new FixedPointForm(points, t, cut, effort).solve();
        if (small.isPresent()) {
            return small.get();
        }
        Enclosure f = new EigenvalueForm(points, t, effort).solve();
        WideDouble moved = cut.sqrtUp();
        return f.sqrt()
                .plus(Enclosure.of(moved.negate(), moved))
                .max(Enclosure.ZERO)
                .square();
    }

    private TypeLattice lattice() {
        Optional<TypeLattice> k = kept;
        if (k.isPresent()) {
            return k.get();
        }
        TypeLattice made = convolution(LIGHT);
        if (made.index().length <= MOST_KEPT) {
            kept = Optional.of(made);
        }
        return made;
    }

    private TypeLattice convolution(double light) {
        TypeLattice sum = TypeLattice.NOTHING;
        for (int x = 0; x < copies.length; x++) {
            effort.checkpoint();
            if (copies[x] > 0) {
                sum = sum.plus(letters.lattice(x, copies[x], n, light));
            }
        }
        return sum;
    }

    @Override
    public Enclosure firstTrace() {
        return CopyErrors.trace(first());
    }

    @Override
    public Enclosure secondTrace() {
        CopyErrors.Factor other = letters.other(n);
        return other.trace().power(other.n());
    }

    @Override
    public int dimension() {
        return CopyCount.dimension(letters.dimension(), n);
    }

    @Override
    public PairKind kind() {
        return PairKind.RANK_ONE;
    }
}
