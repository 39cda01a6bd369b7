package org.minorant.core.pair;

import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/**
 * The value of one spin block, or of a product of spin blocks: by one eigendecomposition if the answer is not much smaller than the traces, else by rotations.
 *
 * @param dimension the dimension of the block
 * @param most an upper end of the block's share, by its traces
 * @param allowance a width of the share that cannot be seen in the sum
 * @param tolerance the relative width asked for
 */
record SpinBlockValue(int dimension, WideDouble most, WideDouble allowance, double tolerance) {

    /** log2 of the heaviest weight; its square and the products of a few such weights stay in range. */
    private static final long TOP = 450;

    /** The relative error of a weight is below 4n · 2^-102, n at most 2^27 or so. */
    private static final double ROUNDING = 0x1p-70;

    /** Eigendecompositions are usually closer by so many binary digits than what is expected of them, and a block's answer is no smaller beside its traces where it matters. */
    private static final int USUAL = 3;

    /** A block this narrow needs no rotations. */
    private static final double ENOUGH = 0x1p-45;

    /**
     * The share of the block in the sum.
     *
     * @param a the columns of A
     * @param b the columns of B
     * @param window overlaps of the columns
     * @param proven whether to enclose; otherwise the ends are those of an estimate
     * @param stop passed many times a second
     */
    Enclosure of(BlockColumns a, BlockColumns b, SpinOverlaps.Window window, boolean proven, Runnable stop) {
        // one unit for both operators; the heavier one's first column is near the top of what squares without overflow
        long shift = Math.max(a.weights()[0].exponent(), b.weights()[0].exponent()) - TOP;
        ColumnWeights x = new ColumnWeights(a, shift);
        ColumnWeights y = new ColumnWeights(b, shift);
        if (x.held() == 0 || y.held() == 0) {
            return Enclosure.of(WideDouble.ZERO, most);
        }
        WideDouble leftOut = WideDouble.of(x.leftOut()).plusUp(WideDouble.of(y.leftOut()));
        Enclosure shallow = Enclosure.of(WideDouble.ZERO, most);
        boolean fits = DenseBlock.fits(dimension, x, y);
        if (fits) {
            shallow = share(DenseBlock.enclose(x, y, window, stop), leftOut, shift);
        } else if (isWorthTrying(x, y, shift)) {
            shallow = share(SpanBlock.enclose(SpinBlock.columns(x, y, window), stop), leftOut, shift);
        }
        WideDouble width = shallow.upperWide().plusUp(shallow.lowerWide().negate());
        if (width.compareTo(allowance) <= 0 || shallow.relativeWidth() <= Math.max(ENOUGH, tolerance / 4)) {
            return shallow;
        }
        Enclosure rotated = share(byRotations(SpinBlock.columns(x, y, window), proven, stop), leftOut, shift);
        if (proven) {
            return shallow.intersect(rotated);
        }
        return rotated.relativeWidth() <= shallow.relativeWidth() ? rotated : shallow;
    }

    /** Whether one eigendecomposition may be enough, by the width that is usual for it. */
    private boolean isWorthTrying(ColumnWeights x, ColumnWeights y, long shift) {
        int columns = x.held() + y.held();
        double traces = x.trace(x.held()).hi() + y.trace(y.held()).hi();
        WideDouble width =
                WideDouble.of(WholeBlock.widthInDouble(columns, traces)).timesPowerOfTwo(shift);
        WideDouble shareOfMost = most.timesDown(WideDouble.of(tolerance)).timesPowerOfTwo(-USUAL - 2);
        return width.compareTo(allowance.timesPowerOfTwo(USUAL).max(shareOfMost)) <= 0;
    }

    private static Enclosure byRotations(ColumnPair columns, boolean proven, Runnable stop) {
        return proven ? columns.enclose(1, 1, stop) : columns.estimate(1, 1, stop);
    }

    private Enclosure share(Enclosure unit, WideDouble leftOut, long shift) {
        return BlockShare.of(unit, ROUNDING, leftOut, shift, most);
    }
}
