package org.minorant.benchmarks;

import java.util.concurrent.TimeUnit;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Operator;
import org.minorant.core.internal.dd.DdProducts;
import org.minorant.core.internal.kernel.Products;
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

/** Complex and real products of n × n matrices, in double and in double-double, and the storage that lost. */
@State(Scope.Thread)
@BenchmarkMode(Mode.SampleTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
@Warmup(iterations = 3, time = 1)
@Measurement(iterations = 4, time = 1)
@Fork(1)
public class ProductsBenchmark {

    /** Dimension. */
    @Param({"64", "256"})
    public int n;

    private double[] are;
    private double[] aim;
    private double[] bre;
    private double[] bim;
    private double[] cre;
    private double[] cim;
    private double[] a;
    private double[] b;
    private double[] c;
    private EnclosedMatrix x;
    private EnclosedMatrix y;
    private double[][][] rows;

    /** Draws the factors. */
    @Setup
    public void draw() {
        are = Inputs.gaussian(n * n, 1);
        aim = Inputs.gaussian(n * n, 2);
        bre = Inputs.gaussian(n * n, 3);
        bim = Inputs.gaussian(n * n, 4);
        cre = new double[n * n];
        cim = new double[n * n];
        a = Inputs.gaussian(2 * n * n, 5);
        b = Inputs.gaussian(2 * n * n, 6);
        c = new double[2 * n * n];
        x = EnclosedMatrix.of(Operator.ofRowMajor(n, n, are, aim));
        y = EnclosedMatrix.of(Operator.ofRowMajor(n, n, bre, bim));
        rows = new double[6][n][n];
        for (int i = 0; i < n; i++) {
            System.arraycopy(are, i * n, rows[0][i], 0, n);
            System.arraycopy(bre, i * n, rows[2][i], 0, n);
        }
    }

    /** Complex product on split arrays, as the library does it: 8n³ flops. */
    @Benchmark
    public double[] split() {
        Products.multiply(n, n, n, are, aim, bre, bim, cre, cim);
        return cre;
    }

    /** Complex product on interleaved arrays, rows of the right factor packed beside i times themselves: 8n³ flops. */
    @Benchmark
    public double[] interleavedPacked() {
        Interleaved.multiplyPacked(n, a, b, c);
        return c;
    }

    /** Complex product on interleaved arrays, plainly: 8n³ flops. */
    @Benchmark
    public double[] interleavedPlain() {
        Interleaved.multiplyPlain(n, a, b, c);
        return c;
    }

    /** Real product: 2n³ flops. */
    @Benchmark
    public double[] real() {
        Products.multiply(n, n, n, are, new double[0], bre, new double[0], cre, new double[0]);
        return cre;
    }

    /** Real product in double-double: n³ multiply-adds. */
    @Benchmark
    public double[][] doubleDouble() {
        DdProducts.addProduct(rows[0], rows[1], rows[2], rows[3], 1, rows[4], rows[5]);
        return rows[4];
    }

    /** Enclosed complex product: 4n³ double-double multiply-adds, and the radii. */
    @Benchmark
    public EnclosedMatrix enclosed() {
        return x.times(y);
    }
}
