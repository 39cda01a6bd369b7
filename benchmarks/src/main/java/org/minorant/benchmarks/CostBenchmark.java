package org.minorant.benchmarks;

import java.util.concurrent.TimeUnit;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Operator;
import org.minorant.core.internal.door.EigenResidual;
import org.minorant.core.internal.door.HermitianEigen;
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
 * The certified minimum error of a dense pair beside the Hermitian eigendecomposition it rests on. {@link CostTable} runs both in one JMH run
 * and prints their ratio.
 */
@State(Scope.Thread)
@BenchmarkMode(Mode.SampleTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
@Warmup(iterations = 3, time = 1)
@Measurement(iterations = 4, time = 1)
@Fork(1)
public class CostBenchmark {

    /** Dimension of the space. */
    @Param({"64", "128", "256"})
    public int dimension;

    /** Whether the states are complex or real. */
    @Param({"complex", "real"})
    public String entries;

    private HypothesisPair pair;
    private double[] re;
    private double[] im;
    private HermitianEigen eigen;

    /** Draws two states. */
    @Setup
    public void draw() {
        DensityOperator a = Inputs.state(dimension, "complex".equals(entries), 1);
        DensityOperator b = Inputs.state(dimension, "complex".equals(entries), 3);
        pair = HypothesisPair.of(a, b);
        Operator difference = a.times(0.5).minus(b.times(0.5));
        re = difference.realParts();
        im = difference.imaginaryParts();
        eigen = HermitianEigen.of(dimension, re, im);
    }

    /** The eigendecomposition of ½(ρ − σ), values and vectors. */
    @Benchmark
    public HermitianEigen decomposition() {
        return HermitianEigen.of(dimension, re, im);
    }

    /** The certificate of that decomposition. */
    @Benchmark
    public EigenResidual certificate() {
        return EigenResidual.of(dimension, re, im, eigen);
    }

    /** The enclosed minimum error at equal priors, Tr[½ρ ∧ ½σ]. */
    @Benchmark
    public Enclosure minimumError() {
        return pair.minimumError(0.5);
    }
}
