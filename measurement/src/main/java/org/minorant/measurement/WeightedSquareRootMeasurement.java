package org.minorant.measurement;

import java.util.List;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;
import org.minorant.core.Enclosure;
import org.minorant.core.HermitianOperator;
import org.minorant.core.InvalidInputException;
import org.minorant.core.PositiveFactor;

/**
 * A weighted square-root measurement of an ensemble: M_i = T^(-½) (p_iρ_i)^s T^(-½) with T = Σ (p_jρ_j)^s, on the support of T.
 *
 * <p>Power s = 1 is the pretty-good measurement; s = 2, weighted quadratically, is asymptotically optimal for nearly orthogonal states, where s = 1 errs up to twice as
 * often as need be.
 *
 * <p><b>Accuracy.</b> Probabilities are certified for exactly the measurement stored, {@link #povm()}, which is the ideal one rounded to doubles; errors below about 1e-16
 * reflect that rounding. Directions in which T is below 1e-27 of its largest eigenvalue count as empty.
 *
 * <p>Immutable and thread-safe.
 *
 * <p>Sources: A. S. Holevo, Theory Probab. Appl. 23, 411 (1978); J. Tyson, J. Math. Phys. 50, 032106 (2009) (both from memory).
 */
public final class WeightedSquareRootMeasurement {

    /** Eigenvalues of a state this far below its largest are rounding noise of the spectrum. */
    private static final double NEGLIGIBLE = 0x1p-90;

    private static final double LARGEST_POWER = 16;

    private final double power;
    private final Povm povm;
    private final JointDistribution joint;

    private WeightedSquareRootMeasurement(double power, Povm povm, JointDistribution joint) {
        this.power = power;
        this.povm = povm;
        this.joint = joint;
    }

    /**
     * Returns the weighted square-root measurement of an ensemble.
     *
     * @param ensemble the states with their priors
     * @param power s, above 0 and at most 16
     * @return the measurement
     * @throws InvalidInputException if the power is out of range
     */
    public static WeightedSquareRootMeasurement of(Ensemble ensemble, double power) {
        Checks.inRange("WeightedSquareRootMeasurement.of", "the power", power, Double.MIN_NORMAL, LARGEST_POWER);
        ColumnBlocks.Builder z = new ColumnBlocks.Builder(ensemble.dimension());
        double largest = 0;
        for (double p : ensemble.priors()) {
            largest = Math.max(largest, p);
        }
        for (int i = 0; i < ensemble.size(); i++) {
            // only ratios of priors matter; dividing by the largest keeps high powers from underflow
            addPower(z, ensemble.state(i).factor(), ensemble.prior(i) / largest, power);
        }
        ColumnBlocks blocks = z.build();
        PolarFactors polar = PolarFactors.of(blocks.matrix());
        List<HermitianOperator> elements = blocks.measurement(polar);
        if (polar.rank() < ensemble.dimension()) {
            elements.add(ColumnBlocks.kernel(polar));
        }
        Povm povm = Povm.of(elements);
        return new WeightedSquareRootMeasurement(power, povm, povm.jointDistribution(ensemble));
    }

    /** Columns of (pA)^s: with A = XX* and X*X = VΛV*, those of √p^s XV Λ^((s−1)/2). */
    private static void addPower(ColumnBlocks.Builder z, PositiveFactor f, double p, double power) {
        EnclosedMatrix x = f.columns();
        EnclosedSpectrum s = EnclosedSpectrum.of(x.adjoint().times(x).midpoint());
        int n = s.dimension();
        double threshold = NEGLIGIBLE * s.value(n - 1);
        int first = 0;
        while (first < n && !(s.value(first) > threshold)) {
            first++;
        }
        double weight = Math.pow(p, power / 2);
        if (first == n || weight == 0) {
            z.addEmpty();
            return;
        }
        EnclosedMatrix.Builder scale = EnclosedMatrix.builder(n, n - first);
        for (int c = first; c < n; c++) {
            double w = weight * Math.pow(s.value(c), (power - 1) / 2);
            for (int i = 0; i < n; i++) {
                scale.set(
                        i,
                        c - first,
                        w * s.vectors().re(i, c),
                        0,
                        w * s.vectors().im(i, c),
                        0,
                        0);
            }
        }
        z.add(x.times(scale.build()).midpoint());
    }

    /**
     * Returns the power.
     *
     * @return s
     */
    public double power() {
        return power;
    }

    /**
     * Returns the measurement: one outcome for each state and, if the states leave part of the space empty, one more for its projector.
     *
     * @return the measurement, complete within rounding
     */
    public Povm povm() {
        return povm;
    }

    /**
     * Returns the joint probabilities of the state prepared and the outcome seen, for the measurement as stored.
     *
     * @return p_i Tr ρ_i M_j
     */
    public JointDistribution jointDistribution() {
        return joint;
    }

    /**
     * Returns the probability of naming the state that was prepared, for the measurement as stored.
     *
     * @return Σ_i p_i Tr ρ_i M_i
     */
    public Enclosure successProbability() {
        return joint.successProbability();
    }

    /**
     * Returns the probability of another outcome than the state's own, as its own sum, for the measurement as stored.
     *
     * @return the sum of p_i Tr ρ_i M_j over i ≠ j
     */
    public Enclosure errorProbability() {
        return joint.errorProbability();
    }

    /** The power and the error. */
    @Override
    public String toString() {
        return "WeightedSquareRootMeasurement of power " + power + ", error " + errorProbability();
    }
}
