package org.minorant.core.pair;

import java.math.BigDecimal;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Enclosure;
import org.minorant.core.PositiveFactor;
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

    private final PositiveFactor first;
    private final PositiveFactor second;
    private final EnclosedMatrix gx;
    private final EnclosedMatrix gy;
    private final EnclosedMatrix cross;
    private final Enclosure traceA;
    private final Enclosure traceB;

    FactorPair(PositiveFactor first, PositiveFactor second) {
        this.first = first;
        this.second = second;
        EnclosedMatrix x = first.columns();
        EnclosedMatrix y = second.columns();
        this.gx = x.adjoint().times(x);
        this.gy = y.adjoint().times(y);
        this.cross = crossProducts(x, y);
        this.traceA = withErrors(gx.traceRe(), first);
        this.traceB = withErrors(gy.traceRe(), second);
    }

    private static Enclosure withErrors(Enclosure trace, PositiveFactor f) {
        return trace.times(Enclosure.of(1 - f.relativeError(), 1 + f.relativeError()))
                .widen(f.traceError())
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
    Enclosure value(WideDouble a, WideDouble b) {
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
        double eta = Math.max(first.relativeError(), second.relativeError()) + 0x1p-97;
        Enclosure errors = Enclosure.of(wa, wa)
                .times(first.traceError())
                .plus(Enclosure.of(wb, wb).times(second.traceError()));
        Enclosure wide = f.times(Enclosure.of(1 - eta, 1 + eta));
        Enclosure all = Enclosure.of(
                wide.lowerWide().plusDown(errors.upperWide().negate()),
                wide.upperWide().plusUp(errors.upperWide()));
        return Enclosure.of(scaled(all.lowerWide(), shift), scaled(all.upperWide(), shift));
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
        EnclosedMatrix x = scale(first.columns(), sa).midpoint();
        EnclosedMatrix y = scale(second.columns(), sb).midpoint();
        HyperbolicSweeps sweeps = HyperbolicSweeps.run(x, y, wgx, wgy, unitCross, e);
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
        return traceA;
    }

    @Override
    public Enclosure secondTrace() {
        return traceB;
    }

    @Override
    public int dimension() {
        return first.dimension();
    }

    @Override
    public PairKind kind() {
        return PairKind.FACTORED;
    }
}
