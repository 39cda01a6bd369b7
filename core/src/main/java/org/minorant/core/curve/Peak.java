package org.minorant.core.curve;

/**
 * Where the supremum of F(t) − at is to be looked for next, from values of F that need not be certified.
 *
 * <p>Everything is relative to the highest node: x = ln(t/t₀), y = ln(F/F₀), heights in units of F₀ − at₀. Smooth peaks are found by interpolating y, a benign function
 * with slopes between 0 and 1; corners by crossing chords. Once the highest node is the peak as far as can be told, its neighbours are taken as near as the chords through
 * the three ask for: what chords leave open is of second order in that distance, what noise does to them of inverse first.
 */
final class Peak {

    private static final int NODES = 5;

    /** Below this spacing a parabola is as good, and less sensitive to noise. */
    private static final double NARROW = 1e-3;

    /** Above this spacing, in ln t, lines are crossed in logarithms. */
    private static final double WIDE = 4;

    private static final int BISECTIONS = 60;

    private final double[] x;
    private final double[] y;
    private final int best;
    private final double share;

    /**
     * Takes the nodes.
     *
     * @param x ln(t/t₀), ascending, 0 at the highest node
     * @param y ln(F/F₀); NaN where F is not known, but F ≤ at is
     * @param best the index of the highest node
     * @param share (F₀ − at₀)/F₀, positive
     */
    Peak(double[] x, double[] y, int best, double share) {
        this.x = x;
        this.y = y;
        this.best = best;
        this.share = share;
    }

    /** Whether there is a node on either side of the highest. */
    boolean isBracketed() {
        return best > 0 && best < x.length - 1;
    }

    /** How far the neighbour on the left is. */
    double left() {
        return -x[best - 1];
    }

    /** How far the neighbour on the right is. */
    double right() {
        return x[best + 1];
    }

    /** How far a node lies below the highest, in units of its height; 1 where F is not known. */
    private double drop(int i) {
        return Double.isNaN(y[i]) ? 1 : -(Math.expm1(y[i]) - (1 - share) * Math.expm1(x[i])) / share;
    }

    /** What the chords through the highest node and its neighbours leave open, in units of its height. */
    double gap() {
        double l = -Math.expm1(x[best - 1]);
        double r = Math.expm1(x[best + 1]);
        return Math.max(drop(best - 1) / l * r, drop(best + 1) / r * l);
    }

    /**
     * The next x to look at, strictly between the neighbours of the highest node; NaN if interpolation and chords lead nowhere new.
     *
     * @param target the gap to reach
     * @param corner whether to look for a corner first
     * @param reach 1, or more where neighbours taken near the highest node have turned out higher themselves
     */
    double next(double target, boolean corner, double reach) {
        double knee = corner && Math.max(left(), right()) > WIDE ? knee() : Double.NaN;
        if (inside(knee) && knee != 0) {
            return knee;
        }
        double vertex = vertex();
        double crossing = crossing();
        double v = inside(corner ? crossing : vertex) ? corner ? crossing : vertex : corner ? vertex : crossing;
        double widest = Math.max(left(), right());
        double near = Math.min(widest / 2, reach * spacing(target, widest));
        if (inside(v) && Math.abs(v) <= near / 2) {
            return right() > left() ? near : -near;
        }
        return beyond(v, Math.min(near, widest) / 8);
    }

    /** A point near a neighbour is moved away from it, so that it and the neighbour come to lie on either side of the peak. */
    private double beyond(double v, double least) {
        if (v < 0 && v + left() < left() / 8) {
            return Math.min(-left() / 8, v + Math.max(v + left(), least));
        }
        if (v > 0 && right() - v < right() / 8) {
            return Math.max(right() / 8, v - Math.max(right() - v, least));
        }
        return inside(v) ? v : Double.NaN;
    }

    /** Half way to the neighbour further away. */
    double halfWay() {
        return right() > left() ? right() / 2 : -left() / 2;
    }

    private boolean inside(double v) {
        return v > x[best - 1] && v < x[best + 1];
    }

    /** The distance of neighbours at which a smooth peak, known so far at the given distance, closes to the target. */
    private double spacing(double target, double widest) {
        double s = widest * Math.sqrt(0.7 * target / gap());
        // too close a neighbour would be indistinguishable
        return s > 0 ? Math.max(s, 0x1p-50) : widest / 2;
    }

    /** Where the interpolated F has the slope a. */
    private double vertex() {
        int most = Math.max(left(), right()) < NARROW ? 3 : NODES;
        for (int n = most; n >= 3; n -= 2) {
            double v = new Interpolation(x, y, best, n).steepness(1 - share, x[best - 1], x[best + 1], BISECTIONS);
            if (inside(v)) {
                return v;
            }
        }
        return Double.NaN;
    }

    /** Where the extended chords cross, on the side on which they leave more open. */
    private double crossing() {
        double[] right = crossing(best - 1, best, best + 1, best + 2);
        double[] left = crossing(best - 2, best - 1, best, best + 1);
        return right[1] > left[1] || Double.isNaN(left[1]) ? right[0] : left[0];
    }

    /** Where power laws through neighbouring nodes on either side cross, in the wider gap: where F turns from one to the other. */
    private double knee() {
        int k = left() > right() ? best - 2 : best - 1;
        if (k < 0 || k + 3 >= x.length) {
            return Double.NaN;
        }
        double steep = (y[k + 1] - y[k]) / (x[k + 1] - x[k]);
        double flat = (y[k + 3] - y[k + 2]) / (x[k + 3] - x[k + 2]);
        return (y[k + 2] - flat * x[k + 2] - y[k + 1] + steep * x[k + 1]) / (steep - flat);
    }

    /** Where the chord through nodes i, j crosses that through k, l, and how high above the highest node. */
    private double[] crossing(int i, int j, int k, int l) {
        if (i < 0 || l >= x.length) {
            return new double[] {Double.NaN, Double.NaN};
        }
        double uj = Math.expm1(x[j]);
        double uk = Math.expm1(x[k]);
        double rise = (drop(i) - drop(j)) / (uj - Math.expm1(x[i]));
        double fall = (drop(l) - drop(k)) / (Math.expm1(x[l]) - uk);
        double s = (drop(j) - drop(k) + fall * (uk - uj)) / (rise + fall);
        return new double[] {Math.log1p(uj + s), rise * s - drop(j)};
    }
}
