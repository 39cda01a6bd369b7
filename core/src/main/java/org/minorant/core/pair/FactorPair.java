package org.minorant.core.pair;

import java.math.BigDecimal;
import java.util.Optional;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.PositiveFactor;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * Two operators given as sums of squares: hyperbolic rotations in double find where they separate, {@link RotationCertificate} encloses the answer. Relative accuracy at any
 * depth that the factors' own errors allow: f(1 ± η) ± ν by the sandwich of {@link PositiveFactor}.
 */
final class FactorPair extends PositivePair {

    /** Inner products across that lost more than this to cancellation are computed exactly. */
    private static final double CANCELLED = 0x1p-70;

    private static final long EXACT_PRODUCTS = 2_000_000;

    /** Weights beyond 2^±this would over- or underflow when squared; 1e±300 is within. */
    private static final long FAR = 505;

    /** Columns that the rotations work on; only their inner products below enter the certificate. */
    private final EnclosedMatrix x;

    private final EnclosedMatrix y;
    /** A is 2^powerA times what x, gx and traceErrorA describe, so that these are on the scale of one; B likewise. */
    private final int powerA;

    private final int powerB;
    private final double relativeError;
    private final double traceErrorA;
    private final double traceErrorB;
    private final EnclosedMatrix gx;
    private final EnclosedMatrix gy;
    private final EnclosedMatrix cross;
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
        UnitFactor a = UnitFactor.of(first);
        UnitFactor b = UnitFactor.of(second);
        this.x = a.columns();
        this.y = b.columns();
        this.powerA = a.power();
        this.powerB = b.power();
        this.gx = x.adjoint().times(x);
        this.gy = y.adjoint().times(y);
        this.cross = crossProducts(x, y);
        this.relativeError = Math.max(a.relativeError(), b.relativeError());
        this.traceErrorA = a.traceError();
        this.traceErrorB = b.traceError();
        this.traceA = withErrors(gx.traceRe(), a.relativeError(), traceErrorA);
        this.traceB = withErrors(gy.traceRe(), b.relativeError(), traceErrorB);
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
        this.x = UnitFactor.scale(first, -ea).midpoint();
        this.y = UnitFactor.scale(second, -eb).midpoint();
        this.gx = UnitFactor.scale(block(gram, 0, k, 0, k), -powerA);
        this.gy = UnitFactor.scale(block(gram, k, r, k, r), -powerB);
        this.cross = UnitFactor.scale(block(gram, 0, k, k, r), -ea - eb);
        this.relativeError = 0;
        this.traceErrorA = Math.scalb(traceErrorA, -powerA) + (traceErrorA == 0 ? 0 : Double.MIN_VALUE);
        this.traceErrorB = Math.scalb(traceErrorB, -powerB) + (traceErrorB == 0 ? 0 : Double.MIN_VALUE);
        this.traceA = withErrors(gx.traceRe(), 0, this.traceErrorA);
        this.traceB = withErrors(gy.traceRe(), 0, this.traceErrorB);
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

    /** X*Y; entries that cancel are summed exactly, so that nearly orthogonal columns keep the digits of their overlap. */
    private static EnclosedMatrix crossProducts(EnclosedMatrix x, EnclosedMatrix y) {
        EnclosedMatrix m = x.adjoint().times(y);
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(m.rows(), m.columns());
        long budget = EXACT_PRODUCTS;
        for (int i = 0; i < m.rows(); i++) {
            for (int j = 0; j < m.columns(); j++) {
                double size = Math.hypot(m.re(i, j), m.im(i, j));
                if (m.radius(i, j) <= CANCELLED * size || (budget -= x.rows()) < 0) {
                    b.set(i, j, m.re(i, j), m.reTail(i, j), m.im(i, j), m.imTail(i, j), m.radius(i, j));
                } else {
                    exactProduct(b, x, i, y, j);
                }
            }
        }
        return b.build();
    }

    private static void exactProduct(EnclosedMatrix.Builder b, EnclosedMatrix x, int i, EnclosedMatrix y, int j) {
        BigDecimal re = BigDecimal.ZERO;
        BigDecimal im = BigDecimal.ZERO;
        for (int m = 0; m < x.rows(); m++) {
            BigDecimal xr = new DoubleDouble(x.re(m, i), x.reTail(m, i)).toBigDecimal();
            BigDecimal xi = new DoubleDouble(x.im(m, i), x.imTail(m, i)).toBigDecimal();
            BigDecimal yr = new DoubleDouble(y.re(m, j), y.reTail(m, j)).toBigDecimal();
            BigDecimal yi = new DoubleDouble(y.im(m, j), y.imTail(m, j)).toBigDecimal();
            re = re.add(xr.multiply(yr)).add(xi.multiply(yi));
            im = im.add(xr.multiply(yi)).subtract(xi.multiply(yr));
        }
        DoubleDouble r = DoubleDouble.of(re);
        DoubleDouble s = DoubleDouble.of(im);
        double size = Math.abs(r.hi()) + Math.abs(s.hi());
        b.set(
                i,
                j,
                r.hi(),
                r.lo(),
                s.hi(),
                s.lo(),
                size == 0 && re.signum() == 0 && im.signum() == 0 ? 0 : size * 0x1p-103 + 0x1p-1070);
    }

    @Override
    Enclosure value(WideDouble weightA, WideDouble weightB) {
        WideDouble a = weightA.timesPowerOfTwo(powerA);
        WideDouble b = weightB.timesPowerOfTwo(powerB);
        long shift = centre(a, b);
        WideDouble wa = a.timesPowerOfTwo(-shift);
        WideDouble wb = b.timesPowerOfTwo(-shift);
        Enclosure f;
        if (Math.abs(wa.exponent()) > FAR || Math.abs(wb.exponent()) > FAR) {
            // the heavier weight is lowered until the lighter columns can be held; f is monotone and below both traces
            WideDouble most = WideDouble.of(1, FAR);
            WideDouble least = WideDouble.of(1, -FAR);
            WideDouble x = wa.compareTo(wb) > 0 ? most : least;
            WideDouble y = wa.compareTo(wb) > 0 ? least : most;
            WideDouble factor = wa.min(wb).timesPowerOfTwo(FAR);
            Enclosure near = columnsOnly(x.toDoubleDown(), y.toDoubleDown());
            f = Enclosure.of(near.lowerWide().timesDown(factor), WideDouble.POSITIVE_INFINITY);
        } else {
            f = columnsOnly(wa.toDoubleDown(), wb.toDoubleDown());
        }
        double eta = relativeError + 0x1p-97;
        Enclosure errors = Enclosure.of(wa, wa)
                .times(traceErrorA)
                .plus(Enclosure.of(wb, wb).times(traceErrorB));
        Enclosure relative = f.times(Enclosure.of(1 - eta, 1 + eta));
        Enclosure all = Enclosure.of(
                relative.lowerWide().plusDown(errors.upperWide().negate()),
                relative.upperWide().plusUp(errors.upperWide()));
        Enclosure result = Enclosure.of(scaled(all.lowerWide(), shift), scaled(all.upperWide(), shift));
        boolean wide = !(result.relativeWidth() <= Refinement.NARROW);
        return wide && entries.isPresent() ? result.intersect(entries.get().fromEigenvalues(weightA, weightB)) : result;
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

    private Enclosure columnsOnly(double wa, double wb) {
        DoubleDouble sa = DoubleDouble.of(wa).sqrt();
        DoubleDouble sb = DoubleDouble.of(wb).sqrt();
        EnclosedMatrix wgx = scale(scale(gx, sa), sa);
        EnclosedMatrix wgy = scale(scale(gy, sb), sb);
        EnclosedMatrix m = scale(scale(cross, sa), sb);
        double largest = 0;
        for (int i = 0; i < m.rows(); i++) {
            for (int j = 0; j < m.columns(); j++) {
                largest = Math.max(largest, m.modulusUpper(i, j));
            }
        }
        if (largest == 0) {
            return Enclosure.ZERO;
        }
        int e = Math.getExponent(largest);
        EnclosedMatrix unitCross = powerOfTwo(m, -e);
        EnclosedMatrix wx = scale(x, sa).midpoint();
        EnclosedMatrix wy = scale(y, sb).midpoint();
        HyperbolicSweeps sweeps = HyperbolicSweeps.run(wx, wy, wgx, wgy, unitCross, e);
        return RotationCertificate.enclose(wgx, wgy, unitCross, e, sweeps);
    }

    private static EnclosedMatrix scale(EnclosedMatrix m, DoubleDouble s) {
        return s.lo() == 0 ? m.times(s.hi()) : m.times(s.hi()).plus(m.times(s.lo()));
    }

    /** m · 2^e in steps that do not overflow. */
    private static EnclosedMatrix powerOfTwo(EnclosedMatrix m, int e) {
        int half = e / 2;
        return m.times(Math.scalb(1.0, half)).times(Math.scalb(1.0, e - half));
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
        return x.rows();
    }

    @Override
    public PairKind kind() {
        return PairKind.FACTORED;
    }
}
