package org.minorant.core.pair;

import java.util.List;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Operator;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * One irreducible block of many copies: A diagonal in its Gelfand–Tsetlin basis, B in its own, overlaps π_λ(U) between the two; kept patterns only. As in {@link SpinBlock} the inner products define the pair, and the
 * columns only guide the rotations.
 */
final class UnitaryBlock {

    private final Monomials.Column[] x;
    private final Monomials.Column[] y;
    private final IrrepOverlaps overlaps;
    private final int[] rows;
    private final int[] columns;
    private final double step;

    /**
     * A block.
     *
     * @param x the kept eigenvalues of A
     * @param y the kept eigenvalues of B
     * @param overlaps π_λ(U)
     * @param rows where the kept patterns of A stand in its window
     * @param columns the same of B
     * @param step the relative error of an eigenvalue
     */
    UnitaryBlock(
            Monomials.Column[] x,
            Monomials.Column[] y,
            IrrepOverlaps overlaps,
            int[] rows,
            int[] columns,
            double step) {
        this.x = x;
        this.y = y;
        this.overlaps = overlaps;
        this.rows = rows;
        this.columns = columns;
        this.step = step;
    }

    ColumnPair columns(boolean wholeSpace) {
        EnclosedMatrix.Builder cross = EnclosedMatrix.builder(x.length, y.length);
        for (int a = 0; a < x.length; a++) {
            for (int b = 0; b < y.length; b++) {
                DoubleDouble scale = x[a].root().times(y[b].root());
                DoubleDouble re = overlaps.re(rows[a], columns[b]).times(scale);
                DoubleDouble im = overlaps.im(rows[a], columns[b]).times(scale);
                double size = Math.hypot(re.hi(), im.hi());
                // each root errs by half the step and 2^-102; three products; roots below 2^-500 count as 0
                double r = scale.hi() * overlaps.radius(rows[a], columns[b]) * (1 + 0x1p-50)
                        + size * (step + 8 * DoubleDouble.EPS)
                        + 0x1p-495;
                cross.set(a, b, re.hi(), re.lo(), im.hi(), im.lo(), r);
            }
        }
        return wholeSpace
                ? new ColumnPair(axes(overlaps.rows().size()), vectors(), gram(x), gram(y), cross.build())
                : new ColumnPair(axes(x.length + y.length), guides(), gram(x), gram(y), cross.build());
    }

    /** A + B, weighted: an upper end of the trace. */
    double traces(double wa, double wb) {
        return (wa * trace(x) + wb * trace(y)) * (1 + 0x1p-30);
    }

    private static double trace(Monomials.Column[] z) {
        double s = 0;
        for (Monomials.Column c : z) {
            s += c.value().hi();
        }
        return s;
    }

    /** The block in its whole space, which the rows of the overlaps span, for weights of at most about one. */
    WholeBlock whole(double wa, double wb) {
        int d = overlaps.rows().size();
        EnclosedMatrix.Builder v = EnclosedMatrix.builder(d, y.length);
        for (int i = 0; i < d; i++) {
            for (int b = 0; b < y.length; b++) {
                DoubleDouble re = overlaps.re(i, columns[b]).times(y[b].root());
                DoubleDouble im = overlaps.im(i, columns[b]).times(y[b].root());
                double r = y[b].root().hi() * overlaps.radius(i, columns[b]) * (1 + 0x1p-50)
                        + Math.hypot(re.hi(), im.hi()) * (step + 8 * DoubleDouble.EPS)
                        + 0x1p-495;
                v.set(i, b, re.hi(), re.lo(), im.hi(), im.lo(), r);
            }
        }
        EnclosedMatrix.Builder diagonal = EnclosedMatrix.builder(d, d);
        DoubleDouble sum = DoubleDouble.ZERO;
        double error = 0;
        for (int a = 0; a < x.length; a++) {
            DoubleDouble value = x[a].value();
            double radius = value.hi() * step + 0x1p-990;
            diagonal.set(rows[a], rows[a], value.hi(), value.lo(), 0, 0, radius);
            sum = sum.plus(value.times(wa));
            error += wa * radius;
        }
        for (Monomials.Column c : y) {
            sum = sum.plus(c.value().times(wb));
            error += wb * (c.value().hi() * step + 0x1p-990);
        }
        error += (x.length + y.length + 2) * DoubleDouble.EPS * sum.hi();
        EnclosedMatrix columnsOfB = v.build();
        EnclosedMatrix difference = diagonal.build()
                .times(wa)
                .minus(columnsOfB.times(columnsOfB.adjoint()).times(wb));
        return new WholeBlock(difference, sum, error);
    }

    private EnclosedMatrix gram(Monomials.Column[] z) {
        EnclosedMatrix.Builder m = EnclosedMatrix.builder(z.length, z.length);
        for (int i = 0; i < z.length; i++) {
            double radius = z[i].value().hi() * step + 0x1p-990;
            m.set(i, i, z[i].value().hi(), z[i].value().lo(), 0, 0, radius);
        }
        return m.build();
    }

    /** x_a along the a-th axis. */
    private EnclosedMatrix axes(int height) {
        double[] re = new double[height * x.length];
        for (int a = 0; a < x.length; a++) {
            re[a * x.length + a] = x[a].root().hi();
        }
        return EnclosedMatrix.of(Operator.ofRowMajor(height, x.length, re, new double[re.length]));
    }

    /** y_b in the whole space, kept patterns of A first. */
    private EnclosedMatrix vectors() {
        int d = overlaps.rows().size();
        int l = y.length;
        double[] re = new double[d * l];
        double[] im = new double[d * l];
        int[] place = places(d);
        for (int i = 0; i < d; i++) {
            for (int b = 0; b < l; b++) {
                double scale = y[b].root().hi();
                re[place[i] * l + b] = scale * overlaps.re(i, columns[b]).hi();
                im[place[i] * l + b] = scale * overlaps.im(i, columns[b]).hi();
            }
        }
        return EnclosedMatrix.of(Operator.ofRowMajor(d, l, re, im));
    }

    private int[] places(int d) {
        int[] place = new int[d];
        java.util.Arrays.fill(place, -1);
        for (int a = 0; a < rows.length; a++) {
            place[rows[a]] = a;
        }
        int next = rows.length;
        for (int i = 0; i < d; i++) {
            if (place[i] < 0) {
                place[i] = next++;
            }
        }
        return place;
    }

    /** y_b along the kept x_a and, beyond, column b of a triangle R with R*R = 1 − C*C. */
    private EnclosedMatrix guides() {
        int k = x.length;
        int l = y.length;
        OverlapTriangle r = OverlapTriangle.of(overlaps, rows, columns);
        double[] re = new double[(k + l) * l];
        double[] im = new double[(k + l) * l];
        for (int b = 0; b < l; b++) {
            double scale = y[b].root().hi();
            for (int a = 0; a < k; a++) {
                re[a * l + b] = scale * overlaps.re(rows[a], columns[b]).hi();
                im[a * l + b] = scale * overlaps.im(rows[a], columns[b]).hi();
            }
            for (int i = 0; i <= b; i++) {
                re[(k + i) * l + b] = scale * r.re()[i][b];
                im[(k + i) * l + b] = scale * r.im()[i][b];
            }
        }
        return EnclosedMatrix.of(Operator.ofRowMajor(k + l, l, re, im));
    }

    /** The places of patterns in a window. */
    static int[] places(PatternWindow window, List<int[]> patterns) {
        return patterns.stream().mapToInt(window::find).toArray();
    }
}
