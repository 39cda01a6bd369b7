package org.minorant.core;

/**
 * An operator that was brought into its class, with what that took.
 *
 * @param <T> the class of the result
 * @param operator the result
 * @param hermitianDefect ‖A − A*‖/2 in Hilbert–Schmidt norm: how far the given operator was from Hermitian
 * @param negativePart Tr A₋: the sum of the moduli of the negative eigenvalues of its Hermitian part; 0 where positivity was not asked for
 * @param traceBefore the trace of its Hermitian part
 * @param distance the Hilbert–Schmidt distance of the result's entries from the given ones
 */
public record Repaired<T extends HermitianOperator>(
        T operator, double hermitianDefect, double negativePart, double traceBefore, double distance) {}
