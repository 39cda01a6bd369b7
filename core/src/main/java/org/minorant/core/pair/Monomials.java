package org.minorant.core.pair;

import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/** Monomials ∏ a_m^{w_m} of an operator's eigenvalues, from tables of powers; relative error at most (n + d) 2^-102. */
final class Monomials {

    private final WideDoubleDouble[][] power;

    /**
     * A monomial in units of a power of two.
     *
     * @param value the monomial
     * @param root its square root
     */
    record Column(DoubleDouble value, DoubleDouble root) {}

    Monomials(WideDoubleDouble[] values, int n) {
        power = new WideDoubleDouble[values.length][n + 1];
        for (int m = 0; m < values.length; m++) {
            power[m][0] = WideDoubleDouble.ONE;
            for (int e = 1; e <= n; e++) {
                power[m][e] = power[m][e - 1].times(values[m]);
            }
        }
    }

    WideDoubleDouble at(int[] exponents) {
        WideDoubleDouble p = WideDoubleDouble.ONE;
        for (int m = 0; m < exponents.length; m++) {
            p = p.times(power[m][exponents[m]]);
        }
        return p;
    }

    /** A monomial and its root in units of 2^unit and of its root; below 2^-1000 it counts as zero. */
    Column column(int[] exponents, long unit) {
        DoubleDouble v = at(exponents).toDoubleDouble(unit);
        return new Column(v, v.sqrt());
    }
}
