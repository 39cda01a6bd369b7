package org.minorant.core;

/**
 * What an error of the columns of a factor does to the operator.
 *
 * <p><b>Argument.</b> For every τ &gt; 0, (X+E)(X+E)* ≤ (1+τ)XX* + (1+1/τ)EE*, and with X and X+E exchanged and −E for E the same holds the other
 * way round. So XX* is in the sandwich of X+E with relative error τ and trace error (1+1/τ)‖E‖²_F: the error of the columns enters
 * squared, 2^-100 in the columns is 2^-150 in the trace.
 */
final class FactorRounding {

    /** τ: below the accuracy of a double, so that nobody sees it. */
    private static final double RELATIVE = 0x1p-52;

    private FactorRounding() {}

    /** A factor whose columns have an error of Frobenius norm at most the given one. */
    static PositiveFactor absolute(EnclosedMatrix columns, double frobenius) {
        if (frobenius == 0) {
            return new PositiveFactor(columns.midpoint(), 0, 0);
        }
        double trace = (1 + 1 / RELATIVE) * frobenius * frobenius * (1 + 0x1p-48) + Double.MIN_VALUE;
        return new PositiveFactor(columns.midpoint(), RELATIVE, trace);
    }

    /** A factor whose entries have a relative error in modulus of at most the given one, or 2^-1070 where they underflow. */
    static PositiveFactor entrywise(EnclosedMatrix columns, double relative) {
        double size = columns.rows() * (double) columns.columns();
        return absolute(columns, columns.frobeniusUpper() * relative * (1 + 0x1p-48) + Math.sqrt(size) * 0x1p-1069);
    }

    /** A factor whose entries are known up to their radii. */
    static PositiveFactor ofRadii(EnclosedMatrix columns) {
        return absolute(columns, columns.minus(columns.midpoint()).frobeniusUpper());
    }
}
