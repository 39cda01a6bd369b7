package org.minorant.core.pair;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Enclosure;
import org.minorant.core.Operator;
import org.minorant.core.WideDouble;

/**
 * Encloses f = Tr[XX* ∧ YY*] to relative accuracy, from the inner products of the columns and a transformation found in plain double.
 *
 * <p><b>Lower end.</b> For any contraction N (k × l, ‖N‖ &lt; 1) the columns X' = (X − YN*)(1 − NN*)^(−½), Y' = (Y − XN)(1 − N*N)^(−½) obey
 * X'X'* − Y'Y'* = A − B exactly. Since Tr A − f is the trace of (A − B)₊, f(A,B) = (Tr A − Tr X'X'*) + f(A',B'), hence
 *
 * <pre>f ≥ φ(N) = Tr (1 − NN*)⁻¹ (MN* + NM* − NN*Gx − N Gy N*),   Gx = X*X, Gy = Y*Y, M = X*Y,</pre>
 *
 * with equality at the best N. Every term is of the size of f, whatever the traces are: nothing cancels at depth. And φ is stationary at its
 * maximum, so N in double gives φ to about 1e-30 relative, provided φ is evaluated in double-double.
 *
 * <p><b>Upper end.</b> f = φ(N) + f(A',B'), and f(A',B') is second-order small; see {@link LeftoverBound}.
 *
 * <p><b>Inverse.</b> P ≈ (1 − NN*)^(−½) comes from the rotations; with E = P*(1 − NN*)P − 1, ‖E‖ ≤ ε, (1 − NN*)⁻¹ = P(1 + E)⁻¹P*, so that φ = Tr(1 − E + E²)F
 * ± ε³‖F‖_F/(1 − ε), F = P*(…)P. P is refined until ε is small.
 *
 * <p><b>Scale.</b> M = 2^e M̃ and N = 2^e Ñ; then φ = 2^2e φ̃ with q = 2^2e in front of the terms of second order. q may underflow: it is then replaced by zero
 * and a radius.
 */
final class RotationCertificate {

    private static final double FINE = 1e-9;
    private static final int REFINEMENTS = 8;

    private final EnclosedMatrix gx;
    private final EnclosedMatrix gy;
    private final EnclosedMatrix cross;
    private final int exponent;
    private final EnclosedMatrix n;

    /** N Gy. */
    private final EnclosedMatrix nGy;
    /** Gx N. */
    private final EnclosedMatrix gxN;

    private RotationCertificate(
            EnclosedMatrix gx, EnclosedMatrix gy, EnclosedMatrix cross, int exponent, EnclosedMatrix n) {
        this.gx = gx;
        this.gy = gy;
        this.cross = cross;
        this.exponent = exponent;
        this.n = n;
        this.nGy = n.times(gy);
        this.gxN = gx.times(n);
    }

    /**
     * Encloses f.
     *
     * @param gx X*X
     * @param gy Y*Y
     * @param cross X*Y / 2^exponent
     * @param exponent the unit of cross
     * @param sweeps the finished rotations
     * @param checkpoint passed many times a second, may throw
     * @return an enclosure of f
     */
    static Enclosure enclose(
            EnclosedMatrix gx,
            EnclosedMatrix gy,
            EnclosedMatrix cross,
            int exponent,
            HyperbolicSweeps sweeps,
            Runnable checkpoint) {
        ContractionBlocks blocks = ContractionBlocks.of(sweeps, exponent);
        checkpoint.run();
        return new RotationCertificate(gx, gy, cross, exponent, blocks.contraction())
                .enclose(blocks.first(), blocks.second(), checkpoint);
    }

    private Enclosure enclose(EnclosedMatrix first, EnclosedMatrix second, Runnable checkpoint) {
        EnclosedMatrix nn = n.times(n.adjoint());
        EnclosedMatrix left = EnclosedMatrix.identity(gx.rows()).minus(scaleByQ(nn));
        EnclosedMatrix right =
                EnclosedMatrix.identity(gy.rows()).minus(scaleByQ(n.adjoint().times(n)));
        EnclosedMatrix p = refine(first, left);
        checkpoint.run();
        EnclosedMatrix p2 = refine(second, right);
        checkpoint.run();
        EnclosedMatrix e = defect(p, left);
        double epsilon = Math.max(e.frobeniusUpper(), defect(p2, right).frobeniusUpper());
        if (!(epsilon < 0.5)) {
            return Enclosure.of(0, Double.POSITIVE_INFINITY);
        }
        EnclosedMatrix w = n.times(cross.adjoint());
        EnclosedMatrix mixed = w.plus(w.adjoint());
        EnclosedMatrix quadratic = nGy.times(n.adjoint());
        EnclosedMatrix phi = mixed.minus(nn.times(gx)).minus(quadratic);
        EnclosedMatrix f = p.adjoint().times(phi).times(p);
        EnclosedMatrix ef = e.times(f);
        checkpoint.run();
        double rest = Math.pow(e.frobeniusUpper(), 3) * f.frobeniusUpper() / (1 - epsilon) * (1 + 0x1p-40);
        Enclosure value =
                f.traceRe().minus(ef.traceRe()).plus(e.times(ef).traceRe()).widen(rest);
        Enclosure leftover = leftover(p, p2, mixed, quadratic, value).dividedBy(Enclosure.of(1 - epsilon, 1));
        Enclosure total = Enclosure.of(value.lowerWide(), value.upperWide().plusUp(leftover.upperWide()));
        return Enclosure.of(
                total.lowerWide().timesPowerOfTwo(2L * exponent),
                total.upperWide().timesPowerOfTwo(2L * exponent));
    }

    /** Bounds f(A',B') in units of 2^2e. */
    private Enclosure leftover(
            EnclosedMatrix p, EnclosedMatrix p2, EnclosedMatrix mixed, EnclosedMatrix quadratic, Enclosure value) {
        EnclosedMatrix riccati = cross.minus(gxN)
                .minus(nGy)
                .plus(scaleByQ(n.times(cross.adjoint().times(n))));
        EnclosedMatrix across = p.adjoint().times(riccati).times(p2);
        EnclosedMatrix gramX = p.adjoint()
                .times(gx.minus(scaleByQ(mixed)).plus(scaleByQ(quadratic)))
                .times(p);
        EnclosedMatrix v = cross.adjoint().times(n);
        EnclosedMatrix inner = gy.minus(scaleByQ(v.plus(v.adjoint())))
                .plus(scaleByQ(n.adjoint().times(gxN)));
        EnclosedMatrix gramY = p2.adjoint().times(inner).times(p2);
        WideDouble seen = value.lowerWide().max(WideDouble.ZERO);
        return Enclosure.of(WideDouble.ZERO, LeftoverBound.of(gramX, gramY, across, exponent, seen));
    }

    /** q·Z with q = 2^2e; an underflowing q becomes zero with a radius that covers it. */
    private EnclosedMatrix scaleByQ(EnclosedMatrix z) {
        if (exponent >= -450) {
            return z.times(Math.scalb(1.0, 2 * exponent));
        }
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(z.rows(), z.columns());
        for (int i = 0; i < z.rows(); i++) {
            for (int j = 0; j < z.columns(); j++) {
                b.set(i, j, 0, 0, 0, 0, z.modulusUpper(i, j) * 0x1p-900 + 0x1p-1070);
            }
        }
        return b.build();
    }

    private static EnclosedMatrix defect(EnclosedMatrix p, EnclosedMatrix s) {
        return p.adjoint().times(s.times(p)).minus(EnclosedMatrix.identity(p.columns()));
    }

    /** Newton–Schulz steps of third order towards P*SP = 1. */
    private static EnclosedMatrix refine(EnclosedMatrix start, EnclosedMatrix s) {
        EnclosedMatrix p = start;
        for (int i = 0; i < REFINEMENTS; i++) {
            EnclosedMatrix e = defect(p, s).midpoint();
            double size = e.frobeniusUpper();
            if (size < FINE || !(size < 0.9)) {
                return p;
            }
            EnclosedMatrix step = EnclosedMatrix.identity(p.columns())
                    .minus(e.times(0.5))
                    .plus(e.times(e).times(0.375));
            p = p.times(step).midpoint();
        }
        return p;
    }

    /** An operator from two functions of its indices, as an exact matrix. */
    static EnclosedMatrix exact(int rows, int columns, Entry re, Entry im) {
        double[] x = new double[rows * columns];
        double[] y = new double[rows * columns];
        for (int i = 0; i < rows; i++) {
            for (int j = 0; j < columns; j++) {
                x[i * columns + j] = re.at(i, j);
                y[i * columns + j] = im.at(i, j);
            }
        }
        return EnclosedMatrix.of(Operator.ofRowMajor(rows, columns, x, y));
    }

    /** An entry by its indices. */
    @FunctionalInterface
    interface Entry {
        double at(int i, int j);
    }
}
