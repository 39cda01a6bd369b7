package org.minorant.benchmarks;

import java.util.concurrent.TimeUnit;
import org.bytedeco.openblas.global.openblas;
import org.minorant.core.Operator;
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
 * The same Hermitian eigenproblem as {@link CostBenchmark} in OpenBLAS' LAPACK on one thread, values and vectors: divide and conquer (zheevd,
 * dsyevd) and implicit QL (zheev, dsyev). An environment that pins it to older kernels (OPENBLAS_CORETYPE) should be cleared for the run.
 */
@State(Scope.Thread)
@BenchmarkMode(Mode.SampleTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
@Warmup(iterations = 3, time = 1)
@Measurement(iterations = 4, time = 1)
@Fork(1)
public class NativeEigenBenchmark {

    private static final int COLUMN_MAJOR = 102;

    /** Dimension of the space. */
    @Param({"64", "128", "256"})
    public int dimension;

    /** Whether the matrix is complex or real. */
    @Param({"complex", "real"})
    public String entries;

    private double[] matrix;
    private double[] work;
    private double[] values;
    private boolean complex;

    /** Draws the matrix. */
    @Setup
    public void draw() {
        openblas.blas_set_num_threads(1);
        complex = "complex".equals(entries);
        int n = dimension;
        Operator d = Inputs.state(n, complex, 1)
                .times(0.5)
                .minus(Inputs.state(n, complex, 3).times(0.5));
        matrix = new double[complex ? 2 * n * n : n * n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                if (complex) {
                    matrix[2 * (i * n + j)] = d.re(i, j);
                    matrix[2 * (i * n + j) + 1] = d.im(i, j);
                } else {
                    matrix[i * n + j] = d.re(i, j);
                }
            }
        }
        work = matrix.clone();
        values = new double[n];
    }

    /** zheevd or dsyevd. */
    @Benchmark
    public double[] lapackDivideAndConquer() {
        System.arraycopy(matrix, 0, work, 0, work.length);
        int info = complex
                ? openblas.LAPACKE_zheevd(COLUMN_MAJOR, (byte) 'V', (byte) 'L', dimension, work, dimension, values)
                : openblas.LAPACKE_dsyevd(COLUMN_MAJOR, (byte) 'V', (byte) 'L', dimension, work, dimension, values);
        return check(info);
    }

    /** zheev or dsyev. */
    @Benchmark
    public double[] lapackQl() {
        System.arraycopy(matrix, 0, work, 0, work.length);
        int info = complex
                ? openblas.LAPACKE_zheev(COLUMN_MAJOR, (byte) 'V', (byte) 'L', dimension, work, dimension, values)
                : openblas.LAPACKE_dsyev(COLUMN_MAJOR, (byte) 'V', (byte) 'L', dimension, work, dimension, values);
        return check(info);
    }

    private double[] check(int info) {
        if (info != 0) {
            throw new IllegalStateException("LAPACK returned " + info);
        }
        return values;
    }
}
