package org.minorant.core.pair;

import java.math.BigDecimal;
import java.math.MathContext;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.PositiveFactor;
import org.minorant.core.PositiveOperator;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * Everything that copies of two positive operators on a qubit depend on: their eigenvalues, and the angle between their Bloch vectors.
 *
 * <p>The entries (of XX* where a factor X defines the operator) are evaluated exactly, so all eight numbers have relative accuracy, 2^-103 or better, whatever their size: the smaller
 * eigenvalue is the determinant over the larger one, and the sine of the angle comes from the vector product.
 *
 * @param first the eigenvalues of A, the larger one first
 * @param second the eigenvalues of B
 * @param cos cosine of half the angle between the Bloch vectors
 * @param sin sine of half the angle
 */
record QubitSpectra(Spectrum first, Spectrum second, DoubleDouble cos, DoubleDouble sin) {

    private static final MathContext DIGITS = new MathContext(60);
    private static final BigDecimal TWO = BigDecimal.valueOf(2);

    /**
     * Two eigenvalues and how well they describe the operator.
     *
     * @param large the larger one
     * @param small the smaller one, 0 if the operator has rank one
     * @param relativeError η of the operator's factor
     * @param traceError ν of the operator's factor
     */
    record Spectrum(DoubleDouble large, DoubleDouble small, double relativeError, double traceError) {

        /** The smaller eigenvalue over the larger one; 0 for the zero operator. */
        DoubleDouble ratio() {
            return large.hi() == 0 ? DoubleDouble.ZERO : small.dividedBy(large);
        }
    }

    /** A Bloch vector this short, relative to the trace, is rounding of a factor: the operator is a multiple of the identity within that relative error. */
    private static final double NO_DIRECTION = 0x1p-94;

    /** Trace and unnormalised Bloch vector of a qubit operator, exactly. */
    private record Entries(
            BigDecimal trace, BigDecimal x, BigDecimal y, BigDecimal z, double relativeError, double traceError) {

        BigDecimal squaredLength() {
            return x.multiply(x).add(y.multiply(y)).add(z.multiply(z));
        }

        BigDecimal length() {
            return squaredLength().sqrt(DIGITS);
        }

        Entries withRelative(double more) {
            return new Entries(trace, x, y, z, relativeError + more, traceError);
        }

        BigDecimal largeEigenvalue() {
            return trace.add(length()).divide(TWO);
        }

        /** det/λ₁; a negative determinant is rounding of the entries, and the operator meant is their positive part. */
        BigDecimal smallEigenvalue() {
            BigDecimal large = largeEigenvalue();
            BigDecimal four = trace.multiply(trace).subtract(squaredLength());
            return four.signum() <= 0 || large.signum() == 0
                    ? BigDecimal.ZERO
                    : four.divide(large.multiply(BigDecimal.valueOf(4)), DIGITS);
        }

        Spectrum spectrum() {
            return new Spectrum(
                    DoubleDouble.of(largeEigenvalue()), DoubleDouble.of(smallEigenvalue()), relativeError, traceError);
        }
    }

    static QubitSpectra of(PositiveOperator a, PositiveOperator b) {
        Entries p = entries(a);
        Entries q = entries(b);
        BigDecimal lengths = p.length().multiply(q.length());
        if (lengths.signum() == 0) {
            return new QubitSpectra(p.spectrum(), q.spectrum(), DoubleDouble.ONE, DoubleDouble.ZERO);
        }
        BigDecimal dot = p.x.multiply(q.x).add(p.y.multiply(q.y)).add(p.z.multiply(q.z));
        BigDecimal cross =
                square(p.y, q.z, p.z, q.y).add(square(p.z, q.x, p.x, q.z)).add(square(p.x, q.y, p.y, q.x));
        BigDecimal sine = cross.sqrt(DIGITS).divide(lengths, DIGITS);
        BigDecimal cosine = dot.divide(lengths, DIGITS);
        // the larger of the two from the half-angle formula, the smaller one from sin θ = 2 sin cos
        BigDecimal larger = BigDecimal.ONE.add(cosine.abs()).divide(TWO).sqrt(DIGITS);
        BigDecimal smaller = sine.divide(larger.multiply(TWO), DIGITS);
        boolean acute = dot.signum() >= 0;
        BigDecimal turn = smaller.multiply(TWO).multiply(q.length());
        BigDecimal small = q.smallEigenvalue();
        if (turn.signum() > 0 && turn.compareTo(small.multiply(new BigDecimal(NO_DIRECTION))) < 0) {
            // turning B by the angle 2φ changes it by 2 sin φ times its Bloch length at most, a relative error of that
            // over its least eigenvalue
            Spectrum turned = q.withRelative(NO_DIRECTION).spectrum();
            return acute
                    ? new QubitSpectra(p.spectrum(), turned, DoubleDouble.ONE, DoubleDouble.ZERO)
                    : new QubitSpectra(p.spectrum(), turned, DoubleDouble.ZERO, DoubleDouble.ONE);
        }
        return new QubitSpectra(
                p.spectrum(),
                q.spectrum(),
                DoubleDouble.of(acute ? larger : smaller),
                DoubleDouble.of(acute ? smaller : larger));
    }

    private static BigDecimal square(BigDecimal a, BigDecimal b, BigDecimal c, BigDecimal d) {
        BigDecimal e = a.multiply(b).subtract(c.multiply(d));
        return e.multiply(e);
    }

    private static Entries entries(PositiveOperator p) {
        if (!p.isDefinedByFactor()) {
            return entries(
                    new BigDecimal(p.re(0, 0)),
                    new BigDecimal(p.re(1, 1)),
                    new BigDecimal(p.re(1, 0)),
                    new BigDecimal(p.im(1, 0)),
                    0,
                    0);
        }
        PositiveFactor f = p.factor();
        EnclosedMatrix x = f.columns();
        BigDecimal up = BigDecimal.ZERO;
        BigDecimal down = BigDecimal.ZERO;
        BigDecimal re = BigDecimal.ZERO;
        BigDecimal im = BigDecimal.ZERO;
        for (int j = 0; j < x.columns(); j++) {
            BigDecimal ar = new DoubleDouble(x.re(0, j), x.reTail(0, j)).toBigDecimal();
            BigDecimal ai = new DoubleDouble(x.im(0, j), x.imTail(0, j)).toBigDecimal();
            BigDecimal br = new DoubleDouble(x.re(1, j), x.reTail(1, j)).toBigDecimal();
            BigDecimal bi = new DoubleDouble(x.im(1, j), x.imTail(1, j)).toBigDecimal();
            up = up.add(ar.multiply(ar)).add(ai.multiply(ai));
            down = down.add(br.multiply(br)).add(bi.multiply(bi));
            // entry (1, 0) is Σ b ā
            re = re.add(br.multiply(ar)).add(bi.multiply(ai));
            im = im.add(bi.multiply(ar)).subtract(br.multiply(ai));
        }
        return entries(up, down, re, im, f.relativeError(), f.traceError());
    }

    private static Entries entries(
            BigDecimal up, BigDecimal down, BigDecimal re, BigDecimal im, double relative, double trace) {
        Entries e = new Entries(up.add(down), re.multiply(TWO), im.multiply(TWO), up.subtract(down), relative, trace);
        BigDecimal least = e.trace.multiply(new BigDecimal(NO_DIRECTION));
        if (e.squaredLength().signum() > 0 && e.squaredLength().compareTo(least.multiply(least)) < 0) {
            BigDecimal zero = BigDecimal.ZERO;
            return new Entries(e.trace, zero, zero, zero, relative + NO_DIRECTION, trace);
        }
        return e;
    }
}
