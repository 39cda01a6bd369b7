package org.minorant.core;

/**
 * A complex number re + i·im, as a value.
 *
 * @param re the real part
 * @param im the imaginary part
 */
public record Complex(double re, double im) {

    /**
     * Returns |z|, without undue overflow or underflow.
     *
     * @return the modulus
     */
    public double modulus() {
        return Math.hypot(re, im);
    }
}
