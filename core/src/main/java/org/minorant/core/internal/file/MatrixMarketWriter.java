package org.minorant.core.internal.file;

import java.io.IOException;
import org.minorant.core.HermitianOperator;
import org.minorant.core.MatrixMarketLayout;
import org.minorant.core.Operator;
import org.minorant.core.internal.file.MatrixMarketHeader.Field;
import org.minorant.core.internal.file.MatrixMarketHeader.Symmetry;

/** Writes an operator as Matrix Market text that reads back to the same bits. */
public final class MatrixMarketWriter {

    private final Appendable out;
    private final Operator a;
    private final MatrixMarketHeader header;

    private MatrixMarketWriter(Appendable out, Operator a, MatrixMarketLayout layout) {
        this.out = out;
        this.a = a;
        this.header = new MatrixMarketHeader(layout, a.isReal() ? Field.REAL : Field.COMPLEX, symmetry(a));
    }

    /** Writes the operator in the layout. */
    public static void write(Appendable out, Operator a, MatrixMarketLayout layout) throws IOException {
        MatrixMarketWriter w = new MatrixMarketWriter(out, a, layout);
        out.append(w.header.text()).append('\n');
        if (layout == MatrixMarketLayout.ARRAY) {
            out.append(a.rows() + " " + a.columns() + "\n");
            w.entries(false);
        } else {
            out.append(a.rows() + " " + a.columns() + " " + w.stored() + "\n");
            w.entries(true);
        }
    }

    private static Symmetry symmetry(Operator a) {
        if (!(a instanceof HermitianOperator)) {
            return Symmetry.GENERAL;
        }
        return a.isReal() ? Symmetry.SYMMETRIC : Symmetry.HERMITIAN;
    }

    private boolean isStored(int i, int j) {
        return a.re(i, j) != 0 || a.im(i, j) != 0;
    }

    private int first(int j) {
        return header.isTriangular() ? j : 0;
    }

    private long stored() {
        long n = 0;
        for (int j = 0; j < a.columns(); j++) {
            for (int i = first(j); i < a.rows(); i++) {
                n += isStored(i, j) ? 1 : 0;
            }
        }
        return n;
    }

    private void entries(boolean coordinates) throws IOException {
        for (int j = 0; j < a.columns(); j++) {
            for (int i = first(j); i < a.rows(); i++) {
                if (coordinates && !isStored(i, j)) {
                    continue;
                }
                if (coordinates) {
                    out.append((i + 1) + " " + (j + 1) + " ");
                }
                out.append(Decimal.format(a.re(i, j)));
                if (!a.isReal()) {
                    out.append(' ').append(Decimal.format(a.im(i, j)));
                }
                out.append('\n');
            }
        }
    }
}
