package org.minorant.core.pair;

import org.minorant.core.internal.number.WideDoubleDouble;

/** Puts all types of a few copies into {@link LikelihoodBins}. */
final class TypeBins implements TypeBox.Line {

    private static final double U = 0x1p-53;

    private final PowerTable innerX;
    private final PowerTable innerY;
    private final PowerTable lastX;
    private final PowerTable lastY;
    private final double q;
    private final double step;
    private final long stride;
    private final long first;
    private final long scale;
    private final PowerTable powers;
    private final double[][] lists;

    private TypeBins(TypeBox box, double q, long stride, long first, int size, long scale) {
        int k = box.letters();
        innerX = box.firstOf(k - 2);
        innerY = box.secondOf(k - 2);
        lastX = box.firstOf(k - 1);
        lastY = box.secondOf(k - 1);
        this.q = q;
        this.stride = stride;
        this.step = Math.pow(q, stride);
        this.first = first;
        this.scale = scale;
        // q^(stride i) for the distance i from the middle of the grid
        long far = Math.max(Math.abs(first), Math.abs(first + size));
        powers = PowerTable.powers(Letters.wide(q).power((int) stride), 0, (int) far);
        lists = new double[3][size];
    }

    /** All types of m copies on the grid of the given base and stride. */
    static LikelihoodBins of(Letters letters, int m, double q, long stride) {
        int k = letters.count();
        int[] from = new int[k];
        int[] to = new int[k];
        java.util.Arrays.fill(to, m);
        double least = Double.POSITIVE_INFINITY;
        double most = Double.NEGATIVE_INFINITY;
        double overlap = 0;
        for (int i = 0; i < k; i++) {
            double x = Letters.ln(letters.first().get(i));
            double y = Letters.ln(letters.second().get(i));
            least = Math.min(least, y - x);
            most = Math.max(most, y - x);
        }
        double top = overlapExponent(letters);
        for (int i = 0; i < k; i++) {
            double x = Letters.ln(letters.first().get(i));
            double y = Letters.ln(letters.second().get(i));
            overlap += Math.exp((x + y) / 2 - top);
        }
        double lnOverlap = m * (top + Math.log(overlap));
        TypeBox box = TypeBox.of(
                m,
                from,
                to,
                (i, lo, hi) -> PowerTable.scaledPowers(letters.first().get(i), lo, hi),
                (i, lo, hi) -> PowerTable.scaledPowers(letters.second().get(i), lo, hi));
        double width = 2 * Math.log(q) * stride;
        long first = (long) Math.floor(m * least / width) - 1;
        int size = (int) ((long) Math.ceil(m * most / width) - first) + 3;
        TypeBins t = new TypeBins(box, q, stride, first, size, (long) Math.ceil(lnOverlap / Math.log(2)));
        WideDoubleDouble multinomial = Factorials.of(m);
        for (int i = box.outerFrom(); i <= box.outerTo(); i++) {
            box.lines(
                    i,
                    multinomial.significand().hi(),
                    multinomial.exponent(),
                    multinomial.significand().hi(),
                    multinomial.exponent(),
                    t);
        }
        double types = TypeBox.count(m, from, to);
        double error = (2 * k + 24 + types) * U + m * letters.relativeError();
        // types scaled to zero are below 2^-890 of Σ √(xy) each
        return new LikelihoodBins(q, stride, first, t.lists, t.scale, error, types * 0x1p-880);
    }

    private static double overlapExponent(Letters letters) {
        double top = Double.NEGATIVE_INFINITY;
        for (int i = 0; i < letters.count(); i++) {
            top = Math.max(
                    top,
                    (Letters.ln(letters.first().get(i))
                                    + Letters.ln(letters.second().get(i)))
                            / 2);
        }
        return top;
    }

    @Override
    public void visit(int m, int from, int to, double a, long ea, double b, long eb) {
        double width = 2 * Math.log(q) * stride;
        double ln2 = Math.log(2);
        for (int k = from; k <= to; k++) {
            int i = k - innerX.from;
            int j = m - k - lastX.from;
            double x = a * innerX.significand[i] * lastX.significand[j];
            double y = b * innerY.significand[i] * lastY.significand[j];
            long ex = ea + innerX.exponent[i] + lastX.exponent[j];
            long ey = eb + innerY.exponent[i] + lastY.exponent[j];
            double ratio = Math.log(y / x) + (ey - ex) * ln2;
            long bin = (long) Math.floor(ratio / width);
            put(bin, x, ex, y, ey);
        }
    }

    private void put(long bin, double x, long ex, double y, long ey) {
        int p = (int) Math.abs(bin);
        double s = powers.significand[p];
        long e = powers.exponent[p];
        boolean negative = bin < 0;
        // u = x q^k, v = y q^(−k)
        double u = TypeBox.scaled(negative ? x / s : x * s, ex + (negative ? -e : e) - scale);
        double v = TypeBox.scaled(negative ? y * s : y / s, ey + (negative ? e : -e) - scale);
        int at = (int) (bin - first);
        lists[1][at] += u;
        lists[2][at] += v;
        // c + d/step = u, c + d step = v
        double d = Math.max(0, (v - u) / (step - 1 / step));
        double c = Math.max(0, u - d / step);
        double most = Math.max((c + d / step) / u, (c + d * step) / v);
        double fit = u > 0 && v > 0 && most > 1 ? 1 / most : 1;
        if (u > 0 && v > 0) {
            lists[0][at] += c * fit;
            lists[0][at + 1] += d * fit;
        }
    }
}
