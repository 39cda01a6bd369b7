package org.minorant.bounds;

import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.function.DoubleUnaryOperator;
import java.util.stream.IntStream;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;
import org.minorant.core.WideDouble;
import org.minorant.core.curve.Curve;

/**
 * The converse in n uses of a channel whose letters are not alike, with a product state for each group of types of words in place of one for all: for any positive numbers s_G, any states σ_G, and
 *
 * <pre>c = min over types P of Tr[W_P ∧ s_G σ_G^⊗n], G the group of P:    M ≤ Σ_G s_G / (c − ε)   where c &gt; ε.</pre>
 *
 * <p><b>Argument.</b> With s = Σ_G s_G the output state σ = Σ_G (s_G/s) σ_G^⊗n is above each (s_G/s) σ_G^⊗n, and Tr[A ∧ B] is monotone in B. So Tr[W ∧ sσ] ≥ c for each word W, whatever its type, and the one-shot converse
 * ({@link TraceMinimumConverse}) at t = 1/s says 1/M ≥ (c − ε)/s. The weights s_G/s are best where all groups reach the same c: types from which no large code can be made then cost next to nothing. With σ_G near the output of
 * the types in G, s_G is about the size of the best code within G, so the bound is above the largest of these by the logarithm of the number of groups that matter.
 *
 * <p><b>Choices.</b> Groups are boxes of types; small ones need many states, in large ones some types are far from theirs. A few sizes are tried, one box of all types among them, with roots of estimated curves at some types of each. c is what is best
 * for one type near the input that attains the capacity. None of that needs a proof: all types are certified at the end, at one point each, and c is the least of their values. The value of the formula at what was chosen is enclosed.
 */
final class TypesConverse {

    static final Theorem THEOREM = new Theorem(
            "one-shot converse, an output state for each group of types of words",
            "after M. Tomamichel, V. Y. F. Tan, IEEE Trans. Inf. Theory 59, 7041 (2013), and H. Nagaoka (2001) (both from memory)");

    /** More terms than this for one value of all types would take some ten seconds. */
    private static final double MOST_TERMS = 2e9;

    private static final double ENOUGH_FOR_BLOCKS = 1e-5;

    /** What no group needs to be below, relative to the largest and in nats: all of them together then cost nothing. */
    private static final double NOTHING = 20;

    /** c is at least this share of 1 − ε below 1, which curves may miss by rounding. */
    private static final double BELOW_ONE = 1e-6;

    /** A type whose value is below c by more than this share of c − ε has its group raised. */
    private static final double TOO_LOW = 0.005;

    /** c is looked for where ln (c − ε)/(1 − c) is within this of 0. */
    private static final double SPREAD = 14;

    private static final int MOST_RAISES = 4;

    private final ChannelOutputs outputs;
    private final double[] capacityInput;
    private final int n;
    private final double epsilon;

    private TypesConverse(ChannelOutputs outputs, double[] capacityInput, int n, double epsilon) {
        this.outputs = outputs;
        this.capacityInput = capacityInput;
        this.n = n;
        this.epsilon = epsilon;
    }

    /**
     * Bounds ln M.
     *
     * @param channel the channel
     * @param n the number of uses
     * @param epsilon the average error
     * @return the bound; infinite if nothing is certain
     * @throws InvalidInputException if there are too many types, or no curves of words
     */
    static Information messages(ClassicalQuantumChannel channel, int n, double epsilon) {
        TypesConverse converse =
                new TypesConverse(channel.structure(), channel.capacity().input(), n, epsilon);
        converse.check();
        return Information.ofNats(converse.value().max(Enclosure.ZERO)).withSource(THEOREM.toString());
    }

    /** Whether words are not alike, and their types few enough for ledgers. */
    static boolean helps(Lazy<LetterCurves> letters, ClassicalQuantumChannel channel, int n) {
        double count = TypeProbabilities.count(channel.letters(), n);
        if (n == 1 || !(count <= channel.structure().typeCost().mostInLedger())) {
            return false;
        }
        try {
            return !letters.get().areAlike();
        } catch (InvalidInputException e) {
            // no one output state covers all words
            return true;
        }
    }

    /** Truncation of blocks costs less than groups do, and a good deal of time is saved. */
    private TypedWords words(double[] q) {
        TypedWords words = outputs.typed(q, n);
        return outputs.typeCost() == TypeCost.BLOCKS ? words.within(ENOUGH_FOR_BLOCKS) : words;
    }

    private void check() {
        int letters = capacityInput.length;
        double count = TypeProbabilities.count(letters, n);
        int most = outputs.typeCost().most();
        if (!(count <= most)) {
            throw refused(String.format(Locale.ROOT, "%.3g types of words", count), "at most " + most);
        }
        TypedWords words = words(capacityInput);
        double terms = TypeProbabilities.types(letters, n).stream()
                .mapToDouble(words.terms())
                .sum();
        if (!(terms <= MOST_TERMS)) {
            throw refused(
                    String.format(Locale.ROOT, "about %.0e terms", terms),
                    String.format(Locale.ROOT, "at most %.0e", MOST_TERMS));
        }
    }

    private InvalidInputException refused(String found, String limit) {
        return new InvalidInputException(
                "CodingBounds.converseByTypes",
                found + " in " + n + " uses of " + capacityInput.length + " letters",
                limit,
                "take fewer uses, or converse or strongConverse, which take one output state for all words");
    }

    private Enclosure value() {
        TypedWords words = words(capacityInput);
        Lead lead = lead(lnCurve(words.curve(TypeNet.nearest(capacityInput, n))));
        Choice best = TypeNet.of(capacityInput, n, outputs.typeCost().sizes()).stream()
                .map(net -> choice(net, lead))
                .min(Comparator.comparingDouble(this::cost))
                .orElseThrow();
        List<Share> shares = IntStream.range(0, best.ln.length)
                .parallel()
                .mapToObj(g -> share(best.groups.get(g), best.ln[g], best.c))
                .toList();
        Enclosure sum = Enclosure.ZERO;
        Enclosure c = Enclosure.infinite();
        for (Share s : shares) {
            sum = sum.plus(Enclosure.of(s.scale, s.scale));
            c = c.min(s.least);
        }
        Enclosure rest = c.minus(Enclosure.exact(epsilon));
        return rest.lowerWide().signum() > 0 ? sum.ln().minus(rest.ln()) : Enclosure.infinite();
    }

    /**
     * What is best for one type of words.
     *
     * @param lnScale ln s
     * @param c Tr[W ∧ sσ] there, about
     */
    private record Lead(double lnScale, double c) {}

    /** s/(F(s) − ε) falls and then rises, as F is concave. It is least where F(s) > ε, and not beyond twice the s with F(s) = (1 + ε)/2. */
    private Lead lead(DoubleUnaryOperator lnF) {
        double from = root(lnF, Math.log(epsilon), 0);
        double to = root(lnF, Math.log((1 + epsilon) / 2), from) + Math.log(2);
        double x = Unimodal.minimiser(
                y -> {
                    double above = Math.exp(lnF.applyAsDouble(y)) - epsilon;
                    return above > 0 ? y - Math.log(above) : Double.POSITIVE_INFINITY;
                },
                from,
                to,
                1e-3);
        double c = Math.min(Math.exp(lnF.applyAsDouble(x)), mostOfC());
        return new Lead(x, c > epsilon ? c : (1 + epsilon) / 2);
    }

    /**
     * Groups with their numbers.
     *
     * @param groups the groups
     * @param ln ln s_G
     * @param c what all types are to reach
     */
    private record Choice(List<TypeNet.Group> groups, double[] ln, double c) {

        double lnSum() {
            double most =
                    IntStream.range(0, ln.length).mapToDouble(g -> ln[g]).max().orElse(0);
            double sum = 0;
            for (double x : ln) {
                sum += Math.exp(x - most);
            }
            return most + Math.log(sum);
        }
    }

    /** About ln M. */
    private double cost(Choice choice) {
        return choice.lnSum() - Math.log(choice.c - epsilon);
    }

    private Choice choice(List<TypeNet.Group> net, Lead lead) {
        Choice first = new Choice(net, scales(net, lead), lead.c);
        int looks = net.stream().mapToInt(group -> group.some().size()).sum();
        if (looks > outputs.typeCost().few()) {
            return first;
        }
        // Σ s_G is convex in c, so that Σ s_G/(c − ε) falls and then rises
        double y = Unimodal.minimiser(x -> cost(choice(net, lead, x)), -SPREAD, SPREAD, 0.05);
        Choice second = choice(net, lead, y);
        return cost(second) < cost(first) ? second : first;
    }

    /** With (c − ε)/(1 − ε) = e^y/(1 + e^y). */
    private Choice choice(List<TypeNet.Group> net, Lead lead, double y) {
        double c = Math.min(epsilon + (1 - epsilon) / (1 + Math.exp(-y)), mostOfC());
        return new Choice(net, scales(net, new Lead(lead.lnScale, c)), c);
    }

    private double mostOfC() {
        return 1 - BELOW_ONE * (1 - epsilon);
    }

    private double[] scales(List<TypeNet.Group> net, Lead lead) {
        double least = lead.lnScale - NOTHING - Math.log(net.size());
        return net.parallelStream()
                .mapToDouble(group -> {
                    TypedWords words = words(group.centre());
                    double ln = least;
                    for (int[] type : group.some()) {
                        DoubleUnaryOperator lnF = lnCurve(words.curve(type));
                        if (!(lnF.applyAsDouble(ln) >= Math.log(lead.c))) {
                            ln = Math.max(ln, root(lnF, Math.log(lead.c), lead.lnScale));
                        }
                    }
                    return ln;
                })
                .toArray();
    }

    /**
     * What a group adds.
     *
     * @param scale s_G
     * @param least the least certified value in the group at s_G
     */
    private record Share(WideDouble scale, Enclosure least) {}

    private Share share(TypeNet.Group group, double lnScale, double c) {
        TypedWords words = words(group.centre());
        double ln = lnScale;
        for (int raise = 0; ; raise++) {
            WideDouble scale = WideDouble.expUp(ln);
            List<Enclosure> values = group.types().parallelStream()
                    .map(type -> words.curve(type).at(scale))
                    .toList();
            int worst = IntStream.range(0, values.size())
                    .boxed()
                    .min(Comparator.comparing(i -> values.get(i).lowerWide()))
                    .orElseThrow();
            boolean low = !(values.get(worst).lower() >= c - TOO_LOW * (c - epsilon));
            if (!low || raise == MOST_RAISES) {
                return new Share(scale, values.stream().reduce(Enclosure.infinite(), Enclosure::min));
            }
            ln = root(lnCurve(words.curve(group.types().get(worst))), Math.log(c), ln);
        }
    }

    /** About ln F(s) from ln s, by the curve's guess where it has one. */
    private static DoubleUnaryOperator lnCurve(Curve curve) {
        return curve.guess().<DoubleUnaryOperator>map(g -> g::lnValue).orElse(x -> {
            Enclosure f = curve.at(WideDouble.expDown(x));
            return 0.5 * (f.lnLower() + f.lnUpper());
        });
    }

    /** Where an increasing function of ln s reaches a level, or just beyond. */
    private static double root(DoubleUnaryOperator lnF, double level, double start) {
        return new RisingRoot(x -> lnF.applyAsDouble(x) - level).near(start);
    }
}
