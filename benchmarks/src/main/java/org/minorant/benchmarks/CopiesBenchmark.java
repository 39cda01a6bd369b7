package org.minorant.benchmarks;

import java.util.concurrent.TimeUnit;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Estimate;
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
 * The minimum error of n copies of two qubit states, enclosed and estimated, all cores used. {@link CopiesTable} runs it beside the native yardstick.
 */
@State(Scope.Thread)
@BenchmarkMode(Mode.SingleShotTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
@Warmup(iterations = 15)
@Measurement(iterations = 5)
@Fork(1)
public class CopiesBenchmark {

    /** Which pair: {@code X} has the Bloch vectors (0,0,0.9) and (0.6,0,0.5); {@code near} lengths 0.97 at the angle 0.45/√(n/1000), equally deep for all n; {@code deep} lengths 0.98 and 0.96 with cosine 0.9. */
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
            default -> throw new IllegalArgumentException(pair);
        };
    }

    private static HypothesisPair of(double first, double second, double angle, int n) {
        DensityOperator a = DensityOperator.ofBloch(0, 0, first);
        DensityOperator b = DensityOperator.ofBloch(second * Math.sin(angle), 0, second * Math.cos(angle));
        return HypothesisPair.ofCurve(PositivePair.of(a, b).copies(n));
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
