package org.minorant.core.state;

import org.minorant.core.DensityOperator;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Operator;
import org.minorant.core.PositiveFactor;
import org.minorant.core.PositiveOperator;
import org.minorant.core.internal.message.Checks;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * Random states from a seed.
 *
 * <p>The same seed gives the same bits on every platform, whatever ran before; different seeds give unrelated states. Each state is XX*
 * exactly, for the factor X of doubles that is described with it, so that its rank and its small eigenvalues are what the measure made
 * them. Not for cryptography. Stateless and thread-safe.
 *
 * <p>Sources: K. Życzkowski, H.-J. Sommers, J. Phys. A 34, 7111 (2001), for the induced measures; V. Al Osipov, H.-J. Sommers, K.
 * Życzkowski, J. Phys. A 43, 055302 (2010), for the Bures measure (both from memory).
 */
public final class RandomStates {

    private RandomStates() {}

    /**
     * Returns a pure state distributed by the unitarily invariant measure.
     *
     * @param dimension d, at least 1
     * @param seed the seed
     * @return a random pure state
     * @throws org.minorant.core.InvalidInputException if d is below 1 or too large for memory
     */
    public static DensityOperator pure(int dimension, long seed) {
        return normalised("RandomStates.pure", dimension, 1, seed);
    }

    /**
     * Returns a state distributed by the Hilbert–Schmidt measure: GG* / Tr GG*, G a d × d matrix of independent complex normal entries. The
     * mean purity is 2d/(d² + 1).
     *
     * @param dimension d, at least 1
     * @param seed the seed
     * @return a random state
     * @throws org.minorant.core.InvalidInputException if d is below 1 or too large for memory
     */
    public static DensityOperator hilbertSchmidt(int dimension, long seed) {
        return normalised("RandomStates.hilbertSchmidt", dimension, dimension, seed);
    }

    /**
     * Returns the state of a d-dimensional part of a random pure state on d · k dimensions: GG* / Tr GG*, G of shape d × k. Its rank is
     * min(d, k), its mean purity (d + k)/(dk + 1).
     *
     * @param dimension d, at least 1
     * @param environment k, at least 1
     * @param seed the seed
     * @return a random state
     * @throws org.minorant.core.InvalidInputException if a dimension is below 1 or too large for memory
     */
    public static DensityOperator induced(int dimension, int environment, long seed) {
        return normalised("RandomStates.induced", dimension, environment, seed);
    }

    private static DensityOperator normalised(String asked, int d, int k, long seed) {
        Checks.dimensions(asked, d, d);
        Checks.dimensions(asked, d, k);
        return state(Ginibre.of(d, k, new SeededNormals(seed)).normalise());
    }

    private static DensityOperator state(Ginibre factor) {
        double[][] x = factor.rowMajor();
        return DensityOperator.of(
                PositiveOperator.ofFactor(Operator.ofRowMajor(factor.rows(), factor.columns(), x[0], x[1])));
    }

    /**
     * Returns a state distributed by the Bures measure: (1 + U) GG* (1 + U*), normalised, with U Haar-distributed and G as for {@link
     * #hilbertSchmidt}. The mean purity is (5d² + 1)/(2d(d² + 2)).
     *
     * @param dimension d, at least 1
     * @param seed the seed
     * @return a random state
     * @throws org.minorant.core.InvalidInputException if d is below 1 or too large for memory
     */
    public static DensityOperator bures(int dimension, long seed) {
        Checks.dimensions("RandomStates.bures", dimension, dimension);
        SeededNormals normals = new SeededNormals(seed);
        Ginibre u = HaarUnitary.columns(dimension, normals);
        Ginibre g = Ginibre.of(dimension, dimension, normals);
        return state(g.plusProduct(u).normalise());
    }

    /**
     * Returns a state with prescribed eigenvalues and Haar-distributed eigenvectors: X has the columns √p_j u_j. The u_j are orthonormal to
     * about d · 2^-52, so that the eigenvalues, also the smallest, are the prescribed ones within that relative error (Ostrowski); zeros
     * stay zeros.
     *
     * @param eigenvalues the spectrum, each at least 0, summing to one within d · 2^-50
     * @param seed the seed
     * @return a state with this spectrum
     * @throws org.minorant.core.InvalidInputException if an eigenvalue is negative or not finite, there is none, or the sum is not one
     */
    public static DensityOperator ofSpectrum(double[] eigenvalues, long seed) {
        // refuses what is not a spectrum, with the messages of that type
        DensityOperator diagonal = DensityOperator.ofEigenvalues(eigenvalues);
        int d = diagonal.dimension();
        Ginibre u = HaarUnitary.columns(d, new SeededNormals(seed));
        int rank = 0;
        for (double p : eigenvalues) {
            rank += p > 0 ? 1 : 0;
        }
        EnclosedMatrix.Builder x = EnclosedMatrix.builder(d, rank);
        int c = 0;
        for (int j = 0; j < d; j++) {
            if (eigenvalues[j] > 0) {
                int e = Math.getExponent(eigenvalues[j]) / 2;
                DoubleDouble root =
                        DoubleDouble.of(Math.scalb(eigenvalues[j], -2 * e)).sqrt();
                for (int i = 0; i < d; i++) {
                    DoubleDouble re = root.times(u.re()[j][i]);
                    DoubleDouble im = root.times(u.im()[j][i]);
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
}
