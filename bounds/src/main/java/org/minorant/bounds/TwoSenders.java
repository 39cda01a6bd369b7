package org.minorant.bounds;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;
import org.minorant.core.curve.CurveRoot;
import org.minorant.core.pair.PositivePair;

/**
 * Two senders and one receiver: letters x of the first and y of the second make the state W_xy, and the receiver is to find both messages. What some code of M₁ and M₂ messages surely reaches, for one use and for n ({@link
 * #uses}) where they fit, and what none exceeds. Errors are average errors: the probability that either message is found wrongly, over all pairs of messages.
 *
 * <p><b>Achievability.</b> With ρ_y = Σ P(x) W_xy, ρ_x = Σ Q(y) W_xy and ρ = Σ P(x) Q(y) W_xy some code has an average error of at most
 *
 * <pre>g(M₁, M₂) = Σ P(x) Q(y) Tr[W_xy ∧ ((M₁−1) ρ_y + (M₂−1) ρ_x + (M₁−1)(M₂−1) ρ)].</pre>
 *
 * <p><b>Argument.</b> Draw x(1) … x(M₁) from P and y(1) … y(M₂) from Q, all independent, and use the pretty-good measurement on the M₁M₂ states. It errs on a pair of messages with at most Tr[W ∧ R], W their state and R the sum of all others (H.-C.
 * Cheng 2023). Fix the two codewords x and y of that pair and take the mean over the others: a trace minimum is concave in R, so the mean of R may stand there. Of the other states M₁ − 1 share y, and have the mean ρ_y; M₂ − 1 share x, with
 * the mean ρ_x; the rest share none, and have the mean ρ. Then take the mean over x and y. So the mean over all codes is at most g, and some code is as good.
 *
 * <p><b>Converse.</b> Both senders together are one sender with letters (x, y), so M₁M₂ obeys that converse. For some message of the second sender the error over those of the first is at most ε; with that message's letter y fixed, M₁ obeys the converse of
 * the channel x ↦ W_xy for some y, so the largest of them.
 *
 * <p><b>What is proved.</b> Enclosures hold the formula's value for states and distributions as given and as divided by their sums.
 *
 * <p><b>Default.</b> Both inputs uniform.
 *
 * <p>Immutable and thread-safe. Sources: H.-C. Cheng, PRX Quantum 4, 040330 (2023), part on several senders; J. Yard, P. Hayden, I. Devetak, IEEE Trans. Inf. Theory 54, 3091 (2008), for the region that many uses reach; A. Winter, ibid. 47, 3059 (2001) (all
 * from memory).
 */
public final class TwoSenders {

    static final Theorem CODING = new Theorem(
            "one-shot random coding for two senders",
            "H.-C. Cheng, PRX Quantum 4, 040330 (2023), part on several senders (from memory)");

    /** Words of each kind and dimensions up to which n uses are one use of words. */
    private static final int MOST_WORDS = 4096;

    private static final int MOST_DIMENSIONS = 64;

    private static final double ENOUGH = 0x1p-40;

    /** Products below this may have lost digits to gradual underflow. */
    static final double SHALLOW = 0x1p-960;

    private final List<List<DensityOperator>> outputs;
    private final double[] first;
    private final double[] second;
    private final int uses;
    private final Lazy<TwoSenderBound> bound;

    private TwoSenders(List<List<DensityOperator>> outputs, double[] first, double[] second, int uses) {
        this.outputs = outputs;
        this.first = first;
        this.second = second;
        this.uses = uses;
        this.bound = new Lazy<>(this::makeBound);
    }

    /**
     * Returns the bounds for one use with uniform inputs.
     *
     * @param outputs for each letter x of the first sender one list with W_xy for each letter y of the second
     * @return the bounds
     * @throws InvalidInputException if there is no letter, the lists differ in length, or the dimensions differ
     */
    public static TwoSenders of(List<? extends List<DensityOperator>> outputs) {
        String asked = "TwoSenders.of";
        List<List<DensityOperator>> copy = new ArrayList<>();
        List<DensityOperator> all = new ArrayList<>();
        for (List<DensityOperator> row : outputs) {
            copy.add(List.copyOf(row));
            all.addAll(row);
        }
        ChannelChecks.outputs(asked, all);
        for (int x = 1; x < copy.size(); x++) {
            if (copy.get(x).size() != copy.get(0).size()) {
                throw new InvalidInputException(
                        asked,
                        "letter " + x + " of the first sender has "
                                + copy.get(x).size() + " states",
                        copy.get(0).size() + ", as letter 0",
                        "give one state for each letter of the second sender");
            }
        }
        return new TwoSenders(
                List.copyOf(copy), uniform(copy.size()), uniform(copy.get(0).size()), 1);
    }

    private static double[] uniform(int letters) {
        double[] p = new double[letters];
        java.util.Arrays.fill(p, 1.0 / letters);
        return p;
    }

    /**
     * Returns the same bounds with other distributions of codewords.
     *
     * @param p the distribution of the first sender's letters, summing to one within letters · 2^-50
     * @param q that of the second sender's
     * @return the bounds with these inputs
     * @throws InvalidInputException if one is not a distribution over its letters
     */
    public TwoSenders withInputs(double[] p, double[] q) {
        String asked = "TwoSenders.withInputs";
        return new TwoSenders(
                outputs,
                ChannelChecks.input(asked, p, outputs.size()),
                ChannelChecks.input(asked, q, outputs.get(0).size()),
                uses);
    }

    /**
     * Returns the same bounds for n uses, codewords drawn letter by letter.
     *
     * <p><b>What is covered.</b> The three competitors are powers of different operators, so no one pair of copies stands for them. Diagonal states go by types, as far as these are not too many; others as one use of words, up to 4096 pairs of words and 64
     * dimensions. Anything else is refused when a bound is asked for. {@link #converse} goes as far as {@link CodingBounds#converse}.
     *
     * @param n the number of uses, at least 1; it replaces an earlier one
     * @return the bounds for n uses
     * @throws InvalidInputException if n is below 1
     */
    public TwoSenders uses(int n) {
        if (n < 1) {
            throw new InvalidInputException(
                    "TwoSenders.uses", "the number of uses is " + n, "at least 1", "give the length of the codewords");
        }
        return new TwoSenders(outputs, first, second, n);
    }

    /**
     * Returns the number of uses.
     *
     * @return n; 1 unless chosen with {@link #uses(int)}
     */
    public int uses() {
        return uses;
    }

    /** g by the numbers of other messages. */
    @FunctionalInterface
    interface TwoSenderBound {
        Enclosure at(WideDouble otherFirst, WideDouble otherSecond);
    }

    private TwoSenderBound makeBound() {
        List<DensityOperator> all = flat();
        if (all.stream().allMatch(DiagonalOutputs::isDiagonal)) {
            return TwoSenderTypes.of(outputs, first, second, uses);
        }
        double letters = Math.pow(all.size(), uses);
        double dimension = Math.pow(all.get(0).dimension(), uses);
        if (uses > 1 && !(letters <= MOST_WORDS && dimension <= MOST_DIMENSIONS)) {
            throw new InvalidInputException(
                    "TwoSenders.uses",
                    uses + " uses of " + all.size() + " pairs of letters in dimension "
                            + all.get(0).dimension(),
                    "diagonal states, or at most " + MOST_WORDS + " pairs of words and " + MOST_DIMENSIONS
                            + " dimensions",
                    "ask for fewer uses");
        }
        TwoSenders words = this;
        for (int k = 1; k < uses; k++) {
            words = words.longer(outputs, first, second);
        }
        TwoSenders w = words;
        return (a, b) -> w.dense(a, b);
    }

    private List<DensityOperator> flat() {
        List<DensityOperator> all = new ArrayList<>();
        outputs.forEach(all::addAll);
        return all;
    }

    /** The words made of these and one more letter. */
    private TwoSenders longer(List<List<DensityOperator>> letters, double[] p, double[] q) {
        List<List<DensityOperator>> words = new ArrayList<>();
        for (List<DensityOperator> row : outputs) {
            for (List<DensityOperator> other : letters) {
                List<DensityOperator> word = new ArrayList<>();
                for (DensityOperator a : row) {
                    for (DensityOperator b : other) {
                        word.add(a.tensor(b));
                    }
                }
                words.add(word);
            }
        }
        return new TwoSenders(words, products(first, p), products(second, q), 1);
    }

    private static double[] products(double[] a, double[] b) {
        double[] c = new double[a.length * b.length];
        for (int i = 0; i < c.length; i++) {
            c[i] = a[i / b.length] * b[i % b.length];
        }
        return c;
    }

    /**
     * One use: a pair for each pair of letters, its second operator a sum of all states with weights, which carry a common power of two. Weights lost to underflow, or nearly, are missing in the lower end only: they amount to less than 2^-1000
     * of that power.
     */
    private Enclosure dense(WideDouble otherFirst, WideDouble otherSecond) {
        WideDouble largest = otherFirst.max(WideDouble.ONE).timesUp(otherSecond.max(WideDouble.ONE));
        long power = -largest.exponent();
        WideDouble scale = WideDouble.ONE.timesPowerOfTwo(-power);
        double[] others = {
            otherFirst.timesPowerOfTwo(power).toDoubleUp(),
            otherSecond.timesPowerOfTwo(power).toDoubleUp(),
            otherFirst.timesUp(otherSecond).timesPowerOfTwo(power).toDoubleUp()
        };
        List<DensityOperator> all = flat();
        Enclosure sum = Enclosure.ZERO;
        boolean lost = isLost(others);
        for (int x = 0; x < first.length; x++) {
            for (int y = 0; y < second.length; y++) {
                double p = first[x] * second[y];
                double[] weights = weights(x, y, others);
                lost |= isLost(weights) || isLost(new double[] {p});
                if (p > 0 && largest(weights) > 0) {
                    PositivePair pair =
                            PositivePair.of(outputs.get(x).get(y), PositiveOperator.weightedSum(all, weights));
                    sum = sum.plus(pair.traceMinimum(WideDouble.ONE, scale).times(p));
                }
            }
        }
        Enclosure g = sum.times(slack(all, first, second));
        WideDouble missing = scale.timesPowerOfTwo(-1000);
        return lost ? Enclosure.of(WideDouble.ZERO, g.upperWide().plusUp(missing)) : g;
    }

    /** The weights of all states in what competes with W_xy. */
    private double[] weights(int x, int y, double[] others) {
        double[] weights = new double[first.length * second.length];
        for (int k = 0; k < weights.length; k++) {
            int u = k / second.length;
            int v = k % second.length;
            weights[k] = first[u] * second[v] * others[2]
                    + (v == y ? first[u] * others[0] : 0)
                    + (u == x ? second[v] * others[1] : 0);
        }
        return weights;
    }

    private static boolean isLost(double[] weights) {
        for (double w : weights) {
            if (w > 0 && w < SHALLOW) {
                return true;
            }
        }
        return false;
    }

    private static double largest(double[] weights) {
        double most = 0;
        for (double w : weights) {
            most = Math.max(most, w);
        }
        return most;
    }

    /** Factors of normalisation and the rounding of weights: traces enter once, both sums twice, and a weight has a few roundings. */
    static Enclosure slack(List<DensityOperator> states, double[] p, double[] q) {
        Enclosure sums = around(Traces.sum(p)).times(around(Traces.sum(q)));
        return around(Traces.hull(states)).times(sums).times(sums).times(Enclosure.ONE.widen(0x1p-49));
    }

    /** A number near 1, its inverse, and 1. */
    private static Enclosure around(Enclosure sum) {
        return Enclosure.ONE.dividedBy(sum).hull(sum).hull(Enclosure.ONE);
    }

    /**
     * Returns an average error that some code of M₁ and M₂ messages surely does not exceed.
     *
     * @param messages M₁, at least 1
     * @param otherMessages M₂, at least 1
     * @return g(M₁, M₂); 0 for one message each
     * @throws InvalidInputException if a number is below 1, or the uses do not fit
     */
    public Enclosure achievableError(long messages, long otherMessages) {
        String asked = "TwoSenders.achievableError";
        return reached(MessageCount.others(asked, messages), MessageCount.others(asked, otherMessages));
    }

    /**
     * Returns g(M₁, M₂) for real numbers of any size given by their logarithms.
     *
     * @param messages ln M₁, at least 0
     * @param otherMessages ln M₂, at least 0
     * @return g(M₁, M₂)
     * @throws InvalidInputException if a logarithm is negative or beyond 7e8, or the uses do not fit
     */
    public Enclosure achievableError(Information messages, Information otherMessages) {
        String asked = "TwoSenders.achievableError";
        return reached(MessageCount.others(asked, messages), MessageCount.others(asked, otherMessages));
    }

    /** g does not decrease in either number. */
    private Enclosure reached(Enclosure a, Enclosure b) {
        Enclosure low = at(a.lowerWide(), b.lowerWide());
        boolean exact = a.lowerWide().equals(a.upperWide()) && b.lowerWide().equals(b.upperWide());
        return exact ? low : low.hull(at(a.upperWide(), b.upperWide()));
    }

    private Enclosure at(WideDouble a, WideDouble b) {
        return a.signum() == 0 && b.signum() == 0
                ? Enclosure.ZERO
                : bound.get().at(a, b).clip(0, 1);
    }

    /**
     * Returns the largest ln M₂ with g(M₁, M₂) ≤ ε: beside M₁ messages of the first sender some code has ⌊M₂⌋ of the second.
     *
     * @param messages ln M₁, at least 0
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @return the threshold; 0 if it lies below two messages; empty if M₁ alone has no certain place below ε
     * @throws InvalidInputException if ln M₁ is negative or beyond 7e8, ε is not in range, or the uses do not fit
     */
    public Optional<Information> achievable(Information messages, double epsilon) {
        String asked = "TwoSenders.achievable";
        ChannelChecks.error(asked, epsilon);
        WideDouble a = MessageCount.others(asked, messages).upperWide();
        WideDouble level = WideDouble.of(epsilon);
        if (at(a, WideDouble.ZERO).upperWide().compareTo(level) > 0) {
            return Optional.empty();
        }
        // Q(y) W_xy ≤ ρ_x: from 1/min Q on g is one
        WideDouble most = Enclosure.of(
                        LetterCurves.saturation(second),
                        LetterCurves.saturation(second).max(WideDouble.of(2)))
                .power(uses)
                .upperWide();
        Enclosure root = CurveRoot.of(b -> at(a, b), level, WideDouble.ONE, most, ENOUGH);
        Enclosure others = root.upperWide().compareTo(WideDouble.ONE) > 0 ? root : Enclosure.ZERO;
        return Optional.of(MessageCount.threshold(others, CODING));
    }

    /**
     * Returns ln M₁M₂ that no code of average error ε exceeds: the converse for both senders as one, see {@link CodingBounds#converse}.
     *
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @return the bound
     * @throws InvalidInputException if ε is not in range, or n uses of that channel are not covered
     */
    public Information converse(double epsilon) {
        ChannelChecks.error("TwoSenders.converse", epsilon);
        return CodingBounds.of(ClassicalQuantumChannel.of(flat())).uses(uses).converse(epsilon);
    }

    /**
     * Returns ln M₁ that no code of average error ε exceeds in one use: the largest converse of the channels x ↦ W_xy.
     *
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @return the bound
     * @throws InvalidInputException if ε is not in range, or for more than one use
     */
    public Information converseOfFirst(double epsilon) {
        List<List<DensityOperator>> columns = new ArrayList<>();
        for (int y = 0; y < second.length; y++) {
            int letter = y;
            columns.add(outputs.stream().map(row -> row.get(letter)).toList());
        }
        return largestConverse("TwoSenders.converseOfFirst", columns, epsilon);
    }

    /**
     * Returns ln M₂ that no code of average error ε exceeds in one use: the largest converse of the channels y ↦ W_xy.
     *
     * @param epsilon the average error allowed, between 0 and 1, both excluded
     * @return the bound
     * @throws InvalidInputException if ε is not in range, or for more than one use
     */
    public Information converseOfSecond(double epsilon) {
        return largestConverse("TwoSenders.converseOfSecond", outputs, epsilon);
    }

    private Information largestConverse(String asked, List<List<DensityOperator>> channels, double epsilon) {
        ChannelChecks.error(asked, epsilon);
        if (uses > 1) {
            throw new InvalidInputException(
                    asked,
                    uses + " uses, with words of the other sender that mix channels",
                    "one use",
                    "use converse, or a channel whose letters are words");
        }
        Enclosure most = Enclosure.ZERO;
        for (List<DensityOperator> states : channels) {
            most = most.max(CodingBounds.of(ClassicalQuantumChannel.of(states))
                    .converse(epsilon)
                    .nats());
        }
        return Information.ofNats(most).withSource(TraceMinimumConverse.THEOREM.toString());
    }
}
