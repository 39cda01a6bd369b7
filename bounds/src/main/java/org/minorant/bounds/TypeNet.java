package org.minorant.bounds;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.TreeSet;
import java.util.stream.IntStream;

/** Groups of types of words: boxes of counts, each with a distribution of letters near all of its types. */
final class TypeNet {

    /** So many types of a group are looked at where one of a few stands for all. */
    private static final int SOME = 3;

    /** The same where one group has all types. */
    private static final int MANY = 9;

    private TypeNet() {}

    /**
     * A group.
     *
     * @param centre a distribution of letters, all positive unless it is given
     * @param types the types
     * @param some some of them, its ends and others in between
     */
    record Group(double[] centre, List<int[]> types, List<int[]> some) {

        static Group of(double[] centre, List<int[]> types, int looks) {
            int last = types.size() - 1;
            int count = Math.min(types.size(), looks);
            List<int[]> some = IntStream.range(0, count)
                    .map(i -> count == 1 ? 0 : (int) ((long) i * last / (count - 1)))
                    .distinct()
                    .mapToObj(types::get)
                    .toList();
            return new Group(centre, types, some);
        }
    }

    /**
     * Divides the types of all words into groups, in several ways.
     *
     * @param p the distribution for the one group of all types
     * @param n the length of words
     * @param sizes lengths of the boxes, in √n
     * @return the groups, one list for each size, and one of a single group
     */
    static List<List<Group>> of(double[] p, int n, double[] sizes) {
        List<int[]> types = TypeProbabilities.types(p.length, n);
        TreeSet<Integer> lengths = new TreeSet<>();
        for (double size : sizes) {
            lengths.add((int) Math.max(1, Math.round(size * Math.sqrt(n))));
        }
        List<List<Group>> nets = new ArrayList<>();
        nets.add(List.of(Group.of(p, types, MANY)));
        for (int length : lengths) {
            Map<List<Integer>, List<int[]>> boxes = new LinkedHashMap<>();
            for (int[] type : types) {
                List<Integer> box = Arrays.stream(type)
                        .limit(type.length - 1L)
                        .mapToObj(k -> k / length)
                        .toList();
                boxes.computeIfAbsent(box, b -> new ArrayList<>()).add(type);
            }
            nets.add(boxes.values().stream()
                    .map(box -> Group.of(centre(box, n), box, SOME))
                    .toList());
        }
        return nets;
    }

    /** The mean of types, with half a letter more of each kind: no word is outside the support of what these letters give. */
    private static double[] centre(List<int[]> types, int n) {
        double[] q = new double[types.get(0).length];
        for (int x = 0; x < q.length; x++) {
            double mean = 0;
            for (int[] type : types) {
                mean += type[x];
            }
            q[x] = (mean / types.size() + 0.5) / (n + 0.5 * q.length);
        }
        return q;
    }

    /**
     * The type next to a distribution: counts rounded down, and letters added where most is left.
     *
     * @param p the distribution
     * @param n the length of words
     */
    static int[] nearest(double[] p, int n) {
        double sum = Arrays.stream(p).sum();
        double[] ideal = Arrays.stream(p).map(x -> n * x / sum).toArray();
        int[] type = new int[p.length];
        int left = n;
        for (int x = 0; x < type.length; x++) {
            double near = Math.rint(ideal[x]);
            // a rounding below a whole number is meant to be that number
            type[x] = (int) (Math.abs(ideal[x] - near) <= n * 0x1p-50 ? near : Math.floor(ideal[x]));
            left -= type[x];
        }
        for (; left > 0; left--) {
            int best = 0;
            for (int x = 1; x < type.length; x++) {
                best = ideal[x] - type[x] > ideal[best] - type[best] ? x : best;
            }
            type[best]++;
        }
        for (; left < 0; left++) {
            int best = 0;
            for (int x = 1; x < type.length; x++) {
                best = type[x] - ideal[x] > type[best] - ideal[best] ? x : best;
            }
            type[best]--;
        }
        return type;
    }
}
