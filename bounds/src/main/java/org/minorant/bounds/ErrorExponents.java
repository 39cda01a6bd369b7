package org.minorant.bounds;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;

/**
 * How fast errors vanish below the capacity, and successes above it: the exponents of −(1/n) ln of the error, or of the success, of codes of e^(nR) messages in n uses of a classical-quantum channel, n large.
 *
 * <pre>E0(s, P) = −ln Tr (Σ P(x) W_x^(1/(1+s)))^(1+s)
 * random coding    max over 0 ≤ s ≤ 1 and P of E0(s, P) − sR
 * sphere packing   sup over s ≥ 0 and P of E0(s, P) − sR
 * expurgated       sup over s ≥ 1 of −s ln Σ P(x) P(z) (Tr W_x^½ W_z^½)^(1/s) − sR
 * strong converse  sup over α &gt; 1 of ((α−1)/α) (R − χ̃_α),   χ̃_α = min over σ of max_x D̃_α(W_x‖σ)</pre>
 *
 * <p><b>What is known of the best codes.</b> Below the capacity, with the reliability E(R) = lim −(1/n) ln of the least error:
 *
 * <ul>
 *   <li>random coding ≤ E(R): for classical channels R. G. Gallager, IEEE Trans. Inf. Theory 11, 3 (1965); for kets M. V. Burnashev, A. S. Holevo, Probl. Inf. Transm. 34, 97 (1998). For mixed outputs A. S. Holevo, IEEE
 *       Trans. Inf. Theory 46, 2256 (2000) conjectured it; K. Li, D. Yang, arXiv:2407.12403 (2024), and J. M. Renes, arXiv:2407.11118 (2024), have announced proofs (all from memory). What was proven before is smaller:
 *       M. Hayashi, Phys. Rev. A 76, 062301 (2007), and H.-C. Cheng, PRX Quantum 4, 040330 (2023), with Tr W_x^(1−s) ρ^s in its place, which is the exponent of {@link CodingBounds#chernoffAchievable};
 *   <li>expurgated ≤ E(R) for every channel: Holevo 2000;
 *   <li>E(R) ≤ sphere packing for every channel, but for the countably many rates where it may jump: M. Dalai, IEEE Trans. Inf. Theory 59, 8027 (2013).
 * </ul>
 *
 * <p>From the critical rate on, random coding and sphere packing agree. Above the capacity the success decays with the strong converse exponent exactly: M. Mosonyi, T. Ogawa, Commun. Math. Phys. 355, 373 (2017).
 *
 * <p><b>Accuracy.</b> Values are enclosed for outputs and inputs divided by their sums. Searches find inputs, output states and s; certificates bound what they missed. Widths are about 1e-12 nats, up to some 1e-6 where the best input is nearly open or about to drop a letter, and 1e-9 for the
 * strong converse exponent. They are larger at rate zero for sphere packing, at rates where it becomes infinite, for ranks that doubles do not fix, and far above the capacity for the strong converse exponent, of which orders
 * beyond 5 are only bounded (1e-2 was met).
 *
 * <p><b>Special cases.</b> At rates from the capacity on the first three are 0 (the expurgated one earlier), up to the capacity the last. At rate zero, and below the rate up to which outputs can be told apart by their supports,
 * sphere packing or the expurgated exponent may be infinite, which is returned as such.
 *
 * <p>Immutable and thread-safe; values are worked out when first asked for.
 */
public final class ErrorExponents {

    private static final String HOLEVO = "A. S. Holevo, IEEE Trans. Inf. Theory 46, 2256 (2000) (from memory)";

    private static final Theorem EXPURGATED = new Theorem("expurgated exponent", HOLEVO);

    private static final Theorem SPHERE_PACKING =
            new Theorem("sphere-packing exponent", "M. Dalai, IEEE Trans. Inf. Theory 59, 8027 (2013) (from memory)");

    private static final Theorem STRONG_CONVERSE = new Theorem(
            "strong converse exponent", "M. Mosonyi, T. Ogawa, Commun. Math. Phys. 355, 373 (2017) (from memory)");

    /** Spacings at which differences of E0 bound its slope. */
    private static final double[] SPACINGS = {0x1p-27, 0x1p-24, 0x1p-20};

    private final ClassicalQuantumChannel channel;
    private final Information rate;
    private final Optional<double[]> input;
    private final Lazy<Exponent> random;
    private final Lazy<Exponent> sphere;
    private final Lazy<Exponent> strong;
    private final Lazy<double[]> expurgatedInput;
    private final Lazy<Exponent> expurgated;
    private final Lazy<double[]> cutoffInput;

    private ErrorExponents(ClassicalQuantumChannel channel, Information rate, Optional<double[]> input) {
        this.channel = channel;
        this.rate = rate;
        this.input = input;
        this.random = new Lazy<>(this::makeRandom);
        this.sphere = new Lazy<>(this::makeSphere);
        this.strong = new Lazy<>(this::makeStrong);
        this.expurgatedInput = new Lazy<>(this::makeExpurgatedInput);
        this.expurgated = new Lazy<>(this::makeExpurgated);
        this.cutoffInput = new Lazy<>(() -> gallager(1).input(1));
    }

    /**
     * Returns the exponents of a channel at a rate, with the best inputs.
     *
     * @param channel the channel
     * @param rate R, per use, at least 0; its own enclosure is carried through
     * @return the exponents
     * @throws InvalidInputException if the rate is negative or not finite
     */
    public static ErrorExponents of(ClassicalQuantumChannel channel, Information rate) {
        if (!(rate.nats().lower() >= 0 && rate.nats().isFinite())) {
            throw new InvalidInputException(
                    "ErrorExponents.of",
                    "the rate is " + rate.nats().toIntervalString(6) + " nats",
                    "at least 0 and finite",
                    "give the logarithm of the number of messages over the number of uses");
        }
        return new ErrorExponents(channel, rate, Optional.empty());
    }

    /**
     * Returns the same with another input for random coding, the expurgated exponent, critical and cutoff rate. Sphere packing and strong converse bound all codes, and stay those of the channel.
     *
     * @param p a distribution over the letters, summing to one within letters · 2^-50
     * @return the exponents with that input
     * @throws InvalidInputException if the input is not a distribution over the letters
     */
    public ErrorExponents withInput(double... p) {
        double[] copy = ChannelChecks.input("ErrorExponents.withInput", p, channel.letters());
        return new ErrorExponents(channel, rate, Optional.of(copy));
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
     * Returns the rate.
     *
     * @return R
     */
    public Information rate() {
        return rate;
    }

    private GallagerFamily gallager(double last) {
        return new GallagerFamily(channel, input, Optional.of(last));
    }

    private static boolean isSurelyAtMost(Enclosure a, Enclosure b) {
        return a.upperWide().compareTo(b.lowerWide()) <= 0;
    }

    private static Exponent exponent(ExponentSearch.Result r, Standing standing, Theorem theorem) {
        Information value = Information.ofNats(r.supremum()).withSource(theorem.toString());
        return new Exponent(value, r.s(), standing, theorem);
    }

    /**
     * Returns the random-coding exponent: with the best input for the rate, or the chosen one.
     *
     * <p>It is proven to be reached by codes on classical channels and for kets; for mixed outputs see the class comment.
     *
     * @return max over 0 ≤ s ≤ 1 of E0(s, P) − sR, and that s
     */
    public Exponent randomCoding() {
        return random.get();
    }

    private Exponent makeRandom() {
        boolean classical = channel.structure() instanceof DiagonalOutputs;
        boolean kets = channel.outputs().stream()
                .allMatch(w -> w.isDefinedByFactor() && w.factor().rank() == 1);
        String source = classical
                ? "R. G. Gallager, IEEE Trans. Inf. Theory 11, 3 (1965) (from memory)"
                : kets
                        ? "M. V. Burnashev, A. S. Holevo, Probl. Inf. Transm. 34, 97 (1998) (from memory)"
                        : "conjectured: " + HOLEVO
                                + "; announced: K. Li, D. Yang, arXiv:2407.12403 (2024), J. M. Renes, arXiv:2407.11118 (2024) (from memory)";
        Standing standing = classical || kets ? Standing.PROVEN : Standing.ANNOUNCED;
        return exponent(
                ExponentSearch.of(gallager(1), rate.nats()), standing, new Theorem("random-coding exponent", source));
    }

    /**
     * Returns the sphere-packing exponent of the channel, which no codes exceed.
     *
     * @return sup over s ≥ 0 and P of E0(s, P) − sR; infinite below the rate at which supports alone tell words apart
     */
    public Exponent spherePacking() {
        return sphere.get();
    }

    private Exponent makeSphere() {
        GallagerFamily family = new GallagerFamily(channel, Optional.empty(), Optional.empty());
        return exponent(ExponentSearch.of(family, rate.nats()), Standing.PROVEN, SPHERE_PACKING);
    }

    /**
     * Returns the expurgated exponent at {@link #expurgatedInput}: one that codes surely reach. The best input is not certified, as the problem is not convex in general.
     *
     * @return sup over s ≥ 1 of −s ln Σ P(x) P(z) (Tr W_x^½ W_z^½)^(1/s) − sR, or 0; infinite if outputs are orthogonal and the rate is small
     */
    public Exponent expurgated() {
        return expurgated.get();
    }

    /**
     * Returns the input of the expurgated exponent.
     *
     * @return the chosen input, or the best one that a search found; a copy
     */
    public double[] expurgatedInput() {
        return expurgatedInput.get().clone();
    }

    private double[] makeExpurgatedInput() {
        if (input.isPresent()) {
            return input.get();
        }
        double[] equal = new double[channel.letters()];
        Arrays.fill(equal, 1.0 / equal.length);
        List<double[]> starts =
                new ArrayList<>(List.of(equal, channel.capacity().input(), cutoffInput.get()));
        return ExpurgatedFamily.search(
                ExpurgatedFamily.lnOverlaps(channel), rate.nats().midpoint(), starts);
    }

    private Exponent makeExpurgated() {
        ExpurgatedFamily family = new ExpurgatedFamily(ExpurgatedFamily.lnOverlaps(channel), expurgatedInput.get());
        return exponent(ExponentSearch.of(family, rate.nats()), Standing.PROVEN, EXPURGATED);
    }

    /**
     * Returns the strong converse exponent of the channel: above the capacity, the success probability of the best codes decays like e^(−n times it).
     *
     * @return sup over α &gt; 1 of ((α−1)/α)(R − χ̃_α), with the (α−1)/α of its lower end; 0 up to the capacity
     */
    public Exponent strongConverse() {
        return strong.get();
    }

    private Exponent makeStrong() {
        ExponentSearch.Result r =
                isSurelyAtMost(rate.nats(), channel.capacity().value().nats())
                        ? new ExponentSearch.Result(Enclosure.ZERO, 0)
                        : StrongConverseExponent.of(
                                channel.renyi(), rate.nats(), channel.capacity().input());
        return exponent(r, Standing.PROVEN, STRONG_CONVERSE);
    }

    /**
     * Returns the cutoff rate max over P of E0(1, P), or E0(1, P) of the chosen input: the random-coding exponent at rate zero.
     *
     * @return the cutoff rate
     */
    public Information cutoffRate() {
        ExponentPoint p = new GallagerFamily(channel, Optional.of(cutoffInput.get()), Optional.of(1.0)).at(1);
        Enclosure value = p.value();
        if (input.isEmpty()) {
            Enclosure most = value;
            for (ExponentLine line : gallager(1).at(1).lines()) {
                most = most.max(line.value());
            }
            value = Enclosure.of(value.lowerWide(), most.upperWide());
        }
        return Information.ofNats(value).withSource("cutoff rate, E0 at s = 1");
    }

    /**
     * Returns the critical rate, from which on random coding and sphere packing agree: the slope of E0(s, P) at s = 1, for the input found at the cutoff rate or the chosen one. Enclosed for that input, to about 1e-8.
     *
     * @return ∂E0/∂s at s = 1
     */
    public Information criticalRate() {
        double[] p = cutoffInput.get();
        Enclosure middle = channel.renyi().gallager(1, p);
        Enclosure slope = Enclosure.of(0, Double.POSITIVE_INFINITY);
        for (double h : SPACINGS) {
            // E0 is concave in s: its slope lies between those of chords on either side
            Enclosure right = channel.renyi().gallager(1 + h, p).minus(middle).dividedBy(Enclosure.exact(h));
            Enclosure left = middle.minus(channel.renyi().gallager(1 - h, p)).dividedBy(Enclosure.exact(h));
            slope = slope.intersect(Enclosure.of(right.lowerWide(), left.upperWide()));
        }
        return Information.ofNats(slope).withSource("critical rate, slope of E0 at s = 1");
    }

    /** The exponents, one a line. */
    @Override
    public String toString() {
        return "exponents at rate " + rate + "\n  random coding    " + randomCoding() + "\n  expurgated       "
                + expurgated() + "\n  sphere packing   " + spherePacking() + "\n  strong converse  " + strongConverse();
    }
}
