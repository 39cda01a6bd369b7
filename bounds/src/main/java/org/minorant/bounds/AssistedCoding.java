package org.minorant.bounds;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.minorant.core.DensityOperator;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;
import org.minorant.core.KrausChannel;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;
import org.minorant.core.curve.Curve;
import org.minorant.core.curve.CurveRoot;
import org.minorant.core.pair.PositivePair;

/**
 * What codes can and cannot do that send messages through a quantum channel N, in one use or in n ({@link #uses}), when sender and receiver share as much entanglement as they like: certified from both sides.
 *
 * <p>A code is a shared state, an encoding of its sender's half into the input for each message, and a measurement {T_m} of output and receiver's half. All converses are for the <em>average</em> error; what is
 * achievable holds for the error of every single message, see below. Real and whole M are read as in {@link CodingBounds}.
 *
 * <p><b>The pair.</b> For a purification θ_RA of the input all numbers come from the curve
 *
 * <pre>f(t) = Tr[N(θ_RA) ∧ t θ_R ⊗ N(θ_A)],</pre>
 *
 * and from its n-fold copies, as θ^⊗n may be shared, too.
 *
 * <p><b>Achievability, f(M − 1).</b> Share M copies of θ, one for each message; for message m the sender puts his half of the m-th into the channel. The receiver has σ_m = N(θ) on R_m B, with θ_R on all other R_k. The pretty-good measurement
 * errs on m with Tr[σ_m S^(−½)(S − σ_m)S^(−½)] ≤ Tr[σ_m ∧ (S − σ_m)], S = Σ_k σ_k (H.-C. Cheng 2023). A trace minimum does not decrease when both operators go through a partial trace, as that is positive and keeps traces.
 * Leave out all R_k but R_m: σ_m becomes N(θ), and every other σ_k becomes θ_R ⊗ N(θ_A). So the error of each message is at most Tr[N(θ) ∧ (M − 1) θ_R ⊗ N(θ_A)] = f(M − 1).
 *
 * <p><b>Converse.</b> See {@link #converse}: hypothesis testing against an output state, for all inputs at once.
 *
 * <p><b>Defaults.</b> Input: the one that attains the capacity; the maximally mixed one for symmetric channels, which it is the best for. A purification is made of the root of the input rounded to double; {@link #input()} is the
 * state that is meant.
 *
 * <p><b>What is proved.</b> Enclosures hold the value of the formula at that input, for operators divided by their traces, and, where A and B do not commute, for those given, too. Where Kraus operators miss ΣK*K = 1 by rounding, the converse for symmetric
 * channels is that of the channel with K(ΣK*K)^(−½).
 *
 * <p>Immutable and thread-safe.
 *
 * <p>Sources: H.-C. Cheng, PRX Quantum 4, 040330 (2023), entanglement-assisted part; A. Anshu, R. Jain, N. A. Warsi, IEEE Trans. Inf. Theory 65, 1287 (2019), position-based coding; W. Matthews, S. Wehner, IEEE
 * Trans. Inf. Theory 60, 7317 (2014) (all from memory).
 */
public final class AssistedCoding {

    static final Theorem CODING = new Theorem(
            "one-shot random coding with shared entanglement, f(M-1)",
            "H.-C. Cheng, PRX Quantum 4, 040330 (2023), entanglement-assisted part (from memory)");

    static final Theorem WEAK = new Theorem(
            "weak converse with shared entanglement, (C + h(e))/(1 - e)",
            "R. M. Fano, Transmission of Information (1961); C. H. Bennett, P. W. Shor, J. A. Smolin, A. V. Thapliyal, IEEE Trans. Inf. Theory 48, 2637 (2002) (both from memory)");

    /** A relative width of M that is small enough. */
    private static final double ENOUGH = 0x1p-28;

    /** From here on a search begins at the normal approximation. */
    private static final int FEW = 1000;

    /** The part of 1/d that makes an input of full rank for the converse. */
    private static final double PART = 1e-6;

    private final KrausChannel channel;
    private final Optional<AssistedInput> chosen;
    private final int uses;
    private final Lazy<AssistedCapacity> capacity;
    private final Lazy<Optional<AssistedLetters>> letters;
    private final Lazy<LetterCurves> curves;

    private AssistedCoding(
            KrausChannel channel,
            Optional<AssistedInput> chosen,
            int uses,
            Lazy<AssistedCapacity> capacity,
            Lazy<Optional<AssistedLetters>> letters) {
        this.channel = channel;
        this.chosen = chosen;
        this.uses = uses;
        this.capacity = capacity;
        this.letters = letters;
        this.curves = new Lazy<>(this::makeCurves);
    }

    /**
     * Returns the bounds for one use of a channel, with the default input.
     *
     * @param channel the channel
     * @return the bounds
     */
    public static AssistedCoding of(KrausChannel channel) {
        return new AssistedCoding(
                channel,
                Optional.empty(),
                1,
                new Lazy<>(() -> AssistedCapacitySearch.of(channel)),
                new Lazy<>(() -> AssistedLetters.of(channel)));
    }

    /**
     * Returns the same bounds with another input.
     *
     * @param rho a state of the input system, of which the shared entangled state is a purification
     * @return the bounds with that input
     * @throws InvalidInputException if its dimension is not that of the inputs
     */
    public AssistedCoding withInput(DensityOperator rho) {
        if (rho.dimension() != channel.inputDimension()) {
            throw new InvalidInputException(
                    "AssistedCoding.withInput",
                    "the state has dimension " + rho.dimension(),
                    channel.inputDimension() + ", as the inputs",
                    "give a state of the input system");
        }
        return new AssistedCoding(channel, Optional.of(AssistedInput.of(rho)), uses, capacity, letters);
    }

    /**
     * Returns the same bounds for n uses of the channel.
     *
     * <p><b>What is covered.</b> Achievability where n copies of the pair are: A and B commute (channels with N(1) ∝ 1 and the maximally mixed input, erasure), to millions of uses if there are two or three different ratios of eigenvalues; general ones as {@link
     * PositivePair#copies} says. The converse where the channel is symmetric: see {@link #converse}.
     *
     * @param n the number of uses, at least 1; it replaces an earlier one
     * @return the bounds for n uses
     * @throws InvalidInputException if n is below 1
     */
    public AssistedCoding uses(int n) {
        if (n < 1) {
            throw new InvalidInputException(
                    "AssistedCoding.uses",
                    "the number of uses is " + n,
                    "at least 1",
                    "give the number of uses of the channel");
        }
        return new AssistedCoding(channel, chosen, n, capacity, letters);
    }

    private AssistedInput root() {
        if (chosen.isPresent()) {
            return chosen.get();
        }
        return isSymmetric()
                ? AssistedInput.maximallyMixed(channel.inputDimension())
                : AssistedInput.of(capacity.get().input());
    }

    private boolean isSymmetric() {
        return letters.get().isPresent() && letters.get().get().isSymmetric();
    }

    private boolean commutes() {
        return letters.get().isPresent() && root().isUniform();
    }

    private LetterCurves makeCurves() {
        if (commutes()) {
            return letters.get().get().words(uses).curves();
        }
        PositiveOperator joint = root().joint(channel);
        PositiveOperator product = root().product(channel);
        Enclosure first = Traces.of(joint);
        Enclosure one = Enclosure.ONE;
        Enclosure slack =
                one.dividedBy(first).hull(one.dividedBy(Traces.of(product))).hull(one);
        PositivePair pair = PositivePair.of(joint, product).copies(uses);
        return WordCurves.of(pair, first, slack, 0, 0, uses).curves();
    }

    /** N(θ) ≤ s θ_R ⊗ N(θ_A) with s = Tr ρ^(−1), as ⟨θ|ρ_R^(−1) ⊗ ρ_A^(−1)|θ⟩ is that; in n uses the n-th power. */
    private WideDouble saturation() {
        Enclosure s;
        if (commutes()) {
            s = Enclosure.exact(letters.get().get().saturation());
        } else {
            EnclosedMatrix x = EnclosedMatrix.of(root().root());
            EnclosedSpectrum gram = EnclosedSpectrum.of(x.adjoint().times(x));
            s = Enclosure.ZERO;
            for (int i = 0; i < gram.dimension(); i++) {
                s = s.plus(Enclosure.ONE.dividedBy(gram.eigenvalue(i)));
            }
            s = s.max(Enclosure.exact(2)).times(1 + 0x1p-40);
        }
        return s.power(uses).upperWide();
    }

    private Curve mean() {
        return curves.get().mean(saturation());
    }

    /**
     * Returns the number of uses.
     *
     * @return n; 1 unless chosen with {@link #uses(int)}
     */
    public int uses() {
        return uses;
    }

    /**
     * Returns the channel.
     *
     * @return the channel
     */
    public KrausChannel channel() {
        return channel;
    }

    /**
     * Returns the input whose purification is shared.
     *
     * @return the state meant: a chosen one up to rounding of its root
     */
    public DensityOperator input() {
        return root().state();
    }

    /**
     * Returns the assisted capacity of one use with the input that attains it, both certified.
     *
     * @return the capacity, worked out at the first call
     */
    public AssistedCapacity capacity() {
        return capacity.get();
    }

    /**
     * Returns an error that some code of M messages does not exceed for any message: f(M − 1).
     *
     * @param messages M, at least 1
     * @return f(M − 1); 0 for one message
     * @throws InvalidInputException if M is below 1, or n copies of the pair are not covered
     */
    public Enclosure achievableError(long messages) {
        Enclosure others = MessageCount.others("AssistedCoding.achievableError", messages);
        return RandomCoding.error(mean(), others);
    }

    /**
     * Returns f(M − 1) as {@link #achievableError(long)}, for a real M of any size given by its logarithm.
     *
     * @param messages ln M, at least 0; its own enclosure is carried through
     * @return f(M − 1)
     * @throws InvalidInputException if ln M is negative or beyond 7e8, or n copies of the pair are not covered
     */
    public Enclosure achievableError(Information messages) {
        Enclosure others = MessageCount.others("AssistedCoding.achievableError", messages);
        return RandomCoding.error(mean(), others);
    }

    /**
     * Returns the largest ln M with f(M − 1) ≤ ε: some code of ⌊M⌋ messages errs on none with more than ε.
     *
     * @param epsilon the error allowed, between 0 and 1, both excluded
     * @return the threshold; 0 if it lies below two messages, and from 0 if that is not certain
     * @throws InvalidInputException if ε is not in range, or n copies of the pair are not covered
     */
    public Information achievable(double epsilon) {
        ChannelChecks.error("AssistedCoding.achievable", epsilon);
        return MessageCount.threshold(others(epsilon), CODING);
    }

    private Enclosure others(double epsilon) {
        if (commutes() && uses > FEW) {
            Optional<Enclosure> root = near(mean(), epsilon);
            if (root.isPresent()) {
                return root.get();
            }
        }
        return RandomCoding.others(mean(), epsilon, saturation(), ENOUGH);
    }

    /** The crossing of f with ε, where the normal approximation leads to a bracket of it; so a search among depths where types are many is spared. */
    private Optional<Enclosure> near(Curve f, double epsilon) {
        double about = normalApproximation(epsilon).nats();
        double away = 10 + Math.log(uses);
        WideDouble level = WideDouble.of(epsilon);
        WideDouble most = WideDouble.expUp(about + away);
        if (!(about > away) || f.at(most).lowerWide().compareTo(level) <= 0) {
            return Optional.empty();
        }
        Enclosure root = CurveRoot.of(f, level, WideDouble.expDown(about - away), most, ENOUGH);
        return root.lowerWide().signum() > 0 ? Optional.of(root) : Optional.empty();
    }

    /**
     * Returns ln M that no code of average error ε exceeds, whatever entanglement it uses and whatever inputs.
     *
     * <p>For a <em>symmetric</em> channel, in n uses,
     *
     * <pre>ln M ≤ −ln sup over t ≥ 0 of Tr[tN(Φ)^⊗n ∧ (1/d ⊗ N(1/d))^⊗n] − tε,   Φ maximally entangled,</pre>
     *
     * enclosed. Symmetric are channels for which N(Φ) and 1/d ⊗ N(1/d) commute and whose joint eigenprojectors have multiples of the identity for parts on R, up to rounding: Pauli, depolarising and dephasing channels, all qubit channels with N(1) = 1,
     * erasure, and what unitaries before and after make of them; outputs that N(1) tells apart must lie in different basis vectors, each Kraus operator in one such part. This is found by the library.
     *
     * <p>For any other channel, in one use, a number that is surely such a bound: 1/M ≥ t(1 − ε) − λ, λ the largest eigenvalue of ρ^(−½) Tr_B (tN(θ) − ρ ⊗ N(ρ))₊ ρ^(−½), at the t found to be best and the
     * input here, to which 1e-6 of 1/d is added where it lacks full rank. More uses of such a channel are refused; one use of its tensor power goes, and {@link #weakConverse} always.
     *
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @return the bound; its upper end is surely not exceeded
     * @throws InvalidInputException if ε is not in range, or for more uses of a channel that is not symmetric
     */
    public Information converse(double epsilon) {
        ChannelChecks.error("AssistedCoding.converse", epsilon);
        if (!isSymmetric()) {
            return oneUse("AssistedCoding.converse").messages(epsilon);
        }
        AssistedLetters l = letters.get().get();
        double most = Math.nextUp(epsilon + l.excess(uses));
        LetterCurves words = l.words(uses).curves();
        Optional<WideDouble> weight =
                uses > FEW ? near(words.leastAgainst(), epsilon).map(Enclosure::lowerWide) : Optional.empty();
        Information bound = TraceMinimumConverse.messagesOfWords(
                words, Enclosure.of(epsilon, most), weight.or(() -> ErrorWeight.of(words.leastAgainst(), epsilon)));
        return bound.withSource(AssistedConverse.THEOREM.toString());
    }

    /**
     * Returns an average error below which no code of M messages can be, by the inequalities of {@link #converse}.
     *
     * @param messages M, at least 1
     * @return the bound; 0 for one message
     * @throws InvalidInputException if M is below 1, or for more uses of a channel that is not symmetric
     */
    public Enclosure converseError(long messages) {
        return converseError(MessageCount.messages("AssistedCoding.converseError", messages));
    }

    /**
     * Returns the error that no code undercuts as {@link #converseError(long)}, for a real M of any size given by its logarithm.
     *
     * @param messages ln M, at least 0
     * @return the bound
     * @throws InvalidInputException if ln M is negative or beyond 7e8, or for more uses of a channel that is not symmetric
     */
    public Enclosure converseError(Information messages) {
        return converseError(MessageCount.messages("AssistedCoding.converseError", messages));
    }

    private Enclosure converseError(Enclosure messages) {
        if (!isSymmetric()) {
            AssistedConverse c = oneUse("AssistedCoding.converseError");
            return messages.equals(Enclosure.ONE) ? Enclosure.ZERO : c.error(messages);
        }
        AssistedLetters l = letters.get().get();
        Enclosure bound = TraceMinimumConverse.error(l.words(uses).curves(), messages);
        return bound.minus(Enclosure.of(0, l.excess(uses))).clip(0, 1);
    }

    private AssistedConverse oneUse(String asked) {
        if (uses > 1) {
            throw new InvalidInputException(
                    asked,
                    uses + " uses of a channel whose symmetry was not found",
                    "channels for which N(Φ) and 1/d ⊗ N(1/d) commute, with joint eigenprojectors that have multiples of the identity for parts on R",
                    "use weakConverse, or ask for one use of a tensor power of the channel");
        }
        AssistedInput input = root();
        if (!input.isFull()) {
            DensityOperator full = DensityOperator.mixture(
                    List.of(input.state(), DensityOperator.maximallyMixed(channel.inputDimension())), 1 - PART, PART);
            input = AssistedInput.of(full);
        }
        return AssistedConverse.of(channel, input);
    }

    /**
     * Returns the weak converse ln M ≤ (nC + h(ε))/(1 − ε) with the assisted capacity C, which is additive: for every channel and n.
     *
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @return the bound
     * @throws InvalidInputException if ε is not in range
     */
    public Information weakConverse(double epsilon) {
        ChannelChecks.error("AssistedCoding.weakConverse", epsilon);
        Information c = Information.ofNats(capacity().value().nats().times(uses));
        return FanoHolevo.messages(c, epsilon).withSource(WEAK.toString());
    }

    /**
     * Returns the normal approximation ln M ≈ nC − √(nV) Q⁻¹(ε), V the variance of ln N(θ) − ln θ_R ⊗ N(θ_A) at the input found for the capacity: no bound, and nothing is promised at any n.
     *
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @return the approximation
     * @throws InvalidInputException if ε is not in range
     */
    public Approximation normalApproximation(double epsilon) {
        ChannelChecks.error("AssistedCoding.normalApproximation", epsilon);
        return AssistedNormal.of(channel, capacity(), uses, epsilon);
    }

    /**
     * Returns every bound on ln of the largest whole number of messages at average error ε. Where the converse by hypothesis testing is not covered, the weak one stands alone.
     *
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @return the bounds in order, with their sources
     * @throws InvalidInputException if ε is not in range, or n copies of the pair are not covered
     */
    public Ledger ledger(double epsilon) {
        ChannelChecks.error("AssistedCoding.ledger", epsilon);
        List<Bound> bounds = new ArrayList<>();
        bounds.add(Bound.of(Side.LOWER, MessageCount.whole(others(epsilon)), CODING, List.of("whole messages")));
        if (isSymmetric()) {
            bounds.add(Bound.of(
                    Side.UPPER, converse(epsilon), AssistedConverse.THEOREM, List.of("the channel is symmetric")));
        } else if (uses == 1) {
            bounds.add(Bound.of(Side.UPPER, converse(epsilon), AssistedConverse.THEOREM, List.of("one use")));
        }
        bounds.add(Bound.of(Side.UPPER, weakConverse(epsilon), WEAK, List.of()));
        String inUses = uses == 1 ? "" : " in " + uses + " uses";
        return Ledger.of(
                "logarithm of the largest number of messages with shared entanglement at average error " + epsilon
                        + inUses,
                bounds);
    }
}
