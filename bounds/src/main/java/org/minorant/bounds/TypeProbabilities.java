package org.minorant.bounds;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.stream.IntStream;
import org.minorant.core.Enclosure;

/** The types of words of n letters, how often each kind of letter occurs, and their multinomial probabilities. */
final class TypeProbabilities {

    private final Enclosure[] factorial;
    private final Enclosure[][] powers;

    /**
     * Makes the tables.
     *
     * @param share the probability of each kind
     * @param n the length of words
     */
    TypeProbabilities(Enclosure[] share, int n) {
        factorial = new Enclosure[n + 1];
        factorial[0] = Enclosure.ONE;
        for (int k = 1; k <= n; k++) {
            factorial[k] = factorial[k - 1].times(k);
        }
        powers = new Enclosure[share.length][n + 1];
        for (int i = 0; i < share.length; i++) {
            powers[i][0] = Enclosure.ONE;
            for (int k = 1; k <= n; k++) {
                powers[i][k] = powers[i][k - 1].times(share[i]);
            }
        }
    }

    /** n!/Π n_i! · Π p_i^{n_i}, to about n roundings. */
    Enclosure of(int[] type) {
        Enclosure p = factorial[factorial.length - 1];
        for (int i = 0; i < type.length; i++) {
            p = p.times(powers[i][type[i]].dividedBy(factorial[type[i]]));
        }
        return p;
    }

    /** The number of types, C(n + kinds − 1, kinds − 1). */
    static double count(int kinds, int n) {
        double c = 1;
        for (int i = 1; i < kinds; i++) {
            c *= (n + i) / (double) i;
        }
        return c;
    }

    /** All types. */
    static List<int[]> types(int kinds, int n) {
        List<int[]> all = new ArrayList<>();
        collect(all, new int[kinds], 0, n);
        return all;
    }

    private static void collect(List<int[]> all, int[] type, int k, int left) {
        if (k == type.length - 1) {
            type[k] = left;
            all.add(type.clone());
            return;
        }
        for (int i = 0; i <= left; i++) {
            type[k] = i;
            collect(all, type, k + 1, left - i);
        }
    }

    /** Which weights, the smallest ones, are together below a budget even if each is a little larger. */
    static boolean[] rare(double[] weights, double budget) {
        boolean[] rare = new boolean[weights.length];
        double sum = 0;
        List<Integer> order = IntStream.range(0, weights.length)
                .boxed()
                .sorted(Comparator.comparingDouble(i -> weights[i]))
                .toList();
        for (int i : order) {
            sum += weights[i] * (1 + 1e-6);
            if (sum > budget / 2) {
                break;
            }
            rare[i] = true;
        }
        return rare;
    }
}
