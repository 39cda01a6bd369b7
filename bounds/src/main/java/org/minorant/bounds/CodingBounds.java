package org.minorant.bounds;

import java.util.Arrays;
import java.util.Optional;
import java.util.stream.IntStream;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;
import org.minorant.core.WideDouble;
import org.minorant.core.curve.Curve;

/**
 * What codes for one use of a classical-quantum channel, or for n uses ({@link #uses}), can and cannot do, certified from both sides.
 *
 * <p>A code of M messages is a letter x(m) for each message and a measurement {T_m}; its average error is 1 − (1/M) Σ_m Tr[W_x(m) T_m]. All
 * bounds here but {@link #achievableLargest} are on the <em>average</em> error probability. A converse for the average error holds for the largest error, too; an
 * achievable average error ε gives a code with half the messages and a largest error of at most 2ε.
 *
 * <p><b>Real and whole M.</b> Formulas are evaluated for real M ≥ 1, as in the literature, so that thresholds vary smoothly. A code has a whole number of
 * messages: a threshold ln M from {@link #achievable} promises a code of ⌊M⌋ messages, and a threshold below two messages is returned as ln M = 0, one
 * message, which never fails. {@link #ledger} counts whole messages.
 *
 * <p><b>What is proved.</b> Enclosures hold the value of the named formula at the chosen input distribution and output state; they hold for states and
 * distributions as given and for those divided by their sums. The bounds say nothing about channels that are only approximately known: where safety or
 * security depends on them, the description of the channel needs a qualified review of its own.
 *
 * <p><b>Defaults.</b> Input: the one that attains the capacity (the uniform one if that does). Output state: that of the capacity.
 *
 * <p>Immutable and thread-safe.
 */
public final class CodingBounds {

    /** A relative width of M that is small enough in many uses, where values may be costly. */
    private static final double ENOUGH_FOR_WORDS = 0x1p-28;

    private final ClassicalQuantumChannel channel;
    private final Optional<double[]> chosenInput;
    private final Optional<DensityOperator> chosenOutput;
    private final int uses;
    private final Lazy<Curve> mean;
    private final Lazy<LetterCurves> letters;
    private final Lazy<ClassicalCodes> classical;

    private CodingBounds(
            ClassicalQuantumChannel channel,
            Optional<double[]> chosenInput,
            Optional<DensityOperator> chosenOutput,
            int uses) {
        this.channel = channel;
        this.uses = uses;
        this.chosenInput = chosenInput;
        this.chosenOutput = chosenOutput;
        this.mean = new Lazy<>(this::makeMean);
        this.letters = new Lazy<>(this::makeLetters);
        this.classical = new Lazy<>(() -> new ClassicalCodes(
                ClassicalCodes.outputs("CodingBounds", channel), input(), uses, mean.get(), saturation()));
    }

    /**
     * Returns the bounds for one use of a channel, with the default input and output state.
     *
     * @param channel the channel
     * @return the bounds
     */
    public static CodingBounds of(ClassicalQuantumChannel channel) {
        return new CodingBounds(channel, Optional.empty(), Optional.empty(), 1);
    }

    /**
     * Returns the same bounds with another input distribution for the codewords of the achievability bounds.
     *
     * @param input a distribution over the letters, summing to one within letters · 2^-50
     * @return the bounds with that input
     * @throws InvalidInputException if the input is not a distribution over the letters
     */
    public CodingBounds withInput(double... input) {
        double[] p = ChannelChecks.input("CodingBounds.withInput", input, channel.letters());
        return new CodingBounds(channel, Optional.of(p), chosenOutput, uses);
    }

    /**
     * Returns the same bounds with another output state for the converse.
     *
     * @param sigma a state of the output system
     * @return the bounds with that state
     * @throws InvalidInputException if its dimension is not that of the outputs
     */
    public CodingBounds withOutputState(DensityOperator sigma) {
        if (sigma.dimension() != channel.dimension()) {
            throw new InvalidInputException(
                    "CodingBounds.withOutputState",
                    "the state has dimension " + sigma.dimension(),
                    channel.dimension() + ", as the outputs",
                    "give a state of the output system");
        }
        return new CodingBounds(channel, chosenInput, Optional.of(sigma), uses);
    }

    /**
     * Returns the same bounds for n uses of the channel: codewords are words of n letters, drawn letter by letter from the input P for the achievability bounds, and the output state
     * of the converse is σ^⊗n.
     *
     * <p><b>What is covered.</b>
     *
     * <ul>
     *   <li>classical channels, against output states that commute with the letters; for the converse by types of words where letters are not alike, which fits two kinds of letters to 10⁴ uses, three to a few hundred;
     *   <li>kets: two equiprobable ones, or letters that are alike against the output state, by copies of one pair; others by the types of words, up to 20 000 of them;
     *   <li>letters on a qubit: of the same Bloch length and the same angle to the Bloch vector of the output state, or of the same length if that is maximally mixed, by copies of one pair; others by up to 300 types of words,
     *       which takes minutes at 30 uses and long beyond;
     *   <li>any letters while words have a dimension of at most 512.
     * </ul>
     *
     * Other channels are refused, when a bound is asked for that needs what they have not.
     *
     * <p><b>Accuracy.</b> Letters alike only up to rounding are taken for alike, and the enclosures widened for it. What the conditions on normalisation leave open grows like n roundings.
     *
     * @param n the number of uses, at least 1; it replaces an earlier one
     * @return the bounds for n uses
     * @throws InvalidInputException if n is below 1
     */
    public CodingBounds uses(int n) {
        if (n < 1) {
            throw new InvalidInputException(
                    "CodingBounds.uses",
                    "the number of uses is " + n,
                    "at least 1",
                    "give the length of the codewords");
        }
        return new CodingBounds(channel, chosenInput, chosenOutput, n);
    }

    private Curve makeMean() {
        double[] p = input();
        if (uses > 1) {
            return channel.structure().words(p, uses).curves().mean(saturation());
        }
        int[] used = IntStream.range(0, p.length).filter(x -> p[x] > 0).toArray();
        double[] weights = Arrays.stream(used).mapToDouble(x -> p[x]).toArray();
        return channel.structure().againstMixture(used, p).mean(weights);
    }

    /** As W_x ≤ ρ/P(x), the curve is its largest value from here on, in n uses from the n-th power. */
    private WideDouble saturation() {
        WideDouble one = LetterCurves.saturation(input()).max(WideDouble.of(2));
        return Enclosure.of(one, one).power(uses).upperWide();
    }

    private LetterCurves makeLetters() {
        if (uses > 1) {
            return (chosenOutput.isPresent()
                            ? channel.structure().wordsAgainst(chosenOutput.get(), uses)
                            : channel.structure()
                                    .wordsAgainstMixture(channel.capacity().input(), uses))
                    .curves();
        }
        int[] all = IntStream.range(0, channel.letters()).toArray();
        return chosenOutput.isPresent()
                ? channel.structure().against(all, chosenOutput.get())
                : channel.structure().againstMixture(all, channel.capacity().input());
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
    public ClassicalQuantumChannel channel() {
        return channel;
    }

    /**
     * Returns the input distribution of the achievability bounds.
     *
     * @return one probability for each letter, a copy
     */
    public double[] input() {
        return chosenInput.isPresent()
                ? chosenInput.get().clone()
                : channel.capacity().input();
    }

    /**
     * Returns the output state of the converse.
     *
     * @return the state
     */
    public DensityOperator outputState() {
        return chosenOutput.isPresent()
                ? chosenOutput.get()
                : channel.capacity().outputState();
    }

    /**
     * Returns an average error that some code of M messages surely does not exceed: f(M − 1) at the chosen input P, where
     *
     * <pre>f(t) = Tr[ρ_XB ∧ t ρ_X ⊗ ρ_B] = Σ_x P(x) Tr[W_x ∧ t ρ_B],   ρ_B = Σ_x P(x) W_x.</pre>
     *
     * <p>Source: H.-C. Cheng, PRX Quantum 4, 040330 (2023). On classical channels it is the dependence-testing bound with M − 1 in place of (M − 1)/2.
     *
     * @param messages M, at least 1
     * @return f(M − 1); 0 for one message
     * @throws InvalidInputException if M is below 1
     */
    public Enclosure achievableError(long messages) {
        return RandomCoding.error(mean.get(), MessageCount.others("CodingBounds.achievableError", messages));
    }

    /**
     * Returns f(M − 1) as {@link #achievableError(long)}, for a real M of any size given by its logarithm.
     *
     * @param messages ln M, at least 0; its own enclosure is carried through
     * @return f(M − 1)
     * @throws InvalidInputException if ln M is negative or beyond 7e8
     */
    public Enclosure achievableError(Information messages) {
        return RandomCoding.error(mean.get(), MessageCount.others("CodingBounds.achievableError", messages));
    }

    /**
     * Returns the largest ln M with f(M − 1) ≤ ε at the chosen input: some code of ⌊M⌋ messages has an average error of at most ε.
     *
     * <p>The lower end is certified by a value of f not above ε, the upper end by one above.
     *
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @return the threshold; 0 if it lies below two messages, and from 0 if that is not certain
     * @throws InvalidInputException if ε is not in range
     */
    public Information achievable(double epsilon) {
        ChannelChecks.error("CodingBounds.achievable", epsilon);
        return MessageCount.threshold(others(epsilon), RandomCoding.THEOREM);
    }

    /**
     * Returns ln M such that some code of ⌊M⌋ messages has a <em>largest</em> error of at most ε, for every message: M = (1 + t)(1 − f(t)/ε) with the f of {@link #achievableError(long)}, at a t that a search found. Of a code of 1 + t messages and
     * average error f(t), these are the messages of error at most ε. No converse needs to be told apart: what no code exceeds at average error ε is not exceeded at largest error ε.
     *
     * @param epsilon the largest error allowed, between 0 and 1, both excluded
     * @return the value at that t, enclosed: its lower end is surely reached, and another t may give more; 0 if it lies below two messages
     * @throws InvalidInputException if ε is not in range
     */
    public Information achievableLargest(double epsilon) {
        ChannelChecks.error("CodingBounds.achievableLargest", epsilon);
        return MessageCount.threshold(LargestError.others(mean.get(), epsilon, others(epsilon)), LargestError.THEOREM);
    }

    /**
     * Returns the largest ln M at which {@link #constantCompositionError} is at most ε, with the reading of {@link #achievable}: there is a code in all of whose words each letter occurs equally often.
     *
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @return the threshold, with the counts of letters in its source
     * @throws InvalidInputException if ε is not in range, or the letters are not covered in so many uses
     */
    public Information constantComposition(double epsilon) {
        ChannelChecks.error("CodingBounds.constantComposition", epsilon);
        return composition().messages(epsilon);
    }

    /**
     * Returns an average error that some code of M words of one type T surely does not exceed: with P = T/n, T the type nearest to n times the input, and Pⁿ(T) its probability,
     *
     * <pre>Tr[W_T ∧ (M − 1)/Pⁿ(T) ρ_B^⊗n],   ρ_B = Σ_x P(x) W_x.</pre>
     *
     * <p>Source: H.-C. Cheng, PRX Quantum 4, 040330 (2023), with words drawn from the class of T, whose mean output is at most ρ_B^⊗n/Pⁿ(T).
     *
     * @param messages ln M, at least 0
     * @return the bound
     * @throws InvalidInputException if ln M is negative or beyond 7e8, or the letters are not covered in so many uses
     */
    public Enclosure constantCompositionError(Information messages) {
        return composition().error(MessageCount.others("CodingBounds.constantCompositionError", messages));
    }

    private ConstantComposition composition() {
        return ConstantComposition.of(channel.structure(), input(), uses);
    }

    private Enclosure others(double epsilon) {
        return RandomCoding.others(mean.get(), epsilon, saturation(), uses == 1 ? 0 : ENOUGH_FOR_WORDS);
    }

    /**
     * Returns the dependence-testing bound of a classical channel, f((M−1)/2) with the f of {@link #achievableError(long)}: some code of M messages has at most this average error.
     *
     * <p>Source: Y. Polyanskiy, H. V. Poor, S. Verdú, IEEE Trans. Inf. Theory 56, 2307 (2010), theorem 17 (number from memory).
     *
     * @param messages M, at least 1
     * @return the bound; 0 for one message
     * @throws InvalidInputException if M is below 1 or the outputs are not diagonal
     */
    public Enclosure dependenceTestingError(long messages) {
        Enclosure others = MessageCount.others("CodingBounds.dependenceTestingError", messages);
        return classical("CodingBounds.dependenceTestingError").dependenceTestingError(others);
    }

    /**
     * Returns the bound of {@link #dependenceTestingError(long)} for a real M.
     *
     * @param messages ln M, at least 0
     * @return the bound
     * @throws InvalidInputException if ln M is negative or beyond 7e8, or the outputs are not diagonal
     */
    public Enclosure dependenceTestingError(Information messages) {
        Enclosure others = MessageCount.others("CodingBounds.dependenceTestingError", messages);
        return classical("CodingBounds.dependenceTestingError").dependenceTestingError(others);
    }

    /**
     * Returns the largest ln M at which {@link #dependenceTestingError(long)} is at most ε, with the reading of {@link #achievable}; M − 1 is twice that of {@link #achievable}, exactly.
     *
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @return the threshold; 0 if it lies below two messages, and from 0 if that is not certain
     * @throws InvalidInputException if ε is not in range or the outputs are not diagonal
     */
    public Information dependenceTesting(double epsilon) {
        ChannelChecks.error("CodingBounds.dependenceTesting", epsilon);
        ClassicalCodes codes = classical("CodingBounds.dependenceTesting");
        return MessageCount.threshold(codes.dependenceTesting(epsilon), DependenceTesting.THEOREM);
    }

    /**
     * Returns the random-coding union bound of a classical channel: some code of M messages has at most the average error E[min(1, (M−1) P[W(Y|X̄) ≥ W(Y|X) given X, Y])], words X and X̄ drawn
     * from the input. Never above f(M − 1), nor far from dependence testing on either side.
     *
     * <p><b>Accuracy and cost.</b> By joint types: relative width about 1e-9. Likelihoods equal up to 2^-44 are taken for equal, which is a decoder, too. Two letters and outcomes fit to some 3000 uses, to 10⁴ with a zero among them; where more than
     * 5 · 10⁸ types matter it is refused.
     *
     * <p>Source: Y. Polyanskiy, H. V. Poor, S. Verdú, IEEE Trans. Inf. Theory 56, 2307 (2010), theorem 16 (number from memory).
     *
     * @param messages M, at least 1
     * @return the bound; 0 for one message
     * @throws InvalidInputException if M is below 1, the outputs are not diagonal or there are too many types
     */
    public Enclosure randomCodingUnionError(long messages) {
        Enclosure others = MessageCount.others("CodingBounds.randomCodingUnionError", messages);
        return classical("CodingBounds.randomCodingUnionError").unionError(others);
    }

    /**
     * Returns the bound of {@link #randomCodingUnionError(long)} for a real M.
     *
     * @param messages ln M, at least 0
     * @return the bound
     * @throws InvalidInputException if ln M is negative or beyond 7e8, the outputs are not diagonal or there are too many types
     */
    public Enclosure randomCodingUnionError(Information messages) {
        Enclosure others = MessageCount.others("CodingBounds.randomCodingUnionError", messages);
        return classical("CodingBounds.randomCodingUnionError").unionError(others);
    }

    /**
     * Returns the largest ln M at which {@link #randomCodingUnionError(long)} is at most ε, with the reading of {@link #achievable}.
     *
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @return the threshold; 0 if it lies below two messages, and from 0 if that is not certain
     * @throws InvalidInputException if ε is not in range, the outputs are not diagonal or there are too many types
     */
    public Information randomCodingUnion(double epsilon) {
        ChannelChecks.error("CodingBounds.randomCodingUnion", epsilon);
        ClassicalCodes codes = classical("CodingBounds.randomCodingUnion");
        return MessageCount.threshold(codes.union(epsilon), RandomCodingUnion.THEOREM);
    }

    private ClassicalCodes classical(String asked) {
        ClassicalCodes.outputs(asked, channel);
        return classical.get();
    }

    /**
     * Returns the older bound on the average error of some code of M messages, for comparison: the least value over all tests and c &gt; 0 of (1+c)
     * Tr[ρ_XB (1−T)] + (2+c+1/c)(M−1) Tr[ρ_X ⊗ ρ_B T]. Never better than {@link #achievableError(long)}; enclosed to about 1e-11 relative.
     *
     * <p>Source: M. Hayashi, H. Nagaoka, IEEE Trans. Inf. Theory 49, 1753 (2003), lemma 2 (from memory).
     *
     * @param messages M, at least 1
     * @return the bound, at most 1; 0 for one message
     * @throws InvalidInputException if M is below 1
     */
    public Enclosure hayashiNagaokaError(long messages) {
        return HayashiNagaoka.error(mean.get(), MessageCount.others("CodingBounds.hayashiNagaokaError", messages));
    }

    /**
     * Returns the older bound as {@link #hayashiNagaokaError(long)}, for a real M of any size given by its logarithm.
     *
     * @param messages ln M, at least 0
     * @return the bound, at most 1
     * @throws InvalidInputException if ln M is negative or beyond 7e8
     */
    public Enclosure hayashiNagaokaError(Information messages) {
        return HayashiNagaoka.error(mean.get(), MessageCount.others("CodingBounds.hayashiNagaokaError", messages));
    }

    /**
     * Returns the largest ln M at which {@link #hayashiNagaokaError(long)} is at most ε, with the reading of {@link #achievable}.
     *
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @return the threshold; 0 if it lies below two messages, and from 0 if that is not certain
     * @throws InvalidInputException if ε is not in range
     */
    public Information hayashiNagaoka(double epsilon) {
        ChannelChecks.error("CodingBounds.hayashiNagaoka", epsilon);
        return MessageCount.threshold(
                HayashiNagaoka.others(mean.get(), epsilon, others(epsilon)), HayashiNagaoka.THEOREM);
    }

    /**
     * Returns an average error below which no code of M messages can be: with the chosen output state σ,
     *
     * <pre>ε ≥ sup over s ≥ 0 of  min_x Tr[W_x ∧ sσ] − s/M.</pre>
     *
     * @param messages M, at least 1
     * @return the bound; 0 for one message
     * @throws InvalidInputException if M is below 1
     */
    public Enclosure converseError(long messages) {
        Enclosure m = MessageCount.messages("CodingBounds.converseError", messages);
        return TraceMinimumConverse.error(letters.get(), m);
    }

    /**
     * Returns the error that no code undercuts as {@link #converseError(long)}, for a real M of any size given by its logarithm.
     *
     * @param messages ln M, at least 0
     * @return the bound
     * @throws InvalidInputException if ln M is negative or beyond 7e8
     */
    public Enclosure converseError(Information messages) {
        Enclosure m = MessageCount.messages("CodingBounds.converseError", messages);
        return TraceMinimumConverse.error(letters.get(), m);
    }

    /**
     * Returns ln M that no code of average error ε exceeds: with the chosen output state σ,
     *
     * <pre>ln M ≤ −ln sup over t ≥ 0 of  min_x Tr[tW_x ∧ σ] − tε.</pre>
     *
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @return the bound, enclosed; its upper end is surely not exceeded. Infinite if some output is orthogonal to σ
     * @throws InvalidInputException if ε is not in range
     */
    public Information converse(double epsilon) {
        ChannelChecks.error("CodingBounds.converse", epsilon);
        return uses == 1
                ? TraceMinimumConverse.messages(letters.get(), epsilon)
                : TraceMinimumConverse.messagesOfWords(letters.get(), epsilon);
    }

    /**
     * Returns ln M that no code of average error ε exceeds, with an output state of its own for each group of types of words: where letters are not alike, {@link #converse} is that of the best word, often far above. The output states do
     * not depend on those of these bounds. For numbers s_G, one for each group G of types P,
     *
     * <pre>M ≤ Σ_G s_G / (c − ε),   c = min over P of Tr[W_P ∧ s_G σ_G^⊗n].</pre>
     *
     * <p>The value at the s_G and σ_G that a search found is enclosed, to about 1e-9, for mixed letters 1e-5. It covers classical channels up to 20 000 types of words, kets up to 2000, others, which take minutes then, up to 33, all while {@link #uses} covers them. {@link #ledger} lists it, and {@link #constantComposition}, for a tenth of that.
     *
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @return the bound; infinite if no output states were found
     * @throws InvalidInputException if ε is not in range, or there are too many types of words
     */
    public Information converseByTypes(double epsilon) {
        ChannelChecks.error("CodingBounds.converseByTypes", epsilon);
        return TypesConverse.messages(channel, uses, epsilon);
    }

    /**
     * Returns the weak converse ln M ≤ (nC + h(ε))/(1 − ε) from Fano's and Holevo's inequalities.
     *
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @return the bound
     * @throws InvalidInputException if ε is not in range
     */
    public Information weakConverse(double epsilon) {
        ChannelChecks.error("CodingBounds.weakConverse", epsilon);
        return FanoHolevo.messages(
                Information.ofNats(channel.capacity().value().nats().times(uses)), epsilon);
    }

    /**
     * Returns ln M that some code of average error ε surely has, for every channel and any number of uses: with Q_s = Σ P(x) Tr W_x^(1−s) ρ_B^s at the chosen input,
     *
     * <pre>ln(M − 1) ≥ max over 0 &lt; s ≤ 1 of (ln ε − n ln Q_s)/s.</pre>
     *
     * <p>Never above {@link #achievable}, from which it follows by a bound on f; for where that is refused. The value at the s that a search found is enclosed to about n roundings.
     *
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @return the threshold, with the reading of {@link #achievable}
     * @throws InvalidInputException if ε is not in range
     */
    public Information chernoffAchievable(double epsilon) {
        ChannelChecks.error("CodingBounds.chernoffAchievable", epsilon);
        return MessageCount.threshold(relaxed().others(epsilon), ChernoffWords.THEOREM);
    }

    /**
     * Returns ln M that no code of average error ε exceeds, for every channel and any number of uses: at any output state σ and α &gt; 1
     *
     * <pre>ln M ≤ n max_x D̃_α(W_x‖σ) + α/(α−1) ln 1/(1−ε).</pre>
     *
     * <p>Never below {@link #converse} at the same output state. The value at the α, and the σ where none was chosen, that a search found is enclosed to about n roundings.
     *
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @return the bound; infinite if a letter's support is not certain to lie in that of the chosen output state
     * @throws InvalidInputException if ε is not in range
     */
    public Information strongConverse(double epsilon) {
        ChannelChecks.error("CodingBounds.strongConverse", epsilon);
        return strong().messages(epsilon);
    }

    private ChernoffWords relaxed() {
        return new ChernoffWords(channel.renyi(), input(), uses);
    }

    private StrongConverseWords strong() {
        return new StrongConverseWords(channel.renyi(), chosenOutput, input(), uses);
    }

    /**
     * Returns the normal approximation ln M ≈ nC − √(nV) Q⁻¹(ε), without a term of order ln n: no bound, and nothing is promised at any n.
     *
     * <p>C is the capacity, V the least {@linkplain ChannelDispersion dispersion} for ε &lt; ½, the largest one above. Chosen inputs and output states do not enter. It is given for every channel.
     *
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @return the approximation
     * @throws InvalidInputException if ε is not in range
     */
    public Approximation normalApproximation(double epsilon) {
        ChannelChecks.error("CodingBounds.normalApproximation", epsilon);
        return NormalApproximation.of(channel, uses, epsilon);
    }

    /**
     * Returns the approximation of moderate deviations, ln M ≈ nC − √(2nV ln 1/ε) for ε ≤ ½, nC + √(2nV ln 1/(1−ε)) above: the leading terms where ε, or 1 − ε, vanishes with growing n, but not exponentially. No bound.
     *
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @return the approximation, with V as in {@link #normalApproximation}
     * @throws InvalidInputException if ε is not in range
     */
    public Approximation moderateDeviations(double epsilon) {
        ChannelChecks.error("CodingBounds.moderateDeviations", epsilon);
        return NormalApproximation.moderate(channel, uses, epsilon);
    }

    /**
     * Returns how many uses a fraction of the capacity takes at an error of ε, counted in whole messages: {@link #blockLengthFor(double, double, WholeUnit)}.
     *
     * @param fraction the fraction of the capacity, between 0 and 1, both excluded
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @return a number of uses that is surely enough, and one before which it is impossible
     * @throws InvalidInputException if an argument is out of range, the capacity is 0, or the bounds do not cover the uses needed
     */
    public BlockLength blockLengthFor(double fraction, double epsilon) {
        return BlockLengthSearch.of(this, fraction, epsilon, WholeUnit.MESSAGES);
    }

    /**
     * Returns how many uses of the channel a fraction of its capacity takes at an error of ε, for every channel that {@link #uses} covers, at the input and output state of these bounds. Classical channels take the best of
     * dependence testing and the random-coding union, the others f(M − 1). Evaluates the converse some hundred times, which takes long where one value does.
     *
     * @param fraction the fraction of the capacity, between 0 and 1, both excluded
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @param unit what the size of codes is counted in
     * @return a number of uses that is surely enough, and one before which it is impossible; {@link BlockLength} says exactly what is certified
     * @throws InvalidInputException if an argument is out of range, the capacity is 0, or the bounds do not cover the uses needed
     */
    public BlockLength blockLengthFor(double fraction, double epsilon, WholeUnit unit) {
        return BlockLengthSearch.of(this, fraction, epsilon, unit);
    }

    /** A bound by which M messages surely have an error of at most ε, if there is one. */
    Optional<Theorem> reaching(WideDouble others, double epsilon) {
        if (ClassicalCodes.cover(channel)) {
            return classical.get().reaching(others, epsilon);
        }
        return mean.get().at(others).upper() <= epsilon ? Optional.of(RandomCoding.THEOREM) : Optional.empty();
    }

    /**
     * Returns every bound on ln of the largest whole number of messages that the uses carry with average error at most ε. The bound of Hayashi and Nagaoka, never the best one, is
     * listed for one use only: in many it takes long. A bound that {@link #uses} refuses for this channel is left out, which the name of the quantity says.
     *
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @return the bounds in order, with their sources
     * @throws InvalidInputException if ε is not in range
     */
    public Ledger ledger(double epsilon) {
        ChannelChecks.error("CodingBounds.ledger", epsilon);
        UsesLedger ledger = new UsesLedger(uses);
        if (uses == 1) {
            Enclosure older = HayashiNagaoka.others(mean.get(), epsilon, others(epsilon));
            ledger.whole(() -> older, HayashiNagaoka.THEOREM);
        }
        ledger.whole(() -> others(epsilon), RandomCoding.THEOREM);
        if (ClassicalCodes.cover(channel)) {
            ledger.whole(() -> classical.get().dependenceTesting(epsilon), DependenceTesting.THEOREM);
            ledger.whole(() -> classical.get().union(epsilon), RandomCodingUnion.THEOREM);
        }
        ledger.whole(() -> relaxed().others(epsilon), ChernoffWords.THEOREM);
        ledger.add(Side.UPPER, () -> converse(epsilon), TraceMinimumConverse.THEOREM);
        if (TypesConverse.helps(letters, channel, uses)) {
            ledger.whole(() -> composition().others(epsilon), ConstantComposition.THEOREM);
            ledger.add(Side.UPPER, () -> converseByTypes(epsilon), TypesConverse.THEOREM);
        }
        ledger.add(Side.UPPER, () -> strongConverse(epsilon), StrongConverseWords.THEOREM);
        ledger.add(Side.UPPER, () -> weakConverse(epsilon), FanoHolevo.THEOREM);
        return ledger.of("logarithm of the largest number of messages at average error " + epsilon);
    }

    /**
     * Returns every bound on the least average error of a code of M messages. That of Hayashi and Nagaoka is listed for one use only; what {@link #uses} refuses is left out as in {@link #ledger}.
     *
     * @param messages M, at least 1
     * @return the bounds in order, with their sources
     * @throws InvalidInputException if M is below 1
     */
    public Ledger errorLedger(long messages) {
        Enclosure others = MessageCount.others("CodingBounds.errorLedger", messages);
        UsesLedger ledger = new UsesLedger(uses);
        ledger.plain(Side.LOWER, () -> converseError(messages), TraceMinimumConverse.THEOREM);
        ledger.plain(Side.LOWER, () -> strong().error(others.plus(Enclosure.ONE)), StrongConverseWords.THEOREM);
        ledger.plain(Side.UPPER, () -> achievableError(messages), RandomCoding.THEOREM);
        if (ClassicalCodes.cover(channel)) {
            ledger.plain(Side.UPPER, () -> dependenceTestingError(messages), DependenceTesting.THEOREM);
            ledger.plain(Side.UPPER, () -> randomCodingUnionError(messages), RandomCodingUnion.THEOREM);
        }
        ledger.plain(Side.UPPER, () -> relaxed().error(others), ChernoffWords.THEOREM);
        if (uses == 1) {
            ledger.plain(Side.UPPER, () -> hayashiNagaokaError(messages), HayashiNagaoka.THEOREM);
        }
        return ledger.of("least average error of a code of " + messages + " messages");
    }
}
