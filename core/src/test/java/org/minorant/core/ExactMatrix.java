package org.minorant.core;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;
import java.util.Arrays;

/**
 * A real matrix of decimals with 110 digits, as an oracle. A complex matrix A + iB stands in here as the real one ((A, −B), (B, A)): products, sums and adjoints
 * agree, eigenvalues occur twice as often.
 */
final class ExactMatrix {

    static final MathContext MC = new MathContext(110, RoundingMode.HALF_EVEN);

    final int rows;
    final int columns;
    final BigDecimal[][] a;

    ExactMatrix(int rows, int columns) {
        this.rows = rows;
        this.columns = columns;
        this.a = new BigDecimal[rows][columns];
        for (BigDecimal[] row : a) {
            Arrays.fill(row, BigDecimal.ZERO);
        }
    }

    /** The entries, exactly. */
    static ExactMatrix of(Operator m) {
        return of(EnclosedMatrix.of(m));
    }

    /** The midpoints, exactly. */
    static ExactMatrix of(EnclosedMatrix m) {
        ExactMatrix x = new ExactMatrix(2 * m.rows(), 2 * m.columns());
        for (int i = 0; i < m.rows(); i++) {
            for (int j = 0; j < m.columns(); j++) {
                BigDecimal re = new BigDecimal(m.re(i, j)).add(new BigDecimal(m.reTail(i, j)));
                BigDecimal im = new BigDecimal(m.im(i, j)).add(new BigDecimal(m.imTail(i, j)));
                x.setComplex(i, j, re, im);
            }
        }
        return x;
    }

    void setComplex(int i, int j, BigDecimal re, BigDecimal im) {
        a[i][j] = re;
        a[i + rows / 2][j + columns / 2] = re;
        a[i + rows / 2][j] = im;
        a[i][j + columns / 2] = im.negate();
    }

    static ExactMatrix identity(int n) {
        ExactMatrix x = new ExactMatrix(n, n);
        for (int i = 0; i < n; i++) {
            x.a[i][i] = BigDecimal.ONE;
        }
        return x;
    }

    ExactMatrix times(ExactMatrix o) {
        ExactMatrix x = new ExactMatrix(rows, o.columns);
        for (int i = 0; i < rows; i++) {
            for (int k = 0; k < columns; k++) {
                if (a[i][k].signum() != 0) {
                    for (int j = 0; j < o.columns; j++) {
                        if (o.a[k][j].signum() != 0) {
                            x.a[i][j] = x.a[i][j].add(a[i][k].multiply(o.a[k][j]), MC);
                        }
                    }
                }
            }
        }
        return x;
    }

    ExactMatrix plus(ExactMatrix o) {
        return combine(o, BigDecimal.ONE);
    }

    ExactMatrix minus(ExactMatrix o) {
        return combine(o, BigDecimal.ONE.negate());
    }

    private ExactMatrix combine(ExactMatrix o, BigDecimal w) {
        ExactMatrix x = new ExactMatrix(rows, columns);
        for (int i = 0; i < rows; i++) {
            for (int j = 0; j < columns; j++) {
                x.a[i][j] = a[i][j].add(w.multiply(o.a[i][j]), MC);
            }
        }
        return x;
    }

    ExactMatrix times(BigDecimal w) {
        ExactMatrix x = new ExactMatrix(rows, columns);
        for (int i = 0; i < rows; i++) {
            for (int j = 0; j < columns; j++) {
                x.a[i][j] = a[i][j].multiply(w, MC);
            }
        }
        return x;
    }

    ExactMatrix adjoint() {
        ExactMatrix x = new ExactMatrix(columns, rows);
        for (int i = 0; i < rows; i++) {
            for (int j = 0; j < columns; j++) {
                x.a[j][i] = a[i][j];
            }
        }
        return x;
    }

    /** X X*. */
    ExactMatrix squared() {
        return times(adjoint());
    }

    /** The complex trace, which is real for Hermitian matrices. */
    BigDecimal trace() {
        BigDecimal s = BigDecimal.ZERO;
        for (int i = 0; i < rows / 2; i++) {
            s = s.add(a[i][i], MC);
        }
        return s;
    }

    /** Eigenvalues of a symmetric matrix, in no order, each complex one twice; vectors in the columns of v if it is given. */
    BigDecimal[] eigenvalues(ExactMatrix v) {
        return new FixedPointJacobi(this).run(v);
    }

    BigDecimal[] eigenvalues() {
        return eigenvalues(null);
    }

    /** Whether a symmetric matrix with positive diagonal is positive definite beyond doubt, decided at unit diagonal. */
    boolean isPositiveDefinite() {
        for (int i = 0; i < rows; i++) {
            if (a[i][i].signum() <= 0) {
                return false;
            }
        }
        for (BigDecimal x : scaledBy(this).eigenvalues()) {
            if (x.compareTo(new BigDecimal("1e-60")) < 0) {
                return false;
            }
        }
        return true;
    }

    /** The positive part of a symmetric matrix. */
    ExactMatrix positivePart() {
        ExactMatrix v = identity(rows);
        BigDecimal[] values = eigenvalues(v);
        ExactMatrix scaled = new ExactMatrix(rows, rows);
        for (int i = 0; i < rows; i++) {
            for (int j = 0; j < rows; j++) {
                scaled.a[i][j] = v.a[i][j].multiply(values[j].max(BigDecimal.ZERO), MC);
            }
        }
        return scaled.times(v.adjoint());
    }

    /** The trace of the negative part, of the complex matrix. */
    BigDecimal negativeTrace() {
        BigDecimal s = BigDecimal.ZERO;
        for (BigDecimal x : eigenvalues()) {
            s = s.add(x.negate().max(BigDecimal.ZERO), MC);
        }
        return s.divide(BigDecimal.valueOf(2), MC);
    }

    /** The trace norm of the complex matrix, if it is Hermitian. */
    BigDecimal traceNorm() {
        BigDecimal s = BigDecimal.ZERO;
        for (BigDecimal x : eigenvalues()) {
            s = s.add(x.abs(), MC);
        }
        return s.divide(BigDecimal.valueOf(2), MC);
    }

    /** D M D with powers of ten near 1/√s_ii, which brings a positive s to a diagonal near one; rows where s vanishes are left alone. */
    ExactMatrix scaledBy(ExactMatrix s) {
        ExactMatrix x = new ExactMatrix(rows, columns);
        int[] d = new int[rows];
        for (int i = 0; i < rows; i++) {
            BigDecimal v = s.a[i][i];
            d[i] = v.signum() > 0 ? Math.floorDiv(v.scale() - v.precision(), 2) : 0;
        }
        for (int i = 0; i < rows; i++) {
            for (int j = 0; j < columns; j++) {
                x.a[i][j] = a[i][j].scaleByPowerOfTen(d[i] + d[j]);
            }
        }
        return x;
    }

    BigDecimal largest() {
        BigDecimal most = BigDecimal.ZERO;
        for (BigDecimal[] row : a) {
            for (BigDecimal v : row) {
                most = most.max(v.abs());
            }
        }
        return most;
    }

    /** The Kronecker product of two complex matrices. */
    static ExactMatrix tensor(ExactMatrix p, ExactMatrix q) {
        int pr = p.rows / 2;
        int pc = p.columns / 2;
        int qr = q.rows / 2;
        int qc = q.columns / 2;
        ExactMatrix x = new ExactMatrix(2 * pr * qr, 2 * pc * qc);
        for (int i = 0; i < pr; i++) {
            for (int j = 0; j < pc; j++) {
                BigDecimal re = p.a[i][j];
                BigDecimal im = p.a[i + pr][j];
                for (int k = 0; k < qr; k++) {
                    for (int l = 0; l < qc; l++) {
                        BigDecimal u = q.a[k][l];
                        BigDecimal w = q.a[k + qr][l];
                        x.setComplex(
                                i * qr + k,
                                j * qc + l,
                                re.multiply(u, MC).subtract(im.multiply(w, MC), MC),
                                re.multiply(w, MC).add(im.multiply(u, MC), MC));
                    }
                }
            }
        }
        return x;
    }

    /** The complex matrix with rows and columns taken from these indices. */
    ExactMatrix select(int[] indices) {
        int m = indices.length;
        ExactMatrix x = new ExactMatrix(2 * m, 2 * m);
        for (int i = 0; i < m; i++) {
            for (int j = 0; j < m; j++) {
                x.setComplex(i, j, a[indices[i]][indices[j]], a[indices[i] + rows / 2][indices[j]]);
            }
        }
        return x;
    }
}
