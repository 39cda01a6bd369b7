package org.minorant.bounds;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import org.minorant.bounds.divergence.Ball;
import org.minorant.bounds.divergence.SpectralState;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Enclosure;
import org.minorant.core.KrausChannel;
import org.minorant.core.Operator;
import org.minorant.core.PositiveOperator;
import org.minorant.core.pair.PositivePair;

/**
 * A channel N for which A = N(Φ) and B = (1/d) ⊗ N(1/d) commute, Φ maximally entangled: the outputs' basis vectors fall into groups on which N(1/d) is a multiple of the identity, and every Kraus operator has its
 * outputs in one group. Then B is a multiple of the identity on each group, and the pair is that of the eigenvalues of A there: so for channels with N(1) ∝ 1 (Pauli, depolarising, dephasing, all unital channels of
 * equal dimensions), and for the erasure channel with two groups.
 *
 * <p><b>Symmetry.</b> Let P be the sum of the eigenprojectors of A in a group that belong to one ratio a/b. If Tr_B P is a multiple of the identity for every P, the channel is called symmetric here: (tA^⊗n − B^⊗n)₊ is a combination of
 * products of such P, so its part on R^n is a multiple of the identity, and the converse for the maximally entangled input is one for all, see {@link AssistedConverse}. Covariant channels are symmetric.
 *
 * <p><b>Errors.</b> A and B are normalised. Let A' and B' be the operators with equal ratios in each P. {@code error} e: A is within 1 ± e of A', B of B', and the doubles here of their eigenvalues. {@code
 * bias} β: A ≤ (1+α)A', Tr_B P ≤ (1+p) (Tr P/d) 1 and Tr A' ≤ 1+r with (1+α)(1+p)(1+r) ≤ 1+β.
 *
 * @param joint eigenvalues of A', summed for each P
 * @param product those of B'
 * @param error e
 * @param bias β; infinite if the channel is not symmetric
 */
record AssistedLetters(double[] joint, double[] product, double error, double bias) {

    /** Numbers further apart than this, relatively, are not equal up to rounding. */
    private static final double ALIKE = 0x1p-40;

    private static final double UP = 1 + 0x1p-40;

    /** One eigenvector of A, or several of equal ratio. */
    private record Letter(Ball a, Ball b, double deviation, double skew) {}

    /** Looks for the structure. */
    static Optional<AssistedLetters> of(KrausChannel channel) {
        List<Group> groups = Group.of(channel);
        if (groups.isEmpty()) {
            return Optional.empty();
        }
        int in = channel.inputDimension();
        List<Letter> letters = new ArrayList<>();
        double deviation = 0;
        Ball totalA = Ball.ZERO;
        Ball totalB = Ball.ZERO;
        for (Group g : groups) {
            SpectralState s = SpectralState.of(g.choi(in));
            if (s.restRank() > 0) {
                return Optional.empty();
            }
            letters.addAll(letters(s, g, in));
            deviation = Math.max(deviation, g.deviation());
            totalA = totalA.plus(s.trace());
            totalB = totalB.plus(g.value().times((double) in * g.rows().size()));
        }
        double[] a = new double[letters.size()];
        double[] b = new double[letters.size()];
        double rounding = 0;
        double skew = 0;
        Ball sum = Ball.ZERO;
        for (int i = 0; i < a.length; i++) {
            Letter l = letters.get(i);
            Ball x = l.a().dividedBy(totalA);
            Ball y = l.b().dividedBy(totalB);
            sum = sum.plus(x);
            a[i] = x.hi();
            b[i] = y.hi();
            rounding = Math.max(rounding, Math.max(rounding(x), rounding(y)));
            deviation = Math.max(deviation, l.deviation());
            skew = Math.max(skew, l.skew());
        }
        double excess = Math.max(0, sum.minus(Ball.ONE).upper());
        double error = (deviation + rounding) * UP;
        double bias = skew <= ALIKE ? (deviation + excess + skew) * UP : Double.POSITIVE_INFINITY;
        return error <= ALIKE ? Optional.of(new AssistedLetters(a, b, error, bias)) : Optional.empty();
    }

    /** The eigenvectors of one group, those of equal eigenvalue together. */
    private static List<Letter> letters(SpectralState s, Group g, int in) {
        List<Integer> order = new ArrayList<>();
        for (int i = 0; i < s.rank(); i++) {
            order.add(i);
        }
        order.sort(Comparator.comparingDouble(i -> -s.values().get(i).hi()));
        List<Letter> letters = new ArrayList<>();
        for (int from = 0; from < order.size(); ) {
            double first = s.values().get(order.get(from)).hi();
            int to = from + 1;
            while (to < order.size() && first - s.values().get(order.get(to)).hi() <= ALIKE * first) {
                to++;
            }
            letters.add(letter(s, g, in, order.subList(from, to)));
            from = to;
        }
        return letters;
    }

    private static Letter letter(SpectralState s, Group g, int in, List<Integer> columns) {
        int r = columns.size();
        int out = g.rows().size();
        Ball sum = Ball.ZERO;
        EnclosedMatrix.Builder m = EnclosedMatrix.builder(in, out * r);
        for (int c = 0; c < r; c++) {
            int column = columns.get(c);
            sum = sum.plus(s.values().get(column));
            EnclosedMatrix v = s.vectors();
            for (int i = 0; i < in; i++) {
                for (int o = 0; o < out; o++) {
                    int k = i * out + o;
                    m.set(
                            i,
                            c * out + o,
                            v.re(k, column),
                            v.reTail(k, column),
                            v.im(k, column),
                            v.imTail(k, column),
                            v.radius(k, column));
                }
            }
        }
        Ball mean = sum.dividedBy(Ball.of(r));
        double deviation = 0;
        for (int column : columns) {
            deviation = Math.max(deviation, s.values().get(column).minus(mean).magnitude() / mean.lower() * UP);
        }
        // Tr_B P − (r/d) 1, relative to r/d
        Ball share = Ball.of(r).dividedBy(Ball.of(in));
        EnclosedMatrix.Builder multiple = EnclosedMatrix.builder(in, in);
        for (int i = 0; i < in; i++) {
            multiple.set(i, i, share.hi(), share.lo(), 0, 0, share.radius());
        }
        EnclosedMatrix p = m.build();
        double away = p.times(p.adjoint()).minus(multiple.build()).frobeniusUpper();
        return new Letter(sum, g.value().times(r), deviation, away / share.lower() * UP);
    }

    /** How far the leading part of a positive number is from it, relatively. */
    private static double rounding(Ball x) {
        return (Math.abs(x.lo()) + x.radius()) / x.hi() * UP;
    }

    boolean isSymmetric() {
        return bias < Double.POSITIVE_INFINITY;
    }

    /** The pair of n uses, as curves of words. */
    WordCurves words(int n) {
        PositivePair pair = PositivePair.ofSpectra(joint, product).copies(n);
        return WordCurves.of(pair, Enclosure.ONE, Enclosure.ONE, error, 0, n);
    }

    /** What the bias adds to an error probability in n uses: (1 + β)^n − 1. */
    double excess(int n) {
        return Math.expm1(n * Math.log1p(bias)) * UP;
    }

    /** A number s with A ≤ sB. */
    double saturation() {
        double most = 2;
        for (int i = 0; i < joint.length; i++) {
            most = Math.max(most, joint[i] / product[i] * (1 + 4 * error));
        }
        return most;
    }

    /**
     * Output basis vectors on which ΣKK* is a multiple of the identity.
     *
     * @param rows the basis vectors
     * @param kraus the Kraus operators whose outputs lie there
     * @param value the multiple
     * @param deviation how far ΣKK* is from it, relatively
     */
    private record Group(List<Integer> rows, List<Operator> kraus, Ball value, double deviation) {

        /** The groups; none if there are not any. */
        static List<Group> of(KrausChannel channel) {
            int in = channel.inputDimension();
            EnclosedMatrix t = AssistedCapacityCertificate.image(channel.krausOperators(), EnclosedMatrix.identity(in));
            List<List<Integer>> rows = rows(t, channel.krausOperators());
            List<Group> groups = new ArrayList<>();
            int placed = 0;
            for (List<Integer> g : rows) {
                List<Operator> inside = channel.krausOperators().stream()
                        .filter(k -> !isZero(k) && liesIn(k, g))
                        .toList();
                placed += inside.size();
                int first = g.get(0);
                Ball value = new Ball(t.re(first, first), t.reTail(first, first), 0);
                double deviation = deviation(t, g, value);
                if (!(deviation <= ALIKE) || inside.isEmpty()) {
                    return List.of();
                }
                groups.add(new Group(g, inside, value, deviation));
            }
            long nonzero =
                    channel.krausOperators().stream().filter(k -> !isZero(k)).count();
            return placed == nonzero ? groups : List.of();
        }

        private static List<List<Integer>> rows(EnclosedMatrix t, List<Operator> kraus) {
            List<List<Integer>> rows = new ArrayList<>();
            for (int o = 0; o < t.rows(); o++) {
                int row = o;
                if (kraus.stream().allMatch(k -> isZero(k, row))) {
                    continue;
                }
                double v = t.re(o, o);
                Optional<List<Integer>> same = rows.stream()
                        .filter(g -> Math.abs(t.re(g.get(0), g.get(0)) - v) <= ALIKE * v)
                        .findFirst();
                same.ifPresentOrElse(g -> g.add(row), () -> rows.add(new ArrayList<>(List.of(row))));
            }
            return rows;
        }

        private static double deviation(EnclosedMatrix t, List<Integer> g, Ball value) {
            double squares = 0;
            for (int i : g) {
                for (int j : g) {
                    double m = i == j
                            ? new Ball(t.re(i, i), t.reTail(i, i), t.radius(i, i))
                                    .minus(value)
                                    .magnitude()
                            : t.modulusUpper(i, j);
                    squares += m * m;
                }
            }
            return Math.sqrt(squares) / value.lower() * UP;
        }

        private static boolean isZero(Operator k) {
            for (int o = 0; o < k.rows(); o++) {
                if (!isZero(k, o)) {
                    return false;
                }
            }
            return true;
        }

        private static boolean isZero(Operator k, int row) {
            for (int i = 0; i < k.columns(); i++) {
                if (k.re(row, i) != 0 || k.im(row, i) != 0) {
                    return false;
                }
            }
            return true;
        }

        private static boolean liesIn(Operator k, List<Integer> g) {
            for (int o = 0; o < k.rows(); o++) {
                if (!g.contains(o) && !isZero(k, o)) {
                    return false;
                }
            }
            return true;
        }

        /** The Choi operator on input ⊗ group. */
        PositiveOperator choi(int in) {
            int out = rows.size();
            double[] re = new double[in * out * kraus.size()];
            double[] im = new double[re.length];
            for (int k = 0; k < kraus.size(); k++) {
                for (int i = 0; i < in; i++) {
                    for (int o = 0; o < out; o++) {
                        int at = (i * out + o) * kraus.size() + k;
                        re[at] = kraus.get(k).re(rows.get(o), i);
                        im[at] = kraus.get(k).im(rows.get(o), i);
                    }
                }
            }
            return PositiveOperator.ofFactor(Operator.ofRowMajor(in * out, kraus.size(), re, im));
        }
    }
}
