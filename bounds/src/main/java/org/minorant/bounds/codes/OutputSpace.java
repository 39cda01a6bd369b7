package org.minorant.bounds.codes;

import java.util.Arrays;
import org.minorant.core.CertifiedSquareRoot;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Enclosure;
import org.minorant.core.HermitianOperator;
import org.minorant.core.Operator;

/**
 * The error of the pretty-good measurement from the sum S = ZZ* of the words' states, in the space of outputs, where that is smaller than the Gram matrix: H_ww = μ_w X_w* S^(-½) X_w.
 *
 * <p><b>Enclosure.</b> Let S ≈ ŨΛŨ* ({@link CertifiedSquareRoot}), T = Ũ Λ^(-½) Ũ* on the values from τ = λ_c on, C = S^½ and C' = T⁻¹ on its support, E = C − C'. With the polar form Z = CU, H = U*CU, and
 * Z*TZ = U*CTCU. As CTC − C = ΠE + EΠ − E + ETE with Π the projector of T, and ΠE + EΠ − E = ΠEΠ − (1−Π)E(1−Π),
 *
 * <pre>‖H − Z*TZ‖_F ≤ ‖E‖_F + ‖E‖_F²/√τ.</pre>
 *
 * <p>The diagonal blocks μ X*TX are computed from V*X. With d_k the distance of column k of V from that of Ũ, Σd_k² ≤ δ², and γ the rounding of V*X, row k of it is off by at most γ(1+δ) + d_k; by Cauchy and Schwarz a
 * block is off by at most 2μ(γ'Σ‖y_k‖/√λ_k + δ(Σ‖y_k‖²/λ_k)^½) and terms of second order. Only blocks on the diagonal are known: the error is one minus the success, and known absolutely: within some
 * 1e-14/√λ_0 where the sum, scaled to trace M, is not singular, and some 1e-7 where it is or nearly is.
 */
final class OutputSpace {

    /** Larger dimensions are not tried. */
    static final int LARGEST = 4096;

    /** More multiplications are not begun; some minutes. */
    static final double MULTIPLICATIONS = 0x1p41;

    /** Words whose states are summed before they join the sum. */
    private static final int GROUP = 64;

    private static final double U = 0x1p-53;
    private static final double UP = 1 + 0x1p-40;

    private final WordColumns words;
    private final Watch watch;
    private final int d;
    private final int dimension;
    private final boolean real;
    private final double[][] lettersRe;
    private final double[][] lettersIm;

    OutputSpace(WordColumns words, Watch watch) {
        this.words = words;
        this.watch = watch;
        EnclosedMatrix all = words.letters().columns();
        this.d = all.rows();
        this.dimension = (int) Math.pow(d, words.length());
        this.real = all.isReal();
        this.lettersRe = new double[all.columns()][d];
        this.lettersIm = new double[real ? 0 : all.columns()][d];
        for (int c = 0; c < all.columns(); c++) {
            for (int i = 0; i < d; i++) {
                lettersRe[c][i] = all.re(i, c);
                if (!real) {
                    lettersIm[c][i] = all.im(i, c);
                }
            }
        }
    }

    /** About how many multiplications it takes. */
    static double multiplications(WordColumns words, double dimension) {
        double m = 9 * dimension * dimension * dimension;
        for (int w = 0; w < words.size(); w++) {
            double r = words.rank(w);
            m += 2 * dimension * dimension + dimension * r * r;
        }
        return m;
    }

    Enclosure error() {
        double distance = 0;
        Tensor sum = new Tensor(dimension, dimension, real);
        Tensor part = new Tensor(dimension, dimension, real);
        int n = words.length();
        for (int w = 0; w < words.size(); w++) {
            part.add(state(w), words.shared(w));
            if (w % GROUP == GROUP - 1 || w == words.size() - 1) {
                sum.add(part, 1);
                part.clear();
            }
            watch.done(w + 1, 2L * words.size());
        }
        // an entry of a letter's state is off by (√2(d+2) + 1)u of the product of its rows' norms, that of a word by n
        // times as much and n products; joining the sum adds a rounding for each word of a group and for each group
        double depth = n * (1.5 * (d + 2) + 4) + 2 + GROUP + (double) words.size() / GROUP + 3;
        distance += depth * U * words.messages() * UP;
        CertifiedSquareRoot root = CertifiedSquareRoot.of(sum.hermitian(), distance);
        watch.checkpoint();
        return success(root).complement().clip(0, 1);
    }

    private Enclosure success(CertifiedSquareRoot root) {
        double[] values = root.values();
        int cut = bestCut(root, values);
        double tau = values[cut];
        double e = root.errorWithout(cut);
        double total = e + e / Math.sqrt(tau) * e;
        double rounded = 4 * U;
        total += Math.sqrt(2.0 * words.messages()) * words.letters().wordError(words.length(), rounded) * UP;
        Tensor vectors = Tensor.of(root.vectors(), cut);
        int n = words.length();
        double gamma = n * (1.5 * (d + 2) + 2) * U * (1 + root.defect()) * UP;
        double squares = 0;
        double blockErrors = 0;
        for (int w = 0; w < words.size(); w++) {
            Tensor y = contract(vectors, w);
            double mu = words.shared(w);
            double first = 0;
            double second = 0;
            double trace = 0;
            double[] scale = new double[y.columns];
            for (int k = 0; k < y.columns; k++) {
                double row = y.columnNorm2(k);
                double lambda = values[cut + k];
                double inverse = 1 / Math.sqrt(lambda);
                first += Math.sqrt(row) * inverse;
                second += row / lambda;
                trace += row * inverse;
                scale[k] = Math.sqrt(inverse);
            }
            Operator q = y.scaled(scale);
            Operator h = q.times(q.adjoint());
            double norm = 0;
            for (int i = 0; i < h.rows(); i++) {
                double rowSum = 0;
                for (int j = 0; j < h.columns(); j++) {
                    rowSum += h.re(i, j) * h.re(i, j) + h.im(i, j) * h.im(i, j);
                }
                norm += rowSum;
            }
            double delta = root.defect();
            double off = 2 * (gamma * first + delta * Math.sqrt(second))
                    + 2 * (y.columns * gamma * gamma + delta * delta) / Math.sqrt(tau)
                    + ((y.columns + 2) * 2 * U + 16 * U) * trace;
            // counted as μ^½ H_ww: the success of μ messages that share a word is ‖H_ww‖²/μ
            squares += mu * norm;
            blockErrors += mu * off * off;
            watch.done(words.size() + w + 1, 2L * words.size());
        }
        total += Math.sqrt(blockErrors);
        double relative = (2.0 * (dimension + words.size()) + 16) * U;
        return WordGram.squaredNorm(squares, relative, total * UP, words.messages());
    }

    /** The number of values to leave out for the least error. */
    private static int bestCut(CertifiedSquareRoot root, double[] values) {
        int best = values.length - 1;
        double least = Double.POSITIVE_INFINITY;
        // values of one decade differ little: a few in each are enough
        double last = 0;
        for (int c = 0; c < values.length; c++) {
            if (values[c] > 1.5 * last || c == values.length - 1) {
                last = values[c];
                double e = root.errorWithout(c);
                double total = e + e / Math.sqrt(values[c]) * e;
                if (total < least) {
                    least = total;
                    best = c;
                }
            }
        }
        return best;
    }

    /** X_w X_w* in full, letter by letter. */
    private Tensor state(int w) {
        Tensor s = Tensor.one(real);
        for (int x : words.word(w)) {
            s = s.kronecker(letter(x));
        }
        return s;
    }

    private Tensor letter(int x) {
        Tensor t = new Tensor(d, d, real);
        LetterColumns letters = words.letters();
        for (int c = letters.offset(x); c < letters.offset(x + 1); c++) {
            for (int i = 0; i < d; i++) {
                for (int j = 0; j < d; j++) {
                    t.re[i][j] += lettersRe[c][i] * lettersRe[c][j];
                    if (!real) {
                        t.re[i][j] += lettersIm[c][i] * lettersIm[c][j];
                        t.im[i][j] += lettersIm[c][i] * lettersRe[c][j] - lettersRe[c][i] * lettersIm[c][j];
                    }
                }
            }
        }
        return t;
    }

    /** X_w*V: each leg of the columns of V is met with the columns of its letter. */
    private Tensor contract(Tensor vectors, int w) {
        int[] word = words.word(w);
        LetterColumns letters = words.letters();
        Tensor t = vectors;
        // the first leg is contracted first; its index then goes last, so that after n steps all are in order
        for (int x : word) {
            int rank = letters.rank(x);
            int rest = t.rows() / d;
            Tensor next = new Tensor(rest * rank, t.columns, t.isReal() && real);
            for (int r = 0; r < rank; r++) {
                int c = letters.offset(x) + r;
                for (int i = 0; i < d; i++) {
                    double a = lettersRe[c][i];
                    double b = real ? 0 : -lettersIm[c][i];
                    for (int k = 0; k < rest; k++) {
                        next.addRow(k * rank + r, t, i * rest + k, a, b);
                    }
                }
            }
            t = next;
        }
        return t;
    }

    /** A matrix by rows that is filled step by step. */
    private static final class Tensor {

        private final double[][] re;
        private final double[][] im;
        private final int columns;

        Tensor(int rows, int columns, boolean real) {
            this.re = new double[rows][columns];
            this.im = new double[real ? 0 : rows][columns];
            this.columns = columns;
        }

        static Tensor one(boolean real) {
            Tensor t = new Tensor(1, 1, real);
            t.re[0][0] = 1;
            return t;
        }

        /** The columns from a given one on. */
        static Tensor of(Operator a, int from) {
            Tensor t = new Tensor(a.rows(), a.columns() - from, a.isReal());
            for (int i = 0; i < a.rows(); i++) {
                for (int j = from; j < a.columns(); j++) {
                    t.re[i][j - from] = a.re(i, j);
                    if (!a.isReal()) {
                        t.im[i][j - from] = a.im(i, j);
                    }
                }
            }
            return t;
        }

        int rows() {
            return re.length;
        }

        boolean isReal() {
            return im.length == 0;
        }

        void clear() {
            for (double[] row : re) {
                Arrays.fill(row, 0);
            }
            for (double[] row : im) {
                Arrays.fill(row, 0);
            }
        }

        void add(Tensor o, double weight) {
            for (int i = 0; i < re.length; i++) {
                axpy(re[i], weight, o.re[i]);
                if (!isReal()) {
                    axpy(im[i], weight, o.im[i]);
                }
            }
        }

        /** Adds (a + ib) times a row of another matrix to a row. */
        void addRow(int to, Tensor o, int from, double a, double b) {
            axpy(re[to], a, o.re[from]);
            if (!isReal()) {
                axpy(im[to], b, o.re[from]);
                if (!o.isReal()) {
                    axpy(re[to], -b, o.im[from]);
                    axpy(im[to], a, o.im[from]);
                }
            }
        }

        private static void axpy(double[] to, double a, double[] x) {
            for (int j = 0; j < to.length; j++) {
                to[j] += a * x[j];
            }
        }

        Tensor kronecker(Tensor o) {
            Tensor t = new Tensor(rows() * o.rows(), columns * o.columns, isReal());
            for (int i = 0; i < t.rows(); i++) {
                int p = i / o.rows();
                int q = i % o.rows();
                for (int j = 0; j < columns; j++) {
                    for (int k = 0; k < o.columns; k++) {
                        int at = j * o.columns + k;
                        t.re[i][at] = re[p][j] * o.re[q][k];
                        if (!isReal()) {
                            t.re[i][at] -= im[p][j] * o.im[q][k];
                            t.im[i][at] = re[p][j] * o.im[q][k] + im[p][j] * o.re[q][k];
                        }
                    }
                }
            }
            return t;
        }

        double columnNorm2(int k) {
            double s = 0;
            for (double[] row : re) {
                s += row[k] * row[k];
            }
            for (double[] row : im) {
                s += row[k] * row[k];
            }
            return s;
        }

        Operator scaled(double[] scale) {
            double[] r = new double[rows() * columns];
            double[] m = new double[isReal() ? 0 : r.length];
            for (int i = 0; i < rows(); i++) {
                for (int j = 0; j < columns; j++) {
                    r[i * columns + j] = scale[j] * re[i][j];
                    if (!isReal()) {
                        m[i * columns + j] = scale[j] * im[i][j];
                    }
                }
            }
            return Operator.ofRowMajor(rows(), columns, r, m);
        }

        /** The matrix, of which one triangle and its conjugate are taken. */
        HermitianOperator hermitian() {
            int n = rows();
            double[] r = new double[n * n];
            double[] m = new double[isReal() ? 0 : n * n];
            for (int i = 0; i < n; i++) {
                for (int j = 0; j <= i; j++) {
                    r[i * n + j] = re[i][j];
                    r[j * n + i] = re[i][j];
                    if (!isReal() && j < i) {
                        m[i * n + j] = im[i][j];
                        m[j * n + i] = -im[i][j];
                    }
                }
            }
            return HermitianOperator.of(Operator.ofRowMajor(n, n, r, m));
        }
    }
}
