package org.minorant.bounds.divergence;

import java.util.BitSet;
import java.util.List;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.PositiveOperator;

/**
 * A positive operator A by its certified eigenvalues and eigenvectors:
 *
 * <pre>A = U(D + K)U* ⊕ R,   |K| ≤ κ entry by entry of D in the Loewner order,   0 ≤ R ≤ rest</pre>
 *
 * with U an exact isometry that the enclosed {@code vectors} contain, D diagonal and positive, and R on the orthogonal complement of its
 * range. So A lies between U(D − κ)U* and U(D + κ)U* + R, two operators with the same known eigenvectors: whatever is monotone in A in
 * the Loewner order is enclosed by its values at the two ends of the eigenvalue balls D ± κ.
 *
 * <p>{@code rest} = 0 says that the rank is certain.
 *
 * @param vectors U, dimension × rank, with radii
 * @param values D ± κ, certainly positive, one for each column
 * @param rest an upper end of ‖R‖
 * @param restRank an upper end of the rank of R
 * @param rows the basis vectors on which A does not vanish structurally: A acts on their span
 * @param coordinates whether every column of U is a basis vector, exactly
 */
public record SpectralState(
        EnclosedMatrix vectors, List<Ball> values, double rest, int restRank, BitSet rows, boolean coordinates) {

    /**
     * Decomposes an operator. Diagonal matrices keep their eigenvalues exactly; factors with independent columns keep their support; all
     * others are decomposed as matrices, which decides eigenvalues down to about 1e-24 of the largest, and zeros exactly where elimination in whole numbers is affordable (to
     * dimension 30 or so).
     *
     * @param a the operator
     * @return its certified spectrum
     */
    public static SpectralState of(PositiveOperator a) {
        return SpectralStates.decompose(a);
    }

    /**
     * Returns the dimension of the space.
     *
     * @return the number of rows of U
     */
    public int dimension() {
        return vectors.rows();
    }

    /**
     * Returns the number of eigenvalues known to be positive.
     *
     * @return the number of columns of U
     */
    public int rank() {
        return values.size();
    }

    /**
     * Tells whether the support is certainly the whole span of the basis vectors in {@link #rows}.
     *
     * @return whether no eigenvalue on that span may vanish
     */
    public boolean fillsRows() {
        return restRank == 0 && rank() == rows.cardinality();
    }

    /**
     * Returns the trace.
     *
     * @return Tr A
     */
    public Ball trace() {
        Ball t = Ball.ZERO;
        for (Ball d : values) {
            t = t.plus(d);
        }
        // Tr R is between 0 and restRank · rest
        double half = 0.5 * restRank * rest;
        return restRank == 0 ? t : t.plus(new Ball(half, 0, half));
    }

    /**
     * Returns the largest radius of an eigenvalue: a bound on ‖K‖.
     *
     * @return max κ
     */
    public double spread() {
        double k = 0;
        for (Ball d : values) {
            k = Math.max(k, d.radius());
        }
        return k;
    }

    /**
     * Returns the natural logarithms of the eigenvalues.
     *
     * @return ln D, widened for κ
     */
    public List<Ball> logarithms() {
        return values.stream().map(Ball::ln).toList();
    }
}
