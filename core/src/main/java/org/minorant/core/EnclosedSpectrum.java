package org.minorant.core;

import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.work.Checkpoint;

/**
 * A certified spectral decomposition of a Hermitian matrix A: vectors V and values Λ with
 *
 * <pre>‖A − VΛV*‖_F ≤ residual,   ‖V*V − 1‖_F ≤ defect,</pre>
 *
 * both about 1e-30 of ‖A‖ for well-scaled input up to a few hundred dimensions.
 *
 * <p><b>Argument.</b> Vectors come from a double eigendecomposition, are made orthonormal to double-double by Newton–Schulz
 * steps and corrected to first order where eigenvalues are apart, by decompositions of their clusters where they are not. How they were
 * found does not matter: residual and defect are computed afterwards with {@link EnclosedMatrix}. By the theorems of Weyl and
 * Ostrowski the i-th smallest eigenvalue of A is within residual + defect · max|Λ| of the i-th smallest entry of Λ (Horn and
 * Johnson, Matrix Analysis, 2nd ed., 4.3.1 and 4.5.9).
 *
 * <p>Eigenvalues ascend. Immutable and thread-safe.
 */
public final class EnclosedSpectrum {

    private final EnclosedMatrix vectors;
    private final DoubleDouble[] values;
    private final double residual;
    private final double defect;

    private EnclosedSpectrum(EnclosedMatrix vectors, DoubleDouble[] values, double residual, double defect) {
        this.vectors = vectors;
        this.values = values;
        this.residual = residual;
        this.defect = defect;
    }

    /**
     * Decomposes a Hermitian operator, whose entries are taken as exact.
     *
     * @param a the operator
     * @return its certified spectral decomposition
     */
    public static EnclosedSpectrum of(HermitianOperator a) {
        return of(EnclosedMatrix.of(a));
    }

    /**
     * Decomposes an enclosed Hermitian matrix; what is found holds for every Hermitian matrix in the enclosure.
     *
     * @param a a square matrix, Hermitian up to its radii
     * @return its certified spectral decomposition
     * @throws InvalidInputException if the matrix is not square
     */
    public static EnclosedSpectrum of(EnclosedMatrix a) {
        SpectrumRefinement r = SpectrumRefinement.of(a);
        EnclosedMatrix v = r.vectors();
        DoubleDouble[] values = r.values();
        EnclosedMatrix back = scaleColumns(v, values).times(v.adjoint());
        Checkpoint.current().run();
        double residual = a.minus(back).frobeniusUpper();
        double defect =
                v.adjoint().times(v).minus(EnclosedMatrix.identity(a.rows())).frobeniusUpper();
        return new EnclosedSpectrum(v, values, residual, defect);
    }

    /** v · diag(values), the values taken as exact. */
    private static EnclosedMatrix scaleColumns(EnclosedMatrix v, DoubleDouble[] values) {
        EnclosedMatrix.Builder d = EnclosedMatrix.builder(values.length, values.length);
        for (int i = 0; i < values.length; i++) {
            for (int j = 0; j < values.length; j++) {
                d.set(i, j, values[j].hi(), values[j].lo(), 0, 0, 0);
            }
        }
        return v.timesEntrywise(d.build());
    }

    /**
     * Returns the dimension.
     *
     * @return the dimension of the space
     */
    public int dimension() {
        return values.length;
    }

    /**
     * Returns the vectors V, one column each: exact numbers, orthonormal up to {@link #defect()}.
     *
     * @return V, with radius zero
     */
    public EnclosedMatrix vectors() {
        return vectors;
    }

    /**
     * Returns the i-th smallest entry of Λ: an exact number, an eigenvalue of VΛV* up to the defect.
     *
     * @param i index from 0, ascending
     * @return the leading part of the value
     */
    public double value(int i) {
        return values[i].hi();
    }

    /**
     * Returns what {@link #value} leaves out of the i-th smallest entry of Λ.
     *
     * @param i index from 0, ascending
     * @return the trailing part
     */
    public double valueTail(int i) {
        return values[i].lo();
    }

    /**
     * Returns a certified enclosure of the i-th smallest eigenvalue of A.
     *
     * @param i index from 0, ascending
     * @return Λ_i widened by residual + defect · max|Λ|
     */
    public Enclosure eigenvalue(int i) {
        return Enclosure.exact(values[i].hi())
                .plus(Enclosure.exact(values[i].lo()).widen(eigenvalueRadius()));
    }

    /**
     * Returns the bound on the distance of eigenvalues of A from Λ.
     *
     * @return residual + defect · max|Λ|, rounded up
     */
    public double eigenvalueRadius() {
        double most = Math.max(Math.abs(values[0].hi()), Math.abs(values[values.length - 1].hi()));
        return (residual + defect * most * (1 + 0x1p-50)) * (1 + 0x1p-50);
    }

    /**
     * Returns the bound on ‖A − VΛV*‖_F.
     *
     * @return the residual
     */
    public double residual() {
        return residual;
    }

    /**
     * Returns the bound on ‖V*V − 1‖_F.
     *
     * @return the defect of orthonormality
     */
    public double defect() {
        return defect;
    }
}
