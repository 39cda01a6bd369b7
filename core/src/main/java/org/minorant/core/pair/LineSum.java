package org.minorant.core.pair;

/**
 * Sums min(x, y) along lines of types, with the rounding errors of the sum carried along (Ogita, Rump, Oishi, SIAM J. Sci. Comput. 26, 1955, 2005: relative error 2^-53 + (m 2^-53)² for m positive
 * terms; from memory).
 */
final class LineSum implements TypeBox.Line {

    private final PowerTable innerX;
    private final PowerTable innerY;
    private final PowerTable lastX;
    private final PowerTable lastY;
    private final long scale;
    private final Effort effort;
    private double sum;
    private double carried;
    private int sinceCheck;

    LineSum(TypeBox box, long scale, Effort effort) {
        int k = box.letters();
        innerX = box.firstOf(k - 2);
        innerY = box.secondOf(k - 2);
        lastX = box.firstOf(k - 1);
        lastY = box.secondOf(k - 1);
        this.scale = scale;
        this.effort = effort;
    }

    @Override
    public void visit(int m, int from, int to, double a, long ea, double b, long eb) {
        sinceCheck += to - from + 1;
        if (sinceCheck > 100_000) {
            sinceCheck = 0;
            effort.checkpoint();
        }
        double s = sum;
        double c = carried;
        long ex = ea - scale;
        long ey = eb - scale;
        for (int k = from; k <= to; k++) {
            int i = k - innerX.from;
            int j = m - k - lastX.from;
            double x = a * innerX.significand[i] * lastX.significand[j];
            double y = b * innerY.significand[i] * lastY.significand[j];
            double term = Math.min(
                    TypeBox.scaled(x, ex + innerX.exponent[i] + lastX.exponent[j]),
                    TypeBox.scaled(y, ey + innerY.exponent[i] + lastY.exponent[j]));
            double t = s + term;
            double z = t - s;
            c += (s - (t - z)) + (term - z);
            s = t;
        }
        sum = s;
        carried = c;
    }

    double high() {
        return sum;
    }

    double low() {
        return carried;
    }
}
