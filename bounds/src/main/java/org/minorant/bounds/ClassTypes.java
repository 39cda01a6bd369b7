package org.minorant.bounds;

import java.util.Arrays;

/** The types of letters over the outcomes of one class that matter, for each number of such outcomes. */
final class ClassTypes {

    private final LikelihoodClass likelihoods;
    private final long[] keys;
    private final double[] ln;
    private final TypeTable[] joint;
    private final TypeTable[] input;
    private final TypeTable whole;
    private final double depth;

    /** Each made when first needed; the same whoever makes it. */
    private final CountWindow[][] windows;

    /**
     * Makes the tables.
     *
     * @param likelihoods the class
     * @param keys the tie key of each level
     * @param most the largest number of outcomes
     * @param depth minus ln of what may be left out on either side of each count
     */
    ClassTypes(LikelihoodClass likelihoods, long[] keys, int most, double depth) {
        this.likelihoods = likelihoods;
        this.keys = keys;
        this.depth = depth;
        this.windows = new CountWindow[most + 1][];
        int levels = likelihoods.levels();
        ln = new double[levels];
        joint = new TypeTable[levels];
        input = new TypeTable[levels];
        for (int j = 0; j < levels; j++) {
            ln[j] = likelihoods.ln(j);
            joint[j] = TypeTable.powers(likelihoods.joint()[j], most);
            input[j] = TypeTable.powers(likelihoods.input()[j], most);
        }
        whole = TypeTable.powers(likelihoods.total(), most);
    }

    /** q^k/k! for the probability q of the class. */
    TypeTable whole() {
        return whole;
    }

    private CountWindow[] windows(int m) {
        CountWindow[] known = windows[m];
        if (known == null) {
            known = make(m);
            windows[m] = known;
        }
        return known;
    }

    private CountWindow[] make(int m) {
        CountWindow[] w = new CountWindow[likelihoods.levels()];
        double total = likelihoods.total();
        for (int j = 0; j < w.length; j++) {
            double rest = 0;
            for (int i = 0; i < w.length; i++) {
                rest += i == j ? 0 : likelihoods.joint()[i];
            }
            w[j] = CountWindow.of(m, likelihoods.joint()[j] / total, rest / total, depth);
        }
        return w;
    }

    /** How many windows leave out a count. */
    int cut(int m) {
        return (int) Arrays.stream(windows(m)).filter(w -> w.size() <= m).count();
    }

    /** No fewer types than there are. */
    double count(int m) {
        double[] width = Arrays.stream(windows(m))
                .mapToDouble(CountWindow::size)
                .sorted()
                .toArray();
        double box = 1;
        double all = 1;
        for (int j = 0; j + 1 < width.length; j++) {
            box *= width[j];
            all *= (m + j + 1.0) / (j + 1.0);
        }
        return Math.min(box, all);
    }

    /** The types of m outcomes. */
    TypeList types(int m) {
        CountWindow[] windows = windows(m);
        TypeList list = new TypeList(8);
        add(list, windows, 0, m, 0, 0, 1, 0, 1, 0);
        return list;
    }

    private void add(
            TypeList list,
            CountWindow[] windows,
            int j,
            int left,
            double d,
            long key,
            double a,
            int ea,
            double p,
            int ep) {
        boolean last = j == windows.length - 1;
        int from = last ? left : windows[j].from();
        int to = Math.min(left, windows[j].to());
        for (int k = from; k <= to; k++) {
            double x = a * joint[j].significand(k);
            double y = p * input[j].significand(k);
            int ex = ea + joint[j].exponent(k);
            int ey = ep + input[j].exponent(k);
            double metric = d + k * ln[j];
            long tie = key + k * keys[j];
            if (last) {
                if (k >= windows[j].from()) {
                    list.add(metric, tie, x, ex, y, ey);
                }
            } else {
                // significands below 2 each: few levels stay far below overflow
                int sx = Math.getExponent(x);
                int sy = Math.getExponent(y);
                add(
                        list,
                        windows,
                        j + 1,
                        left - k,
                        metric,
                        tie,
                        x * TypeList.powerOfTwo(-sx),
                        ex + sx,
                        y * TypeList.powerOfTwo(-sy),
                        ey + sy);
            }
        }
    }
}
