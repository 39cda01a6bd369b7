package org.minorant.core.pair;

import java.util.ArrayList;
import java.util.List;
import java.util.stream.IntStream;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * n copies of two commuting operators, by types: with a_i and b_i the eigenvalues,
 *
 * <pre>f = Σ over n_1 + … + n_K = n of n!/(n_1! ⋯ n_K!) · min(w Π a_i^{n_i}, v Π b_i^{n_i}).</pre>
 *
 * <p><b>Enclosure.</b> All terms are positive. Each is a product of table entries of relative error 2^-53 (powers over factorials, made in double-double), so that f has relative error
 * (2K + 8) · 2^-53 plus n times that of the letters, at any depth. Types outside the windows of {@link Tilt} are left out; what they can amount to is added to the upper end.
 *
 * <p>Four letters go by {@link PairedLines} where types are many. Where more than 10^8 types, or 10^9 steps of these lines, matter, {@link LikelihoodBins} enclose the sum as closely as 2^14 bins allow.
 *
 * <p>Types and their use here: T. M. Cover and J. A. Thomas, Elements of Information Theory, ch. 11 (from memory).
 */
final class CommutingCopies extends PositivePair {

    /** Beyond this many types a value would take more than a second or so, and bins take over. */
    static final double MOST_TYPES = 1e8;

    /** Beyond this many types four letters go by pairs. */
    private static final double MANY_TYPES = 1e6;

    private static final double U = 0x1p-53;
    private static final int ATTEMPTS = 4;

    private final int n;
    private final int dimension;
    private final Letters letters;
    private final double[] lnFirst;
    private final double[] lnSecond;
    private final WideDoubleDouble totalA;
    private final WideDoubleDouble totalB;
    private final double traceError;
    private final Effort effort;
    /** Made when first needed; the same value whoever makes it. */
    private volatile BinnedSum bins;

    private CommutingCopies(
            int n,
            int dimension,
            Letters letters,
            WideDoubleDouble totalA,
            WideDoubleDouble totalB,
            double traceError,
            Effort effort) {
        this.n = n;
        this.dimension = dimension;
        this.letters = letters;
        this.lnFirst = letters.first().stream().mapToDouble(Letters::ln).toArray();
        this.lnSecond = letters.second().stream().mapToDouble(Letters::ln).toArray();
        this.totalA = totalA;
        this.totalB = totalB;
        this.traceError = traceError;
        this.effort = effort;
    }

    /** n copies of the pair with the given eigenvalues. */
    static PositivePair of(double[] a, double[] b, int n) {
        Letters letters = Letters.ofSpectra(a, b);
        List<WideDoubleDouble> all = new ArrayList<>(letters.first());
        all.addAll(letters.second());
        Letters.checkCopies(n, all);
        return new CommutingCopies(
                n, a.length, letters, total(a), total(b), a.length * DoubleDouble.EPS, Effort.DEFAULT);
    }

    /** n copies of two commuting operators whose eigenvalues are known within a relative error, small ones included. */
    static PositivePair of(DoubleDouble[] a, DoubleDouble[] b, double relativeError, int n) {
        List<WideDoubleDouble> x = new ArrayList<>();
        List<WideDoubleDouble> y = new ArrayList<>();
        WideDoubleDouble totalA = WideDoubleDouble.ZERO;
        WideDoubleDouble totalB = WideDoubleDouble.ZERO;
        for (int i = 0; i < a.length; i++) {
            WideDoubleDouble p = WideDoubleDouble.of(a[i]);
            WideDoubleDouble q = WideDoubleDouble.of(b[i]);
            totalA = Letters.sum(totalA, p);
            totalB = Letters.sum(totalB, q);
            if (a[i].hi() > 0 && b[i].hi() > 0) {
                x.add(p);
                y.add(q);
            }
        }
        Letters letters = new Letters(List.copyOf(x), List.copyOf(y), relativeError);
        List<WideDoubleDouble> all = new ArrayList<>(x);
        all.addAll(y);
        Letters.checkCopies(n, all);
        double traceError = relativeError + a.length * DoubleDouble.EPS;
        return new CommutingCopies(n, a.length, letters, totalA, totalB, traceError, Effort.DEFAULT);
    }

    private static WideDoubleDouble total(double[] a) {
        WideDoubleDouble s = WideDoubleDouble.ZERO;
        for (double v : a) {
            if (v > 0) {
                s = Letters.sum(s, Letters.wide(v));
            }
        }
        return s;
    }

    @Override
    PositivePair power(int k) {
        int copies = CopyCount.times(n, k);
        List<WideDoubleDouble> all = new ArrayList<>(letters.first());
        all.addAll(letters.second());
        Letters.checkCopies(copies, all);
        return new CommutingCopies(copies, dimension, letters, totalA, totalB, traceError, effort);
    }

    @Override
    public PositivePair withEffort(Effort e) {
        return new CommutingCopies(n, dimension, letters, totalA, totalB, traceError, e);
    }

    @Override
    Enclosure value(WideDouble wa, WideDouble wb) {
        if (letters.count() == 0) {
            return Enclosure.ZERO;
        }
        double lnA = ln(wa);
        double lnT = ln(wb) - lnA;
        Tilt tilt = Tilt.of(lnFirst, lnSecond, lnT, n);
        double lnBound = tilt.lnChernoff() + lnA;
        int k = letters.count();
        // the sum is below its bound by a factor polynomial in n
        double ln = Math.log(2 * k / effort.tolerance()) + Math.log(n) * 0.5 * (k + 1) + 10;
        int[] from = new int[k];
        int[] to = new int[k];
        Enclosure f = Enclosure.ZERO;
        for (int attempt = 0; attempt < ATTEMPTS; attempt++) {
            for (int i = 0; i < k; i++) {
                from[i] = tilt.from(i, ln);
                to[i] = tilt.to(i, ln);
            }
            double count = TypeBox.count(n, from, to);
            boolean paired = k == PairedLines.LETTERS
                    && count > MANY_TYPES
                    && PairedLines.work(from, to) < PairedLines.MOST_STEPS;
            if (!paired && count > MOST_TYPES) {
                Enclosure binned = bins().sum(wa, wb, (long) Math.ceil(lnBound / Math.log(2)));
                WideDouble upper = binned.upperWide().min(WideDouble.expUp(lnBound));
                return Enclosure.of(binned.lowerWide().min(upper), upper);
            }
            Enclosure kept = paired ? pairedSum(from, to, lnBound, wa, wb) : sum(from, to, lnBound, wa, wb);
            WideDouble skipped = WideDouble.expUp(lnBound - ln + Math.log(2 * k));
            f = Enclosure.of(kept.lowerWide(), kept.upperWide().plusUp(skipped));
            WideDouble allowed = kept.lowerWide().timesDown(WideDouble.of(effort.tolerance() / 8));
            if (skipped.compareTo(allowed) <= 0) {
                return f;
            }
            ln += allowed.signum() > 0 ? skipped.dividedByUp(allowed).lnUp() + 3 : 200;
        }
        return f;
    }

    private BinnedSum bins() {
        BinnedSum b = bins;
        if (b == null) {
            b = BinnedSum.of(letters, n, effort);
            bins = b;
        }
        return b;
    }

    private static double ln(WideDouble w) {
        return Math.log(w.significand()) + w.exponent() * Math.log(2);
    }

    private Enclosure sum(int[] from, int[] to, double lnBound, WideDouble wa, WideDouble wb) {
        int k = letters.count();
        TypeBox box = TypeBox.of(
                n,
                from,
                to,
                (i, lo, hi) -> PowerTable.scaledPowers(letters.first().get(i), lo, hi),
                (i, lo, hi) -> PowerTable.scaledPowers(letters.second().get(i), lo, hi));
        WideDoubleDouble multinomial = Factorials.of(n);
        WideDoubleDouble a = multinomial.times(exact(wa));
        WideDoubleDouble b = multinomial.times(exact(wb));
        // sums stay below 2^2, every term is above 2^-900 or does not matter
        long scale = (long) Math.ceil(lnBound / Math.log(2));
        int first = box.outerFrom();
        int lines = box.outerTo() - first + 1;
        long[] done = {0};
        double[][] sums = IntStream.range(0, Math.max(0, lines))
                .parallel()
                .mapToObj(i -> {
                    effort.checkpoint();
                    LineSum s = new LineSum(box, scale, effort);
                    box.lines(
                            first + i,
                            a.significand().hi(),
                            a.exponent(),
                            b.significand().hi(),
                            b.exponent(),
                            s);
                    synchronized (done) {
                        effort.listener().onProgress(++done[0], lines);
                    }
                    return new double[] {s.high(), s.low()};
                })
                .toArray(double[][]::new);
        return total(sums, scale, (2 * k + 8) * U);
    }

    /** The same for four letters. */
    private Enclosure pairedSum(int[] from, int[] to, double lnBound, WideDouble wa, WideDouble wb) {
        PairedLines lines = new PairedLines(
                n,
                from,
                to,
                (i, lo, hi) -> PowerTable.scaledPowers(letters.first().get(i), lo, hi),
                (i, lo, hi) -> PowerTable.scaledPowers(letters.second().get(i), lo, hi));
        WideDoubleDouble multinomial = Factorials.of(n);
        WideDoubleDouble a = multinomial.times(exact(wa));
        WideDoubleDouble b = multinomial.times(exact(wb));
        long scale = (long) Math.ceil(lnBound / Math.log(2));
        int first = lines.outerFrom();
        int count = Math.max(0, lines.outerTo() - first + 1);
        long[] done = {0};
        double[][] sums = IntStream.range(0, count)
                .parallel()
                .mapToObj(i -> {
                    effort.checkpoint();
                    double s = lines.sum(
                            first + i,
                            a.significand().hi(),
                            a.exponent() - scale,
                            b.significand().hi(),
                            b.exponent() - scale);
                    synchronized (done) {
                        effort.listener().onProgress(++done[0], count);
                    }
                    return new double[] {s, 0};
                })
                .toArray(double[][]::new);
        return total(sums, scale, lines.error() + 8 * U);
    }

    private Enclosure total(double[][] sums, long scale, double rounding) {
        DoubleDouble sum = DoubleDouble.ZERO;
        for (double[] s : sums) {
            sum = sum.plus(DoubleDouble.sum(s[0], s[1]));
        }
        double error = rounding + n * letters.relativeError() + n * 0x1p-98;
        // terms that were scaled to zero are below 2^-890 each, and at most 10^8
        WideDouble lower = WideDouble.of(Math.max(0, sum.value() * (1 - error)), scale);
        WideDouble upper = WideDouble.of(sum.value() * (1 + error) + 0x1p-860, scale);
        return Enclosure.of(lower, upper);
    }

    private static WideDoubleDouble exact(WideDouble w) {
        return WideDoubleDouble.of(DoubleDouble.of(w.significand()), w.exponent());
    }

    @Override
    public Enclosure firstTrace() {
        return Letters.enclosure(totalA.power(n), n * (traceError + 0x1p-100));
    }

    @Override
    public Enclosure secondTrace() {
        return Letters.enclosure(totalB.power(n), n * (traceError + 0x1p-100));
    }

    @Override
    public int dimension() {
        return CopyCount.dimension(dimension, n);
    }

    @Override
    public PairKind kind() {
        return PairKind.TYPES;
    }
}
