package org.minorant.tests.containment;

import java.util.Arrays;
import org.minorant.core.DensityOperator;
import org.minorant.core.Operator;
import org.minorant.core.PositiveOperator;
import org.minorant.tests.Draw.Matrix;
import org.minorant.tests.reference.ReferenceOperator;

/**
 * A positive operator as a user gives it, beside what it means exactly.
 *
 * @param form how it was given
 * @param operator what the library made of it
 * @param meant what it means
 * @param data the numbers given, to every digit
 */
record GivenOperator(String form, PositiveOperator operator, ReferenceOperator meant, String data) {

    static GivenOperator ofEntries(Matrix m) {
        return new GivenOperator(
                "entries", PositiveOperator.of(m.re(), m.im()), ReferenceOperator.ofEntries(m.re(), m.im()), text(m));
    }

    static GivenOperator ofColumns(Matrix m) {
        return new GivenOperator(
                "columns",
                PositiveOperator.ofFactor(Operator.of(m.re(), m.im())),
                ReferenceOperator.ofColumns(m.re(), m.im()),
                text(m));
    }

    static GivenOperator ofKet(Matrix column) {
        int n = column.rows();
        double[] re = new double[n];
        double[] im = new double[n];
        for (int i = 0; i < n; i++) {
            re[i] = column.re()[i][0];
            im[i] = column.im()[i][0];
        }
        return new GivenOperator(
                "ket",
                DensityOperator.ofKet(re, im),
                ReferenceOperator.ofColumns(column.re(), column.im()),
                text(column));
    }

    static GivenOperator ofBloch(double x, double y, double z) {
        return new GivenOperator(
                "Bloch vector",
                DensityOperator.ofBloch(x, y, z),
                ReferenceOperator.ofBloch(x, y, z),
                Arrays.toString(new double[] {x, y, z}));
    }

    static GivenOperator ofDiagonal(double... p) {
        Matrix m = org.minorant.tests.Draw.diagonal(p);
        return new GivenOperator(
                "diagonal",
                PositiveOperator.ofEigenvalues(p),
                ReferenceOperator.ofEntries(m.re(), m.im()),
                Arrays.toString(p));
    }

    private static String text(Matrix m) {
        return "re " + Arrays.deepToString(m.re()) + " im " + Arrays.deepToString(m.im());
    }

    @Override
    public String toString() {
        return form + " " + data;
    }
}
