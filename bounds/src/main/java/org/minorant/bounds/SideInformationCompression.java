package org.minorant.bounds;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.stream.IntStream;
import org.apache.commons.numbers.gamma.InverseErfc;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;
import org.minorant.core.WideDouble;
import org.minorant.core.curve.Curve;
import org.minorant.core.curve.CurveRoot;
import org.minorant.measurement.Ensemble;

/**
 * How far a source can be compressed for a receiver who holds quantum side information, for one letter or for n ({@link #uses}): certified from both sides.
 *
 * <p>The source emits x with probability P(x), and the receiver holds the state W_x. A code of M values is a map h of x to 1 … M and, for each value m, a measurement {T^m_x}; its error is 1 − Σ_x P(x) Tr[W_x T^h(x)_x]. With ρ_B = Σ_x P(x)
 * W_x and ρ_XB = ⊕_x P(x) W_x all numbers come from
 *
 * <pre>f(t) = Tr[ρ_XB ∧ t 1_X ⊗ ρ_B] = Σ_x Tr[P(x) W_x ∧ t ρ_B].</pre>
 *
 * <p><b>Achievability, f(1/M).</b> Draw h such that two different letters have the same value with probability at most 1/M, as any 2-universal family does; let the receiver use the pretty-good measurement on the letters of the value he is told. With A_x = P(x) W_x and S the sum of A_y over h(y) = h(x), a letter
 * adds Tr[A_x S^(−½)(S − A_x)S^(−½)] ≤ Tr[A_x ∧ (S − A_x)] to the error. A trace minimum is concave and nondecreasing in its second operator, so the mean over h is at most Tr[A_x ∧ (1/M) Σ_{y≠x} A_y] ≤ Tr[A_x ∧ ρ_B/M]; the sum over x is f(1/M).
 *
 * <p><b>Converse.</b> Σ_x |x⟩⟨x| ⊗ T^h(x)_x is a test that accepts ρ_XB with 1 − ε, and 1 ⊗ σ with Σ_m Σ_{x: h(x)=m} Tr[σ T^m_x] ≤ M, for every state σ. So M ≥ sup over t ≥ 0 of Tr[tρ_XB ∧ 1 ⊗ σ] − tε; σ = ρ_B here. Random maps do not help, as all is linear in them.
 *
 * <p><b>What is proved.</b> Enclosures hold the formula's value for states and distribution as divided by their sums. Formulas are evaluated for real M; an {@link #achievable} threshold ln M promises a code of ⌈M⌉ values. {@link #ledger} counts whole values.
 *
 * <p>Immutable and thread-safe. Sources: H.-C. Cheng, PRX Quantum 4, 040330 (2023), part on data compression; J. M. Renes, R. Renner, IEEE Trans. Inf. Theory 58, 1985 (2012); M. Tomamichel, M. Hayashi, IEEE Trans. Inf. Theory 59, 7693 (2013) (all
 * from memory).
 */
public final class SideInformationCompression {

    static final Theorem HASHING = new Theorem(
            "one-shot random hashing with side information, f(1/M)",
            "H.-C. Cheng, PRX Quantum 4, 040330 (2023), part on data compression (from memory)");

    static final Theorem CONVERSE = new Theorem(
            "one-shot converse for compression, hypothesis testing against no knowledge of the letter",
            "J. M. Renes, R. Renner, IEEE Trans. Inf. Theory 58, 1985 (2012); M. Tomamichel, M. Hayashi, ibid. 59, 7693 (2013) (both from memory)");

    static final Theorem WEAK = new Theorem(
            "weak converse nH(X|B) - h(e) - e n ln|X|",
            "R. M. Fano, Transmission of Information (1961); I. Devetak, A. Winter, Phys. Rev. A 68, 042301 (2003) (both from memory)");

    private static final double ENOUGH = 0x1p-28;

    private static final long LONG = 64;

    private static final String SOURCE =
            "normal approximation nH + sqrt(nV) Q^-1(e), without a logarithmic term: M. Tomamichel, M. Hayashi, IEEE Trans. Inf. Theory 59, 7693 (2013) (from memory)";

    private final ClassicalQuantumChannel states;
    private final double[] p;
    private final int uses;
    private final Lazy<SideInformationPair> pair;

    private SideInformationCompression(ClassicalQuantumChannel states, double[] p, int uses) {
        this.states = states;
        this.p = p;
        this.uses = uses;
        this.pair = new Lazy<>(() -> SideInformationPair.of(states, p, uses));
    }

    /**
     * Returns the bounds for one letter.
     *
     * @param states the side information: a state for each letter, as the outputs of a channel
     * @param p the probabilities of the letters, summing to one within letters · 2^-50
     * @return the bounds
     * @throws InvalidInputException if p is not a distribution over the letters
     */
    public static SideInformationCompression of(ClassicalQuantumChannel states, double... p) {
        double[] q = ChannelChecks.input("SideInformationCompression.of", p, states.letters());
        int[] used = IntStream.range(0, q.length).filter(x -> q[x] > 0).toArray();
        if (used.length == q.length) {
            return new SideInformationCompression(states, q, 1);
        }
        List<DensityOperator> kept = new ArrayList<>();
        for (int x : used) {
            kept.add(states.outputs().get(x));
        }
        double[] positive = Arrays.stream(used).mapToDouble(x -> q[x]).toArray();
        return new SideInformationCompression(ClassicalQuantumChannel.of(kept), positive, 1);
    }

    /**
     * Returns the bounds for one letter of an ensemble.
     *
     * @param ensemble the states that the receiver holds, with the probabilities of the letters
     * @return the bounds
     */
    public static SideInformationCompression of(Ensemble ensemble) {
        return of(ClassicalQuantumChannel.of(ensemble.states()), ensemble.priors());
    }

    /**
     * Returns the same bounds for n independent letters, with a state for each.
     *
     * <p><b>What is covered.</b> Classical side information (diagonal states), by types; letters of equal probability whose words are alike, as in {@link CodingBounds#uses}: two kets, qubits of like length and angle to the mixture; any others as far as copies
     * of the block-diagonal pair go, to twelve dimensions of letter and state together and a few letters.
     *
     * @param n the number of letters, at least 1; it replaces an earlier one
     * @return the bounds for n letters
     * @throws InvalidInputException if n is below 1
     */
    public SideInformationCompression uses(int n) {
        if (n < 1) {
            throw new InvalidInputException(
                    "SideInformationCompression.uses",
                    "the number of letters is " + n,
                    "at least 1",
                    "give the number of letters that are compressed together");
        }
        return new SideInformationCompression(states, p, n);
    }

    /**
     * Returns the number of letters that are compressed together.
     *
     * @return n; 1 unless chosen with {@link #uses(int)}
     */
    public int uses() {
        return uses;
    }

    /**
     * Returns the limit for many letters, H(X|B) = H(P) − I(X:B), for each letter.
     *
     * @return an enclosure of H(X|B)
     */
    public Information conditionalEntropy() {
        Enclosure sum = Traces.sum(p);
        Enclosure h = Enclosure.ZERO;
        for (double x : p) {
            h = h.minus(EntropyTerm.of(Enclosure.exact(x).dividedBy(sum)));
        }
        Enclosure rest = h.minus(states.mutualInformation(p).nats()).max(Enclosure.ZERO);
        return Information.ofNats(rest).withSource("conditional entropy H(X|B)");
    }

    /**
     * Returns an error that some code of M values does not exceed: f(1/M), in n copies.
     *
     * @param values M, at least 1
     * @return f(1/M)
     * @throws InvalidInputException if M is below 1, or the letters are not covered
     */
    public Enclosure achievableError(long values) {
        return reached(MessageCount.messages("SideInformationCompression.achievableError", values));
    }

    /**
     * Returns f(1/M) as {@link #achievableError(long)}, for a real M of any size given by its logarithm.
     *
     * @param values ln M, at least 0
     * @return f(1/M)
     * @throws InvalidInputException if ln M is negative or beyond 7e8, or the letters are not covered
     */
    public Enclosure achievableError(Information values) {
        return reached(MessageCount.messages("SideInformationCompression.achievableError", values));
    }

    private Enclosure reached(Enclosure values) {
        return curve().over(pair.get().total().dividedBy(values)).clip(0, 1);
    }

    /** t ↦ Tr[ρ_XB ∧ t B'], with B' = (1 ⊗ ρ_B)/K. */
    private Curve curve() {
        return pair.get().curves().mean(pair.get().total().upperWide());
    }

    /**
     * Returns the least ln M with f(1/M) ≤ ε: some code of ⌈M⌉ values has an error of at most ε.
     *
     * @param epsilon the error allowed, between 0 and 1, both excluded
     * @return the threshold
     * @throws InvalidInputException if ε is not in range, or the letters are not covered
     */
    public Information achievable(double epsilon) {
        ChannelChecks.error("SideInformationCompression.achievable", epsilon);
        Enclosure nats = pair.get().total().ln().minus(root(epsilon).ln()).max(Enclosure.ZERO);
        return Information.ofNats(nats).withSource(HASHING.toString());
    }

    /** The largest t with f(t) ≤ ε, in units of B': above ε/2, as f(t) ≤ t, and below K, where P(x) W_x ≤ ρ_B. */
    private Enclosure root(double epsilon) {
        Curve f = curve();
        WideDouble level = WideDouble.of(epsilon);
        WideDouble[] bracket = {
            WideDouble.of(epsilon / 2), pair.get().total().upperWide().timesPowerOfTwo(1)
        };
        if (bracket[1].exponent() > LONG) {
            bracket = ErrorWeight.halved(f, level, bracket[0], bracket[1]);
        }
        return CurveRoot.of(f, level, bracket[0], bracket[1], ENOUGH);
    }

    /**
     * Returns ln M below which no code of error ε is: ln sup over t ≥ 0 of Tr[tρ_XB ∧ 1 ⊗ ρ_B] − tε, in n copies.
     *
     * @param epsilon the error allowed, between 0 and 1, both excluded
     * @return the bound, enclosed; its lower end is surely needed. 0 where the formula says less
     * @throws InvalidInputException if ε is not in range, or the letters are not covered
     */
    public Information converse(double epsilon) {
        ChannelChecks.error("SideInformationCompression.converse", epsilon);
        Information spared = TraceMinimumConverse.messagesOfWords(pair.get().curves(), epsilon);
        Enclosure nats = pair.get().total().ln().minus(spared.nats()).max(Enclosure.ZERO);
        return Information.ofNats(nats).withSource(CONVERSE.toString());
    }

    /**
     * Returns an error below which no code of M values can be: sup over s ≥ 0 of Tr[ρ_XB ∧ s 1 ⊗ ρ_B] − sM, in n copies.
     *
     * @param values M, at least 1
     * @return the bound
     * @throws InvalidInputException if M is below 1, or the letters are not covered
     */
    public Enclosure converseError(long values) {
        Enclosure m = MessageCount.messages("SideInformationCompression.converseError", values);
        return TraceMinimumConverse.error(
                pair.get().curves(), pair.get().total().dividedBy(m));
    }

    /**
     * Returns the weak converse ln M ≥ nH(X|B) − h(ε) − εn ln|X|, for every source.
     *
     * @param epsilon the error allowed, between 0 and 1, both excluded
     * @return the bound; 0 where the formula says less
     * @throws InvalidInputException if ε is not in range
     */
    public Information weakConverse(double epsilon) {
        ChannelChecks.error("SideInformationCompression.weakConverse", epsilon);
        Enclosure e = Enclosure.exact(epsilon);
        Enclosure h = EntropyTerm.of(e).plus(EntropyTerm.of(e.complement())).negate();
        Enclosure letters = Enclosure.exact(p.length).ln().times(uses).times(e);
        Enclosure nats = conditionalEntropy().nats().times(uses).minus(h).minus(letters);
        return Information.ofNats(nats.max(Enclosure.ZERO)).withSource(WEAK.toString());
    }

    /**
     * Returns the normal approximation ln M ≈ nH(X|B) + √(nV) Q⁻¹(ε), V = V(ρ_XB‖1 ⊗ ρ_B): no bound, and nothing is promised at any n.
     *
     * @param epsilon the error allowed, between 0 and 1, both excluded
     * @return the approximation
     * @throws InvalidInputException if ε is not in range
     */
    public Approximation normalApproximation(double epsilon) {
        ChannelChecks.error("SideInformationCompression.normalApproximation", epsilon);
        double quantile = Math.sqrt(2) * InverseErfc.value(2 * epsilon);
        double mean = uses * conditionalEntropy().nats().midpoint();
        return new Approximation(mean + Math.sqrt(uses * variance()) * quantile, SOURCE);
    }

    /** Σ P(x) [V(W_x‖ρ_B) + (D(W_x‖ρ_B) + ln P(x))²] less the square of the mean. */
    private double variance() {
        DensityOperator mixture = states.outputState(p);
        double first = 0;
        double second = 0;
        for (int x = 0; x < p.length; x++) {
            DensityOperator w = states.outputs().get(x);
            double d = Divergences.relativeEntropy(w, mixture).nats().midpoint() + Math.log(p[x]);
            first += p[x] * d;
            second += p[x]
                    * (d * d + Divergences.relativeEntropyVariance(w, mixture).midpoint());
        }
        return Math.max(0, second - first * first);
    }

    /**
     * Returns every bound on ln of the least whole number of values at error ε.
     *
     * @param epsilon the error allowed, between 0 and 1, both excluded
     * @return the bounds in order, with their sources
     * @throws InvalidInputException if ε is not in range, or the letters are not covered
     */
    public Ledger ledger(double epsilon) {
        ChannelChecks.error("SideInformationCompression.ledger", epsilon);
        List<Bound> bounds = new ArrayList<>();
        bounds.add(Bound.of(Side.UPPER, whole(achievable(epsilon)), HASHING, List.of("whole values")));
        bounds.add(Bound.of(Side.LOWER, converse(epsilon), CONVERSE, List.of()));
        bounds.add(Bound.of(Side.LOWER, weakConverse(epsilon), WEAK, List.of()));
        String many = uses == 1 ? "" : ", " + uses + " letters";
        return Ledger.of("logarithm of the least number of values at error " + epsilon + many, bounds);
    }

    /** ln ⌈M⌉ from above; beyond 2^52 one more is enough. */
    private static Information whole(Information values) {
        Enclosure m = values.nats().exp();
        WideDouble high = m.upperWide();
        Enclosure above = high.exponent() < 52
                ? Enclosure.exact(Math.ceil(high.toDoubleUp()))
                : Enclosure.of(high, high).plus(Enclosure.ONE);
        return Information.ofNats(above.ln().max(Enclosure.ZERO)).withSource(values.source());
    }
}
