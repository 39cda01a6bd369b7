package org.minorant.core.curve;

import org.minorant.core.WideDouble;

/**
 * A line above a function on an interval, known by its values at the two ends, each rounded up.
 *
 * @param left the value at the left end
 * @param right the value at the right end
 */
public record LineBound(WideDouble left, WideDouble right) {

    /** The largest value on the interval. */
    WideDouble most() {
        return left.max(right);
    }

    private boolean rises() {
        return left.compareTo(right) < 0;
    }

    /**
     * An upper end of the largest value that the smaller of two lines takes on the interval.
     *
     * <p>The smaller of two lines lies below each of their convex combinations. Where one rises and the other falls, the combination
     * that is nearly level is taken; any weight is right, the level one is the best.
     */
    WideDouble mostWith(LineBound other) {
        WideDouble alone = most().min(other.most());
        if (rises() == other.rises()) {
            return alone;
        }
        LineBound up = rises() ? this : other;
        LineBound down = rises() ? other : this;
        WideDouble rise = up.right.plusUp(up.left.negate());
        WideDouble fall = down.left.plusUp(down.right.negate());
        WideDouble sum = rise.plusUp(fall);
        if (sum.signum() <= 0 || sum.isInfinite()) {
            return alone;
        }
        double share = Math.min(1, fall.dividedByUp(sum).toDoubleUp());
        WideDouble l = combination(share, up.left, down.left);
        WideDouble r = combination(share, up.right, down.right);
        return alone.min(l.max(r));
    }

    /** An upper end of ax + (1−a)y. */
    private static WideDouble combination(double a, WideDouble x, WideDouble y) {
        // 1 − a is rounded: the exact weight lies between the neighbours of the rounded one
        double b = y.signum() < 0 ? Math.nextDown(1 - a) : Math.nextUp(1 - a);
        return WideDouble.of(a).timesUp(x).plusUp(WideDouble.of(b).timesUp(y));
    }

    /**
     * Returns an upper end of the value at a point of the interval.
     *
     * @param from the left end of the interval
     * @param x the point
     * @param to the right end
     * @return a number not below the line at x
     */
    public WideDouble at(double from, double x, double to) {
        WideDouble whole = WideDouble.of(to).plusUp(WideDouble.of(-from));
        double share =
                WideDouble.of(x).plusUp(WideDouble.of(-from)).dividedByUp(whole).toDoubleUp();
        double slack = 0x1p-50;
        // the share is exact within 2^-50; the line is between its values at shares a little to either side
        WideDouble a = combination(Math.min(1, share + slack), right, left);
        WideDouble b = combination(Math.max(0, share - slack), right, left);
        return a.max(b);
    }

    /** Where on the interval, from 0 to 1, this line meets another, one of them rising; ½ if it cannot be told. */
    double meets(LineBound other) {
        WideDouble atLeft = left.plusUp(other.left.negate());
        WideDouble atRight = other.right.plusUp(right.negate());
        WideDouble sum = atLeft.plusUp(atRight);
        if (sum.signum() == 0 || sum.isInfinite()) {
            return 0.5;
        }
        double x = atLeft.dividedByUp(sum).toDoubleUp();
        return x > 0 && x < 1 ? x : 0.5;
    }
}
