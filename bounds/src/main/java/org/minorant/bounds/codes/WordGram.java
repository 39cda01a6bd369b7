package org.minorant.bounds.codes;

import java.util.Arrays;
import org.minorant.core.CertifiedSquareRoot;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;
import org.minorant.core.Enclosure;
import org.minorant.core.HermitianOperator;
import org.minorant.core.Operator;

/**
 * The error of the pretty-good measurement from the Gram matrix G = Z*Z of the columns of all words, scaled to about one: H = G^½. Its entries are products of inner products of letters, so
 * that the dimension of words does not matter, only how many columns there are.
 *
 * <p><b>Enclosure.</b> A matrix Ĥ with ‖H − Ĥ‖_F ≤ e. A sum of squared entries of H with weights between 0 and 1 is the square of a norm, and norms differ by at most e: it lies between (q − e)² and
 * (q + e)², q² the sum for Ĥ. Summing over pairs of different words keeps the digits of small errors; one minus the success, from the blocks on the diagonal, is intersected with it.
 *
 * <p><b>e</b> is the error of the root ({@link CertifiedSquareRoot}), to 30 digits for up to {@value #PRECISE} columns and in double for more; and √2 times the error of Z, as the map from Z to H is √2-Lipschitz (H. Araki, S.
 * Yamagami, Commun. Math. Phys. 81, 89, 1981, from memory).
 */
final class WordGram {

    /** Up to so many columns roots are taken to 30 digits. */
    static final int PRECISE = 256;

    /** More columns are not tried. */
    static final int LARGEST = 4096;

    /** Up to so many products of entries, 30 digits are carried; beyond, they would take longer than the root. */
    private static final double PRECISE_PRODUCTS = 0x1p26;

    private static final double U = 0x1p-53;
    private static final double UP = 1 + 0x1p-40;

    private final WordColumns words;
    private final Watch watch;
    private final int[] owners;
    private final int[][] columns;

    WordGram(WordColumns words, Watch watch) {
        this.words = words;
        this.watch = watch;
        this.owners = words.owners();
        this.columns = words.columns();
    }

    Enclosure error() {
        int n = columns.length;
        boolean precise = n <= PRECISE && (double) n * n * words.length() <= PRECISE_PRODUCTS;
        return precise ? precise() : inDouble();
    }

    /** What the errors of the letters do to H. */
    private double states() {
        return Math.sqrt(2.0 * words.messages()) * words.letters().wordError(words.length(), 0) * UP;
    }

    /** From a root in double. */
    Enclosure inDouble() {
        CertifiedSquareRoot root = rootInDouble();
        watch.checkpoint();
        HermitianOperator h = root.root();
        return sum(h, root.rootError() + states());
    }

    /** From a root of 30 digits. */
    Enclosure precise() {
        EnclosedMatrix g = gram();
        watch.checkpoint();
        EnclosedSpectrum s = EnclosedSpectrum.of(g);
        int n = s.dimension();
        double delta = s.defect();
        double most = Math.max(Math.abs(s.value(0)), Math.abs(s.value(n - 1)));
        double negative = 0;
        double[] values = new double[n];
        EnclosedMatrix.Builder roots = EnclosedMatrix.builder(n, n);
        for (int k = 0; k < n; k++) {
            values[k] = Math.max(0, s.value(k));
            negative += Math.max(0, -s.value(k));
            double root = Math.sqrt(values[k]);
            // one step of Newton's method: squared, within 2^-100 of the value
            double tail = root == 0 ? 0 : (Math.fma(-root, root, values[k]) + s.valueTail(k)) / (2 * root);
            roots.set(k, k, root, tail, 0, 0, 0);
        }
        double distance = (s.residual() + delta * (2 + delta) * most + negative + n * 0x1p-98 * most) * UP;
        EnclosedMatrix h = s.vectors().times(roots.build()).times(s.vectors().adjoint());
        double radii = h.minus(h.midpoint()).frobeniusUpper();
        double error = CertifiedSquareRoot.error(values, distance) * UP + delta * (2 + delta) * Math.sqrt(most) + radii;
        return sum(h.toOperator(), error * UP + states());
    }

    /** G to 30 digits: the entrywise product of what each position contributes. */
    private EnclosedMatrix gram() {
        int n = columns.length;
        EnclosedMatrix letters = words.letters().overlaps();
        EnclosedMatrix g = weights(n);
        for (int j = 0; j < words.length(); j++) {
            EnclosedMatrix.Builder b = EnclosedMatrix.builder(n, n);
            for (int r = 0; r < n; r++) {
                for (int c = 0; c < n; c++) {
                    int x = columns[r][j];
                    int y = columns[c][j];
                    b.set(
                            r,
                            c,
                            letters.re(x, y),
                            letters.reTail(x, y),
                            letters.im(x, y),
                            letters.imTail(x, y),
                            letters.radius(x, y));
                }
            }
            g = g.timesEntrywise(b.build());
            watch.checkpoint();
        }
        return g;
    }

    /** √(μ_v μ_w). */
    private EnclosedMatrix weights(int n) {
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(n, 1);
        for (int r = 0; r < n; r++) {
            double mu = words.shared(owners[r]);
            double root = Math.sqrt(mu);
            double tail = Math.fma(-root, root, mu) / (2 * root);
            b.set(r, 0, root, tail, 0, 0, tail == 0 ? 0 : root * 0x1p-101);
        }
        EnclosedMatrix roots = b.build();
        return roots.times(roots.adjoint());
    }

    /** G in double, row by row, and its root. */
    private CertifiedSquareRoot rootInDouble() {
        int n = columns.length;
        EnclosedMatrix letters = words.letters().overlaps();
        int size = letters.rows();
        double[][] gr = new double[size][size];
        double[][] gi = new double[size][size];
        double radius = 0;
        for (int x = 0; x < size; x++) {
            for (int y = 0; y < size; y++) {
                gr[x][y] = letters.re(x, y);
                gi[x][y] = letters.im(x, y);
                radius = Math.max(radius, letters.radius(x, y));
            }
        }
        boolean real = letters.isReal();
        double[] re = new double[n * n];
        double[] im = new double[real ? 0 : n * n];
        double[] root = new double[n];
        Arrays.setAll(root, r -> Math.sqrt(words.shared(owners[r])));
        int length = words.length();
        int[][] at = new int[length][n];
        for (int c = 0; c < n; c++) {
            for (int j = 0; j < length; j++) {
                at[j][c] = columns[c][j];
            }
        }
        double norm = 0;
        for (int r = 0; r < n; r++) {
            double[] p = new double[r + 1];
            double[] q = new double[real ? 0 : r + 1];
            for (int c = 0; c <= r; c++) {
                p[c] = root[r] * root[c];
            }
            for (int j = 0; j < length; j++) {
                int x = columns[r][j];
                if (real) {
                    multiply(p, gr[x], at[j]);
                } else {
                    multiply(p, q, gr[x], gi[x], at[j]);
                }
            }
            for (int c = 0; c <= r; c++) {
                re[r * n + c] = p[c];
                re[c * n + r] = p[c];
                norm += 2 * p[c] * p[c];
                if (!real) {
                    im[r * n + c] = c == r ? 0 : q[c];
                    im[c * n + r] = c == r ? 0 : -q[c];
                    norm += 2 * q[c] * q[c];
                }
            }
            watch.checkpoint();
        }
        // √5 u for a complex product and 2u for the factor's rounding at each position, 3u for the weights; the radii
        // of letters are absolute, other factors at most 1 + 2^-40
        double relative = (length * 5.0 + 8) * U;
        double most = 0;
        for (double v : root) {
            most = Math.max(most, v);
        }
        double off = (relative * Math.sqrt(norm) + n * (most * most * length * radius + length * 0x1p-1060)) * UP;
        Operator g = Operator.ofRowMajor(n, n, re, im);
        return CertifiedSquareRoot.of(HermitianOperator.of(g), off);
    }

    private static void multiply(double[] p, double[] g, int[] at) {
        for (int c = 0; c < p.length; c++) {
            p[c] *= g[at[c]];
        }
    }

    private static void multiply(double[] p, double[] q, double[] gr, double[] gi, int[] at) {
        for (int c = 0; c < p.length; c++) {
            double x = gr[at[c]];
            double y = gi[at[c]];
            double re = p[c] * x - q[c] * y;
            q[c] = p[c] * y + q[c] * x;
            p[c] = re;
        }
    }

    /** The weighted sums of squares of a matrix within e of H. */
    private Enclosure sum(Operator h, double e) {
        int n = h.rows();
        double wrong = 0;
        double right = 0;
        for (int i = 0; i < n; i++) {
            double off = 0;
            double own = 0;
            double mu = words.shared(owners[i]);
            for (int j = 0; j < n; j++) {
                double square = h.re(i, j) * h.re(i, j) + h.im(i, j) * h.im(i, j);
                if (owners[i] == owners[j]) {
                    own += square;
                } else {
                    off += square;
                }
            }
            wrong += off + (1 - 1 / mu) * own;
            right += own / mu;
        }
        // no term passes through more than 2n + 12 roundings; squares may underflow
        double relative = (2.0 * n + 16) * U;
        Enclosure error = squaredNorm(wrong, relative, e, words.messages());
        Enclosure success = squaredNorm(right, relative, e, words.messages());
        return error.intersect(success.complement().max(Enclosure.ZERO)).min(Enclosure.ONE);
    }

    /** The square of a norm that is known up to e, from the square computed, over the number of messages. */
    static Enclosure squaredNorm(double square, double relative, double e, int messages) {
        Enclosure norm = Enclosure.exact(square)
                .times(Enclosure.of(1 - relative, 1 + relative))
                .sqrt()
                .widen(e * UP + 0x1p-500)
                .max(Enclosure.ZERO);
        return norm.square().dividedBy(Enclosure.exact(messages));
    }
}
