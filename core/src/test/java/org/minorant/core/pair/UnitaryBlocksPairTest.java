package org.minorant.core.pair;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.SplittableRandom;
import java.util.concurrent.CancellationException;
import java.util.concurrent.atomic.AtomicLong;
import org.junit.jupiter.api.Test;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.Operator;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;

/**
 * Copies of operators of dimension three and more against dense powers, against blocks of spin and types where these apply, and at depth against bounds. Set {@code unitary.pairs} for a longer run.
 */
class UnitaryBlocksPairTest {

    private static final int PAIRS = Integer.getInteger("unitary.pairs", 8);

    /** Truncation stays within half the tolerance of 1e-12; the rest is a few hundred roundings of the weights. */
    private static final double NARROW = 1.1e-12;

    /** XX* with random columns that fall off, of trace one. */
    private static PositiveOperator random(SplittableRandom r, int d, int rank, boolean real, double decay) {
        double[][] x = new double[d][rank];
        double[][] y = new double[d][rank];
        double t = 0;
        for (int i = 0; i < d; i++) {
            for (int j = 0; j < rank; j++) {
                double s = Math.pow(decay, j);
                x[i][j] = s * (r.nextDouble() * 2 - 1);
                y[i][j] = real ? 0 : s * (r.nextDouble() * 2 - 1);
                t += x[i][j] * x[i][j] + y[i][j] * y[i][j];
            }
        }
        return PositiveOperator.ofFactor(Operator.of(x, y)).times(1 / t);
    }

    private static PositiveOperator power(PositiveOperator a, int n) {
        PositiveOperator p = a;
        for (int i = 1; i < n; i++) {
            p = p.tensor(a);
        }
        return p;
    }

    private static void meet(Enclosure f, Enclosure g, String where) {
        assertTrue(
                f.lowerWide().compareTo(g.upperWide()) <= 0 && g.lowerWide().compareTo(f.upperWide()) <= 0,
                () -> where + ": " + f + " and " + g);
    }

    @Test
    void meetsDensePowers() {
        for (int p = 0; p < PAIRS; p++) {
            SplittableRandom r = new SplittableRandom(p);
            int d = p % 3 == 2 ? 4 : 3;
            int n = d == 4 ? 2 + p / 3 % 2 : p % 6 == 1 ? 4 : 2 + p / 3 % 2;
            boolean real = p % 2 == 0;
            PositiveOperator a = random(r, d, 2 + r.nextInt(d - 1), real, 0.3 + 0.7 * r.nextDouble());
            PositiveOperator b = random(r, d, 2 + r.nextInt(d - 1), real, 0.3 + 0.7 * r.nextDouble());
            WideDouble t = WideDouble.of(Math.exp(6 * r.nextDouble() - 3));
            PositivePair pair = PositivePair.of(a, b).copies(n);
            assertEquals(PairKind.UNITARY_BLOCKS, pair.kind());
            Enclosure f = pair.traceMinimum(WideDouble.ONE, t);
            String where = "pair " + p;
            meet(f, PositivePair.of(power(a, n), power(b, n)).traceMinimum(WideDouble.ONE, t), where);
            assertTrue(f.relativeWidth() <= NARROW, () -> where + ": " + f.relativeWidth());
            assertEquals(1, pair.traceMinimumEstimate(WideDouble.ONE, t).value() / f.midpoint(), 1e-11);
        }
    }

    /** Five copies, 243 dimensions: the dense pair is right to about 1e-15 of that many traces. */
    @Test
    void meetsADensePowerOfFiveCopies() {
        SplittableRandom r = new SplittableRandom(77);
        PositiveOperator a = random(r, 3, 3, true, 0.6);
        PositiveOperator b = random(r, 3, 3, true, 0.6);
        meet(
                PositivePair.of(a, b).copies(5).traceMinimum(1),
                PositivePair.of(power(a, 5), power(b, 5)).traceMinimum(1),
                "five copies");
    }

    @Test
    void agreesWithSpinBlocksForQubits() {
        SplittableRandom r = new SplittableRandom(5);
        for (int n : new int[] {2, 7, 30}) {
            PositiveOperator a = random(r, 2, 2, false, 0.5);
            PositiveOperator b = random(r, 2, 2, false, 0.5);
            Enclosure f = UnitaryBlocksPair.of(a, b, n).traceMinimum(0.7);
            meet(f, SpinBlocksPair.of(a, b, n).traceMinimum(0.7), n + " copies");
            assertTrue(f.relativeWidth() <= NARROW);
        }
    }

    @Test
    void agreesWithTypesForDiagonalOperators() {
        double[] x = {0.6, 0.3, 0.1};
        double[] y = {0.05, 0.15, 0.8};
        PositiveOperator a = PositiveOperator.ofEigenvalues(x);
        PositiveOperator b = PositiveOperator.ofEigenvalues(y);
        for (int n : new int[] {2, 6}) {
            Enclosure f = UnitaryBlocksPair.of(a, b, n).traceMinimum(1.5);
            meet(f, PositivePair.of(a, b).copies(n).traceMinimum(1.5), n + " copies");
            assertTrue(f.relativeWidth() <= NARROW);
        }
    }

    /** A qubit pair turned into three dimensions by three times an isometry, so that no entry shows the plane. */
    @Test
    void findsACommonPlane() {
        double[][] v = {{2, -2}, {2, 1}, {1, 2}};
        Operator isometry = Operator.of(v, new double[3][2]);
        PositiveOperator a =
                PositiveOperator.ofFactor(Operator.of(new double[][] {{0.75, 0.25}, {0, 0.5}}, new double[2][2]));
        PositiveOperator b =
                PositiveOperator.ofFactor(Operator.of(new double[][] {{0.5, 0}, {0.25, 0.75}}, new double[2][2]));
        PositivePair pair = PositivePair.of(a.conjugatedBy(isometry), b.conjugatedBy(isometry))
                .copies(12);
        assertEquals(PairKind.UNITARY_BLOCKS, pair.kind());
        Enclosure qubits = SpinBlocksPair.of(a, b, 12).traceMinimum(1);
        Enclosure nine = Enclosure.exact(9).power(12);
        meet(pair.traceMinimum(1), qubits.times(nine), "plane");
    }

    @Test
    void directSumsKnowTheirCopies() {
        PositiveOperator a =
                PositiveOperator.of(new double[][] {{0.5, 0.25, 0}, {0.25, 0.25, 0}, {0, 0, 0.25}}, new double[3][3]);
        PositiveOperator b = PositiveOperator.of(
                new double[][] {{0.125, -0.0625, 0}, {-0.0625, 0.25, 0}, {0, 0, 0.5}}, new double[3][3]);
        PositivePair pair = PositivePair.of(a, b);
        assertEquals(PairKind.DIRECT_SUM, pair.kind());
        meet(
                pair.copies(3).traceMinimum(1),
                PositivePair.of(power(a, 3), power(b, 3)).traceMinimum(1),
                "direct sum");
    }

    /** Nearly pure states at depth: between the bounds of Chernoff and of Nussbaum and Szkoła, and decreasing. */
    @Test
    void liesBetweenBoundsAtDepth() {
        double c = 0.8;
        double s = 0.6;
        double[][] x = {{0.9985, 0, 0}, {0, 0.001, 0}, {0, 0, 0.0005}};
        PositiveOperator a = PositiveOperator.of(x, new double[3][3]);
        Operator turn = Operator.of(new double[][] {{c, -s, 0}, {s, c, 0}, {0, 0, 1}}, new double[3][3])
                .times(Operator.of(new double[][] {{1, 0, 0}, {0, c, -s}, {0, s, c}}, new double[3][3]));
        PositiveOperator b = a.conjugatedBy(turn);
        double[] v = {0.9985, 0.001, 0.0005};
        double chernoff = 1;
        for (double e = 0.05; e < 1; e += 0.05) {
            double sum = 0;
            for (int i = 0; i < 3; i++) {
                for (int j = 0; j < 3; j++) {
                    sum += Math.pow(v[i], e) * Math.pow(v[j], 1 - e) * turn.re(i, j) * turn.re(i, j);
                }
            }
            chernoff = Math.min(chernoff, sum);
        }
        double before = 1;
        for (int n : new int[] {2, 8, 24}) {
            PositivePair pair = PositivePair.of(a, b).copies(n).withEffort(Effort.DEFAULT.withTolerance(0.1));
            Enclosure f = pair.traceMinimum(1);
            assertTrue(f.relativeWidth() <= 0.11, n + " copies: " + f);
            // both bounds are evaluated in plain double, to about 1e-13
            assertTrue(f.lower() <= Math.pow(chernoff, n) * (1 + 1e-10));
            assertTrue(f.upper() >= nussbaumSzkola(v, turn, n) * (1 - 1e-10));
            assertTrue(f.upper() < before);
            before = f.lower();
        }
    }

    /** ½ Σ min over n copies of P_ij = v_i |U_ij|² and Q_ij = v_j |U_ij|², grouped by how often each v occurs on either side. */
    private static double nussbaumSzkola(double[] v, Operator u, int n) {
        List<double[]> pairs = new ArrayList<>();
        for (int i = 0; i < 3; i++) {
            for (int j = 0; j < 3; j++) {
                double w = u.re(i, j) * u.re(i, j);
                if (w > 0) {
                    pairs.add(new double[] {i, j, w});
                }
            }
        }
        // state: counts of eigenvalues 1 and 2 on either side
        Map<List<Integer>, Double> sums = new HashMap<>();
        sums.put(List.of(0, 0, 0, 0), 1.0);
        for (int k = 0; k < n; k++) {
            Map<List<Integer>, Double> next = new HashMap<>();
            sums.forEach((c, weight) -> {
                for (double[] p : pairs) {
                    List<Integer> to = List.of(
                            c.get(0) + (p[0] == 1 ? 1 : 0),
                            c.get(1) + (p[0] == 2 ? 1 : 0),
                            c.get(2) + (p[1] == 1 ? 1 : 0),
                            c.get(3) + (p[1] == 2 ? 1 : 0));
                    next.merge(to, weight * p[2], Double::sum);
                }
            });
            sums = next;
        }
        double total = 0;
        for (var e : sums.entrySet()) {
            List<Integer> c = e.getKey();
            double p = monomial(v, n, c.get(0), c.get(1));
            double q = monomial(v, n, c.get(2), c.get(3));
            total += 0.5 * e.getValue() * Math.min(p, q);
        }
        return total;
    }

    private static double monomial(double[] v, int n, int one, int two) {
        return Math.pow(v[0], n - one - two) * Math.pow(v[1], one) * Math.pow(v[2], two);
    }

    @Test
    void reportsProgressAndCanBeCancelled() {
        SplittableRandom r = new SplittableRandom(3);
        PositivePair pair = PositivePair.of(random(r, 3, 3, true, 0.4), random(r, 3, 3, true, 0.4))
                .copies(6);
        AtomicLong seen = new AtomicLong();
        WorkListener counts = (done, total) -> seen.accumulateAndGet(total, Math::max);
        Enclosure f = pair.withEffort(Effort.DEFAULT.withListener(counts)).traceMinimum(1);
        assertEquals(7, seen.get());
        Work work = pair.work(WideDouble.ONE, WideDouble.ONE);
        assertEquals(7, work.parts());
        // the symmetric subspace and its neighbours: no block of six copies has more than 35 dimensions
        assertTrue(work.largestRank() <= 70 && work.largestRank() >= 20, () -> "rank " + work.largestRank());
        assertTrue(work.bytes() < 10_000_000);
        assertEquals(f, pair.traceMinimum(1));
        WorkListener stops = new WorkListener() {
            @Override
            public void onProgress(long done, long total) {}

            @Override
            public boolean isCancelled() {
                return true;
            }
        };
        assertThrows(
                CancellationException.class,
                () -> pair.withEffort(Effort.DEFAULT.withListener(stops)).traceMinimum(1));
    }

    /** Counts only what is asked from inside an enclosed spectrum, and cancels there: an answer would mean that nothing is asked in there. */
    @Test
    void canBeCancelledInsideASpectrum() {
        SplittableRandom r = new SplittableRandom(3);
        PositivePair pair = PositivePair.of(random(r, 3, 3, false, 0.4), random(r, 3, 3, false, 0.4))
                .copies(8);
        for (int polls : new int[] {1, 4, 12}) {
            AtomicLong asked = new AtomicLong();
            WorkListener stops = new WorkListener() {
                @Override
                public void onProgress(long done, long total) {}

                @Override
                public boolean isCancelled() {
                    boolean inside = StackWalker.getInstance()
                            .walk(frames -> frames.anyMatch(
                                    f -> f.getClassName().equals("org.minorant.core.EnclosedSpectrum")));
                    return inside && asked.incrementAndGet() >= polls;
                }
            };
            assertThrows(
                    CancellationException.class,
                    () -> pair.withEffort(Effort.DEFAULT.withListener(stops)).traceMinimum(1));
            assertTrue(asked.get() >= polls);
        }
        assertTrue(pair.traceMinimum(1).relativeWidth() <= NARROW);
    }

    @Test
    void refusesWhatDoesNotFit() {
        SplittableRandom r = new SplittableRandom(4);
        PositiveOperator a = random(r, 3, 3, true, 0.9);
        PositiveOperator b = random(r, 3, 3, true, 0.9);
        PositivePair many = PositivePair.of(a, b).copies(60);
        InvalidInputException e = assertThrows(InvalidInputException.class, () -> many.traceMinimum(1));
        assertTrue(e.getMessage().contains("1500"), e.getMessage());
        PositiveOperator x = random(r, 13, 13, true, 0.9);
        PositiveOperator y = random(r, 13, 13, true, 0.9);
        assertThrows(InvalidInputException.class, () -> PositivePair.of(x, y).copies(2));
    }

    @Test
    void copiesOfCopiesAreCopies() {
        SplittableRandom r = new SplittableRandom(6);
        PositivePair pair = PositivePair.of(random(r, 3, 3, true, 0.4), random(r, 3, 3, true, 0.4));
        assertEquals(pair.copies(4).traceMinimum(1), pair.copies(2).copies(2).traceMinimum(1));
        assertEquals(81, pair.copies(4).dimension());
        assertTrue(pair.copies(4).firstTrace().relativeWidth() <= 1e-13);
        assertEquals(1, pair.copies(4).secondTrace().midpoint(), 1e-12);
    }
}
