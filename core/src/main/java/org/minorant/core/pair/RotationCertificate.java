package org.minorant.core.pair;

import java.util.Optional;
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

    /** Beyond this relative width what the rotations left is enclosed in its turn. */
    private static final double WIDE = 0x1p-46;

    private static final int MOST_LEVELS = 3;

    /** A value of φ wider than this gains from another step towards P*SP = 1. */
    private static final double SHARP = 0x1p-60;

    private static final int MOST_STEPS = 2;

    private final WeightedColumns pair;
    private final EnclosedMatrix gx;
    private final EnclosedMatrix gy;
    private final EnclosedMatrix cross;
    private final int exponent;
    private final EnclosedMatrix n;

    /** N Gy. */
    private final EnclosedMatrix nGy;
    /** Gx N. */
    private final EnclosedMatrix gxN;
    /** NN*. */
    private final EnclosedMatrix nn;

    private RotationCertificate(WeightedColumns pair, EnclosedMatrix n) {
        this.pair = pair;
        this.gx = pair.gx();
        this.gy = pair.gy();
        this.cross = pair.cross();
        this.exponent = pair.exponent();
        this.n = n;
        // Gy is often diagonal, and zeros of a left factor cost nothing
        this.nGy = gy.times(n.adjoint()).adjoint();
        this.gxN = gx.times(n);
        this.nn = n.times(n.adjoint());
    }

    /**
     * Encloses f.
     *
     * @param pair the columns with their inner products
     * @param checkpoint passed many times a second, may throw
     * @return an enclosure of f
     */
    static Enclosure enclose(WeightedColumns pair, Runnable checkpoint) {
        return enclose(pair, pair.sweep(checkpoint), checkpoint);
    }

    /** The same from rotations found elsewhere, which are not trusted. */
    static Enclosure enclose(WeightedColumns pair, HyperbolicSweeps sweeps, Runnable checkpoint) {
        return enclose(pair, sweeps, 1, checkpoint);
    }

    private static Enclosure enclose(WeightedColumns pair, HyperbolicSweeps sweeps, int level, Runnable checkpoint) {
        ContractionBlocks blocks = ContractionBlocks.of(sweeps, pair.exponent());
        checkpoint.run();
        Enclosure unit = new RotationCertificate(pair, blocks.contraction())
                .enclose(blocks.first(), blocks.second(), level, checkpoint);
        return Enclosure.of(
                unit.lowerWide().timesPowerOfTwo(2L * pair.exponent()),
                unit.upperWide().timesPowerOfTwo(2L * pair.exponent()));
    }

    /** f in units of 2^2e. */
    private Enclosure enclose(EnclosedMatrix first, EnclosedMatrix second, int level, Runnable checkpoint) {
        EnclosedMatrix left = EnclosedMatrix.identity(gx.rows()).minus(scaleByQ(nn));
        Inverse p = Inverse.refine(first, left);
        checkpoint.run();
        Inverse p2 = Inverse.refine(
                second,
                EnclosedMatrix.identity(gy.rows()).minus(scaleByQ(n.adjoint().times(n))));
        checkpoint.run();
        double epsilon = Math.max(p.size(), p2.size());
        if (!(epsilon < 0.5)) {
            return Enclosure.of(0, Double.POSITIVE_INFINITY);
        }
        EnclosedMatrix w = n.times(cross.adjoint());
        EnclosedMatrix mixed = w.plus(w.adjoint());
        EnclosedMatrix quadratic = nGy.times(n.adjoint());
        // (Gx NN*)*, for the same reason as above
        EnclosedMatrix phi = mixed.minus(gx.times(nn).adjoint()).minus(quadratic);
        Enclosure value = p.traceOfInverse(congruence(p, phi));
        for (int i = 0; i < MOST_STEPS && !(value.relativeWidth() <= SHARP); i++) {
            p = p.refined(left);
            value = value.intersect(p.traceOfInverse(congruence(p, phi)));
        }
        checkpoint.run();
        WeightedColumns rest = leftover(p, p2, mixed, quadratic);
        WideDouble seen = value.lowerWide().max(WideDouble.ZERO);
        WideDouble bound = LeftoverBound.of(rest.gx(), rest.gy(), rest.cross(), exponent, seen);
        // A' = (X − YN*)P(1 + E)⁻¹P*(…)* lies between (1 ± ε)⁻¹ times what P alone gives, and f is monotone and
        // homogeneous
        Enclosure error = Enclosure.of(1 - epsilon, 1).dividedBy(Enclosure.of(1 - epsilon, 1));
        Enclosure more = Enclosure.of(WideDouble.ZERO, bound).times(error);
        Enclosure total = plus(value, more);
        if (level == MOST_LEVELS || total.relativeWidth() <= WIDE) {
            return total;
        }
        return total.intersect(plus(value, deeper(rest, level, checkpoint).times(error)));
    }

    private static Enclosure plus(Enclosure value, Enclosure more) {
        return Enclosure.of(
                value.lowerWide().plusDown(more.lowerWide()), value.upperWide().plusUp(more.upperWide()));
    }

    /** f(A',B') in units of 2^2e, by rotations of the columns that are left. */
    private Enclosure deeper(WeightedColumns rest, int level, Runnable checkpoint) {
        Optional<WeightedColumns> unit = rest.rescaled();
        if (unit.isEmpty()) {
            return Enclosure.ZERO;
        }
        Enclosure f = enclose(unit.get(), unit.get().sweep(checkpoint), level + 1, checkpoint);
        return Enclosure.of(
                f.lowerWide().max(WideDouble.ZERO).timesPowerOfTwo(-2L * exponent),
                f.upperWide().timesPowerOfTwo(-2L * exponent));
    }

    private static EnclosedMatrix congruence(Inverse p, EnclosedMatrix m) {
        return p.root().adjoint().times(m).times(p.root());
    }

    /** The columns X' = (X − YN*)P and Y' = (Y − XN)P₂ with their inner products, those across in units of 2^e. */
    private WeightedColumns leftover(Inverse p, Inverse p2, EnclosedMatrix mixed, EnclosedMatrix quadratic) {
        EnclosedMatrix v = cross.adjoint().times(n);
        EnclosedMatrix riccati = cross.minus(gxN).minus(nGy).plus(scaleByQ(n.times(v)));
        EnclosedMatrix across = p.root().adjoint().times(riccati).times(p2.root());
        EnclosedMatrix gramX = congruence(p, gx.minus(scaleByQ(mixed)).plus(scaleByQ(quadratic)));
        EnclosedMatrix inner = gy.minus(scaleByQ(v.plus(v.adjoint())))
                .plus(scaleByQ(n.adjoint().times(gxN)));
        return new WeightedColumns(
                () -> changed(pair.x(), pair.y(), n.adjoint(), p.root()),
                () -> changed(pair.y(), pair.x(), n, p2.root()),
                gramX,
                congruence(p2, inner),
                across,
                exponent);
    }

    /** (X − Y·2^e·N)P. */
    private EnclosedMatrix changed(EnclosedMatrix x, EnclosedMatrix y, EnclosedMatrix by, EnclosedMatrix p) {
        double unit = Math.scalb(1.0, Math.max(exponent, -1060));
        return x.minus(y.times(by.times(unit))).times(p).midpoint();
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
