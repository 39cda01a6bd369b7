package org.minorant.tests.property;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.SplittableRandom;
import java.util.function.BiConsumer;
import java.util.random.RandomGenerator;
import org.junit.jupiter.api.Test;
import org.minorant.bounds.ClassicalQuantumChannel;
import org.minorant.bounds.CodingBounds;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;

/** What codes reach is not beyond what they cannot exceed, for random channels, inputs, uses and errors; and routes that compute the same number agree. */
final class CodesOfAnyChannelTest {

    /** How many times as many cases as in every build. */
    private static final int TIMES = Integer.getInteger("codes.times", 1);

    private static double[] distribution(RandomGenerator random, int size) {
        double[] p = new double[size];
        double sum = 0;
        for (int i = 0; i < size; i++) {
            // zeros and rare entries now and then
            p[i] = random.nextInt(6) == 0 && i > 0 ? 0 : Math.pow(random.nextDouble(), 2) + 1e-3;
            sum += p[i];
        }
        for (int i = 0; i < size; i++) {
            p[i] /= sum;
        }
        return p;
    }

    private static ClassicalQuantumChannel classical(RandomGenerator random) {
        int outcomes = 2 + random.nextInt(2);
        double[][] rows = new double[2 + random.nextInt(2)][];
        for (int x = 0; x < rows.length; x++) {
            rows[x] = distribution(random, outcomes);
        }
        return ClassicalQuantumChannel.ofStochasticMatrix(rows);
    }

    private static DensityOperator ket(RandomGenerator random) {
        double a = 6 * random.nextDouble();
        double b = 6 * random.nextDouble();
        double s = Math.sin(a);
        return DensityOperator.ofKet(new double[] {Math.cos(a), s * Math.cos(b)}, new double[] {0, s * Math.sin(b)});
    }

    private static ClassicalQuantumChannel kets(RandomGenerator random) {
        List<DensityOperator> letters = new ArrayList<>();
        for (int x = 2 + random.nextInt(2); x > 0; x--) {
            letters.add(ket(random));
        }
        return ClassicalQuantumChannel.of(letters);
    }

    private static ClassicalQuantumChannel qubits(RandomGenerator random) {
        List<DensityOperator> letters = new ArrayList<>();
        for (int x = 0; x < 2; x++) {
            double z = 2 * random.nextDouble() - 1;
            double r = 0.98 * random.nextDouble();
            double across = Math.sqrt(1 - z * z) * r;
            double turn = 6.3 * random.nextDouble();
            letters.add(DensityOperator.ofBloch(across * Math.cos(turn), across * Math.sin(turn), r * z));
        }
        return ClassicalQuantumChannel.of(letters);
    }

    private static void notBeyond(Information reached, Information limit, String what) {
        assertTrue(reached.nats().lower() <= limit.nats().upper(), () -> what + ": " + reached + " beyond " + limit);
    }

    private static CodingBounds draw(RandomGenerator random, ClassicalQuantumChannel channel, int most) {
        CodingBounds bounds = CodingBounds.of(channel).uses(1 + random.nextInt(most));
        return random.nextBoolean() ? bounds : bounds.withInput(distribution(random, channel.letters()));
    }

    private static double level(RandomGenerator random) {
        double e = Math.pow(10, -4 * random.nextDouble());
        return random.nextInt(4) == 0 ? 1 - 0.9 * e : 0.95 * e;
    }

    private static void check(CodingBounds b, double epsilon, boolean relaxed) {
        String what = b.uses() + " uses at " + epsilon;
        Information reached = b.achievable(epsilon);
        notBeyond(reached, b.converse(epsilon), what);
        notBeyond(b.achievableLargest(epsilon), reached, what + ", largest error");
        notBeyond(b.chernoffAchievable(epsilon), reached, what + ", Chernoff");
        if (relaxed) {
            notBeyond(reached, b.strongConverse(epsilon), what + ", strong converse");
            notBeyond(reached, b.weakConverse(epsilon), what + ", weak converse");
        }
    }

    private static void run(int cases, long seed, BiConsumer<RandomGenerator, Integer> one) {
        SplittableRandom random = new SplittableRandom(seed);
        for (int i = 0; i < cases * TIMES; i++) {
            one.accept(random.split(), i);
        }
    }

    @Test
    void classicalChannels() {
        run(700, 41, (random, i) -> check(draw(random, classical(random), 6), level(random), i % 10 == 0));
    }

    @Test
    void ketChannels() {
        run(60, 42, (random, i) -> check(draw(random, kets(random), 4), level(random), i % 20 == 0));
    }

    @Test
    void qubitChannels() {
        run(5, 43, (random, i) -> check(draw(random, qubits(random), 2), level(random), i % 20 == 0));
    }

    /** Codes by types, which take longer. */
    @Test
    void codesByTypes() {
        run(6, 44, (random, i) -> {
            ClassicalQuantumChannel channel = i % 3 == 0 ? kets(random) : classical(random);
            CodingBounds b = draw(random, channel, 8);
            double epsilon = level(random);
            Information most = b.converseByTypes(epsilon);
            String what = b.uses() + " uses at " + epsilon + ", by types";
            notBeyond(b.achievable(epsilon), most, what);
            notBeyond(b.constantComposition(epsilon), most, what);
            notBeyond(b.constantComposition(epsilon), b.converse(epsilon), what);
        });
    }

    /** Two uses by types of words, or by one pair, against one use of the channel of all four or nine words. */
    @Test
    void wordsMultipliedOut() {
        run(6, 45, (random, i) -> {
            ClassicalQuantumChannel channel =
                    i % 3 == 0 ? kets(random) : i % 3 == 1 ? classical(random) : qubits(random);
            int k = channel.letters();
            List<DensityOperator> letters = new ArrayList<>();
            for (int x = 0; x < k; x++) {
                letters.add(channel.outputs().get(x));
            }
            double[] p = distribution(random, k);
            double[] q = new double[k * k];
            List<DensityOperator> words = new ArrayList<>();
            double sum = 0;
            for (int x = 0; x < k; x++) {
                for (int y = 0; y < k; y++) {
                    words.add(DensityOperator.of(letters.get(x).tensor(letters.get(y))));
                    q[x * k + y] = p[x] * p[y];
                    sum += q[x * k + y];
                }
            }
            for (int w = 0; w < q.length; w++) {
                q[w] /= sum;
            }
            DensityOperator sigma = channel.outputState(distribution(random, k));
            CodingBounds twice = CodingBounds.of(channel).withInput(p).uses(2).withOutputState(sigma);
            CodingBounds once = CodingBounds.of(ClassicalQuantumChannel.of(words))
                    .withInput(q)
                    .withOutputState(DensityOperator.of(sigma.tensor(sigma)));
            double epsilon = level(random);
            agree(twice.achievableError(3), once.achievableError(3));
            agree(twice.converseError(3), once.converseError(3));
            agree(twice.achievable(epsilon).nats(), once.achievable(epsilon).nats());
            agree(twice.converse(epsilon).nats(), once.converse(epsilon).nats());
        });
    }

    /** Inputs and states of the two routes differ by roundings, which errors may enlarge some thousand times. */
    private static void agree(Enclosure a, Enclosure b) {
        if (a.isFinite() && b.isFinite()) {
            assertTrue(a.widen(1e-11).isPossiblyBelow(b) && b.isPossiblyBelow(a.widen(1e-11)), a + " and " + b);
        }
    }
}
