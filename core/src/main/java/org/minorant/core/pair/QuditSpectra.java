package org.minorant.core.pair;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;
import java.util.Optional;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.PositiveFactor;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * What copies of two positive operators of small dimension depend on: their eigenvalues and the overlaps U_ij = ⟨v_i, w_j⟩ of their eigenvectors.
 *
 * <p>The entries (of XX* where a factor X defines the operator) are decomposed to about 150 digits ({@link DigitSpectrum}), A = QΛQ* + E with ‖E‖ ≤ e. Eigenvalues above c = 2^104 e keep a relative
 * error of 2^-103, rounding to double-double included; the others count as zero. As ±E ≤ e·1 ≤ 2^-104 Λ on the span of the former, (1 − 2^-103)Λ' − N ≤ A ≤ (1 + 2^-103)Λ' + N with N = c + e on the span of the latter.
 *
 * @param first spectrum of A
 * @param second spectrum of B
 * @param overlaps U
 */
record QuditSpectra(Spectrum first, Spectrum second, QuditOverlaps overlaps) {

    private static final MathContext UP = new MathContext(20, RoundingMode.UP);
    private static final BigDecimal SMALL = BigDecimal.valueOf(2).pow(104);
    private static final double ROUNDING = 0x1p-103;

    /**
     * The eigenvalues of one operator, and how well they describe it.
     *
     * @param values eigenvalues, descending; zeros are exact
     * @param relativeError η: (1 − η)A' − N ≤ A ≤ (1 + η)A' + N
     * @param traceError ν, an upper end of Tr N
     */
    record Spectrum(WideDoubleDouble[] values, double relativeError, WideDouble traceError) {

        /** Whether the two largest eigenvalues are well within the range of double. */
        boolean isPlain() {
            return Math.abs(values[0].exponent()) < 400
                    && (values[1].significand().hi() == 0 || values[1].exponent() > -800);
        }

        QubitSpectra.Spectrum asQubit() {
            DoubleDouble large = values[0].toDoubleDouble(0);
            double nu = (2 * traceError.toDoubleUp() + large.hi() * 0x1p-388) * (1 + 0x1p-50);
            return new QubitSpectra.Spectrum(large, values[1].toDoubleDouble(0), relativeError, nu);
        }

        int rank() {
            int r = 0;
            while (r < values.length && values[r].significand().hi() > 0) {
                r++;
            }
            return r;
        }
    }

    static QuditSpectra of(PositiveOperator a, PositiveOperator b) {
        DigitSpectrum p = DigitSpectrum.of(entries(a));
        DigitSpectrum q = DigitSpectrum.of(entries(b));
        return new QuditSpectra(
                spectrum(a, p),
                spectrum(b, q),
                QuditOverlaps.of(
                        p.vectors().adjoint().times(q.vectors()), p.defect().add(q.defect())));
    }

    /**
     * The same as operators on a qubit, if one of them has rank two, the other at most that, and the support of the former holds that of the latter. What the overlaps leave out, {@link QuditOverlaps#ABSOLUTE} each, turns
     * eigenvectors by less than 2^-390, which is added to the trace error.
     */
    Optional<QubitSpectra> asQubit() {
        boolean firstIsPlane = first.rank() == 2;
        int small = firstIsPlane ? second.rank() : first.rank();
        if (!firstIsPlane && second.rank() != 2 || small == 0 || small > 2 || !first.isPlain() || !second.isPlain()) {
            return Optional.empty();
        }
        for (int i = 0; i < small; i++) {
            for (int j = 2; j < first.values().length; j++) {
                if ((firstIsPlane ? overlaps.modulus(j, i) : overlaps.modulus(i, j)) != 0) {
                    return Optional.empty();
                }
            }
        }
        DoubleDouble cos = overlaps.absolute(0, 0);
        DoubleDouble sin = firstIsPlane ? overlaps.absolute(1, 0) : overlaps.absolute(0, 1);
        return Optional.of(new QubitSpectra(first.asQubit(), second.asQubit(), cos, sin));
    }

    private static DigitMatrix entries(PositiveOperator a) {
        int d = a.dimension();
        if (!a.isDefinedByFactor()) {
            DigitMatrix m = DigitMatrix.zero(d, d);
            for (int i = 0; i < d; i++) {
                for (int j = 0; j < d; j++) {
                    m.re()[i][j] = new BigDecimal(a.re(i, j));
                    m.im()[i][j] = new BigDecimal(a.im(i, j));
                }
            }
            return m;
        }
        EnclosedMatrix x = a.factor().columns();
        DigitMatrix m = DigitMatrix.zero(d, x.columns());
        for (int i = 0; i < d; i++) {
            for (int j = 0; j < x.columns(); j++) {
                m.re()[i][j] = new DoubleDouble(x.re(i, j), x.reTail(i, j)).toBigDecimal();
                m.im()[i][j] = new DoubleDouble(x.im(i, j), x.imTail(i, j)).toBigDecimal();
            }
        }
        return m.times(m.adjoint());
    }

    private static Spectrum spectrum(PositiveOperator a, DigitSpectrum s) {
        BigDecimal limit = s.error().multiply(SMALL);
        BigDecimal lost = BigDecimal.ZERO;
        WideDoubleDouble[] values = new WideDoubleDouble[a.dimension()];
        for (int i = 0; i < values.length; i++) {
            if (s.values()[i].compareTo(limit) > 0) {
                values[i] = wide(s.values()[i]);
            } else {
                values[i] = WideDoubleDouble.ZERO;
                lost = lost.add(limit).add(s.error());
            }
        }
        if (!a.isDefinedByFactor()) {
            return new Spectrum(values, ROUNDING, wideUp(lost));
        }
        PositiveFactor f = a.factor();
        double relative = (f.relativeError() + ROUNDING) * (1 + f.relativeError());
        return new Spectrum(values, relative, wideUp(lost).plusUp(wideUp(new BigDecimal(f.traceError()))));
    }

    /** Of an operator that is zero altogether nothing is lost: all is exact. */
    private static WideDouble wideUp(BigDecimal x) {
        if (x.signum() == 0) {
            return WideDouble.ZERO;
        }
        WideDoubleDouble w = wide(x.round(UP));
        return WideDouble.of(Math.nextUp(w.significand().hi()) * (1 + 0x1p-50), w.exponent());
    }

    /** The nearest number with a double-double significand, to 2^-104. */
    private static WideDoubleDouble wide(BigDecimal x) {
        // a power of two near x, from its decimal exponent
        long e = Math.round((x.precision() - (double) x.scale()) * (Math.log(10) / Math.log(2)));
        BigDecimal power = BigDecimal.valueOf(2).pow((int) Math.abs(e));
        BigDecimal unit = e > 0 ? x.divide(power, DigitSpectrum.DIGITS) : x.multiply(power);
        return WideDoubleDouble.of(DoubleDouble.of(unit), e);
    }
}
