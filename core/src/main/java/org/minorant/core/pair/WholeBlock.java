package org.minorant.core.pair;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;
import org.minorant.core.Enclosure;
import org.minorant.core.Operator;
import org.minorant.core.internal.door.EigenResidual;
import org.minorant.core.internal.door.HermitianEigen;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * A block in its whole space, by the eigenvalues of the difference: f = ½(Tr A + Tr B − ‖A − B‖₁), right to a part of the traces, which is enough where the answer is not much smaller, and far quicker than rotations
 * of as many columns.
 *
 * <p>D = A − B is formed as an {@link EnclosedMatrix}, with the errors of the overlaps in its radii. <b>In double:</b> Σ|Λ| differs from ‖D‖₁ by the trace error of the decomposition ({@link EigenResidual}) and
 * by what rounding D to double and its radii amount to, √d times their Frobenius norm. <b>In double-double:</b> by {@link EnclosedSpectrum} ‖D − VΛV*‖_F ≤ r and ‖V*V − 1‖ ≤ δ; with V = QH, Q unitary,
 * |‖VΛV*‖₁ − Σ|Λ|| ≤ ‖HΛH − Λ‖₁ ≤ (2δ + δ²)Σ|Λ|, as ‖H − 1‖ ≤ δ.
 */
final class WholeBlock {

    private static final double U = 0x1p-53;
    private static final double UP = 1 + 0x1p-40;

    private final EnclosedMatrix difference;
    private final DoubleDouble traces;
    private final double traceError;

    /**
     * A difference of two positive operators.
     *
     * @param difference D
     * @param traces Tr A + Tr B
     * @param traceError how much the latter may err
     */
    WholeBlock(EnclosedMatrix difference, DoubleDouble traces, double traceError) {
        this.difference = difference;
        this.traces = traces;
        this.traceError = traceError;
    }

    /** The width that can be expected of {@link #inDouble}. */
    static double widthInDouble(int d, double traces) {
        return 4 * Math.sqrt(d) * d * U * traces;
    }

    /** The width that can be expected of {@link #inDoubleDouble}. */
    static double widthInDoubleDouble(int d, double traces) {
        return d * 0x1p-88 * traces;
    }

    Enclosure inDouble() {
        int d = difference.rows();
        Operator top = difference.toOperator();
        double[] re = top.realParts();
        double[] im = top.imaginaryParts();
        double[] or = re.clone();
        double[] oi = im.clone();
        // exactly Hermitian, as the solver reads one triangle
        for (int i = 0; i < d; i++) {
            for (int j = 0; j < i; j++) {
                re[j * d + i] = re[i * d + j];
                if (im.length != 0) {
                    im[j * d + i] = -im[i * d + j];
                }
            }
            if (im.length != 0) {
                im[i * d + i] = 0;
            }
        }
        double changed = 0;
        for (int i = 0; i < d * d; i++) {
            double x = re[i] - or[i];
            double y = im.length == 0 ? 0 : im[i] - oi[i];
            changed += x * x + y * y;
        }
        double rounding = difference.minus(EnclosedMatrix.of(top)).frobeniusUpper() + Math.sqrt(changed) * UP;
        HermitianEigen e = HermitianEigen.of(d, re, im);
        double error = EigenResidual.of(d, re, im, e).traceError() + Math.sqrt(d) * rounding;
        DoubleDouble sum = DoubleDouble.ZERO;
        for (double v : e.values()) {
            sum = sum.plus(DoubleDouble.of(Math.abs(v)));
        }
        return half(sum, error * UP);
    }

    Enclosure inDoubleDouble() {
        int d = difference.rows();
        EnclosedSpectrum s = EnclosedSpectrum.of(difference);
        DoubleDouble sum = DoubleDouble.ZERO;
        for (int i = 0; i < d; i++) {
            DoubleDouble v = new DoubleDouble(s.value(i), s.valueTail(i));
            sum = sum.plus(v.hi() < 0 ? v.negate() : v);
        }
        double error = Math.sqrt(d) * s.residual() + 2.1 * s.defect() * sum.hi();
        return half(sum, error * UP);
    }

    /** ½(Tr A + Tr B − sum), the sum of d numbers right to the error and to its own rounding. */
    private Enclosure half(DoubleDouble sum, double error) {
        DoubleDouble f = traces.minus(sum).times(0.5);
        double all = 0.5 * (error + traceError + (difference.rows() + 2) * DoubleDouble.EPS * (sum.hi() + traces.hi()));
        return Enclosure.exact(f.hi()).plus(Enclosure.exact(f.lo())).widen(all * UP);
    }
}
