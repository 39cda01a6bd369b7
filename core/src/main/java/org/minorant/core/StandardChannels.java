package org.minorant.core;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.internal.message.Checks;

/**
 * The channels of the textbooks, by Kraus operators (M. A. Nielsen and I. L. Chuang, Quantum Computation and Quantum Information, ch. 8; M. M. Wilde,
 * Quantum Information Theory, ch. 4; both from memory).
 *
 * <p>Roots of the parameters are rounded to double, so that the channel meant is that of a parameter within about 2^-52 of the given one, relatively. All but
 * the unitary have Kraus operators with at most one entry in each row: they map kets of doubles without rounding.
 */
public final class StandardChannels {

    private StandardChannels() {}

    /**
     * Returns the identity channel.
     *
     * @param d the dimension, at least 1
     * @return A ↦ A
     * @throws InvalidInputException if d is below 1 or too large for memory
     */
    public static KrausChannel identity(int d) {
        return KrausChannel.of(HermitianOperator.identity(d));
    }

    /**
     * Returns the channel of a unitary, or of an isometry into a larger space.
     *
     * @param u a matrix with u*u = 1 within d · 2^-48
     * @return A ↦ u A u*
     * @throws InvalidInputException if u*u is not the identity up to rounding
     */
    public static KrausChannel unitary(Operator u) {
        return KrausChannel.of(u);
    }

    /**
     * Returns the depolarising channel.
     *
     * @param d the dimension, at least 1
     * @param p the probability of replacing the state, in [0, 1]
     * @return A ↦ (1 − p) A + p Tr(A) 1/d, with Kraus operators √(1−p) 1 and √(p/d) |i⟩⟨j|
     * @throws InvalidInputException if a parameter is out of range
     */
    public static KrausChannel depolarising(int d, double p) {
        String asked = "StandardChannels.depolarising";
        Checks.dimensions(asked, d, d);
        Checks.dimensions(asked + ", all Kraus operators", (long) d * d + 1, (long) d * d);
        probability(asked, p);
        List<Operator> kraus = new ArrayList<>();
        kraus.add(HermitianOperator.identity(d).times(Math.sqrt(1 - p)));
        for (int i = 0; i < d; i++) {
            for (int j = 0; j < d; j++) {
                kraus.add(unit(d, d, i, j, Math.sqrt(p / d)));
            }
        }
        return KrausChannel.of(kraus);
    }

    /**
     * Returns the dephasing channel.
     *
     * @param d the dimension, at least 1
     * @param p the probability of a measurement in the basis, in [0, 1]; for a qubit a phase flip of probability p/2
     * @return A ↦ (1 − p) A + p Σ |i⟩⟨i|A|i⟩⟨i|
     * @throws InvalidInputException if a parameter is out of range
     */
    public static KrausChannel dephasing(int d, double p) {
        String asked = "StandardChannels.dephasing";
        Checks.dimensions(asked, d, d);
        Checks.dimensions(asked + ", all Kraus operators", d + 1L, (long) d * d);
        probability(asked, p);
        List<Operator> kraus = new ArrayList<>();
        kraus.add(HermitianOperator.identity(d).times(Math.sqrt(1 - p)));
        for (int i = 0; i < d; i++) {
            kraus.add(unit(d, d, i, i, Math.sqrt(p)));
        }
        return KrausChannel.of(kraus);
    }

    /**
     * Returns the amplitude damping channel of a qubit, the decay of |1⟩ to |0⟩.
     *
     * @param gamma the probability of a decay, in [0, 1]
     * @return the channel with Kraus operators |0⟩⟨0| + √(1−γ) |1⟩⟨1| and √γ |0⟩⟨1|
     * @throws InvalidInputException if γ is out of range
     */
    public static KrausChannel amplitudeDamping(double gamma) {
        probability("StandardChannels.amplitudeDamping", gamma);
        return KrausChannel.of(HermitianOperator.diagonal(1, Math.sqrt(1 - gamma)), unit(2, 2, 0, 1, Math.sqrt(gamma)));
    }

    /**
     * Returns the bit flip channel of a qubit.
     *
     * @param p the probability of a flip, in [0, 1]
     * @return A ↦ (1 − p) A + p XAX, with X the Pauli operator
     * @throws InvalidInputException if p is out of range
     */
    public static KrausChannel bitFlip(double p) {
        probability("StandardChannels.bitFlip", p);
        double r = Math.sqrt(p);
        return KrausChannel.of(
                HermitianOperator.identity(2).times(Math.sqrt(1 - p)),
                HermitianOperator.ofReal(new double[][] {{0, r}, {r, 0}}));
    }

    /**
     * Returns the phase flip channel of a qubit.
     *
     * @param p the probability of a flip, in [0, 1]
     * @return A ↦ (1 − p) A + p ZAZ, with Z the Pauli operator
     * @throws InvalidInputException if p is out of range
     */
    public static KrausChannel phaseFlip(double p) {
        probability("StandardChannels.phaseFlip", p);
        double r = Math.sqrt(p);
        return KrausChannel.of(
                HermitianOperator.identity(2).times(Math.sqrt(1 - p)), HermitianOperator.diagonal(r, -r));
    }

    /**
     * Returns the erasure channel: with some probability the state is lost, and a flag orthogonal to all inputs, the last basis vector, says so.
     *
     * @param d the dimension of inputs, at least 1
     * @param p the probability of a loss, in [0, 1]
     * @return A ↦ (1 − p) A ⊕ p Tr(A), with outputs of dimension d + 1
     * @throws InvalidInputException if a parameter is out of range
     */
    public static KrausChannel erasure(int d, double p) {
        String asked = "StandardChannels.erasure";
        Checks.dimensions(asked, d + 1L, d);
        Checks.dimensions(asked + ", all Kraus operators", d + 1L, (d + 1L) * d);
        probability(asked, p);
        double[] kept = new double[(d + 1) * d];
        for (int i = 0; i < d; i++) {
            kept[i * d + i] = Math.sqrt(1 - p);
        }
        List<Operator> kraus = new ArrayList<>();
        kraus.add(new Operator(d + 1, d, kept, new double[0]));
        for (int i = 0; i < d; i++) {
            kraus.add(unit(d + 1, d, d, i, Math.sqrt(p)));
        }
        return KrausChannel.of(kraus);
    }

    private static void probability(String asked, double p) {
        Checks.inRange(asked, "the probability", p, 0, 1);
    }

    /** value · |i⟩⟨j|. */
    private static Operator unit(int rows, int columns, int i, int j, double value) {
        double[] re = new double[rows * columns];
        re[i * columns + j] = value;
        return new Operator(rows, columns, re, new double[0]);
    }
}
