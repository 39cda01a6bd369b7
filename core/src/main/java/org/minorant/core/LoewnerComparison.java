package org.minorant.core;

import java.util.Optional;
import org.minorant.core.internal.message.Checks;

/**
 * Two Hermitian operators compared in the Loewner order: A ≤ B means that B − A is positive semidefinite.
 *
 * <p><b>Accuracy.</b> The extreme eigenvalues of B − A are enclosed, for the operators meant (see {@link PositiveOperator}), within about 1e-30 of
 * ‖A‖ + ‖B‖ for well-scaled input, at worst 1e-13 (the relative error that a factor may have), and exactly if both are diagonal. An eigenvalue that is zero (A and B touch in some direction) is
 * therefore mostly left undecided.
 *
 * @param least the smallest eigenvalue of B − A
 * @param largest the largest eigenvalue of B − A
 * @param leastVector a ket, dimension × 1, of norm one up to rounding: an approximate eigenvector to the smallest eigenvalue
 */
public record LoewnerComparison(Enclosure least, Enclosure largest, Operator leastVector) {

    /**
     * Compares two operators.
     *
     * @param a the first operator
     * @param b the second operator, on the same space
     * @return the comparison of A with B
     * @throws InvalidInputException if the dimensions differ
     */
    public static LoewnerComparison of(HermitianOperator a, HermitianOperator b) {
        Checks.equalShapes("LoewnerComparison.of", a, b);
        MeantOperator p = MeantOperator.of(a);
        MeantOperator q = MeantOperator.of(b);
        if (p.isExact() && q.isExact() && Positivity.isDiagonal(a) && Positivity.isDiagonal(b)) {
            return diagonal(a, b);
        }
        double error = (p.traceNormError() + q.traceNormError()) * (1 + 0x1p-52);
        EnclosedSpectrum s = EnclosedSpectrum.of(q.matrix().minus(p.matrix()));
        int n = s.dimension();
        double[] re = new double[n];
        double[] im = new double[n];
        for (int i = 0; i < n; i++) {
            re[i] = s.vectors().re(i, 0);
            im[i] = s.vectors().im(i, 0);
        }
        return new LoewnerComparison(
                s.eigenvalue(0).widen(error), s.eigenvalue(n - 1).widen(error), new Operator(n, 1, re, im));
    }

    private static LoewnerComparison diagonal(HermitianOperator a, HermitianOperator b) {
        int n = a.rows();
        Enclosure least = Enclosure.infinite();
        Enclosure largest = Enclosure.infinite().negate();
        int at = 0;
        for (int i = 0; i < n; i++) {
            Enclosure d = Enclosure.exact(b.re(i, i)).minus(Enclosure.exact(a.re(i, i)));
            if (d.lowerWide().compareTo(least.lowerWide()) < 0) {
                at = i;
            }
            least = least.min(d);
            largest = largest.max(d);
        }
        double[] v = new double[n];
        v[at] = 1;
        return new LoewnerComparison(least, largest, new Operator(n, 1, v, new double[0]));
    }

    /**
     * Tells whether A ≤ B.
     *
     * @return certainly if the smallest eigenvalue of B − A is at least 0, certainly not if it is negative
     */
    public Answer isBelow() {
        return sign(least);
    }

    /**
     * Tells whether A ≥ B.
     *
     * @return certainly if the largest eigenvalue of B − A is at most 0, certainly not if it is positive
     */
    public Answer isAbove() {
        return sign(largest.negate());
    }

    private static Answer sign(Enclosure least) {
        if (least.lowerWide().signum() >= 0) {
            return Answer.CERTAINLY;
        }
        return least.upperWide().signum() < 0 ? Answer.CERTAINLY_NOT : Answer.UNDECIDED;
    }

    /**
     * Returns the eigenvalue that contradicts A ≤ B, if one does with certainty; {@link #leastVector()} is its vector.
     *
     * @return the smallest eigenvalue of B − A if it is certainly negative
     */
    public Optional<Enclosure> violation() {
        return isBelow() == Answer.CERTAINLY_NOT ? Optional.of(least) : Optional.empty();
    }
}
