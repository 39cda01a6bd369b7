package org.minorant.core.pair;

import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.door.EigenResidual;
import org.minorant.core.internal.door.HermitianEigen;

/**
 * Two dense operators: f = ½(Tr A + Tr B − ‖A − B‖₁), from one Hermitian eigendecomposition.
 *
 * <p><b>Enclosure.</b> Let C be the rounded difference of the weighted entries. Σ|Λ| differs from ‖C‖₁ by at most the trace error of the
 * decomposition (see EigenResidual). Rounding of the entries, and what the entries differ from the operators meant, enter in trace norm:
 * |Tr[A'∧B'] − Tr[A∧B]| ≤ ‖A'−A‖₁ + ‖B'−B‖₁.
 */
final class DensePair extends PositivePair {

    private static final double U = 0x1p-53;

    private final PositiveOperator a;
    private final PositiveOperator b;
    private final int exponentA;
    private final int exponentB;
    /** Exact phases that make both operators real; a real problem costs a quarter. */
    private final Optional<QuarterTurns> turns;

    private final Refinement refinement;

    DensePair(PositiveOperator a, PositiveOperator b) {
        this.a = a;
        this.b = b;
        this.exponentA = exponent(a);
        this.exponentB = exponent(b);
        this.turns = QuarterTurns.find(a, b);
        this.refinement = new Refinement(a, b);
    }

    @Override
    Enclosure value(WideDouble wa, WideDouble wb) {
        return refinement.narrow(fromEigenvalues(wa, wb), wa, wb);
    }

    Enclosure fromEigenvalues(WideDouble wa, WideDouble wb) {
        // both operators are brought to order one by powers of two, or tiny ones would lose their error bound to
        // underflow
        long ea = wa.exponent() + exponentA;
        long eb = wb.exponent() + exponentB;
        long shift = largest(a) == 0 ? eb : largest(b) == 0 ? ea : Math.max(ea, eb);
        // a weight that underflows here is below 1e-300 of the other; losing it is inside the error below
        double x = WideDouble.of(wa.significand(), ea - shift).toDoubleDown();
        double y = WideDouble.of(wb.significand(), eb - shift).toDoubleDown();
        int n = a.dimension();
        double[] re = new double[n * n];
        boolean real = a.isReal() && b.isReal();
        double[] im = real || turns.isPresent() ? new double[0] : new double[n * n];
        double size = 0;
        // in two steps, as the power itself may be out of range
        double halfA = Math.scalb(1.0, -exponentA / 2);
        double restA = Math.scalb(1.0, -exponentA + exponentA / 2);
        double halfB = Math.scalb(1.0, -exponentB / 2);
        double restB = Math.scalb(1.0, -exponentB + exponentB / 2);
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                double p = x * (a.re(i, j) * halfA * restA);
                double q = y * (b.re(i, j) * halfB * restB);
                size += p * p + q * q;
                double difference = p - q;
                if (!real) {
                    double r = x * (a.im(i, j) * halfA * restA);
                    double s = y * (b.im(i, j) * halfB * restB);
                    size += r * r + s * s;
                    if (turns.isPresent()) {
                        difference = turns.get().entry(i, j, difference, r - s);
                    } else {
                        im[i * n + j] = r - s;
                    }
                }
                re[i * n + j] = difference;
            }
        }
        // two products and a difference: at most 2u(|p| + |q|) in each entry, ≤ 2√2·u·√(p²+q²); trace norm ≤ √n ·
        // Frobenius norm
        double rounding = Math.sqrt(n) * 3 * U * Math.sqrt(size) * (1 + 1e-6) + (double) n * n * 0x1p-1000;
        HermitianEigen e = HermitianEigen.of(n, re, im);
        double error = EigenResidual.of(n, re, im, e).traceError() + rounding;
        Enclosure norm = Enclosure.ZERO;
        for (double v : e.values()) {
            norm = norm.plus(Enclosure.exact(Math.abs(v)));
        }
        Enclosure sum = scaled(entryTrace(a), -exponentA)
                .times(x)
                .plus(scaled(entryTrace(b), -exponentB).times(y))
                .minus(norm.widen(error));
        Enclosure defects = scaled(Enclosure.exact(a.entryDefect()), -exponentA)
                .times(x)
                .plus(scaled(Enclosure.exact(b.entryDefect()), -exponentB).times(y));
        Enclosure f = sum.times(0.5).plus(defects.hull(defects.negate()));
        return scaled(f, shift);
    }

    private static Enclosure scaled(Enclosure e, long power) {
        return Enclosure.of(e.lowerWide().timesPowerOfTwo(power), e.upperWide().timesPowerOfTwo(power));
    }

    /** The exponent of two of the largest entry; 0 for the zero operator. */
    private static int exponent(PositiveOperator p) {
        return (int) WideDouble.of(largest(p)).exponent();
    }

    private static double largest(PositiveOperator p) {
        double most = 0;
        // of a positive operator the largest entry is on the diagonal, up to what rounding made of it
        for (int i = 0; i < p.dimension(); i++) {
            most = Math.max(most, Math.abs(p.re(i, i)));
        }
        return most;
    }

    /** The trace of the entries as stored, which is what the eigenvalues belong to. */
    private static Enclosure entryTrace(PositiveOperator p) {
        Enclosure s = Enclosure.ZERO;
        for (int i = 0; i < p.dimension(); i++) {
            s = s.plus(Enclosure.exact(p.re(i, i)));
        }
        return s;
    }

    @Override
    PositivePair power(int n) {
        return PairStructure.power(a, b, n);
    }

    @Override
    public Enclosure firstTrace() {
        return a.traceEnclosure();
    }

    @Override
    public Enclosure secondTrace() {
        return b.traceEnclosure();
    }

    @Override
    public int dimension() {
        return a.dimension();
    }

    @Override
    public PairKind kind() {
        return PairKind.DENSE;
    }
}
