package org.minorant.benchmarks;

import java.util.concurrent.TimeUnit;
import org.minorant.bounds.ClassicalQuantumChannel;
import org.minorant.bounds.CodingBounds;
import org.minorant.core.DensityOperator;
import org.minorant.core.Information;
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
 * Bounds on codes at an average error of 1e-3, all cores used. Every value starts from the states, so it takes in the capacity, whose input and output state are the default ones.
 * {@link CodingTable} runs it beside the native unit.
 */
@State(Scope.Thread)
@BenchmarkMode(Mode.SingleShotTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
@Warmup(iterations = 15)
@Measurement(iterations = 5)
@Fork(1)
public class CodingBenchmark {

    private static final double EPSILON = 1e-3;

    /**
     * Which channel and how many uses: {@code kets} of overlap 0.78; {@code symmetric} qubits of Bloch length 0.9 at ±0.8 rad from an axis; {@code bsc}, the binary symmetric channel with crossover 0.11;
     * {@code qubits} of Bloch vectors (0,0,0.9) and (0.6,0,0.5).
     */
    @Param({"kets 100000"})
    public String channel;

    private DensityOperator[] letters;
    private int n;

    /** Makes the letters. */
    @Setup
    public void make() {
        String[] words = channel.split(" ");
        n = Integer.parseInt(words[1]);
        letters = switch (words[0]) {
            case "kets" ->
                new DensityOperator[] {
                    DensityOperator.ofKet(1, 0), DensityOperator.ofKet(0.78, Math.sqrt(1 - 0.78 * 0.78))
                };
            case "symmetric" -> new DensityOperator[] {tilted(0.8), tilted(-0.8)};
            case "bsc" ->
                new DensityOperator[] {
                    DensityOperator.ofEigenvalues(0.89, 0.11), DensityOperator.ofEigenvalues(0.11, 0.89)
                };
            case "qubits" ->
                new DensityOperator[] {DensityOperator.ofBloch(0, 0, 0.9), DensityOperator.ofBloch(0.6, 0, 0.5)};
            default -> throw new IllegalArgumentException(channel);
        };
    }

    private static DensityOperator tilted(double angle) {
        return DensityOperator.ofBloch(0.9 * Math.sin(angle), 0, 0.9 * Math.cos(angle));
    }

    private CodingBounds bounds() {
        return CodingBounds.of(ClassicalQuantumChannel.of(letters)).uses(n);
    }

    /** The largest ln M of random codes. */
    @Benchmark
    public Information achievable() {
        return bounds().achievable(EPSILON);
    }

    /** Both sides. */
    @Benchmark
    public Information[] bothSides() {
        CodingBounds b = bounds();
        return new Information[] {b.achievable(EPSILON), b.converse(EPSILON)};
    }

    /** Both sides and the random-coding union, classical channels only. */
    @Benchmark
    public Information[] withUnion() {
        CodingBounds b = bounds();
        return new Information[] {b.achievable(EPSILON), b.randomCodingUnion(EPSILON), b.converse(EPSILON)};
    }
}
