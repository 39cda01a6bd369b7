package org.minorant.tests.reference;

import java.math.BigInteger;

/**
 * Eigenvalues, and if asked for eigenvectors, of a complex Hermitian matrix of norm at most 2: Householder reduction to tridiagonal form,
 * then QR steps with Wilkinson's shift (G. H. Golub and C. F. Van Loan, Matrix Computations, 4th ed., 8.3; from memory).
 *
 * <p><b>Error.</b> All transformations are unitary up to rounding, because what they are made from is scaled to full length first. One
 * transformation of n × n numbers below 2 makes errors of at most 40 n · 2^-bits in norm; there are fewer than 8 n² of them, and the
 * sum, together with what deflation drops, stays below 2^24 · 2^-bits for n ≤ 32 and below 2^35 · 2^-bits for n ≤ 400. {@link #GUARD} leaves the rest.
 */
final class FixedSpectrum {

    /** Eigenvalues, and positive parts in norm, are good to 2^(GUARD − bits). */
    static final int GUARD = 40;

    private static final int DEFLATION = 10;

    private final FixedPoint numbers;
    private final int n;
    private final BigInteger[] d;
    private final BigInteger[] e;
    /** Eigenvectors as columns, or null if they were not asked for. */
    private final FixedMatrix v;

    private FixedSpectrum(FixedMatrix a, boolean vectors) {
        numbers = a.numbers;
        n = a.n;
        v = vectors ? FixedMatrix.identity(numbers, n) : null;
        FixedMatrix t = a.copy();
        for (int k = 0; k + 2 < n; k++) {
            reflect(t, k);
        }
        d = new BigInteger[n];
        e = new BigInteger[n];
        for (int i = 0; i < n; i++) {
            d[i] = t.re[i][i];
            e[i] = BigInteger.ZERO;
        }
        if (n > 1) {
            straighten(t);
        }
        diagonalise();
    }

    static BigInteger[] values(FixedMatrix a) {
        return new FixedSpectrum(a, false).d;
    }

    /**
     * Eigenvalues and eigenvectors.
     *
     * @param values eigenvalues, in no order
     * @param vectors one column for each
     */
    record Decomposition(BigInteger[] values, FixedMatrix vectors) {}

    static Decomposition decomposition(FixedMatrix a) {
        FixedSpectrum s = new FixedSpectrum(a, true);
        return new Decomposition(s.d, s.v);
    }

    /** Σ max(λ, 0) vv*. */
    static FixedMatrix positivePart(FixedMatrix a) {
        FixedSpectrum s = new FixedSpectrum(a, true);
        int n = a.n;
        FixedMatrix p = new FixedMatrix(a.numbers, n);
        for (int i = 0; i < n; i++) {
            for (int j = 0; j <= i; j++) {
                BigInteger r = BigInteger.ZERO;
                BigInteger m = BigInteger.ZERO;
                for (int k = 0; k < n; k++) {
                    if (s.d[k].signum() > 0) {
                        BigInteger x = s.numbers.times(s.d[k], s.v.re[i][k]);
                        BigInteger y = s.numbers.times(s.d[k], s.v.im[i][k]);
                        r = r.add(x.multiply(s.v.re[j][k])).add(y.multiply(s.v.im[j][k]));
                        m = m.add(y.multiply(s.v.re[j][k])).subtract(x.multiply(s.v.im[j][k]));
                    }
                }
                p.setHermitian(i, j, r.shiftRight(s.numbers.bits()), m.shiftRight(s.numbers.bits()));
            }
        }
        return p;
    }

    /** Reflects column k of t so that it vanishes below row k + 1. */
    private void reflect(FixedMatrix t, int k) {
        int first = k + 1;
        int length = 0;
        for (int i = first; i < n; i++) {
            length = Math.max(length, Math.max(t.re[i][k].bitLength(), t.im[i][k].bitLength()));
        }
        boolean done = true;
        for (int i = first + 1; i < n; i++) {
            done &= t.re[i][k].signum() == 0 && t.im[i][k].signum() == 0;
        }
        if (done) {
            return;
        }
        // scaled up, exactly, so that the largest part is near one and the reflection keeps its digits
        int shift = Math.max(0, numbers.bits() - length);
        BigInteger[] x = new BigInteger[n];
        BigInteger[] y = new BigInteger[n];
        BigInteger square = BigInteger.ZERO;
        for (int i = first; i < n; i++) {
            x[i] = t.re[i][k].shiftLeft(shift);
            y[i] = t.im[i][k].shiftLeft(shift);
            square = square.add(x[i].multiply(x[i])).add(y[i].multiply(y[i]));
        }
        BigInteger norm = square.sqrt();
        // the head may be far below the rest: its phase is found on another scale, or v would not fit its norm
        int headLength = Math.max(x[first].bitLength(), y[first].bitLength());
        int more = Math.max(0, numbers.bits() - headLength);
        BigInteger hx = x[first].shiftLeft(more);
        BigInteger hy = y[first].shiftLeft(more);
        BigInteger size = hx.multiply(hx).add(hy.multiply(hy)).sqrt();
        BigInteger head = size.shiftRight(more);
        // v = x + (x₀/|x₀|)‖x‖e₀, of squared norm 2‖x‖(‖x‖ + |x₀|)
        if (size.signum() == 0) {
            x[first] = norm;
        } else {
            x[first] = x[first].add(hx.multiply(norm).divide(size));
            y[first] = y[first].add(hy.multiply(norm).divide(size));
        }
        BigInteger half = numbers.times(norm, norm.add(head));
        apply(t, first, x, y, half);
    }

    /** t := HtH and v := vH with H = 1 − (ww*)/half, w = x + iy from row first on. */
    private void apply(FixedMatrix t, int first, BigInteger[] x, BigInteger[] y, BigInteger half) {
        int rows = v == null ? n : 2 * n;
        for (int side = 0; side < 2; side++) {
            // from the right on rows of t (and of v, once), then the same on the adjoint
            for (int i = 0; i < (side == 0 ? rows : n); i++) {
                BigInteger[] r = i < n ? t.re[i] : v.re[i - n];
                BigInteger[] m = i < n ? t.im[i] : v.im[i - n];
                BigInteger p = BigInteger.ZERO;
                BigInteger q = BigInteger.ZERO;
                for (int j = first; j < n; j++) {
                    p = p.add(r[j].multiply(x[j])).subtract(m[j].multiply(y[j]));
                    q = q.add(r[j].multiply(y[j])).add(m[j].multiply(x[j]));
                }
                p = p.divide(half);
                q = q.divide(half);
                for (int j = first; j < n; j++) {
                    r[j] = r[j].subtract(numbers.times(p, x[j])).subtract(numbers.times(q, y[j]));
                    m[j] = m[j].subtract(numbers.times(q, x[j])).add(numbers.times(p, y[j]));
                }
            }
            adjoin(t);
        }
    }

    private void adjoin(FixedMatrix t) {
        for (int i = 0; i < n; i++) {
            t.im[i][i] = t.im[i][i].negate();
            for (int j = 0; j < i; j++) {
                BigInteger r = t.re[i][j];
                BigInteger m = t.im[i][j];
                t.re[i][j] = t.re[j][i];
                t.im[i][j] = t.im[j][i].negate();
                t.re[j][i] = r;
                t.im[j][i] = m.negate();
            }
        }
    }

    /** Makes the subdiagonal real by phases, which go into the vectors. */
    private void straighten(FixedMatrix t) {
        BigInteger pr = numbers.one();
        BigInteger pi = BigInteger.ZERO;
        for (int k = 0; k + 1 < n; k++) {
            BigInteger x = t.re[k + 1][k];
            BigInteger y = t.im[k + 1][k];
            int shift = Math.max(0, numbers.bits() - Math.max(x.bitLength(), y.bitLength()));
            BigInteger sx = x.shiftLeft(shift);
            BigInteger sy = y.shiftLeft(shift);
            BigInteger size = sx.multiply(sx).add(sy.multiply(sy)).sqrt();
            e[k] = size.shiftRight(shift);
            if (size.signum() != 0) {
                // the phase of column k+1 is that of column k times x/|x|
                BigInteger cr = numbers.dividedBy(sx, size);
                BigInteger ci = numbers.dividedBy(sy, size);
                BigInteger qr = numbers.times(pr, cr).subtract(numbers.times(pi, ci));
                pi = numbers.times(pr, ci).add(numbers.times(pi, cr));
                pr = qr;
            }
            for (int i = 0; v != null && i < n; i++) {
                BigInteger r = v.re[i][k + 1];
                BigInteger m = v.im[i][k + 1];
                v.re[i][k + 1] = numbers.times(r, pr).subtract(numbers.times(m, pi));
                v.im[i][k + 1] = numbers.times(r, pi).add(numbers.times(m, pr));
            }
        }
    }

    private void diagonalise() {
        int top = n - 1;
        int steps = 0;
        while (top > 0) {
            int low = top;
            while (low > 0 && !isNegligible(e[low - 1])) {
                low--;
            }
            if (low == top) {
                top--;
            } else {
                step(low, top);
                if (++steps > 60 * n) {
                    throw new IllegalStateException("no convergence in " + steps + " steps at dimension " + n);
                }
            }
        }
    }

    private static boolean isNegligible(BigInteger offDiagonal) {
        return offDiagonal.bitLength() <= DEFLATION;
    }

    /**
     * One step T − σ = QR, T := RQ + σ on rows low..top, with σ the eigenvalue of the last 2 × 2 block nearer to its corner. The shift is
     * subtracted, not chased down as a bulge: a bulge below 2^-bits would be lost, and with it the convergence.
     */
    private void step(int low, int top) {
        BigInteger shift = shift(top);
        BigInteger x = d[low].subtract(shift);
        BigInteger y = e[low];
        BigInteger cBefore = numbers.one();
        BigInteger sBefore = BigInteger.ZERO;
        for (int k = low; k < top; k++) {
            BigInteger z = e[k];
            int scale = Math.max(0, numbers.bits() - Math.max(x.bitLength(), z.bitLength()));
            BigInteger sx = x.shiftLeft(scale);
            BigInteger sz = z.shiftLeft(scale);
            BigInteger size = sx.multiply(sx).add(sz.multiply(sz)).sqrt();
            BigInteger c = size.signum() == 0 ? numbers.one() : numbers.dividedBy(sx, size);
            BigInteger s = size.signum() == 0 ? BigInteger.ZERO : numbers.dividedBy(sz, size);
            BigInteger r = size.shiftRight(scale);
            BigInteger next = d[k + 1].subtract(shift);
            BigInteger beside = numbers.times(c, y).add(numbers.times(s, next));
            x = numbers.times(c, next).subtract(numbers.times(s, y));
            y = numbers.times(c, e[k + 1]);
            d[k] = numbers.times(numbers.times(c, cBefore), r)
                    .add(numbers.times(s, beside))
                    .add(shift);
            if (k > low) {
                e[k - 1] = numbers.times(sBefore, r);
            }
            cBefore = c;
            sBefore = s;
            rotate(k, c, s);
        }
        d[top] = numbers.times(cBefore, x).add(shift);
        e[top - 1] = numbers.times(sBefore, x);
    }

    private BigInteger shift(int top) {
        BigInteger gap = d[top - 1].subtract(d[top]);
        BigInteger off = e[top - 1];
        BigInteger root = gap.multiply(gap).add(off.multiply(off).shiftLeft(2)).sqrt();
        BigInteger far = gap.signum() < 0 ? gap.subtract(root) : gap.add(root);
        return far.signum() == 0
                ? d[top].subtract(off)
                : d[top].subtract(off.multiply(off).shiftLeft(1).divide(far));
    }

    private void rotate(int k, BigInteger c, BigInteger s) {
        for (int i = 0; v != null && i < n; i++) {
            BigInteger a = v.re[i][k];
            BigInteger b = v.re[i][k + 1];
            v.re[i][k] = numbers.times(c, a).add(numbers.times(s, b));
            v.re[i][k + 1] = numbers.times(c, b).subtract(numbers.times(s, a));
            a = v.im[i][k];
            b = v.im[i][k + 1];
            v.im[i][k] = numbers.times(c, a).add(numbers.times(s, b));
            v.im[i][k + 1] = numbers.times(c, b).subtract(numbers.times(s, a));
        }
    }
}
