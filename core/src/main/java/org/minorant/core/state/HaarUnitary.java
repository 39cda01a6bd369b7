package org.minorant.core.state;

import org.minorant.core.Operator;
import org.minorant.core.internal.message.Checks;

/**
 * Unitaries distributed by the invariant (Haar) measure of U(d), from a seed: the orthonormalised columns of a matrix of independent
 * complex normal entries.
 *
 * <p>The same seed gives the same bits on every platform. Columns are orthonormal to about d · 2^-52. Not for cryptography. Stateless and
 * thread-safe.
 *
 * <p>Source: F. Mezzadri, How to generate random matrices from the classical compact groups, Notices AMS 54, 592 (2007) (from memory).
 */
public final class HaarUnitary {

    private HaarUnitary() {}

    /**
     * Returns a Haar-distributed unitary.
     *
     * @param dimension d, at least 1
     * @param seed the seed; different seeds give unrelated unitaries
     * @return a unitary d × d
     * @throws org.minorant.core.InvalidInputException if d is below 1 or too large for memory
     */
    public static Operator of(int dimension, long seed) {
        Checks.dimensions("HaarUnitary.of", dimension, dimension);
        double[][] u = columns(dimension, new SeededNormals(seed)).rowMajor();
        return Operator.ofRowMajor(dimension, dimension, u[0], u[1]);
    }

    static Ginibre columns(int dimension, SeededNormals normals) {
        return Ginibre.of(dimension, dimension, normals).orthonormalise();
    }
}
