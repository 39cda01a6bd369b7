package org.minorant.core.pair;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/** That errors of overlaps and of factors reach the enclosure: here they are made large, as they are far below its width otherwise. */
class BlockErrorsTest {

    private static ColumnWeights weights(double first, double ratio) {
        WideDoubleDouble w = WideDoubleDouble.of(DoubleDouble.of(first));
        return new ColumnWeights(BlockColumns.geometric(w, DoubleDouble.of(ratio), 2), 0);
    }

    private static SpinOverlaps.Window rotation(double angle, double radius) {
        double c = Math.cos(angle);
        double s = Math.sin(angle);
        return new SpinOverlaps.Window(
                new double[][] {{c, s}, {-s, c}}, new double[2][2], new double[][] {{radius, radius}, {radius, radius}
                });
    }

    /** f of the pair diag(x, xr) against R diag(y, yq) R*, from the trace norm of a real 2 × 2 matrix; right to 1e-15. */
    private static double exact(double x, double r, double y, double q, double angle) {
        double c = Math.cos(angle);
        double s = Math.sin(angle);
        double up = x - y * (c * c + q * s * s);
        double down = x * r - y * (s * s + q * c * c);
        double off = y * (1 - q) * c * s;
        double norm = up * down - off * off < 0 ? Math.hypot(up - down, 2 * off) : Math.abs(up + down);
        return 0.5 * (x * (1 + r) + y * (1 + q) - norm);
    }

    @Test
    void denseBlocksHoldWhatTheRadiiLeaveOpen() {
        double radius = 1e-6;
        for (double turn : new double[] {-0.9e-6, 0, 0.9e-6}) {
            Enclosure f = DenseBlock.enclose(weights(0.7, 0.4), weights(0.6, 0.5), rotation(0.3, radius), () -> {});
            double value = exact(0.7, 0.4, 0.6, 0.5, 0.3 + turn);
            assertTrue(f.contains(value), () -> f + " and " + value);
            assertTrue(f.upper() - f.lower() < 20 * radius, f::toString);
        }
    }

    /** The Gram matrix errs by about the radius, and √f by the root of that. */
    @Test
    void blocksInTheSpanOfTheirColumnsHoldWhatTheRadiiLeaveOpen() {
        double radius = 1e-6;
        for (double turn : new double[] {-0.9e-6, 0, 0.9e-6}) {
            Enclosure f = SpanBlock.enclose(
                    SpinBlock.columns(weights(0.7, 0.4), weights(0.6, 0.5), rotation(0.3, radius)), () -> {});
            double value = exact(0.7, 0.4, 0.6, 0.5, 0.3 + turn);
            assertTrue(f.contains(value), () -> f + " and " + value);
            assertTrue(f.upper() - f.lower() < 20 * Math.sqrt(radius), f::toString);
        }
        Enclosure sharp =
                SpanBlock.enclose(SpinBlock.columns(weights(0.7, 0.4), weights(0.6, 0.5), rotation(0.3, 0)), () -> {});
        assertTrue(sharp.widen(1e-15).contains(exact(0.7, 0.4, 0.6, 0.5, 0.3)), sharp::toString);
        // the window is orthogonal to 1e-16 only, so that its root finds 1e-16 more of a column
        assertTrue(sharp.upper() - sharp.lower() < 1e-7, sharp::toString);
    }

    @Test
    void crossProductsHaveTheRadiiOfTheirOverlaps() {
        double radius = 1e-6;
        ColumnWeights x = weights(0.7, 0.4);
        ColumnWeights y = weights(0.6, 0.5);
        ColumnPair pair = SpinBlock.columns(x, y, rotation(0.3, radius));
        for (int a = 0; a < 2; a++) {
            for (int b = 0; b < 2; b++) {
                double least = radius * Math.sqrt(x.power(a).hi() * y.power(b).hi());
                assertTrue(pair.cross().radius(a, b) >= least * (1 - 0x1p-50));
                assertTrue(pair.cross().radius(a, b) <= least * (1 + 1e-9));
            }
        }
    }

    /** (a + ν)^n − a^n is what N = ν on one eigenvector adds to the trace of n copies of an operator of trace a. */
    @Test
    void whatTheTracesLeaveOpenGrowsWithTheCopies() {
        double a = 0.9;
        for (double nu : new double[] {1e-12, 1e-6, 1e-3}) {
            for (int n : new int[] {1, 2, 10, 100}) {
                double added = Math.pow(a, n) * Math.expm1(n * Math.log1p(nu / a));
                WideDouble bound = CopyErrors.trace(n, Enclosure.exact(a), nu, 1e-15);
                assertTrue(bound.toDoubleUp() >= added * (1 - 1e-10), () -> n + ", " + nu);
                // 2ν in place of ν, and the first order in place of the difference
                assertTrue(bound.toDoubleUp() <= added * Math.exp(2 * n * nu / a) * (1 + 1e-10), () -> n + ", " + nu);
                Enclosure f = CopyErrors.apply(
                        Enclosure.exact(0.5),
                        List.of(new CopyErrors.Factor(Enclosure.exact(a), 0, nu, n)),
                        WideDouble.of(2));
                assertTrue(f.contains(0.5 + 2 * added * (1 - 1e-10)) && f.contains(0.5 - 2 * added * (1 - 1e-10)));
            }
        }
    }
}
