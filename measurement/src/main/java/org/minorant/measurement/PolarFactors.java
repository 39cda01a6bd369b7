package org.minorant.measurement;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;

/**
 * A matrix as Z ≈ L P R* with P positive definite and L, R near-orthonormal columns: its polar decomposition on the directions that are not
 * negligible, with a certificate.
 *
 * <p><b>How.</b> The certified spectrum of the smaller Gram matrix gives R; L = ZR scaled and made orthonormal by Newton–Schulz steps. Squaring Z loses half of the
 * digits of its small singular values d, which comes back here: B = L*ZR is Hermitian but for a skew part that is measured directly, and the rotation
 * L(1 + K), K_ij = (B − B*)_ij/(d_i + d_j), removes it.
 *
 * <p><b>Certificate.</b> How the factors were found does not matter: ‖Z − LPR*‖_F ≤ residual, ‖L*L − 1‖ ≤ leftDefect, ‖R*R − 1‖ ≤ rightDefect are computed afterwards
 * with radii, and P = D^½(1 + Δ)D^½ with ‖Δ‖ ≤ ½ shows P ≥ ½D &gt; 0.
 *
 * @param left L, with radius zero
 * @param core P, with radius zero
 * @param right R, with radius zero
 * @param residual a bound on ‖Z − LPR*‖_F for every Z in the enclosure
 * @param leftDefect a bound on ‖L*L − 1‖_F, at most ½
 * @param rightDefect a bound on ‖R*R − 1‖_F, at most ½
 * @param least a lower bound on the smallest eigenvalue of P, positive
 */
record PolarFactors(
        EnclosedMatrix left,
        EnclosedMatrix core,
        EnclosedMatrix right,
        double residual,
        double leftDefect,
        double rightDefect,
        double least) {

    /** Squared singular values this far below the largest are left out at first: the spectrum of the Gram matrix is noise there. */
    private static final double NEGLIGIBLE = 0x1p-90;

    private static final double RETRY = 0x1p12;
    private static final int ATTEMPTS = 7;
    private static final int ORTHONORMAL_STEPS = 8;
    private static final int POLAR_STEPS = 5;
    private static final double CONVERGED = 0x1p-100;

    static PolarFactors of(EnclosedMatrix z) {
        boolean tall = z.rows() >= z.columns();
        EnclosedMatrix m = tall ? z : z.adjoint();
        EnclosedMatrix mid = m.midpoint();
        EnclosedSpectrum gram = EnclosedSpectrum.of(mid.adjoint().times(mid).midpoint());
        double threshold = NEGLIGIBLE;
        for (int attempt = 0; attempt < ATTEMPTS; attempt++, threshold *= RETRY) {
            PolarFactors f = attempt(m, mid, gram, threshold);
            if (f.leftDefect <= 0.5 && f.rightDefect <= 0.5 && f.least > 0) {
                return tall
                        ? f
                        : new PolarFactors(f.right, f.core, f.left, f.residual, f.rightDefect, f.leftDefect, f.least);
            }
        }
        throw new ArithmeticException("the polar decomposition of a " + z.rows() + " x " + z.columns()
                + " matrix of Frobenius norm " + z.frobeniusUpper() + " did not converge");
    }

    int rank() {
        return core.rows();
    }

    private static PolarFactors attempt(EnclosedMatrix m, EnclosedMatrix mid, EnclosedSpectrum gram, double threshold) {
        int n = gram.dimension();
        double most = gram.value(n - 1);
        int first = n - 1;
        while (first > 0 && gram.value(first - 1) > threshold * most) {
            first--;
        }
        int k = n - first;
        double[] d = new double[k];
        for (int j = 0; j < k; j++) {
            d[j] = Math.sqrt(gram.value(first + j));
        }
        EnclosedMatrix right = columns(gram.vectors(), first);
        EnclosedMatrix image = mid.times(right).midpoint();
        EnclosedMatrix left = orthonormal(scaledColumns(image, d));
        EnclosedMatrix b = left.adjoint().times(image).midpoint();
        double size = d[k - 1];
        for (int step = 0; step < POLAR_STEPS; step++) {
            EnclosedMatrix skew = b.minus(b.adjoint()).midpoint();
            if (!(skew.frobeniusUpper() > CONVERGED * size)) {
                break;
            }
            EnclosedMatrix turn = EnclosedMatrix.identity(k).plus(rotation(skew, d));
            left = orthonormal(left.times(turn).midpoint());
            b = left.adjoint().times(image).midpoint();
        }
        EnclosedMatrix p = b.plus(b.adjoint()).times(0.5).midpoint();
        double residual = m.minus(left.times(p.times(right.adjoint()))).frobeniusUpper();
        return new PolarFactors(left, p, right, residual, defect(left), defect(right), leastEigenvalue(p));
    }

    private static EnclosedMatrix columns(EnclosedMatrix v, int first) {
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(v.rows(), v.columns() - first);
        for (int i = 0; i < v.rows(); i++) {
            for (int j = first; j < v.columns(); j++) {
                b.set(i, j - first, v.re(i, j), v.reTail(i, j), v.im(i, j), v.imTail(i, j), 0);
            }
        }
        return b.build();
    }

    private static EnclosedMatrix scaledColumns(EnclosedMatrix a, double[] d) {
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(d.length, d.length);
        for (int j = 0; j < d.length; j++) {
            b.set(j, j, 1 / d[j], 0, 0, 0, 0);
        }
        return a.times(b.build()).midpoint();
    }

    /** Newton–Schulz steps V + ½V(1 − V*V), each of which squares the defect. */
    private static EnclosedMatrix orthonormal(EnclosedMatrix start) {
        EnclosedMatrix v = start;
        double before = Double.POSITIVE_INFINITY;
        for (int step = 0; step < ORTHONORMAL_STEPS; step++) {
            EnclosedMatrix rest =
                    EnclosedMatrix.identity(v.columns()).minus(v.adjoint().times(v));
            double size = rest.midpoint().frobeniusUpper();
            if (!(size < before) || !(size < 1)) {
                break;
            }
            v = v.plus(v.times(rest).times(0.5)).midpoint();
            if (size < 0x1p-60) {
                break;
            }
            before = size;
        }
        return v;
    }

    private static EnclosedMatrix rotation(EnclosedMatrix skew, double[] d) {
        EnclosedMatrix.Builder k = EnclosedMatrix.builder(d.length, d.length);
        for (int i = 0; i < d.length; i++) {
            for (int j = 0; j < d.length; j++) {
                double s = d[i] + d[j];
                k.set(i, j, skew.re(i, j) / s, 0, skew.im(i, j) / s, 0, 0);
            }
        }
        return k.build();
    }

    private static double defect(EnclosedMatrix v) {
        return v.adjoint().times(v).minus(EnclosedMatrix.identity(v.columns())).frobeniusUpper();
    }

    /** ½ min P_ii if P, scaled to unit diagonal, is within ½ of the identity; −1 if not. */
    private static double leastEigenvalue(EnclosedMatrix p) {
        int n = p.rows();
        double least = Double.POSITIVE_INFINITY;
        double off = 0;
        for (int i = 0; i < n; i++) {
            least = Math.min(least, p.re(i, i));
        }
        if (!(least > 0)) {
            return -1;
        }
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                double s = Math.sqrt(p.re(i, i)) * Math.sqrt(p.re(j, j));
                double x = i == j ? 0x1p-50 : p.modulusUpper(i, j) / s;
                off += x * x;
            }
        }
        // rounding of this sum is far below the margin between 0.49 and 0.5
        return Math.sqrt(off) <= 0.49 ? 0.5 * least : -1;
    }
}
