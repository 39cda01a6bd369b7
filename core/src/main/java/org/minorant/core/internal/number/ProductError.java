package org.minorant.core.internal.number;

/**
 * The rounding error of a product: a·b = p + error(a, b, p) for p = fl(a·b), exactly unless something under- or overflows.
 *
 * <p><b>Why not always a fused multiply-add.</b> On a CPU without that instruction {@link Math#fma} goes through big decimals, some hundred
 * times slower than splitting the factors (Dekker, Numer. Math. 18, 224, 1971; Veltkamp's split; from memory). Both give the same bits, so
 * that whichever is chosen, results do not change. The choice is made once, when the class is loaded, by timing; the compiler then sees a
 * constant.
 */
public final class ProductError {

    /** Slower than this, in nanoseconds a call, is not an instruction, not even when interpreted. */
    private static final double SLOW = 400;

    private static final boolean FUSED = nanosecondsPerCall() < SLOW;

    private static final double SPLITTER = 0x1p27 + 1;

    /** Larger factors would overflow when split. */
    private static final double LARGE = 0x1p990;

    private ProductError() {}

    /** a · b − p, for p = fl(a · b). */
    public static double of(double a, double b, double p) {
        return FUSED ? Math.fma(a, b, -p) : bySplitting(a, b, p);
    }

    /** a − q · b for q near a / b: a number whose sign is that of the exact one. */
    public static double remainder(double a, double q, double b) {
        if (FUSED) {
            return Math.fma(-q, b, a);
        }
        double p = q * b;
        // the difference of neighbours is exact, and one rounding keeps the sign
        return (a - p) - bySplitting(q, b, p);
    }

    static double bySplitting(double a, double b, double p) {
        if (!(Math.abs(a) < LARGE && Math.abs(b) < LARGE)) {
            return Math.fma(a, b, -p);
        }
        double ca = SPLITTER * a;
        double ah = ca - (ca - a);
        double al = a - ah;
        double cb = SPLITTER * b;
        double bh = cb - (cb - b);
        double bl = b - bh;
        return al * bl - (((p - ah * bh) - al * bh) - ah * bl);
    }

    /** The least of a few timings, so that an interruption does not count. */
    private static double nanosecondsPerCall() {
        int calls = 40;
        double least = Double.POSITIVE_INFINITY;
        double x = 1 + 0x1p-30;
        for (int block = 0; block < 8; block++) {
            long start = System.nanoTime();
            for (int i = 0; i < calls; i++) {
                x = Math.fma(x, 1 - 0x1p-30, 0x1p-60);
            }
            least = Math.min(least, (double) (System.nanoTime() - start) / calls);
        }
        // x is used, so that the loop cannot be dropped
        return x > 0 ? least : SLOW;
    }
}
