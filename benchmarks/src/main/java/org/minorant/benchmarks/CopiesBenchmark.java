package org.minorant.benchmarks;

import java.util.concurrent.TimeUnit;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Estimate;
import org.minorant.core.Operator;
import org.minorant.core.PositiveOperator;
import org.minorant.core.pair.PositivePair;
import org.minorant.measurement.HypothesisPair;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Param;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;

/**
 * The minimum error of n copies of two states, enclosed and estimated, all cores used. {@link CopiesTable} runs it beside the native yardstick.
 */
@State(Scope.Thread)
@BenchmarkMode(Mode.SingleShotTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
@Warmup(iterations = 15)
@Measurement(iterations = 5)
@Fork(1)
public class CopiesBenchmark {

    /**
     * Which pair: {@code X} has the Bloch vectors (0,0,0.9) and (0.6,0,0.5); {@code near} lengths 0.97 at the angle 0.45/√(n/1000), equally deep for all n; {@code deep} lengths 0.98 and 0.96 with cosine
     * 0.9; {@code length-r} both lengths r at a right angle; {@code kets} overlap cos(π/4), as of length one; {@code d-k} real states of k dimensions with eigenvalues proportional to 1, 1/5, 1/25, …,
     * the second turned by half a radian in each plane of two neighbouring axes.
     */
    @Param({"X 200", "X 500", "X 1000", "near 1000", "near 2000", "near 4000", "near 8000", "near 16000"})
    public String pair;

    private HypothesisPair many;

    /** Makes the pair. */
    @Setup
    public void make() {
        String[] words = pair.split(" ");
        int n = Integer.parseInt(words[1]);
        many = switch (words[0]) {
            case "X" -> of(0.9, Math.hypot(0.6, 0.5), Math.atan2(0.6, 0.5), n);
            case "near" -> of(0.97, 0.97, 0.45 / Math.sqrt(n / 1000.0), n);
            case "deep" -> of(0.98, 0.96, Math.acos(0.9), n);
            case "kets" -> copies(DensityOperator.ofKet(1, 0), DensityOperator.ofKet(1, 1), n);
            default -> {
                String[] kind = words[0].split("-");
                yield switch (kind[0]) {
                    case "length" -> of(Double.parseDouble(kind[1]), Double.parseDouble(kind[1]), Math.PI / 2, n);
                    case "d" -> turned(Integer.parseInt(kind[1]), n);
                    default -> throw new IllegalArgumentException(pair);
                };
            }
        };
    }

    private static HypothesisPair turned(int d, int n) {
        double[][] root = new double[d][d];
        double trace = 0;
        for (int i = 0; i < d; i++) {
            root[i][i] = Math.pow(0.2, 0.5 * i);
            trace += Math.pow(0.2, i);
        }
        Operator first = Operator.ofReal(root).times(1 / Math.sqrt(trace));
        Operator second = first;
        for (int i = 0; i + 1 < d; i++) {
            double[][] turn = new double[d][d];
            for (int j = 0; j < d; j++) {
                turn[j][j] = j == i || j == i + 1 ? Math.cos(0.5) : 1;
            }
            turn[i][i + 1] = -Math.sin(0.5);
            turn[i + 1][i] = Math.sin(0.5);
            second = Operator.ofReal(turn).times(second);
        }
        PositivePair one = PositivePair.of(PositiveOperator.ofFactor(first), PositiveOperator.ofFactor(second));
        return HypothesisPair.ofCurve(one.copies(n));
    }

    private static HypothesisPair copies(DensityOperator a, DensityOperator b, int n) {
        return HypothesisPair.ofCurve(PositivePair.of(a, b).copies(n));
    }

    private static HypothesisPair of(double first, double second, double angle, int n) {
        DensityOperator a = DensityOperator.ofBloch(0, 0, first);
        DensityOperator b = DensityOperator.ofBloch(second * Math.sin(angle), 0, second * Math.cos(angle));
        return copies(a, b, n);
    }

    /** The minimum error at equal priors, enclosed within 1e-12 of truncation. */
    @Benchmark
    public Enclosure enclosed() {
        return many.minimumError(0.5);
    }

    /** The same without proof. */
    @Benchmark
    public Estimate estimated() {
        return many.minimumErrorEstimate(0.5);
    }
}
