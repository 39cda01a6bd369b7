package org.minorant.core;

import org.minorant.core.internal.number.DoubleDouble;

/**
 * Cyclic Jacobi rotations in double-double on a Hermitian matrix that is already nearly diagonal outside clusters of close
 * eigenvalues. Used for what a first-order correction cannot separate; trusted by nobody, see {@link EnclosedSpectrum}.
 */
final class JacobiSweeps {

    private static final int MOST_SWEEPS = 12;

    private final int n;
    private final DoubleDouble[][] re;
    private final DoubleDouble[][] im;
    private final DoubleDouble[][] vre;
    private final DoubleDouble[][] vim;

    private JacobiSweeps(EnclosedMatrix b, EnclosedMatrix v) {
        n = b.rows();
        re = new DoubleDouble[n][n];
        im = new DoubleDouble[n][n];
        vre = new DoubleDouble[n][n];
        vim = new DoubleDouble[n][n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                re[i][j] = new DoubleDouble(b.re(i, j), b.reTail(i, j));
                im[i][j] = new DoubleDouble(b.im(i, j), b.imTail(i, j));
                // vectors by column, so that a rotation works on two rows
                vre[j][i] = new DoubleDouble(v.re(i, j), v.reTail(i, j));
                vim[j][i] = new DoubleDouble(v.im(i, j), v.imTail(i, j));
            }
        }
    }

    /** Rotates until no entry above the threshold is left; returns the rotated vectors. */
    static EnclosedMatrix diagonalise(EnclosedMatrix b, EnclosedMatrix v, double threshold) {
        JacobiSweeps s = new JacobiSweeps(b, v);
        for (int sweep = 0; sweep < MOST_SWEEPS; sweep++) {
            if (!s.sweep(threshold)) {
                break;
            }
        }
        EnclosedMatrix.Builder w = EnclosedMatrix.builder(s.n, s.n);
        for (int i = 0; i < s.n; i++) {
            for (int j = 0; j < s.n; j++) {
                w.set(i, j, s.vre[j][i].hi(), s.vre[j][i].lo(), s.vim[j][i].hi(), s.vim[j][i].lo(), 0);
            }
        }
        return w.build();
    }

    private boolean sweep(double threshold) {
        boolean rotated = false;
        for (int p = 0; p < n - 1; p++) {
            for (int q = p + 1; q < n; q++) {
                if (Math.abs(re[p][q].hi()) + Math.abs(im[p][q].hi()) > threshold) {
                    rotate(p, q);
                    rotated = true;
                }
            }
        }
        return rotated;
    }

    private void rotate(int p, int q) {
        DoubleDouble x = re[p][q];
        DoubleDouble y = im[p][q];
        DoubleDouble modulus = modulus(x, y);
        DoubleDouble tau = re[q][q].minus(re[p][p]).dividedBy(modulus.times(2));
        DoubleDouble root = modulus(DoubleDouble.ONE, tau);
        DoubleDouble sign = DoubleDouble.of(tau.hi() >= 0 ? 1 : -1);
        DoubleDouble t = sign.dividedBy(tau.times(sign).plus(root));
        DoubleDouble c = DoubleDouble.ONE.dividedBy(modulus(DoubleDouble.ONE, t));
        DoubleDouble s = t.times(c);
        DoubleDouble sx = s.times(x).dividedBy(modulus);
        DoubleDouble sy = s.times(y).dividedBy(modulus);
        // columns: p' = c p − s e^{-iφ} q,  q' = s e^{iφ} p + c q; rows are their conjugates, since B is Hermitian
        mix(vre[p], vim[p], vre[q], vim[q], c, sx, sy);
        DoubleDouble shift = t.times(modulus);
        DoubleDouble pp = re[p][p].minus(shift);
        DoubleDouble qq = re[q][q].plus(shift);
        mix(re[p], im[p], re[q], im[q], c, sx, sy.negate());
        for (int k = 0; k < n; k++) {
            re[k][p] = re[p][k];
            im[k][p] = im[p][k].negate();
            re[k][q] = re[q][k];
            im[k][q] = im[q][k].negate();
        }
        re[p][p] = pp;
        re[q][q] = qq;
        im[p][p] = im[q][q] = re[p][q] = re[q][p] = im[p][q] = im[q][p] = DoubleDouble.ZERO;
    }

    private static DoubleDouble modulus(DoubleDouble x, DoubleDouble y) {
        double scale = Math.max(Math.abs(x.hi()), Math.abs(y.hi()));
        double f = Math.scalb(1.0, -Math.getExponent(scale));
        DoubleDouble a = x.times(f);
        DoubleDouble b = y.times(f);
        return a.times(a).plus(b.times(b)).sqrt().times(1 / f);
    }

    /** (u, w) becomes (c u − (sx − i sy) w, (sx + i sy) u + c w), entry by entry. */
    private static void mix(
            DoubleDouble[] ur,
            DoubleDouble[] ui,
            DoubleDouble[] wr,
            DoubleDouble[] wi,
            DoubleDouble c,
            DoubleDouble sx,
            DoubleDouble sy) {
        for (int k = 0; k < ur.length; k++) {
            DoubleDouble a = ur[k];
            DoubleDouble b = ui[k];
            DoubleDouble d = wr[k];
            DoubleDouble e = wi[k];
            ur[k] = c.times(a).minus(sx.times(d).plus(sy.times(e)));
            ui[k] = c.times(b).minus(sx.times(e).minus(sy.times(d)));
            wr[k] = c.times(d).plus(sx.times(a).minus(sy.times(b)));
            wi[k] = c.times(e).plus(sx.times(b).plus(sy.times(a)));
        }
    }
}
