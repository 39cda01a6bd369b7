package org.minorant.core;

import java.util.Arrays;
import org.minorant.core.internal.door.EigenResidual;
import org.minorant.core.internal.door.HermitianEigen;
import org.minorant.core.internal.kernel.Products;

/**
 * The square root of a positive matrix A from one eigendecomposition in double, with a bound on its error. For thousands of dimensions, where {@link EnclosedSpectrum} would take
 * too long.
 *
 * <p><b>What is known.</b> Computed V and Λ; B = ŨΛ₊Ũ* with Λ₊ = max(Λ, 0) and Ũ the unitary next to V, ‖V − Ũ‖_F ≤ δ; and ‖A − B‖_F ≤ ε, which includes how far the matrix at hand is
 * from A.
 *
 * <p><b>Bound.</b> For any number c, let λ_c be the (c+1)-th smallest entry of Λ₊. Then
 *
 * <pre>‖A^½ − B^½‖_F² ≤ ε²/λ_c + ε√c.</pre>
 *
 * <p>Argument: between eigenvectors of A and B, with overlaps O_ij, E = A^½ − B^½ has entries (√a_i − √b_j)O_ij, and R = A − B has (a_i − b_j)O_ij. Where b_j ≥ λ_c, |E_ij| ≤ |R_ij|/√λ_c.
 * For the c other b_j, |E_ij|² ≤ |a_i − b_j||O_ij|² = |R_ij||O_ij|, and by Cauchy and Schwarz these sum to at most ‖R‖_F √c. (The first is the usual perturbation bound, the second
 * that of Powers and Størmer.) The best c is used: a matrix that is not singular has an error of about ε/√λ_0, a singular one of about √ε.
 *
 * <p>Immutable and thread-safe.
 */
public final class CertifiedSquareRoot {

    private static final double U = 0x1p-53;

    private final double[] values;
    private final Operator vectors;
    private final double defect;
    private final double distance;

    private CertifiedSquareRoot(double[] values, Operator vectors, double defect, double distance) {
        this.values = values;
        this.vectors = vectors;
        this.defect = defect;
        this.distance = distance;
    }

    /**
     * Decomposes a matrix that is close to a positive one.
     *
     * @param near the matrix at hand
     * @param distance a bound on its distance from A in Frobenius norm
     * @return the square root of A, with its error
     * @throws InvalidInputException if the distance is negative or not finite
     */
    public static CertifiedSquareRoot of(HermitianOperator near, double distance) {
        if (!(distance >= 0 && distance < Double.POSITIVE_INFINITY)) {
            throw new InvalidInputException(
                    "CertifiedSquareRoot.of",
                    "the distance is " + distance,
                    "a number that is at least 0",
                    "give a bound on the Frobenius norm of the difference");
        }
        int n = near.dimension();
        double[] re = near.realParts();
        double[] im = near.imaginaryParts();
        HermitianEigen e = HermitianEigen.of(n, re, im);
        EigenResidual r = EigenResidual.of(n, re, im, e);
        double[] values = e.values().clone();
        double negative = 0;
        for (int i = 0; i < n && values[i] < 0; i++) {
            negative += values[i] * values[i];
            values[i] = 0;
        }
        // squares may underflow
        double cut = negative == 0 ? 0 : Math.sqrt(negative) * (1 + n * U) + n * 0x1p-500;
        double all = (distance + r.frobeniusError() + cut) * (1 + 4 * U);
        Operator vectors = new Operator(n, n, e.vectorsRe(), im.length == 0 ? new double[0] : e.vectorsIm());
        return new CertifiedSquareRoot(values, vectors, r.defect(), all);
    }

    /**
     * Returns the dimension.
     *
     * @return the dimension
     */
    public int dimension() {
        return values.length;
    }

    /**
     * Returns Λ₊.
     *
     * @return a copy, ascending, at least 0
     */
    public double[] values() {
        return values.clone();
    }

    /**
     * Returns V.
     *
     * @return column j belongs to the j-th smallest value
     */
    public Operator vectors() {
        return vectors;
    }

    /**
     * Returns δ.
     *
     * @return a bound on ‖V − Ũ‖_F
     */
    public double defect() {
        return defect;
    }

    /**
     * Returns a bound on ‖A^½ − B^½‖_F.
     *
     * @return the bound for the best c
     */
    public double error() {
        return error(values, distance);
    }

    /**
     * Returns the bound on the distance of two square roots, from the eigenvalues of one of the matrices.
     *
     * @param values the eigenvalues of B, ascending, at least 0
     * @param distance a bound on ‖A − B‖_F for a positive A
     * @return a bound on ‖A^½ − B^½‖_F for the best c
     */
    public static double error(double[] values, double distance) {
        double least = bound(Double.POSITIVE_INFINITY, distance, values.length);
        for (int c = 0; c < values.length; c++) {
            least = Math.min(least, bound(values[c], distance, c));
        }
        return least;
    }

    /**
     * Returns a bound on ‖A^½ − B_c^½‖_F where the c smallest values are left out of B_c.
     *
     * @param c how many are left out, below the dimension
     * @return the bound with this c
     * @throws InvalidInputException if c is out of range
     */
    public double errorWithout(int c) {
        if (c < 0 || c >= values.length) {
            throw new InvalidInputException(
                    "CertifiedSquareRoot.errorWithout", "c is " + c, "0 to " + (values.length - 1), "keep a value");
        }
        double left = 0;
        for (int i = 0; i < c; i++) {
            left += values[i] * values[i];
        }
        double all = (distance + Math.sqrt(left) * (1 + c * U) + c * 0x1p-500) * (1 + 4 * U);
        return bound(values[c], all, c);
    }

    private static double bound(double value, double distance, int c) {
        double tail = value > 0 ? distance / value * distance : Double.POSITIVE_INFINITY;
        return Math.sqrt(tail + distance * Math.sqrt(c)) * (1 + 16 * U) + Double.MIN_NORMAL;
    }

    /**
     * Returns VΛ₊^½V*, multiplied out in double.
     *
     * @return a matrix within {@link #rootError} of A^½
     */
    public HermitianOperator root() {
        Operator w = quarter();
        return HermitianPart.ofLowerTriangle(w.times(w.adjoint()));
    }

    /** VΛ₊^¼. */
    private Operator quarter() {
        int n = values.length;
        double[] re = vectors.realParts();
        double[] im = vectors.imaginaryParts();
        double[] quarter =
                Arrays.stream(values).map(v -> Math.sqrt(Math.sqrt(v))).toArray();
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                re[i * n + j] *= quarter[j];
                if (im.length != 0) {
                    im[i * n + j] *= quarter[j];
                }
            }
        }
        return new Operator(n, n, re, im);
    }

    /**
     * Returns a bound on the distance of {@link #root} from A^½ in Frobenius norm: {@link #error}, δ(2 + δ) max √Λ₊ for the vectors, and (γ + 16u)(1 + δ)² Tr Λ₊^½ for rounding, γ that of a
     * product.
     *
     * @return the bound
     */
    public double rootError() {
        int n = values.length;
        double trace = 0;
        for (double v : values) {
            trace += Math.sqrt(v);
        }
        double turned = defect * (2 + defect) * Math.sqrt(values[n - 1]);
        double rounding = (Products.gamma(n) + 16 * U) * (1 + defect) * (1 + defect) * trace * (1 + n * U);
        return (error() + turned + rounding + n * 0x1p-500) * (1 + 16 * U);
    }
}
