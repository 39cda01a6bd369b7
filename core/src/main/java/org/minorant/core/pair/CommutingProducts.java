package org.minorant.core.pair;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * A product of powers of commuting pairs, by types of each factor: with x and y the products of powers over factorials,
 *
 * <pre>f = Π_j n_j! · Σ over types of min(w Π_j x_j, v Π_j y_j).</pre>
 *
 * <p>One factor's types, those of which there are most, stand in the order of x/y, with sums of x from the one end and of y from the other: a type of the other factors then takes w Πx for those up to some place, v Πy for the rest.
 *
 * <p><b>Enclosure.</b> All terms are positive, of products of table entries of relative error 2^-53. A place that is off by the rounding δ of logarithms takes terms that are larger than the minimum by e^δ at most: the sum is above f in any case, and below
 * f e^δ. Windows are those of {@link Tilt}, with one tilt for all factors; what they leave out is added to the upper end.
 */
final class CommutingProducts extends PositivePair {

    private static final double U = 0x1p-53;

    /** More than all terms that fall below the range of sums, which begin near the bound. */
    private static final double LOST = 0x1p-500;

    private static final int ATTEMPTS = 4;
    private static final int STEPS = 40;

    private final List<CommutingPowers.Factor> factors;
    private final int[] copies;
    private final int dimension;
    private final Effort effort;
    private final int letters;
    private final boolean vanishes;
    private final WideDoubleDouble multinomial;
    private final Enclosure traceA;
    private final Enclosure traceB;

    /** For validated numbers of copies, one for each factor. */
    CommutingProducts(List<CommutingPowers.Factor> all, int[] numbers, int dimension, Effort effort) {
        factors = new ArrayList<>();
        copies = java.util.Arrays.stream(numbers).filter(n -> n > 0).toArray();
        WideDoubleDouble product = WideDoubleDouble.ONE;
        int count = 0;
        boolean zero = false;
        for (int j = 0; j < numbers.length; j++) {
            if (numbers[j] > 0) {
                factors.add(all.get(j));
                product = product.times(Factorials.of(numbers[j]));
                count += all.get(j).letters();
                zero |= all.get(j).letters() == 0;
            }
        }
        this.dimension = dimension;
        this.effort = effort;
        letters = count;
        vanishes = zero;
        multinomial = product;
        traceA = trace(true);
        traceB = trace(false);
    }

    @Override
    public PositivePair withEffort(Effort e) {
        int[] numbers = copies.clone();
        return new CommutingProducts(factors, numbers, dimension, e);
    }

    private int total() {
        return java.util.Arrays.stream(copies).sum();
    }

    @Override
    Enclosure value(WideDouble wa, WideDouble wb) {
        if (vanishes) {
            return Enclosure.ZERO;
        }
        double lnA = ln(wa);
        double lnT = ln(wb) - lnA;
        double s = tilt(lnT);
        List<Tilt> tilts = tilts(s);
        double lnBound = lnA + s * lnT;
        for (Tilt t : tilts) {
            lnBound += t.lnChernoff();
        }
        double ln = Math.log(2 * letters / effort.tolerance()) + Math.log(total()) * 0.5 * (letters + 1) + 10;
        Enclosure f = Enclosure.ZERO;
        for (int attempt = 0; attempt < ATTEMPTS; attempt++) {
            Enclosure kept = sum(tilts, ln, lnT, lnBound, wa, wb);
            WideDouble skipped = WideDouble.expUp(lnBound - ln + Math.log(2 * letters));
            f = Enclosure.of(kept.lowerWide(), kept.upperWide().plusUp(skipped));
            WideDouble allowed = kept.lowerWide().timesDown(WideDouble.of(effort.tolerance() / 8));
            if (skipped.compareTo(allowed) <= 0) {
                return f;
            }
            ln += allowed.signum() > 0 ? skipped.dividedByUp(allowed).lnUp() + 3 : 200;
        }
        return f;
    }

    private static double ln(WideDouble w) {
        return Math.log(w.significand()) + w.exponent() * Math.log(2);
    }

    /** The s that makes t^s Π Z_j(s)^n_j small; any s gives a bound. */
    private double tilt(double lnT) {
        double lo = 0;
        double hi = 1;
        for (int step = 0; step < STEPS; step++) {
            double s = (lo + hi) / 2;
            double slope = lnT;
            for (int j = 0; j < copies.length; j++) {
                slope += copies[j]
                        * Tilt.slope(factors.get(j).lnFirst(), factors.get(j).lnSecond(), s);
            }
            if (slope < 0) {
                lo = s;
            } else {
                hi = s;
            }
        }
        return lo == 0 ? 0 : hi == 1 ? 1 : (lo + hi) / 2;
    }

    private List<Tilt> tilts(double s) {
        List<Tilt> tilts = new ArrayList<>();
        for (int j = 0; j < copies.length; j++) {
            tilts.add(Tilt.at(s, factors.get(j).lnFirst(), factors.get(j).lnSecond(), 0, copies[j]));
        }
        return tilts;
    }

    private Enclosure sum(List<Tilt> tilts, double ln, double lnT, double lnBound, WideDouble wa, WideDouble wb) {
        effort.checkpoint();
        List<FactorTypes> types = new ArrayList<>();
        double error = 0;
        double largest = 1;
        for (int j = 0; j < copies.length; j++) {
            CommutingPowers.Factor factor = factors.get(j);
            int[] from = new int[factor.letters()];
            int[] to = new int[factor.letters()];
            for (int i = 0; i < from.length; i++) {
                from[i] = tilts.get(j).from(i, ln);
                to[i] = tilts.get(j).to(i, ln);
                largest = Math.max(largest, Math.abs(factor.lnFirst()[i]) + Math.abs(factor.lnSecond()[i]));
            }
            types.add(FactorTypes.of(factor, copies[j], from, to));
            error += copies[j] * (factor.error() + 0x1p-98);
        }
        types.sort(Comparator.comparingInt(t -> t.size));
        FactorTypes inner = types.remove(types.size() - 1);
        inner.accumulate();
        long scale = (long) Math.ceil(lnBound / Math.log(2));
        Line line = new Line(inner, lnT, scale);
        descend(
                types,
                0,
                0,
                multinomial.significand().hi() * wa.significand(),
                multinomial.exponent() + wa.exponent(),
                multinomial.significand().hi() * wb.significand(),
                multinomial.exponent() + wb.exponent(),
                line);
        double rounding = (4 * letters + 2 * copies.length + inner.size + line.terms + 20) * U;
        // every logarithm of the letters is within four units, and each of the terms and sums within one
        double unsure = (16.0 + 4 * letters) * U * (total() * largest + Math.abs(lnT));
        WideDouble lower = WideDouble.of(Math.max(0, line.sum * (1 - error - rounding - unsure)), scale);
        WideDouble upper = WideDouble.of(line.sum * (1 + error + rounding) + LOST, scale);
        return Enclosure.of(lower, upper);
    }

    /** Goes through the types of all factors but one. */
    private static void descend(
            List<FactorTypes> types, int j, double r, double a, long ea, double b, long eb, Line line) {
        if (j == types.size()) {
            line.add(r, a, ea, b, eb);
            return;
        }
        FactorTypes t = types.get(j);
        for (int i = 0; i < t.size; i++) {
            double x = a * t.a[i];
            double y = b * t.b[i];
            int sx = Math.getExponent(x);
            int sy = Math.getExponent(y);
            descend(
                    types,
                    j + 1,
                    r + t.ratio[i],
                    TypeBox.scaled(x, -sx),
                    ea + t.ea[i] + sx,
                    TypeBox.scaled(y, -sy),
                    eb + t.eb[i] + sy,
                    line);
        }
    }

    /** Adds up the types of the last factor. */
    private static final class Line {

        private final FactorTypes inner;
        private final double lnT;
        private final long scale;
        private double sum;
        private long terms;

        Line(FactorTypes inner, double lnT, long scale) {
            this.inner = inner;
            this.lnT = lnT;
            this.scale = scale;
        }

        void add(double r, double a, long ea, double b, long eb) {
            int c = inner.upTo(lnT - r);
            terms += 2;
            if (c > 0) {
                sum += TypeBox.scaled(a * inner.a[c - 1], ea + inner.ea[c - 1] - scale);
            }
            if (c < inner.size) {
                sum += TypeBox.scaled(b * inner.b[c], eb + inner.eb[c] - scale);
            }
        }
    }

    @Override
    public Enclosure firstTrace() {
        return traceA;
    }

    @Override
    public Enclosure secondTrace() {
        return traceB;
    }

    private Enclosure trace(boolean first) {
        WideDoubleDouble product = WideDoubleDouble.ONE;
        double error = 0;
        for (int j = 0; j < copies.length; j++) {
            CommutingPowers.Factor factor = factors.get(j);
            product = product.times((first ? factor.totalA() : factor.totalB()).power(copies[j]));
            error += copies[j] * (factor.traceError() + 0x1p-100) + 0x1p-100;
        }
        return Letters.enclosure(product, error);
    }

    @Override
    public int dimension() {
        return CopyCount.dimension(dimension, total());
    }

    @Override
    public PairKind kind() {
        return PairKind.TYPES;
    }
}
