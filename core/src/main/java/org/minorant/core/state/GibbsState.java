package org.minorant.core.state;

import org.minorant.core.DensityOperator;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;
import org.minorant.core.HermitianOperator;
import org.minorant.core.PositiveFactor;
import org.minorant.core.PositiveOperator;
import org.minorant.core.internal.message.Checks;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * The Gibbs state of a Hamiltonian H at inverse temperature b,
 *
 * <pre>ρ = e^(−bH) / Tr e^(−bH).</pre>
 *
 * <p><b>Accuracy.</b> Energies enter as differences to the lowest one (the highest, for b &lt; 0), formed with 31 digits, so that nothing
 * overflows and small eigenvalues keep their digits: a Boltzmann factor has relative error at most 2^-50. A diagonal H gives a diagonal
 * state with these eigenvalues. Any other H is decomposed with about 30 digits ({@link EnclosedSpectrum}: energies are known to its
 * eigenvalue radius δ, which is a factor e^(±2|b|δ)), and the state is XX* exactly, with column j of X the j-th vector times the root of
 * its weight. Weights below 4.9e-324 become zero and are left out.
 *
 * <p>The state returned is the one that these numbers define. Stateless and thread-safe.
 */
public final class GibbsState {

    /** e^(−800) is below the smallest double. */
    private static final double VANISHES = 800;

    private GibbsState() {}

    /**
     * Returns the Gibbs state.
     *
     * @param hamiltonian H, in the inverse units of b
     * @param inverseTemperature b, finite; 0 gives the maximally mixed state, negative values an inverted population
     * @return e^(−bH) / Tr e^(−bH)
     * @throws org.minorant.core.InvalidInputException if b is not finite
     */
    public static DensityOperator of(HermitianOperator hamiltonian, double inverseTemperature) {
        Checks.inRange(
                "GibbsState.of", "the inverse temperature", inverseTemperature, -Double.MAX_VALUE, Double.MAX_VALUE);
        // a power of two brings the largest entry to order one; the product with b stays the same
        int scale = scale(hamiltonian);
        return isDiagonal(hamiltonian)
                ? diagonal(hamiltonian, inverseTemperature, scale)
                : dense(hamiltonian, inverseTemperature, scale);
    }

    private static boolean isDiagonal(HermitianOperator h) {
        for (int i = 0; i < h.dimension(); i++) {
            for (int j = 0; j < i; j++) {
                if (h.re(i, j) != 0 || h.im(i, j) != 0) {
                    return false;
                }
            }
        }
        return true;
    }

    private static int scale(HermitianOperator h) {
        double largest = 0;
        for (int i = 0; i < h.dimension(); i++) {
            for (int j = 0; j <= i; j++) {
                largest = Math.max(largest, Math.max(Math.abs(h.re(i, j)), Math.abs(h.im(i, j))));
            }
        }
        return largest == 0 ? 0 : Math.getExponent(largest);
    }

    private static DensityOperator diagonal(HermitianOperator h, double b, int scale) {
        int n = h.dimension();
        DoubleDouble[] energies = new DoubleDouble[n];
        for (int i = 0; i < n; i++) {
            energies[i] = DoubleDouble.of(Math.scalb(h.re(i, i), -scale));
        }
        return DensityOperator.ofEigenvalues(weights(energies, b, scale));
    }

    private static DensityOperator dense(HermitianOperator h, double b, int scale) {
        int n = h.dimension();
        EnclosedSpectrum s = EnclosedSpectrum.of(scaled(h, -scale));
        DoubleDouble[] energies = new DoubleDouble[n];
        for (int i = 0; i < n; i++) {
            energies[i] = new DoubleDouble(s.value(i), s.valueTail(i));
        }
        double[] p = weights(energies, b, scale);
        int rank = 0;
        for (double w : p) {
            rank += w > 0 ? 1 : 0;
        }
        EnclosedMatrix v = s.vectors();
        EnclosedMatrix.Builder x = EnclosedMatrix.builder(n, rank);
        int c = 0;
        for (int j = 0; j < n; j++) {
            if (p[j] > 0) {
                // scaled by an even power of two, so that the root of a tiny weight keeps its digits
                int e = Math.getExponent(p[j]) / 2;
                DoubleDouble root = DoubleDouble.of(Math.scalb(p[j], -2 * e)).sqrt();
                for (int i = 0; i < n; i++) {
                    DoubleDouble re = root.times(new DoubleDouble(v.re(i, j), v.reTail(i, j)));
                    DoubleDouble im = root.times(new DoubleDouble(v.im(i, j), v.imTail(i, j)));
                    x.set(
                            i,
                            c,
                            Math.scalb(re.hi(), e),
                            Math.scalb(re.lo(), e),
                            Math.scalb(im.hi(), e),
                            Math.scalb(im.lo(), e),
                            0);
                }
                c++;
            }
        }
        return DensityOperator.of(PositiveOperator.ofFactor(new PositiveFactor(x.build(), 0, 0)));
    }

    private static HermitianOperator scaled(HermitianOperator h, int power) {
        int n = h.dimension();
        double[][] re = new double[n][n];
        double[][] im = new double[n][n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                re[i][j] = Math.scalb(h.re(i, j), power);
                im[i][j] = Math.scalb(h.im(i, j), power);
            }
        }
        return HermitianOperator.of(re, im);
    }

    /** e^(−b 2^scale (E_i − E_0)) over their sum, E_0 the energy of the largest weight. */
    private static double[] weights(DoubleDouble[] energies, double b, int scale) {
        DoubleDouble ground = energies[0];
        for (DoubleDouble e : energies) {
            double d = e.minus(ground).hi();
            ground = (b < 0 ? -d : d) < 0 ? e : ground;
        }
        double[] w = new double[energies.length];
        DoubleDouble sum = DoubleDouble.ZERO;
        for (int i = 0; i < w.length; i++) {
            w[i] = boltzmann(energies[i].minus(ground), b, scale);
            sum = sum.plus(DoubleDouble.of(w[i]));
        }
        for (int i = 0; i < w.length; i++) {
            w[i] /= sum.value();
        }
        return w;
    }

    /** e^(−b 2^scale d); the bits do not depend on the platform. */
    private static double boltzmann(DoubleDouble d, double b, int scale) {
        // b = f · 2^k with 1 ≤ |f| < 2, so that the product cannot overflow before its size is known
        int k = Math.getExponent(b);
        double f = Math.scalb(b, -k);
        DoubleDouble product = d.times(f);
        double size = Math.scalb(product.hi(), k + scale);
        if (!(Math.abs(size) < VANISHES)) {
            return 0;
        }
        return StrictMath.exp(-size) * (1 - Math.scalb(product.lo(), k + scale));
    }
}
