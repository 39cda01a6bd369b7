package org.minorant.core.pair;

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
    private final Refinement refinement;

    DensePair(PositiveOperator a, PositiveOperator b) {
        this.a = a;
        this.b = b;
        this.refinement = new Refinement(a, b);
    }

    @Override
    Enclosure value(WideDouble wa, WideDouble wb) {
        return refinement.narrow(fromEigenvalues(wa, wb), wa, wb);
    }

    Enclosure fromEigenvalues(WideDouble wa, WideDouble wb) {
        long shift = Math.max(wa.exponent(), wb.exponent());
        // a weight that underflows here is below 1e-300 of the other; losing it is inside the error below
        double x = wa.timesPowerOfTwo(-shift).toDoubleDown();
        double y = wb.timesPowerOfTwo(-shift).toDoubleDown();
        int n = a.dimension();
        double[] re = new double[n * n];
        double[] im = a.isReal() && b.isReal() ? new double[0] : new double[n * n];
        double size = 0;
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                double p = x * a.re(i, j);
                double q = y * b.re(i, j);
                re[i * n + j] = p - q;
                size += p * p + q * q;
                if (im.length != 0) {
                    double r = x * a.im(i, j);
                    double s = y * b.im(i, j);
                    im[i * n + j] = r - s;
                    size += r * r + s * s;
                }
            }
        }
        // two products and a difference: at most 2u(|p| + |q|) in each entry, ≤ 2√2·u·√(p²+q²); trace norm ≤ √n ·
        // Frobenius norm
        double rounding = Math.sqrt(n) * 3 * U * Math.sqrt(size) * (1 + 1e-6) + n * 0x1p-1000;
        HermitianEigen e = HermitianEigen.of(n, re, im);
        double error = EigenResidual.of(n, re, im, e).traceError() + rounding;
        Enclosure norm = Enclosure.ZERO;
        for (double v : e.values()) {
            norm = norm.plus(Enclosure.exact(Math.abs(v)));
        }
        double defects = (x * a.entryDefect() + y * b.entryDefect()) * (1 + 0x1p-50);
        Enclosure sum = entryTrace(a).times(x).plus(entryTrace(b).times(y)).minus(norm.widen(error));
        Enclosure f = sum.times(0.5).widen(defects);
        return Enclosure.of(f.lowerWide().timesPowerOfTwo(shift), f.upperWide().timesPowerOfTwo(shift));
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
