package org.minorant.bounds.codes;

import java.util.Arrays;
import java.util.Optional;
import org.minorant.core.CertifiedSquareRoot;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Enclosure;

/**
 * The error of the pretty-good measurement for linear codes of kets that are alike: where inner products of letters depend on the difference of their symbols only, ⟨ψ_u|ψ_v⟩ = γ(v − u), so do those of words on the
 * difference of messages, and the characters of the group of messages diagonalise the Gram matrix:
 *
 * <pre>Γ(v) = Π_j γ((Av)_j),   λ_χ = Σ_v Γ(v) χ(v),   error = 1 − h² = (1/M) Σ_χ (√λ_χ − h)²,   h = (1/M) Σ_χ √λ_χ.</pre>
 *
 * <p>No matrix is formed, so that a million messages take seconds. Messages of equal words are counted once: with κ for each word, error = (κ − 1 + ε)/κ, ε that of the different words, which are a linear code, too.
 *
 * <p><b>Enclosure.</b> Each eigenvalue λ̂ computed is within δ of one of a matrix B with these characters: δ is (cs + 5n)u Σ_{v≠0}|Γ(v)|, with c = 1.5p + 24 for each of s digits (2 for p = 2). Roots of numbers that are not
 * negative differ by at most δ/(√λ̂ + √(λ̂ − δ)₊), and by at most √δ if λ̂ ≤ δ. Of two kets B is the Gram matrix A itself, and the rounding of γ is in δ. Otherwise A differs from B off the diagonal, by what the letters' inner products
 * differ from γ, and so it does from the positive part of B; {@link CertifiedSquareRoot#error(double[], double)} bounds what this does to the root. M · error is the square of the norm of what is left of the roots without their
 * mean, known up to these errors. All of them are in proportion to the entries off the diagonal: small errors keep their digits.
 */
final class CharacterSums {

    /** More messages are not tried. */
    static final int LARGEST = 1 << 22;

    /** Inner products of symbols are compared one by one. */
    private static final int SYMBOLS = 512;

    /** Letters that differ from γ by more, relatively or, where γ is nearly 0, absolutely, are not alike. */
    private static final double ALIKE = 0x1p-44;

    private static final int CHUNK = 1024;
    private static final double U = 0x1p-53;
    private static final double UP = 1 + 0x1p-40;

    private final FiniteField field;
    private final double[] re;
    private final double[] im;
    private final double relative;
    private final double absolute;
    private final boolean exact;
    private final int[][] generators;
    private final int copies;
    private final LetterColumns letters;
    private final Watch watch;
    private final int size;
    private final double[] sumRe;
    private final double[] sumIm;

    private CharacterSums(
            FiniteField field, Overlaps overlaps, int[][] generators, int copies, LetterColumns letters, Watch watch) {
        this.field = field;
        this.re = overlaps.re;
        this.im = overlaps.im;
        this.relative = overlaps.relative;
        this.absolute = overlaps.absolute;
        this.exact = overlaps.exact;
        this.generators = generators;
        this.copies = copies;
        this.letters = letters;
        this.watch = watch;
        this.size = power(field.characteristic(), generators.length);
        this.sumRe = new double[size];
        this.sumIm = new double[field.characteristic() == 2 ? 0 : size];
    }

    /** γ by the number of the difference, with what the letters differ from it; exact if they differ from some γ next to it by nothing. */
    private record Overlaps(double[] re, double[] im, double relative, double absolute, boolean exact) {}

    /**
     * Finds the structure.
     *
     * @param code a codebook
     * @param letters the letters' columns
     * @param watch asked for cancellation
     * @return the sums, if the codebook comes from one field, M is a power of its prime, and the letters are kets with inner products that depend on differences only
     */
    static Optional<CharacterSums> of(Codebook code, LetterColumns letters, Watch watch) {
        Optional<CodebookFamily> family = code.family();
        if (family.isEmpty() || family.get().maps().size() != 1) {
            return Optional.empty();
        }
        AffineMaps maps = family.get().maps().get(0);
        FiniteField field = maps.field();
        int p = field.characteristic();
        int digits = 0;
        long count = 1;
        while (count < code.messages()) {
            count *= p;
            digits++;
        }
        if (count != code.messages() || count > LARGEST || field.size() > SYMBOLS || p > 64) {
            return Optional.empty();
        }
        Optional<Overlaps> overlaps = overlaps(field, family.get().input(), letters);
        if (overlaps.isEmpty()) {
            return Optional.empty();
        }
        int[][] all = new int[digits][];
        for (int i = 0, message = 1; i < digits; i++, message *= p) {
            all[i] = maps.difference(code.coefficients().get(0), message);
        }
        int[][] independent = PrimeElimination.independent(all, field);
        int copies = power(p, digits - independent.length);
        return Optional.of(new CharacterSums(field, overlaps.get(), independent, copies, letters, watch));
    }

    /** Roundings of one digit of the transform: sums of p complex products, with roots of unity right to 17u; for p = 2 there are sums only. */
    private static double stage(int p) {
        return p == 2 ? 2 : 1.5 * p + 24;
    }

    /** The number of different words. */
    int size() {
        return size;
    }

    private static int power(int p, int e) {
        int r = 1;
        for (int i = 0; i < e; i++) {
            r *= p;
        }
        return r;
    }

    private static Optional<Overlaps> overlaps(FiniteField field, RationalInput input, LetterColumns letters) {
        int q = field.size();
        EnclosedMatrix g = letters.overlaps();
        // of two kets only the modulus of the inner product matters
        boolean two = input.letters() == 2;
        double[] re = new double[q];
        double[] im = new double[q];
        for (int w = 0; w < q; w++) {
            int x = input.letter(0);
            int y = input.letter(w);
            if (letters.rank(x) != 1 || letters.rank(y) != 1) {
                return Optional.empty();
            }
            int back = field.negative(w);
            boolean known = back < w;
            re[w] = known ? re[back] : two ? modulus(g, letters, x, y) : g.re(letters.offset(x), letters.offset(y));
            im[w] = back == w || two ? 0 : known ? -im[back] : g.im(letters.offset(x), letters.offset(y));
        }
        // the entry on the diagonal is 1, and so is that of letters that are the same
        re[0] = 1;
        im[0] = 0;
        double[] off = new double[q];
        for (int u = 0; u < q; u++) {
            for (int w = 0; w < q; w++) {
                int x = input.letter(u);
                int y = input.letter(field.sum(u, w));
                int i = letters.offset(x);
                int j = letters.offset(y);
                boolean same = x == y;
                double real = same ? 1 : two ? modulus(g, letters, x, y) : g.re(i, j);
                double imaginary = same || two ? 0 : g.im(i, j);
                // what a double leaves out, the radius, and the rounding of a modulus
                double here = Math.hypot(real - re[w], imaginary - im[w])
                        + (same ? 0 : 4 * U * Math.hypot(real, imaginary) + g.radius(i, j));
                off[w] = Math.max(off[w], here * UP);
            }
        }
        double relative = 0;
        double absolute = 0;
        for (int w = 0; w < q; w++) {
            double size = Math.hypot(re[w], im[w]);
            if (off[w] <= ALIKE * size) {
                relative = Math.max(relative, off[w] / size * UP);
            } else {
                // as good as orthogonal, or not alike
                absolute = Math.max(absolute, (off[w] + size) * UP);
                re[w] = 0;
                im[w] = 0;
            }
        }
        return absolute <= ALIKE ? Optional.of(new Overlaps(re, im, relative, absolute, two)) : Optional.empty();
    }

    private static double modulus(EnclosedMatrix g, LetterColumns letters, int x, int y) {
        return Math.hypot(g.re(letters.offset(x), letters.offset(y)), g.im(letters.offset(x), letters.offset(y)));
    }

    Enclosure error() {
        int n = generators.length == 0 ? 0 : generators[0].length;
        fill(generators.length, 0, new int[n]);
        sumRe[0] = 0;
        if (sumIm.length != 0) {
            sumIm[0] = 0;
        }
        double moduli = 0;
        double squares = 0;
        for (int v = 0; v < size; v++) {
            double s = sumRe[v] * sumRe[v] + (sumIm.length == 0 ? 0 : sumIm[v] * sumIm[v]);
            moduli += Math.sqrt(s);
            squares += s;
        }
        // sums of so many terms, rounded up
        double up = UP * (1 + size * 2 * U);
        int p = field.characteristic();
        for (int i = 0, stride = 1; i < generators.length; i++, stride *= p) {
            transform(p, stride);
            watch.checkpoint();
        }
        double each = ((stage(p) * generators.length + 5.0 * n) * U * moduli + size * n * 0x1p-1060) * up;
        double letter = Math.expm1(n * Math.log1p(relative)) * UP;
        double nothing = n * (absolute + 0x1p-1060) * Math.exp(2 * n * ALIKE);
        // of two kets the matrix meant has the same characters, and what γ was rounded by is rounding, too
        double rounding = exact ? each + letter * moduli * up + size * nothing : each;
        double root = Math.sqrt(size);
        double distance = exact ? 0 : root * (letter * Math.sqrt(squares) * up + root * nothing) * UP;
        Enclosure words = words(rounding * UP, distance, n);
        return copies == 1 ? words : words.plus(Enclosure.exact(copies - 1.0)).dividedBy(Enclosure.exact(copies));
    }

    /**
     * The error of the different words, from λ − 1 in sumRe.
     *
     * @param rounding a bound on the error of each eigenvalue
     * @param distance what the matrix meant is from the one with these characters, in Frobenius norm
     */
    private Enclosure words(double rounding, double distance, int n) {
        double[] least = new double[size];
        double[] r = new double[size];
        double mean = 0;
        double sum = 0;
        double roots = 0;
        for (int v = 0; v < size; v++) {
            double e = Math.max(-1, sumRe[v]);
            // 1 + e is exact below −½ and right to 2u above
            double lambda = 1 + e;
            least[v] = Math.max(0, lambda * (1 - 4 * U) - rounding);
            double off = rounding / Math.max(Double.MIN_NORMAL, Math.sqrt(lambda) + Math.sqrt(least[v]));
            roots += Math.min(off * off, 2 * rounding);
            r[v] = e / (1 + Math.sqrt(lambda));
            mean += r[v];
            sum += Math.abs(r[v]);
        }
        mean /= size;
        Arrays.sort(least);
        double norm2 = 0;
        double square = 0;
        for (int from = 0; from < size; from += CHUNK) {
            double part = 0;
            double own = 0;
            for (int v = from; v < Math.min(size, from + CHUNK); v++) {
                part += (r[v] - mean) * (r[v] - mean);
                own += r[v] * r[v];
            }
            norm2 += part;
            square += own;
        }
        double roundedRoots = 8 * U * (Math.sqrt(square) + Math.sqrt(size) * Math.abs(mean)) * UP;
        double e = CertifiedSquareRoot.error(least, distance) * UP
                + Math.sqrt(roots) * (1 + size * U) * UP
                + size * 0x1p-500
                + roundedRoots
                + Math.sqrt(2.0 * size) * letters.wordError(n, 0) * UP;
        // the norm around another number than the mean, off by η, is larger by size · η²; what rounding may do to the
        // mean
        double eta = (size + 4.0) * U * (sum / size) * (1 + 1e-6);
        double lower = Math.max(0, norm2 - 2 * size * eta * eta);
        double relativeSum = (2.0 * CHUNK + 2.0 * size / CHUNK + 16) * U;
        Enclosure high = WordGram.squaredNorm(norm2, relativeSum, e, size);
        Enclosure low = WordGram.squaredNorm(lower, relativeSum, e, size);
        return Enclosure.of(low.lowerWide(), high.upperWide()).min(Enclosure.ONE);
    }

    /** Γ at all messages of which the digits from a given one on are chosen. */
    private void fill(int digit, int index, int[] difference) {
        if (digit == 0) {
            put(index, difference);
            return;
        }
        int p = field.characteristic();
        int stride = power(p, digit - 1);
        int[] d = difference.clone();
        for (int a = 0; a < p; a++) {
            fill(digit - 1, index + a * stride, d);
            for (int j = 0; j < d.length && a < p - 1; j++) {
                d[j] = field.sum(d[j], generators[digit - 1][j]);
            }
        }
        if (digit > 8) {
            watch.checkpoint();
        }
    }

    private void put(int index, int[] difference) {
        double x = 1;
        double y = 0;
        if (sumIm.length == 0) {
            for (int s : difference) {
                x *= re[s];
            }
        } else {
            for (int s : difference) {
                double t = x * re[s] - y * im[s];
                y = x * im[s] + y * re[s];
                x = t;
            }
            sumIm[index] = y;
        }
        sumRe[index] = x;
    }

    /** One digit of the transform, in place. */
    private void transform(int p, int stride) {
        double[] c = new double[p];
        double[] s = new double[p];
        for (int a = 0; a < p; a++) {
            c[a] = StrictMath.cos(2 * Math.PI * a / p);
            s[a] = StrictMath.sin(2 * Math.PI * a / p);
        }
        double[] x = new double[p];
        double[] y = new double[p];
        for (int block = 0; block < size; block += stride * p) {
            for (int i = block; i < block + stride; i++) {
                if (p == 2) {
                    double a = sumRe[i];
                    double b = sumRe[i + stride];
                    sumRe[i] = a + b;
                    sumRe[i + stride] = a - b;
                    continue;
                }
                for (int k = 0; k < p; k++) {
                    x[k] = 0;
                    y[k] = 0;
                    for (int a = 0; a < p; a++) {
                        int t = a * k % p;
                        double u = sumRe[i + a * stride];
                        double v = sumIm[i + a * stride];
                        x[k] += u * c[t] - v * s[t];
                        y[k] += u * s[t] + v * c[t];
                    }
                }
                for (int k = 0; k < p; k++) {
                    sumRe[i + k * stride] = x[k];
                    sumIm[i + k * stride] = y[k];
                }
            }
        }
    }
}
