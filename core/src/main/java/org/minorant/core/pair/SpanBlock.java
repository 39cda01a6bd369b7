package org.minorant.core.pair;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * A block of two operators of low rank, by one eigendecomposition of A − B in the span of their columns, right to about 1e-14 of the traces: where the answer is not much smaller, far quicker than rotations, and at
 * ease with columns of A and B that nearly coincide.
 *
 * <p><b>Argument.</b> What defines the pair is the Gram matrix G of all columns W = (X, Y); the columns Z that stand for them have another, G' = Z*Z. There are unitaries V with ‖W − VZ‖_F ≤ ‖√G − √G'‖_F ≤ √e for
 * e ≥ ‖G − G'‖₁ (R. T. Powers, E. Størmer, Commun. Math. Phys. 16, 1, 1970, from memory), and √f is 1-Lipschitz in X and in Y, so that |√f(W) − √f(Z)| ≤ √(2e). f(Z) is the value of {@link WholeBlock}.
 */
final class SpanBlock {

    private static final double UP = 1 + 0x1p-40;

    private SpanBlock() {}

    /**
     * Encloses Tr[A ∧ B].
     *
     * @param pair columns and what their inner products are known to be
     * @param checkpoint passed between the steps
     */
    static Enclosure enclose(ColumnPair pair, Runnable checkpoint) {
        EnclosedMatrix x = pair.x();
        EnclosedMatrix y = pair.y();
        EnclosedMatrix bra = y.adjoint();
        EnclosedMatrix gx = x.adjoint().times(x);
        EnclosedMatrix gy = bra.times(y);
        double a = gx.minus(pair.gx()).frobeniusUpper();
        double b = gy.minus(pair.gy()).frobeniusUpper();
        double c = x.adjoint().times(y).minus(pair.cross()).frobeniusUpper();
        double e = Math.sqrt((x.columns() + y.columns()) * (a * a + b * b + 2 * c * c)) * UP;
        checkpoint.run();
        EnclosedMatrix difference = x.times(x.adjoint()).minus(y.times(bra));
        checkpoint.run();
        DoubleDouble traces = trace(gx).plus(trace(gy));
        double traceError = radii(gx) + radii(gy) + (x.columns() + y.columns() + 2) * DoubleDouble.EPS * traces.hi();
        Enclosure f =
                new WholeBlock(difference, traces, traceError * UP).inDouble().max(Enclosure.ZERO);
        WideDouble off = WideDouble.of(2 * e).sqrtUp();
        return f.sqrt()
                .plus(Enclosure.of(off.negate(), off))
                .max(Enclosure.ZERO)
                .square();
    }

    private static DoubleDouble trace(EnclosedMatrix gram) {
        DoubleDouble s = DoubleDouble.ZERO;
        for (int i = 0; i < gram.rows(); i++) {
            s = s.plus(new DoubleDouble(gram.re(i, i), gram.reTail(i, i)));
        }
        return s;
    }

    private static double radii(EnclosedMatrix gram) {
        double s = 0;
        for (int i = 0; i < gram.rows(); i++) {
            s += gram.radius(i, i);
        }
        return s;
    }
}
