package org.minorant.core.pair;

import java.util.Optional;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.PositiveFactor;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;

/**
 * Two operators given as sums of squares: hyperbolic rotations in double find where they separate, {@link RotationCertificate} encloses the answer. Relative accuracy at any
 * depth that the factors' own errors allow: f(1 ± η) ± ν by the sandwich of {@link PositiveFactor}.
 */
final class FactorPair extends PositivePair {

    /** Weights beyond 2^±this would over- or underflow when squared; 1e±300 is within. */
    private static final long FAR = 505;

    private final ColumnPair columns;
    /** Whether the inner products, not the columns, define the pair. */
    private final boolean gramOnly;
    /** The same after an exact change of columns, made when first needed; the same value whoever makes it. */
    private volatile ColumnPair.Changed changed;

    /** A is 2^powerA times what the columns and traceErrorA describe, so that these are on the scale of one; B likewise. */
    private final int powerA;

    private final int powerB;
    private final double relativeError;
    private final double traceErrorA;
    private final double traceErrorB;
    private final Enclosure traceA;
    private final Enclosure traceB;
    /** The same operators by their entries, for answers that the rotations leave wide (operators equal in many directions). */
    private final Optional<DensePair> entries;

    FactorPair(PositiveFactor first, PositiveFactor second) {
        this(first, second, Optional.empty());
    }

    /** The pair of two operators through their factors. */
    static FactorPair fromOperators(PositiveOperator a, PositiveOperator b) {
        return fromOperators(a, b, QuarterTurns.find(a, b), Optional.of(new DensePair(a, b)));
    }

    /** The same, made real by the turns if the factors follow them. */
    static FactorPair fromOperators(
            PositiveOperator a, PositiveOperator b, Optional<QuarterTurns> turns, Optional<DensePair> entries) {
        PositiveFactor x = a.factor().reduced();
        PositiveFactor y = b.factor().reduced();
        Optional<EnclosedMatrix> rx = turns.flatMap(t -> t.columns(x.columns()));
        Optional<EnclosedMatrix> ry = turns.flatMap(t -> t.columns(y.columns()));
        if (rx.isEmpty() || ry.isEmpty()) {
            return new FactorPair(x, y, entries);
        }
        return new FactorPair(
                new PositiveFactor(rx.get(), x.relativeError(), x.traceError()),
                new PositiveFactor(ry.get(), y.relativeError(), y.traceError()),
                entries);
    }

    private FactorPair(PositiveFactor first, PositiveFactor second, Optional<DensePair> entries) {
        this.entries = entries;
        this.gramOnly = false;
        UnitFactor a = UnitFactor.of(first);
        UnitFactor b = UnitFactor.of(second);
        this.columns = ColumnPair.of(a.columns(), b.columns());
        this.powerA = a.power();
        this.powerB = b.power();
        this.relativeError = Math.max(a.relativeError(), b.relativeError());
        this.traceErrorA = a.traceError();
        this.traceErrorB = b.traceError();
        this.traceA = withErrors(columns.gx().traceRe(), a.relativeError(), traceErrorA);
        this.traceB = withErrors(columns.gy().traceRe(), b.relativeError(), traceErrorB);
    }

    private FactorPair(EnclosedMatrix z, EnclosedMatrix gram, int k, double traceErrorA, double traceErrorB) {
        int r = gram.rows();
        this.entries = Optional.empty();
        EnclosedMatrix first = block(z, 0, z.rows(), 0, k);
        EnclosedMatrix second = block(z, 0, z.rows(), k, r);
        int ea = UnitFactor.exponent(first);
        int eb = UnitFactor.exponent(second);
        this.powerA = 2 * ea;
        this.powerB = 2 * eb;
        this.columns = new ColumnPair(
                UnitFactor.scale(first, -ea).midpoint(),
                UnitFactor.scale(second, -eb).midpoint(),
                UnitFactor.scale(block(gram, 0, k, 0, k), -powerA),
                UnitFactor.scale(block(gram, k, r, k, r), -powerB),
                UnitFactor.scale(block(gram, 0, k, k, r), -ea - eb));
        this.gramOnly = true;
        this.relativeError = 0;
        this.traceErrorA = Math.scalb(traceErrorA, -powerA) + (traceErrorA == 0 ? 0 : Double.MIN_VALUE);
        this.traceErrorB = Math.scalb(traceErrorB, -powerB) + (traceErrorB == 0 ? 0 : Double.MIN_VALUE);
        this.traceA = withErrors(columns.gx().traceRe(), 0, this.traceErrorA);
        this.traceB = withErrors(columns.gy().traceRe(), 0, this.traceErrorB);
    }

    /**
     * The pair whose columns have a given Gram matrix G, taken as exact: the certificate needs the inner products only, and the rotations any columns that come close.
     *
     * <p>If G is singular within rounding, the operator meant is its positive part; columns then differ by at most e = √‖G₊ − G‖₁ in Frobenius norm (Powers and Størmer, Comm. Math. Phys. 16, 1, 1970:
     * ‖√G − √G'‖_F² ≤ ‖G − G'‖₁), which changes XX* by at most 2e‖X‖_F + e² in trace norm.
     */
    static FactorPair fromGram(PositiveOperator gram, int firstColumns) {
        int r = gram.dimension();
        if (firstColumns < 1 || firstColumns >= r) {
            throw new InvalidInputException(
                    "PositivePair.ofGram",
                    firstColumns + " of " + r + " columns belong to the first operator",
                    "at least 1 and fewer than all",
                    "split the columns between the two operators");
        }
        double e = Math.sqrt(gram.entryDefect()) * (1 + 0x1p-50);
        EnclosedMatrix z = gram.factor().columns().adjoint();
        EnclosedMatrix g = EnclosedMatrix.of(gram);
        double x = block(z, 0, z.rows(), 0, firstColumns).frobeniusUpper() + e;
        double y = block(z, 0, z.rows(), firstColumns, r).frobeniusUpper() + e;
        return new FactorPair(
                z, g, firstColumns, (2 * e * x + e * e) * (1 + 0x1p-40), (2 * e * y + e * e) * (1 + 0x1p-40));
    }

    private static EnclosedMatrix block(EnclosedMatrix m, int row, int toRow, int column, int toColumn) {
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(toRow - row, toColumn - column);
        for (int i = row; i < toRow; i++) {
            for (int j = column; j < toColumn; j++) {
                b.set(i - row, j - column, m.re(i, j), m.reTail(i, j), m.im(i, j), m.imTail(i, j), m.radius(i, j));
            }
        }
        return b.build();
    }

    private static Enclosure withErrors(Enclosure trace, double relative, double absolute) {
        return trace.times(Enclosure.of(1 - relative, 1 + relative))
                .widen(absolute)
                .max(Enclosure.ZERO);
    }

    @Override
    Enclosure value(WideDouble weightA, WideDouble weightB) {
        Enclosure f = value(columns, relativeError, weightA, weightB);
        if (isWide(f) && !gramOnly && columns.isSmall()) {
            ColumnPair.Changed c = changed;
            if (c == null) {
                c = columns.orthogonalised();
                changed = c;
            }
            f = f.intersect(value(c.pair(), relativeError + 2 * c.relativeError(), weightA, weightB));
        }
        return isWide(f) && entries.isPresent() ? f.intersect(entries.get().fromEigenvalues(weightA, weightB)) : f;
    }

    private static boolean isWide(Enclosure f) {
        return !(f.relativeWidth() <= Refinement.NARROW);
    }

    private Enclosure value(ColumnPair pair, double error, WideDouble weightA, WideDouble weightB) {
        WideDouble a = weightA.timesPowerOfTwo(powerA);
        WideDouble b = weightB.timesPowerOfTwo(powerB);
        long shift = centre(a, b);
        WideDouble wa = a.timesPowerOfTwo(-shift);
        WideDouble wb = b.timesPowerOfTwo(-shift);
        Enclosure f;
        if (Math.abs(wa.exponent()) > FAR || Math.abs(wb.exponent()) > FAR) {
            // the heavier weight is lowered until the lighter columns can be held: f is monotone, and levels off at
            // what the support of the heavier operator holds of the lighter one
            WideDouble heavy = WideDouble.of(1, FAR);
            WideDouble light = WideDouble.of(1, -FAR);
            WideDouble x = wa.compareTo(wb) > 0 ? heavy : light;
            WideDouble y = wa.compareTo(wb) > 0 ? light : heavy;
            WideDouble factor = wa.min(wb).timesPowerOfTwo(FAR);
            Enclosure near = pair.enclose(x.toDoubleDown(), y.toDoubleDown());
            WideDouble level = wa.compareTo(wb) > 0
                    ? SupportTrace.upper(pair.gx(), pair.cross())
                    : SupportTrace.upper(pair.gy(), pair.cross().adjoint());
            WideDouble least = near.lowerWide().timesDown(factor);
            WideDouble most = level.isInfinite() ? level : level.timesUp(wa.min(wb));
            f = Enclosure.of(least, most.max(least));
        } else {
            f = pair.enclose(wa.toDoubleDown(), wb.toDoubleDown());
        }
        double eta = error + 0x1p-97;
        Enclosure errors = Enclosure.of(wa, wa)
                .times(traceErrorA)
                .plus(Enclosure.of(wb, wb).times(traceErrorB));
        Enclosure relative = f.times(Enclosure.of(1 - eta, 1 + eta));
        Enclosure all = Enclosure.of(
                relative.lowerWide().plusDown(errors.upperWide().negate()),
                relative.upperWide().plusUp(errors.upperWide()));
        return Enclosure.of(scaled(all.lowerWide(), shift), scaled(all.upperWide(), shift));
    }

    private static Enclosure unscaled(Enclosure trace, int power) {
        return Enclosure.of(
                trace.lowerWide().timesPowerOfTwo(power), trace.upperWide().timesPowerOfTwo(power));
    }

    private static WideDouble scaled(WideDouble x, long shift) {
        return x.isInfinite() ? x : x.timesPowerOfTwo(shift);
    }

    /** The power of two that centres the two weighted traces around one. */
    private long centre(WideDouble a, WideDouble b) {
        long ea = a.exponent() + traceA.upperWide().exponent();
        long eb = b.exponent() + traceB.upperWide().exponent();
        return Math.floorDiv(ea + eb, 2L);
    }

    @Override
    PositivePair power(int n) {
        return entries.isPresent() ? entries.get().power(n) : super.power(n);
    }

    @Override
    public Enclosure firstTrace() {
        return unscaled(traceA, powerA);
    }

    @Override
    public Enclosure secondTrace() {
        return unscaled(traceB, powerB);
    }

    @Override
    public int dimension() {
        return columns.x().rows();
    }

    @Override
    public PairKind kind() {
        return PairKind.FACTORED;
    }
}
