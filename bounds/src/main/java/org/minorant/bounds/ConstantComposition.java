package org.minorant.bounds;

import java.util.Arrays;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.WideDouble;
import org.minorant.core.curve.Curve;
import org.minorant.core.curve.CurveRoot;

/**
 * Codes of which every word has the same type T, that is, each letter equally often: with P = T/n, ρ_B = Σ P(x) W_x, Pⁿ(T) the probability that n letters drawn from P have the type T, and W_T a word of that type, some such code of
 * M messages has an average error of at most
 *
 * <pre>f_T((M − 1)/Pⁿ(T)),    f_T(t) = Tr[W_T ∧ t ρ_B^⊗n].</pre>
 *
 * <p><b>Argument.</b> Draw the words independently and uniformly from the class of T. The one-shot bound ({@link RandomCoding}) with this input says that the error is at most the mean over the class of Tr[W_w ∧ (M − 1) ρ̄], where ρ̄ is the mean of
 * the outputs W_w. Each word of the class has the same probability Pⁿ(T)/|T| under Pⁿ, so that ρ_B^⊗n = Σ_w Pⁿ(w) W_w, a sum over all words, is at least Pⁿ(T) ρ̄. As Tr[A ∧ B] is monotone in B, ρ̄ may be replaced by ρ_B^⊗n/Pⁿ(T). All
 * words of the class are permutations of one and, as ρ_B^⊗n is symmetric, have the same curve. Nothing in this asks that P be exactly T/n: it is the nearest distribution in double, and Pⁿ(T) is enclosed for that one.
 */
final class ConstantComposition {

    static final Theorem THEOREM = new Theorem(
            "one-shot random coding by words of one type, f(M-1)",
            "from H.-C. Cheng, PRX Quantum 4, 040330 (2023), one-shot achievability (theorem number from memory)");

    /** A relative width of M that is small enough. */
    private static final double ENOUGH = 0x1p-28;

    private final int[] type;
    private final Curve curve;
    private final Enclosure probability;
    private final WideDouble saturation;

    private ConstantComposition(int[] type, Curve curve, Enclosure probability, WideDouble saturation) {
        this.type = type;
        this.curve = curve;
        this.probability = probability;
        this.saturation = saturation;
    }

    /**
     * Prepares the bound.
     *
     * @param outputs the letters
     * @param input the input; its type is the nearest one
     * @param n the length of words
     */
    static ConstantComposition of(ChannelOutputs outputs, double[] input, int n) {
        int[] type = TypeNet.nearest(input, n);
        double[] p = Arrays.stream(type).mapToDouble(k -> k / (double) n).toArray();
        Enclosure sum = Traces.sum(p);
        Enclosure[] share = Arrays.stream(p)
                .mapToObj(x -> Enclosure.exact(x).dividedBy(sum))
                .toArray(Enclosure[]::new);
        // W_w ≤ ρ_B^⊗n / Π P(w_i)
        Enclosure word = Enclosure.ONE;
        for (int x = 0; x < type.length; x++) {
            word = type[x] == 0 ? word : word.times(share[x].power(type[x]));
        }
        WideDouble saturation =
                Enclosure.ONE.dividedBy(word).times(1 + n * 0x1p-30).upperWide();
        Curve curve = outputs.typed(p, n).curve(type, saturation);
        return new ConstantComposition(type, curve, new TypeProbabilities(share, n).of(type), saturation);
    }

    /** The bound on the error with M − 1 other messages. */
    Enclosure error(Enclosure others) {
        return RandomCoding.error(curve, others.dividedBy(probability));
    }

    /** The largest M − 1, real, with a bound of at most ε; below 1 only its upper end is meant. */
    Enclosure others(double epsilon) {
        WideDouble least = Enclosure.ONE.dividedBy(probability).upperWide();
        WideDouble most = saturation.max(least).timesUp(WideDouble.of(2));
        Enclosure root = CurveRoot.of(curve, WideDouble.of(epsilon), least, most, ENOUGH);
        // a crossing not above the least point is one below two messages
        return root.upperWide().compareTo(least) > 0
                ? root.times(probability)
                : Enclosure.of(WideDouble.ZERO, WideDouble.of(Math.nextDown(1.0)));
    }

    /** ln M, with the type in its source. */
    Information messages(double epsilon) {
        Information ln = MessageCount.threshold(others(epsilon), THEOREM);
        return ln.withSource(ln.source() + ", letters occurring " + Arrays.toString(type) + " times");
    }
}
