package org.minorant.core;

import java.util.List;
import org.minorant.core.internal.message.Checks;

/**
 * A density operator: positive, of trace one; the state of a quantum system.
 *
 * <p><b>Trace.</b> Doubles seldom sum to one exactly; the trace is accepted within n · 2^-50 of one and the operator is used as given.
 * Which operator is meant by entries with a tiny negative eigenvalue is said in {@link PositiveOperator}.
 *
 * <p>Immutable and thread-safe.
 */
public final class DensityOperator extends PositiveOperator {

    private static final double TRACE_ROUNDING = 0x1p-50;

    private DensityOperator(PositiveOperator p) {
        super(p);
    }

    /**
     * Returns the state with these entries.
     *
     * @param re real parts, d × d, symmetric
     * @param im imaginary parts, d × d, antisymmetric
     * @return the state
     * @throws InvalidInputException if the shape is wrong, an entry is not finite, or the matrix is not exactly Hermitian, not positive
     *     up to rounding, or not of trace one within d · 2^-50
     */
    public static DensityOperator of(double[][] re, double[][] im) {
        return of(Operator.of(re, im));
    }

    /**
     * Returns the state with these real entries.
     *
     * @param re entries, d × d, symmetric
     * @return the state
     * @throws InvalidInputException as {@link #of(double[][], double[][])}
     */
    public static DensityOperator ofReal(double[][] re) {
        return of(Operator.ofReal(re));
    }

    /**
     * Returns an operator as a state.
     *
     * @param a an exactly Hermitian operator, positive up to rounding, of trace one within d · 2^-50
     * @return the state
     * @throws InvalidInputException if it is anything else
     */
    public static DensityOperator of(Operator a) {
        if (a instanceof DensityOperator d) {
            return d;
        }
        requireHermitian("DensityOperator.of", a);
        double trace = a.trace().re();
        double tolerance = a.rows() * TRACE_ROUNDING;
        if (!(Math.abs(trace - 1) <= tolerance)) {
            throw new InvalidInputException(
                    "DensityOperator.of",
                    "the trace is " + trace,
                    "1 within " + tolerance,
                    "use DensityOperator.nearest to normalise");
        }
        return new DensityOperator(
                a instanceof PositiveOperator p ? p : PositiveOperator.ofEntries("DensityOperator.of", a));
    }

    /**
     * Returns the pure state |ψ⟩⟨ψ| of a normalised ket, exactly that of these amplitudes.
     *
     * @param re real parts of the d amplitudes
     * @param im imaginary parts, as many
     * @return the pure state
     * @throws InvalidInputException if the lengths differ, are zero, an amplitude is not finite, or the squared norm is not one within
     *     d · 2^-50
     */
    public static DensityOperator ofKet(double[] re, double[] im) {
        Checks.length("DensityOperator.ofKet, imaginary part", im, re.length);
        Operator psi = Operator.ofRowMajor(re.length, 1, re, im);
        double norm = 0;
        for (int i = 0; i < re.length; i++) {
            norm += re[i] * re[i] + im[i] * im[i];
        }
        double tolerance = re.length * TRACE_ROUNDING;
        if (!(Math.abs(norm - 1) <= tolerance)) {
            throw new InvalidInputException(
                    "DensityOperator.ofKet",
                    "the squared norm is " + norm,
                    "1 within " + tolerance,
                    "divide the ket by its norm");
        }
        return new DensityOperator(PositiveOperator.ofFactor(psi));
    }

    /**
     * Returns the pure state of a normalised ket with real amplitudes.
     *
     * @param re the d amplitudes
     * @return the pure state
     * @throws InvalidInputException as {@link #ofKet(double[], double[])}
     */
    public static DensityOperator ofKet(double... re) {
        return ofKet(re, new double[re.length]);
    }

    /**
     * Returns the qubit state ½(1 + xX + yY + zZ), with X, Y, Z the Pauli operators, exactly that of these three doubles; its small
     * eigenvalue (1 − |r|)/2 keeps its digits also next to purity. A vector longer than one by rounding means the
     * positive part of that matrix, (1 + |r|)/2 times the pure state along it.
     *
     * @param x first Bloch component
     * @param y second Bloch component
     * @param z third Bloch component
     * @return the qubit state, 2 × 2, in the eigenbasis of Z
     * @throws InvalidInputException if a component is not finite or the vector is longer than one by more than 2^-50
     */
    public static DensityOperator ofBloch(double x, double y, double z) {
        Checks.finite("DensityOperator.ofBloch", new double[] {x, y, z});
        return new DensityOperator(BlochState.of(x, y, z));
    }

    /**
     * Returns the maximally mixed state 1/d.
     *
     * @param d the dimension, at least 1
     * @return 1/d on d dimensions
     * @throws InvalidInputException if d is below 1 or too large for memory
     */
    public static DensityOperator maximallyMixed(int d) {
        Checks.dimensions("DensityOperator.maximallyMixed", d, d);
        double[] p = new double[d];
        java.util.Arrays.fill(p, 1.0 / d);
        return ofEigenvalues(p);
    }

    /**
     * Returns the diagonal state with these eigenvalues; small ones keep their digits.
     *
     * @param eigenvalues probabilities, each at least 0, summing to one within d · 2^-50
     * @return the state
     * @throws InvalidInputException if one is negative or not finite, or the sum is not one
     */
    public static DensityOperator ofEigenvalues(double... eigenvalues) {
        return of((Operator) PositiveOperator.ofEigenvalues(eigenvalues));
    }

    /**
     * Returns a positive operator of trace one as a state, keeping its factor.
     *
     * @param a a positive operator
     * @return the state
     * @throws InvalidInputException if the trace is not one within d · 2^-50
     */
    public static DensityOperator of(PositiveOperator a) {
        return of((Operator) a);
    }

    /**
     * Returns the mixture Σ w_i ρ_i of the states meant, exactly; the entries are a copy of it, rounded once. A mixture of kets has as many columns
     * in its factor as kets, and keeps relative accuracy: see {@link PositiveOperator#weightedSum}.
     *
     * @param states states of one dimension, at least one
     * @param weights as many probabilities, each at least 0, summing to one within n · 2^-50 for n states; used as given
     * @return the mixture; its trace is Σ w_i Tr ρ_i, one up to rounding
     * @throws InvalidInputException if the list is empty, the lengths or dimensions differ, a weight is negative or not finite, or the weights do
     *     not sum to one
     */
    public static DensityOperator mixture(List<DensityOperator> states, double... weights) {
        String asked = "DensityOperator.mixture";
        PositiveOperator sum = WeightedSum.of(asked, states, weights);
        double total = 0;
        for (double w : weights) {
            total += w;
        }
        double tolerance = weights.length * TRACE_ROUNDING;
        if (!(Math.abs(total - 1) <= tolerance)) {
            throw new InvalidInputException(
                    asked,
                    "the weights sum to " + total,
                    "1 within " + tolerance,
                    "divide the weights by their sum, or use PositiveOperator.weightedSum");
        }
        return new DensityOperator(sum);
    }

    /** Takes over a positive operator that is a state by a theorem; rounding of its trace is not refused. */
    static DensityOperator trusted(PositiveOperator p) {
        return p instanceof DensityOperator d ? d : new DensityOperator(p);
    }

    /**
     * Returns the nearest state in Hilbert–Schmidt norm: see {@link StateRepair#NEAREST}.
     *
     * @param a a square operator
     * @return the state, given by its factor, and what was repaired
     * @throws InvalidInputException if the operator is not square
     */
    public static Repaired<DensityOperator> nearest(Operator a) {
        return nearest(a, StateRepair.NEAREST);
    }

    /**
     * Returns a state near an operator.
     *
     * @param a a square operator
     * @param how what is done to the spectrum of its Hermitian part
     * @return the state, given by its factor, and what was repaired
     * @throws InvalidInputException if the operator is not square or, where its positive part is to be normalised, has none
     */
    public static Repaired<DensityOperator> nearest(Operator a, StateRepair how) {
        return Repairs.state(a, how);
    }

    /**
     * Returns the product state.
     *
     * @param other the state of the second system
     * @return this ⊗ other, with the factor of {@link PositiveOperator#tensor}
     * @throws InvalidInputException as {@link Operator#tensor}
     */
    public DensityOperator tensor(DensityOperator other) {
        return new DensityOperator(super.tensor((PositiveOperator) other));
    }

    @Override
    public DensityOperator conjugate() {
        return new DensityOperator(super.conjugate());
    }

    @Override
    public DensityOperator transpose() {
        return conjugate();
    }
}
