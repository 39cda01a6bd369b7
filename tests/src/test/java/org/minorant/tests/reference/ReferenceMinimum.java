package org.minorant.tests.reference;

import java.math.BigDecimal;
import java.math.BigInteger;

/** Tr[aA ∧ bB] = ½(a Tr A + b Tr B − ‖aA − bB‖₁), at as many digits as the depth of the answer asks for. */
public final class ReferenceMinimum {

    /** Tried in turn until twenty digits of the answer are certain; the last is for answers that are zero, or as good as. */
    private static final int[] LADDER = {256, 768, 1408, 2432};

    private ReferenceMinimum() {}

    /**
     * Computes Tr[aA ∧ bB].
     *
     * @param a weight on A, at least 0
     * @param first A
     * @param b weight on B, at least 0
     * @param second B
     * @return the value; its error is at most 1e-20 of it, or 2^-2300 of the larger weighted trace
     */
    public static Reference of(BigDecimal a, ReferenceOperator first, BigDecimal b, ReferenceOperator second) {
        if (a.signum() == 0 || b.signum() == 0) {
            return new Reference(BigDecimal.ZERO, BigDecimal.ZERO);
        }
        Reference found = at(LADDER[0], a, first, b, second);
        for (int i = 1; i < LADDER.length && !found.isSharp(); i++) {
            found = at(LADDER[i], a, first, b, second);
        }
        return found;
    }

    /** The same at a chosen number of bits. */
    static Reference at(int bits, BigDecimal a, ReferenceOperator first, BigDecimal b, ReferenceOperator second) {
        FixedPoint numbers = new FixedPoint(bits);
        int ea = exponentOf(a);
        int eb = exponentOf(b);
        int scale = Math.max(ea + first.exponent(), eb + second.exponent()) + logTwo(first.dimension());
        FixedMatrix x = first.at(numbers).times(numbers.of(a, ea), scale - ea - first.exponent());
        FixedMatrix y = second.at(numbers).times(numbers.of(b, eb), scale - eb - second.exponent());
        BigInteger sum = x.trace().add(y.trace());
        for (BigInteger value : FixedSpectrum.values(x.minus(y))) {
            sum = sum.subtract(value.abs());
        }
        // each eigenvalue, and each of the two matrices in norm, is good to 2^(GUARD − bits)
        BigInteger error = BigInteger.valueOf(3L * x.n).shiftLeft(FixedSpectrum.GUARD);
        return new Reference(numbers.toDecimal(sum, scale - 1), numbers.toDecimal(error, scale - 1));
    }

    /** An e with 2^(e−2) ≤ value ≤ 2^e, or nearly: the weight is divided by it so that it keeps its digits. */
    private static int exponentOf(BigDecimal value) {
        BigInteger whole = value.toBigInteger();
        if (whole.signum() > 0) {
            return whole.bitLength();
        }
        BigInteger inverse =
                BigDecimal.ONE.divide(value, new java.math.MathContext(20)).toBigInteger();
        return 2 - inverse.bitLength();
    }

    private static int logTwo(int count) {
        return 32 - Integer.numberOfLeadingZeros(count);
    }
}
