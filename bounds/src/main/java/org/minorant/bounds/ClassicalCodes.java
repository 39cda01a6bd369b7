package org.minorant.bounds;

import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.WideDouble;
import org.minorant.core.curve.Curve;

/** The achievability bounds that need a classical channel: dependence testing and the random-coding union. */
final class ClassicalCodes {

    /** A relative width of M that is small enough: 1e-8 bit. */
    private static final double ENOUGH = 0x1p-28;

    private final Curve dependence;
    private final Lazy<RandomCodingUnion> union;
    private final WideDouble saturation;

    /**
     * Takes the channel's parts.
     *
     * @param outputs its rows
     * @param p the input
     * @param n the number of uses
     * @param f the mean curve of words against their mixture
     * @param saturation a point from which on the curve is 1
     */
    ClassicalCodes(DiagonalOutputs outputs, double[] p, int n, Curve f, WideDouble saturation) {
        this.dependence = DependenceTesting.of(f);
        this.union = new Lazy<>(() -> outputs.union(p, n));
        this.saturation = saturation;
    }

    /** The rows of a classical channel. */
    static DiagonalOutputs outputs(String asked, ClassicalQuantumChannel channel) {
        if (channel.structure() instanceof DiagonalOutputs diagonal) {
            return diagonal;
        }
        throw new InvalidInputException(
                asked,
                "a channel whose outputs are not all diagonal",
                "a classical channel: diagonal output states, or a stochastic matrix",
                "ask for achievable, which needs no commuting outputs, or give commuting outputs in their common eigenbasis");
    }

    /** Whether a channel is one that these bounds are for. */
    static boolean cover(ClassicalQuantumChannel channel) {
        return channel.structure() instanceof DiagonalOutputs;
    }

    /** A bound by which M messages surely have an error of at most ε; none if there is not one that says so. */
    Optional<Theorem> reaching(WideDouble others, double epsilon) {
        if (dependence.at(others).upper() <= epsilon) {
            return Optional.of(DependenceTesting.THEOREM);
        }
        boolean reached = union.get().fits(epsilon)
                && union.get().near(epsilon).at(others).upper() <= epsilon;
        return reached ? Optional.of(RandomCodingUnion.THEOREM) : Optional.empty();
    }

    Enclosure dependenceTestingError(Enclosure others) {
        return RandomCoding.error(dependence, others);
    }

    /** The largest M − 1. */
    Enclosure dependenceTesting(double epsilon) {
        return RandomCoding.others(dependence, epsilon, saturation.timesPowerOfTwo(1), ENOUGH);
    }

    Enclosure unionError(Enclosure others) {
        return RandomCoding.error(this::union, others);
    }

    private Enclosure union(WideDouble t) {
        return t.signum() == 0 ? Enclosure.ZERO : union.get().at(t);
    }

    /** The largest M − 1. */
    Enclosure union(double epsilon) {
        return RandomCoding.others(union.get().near(epsilon), epsilon, saturation, ENOUGH);
    }
}
